//! What playing the cuts through says.

use super::{Figure, Told};
use crate::units::{AmpHours, Amps, DcVolts, Hours};
use crate::wording::numbers::{Numbers, duration};

/// Three or more ratings follow no kinetic battery: the cut was played with the exponent.
pub fn ratings_not_kinetic(peukert: f64) -> Told {
    Told {
        code: "ratings_not_kinetic",
        text: format!(
            "The battery's ratings follow no curve of the play-through; it was played with an exponent of {}.",
            Numbers::default().three_figures(peukert)
        ),
        cure: "Check the ratings against the data sheet: hours, Ah, and one end voltage for all.",
    }
}

/// The bank does not last the cut when it is played through.
pub fn cut_not_held(lasts: Hours, asked: Hours) -> Told {
    Told {
        code: "cut_not_held",
        text: format!(
            "Played through at the end of its life on its coldest day, the bank lasts {} of the {} asked for.",
            duration(lasts),
            duration(asked)
        ),
        cure: "Take a thicker or shorter battery cable, higher bank volts, or a lower cut-off.",
    }
}

/// Formula and play-through ask for different capacities.
pub fn methods_differ(by_formula: AmpHours, played: AmpHours) -> Told {
    Told {
        code: "methods_differ",
        text: format!(
            "The formulas ask for {}, playing the cut through for {}; the larger was taken.",
            by_formula.told(),
            played.told()
        ),
        cure: "Nothing to do: the working shows both.",
    }
}

/// A motor starts at first but no more at the end of the cut.
pub fn start_fails_late(load: &str, at: Hours, lowest: DcVolts, cut_off: DcVolts) -> Told {
    Told {
        code: "start_fails_late",
        text: format!(
            "{load} may start {} into the cut; the volts then sag to {}, below the cut-off of {}.",
            duration(at),
            lowest.told(),
            cut_off.told()
        ),
        cure: "Take a larger bank, a thicker cable, a lower cut-off, or keep it from starting late.",
    }
}

fn missing(hours: Hours, current: Option<Amps>) -> String {
    match current {
        Some(current) => {
            format!("{} more charging current, or {} more mains, would do", current.told(), duration(hours))
        }
        None => format!("no charging current alone would do; {} of mains are missing", duration(hours)),
    }
}

/// The bank is not full before every cut.
pub fn slowly_losing(hours: Hours, current: Option<Amps>) -> Told {
    Told {
        code: "slowly_losing",
        text: format!(
            "Over four weeks of these cuts the bank is not full before each of them: {}.",
            missing(hours, current)
        ),
        cure: "Raise the charging current within what the bank bears, free the incoming breaker, or take a larger bank.",
    }
}

/// The bank is never full again.
pub fn never_recovers(hours: Hours, current: Option<Amps>) -> Told {
    Told {
        code: "never_recovers",
        text: format!("Over four weeks of these cuts the bank is never full again: {}.", missing(hours, current)),
        cure: "Raise the charging current within what the bank bears, add a charger, carry fewer loads, or agree on fewer hours.",
    }
}
