//! What flows into a fault: the most, for the breaking capacity, and the least, for the fuse to open at all.

use super::paper::Paper;
use super::runs::Given;
use crate::sizing::design::Run;
use crate::sizing::sheet::{Checked, Rule};
use crate::units::{Amps, Kiloamps, Ohms};

impl Given<'_> {
    /// Most that the bank gives into a bolted fault.
    pub(super) fn bank_fault(&self, paper: &mut Paper) -> Kiloamps {
        let per_ah = self.assumptions.fault_current_per_ah;
        let values = [("k", per_ah, "A/Ah"), ("C", self.bank.installed.0, "Ah")];
        Kiloamps(paper.line("fault_current_ka", &BANK_FAULT, &values, per_ah * self.bank.installed.0 / 1000.0))
    }

    /// Most that the other strings give into a fault of this one.
    pub(super) fn string_fault(&self, strings: f64, paper: &mut Paper) -> Kiloamps {
        let per_ah = self.assumptions.fault_current_per_ah;
        let values = [("k", per_ah, "A/Ah"), ("C", self.bank.installed.0, "Ah"), ("n", strings, "")];
        let fault = per_ah * self.bank.installed.0 * (strings - 1.0) / strings / 1000.0;
        Kiloamps(paper.line("fault_current_ka", &STRING_FAULT, &values, fault))
    }

    /// Through the unit's bypass the board sees the fault current of the mains.
    pub(super) fn mains_fault(&self, paper: &mut Paper) -> Kiloamps {
        let fault = self.assumptions.supply_fault_current_ka;
        Kiloamps(paper.line("fault_current_ka", &MAINS_FAULT, &[("I_k", fault, "kA")], fault))
    }

    /// Least that flows at the far end of a battery run: the aged bank at the end of a cut, through the whole
    /// cable; one string alone where its lead is meant.
    pub(super) fn weakest_fault(&self, loop_resistance: Ohms, paper: &mut Paper) -> Amps {
        let strings = if paper.run == Run::StringLead { f64::from(self.bank.strings) } else { 1.0 };
        let (volts, bank) = (self.bank.end_open_circuit, self.bank.aged_resistance);
        let least: Amps = volts / (bank * strings + loop_resistance);
        let values =
            [("U_0", volts.0, "V"), ("R_bank", bank.0, "Ω"), ("n", strings, ""), ("R", loop_resistance.0, "Ω")];
        paper.line("least_fault_ka", &LEAST_FAULT, &values, least.0 / 1000.0);
        least
    }
}

const BANK_FAULT: Rule = Rule {
    symbol: "I_k",
    name: "Largest fault current",
    formula: "I_k = k · C / 1000",
    unit: "kA",
    source: "a switchgear maker's note on DC distribution: near 10 A/Ah, always under 20; not for lithium",
    checked: Checked::Read,
};

const STRING_FAULT: Rule = Rule {
    formula: "I_k = k · C · (n − 1) / n / 1000",
    source: "the other strings feed the fault of this one; k by a switchgear maker's note on DC distribution",
    ..BANK_FAULT
};

const MAINS_FAULT: Rule = Rule {
    formula: "I_k as assumed for the mains, which the unit's bypass lets through",
    source: "ask the distributor",
    checked: Checked::CommonPractice,
    ..BANK_FAULT
};

const LEAST_FAULT: Rule = Rule {
    symbol: "I_k,min",
    name: "Fault current of the aged bank at the end of a cut, at the far end of the cable",
    formula: "I_k,min = U_0 / (n · R_bank + R) / 1000, n strings where the lead of one is meant",
    unit: "kA",
    source: "Ohm's law; equation as in a valve-regulated battery maker's conference paper",
    checked: Checked::Read,
};
