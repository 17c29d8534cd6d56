//! How much larger a bank must be for its coldest day: factor on the 25 °C capacity.
//!
//! Lead-acid: IEEE 485, temperature correction for 25 °C, electrolyte temperature in °C and factor.
//! Source: 4.4 °C and above in a published 25 °C chart; the three coldest rows (from memory).
//! Makers differ: one sheet's 90 % at 10 °C means 1.11 where the standard says 1.19; the standard's
//! is kept. Warmth earns a size no credit: what it adds in capacity it costs in life. It is told only
//! where the hours of a warm bank are told.

use super::between;
use crate::sizing::survey::Chemistry;
use crate::units::Celsius;

/// IEEE 485: °C (falling) and factor.
const LEAD_ACID: &[(f64, f64)] = &[
    (25.0, 1.000),
    (24.4, 1.006),
    (23.9, 1.011),
    (23.3, 1.017),
    (22.8, 1.023),
    (22.2, 1.029),
    (21.7, 1.034),
    (21.1, 1.040),
    (20.6, 1.048),
    (20.0, 1.056),
    (19.4, 1.064),
    (18.9, 1.072),
    (18.3, 1.080),
    (15.6, 1.110),
    (12.8, 1.150),
    (10.0, 1.190),
    (7.2, 1.250),
    (4.4, 1.300),
    (1.7, 1.350),
    (-1.1, 1.430),
    (-3.9, 1.520),
];

/// Lithium iron phosphate: °C (falling) and share of the 25 °C capacity.
///
/// Source: samples in a vendor's article, 80 % at 0 °C; −10 and −20 °C (from memory) between that
/// article's 66 and 44 to 55 % and what better cells give. Uncertain.
const LFP: &[(f64, f64)] = &[(25.0, 1.00), (0.0, 0.80), (-10.0, 0.70), (-20.0, 0.55)];

/// Factor on the size of a bank whose coldest temperature is given; never below one.
///
/// Below the table the coldest row holds: see [`rows`].
pub fn size_factor(chemistry: Chemistry, coldest: Celsius) -> f64 {
    if chemistry.is_lead_acid() { between(LEAD_ACID, coldest.0) } else { 1.0 / between(LFP, coldest.0) }
}

/// IEEE 485: °C (falling) and factor, above the base. Source: read in the same published chart.
const LEAD_ACID_WARM: &[(f64, f64)] = &[
    (48.9, 0.860),
    (43.3, 0.880),
    (37.8, 0.910),
    (35.0, 0.930),
    (32.2, 0.940),
    (30.0, 0.956),
    (27.8, 0.972),
    (25.0, 1.000),
];

/// Capacity at a temperature over that at 25 °C; above one in a warm lead-acid bank.
pub fn capacity_share(chemistry: Chemistry, at: Celsius) -> f64 {
    if chemistry.is_lead_acid() && at.0 > 25.0 {
        1.0 / between(LEAD_ACID_WARM, at.0)
    } else {
        1.0 / size_factor(chemistry, at)
    }
}

/// The coldest and the warmest temperature of the table.
pub fn rows(chemistry: Chemistry) -> (Celsius, Celsius) {
    let table = if chemistry.is_lead_acid() { LEAD_ACID } else { LFP };
    let celsius = |row: Option<&(f64, f64)>| Celsius(row.expect("a table has rows").0);
    (celsius(table.last()), celsius(table.first()))
}

#[cfg(test)]
mod tests {
    use super::*;
    use proptest::prelude::*;

    #[test]
    fn lead_acid_factors_are_those_of_ieee_485() {
        let cases = [(25.0, 1.0), (20.0, 1.056), (10.0, 1.19), (4.4, 1.30), (1.7, 1.35), (-3.9, 1.52)];
        for (celsius, factor) in cases {
            assert_eq!(size_factor(Chemistry::VrlaAgm, Celsius(celsius)), factor, "{celsius} °C");
        }
        let between_rows = size_factor(Chemistry::FloodedTubular, Celsius(14.2));
        assert!((between_rows - 1.13).abs() < 1e-12, "half way between 12.8 and 15.6 °C: {between_rows}");
    }

    #[test]
    fn warmth_earns_no_credit() {
        for chemistry in Chemistry::ALL {
            assert_eq!(size_factor(chemistry, Celsius(40.0)), 1.0);
        }
    }

    #[test]
    fn lithium_at_freezing_gives_four_fifths() {
        assert!((size_factor(Chemistry::Lfp, Celsius(0.0)) - 1.25).abs() < 1e-12);
        assert!((size_factor(Chemistry::Lfp, Celsius(-20.0)) - 1.0 / 0.55).abs() < 1e-12);
    }

    proptest! {
        #[test]
        fn a_colder_battery_is_never_smaller(one in -40.0..60.0, other in -40.0..60.0, kind in 0_usize..5) {
            let (cold, warm) = if one < other { (one, other) } else { (other, one) };
            let chemistry = Chemistry::ALL[kind];
            prop_assert!(size_factor(chemistry, Celsius(cold)) >= size_factor(chemistry, Celsius(warm)));
        }
    }
}
