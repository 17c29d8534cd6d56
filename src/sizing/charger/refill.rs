//! How long it takes to fill the bank again, and the current that does it in time.

use crate::sizing::Sheet;
use crate::sizing::sheet::{Checked, Rule};
use crate::sizing::tables::chemistries::Absorption;
use crate::units::{AmpHours, Amps, Hours};

/// What has to go back into the bank, and how this kind takes it.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Refill {
    /// Capacity of the bank at the 20 h rate.
    pub capacity: AmpHours,
    /// Charge that the cut took.
    pub taken: AmpHours,
    /// Charge put back over charge taken.
    pub charge_factor: f64,
    /// State of charge at which the current begins to fall.
    pub end_of_bulk: f64,
    /// How long the rest takes.
    pub absorption: Absorption,
}

const RECHARGE: Rule = Rule {
    symbol: "T_charge",
    name: "Time to full after the sized cut",
    formula: "T_charge = max(f·Q_bulk/I + x·(a·C_20/I + T_fixed), f·Q/I), Q_bulk = max(0, Q − (1−s_1)·C_20), x = min(1, Q/((1−s_1)·C_20))",
    unit: "h",
    source: "bulk and absorption after a deep-cycle maker's manual; lithium after a charger's manual",
    checked: Checked::Read,
};

impl Refill {
    /// Charge that goes in before the current falls, and the share of a whole absorption that follows.
    fn stages(&self) -> (AmpHours, f64) {
        let last = self.capacity * (1.0 - self.end_of_bulk);
        let bulk = (self.taken - last).max(AmpHours::ZERO) * self.charge_factor;
        (bulk, (self.taken / last).min(1.0))
    }

    /// The part of the time that a larger current shortens, as charge, and the part that none does.
    fn parts(&self) -> (AmpHours, Hours) {
        let (bulk, share) = self.stages();
        (bulk + self.capacity * (self.absorption.coefficient * share), self.absorption.fixed * share)
    }

    /// Charge that must go in, losses included.
    fn put_back(&self) -> AmpHours {
        self.taken * self.charge_factor
    }

    /// Time to full at a current, from full load on the mains to the end of absorption.
    ///
    /// Bulk at the full current, then absorption, and never less than all the charge at the full
    /// current. Zero when nothing was taken. Holds after a discharge of hours; after a very slow
    /// one a maker allows some hours more.
    ///
    /// Source: a deep-cycle maker's manual, absorption as a multiple of capacity over current, on
    /// the last fifth of the charge at half the current and 5 % more; a charger's manual for lithium.
    pub fn time(&self, current: Amps) -> Hours {
        let (shortened, fixed) = self.parts();
        (shortened / current + fixed).max(self.put_back() / current)
    }

    /// The current that fills the bank in a time; `None` where no current does.
    pub fn current_for(&self, has: Hours) -> Option<Amps> {
        let (shortened, fixed) = self.parts();
        if self.taken <= AmpHours::ZERO {
            return Some(Amps::ZERO);
        }
        (has > fixed).then(|| (shortened / (has - fixed)).max(self.put_back() / has))
    }

    /// Writes the time to full at the current that was chosen.
    pub fn write_down(&self, current: Amps, sheet: &mut Sheet) -> Hours {
        let values = [
            ("Q", self.taken.0, "Ah"),
            ("C_20", self.capacity.0, "Ah"),
            ("I", current.0, "A"),
            ("f", self.charge_factor, ""),
            ("s_1", self.end_of_bulk, ""),
            ("a", self.absorption.coefficient, ""),
            ("T_fixed", self.absorption.fixed.0, "h"),
        ];
        Hours(sheet.line("charger.recharge_h", &RECHARGE, &values, self.time(current).0))
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::survey::Chemistry;
    use crate::sizing::tables::chemistries::properties;
    use proptest::prelude::*;

    fn refill(chemistry: Chemistry, capacity: f64, depth: f64) -> Refill {
        let kind = properties(chemistry);
        Refill {
            capacity: AmpHours(capacity),
            taken: AmpHours(capacity * depth),
            charge_factor: kind.charge_factor,
            end_of_bulk: kind.charge_at_end_of_bulk,
            absorption: kind.absorption,
        }
    }

    #[test]
    fn times_are_those_of_the_makers_formula() {
        let cases = [
            // kind, Ah, depth, A, expected h, where from
            (Chemistry::FloodedFlatPlate, 100.0, 0.5, 10.0, 7.65, "1.15 · 30/10 + 0.42 · 100/10"),
            (Chemistry::FloodedFlatPlate, 100.0, 0.1, 10.0, 2.1, "half of an absorption of 4.2 h"),
            (Chemistry::VrlaAgm, 100.0, 0.5, 20.0, 3.628, "1.08 · 32/20 + 0.38 · 100/20"),
            (Chemistry::Lfp, 100.0, 0.8, 50.0, 2.0352, "1.01 · 76/50 + 0.5"),
            (Chemistry::Lfp, 100.0, 0.8, 4.0, 20.2, "never less than all the charge at the full current"),
        ];
        for (kind, capacity, depth, current, expected, source) in cases {
            let hours = refill(kind, capacity, depth).time(Amps(current)).0;
            assert!((hours - expected).abs() < 1e-9, "{kind:?} {depth}: {hours} h, {source}");
        }
    }

    #[test]
    fn nothing_taken_needs_no_time_and_no_current() {
        for kind in Chemistry::ALL {
            let full = refill(kind, 200.0, 0.0);
            assert_eq!((full.time(Amps(10.0)).0, full.current_for(Hours(1.0))), (0.0, Some(Amps(0.0))), "{kind:?}");
        }
    }

    #[test]
    fn no_current_fills_lithium_faster_than_its_absorption() {
        assert_eq!(refill(Chemistry::Lfp, 100.0, 0.5).current_for(Hours(0.5)), None);
    }

    fn any() -> impl Strategy<Value = Refill> {
        (0_usize..5, 5.0..800.0, 0.01..1.0).prop_map(|(kind, ah, depth)| refill(Chemistry::ALL[kind], ah, depth))
    }

    proptest! {
        #[test]
        fn a_larger_current_never_takes_longer(refill in any(), current in 1.0..100.0, more in 0.01..100.0) {
            prop_assert!(refill.time(Amps(current + more)) <= refill.time(Amps(current)));
        }

        #[test]
        fn a_deeper_cut_never_takes_less_time(kind in 0_usize..5, one in 0.0..1.0_f64, other in 0.0..1.0_f64) {
            let time = |depth: f64| refill(Chemistry::ALL[kind], 100.0, depth).time(Amps(10.0));
            prop_assert!(time(one.max(other)) >= time(one.min(other)));
        }

        #[test]
        fn the_current_found_fills_the_bank_just_in_time(refill in any(), has in 0.6..40.0) {
            let current = refill.current_for(Hours(has)).expect("more than the fixed part");
            prop_assert!((refill.time(current).0 / has - 1.0).abs() < 1e-9);
        }
    }
}
