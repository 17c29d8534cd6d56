//! Change on the check-over: after saving there, back to the prices.

use axum::extract::{Request, State};
use axum::http::header::{LOCATION, REFERER};
use axum::http::{HeaderValue, Method};
use axum::middleware::Next;
use axum::response::Response;

use crate::jobs::JobId;
use crate::web::app::App;

/// A form of the survey that was opened from the check-over goes back to it instead of one step on;
/// a page that stays on itself is left alone.
pub async fn come_back(State(app): State<App>, request: Request, next: Next) -> Response {
    let asked = (request.method() == Method::POST).then(|| from_check_over(&request)).flatten();
    let path = request.uri().path().to_owned();
    let mut response = next.run(request).await;
    let goes_on = response.headers().get(LOCATION).is_some_and(|to| !to.as_bytes().ends_with(path.as_bytes()));
    if let (Some(job), true) = (asked, goes_on)
        && let Ok(address) = HeaderValue::from_str(&app.paths().price(job))
    {
        response.headers_mut().insert(LOCATION, address);
    }
    response
}

/// The job whose page says that it was opened from the check-over.
fn from_check_over(request: &Request) -> Option<JobId> {
    let page = request.headers().get(REFERER)?.to_str().ok()?;
    let (page, query) = page.split_once('?')?;
    let path = request.uri().path();
    let job = path.strip_prefix("/job/")?.split('/').next()?.parse().ok()?;
    (query == "back=price" && page.ends_with(path)).then_some(JobId(job))
}
