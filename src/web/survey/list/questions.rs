//! What is asked about once, beside a line, and never stands in the way.

use std::collections::BTreeMap;

use crate::reading;
use crate::sizing::survey::{Load, StartKind};
use crate::wording::{Labelled, Numbers};

/// A power this many times off the usual one, and outside those of all loads of that name, is asked about.
const SLIP: f64 = 5.0;

/// What to ask about each load, by its place in the list.
pub fn of(loads: &[Load], numbers: Numbers) -> BTreeMap<u32, String> {
    let asked = loads.iter().enumerate().filter_map(|(at, load)| Some((at as u32, question(load, numbers)?)));
    asked.collect()
}

fn question(load: &Load, numbers: Numbers) -> Option<String> {
    let Some((likely, (least, most))) = reading::likely(&load.name).zip(reading::usual_power(&load.name)) else {
        return unknown(load);
    };
    let watts = |power: f64| numbers.with_unit(power, "W");
    let usual = if least == most { watts(least.0) } else { format!("{} to {}", watts(least.0), watts(most.0)) };
    let is_far = !(1.0 / SLIP..=SLIP).contains(&(load.running / likely.running));
    (is_far && !(least.0..=most.0).contains(&load.running.0))
        .then(|| format!("“{}” is usually {usual}. Keep {}?", load.name, watts(load.running.0)))
}

/// A name that says nothing, counted as what starts the gentlest.
fn unknown(load: &Load) -> Option<String> {
    let kind = StartKind::Resistive;
    (load.start == kind && load.motor_plate.is_none())
        .then(|| format!("“{}” counts as a {}. Is there a motor in it? Then choose its kind.", load.name, kind.label()))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::tables::appliances;
    use crate::units::Watts;

    fn fridge(watts: f64) -> Load {
        let fridge = appliances::by_key("fridge_direct_cool").expect("is on the list").load(1);
        Load { name: "Fridge".to_owned(), running: Watts(watts), ..fridge }
    }

    #[test]
    fn a_power_far_from_the_usual_ones_is_asked_about() {
        for (watts, is_asked) in
            [(150.0, false), (10.0, true), (60.0, false), (700.0, false), (1500.0, true), (15_000.0, true)]
        {
            assert_eq!(!of(&[fridge(watts)], Numbers::default()).is_empty(), is_asked, "{watts}");
        }
        let asked = &of(&[fridge(1500.0)], Numbers::default())[&0];
        assert!(asked.starts_with("“Fridge” is usually ") && asked.ends_with("Keep 1,500\u{a0}W?"), "{asked}");
    }

    #[test]
    fn a_name_that_says_nothing_is_asked_for_its_kind() {
        let lathe = |start| Load { name: "Lathe".to_owned(), start, ..fridge(1500.0) };
        assert!(!of(&[lathe(StartKind::Resistive)], Numbers::default()).is_empty());
        assert!(of(&[lathe(StartKind::MotorCapStart)], Numbers::default()).is_empty());
    }
}
