//! The sheet as a whole, from a survey, its design and its prices.

use super::{Voice, care, cut, lists, promise, what_if};
use crate::quotes::price::PriceDraft;
use crate::quotes::sheet::{FORMAT, FirmShown, QuoteSheet};
use crate::sizing::{Design, Survey};

/// To whom the sheet is addressed.
#[derive(Clone, Copy, Debug)]
pub struct Customer<'a> {
    /// Name.
    pub name: &'a str,
    /// Place of the job.
    pub place: &'a str,
}

/// Everything the customer is shown; `None` while a line has no price yet.
pub fn sheet(
    firm: FirmShown,
    customer: Customer,
    survey: &Survey,
    design: &Design,
    price: &PriceDraft,
    voice: Voice,
) -> Option<QuoteSheet> {
    let lines = price.sheet_lines(firm.decimal_mark)?;
    let totals = price.totals();
    Some(QuoteSheet {
        format: FORMAT.to_owned(),
        language: voice.words.language().to_owned(),
        customer: customer.name.to_owned(),
        place: customer.place.to_owned(),
        promise: promise::promise(survey, design, voice),
        stays_on: lists::stays_on(survey, voice),
        not_promised: lists::not_promised(survey),
        left_off: lists::left_off(&price.left_off, voice),
        one_at_a_time: lists::one_at_a_time(survey),
        start_in_turn: lists::start_in_turn(survey, design),
        cut: cut::cut(survey, design),
        loads_hours: what_if::loads_hours(survey, design),
        lines,
        labour: price.labour,
        subtotal: totals.subtotal,
        tax_basis_points: price.tax_basis_points,
        tax: totals.tax,
        total: totals.total,
        ends_on: price.ends_on.clone(),
        note: price.note.clone(),
        good_to_know: care::good_to_know(survey, design, voice),
        cautions: care::cautions(survey, voice),
        firm,
    })
}
