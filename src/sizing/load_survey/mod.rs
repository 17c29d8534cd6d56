//! What the loads ask for: power that runs together, energy of the cut, starts.
//!
//! Power is summed with no diversity: everything that may be on in a stretch of the day is on.
//! Energy uses the duties.

mod day;
mod items;
pub mod outage;
mod power;
mod turns;

#[cfg(test)]
pub(crate) mod example;
#[cfg(test)]
mod laws;
#[cfg(test)]
mod tests;

pub use outage::{cuts, starts};
pub use power::Power;

use super::assumptions::Assumptions;
use super::design::{DayStretch, Demand, StartNeed};
use super::finding::Finding;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::{LifeSupport, StartsAt, Survey};
use super::tables::motors;
use crate::units::{Hours, VoltAmps, WattHours, Watts};
use day::Stretch;

const RUNNING: Rule = Rule {
    symbol: "P",
    name: "Real power running together",
    formula: "P = max over the day of Σ P_i",
    unit: "W",
    source: "sum without diversity, as NEC 702.4(B) asks of an automatic transfer",
    checked: Checked::Read,
};

const RUNNING_VA: Rule = Rule {
    symbol: "S",
    name: "Apparent power running together",
    formula: "S = max over the day of √(ΣP² + ΣQ² + ΣD²)",
    unit: "VA",
    source: "IEEE 1459-2010, arithmetic of the powers of one phase",
    checked: Checked::FromMemory,
};

const TOGETHER: Rule = Rule {
    symbol: "S_together",
    name: "All motors restarting together, the rest running",
    formula: "S_together = max over the day of |Σ running + Σ starting|, P, Q and D apart",
    unit: "VA",
    source: "every motor restarts by itself at the changeover after a break of more than about 0.1 s",
    checked: Checked::CommonPractice,
};

const STAGGERED: Rule = Rule {
    symbol: "S_staggered",
    name: "One motor starting at a time, the rest running",
    formula: "S_staggered = max over the day and the starts of |rest running + start|, P, Q and D apart",
    unit: "VA",
    source: "starts one after another, by a delay timer or by hand",
    checked: Checked::CommonPractice,
};

const OUTAGE: Rule = Rule {
    symbol: "E",
    name: "Energy of the loads over the cut",
    formula: "E = Σ P_average · t over the stretches of the cut from its start",
    unit: "Wh",
    source: "energy is power times time; duties and clock windows as surveyed",
    checked: Checked::Derived,
};

const AVERAGE: Rule = Rule {
    symbol: "E_average",
    name: "Energy of a cut of the same length at an average hour",
    formula: "E_average = E_day · t / 24 h",
    unit: "Wh",
    source: "energy is power times time",
    checked: Checked::Derived,
};

/// Adds up the stay-on list: highest running power, starts, and the energy of the cut.
pub fn demand(survey: &Survey, assumptions: &Assumptions, sheet: &mut Sheet) -> Demand {
    warn_of_loads(survey, sheet);
    let items = items::items(survey, assumptions);
    let stretches = day::stretches(&items);
    let day: Vec<_> = stretches.iter().map(Stretch::shown).collect();
    let autonomy = survey.outage.autonomy;
    let worst = outage::worst_start(&day, autonomy);
    let sized = match survey.outage.starts_at {
        StartsAt::Worst => worst,
        StartsAt::At(time) => time.hours(),
    };
    Demand {
        running: running(&stretches, sheet),
        running_va: running_va(&stretches, sheet),
        surge_together: together(&stretches, sheet),
        surge_staggered: staggered(&stretches, sheet),
        outage: outage_energy(&day, sized, autonomy, sheet),
        worst_start: outage::minute(worst),
        sized_start: outage::minute(sized),
        average_outage: average_outage(&day, autonomy, sheet),
        starts: hardest_starts(&stretches, survey.loads.len()),
        day,
    }
}

/// The day of a list of loads by its averages alone: what a cut takes, without what starts ask for.
pub fn averages(survey: &Survey, assumptions: &Assumptions) -> Vec<DayStretch> {
    day::averages(&items::items(survey, assumptions))
}

/// The stretch in which a figure is highest, the earliest of equals, and when it begins.
fn highest(stretches: &[Stretch], figure: impl Fn(&Stretch) -> f64) -> (&Stretch, (&'static str, f64, &'static str)) {
    let later = |best, next| if figure(next) > figure(best) { next } else { best };
    let stretch = stretches.iter().reduce(later).expect("the day has stretches");
    (stretch, ("from", stretch.from.hours().0, "h"))
}

fn running(stretches: &[Stretch], sheet: &mut Sheet) -> Watts {
    let (stretch, from) = highest(stretches, |stretch| stretch.real.0);
    Watts(sheet.line("demand.running_w", &RUNNING, &[from], stretch.real.0))
}

fn running_va(stretches: &[Stretch], sheet: &mut Sheet) -> VoltAmps {
    let (stretch, from) = highest(stretches, |stretch| stretch.running.apparent().0);
    let Power { real, reactive, distortion } = stretch.running;
    let values = [from, ("ΣP", real.0, "W"), ("ΣQ", reactive.0, "var"), ("ΣD", distortion.0, "VA")];
    VoltAmps(sheet.line("demand.running_va", &RUNNING_VA, &values, stretch.running.apparent().0))
}

fn together(stretches: &[Stretch], sheet: &mut Sheet) -> VoltAmps {
    let (stretch, from) = highest(stretches, |stretch| stretch.together.0);
    let values = [from, ("S", stretch.running.apparent().0, "VA")];
    VoltAmps(sheet.line("demand.surge_together_va", &TOGETHER, &values, stretch.together.0))
}

fn staggered(stretches: &[Stretch], sheet: &mut Sheet) -> VoltAmps {
    let (stretch, from) = highest(stretches, |stretch| stretch.staggered.0);
    let hardest = day::hardest(stretch.starts.iter().filter(|need| need.is_surge()).copied());
    let parts = hardest.map(|need| [("rest", need.rest.apparent().0, "VA"), ("start", need.start.apparent().0, "VA")]);
    let values: Vec<_> = [from].into_iter().chain(parts.into_iter().flatten()).collect();
    VoltAmps(sheet.line("demand.surge_staggered_va", &STAGGERED, &values, stretch.staggered.0))
}

fn outage_energy(day: &[DayStretch], start: Hours, autonomy: Hours, sheet: &mut Sheet) -> WattHours {
    let values = [("start", start.0, "h"), ("t", autonomy.0, "h")];
    WattHours(sheet.line("demand.outage_wh", &OUTAGE, &values, outage::energy(day, start, autonomy).0))
}

fn average_outage(day: &[DayStretch], autonomy: Hours, sheet: &mut Sheet) -> WattHours {
    let energy = outage::day_energy(day);
    let values = [("E_day", energy.0, "Wh"), ("t", autonomy.0, "h")];
    WattHours(sheet.line("demand.average_outage_wh", &AVERAGE, &values, energy.0 * autonomy.0 / 24.0))
}

/// The hardest start of each load over the day, in the order of the rows.
fn hardest_starts(stretches: &[Stretch], rows: usize) -> Vec<StartNeed> {
    let mut hardest: Vec<Option<StartNeed>> = vec![None; rows];
    for need in stretches.iter().flat_map(|stretch| &stretch.starts) {
        let best = &mut hardest[need.row];
        *best = day::hardest(best.iter().copied().chain([*need]));
    }
    hardest.into_iter().flatten().collect()
}

/// Loads that a life hangs on, and motors whose plate leaves their start open.
fn warn_of_loads(survey: &Survey, sheet: &mut Sheet) {
    for load in &survey.loads {
        if load.life_support != LifeSupport::No {
            sheet.find(Finding::MedicalLoad { load: load.name.clone(), kind: load.life_support });
        }
        if load.motor_plate.is_some_and(motors::leaves_start_open) {
            sheet.find(Finding::CodeLetterOpen { load: load.name.clone() });
        }
    }
}
