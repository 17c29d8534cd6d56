//! One bank in one state of age and warmth: its wells, its volts, and the current of a constant power.
//!
//! `V = n·OCV(s) − I·R(s)` with `s` the head of the well at hand, so that the volts sag under a load and
//! come back after it. A constant power behind that draws the smaller root of `R·I² − V_oc·I + P = 0`.

use super::wells::{Charge, Wells};
use crate::sizing::tables::chemistries::Properties;
use crate::units::DcVolts;

/// A bank as the unit meets it at its terminals, cable included.
#[derive(Clone, Copy, Debug)]
pub struct Battery {
    /// Its charge.
    pub wells: Wells,
    /// Open-circuit volts and rise of the resistance.
    pub kind: &'static Properties,
    /// Cells in series.
    pub cells: f64,
    /// Resistance of the full bank, Ω.
    pub resistance: f64,
    /// Both conductors of the cable to the unit, Ω.
    pub lead: f64,
    /// Volts at which the unit stops.
    pub cut_off: DcVolts,
}

/// What a constant power meets at one moment.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Draw {
    /// Current, A.
    pub current: f64,
    /// Volts at the unit.
    pub volts: f64,
}

impl Battery {
    fn open_circuit(&self, head: f64) -> f64 {
        self.kind.open_circuit_at(head).0 * self.cells
    }

    /// Resistance of bank and cable.
    fn resistance_at(&self, head: f64) -> f64 {
        self.resistance * self.kind.resistance_rise(head) + self.lead
    }

    /// Current and volts while a power is drawn at the unit; `None` where no current delivers it.
    pub fn draw(&self, head: f64, watts: f64) -> Option<Draw> {
        let (open, resistance) = (self.open_circuit(head), self.resistance_at(head));
        let inside = open * open - 4.0 * resistance * watts;
        let volts = (open + inside.max(0.0).sqrt()) / 2.0;
        (inside >= 0.0).then_some(Draw { current: watts / volts, volts })
    }

    /// Volts at the unit while a motor starts; where no current delivers the power, half of the
    /// open-circuit volts, at which a source gives most.
    pub fn sags_to(&self, head: f64, watts: f64) -> f64 {
        self.draw(head, watts).map_or_else(|| self.open_circuit(head) / 2.0, |draw| draw.volts)
    }

    /// The head of the well at hand at which this power brings the unit to its cut-off.
    ///
    /// There `n·OCV(s) − I·R(s) = V_cut-off` with `I = P / V_cut-off`. Both sides are straight between the
    /// points of the open-circuit table and the left one rises with `s`, so the crossing is found exactly.
    /// Nothing where even an empty well keeps the volts; above one where a full bank does not.
    pub fn head_at_cut_off(&self, watts: f64) -> f64 {
        let current = watts / self.cut_off.0;
        let left = |head: f64, open: f64| open * self.cells - current * self.resistance_at(head) - self.cut_off.0;
        let (full, lower) = self.kind.open_circuit.split_first().expect("a table has rows");
        let mut above = (full.0, left(full.0, full.1));
        if above.1 < 0.0 {
            return 2.0;
        }
        for &(head, open) in lower {
            let here = left(head, open);
            if here < 0.0 {
                return head + (above.0 - head) * here / (here - above.1);
            }
            above = (head, here);
        }
        0.0
    }

    /// Charge at hand below which this power can no longer be drawn, Ah.
    pub fn floor(&self, watts: f64) -> f64 {
        self.head_at_cut_off(watts) * self.wells.at_hand * self.wells.full
    }

    /// Lets a constant power be drawn for some hours. When the charge at hand comes down to the floor
    /// before, the discharge ends there and then.
    ///
    /// Over a step the current is taken as constant, at its mean by Simpson's rule over beginning, middle
    /// and end; the charge then follows in closed form. The step is kept so short that this mean and the
    /// current in the middle differ by no more than the share `error`.
    pub fn drain(&self, charge: &mut Charge, watts: f64, floor: f64, hours: f64, error: f64) -> Drained {
        if watts <= 0.0 {
            *charge = self.wells.after(*charge, 0.0, hours, self.wells.fading(hours));
            return Drained { hours, reached_floor: false };
        }
        if self.wells.at_hand(*charge) <= floor {
            return Drained { hours: 0.0, reached_floor: true };
        }
        let (mut done, mut step) = (0.0, hours);
        let mut first = self.current(*charge, watts);
        while done < hours {
            let left = hours - done;
            let (last, length) = (step >= left, step.min(left));
            let faded = self.wells.fading(length / 2.0);
            let middle = self.current(self.wells.after(*charge, first, length / 2.0, faded), watts);
            let end = self.current(self.wells.after(*charge, middle, length, faded * faded), watts);
            let mean = (first + 4.0 * middle + end) / 6.0;
            let span = mean * length / (self.wells.at_hand * self.wells.full) / REACH;
            let off = ((mean - middle).abs() / mean).max(span * span);
            if off > error && length > SHORTEST {
                step = length * (0.9 * (error / off).sqrt()).clamp(0.1, 0.8);
                continue;
            }
            let next = self.wells.after(*charge, mean, length, faded * faded);
            if self.wells.at_hand(next) <= floor {
                let (time, current) = self.crossing(*charge, watts, floor, mean, length);
                *charge = self.wells.after(*charge, current, time, self.wells.fading(time));
                return Drained { hours: done + time, reached_floor: true };
            }
            (*charge, first) = (next, end);
            done = if last { hours } else { done + length };
            step = length * (0.9 * (error / off.max(1e-12)).sqrt()).clamp(0.5, 4.0);
        }
        Drained { hours, reached_floor: false }
    }

    /// When the charge at hand meets the floor within a step, and the current that brings it there.
    fn crossing(&self, charge: Charge, watts: f64, floor: f64, mean: f64, length: f64) -> (f64, f64) {
        let mut current = mean;
        let mut time = self.wells.reaches(charge, current, floor, length);
        for _ in 0..2 {
            let first = self.current(charge, watts);
            let faded = self.wells.fading(time / 2.0);
            let middle = self.current(self.wells.after(charge, first, time / 2.0, faded), watts);
            let end = self.current(self.wells.after(charge, middle, time, faded * faded), watts);
            current = (first + 4.0 * middle + end) / 6.0;
            time = self.wells.reaches(charge, current, floor, length);
        }
        (time, current)
    }

    /// Current of a power; where none delivers it, that of the greatest power the bank can give.
    fn current(&self, charge: Charge, watts: f64) -> f64 {
        let head = self.wells.head(charge).max(0.0);
        let (open, resistance) = (self.open_circuit(head), self.resistance_at(head));
        let root = (open * open - 4.0 * resistance * watts).max(0.0).sqrt();
        2.0 * watts / (open + root)
    }
}

/// Share by which the mean current of a step may differ from that in its middle.
pub const FINE: f64 = 2e-4;
/// What a step may take from the well at hand, over the root of the error: between two points of the tables
/// the volts may bend where neither beginning, middle nor end of a longer step would show it.
const REACH: f64 = 8.0;
/// No step is made shorter than this for the sake of the current, in hours.
const SHORTEST: f64 = 1e-5;

/// How a discharge went on.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Drained {
    /// Hours until its end or until the floor.
    pub hours: f64,
    /// Whether the charge at hand came down to the floor.
    pub reached_floor: bool,
}
