//! What heat and height leave of a unit's rating.

use crate::sizing::assumptions::Assumptions;
use crate::sizing::finding::Finding;
use crate::sizing::sheet::{Checked, Rule, Sheet};
use crate::sizing::tables::altitude::altitude_share;
use crate::units::{Celsius, Fraction, Metres};

const DERATING: Rule = Rule {
    symbol: "f_derating",
    name: "What heat and height leave of the rating",
    formula: "f = (1 − a·(T − T_0)) · f_height; f_height the lower of 1 % per 100 m above 1000 m and the UPS table",
    unit: "",
    source: "rules for air-cooled drives (read); UPS altitude table of IEC 62040-3 (from memory)",
    checked: Checked::FromMemory,
};

/// The rule was given for 40 to 50 °C; above, its slope goes on down to the floor, and a finding says so.
const HOTTEST_C: f64 = 50.0;

/// What heat and height leave of the continuous rating; the surge of a second is not touched.
pub fn derating(ambient: Celsius, altitude: Metres, assumptions: &Assumptions, sheet: &mut Sheet) -> Fraction {
    if ambient.0 > HOTTEST_C {
        let (lowest, highest) = (assumptions.derating_from_c, HOTTEST_C);
        sheet.find(Finding::OutsideMethod { what: "derating by heat", given: ambient.0, lowest, highest, unit: "°C" });
    }
    let heat = 1.0 - assumptions.derating_per_k * (ambient.0 - assumptions.derating_from_c).max(0.0);
    let by_rule = 1.0 - assumptions.derating_per_100_m * ((altitude.0 - 1000.0) / 100.0).max(0.0);
    let height = by_rule.min(altitude_share(altitude, sheet));
    let share = (heat * height).clamp(assumptions.derating_least, 1.0);
    let values = [("T", ambient.0, "°C"), ("T_0", assumptions.derating_from_c, "°C"), ("f_height", height, "")];
    Fraction::new(sheet.line("inverter.derating", &DERATING, &values, share)).unwrap_or(Fraction::ONE)
}
