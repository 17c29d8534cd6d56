//! Keys that forms carry: what a change is based on, and which submit it is.

use std::fmt;

use serde::{Deserialize, Serialize};
use sha2::{Digest, Sha256};

/// How often a record was saved; a change names the one that it was based on.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(transparent)]
pub struct Revision(pub i64);

impl fmt::Display for Revision {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        self.0.fmt(f)
    }
}

/// The key of one rendered form: sent twice, it is one submit.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct OneTimeKey(String);

impl OneTimeKey {
    /// From 128 random bits.
    pub fn from_random(bits: [u8; 16]) -> Self {
        Self(data_encoding::BASE32_NOPAD.encode(&bits).to_ascii_lowercase())
    }

    /// Reads the key that a form sent back; anything else than a key is none.
    pub fn read(text: &str) -> Option<Self> {
        let fits = text.len() == 26 && text.bytes().all(|byte| byte.is_ascii_lowercase() || byte.is_ascii_digit());
        fits.then(|| Self(text.to_owned()))
    }

    /// The key of a second write that the same submit causes; always the same one.
    pub fn next(&self) -> Self {
        let mut bits = [0; 16];
        bits.copy_from_slice(&Sha256::digest(&self.0)[..16]);
        Self::from_random(bits)
    }

    /// Its letters.
    pub fn as_str(&self) -> &str {
        &self.0
    }
}

impl fmt::Display for OneTimeKey {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.0)
    }
}

/// Declares the id of a kind of record, so that one never passes for another.
macro_rules! id {
    ($(#[$doc:meta])* $name:ident) => {
        $(#[$doc])*
        #[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
        pub struct $name(pub i64);

        impl std::fmt::Display for $name {
            fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
                self.0.fmt(f)
            }
        }
    };
}

pub(crate) use id;
