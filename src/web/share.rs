//! The customer's side of an offer: the sheet behind a link, the answer, the record of it.
//!
//! Nobody signs in here: whoever holds the key of a link may read its sheet and answer it. Opening a
//! page changes nothing, since chat programs and mail scanners open links too. No cookie, no script.

mod answer;
pub mod page;
mod picture;
pub mod wrong_links;

use std::collections::BTreeMap;

use axum::Router;
use axum::extract::{Path, RawQuery, Request, State};
use axum::http::{HeaderName, HeaderValue, StatusCode, header};
use axum::middleware::{Next, from_fn};
use axum::response::{Html, IntoResponse, Redirect, Response};
use axum::routing::get;

use self::page::{AnswerForm, GonePage, KeptPage, OfferPage};
use super::app::{App, fresh_key};
use super::assets::address_of;
use super::client::Client;
use super::error::Error;
use super::forms::{self, Form};
use crate::keys::OneTimeKey;
use crate::qr::Qr;
use crate::quotes::share_key::ShareKey;
use crate::quotes::sheet::QuoteSheet;
use crate::quotes::{Answer, FrozenVersion, LinkState, Shared};
use crate::store::{self, Once};
use crate::translations::Words;

/// The customer's addresses.
pub fn routes() -> Router<App> {
    Router::new().route("/o/{key}", get(offer).post(send)).route("/o/{key}/kept", get(kept)).layer(from_fn(private))
}

/// Nothing of a sheet stays with others: no address in the next request, no copy, no index.
async fn private(request: Request, next: Next) -> Response {
    let mut response = next.run(request).await;
    let headers = response.headers_mut();
    headers.insert(header::REFERRER_POLICY, HeaderValue::from_static("no-referrer"));
    headers.insert(HeaderName::from_static("x-robots-tag"), HeaderValue::from_static("noindex, nofollow"));
    headers.insert(header::CACHE_CONTROL, HeaderValue::from_static("private, no-store"));
    response
}

/// Address of the stylesheet.
pub fn stylesheet(app: &App) -> String {
    app.paths().asset(address_of("keeplit.css"))
}

/// A path as customers see it: below the public address, never below what a request claims.
pub fn public(app: &App, path: &str) -> Option<String> {
    let address = app.config.public_address.as_deref()?;
    let origin = address.trim_end_matches('/').strip_suffix(app.config.base()).unwrap_or(address);
    Some(format!("{origin}{path}"))
}

/// The sheet of a frozen version, as it was written.
pub fn sheet_of(version: &FrozenVersion) -> Result<QuoteSheet, Error> {
    serde_json::from_slice(&version.sheet).map_err(|cause| Error::Internal(cause.into()))
}

/// A link that leads to a sheet.
struct Opened {
    key: ShareKey,
    shared: Shared,
    sheet: QuoteSheet,
}

/// Finds the sheet behind a key; what is answered instead if there is none.
async fn open(app: &App, client: Client, text: &str, rest: &str) -> Result<Opened, Response> {
    let exact = ShareKey::read(text);
    let Some(key) = exact.or_else(|| ShareKey::read_before_punctuation(text)) else {
        return Err(wrong(app, client));
    };
    let found =
        app.store.shared(key.hash(), app.clock.now()).await.map_err(|error| Error::from(error).into_response())?;
    let Some(shared) = found else {
        return Err(wrong(app, client));
    };
    if exact.is_none() {
        return Err(Redirect::permanent(&format!("{}{rest}", app.paths().offer(&key.to_string()))).into_response());
    }
    let sheet =
        serde_json::from_slice(&shared.version.sheet).map_err(|cause| Error::Internal(cause.into()).into_response())?;
    Ok(Opened { key, shared, sheet })
}

/// No sheet has this key; too many of these from one address must wait.
fn wrong(app: &App, client: Client) -> Response {
    let words = Words::of("en");
    let (status, title, told) = if app.wrong_links.note(client.address) {
        (StatusCode::NOT_FOUND, "missing-title", "missing")
    } else {
        (StatusCode::TOO_MANY_REQUESTS, "slow-title", "slow")
    };
    let page = GonePage {
        words,
        stylesheet: stylesheet(app),
        title: words.say(title),
        told: vec![words.say(told)],
        firm: None,
    };
    (status, page.into_html()).into_response()
}

/// Rows of the stay-on list that a customer ticks off to see the hours.
#[derive(Debug, Default, serde::Deserialize)]
#[serde(default)]
struct TickedOff {
    off: BTreeMap<u32, String>,
}

impl TickedOff {
    /// What an address asks for; an address that asks for anything else ticks nothing.
    fn read(query: Option<&str>) -> Self {
        query.and_then(|query| forms::read(query.as_bytes()).ok()).unwrap_or_default()
    }

    fn has(&self, row: usize) -> bool {
        u32::try_from(row).is_ok_and(|row| self.off.contains_key(&row))
    }
}

/// Shows the sheet, or why it is no longer open.
async fn offer(State(app): State<App>, client: Client, Path(key): Path<String>, RawQuery(query): RawQuery) -> Response {
    let off = TickedOff::read(query.as_deref());
    match open(&app, client, &key, "").await {
        Ok(opened) if opened.shared.state == LinkState::Open => {
            let Ok(key) = fresh_key() else { return Error::Busy.into_response() };
            let form = AnswerForm { key: key.to_string(), ..AnswerForm::default() };
            opened.page(&app, form, Vec::new(), &off).into_response()
        }
        Ok(opened) => opened.gone(&app, false),
        Err(answer) => answer,
    }
}

/// Keeps the customer's answer; late, it says so and keeps nothing.
async fn send(
    State(app): State<App>,
    client: Client,
    Path(key): Path<String>,
    Form(form): Form<AnswerForm>,
) -> Response {
    let opened = match open(&app, client, &key, "").await {
        Ok(opened) if opened.shared.state == LinkState::Open => opened,
        Ok(opened) => return opened.gone(&app, true),
        Err(answer) => return answer,
    };
    let read = match answer::read(&form, Words::of(&opened.sheet.language)) {
        Ok(read) => read,
        Err(complaints) => {
            return (StatusCode::UNPROCESSABLE_ENTITY, opened.page(&app, form, complaints, &TickedOff::default()))
                .into_response();
        }
    };
    let now = app.clock.now();
    let Some(key) = OneTimeKey::read(&form.key).or_else(|| fresh_key().ok()) else {
        return Error::Busy.into_response();
    };
    let submit = Once { key, now };
    let given = Answer { said: read.said, name: read.name, words: read.words, at: now };
    match app.store.answer(opened.key.hash(), submit, given).await {
        // Answered already: the record shows the first answer.
        Ok(()) | Err(store::Error::Taken) => Redirect::to(&app.paths().kept(&opened.key.to_string())).into_response(),
        Err(store::Error::Stale) => opened.gone(&app, true),
        Err(error) => Error::from(error).into_response(),
    }
}

/// Shows the record of the answer; as long as the link is not cancelled, also after its end.
async fn kept(State(app): State<App>, client: Client, Path(key): Path<String>) -> Response {
    let opened = match open(&app, client, &key, "/kept").await {
        Ok(opened) if opened.shared.state != LinkState::Cancelled => opened,
        Ok(opened) => return opened.gone(&app, false),
        Err(answer) => return answer,
    };
    match &opened.shared.version.answer {
        Some(answer) => {
            let offer = app.paths().offer(&opened.key.to_string());
            KeptPage::new(&opened.shared.version, &opened.sheet, answer, stylesheet(&app), offer)
                .into_html()
                .into_response()
        }
        None => Redirect::to(&app.paths().offer(&opened.key.to_string())).into_response(),
    }
}

impl Opened {
    fn page(
        &self,
        app: &App,
        form: AnswerForm,
        complaints: Vec<(&'static str, String)>,
        off: &TickedOff,
    ) -> Html<String> {
        let key = self.key.to_string();
        let address = public(app, &app.paths().offer(&key));
        let page = OfferPage::new(&self.shared.version, &self.sheet, stylesheet(app), |row| off.has(row));
        let qr = address.as_deref().and_then(Qr::of);
        OfferPage {
            here: app.paths().offer(&key),
            kept: app.paths().kept(&key),
            address: address.unwrap_or_default(),
            qr,
            form,
            complaints,
            ..page
        }
        .into_html()
    }

    /// Status 410 and the firm's phone, nothing else of the sheet.
    fn gone(&self, app: &App, late: bool) -> Response {
        let words = Words::of(&self.sheet.language);
        let day = |at| page::day(&self.sheet.firm, at, words);
        let (title, told) = match self.shared.state {
            LinkState::Cancelled => ("gone-cancelled-title", words.say("gone-cancelled")),
            LinkState::Replaced => {
                let old = day(self.shared.version.made_at);
                let new = day(self.shared.newest_made_at);
                ("gone-replaced-title", words.fill("gone-replaced", &[("old", old.into()), ("new", new.into())]))
            }
            LinkState::Ended | LinkState::Open => ("gone-ended-title", words.say("gone-ended")),
        };
        let late = late.then(|| words.say("gone-late"));
        let page = GonePage {
            words,
            stylesheet: stylesheet(app),
            title: words.say(title),
            told: late.into_iter().chain([told]).collect(),
            firm: Some(page::Phone::of(&self.sheet.firm)),
        };
        (StatusCode::GONE, page.into_html()).into_response()
    }
}
