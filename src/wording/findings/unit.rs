//! The unit: rating, mains, changeover, wave.

use super::{Figure, Told, percent};
use crate::units::{AcVolts, Milliseconds, VoltAmps, Watts};

/// The peak running load is above what the trade's largest unit carries.
pub fn no_inverter_fits(needed: VoltAmps, largest: VoltAmps) -> Told {
    Told {
        code: "no_inverter_fits",
        text: format!(
            "The loads ask for {}; the largest unit of the trade list has {}.",
            needed.told(),
            largest.told()
        ),
        cure: "Take loads off the list, let some take turns, or split the site onto two units.",
    }
}

/// The unit to be used again is too small.
pub fn reused_inverter_too_small(needed: VoltAmps, there: VoltAmps) -> Told {
    Told {
        code: "reused_inverter_too_small",
        text: format!("The unit that is there has {}; the loads ask for {}.", there.told(), needed.told()),
        cure: "Replace the unit, take loads off the list, or let some take turns.",
    }
}

/// The mains leaves the unit's narrow window: it would live on battery, or its wide window with the slow changeover must be set.
pub fn mains_window_too_narrow(lowest: AcVolts, highest: AcVolts, window: (AcVolts, AcVolts)) -> Told {
    Told {
        code: "mains_window_too_narrow",
        text: format!(
            "The mains here runs from {} to {}; the narrow window takes {} to {}.",
            lowest.told(),
            highest.told(),
            window.0.told(),
            window.1.told()
        ),
        cure: "Set the wide window and mind its slow changeover, or fit a stabiliser before the unit.",
    }
}

/// The mains leaves even the wide window: in those hours the bank is never recharged.
pub fn mains_outside_wide_window(lowest: AcVolts, highest: AcVolts, window: (AcVolts, AcVolts)) -> Told {
    Told {
        code: "mains_outside_wide_window",
        text: format!(
            "The mains here runs from {} to {}, beyond even the wide window of {} to {}: in those hours the bank is not recharged.",
            lowest.told(),
            highest.told(),
            window.0.told(),
            window.1.told()
        ),
        cure: "Fit a stabiliser before the unit, and count those hours as a cut.",
    }
}

/// The break at changeover is longer than a load rides through.
pub fn changeover_too_slow(load: &str, bears: Milliseconds, breaks: Milliseconds) -> Told {
    Told {
        code: "changeover_too_slow",
        text: format!("{load} rides through {}; the changeover takes {}.", bears.told(), breaks.told()),
        cure: "Use the narrow window, a faster unit, or give this load a small supply of its own.",
    }
}

/// A square wave is refused by a load: a sine is fitted, unless the unit that makes it is to be used again.
pub fn square_wave_refused(load: &str, reused: bool) -> Told {
    let (text, cure) = if reused {
        (
            format!("{load} needs a sine, and the unit that is there makes a square wave."),
            "Fit a sine unit, or take this load off the list.",
        )
    } else {
        (format!("{load} needs a sine, so a sine unit was chosen."), "Offer a square-wave unit only without this load.")
    };
    Told { code: "square_wave_refused", text, cure }
}

/// A square wave on offer is borne, but not liked, by a load.
pub fn square_wave_disliked(load: &str) -> Told {
    Told {
        code: "square_wave_disliked",
        text: format!("{load} runs on a square wave, but hotter or louder."),
        cure: "A sine unit serves it better.",
    }
}

/// The no-load draw takes a large share of the bank.
pub fn no_load_draw_heavy(draw: Watts, share: f64) -> Told {
    Told {
        code: "no_load_draw_heavy",
        text: format!("The unit itself draws {}, {} of the energy of the cut.", draw.told(), percent(share)),
        cure: "Take a unit with a lower no-load draw, or switch it off when nothing is needed.",
    }
}
