//! Price up: a last look at the survey, parts with prices, and the sheet made of them.

pub mod case;
mod come_back;
mod facts;
pub mod form;

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;

use self::case::Case;
pub use self::come_back::come_back;
use self::facts::Fact;
use self::form::{PriceForm, Row, SPARE};
use super::app::App;
use super::conflict::Conflict;
use super::error::Error;
use super::forms::{Complaints, Form, on_to, page, page_again, page_of_conflict, revision, submit};
use super::frame::{Frame, StepOf};
use super::past::changed_since_last_sheet;
use super::session::Installer;
use crate::jobs::JobId;
use crate::offer::refill::{self, Differs};
use crate::quotes::price::PriceDraft;
use crate::store::{self, Once};
use crate::wording::Told;

#[derive(Template)]
#[template(path = "quotes/price.html")]
struct PricePage {
    frame: Frame,
    here: String,
    needs: String,
    past: String,
    facts: Vec<Fact>,
    stops: Vec<Told>,
    can_be_designed: bool,
    missing: Vec<String>,
    rows: Vec<ShownRow>,
    form: PriceForm,
    sums: Sums,
    currency: String,
    complaints: Complaints,
    conflict: Conflict,
    reload: String,
    /// What changed since the last sheet; empty if nothing did.
    since: String,
}

/// A line of the table.
struct ShownRow {
    at: u32,
    row: Row,
    sum: String,
    hint: String,
    complaints: Vec<String>,
}

/// The sums below the table, as far as there are prices.
#[derive(Default)]
struct Sums {
    subtotal: String,
    tax: String,
    total: String,
    cost: String,
    left: String,
    unpriced: usize,
}

/// The page with the prices so far, or with the design's parts.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let case = Case::find(&app, &installer, JobId(id)).await?;
    let draft = case.draft(app.clock.now());
    let mut shown = PricePage::of(&app, &installer, &case, PriceForm::of(&draft, case.mark), &draft)?;
    shown.since = changed_since_last_sheet(&app, &case).await?.unwrap_or_default();
    page(&shown)
}

/// Stores the prices; then stays, takes the design's parts again, or makes the sheet.
pub async fn save(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<PriceForm>,
) -> Result<Response, Error> {
    let case = Case::find(&app, &installer, JobId(id)).await?;
    let mut draft = match form.read(case.currency(), case.mark) {
        Ok(draft) => draft,
        Err(complaints) => return again(&app, &installer, &case, form, complaints),
    };
    if form.act == "refill" {
        draft.lines = refill::refill(&draft.lines, &case.kit);
    }
    let once = submit(&app, &form.key)?;
    let seen = revision(&form.revision);
    match app.store.save_price(installer.firm.id, once.clone(), case.job.id, seen, &draft).await {
        Err(store::Error::Stale) => conflict(&app, &installer, &case, form),
        Err(error) => Err(error.into()),
        Ok(()) if form.act == "make" => make(&app, &installer, case.job.id, once).await,
        Ok(()) => Ok(on_to(&app.paths().price(case.job.id))),
    }
}

/// The form as typed, with what is wrong.
fn again(
    app: &App,
    installer: &Installer,
    case: &Case,
    form: PriceForm,
    complaints: Complaints,
) -> Result<Response, Error> {
    let stored = case.draft(app.clock.now());
    let mut shown = PricePage::of(app, installer, case, form, &stored)?;
    shown.complain(complaints);
    page_again(&shown)
}

/// Someone saved meanwhile: what was typed stays, beside what is stored by now.
fn conflict(app: &App, installer: &Installer, case: &Case, form: PriceForm) -> Result<Response, Error> {
    let stored = case.draft(app.clock.now());
    let conflict = Conflict::between(&form.fields(), &PriceForm::of(&stored, case.mark).fields());
    let mut shown = PricePage::of(app, installer, case, form, &stored)?;
    shown.frame.is_error = true;
    shown.conflict = conflict;
    page_of_conflict(&shown)
}

/// Freezes a sheet of the prices just stored; with an obstacle in the way, says which.
async fn make(app: &App, installer: &Installer, id: JobId, once: Once) -> Result<Response, Error> {
    let case = Case::find(app, installer, id).await?;
    let draft = case.draft(once.now);
    let Some(version) = case.version(&draft, &installer.person.name, once.now) else {
        let mut complaints = Complaints::default();
        for (field, label, message) in case.obstacles(&draft, once.now) {
            complaints.add(field, label, message);
        }
        return again(app, installer, &case, PriceForm::of(&draft, case.mark), complaints);
    };
    let second = Once { key: once.key.next(), now: once.now };
    app.store.make_version(installer.firm.id, second, id, case.job.revision, version).await?;
    Ok(on_to(&app.paths().send(id)))
}

impl PricePage {
    fn of(
        app: &App,
        installer: &Installer,
        case: &Case,
        mut form: PriceForm,
        stored: &PriceDraft,
    ) -> Result<Self, Error> {
        let frame = Frame::of_step(app, installer, case.job.id, StepOf::Price, "Price up")?;
        form.key.clone_from(&frame.key);
        form.revision = case.job.revision.to_string();
        let missing = refill::missing(&stored.lines, &case.kit).into_iter().map(|part| part.text.clone());
        Ok(Self {
            here: frame.paths.price(case.job.id),
            needs: frame.paths.needs(case.job.id),
            past: frame.paths.past(case.job.id),
            facts: facts::facts(case, &frame.paths),
            stops: case.stops(),
            can_be_designed: case.designed.is_some(),
            missing: missing.collect(),
            rows: rows(case, &form),
            sums: Sums::of(stored, case.mark),
            currency: case.currency().to_string(),
            complaints: Complaints::default(),
            conflict: Conflict::default(),
            reload: frame.paths.price(case.job.id),
            since: String::new(),
            form,
            frame,
        })
    }

    fn complain(&mut self, complaints: Complaints) {
        self.frame.is_error = true;
        for row in &mut self.rows {
            let prefix = format!("lines[{}]", row.at);
            let of_row = complaints.all().iter().filter(|complaint| complaint.field.starts_with(&prefix));
            row.complaints = of_row.map(|complaint| format!("{}: {}", complaint.label, complaint.message)).collect();
        }
        self.complaints = complaints;
    }
}

/// The lines as typed, with their sums as far as they can be read, and a few empty ones below.
fn rows(case: &Case, form: &PriceForm) -> Vec<ShownRow> {
    let first_free = form.lines.keys().next_back().map_or(0, |last| last.saturating_add(1));
    let spare = (first_free..first_free.saturating_add(SPARE)).map(|at| (at, Row::default()));
    let filled = form.lines.iter().filter(|(_, row)| !row.is_empty()).map(|(at, row)| (*at, row.clone()));
    let shown = filled.chain(spare).map(|(at, row)| {
        let line = row.read(case.currency(), case.mark);
        let sum = line.as_ref().and_then(|line| line.sum()).map(|sum| sum.shown(case.mark));
        let hint =
            line.as_ref().and_then(|line| refill::differs(line, &case.kit)).map(|differs| told(&differs, case.mark));
        let no_price = if row.is_empty() { "" } else { "no price yet" };
        ShownRow {
            at,
            sum: sum.unwrap_or_else(|| no_price.to_owned()),
            hint: hint.unwrap_or_default(),
            row,
            complaints: Vec::new(),
        }
    });
    shown.collect()
}

fn told(differs: &Differs, mark: char) -> String {
    match differs {
        Differs::Gone => "The design no longer asks for this.".to_owned(),
        Differs::Now(part) => format!("The design says: {} × {}", part.quantity.shown(mark), part.text),
    }
}

impl Sums {
    fn of(draft: &PriceDraft, mark: char) -> Self {
        let totals = draft.totals();
        let left = crate::money::Money { minor: totals.subtotal.minor - totals.cost.minor, ..totals.subtotal };
        Self {
            subtotal: totals.subtotal.shown(mark),
            tax: totals.tax.shown(mark),
            total: totals.total.shown(mark),
            cost: totals.cost.shown(mark),
            left: left.shown(mark),
            unpriced: totals.unpriced,
        }
    }
}
