//! How parallel strings share the bank's current.

use super::paper::Paper;
use super::runs::Given;
use crate::sizing::finding::Finding;
use crate::sizing::sheet::{Checked, Rule};

/// A string's share above the mean by more than this is told: our rule.
const UNEVEN_ABOVE: f64 = 0.05;

/// How far the current of a string whose resistance is lower by the share `spread` is above the mean of `n` strings
/// of equal volts: `n / (1 + (n − 1)·(1 − s)) − 1`.
///
/// Source: Kirchhoff's laws, `I_i = I · (1/R_i) / Σ(1/R_j)`.
pub fn excess(strings: f64, spread: f64) -> f64 {
    strings / (1.0 + (strings - 1.0) * (1.0 - spread)) - 1.0
}

impl Given<'_> {
    /// How far the worst string's current is above the mean, when its resistance is below the others' by the
    /// spread. The leads, of equal length, would even this out a little; that is not counted on.
    pub(super) fn imbalance(&self, paper: &mut Paper) -> f64 {
        let (strings, spread) = (f64::from(self.bank.strings), self.assumptions.string_resistance_spread);
        let values = [("n", strings, ""), ("s", spread, "")];
        let excess = paper.line("imbalance", &IMBALANCE, &values, excess(strings, spread));
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

    /// Kirchhoff's laws: `I_i = I · (1/R_i) / Σ(1/R_j)`.
    fn shares(whole: f64, resistances: &[f64]) -> Vec<f64> {
        let conductance: f64 = resistances.iter().map(|resistance| 1.0 / resistance).sum();
        resistances.iter().map(|resistance| whole / (resistance * conductance)).collect()
    }

    #[test]
    fn the_stronger_string_carries_more_than_the_mean_as_kirchhoff_says() {
        for n in 1..=6 {
            for spread in [0.0, 0.05, 0.2, 0.5] {
                let mut resistances = vec![0.03; n];
                resistances[0] *= 1.0 - spread;
                let by_kirchhoff = shares(90.0, &resistances)[0] / (90.0 / n as f64) - 1.0;
                assert!((excess(n as f64, spread) - by_kirchhoff).abs() < 1e-12, "{n} strings, {spread}");
            }
        }
    }

    #[test]
    fn equal_strings_or_one_alone_share_equally() {
        assert!((1..=6).all(|n| excess(f64::from(n), 0.0) == 0.0));
        assert_eq!(excess(1.0, 0.3), 0.0);
    }

    #[test]
    fn five_hundredths_less_resistance_draw_a_thirtieth_more_of_three() {
        // Our own vector: three strings, 5 % spread: 3/(1 + 2·0.95) − 1.
        assert!((excess(3.0, 0.05) - 0.034_483).abs() < 1e-6);
    }
}
