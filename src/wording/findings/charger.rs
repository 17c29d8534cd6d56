//! The charger and the mains that feeds it.

use super::{Figure, Told};
use crate::units::{Amps, Celsius, Hours};
use crate::wording::numbers::duration;

/// The bank cannot be full again in the mains hours there are.
pub fn cannot_refill(needs: Hours, has: Hours, charger_needed: Amps) -> Told {
    Told {
        code: "cannot_refill",
        text: format!("The bank needs {} to be full again and has {} between cuts.", duration(needs), duration(has)),
        cure: if charger_needed.0 > 0.0 {
            "Fit a stronger charger within what the bank bears, a larger bank, or ask less of it."
        } else {
            "No charger is fast enough: ask for fewer hours, take fewer loads, or lithium."
        },
    }
}

/// There is no mains to recharge from.
pub fn no_mains() -> Told {
    Told {
        code: "no_mains",
        text: "There are no mains hours to recharge in.".to_owned(),
        cure: "Add another source, such as a generator or solar, or correct the hours between cuts.",
    }
}

/// The charger needed is above what the bank bears.
pub fn charger_too_strong(current: Amps, most: Amps) -> Told {
    Told {
        code: "charger_too_strong",
        text: format!("The charger gives {}; this bank bears {}.", current.told(), most.told()),
        cure: "Choose a lower current setting.",
    }
}

/// The charger is below what the bank wants.
pub fn charger_too_weak(current: Amps, least: Amps) -> Told {
    Told {
        code: "charger_too_weak",
        text: format!("The charger gives {}; this bank wants {} at least.", current.told(), least.told()),
        cure: "Choose a higher current setting or a separate charger.",
    }
}

/// Load and charger together overload the incoming breaker.
pub fn incoming_breaker_too_small(current: Amps, breaker: Amps) -> Told {
    Told {
        code: "incoming_breaker_too_small",
        text: format!("Loads and charger together draw {} through a breaker of {}.", current.told(), breaker.told()),
        cure: "Choose a lower charging current, or have the supply enlarged.",
    }
}

/// Lithium must not be charged below freezing.
pub fn lithium_in_the_cold(coldest: Celsius) -> Told {
    Told {
        code: "lithium_in_the_cold",
        text: format!(
            "The battery place falls to {}; lithium iron phosphate must not be charged below 0 °C.",
            coldest.told()
        ),
        cure: "Put it in a warmer place, or take a pack with a heater and a charge lock.",
    }
}

/// The place is hotter than the battery may be charged at.
pub fn battery_too_hot(hottest: Celsius, limit: Celsius) -> Told {
    Told {
        code: "battery_too_hot",
        text: format!(
            "The battery place rises to {}; this battery may be charged up to {}.",
            hottest.told(),
            limit.told()
        ),
        cure: "Find a cooler place or give it air.",
    }
}
