//! The check-over: what was surveyed and what came out, each with a way back to change it.

use super::case::Case;
use crate::sizing::survey::{Chemistry, StartsAt};
use crate::sizing::{Design, Survey};
use crate::web::Paths;
use crate::wording::duration;

/// One line of the check-over.
pub struct Fact {
    /// What it is.
    pub name: &'static str,
    /// What it stands at.
    pub value: String,
    /// Where it is changed or seen.
    pub change: String,
    /// Whether it can be changed there.
    pub is_input: bool,
}

/// The survey and the design in a few lines.
pub fn facts(case: &Case, paths: &Paths) -> Vec<Fact> {
    let id = case.job.id;
    let back = |address: String| format!("{address}?back=price");
    let input = |name, value, change| Fact { name, value, change: back(change), is_input: true };
    let contact = &case.job.contact;
    let customer = [contact.customer.as_str(), &contact.place].into_iter().filter(|part| !part.is_empty());
    let mut facts = vec![
        input("Site", customer.collect::<Vec<_>>().join(", "), paths.site(id)),
        input("Stay-on list", list(case), paths.list(id)),
        input("Power cut", cut(case), paths.cut(id)),
        input("Cable runs", runs(case), paths.runs(id)),
    ];
    for fact in &mut facts {
        if fact.value.is_empty() {
            fact.value = "nothing yet".to_owned();
        }
    }
    if let Some((survey, design)) = &case.designed {
        facts.push(Fact {
            name: "What it needs",
            value: needs(case, survey, design),
            change: paths.needs(id),
            is_input: false,
        });
    }
    facts
}

fn list(case: &Case) -> String {
    let things: u32 = case.job.draft.loads.iter().map(|load| load.quantity).sum();
    let running = case.designed.as_ref().map(|(_, design)| case.voice.numbers.with_unit(design.demand.running.0, "W"));
    match (things, running) {
        (0, _) => String::new(),
        (things, None) => format!("{things} things"),
        (things, Some(running)) => format!("{things} things, {running} running together at most"),
    }
}

fn cut(case: &Case) -> String {
    let Some(outage) = &case.job.draft.outage else { return String::new() };
    let start = match outage.starts_at {
        StartsAt::Worst => "at its worst hour".to_owned(),
        StartsAt::At(time) => format!("from {time}"),
    };
    let per_week = case.voice.numbers.plain(outage.cuts_per_week, 1);
    format!("{} {start}, {per_week} a week", duration(outage.autonomy))
}

fn runs(case: &Case) -> String {
    let runs = &case.job.draft.runs;
    let metres = |length: crate::units::Metres| case.voice.numbers.with_unit(length.0, "m");
    format!(
        "battery to inverter {}, inverter to board {}, mains to inverter {}",
        metres(runs.bank_to_inverter),
        metres(runs.inverter_to_board),
        metres(runs.mains_to_inverter)
    )
}

fn needs(case: &Case, survey: &Survey, design: &Design) -> String {
    let numbers = case.voice.numbers;
    let bank = &design.bank;
    let kind = match survey.choice.chemistry {
        Chemistry::FloodedTubular => "tubular",
        Chemistry::FloodedFlatPlate => "flat plate",
        Chemistry::VrlaAgm => "AGM",
        Chemistry::VrlaGel => "gel",
        Chemistry::Lfp => "lithium iron phosphate",
    };
    format!(
        "{} inverter · {} × {} 12 V {kind} at {}",
        numbers.with_unit(design.inverter.rating.0, "VA"),
        bank.blocks_in_series * bank.strings,
        numbers.with_unit(bank.block.0, "Ah"),
        numbers.with_unit(bank.bus.volts().0, "V"),
    )
}
