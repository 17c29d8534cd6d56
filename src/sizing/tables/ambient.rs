//! Correction of capacity for the air around a cable; 30 °C is the reference.
//!
//! IEC 60364-5-52 Table B.52.14, air: °C and factor. Read in three reproductions.
//! NEC Table 310.15(B)(1): upper end of each range in °C and factor; the first row holds for 10 °C and
//! below. Read in two reproductions.

use crate::sizing::survey::{Code, Insulation};
use crate::units::Celsius;

/// Rows of temperature in °C and factor, coldest first.
type Rows = &'static [(f64, f64)];

const IEC_PVC: Rows = &[
    (10.0, 1.22),
    (15.0, 1.17),
    (20.0, 1.12),
    (25.0, 1.06),
    (30.0, 1.0),
    (35.0, 0.94),
    (40.0, 0.87),
    (45.0, 0.79),
    (50.0, 0.71),
    (55.0, 0.61),
    (60.0, 0.5),
];

const IEC_XLPE: Rows = &[
    (10.0, 1.15),
    (15.0, 1.12),
    (20.0, 1.08),
    (25.0, 1.04),
    (30.0, 1.0),
    (35.0, 0.96),
    (40.0, 0.91),
    (45.0, 0.87),
    (50.0, 0.82),
    (55.0, 0.76),
    (60.0, 0.71),
    (65.0, 0.65),
    (70.0, 0.58),
    (75.0, 0.5),
    (80.0, 0.41),
];

const NEC_75: Rows = &[
    (10.0, 1.2),
    (15.0, 1.15),
    (20.0, 1.11),
    (25.0, 1.05),
    (30.0, 1.0),
    (35.0, 0.94),
    (40.0, 0.88),
    (45.0, 0.82),
    (50.0, 0.75),
    (55.0, 0.67),
    (60.0, 0.58),
    (65.0, 0.47),
    (70.0, 0.33),
];

const NEC_90: Rows = &[
    (10.0, 1.15),
    (15.0, 1.12),
    (20.0, 1.08),
    (25.0, 1.04),
    (30.0, 1.0),
    (35.0, 0.96),
    (40.0, 0.91),
    (45.0, 0.87),
    (50.0, 0.82),
    (55.0, 0.76),
    (60.0, 0.71),
    (65.0, 0.65),
    (70.0, 0.58),
    (75.0, 0.5),
    (80.0, 0.41),
    (85.0, 0.29),
];

fn rows(code: Code, insulation: Insulation) -> Rows {
    match (code, insulation) {
        (Code::Iec, Insulation::Pvc70) => IEC_PVC,
        (Code::Iec, Insulation::Xlpe90) => IEC_XLPE,
        (Code::Nec, Insulation::Pvc70) => NEC_75,
        (Code::Nec, Insulation::Xlpe90) => NEC_90,
    }
}

/// The highest temperature in the table.
pub fn highest(code: Code, insulation: Insulation) -> Celsius {
    Celsius(rows(code, insulation).last().map_or(0.0, |row| row.0))
}

/// Factor for the air around a cable.
///
/// Between two rows of the IEC the square of the factor is taken as linear, as
/// `C = √((T_max − T) / (T_max − 30))` has it, which the rows follow within 0.011. The NEC's rows are
/// ranges and are not interpolated. Below the first row and above the last the row itself holds: colder
/// air is given no more, and hotter air is a finding of whoever asks.
pub fn factor(code: Code, insulation: Insulation, air: Celsius) -> f64 {
    let rows = rows(code, insulation);
    let above = rows.partition_point(|row| row.0 < air.0).min(rows.len() - 1);
    match code {
        Code::Iec if above > 0 => between(rows[above - 1], rows[above], air.0),
        _ => rows[above].1,
    }
}

/// The square of the factor runs straight from one row to the next; past the second it stays.
fn between(cooler: (f64, f64), hotter: (f64, f64), air: f64) -> f64 {
    let share = ((air - cooler.0) / (hotter.0 - cooler.0)).clamp(0.0, 1.0);
    (cooler.1.powi(2) + share * (hotter.1.powi(2) - cooler.1.powi(2))).sqrt()
}

#[cfg(test)]
mod tests {
    use super::*;

    const ALL: [(Code, Insulation, f64); 4] = [
        (Code::Iec, Insulation::Pvc70, 70.0),
        (Code::Iec, Insulation::Xlpe90, 90.0),
        (Code::Nec, Insulation::Pvc70, 75.0),
        (Code::Nec, Insulation::Xlpe90, 90.0),
    ];

    #[test]
    fn factors_are_those_of_the_tables() {
        let cases = [
            // IEC 60364-5-52 Table B.52.14; NEC Table 310.15(B)(1), whose ranges end at the fives
            (Code::Iec, Insulation::Pvc70, 40.0, 0.87),
            (Code::Iec, Insulation::Pvc70, 60.0, 0.50),
            (Code::Iec, Insulation::Xlpe90, 45.0, 0.87),
            (Code::Iec, Insulation::Xlpe90, 80.0, 0.41),
            (Code::Nec, Insulation::Pvc70, 36.0, 0.88),
            (Code::Nec, Insulation::Pvc70, 40.0, 0.88),
            (Code::Nec, Insulation::Xlpe90, 41.0, 0.87),
            (Code::Nec, Insulation::Xlpe90, -5.0, 1.15),
        ];
        for (code, insulation, air, expected) in cases {
            let factor = factor(code, insulation, Celsius(air));
            assert!((factor - expected).abs() < 1e-12, "{code:?} {insulation:?} {air} °C: {factor}");
        }
    }

    #[test]
    fn every_iec_row_follows_the_heat_balance() {
        for (rows, limit) in [(IEC_PVC, 70.0_f64), (IEC_XLPE, 90.0)] {
            for (air, factor) in rows {
                let balance = ((limit - air) / (limit - 30.0)).sqrt();
                assert!((factor - balance).abs() <= 0.011, "{limit} °C insulation in {air} °C: {factor} {balance}");
            }
        }
    }

    #[test]
    fn hotter_air_never_carries_more_and_30_degrees_is_the_reference() {
        for (code, insulation, limit) in ALL {
            let factors: Vec<f64> =
                (-200..1000).map(|tenth| factor(code, insulation, Celsius(f64::from(tenth) / 10.0))).collect();
            assert!(factors.is_sorted_by(|cool, hot| cool >= hot && *hot > 0.0), "{code:?} {insulation:?}");
            assert_eq!(factor(code, insulation, Celsius(30.0)), 1.0);
            assert!(highest(code, insulation).0 < limit);
        }
    }
}
