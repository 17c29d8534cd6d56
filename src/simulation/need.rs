//! The smallest bank that lasts the cut from every start, when it is played through.

use super::cut::Course;
use super::day::Day;
use super::plant::{Condition, Plant};
use crate::units::{AmpHours, Hours};

/// Capacities are tried on a ladder whose rungs lie so far apart; so the answer to a harder question is
/// never a lower rung.
const RUNG: f64 = 1.001;
/// The search begins so many rungs from the guess, and widens by as many.
const REACH: i32 = 220;
/// A bank so many rungs above the guess is no answer any more: the cable alone takes too many volts.
const FARTHEST: i32 = 14_000;
/// Below this rung no bank is worth asking for.
const LOWEST: i32 = -14_000;

/// Capacity at the reference rate that just lasts a cut from every one of these starts; `None` where no
/// bank does, because the cable alone takes too many volts.
///
/// More capacity never lasts shorter, so a start is searched by halving; with the hardest one first, the
/// others mostly need a single look. The answer lasts, and lies at most a thousandth above the smallest that does.
pub fn just_enough(
    plant: &Plant,
    day: &Day,
    starts: &[Hours],
    autonomy: Hours,
    condition: Condition,
    guess: AmpHours,
) -> Option<AmpHours> {
    let capacity = |rung: i32| AmpHours(RUNG.powi(rung));
    let lasts = |rung: i32, start: Hours| {
        let course = Course::new(plant.battery(capacity(rung), condition), day);
        course.lasts(start.0, autonomy.0).served >= autonomy.0
    };
    let first = *starts.first()?;
    let guessed = (guess.0.max(1e-3).ln() / RUNG.ln()).ceil() as i32;
    let mut enough = guessed;
    while enough > LOWEST && lasts(enough, first) {
        enough -= REACH;
    }
    for &start in starts {
        if lasts(enough, start) {
            continue;
        }
        let mut short = enough;
        while !lasts(enough, start) {
            (short, enough) = (enough, enough + REACH);
            if enough > guessed.max(0) + FARTHEST {
                return None;
            }
        }
        while enough - short > 1 {
            let middle = short + (enough - short) / 2;
            if lasts(middle, start) { enough = middle } else { short = middle }
        }
    }
    Some(capacity(enough))
}
