//! Pricing a job: lines that start from the design's kit and are then edited by hand.

use serde::{Deserialize, Serialize};

use super::Quantity;
use super::sheet::SheetLine;
use crate::money::{Currency, Money};

/// The prices of a job as they stand, before a sheet is made of them.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct PriceDraft {
    /// Currency of all prices.
    pub currency: Currency,
    /// Parts, in the order of the sheet; none before the job was first priced.
    pub lines: Vec<PricedLine>,
    /// Work, if it is priced apart.
    pub labour: Option<Money>,
    /// Tax in hundredths of a percent.
    pub tax_basis_points: u32,
    /// Last day of the price, as `YYYY-MM-DD`; empty until it is set.
    pub ends_on: String,
    /// A word to the customer.
    pub note: String,
    /// What is left off, a line each, in the installer's words.
    pub left_off: String,
}

/// One part with its price.
#[derive(Clone, Debug, PartialEq, Serialize, Deserialize)]
pub struct PricedLine {
    /// What the customer reads.
    pub text: String,
    /// How many, or how many metres.
    pub quantity: Quantity,
    /// Price of one to the customer; none yet.
    pub unit_price: Option<Money>,
    /// What one costs the firm; the customer never sees it.
    pub cost: Option<Money>,
    /// Key of the part of the design that the line came from.
    pub from_design: Option<String>,
}

impl PricedLine {
    /// Price of all of the line.
    pub fn sum(&self) -> Option<Money> {
        self.unit_price.map(|price| self.quantity.times(price))
    }
}

/// What the customer pays, line by line and in all.
#[derive(Clone, Debug, PartialEq)]
pub struct Totals {
    /// Lines and work together.
    pub subtotal: Money,
    /// Tax on it.
    pub tax: Money,
    /// What the customer pays.
    pub total: Money,
    /// What the parts cost the firm, as far as it is known.
    pub cost: Money,
    /// How many lines have no price yet.
    pub unpriced: usize,
}

impl PriceDraft {
    /// Sums over the lines that have a price; each line is rounded by itself, then the tax.
    pub fn totals(&self) -> Totals {
        let nothing = Money::nothing(self.currency);
        let lines = self.lines.iter().filter_map(PricedLine::sum).fold(nothing, |sum, line| sum + line);
        let subtotal = lines + self.labour.unwrap_or(nothing);
        let tax = subtotal.scaled(self.tax_basis_points, 10_000);
        let cost = self.lines.iter().filter_map(|line| line.cost.map(|cost| line.quantity.times(cost)));
        Totals {
            subtotal,
            tax,
            total: subtotal + tax,
            cost: cost.fold(nothing, |sum, line| sum + line),
            unpriced: self.lines.iter().filter(|line| line.unit_price.is_none()).count(),
        }
    }

    /// The lines as the customer sees them; `None` while one has no price yet.
    pub fn sheet_lines(&self, mark: char) -> Option<Vec<SheetLine>> {
        let line = |line: &PricedLine| {
            Some(SheetLine {
                text: line.text.clone(),
                quantity: line.quantity.shown(mark),
                each: line.unit_price?,
                sum: line.sum()?,
            })
        };
        self.lines.iter().map(line).collect()
    }
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;

    fn draft(lines: &[(u32, i64)], labour: i64, tax_basis_points: u32) -> PriceDraft {
        let currency = Currency::new("EUR").unwrap();
        let line = |&(thousandths, minor): &(u32, i64)| PricedLine {
            text: "Part".into(),
            quantity: Quantity::new(f64::from(thousandths) / 1000.0).unwrap(),
            unit_price: Some(Money { minor, currency }),
            cost: Some(Money { minor: minor / 2, currency }),
            from_design: None,
        };
        PriceDraft {
            currency,
            lines: lines.iter().map(line).collect(),
            labour: Some(Money { minor: labour, currency }),
            tax_basis_points,
            ends_on: String::new(),
            note: String::new(),
            left_off: String::new(),
        }
    }

    proptest! {
        #[test]
        fn a_total_is_the_sum_of_what_the_customer_sees(
            lines in prop::collection::vec((0u32..=100_000_000, 0i64..=1_000_000_000_000), 0..40),
            labour in 0i64..=1_000_000_000_000,
            tax in 0u32..=5_000,
        ) {
            let draft = draft(&lines, labour, tax);
            let totals = draft.totals();
            let shown: i64 = draft.sheet_lines('.').unwrap().iter().map(|line| line.sum.minor).sum();
            prop_assert_eq!(totals.subtotal.minor, shown + labour);
            prop_assert_eq!(totals.total.minor, totals.subtotal.minor + totals.tax.minor);
            let exact = totals.subtotal.minor as f64 * f64::from(tax) / 10_000.0;
            prop_assert!((totals.tax.minor as f64 - exact).abs() <= 0.5 + exact * 1e-12);
        }
    }

    #[test]
    fn a_line_without_a_price_keeps_the_sheet_back() {
        let mut draft = draft(&[(1000, 500), (2000, 100)], 0, 0);
        draft.lines[1].unit_price = None;
        assert_eq!(draft.totals().unpriced, 1);
        assert_eq!(draft.totals().subtotal.minor, 500);
        assert_eq!(draft.sheet_lines('.'), None);
    }

    #[test]
    fn what_the_firm_pays_is_nowhere_on_the_customers_lines() {
        let mut draft = draft(&[(1000, 500)], 0, 0);
        draft.lines[0].cost = Some(Money { minor: 77_777, currency: draft.currency });
        let shown = serde_json::to_string(&draft.sheet_lines('.').unwrap()).unwrap();
        assert!(!shown.contains("77777"), "{shown}");
    }
}
