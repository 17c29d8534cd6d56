//! Weeks and years: whether the bank is full again in time, and how often it runs dry.
//!
//! The years are played while the page is being sent: how far they are comes line by line, then what they
//! say. A browser that goes away, or Stop, ends the playing.

use std::convert::Infallible;

use askama::Template;
use axum::body::{Body, Bytes};
use axum::extract::{Path, RawQuery, State};
use axum::http::header;
use axum::response::{IntoResponse, Response};
use tokio_stream::StreamExt;
use tokio_stream::wrappers::ReceiverStream;

use super::unfinished;
use crate::drawing;
use crate::jobs::JobId;
use crate::sizing::proof::{DayOfCharge, Proof, Recovery, RestsOn, Year, YearTold};
use crate::units::Hours;
use crate::web::app::App;
use crate::web::book::KeyForm;
use crate::web::error::Error;
use crate::web::forms::{Form, on_to, page};
use crate::web::frame::{Frame, StepOf};
use crate::web::headers::Streamed;
use crate::web::playing::{Heard, YEARS};
use crate::web::price::case::Case;
use crate::web::session::Installer;
use crate::wording::{Numbers, duration};

/// Where in the page the years come.
const HERE: &str = "<!-- years -->";

#[derive(Template)]
#[template(path = "design/weeks.html")]
struct WeeksPage {
    frame: Frame,
    id: JobId,
    class: &'static str,
    shape: &'static str,
    verdict: &'static str,
    told: Vec<String>,
    picture: String,
    days: Vec<[String; 4]>,
    rests_on: String,
    is_playing: bool,
    years: u32,
}

#[derive(Template)]
#[template(path = "design/year.html")]
struct YearPart<'a> {
    year: &'a Year,
    years: String,
    rows: Vec<[String; 3]>,
    rests_on: String,
}

/// The four weeks; with `play` in the address the years as well.
pub async fn show(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    RawQuery(query): RawQuery,
) -> Result<Response, Error> {
    let case = Case::find(&app, &installer, JobId(id)).await?;
    let frame = Frame::of_step(&app, &installer, case.job.id, StepOf::Needs, "Weeks and years")?;
    let (numbers, is_playing) = (frame.numbers, query.as_deref() == Some("play=yes"));
    let Some((survey, design)) = case.designed else { return unfinished(frame, &case.job) };
    let Some(proof) = &design.proof else { return unfinished(frame, &case.job) };
    let (class, shape, verdict) = verdict(proof.weeks.recovery);
    let whole = WeeksPage {
        id: case.job.id,
        class,
        shape,
        verdict,
        told: told(proof, numbers),
        picture: drawing::weeks::picture(&proof.weeks, verdict, numbers)?,
        days: proof.weeks.days.iter().enumerate().map(|(day, charge)| day_row(day, charge, numbers)).collect(),
        rests_on: rests_on(&crate::simulation::year::rests_on(&survey)),
        is_playing,
        years: YEARS,
        frame,
    };
    if !is_playing {
        return page(&whole);
    }
    let text = whole.render()?;
    let (before, after) = text.split_once(HERE).unwrap_or((&text, ""));
    let (before, after) = (before.to_owned(), after.to_owned());
    let heard = ReceiverStream::new(app.playing.play(installer.person.id, survey, design));
    let parts = tokio_stream::once(before)
        .chain(heard.map(move |heard| part(&heard, numbers)))
        .chain(tokio_stream::once(after))
        .map(|text| Ok::<_, Infallible>(Bytes::from(text)));
    let headers = [(header::CONTENT_TYPE, "text/html; charset=utf-8"), (header::CACHE_CONTROL, "no-store")];
    let mut response = (headers, Body::from_stream(parts)).into_response();
    response.extensions_mut().insert(Streamed);
    Ok(response)
}

/// Stops what the person has running.
pub async fn stop(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(_): Form<KeyForm>,
) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    app.playing.stop(installer.person.id);
    Ok(on_to(&app.paths().weeks(job.id)))
}

/// What is sent of something heard.
fn part(heard: &Heard, numbers: Numbers) -> String {
    match heard {
        Heard::Waiting => "<p>Others are playing; this waits its turn.</p>\n".to_owned(),
        Heard::Done(years) => {
            let [done, all] = [*years, YEARS].map(|years| numbers.plain(f64::from(years), 0));
            format!("<p class=\"soft\">{done} of {all} years</p>\n")
        }
        Heard::Stopped => "<p>Stopped; nothing was kept.</p>\n".to_owned(),
        Heard::Over(year) => {
            let rows = rows(year, numbers);
            let years = numbers.plain(f64::from(year.years), 0);
            let part = YearPart { years, rows, rests_on: rests_on(&year.rests_on), year };
            part.render().unwrap_or_default()
        }
    }
}

fn verdict(recovery: Recovery) -> (&'static str, &'static str, &'static str) {
    match recovery {
        Recovery::FullBeforeNextCut => ("hold", "●", "Full before every cut"),
        Recovery::SlowlyLosing => ("tight", "▲", "Not full before every cut"),
        Recovery::NeverRecovers => ("short", "■", "Never full again"),
    }
}

fn told(proof: &Proof, numbers: Numbers) -> Vec<String> {
    let weeks = &proof.weeks;
    let cuts = if weeks.cuts == 1 { "one cut".to_owned() } else { format!("{} cuts", weeks.cuts) };
    let mut told = vec![match weeks.run_outs {
        0 => format!("Four weeks, {cuts}: the bank, aged and cold, runs dry in none of them."),
        1 => format!("Four weeks, {cuts}: the bank, aged and cold, runs dry in one of them."),
        n => format!("Four weeks, {cuts}: the bank, aged and cold, runs dry in {n} of them."),
    }];
    if weeks.recovery != Recovery::FullBeforeNextCut {
        told.push(format!("Before the worst of them {} of mains are missing.", duration(weeks.missing_hours)));
        told.push(match weeks.missing_current {
            Some(current) => format!("{} more charging current would do.", numbers.with_unit(current.0, "A")),
            None => "No charging current alone would do.".to_owned(),
        });
    }
    told
}

fn day_row(day: usize, charge: &DayOfCharge, numbers: Numbers) -> [String; 4] {
    let off = if charge.off > Hours::ZERO { duration(charge.off) } else { "–".to_owned() };
    [(day + 1).to_string(), off, numbers.percent(charge.lowest), numbers.percent(charge.highest)]
}

/// What the figures rest on, always said beside them.
fn rests_on(rests_on: &RestsOn) -> String {
    match rests_on {
        RestsOn::Schedule => "the blocks that the feeder announces".to_owned(),
        RestsOn::Answers => "your answers on how often and how long".to_owned(),
        RestsOn::Country { region, year } => format!("the average of {region}, {year}"),
    }
}

fn rows(year: &Year, numbers: Numbers) -> Vec<[String; 3]> {
    let both =
        |name: &str, figure: &dyn Fn(&YearTold) -> String| [name.to_owned(), figure(&year.first), figure(&year.last)];
    let two = |value: f64| two_figures(value, numbers);
    vec![
        both("Cuts in a year", &|told| two(told.cuts_per_year)),
        both("Runs dry in a year", &|told| {
            let (low, high) = told.run_outs_interval;
            format!("{} ({} to {})", two(told.run_outs_per_year), two(low), two(high))
        }),
        both("Cuts ridden through", &|told| share(told.ridden_through, numbers)),
        both("Without power in a year", &|told| match told.unserved.0 {
            hours if hours < 1.0 / 60.0 => "none".to_owned(),
            hours if hours < 10.0 => duration(told.unserved),
            hours => format!("{}\u{a0}h", two(hours)),
        }),
        both("Lowest charge, a middling year", &|told| share(told.lowest_charge[1].max(0.0), numbers)),
        both("Lowest charge, a bad year", &|told| share(told.lowest_charge[0].max(0.0), numbers)),
        both("Whole discharges in a year", &|told| two(told.full_cycles_per_year)),
    ]
}

/// A figure with two figures at most: chance earns no more.
pub fn two_figures(value: f64, numbers: Numbers) -> String {
    if value <= 0.0 {
        return "0".to_owned();
    }
    let size = value.log10().floor();
    let unit = 10f64.powf(size - 1.0);
    let rounded = (value / unit).round() * unit;
    numbers.plain(rounded, (1.0 - size).clamp(0.0, 6.0) as usize)
}

/// A share in whole per cent; nearly all and nearly none keep what sets them apart.
fn share(share: f64, numbers: Numbers) -> String {
    let percent = share * 100.0;
    if percent > 99.0 && percent < 100.0 {
        return format!("over {}\u{a0}%", numbers.plain((percent * 10.0).floor().min(999.0) / 10.0, 1));
    }
    format!("{}\u{a0}%", numbers.plain(percent, 0))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn chance_is_told_in_two_figures() {
        let numbers = Numbers::default();
        for (value, told) in [
            (0.0, "0"),
            (0.003, "0.003"),
            (0.0312, "0.031"),
            (1.26, "1.3"),
            (52.4, "52"),
            (521.85, "520"),
            (0.996, "1"),
        ] {
            assert_eq!(two_figures(value, numbers), told, "{value}");
        }
        for (value, told) in [(1.0, "100\u{a0}%"), (0.9996, "over 99.9\u{a0}%"), (0.87, "87\u{a0}%"), (0.0, "0\u{a0}%")]
        {
            assert_eq!(share(value, numbers), told, "{value}");
        }
    }
}
