//! How many wrong links one address may open before it must wait.
//!
//! A key of 128 bits is not found by trying; this keeps those who try from costing the rest anything.
//! Only wrong links count, so a household behind one address always opens its right one.

use std::net::IpAddr;
use std::num::NonZeroU32;
use std::time::Duration;

use governor::clock::{Clock, DefaultClock};
use governor::middleware::NoOpMiddleware;
use governor::state::keyed::DashMapStateStore;
use governor::{Quota, RateLimiter};

use crate::web::client::network;

/// Wrong links in a row before the wait begins.
const WRONG: NonZeroU32 = NonZeroU32::new(20).expect("twenty is not zero");
/// After that, one more for each of these.
const WAIT: Duration = Duration::from_secs(30);
/// Addresses counted at most; those that have waited long enough make room, and while there is none
/// every wrong link waits.
const KEPT: usize = 10_000;

type Limiter<C> = RateLimiter<IpAddr, DashMapStateStore<IpAddr>, C, NoOpMiddleware<<C as Clock>::Instant>>;

/// Counts wrong links by address.
pub struct WrongLinks<C: Clock = DefaultClock> {
    limiter: Limiter<C>,
}

impl Default for WrongLinks {
    fn default() -> Self {
        Self::with_clock(DefaultClock::default())
    }
}

impl<C: Clock> WrongLinks<C> {
    fn with_clock(clock: C) -> Self {
        let quota = Quota::with_period(WAIT).unwrap_or(Quota::per_minute(WRONG)).allow_burst(WRONG);
        Self { limiter: RateLimiter::new(quota, DashMapStateStore::default(), clock) }
    }

    /// Notes a wrong link; `false` once there were too many.
    pub fn note(&self, address: IpAddr) -> bool {
        if self.limiter.len() >= KEPT {
            self.limiter.retain_recent();
        }
        self.limiter.len() < KEPT && self.limiter.check_key(&network(address)).is_ok()
    }
}

#[cfg(test)]
mod tests {
    use governor::clock::FakeRelativeClock;

    use super::*;

    fn at(text: &str) -> IpAddr {
        text.parse().unwrap()
    }

    #[test]
    fn the_twenty_first_wrong_link_must_wait_and_others_need_not() {
        let clock = FakeRelativeClock::default();
        let wrong = WrongLinks::with_clock(clock.clone());
        assert!((0..20).all(|_| wrong.note(at("192.0.2.1"))));
        assert!(!wrong.note(at("192.0.2.1")));
        assert!(wrong.note(at("192.0.2.2")));
        clock.advance(WAIT);
        assert!(wrong.note(at("192.0.2.1")), "one more after the wait");
        assert!(!wrong.note(at("192.0.2.1")));
    }

    #[test]
    fn the_memory_of_wrong_links_is_bounded() {
        let wrong = WrongLinks::with_clock(FakeRelativeClock::default());
        let from = |n: usize| IpAddr::from(std::net::Ipv4Addr::from_bits(n as u32));
        assert!((0..KEPT).all(|n| wrong.note(from(n))));
        assert!(!wrong.note(from(KEPT)));
        assert_eq!(wrong.limiter.len(), KEPT);
    }
}
