//! The arguable factors as a table of fields: those of a firm and those of one job.

use std::collections::BTreeMap;

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;
use serde::Deserialize;

use super::app::App;
use super::error::Error;
use super::forms::{Complaints, Form, on_to, page, page_again, revision, submit};
use super::frame::Frame;
use super::session::Installer;
use crate::documents::limits;
use crate::jobs::JobId;
use crate::reading;
use crate::sizing::Assumptions;
use crate::wording::{DecimalMark, Numbers};

/// One factor as a field.
pub struct Row {
    /// Name of the field.
    pub field: String,
    /// What it is.
    pub name: &'static str,
    /// What holds if the field is left empty.
    pub default: String,
    /// Its unit.
    pub unit: &'static str,
    /// What was typed, or was set before.
    pub typed: String,
    /// Where the default comes from.
    pub source: &'static str,
}

/// Every factor with what was typed, or with what was set before.
pub fn rows(defaults: &Assumptions, typed: &BTreeMap<String, String>, numbers: Numbers) -> Vec<Row> {
    let row = |entry: crate::sizing::assumptions::Entry| Row {
        field: format!("assumptions[{}]", entry.about.key),
        name: entry.about.name,
        default: numbers.with_unit(entry.value, entry.about.unit),
        unit: entry.about.unit,
        typed: typed.get(entry.about.key).cloned().unwrap_or_default(),
        source: entry.about.source,
    };
    defaults.entries().into_iter().map(row).collect()
}

/// What was set before, as it would be typed.
pub fn typed(set: &[(String, f64)], numbers: Numbers) -> BTreeMap<String, String> {
    set.iter().map(|(key, value)| (key.clone(), numbers.typed(*value))).collect()
}

/// The factors that were typed; empty fields leave the default.
pub fn read(
    typed: &BTreeMap<String, String>,
    defaults: &Assumptions,
    mark: DecimalMark,
    complaints: &mut Complaints,
) -> Vec<(String, f64)> {
    let mut trial = defaults.clone();
    let mut set = Vec::new();
    for entry in defaults.entries() {
        let key = entry.about.key;
        let Some(text) = typed.get(key).filter(|text| !text.trim().is_empty()) else { continue };
        let limit = limits::Limit { lowest: entry.about.lowest, highest: entry.about.highest, unit: "", whole: false };
        let value = reading::plain(text, mark, limit);
        let value =
            value.and_then(|value| trial.set(key, value).map(|()| value).map_err(|refused| refused.to_string().into()));
        set.extend(
            complaints
                .take(&format!("assumptions[{key}]"), entry.about.name, value)
                .map(|value| (key.to_owned(), value)),
        );
    }
    set
}

/// The factors of one job.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct AssumptionsForm {
    key: String,
    revision: String,
    assumptions: BTreeMap<String, String>,
}

#[derive(Template)]
#[template(path = "survey/assumptions.html")]
struct AssumptionsPage {
    frame: Frame,
    here: String,
    working: String,
    revision: String,
    rows: Vec<Row>,
    complaints: Complaints,
}

/// The factors of a job, to be overridden.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let numbers = Numbers::new(installer.firm.profile.decimal_mark);
    let form = AssumptionsForm { assumptions: typed(&job.draft.overrides, numbers), ..AssumptionsForm::default() };
    page(&assumptions_page(&app, &installer, &job, form.assumptions, Complaints::default())?)
}

/// Stores the factors of a job and goes back to its working.
pub async fn save(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<AssumptionsForm>,
) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let mut complaints = Complaints::default();
    let mark = installer.firm.profile.decimal_mark;
    let set = read(&form.assumptions, &of_firm(&installer, &job), mark, &mut complaints);
    if !complaints.is_empty() {
        return page_again(&assumptions_page(&app, &installer, &job, form.assumptions, complaints)?);
    }
    let mut draft = job.draft.clone();
    draft.overrides = set;
    let once = submit(&app, &form.key)?;
    app.store.save_draft(installer.firm.id, once, job.id, revision(&form.revision), &draft).await?;
    Ok(on_to(&app.paths().working(job.id)))
}

/// What holds for a job that overrides nothing.
fn of_firm(installer: &Installer, job: &crate::jobs::Job) -> Assumptions {
    let mut draft = job.draft.clone();
    draft.overrides.clear();
    draft.assumptions(&installer.firm.profile.assumptions)
}

fn assumptions_page(
    app: &App,
    installer: &Installer,
    job: &crate::jobs::Job,
    typed: BTreeMap<String, String>,
    complaints: Complaints,
) -> Result<AssumptionsPage, Error> {
    let mut frame = Frame::of(app, installer, "Assumptions of this job")?;
    frame.is_error = !complaints.is_empty();
    let rows = rows(&of_firm(installer, job), &typed, frame.numbers);
    let (here, working) = (frame.paths.assumptions(job.id), frame.paths.working(job.id));
    Ok(AssumptionsPage { here, working, revision: job.revision.to_string(), rows, complaints, frame })
}
