//! The offer sheet: everything the customer is shown, frozen when it is made.
//!
//! It holds text and figures, not what they were computed from; so it reads the same after the
//! program, the prices or the job have changed. Nothing in it is for the firm's eyes alone: no cost,
//! no margin, no note of the installer.

use serde::{Deserialize, Serialize};

use crate::money::Money;

/// The name of this form of the sheet.
pub const FORMAT: &str = "keeplit-quote-1";

/// One version of an offer, as the customer sees it.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct QuoteSheet {
    /// Always [`FORMAT`].
    pub format: String,
    /// Language of all its text.
    pub language: String,
    /// Who offers.
    pub firm: FirmShown,
    /// To whom.
    pub customer: String,
    /// Where.
    pub place: String,
    /// What is promised.
    pub promise: Promise,
    /// What stays on, in the order of the survey.
    pub stays_on: Vec<StaysOn>,
    /// Loads that a life, a treatment or a product hangs on: no hours are promised for them.
    pub not_promised: Vec<String>,
    /// What does not stay on.
    pub left_off: Vec<String>,
    /// Groups of which only one may run at a time.
    pub one_at_a_time: Vec<Vec<String>>,
    /// Motors that must not all start together.
    pub start_in_turn: Vec<String>,
    /// The sized cut, from its start to its end.
    pub cut: Vec<CutStretch>,
    /// Hours that switching a load off gains, the most first; absent in sheets made before it was told.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub loads_hours: Vec<LoadHours>,
    /// What is fitted and what it costs.
    pub lines: Vec<SheetLine>,
    /// Work, if it is priced apart.
    pub labour: Option<Money>,
    /// Lines and work together.
    pub subtotal: Money,
    /// Tax as a share of the subtotal, in hundredths of a percent.
    pub tax_basis_points: u32,
    /// Tax.
    pub tax: Money,
    /// What the customer pays.
    pub total: Money,
    /// Last day on which the price holds, as `YYYY-MM-DD`.
    pub ends_on: String,
    /// A word of the installer to the customer.
    pub note: String,
    /// What the customer ought to know, a sentence or two each.
    pub good_to_know: Vec<String>,
    /// Words of caution.
    pub cautions: Vec<String>,
}

/// The firm as its customers know it.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct FirmShown {
    /// Name.
    pub name: String,
    /// Phone.
    pub phone: String,
    /// E-mail; empty if none is shown.
    pub email: String,
    /// Address; empty if none is shown.
    pub address: String,
    /// Licence number; empty if none is shown.
    pub licence: String,
    /// Time zone in which its days and hours are told.
    pub time_zone: String,
    /// Decimal mark of its numbers: `.` or `,`.
    pub decimal_mark: char,
    /// Whether it is invented.
    pub made_up: bool,
}

/// What is promised.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Promise {
    /// The length of the cut that is bridged.
    pub hours: f64,
    /// The promise in a few words: "About 6 hours".
    pub short: String,
    /// The promise in a sentence; empty if there is none.
    pub told: String,
    /// What it rests on, a sentence each.
    pub holds_on: Vec<String>,
}

/// One thing that stays on.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct StaysOn {
    /// What it is.
    pub name: String,
    /// How many.
    pub quantity: u32,
    /// When it may run, and how much of that time.
    pub when: String,
}

/// A stretch of the cut in which nothing changes.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct CutStretch {
    /// Hours since the mains went off.
    pub from_h: f64,
    /// End of the stretch.
    pub to_h: f64,
    /// Average power in use.
    pub average_w: f64,
    /// Share of the battery left at the end of the stretch.
    pub left_share: f64,
}

/// What switching one load off gains.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct LoadHours {
    /// The load.
    pub name: String,
    /// Hours more without it.
    pub gains_h: f64,
}

/// One line of what is fitted.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct SheetLine {
    /// What it is.
    pub text: String,
    /// How many or how much, as it is printed.
    pub quantity: String,
    /// Price of one.
    pub each: Money,
    /// Price of all.
    pub sum: Money,
}
