//! The offer: a design and its prices turned into what the customer reads.
//!
//! Pure: the same job, design and words always make the same sheet.

mod care;
mod compose;
mod cut;
mod kit;
mod lists;
mod promise;
pub mod refill;
pub mod since;
pub mod what_if;

use crate::translations::Words;
use crate::wording::Numbers;

pub use compose::{Customer, sheet};
pub use kit::{KitLine, kit};
/// In which words and with which numbers the customer is spoken to.
#[derive(Clone, Copy)]
pub struct Voice {
    /// The words.
    pub words: &'static Words,
    /// The numbers.
    pub numbers: Numbers,
}

#[cfg(test)]
mod tests;
