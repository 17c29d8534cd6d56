//! The section method: what rating carries a changing current to its end.
//!
//! Each section ends at one moment of the cut. Up to there every change of current needs
//! `ΔA · K(t)`, `t` running from the change to the end of the section; a fall gives some of it
//! back. The largest section rules. A load that falls is ruled by an early section, one that rises
//! by the last.
//!
//! Currents that last seconds (a motor's start) are no steps here: the volts they cost are checked
//! with the starts.
//!
//! Source (from memory): IEEE 485, cell sizing by the modified Hoxie method; formula and its
//! meaning read in articles that reproduce it.

use super::duty_cycle::Cut;
use super::peukert::Curve;
use crate::units::{AmpHours, Amps, Hours};

/// `F_S = Σ_p (A_p − A_(p−1)) · K(t_pS)` of the section that ends with the last of these steps.
pub fn section(steps: &[(Amps, Hours)], curve: &Curve) -> AmpHours {
    let mut left: Hours = steps.iter().map(|step| step.1).sum();
    let mut before = Amps::ZERO;
    let mut size = 0.0;
    for &(current, hours) in steps {
        if current != before {
            size += (current - before).0 * curve.hour_rate_factor(left.max(Hours::ZERO));
        }
        before = current;
        left = left - hours;
    }
    AmpHours(size)
}

/// Uncorrected size: the largest section of a cut.
///
/// All are computed, also those that end before a rise: so a heavier load can never skip one.
pub fn largest_section(cut: &Cut, curve: &Curve) -> AmpHours {
    let steps = cut.as_slice();
    (1..=steps.len()).map(|end| section(&steps[..end], curve)).fold(AmpHours::ZERO, AmpHours::max)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::survey::BatteryRating;
    use proptest::prelude::*;

    /// Capacity at the 20 h rate of the simulated valve-regulated cell.
    const C20: f64 = 21.6202;

    /// Its own ratings at 0.05, 0.2, 0.5 and 1 times that capacity: hours and Ah down to 1.75 V.
    ///
    /// Source: PyBaMM 26.10.1.1, full lead-acid model with the parameter set Sulzer2019, 294.85 K.
    fn simulated() -> Curve {
        let rows = [(20.0, 21.6202), (4.6995, 20.3209), (1.7305, 18.7074), (0.7757, 16.7701)];
        let ratings = rows.map(|(hours, capacity)| BatteryRating { hours: Hours(hours), capacity: AmpHours(capacity) });
        let (curve, finding) = Curve::new(&ratings, 1.12, Hours(5.0));
        assert_eq!(finding, None);
        curve
    }

    fn plain(k: f64) -> Curve {
        Curve::new(&[], k, Hours(1.0)).0
    }

    fn cut(steps: &[(f64, f64)]) -> Cut {
        Cut::new(steps.iter().map(|&(current, hours)| (Amps(current), Hours(hours))).collect())
    }

    #[test]
    fn steady_currents_last_as_long_as_the_simulated_cell() {
        // A, h. Source: PyBaMM 26.10.1.1, full lead-acid model, Sulzer2019, 294.85 K: other rows than the ratings.
        let rows = [
            (1.7, 12.5291),
            (2.1620, 9.7565),
            (3.4, 6.0657),
            (5.1, 3.9390),
            (6.4861, 3.0387),
            (8.5, 2.2607),
            (16.2151, 1.0898),
            (17.0, 1.0314),
        ];
        let curve = simulated();
        for (current, hours) in rows {
            let runtime = curve.runtime(AmpHours(C20), Amps(current));
            assert!((runtime.0 / hours - 1.0).abs() < 0.02, "{current} A: {runtime:?} against {hours} h");
            let size = largest_section(&cut(&[(current, hours)]), &curve);
            assert!((size.0 / C20 - 1.0).abs() < 0.02, "{current} A: {size:?}");
        }
    }

    #[test]
    fn stepped_loads_want_the_simulated_cell() {
        // Currents over C20 and hours, and the scale at which the simulated cell just survives. Source: PyBaMM
        // 26.10.1.1, as above. Loads with a late short peak end on volts, which no method of charge sees: not here.
        let steps = [(0.10, 1.0), (0.25, 0.5), (0.05, 1.0), (0.30, 0.25), (0.12, 1.0), (0.20, 1.25)];
        let high_first = [(0.40, 1.0), (0.10, 4.0)];
        let evening = [(0.03, 4.0), (0.15, 3.0), (0.05, 3.0), (0.10, 2.0)];
        let profiles =
            [("steps", &steps[..], 0.9235), ("high first", &high_first, 0.9669), ("evening", &evening, 0.9733)];
        for (name, profile, scale) in profiles {
            let charge: f64 = profile.iter().map(|(current, hours)| current * hours).sum();
            let steps: Vec<_> = profile.iter().map(|&(i, hours)| (i / charge * scale * C20, hours)).collect();
            let size = largest_section(&cut(&steps), &simulated());
            assert!((size.0 / C20 - 1.0).abs() < 0.02, "{name}: {size:?}");
        }
    }

    #[test]
    fn one_period_is_current_times_hour_rate_factor() {
        let curve = plain(1.2);
        let size = largest_section(&cut(&[(10.0, 3.0)]), &curve);
        assert!((size.0 - 10.0 * curve.hour_rate_factor(Hours(3.0))).abs() < 1e-12);
    }

    #[test]
    fn three_periods_are_worked_by_hand() {
        // Exponent 1.25, K(t) = 20·(t/20)^0.8: K(0.5) = 1.0456, K(1) = 1.8206, K(1.5) = 2.5182, K(2) = 3.1698, K(3) = 4.3844.
        // 40 A 1 h, 10 A 1.5 h, 25 A 0.5 h: sections 72.82; 40·K(2.5) − 30·K(1.5); 40·K(3) − 30·K(2) + 15·K(0.5) = 95.97.
        let size = largest_section(&cut(&[(40.0, 1.0), (10.0, 1.5), (25.0, 0.5)]), &plain(1.25));
        assert!((size.0 - 95.97).abs() < 0.02, "{size:?}");
    }

    #[test]
    fn rising_steps_end_in_the_last_section_and_a_fall_may_be_ruled_by_an_early_one() {
        let curve = plain(1.3);
        let rising = cut(&[(5.0, 1.0), (10.0, 1.0), (20.0, 1.0)]);
        assert_eq!(largest_section(&rising, &curve), section(rising.as_slice(), &curve));
        let falling = cut(&[(100.0, 0.5), (0.5, 0.5)]);
        assert_eq!(largest_section(&falling, &curve), section(&falling.as_slice()[..1], &curve));
    }

    #[test]
    fn an_exponent_of_one_is_plain_ampere_hours() {
        let load = cut(&[(5.0, 1.0), (40.0, 0.5), (12.0, 2.0)]);
        assert!((largest_section(&load, &plain(1.0)).0 - load.charge().0).abs() < 1e-9);
    }

    proptest! {
        #[test]
        fn scaling_all_currents_scales_the_size(
            steps in prop::collection::vec((0.0..100.0, 0.05..4.0), 1..8), k in 1.0..1.5, factor in 0.1..10.0_f64,
        ) {
            let scaled: Vec<_> = steps.iter().map(|&(current, hours)| (current * factor, hours)).collect();
            let (one, other) = (largest_section(&cut(&steps), &plain(k)), largest_section(&cut(&scaled), &plain(k)));
            prop_assert!((other.0 - one.0 * factor).abs() <= 1e-9 * (1.0 + other.0));
        }

        #[test]
        fn a_tail_without_current_never_raises_the_size_within_the_ratings(
            steps in prop::collection::vec((0.0..100.0, 0.05..1.5), 1..8), k in 1.0..1.5, tail in 0.01..8.0,
        ) {
            let mut longer = steps.clone();
            longer.push((0.0, tail));
            let (one, other) = (largest_section(&cut(&steps), &plain(k)), largest_section(&cut(&longer), &plain(k)));
            prop_assert!(other.0 <= one.0 * (1.0 + 1e-9) + 1e-9);
        }

        #[test]
        fn the_size_is_at_least_that_of_the_first_period(
            steps in prop::collection::vec((0.0..100.0, 0.05..4.0), 1..8), k in 1.0..1.5,
        ) {
            let first = steps[0].0 * plain(k).hour_rate_factor(Hours(steps[0].1));
            prop_assert!(largest_section(&cut(&steps), &plain(k)).0 >= first * (1.0 - 1e-12));
        }

        #[test]
        fn cutting_a_period_in_two_changes_no_section_that_ends_with_it(current in 0.1..100.0, hours in 0.1..8.0, share in 0.01..0.99) {
            let curve = plain(1.2);
            let whole = section(&[(Amps(current), Hours(hours))], &curve);
            let halves = [(Amps(current), Hours(hours * share)), (Amps(current), Hours(hours * (1.0 - share)))];
            prop_assert!((section(&halves, &curve).0 / whole.0 - 1.0).abs() < 1e-9);
        }
    }
}
