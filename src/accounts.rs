//! Firms and the people who sign in for them.

use serde::{Deserialize, Serialize};

use crate::documents::Draft;
use crate::keys::{Revision, id};
use crate::money::Currency;
use crate::wording::DecimalMark;

id!(
    /// A firm.
    FirmId
);
id!(
    /// A person.
    PersonId
);

/// A firm, with what it has set.
#[derive(Clone, Debug, PartialEq)]
pub struct Firm {
    /// Its id.
    pub id: FirmId,
    /// What it has set.
    pub profile: Profile,
    /// Whether it is invented, to look at.
    pub made_up: bool,
    /// How often the profile was saved.
    pub revision: Revision,
}

/// What a firm has set.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
#[serde(default)]
pub struct Profile {
    /// Name.
    pub name: String,
    /// Phone.
    pub phone: String,
    /// E-mail that customers see; empty if none.
    pub email: String,
    /// Address that customers see; empty if none.
    pub address: String,
    /// Licence number; empty if none.
    pub licence: String,
    /// Currency of all prices.
    pub currency: Currency,
    /// Decimal mark of numbers, typed and shown.
    pub decimal_mark: DecimalMark,
    /// Tax in hundredths of a percent.
    pub tax_basis_points: u32,
    /// Days for which a price holds.
    pub price_holds_days: u32,
    /// Time zone, by its name in the time-zone database.
    pub time_zone: String,
    /// What a new job begins with, in the form of a survey; empty for the program's own defaults.
    pub new_job: String,
    /// Assumptions that the firm sets, by name.
    pub assumptions: Vec<(String, f64)>,
}

impl Default for Profile {
    fn default() -> Self {
        Self {
            name: String::new(),
            phone: String::new(),
            email: String::new(),
            address: String::new(),
            licence: String::new(),
            currency: Currency::EUR,
            decimal_mark: DecimalMark::Point,
            tax_basis_points: 0,
            price_holds_days: 30,
            time_zone: "UTC".to_owned(),
            new_job: String::new(),
            assumptions: Vec::new(),
        }
    }
}

impl Profile {
    /// What a new job begins with.
    pub fn first_draft(&self) -> Draft {
        Draft::read(&self.new_job).unwrap_or_default()
    }
}

/// A person who signs in.
#[derive(Clone, Debug, PartialEq)]
pub struct Person {
    /// Their id.
    pub id: PersonId,
    /// The firm they belong to.
    pub firm: FirmId,
    /// Name.
    pub name: String,
    /// E-mail, as they wrote it.
    pub email: String,
    /// Hash of the password, in the PHC form.
    pub password_hash: String,
}

/// A person to be added.
#[derive(Clone, Debug, PartialEq)]
pub struct NewPerson {
    /// Name.
    pub name: String,
    /// E-mail.
    pub email: String,
    /// Hash of the password, in the PHC form.
    pub password_hash: String,
}

/// What two spellings of one e-mail address have in common.
pub fn folded(text: &str) -> String {
    use unicode_normalization::UnicodeNormalization;
    text.trim().nfkc().flat_map(char::to_lowercase).collect()
}

/// Something before and behind one @, without spaces; the rest only a letter can tell.
pub fn is_email(typed: &str) -> bool {
    let typed = typed.trim();
    let parts: Vec<_> = typed.split('@').collect();
    parts.len() == 2
        && parts.iter().all(|part| !part.is_empty())
        && !typed.contains(char::is_whitespace)
        && typed.len() <= 254
}
