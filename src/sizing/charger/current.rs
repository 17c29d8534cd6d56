//! Which charging current to set: what the bank bears, what the time asks for, what units offer.

use crate::sizing::Sheet;
use crate::sizing::assumptions::Assumptions;
use crate::sizing::sheet::{Checked, Rule};
use crate::sizing::tables::charger_currents::SETTINGS;
use crate::sizing::tables::chemistries::ChargeCurrent;
use crate::units::{AmpHours, Amps, Celsius};

/// Two currents that differ by less are the same setting.
const SAME: f64 = 1e-9;

const LEAST: Rule = Rule {
    symbol: "I_least",
    name: "Least charging current",
    formula: "I_least = C_20 · i_least",
    unit: "A",
    source: "makers' manuals, by kind of battery",
    checked: Checked::Read,
};

const MOST: Rule = Rule {
    symbol: "I_most",
    name: "Most charging current",
    formula: "I_most = C_20 · i_most; lithium below 15 °C a fifth of the capacity",
    unit: "A",
    source: "makers' manuals and data sheets, by kind of battery",
    checked: Checked::Read,
};

const CURRENT: Rule = Rule {
    symbol: "I_charge",
    name: "Charging current to be set",
    formula: "smallest trade setting ≥ max(I_needed, I_least) and ≤ I_most",
    unit: "A",
    source: "settings that units of the trade offer",
    checked: Checked::CommonPractice,
};

/// What the bank wants at least and bears at most.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Limits {
    /// Least current.
    pub least: Amps,
    /// Most current.
    pub most: Amps,
}

impl Limits {
    /// From the capacity at the 20 h rate; lithium bears less in the cold.
    pub fn of(
        capacity: AmpHours,
        kind: &ChargeCurrent,
        coldest: Celsius,
        factors: &Assumptions,
        sheet: &mut Sheet,
    ) -> Self {
        let in_the_cold = kind.most_in_the_cold.filter(|&(below, _)| coldest < below);
        let most = in_the_cold
            .map_or(factors.charge_current_most_a_per_ah, |(_, most)| most.min(factors.charge_current_most_a_per_ah));
        let least = factors.charge_current_least_a_per_ah;
        let values = |symbol, per_ah| [("C_20", capacity.0, "Ah"), (symbol, per_ah, "A/Ah")];
        Self {
            least: Amps(sheet.line("charger.least_a", &LEAST, &values("i_least", least), capacity.0 * least)),
            most: Amps(sheet.line("charger.most_a", &MOST, &values("i_most", most), capacity.0 * most)),
        }
    }

    /// The smallest setting that is enough and within the limits; the largest within them if none is
    /// enough, and the smallest there is if even that is too strong.
    pub fn setting(&self, needed: Amps, sheet: &mut Sheet) -> Amps {
        let wanted = needed.max(self.least);
        let borne = || SETTINGS.iter().copied().filter(|&setting| setting <= self.most.0 * (1.0 + SAME));
        let enough = borne().find(|&setting| setting >= wanted.0 * (1.0 - SAME));
        let setting = enough.or_else(|| borne().next_back()).unwrap_or(SETTINGS[0]);
        let values = [("I_needed", needed.0, "A"), ("I_least", self.least.0, "A"), ("I_most", self.most.0, "A")];
        Amps(sheet.line("charger.current_a", &CURRENT, &values, setting))
    }
}
