//! Forms: read whole, complained about at once, shown again as typed.

use std::borrow::Cow;

use askama::Template;
use axum::body::Bytes;
use axum::extract::{FromRequest, Request};
use axum::http::header::{CACHE_CONTROL, CONTENT_TYPE};
use axum::http::{HeaderValue, StatusCode};
use axum::response::{Html, IntoResponse, Redirect, Response};
use serde::de::DeserializeOwned;

use super::app::App;
use super::error::Error;
use crate::keys::{OneTimeKey, Revision};
use crate::reading::Refusal;
use crate::store::Once;

/// A form as it arrived: every field is text.
pub struct Form<T>(pub T);

impl<T: DeserializeOwned, S: Send + Sync> FromRequest<S> for Form<T> {
    type Rejection = Response;

    async fn from_request(request: Request, state: &S) -> Result<Self, Response> {
        let kind = request.headers().get(CONTENT_TYPE).and_then(|kind| kind.to_str().ok()).unwrap_or("");
        if !kind.starts_with("application/x-www-form-urlencoded") {
            return Err(StatusCode::UNSUPPORTED_MEDIA_TYPE.into_response());
        }
        let body = Bytes::from_request(request, state).await.map_err(IntoResponse::into_response)?;
        read(&body).map(Self).map_err(IntoResponse::into_response)
    }
}

/// Reads the text of a form; rows are in brackets: `loads[3][name]`.
pub fn read<T: DeserializeOwned>(body: &[u8]) -> Result<T, Error> {
    let text = std::str::from_utf8(body).map_err(|_| Error::Unusable("the form is not text"))?;
    let config = serde_qs::Config::new().max_depth(3).use_form_encoding(true);
    config.deserialize_str(&picked(text)).map_err(|_| Error::Unusable("the form does not fit the page"))
}

/// The form with the reading that was picked in its field: `pick=name=value`, one of two buttons.
///
/// Name and value stay encoded as the browser sent them, which encodes both the same way everywhere.
fn picked(text: &str) -> Cow<'_, str> {
    let pick = text.split('&').find_map(|pair| pair.strip_prefix("pick=")?.split_once("%3D"));
    let Some((field, value)) = pick else { return Cow::Borrowed(text) };
    let pairs = text.split('&').map(|pair| match pair.split_once('=') {
        Some((name, _)) if name == field => format!("{field}={value}"),
        _ => pair.to_owned(),
    });
    Cow::Owned(pairs.collect::<Vec<_>>().join("&"))
}

/// The submit of a form that carries a key.
pub fn submit(app: &App, key: &str) -> Result<Once, Error> {
    let key = OneTimeKey::read(key).ok_or(Error::Unusable("the form has lost its key"))?;
    Ok(app.submit(key))
}

/// The revision that a form was based on; what is no number is never current.
pub fn revision(text: &str) -> Revision {
    Revision(text.parse().unwrap_or(-1))
}

/// What is wrong with a form, field by field, in the order of the page.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Complaints(Vec<Complaint>);

/// What is wrong with one field.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Complaint {
    /// Name of the field.
    pub field: String,
    /// What it is called on the page.
    pub label: String,
    /// What to give instead.
    pub message: String,
    /// What could have been meant, each as it would be typed.
    pub readings: Vec<String>,
}

impl Complaint {
    /// The id of the field, for the link to it.
    pub fn id(&self) -> String {
        id_of(&self.field)
    }
}

/// The id of a field: its name without brackets.
pub fn id_of(field: &str) -> String {
    field.replace('[', "-").replace(']', "")
}

impl Complaints {
    /// Adds what is wrong with a field.
    pub fn add(&mut self, field: impl Into<String>, label: impl Into<String>, message: impl Into<String>) {
        let refusal = Refusal::from(message.into());
        self.refuse(&field.into(), &label.into(), refusal);
    }

    /// Keeps a value, or notes what is wrong and gives `None`.
    pub fn take<T>(&mut self, field: &str, label: &str, read: Result<T, impl Into<Refusal>>) -> Option<T> {
        read.map_err(|refusal| self.refuse(field, label, refusal.into())).ok()
    }

    fn refuse(&mut self, field: &str, label: &str, refusal: Refusal) {
        let Refusal { text: message, readings } = refusal;
        self.0.push(Complaint { field: field.to_owned(), label: label.to_owned(), message, readings });
    }

    /// Whether nothing is wrong.
    pub fn is_empty(&self) -> bool {
        self.0.is_empty()
    }

    /// All of them.
    pub fn all(&self) -> &[Complaint] {
        &self.0
    }

    /// Whether something is wrong with a field whose name begins so.
    pub fn touch(&self, beginning: &str) -> bool {
        self.0.iter().any(|complaint| complaint.field.starts_with(beginning))
    }

    /// Whether some field can be read two ways.
    pub fn has_readings(&self) -> bool {
        self.0.iter().any(|complaint| !complaint.readings.is_empty())
    }

    /// The same in the words of the box on top; empty if nothing is wrong.
    pub fn told(&self, field: &str) -> String {
        let complaint = self.0.iter().find(|complaint| complaint.field == field);
        complaint.map_or_else(String::new, |complaint| format!("{}: {}", complaint.label, complaint.message))
    }

    /// What could have been meant by a field; empty unless it can be read two ways.
    pub fn readings(&self, field: &str) -> &[String] {
        self.0.iter().find(|complaint| complaint.field == field).map_or(&[], |complaint| &complaint.readings)
    }

    /// What is wrong with a field; empty if nothing is.
    pub fn of(&self, field: &str) -> &str {
        self.0.iter().find(|complaint| complaint.field == field).map_or("", |complaint| complaint.message.as_str())
    }
}

/// A page.
pub fn page(template: &impl Template) -> Result<Response, Error> {
    Ok(Html(template.render()?).into_response())
}

/// Keeps an answer out of every store: it is about passwords.
pub async fn unkept(mut response: Response) -> Response {
    response.headers_mut().insert(CACHE_CONTROL, HeaderValue::from_static("private, no-store"));
    response
}

/// A page that shows a form again, as typed, with what is wrong.
pub fn page_again(template: &impl Template) -> Result<Response, Error> {
    Ok((StatusCode::UNPROCESSABLE_ENTITY, Html(template.render()?)).into_response())
}

/// A page that shows a form again because what it was based on has changed.
pub fn page_of_conflict(template: &impl Template) -> Result<Response, Error> {
    Ok((StatusCode::CONFLICT, Html(template.render()?)).into_response())
}

/// After a form was taken: on to a page, so that a reload sends nothing twice.
pub fn on_to(address: &str) -> Response {
    Redirect::to(address).into_response()
}

/// Text of a field, with what is wrong with its length.
pub fn text(typed: &str, most: usize) -> Result<String, String> {
    let text = typed.trim();
    if text.chars().count() > most {
        Err(format!("give at most {most} characters"))
    } else if text.chars().any(|letter| letter.is_control() && letter != '\n' && letter != '\r') {
        Err("leave out control characters".to_owned())
    } else {
        Ok(text.to_owned())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_reading_that_was_picked_stands_in_its_field() {
        let sent = "key=k&loads%5B3%5D%5Bpower%5D=1.500&name=a+b&pick=loads%5B3%5D%5Bpower%5D%3D1500+W";
        let expected = "key=k&loads%5B3%5D%5Bpower%5D=1500+W&name=a+b&pick=loads%5B3%5D%5Bpower%5D%3D1500+W";
        assert_eq!(picked(sent), expected);
        for plain in ["", "key=k&name=pick", "pick=", "pick=a%3Db"] {
            assert_eq!(picked(plain), plain);
        }
    }
}
