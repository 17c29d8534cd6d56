//! Hour by hour: the load over the day and the cut on it, as a picture and as a table.

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;

use super::unfinished;
use crate::drawing;
use crate::jobs::JobId;
use crate::web::app::App;
use crate::web::error::Error;
use crate::web::forms::page;
use crate::web::frame::{Frame, StepOf};
use crate::web::price::case::Case;
use crate::web::session::Installer;
use crate::wording::duration;

#[derive(Template)]
#[template(path = "design/hours.html")]
struct HoursPage {
    frame: Frame,
    id: JobId,
    told: String,
    picture: String,
    rows: Vec<[String; 4]>,
}

/// The day of a job.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let case = Case::find(&app, &installer, JobId(id)).await?;
    let mut frame = Frame::of_step(&app, &installer, case.job.id, StepOf::Needs, "Hour by hour")?;
    frame.title = "Hour by hour".to_owned();
    let Some((survey, design)) = &case.designed else { return unfinished(frame, &case.job) };
    let (demand, numbers, autonomy) = (&design.demand, frame.numbers, survey.outage.autonomy);
    let row = |stretch: &crate::sizing::design::DayStretch| {
        [
            format!("{}–{}", stretch.from, stretch.to),
            numbers.with_unit(stretch.average.0, "W"),
            numbers.with_unit(stretch.peak.0, "W"),
            numbers.with_unit(stretch.peak_va.0, "VA"),
        ]
    };
    let told = format!(
        "The cut of {} was taken from {}; its loads use {}. The worst start is {}; at an average hour the same cut uses {}.",
        duration(autonomy),
        demand.sized_start,
        numbers.with_unit(demand.outage.0, "Wh"),
        demand.worst_start,
        numbers.with_unit(demand.average_outage.0, "Wh"),
    );
    page(&HoursPage {
        id: case.job.id,
        told,
        picture: drawing::day::picture(demand, autonomy, numbers)?,
        rows: demand.day.iter().map(row).collect(),
        frame,
    })
}
