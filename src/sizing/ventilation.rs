//! Air for a bank that gasses: flow, openings, and how far a spark must stay away.
//!
//! Lead-acid gives off hydrogen while it is boosted. Lithium iron phosphate gives off none in
//! normal use and the standard does not cover it; its room still needs to be kept cool.

use super::battery_bank::peukert::Curve;
use super::design::{Bank, Ventilation};
use super::finding::Finding;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::Survey;
use super::tables::chemistries::properties;
use crate::units::{AmpHours, CubicMetresPerHour, Hours, Millimetres, SquareCentimetres};

/// m³/h per cell, mA/Ah and Ah: hydrogen of 0.42·10⁻³ m³/Ah thinned 24 times, with a safety of 5.
const FLOW: f64 = 0.05e-3;

/// cm² of each opening per m³/h, at an air speed of 0.1 m/s.
const OPENING_PER_FLOW: f64 = 28.0;

/// mm at one mA/Ah and one Ah.
const DISTANCE: f64 = 28.8;

/// Above the cells the gas may catch fire this far up whatever the ventilation.
const LEAST_DISTANCE: Millimetres = Millimetres(100.0);

const AIRFLOW: Rule = Rule {
    symbol: "Q",
    name: "Flow of fresh air while charging",
    formula: "Q = 0.05 · n · I_gas · C_10 · 10⁻³",
    unit: "m³/h",
    source: "EN IEC 62485-2, formula and constants; boost gassing current from memory",
    checked: Checked::FromMemory,
};

const OPENING: Rule = Rule {
    symbol: "A",
    name: "Free area of each of two openings",
    formula: "A = 28 · Q",
    unit: "cm²",
    source: "EN IEC 62485-2, at an air speed of 0.1 m/s",
    checked: Checked::Read,
};

const SAFE_DISTANCE: Rule = Rule {
    symbol: "d",
    name: "No spark nearer to a vent",
    formula: "d = 28.8 · ∛I_gas · ∛C_10, never below 100 mm",
    unit: "mm",
    source: "EN IEC 62485-2; the least distance from a maker's note",
    checked: Checked::FromMemory,
};

/// Air for a bank.
///
/// The boost value of the gassing current is taken: a unit that recharges after every cut boosts
/// far more often than once a month, for which alone the float value holds.
pub fn ventilation(survey: &Survey, bank: &Bank, sheet: &mut Sheet) -> Ventilation {
    let kind = properties(survey.choice.chemistry);
    let gas = kind.gassing.map_or(0.0, |gassing| gassing.boost);
    let cells = f64::from(kind.cells_per_block * bank.blocks_in_series);
    let capacity = bank.installed * Curve::of_bank(survey, bank).share_at(Hours(10.0));
    let airflow = airflow(cells, gas, capacity, sheet);
    let opening = opening(airflow, sheet);
    judge(survey, opening, sheet);
    Ventilation { airflow, opening, safe_distance: safe_distance(gas, capacity, sheet) }
}

fn airflow(cells: f64, gas: f64, capacity: AmpHours, sheet: &mut Sheet) -> CubicMetresPerHour {
    let values = [("n", cells, ""), ("I_gas", gas, "mA/Ah"), ("C_10", capacity.0, "Ah")];
    let flow = FLOW * cells * gas * capacity.0;
    CubicMetresPerHour(sheet.line("ventilation.airflow_m3_per_h", &AIRFLOW, &values, flow))
}

fn opening(flow: CubicMetresPerHour, sheet: &mut Sheet) -> SquareCentimetres {
    let area = OPENING_PER_FLOW * flow.0;
    SquareCentimetres(sheet.line("ventilation.opening_cm2", &OPENING, &[("Q", flow.0, "m³/h")], area))
}

fn safe_distance(gas: f64, capacity: AmpHours, sheet: &mut Sheet) -> Millimetres {
    let distance = Millimetres(DISTANCE * (gas * capacity.0).cbrt());
    let distance = if gas > 0.0 { distance.max(LEAST_DISTANCE) } else { Millimetres::ZERO };
    let values = [("I_gas", gas, "mA/Ah"), ("C_10", capacity.0, "Ah")];
    Millimetres(sheet.line("ventilation.safe_distance_mm", &SAFE_DISTANCE, &values, distance.0))
}

fn judge(survey: &Survey, opening: SquareCentimetres, sheet: &mut Sheet) {
    let chemistry = survey.choice.chemistry;
    if survey.site.battery_room_vented || !chemistry.is_lead_acid() {
        return;
    }
    let opening_cm2 = opening.0;
    sheet.find(if chemistry.is_flooded() {
        Finding::FloodedWithoutAir { opening_cm2 }
    } else {
        Finding::SealedWithoutAir { opening_cm2 }
    });
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::battery_bank::example::{self, bank, shop};
    use crate::sizing::survey::{BatteryRating, BusVolts, Chemistry};

    /// A bank of one string of 12 V blocks of 100 Ah at the 10 h rate.
    fn hundred(chemistry: Chemistry) -> (Survey, Bank) {
        let mut survey = shop(chemistry);
        survey.choice.bus = Some(BusVolts::V12);
        let rating = |hours, capacity| BatteryRating { hours: Hours(hours), capacity: AmpHours(capacity) };
        survey.battery_ratings = vec![rating(20.0, 108.0), rating(10.0, 100.0)];
        let bank = bank(&survey, &[(50.0, 2.0)]).0;
        assert_eq!(bank.strings, 1);
        (survey, bank)
    }

    #[test]
    fn flow_openings_and_distance_are_those_of_en_iec_62485_2() {
        let cases = [
            // kind, m³/h, cm², mm; by hand from Q = 0.05·n·I_gas·C·10⁻³, A = 28·Q, d = 28.8·∛I_gas·∛C
            (Chemistry::VrlaAgm, 0.24, 6.72, 267.3),
            (Chemistry::VrlaGel, 0.24, 6.72, 267.3),
            (Chemistry::FloodedTubular, 0.60, 16.80, 362.9),
            (Chemistry::Lfp, 0.0, 0.0, 0.0),
        ];
        for (chemistry, flow, area, distance) in cases {
            let (survey, bank) = hundred(chemistry);
            let air = ventilation(&survey, &bank, &mut Sheet::default());
            assert!((air.airflow.0 - flow).abs() < 1e-9, "{chemistry:?}: {air:?}");
            assert!((air.opening.0 - area).abs() < 1e-9, "{chemistry:?}: {air:?}");
            assert!((air.safe_distance.0 - distance).abs() < 0.1, "{chemistry:?}: {air:?}");
        }
    }

    #[test]
    fn the_flow_constant_is_hydrogen_thinned_with_a_safety_of_five() {
        let (dilution, hydrogen, safety) = (24.0, 0.42e-3, 5.0);
        assert!((dilution * hydrogen * safety - FLOW * 1000.0).abs() < 0.0005, "0.05 m³/Ah in round figures");
    }

    #[test]
    fn a_small_battery_keeps_the_least_distance() {
        let mut survey = shop(Chemistry::VrlaAgm);
        survey.outage.autonomy = Hours(0.1);
        let bank = bank(&survey, &[(0.0, 0.01)]).0;
        assert_eq!(bank.installed.0, 7.0);
        assert!(ventilation(&survey, &bank, &mut Sheet::default()).safe_distance.0 >= 100.0);
        assert_eq!(safe_distance(1.0, AmpHours(7.0), &mut Sheet::default()), LEAST_DISTANCE);
    }

    #[test]
    fn a_room_without_air_is_a_stop_for_flooded_and_a_warning_for_sealed_cells() {
        for chemistry in Chemistry::ALL {
            let (mut survey, bank) = hundred(chemistry);
            survey.site.battery_room_vented = false;
            let mut sheet = Sheet::default();
            let opening_cm2 = ventilation(&survey, &bank, &mut sheet).opening.0;
            let expected = match chemistry {
                Chemistry::Lfp => vec![],
                kind if kind.is_flooded() => vec![Finding::FloodedWithoutAir { opening_cm2 }],
                _ => vec![Finding::SealedWithoutAir { opening_cm2 }],
            };
            assert_eq!(sheet.findings, expected, "{chemistry:?}");
        }
    }

    #[test]
    fn every_figure_of_the_ventilation_stands_on_the_sheet_with_the_same_value() {
        let (survey, bank) = hundred(Chemistry::FloodedTubular);
        let mut sheet = Sheet::default();
        let air = ventilation(&survey, &bank, &mut sheet);
        example::assert_on_sheet("ventilation", &air, &sheet);
    }
}
