//! The working: every figure with formula, values, result and source.

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;

use super::{anchor, unfinished};
use crate::jobs::JobId;
use crate::sizing::assumptions::Entry;
use crate::sizing::sheet::Line;
use crate::web::app::App;
use crate::web::error::Error;
use crate::web::forms::page;
use crate::web::frame::{Frame, StepOf};
use crate::web::price::case::Case;
use crate::web::session::Installer;
use crate::wording::{Labelled, Numbers};

#[derive(Template)]
#[template(path = "design/working.html")]
struct WorkingPage {
    frame: Frame,
    id: JobId,
    name: String,
    parts: Vec<(&'static str, Vec<Row>)>,
    assumptions: Vec<Factor>,
}

/// One line of the sheet.
struct Row {
    anchor: String,
    name: &'static str,
    of: String,
    result: String,
    formula: &'static str,
    values: String,
    source: &'static str,
    checked: &'static str,
}

/// One assumption in force.
struct Factor {
    name: &'static str,
    value: String,
    default: Option<String>,
    source: &'static str,
    checked: &'static str,
}

/// Parts of the design, in the order of the sheet.
const PARTS: [(&str, &str); 8] = [
    ("demand", "What the loads ask for"),
    ("inverter", "Inverter"),
    ("bank", "Bank"),
    ("charger", "Charger"),
    ("cables", "Cables and fuses"),
    ("starts", "Motor starts"),
    ("ventilation", "Air"),
    ("life", "Life of the bank"),
];

/// The sheet of a job.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let case = Case::find(&app, &installer, JobId(id)).await?;
    let mut frame = Frame::of_step(&app, &installer, case.job.id, StepOf::Needs, "The working")?;
    frame.title = "The working".to_owned();
    let Some((_, design)) = &case.designed else { return unfinished(frame, &case.job) };
    let numbers = frame.numbers;
    let part = |(key, name): (&'static str, &'static str)| {
        let lines = design.working.iter().filter(|line| line.figure.split('.').next() == Some(key));
        (name, lines.map(|line| row(line, numbers)).collect())
    };
    page(&WorkingPage {
        id: case.job.id,
        name: case.job.contact.customer.clone(),
        parts: PARTS.into_iter().map(part).collect(),
        assumptions: design.assumptions.entries().into_iter().map(|entry| factor(entry, numbers)).collect(),
        frame,
    })
}

fn row(line: &Line, numbers: Numbers) -> Row {
    let value = |value: &crate::sizing::sheet::Value| {
        format!("{} = {}", value.symbol, numbers.with_unit(value.value, value.unit))
    };
    let part = line.figure.split('.').next().unwrap_or("");
    let of = match (part, line.figure.split('.').nth(1)) {
        ("cables", Some(run)) => run.replace('_', " "),
        ("starts", Some(load)) => load.to_owned(),
        _ => String::new(),
    };
    Row {
        anchor: anchor(&line.figure),
        name: line.name,
        of,
        result: numbers.with_unit(line.result, line.unit),
        formula: line.formula,
        values: line.values.iter().map(value).collect::<Vec<_>>().join(" · "),
        source: line.source,
        checked: line.checked.label(),
    }
}

fn factor(entry: Entry, numbers: Numbers) -> Factor {
    let told = |value: f64| numbers.with_unit(value, entry.about.unit);
    Factor {
        name: entry.about.name,
        value: told(entry.value),
        default: (entry.value != entry.default).then(|| told(entry.default)),
        source: entry.about.source,
        checked: entry.about.checked.label(),
    }
}
