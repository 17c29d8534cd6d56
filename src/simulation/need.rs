//! The smallest bank that lasts the cut from every start, when it is played through.

use super::cut::Course;
use super::day::Day;
use super::plant::{Condition, Plant};
use crate::units::{AmpHours, Hours};

/// By how much the answer may lie above the smallest such bank.
const CLOSE: f64 = 1e-3;
/// The search begins this far from the guess, and widens by the same factor.
const REACH: f64 = 1.25;
/// A bank so many times the guess is no answer any more: the cable alone takes too many volts.
const FARTHEST: f64 = 1e6;

/// Capacity at the reference rate that just lasts a cut from every one of these starts; `None` where no
/// bank does, because the cable alone takes too many volts.
///
/// More capacity never lasts shorter, so the first start is searched by halving and the others mostly
/// need a single look. The answer lasts; it lies at most a thousandth above the smallest that does.
pub fn just_enough(
    plant: &Plant,
    day: &Day,
    starts: &[Hours],
    autonomy: Hours,
    condition: Condition,
    guess: AmpHours,
) -> Option<AmpHours> {
    let lasts = |capacity: f64, start: Hours| {
        let course = Course::new(plant.battery(AmpHours(capacity), condition), day);
        course.lasts(start.0, autonomy.0).served >= autonomy.0
    };
    let first = *starts.first()?;
    let mut enough = guess.0.max(1e-3);
    while lasts(enough, first) {
        enough /= REACH;
        if enough < 1e-6 {
            return Some(AmpHours(enough));
        }
    }
    for &start in starts {
        if lasts(enough, start) {
            continue;
        }
        let mut short = enough;
        while !lasts(enough, start) {
            (short, enough) = (enough, enough * REACH);
            if enough > guess.0.max(1.0) * FARTHEST {
                return None;
            }
        }
        while enough / short > 1.0 + CLOSE {
            let middle = (enough * short).sqrt();
            if lasts(middle, start) { enough = middle } else { short = middle }
        }
    }
    Some(AmpHours(enough))
}
