//! Numbers as people type them on a nameplate's word: either decimal mark, groups, spaces of all
//! kinds, digits of other scripts, and the unit in the box.

mod line;
mod number;
mod quantities;

pub use line::{Line, counted, likely, one_line, usual_power};
pub use number::{Trouble, Typed, number_and_unit};
pub use quantities::{
    MOTOR_EFFICIENCY, Power, PowerUnit, Refusal, Supplied, WATTS_PER_HORSEPOWER, WATTS_PER_METRIC_HORSEPOWER, hours,
    metres, percent, plain, power, temperature, whole,
};
