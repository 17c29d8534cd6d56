//! The volts that the charger is set to, for the whole string.

use crate::sizing::Sheet;
use crate::sizing::assumptions::Assumptions;
use crate::sizing::sheet::{Checked, Rule};
use crate::sizing::survey::Site;
use crate::units::{Celsius, DcVolts};

/// The temperature at which set volts are given.
const BASE: Celsius = Celsius(25.0);

/// Set volts of a string.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SetVolts {
    /// While the current falls, at 25 °C.
    pub absorption: DcVolts,
    /// Once full, at 25 °C.
    pub float: DcVolts,
    /// Change of both per kelvin above 25 °C, in V.
    pub per_kelvin: f64,
    /// Absorption on the coldest day.
    pub coldest: DcVolts,
    /// Absorption on the hottest day.
    pub hottest: DcVolts,
}

const fn rule(symbol: &'static str, name: &'static str, formula: &'static str, unit: &'static str) -> Rule {
    let source = "makers' data sheets and manuals; they differ between -3 and -5 mV per kelvin and cell";
    Rule { symbol, name, formula, unit, source, checked: Checked::Read }
}

const ABSORPTION: Rule = rule("V_abs", "Absorption volts of the string at 25 °C", "V_abs = n · v_abs", "V");
const FLOAT: Rule = rule("V_float", "Float volts of the string at 25 °C", "V_float = n · v_float", "V");
const PER_KELVIN: Rule =
    rule("c_T", "Change of the set volts per kelvin above 25 °C", "c_T = n · c_cell / 1000", "V/K");
const COLDEST: Rule =
    rule("V_abs,cold", "Absorption volts on the coldest day", "V_abs,cold = V_abs + c_T · (T − 25 °C)", "V");
const HOTTEST: Rule =
    rule("V_abs,hot", "Absorption volts on the hottest day", "V_abs,hot = V_abs + c_T · (T − 25 °C)", "V");

impl SetVolts {
    /// From the volts per cell in force and the site's coldest and hottest day.
    pub fn of(cells: u32, site: &Site, assumptions: &Assumptions) -> Self {
        let n = f64::from(cells);
        let absorption = DcVolts(n * assumptions.absorption_v_per_cell);
        let float = DcVolts(n * assumptions.float_v_per_cell);
        let per_kelvin = n * assumptions.compensation_mv_per_k / 1000.0;
        let at = |celsius: Celsius| absorption + DcVolts(per_kelvin * (celsius - BASE).0);
        Self { absorption, float, per_kelvin, coldest: at(site.battery_coldest), hottest: at(site.battery_hottest) }
    }

    /// Writes all five down.
    pub fn write_down(&self, cells: u32, site: &Site, assumptions: &Assumptions, sheet: &mut Sheet) {
        let n = ("n", f64::from(cells), "");
        let volts = |symbol, value| [n, (symbol, value, "V")];
        sheet.line(
            "charger.absorption_v",
            &ABSORPTION,
            &volts("v_abs", assumptions.absorption_v_per_cell),
            self.absorption.0,
        );
        sheet.line("charger.float_v", &FLOAT, &volts("v_float", assumptions.float_v_per_cell), self.float.0);
        let per_cell = [n, ("c_cell", assumptions.compensation_mv_per_k, "mV/K")];
        sheet.line("charger.compensation_v_per_k", &PER_KELVIN, &per_cell, self.per_kelvin);
        let at = |celsius: Celsius| {
            [("V_abs", self.absorption.0, "V"), ("c_T", self.per_kelvin, "V/K"), ("T", celsius.0, "°C")]
        };
        sheet.line("charger.absorption_coldest_v", &COLDEST, &at(site.battery_coldest), self.coldest.0);
        sheet.line("charger.absorption_hottest_v", &HOTTEST, &at(site.battery_hottest), self.hottest.0);
    }
}
