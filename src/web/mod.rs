//! The pages: thin. A handler reads, asks the store or the engine, and answers.
//!
//! To add a page: its address goes into `paths.rs`; a file of the noun gets a struct with
//! `#[derive(Template)]`, its first field `frame: Frame`, and a handler that returns
//! `Result<Response, Error>`; `page(&struct)` renders it. A form struct has only `String` fields,
//! among them `key` and `revision`; its `read` gives values or `Complaints`, and with complaints the
//! page is shown again as typed by `page_again`. The route goes into [`router`]; what needs a
//! signed-in person takes `Installer`.

pub mod accept;
mod app;
mod assets;
mod assumptions;
mod back;
mod book;
mod client;
mod clock;
mod conflict;
mod design;
mod error;
mod firm;
mod first_day;
mod forms;
mod frame;
mod headers;
mod health;
mod past;
mod paths;
mod playing;
mod price;
mod send;
mod session;
mod share;
mod sign_in;
mod site;
mod survey;

use axum::Router;
use axum::extract::DefaultBodyLimit;
use axum::middleware::{from_fn, from_fn_with_state, map_response};
use axum::routing::{get, post};
use tower_http::catch_panic::CatchPanicLayer;
use tower_http::compression::CompressionLayer;
use tower_http::compression::predicate::{DefaultPredicate, Predicate};
use tower_http::csrf::CsrfLayer;

pub use app::{App, Config, random_text};
pub use clock::Clock;
pub use paths::Paths;
pub use price::case::Case;

/// Most bytes of a form.
const FORM_BYTES: usize = 256 * 1024;

/// Every route with its layers.
pub fn router(app: App) -> Router {
    let routes = public().merge(share::routes()).merge(signed_in(&app));
    let routes = match app.config.base() {
        "" => routes,
        base => Router::new().nest(base, routes).merge(book_below(base, &app)),
    };
    routes
        .fallback(error::not_here)
        .layer(DefaultBodyLimit::max(FORM_BYTES))
        .layer(from_fn_with_state(app.clone(), session::refuse_foreign))
        .layer(CsrfLayer::new().with_insecure_bypass(offers_are_keyed))
        .layer(CatchPanicLayer::custom(error::caught))
        .layer(from_fn_with_state(app.clone(), error::show))
        .layer(from_fn(headers::add))
        .layer(CompressionLayer::new().compress_when(DefaultPredicate::new().and(headers::is_whole)))
        .with_state(app)
}

/// The book at the base path with its slash, which nesting leaves out.
fn book_below(base: &str, app: &App) -> Router<App> {
    let book = get(book::show).layer(from_fn_with_state(app.clone(), session::require));
    Router::new().route(&format!("{base}/"), book)
}

/// What anybody may ask for.
fn public() -> Router<App> {
    Router::new()
        .route("/healthz", get(health::is_up))
        .route("/readyz", get(health::is_ready))
        .route("/robots.txt", get(assets::robots))
        .route("/static/{name}", get(assets::asset))
        .merge(entrance())
}

/// Where passwords are typed.
fn entrance() -> Router<App> {
    Router::new()
        .route("/begin", get(first_day::show).post(first_day::begin))
        .route("/in", get(sign_in::show).post(sign_in::sign_in))
        .layer(map_response(forms::unkept))
}

/// What only a signed-in person may ask for.
fn signed_in(app: &App) -> Router<App> {
    Router::new()
        .route("/", get(book::show))
        .route("/out", post(sign_in::sign_out))
        .route("/job/new", post(book::start))
        .route("/job/{id}", get(site::first_step))
        .route("/job/{id}/site", get(site::show).post(site::save))
        .route("/job/{id}/list", get(survey::list::show).post(survey::list::save))
        .route("/job/{id}/cut", get(survey::cut::show).post(survey::cut::save))
        .route("/job/{id}/runs", get(survey::runs::show).post(survey::runs::save))
        .route("/job/{id}/needs", get(design::needs::show))
        .route("/job/{id}/hours", get(design::hours::show))
        .route("/job/{id}/weeks", get(design::weeks::show))
        .route("/job/{id}/weeks/stop", post(design::weeks::stop))
        .route("/job/{id}/try", get(design::try_change::show).post(design::try_change::take))
        .route("/job/{id}/working", get(design::working::show))
        .route("/job/{id}/copy", post(book::copy))
        .route("/job/{id}/state", post(book::set_state))
        .route("/job/{id}/bin", get(book::ask_to_bin).post(book::bin))
        .route("/job/{id}/restore", post(book::restore))
        .route("/job/{id}/assumptions", get(assumptions::show).post(assumptions::save))
        .route("/job/{id}/price", get(price::show).post(price::save))
        .route("/job/{id}/send", get(send::show).post(send::make_link))
        .route("/job/{id}/sheet/{version}", get(send::preview))
        .route("/job/{id}/link/{link}/cancel", post(send::cancel))
        .route("/job/{id}/past", get(past::show))
        .route("/firm", get(firm::show).post(firm::save))
        .route("/back", get(back::show))
        .route("/back/backup", post(back::back_up))
        .layer(from_fn_with_state(app.clone(), price::come_back))
        .layer(from_fn_with_state(app.clone(), session::require))
}

/// A customer's answer needs the key in its address and no cookie, so it may come from anywhere:
/// a page that says nobody where it was opened sends no origin on plain http.
fn offers_are_keyed(_: &axum::http::Method, address: &axum::http::Uri) -> bool {
    address.path().contains("/o/")
}
