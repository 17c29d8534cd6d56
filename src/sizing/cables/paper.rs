//! The part of the calculation sheet that belongs to one run.

use crate::sizing::design::Run;
use crate::sizing::sheet::{Rule, Sheet};

/// The sheet, open at a run.
pub struct Paper<'a> {
    /// Which run.
    pub run: Run,
    /// The sheet.
    pub sheet: &'a mut Sheet,
}

impl Paper<'_> {
    /// Writes a figure of the run down under its JSON path and gives it back.
    pub fn line(&mut self, name: &str, rule: &Rule, values: &[(&'static str, f64, &'static str)], result: f64) -> f64 {
        self.sheet.line(["cables", self.run.key(), name].join("."), rule, values, result)
    }
}
