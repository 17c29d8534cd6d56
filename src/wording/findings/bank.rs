//! The bank: volts, strings, ratings, and what hangs on it.

use super::{Figure, Told};
use crate::sizing::survey::{BusVolts, LifeSupport};
use crate::units::{AmpHours, Amps, Hours};
use crate::wording::names::Labelled;
use crate::wording::numbers::{Numbers, duration};

/// The volts of the bank are too low for the power.
pub fn bus_volts_too_low(bus: BusVolts, current: Amps, limit: Amps) -> Told {
    Told {
        code: "bus_volts_too_low",
        text: format!(
            "At {} the battery current is {}; good practice ends at {}.",
            bus.volts().told(),
            current.told(),
            limit.told()
        ),
        cure: "Take higher bank volts.",
    }
}

/// The battery current is too much for one cable: several lie in parallel.
pub fn battery_current_too_high(current: Amps, limit: Amps) -> Told {
    Told {
        code: "battery_current_too_high",
        text: format!(
            "The battery current is {}, above the {} that one cable may carry.",
            current.told(),
            limit.told()
        ),
        cure: "Lay the cables in parallel as listed, all of one length; or take higher bank volts, or two units.",
    }
}

/// More strings in parallel than is good practice.
pub fn many_strings(strings: u32, good: u32) -> Told {
    Told {
        code: "many_strings",
        text: format!("{strings} strings in parallel share the current badly; {good} are good practice."),
        cure: "Take larger blocks or higher bank volts, with equal leads to one busbar.",
    }
}

/// More strings in parallel than is ever allowed.
pub fn too_many_strings(strings: u32, most: u32) -> Told {
    Told {
        code: "too_many_strings",
        text: format!("{strings} strings in parallel are more than the {most} that may be."),
        cure: "Take larger blocks, cells of 2 V, higher bank volts, or fewer hours.",
    }
}

/// Two ratings of a battery contradict each other; the chemistry's typical ones were used.
pub fn ratings_contradict(slow: (Hours, AmpHours), fast: (Hours, AmpHours)) -> Told {
    Told {
        code: "ratings_contradict",
        text: format!(
            "The ratings contradict each other: {} at {} and {} at {}. Typical ones were used.",
            slow.1.told(),
            duration(slow.0),
            fast.1.told(),
            duration(fast.0)
        ),
        cure: "Read the data sheet again: a faster discharge gives fewer Ah, in a shorter time.",
    }
}

/// No rating was given: the chemistry's typical ones were used.
pub fn typical_ratings(peukert: f64) -> Told {
    Told {
        code: "typical_ratings",
        text: format!(
            "No data-sheet ratings were given: the battery's typical exponent {} was used.",
            Numbers::default().three_figures(peukert)
        ),
        cure: "Enter two or three ratings of the block you fit.",
    }
}

/// A current or time is outside the ratings the method was fitted to.
pub fn outside_ratings(hours: Hours, shortest: Hours, longest: Hours) -> Told {
    Told {
        code: "outside_ratings",
        text: format!(
            "The hardest current would empty the bank in {}; the ratings cover {} to {}.",
            duration(hours),
            duration(shortest),
            duration(longest)
        ),
        cure: "Enter a rating at a faster rate, and test the bank at commissioning.",
    }
}

/// The method's range ends before the value asked for.
pub fn outside_method(what: &'static str, given: f64, lowest: f64, highest: f64, unit: &'static str) -> Told {
    let told = |value| Numbers::default().with_unit(value, unit);
    Told {
        code: "outside_method",
        text: format!(
            "{}: {} is outside the method's range of {} to {}.",
            capitalised(what),
            told(given),
            told(lowest),
            told(highest)
        ),
        cure: "Ask the maker, and confirm by measurement.",
    }
}

/// A life, a treatment or a product hangs on a load.
pub fn medical_load(load: &str, kind: LifeSupport) -> Told {
    Told {
        code: "medical_load",
        text: format!("{load}: {}. No hours are promised for it.", kind.label()),
        cure: "Agree with its supplier and the doctor; keep its own reserve; register with the utility; test weekly.",
    }
}

fn capitalised(what: &str) -> String {
    let mut letters = what.chars();
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}
