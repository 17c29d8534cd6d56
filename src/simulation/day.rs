//! The day as the bank meets it: what the unit draws, stretch by stretch.

use crate::sizing::design::{DayStretch, Losses};

/// Hours of a day.
pub const DAY: f64 = 24.0;

/// The day in stretches of constant power; equal neighbours are one.
#[derive(Clone, Debug, PartialEq)]
pub struct Day {
    stretches: Vec<Stretch>,
}

/// A stretch in which nothing changes.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Stretch {
    /// End, in hours since midnight.
    pub to: f64,
    /// Average power of the loads, W.
    pub load: f64,
    /// What the unit draws from the bank for it, W.
    pub drawn: f64,
    /// Apparent power with everything on that may be on, VA: what the mains carries beside the charger.
    pub apparent: f64,
}

impl Day {
    /// The stretches of a demand behind a unit's losses.
    pub fn of(day: &[DayStretch], losses: &Losses) -> Self {
        let mut stretches: Vec<Stretch> = Vec::with_capacity(day.len());
        for one in day {
            let (to, load, apparent) = (one.to.hours().0, one.average.0, one.peak_va.0);
            match stretches.last_mut() {
                Some(last) if last.load == load && last.apparent == apparent => last.to = to,
                _ => stretches.push(Stretch { to, load, drawn: losses.drawn(one.average).0, apparent }),
            }
        }
        Self { stretches }
    }

    /// The stretches from midnight to midnight.
    pub fn stretches(&self) -> &[Stretch] {
        &self.stretches
    }

    /// The stretches from an hour of the day on, without end: which one, and how long it lasts from then.
    pub fn from(&self, start: f64) -> impl Iterator<Item = (usize, f64)> + '_ {
        let hour = start.rem_euclid(DAY);
        let first = self.stretches.partition_point(|stretch| stretch.to <= hour).min(self.stretches.len() - 1);
        let lasts = self.stretches[first].to - hour;
        let begin = |at: usize| if at == 0 { 0.0 } else { self.stretches[at - 1].to };
        let mut at = first;
        std::iter::once((first, lasts)).chain(std::iter::from_fn(move || {
            at = (at + 1) % self.stretches.len();
            Some((at, self.stretches[at].to - begin(at)))
        }))
    }
}
