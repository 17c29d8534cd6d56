//! The bank at the end of a cut, at the end of its life, on its coldest day: what a motor's start meets.

use crate::sizing::Sheet;
use crate::sizing::assumptions::Assumptions;
use crate::sizing::sheet::{Checked, Rule};
use crate::sizing::tables::chemistries::Properties;
use crate::units::{AmpHours, DcVolts, Ohms};

const RESISTANCE: Rule = Rule {
    symbol: "R_aged",
    name: "Resistance of the aged bank at the end of the cut",
    formula: "R_aged = n · r / C_20 × (1 + (m − 1) · DoD_aged / 0.8) × ageing_R",
    unit: "Ω",
    source: "makers' data sheets and handbooks; rise at low charge and with age",
    checked: Checked::FromMemory,
};

const OPEN_CIRCUIT: Rule = Rule {
    symbol: "V_end",
    name: "Open-circuit volts at the end of the cut, bank aged and cold",
    formula: "V_end = n · V_oc(1 − DoD_aged), DoD_aged = min(1, DoD × ageing × f_temperature)",
    unit: "V",
    source: "open-circuit table of the kind of battery",
    checked: Checked::FromMemory,
};

/// What a cut leaves.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct EndOfCut {
    /// Depth in the last year on the coldest day.
    depth: f64,
    cells: f64,
}

impl EndOfCut {
    /// From the depth of the new bank at 25 °C and the cells in a string.
    pub fn new(depth: f64, cold: f64, assumptions: &Assumptions, cells: u32) -> Self {
        Self { depth: (depth * assumptions.ageing_factor * cold).min(1.0), cells: f64::from(cells) }
    }

    /// Resistance of the whole bank; `capacity` is its Ah at the 20 h rate, so parallel strings are in it.
    pub fn resistance(
        &self,
        kind: &Properties,
        capacity: AmpHours,
        assumptions: &Assumptions,
        sheet: &mut Sheet,
    ) -> Ohms {
        let age = assumptions.aged_resistance_multiple;
        let resistance = kind.resistance_at(1.0 - self.depth, capacity) * (self.cells * age);
        let values = [
            ("n", self.cells, ""),
            ("r", kind.resistance_at_1_ah.0, "Ω·Ah"),
            ("C_20", capacity.0, "Ah"),
            ("m", kind.resistance_multiple_nearly_empty, ""),
            ("DoD_aged", self.depth, ""),
            ("ageing_R", age, ""),
        ];
        Ohms(sheet.line("bank.aged_resistance_ohm", &RESISTANCE, &values, resistance.0))
    }

    /// Open-circuit volts of the string.
    pub fn open_circuit(&self, kind: &Properties, sheet: &mut Sheet) -> DcVolts {
        let cell = kind.open_circuit_at(1.0 - self.depth);
        let values = [("n", self.cells, ""), ("DoD_aged", self.depth, ""), ("V_oc", cell.0, "V")];
        DcVolts(sheet.line("bank.end_open_circuit_v", &OPEN_CIRCUIT, &values, (cell * self.cells).0))
    }
}
