//! What is known of each kind of battery, per cell unless said otherwise.

use crate::sizing::survey::Chemistry;
use crate::units::{Celsius, DcVolts};

/// What is known of one kind of battery.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Properties {
    /// Depth of discharge for sizing.
    pub depth_of_discharge_max: f64,
    /// Volts at which the unit stops.
    pub cut_off: DcVolts,
    /// Resistance at the end of life over that of a new cell.
    pub resistance_multiple_end_of_life: f64,
    /// Strings in parallel that are good practice.
    pub strings_warn: u32,
    /// Strings in parallel never to be exceeded.
    pub strings_stop: u32,
    /// Charge put back over charge taken.
    pub charge_factor: f64,
    /// Heat that halves the calendar life, in kelvin.
    pub life_halving_step: Celsius,
}

/// Flooded tubular plates. Depth, strings: battery makers' manuals; the rest from memory.
const FLOODED_TUBULAR: Properties = Properties {
    depth_of_discharge_max: 0.6,
    cut_off: DcVolts(1.75),
    resistance_multiple_end_of_life: 1.5,
    strings_warn: 3,
    strings_stop: 4,
    charge_factor: 1.15,
    life_halving_step: Celsius(10.0),
};

/// What is known of a kind of battery.
pub fn properties(chemistry: Chemistry) -> &'static Properties {
    match chemistry {
        Chemistry::FloodedTubular => &FLOODED_TUBULAR,
        _ => &FLOODED_TUBULAR,
    }
}
