//! What the engine answers: what it needs, hour by hour, weeks and years, a change tried, the working.

pub mod hours;
pub mod needs;
pub mod try_change;
pub mod weeks;
pub mod working;

use askama::Template;
use axum::response::Response;

use super::error::Error;
use super::forms::page;
use super::frame::Frame;
use crate::jobs::Job;

#[derive(Template)]
#[template(path = "design/unfinished.html")]
struct UnfinishedPage {
    frame: Frame,
    missing: Vec<(String, String)>,
}

/// What is missing before anything can be worked out, with the way there.
fn unfinished(frame: Frame, job: &Job) -> Result<Response, Error> {
    let missing = job.draft.complete().err().unwrap_or_default();
    let told = |fault: crate::documents::Fault| {
        if fault.path == "loads" {
            ("Count at least one thing on the stay-on list".to_owned(), frame.paths.list(job.id))
        } else {
            ("Say how long the cut lasts".to_owned(), frame.paths.cut(job.id))
        }
    };
    let missing = missing.into_iter().map(told).collect();
    page(&UnfinishedPage { frame, missing })
}

/// The place of a figure in the working.
fn anchor(figure: &str) -> String {
    let plain = |letter: char| if letter.is_ascii_alphanumeric() || letter == '_' { letter } else { '-' };
    format!("f-{}", figure.chars().map(plain).collect::<String>())
}
