//! A store in a folder of its own, with two firms.

use keeplit::accounts::{FirmId, NewPerson, Profile};
use keeplit::documents::Draft;
use keeplit::jobs::{Contact, JobId};
use keeplit::keys::OneTimeKey;
use keeplit::store::{Once, Store};

/// The moment at which the tests play.
pub const NOW: i64 = 1_800_000_000;

/// A store with two firms in it.
pub struct Shelf {
    pub store: Store,
    pub ana: FirmId,
    pub ben: FirmId,
    pub folder: tempfile::TempDir,
}

impl Shelf {
    pub async fn new() -> Self {
        let folder = tempfile::tempdir().unwrap();
        let store = Store::open(folder.path()).await.unwrap();
        let ana = store.add_firm(profile("Ana's firm"), false, NOW).await.unwrap();
        let ben = store.add_firm(profile("Ben's firm"), false, NOW).await.unwrap();
        Self { store, ana, ben, folder }
    }

    /// A job of Ana's firm.
    pub async fn job(&self, customer: &str) -> JobId {
        self.store.start_job(self.ana, submit(), contact(customer), &Draft::default()).await.unwrap()
    }
}

pub fn profile(name: &str) -> Profile {
    Profile { name: name.to_owned(), ..Profile::default() }
}

pub fn person(email: &str) -> NewPerson {
    NewPerson { name: "Ana".to_owned(), email: email.to_owned(), password_hash: "$argon2id$".to_owned() }
}

pub fn contact(customer: &str) -> Contact {
    let (place, phone) = ("12 Hill Road, Thornby".to_owned(), "+44 1632 960 123".to_owned());
    Contact { customer: customer.to_owned(), place, phone, note: String::new() }
}

/// A submit that nobody has sent before.
pub fn submit() -> Once {
    use std::sync::atomic::{AtomicU64, Ordering};
    static NEXT: AtomicU64 = AtomicU64::new(1);
    let mut bits = [0; 16];
    bits[..8].copy_from_slice(&NEXT.fetch_add(1, Ordering::Relaxed).to_le_bytes());
    Once { key: OneTimeKey::from_random(bits), now: NOW }
}
