//! The one place that asks what time it is; a test sets it.

use std::sync::Arc;

/// Tells seconds since 1970, UTC.
#[derive(Clone)]
pub struct Clock(Arc<dyn Fn() -> i64 + Send + Sync>);

impl Clock {
    /// The machine's clock.
    #[allow(clippy::disallowed_methods, reason = "this is the place that asks")]
    pub fn system() -> Self {
        Self::new(|| jiff::Timestamp::now().as_second())
    }

    /// A clock of one's own.
    pub fn new(now: impl Fn() -> i64 + Send + Sync + 'static) -> Self {
        Self(Arc::new(now))
    }

    /// Seconds since 1970, UTC.
    pub fn now(&self) -> i64 {
        self.0()
    }
}
