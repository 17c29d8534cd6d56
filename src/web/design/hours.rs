//! Hour by hour: the load over the day, the cut played through in all its cases, and how long the bank
//! lasts from each hour; each as a picture and as a table of the same figures.

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;

use super::unfinished;
use crate::drawing;
use crate::jobs::JobId;
use crate::simulation;
use crate::sizing::design::DayStretch;
use crate::sizing::proof::{Case as Played, HourOfStart, Moment};
use crate::units::Hours;
use crate::web::app::App;
use crate::web::error::Error;
use crate::web::forms::page;
use crate::web::frame::{Frame, StepOf};
use crate::web::price::case::Case;
use crate::web::session::Installer;
use crate::wording::{Labelled, Numbers, duration};

#[derive(Template)]
#[template(path = "design/hours.html")]
struct HoursPage {
    frame: Frame,
    id: JobId,
    told: String,
    day: String,
    rows: Vec<[String; 4]>,
    cut_told: String,
    cut: String,
    moments: Vec<[String; 5]>,
    cases: Vec<CaseRow>,
    aged_health: String,
    spread_told: String,
    spread: String,
    starts: Vec<[String; 3]>,
}

/// One case in words.
struct CaseRow {
    state: String,
    start: String,
    class: &'static str,
    shape: &'static str,
    lasts: String,
    ended_by: &'static str,
    lowest: String,
    left: String,
}

/// The day and the cut of a job.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let case = Case::find(&app, &installer, JobId(id)).await?;
    let frame = Frame::of_step(&app, &installer, case.job.id, StepOf::Needs, "Hour by hour")?;
    let Some((survey, design)) = &case.designed else { return unfinished(frame, &case.job) };
    let design = simulation::with_detail(survey, design.clone());
    let Some(proof) = &design.proof else { return unfinished(frame, &case.job) };
    let by_hour = proof.detail.as_ref().map_or(&[][..], |detail| &detail.by_hour);
    let (demand, numbers, autonomy) = (&design.demand, frame.numbers, survey.outage.autonomy);
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
        day: drawing::day::picture(demand, autonomy, numbers)?,
        rows: demand.day.iter().map(|stretch| day_row(stretch, numbers)).collect(),
        cut_told: format!(
            "Played from {} at the end of the bank's life on its coldest day, until it stops; the band is the {} asked for.",
            demand.sized_start,
            duration(autonomy)
        ),
        cut: drawing::played::picture(&proof.curve, &design.bank, autonomy, proof.runtime_aged, numbers)?,
        moments: proof.curve.iter().map(|moment| moment_row(moment, numbers)).collect(),
        cases: proof.cases.iter().map(|case| case_row(case, numbers)).collect(),
        aged_health: numbers.percent(1.0 / design.assumptions.ageing_factor),
        spread_told: spread_told(by_hour),
        spread: drawing::spread::picture(by_hour, autonomy)?,
        starts: by_hour.iter().map(hour_row).collect(),
        frame,
    })
}

fn day_row(stretch: &DayStretch, numbers: Numbers) -> [String; 4] {
    [
        format!("{}–{}", stretch.from, stretch.to),
        numbers.with_unit(stretch.average.0, "W"),
        numbers.with_unit(stretch.peak.0, "W"),
        numbers.with_unit(stretch.peak_va.0, "VA"),
    ]
}

fn moment_row(moment: &Moment, numbers: Numbers) -> [String; 5] {
    [
        duration(moment.at),
        numbers.with_unit(moment.load.0, "W"),
        numbers.with_unit(moment.current.0, "A"),
        numbers.with_unit(moment.volts.0, "V"),
        numbers.percent(moment.charge_left),
    ]
}

fn case_row(case: &Played, numbers: Numbers) -> CaseRow {
    let age = if case.health < 1.0 { "aged" } else { "new" };
    let (class, shape) = if case.holds { ("hold", "●") } else { ("short", "■") };
    CaseRow {
        state: format!("{}, {}", numbers.with_unit(case.battery.0, "°C"), age),
        start: case.start.to_string(),
        class,
        shape,
        lasts: lasts(case.runtime),
        ended_by: case.ended_by.label(),
        lowest: numbers.with_unit(case.lowest.0, "V"),
        left: numbers.percent(case.charge_left),
    }
}

/// A runtime; the longest that is played is told as "a week or more".
pub fn lasts(runtime: Hours) -> String {
    if runtime.0 >= simulation::costs::LONGEST { "a week or more".to_owned() } else { duration(runtime) }
}

fn hour_row(hour: &HourOfStart) -> [String; 3] {
    [hour.start.to_string(), lasts(hour.new), lasts(hour.aged)]
}

/// The spread over the hours of the day in three figures.
fn spread_told(by_hour: &[HourOfStart]) -> String {
    let mut aged: Vec<_> = by_hour.iter().map(|hour| hour.aged).collect();
    aged.sort_by(Hours::order);
    let [Some(least), Some(middle), Some(most)] =
        [0, aged.len() / 2, aged.len().saturating_sub(1)].map(|at| aged.get(at))
    else {
        return String::new();
    };
    format!(
        "At the end of its life on its coldest day: {} from the worst hour, {} from a middling one, {} from the best.",
        lasts(*least),
        lasts(*middle),
        lasts(*most)
    )
}
