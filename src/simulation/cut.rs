//! One cut: the day's powers drawn from the bank until it ends, or until the bank does.

use super::battery::{Battery, FINE};
use super::day::Day;
use super::wells::Charge;
use crate::sizing::proof::EndedBy;

/// A bank with the day it has to carry.
#[derive(Clone, Debug)]
pub struct Course<'a> {
    /// The bank.
    pub battery: Battery,
    /// The day.
    pub day: &'a Day,
    /// Charge at hand below which each stretch of the day can no longer be carried, Ah.
    floors: Vec<f64>,
    /// Share by which the mean current of a step may differ from that in its middle.
    error: f64,
}

/// How a cut ended.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct End {
    /// Hours served.
    pub served: f64,
    /// What ended it.
    pub by: EndedBy,
}

/// A stretch of the cut, as it was played.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Played {
    /// Which stretch of the day.
    pub stretch: usize,
    /// Hours into the cut at which it ended.
    pub to: f64,
    /// Charge when it began.
    pub before: Charge,
    /// Charge when it ended.
    pub after: Charge,
}

impl<'a> Course<'a> {
    /// A bank with the day it has to carry.
    pub fn new(battery: Battery, day: &'a Day) -> Self {
        let floors = day.stretches().iter().map(|stretch| battery.floor(stretch.drawn)).collect();
        Self { battery, day, floors, error: FINE }
    }

    /// The same in coarser steps.
    pub fn in_steps_of(self, error: f64) -> Self {
        Self { error, ..self }
    }

    /// Plays a cut of some hours from an hour of the day on.
    pub fn play(&self, charge: &mut Charge, start: f64, hours: f64) -> End {
        self.play_seen(charge, start, hours, |_| {})
    }

    /// The same; each stretch is shown when it is over.
    pub fn play_seen(&self, charge: &mut Charge, start: f64, hours: f64, mut seen: impl FnMut(Played)) -> End {
        let mut served = 0.0;
        for (stretch, lasts) in self.day.from(start) {
            let left = hours - served;
            if left <= 0.0 {
                break;
            }
            let (last, before) = (lasts >= left, *charge);
            let (watts, floor) = (self.day.stretches()[stretch].drawn, self.floors[stretch]);
            let drained = self.battery.drain(charge, watts, floor, if last { left } else { lasts }, self.error);
            let to = if last && !drained.reached_floor { hours } else { served + drained.hours };
            seen(Played { stretch, to, before, after: *charge });
            if drained.reached_floor && to < hours {
                return End { served: to, by: self.why(*charge, watts, floor) };
            }
            served = to;
        }
        End { served: hours, by: EndedBy::CutEnds }
    }

    fn why(&self, charge: Charge, watts: f64, floor: f64) -> EndedBy {
        if floor <= 0.0 {
            EndedBy::EmptyWell
        } else if self.battery.draw(self.battery.wells.head(charge), watts).is_none() {
            EndedBy::Overload
        } else {
            EndedBy::CutOff
        }
    }

    /// Hours that a full bank lasts from an hour of the day on, up to a limit.
    pub fn lasts(&self, start: f64, limit: f64) -> End {
        self.play(&mut self.battery.wells.filled(), start, limit)
    }
}
