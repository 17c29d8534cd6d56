//! The kinetic battery: charge in two wells, one at hand and one bound, joined by a valve.
//!
//! The state is kept as the charge of both wells together and as what the well at hand holds more
//! (or less) than its share. In these two numbers the model's law for a constant current has a closed
//! form with a single exponential: the charge falls by `I·h`, and the difference dies away with `k'`
//! while the current feeds it.
//!
//! Source: J. F. Manwell and J. G. McGowan, "Lead acid battery storage model for hybrid energy systems",
//! *Solar Energy* 50 (1993) 399; the step equations were held against two public implementations.

use crate::sizing::survey::BatteryRating;
use crate::units::Hours;

/// What sets one battery apart: both numbers are free of its size.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Kinetics {
    /// Share of the charge that is at hand in a battery at rest (`c`).
    pub at_hand: f64,
    /// Rate at which bound charge follows, 1/h (`k'`).
    pub rate: f64,
    /// Charge of both wells, full, over the capacity at the reference rate (`q_max / C_H`).
    pub full: f64,
}

/// Charge in both wells, Ah.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Charge {
    /// Both wells together.
    pub total: f64,
    /// What the well at hand holds beyond its share; negative while a current empties it faster than
    /// bound charge follows.
    pub beyond: f64,
}

/// The share at hand outside which a fit is refused; a real battery lies between.
const AT_HAND: std::ops::Range<f64> = 0.05..0.98;
/// The rate outside which a fit is refused, 1/h.
const RATE: std::ops::RangeInclusive<f64> = 0.005..=100.0;
/// The error of the fitted curve on any rating above which a fit is refused.
const WORST_FIT: f64 = 0.05;
/// The rates that a lone exponent is laid through, in hours.
const LAID_THROUGH: [f64; 3] = [20.0, 5.0, 1.0];
/// Below this an exponent leaves no bound charge worth speaking of: plain ampere-hours.
const PLAIN: f64 = 1.005;

impl Kinetics {
    /// Plain ampere-hours: all charge is at hand.
    pub const PLAIN: Self = Self { at_hand: 1.0, rate: 1.0, full: 1.0 };

    /// The battery whose capacities at 20, 5 and 1 h follow Peukert's law, its capacity given at a rate.
    ///
    /// Between those rates both laws then agree within 4 %. Faster, this one gives more charge; slower,
    /// it stops at the charge there is, where the power law would promise charge without end.
    pub fn of_exponent(exponent: f64, rated: Hours) -> Self {
        if exponent < PLAIN {
            return Self::PLAIN;
        }
        let capacity = |hours: f64| (hours / rated.0).powf(1.0 - 1.0 / exponent);
        let points = LAID_THROUGH.map(|hours| (hours, capacity(hours)));
        let rate = rate_through(&points).unwrap_or(0.4);
        let (sum, slope) = line_through(&points, rate);
        Self { at_hand: sum / (sum + slope), rate, full: 1.0 / sum }
    }

    /// The battery that a data sheet's three or more ratings describe; `None` where they do not follow
    /// the model: fewer charge at a slower rate, a share at hand that no battery has, or a poor fit.
    ///
    /// `1/q(t) = 1/q_max + (1/c − 1)/q_max · (1 − e^(−k't))/(k't)` is a straight line in the last factor,
    /// so that only `k'` must be searched for: exactly through three ratings, by least squares of the
    /// relative errors through four.
    pub fn of_ratings(ratings: &[BatteryRating], rated: Hours) -> Option<Self> {
        let reference = ratings.iter().find(|rating| rating.hours == rated)?.capacity.0;
        let mut points: Vec<_> = ratings.iter().map(|one| (one.hours.0, one.capacity.0 / reference)).collect();
        points.sort_by(|one, other| other.0.total_cmp(&one.0));
        points.dedup();
        let falls = points.windows(2).all(|pair| pair[0].0 > pair[1].0 && pair[0].1 > pair[1].1);
        if points.len() < 3 || !falls {
            return None;
        }
        let rate = match points[..] {
            [slow, middle, fast] => rate_through(&[slow, middle, fast])?,
            _ => best_rate(&points),
        };
        let (sum, slope) = line_through(&points, rate);
        let fitted = Self { at_hand: sum / (sum + slope), rate, full: 1.0 / sum };
        let worst = points.iter().map(|&(hours, capacity)| (fitted.capacity(hours) / capacity - 1.0).abs());
        let sound = AT_HAND.contains(&fitted.at_hand) && RATE.contains(&rate) && fitted.full.is_finite();
        (sound && worst.fold(0.0, f64::max) < WORST_FIT).then_some(fitted)
    }

    /// Capacity at a rate over that at the reference rate: what a constant current takes from full to empty.
    pub fn capacity(&self, hours: f64) -> f64 {
        self.full / (1.0 + (1.0 / self.at_hand - 1.0) * follows(self.rate * hours))
    }
}

/// `(1 − e^(−x))/x`, one at nothing: what share of the bound charge a discharge of this length misses.
fn follows(x: f64) -> f64 {
    if x < 1e-9 { 1.0 } else { -(-x).exp_m1() / x }
}

/// The line `1/q = sum + slope · follows(k't)` through the points, by least squares of the relative errors.
fn line_through(points: &[(f64, f64)], rate: f64) -> (f64, f64) {
    let mut sums = [0.0; 5];
    for &(hours, capacity) in points {
        let (one, slope) = (capacity, capacity * follows(rate * hours));
        for (sum, part) in sums.iter_mut().zip([one * one, one * slope, slope * slope, one, slope]) {
            *sum += part;
        }
    }
    let [aa, ab, bb, a, b] = sums;
    let determinant = aa * bb - ab * ab;
    ((a * bb - b * ab) / determinant, (b * aa - a * ab) / determinant)
}

/// The rate with which the model goes exactly through three points, slowest first; `None` where none does.
///
/// With the line's two numbers eliminated, one equation in `k'` is left whose side rises steadily.
fn rate_through(points: &[(f64, f64); 3]) -> Option<f64> {
    let [slow, middle, fast] = points.map(|(hours, capacity)| (hours, 1.0 / capacity));
    let wanted = (middle.1 - slow.1) / (fast.1 - middle.1);
    let side = |ln_rate: f64| {
        let at = |hours: f64| follows(ln_rate.exp() * hours);
        (at(middle.0) - at(slow.0)) / (at(fast.0) - at(middle.0)) - wanted
    };
    let (low, high) = (RATE.start().ln(), RATE.end().ln());
    root(side, low, high).map(f64::exp)
}

/// Where a function that changes its sign between two places crosses nothing; `None` where it does not.
///
/// False position with halving (the Illinois rule): it keeps the bracket and closes in fast.
pub fn root(function: impl Fn(f64) -> f64, mut low: f64, mut high: f64) -> Option<f64> {
    let (mut at_low, mut at_high) = (function(low), function(high));
    if at_low == 0.0 || at_high == 0.0 {
        return Some(if at_low == 0.0 { low } else { high });
    }
    if at_low.is_nan() || at_high.is_nan() || at_low * at_high > 0.0 {
        return None;
    }
    for _ in 0..100 {
        let next = (low * at_high - high * at_low) / (at_high - at_low);
        let at_next = function(next);
        if at_next == 0.0 || (high - low).abs() <= 1e-13 * (1.0 + high.abs()) {
            return Some(next);
        }
        if at_next * at_high < 0.0 {
            (low, at_low) = (high, at_high);
        } else {
            at_low /= 2.0;
        }
        if (next - high).abs() <= 1e-14 * (1.0 + next.abs()) {
            return Some(next);
        }
        (high, at_high) = (next, at_next);
    }
    Some(high)
}

/// The rate of least squares through more than three points, by golden section on its logarithm.
fn best_rate(points: &[(f64, f64)]) -> f64 {
    let misfit = |ln_rate: f64| {
        let rate = ln_rate.exp();
        let (sum, slope) = line_through(points, rate);
        let error = |&(hours, capacity): &(f64, f64)| (capacity * (sum + slope * follows(rate * hours)) - 1.0).powi(2);
        points.iter().map(error).sum::<f64>()
    };
    let golden = (5.0_f64.sqrt() - 1.0) / 2.0;
    let (mut low, mut high) = (RATE.start().ln(), RATE.end().ln());
    let (mut left, mut right) = (high - golden * (high - low), low + golden * (high - low));
    let (mut at_left, mut at_right) = (misfit(left), misfit(right));
    while high - low > 1e-9 {
        if at_left < at_right {
            (high, right, at_right) = (right, left, at_left);
            left = high - golden * (high - low);
            at_left = misfit(left);
        } else {
            (low, left, at_left) = (left, right, at_right);
            right = low + golden * (high - low);
            at_right = misfit(right);
        }
    }
    ((low + high) / 2.0).exp()
}

/// One battery of a size: its wells with their capacity in Ah.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Wells {
    /// Charge of both, full.
    pub full: f64,
    /// Share of it at hand at rest.
    pub at_hand: f64,
    /// Rate at which bound charge follows, 1/h.
    pub rate: f64,
}

impl Wells {
    /// Full and at rest.
    pub fn filled(&self) -> Charge {
        Charge { total: self.full, beyond: 0.0 }
    }

    /// Charge at hand.
    pub fn at_hand(&self, charge: Charge) -> f64 {
        self.at_hand * charge.total + charge.beyond
    }

    /// How high the well at hand stands, one when full: what the volts follow.
    pub fn head(&self, charge: Charge) -> f64 {
        self.at_hand(charge) / (self.at_hand * self.full)
    }

    /// What is left of a difference between the wells after a time.
    pub fn fading(&self, hours: f64) -> f64 {
        (-self.rate * hours).exp()
    }

    /// After a constant current for some hours; `faded` is [`Self::fading`] of those hours.
    pub fn after(&self, charge: Charge, current: f64, hours: f64, faded: f64) -> Charge {
        let fed = current * (1.0 - self.at_hand) * (1.0 - faded) / self.rate;
        Charge { total: charge.total - current * hours, beyond: charge.beyond * faded - fed }
    }

    /// When a constant current brings the charge at hand down to a floor, given that it does within
    /// `hours`; the charge at hand crosses it once.
    pub fn reaches(&self, charge: Charge, current: f64, floor: f64, hours: f64) -> f64 {
        let above = |time: f64| self.at_hand(self.after(charge, current, time, self.fading(time))) - floor;
        root(above, 0.0, hours).unwrap_or(hours)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::AmpHours;
    use proptest::prelude::*;

    fn ratings(points: &[(f64, f64)]) -> Vec<BatteryRating> {
        points.iter().map(|&(hours, ah)| BatteryRating { hours: Hours(hours), capacity: AmpHours(ah) }).collect()
    }

    #[test]
    fn an_exponent_gives_the_battery_that_follows_it_at_20_5_and_1_h() {
        // Exponent, q_max/C20, k', c, C5/C20, C1/C20: exact fits, solved independently with a general library.
        let rows = [
            (1.02, 1.012, 0.373, 0.920, 0.973, 0.943),
            (1.05, 1.029, 0.391, 0.816, 0.936, 0.867),
            (1.10, 1.057, 0.419, 0.678, 0.882, 0.762),
            (1.15, 1.084, 0.446, 0.573, 0.835, 0.677),
            (1.20, 1.110, 0.473, 0.490, 0.794, 0.607),
            (1.25, 1.136, 0.499, 0.424, 0.758, 0.549),
            (1.30, 1.162, 0.524, 0.371, 0.726, 0.501),
        ];
        for (exponent, full, rate, at_hand, at_5_h, at_1_h) in rows {
            let wells = Kinetics::of_exponent(exponent, Hours(20.0));
            let pairs = [
                (wells.full, full),
                (wells.rate, rate),
                (wells.at_hand, at_hand),
                (wells.capacity(5.0), at_5_h),
                (wells.capacity(1.0), at_1_h),
                (wells.capacity(20.0), 1.0),
            ];
            assert!(pairs.iter().all(|(got, wanted)| (got - wanted).abs() < 6e-4), "{exponent}: {pairs:?}");
        }
    }

    #[test]
    fn a_data_sheet_is_fitted_through_its_ratings() {
        // Glass mat, 12 V 40 Ah, ratings of a maker's data sheet; the fit solved independently.
        let sheet = ratings(&[(20.0, 40.0), (5.0, 34.0), (1.0, 24.0)]);
        let wells = Kinetics::of_ratings(&sheet, Hours(20.0)).expect("it follows the model");
        assert!((wells.full * 40.0 - 42.53).abs() < 0.01, "{wells:?}");
        assert!((wells.rate - 0.941).abs() < 0.001 && (wells.at_hand - 0.456).abs() < 0.001, "{wells:?}");
        // Its own 10 h rating of 37.2 Ah is met within 1.5 %.
        assert!((wells.capacity(10.0) * 40.0 / 37.2 - 1.015).abs() < 0.001);
        let four = ratings(&[(20.0, 40.0), (10.0, 37.2), (5.0, 34.0), (1.0, 24.0)]);
        let fitted = Kinetics::of_ratings(&four, Hours(20.0)).expect("it follows the model");
        for rating in &four {
            let off = fitted.capacity(rating.hours.0) * 40.0 / rating.capacity.0 - 1.0;
            assert!(off.abs() < 0.02, "{rating:?}: {off}");
        }
    }

    #[test]
    fn what_is_no_kinetic_battery_is_refused() {
        for (why, points) in [
            ("two ratings", vec![(20.0, 40.0), (5.0, 34.0)]),
            ("more charge at a faster rate", vec![(20.0, 40.0), (5.0, 41.0), (1.0, 24.0)]),
            ("as much charge at a faster rate", vec![(20.0, 40.0), (5.0, 40.0), (1.0, 24.0)]),
            ("nearly nothing at hand", vec![(20.0, 40.0), (5.0, 11.0), (1.0, 1.5)]),
            ("falls too late", vec![(20.0, 40.0), (5.0, 39.99), (1.0, 20.0)]),
        ] {
            assert_eq!(Kinetics::of_ratings(&ratings(&points), Hours(20.0)), None, "{why}");
        }
    }

    #[test]
    fn an_exponent_of_one_is_plain_ampere_hours() {
        let wells = Kinetics::of_exponent(1.0, Hours(20.0));
        assert_eq!(wells, Kinetics::PLAIN);
        assert_eq!((wells.capacity(20.0), wells.capacity(0.1)), (1.0, 1.0));
    }

    #[test]
    fn the_root_is_found_or_said_not_to_be_there() {
        assert!((root(|x| x * x - 2.0, 0.0, 2.0).unwrap() - 2.0_f64.sqrt()).abs() < 1e-12);
        assert_eq!(root(|x| x, 0.0, 1.0), Some(0.0));
        assert_eq!(root(|x| x * x + 1.0, -1.0, 1.0), None);
        assert_eq!(root(|_| f64::NAN, 0.0, 1.0), None);
    }

    fn any_wells() -> impl Strategy<Value = Wells> {
        (1.0..2000.0_f64, 0.05..1.0_f64, 0.05..5.0_f64).prop_map(|(full, at_hand, rate)| Wells { full, at_hand, rate })
    }

    fn step(wells: &Wells, charge: Charge, current: f64, hours: f64) -> Charge {
        wells.after(charge, current, hours, wells.fading(hours))
    }

    proptest! {
        #[test]
        fn cutting_a_step_in_two_changes_nothing(
            wells in any_wells(), share in 0.01..0.99_f64, hours in 0.01..20.0_f64, rate in 1.0..50.0_f64,
        ) {
            let current = wells.full / rate;
            let whole = step(&wells, wells.filled(), current, hours);
            let parts = step(&wells, step(&wells, wells.filled(), current, hours * share), current, hours * (1.0 - share));
            prop_assert!((whole.total - parts.total).abs() < 1e-9 * wells.full);
            prop_assert!((whole.beyond - parts.beyond).abs() < 1e-9 * wells.full);
        }

        #[test]
        fn the_charge_of_both_falls_by_current_times_time(wells in any_wells(), current in -50.0..50.0_f64, hours in 0.0..10.0_f64) {
            let after = step(&wells, wells.filled(), current, hours);
            prop_assert!((after.total - wells.full + current * hours).abs() < 1e-9 * wells.full.max(500.0));
        }

        #[test]
        fn rest_never_lowers_the_well_at_hand(wells in any_wells(), hours in 0.01..5.0_f64, rest in 0.01..50.0_f64, rate in 1.0..50.0_f64) {
            let drawn = step(&wells, wells.filled(), wells.full / rate, hours);
            let rested = step(&wells, drawn, 0.0, rest);
            prop_assert!(wells.at_hand(rested) >= wells.at_hand(drawn) - 1e-9 * wells.full);
            prop_assert_eq!(rested.total, drawn.total);
        }

        #[test]
        fn a_constant_current_empties_it_when_the_capacity_says(wells in any_wells(), hours in 0.1..100.0_f64) {
            let kinetics = Kinetics { at_hand: wells.at_hand, rate: wells.rate, full: 1.0 };
            let current = wells.full * kinetics.capacity(hours) / hours;
            let time = wells.reaches(wells.filled(), current, 0.0, hours * 2.0);
            prop_assert!((time / hours - 1.0).abs() < 1e-6, "{} h for {} h", time, hours);
        }

        #[test]
        fn a_faster_rate_gives_less_charge_but_never_less_than_is_at_hand(
            exponent in 1.01..1.6_f64, hours in 0.05..100.0_f64, longer in 1.01..5.0_f64,
        ) {
            let wells = Kinetics::of_exponent(exponent, Hours(20.0));
            let (fast, slow) = (wells.capacity(hours), wells.capacity(hours * longer));
            prop_assert!(fast < slow && slow <= wells.full && fast >= wells.at_hand * wells.full);
            // Hour-rate factor: it rises with the time, but not in proportion.
            prop_assert!(hours / fast < hours * longer / slow);
        }

        #[test]
        fn what_a_battery_gives_is_fitted_back(at_hand in 0.1..0.95_f64, rate in 0.1..3.0_f64) {
            let battery = Kinetics { at_hand, rate, full: 1.0 };
            let sheet = ratings(&[20.0, 5.0, 1.0].map(|hours| (hours, 100.0 * battery.capacity(hours))));
            let fitted = Kinetics::of_ratings(&sheet, Hours(20.0)).expect("it is one");
            prop_assert!((fitted.at_hand - at_hand).abs() < 1e-4 && (fitted.rate / rate - 1.0).abs() < 1e-4, "{:?}", fitted);
        }
    }
}
