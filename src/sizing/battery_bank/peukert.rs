//! How much charge a battery gives at a current: Peukert's law between the ratings of its data sheet.
//!
//! Only the H-hour form is used: `t = H · (C_H / (I · H))^k`. The exponent is no constant of a
//! battery, it rises with the current; so with several ratings each pair of neighbours has its own,
//! and nothing faster than the fastest rating is known (a finding says so). A current below that of
//! the slowest rating earns no bonus: there the plain ampere-hours of that rating hold, since the
//! law would promise a charge without limit.
//!
//! Source (from memory): W. Peukert, *Elektrotechnische Zeitschrift*, 1897; D. Doerffel and
//! S. Abu-Sharkh, *Journal of Power Sources* 155 (2006) 395, on where the law fails.

use super::duty_cycle::Cut;
use crate::sizing::design::Bank;
use crate::sizing::finding::Finding;
use crate::sizing::survey::{BatteryRating, Survey};
use crate::sizing::tables::chemistries::properties;
use crate::units::{AmpHours, Amps, Hours};

/// The rate that capacities are given at when no data sheet says otherwise.
const USUAL_RATE: Hours = Hours(20.0);

/// Above this the two ratings cannot belong to one battery: published ones lie between 1.0 and 1.6.
const LARGEST_EXPONENT: f64 = 2.0;

/// What a data sheet says of one block, relative to its capacity at the reference rate.
#[derive(Clone, Debug, PartialEq)]
pub struct Curve {
    /// The reference rate: 20 h, or the rating nearest to it.
    pub rated: Hours,
    /// Capacity at that rate of the block on the data sheet, if there is one.
    pub block: Option<AmpHours>,
    /// Fastest first; at least one.
    points: Vec<Point>,
    /// Exponent between neighbours, fastest first; at least one.
    exponents: Vec<f64>,
    /// The fastest rate at which the curve is known.
    pub fastest: Hours,
}

/// Hours to empty at a current over the capacity at the reference rate.
#[derive(Clone, Copy, Debug, PartialEq)]
struct Point {
    hours: f64,
    current: f64,
}

/// Exponent from two ratings: `k = ln(t1/t2) / ln(I2/I1)`; `None` if they contradict each other.
///
/// They do when the faster one gives more charge (`k < 1`), when its current is not the higher one,
/// or when the exponent is beyond any battery's.
pub fn exponent(one: BatteryRating, other: BatteryRating) -> Option<f64> {
    let (slow, fast) = if one.hours > other.hours { (one, other) } else { (other, one) };
    let (slow_current, fast_current) = (slow.capacity / slow.hours, fast.capacity / fast.hours);
    let k = (slow.hours / fast.hours).ln() / (fast_current / slow_current).ln();
    (slow.hours > fast.hours && fast_current > slow_current && (1.0..=LARGEST_EXPONENT).contains(&k)).then_some(k)
}

impl Curve {
    /// The curve of a data sheet's ratings, in any order; what is missing comes from the typical
    /// exponent, which is known from `typical_from` on. The finding says what was made up or refused.
    pub fn new(ratings: &[BatteryRating], typical: f64, typical_from: Hours) -> (Self, Option<Finding>) {
        let mut ratings = ratings.to_vec();
        ratings.sort_by(|one, other| one.hours.order(&other.hours));
        ratings.dedup();
        let reference =
            ratings.iter().copied().min_by(|one, other| distance(one.hours).total_cmp(&distance(other.hours)));
        let Some(reference) = reference else {
            return (
                Self::typical(USUAL_RATE, None, typical, typical_from),
                Some(Finding::TypicalRatings { peukert: typical }),
            );
        };
        let typical_curve = || Self::typical(reference.hours, Some(reference.capacity), typical, typical_from);
        if ratings.len() == 1 {
            return (typical_curve(), Some(Finding::TypicalRatings { peukert: typical }));
        }
        let exponents: Vec<_> = ratings.windows(2).map(|pair| exponent(pair[0], pair[1])).collect();
        if let Some(at) = exponents.iter().position(Option::is_none) {
            let (fast, slow) = (ratings[at], ratings[at + 1]);
            let contradict =
                Finding::RatingsContradict { slow: (slow.hours, slow.capacity), fast: (fast.hours, fast.capacity) };
            return (typical_curve(), Some(contradict));
        }
        let points = ratings.iter().map(|rating| Point::of(*rating, reference.capacity)).collect();
        let fastest = ratings[0].hours;
        let exponents = exponents.into_iter().flatten().collect();
        (Self { rated: reference.hours, block: Some(reference.capacity), points, exponents, fastest }, None)
    }

    /// The curve of a bank that is sized already.
    pub fn of_bank(survey: &Survey, bank: &Bank) -> Self {
        let from = properties(survey.choice.chemistry).peukert_holds_from;
        Self::new(&survey.battery_ratings, bank.peukert_exponent, from).0
    }

    /// One rating and an exponent.
    fn typical(rated: Hours, block: Option<AmpHours>, exponent: f64, from: Hours) -> Self {
        let point = Point { hours: rated.0, current: 1.0 / rated.0 };
        Self { rated, block, points: vec![point], exponents: vec![exponent], fastest: rated.min(from) }
    }

    /// The slowest rate of the curve.
    pub fn slowest_rate(&self) -> Hours {
        Hours(self.slowest().hours)
    }

    fn slowest(&self) -> Point {
        self.points[self.points.len() - 1]
    }

    /// The rating to start from and the exponent, for what `beyond` tells to lie past a rating.
    fn span(&self, beyond: impl Fn(&Point) -> bool) -> (Point, f64) {
        let last = self.exponents.len() - 1;
        let at = (0..last).find(|&at| self.points.get(at + 1).is_some_and(&beyond)).unwrap_or(last);
        (self.points[at], self.exponents[at])
    }

    /// Hours in which a current empties a full bank, and the exponent that holds there.
    ///
    /// `current` is over the capacity at the reference rate, so 1/h.
    fn time(&self, current: f64) -> (f64, f64) {
        let slowest = self.slowest();
        if current <= slowest.current {
            return (slowest.hours * slowest.current / current, 1.0);
        }
        let (from, k) = self.span(|next| current > next.current);
        (from.hours * (from.current / current).powf(k), k)
    }

    /// The time in which a steady current empties a full bank of this capacity; without end for no current.
    pub fn runtime(&self, capacity: AmpHours, current: Amps) -> Hours {
        Hours(self.time(current.0 / capacity.0).0)
    }

    /// The exponent that holds at a current.
    pub fn exponent_at(&self, capacity: AmpHours, current: Amps) -> f64 {
        let current = current.0 / capacity.0;
        self.span(|next| current > next.current).1
    }

    /// Hour-rate factor `K(t) = C_rated / I(t)`: Ah of rating for each ampere held for the time.
    ///
    /// From the law `K(t) = C_rated/I_H · (t/H)^(1/k)`; past the slowest rating in proportion to the time.
    pub fn hour_rate_factor(&self, time: Hours) -> f64 {
        let slowest = self.slowest();
        if time.0 >= slowest.hours {
            return time.0 / (slowest.hours * slowest.current);
        }
        let (from, k) = self.span(|next| time.0 < next.hours);
        (time.0 / from.hours).powf(1.0 / k) / from.current
    }

    /// Capacity at another rate over that at the reference rate.
    pub fn share_at(&self, rate: Hours) -> f64 {
        rate.0 / self.hour_rate_factor(rate)
    }

    /// Share of a full bank that a cut takes by the step sum `U = Σ h_j / t(I_j)`; at one it is flat.
    pub fn taken(&self, cut: &Cut, capacity: AmpHours) -> f64 {
        cut.steps().map(|(current, hours)| hours.0 / self.time(current.0 / capacity.0).0).sum()
    }

    /// Capacity at the reference rate that a cut just empties.
    ///
    /// `U` falls with the capacity by a power between 1 and 2, so that Newton's method on the
    /// logarithms closes in from wherever it starts.
    pub fn emptied(&self, cut: &Cut) -> AmpHours {
        let slowest = self.slowest();
        let mut capacity = cut.charge().0 / (slowest.hours * slowest.current);
        if capacity <= 0.0 {
            return AmpHours::ZERO;
        }
        for _ in 0..60 {
            let (mut taken, mut slope) = (0.0, 0.0);
            for (current, hours) in cut.steps() {
                let (time, k) = self.time(current.0 / capacity);
                taken += hours.0 / time;
                slope += k * hours.0 / time;
            }
            capacity *= f64::powf(taken, taken / slope);
            if (taken - 1.0).abs() < 1e-13 {
                break;
            }
        }
        AmpHours(capacity)
    }
}

impl Point {
    fn of(rating: BatteryRating, reference: AmpHours) -> Self {
        Self { hours: rating.hours.0, current: rating.capacity / reference / rating.hours.0 }
    }
}

/// How far a rate is from the usual one.
fn distance(rate: Hours) -> f64 {
    (rate / USUAL_RATE).ln().abs()
}

#[cfg(test)]
mod tests {
    use super::*;
    use proptest::prelude::*;

    fn rating(hours: f64, capacity: f64) -> BatteryRating {
        BatteryRating { hours: Hours(hours), capacity: AmpHours(capacity) }
    }

    /// A 12 V 40 Ah glass-mat block. Source: maker's data sheet.
    fn sheet() -> Vec<BatteryRating> {
        vec![rating(20.0, 40.0), rating(10.0, 37.2), rating(5.0, 34.0), rating(1.0, 24.0)]
    }

    fn curve(ratings: &[BatteryRating]) -> Curve {
        let (curve, finding) = Curve::new(ratings, 1.2, Hours(5.0));
        assert_eq!(finding, None);
        curve
    }

    fn typical(exponent: f64) -> Curve {
        Curve::new(&[rating(20.0, 100.0)], exponent, Hours(5.0)).0
    }

    #[test]
    fn exponents_are_those_of_the_data_sheets_ratings() {
        let s = sheet();
        // What the maker's ratings of 40, 37.2, 34 and 24 Ah give, by hand: ln(t1/t2) / ln(I2/I1).
        let cases = [(s[0], s[1], 1.117), (s[0], s[2], 1.133), (s[0], s[3], 1.206), (s[2], s[3], 1.276)];
        for (slow, fast, expected) in cases {
            let k = exponent(slow, fast).unwrap();
            assert!((k - expected).abs() < 0.0005, "{slow:?} {fast:?}: {k}");
            assert_eq!(exponent(fast, slow), Some(k), "in any order");
        }
    }

    #[test]
    fn runtime_follows_the_law() {
        let cases = [
            // what                        Ah     k     A     expected h  where from
            ("at the rated current", 100.0, 1.20, 5.0, 20.0, "definition of the rating"),
            ("twice the rated current", 100.0, 1.20, 10.0, 8.7055, "by hand: 20 × 0.5^1.2"),
            ("exponent one is plain Ah", 100.0, 1.00, 50.0, 2.0, "100 Ah / 50 A"),
            ("half the rated current", 100.0, 1.20, 2.5, 40.0, "no bonus below the slowest rate: 100 Ah / 2.5 A"),
        ];
        for (what, capacity, k, current, expected, source) in cases {
            let hours = typical(k).runtime(AmpHours(capacity), Amps(current)).0;
            assert!((hours - expected).abs() < 0.0001, "{what}: {hours} h, {source}");
        }
    }

    #[test]
    fn a_curve_passes_through_every_rating() {
        let curve = curve(&sheet());
        assert_eq!((curve.rated, curve.block), (Hours(20.0), Some(AmpHours(40.0))));
        for given in sheet() {
            let hours = curve.runtime(AmpHours(40.0), given.capacity / given.hours);
            assert!((hours / given.hours - 1.0).abs() < 1e-12, "{given:?}: {hours:?}");
            assert!((curve.share_at(given.hours) - given.capacity.0 / 40.0).abs() < 1e-12, "{given:?}");
        }
        assert_eq!((curve.fastest, curve.slowest_rate()), (Hours(1.0), Hours(20.0)));
    }

    #[test]
    fn the_reference_rate_is_the_rating_nearest_to_twenty_hours() {
        let cases = [(vec![100.0, 10.0], 10.0), (vec![100.0, 24.0, 5.0], 24.0), (vec![8.0], 8.0)];
        for (hours, expected) in cases {
            let ratings: Vec<_> = hours.iter().map(|&h: &f64| rating(h, 100.0 * h.powf(0.1))).collect();
            assert_eq!(Curve::new(&ratings, 1.2, Hours(5.0)).0.rated.0, expected, "{hours:?}");
        }
    }

    #[test]
    fn ratings_that_no_battery_has_are_refused() {
        let cases = [
            ("more charge at the faster rate", rating(20.0, 100.0), rating(10.0, 101.0)),
            ("less current at the faster rate", rating(20.0, 100.0), rating(10.0, 45.0)),
            ("the same rate twice", rating(20.0, 100.0), rating(20.0, 90.0)),
            ("an exponent beyond any battery's", rating(20.0, 100.0), rating(10.0, 60.0)),
        ];
        for (what, one, other) in cases {
            assert_eq!(exponent(one, other), None, "{what}");
            let (curve, finding) = Curve::new(&[one, other], 1.2, Hours(5.0));
            assert!(matches!(finding, Some(Finding::RatingsContradict { .. })), "{what}: {finding:?}");
            assert_eq!(curve.exponent_at(AmpHours(100.0), Amps(20.0)), 1.2, "{what}");
        }
    }

    #[test]
    fn one_rating_or_none_takes_the_typical_exponent_and_says_so() {
        for ratings in [vec![], vec![rating(20.0, 150.0)]] {
            let (curve, finding) = Curve::new(&ratings, 1.2, Hours(5.0));
            assert_eq!(finding, Some(Finding::TypicalRatings { peukert: 1.2 }));
            assert_eq!((curve.rated, curve.fastest), (Hours(20.0), Hours(5.0)));
            assert_eq!(curve.block, ratings.first().map(|rating| rating.capacity));
        }
    }

    #[test]
    fn the_same_rating_twice_is_one_rating() {
        let finding = Curve::new(&[rating(20.0, 150.0), rating(20.0, 150.0)], 1.2, Hours(5.0)).1;
        assert_eq!(finding, Some(Finding::TypicalRatings { peukert: 1.2 }));
    }

    fn any_curve() -> impl Strategy<Value = Curve> {
        prop_oneof![(1.0..1.6).prop_map(typical), Just(curve(&sheet()))]
    }

    proptest! {
        #[test]
        fn a_higher_current_never_lasts_longer(curve in any_curve(), current in 0.1..200.0, more in 0.001..50.0) {
            let last = |amps: f64| curve.runtime(AmpHours(100.0), Amps(amps));
            prop_assert!(last(current + more) < last(current));
        }

        #[test]
        fn a_higher_current_never_gives_more_charge(curve in any_curve(), current in 0.1..200.0, more in 0.0..50.0) {
            let charge = |amps: f64| Amps(amps) * curve.runtime(AmpHours(100.0), Amps(amps));
            prop_assert!(charge(current + more).0 <= charge(current).0 * (1.0 + 1e-12));
        }

        #[test]
        fn hour_rate_factor_and_runtime_are_two_ways_to_one_number(curve in any_curve(), hours in 0.1..100.0) {
            let current = Amps(100.0 / curve.hour_rate_factor(Hours(hours)));
            prop_assert!((curve.runtime(AmpHours(100.0), current).0 / hours - 1.0).abs() < 1e-9);
        }

        #[test]
        fn the_hour_rate_factor_rises_with_the_time_but_not_in_proportion(
            curve in any_curve(), hours in 0.01..100.0, longer in 1.001..10.0,
        ) {
            let (short, long) = (curve.hour_rate_factor(Hours(hours)), curve.hour_rate_factor(Hours(hours * longer)));
            prop_assert!(long > short);
            prop_assert!(long / short <= longer * (1.0 + 1e-12));
        }

        #[test]
        fn the_capacity_found_is_just_emptied(
            curve in any_curve(), steps in prop::collection::vec((0.0..300.0, 0.05..5.0), 1..10),
        ) {
            let cut = Cut::new(steps.into_iter().map(|(current, hours)| (Amps(current), Hours(hours))).collect());
            let capacity = curve.emptied(&cut);
            prop_assert!((curve.taken(&cut, capacity) - 1.0).abs() < 1e-9);
        }
    }
}
