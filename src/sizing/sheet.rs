//! The calculation sheet: each figure is written down where it is computed.
//!
//! A stage computes a figure, hands it to the sheet together with its formula, the values put in
//! and the source, and gets the same figure back. So the sheet cannot drift from the answer.

use std::borrow::Cow;

use serde::Serialize;

use super::finding::Finding;

/// Working and findings of one design, in the order in which they came up.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Sheet {
    /// How each figure came about.
    pub working: Vec<Line>,
    /// What the installer must hear.
    pub findings: Vec<Finding>,
}

/// How one figure came about.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Line {
    /// Where the figure stands in the design, by the names of its JSON: `bank.required_ah`,
    /// `cables.bank_to_inverter.capacity_a`. Steps on the way have a name of their own.
    pub figure: Cow<'static, str>,
    /// The symbol in the formula.
    pub symbol: &'static str,
    /// What the figure is, in the trade's words.
    pub name: &'static str,
    /// The formula, in the symbols of `values`.
    pub formula: &'static str,
    /// What was put in.
    pub values: Vec<Value>,
    /// What came out.
    pub result: f64,
    /// Its unit; empty for a pure number.
    pub unit: &'static str,
    /// Where the formula comes from.
    pub source: &'static str,
    /// Whether anyone has seen that page.
    pub checked: Checked,
}

/// One value that went into a formula.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Value {
    /// The symbol in the formula.
    pub symbol: &'static str,
    /// The number.
    pub value: f64,
    /// Its unit; empty for a pure number.
    pub unit: &'static str,
}

/// How well a source is known.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
pub enum Checked {
    /// The page, or a faithful reproduction of it, was read.
    Read,
    /// Recalled, not seen in print.
    FromMemory,
    /// A fact of the trade without a source.
    CommonPractice,
    /// Follows by arithmetic or physics from what stands above it.
    Derived,
    /// Our own rule.
    OurRule,
}

/// Formula and source of a figure; written once as a constant beside the function that computes it.
#[derive(Clone, Copy, Debug)]
pub struct Rule {
    /// The symbol of the result.
    pub symbol: &'static str,
    /// What the result is, in the trade's words.
    pub name: &'static str,
    /// The formula.
    pub formula: &'static str,
    /// The unit of the result; empty for a pure number.
    pub unit: &'static str,
    /// Where the formula comes from.
    pub source: &'static str,
    /// Whether anyone has seen that page.
    pub checked: Checked,
}

impl Sheet {
    /// Writes a figure down and gives it back.
    pub fn line(
        &mut self,
        figure: impl Into<Cow<'static, str>>,
        rule: &Rule,
        values: &[(&'static str, f64, &'static str)],
        result: f64,
    ) -> f64 {
        let values = values.iter().map(|&(symbol, value, unit)| Value { symbol, value, unit }).collect();
        let Rule { symbol, name, formula, unit, source, checked } = *rule;
        let figure = figure.into();
        self.working.push(Line { figure, symbol, name, formula, values, result, unit, source, checked });
        result
    }

    /// Notes something that the installer must hear; the same thing is said once.
    pub fn find(&mut self, finding: Finding) {
        if !self.findings.contains(&finding) {
            self.findings.push(finding);
        }
    }
}
