//! Writing `keeplit-design-1`: the engine's answer with findings in words, working and assumptions.

use serde_json::{Map, Value, json};

use super::draft::Draft;
use crate::sizing::assumptions::Entry;
use crate::sizing::{Design, Finding};
use crate::wording;

/// The name of the form.
pub const FORMAT: &str = "keeplit-design-1";

/// The whole answer. `defaults_taken` names, by path, every value that the survey left out.
pub fn write(design: &Design, draft: &Draft) -> Value {
    json!({
        "format": FORMAT,
        "program_version": env!("CARGO_PKG_VERSION"),
        "demand": design.demand,
        "inverter": design.inverter,
        "bank": design.bank,
        "starts": design.starts,
        "charger": design.charger,
        "cables": design.cables,
        "ventilation": design.ventilation,
        "life": design.life,
        "proof": design.proof,
        "findings": design.findings.iter().map(finding).collect::<Vec<_>>(),
        "working": design.working,
        "assumptions": design.assumptions.entries().iter().map(assumption).collect::<Vec<_>>(),
        "defaults_taken": draft.defaults_taken.iter().cloned().collect::<Map<_, _>>(),
    })
}

fn finding(finding: &Finding) -> Value {
    let told = wording::finding(finding);
    json!({ "code": told.code, "severity": finding.severity(), "text": told.text, "cure": told.cure })
}

fn assumption(entry: &Entry) -> Value {
    json!({
        "key": entry.about.key,
        "name": entry.about.name,
        "value": entry.value,
        "default": entry.default,
        "unit": entry.about.unit,
        "source": entry.about.source,
        "checked": entry.about.checked,
    })
}
