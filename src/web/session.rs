//! Who is signed in: a random token in a cookie, its hash in the store.

use axum::body::{Body, to_bytes};
use axum::extract::{FromRequestParts, OriginalUri, Request, State};
use axum::http::header::{COOKIE, ORIGIN, SET_COOKIE};
use axum::http::request::Parts;
use axum::http::{HeaderMap, HeaderValue, Method};
use axum::middleware::Next;
use axum::response::{IntoResponse, Redirect, Response};
use axum_extra::extract::CookieJar;
use sha2::{Digest, Sha256};

use super::app::App;
use super::error::Error;
use super::forms::unkept;
use super::{FORM_BYTES, sign_in};
use crate::accounts::{Firm, Person, PersonId};

/// Seconds that a session lasts: two weeks, so that a job may be revisited without a password in between.
const LASTS: i64 = 14 * 24 * 3600;

/// The signed-in person with their firm.
#[derive(Clone, Debug)]
pub struct Installer {
    /// The person.
    pub person: Person,
    /// Their firm.
    pub firm: Firm,
}

impl<S: Send + Sync> FromRequestParts<S> for Installer {
    type Rejection = Error;

    /// [`require`] has put it there; a route outside of it has nobody.
    async fn from_request_parts(parts: &mut Parts, _: &S) -> Result<Self, Error> {
        parts.extensions.get::<Self>().cloned().ok_or(Error::NotFound)
    }
}

/// Lets only signed-in people through; the others are asked to sign in, and come back to what they
/// asked for, a form they sent included.
pub async fn require(State(app): State<App>, mut request: Request, next: Next) -> Result<Response, Error> {
    if let Some(installer) = find(&app, request.headers()).await? {
        request.extensions_mut().insert(installer);
        return Ok(next.run(request).await);
    }
    let wanted = path_of(&request).to_owned();
    if request.method() == Method::GET || request.method() == Method::HEAD {
        return Ok(Redirect::to(&app.paths().sign_in_and_go_to(&wanted)).into_response());
    }
    let body = to_bytes(request.into_body(), FORM_BYTES).await.map_err(|_| Error::Unusable("the form is too large"))?;
    Ok(unkept(sign_in::ask_again(&app, &wanted, &String::from_utf8_lossy(&body))?).await)
}

/// The address as the browser asked for it, the base path included.
fn path_of(request: &Request) -> &str {
    let asked = request.extensions().get::<OriginalUri>().map_or(request.uri(), |original| &original.0);
    asked.path_and_query().map_or("/", |address| address.as_str())
}

async fn find(app: &App, headers: &HeaderMap) -> Result<Option<Installer>, Error> {
    let Some(hash) = token(app, headers).map(|token| hash_of(&token)) else { return Ok(None) };
    let found = app.store.session(hash, app.clock.now()).await?;
    Ok(found.map(|signed_in| Installer { person: signed_in.person, firm: signed_in.firm }))
}

/// The token of the session cookie; none where two cookies claim to be it.
fn token(app: &App, headers: &HeaderMap) -> Option<String> {
    let jar = CookieJar::from_headers(headers);
    let name = cookie_name(app);
    let claims = headers.get_all(COOKIE).iter().filter_map(|value| value.to_str().ok());
    let count =
        claims.flat_map(|value| value.split(';')).filter(|part| part.trim().starts_with(&format!("{name}="))).count();
    (count == 1).then(|| jar.get(name).map(|cookie| cookie.value().to_owned())).flatten()
}

fn hash_of(token: &str) -> [u8; 32] {
    Sha256::digest(token.as_bytes()).into()
}

/// The prefix binds the cookie to this host where https and no base path allow it.
fn cookie_name(app: &App) -> &'static str {
    if app.config.is_https() && app.config.base().is_empty() { "__Host-keeplit" } else { "keeplit" }
}

/// Starts a session and puts its cookie on an answer.
pub async fn start(app: &App, person: PersonId, mut response: Response) -> Result<Response, Error> {
    let mut bytes = [0; 32];
    getrandom::fill(&mut bytes)?;
    let token = data_encoding::BASE32_NOPAD.encode(&bytes).to_ascii_lowercase();
    let now = app.clock.now();
    app.store.start_session(person, hash_of(&token), now, now + LASTS).await?;
    set_cookie(app, &token, LASTS, &mut response)?;
    Ok(response)
}

/// Ends the session of a request.
pub async fn end(app: &App, headers: &HeaderMap, mut response: Response) -> Result<Response, Error> {
    if let Some(token) = token(app, headers) {
        app.store.end_session(hash_of(&token)).await?;
    }
    set_cookie(app, "", 0, &mut response)?;
    let wipe = HeaderValue::from_static("\"cache\", \"storage\"");
    response.headers_mut().insert("clear-site-data", wipe);
    Ok(response)
}

fn set_cookie(app: &App, token: &str, lasts: i64, response: &mut Response) -> Result<(), Error> {
    let path = if app.config.base().is_empty() { "/" } else { app.config.base() };
    let secure = if app.config.is_https() { "; Secure" } else { "" };
    let cookie = format!("{}={token}; Path={path}; Max-Age={lasts}; HttpOnly; SameSite=Lax{secure}", cookie_name(app));
    let value = HeaderValue::from_str(&cookie).map_err(|error| Error::Internal(error.into()))?;
    response.headers_mut().append(SET_COOKIE, value);
    Ok(())
}

/// A form with a session cookie must say where it was sent from; programs without a browser that
/// send neither header have no business with someone's session.
pub async fn refuse_foreign(State(app): State<App>, request: Request<Body>, next: Next) -> Result<Response, Error> {
    let headers = request.headers();
    let says_nothing = !headers.contains_key("sec-fetch-site") && !headers.contains_key(ORIGIN);
    if !request.method().is_safe() && says_nothing && token(&app, headers).is_some() {
        return Err(Error::Foreign);
    }
    Ok(next.run(request).await)
}
