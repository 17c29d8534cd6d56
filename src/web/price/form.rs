//! The price form: as typed, and read into prices.

use std::collections::BTreeMap;

use jiff::civil::Date;
use serde::Deserialize;

use crate::money::{Currency, Money};
use crate::quotes::Quantity;
use crate::quotes::price::{PriceDraft, PricedLine};
use crate::quotes::typed::percentage;
use crate::web::forms::{Complaints, text};

/// Most lines of a sheet.
const MOST_LINES: usize = 200;
/// Empty lines below the filled ones.
pub const SPARE: u32 = 3;

/// The form as it arrives.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct PriceForm {
    /// One-time key.
    pub key: String,
    /// What it is based on.
    pub revision: String,
    /// Which button was pressed: `save`, `refill` or `make`.
    pub act: String,
    /// Parts.
    pub lines: BTreeMap<u32, Row>,
    /// Work.
    pub labour: String,
    /// Tax in percent.
    pub tax: String,
    /// Last day of the price.
    pub ends_on: String,
    /// Note to the customer.
    pub note: String,
    /// What is left off, a line each.
    pub left_off: String,
}

/// One part as typed.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct Row {
    /// Part of the design that it came from; empty for a line of the installer's own.
    pub from: String,
    /// What the customer reads.
    pub text: String,
    /// How many.
    pub quantity: String,
    /// Price of one.
    pub price: String,
    /// What one costs the firm.
    pub cost: String,
}

impl Row {
    /// Whether nothing is typed that is worth a line.
    pub fn is_empty(&self) -> bool {
        [&self.text, &self.price, &self.cost].iter().all(|field| field.trim().is_empty())
    }

    /// The line by itself; `None` if it cannot be read.
    pub fn read(&self, currency: Currency, mark: char) -> Option<PricedLine> {
        let mut reader = Reader { currency, mark, complaints: Complaints::default() };
        reader.line(0, self).filter(|_| reader.complaints.is_empty())
    }
}

impl PriceForm {
    /// Every field with its label, to be held against what someone else stored.
    pub fn fields(&self) -> Vec<(&'static str, String)> {
        let rows = self.lines.values().filter(|row| !row.is_empty());
        let lines = rows.map(|row| format!("{} × {} at {} ({})", row.quantity, row.text, row.price, row.cost));
        vec![
            ("Parts", lines.collect::<Vec<_>>().join("; ")),
            ("Work", self.labour.clone()),
            ("Tax", self.tax.clone()),
            ("Last day of this price", self.ends_on.clone()),
            ("Note to the customer", self.note.clone()),
            ("What is left off", self.left_off.clone()),
        ]
    }

    /// A stored draft as it is typed.
    pub fn of(draft: &PriceDraft, mark: char) -> Self {
        let money = |amount: Option<Money>| amount.map_or_else(String::new, |amount| amount.typed(mark));
        let row = |line: &PricedLine| Row {
            from: line.from_design.clone().unwrap_or_default(),
            text: line.text.clone(),
            quantity: line.quantity.shown(mark),
            price: money(line.unit_price),
            cost: money(line.cost),
        };
        Self {
            lines: (0..).zip(draft.lines.iter().map(row)).collect(),
            labour: money(draft.labour),
            tax: crate::web::share::page::percent(draft.tax_basis_points, mark),
            ends_on: draft.ends_on.clone(),
            note: draft.note.clone(),
            left_off: draft.left_off.clone(),
            ..Self::default()
        }
    }

    /// The prices, or every complaint in the order of the form.
    pub fn read(&self, currency: Currency, mark: char) -> Result<PriceDraft, Complaints> {
        let mut reader = Reader { currency, mark, complaints: Complaints::default() };
        if self.lines.len() > MOST_LINES {
            reader.complaints.add("lines", "Parts", format!("give at most {MOST_LINES} lines"));
        }
        let lines = self.lines.iter().filter_map(|(at, row)| reader.line(*at, row)).collect();
        let draft = PriceDraft {
            currency,
            lines,
            labour: reader.money("labour", "Work", &self.labour),
            tax_basis_points: reader.take("tax", "Tax", percentage(&self.tax, mark)),
            ends_on: reader.take("ends_on", "Last day of this price", day(&self.ends_on)),
            note: reader.take("note", "Note to the customer", lines_of(&self.note)),
            left_off: reader.take("left_off", "What is left off", lines_of(&self.left_off)),
        };
        if reader.complaints.is_empty() { Ok(draft) } else { Err(reader.complaints) }
    }
}

struct Reader {
    currency: Currency,
    mark: char,
    complaints: Complaints,
}

impl Reader {
    /// The value, or nothing of it and a complaint.
    fn take<T: Default>(&mut self, field: &str, label: &str, read: Result<T, String>) -> T {
        self.complaints.take(field, label, read).unwrap_or_default()
    }

    /// A line without words and prices is left out.
    fn line(&mut self, at: u32, row: &Row) -> Option<PricedLine> {
        if row.is_empty() {
            return None;
        }
        let field = |part: &str| format!("lines[{at}][{part}]");
        let typed = row.text.trim();
        let name = if typed.is_empty() { format!("Line {}", at + 1) } else { typed.chars().take(40).collect() };
        if typed.is_empty() {
            self.complaints.add(field("text"), &name, "say what it is, or empty the whole line");
        }
        let quantity = if row.quantity.trim().is_empty() { "1" } else { &row.quantity };
        Some(PricedLine {
            text: self.take(&field("text"), &name, text(typed, 200)),
            quantity: self.take(&field("quantity"), &format!("{name}: quantity"), Quantity::read(quantity, self.mark)),
            unit_price: self.money(&field("price"), &format!("{name}: price"), &row.price),
            cost: self.money(&field("cost"), &format!("{name}: what you pay"), &row.cost),
            from_design: Some(row.from.trim()).filter(|key| !key.is_empty() && key.len() <= 60).map(str::to_owned),
        })
    }

    /// Nothing typed is no amount yet.
    fn money(&mut self, field: &str, label: &str, typed: &str) -> Option<Money> {
        if typed.trim().is_empty() {
            return None;
        }
        self.complaints.take(field, label, self.currency.read(typed, self.mark))
    }
}

fn day(typed: &str) -> Result<String, String> {
    let typed = typed.trim();
    if !typed.is_empty() && typed.parse::<Date>().is_err() {
        return Err("give a day as year-month-day, such as 2027-01-31".to_owned());
    }
    Ok(typed.to_owned())
}

fn lines_of(typed: &str) -> Result<String, String> {
    text(&typed.replace("\r\n", "\n"), 2_000)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn form(rows: &[(&str, &str, &str)]) -> PriceForm {
        let row = |&(text, quantity, price): &(&str, &str, &str)| Row {
            text: text.into(),
            quantity: quantity.into(),
            price: price.into(),
            ..Row::default()
        };
        PriceForm { lines: (0..).zip(rows.iter().map(row)).collect(), tax: "20".into(), ..PriceForm::default() }
    }

    #[test]
    fn a_form_of_a_draft_reads_back_as_the_draft() {
        let draft = form(&[("Battery", "2", "199.90"), ("Cable", "4.5", "")]).read(Currency::EUR, '.').unwrap();
        assert_eq!(draft.lines.len(), 2);
        assert_eq!(draft.lines[1].unit_price, None);
        for mark in ['.', ','] {
            assert_eq!(PriceForm::of(&draft, mark).read(Currency::EUR, mark), Ok(draft.clone()));
        }
    }

    #[test]
    fn an_empty_line_is_left_out_and_a_price_without_words_is_not() {
        let draft = form(&[("", "", ""), ("Rod", "", "5")]).read(Currency::EUR, '.').unwrap();
        assert_eq!(draft.lines.len(), 1);
        assert_eq!(draft.lines[0].quantity, Quantity::nearest(1.0));
        let complaints = form(&[("", "1", "5")]).read(Currency::EUR, '.').unwrap_err();
        assert_eq!(complaints.all()[0].id(), "lines-0-text");
    }

    #[test]
    fn every_complaint_is_told_at_once_and_names_its_line() {
        let mut form = form(&[("Battery", "two", "1.500"), ("Fuse", "1", "free")]);
        (form.tax, form.ends_on) = ("lots".into(), "soon".into());
        let complaints = form.read(Currency::EUR, '.').unwrap_err();
        let fields: Vec<String> = complaints.all().iter().map(|complaint| complaint.id()).collect();
        assert_eq!(fields, ["lines-0-quantity", "lines-0-price", "lines-1-price", "tax", "ends_on"]);
        assert_eq!(complaints.all()[1].label, "Battery: price");
        assert!(complaints.of("lines[0][price]").contains("two ways"), "{complaints:?}");
    }
}
