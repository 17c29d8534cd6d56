//! Rated currents of fuses and breakers, in A, smallest first, and what they break.
//!
//! gG fuse-links: preferred currents of IEC 60269-1, read, but 8, 12 and 1250 A, which are left out.
//! Breakers: IEC 60898-1, read. NEC Table 240.6(A), read. Battery fuses: class T by UL 248-15, sizes from
//! memory; the others are trade sizes, from memory; no standard fixes their ratings.

use crate::units::{Amps, DcVolts, Kiloamps};

/// IEC 60898-1, alternating current.
pub const MINIATURE_BREAKERS: &[f64] =
    &[6.0, 8.0, 10.0, 13.0, 16.0, 20.0, 25.0, 32.0, 40.0, 50.0, 63.0, 80.0, 100.0, 125.0];

/// IEC 60269-1, full range, alternating current.
pub const GG_FUSES: &[f64] = &[
    2.0, 4.0, 6.0, 10.0, 16.0, 20.0, 25.0, 32.0, 40.0, 50.0, 63.0, 80.0, 100.0, 125.0, 160.0, 200.0, 250.0, 315.0,
    400.0, 500.0, 630.0, 800.0, 1000.0,
];

/// NEC Table 240.6(A), fuses and inverse-time breakers.
pub const NEC_DEVICES: &[f64] = &[
    15.0, 20.0, 25.0, 30.0, 35.0, 40.0, 45.0, 50.0, 60.0, 70.0, 80.0, 90.0, 100.0, 110.0, 125.0, 150.0, 175.0, 200.0,
    225.0, 250.0, 300.0, 350.0, 400.0, 450.0, 500.0, 600.0, 700.0, 800.0, 1000.0, 1200.0, 1600.0, 2000.0, 2500.0,
    3000.0, 4000.0, 5000.0, 6000.0,
];

/// ISO 8820-5 type SF30, small bolt-down strip fuse.
const SF30_FUSES: &[f64] = &[30.0, 40.0, 50.0, 60.0, 70.0, 80.0, 100.0, 125.0, 150.0, 175.0, 200.0];

/// ISO 8820-5 type SF51, large bolt-down strip fuse.
const SF51_FUSES: &[f64] = &[100.0, 125.0, 150.0, 175.0, 200.0, 225.0, 250.0, 300.0, 400.0, 500.0];

/// Block fuse on the battery post.
const POST_FUSES: &[f64] =
    &[30.0, 40.0, 50.0, 60.0, 75.0, 80.0, 90.0, 100.0, 125.0, 150.0, 175.0, 200.0, 225.0, 250.0, 300.0];

/// Open strip fuse.
const ANL_FUSES: &[f64] =
    &[35.0, 40.0, 50.0, 60.0, 80.0, 100.0, 130.0, 150.0, 175.0, 200.0, 225.0, 250.0, 300.0, 350.0, 400.0, 500.0];

/// UL 248-15, 1 to 1200 A by its scope, which was read; the sizes from memory.
const CLASS_T_FUSES: &[f64] = &[
    30.0, 35.0, 40.0, 45.0, 50.0, 60.0, 70.0, 80.0, 90.0, 100.0, 110.0, 125.0, 150.0, 175.0, 200.0, 225.0, 250.0,
    300.0, 350.0, 400.0, 450.0, 500.0, 600.0,
];

/// IEC 60269-7 on NH bodies, ratings of IEC 60269-1.
const NH_FUSES: &[f64] = &[63.0, 80.0, 100.0, 125.0, 160.0, 200.0, 250.0, 315.0, 400.0, 500.0, 630.0];

/// A family of fuses that may stand in a battery's lead.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct BatteryFuse {
    /// What the installer asks for.
    pub name: &'static str,
    /// Rated currents in A, smallest first.
    pub ratings: &'static [f64],
    /// What it breaks on direct current: up to these volts, this current; lowest volts first.
    pub breaks: &'static [(DcVolts, Kiloamps)],
}

impl BatteryFuse {
    /// What it breaks at these volts; nothing above its highest.
    pub fn breaks_at(&self, volts: DcVolts) -> Option<Kiloamps> {
        self.breaks.iter().find(|row| volts <= row.0).map(|row| row.1)
    }
}

/// Battery fuses, the plainest first. Volts and breaking capacities from memory (trade data), but class T:
/// 20 kA at 125 V, read in one summary; the marking on the part decides.
pub const BATTERY_FUSES: [BatteryFuse; 6] = [
    BatteryFuse {
        name: "ISO 8820-5 SF30 bolt-down fuse, 32 V DC, at the battery end",
        ratings: SF30_FUSES,
        breaks: &[(DcVolts(32.0), Kiloamps(2.0))],
    },
    BatteryFuse {
        name: "ISO 8820-5 SF51 bolt-down fuse, 32 V DC, at the battery end",
        ratings: SF51_FUSES,
        breaks: &[(DcVolts(32.0), Kiloamps(2.0))],
    },
    BatteryFuse {
        name: "terminal fuse, 58 V DC, at the battery end",
        ratings: POST_FUSES,
        breaks: &[(DcVolts(14.0), Kiloamps(10.0)), (DcVolts(32.0), Kiloamps(5.0)), (DcVolts(58.0), Kiloamps(2.0))],
    },
    BatteryFuse {
        name: "ANL strip fuse, 32 V DC, at the battery end",
        ratings: ANL_FUSES,
        breaks: &[(DcVolts(32.0), Kiloamps(6.0))],
    },
    BatteryFuse {
        name: "class T fuse, 125 V DC, at the battery end",
        ratings: CLASS_T_FUSES,
        breaks: &[(DcVolts(125.0), Kiloamps(20.0))],
    },
    BatteryFuse {
        name: "NH battery fuse (IEC 60269-7), 80 V DC or more, at the battery end",
        ratings: NH_FUSES,
        breaks: &[(DcVolts(80.0), Kiloamps(25.0))],
    },
];

/// Breaking capacities of miniature breakers, IEC 60898-1, in kA, from memory.
pub const MINIATURE_BREAKER_BREAKS: &[f64] = &[6.0, 10.0, 15.0, 20.0, 25.0];

/// Breaking capacity of gG fuse-links on alternating current, IEC 60269-2, in kA, from memory.
pub const GG_FUSE_BREAKS: &[f64] = &[50.0];

/// Interrupting ratings of house and panel breakers under the NEC, in kA; common practice, no source.
pub const NEC_DEVICE_BREAKS: &[f64] = &[10.0, 22.0, 65.0];

/// Most energy that a miniature breaker lets through, in A²s: EN 60898-1 energy class 3, C curve, from memory.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct LetThrough {
    /// Holds for ratings up to this.
    pub rating: Amps,
    /// At a fault of 6 kA or less.
    pub at_6_ka: f64,
    /// At a fault of 10 kA or less.
    pub at_10_ka: f64,
}

/// By rating, smallest first; larger breakers are in no class.
pub const BREAKER_LET_THROUGH: [LetThrough; 2] = [
    LetThrough { rating: Amps(16.0), at_6_ka: 42_000.0, at_10_ka: 84_000.0 },
    LetThrough { rating: Amps(32.0), at_6_ka: 55_000.0, at_10_ka: 110_000.0 },
];

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn ratings_and_breaking_capacities_rise() {
        let families = BATTERY_FUSES.iter().map(|family| family.ratings);
        let supply = [MINIATURE_BREAKERS, GG_FUSES, NEC_DEVICES, MINIATURE_BREAKER_BREAKS, NEC_DEVICE_BREAKS];
        assert!(families.chain(supply).all(|ratings| ratings.is_sorted_by(|a, b| a < b)));
    }

    #[test]
    fn higher_volts_are_never_broken_more_easily() {
        for family in BATTERY_FUSES {
            assert!(family.breaks.is_sorted_by(|low, high| low.0 < high.0 && low.1 >= high.1), "{}", family.name);
        }
    }

    #[test]
    fn a_fuse_for_32_volts_is_none_for_a_48_volt_bank() {
        let bears: Vec<_> = BATTERY_FUSES.iter().filter(|fuse| fuse.breaks_at(DcVolts(57.6)).is_some()).collect();
        assert!(bears.len() == 3 && bears.iter().all(|fuse| !fuse.name.contains("32 V")), "{bears:?}");
        assert_eq!(BATTERY_FUSES[2].breaks_at(DcVolts(57.6)), Some(Kiloamps(2.0)));
    }
}
