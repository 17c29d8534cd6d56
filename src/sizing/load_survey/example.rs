//! Loads and surveys for tests; invented.

use super::*;
use crate::sizing::survey::*;
use crate::units::{Fraction, Milliseconds, Seconds};

pub(crate) use crate::sizing::battery_bank::example::shop;

/// A share that is known to be one.
pub(crate) fn share(of_one: f64) -> Fraction {
    Fraction::new(of_one).expect("a share")
}

/// A load that is on all day and starts softly.
pub(crate) fn load(name: &str, watts: f64, power_factor: f64, start: StartKind) -> Load {
    Load {
        name: name.to_owned(),
        quantity: 1,
        on_together: 1,
        running: Watts(watts),
        power_factor: share(power_factor),
        start,
        surge_multiple: 1.0,
        surge_lasts: Seconds(0.0),
        motor_plate: None,
        duty: Fraction::ONE,
        windows: vec![Window::ALL_DAY],
        turn: None,
        needs_sine: NeedsSine::No,
        max_break: Milliseconds(10_000.0),
        life_support: LifeSupport::No,
    }
}

/// A motor with a start.
pub(crate) fn motor(name: &str, watts: f64, power_factor: f64, multiple: f64) -> Load {
    let motor = load(name, watts, power_factor, StartKind::Compressor);
    Load { surge_multiple: multiple, surge_lasts: Seconds(0.5), ..motor }
}

/// A window between two times, each `HHMM` as a number.
pub(crate) fn window(from: u16, to: u16) -> Window {
    let time = |hhmm: u16| TimeOfDay::from_minutes(hhmm / 100 * 60 + hhmm % 100).expect("a time of day");
    Window { from: time(from), to: time(to) }
}

/// The same load in other windows.
pub(crate) fn during(load: Load, windows: &[Window]) -> Load {
    Load { windows: windows.to_vec(), ..load }
}

/// The shop with these loads.
pub(crate) fn survey(loads: Vec<Load>) -> Survey {
    Survey { loads, ..shop(Chemistry::FloodedTubular) }
}

/// What a survey's loads ask for, with the default factors.
pub(crate) fn demand_of(survey: &Survey) -> (Demand, Sheet) {
    let mut sheet = Sheet::default();
    let demand = demand(survey, &Assumptions::defaults(survey.choice.chemistry), &mut sheet);
    (demand, sheet)
}
