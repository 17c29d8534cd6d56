//! The thinnest cable of the table that meets everything asked of a run.

use super::laying::{Laying, Size};
use super::runs::{Plan, Start};
use super::voltage_drop::{alternating, direct, loop_reactance, loop_resistance};
use crate::sizing::protection::{CONTINUOUS, Device};
use crate::sizing::survey::Code;
use crate::units::{Amps, Ohms, SquareMillimetres};

/// Conductors per pole that are still fitted to one terminal; common practice, no source.
pub const MOST_IN_PARALLEL: u32 = 4;

/// Thinner conductors are not laid in parallel.
///
/// Sources (from memory): NEC 310.10(G), 1/0 AWG; IEC 60364-5-52 leaves it to the countries, of which some have 50 mm².
const PARALLEL_FROM: SquareMillimetres = SquareMillimetres(50.0);

/// A run with all that its cable is judged by.
pub struct Question<'a> {
    /// What it carries.
    pub plan: &'a Plan,
    /// How it is laid.
    pub laying: &'a Laying,
    /// Its fuse or breaker.
    pub device: &'a Device,
    /// The thinnest conductor that bears the fault.
    pub least_for_fault: SquareMillimetres,
}

/// A size, so many times per pole, with what follows from it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Candidate {
    /// The size.
    pub size: Size,
    /// Conductors per pole.
    pub parallel: u32,
    /// Capacity after all corrections (I_z).
    pub capacity: Amps,
    /// Resistance of both conductors, warm.
    pub loop_resistance: Ohms,
    /// Drop over both conductors, in V.
    pub drop: f64,
    /// Drop over the nominal volts.
    pub drop_share: f64,
}

impl Question<'_> {
    /// The first that carries the current, bears the fault and keeps the drop, running and starting: single conductors
    /// before parallel ones, thin before thick. Failing that the thickest there is, which comes nearest; the
    /// findings say what it lacks.
    pub fn answer(&self) -> Option<Candidate> {
        let sizes = self.laying.sizes();
        self.candidates(&sizes).find(|one| self.is_sound(one)).or_else(|| self.candidates(&sizes).last())
    }

    fn candidates<'s>(&'s self, sizes: &'s [Size]) -> impl Iterator<Item = Candidate> + 's {
        (1..=MOST_IN_PARALLEL).flat_map(move |parallel| {
            sizes
                .iter()
                .filter(move |size| parallel == 1 || size.area >= PARALLEL_FROM)
                .map(move |size| self.candidate(*size, parallel))
        })
    }

    fn candidate(&self, size: Size, parallel: u32) -> Candidate {
        let plan = self.plan;
        let resistance = loop_resistance(&size, plan.length, parallel);
        let drop = if plan.run.is_dc() {
            direct(plan.current, resistance)
        } else {
            alternating(plan.current, resistance, loop_reactance(plan.length, parallel), plan.power_factor)
        };
        let capacity = self.laying.capacity(&size, parallel);
        Candidate { size, parallel, capacity, loop_resistance: resistance, drop, drop_share: drop / plan.nominal }
    }

    fn is_sound(&self, one: &Candidate) -> bool {
        let keeps_drop = one.drop_share <= self.plan.drop.target && self.keeps_start(one);
        self.carries(one) && self.bears_fault(one) && keeps_drop
    }

    /// Whether the hardest motor's start loses no more than it may.
    fn keeps_start(&self, one: &Candidate) -> bool {
        self.plan.start.is_none_or(|start| self.start_drop_share(one, start) <= start.limit)
    }

    /// What a start loses over both conductors, over the nominal volts.
    pub fn start_drop_share(&self, one: &Candidate, start: Start) -> f64 {
        direct(start.current, one.loop_resistance) / self.plan.nominal
    }

    /// Whether it carries the current and the device protects it; where the trade has no device, whether it would
    /// carry what the device had to.
    pub fn carries(&self, one: &Candidate) -> bool {
        one.capacity >= self.plan.current
            && self.shares_well(one)
            && self.terminals_carry(one)
            && self.is_protected(one)
    }

    /// No conductor carries more than one cable should.
    fn shares_well(&self, one: &Candidate) -> bool {
        let share = self.plan.current / f64::from(one.parallel);
        self.plan.per_conductor.is_none_or(|most| share <= most)
    }

    /// NEC 210.19, 215.2: before any correction the conductor carries 125 % of what flows all day.
    fn terminals_carry(&self, one: &Candidate) -> bool {
        let terminals = one.size.terminals.map(|each| each * f64::from(one.parallel));
        terminals.is_none_or(|terminals| terminals >= self.carried())
    }

    fn is_protected(&self, one: &Candidate) -> bool {
        match self.device.rating {
            Some(rating) => {
                let within_cap = one.size.device_cap.is_none_or(|cap| rating <= cap);
                within_cap && self.device.protects(one.capacity)
            }
            None => one.capacity >= self.carried(),
        }
    }

    fn carried(&self) -> Amps {
        carried(self.plan, self.laying.code)
    }

    /// Whether each of its conductors bears the fault alone.
    pub fn bears_fault(&self, one: &Candidate) -> bool {
        one.size.area >= self.least_for_fault
    }
}

/// What the device must carry: the design current, a quarter more at the battery and under the NEC.
pub fn carried(plan: &Plan, code: Code) -> Amps {
    plan.current * if plan.run.is_dc() || code == Code::Nec { CONTINUOUS } else { 1.0 }
}
