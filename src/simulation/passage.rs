//! A bank through cut after cut, filled by the mains in between.

use super::cut::{Course, End};
use super::day::DAY;
use super::offs::Off;
use super::recharge::Charging;
use super::wells::Charge;
use crate::sizing::proof::EndedBy;

/// A bank with its day and what fills it.
#[derive(Clone, Debug)]
pub struct Passage<'a> {
    /// Bank and day.
    pub course: Course<'a>,
    /// What fills it.
    pub charging: Charging,
}

/// A cut with what came before it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Passed {
    /// The time without mains.
    pub off: Off,
    /// Whether the bank counted as full when the mains went.
    pub was_full: bool,
    /// Charge when the mains went.
    pub before: Charge,
    /// Charge when it came back.
    pub after: Charge,
    /// Charge the mains had put in since the cut before, Ah.
    pub put_in: f64,
    /// Charge the cut took, Ah.
    pub taken: f64,
    /// How the cut ended for the bank.
    pub end: End,
}

impl Passed {
    /// Whether the bank stopped before the mains was back.
    pub fn ran_out(&self) -> bool {
        self.end.by != EndedBy::CutEnds
    }

    /// Hours without mains and without the bank.
    pub fn unserved(&self) -> f64 {
        self.off.to - self.off.from - self.end.served
    }
}

impl Passage<'_> {
    /// Plays cuts in the order of time from a full bank on; each is shown when it is over.
    ///
    /// The unit takes the mains some time after it is back, and carries the loads until then. Once it has
    /// stopped it rests until the mains is back.
    pub fn play(&self, offs: &[Off], mut seen: impl FnMut(&Passed)) -> Charge {
        let Self { course, charging } = self;
        let (battery, day) = (&course.battery, course.day);
        let mut charge = battery.wells.filled();
        let mut now: f64 = 0.0;
        let mut offs = offs.iter().copied().peekable();
        while let Some(mut off) = offs.next() {
            while let Some(next) = offs.next_if(|next| next.from <= off.to + charging.wait) {
                off.to = next.to.max(off.to);
            }
            let filled = charging.fill(battery, &mut charge, day, now.rem_euclid(DAY), off.from - now);
            let before = charge;
            let hours = off.to - off.from + charging.wait;
            let mut end = course.play(&mut charge, off.from, hours);
            let taken = before.total - charge.total;
            if end.by != EndedBy::CutEnds {
                let rest = hours - end.served;
                charge = battery.wells.after(charge, 0.0, rest, battery.wells.fading(rest));
            }
            end.served = end.served.min(off.to - off.from);
            if end.served >= off.to - off.from {
                end.by = EndedBy::CutEnds;
            }
            let was_full = filled.full;
            seen(&Passed { off, was_full, before, after: charge, put_in: filled.put_in, taken, end });
            now = off.to + charging.wait;
        }
        charge
    }
}
