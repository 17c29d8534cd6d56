//! What goes wrong, as a status and a page: the cause is logged here, once, and never shown.

use std::any::Any;

use askama::Template;
use axum::extract::{Request, State};
use axum::http::StatusCode;
use axum::http::header::RETRY_AFTER;
use axum::middleware::Next;
use axum::response::{Html, IntoResponse, Response};
use tower_http::csrf::ProtectionError;

use super::app::{App, random_text};
use super::frame::Frame;
use crate::store;

/// What goes wrong.
#[derive(Debug)]
pub enum Error {
    /// Not here, or someone else's.
    NotFound,
    /// It was changed meanwhile, where the page has no way to show both.
    Stale,
    /// Sent from elsewhere.
    Foreign,
    /// Too many tries.
    TooMany,
    /// The form itself cannot be read.
    Unusable(&'static str),
    /// Nothing can be saved for a moment.
    Busy,
    /// Anything else.
    Internal(anyhow::Error),
}

/// A failure on its way to becoming a page.
#[derive(Clone, Debug)]
struct Failure {
    kind: Kind,
    number: Option<String>,
}

#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Kind {
    NotHere,
    Changed,
    Foreign,
    TooMany,
    Unusable,
    Busy,
    WentWrong,
}

impl Error {
    fn status(&self) -> (StatusCode, Kind) {
        match self {
            Self::NotFound => (StatusCode::NOT_FOUND, Kind::NotHere),
            Self::Stale => (StatusCode::CONFLICT, Kind::Changed),
            Self::Foreign => (StatusCode::FORBIDDEN, Kind::Foreign),
            Self::TooMany => (StatusCode::TOO_MANY_REQUESTS, Kind::TooMany),
            Self::Unusable(_) => (StatusCode::UNPROCESSABLE_ENTITY, Kind::Unusable),
            Self::Busy => (StatusCode::SERVICE_UNAVAILABLE, Kind::Busy),
            Self::Internal(_) => (StatusCode::INTERNAL_SERVER_ERROR, Kind::WentWrong),
        }
    }
}

impl From<store::Error> for Error {
    fn from(error: store::Error) -> Self {
        match error {
            store::Error::NotFound => Self::NotFound,
            store::Error::Stale | store::Error::Taken => Self::Stale,
            store::Error::Busy | store::Error::Full => {
                tracing::warn!(error = %error, "nothing could be saved");
                Self::Busy
            }
            other => Self::Internal(other.into()),
        }
    }
}

impl From<askama::Error> for Error {
    fn from(error: askama::Error) -> Self {
        Self::Internal(error.into())
    }
}

impl From<getrandom::Error> for Error {
    fn from(error: getrandom::Error) -> Self {
        Self::Internal(anyhow::anyhow!("no random numbers: {error}"))
    }
}

impl IntoResponse for Error {
    fn into_response(self) -> Response {
        let (status, kind) = self.status();
        let number = match &self {
            Self::Internal(cause) => Some(logged(&format!("{cause:#}"))),
            Self::Unusable(why) => {
                tracing::info!(why, "a form could not be read");
                None
            }
            _ => None,
        };
        failure(status, Failure { kind, number })
    }
}

/// Logs a cause under a short number that a person can quote.
fn logged(cause: &str) -> String {
    let number = random_text::<3>().unwrap_or_else(|_| "00000".to_owned());
    tracing::error!(number, cause, "a page could not be made");
    number
}

fn failure(status: StatusCode, failure: Failure) -> Response {
    let mut response = status.into_response();
    if status == StatusCode::SERVICE_UNAVAILABLE || status == StatusCode::TOO_MANY_REQUESTS {
        response.headers_mut().insert(RETRY_AFTER, axum::http::HeaderValue::from_static("60"));
    }
    response.extensions_mut().insert(failure);
    response
}

/// A panic in a handler is a failure like any other.
pub fn caught(panic: Box<dyn Any + Send>) -> Response {
    let text = panic.downcast_ref::<String>().map(String::as_str);
    let text = text.or_else(|| panic.downcast_ref::<&str>().copied()).unwrap_or("a panic without words");
    failure(StatusCode::INTERNAL_SERVER_ERROR, Failure { kind: Kind::WentWrong, number: Some(logged(text)) })
}

/// No route has this address.
pub async fn not_here() -> Error {
    Error::NotFound
}

#[derive(Template)]
#[template(path = "states/failure.html")]
struct FailurePage {
    frame: Frame,
    kind: Kind,
    number: String,
}

impl FailurePage {
    fn is(&self, name: &str) -> bool {
        format!("{:?}", self.kind) == name
    }
}

/// Gives every failure its page; also those that a layer answered with a bare status.
pub async fn show(State(app): State<App>, request: Request, next: Next) -> Response {
    let response = next.run(request).await;
    let Some(failure) = failure_of(&response) else { return response };
    let mut frame = Frame::bare(&app, title(failure.kind));
    frame.is_error = true;
    let page = FailurePage { frame, kind: failure.kind, number: failure.number.unwrap_or_default() };
    let Ok(text) = page.render() else { return response };
    let (mut parts, _) = response.into_parts();
    for stale in [axum::http::header::CONTENT_LENGTH, axum::http::header::CONTENT_TYPE] {
        parts.headers.remove(stale);
    }
    // An id that is no number is an address that is not here.
    let status = if parts.status == StatusCode::BAD_REQUEST { StatusCode::NOT_FOUND } else { parts.status };
    (status, parts.headers, Html(text)).into_response()
}

fn failure_of(response: &Response) -> Option<Failure> {
    if let Some(failure) = response.extensions().get::<Failure>() {
        return Some(failure.clone());
    }
    let bare = |kind| Some(Failure { kind, number: None });
    if response.extensions().get::<ProtectionError>().is_some() {
        return bare(Kind::Foreign);
    }
    match response.status() {
        StatusCode::PAYLOAD_TOO_LARGE | StatusCode::UNSUPPORTED_MEDIA_TYPE => bare(Kind::Unusable),
        StatusCode::BAD_REQUEST => bare(Kind::NotHere),
        _ => None,
    }
}

fn title(kind: Kind) -> &'static str {
    match kind {
        Kind::NotHere => "Not here",
        Kind::Changed => "Changed meanwhile",
        Kind::Foreign => "Sent from elsewhere",
        Kind::TooMany => "Too many tries",
        Kind::Unusable => "This could not be read",
        Kind::Busy => "Not saved",
        Kind::WentWrong => "Went wrong",
    }
}
