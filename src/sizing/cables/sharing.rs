//! How parallel strings share the bank's current.

use super::paper::Paper;
use super::runs::Given;
use crate::sizing::finding::Finding;
use crate::sizing::sheet::{Checked, Rule};
use crate::units::{Amps, Ohms};

/// A string's share above the mean by more than this is told: our rule.
const UNEVEN_ABOVE: f64 = 0.05;

/// Currents of parallel strings of equal volts: `I_i = I · (1/R_i) / Σ(1/R_j)`.
///
/// Resistances must be above zero. Source: Kirchhoff's laws.
pub fn shares(whole: Amps, resistances: &[Ohms]) -> Vec<Amps> {
    let conductance: f64 = resistances.iter().map(|resistance| 1.0 / resistance.0).sum();
    resistances.iter().map(|resistance| whole / (resistance.0 * conductance)).collect()
}

impl Given<'_> {
    /// How far the worst string's current is above the mean, when its resistance is below the others' by the
    /// spread. The leads, of equal length, would even this out a little; that is not counted on.
    pub(super) fn imbalance(&self, paper: &mut Paper) -> f64 {
        let spread = self.assumptions.string_resistance_spread;
        let mut resistances = vec![Ohms(1.0); self.bank.strings as usize];
        resistances[0] = Ohms(1.0 - spread);
        let mean = Amps(1.0);
        let worst = shares(mean * f64::from(self.bank.strings), &resistances)[0];
        let values = [("n", f64::from(self.bank.strings), ""), ("s", spread, "")];
        let excess = paper.line("imbalance", &IMBALANCE, &values, worst / mean - 1.0);
        if excess > UNEVEN_ABOVE {
            paper.sheet.find(Finding::StringsUneven { worst_over_mean: 1.0 + excess });
        }
        excess
    }
}

const IMBALANCE: Rule = Rule {
    symbol: "u",
    name: "Worst string's current over the mean, less one",
    formula: "u = n / (1 + (n − 1) · (1 − s)) − 1",
    unit: "",
    source: "Kirchhoff's laws, one string lower in resistance by s than the others",
    checked: Checked::Derived,
};

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn strings_share_the_current_by_their_conductances() {
        // Our own vector: 20, 20 and 24 mΩ at 120 A.
        let currents = shares(Amps(120.0), &[Ohms(0.020), Ohms(0.020), Ohms(0.024)]);
        for (current, expected) in currents.iter().zip([42.353, 42.353, 35.294]) {
            assert!((current.0 - expected).abs() < 0.001, "{currents:?}");
        }
        assert!((currents[0].0 / 40.0 - 1.0 - 0.0588).abs() < 0.0001, "worst string 5.9 % over the mean");
    }

    #[test]
    fn the_shares_add_up_and_equal_strings_share_equally() {
        for n in 1..=6 {
            let currents = shares(Amps(90.0), &vec![Ohms(0.03); n]);
            assert!((currents.iter().copied().sum::<Amps>().0 - 90.0).abs() < 1e-9);
            assert!(currents.iter().all(|current| (current.0 - 90.0 / n as f64).abs() < 1e-9));
        }
    }
}
