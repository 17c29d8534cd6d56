//! Mains back: the charge that goes in, by the clock.
//!
//! The current is the unit's setting until a share of the charge is missing no more; from there on it
//! falls in proportion to what is missing (absorption). What does not stay in the battery is lost in the
//! absorption: the efficiency falls in a straight line from one to what makes a cycle as deep as allowed
//! take the charge factor. The incoming breaker may leave less than the setting while loads run.
//!
//! All of it has a closed form in the missing share `x`: a straight line in bulk, an exponential where
//! the breaker limits the absorption, a logistic where the battery does.
//!
//! Source: makers' charging manuals (bulk to about 80 %, falling current behind it, end at 2 to 3 % of
//! the 20 h capacity); the efficiency near full after J. W. Stevens and G. P. Corey, 1996 (from memory),
//! its straight line is our own simplification.

use super::battery::Battery;
use super::day::Day;
use super::wells::{Charge, root};
use crate::sizing::tables::chemistries::properties;
use crate::sizing::{Design, Survey};
use crate::units::{Amps, Hours};

/// How the mains fills the bank.
#[derive(Clone, Debug, PartialEq)]
pub struct Charging {
    /// Setting of the unit within what the bank bears at its temperature, A; nothing where it bears none.
    pub setting: f64,
    /// Share of the charge that is missing when the current begins to fall.
    tail: f64,
    /// Share of the last charge that stays in the battery.
    end_efficiency: f64,
    /// Current at which the bank counts as full, A.
    ends_at: f64,
    /// What the incoming breaker leaves in each stretch of the day, A; empty where it never limits.
    left: Vec<f64>,
    /// How long the unit waits before it takes the mains, h.
    pub wait: f64,
}

/// What went in while the mains was there.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Filled {
    /// Charge from the charger, Ah.
    pub put_in: f64,
    /// Whether the bank was full at the end.
    pub full: bool,
}

impl Charging {
    /// As the unit is set, on the coldest day; the breaker leaves what the loads do not take. Nothing is
    /// charged where there is no mains between cuts, or where it is too cold for the battery.
    pub fn of(survey: &Survey, design: &Design, day: &Day) -> Self {
        let kind = properties(survey.choice.chemistry);
        let (assumptions, charger, site) = (&design.assumptions, &design.charger, &survey.site);
        let frozen = site.battery_coldest < kind.charge_temperature.0;
        let no_mains = survey.outage.mains_between_cuts <= Hours::ZERO;
        let setting = if frozen || no_mains { 0.0 } else { charger.current.min(charger.most).0 };
        let tail = 1.0 - kind.charge_at_end_of_bulk;
        let volts = charger.absorption_coldest.0;
        let gives = site.supply.0 * assumptions.charger_power_factor * assumptions.charger_efficiency / volts;
        let beside = |apparent: f64| (site.incoming_breaker.0 - apparent / site.supply.0).max(0.0) * gives;
        let left: Vec<_> = day.stretches().iter().map(|stretch| beside(stretch.apparent)).collect();
        let limits = left.iter().any(|&left| left < setting);
        Self {
            setting,
            tail,
            end_efficiency: end_efficiency(assumptions.charge_factor, assumptions.depth_of_discharge_max / tail),
            ends_at: assumptions.absorption_ends_a_per_ah * design.bank.installed.0,
            left: if limits { left } else { Vec::new() },
            wait: assumptions.requalification_s / 3600.0,
        }
    }

    /// The same with another setting.
    pub fn set_to(&self, setting: Amps) -> Self {
        Self { setting: setting.0, ..self.clone() }
    }

    /// Share of the charge at which the current begins to fall.
    pub fn end_of_bulk(&self) -> f64 {
        1.0 - self.tail
    }

    /// The law that [`Self::fill`] carries through: the current at an hour of the day while some share of
    /// the charge is missing, and the share of that current that stays.
    pub fn at(&self, missing: f64, day: &Day, hour: f64) -> (f64, f64) {
        let stretch = day.stretches().iter().position(|stretch| hour < stretch.to).unwrap_or(0);
        let limit = self.left.get(stretch).map_or(self.setting, |left| left.min(self.setting));
        let missing = missing.max(0.0);
        if missing >= self.tail {
            return (limit, 1.0);
        }
        (limit.min(self.setting * missing / self.tail), self.efficiency(missing))
    }

    /// Share of the charge that may be missing in a bank that counts as full.
    pub fn missing_when_full(&self) -> f64 {
        if self.setting > 0.0 { (self.tail * self.ends_at / self.setting).min(self.tail) } else { 0.0 }
    }

    /// Fills a bank for some hours of mains from an hour of the day on.
    ///
    /// A difference between the wells dies away meanwhile; what comes in is shared out evenly, since
    /// charging is slow beside it.
    pub fn fill(&self, battery: &Battery, charge: &mut Charge, day: &Day, start: f64, hours: f64) -> Filled {
        let full = battery.wells.full;
        let mut missing = (1.0 - charge.total / full).max(0.0);
        let mut put_in = 0.0;
        if self.left.is_empty() {
            put_in += self.after(&mut missing, self.setting, full, hours) * full;
        } else {
            let mut done = 0.0;
            for (stretch, lasts) in day.from(start) {
                let lasts = lasts.min(hours - done);
                if lasts <= 0.0 {
                    break;
                }
                put_in += self.after(&mut missing, self.setting.min(self.left[stretch]), full, lasts) * full;
                done += lasts;
            }
        }
        *charge = Charge { total: full * (1.0 - missing), beyond: charge.beyond * battery.wells.fading(hours) };
        Filled { put_in, full: missing <= self.missing_when_full() * (1.0 + 1e-9) + 1e-12 }
    }

    /// Missing share after some hours at a limit of the current; gives the share of the charge put in.
    fn after(&self, missing: &mut f64, limit: f64, full: f64, hours: f64) -> f64 {
        if limit <= 0.0 || *missing <= 0.0 {
            return 0.0;
        }
        let (mut left, before) = (hours, *missing);
        let mut bulk = 0.0;
        if *missing > self.tail {
            let time = ((*missing - self.tail) * full / limit).min(left);
            *missing -= limit * time / full;
            bulk = before - *missing;
            left -= time;
        }
        let tail_before = *missing;
        if left <= 0.0 {
            return bulk;
        }
        let turns = self.tail * limit / self.setting;
        if *missing > turns {
            left = self.at_limit(missing, limit, full, left, turns);
        }
        if left > 0.0 {
            self.falling(missing, full, left);
        }
        bulk + self.put_in(tail_before, *missing)
    }

    fn slope(&self) -> f64 {
        (1.0 - self.end_efficiency) / self.tail
    }

    fn efficiency(&self, missing: f64) -> f64 {
        self.end_efficiency + self.slope() * missing
    }

    /// At a constant current: `η` dies away exponentially. Gives the hours left once the current falls by itself.
    fn at_limit(&self, missing: &mut f64, limit: f64, full: f64, hours: f64, turns: f64) -> f64 {
        let (rate, slope) = (limit / full, self.slope());
        let until = if slope > 0.0 {
            (self.efficiency(*missing) / self.efficiency(turns)).ln() / (slope * rate)
        } else {
            (*missing - turns) / rate
        };
        if until <= hours {
            *missing = turns;
            return hours - until;
        }
        *missing = if slope > 0.0 {
            (self.efficiency(*missing) * (-slope * rate * hours).exp() - self.end_efficiency) / slope
        } else {
            *missing - rate * hours
        };
        0.0
    }

    /// While the current falls with what is missing: `x/η` dies away exponentially.
    fn falling(&self, missing: &mut f64, full: f64, hours: f64) {
        let rate = self.setting * self.end_efficiency / (full * self.tail);
        let fading = *missing / self.efficiency(*missing) * (-rate * hours).exp();
        *missing = self.end_efficiency * fading / (1.0 - self.slope() * fading);
    }

    /// Share of the charge put in while what is missing falls, both within the tail.
    fn put_in(&self, before: f64, after: f64) -> f64 {
        let slope = self.slope();
        if slope < 1e-9 {
            return (before - after) / self.efficiency(before);
        }
        (self.efficiency(before) / self.efficiency(after)).ln() / slope
    }

    /// Hours until a bank counts as full, the breaker aside; none where it never does.
    pub fn time_to_full(&self, battery: &Battery, charge: Charge) -> Option<f64> {
        let full = battery.wells.full;
        let (missing, end) = (1.0 - charge.total / full, self.missing_when_full());
        if missing <= end {
            return Some(0.0);
        }
        if self.setting <= 0.0 || end <= 0.0 {
            return None;
        }
        let bulk = (missing - self.tail).max(0.0) * full / self.setting;
        let from = missing.min(self.tail);
        let fading = |x: f64| x / self.efficiency(x);
        let rate = self.setting * self.end_efficiency / (full * self.tail);
        Some(bulk + (fading(from) / fading(end)).ln().max(0.0) / rate)
    }
}

/// The efficiency at full with which a cycle as deep as allowed takes the charge factor.
///
/// All the loss sits in the tail: the mean of `1/η` over it is `1 + (f − 1)·DoD/tail`, and for a straight
/// line from one to `η_1` that mean is `ln(1/η_1)/(1 − η_1)`.
fn end_efficiency(charge_factor: f64, depth_over_tail: f64) -> f64 {
    let mean = 1.0 + (charge_factor - 1.0) * depth_over_tail.max(1.0);
    let off = |efficiency: f64| -efficiency.ln() / (1.0 - efficiency) - mean;
    root(off, 0.01, 1.0 - 1e-9).unwrap_or(if mean > 1.0 + 1e-6 { 0.01 } else { 1.0 })
}
