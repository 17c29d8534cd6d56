//! Money: whole numbers of the smallest coin with their currency, rounded in one place.

use std::fmt;
use std::ops::Add;

use serde::{Deserialize, Serialize};

/// A currency by its three letters.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Serialize, Deserialize)]
#[serde(try_from = "String", into = "String")]
pub struct Currency([u8; 3]);

/// Currencies whose smallest coin is no hundredth, with the decimals of an amount.
///
/// Source (from memory): ISO 4217.
const DECIMALS: [(&[u8; 3], u32); 16] = [
    (b"BHD", 3),
    (b"BIF", 0),
    (b"CLP", 0),
    (b"DJF", 0),
    (b"GNF", 0),
    (b"IQD", 3),
    (b"JOD", 3),
    (b"JPY", 0),
    (b"KRW", 0),
    (b"KWD", 3),
    (b"OMR", 3),
    (b"RWF", 0),
    (b"UGX", 0),
    (b"VND", 0),
    (b"XAF", 0),
    (b"XOF", 0),
];

impl Currency {
    /// The euro.
    pub const EUR: Self = Self(*b"EUR");

    /// From three capital letters.
    pub fn new(letters: &str) -> Option<Self> {
        let letters: [u8; 3] = letters.as_bytes().try_into().ok()?;
        letters.iter().all(u8::is_ascii_uppercase).then_some(Self(letters))
    }

    /// Decimals of an amount.
    pub fn decimals(self) -> u32 {
        DECIMALS.iter().find(|(letters, _)| **letters == self.0).map_or(2, |&(_, decimals)| decimals)
    }
}

impl fmt::Display for Currency {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        self.0.iter().try_for_each(|letter| fmt::Write::write_char(f, char::from(*letter)))
    }
}

impl fmt::Debug for Currency {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        fmt::Display::fmt(self, f)
    }
}

impl From<Currency> for String {
    fn from(currency: Currency) -> Self {
        currency.to_string()
    }
}

impl TryFrom<String> for Currency {
    type Error = &'static str;

    fn try_from(letters: String) -> Result<Self, Self::Error> {
        Self::new(&letters).ok_or("a currency has three capital letters")
    }
}

/// An amount of money.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Money {
    /// Smallest coins.
    pub minor: i64,
    /// Their currency.
    pub currency: Currency,
}

impl Money {
    /// The most that one price may be, in smallest coins: so that no sum of a sheet can overflow.
    pub const MOST: i64 = 1_000_000_000_000;

    /// Nothing.
    pub const fn nothing(currency: Currency) -> Self {
        Self { minor: 0, currency }
    }

    /// The only place where money is rounded: to the nearest coin, halves away from nothing.
    pub fn scaled(self, by: u32, of: u32) -> Self {
        let product = i128::from(self.minor) * i128::from(by);
        let half = i128::from(of / 2) * product.signum();
        let rounded = (product + half) / i128::from(of.max(1));
        let minor = i64::try_from(rounded).unwrap_or(if rounded < 0 { i64::MIN } else { i64::MAX });
        Self { minor, currency: self.currency }
    }

    /// The bare number as it is typed: `1200.50`.
    pub fn typed(self, mark: char) -> String {
        self.written(mark, "")
    }

    /// As it is printed, with the currency's letters: `EUR 1,200.50`; thousands set apart by a thin space.
    pub fn shown(self, mark: char) -> String {
        format!("{}\u{a0}{}", self.currency, self.written(mark, "\u{202f}"))
    }

    fn written(self, mark: char, group: &str) -> String {
        let decimals = self.currency.decimals() as usize;
        let digits = format!("{:0>width$}", self.minor.unsigned_abs(), width = decimals + 1);
        let (whole, part) = digits.split_at(digits.len() - decimals);
        let mut text = String::from(if self.minor < 0 { "−" } else { "" });
        for (place, digit) in whole.chars().enumerate() {
            if place > 0 && (whole.len() - place) % 3 == 0 {
                text.push_str(group);
            }
            text.push(digit);
        }
        if decimals > 0 {
            text.push(mark);
            text.push_str(part);
        }
        text
    }
}

impl Add for Money {
    type Output = Self;

    fn add(self, other: Self) -> Self {
        debug_assert_eq!(self.currency, other.currency);
        Self { minor: self.minor.saturating_add(other.minor), currency: self.currency }
    }
}

impl fmt::Display for Money {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.shown('.'))
    }
}
