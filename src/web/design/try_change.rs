//! Try a change: the same job with other hours, another battery or fewer loads, beside what it is now.
//!
//! Looking costs nothing and keeps nothing: the change stands in the address. Only "Use this one" stores it.

use std::collections::BTreeMap;

use askama::Template;
use axum::extract::{Path, RawQuery, State};
use axum::response::Response;
use serde::Deserialize;

use super::hours::lasts;
use super::unfinished;
use crate::documents::names::Named;
use crate::documents::{Draft, limits};
use crate::jobs::{Job, JobId};
use crate::reading;
use crate::simulation;
use crate::sizing::proof::Recovery;
use crate::sizing::survey::Chemistry;
use crate::sizing::{Assumptions, Design, Severity};
use crate::store;
use crate::units::Hours;
use crate::web::app::App;
use crate::web::error::Error;
use crate::web::forms::{self, Complaints, Form, on_to, page, page_again, revision, submit};
use crate::web::frame::{Frame, StepOf};
use crate::web::session::Installer;
use crate::wording::{DecimalMark, Labelled, Numbers, duration};

/// What is typed on the page.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct ChangeForm {
    key: String,
    revision: String,
    hours: String,
    chemistry: String,
    off: BTreeMap<u32, String>,
}

#[derive(Template)]
#[template(path = "design/try_change.html")]
struct TryPage {
    frame: Frame,
    id: JobId,
    here: String,
    form: ChangeForm,
    complaints: Complaints,
    loads: Vec<String>,
    rows: Vec<Row>,
    is_changed: bool,
    is_stale: bool,
    notes: Vec<&'static str>,
}

/// One line of the comparison.
struct Row {
    name: &'static str,
    now: String,
    then: String,
}

impl Row {
    fn differs(&self) -> bool {
        self.now != self.then
    }
}

impl TryPage {
    fn chemistries(&self) -> Vec<(&'static str, &'static str)> {
        Chemistry::ALL.map(|kind| (kind.name(), kind.label())).to_vec()
    }

    fn is_off(&self, row: &usize) -> bool {
        u32::try_from(*row).is_ok_and(|row| self.form.off.contains_key(&row))
    }

    fn is_picked(&self, value: &str) -> bool {
        self.form.chemistry == value
    }
}

/// The job as it is beside the job as it would be.
pub async fn show(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    RawQuery(query): RawQuery,
) -> Result<Response, Error> {
    let job = job(&app, &installer, id).await?;
    let numbers = Numbers::new(installer.firm.profile.decimal_mark);
    let form = match query.as_deref().filter(|query| !query.is_empty()) {
        Some(query) => forms::read(query.as_bytes())?,
        None => ChangeForm::of(&job.draft, numbers),
    };
    let mut complaints = Complaints::default();
    let changed = form.read(&job.draft, installer.firm.profile.decimal_mark, &mut complaints);
    compared(&app, &installer, &job, form, changed, complaints, false)
}

/// Stores the change, if the job is still the one that it was tried on.
pub async fn take(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<ChangeForm>,
) -> Result<Response, Error> {
    let job = job(&app, &installer, id).await?;
    let mut complaints = Complaints::default();
    let changed = form.read(&job.draft, installer.firm.profile.decimal_mark, &mut complaints);
    let Some(draft) = changed else {
        return compared(&app, &installer, &job, form, None, complaints, false);
    };
    let once = submit(&app, &form.key)?;
    match app.store.save_draft(installer.firm.id, once, job.id, revision(&form.revision), &draft).await {
        Err(store::Error::Stale) => compared(&app, &installer, &job, form, Some(draft), complaints, true),
        saved => saved.map(|()| on_to(&app.paths().needs(job.id))).map_err(Error::from),
    }
}

async fn job(app: &App, installer: &Installer, id: i64) -> Result<Job, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    if job.binned_at.is_some() { Err(Error::NotFound) } else { Ok(job) }
}

fn compared(
    app: &App,
    installer: &Installer,
    job: &Job,
    form: ChangeForm,
    changed: Option<Draft>,
    complaints: Complaints,
    is_stale: bool,
) -> Result<Response, Error> {
    let mut frame = Frame::of_step(app, installer, job.id, StepOf::Needs, "Try a change")?;
    let firm = &installer.firm.profile.assumptions;
    let Some(now) = designed(&job.draft, firm) else { return unfinished(frame, job) };
    let then = changed.as_ref().and_then(|draft| designed(draft, firm));
    let asked = |draft: &Draft| draft.outage.as_ref().map_or(Hours::ZERO, |outage| outage.autonomy);
    let then_asked = changed.as_ref().map(asked);
    frame.is_error = !complaints.is_empty();
    let mut notes = Vec::new();
    if changed.as_ref().is_some_and(|draft| draft.battery_ratings != job.draft.battery_ratings) {
        notes.push("The ratings of the data sheet belong to the other kind of battery; the change leaves them out.");
    }
    let numbers = frame.numbers;
    let is_changed = changed.as_ref().is_some_and(|draft| *draft != job.draft);
    let is_faulty = !complaints.is_empty();
    let whole = TryPage {
        id: job.id,
        here: frame.paths.try_change(job.id),
        loads: job.draft.loads.iter().map(|load| load.name.clone()).collect(),
        rows: rows((asked(&job.draft), &now), then_asked.zip(then.as_ref()), numbers),
        form: ChangeForm {
            revision: if is_stale || form.revision.is_empty() {
                job.revision.to_string()
            } else {
                form.revision.clone()
            },
            ..form
        },
        is_changed,
        is_stale,
        notes,
        complaints,
        frame,
    };
    if is_faulty { page_again(&whole) } else { page(&whole) }
}

fn designed(draft: &Draft, firm: &[(String, f64)]) -> Option<Design> {
    let survey = draft.complete().ok()?;
    let assumptions: Assumptions = draft.assumptions(firm);
    Some(simulation::design(&survey, assumptions))
}

/// What matters of both, line by line.
fn rows(now: (Hours, &Design), then: Option<(Hours, &Design)>, numbers: Numbers) -> Vec<Row> {
    type Told<'a> = &'a dyn Fn(Hours, &Design) -> String;
    let row = |name: &'static str, told: Told| Row {
        name,
        now: told(now.0, now.1),
        then: then.map_or_else(|| "–".to_owned(), |(asked, design)| told(asked, design)),
    };
    vec![
        row("Hours asked for", &|asked, _| duration(asked)),
        row("Lasts, aged and cold", &|_, design| proof(design, |proof| lasts(proof.runtime_aged))),
        row("Lasts, new at 25 °C", &|_, design| proof(design, |proof| lasts(proof.runtime_new))),
        row("Inverter", &|_, design| numbers.with_unit(design.inverter.rating.0, "VA")),
        row("Bank", &|_, design| {
            let bank = &design.bank;
            let blocks = bank.blocks_in_series * bank.strings;
            format!(
                "{blocks} × {}, {}",
                numbers.with_unit(bank.block.0, "Ah"),
                numbers.with_unit(bank.bus.volts().0, "V")
            )
        }),
        row("Mass of the bank", &|_, design| numbers.with_unit(design.bank.weight.0, "kg")),
        row("Charger", &|_, design| numbers.with_unit(design.charger.current.0, "A")),
        row("Full before every cut", &|_, design| {
            proof(design, |proof| match proof.weeks.recovery {
                Recovery::FullBeforeNextCut => "yes".to_owned(),
                Recovery::SlowlyLosing => "not every one".to_owned(),
                Recovery::NeverRecovers => "never".to_owned(),
            })
        }),
        row("Life of the bank", &|_, design| format!("{}\u{a0}years", numbers.plain(design.life.expected.0, 0))),
        row("To put right", &|_, design| count(design, Severity::Stop)),
        row("To look at", &|_, design| count(design, Severity::Warn)),
    ]
}

fn proof(design: &Design, told: impl Fn(&crate::sizing::proof::Proof) -> String) -> String {
    design.proof.as_ref().map_or_else(|| "–".to_owned(), told)
}

fn count(design: &Design, severity: Severity) -> String {
    match design.findings.iter().filter(|finding| finding.severity() == severity).count() {
        0 => "nothing".to_owned(),
        1 => "one thing".to_owned(),
        n => format!("{n} things"),
    }
}

impl ChangeForm {
    fn of(draft: &Draft, numbers: Numbers) -> Self {
        Self {
            hours: draft.outage.as_ref().map_or_else(String::new, |outage| numbers.typed(outage.autonomy.0)),
            chemistry: draft.choice.chemistry.name().to_owned(),
            ..Self::default()
        }
    }

    /// The draft with the change; `None` with complaints.
    fn read(&self, before: &Draft, mark: DecimalMark, complaints: &mut Complaints) -> Option<Draft> {
        let hours = reading::hours(&self.hours, mark, limits::AUTONOMY_H);
        let hours = complaints.take("hours", "Length of the cut", hours).map(Hours);
        let chemistry = Chemistry::named(&self.chemistry);
        if chemistry.is_none() {
            complaints.add("chemistry", "Battery", "choose one");
        }
        let (_, loads): (Vec<_>, Vec<_>) = before
            .loads
            .iter()
            .enumerate()
            .partition(|(row, _)| u32::try_from(*row).is_ok_and(|row| self.off.contains_key(&row)));
        if loads.is_empty() && !before.loads.is_empty() {
            complaints.add("off", "Left off", "leave at least one load on");
        }
        if !complaints.is_empty() {
            return None;
        }
        let mut draft = before.clone();
        draft.loads = loads.into_iter().map(|(_, load)| load.clone()).collect();
        draft.outage.as_mut()?.autonomy = hours?;
        if chemistry? != draft.choice.chemistry {
            draft.choice.chemistry = chemistry?;
            draft.battery_ratings.clear();
        }
        Some(draft)
    }
}
