//! How many, or how many metres: thousandths, so that a sum of money stays exact.

use crate::money::Money;
use serde::{Deserialize, Serialize};

/// A quantity in whole thousandths, never negative.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord, Serialize, Deserialize)]
#[serde(transparent)]
pub struct Quantity(u32);

impl Quantity {
    /// The most that a line may hold.
    pub const MOST: f64 = 100_000.0;

    /// From a number; `None` if it is no number, negative or above [`Quantity::MOST`].
    pub fn new(number: f64) -> Option<Self> {
        (0.0..=Self::MOST).contains(&number).then(|| Self((number * 1000.0).round() as u32))
    }

    /// Nearest quantity to a number that the engine computed.
    pub fn nearest(number: f64) -> Self {
        Self::new(number.clamp(0.0, Self::MOST)).unwrap_or_default()
    }

    /// So many of what costs this much each.
    pub fn times(self, each: Money) -> Money {
        each.scaled(self.0, 1000)
    }

    /// As it is typed and printed, with the firm's decimal mark.
    pub fn shown(self, mark: char) -> String {
        let (whole, part) = (self.0 / 1000, self.0 % 1000);
        if part == 0 {
            return whole.to_string();
        }
        format!("{whole}{mark}{}", format!("{part:03}").trim_end_matches('0'))
    }
}
