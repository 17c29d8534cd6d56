//! Quotes: prices, the sheet that is frozen for the customer, links to it, and the answer.

pub mod changes;
pub mod price;
mod quantity;
pub mod share_key;
pub mod sheet;
pub mod typed;

pub use quantity::Quantity;

use crate::jobs::JobId;
use crate::keys::id;

id!(
    /// A version of a quote.
    VersionId
);
id!(
    /// A link to a version.
    LinkId
);

/// A version to be frozen.
#[derive(Clone, Debug, PartialEq)]
pub struct NewVersion {
    /// The sheet that the customer sees, in its own form.
    pub sheet: Vec<u8>,
    /// The survey that it rests on.
    pub survey: String,
    /// The design that it rests on, with its assumptions and working.
    pub design: String,
    /// Version of the program.
    pub program_version: &'static str,
    /// Who made it.
    pub made_by: String,
}

/// A frozen version, as it was written.
#[derive(Clone, Debug, PartialEq)]
pub struct FrozenVersion {
    /// Its id.
    pub id: VersionId,
    /// The job.
    pub job: JobId,
    /// Counts the firm's sheets.
    pub number: i64,
    /// Counts the versions of the job.
    pub version: i64,
    /// The sheet, byte by byte.
    pub sheet: Vec<u8>,
    /// SHA-256 of the sheet.
    pub sheet_sha256: Vec<u8>,
    /// The survey that it rests on.
    pub survey: String,
    /// The design that it rests on.
    pub design: String,
    /// Version of the program that made it.
    pub program_version: String,
    /// Who made it.
    pub made_by: String,
    /// When.
    pub made_at: i64,
    /// The customer's answer.
    pub answer: Option<Answer>,
}

/// A link to a version, without its key.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Link {
    /// Its id.
    pub id: LinkId,
    /// Where it leads.
    pub version: VersionId,
    /// Number of that sheet.
    pub number: i64,
    /// When it was made.
    pub made_at: i64,
    /// When it ends.
    pub ends_at: i64,
    /// When it was cancelled.
    pub cancelled_at: Option<i64>,
}

/// What a link opens at a moment.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum LinkState {
    /// The sheet, to be answered or answered already.
    Open,
    /// Its time is over.
    Ended,
    /// The firm has cancelled it.
    Cancelled,
    /// A newer version was made.
    Replaced,
}

impl Link {
    /// What the link opens at a moment; an agreed sheet is not replaced by a newer one.
    pub fn state(&self, now: i64, newest: bool, answered: bool) -> LinkState {
        match self {
            Self { cancelled_at: Some(_), .. } => LinkState::Cancelled,
            Self { ends_at, .. } if *ends_at <= now => LinkState::Ended,
            _ if !newest && !answered => LinkState::Replaced,
            _ => LinkState::Open,
        }
    }
}

/// What a customer's link leads to.
#[derive(Clone, Debug, PartialEq)]
pub struct Shared {
    /// The link.
    pub link: Link,
    /// The version that it leads to.
    pub version: FrozenVersion,
    /// When the newest version of the job was made.
    pub newest_made_at: i64,
    /// What the link opens now.
    pub state: LinkState,
}

/// Yes or no.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs, reason = "the names say it")]
pub enum Said {
    Yes,
    No,
}

impl Said {
    /// Its name in the store.
    pub fn key(self) -> &'static str {
        match self {
            Self::Yes => "yes",
            Self::No => "no",
        }
    }

    /// The answer of a name.
    pub fn named(key: &str) -> Option<Self> {
        [Self::Yes, Self::No].into_iter().find(|said| said.key() == key)
    }
}

/// The customer's answer to one version.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Answer {
    /// Yes or no.
    pub said: Said,
    /// Full name, typed by the customer.
    pub name: String,
    /// Words beside it.
    pub words: String,
    /// When, in seconds since 1970.
    pub at: i64,
}

/// One thing that was done to a job.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Done {
    /// Who did it.
    pub who: String,
    /// What.
    pub did: String,
    /// When, in seconds since 1970.
    pub at: i64,
}
