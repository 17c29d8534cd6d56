//! Motor starts.

use super::{Figure, Told};
use crate::units::{DcVolts, Seconds, VoltAmps};

/// The unit cannot give a motor's starting current.
pub fn motor_will_not_start(load: &str, needed: VoltAmps, available: VoltAmps) -> Told {
    Told {
        code: "motor_will_not_start",
        text: format!(
            "{load} will not start: its start asks for {} and the unit gives {}.",
            needed.told(),
            available.told()
        ),
        cure: "Fit a larger unit or one with more surge, a soft starter, or take it off the list.",
    }
}

/// The unit gives only part of a motor's starting current.
pub fn motor_start_marginal(load: &str, needed: VoltAmps, available: VoltAmps) -> Told {
    Told {
        code: "motor_start_marginal",
        text: format!(
            "{load} may not start: its start asks for {} and the unit gives {}.",
            needed.told(),
            available.told()
        ),
        cure: "Try it at commissioning, or fit a larger unit or a soft starter.",
    }
}

/// A start lasts longer than the unit holds its surge.
pub fn surge_too_short(load: &str, lasts: Seconds, held: Seconds) -> Told {
    Told {
        code: "surge_too_short",
        text: format!("{load} takes {} to start; the unit holds its surge for {}.", lasts.told(), held.told()),
        cure: "Fit a unit that holds its surge longer, or a soft starter.",
    }
}

/// All motors restarting together ask more than the unit gives; staggered they do not.
pub fn restart_together_too_much(together: VoltAmps, staggered: VoltAmps, available: VoltAmps) -> Told {
    Told {
        code: "restart_together_too_much",
        text: format!(
            "All motors restarting at once ask for {}; one after the other they ask for {}. The unit gives {}.",
            together.told(),
            staggered.told(),
            available.told()
        ),
        cure: "Fit delay timers (3 minutes for compressors), or a larger unit.",
    }
}

/// The bank sags below the cut-off when a motor starts.
pub fn bank_sags_at_start(load: &str, lowest: DcVolts, cut_off: DcVolts) -> Told {
    Told {
        code: "bank_sags_at_start",
        text: format!(
            "When {load} starts at the end of the cut, the aged bank sags to {} at the unit, below the cut-off at {}.",
            lowest.told(),
            cut_off.told()
        ),
        cure: "Take a larger bank, a thicker or shorter battery cable, or higher bank volts.",
    }
}

/// A code letter without an upper end.
pub fn code_letter_open(load: &str) -> Told {
    Told {
        code: "code_letter_open",
        text: format!("{load}: code letter V has no upper end, so its start was taken at the lower one."),
        cure: "Read the locked-rotor current on the plate and enter it.",
    }
}
