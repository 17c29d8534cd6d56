//! A design as the simulation needs it: unit, cable and battery, free of the bank's size, age and warmth.

use super::battery::Battery;
use super::wells::{Kinetics, Wells};
use crate::sizing::battery_bank::peukert::Curve;
use crate::sizing::design::Run;
use crate::sizing::finding::Finding;
use crate::sizing::proof::WellsFrom;
use crate::sizing::survey::Chemistry;
use crate::sizing::tables::battery_temperature;
use crate::sizing::tables::chemistries::{Properties, properties};
use crate::sizing::{Design, Survey};
use crate::units::{AmpHours, Celsius, DcVolts, Hours};

/// Age and warmth of a bank.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Condition {
    /// At the end of its life rather than new.
    pub aged: bool,
    /// Its temperature.
    pub at: Celsius,
}

/// New and at the temperature that ratings are given for.
pub const NEW: Condition = Condition { aged: false, at: Celsius(25.0) };

/// Unit, cable and battery of a design.
#[derive(Clone, Copy, Debug)]
pub struct Plant {
    /// The battery's wells over its capacity.
    pub kinetics: Kinetics,
    /// Where they come from.
    pub from: WellsFrom,
    chemistry: Chemistry,
    kind: &'static Properties,
    cells: f64,
    /// Capacity at 20 h over that at the reference rate.
    at_20_h: f64,
    lead: f64,
    cut_off: DcVolts,
    /// Capacity at the end of its life over that of a new bank.
    pub aged_health: f64,
    aged_resistance: f64,
}

impl Plant {
    /// The plant of a design, and what must be told of its ratings.
    pub fn of(survey: &Survey, design: &Design) -> (Self, Option<Finding>) {
        let (bank, assumptions) = (&design.bank, &design.assumptions);
        let chemistry = survey.choice.chemistry;
        let kind = properties(chemistry);
        let fitted = Kinetics::of_ratings(&survey.battery_ratings, bank.rated);
        let kinetics = fitted.unwrap_or_else(|| Kinetics::of_exponent(bank.peukert_exponent, bank.rated));
        let refused = fitted.is_none() && survey.battery_ratings.len() > 2;
        let cable = design.cables.iter().find(|cable| cable.run == Run::BankToInverter);
        let plant = Self {
            kinetics,
            from: if fitted.is_some() { WellsFrom::Ratings } else { WellsFrom::Exponent },
            chemistry,
            kind,
            cells: f64::from(kind.cells_per_block * bank.blocks_in_series),
            at_20_h: Curve::of_bank(survey, bank).share_at(Hours(20.0)),
            lead: cable.map_or(0.0, |cable| cable.loop_resistance.0),
            cut_off: bank.cut_off,
            aged_health: 1.0 / assumptions.ageing_factor,
            aged_resistance: assumptions.aged_resistance_multiple,
        };
        (plant, refused.then_some(Finding::RatingsNotKinetic { peukert: bank.peukert_exponent }))
    }

    /// The worst that the site does to it: the end of its life on the coldest day.
    pub fn ruling(survey: &Survey) -> Condition {
        Condition { aged: true, at: survey.site.battery_coldest }
    }

    /// Capacity over that of a new bank.
    pub fn health(&self, condition: Condition) -> f64 {
        if condition.aged { self.aged_health } else { 1.0 }
    }

    /// A bank of a capacity at the reference rate, in some condition.
    pub fn battery(&self, capacity: AmpHours, condition: Condition) -> Battery {
        let usable = self.health(condition) * battery_temperature::capacity_share(self.chemistry, condition.at);
        let Kinetics { at_hand, rate, full } = self.kinetics;
        let new = self.kind.resistance_at(1.0, capacity * self.at_20_h).0 * self.cells;
        Battery {
            wells: Wells { full: capacity.0 * full * usable, at_hand, rate },
            kind: self.kind,
            cells: self.cells,
            resistance: if condition.aged { new * self.aged_resistance } else { new },
            lead: self.lead,
            cut_off: self.cut_off,
        }
    }
}
