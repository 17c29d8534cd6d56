//! Signing in and out.

use askama::Template;
use axum::body::Body;
use axum::extract::{Query, State};
use axum::http::header::{CONTENT_TYPE, COOKIE, ORIGIN, SET_COOKIE};
use axum::http::{HeaderMap, Request, StatusCode};
use axum::response::{IntoResponse, Redirect, Response};
use serde::Deserialize;
use tower::ServiceExt;

use super::app::App;
use super::client::Client;
use super::error::Error;
use super::forms::{Complaints, Form, on_to, page, page_again};
use super::frame::Frame;
use super::{router, session};
use crate::accounts::{Person, PersonId};
use crate::passwords;

/// Failed tries from one place that are let through: on one account, and on all of them.
const TRIES: i64 = 10;
const TRIES_IN_ALL: i64 = 60;
/// The seconds they are remembered.
const REMEMBERED: i64 = 15 * 60;

/// What a person types to sign in, and what they were about to do.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct SignInForm {
    email: String,
    password: String,
    /// Where to go afterwards.
    next: String,
    /// A form that was sent after the session had ended, to be sent again.
    again: String,
}

#[derive(Template)]
#[template(path = "accounts/sign_in.html")]
struct SignInPage {
    frame: Frame,
    form: SignInForm,
    complaints: Complaints,
}

/// The page to sign in on.
pub async fn show(State(app): State<App>, Query(form): Query<SignInForm>) -> Result<Response, Error> {
    if app.store.is_first_day().await? {
        return Ok(on_to(&app.paths().begin()));
    }
    let form = SignInForm { next: form.next, ..SignInForm::default() };
    page(&SignInPage { frame: Frame::bare(&app, "Sign in"), form, complaints: Complaints::default() })
}

/// The page to sign in on, for someone whose session ended while they were typing.
pub fn ask_again(app: &App, next: &str, body: &str) -> Result<Response, Error> {
    let form = SignInForm { next: next.to_owned(), again: body.to_owned(), ..SignInForm::default() };
    let page = SignInPage { frame: Frame::bare(app, "Sign in to save"), form, complaints: Complaints::default() };
    Ok((StatusCode::UNAUTHORIZED, axum::response::Html(page.render()?)).into_response())
}

/// Signs in; a form that was sent too late is then sent again.
pub async fn sign_in(
    State(app): State<App>,
    client: Client,
    headers: HeaderMap,
    Form(form): Form<SignInForm>,
) -> Result<Response, Error> {
    match known(&app, client, &form).await? {
        Some(person) if form.again.is_empty() => {
            let next = if app.paths().is_own(&form.next) { form.next } else { app.paths().book() };
            session::start(&app, person, Redirect::to(&next).into_response()).await
        }
        Some(person) => send_again(&app, person, &headers, form).await,
        None => refused(&app, client, form).await,
    }
}

/// The person whose e-mail and password these are. Too many failed tries are stopped first.
async fn known(app: &App, client: Client, form: &SignInForm) -> Result<Option<PersonId>, Error> {
    let since = app.clock.now() - REMEMBERED;
    for (whose, tries) in counted(client, form) {
        if app.store.attempts_since(&whose, since).await? >= tries {
            return Err(Error::TooMany);
        }
    }
    let person = app.store.person_by_email(&form.email).await?;
    fits(app, form.password.clone(), person).await
}

/// What failed tries are counted by, and how many of each are let through.
fn counted(client: Client, form: &SignInForm) -> [(String, i64); 2] {
    let place = client.network();
    [(format!("{} from {place}", form.email.trim()), TRIES), (format!("from {place}"), TRIES_IN_ALL)]
}

/// Hashing is costly: one at a time, on a thread of its own; the surplus is turned away.
async fn fits(app: &App, password: String, person: Option<Person>) -> Result<Option<PersonId>, Error> {
    if password.chars().count() > passwords::LONGEST {
        return Ok(None);
    }
    let place = app.hashing.clone().try_acquire_owned().map_err(|_| Error::TooMany)?;
    let checked = tokio::task::spawn_blocking(move || {
        let _place = place;
        let hash = person.as_ref().map(|person| person.password_hash.as_str());
        passwords::fits(&password, hash).then(|| person.map(|person| person.id)).flatten()
    });
    checked.await.map_err(|error| Error::Internal(error.into()))
}

async fn refused(app: &App, client: Client, form: SignInForm) -> Result<Response, Error> {
    let now = app.clock.now();
    for (whose, _) in counted(client, &form) {
        app.store.note_attempt(&whose, now, now - REMEMBERED).await?;
    }
    let mut frame = Frame::bare(app, "Sign in");
    frame.is_error = true;
    let mut complaints = Complaints::default();
    complaints.add("email", "E-mail", "check the e-mail and the password: they do not belong together");
    page_again(&SignInPage { frame, form: SignInForm { password: String::new(), ..form }, complaints })
}

/// Sends a kept form to where it was meant for, under the new session.
async fn send_again(app: &App, person: PersonId, headers: &HeaderMap, form: SignInForm) -> Result<Response, Error> {
    let signed_in = session::start(app, person, StatusCode::OK.into_response()).await?;
    let cookie = signed_in.headers()[SET_COOKIE].clone();
    let pair = cookie.to_str().unwrap_or("").split(';').next().unwrap_or("").to_owned();
    if !app.paths().is_own(&form.next) {
        return Err(Error::NotFound);
    }
    let mut request = Request::post(&form.next)
        .header(CONTENT_TYPE, "application/x-www-form-urlencoded")
        .header(COOKIE, pair)
        .header("sec-fetch-site", "same-origin");
    if let Some(origin) = headers.get(ORIGIN) {
        request = request.header(ORIGIN, origin);
    }
    let request = request.body(Body::from(form.again)).map_err(|error| Error::Internal(error.into()))?;
    let answer = router(app.clone()).oneshot(request).await;
    let mut answer = answer.unwrap_or_else(|never| match never {});
    answer.headers_mut().append(SET_COOKIE, cookie);
    Ok(answer)
}

/// Signs out.
pub async fn sign_out(State(app): State<App>, headers: HeaderMap) -> Result<Response, Error> {
    session::end(&app, &headers, on_to(&app.paths().sign_in())).await
}
