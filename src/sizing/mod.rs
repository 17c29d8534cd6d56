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

/// Answers a survey: every stage in its order, findings heaviest first.
///
/// It never fails: with a survey that came in through the checked door every figure is finite.
pub fn size(survey: &Survey, assumptions: Assumptions) -> Design {
    let mut sheet = Sheet::default();
    let demand = load_survey::demand(survey, &assumptions, &mut sheet);
    let inverter = inverter::inverter(survey, &demand, &assumptions, &mut sheet);
    let bank = battery_bank::bank(survey, &demand, &inverter, &assumptions, &mut sheet);
    let charger = charger::plan(survey, &demand, &inverter, &bank, &assumptions, &mut sheet);
    let cables = cables::cables(survey, &demand, &inverter, &bank, &charger, &assumptions, &mut sheet);
    let starts = surge::starts(survey, &demand, &inverter, &bank, &cables, &assumptions, &mut sheet);
    let ventilation = ventilation::ventilation(survey, &bank, &mut sheet);
    let life = life::life(survey, &bank, &assumptions, &mut sheet);
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
