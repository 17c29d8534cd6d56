//! The place: air and temperature.

use super::{Figure, Told};
use crate::units::Celsius;
use crate::wording::numbers::Numbers;

/// A flooded bank in a room without air.
pub fn flooded_without_air(opening_cm2: f64) -> Told {
    Told {
        code: "flooded_without_air",
        text: format!(
            "A flooded bank gives off hydrogen; this room has no openings. It needs two of {} each.",
            opening(opening_cm2)
        ),
        cure: "Make two openings to the outside, low and high on opposite walls, or choose a sealed bank.",
    }
}

/// A sealed bank in a room without air.
pub fn sealed_without_air(opening_cm2: f64) -> Told {
    Told {
        code: "sealed_without_air",
        text: format!(
            "A sealed bank gives off some hydrogen; this room has no openings. It needs two of {} each.",
            opening(opening_cm2)
        ),
        cure: "Make two openings to the outside, low and high on opposite walls.",
    }
}

/// A temperature is outside the table: the nearest row was used.
pub fn temperature_outside_table(given: Celsius, lowest: Celsius, highest: Celsius) -> Told {
    Told {
        code: "temperature_outside_table",
        text: format!(
            "{} is outside the table of {} to {}; its nearest row was used.",
            given.told(),
            lowest.told(),
            highest.told()
        ),
        cure: "Warm the battery's place, or ask the maker for the capacity at that temperature.",
    }
}

/// Area of one opening.
fn opening(area: f64) -> String {
    Numbers::default().with_unit(area, "cm²")
}
