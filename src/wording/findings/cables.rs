//! Cables with their fuses and breakers.

use super::{Figure, Told, percent};
use crate::sizing::design::Run;
use crate::units::{Amps, Celsius, Kiloamps, Metres, OhmsPerKilometre};
use crate::wording::names::Labelled;
use crate::wording::numbers::Numbers;

/// The drop is above the target but below the limit.
pub fn drop_above_target(run: Run, share: f64, target: f64) -> Told {
    Told {
        code: "drop_above_target",
        text: format!("Cable {}: the drop is {}, above the {} aimed at.", run.label(), percent(share), percent(target)),
        cure: "Shorten the run or take the next size.",
    }
}

/// The drop is above the limit.
pub fn drop_above_limit(run: Run, share: f64, limit: f64) -> Told {
    Told {
        code: "drop_above_limit",
        text: format!("Cable {}: the drop is {}, above the limit of {}.", run.label(), percent(share), percent(limit)),
        cure: "Shorten the run, take a larger size or higher bank volts.",
    }
}

/// No cable of the table carries the current or keeps the drop.
pub fn no_cable_fits(run: Run, current: Amps, length: Metres) -> Told {
    Told {
        code: "no_cable_fits",
        text: format!("Cable {}: no size of the table carries {} over {}.", run.label(), current.told(), length.told()),
        cure: "Shorten the run, take higher bank volts, or split the load.",
    }
}

/// No fuse or breaker of the trade protects the cable.
pub fn no_fuse_fits(run: Run, current: Amps, capacity: Amps) -> Told {
    Told {
        code: "no_fuse_fits",
        text: format!(
            "Cable {}: no fuse of the trade lies between the current of {} and the cable's {}.",
            run.label(),
            current.told(),
            capacity.told()
        ),
        cure: "Take a larger cable, or split the load.",
    }
}

/// The fault current is above what the device breaks.
pub fn breaking_capacity_too_small(run: Run, fault: Kiloamps, breaks: Kiloamps) -> Told {
    Told {
        code: "breaking_capacity_too_small",
        text: format!("Cable {}: a fault brings {}; the fuse breaks {}.", run.label(), fault.told(), breaks.told()),
        cure: "Fit a fuse of a class that breaks more.",
    }
}

/// The cable does not bear the fault until the device clears it.
pub fn fault_heats_cable(run: Run, fault: Kiloamps) -> Told {
    Told {
        code: "fault_heats_cable",
        text: format!("Cable {}: a fault of {} overheats it before the fuse clears.", run.label(), fault.told()),
        cure: "Take a larger cable or a faster fuse.",
    }
}

/// The wiring code's ambient table ends below this temperature.
pub fn ambient_outside_table(run: Run, ambient: Celsius, highest: Celsius) -> Told {
    Told {
        code: "ambient_outside_table",
        text: format!(
            "Cable {}: {} is beyond the code's table, which ends at {}.",
            run.label(),
            ambient.told(),
            highest.told()
        ),
        cure: "Route it through a cooler place, or take insulation for more heat.",
    }
}

/// The strings share the current unevenly: the worst one's over the mean, above one.
pub fn strings_uneven(worst_over_mean: f64) -> Told {
    Told {
        code: "strings_uneven",
        text: format!("The hardest string carries {} of the mean.", percent(worst_over_mean)),
        cure: "Equal leads, lugs and sizes from each string to one busbar.",
    }
}

/// Aluminium was asked for and is not made as a flexible battery lead: copper was taken for this run.
pub fn no_aluminium(run: Run, smallest_mm2: f64) -> Told {
    Told {
        code: "no_aluminium",
        text: format!(
            "Cable {}: aluminium is not made as a flexible battery lead, and for fixed cables not below {}; copper was taken.",
            run.label(),
            Numbers::default().with_unit(smallest_mm2, "mm²")
        ),
        cure: "Use flexible copper here, with lugs made for it.",
    }
}

/// The chosen conductor's resistance is outside what the table covers.
pub fn conductor_outside_table(run: Run, resistance: OhmsPerKilometre) -> Told {
    Told {
        code: "conductor_outside_table",
        text: format!("Cable {}: {} is outside the table.", run.label(), resistance.told()),
        cure: "Confirm the resistance by the cable's own data sheet.",
    }
}

/// A lithium bank's fault current does not follow from its capacity: the maker's figure is needed.
pub fn fault_current_needs_maker(estimate: Kiloamps) -> Told {
    Told {
        code: "fault_current_needs_maker",
        text: format!(
            "A lithium bank's fault current does not follow from its capacity; {} was assumed.",
            estimate.told()
        ),
        cure: "Ask the maker for the prospective fault current before choosing the fuse.",
    }
}

/// The aged bank at the end of a cut gives less than what opens the fuse within seconds.
pub fn fuse_slow_on_aged_bank(run: Run, gives: Amps, opens_at: Amps) -> Told {
    Told {
        code: "fuse_slow_on_aged_bank",
        text: format!(
            "Cable {}: an aged bank gives a fault {}, less than the {} that opens the fuse within seconds.",
            run.label(),
            gives.told(),
            opens_at.told()
        ),
        cure: "Shorten the run or take a larger cable; replace the bank before it is worn out.",
    }
}

/// On battery the unit gives less than what trips the breaker at once: the unit's own shutdown must end a fault.
pub fn breaker_slow_on_battery(run: Run, gives: Amps, trips_at: Amps) -> Told {
    Told {
        code: "breaker_slow_on_battery",
        text: format!(
            "Cable {}: on battery the unit gives {}, less than the {} that trips the breaker at once.",
            run.label(),
            gives.told(),
            trips_at.told()
        ),
        cure: "Prove by test that the unit shuts down on a fault; fit an RCD after it.",
    }
}
