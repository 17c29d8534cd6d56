//! What changed since the last sheet, in sentences for the installer.

use crate::quotes::changes::{Change, Figure};
use crate::wording::Numbers;

/// One change as a short sentence without a full stop.
pub fn told(change: &Change, numbers: Numbers) -> String {
    match change {
        Change::LoadAdded(load) => {
            format!("New: {} × {}, {}", load.quantity, load.name, numbers.with_unit(load.running_w, "W"))
        }
        Change::LoadRemoved(load) => {
            format!("Gone: {} × {}, {}", load.quantity, load.name, numbers.with_unit(load.running_w, "W"))
        }
        Change::LoadCounted { name, old, new } => format!("{name}: {old} before, {new} now"),
        Change::LoadWatts { name, old, new } => format!("{name}: {}", from_to(numbers, *old, *new, "W")),
        Change::LoadTimes { name } => format!("{name}: other hours of the day"),
        Change::Autonomy { old, new } => format!("Length of the cut: {}", from_to(numbers, *old, *new, "h")),
        Change::Kit { figure, old, new } => {
            let (name, unit) = name(*figure);
            format!("{name}: {}", from_to(numbers, *old, *new, unit))
        }
        Change::Cable { run, old, new } => format!("Cable {}: {old} before, {new} now", run.replace('_', " ")),
        Change::Price { old, new } => format!("Price: {old} before, {new} now"),
    }
}

/// All changes in one line for someone who comes back: at most three told, the rest counted.
pub fn short(changes: &[Change], numbers: Numbers) -> Option<String> {
    const TOLD: usize = 3;
    let mut parts: Vec<String> = changes.iter().take(TOLD).map(|change| told(change, numbers)).collect();
    if changes.len() > TOLD {
        parts.push(format!("{} more", changes.len() - TOLD));
    }
    (!parts.is_empty()).then(|| parts.join(" · "))
}

fn from_to(numbers: Numbers, old: f64, new: f64, unit: &str) -> String {
    format!("{} before, {} now", numbers.with_unit(old, unit), numbers.with_unit(new, unit))
}

fn name(figure: Figure) -> (&'static str, &'static str) {
    match figure {
        Figure::InverterRating => ("Inverter", "VA"),
        Figure::BankVolts => ("Bank volts", "V"),
        Figure::Batteries => ("Number of batteries", ""),
        Figure::BlockCapacity => ("Each battery", "Ah"),
        Figure::ChargingCurrent => ("Charging current", "A"),
        Figure::OutageEnergy => ("Energy of the cut", "Wh"),
    }
}
