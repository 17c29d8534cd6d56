//! Past sheets: every version with its answer, what changed since, and who did what.

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;

use super::app::App;
use super::book::day_and_time;
use super::error::Error;
use super::forms::page;
use super::frame::{Frame, StepOf};
use super::price::case::Case;
use super::session::Installer;
use super::share::sheet_of;
use crate::jobs::JobId;
use crate::offer::since;
use crate::quotes::changes::{Change, Standing, changes};
use crate::quotes::{Done, FrozenVersion, Said, VersionId};

#[derive(Template)]
#[template(path = "quotes/past.html")]
struct PastPage {
    frame: Frame,
    job: JobId,
    versions: Vec<ShownVersion>,
    changed: Vec<String>,
    audit: Vec<ShownDone>,
}

/// A version in the list.
struct ShownVersion {
    id: VersionId,
    number: i64,
    version: i64,
    made: String,
    made_by: String,
    promise: String,
    total: String,
    answer: String,
    program: String,
}

/// A line of the audit.
struct ShownDone {
    at: String,
    who: String,
    did: String,
}

/// The page.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let case = Case::find(&app, &installer, JobId(id)).await?;
    let versions = app.store.versions(installer.firm.id, case.job.id).await?;
    let audit = app.store.audit(installer.firm.id, case.job.id).await?;
    let zone = &installer.firm.profile.time_zone;
    let changed = match versions.first() {
        Some(last) => since_version(last, &case)?,
        None => Vec::new(),
    };
    page(&PastPage {
        frame: Frame::of_step(&app, &installer, case.job.id, StepOf::Send, "Past sheets")?,
        job: case.job.id,
        versions: versions.iter().map(|version| shown(version, zone)).collect::<Result<_, _>>()?,
        changed: changed.iter().map(|change| since::told(change, case.voice.numbers)).collect(),
        audit: audit.into_iter().map(|done| shown_done(done, zone)).collect(),
    })
}

/// What changed since the last sheet of a job, in one line for whoever comes back; `None` if nothing
/// did, or if there is no sheet.
pub async fn changed_since_last_sheet(app: &App, case: &Case) -> Result<Option<String>, Error> {
    let versions = app.store.versions(case.firm.id, case.job.id).await?;
    let Some(last) = versions.first() else { return Ok(None) };
    Ok(since::short(&since_version(last, case)?, case.voice.numbers))
}

/// The frozen documents of a version against the job as it is now.
fn since_version(version: &FrozenVersion, case: &Case) -> Result<Vec<Change>, Error> {
    let read = |text: &str| serde_json::from_str(text).map_err(|cause| Error::Internal(cause.into()));
    let design = read(&version.design)?;
    let then = Standing::of(&read(&version.survey)?, Some(&design), Some(sheet_of(version)?.total));
    Ok(changes(&then, &case.standing()))
}

fn shown(version: &FrozenVersion, zone: &str) -> Result<ShownVersion, Error> {
    let sheet = sheet_of(version)?;
    let answer = version.answer.as_ref().map_or_else(
        || "no answer".to_owned(),
        |answer| {
            let said = if answer.said == Said::Yes { "Yes" } else { "No" };
            let words = if answer.words.is_empty() { String::new() } else { format!(": {}", answer.words) };
            format!("{said}, {}, {}{words}", answer.name, day_and_time(answer.at, zone))
        },
    );
    Ok(ShownVersion {
        id: version.id,
        number: version.number,
        version: version.version,
        made: day_and_time(version.made_at, zone),
        made_by: version.made_by.clone(),
        promise: sheet.promise.short.clone(),
        total: sheet.total.shown(sheet.firm.decimal_mark),
        answer,
        program: version.program_version.clone(),
    })
}

fn shown_done(done: Done, zone: &str) -> ShownDone {
    ShownDone { at: day_and_time(done.at, zone), who: done.who, did: done.did }
}
