//! The job book: find a job or start one.

use askama::Template;
use axum::extract::{Path, Query, State};
use axum::response::Response;
use serde::Deserialize;

use super::app::App;
use super::error::Error;
use super::forms::{Form, on_to, page, submit};
use super::frame::Frame;
use super::session::Installer;
use crate::jobs::{Contact, Filter, JobId, JobState, JobSummary};

/// What the address of the book asks for.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct BookQuery {
    search: String,
    state: String,
    binned: String,
    /// A job that was just put into the bin.
    undo: String,
}

#[derive(Template)]
#[template(path = "jobs/book.html")]
struct BookPage {
    frame: Frame,
    query: BookQuery,
    jobs: Vec<Row>,
    undo: Option<JobId>,
}

/// A job as the book shows it.
struct Row {
    id: JobId,
    name: String,
    place: String,
    state: &'static str,
    touched: String,
}

impl BookPage {
    fn states(&self) -> impl Iterator<Item = (&'static str, &'static str, bool)> {
        JobState::ALL.into_iter().map(|(_, key, label)| (key, label, self.query.state == key))
    }

    fn is_bin(&self) -> bool {
        !self.query.binned.is_empty()
    }

    fn is_filtered(&self) -> bool {
        !self.query.search.trim().is_empty() || !self.query.state.is_empty()
    }
}

/// The book, or the bin.
pub async fn show(
    State(app): State<App>,
    installer: Installer,
    Query(query): Query<BookQuery>,
) -> Result<Response, Error> {
    let filter =
        Filter { search: query.search.clone(), state: JobState::named(&query.state), binned: !query.binned.is_empty() };
    let jobs = app.store.jobs(installer.firm.id, &filter).await?;
    let zone = &installer.firm.profile.time_zone;
    let jobs = jobs.into_iter().map(|job| row(job, zone)).collect();
    let title = if filter.binned { "Bin" } else { "Job book" };
    let undo = query.undo.parse().ok().map(JobId);
    page(&BookPage { frame: Frame::of(&app, &installer, title)?, query, jobs, undo })
}

fn row(job: JobSummary, zone: &str) -> Row {
    let name = if job.customer.is_empty() { format!("Job {}", job.id) } else { job.customer };
    Row { id: job.id, name, place: job.place, state: job.state.label(), touched: day_and_time(job.touched_at, zone) }
}

/// A moment as day and time in a firm's zone: "1 Dec 2026, 14:03".
pub fn day_and_time(at: i64, zone: &str) -> String {
    let zone = jiff::tz::TimeZone::get(zone).unwrap_or(jiff::tz::TimeZone::UTC);
    let moment = jiff::Timestamp::from_second(at).unwrap_or(jiff::Timestamp::UNIX_EPOCH);
    moment.to_zoned_datetime(zone).strftime("%-d %b %Y, %H:%M").to_string()
}

impl KeyForm {
    /// The key.
    pub fn key(&self) -> &str {
        &self.key
    }
}

/// A form that carries nothing but its key.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct KeyForm {
    key: String,
    state: String,
}

/// Starts a job and goes to its first step.
pub async fn start(State(app): State<App>, installer: Installer, Form(form): Form<KeyForm>) -> Result<Response, Error> {
    let draft = installer.firm.profile.first_draft();
    let once = submit(&app, &form.key)?;
    let id = app.store.start_job(installer.firm.id, once, Contact::default(), &draft).await?;
    Ok(on_to(&app.paths().site(id)))
}

/// Copies a job and goes to the copy.
pub async fn copy(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<KeyForm>,
) -> Result<Response, Error> {
    let copy = app.store.copy_job(installer.firm.id, submit(&app, &form.key)?, JobId(id)).await?;
    Ok(on_to(&app.paths().site(copy)))
}

/// Sets how far a job has come.
pub async fn set_state(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<KeyForm>,
) -> Result<Response, Error> {
    let state = JobState::named(&form.state).ok_or(Error::Unusable("there is no such state"))?;
    app.store.set_state(installer.firm.id, submit(&app, &form.key)?, JobId(id), state).await?;
    Ok(on_to(&app.paths().book()))
}

#[derive(Template)]
#[template(path = "jobs/bin.html")]
struct BinPage {
    frame: Frame,
    id: JobId,
    name: String,
}

/// Asks before a job goes into the bin, and names it.
pub async fn ask_to_bin(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let name = if job.contact.customer.is_empty() { format!("Job {id}") } else { job.contact.customer };
    page(&BinPage { frame: Frame::of(&app, &installer, "Put a job into the bin")?, id: JobId(id), name })
}

/// Puts a job into the bin; the book then offers to undo it.
pub async fn bin(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<KeyForm>,
) -> Result<Response, Error> {
    app.store.bin_job(installer.firm.id, submit(&app, &form.key)?, JobId(id)).await?;
    Ok(on_to(&format!("{}?undo={id}", app.paths().book())))
}

/// Takes a job out of the bin.
pub async fn restore(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<KeyForm>,
) -> Result<Response, Error> {
    app.store.restore_job(installer.firm.id, submit(&app, &form.key)?, JobId(id)).await?;
    Ok(on_to(&app.paths().book()))
}
