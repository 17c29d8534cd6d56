//! Jobs: one customer's site, revisited for years.

use crate::accounts::FirmId;
use crate::documents::Draft;
use crate::keys::{Revision, id};
use crate::quotes::price::PriceDraft;

id!(
    /// A job.
    JobId
);

/// Days for which a job can be taken back out of the bin.
pub const DAYS_IN_BIN: i64 = 30;

/// One customer's site.
#[derive(Clone, Debug, PartialEq)]
pub struct Job {
    /// Its id.
    pub id: JobId,
    /// Whose it is.
    pub firm: FirmId,
    /// Who and where.
    pub contact: Contact,
    /// How far it has come.
    pub state: JobState,
    /// The survey so far.
    pub draft: Draft,
    /// The prices so far; `None` before it was first priced.
    pub price: Option<PriceDraft>,
    /// How often it was saved.
    pub revision: Revision,
    /// When it was last touched, in seconds since 1970.
    pub touched_at: i64,
    /// When it was put into the bin.
    pub binned_at: Option<i64>,
}

/// Who and where.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Contact {
    /// Customer's name.
    pub customer: String,
    /// Road and town.
    pub place: String,
    /// Phone.
    pub phone: String,
    /// A note for the firm's own eyes.
    pub note: String,
}

/// How far a job has come.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs, reason = "the names say it")]
pub enum JobState {
    BeingSized,
    Priced,
    Sent,
    Agreed,
    TurnedDown,
    Fitted,
}

impl JobState {
    /// Every state with its name in the store and its words.
    pub const ALL: [(Self, &'static str, &'static str); 6] = [
        (Self::BeingSized, "being_sized", "Being sized"),
        (Self::Priced, "priced", "Priced"),
        (Self::Sent, "sent", "Sent"),
        (Self::Agreed, "agreed", "Agreed"),
        (Self::TurnedDown, "turned_down", "Turned down"),
        (Self::Fitted, "fitted", "Fitted"),
    ];

    /// Its name in the store and in addresses.
    pub fn key(self) -> &'static str {
        Self::ALL[self as usize].1
    }

    /// Its words.
    pub fn label(self) -> &'static str {
        Self::ALL[self as usize].2
    }

    /// The state of a name.
    pub fn named(key: &str) -> Option<Self> {
        Self::ALL.iter().find(|(_, known, _)| *known == key).map(|(state, ..)| *state)
    }
}

/// A line of the job book.
#[derive(Clone, Debug, PartialEq)]
pub struct JobSummary {
    /// Its id.
    pub id: JobId,
    /// Customer's name.
    pub customer: String,
    /// Road and town.
    pub place: String,
    /// Phone.
    pub phone: String,
    /// How far it has come.
    pub state: JobState,
    /// When it was last touched.
    pub touched_at: i64,
    /// When it was put into the bin.
    pub binned_at: Option<i64>,
}

/// Which jobs the book shows.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Filter {
    /// Letters of name, place or phone.
    pub search: String,
    /// Only jobs of this state.
    pub state: Option<JobState>,
    /// The bin instead of the book.
    pub binned: bool,
}
