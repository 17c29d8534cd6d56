//! What every handler is handed: store, clock, settings.

use std::net::IpAddr;
use std::sync::{Arc, Mutex};

use tokio::sync::Semaphore;

use super::clock::Clock;
use super::paths::Paths;
use super::playing::Playing;
use super::share::wrong_links::WrongLinks;
use crate::keys::OneTimeKey;
use crate::store::{Once, Store};

/// Settings that are read once, at the start.
#[derive(Clone, Debug, Default)]
pub struct Config {
    /// The address that customers' links show, without a slash at its end; `None` while it is unset.
    pub public_address: Option<String>,
    /// Proxies whose word on the caller's address is taken.
    pub trusted_proxies: Vec<IpAddr>,
}

impl Config {
    /// The path in front of every route: empty, or `/power`.
    pub fn base(&self) -> &str {
        let after_scheme = self.public_address.as_deref().and_then(|address| address.split_once("://"));
        let path = after_scheme.and_then(|(_, rest)| rest.find('/').map(|at| &rest[at..]));
        path.unwrap_or("").trim_end_matches('/')
    }

    /// Whether people come by https, so that cookies may ask for it.
    pub fn is_https(&self) -> bool {
        self.public_address.as_deref().is_some_and(|address| address.starts_with("https://"))
    }
}

/// What every handler is handed; cheap to clone.
#[derive(Clone)]
pub struct App {
    /// The store.
    pub store: Store,
    /// The clock.
    pub clock: Clock,
    /// Settings.
    pub config: Arc<Config>,
    /// The code that opens the first day; `None` once it is over.
    pub set_up_code: Arc<Mutex<Option<String>>>,
    /// One password is hashed at a time; who finds the place taken is told to come again.
    pub hashing: Arc<Semaphore>,
    /// Drawn at the start and never stored: customers' keys are made with it.
    pub secret: [u8; 32],
    /// Wrong links, counted by address.
    pub wrong_links: Arc<WrongLinks>,
    /// Years of cuts that are being played.
    pub playing: Arc<Playing>,
}

impl App {
    /// An app over a store.
    ///
    /// Fails where the machine gives no random numbers: nothing here is safe without them.
    pub fn new(store: Store, clock: Clock, config: Config) -> Result<Self, getrandom::Error> {
        let mut secret = [0; 32];
        getrandom::fill(&mut secret)?;
        Ok(Self {
            store,
            clock,
            config: Arc::new(config),
            set_up_code: Arc::default(),
            hashing: Arc::new(Semaphore::new(1)),
            secret,
            wrong_links: Arc::default(),
            playing: Arc::default(),
        })
    }

    /// Opens the first day with a code that is told to whoever started the program.
    pub fn open_first_day(&self) -> Result<String, getrandom::Error> {
        let code = random_text::<8>()?;
        if let Ok(mut open) = self.set_up_code.lock() {
            *open = Some(code.clone());
        }
        Ok(code)
    }

    /// The addresses of all pages.
    pub fn paths(&self) -> Paths {
        Paths::new(self.config.base())
    }

    /// A submit that arrives now.
    pub fn submit(&self, key: OneTimeKey) -> Once {
        Once { key, now: self.clock.now() }
    }
}

/// Random letters and digits that can be read aloud, of so many bytes.
pub fn random_text<const BYTES: usize>() -> Result<String, getrandom::Error> {
    let mut bytes = [0; BYTES];
    getrandom::fill(&mut bytes)?;
    Ok(data_encoding::BASE32_NOPAD.encode(&bytes).to_ascii_lowercase())
}

/// The key of a form that is rendered now.
pub fn fresh_key() -> Result<OneTimeKey, getrandom::Error> {
    let mut bits = [0; 16];
    getrandom::fill(&mut bits)?;
    Ok(OneTimeKey::from_random(bits))
}
