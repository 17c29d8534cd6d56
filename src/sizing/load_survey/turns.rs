//! Loads that take turns: of each group one runs at a time, and the largest is reckoned with.

use super::items::Item;
use super::power::Power;
use crate::sizing::survey::Load;
use crate::units::Watts;

/// So many sums are kept apart; beyond, their envelope stands for all of them, which is never too low.
const MOST_SUMS: usize = 16;

/// The groups among the lines that may be on in a stretch.
pub struct Turns<'a>(Vec<Vec<&'a Item<'a>>>);

impl<'a> Turns<'a> {
    /// Sorts lines into their groups.
    pub fn of(active: &[&'a Item<'a>]) -> Self {
        let groups = active.iter().filter_map(|item| item.turn).max().map_or(0, |last| last + 1);
        let mut turns = vec![Vec::new(); groups];
        for item in active {
            if let Some(turn) = item.turn {
                turns[turn].push(*item);
            }
        }
        Self(turns)
    }

    /// What may run together on top of what always runs, one member of each group but the one left out.
    ///
    /// Which member weighs most depends on what runs beside it, since P, Q and D add like the sides of
    /// a box; so every sum stays in that is not below another one in all three.
    pub fn sums(&self, always: Power, left_out: Option<usize>, part: fn(&Item) -> Power) -> Vec<Power> {
        let mut sums = vec![always];
        for (turn, members) in self.0.iter().enumerate().filter(|(_, members)| !members.is_empty()) {
            if Some(turn) != left_out {
                let members = highest(members.iter().map(|item| part(item)).collect());
                sums = highest(members.iter().flat_map(|member| sums.iter().map(|sum| *sum + *member)).collect());
            }
            if sums.len() > MOST_SUMS {
                sums = vec![envelope(&sums)];
            }
        }
        sums
    }

    /// Members share the time: their duties add, but never to more than the largest running alone.
    pub fn average(&self) -> Watts {
        let of_group = |members: &Vec<&Item>| {
            let largest = members.iter().map(|item| item.running.real).fold(Watts::ZERO, Watts::max);
            members.iter().map(|item| item.average).sum::<Watts>().min(largest)
        };
        self.0.iter().map(of_group).sum()
    }

    /// The number of groups.
    pub fn count(&self) -> usize {
        self.0.len()
    }
}

/// Those powers that no other one covers in P, Q and D.
fn highest(mut powers: Vec<Power>) -> Vec<Power> {
    if powers.len() > 1 {
        powers.sort_by(|a, b| b.real.order(&a.real).then(b.reactive.order(&a.reactive)));
        let mut kept: Vec<Power> = Vec::new();
        for power in powers {
            if !kept.iter().any(|other| covers(other, &power)) {
                kept.push(power);
            }
        }
        return kept;
    }
    powers
}

fn covers(above: &Power, below: &Power) -> bool {
    above.real >= below.real && above.reactive >= below.reactive && above.distortion >= below.distortion
}

fn envelope(powers: &[Power]) -> Power {
    powers.iter().fold(Power::default(), |high, power| Power {
        real: high.real.max(power.real),
        reactive: high.reactive.max(power.reactive),
        distortion: high.distortion.max(power.distortion),
    })
}

/// The names of the groups that take turns, in alphabetical order.
pub fn names(loads: &[Load]) -> Vec<&str> {
    let mut names: Vec<_> = loads.iter().filter_map(|load| load.turn.as_deref()).collect();
    names.sort_unstable();
    names.dedup();
    names
}
