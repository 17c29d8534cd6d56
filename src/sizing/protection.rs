//! The fuse or breaker of a run: its rating, what it breaks, and whether it protects the cable.
//!
//! `I_b ≤ I_n ≤ I_z` and `I_2 ≤ 1.45 · I_z`, by kind of device; the device bears the volts and breaks
//! the largest fault. The rating follows from the current alone, so the cable is chosen behind it,
//! thicker where the rating asks for it.

use super::survey::Code;
use super::tables::protection_ratings::{
    BATTERY_FUSES, BREAKER_LET_THROUGH, BatteryFuse, GG_FUSE_BREAKS, GG_FUSES, MINIATURE_BREAKER_BREAKS,
    MINIATURE_BREAKERS, NEC_DEVICE_BREAKS, NEC_DEVICES,
};
use crate::units::{Amps, DcVolts, Hertz, Kiloamps, Seconds};

/// A battery's fuse and every device under the NEC stand this far above the current they carry all day.
///
/// Sources: our rule for battery fuses, whose makers give no conventional fusing current; NEC 210.20 and
/// 215.3 (from memory).
pub const CONTINUOUS: f64 = 1.25;

/// Above this rating the NEC allows no next size up: 240.4(B).
const NEXT_SIZE_UP_TO: Amps = Amps(800.0);

/// Fault current over the rating at which a C-curve breaker surely opens at once. Source (from memory): IEC 60898-1.
pub const TRIPS_AT_ONCE: f64 = 10.0;

/// Fault current over the rating at which a battery fuse surely opens within five seconds.
///
/// Source (from memory): the gates of IEC 60269-1 for gG fuse-links, 5 to 8 times by rating; short-time battery
/// fuses are faster.
pub const OPENS_WITHIN_SECONDS: f64 = 5.0;

/// How a device acts on overload.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Kind {
    /// Short-time fuse at the battery: no conventional fusing current, so `I_n ≤ I_z`.
    BatteryFuse,
    /// IEC 60898-1: `I_2 = 1.45 · I_n`.
    MiniatureBreaker,
    /// IEC 60269-1 class gG: `I_2` is 1.6, 1.9 or 2.1 times `I_n` by rating.
    GgFuse,
    /// NEC 240.6(A): no `I_2`; the next size up is allowed.
    NecDevice,
}

/// A fuse or breaker.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Device {
    /// How it acts on overload.
    pub kind: Kind,
    /// What the installer asks for.
    pub name: &'static str,
    /// Rating (I_n); `None` when the trade has none this large.
    pub rating: Option<Amps>,
    /// Fault current it breaks.
    pub breaks: Kiloamps,
}

/// The battery fuse that carries a current, bears the volts and breaks the fault: of the families that
/// do, the plainest. Where none breaks the fault, the one that breaks most.
pub fn for_battery(carried: Amps, volts: DcVolts, fault: Kiloamps) -> Device {
    let bears = || BATTERY_FUSES.iter().filter_map(|family| Some((family, family.breaks_at(volts)?)));
    let large_enough = || bears().filter(|(family, _)| standard_rating(family.ratings, carried).is_some());
    large_enough()
        .find(|(_, breaks)| *breaks >= fault)
        .or_else(|| large_enough().max_by(|a, b| a.1.order(&b.1)))
        .or_else(|| bears().max_by(|a, b| a.1.order(&b.1)))
        .map_or(NONE_FOR_THESE_VOLTS, |(family, breaks)| battery_fuse(family, carried, breaks))
}

const NONE_FOR_THESE_VOLTS: Device =
    Device { kind: Kind::BatteryFuse, name: "battery fuse", rating: None, breaks: Kiloamps(0.0) };

fn battery_fuse(family: &BatteryFuse, carried: Amps, breaks: Kiloamps) -> Device {
    let rating = standard_rating(family.ratings, carried);
    Device { kind: Kind::BatteryFuse, name: family.name, rating, breaks }
}

/// The device on the supply's side: under the IEC a miniature breaker, or a gG fuse where the current or the
/// fault is too large for one; under the NEC a breaker.
pub fn for_supply(code: Code, carried: Amps, fault: Kiloamps) -> Device {
    let of = |kind, name, ratings, breaks| Device {
        kind,
        name,
        rating: standard_rating(ratings, carried),
        breaks: breaking_capacity(breaks, fault),
    };
    if code == Code::Nec {
        return of(Kind::NecDevice, "inverse-time circuit breaker", NEC_DEVICES, NEC_DEVICE_BREAKS);
    }
    let breaker = of(
        Kind::MiniatureBreaker,
        "miniature circuit breaker, C curve, energy class 3",
        MINIATURE_BREAKERS,
        MINIATURE_BREAKER_BREAKS,
    );
    if breaker.rating.is_some() && breaker.breaks >= fault {
        return breaker;
    }
    of(Kind::GgFuse, "gG fuse", GG_FUSES, GG_FUSE_BREAKS)
}

/// The smallest standard rating that carries a current.
fn standard_rating(ratings: &[f64], carried: Amps) -> Option<Amps> {
    ratings.get(ratings.partition_point(|rating| *rating < carried.0)).map(|rating| Amps(*rating))
}

/// The smallest breaking capacity that is enough, or the largest there is.
fn breaking_capacity(steps: &[f64], fault: Kiloamps) -> Kiloamps {
    Kiloamps(steps[steps.partition_point(|step| *step < fault.0).min(steps.len() - 1)])
}

impl Device {
    /// Whether a cable of this capacity (I_z) is protected against overload.
    ///
    /// Without a rating there is nothing to protect it. Sources: IEC 60364-4-43, read in two reproductions;
    /// the shares of gG fuses in one; NEC 240.4(B) in a quotation.
    pub fn protects(&self, capacity: Amps) -> bool {
        let Some(rating) = self.rating else { return false };
        match self.kind {
            Kind::BatteryFuse | Kind::MiniatureBreaker => rating <= capacity,
            Kind::GgFuse => rating <= capacity * gg_share(rating),
            Kind::NecDevice => rating <= capacity || is_next_size_up(rating, capacity),
        }
    }

    /// The current at which it surely opens within its conventional time (I_2); `None` where its standard has none.
    ///
    /// Source (from memory): IEC 60898-1, IEC 60269-1.
    pub fn opens_surely_at(&self) -> Option<Amps> {
        let rating = self.rating?;
        match self.kind {
            Kind::MiniatureBreaker => Some(rating * 1.45),
            Kind::GgFuse => Some(rating * gg_conventional_multiple(rating)),
            Kind::BatteryFuse | Kind::NecDevice => None,
        }
    }

    /// Energy that passes on a fault, in A²s, before it has opened.
    ///
    /// `I²·t` at most; on the supply's side never more than half a cycle where the fault trips it at once,
    /// and no more than the breaker's energy class where it has one. Breakers under the NEC are taken to limit
    /// as those of the class.
    pub fn lets_through(&self, fault: Kiloamps, clears_in: Seconds, frequency: Hertz) -> f64 {
        let squared = (fault.0 * 1000.0).powi(2);
        if self.kind == Kind::BatteryFuse || !self.trips_at_once(fault) {
            return squared * clears_in.0;
        }
        let half_cycle = squared * clears_in.0.min(0.5 / frequency.0);
        self.energy_class(fault).map_or(half_cycle, |class| class.min(half_cycle))
    }

    fn trips_at_once(&self, fault: Kiloamps) -> bool {
        self.rating.is_some_and(|rating| fault.0 * 1000.0 >= rating.0 * TRIPS_AT_ONCE)
    }

    fn energy_class(&self, fault: Kiloamps) -> Option<f64> {
        if self.kind == Kind::GgFuse {
            return None;
        }
        let row = BREAKER_LET_THROUGH.iter().find(|row| self.rating.is_some_and(|rating| rating <= row.rating))?;
        match fault.0 {
            ka if ka <= 6.0 => Some(row.at_6_ka),
            ka if ka <= 10.0 => Some(row.at_10_ka),
            _ => None,
        }
    }
}

/// Largest rating of a gG fuse over the capacity it protects.
fn gg_share(rating: Amps) -> f64 {
    match rating.0 {
        a if a <= 4.0 => 0.69,
        a if a < 16.0 => 0.75,
        _ => 0.9,
    }
}

/// Conventional fusing current of a gG fuse over its rating.
fn gg_conventional_multiple(rating: Amps) -> f64 {
    match rating.0 {
        a if a <= 4.0 => 2.1,
        a if a < 16.0 => 1.9,
        _ => 1.6,
    }
}

/// NEC 240.4(B): the smallest standard rating above a capacity that is itself no standard rating.
fn is_next_size_up(rating: Amps, capacity: Amps) -> bool {
    rating <= NEXT_SIZE_UP_TO && standard_rating(NEC_DEVICES, capacity) == Some(rating)
}

#[cfg(test)]
mod tests;
