//! The stay-on list: a count-off sheet with one box for each common load, and lines of one's own.

mod form;
mod page;
mod questions;
mod row;
mod windows;

use axum::extract::{Path, Query, State};
use axum::response::Response;
use serde::Deserialize;

use form::ListForm;
use page::{ListPage, tally};
use row::Against;

use crate::documents::Draft;
use crate::jobs::{Job, JobId};
use crate::store;
use crate::web::app::App;
use crate::web::conflict::Conflict;
use crate::web::error::Error;
use crate::web::forms::{Complaints, Form, on_to, page, page_again, page_of_conflict, revision, submit};
use crate::web::frame::{Frame, StepOf};
use crate::web::session::Installer;
use crate::wording::Numbers;

/// Whether the page was sent back with a question.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct ListQuery {
    look: String,
}

/// The page as it is stored.
pub async fn show(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Query(query): Query<ListQuery>,
) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let form = ListForm::of(&job, numbers(&installer));
    let mut shown = list_page(&app, &installer, &job, form)?;
    if !query.look.is_empty() {
        shown.questions = questions::of(&job.draft.loads, shown.frame.numbers);
    }
    page(&shown)
}

/// Stores the list and goes on; with complaints, shows it again as typed.
pub async fn save(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<ListForm>,
) -> Result<Response, Error> {
    let firm = &installer.firm;
    let job = app.store.job(firm.id, JobId(id)).await?;
    let against = Against { site: &job.draft.site, mark: firm.profile.decimal_mark };
    let mut complaints = Complaints::default();
    let loads = form.read(&against, &mut complaints);
    if !complaints.is_empty() {
        let mut page = list_page(&app, &installer, &job, form)?;
        (page.complaints, page.frame.is_error) = (complaints, true);
        return page_again(&page);
    }
    let draft = Draft { loads, ..job.draft.clone() };
    let once = submit(&app, &form.key)?;
    match app.store.save_draft(firm.id, once, job.id, revision(&form.revision), &draft).await {
        Err(store::Error::Stale) => conflict(&app, &installer, &job, form),
        saved => saved.map(|()| on_to(&next(&app, &job, &draft, &form.act))).map_err(Error::from),
    }
}

/// On to the cut; back to the list after adding, or where something new is asked about.
fn next(app: &App, before: &Job, draft: &Draft, act: &str) -> String {
    let new: Vec<_> = draft.loads.iter().filter(|load| !before.draft.loads.contains(load)).cloned().collect();
    let list = app.paths().list(before.id);
    if !questions::of(&new, Numbers::default()).is_empty() {
        format!("{list}?look=yes")
    } else if act == "add" {
        list
    } else {
        app.paths().cut(before.id)
    }
}

fn conflict(app: &App, installer: &Installer, job: &Job, form: ListForm) -> Result<Response, Error> {
    let stored = ListForm::of(job, numbers(installer));
    let conflict = Conflict::between(&[("Stay-on list", form.told())], &[("Stay-on list", stored.told())]);
    let form = ListForm { revision: job.revision.to_string(), ..form };
    let mut page = list_page(app, installer, job, form)?;
    page.conflict = conflict;
    page_of_conflict(&page)
}

fn list_page(app: &App, installer: &Installer, job: &Job, form: ListForm) -> Result<ListPage, Error> {
    let frame = Frame::of_step(app, installer, job.id, StepOf::List, "Stay-on list")?;
    let here = frame.paths.list(job.id);
    let assumptions = job.draft.assumptions(&installer.firm.profile.assumptions);
    let tally = tally(&job.draft, &assumptions, frame.numbers);
    Ok(ListPage::new(frame, here, form.with_blanks(), &job.draft, tally))
}

fn numbers(installer: &Installer) -> Numbers {
    Numbers::new(installer.firm.profile.decimal_mark)
}
