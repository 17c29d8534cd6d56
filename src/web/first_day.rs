//! The first day: whoever started the program enters its code and makes the first account.

use askama::Template;
use axum::extract::State;
use axum::response::Response;
use serde::Deserialize;

use super::app::App;
use super::error::Error;
use super::forms::{Complaints, Form, on_to, page, page_again, submit, text};
use super::frame::Frame;
use super::session;
use crate::accounts::{NewPerson, Profile, is_email};
use crate::passwords;

/// What is typed on the first day.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct FirstDayForm {
    key: String,
    code: String,
    firm: String,
    name: String,
    email: String,
    password: String,
}

#[derive(Template)]
#[template(path = "accounts/first_day.html")]
struct FirstDayPage {
    frame: Frame,
    form: FirstDayForm,
    complaints: Complaints,
}

/// The page of the first day; not here once it is over.
pub async fn show(State(app): State<App>) -> Result<Response, Error> {
    still_open(&app).await?;
    page(&FirstDayPage { frame: frame(&app)?, form: FirstDayForm::default(), complaints: Complaints::default() })
}

/// Makes the first firm with its first person, who is signed in at once.
pub async fn begin(State(app): State<App>, Form(form): Form<FirstDayForm>) -> Result<Response, Error> {
    still_open(&app).await?;
    let complaints = complaints(&app, &form);
    if !complaints.is_empty() {
        let mut frame = frame(&app)?;
        frame.is_error = true;
        return page_again(&FirstDayPage { frame, form, complaints });
    }
    let profile = Profile { name: form.firm.trim().to_owned(), ..Profile::default() };
    let person = new_person(&app, &form).await?;
    let id = app.store.begin(submit(&app, &form.key)?, profile, false, person).await?;
    if let Ok(mut code) = app.set_up_code.lock() {
        *code = None;
    }
    session::start(&app, id, on_to(&app.paths().firm())).await
}

async fn still_open(app: &App) -> Result<(), Error> {
    let has_code = app.set_up_code.lock().is_ok_and(|code| code.is_some());
    if has_code && app.store.is_first_day().await? { Ok(()) } else { Err(Error::NotFound) }
}

fn frame(app: &App) -> Result<Frame, Error> {
    let mut frame = Frame::bare(app, "First day");
    frame.key = super::app::fresh_key()?.to_string();
    Ok(frame)
}

fn complaints(app: &App, form: &FirstDayForm) -> Complaints {
    let mut complaints = Complaints::default();
    let right = app.set_up_code.lock().is_ok_and(|code| code.as_deref() == Some(form.code.trim()));
    if !right {
        complaints.add("code", "Set-up code", "give the code that the program printed when it started");
    }
    for (field, label, typed) in [("firm", "Name of your firm", &form.firm), ("name", "Your name", &form.name)] {
        match text(typed, 120) {
            Ok(text) if text.is_empty() => complaints.add(field, label, "give a name"),
            Ok(_) => {}
            Err(message) => complaints.add(field, label, message),
        }
    }
    if !is_email(&form.email) {
        complaints.add("email", "E-mail", "give an e-mail address, such as ana@example.org");
    }
    if let Some(message) = passwords::complaint(&form.password) {
        complaints.add("password", "Password", message);
    }
    complaints
}

async fn new_person(app: &App, form: &FirstDayForm) -> Result<NewPerson, Error> {
    let place = app.hashing.clone().try_acquire_owned().map_err(|_| Error::TooMany)?;
    let password = form.password.clone();
    let mut salt = [0; 16];
    getrandom::fill(&mut salt)?;
    let hashed = tokio::task::spawn_blocking(move || {
        let _place = place;
        passwords::hash(&password, salt)
    });
    let hashed = hashed.await.map_err(|error| Error::Internal(error.into()))?;
    let password_hash = hashed.map_err(|error| Error::Internal(anyhow::anyhow!("{error}")))?;
    Ok(NewPerson { name: form.name.trim().to_owned(), email: form.email.trim().to_owned(), password_hash })
}
