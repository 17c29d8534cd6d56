//! Send: links to the newest sheet, how it looks to the customer, and what came back.
//!
//! A link's key is shown for a quarter of an hour after it was made, and never again: the store has
//! only its hash. The key comes from the form's key and the program's secret, so that a form sent
//! twice shows one link.

use askama::Template;
use axum::extract::{Path, Query, State};
use axum::response::Response;
use serde::Deserialize;

use super::app::App;
use super::book::day_and_time;
use super::error::Error;
use super::forms::{Form, on_to, page, submit};
use super::frame::{Frame, StepOf};
use super::session::Installer;
use super::share::page::{OfferPage, day};
use super::share::{public, sheet_of};
use crate::jobs::JobId;
use crate::qr::Qr;
use crate::quotes::share_key::ShareKey;
use crate::quotes::{FrozenVersion, Link, LinkId, LinkState, Said, VersionId};
use crate::translations::Words;

/// Minutes for which a new link is shown.
const SHOWN_MINUTES: i64 = 15;
/// Days that a link may last.
const LASTS: [(i64, &str); 3] = [(7, "7 days"), (30, "30 days"), (90, "90 days")];
const DAY: i64 = 24 * 3600;

/// What is asked for when a link is made.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct LinkForm {
    key: String,
    version: String,
    lasts: String,
}

/// The link that was just made.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct Made {
    made: String,
}

#[derive(Template)]
#[template(path = "quotes/send.html")]
struct SendPage {
    frame: Frame,
    job: JobId,
    newest: Option<Newest>,
    fresh: Option<Fresh>,
    links: Vec<ShownLink>,
    lasts: [(i64, &'static str); 3],
    public_address: bool,
    minutes: i64,
}

/// The newest sheet.
struct Newest {
    id: VersionId,
    number: i64,
    made_on: String,
    total: String,
    ends_on: String,
    answer: String,
}

/// A link while its key is still known.
struct Fresh {
    address: String,
    qr: Option<Qr>,
    ends: String,
    text: String,
    mail: String,
}

/// A link in the list.
struct ShownLink {
    id: LinkId,
    number: i64,
    made: String,
    ends: String,
    state: &'static str,
    is_open: bool,
}

/// The page.
pub async fn show(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Query(made): Query<Made>,
) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let versions = app.store.versions(installer.firm.id, job.id).await?;
    let links = app.store.links(installer.firm.id, job.id).await?;
    let zone = &installer.firm.profile.time_zone;
    let now = app.clock.now();
    page(&SendPage {
        frame: Frame::of_step(&app, &installer, job.id, StepOf::Send, "Send")?,
        job: job.id,
        newest: versions.first().map(|version| newest(version, zone)).transpose()?,
        fresh: fresh(&app, job.id, &made.made, &job.contact.phone).await?,
        links: links.iter().map(|link| shown(link, &versions, now, zone)).collect(),
        lasts: LASTS,
        public_address: app.config.public_address.is_some(),
        minutes: SHOWN_MINUTES,
    })
}

/// Makes a link and shows it.
pub async fn make_link(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<LinkForm>,
) -> Result<Response, Error> {
    let once = submit(&app, &form.key)?;
    let version = VersionId(form.version.parse().map_err(|_| Error::NotFound)?);
    if app.store.version(installer.firm.id, version).await?.job != JobId(id) {
        return Err(Error::NotFound);
    }
    let days = LASTS.iter().map(|(days, _)| *days).find(|days| days.to_string() == form.lasts).unwrap_or(30);
    let key = ShareKey::mint(&app.secret, &form.key);
    let ends_at = once.now + days * DAY;
    let who = installer.person.name.clone();
    app.store.make_link(installer.firm.id, once, version, key.hash(), ends_at, who).await?;
    Ok(on_to(&format!("{}?made={}#link", app.paths().send(JobId(id)), form.key)))
}

/// Cancels a link; it is dead at once.
pub async fn cancel(
    State(app): State<App>,
    installer: Installer,
    Path((id, link)): Path<(i64, i64)>,
    Form(form): Form<LinkForm>,
) -> Result<Response, Error> {
    let links = app.store.links(installer.firm.id, JobId(id)).await?;
    if links.iter().all(|known| known.id != LinkId(link)) {
        return Err(Error::NotFound);
    }
    let who = installer.person.name.clone();
    app.store.cancel_link(installer.firm.id, submit(&app, &form.key)?, LinkId(link), who).await?;
    Ok(on_to(&app.paths().send(JobId(id))))
}

/// A version as the customer sees it, from the very same template.
pub async fn preview(
    State(app): State<App>,
    installer: Installer,
    Path((id, version)): Path<(i64, i64)>,
) -> Result<Response, Error> {
    let version = app.store.version(installer.firm.id, VersionId(version)).await?;
    if version.job != JobId(id) {
        return Err(Error::NotFound);
    }
    let sheet = sheet_of(&version)?;
    page(&OfferPage { preview: true, ..OfferPage::new(&version, &sheet, super::share::stylesheet(&app), |_| false) })
}

fn newest(version: &FrozenVersion, zone: &str) -> Result<Newest, Error> {
    let sheet = sheet_of(version)?;
    let words = Words::of("en");
    let answer = version.answer.as_ref().map(|answer| {
        let said = if answer.said == Said::Yes { "yes" } else { "no" };
        format!("{} said {said} on {}", answer.name, day_and_time(answer.at, zone))
    });
    Ok(Newest {
        id: version.id,
        number: version.number,
        made_on: day(&sheet.firm, version.made_at, words),
        total: sheet.total.shown(sheet.firm.decimal_mark),
        ends_on: sheet.ends_on.parse().map_or_else(|_| sheet.ends_on.clone(), |day| words.date(day)),
        answer: answer.unwrap_or_default(),
    })
}

/// The link of a form, if it was made a short while ago and still opens.
async fn fresh(app: &App, job: JobId, form_key: &str, phone: &str) -> Result<Option<Fresh>, Error> {
    if form_key.is_empty() {
        return Ok(None);
    }
    let key = ShareKey::mint(&app.secret, form_key);
    let now = app.clock.now();
    let shared = app.store.shared(key.hash(), now).await?;
    let young = shared.filter(|shared| {
        let age = now - shared.link.made_at;
        shared.version.job == job && shared.state == LinkState::Open && age < SHOWN_MINUTES * 60
    });
    let Some((shared, address)) = young.zip(public(app, &app.paths().offer(&key.to_string()))) else {
        return Ok(None);
    };
    let sheet = sheet_of(&shared.version)?;
    let words = Words::of(&sheet.language);
    let body =
        words.fill("message-body", &[("firm", sheet.firm.name.as_str().into()), ("address", address.as_str().into())]);
    let subject = words.fill("offer-title", &[("firm", sheet.firm.name.as_str().into())]);
    let number: String = phone.chars().filter(|letter| letter.is_ascii_digit() || *letter == '+').collect();
    Ok(Some(Fresh {
        qr: Qr::of(&address),
        ends: day(&sheet.firm, shared.link.ends_at, words),
        text: format!("sms:{number}?body={}", escaped(&body)),
        mail: format!("mailto:?subject={}&body={}", escaped(&subject), escaped(&body)),
        address,
    }))
}

/// Text inside an address.
fn escaped(text: &str) -> String {
    let plain = |byte: u8| byte.is_ascii_alphanumeric() || b"-._~".contains(&byte);
    text.bytes().map(|byte| if plain(byte) { char::from(byte).to_string() } else { format!("%{byte:02X}") }).collect()
}

fn shown(link: &Link, versions: &[FrozenVersion], now: i64, zone: &str) -> ShownLink {
    let version = versions.iter().find(|version| version.id == link.version);
    let answered = version.is_some_and(|version| version.answer.is_some());
    let newest = versions.first().is_some_and(|newest| newest.id == link.version);
    let state = link.state(now, newest, answered);
    ShownLink {
        id: link.id,
        number: link.number,
        made: day_and_time(link.made_at, zone),
        ends: day_and_time(link.ends_at, zone),
        state: match state {
            LinkState::Open => "Open",
            LinkState::Ended => "Ended",
            LinkState::Cancelled => "Cancelled",
            LinkState::Replaced => "Replaced by a newer sheet",
        },
        is_open: state == LinkState::Open,
    }
}
