//! For watchdogs: no data in them.

use axum::extract::State;
use axum::http::StatusCode;

use super::app::App;

/// The program is up.
pub async fn is_up() -> &'static str {
    "up\n"
}

/// The store answers and takes writes.
pub async fn is_ready(State(app): State<App>) -> (StatusCode, &'static str) {
    if app.store.is_ready().await {
        (StatusCode::OK, "ready\n")
    } else {
        (StatusCode::SERVICE_UNAVAILABLE, "not ready\n")
    }
}
