//! The engine: pure functions from a survey to a design.
//!
//! Survey → demand → inverter → bank → charger → cables → starts → ventilation, life. Each stage
//! sees the ones before it and the assumptions, writes its figures on the sheet and never looks
//! ahead. It always answers; what is unsafe or doubtful comes back as findings.

pub mod assumptions;
pub mod battery_bank;
pub mod cables;
pub mod charger;
pub mod design;
pub mod finding;
pub mod inverter;
pub mod life;
pub mod load_survey;
pub mod proof;
pub mod protection;
pub mod sheet;
pub mod surge;
pub mod survey;
pub mod tables;
pub mod ventilation;

pub use assumptions::Assumptions;
pub use design::Design;
pub use finding::{Finding, Severity};
pub use sheet::Sheet;
pub use survey::Survey;

use crate::units::AmpHours;
use life::Wear;

/// Answers a survey by formula: every stage in its order, findings heaviest first.
///
/// It never fails: with a survey that came in through the checked door every figure is finite.
/// `crate::simulation::design` proves the answer and raises the bank where it must.
pub fn size(survey: &Survey, assumptions: Assumptions) -> Design {
    size_for(survey, None, assumptions)
}

/// The same with a bank no smaller than the capacity that just lasted the cut when it was `played` through.
pub fn size_for(survey: &Survey, played: Option<AmpHours>, assumptions: Assumptions) -> Design {
    let mut sheet = Sheet::default();
    let demand = load_survey::demand(survey, &assumptions, &mut sheet);
    let inverter = inverter::inverter(survey, &demand, &assumptions, &mut sheet);
    let bank = battery_bank::bank(survey, &demand, &inverter, played, &assumptions, &mut sheet);
    let charger = charger::plan(survey, &demand, &inverter, &bank, &assumptions, &mut sheet);
    let cables = cables::cables(survey, &demand, &inverter, &bank, &charger, &assumptions, &mut sheet);
    let starts = surge::starts(survey, &demand, &inverter, &bank, &cables, &assumptions, &mut sheet);
    let ventilation = ventilation::ventilation(survey, &bank, &mut sheet);
    let life = life::life(survey, &Wear::of_sized_cut(survey, &bank), &assumptions, &mut sheet);
    let Sheet { working, mut findings } = sheet;
    findings.sort_by_key(|finding| std::cmp::Reverse(finding.severity()));
    Design {
        demand,
        inverter,
        bank,
        starts,
        charger,
        cables,
        ventilation,
        life,
        proof: None,
        findings,
        working,
        assumptions,
    }
}
