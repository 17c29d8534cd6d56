//! A survey in progress: everything but the loads and the cut has its default from the start.

use serde_json::Value;

use super::defaults;
use super::fault::Fault;
use super::survey;
use crate::sizing::Assumptions;
use crate::sizing::survey::{BatteryRating, Choice, Load, Outage, ReusedInverter, Runs, Site, Survey};

/// A survey in progress.
#[derive(Clone, Debug, PartialEq)]
pub struct Draft {
    /// The supply and the room.
    pub site: Site,
    /// The cut to be bridged, once it was asked for.
    pub outage: Option<Outage>,
    /// What must stay on, so far.
    pub loads: Vec<Load>,
    /// What the installer has decided already.
    pub choice: Choice,
    /// Cable lengths.
    pub runs: Runs,
    /// Data-sheet ratings of the battery.
    pub battery_ratings: Vec<BatteryRating>,
    /// A unit that is there.
    pub reuse: Option<ReusedInverter>,
    /// Assumptions that this job sets, by name.
    pub overrides: Vec<(String, f64)>,
    /// What a file left out, by path, with the value that was taken; empty for a draft made here.
    pub defaults_taken: Vec<(String, Value)>,
}

impl Default for Draft {
    fn default() -> Self {
        Self {
            site: defaults::site(),
            outage: None,
            loads: Vec::new(),
            choice: defaults::CHOICE,
            runs: defaults::RUNS,
            battery_ratings: Vec::new(),
            reuse: None,
            overrides: Vec::new(),
            defaults_taken: Vec::new(),
        }
    }
}

impl Draft {
    /// Reads the form `keeplit-survey-1`; loads and cut may be missing still.
    pub fn read(text: &str) -> Result<Self, Vec<Fault>> {
        survey::read_draft(text)
    }

    /// Writes the form `keeplit-survey-1`; it reads back equal.
    pub fn write(&self) -> String {
        super::write::document(self).to_string()
    }

    /// The survey, or what is missing still.
    pub fn complete(&self) -> Result<Survey, Vec<Fault>> {
        let mut missing = Vec::new();
        if self.outage.is_none() {
            missing.push(Fault::new("outage.autonomy_h", "give the hours that the cut lasts"));
        }
        if self.loads.is_empty() {
            missing.push(Fault::new("loads", "give at least one load"));
        }
        let Some(outage) = self.outage.clone().filter(|_| missing.is_empty()) else { return Err(missing) };
        Ok(Survey {
            site: self.site.clone(),
            outage,
            loads: self.loads.clone(),
            choice: self.choice,
            runs: self.runs,
            battery_ratings: self.battery_ratings.clone(),
            reuse: self.reuse,
        })
    }

    /// The factors in force: the defaults, then the firm's, then this job's.
    ///
    /// A name that is not known any more, or a value out of its limits, is passed over.
    pub fn assumptions(&self, firm: &[(String, f64)]) -> Assumptions {
        let mut assumptions = Assumptions::defaults(self.choice.chemistry);
        for (key, value) in firm.iter().chain(&self.overrides) {
            let _ = assumptions.set(key, *value);
        }
        assumptions
    }
}
