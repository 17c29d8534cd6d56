//! What the cuts ask of the bank, by both methods.

use super::duty_cycle::Cut;
use super::peukert::Curve;
use super::section_method::{largest_section, section};
use crate::sizing::Sheet;
use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::{Methods, RulingMethod};
use crate::sizing::sheet::{Checked, Rule};
use crate::units::AmpHours;

/// Before depth of discharge, ageing, cold and margin; all at the reference rate.
#[derive(Clone, Debug, PartialEq)]
pub struct Needs {
    /// Capacity that the hardest cut just empties, by Peukert's step sum.
    pub emptied: AmpHours,
    /// Largest section of any cut.
    pub section: AmpHours,
    /// The cut that empties most.
    pub hardest: Cut,
}

/// The hardest of one or more cuts, by each method.
///
/// With one cut every section of it is taken. With the cuts of a whole day, one for each start that
/// may be the worst, the last section of each is enough: a section that ends earlier belongs to a
/// cut that began earlier, and that one carries more behind it.
///
/// The step sum is greatest at one of these starts. A section may ask up to 1 % more between two of
/// them (cuts of up to twelve hours), since it also turns where the load of long ago fades; the
/// design margin covers that.
pub fn needs(cuts: &[Cut], curve: &Curve) -> Needs {
    let mut emptied = AmpHours::ZERO;
    let mut hardest = 0;
    for (at, cut) in cuts.iter().enumerate() {
        if emptied == AmpHours::ZERO || curve.taken(cut, emptied) > 1.0 + 1e-12 {
            (emptied, hardest) = (emptied.max(curve.emptied(cut)), at);
        }
    }
    let section = match cuts {
        [only] => largest_section(only, curve),
        many => many.iter().map(|cut| section(cut.as_slice(), curve)).fold(AmpHours::ZERO, AmpHours::max),
    };
    Needs { emptied, section, hardest: cuts.get(hardest).cloned().unwrap_or_default() }
}

const PEUKERT: Rule = Rule {
    symbol: "C_peukert",
    name: "Capacity by Peukert's law over the depth of discharge",
    formula: "C_peukert = C_flat / DoD × f_temperature × margin, with Σ h_j / t(I_j, C_flat) = 1",
    unit: "Ah",
    source: "Peukert 1897; the larger of depth and end of life as in IEEE 1013",
    checked: Checked::FromMemory,
};

const SECTION: Rule = Rule {
    symbol: "C_section",
    name: "Capacity by the section method with ageing",
    formula: "C_section = max_S Σ_p (A_p − A_(p−1)) · K(t_pS) × ageing × f_temperature × margin",
    unit: "Ah",
    source: "IEEE 485, modified Hoxie method",
    checked: Checked::FromMemory,
};

const REQUIRED: Rule = Rule {
    symbol: "C_required",
    name: "Capacity that the cut asks for",
    formula: "C_required = max(C_peukert, C_section), or C_kinetic where playing the cut through asks for more",
    unit: "Ah",
    source: "depth of discharge and ageing are not multiplied: the larger covers both (IEEE 1013)",
    checked: Checked::FromMemory,
};

const KINETIC: Rule = Rule {
    symbol: "C_kinetic",
    name: "Capacity by playing the cut through",
    formula: "C_kinetic = C_just · margin; C_just lasts the cut from every start, aged and on the coldest day",
    unit: "Ah",
    source: "kinetic battery model (Manwell and McGowan 1993), volts by open-circuit table and resistance",
    checked: Checked::Read,
};

/// Capacity by playing the cut through, written down; `just` is the one that just lasts the cut.
pub fn played(just: AmpHours, assumptions: &Assumptions, sheet: &mut Sheet) -> AmpHours {
    let values = [("C_just", just.0, "Ah"), ("margin", assumptions.bank_margin, "")];
    AmpHours(sheet.line("bank.methods.kibam_ah", &KINETIC, &values, (just * assumptions.bank_margin).0))
}

impl Needs {
    /// Both answers with the same factors, the larger of them, and which one it is.
    ///
    /// Depth of discharge and ageing are not multiplied: a bank that is half used in its first
    /// year can still give the cut when a fifth of it is gone.
    pub fn with_factors(&self, cold: f64, assumptions: &Assumptions) -> (Methods, AmpHours, RulingMethod) {
        let factors = cold * assumptions.bank_margin;
        let peukert = self.emptied / assumptions.depth_of_discharge_max * factors;
        let section = self.section * assumptions.ageing_factor * factors;
        let ruled_by = if section > peukert { RulingMethod::Section } else { RulingMethod::Peukert };
        (Methods { peukert, section, kibam: None }, peukert.max(section), ruled_by)
    }

    /// The same, raised to what playing the cut through asks for; `just` is the capacity that just lasts it.
    pub fn raised(
        &self,
        cold: f64,
        just: Option<AmpHours>,
        factors: &Assumptions,
    ) -> (Methods, AmpHours, RulingMethod) {
        let (methods, required, ruled_by) = self.with_factors(cold, factors);
        match just.map(|just| just * factors.bank_margin) {
            Some(played) if played > required => (methods, played, RulingMethod::Kibam),
            _ => (methods, required, ruled_by),
        }
    }

    /// Writes the answers down.
    pub fn write_down(
        &self,
        methods: Methods,
        required: AmpHours,
        cold: f64,
        factors: &Assumptions,
        sheet: &mut Sheet,
    ) {
        let common = [("f_temperature", cold, ""), ("margin", factors.bank_margin, "")];
        let depth = ("DoD", factors.depth_of_discharge_max, "");
        let [f, m] = common;
        sheet.line(
            "bank.methods.peukert_ah",
            &PEUKERT,
            &[("C_flat", self.emptied.0, "Ah"), depth, f, m],
            methods.peukert.0,
        );
        let ageing = ("ageing", factors.ageing_factor, "");
        sheet.line(
            "bank.methods.section_ah",
            &SECTION,
            &[("F", self.section.0, "Ah"), ageing, f, m],
            methods.section.0,
        );
        let both = [("C_peukert", methods.peukert.0, "Ah"), ("C_section", methods.section.0, "Ah")];
        sheet.line("bank.required_ah", &REQUIRED, &both, required.0);
    }
}
