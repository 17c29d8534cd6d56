//! The closed form against the reference that steps.

use keeplit::simulation::battery::Battery;
use keeplit::simulation::cut::Course;
use keeplit::sizing::proof::EndedBy;

use super::samples::{Chance, sample};
use super::stepper::{self, State};

const DESIGNS: u32 = 10_000;

/// Draws a constant current for some hours.
fn draw(battery: &Battery, mut state: State, current: f64, hours: f64, steps: u32) -> State {
    let step = hours / f64::from(steps);
    for _ in 0..steps {
        let (a, b) = stepper::flows(battery, state, current);
        let middle = State { at_hand: state.at_hand + a * step / 2.0, bound: state.bound + b * step / 2.0 };
        let (a, b) = stepper::flows(battery, middle, current);
        state = State { at_hand: state.at_hand + a * step, bound: state.bound + b * step };
    }
    state
}

#[test]
fn ten_thousand_random_cuts_end_when_the_reference_ends_them() {
    let mut chance = Chance::new(20_261_201);
    let (mut stopped, mut survived, mut worst) = (0, 0, 0.0_f64);
    for number in 0..DESIGNS {
        let one = sample(&mut chance);
        let course = Course::new(one.battery, &one.day);
        let mut charge = one.battery.wells.filled();
        let end = course.play(&mut charge, one.start, one.hours);
        let step = (end.served / 2000.0).clamp(1e-5, 1.0 / 60.0);
        let reference =
            stepper::play(&one.battery, stepper::full(&one.battery), &one.powers, one.start, one.hours, step);
        let off = (end.served - reference.hours).abs() / reference.hours.max(0.01);
        assert!(off < 1e-3, "{number}: {} h against {} h, {end:?}", end.served, reference.hours);
        worst = worst.max(off);
        let stops = end.by != EndedBy::CutEnds;
        let at_the_end = (reference.hours / one.hours - 1.0).abs() < 1e-3;
        assert!(stops == reference.stopped || at_the_end, "{number}: {end:?} against {reference:?}");
        if stops && reference.stopped && end.served > 0.0 {
            stopped += 1;
        } else if !stops {
            survived += 1;
            let left = (reference.state.at_hand + reference.state.bound) / one.battery.wells.full;
            let share = charge.total / one.battery.wells.full;
            assert!((share - left).abs() < 1e-4, "{number}: {share} left against {left}");
        }
    }
    assert!(stopped > 2000 && survived > 2000, "{stopped} stopped, {survived} survived");
    assert!(worst > 0.0, "two ways that agree to the last bit are one way");
}

#[test]
fn under_a_constant_current_the_charge_is_that_of_the_reference() {
    let mut chance = Chance::new(7);
    for number in 0..500 {
        let one = sample(&mut chance);
        let wells = one.battery.wells;
        let current = wells.full / chance.even_in_logarithm(1.0, 40.0);
        let hours = wells.at_hand * wells.full / current * chance.between(0.1, 0.9);
        let before = wells.after(wells.filled(), current / 2.0, hours / 4.0, wells.fading(hours / 4.0));
        let after = wells.after(before, current, hours, wells.fading(hours));
        let start = draw(&one.battery, stepper::full(&one.battery), current / 2.0, hours / 4.0, 4000);
        let reference = draw(&one.battery, start, current, hours, 4000);
        let at_hand = (wells.at_hand(after) - reference.at_hand).abs() / wells.full;
        let total = (after.total - reference.at_hand - reference.bound).abs() / wells.full;
        assert!(at_hand < 1e-6 && total < 1e-6, "{number}: {at_hand} and {total}");
    }
}

#[test]
fn the_reason_of_the_end_is_seen_in_the_volts() {
    let mut chance = Chance::new(99);
    let (mut seen, mut volts_end) = ([0; 3], 0.0_f64);
    for _ in 0..3000 {
        let one = sample(&mut chance);
        let course = Course::new(one.battery, &one.day);
        let mut charge = one.battery.wells.filled();
        let end = course.play(&mut charge, one.start, 1000.0);
        let hour = (one.start + end.served).rem_euclid(24.0);
        let at = one.powers.iter().position(|power| hour < power.0 - 1e-7).unwrap_or(0);
        let state = State {
            at_hand: one.battery.wells.at_hand(charge),
            bound: charge.total - one.battery.wells.at_hand(charge),
        };
        let met = stepper::meets(&one.battery, state, one.powers[at].1);
        match end.by {
            EndedBy::EmptyWell => {
                seen[0] += 1;
                assert!(state.at_hand.abs() < 1e-6 * one.battery.wells.full);
            }
            EndedBy::CutOff => {
                seen[1] += 1;
                let volts = met.expect("a current delivers it").1;
                assert!(volts <= one.battery.cut_off.0 * (1.0 + 1e-4), "{volts} V");
                volts_end = volts_end.max((one.battery.cut_off.0 - volts) / one.battery.cut_off.0);
            }
            EndedBy::Overload => {
                seen[2] += 1;
                assert!(met.is_none());
            }
            EndedBy::CutEnds => panic!("a thousand hours are more than any of them lasts"),
        }
    }
    assert!(seen.iter().all(|count| *count > 20), "{seen:?}");
}
