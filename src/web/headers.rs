//! The headers of every answer, in one place.

use axum::extract::Request;
use axum::http::header::{self, HeaderName};
use axum::http::{Extensions, HeaderMap, HeaderValue, StatusCode, Version};
use axum::middleware::Next;
use axum::response::Response;

const POLICY: &str =
    "default-src 'self'; object-src 'none'; base-uri 'none'; form-action 'self'; frame-ancestors 'none'";

/// Everything comes from here, nothing is framed, nobody is told where a link was opened.
pub async fn add(request: Request, next: Next) -> Response {
    let mut response = next.run(request).await;
    let headers = response.headers_mut();
    for (name, value) in [
        (header::CONTENT_SECURITY_POLICY, POLICY),
        (header::X_CONTENT_TYPE_OPTIONS, "nosniff"),
        (header::REFERRER_POLICY, "same-origin"),
        (header::X_FRAME_OPTIONS, "DENY"),
        (HeaderName::from_static("x-robots-tag"), "noindex, nofollow"),
        (HeaderName::from_static("cross-origin-opener-policy"), "same-origin"),
        // A page may be shown again by going back, but is asked for anew before it is shown afresh.
        (header::CACHE_CONTROL, "private, no-cache"),
    ] {
        headers.entry(name).or_insert(HeaderValue::from_static(value));
    }
    response
}

/// Marks an answer that is sent piece by piece, each as soon as it is there.
#[derive(Clone, Copy, Debug)]
pub struct Streamed;

/// Whether an answer is sent as a whole, so that it may be packed: packing holds pieces back.
pub fn is_whole(_: StatusCode, _: Version, _: &HeaderMap, extensions: &Extensions) -> bool {
    extensions.get::<Streamed>().is_none()
}
