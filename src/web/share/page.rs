//! What the customer's pages show: the frozen sheet, its words and what has come of it.

use std::fmt::Write;

use askama::Template;
use axum::response::Html;
use jiff::tz::TimeZone;
use jiff::{Timestamp, ZonedDateTime};

use super::picture::picture;
use crate::money::Money;
use crate::offer::Voice;
use crate::offer::what_if::{WhatIf, about, what_if};
use crate::qr::Qr;
use crate::quotes::sheet::{FirmShown, LoadHours, QuoteSheet};
use crate::quotes::{Answer, FrozenVersion, Said};
use crate::translations::Words;
use crate::wording::Numbers;

/// The offer sheet, for the customer and for the installer who looks at it as the customer does.
#[derive(Template)]
#[template(path = "quotes/offer.html")]
pub struct OfferPage<'a> {
    /// Its words.
    pub words: &'static Words,
    /// What it shows.
    pub sheet: &'a QuoteSheet,
    /// Number of the sheet and version of the job's offer, in words.
    pub number: String,
    /// Day on which the version was made.
    pub made_on: String,
    /// Last day of the price.
    pub ends_on: String,
    /// Address of the stylesheet.
    pub stylesheet: String,
    /// Address of this page, for its form.
    pub here: String,
    /// Address of the record of the answer.
    pub kept: String,
    /// The link as it is printed; empty where none is known.
    pub address: String,
    /// The link as a square.
    pub qr: Option<Qr>,
    /// The picture of the cut, as SVG.
    pub picture: String,
    /// What may be ticked off, and what that says.
    pub what_if: Option<WhatIf>,
    /// The installer looks, not the customer.
    pub preview: bool,
    /// The answer that was given, in one sentence.
    pub answered: Option<String>,
    /// The answer as typed.
    pub form: AnswerForm,
    /// Fields that are not as they must be, in the order of the form.
    pub complaints: Vec<(&'static str, String)>,
}

/// The answer as it arrives.
#[derive(Clone, Debug, Default, serde::Deserialize)]
#[serde(default)]
pub struct AnswerForm {
    /// One-time key.
    pub key: String,
    /// `yes` or `no`.
    pub said: String,
    /// Full name.
    pub name: String,
    /// Anything else.
    pub words: String,
}

/// One row of the table under the picture.
pub struct CutRow {
    after: String,
    drawn: String,
    left: String,
}

impl<'a> OfferPage<'a> {
    /// A frozen version as it is shown, without a link of its own; `off` are the rows ticked off.
    pub fn new(
        version: &FrozenVersion,
        sheet: &'a QuoteSheet,
        stylesheet: String,
        off: impl Fn(usize) -> bool,
    ) -> Self {
        let words = Words::of(&sheet.language);
        let ends_on = sheet.ends_on.parse().map_or_else(|_| sheet.ends_on.clone(), |day| words.date(day));
        Self {
            words,
            sheet,
            number: number(version, words),
            made_on: day(&sheet.firm, version.made_at, words),
            ends_on,
            stylesheet,
            here: String::new(),
            kept: String::new(),
            address: String::new(),
            qr: None,
            picture: picture(&sheet.cut, words).unwrap_or_default(),
            what_if: what_if(&version.survey, &version.design, off, voice(words)),
            preview: false,
            answered: version.answer.as_ref().map(|answer| told(answer, sheet, words)),
            form: AnswerForm::default(),
            complaints: Vec::new(),
        }
    }

    fn title(&self) -> String {
        let title = self.words.fill("offer-title", &[("firm", self.sheet.firm.name.as_str().into())]);
        if self.complaints.is_empty() {
            return title;
        }
        self.words.fill("problem-title", &[("title", title.into())])
    }

    fn phone(&self) -> Phone {
        Phone::of(&self.sheet.firm)
    }

    fn complaint(&self, field: &str) -> Option<&str> {
        self.complaints.iter().find(|(of, _)| *of == field).map(|(_, told)| told.as_str())
    }

    fn money(&self, amount: &Money) -> String {
        amount.shown(self.sheet.firm.decimal_mark)
    }

    fn tax_percent(&self) -> String {
        percent(self.sheet.tax_basis_points, self.sheet.firm.decimal_mark)
    }

    fn gain(&self, load: &LoadHours) -> String {
        let duration = about(load.gains_h, self.words);
        self.words.fill("cost-without", &[("name", load.name.as_str().into()), ("duration", duration.into())])
    }

    fn cut_rows(&self) -> Vec<CutRow> {
        let row = |stretch: &crate::quotes::sheet::CutStretch| CutRow {
            after: self.words.duration(stretch.to_h),
            drawn: format!("{}\u{a0}W", stretch.average_w.round()),
            left: self.words.fill("cut-percent", &[("percent", (stretch.left_share * 100.0).round().into())]),
        };
        self.sheet.cut.iter().map(row).collect()
    }
}

fn voice(words: &'static Words) -> Voice {
    Voice { words, numbers: Numbers::default() }
}

/// A day as the firm's calendar has it.
pub fn day(firm: &FirmShown, at: i64, words: &Words) -> String {
    words.date(zoned(at, &firm.time_zone).date())
}

/// A moment as the firm's clock shows it.
pub fn moment(firm: &FirmShown, at: i64, words: &Words) -> String {
    words.moment(&zoned(at, &firm.time_zone))
}

/// A time of the store in a time zone; in world time where the zone is not known any more.
pub fn zoned(at: i64, time_zone: &str) -> ZonedDateTime {
    let moment = Timestamp::from_second(at).unwrap_or_default();
    moment.in_tz(time_zone).unwrap_or_else(|_| moment.to_zoned_datetime(TimeZone::UTC))
}

/// Hundredths of a percent as a percentage without needless zeros.
pub fn percent(basis_points: u32, mark: char) -> String {
    let percent = format!("{}{mark}{:02}", basis_points / 100, basis_points % 100);
    percent.trim_end_matches('0').trim_end_matches(mark).to_owned()
}

fn number(version: &FrozenVersion, words: &Words) -> String {
    words.fill(
        "offer-sheet",
        &[("number", version.number.to_string().into()), ("version", version.version.to_string().into())],
    )
}

fn told(answer: &Answer, sheet: &QuoteSheet, words: &Words) -> String {
    let name = match answer.said {
        Said::Yes => "answer-given-yes",
        Said::No => "answer-given-no",
    };
    words.fill(name, &[("name", answer.name.as_str().into()), ("time", moment(&sheet.firm, answer.at, words).into())])
}

/// The record of an answer.
#[derive(Template)]
#[template(path = "quotes/kept.html")]
pub struct KeptPage<'a> {
    words: &'static Words,
    sheet: &'a QuoteSheet,
    answer: &'a Answer,
    number: String,
    made_on: String,
    at: String,
    at_utc: String,
    total: String,
    mark: String,
    stylesheet: String,
    offer: String,
}

impl<'a> KeptPage<'a> {
    /// The record of the answer to a version.
    pub fn new(
        version: &FrozenVersion,
        sheet: &'a QuoteSheet,
        answer: &'a Answer,
        stylesheet: String,
        offer: String,
    ) -> Self {
        let words = Words::of(&sheet.language);
        let utc = Timestamp::from_second(answer.at).unwrap_or_default();
        Self {
            words,
            sheet,
            answer,
            number: number(version, words),
            made_on: day(&sheet.firm, version.made_at, words),
            at: moment(&sheet.firm, answer.at, words),
            at_utc: utc.to_string(),
            total: sheet.total.shown(sheet.firm.decimal_mark),
            mark: check_mark(&version.sheet_sha256),
            stylesheet,
            offer,
        }
    }

    fn yes(&self) -> bool {
        self.answer.said == Said::Yes
    }

    fn phone(&self) -> Phone {
        Phone::of(&self.sheet.firm)
    }
}

/// The first 16 hexadecimal digits of the sheet's SHA-256, in fours: enough to compare by eye.
fn check_mark(hash: &[u8]) -> String {
    let mut mark = String::new();
    for (at, byte) in hash.iter().take(8).enumerate() {
        let gap = if at > 0 && at % 2 == 0 { " " } else { "" };
        let _ = write!(mark, "{gap}{byte:02x}");
    }
    mark
}

/// A sheet that cannot be opened, and whom to call.
#[derive(Template)]
#[template(path = "quotes/gone.html")]
pub struct GonePage {
    /// Its words.
    pub words: &'static Words,
    /// Address of the stylesheet.
    pub stylesheet: String,
    /// What has become of the sheet.
    pub title: String,
    /// What to do.
    pub told: Vec<String>,
    /// Whom to call; `None` where no sheet is known.
    pub firm: Option<Phone>,
}

/// A phone number as it is shown and as it is dialled.
pub struct Phone {
    /// As the firm writes it.
    pub shown: String,
    /// Digits, with a leading plus kept.
    pub digits: String,
}

impl Phone {
    /// The firm's.
    pub fn of(firm: &FirmShown) -> Self {
        let plus = if firm.phone.trim_start().starts_with('+') { "+" } else { "" };
        let digits: String = firm.phone.chars().filter(char::is_ascii_digit).collect();
        Self { shown: firm.phone.clone(), digits: format!("{plus}{digits}") }
    }
}

/// Renders a customer's page; these templates write into a string and cannot fail.
macro_rules! html {
    ($page:ty) => {
        impl $page {
            /// The page as HTML.
            pub fn into_html(self) -> Html<String> {
                Html(self.render().unwrap_or_default())
            }
        }
    };
}

html!(OfferPage<'_>);
html!(KeptPage<'_>);
html!(GonePage);

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_percentage_has_no_needless_zeros() {
        for (points, shown) in [(2000, "20"), (1750, "17,5"), (825, "8,25"), (0, "0"), (5, "0,05")] {
            assert_eq!(percent(points, ','), shown);
        }
    }

    #[test]
    fn the_check_mark_is_read_in_fours() {
        assert_eq!(check_mark(&[0xab, 0xcd, 0x01, 0x23, 0x45, 0x67, 0x89, 0xef, 0xff]), "abcd 0123 4567 89ef");
    }
}
