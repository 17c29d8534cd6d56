//! Whole designs: their sheets, the laws they keep, and one of them by hand.

mod flat_by_hand;
mod laws;
mod sheet;
mod surveys;

use keeplit::documents::{Draft, design, survey};
use keeplit::simulation;
use keeplit::sizing::{Design, Survey};
use serde_json::Value;

/// Reads a survey in the form of the command line.
fn read(text: &str) -> (Draft, Survey) {
    survey::read(text).unwrap_or_else(|faults| panic!("{faults:?}"))
}

/// The answer to a survey with the job's own assumptions.
fn answer(text: &str) -> Design {
    let (draft, survey) = read(text);
    simulation::design(&survey, draft.assumptions(&[]))
}

/// The answer as the command line writes it.
fn written(text: &str) -> Value {
    let (draft, survey) = read(text);
    design::write(&simulation::design(&survey, draft.assumptions(&[])), &draft)
}

/// Every number below a value, with the path by which the sheet names it.
fn numbers(path: &str, value: &Value, found: &mut Vec<(String, f64)>) {
    match value {
        Value::Number(number) => found.push((path.to_owned(), number.as_f64().expect("a number"))),
        Value::Array(entries) => {
            for (at, entry) in entries.iter().enumerate() {
                numbers(&place(path, at, entry), entry, found);
            }
        }
        Value::Object(members) => {
            for (key, member) in members {
                numbers(&format!("{path}.{key}"), member, found);
            }
        }
        _ => {}
    }
}

/// Cables and starts stand under their names, other entries under their place.
fn place(path: &str, at: usize, entry: &Value) -> String {
    match entry.get("run").or(entry.get("load")).and_then(Value::as_str) {
        Some(name) => format!("{path}.{name}"),
        None => format!("{path}[{at}]"),
    }
}

/// The figures of the proof that stand on the sheet; the rest of it is series, played not computed.
const PROVED: [&str; 7] = [
    "proof.runtime_new_h",
    "proof.runtime_aged_h",
    "proof.lowest_voltage_v",
    "proof.wells.full_ah",
    "proof.wells.at_hand_share",
    "proof.wells.rate_per_h",
    "proof.weeks.missing_h",
];

/// Every number of the stages, the day's stretches left out.
fn stage_numbers(design: &Value) -> Vec<(String, f64)> {
    let mut found = Vec::new();
    for stage in ["demand", "inverter", "bank", "starts", "charger", "cables", "ventilation", "life", "proof"] {
        numbers(stage, &design[stage], &mut found);
    }
    found.retain(|(path, _)| !path.starts_with("demand.day["));
    let proved = found.iter().filter(|(path, _)| PROVED.contains(&path.as_str())).count();
    assert_eq!(proved, PROVED.len(), "the proof has all its figures");
    found.retain(|(path, _)| !path.starts_with("proof.") || PROVED.contains(&path.as_str()));
    found
}
