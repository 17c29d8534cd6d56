//! What the loads ask for: power that runs together, energy of the cut, starts.
//!
//! Power is summed with no diversity: everything that may be on in a stretch of the day is on.
//! Energy uses the duties.

mod day;
mod items;
pub mod outage;
mod power;

pub use items::turns;
pub use outage::cuts;
pub use power::Power;

use super::assumptions::Assumptions;
use super::design::{DayStretch, Demand, StartNeed};
use super::finding::Finding;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::{LifeSupport, MotorPlate, StartsAt, Survey};
use crate::units::{Hours, VoltAmps, WattHours, Watts};
use day::Stretch;
use items::Item;

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
    formula: "S_together = max over the day of |Σ running + Σ starting|",
    unit: "VA",
    source: "every motor restarts by itself at the changeover after a break of more than about 0.1 s",
    checked: Checked::CommonPractice,
};

const STAGGERED: Rule = Rule {
    symbol: "S_staggered",
    name: "One motor starting at a time, the rest running",
    formula: "S_staggered = max over the day and the motors of |Σ running − running_i + starting_i|",
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
    let day: Vec<_> = stretches.iter().map(day_stretch).collect();
    let autonomy = survey.outage.autonomy;
    let (worst, worst_energy) = outage::worst_start(&day, autonomy);
    let (sized, energy) = match survey.outage.starts_at {
        StartsAt::Worst => (outage::minute(worst), worst_energy),
        StartsAt::At(time) => (time, outage::energy(&day, time.hours(), autonomy)),
    };
    Demand {
        running: running(&stretches, sheet),
        running_va: running_va(&stretches, sheet),
        surge_together: starting(&TOGETHER, "demand.surge_together_va", &stretches, |s| s.together, sheet),
        surge_staggered: starting(&STAGGERED, "demand.surge_staggered_va", &stretches, |s| s.staggered, sheet),
        outage: outage_energy(energy, sized.hours(), autonomy, sheet),
        worst_start: outage::minute(worst),
        sized_start: sized,
        average_outage: average_outage(&day, autonomy, sheet),
        starts: start_needs(&items, &stretches),
        day,
    }
}

fn day_stretch(stretch: &Stretch) -> DayStretch {
    DayStretch {
        from: stretch.from,
        to: stretch.to,
        average: stretch.average,
        peak: stretch.running.real,
        peak_va: stretch.running.apparent(),
    }
}

fn running(stretches: &[Stretch], sheet: &mut Sheet) -> Watts {
    let highest = stretches.iter().map(|stretch| stretch.running.real).fold(Watts::ZERO, Watts::max);
    Watts(sheet.line("demand.running_w", &RUNNING, &[], highest.0))
}

fn running_va(stretches: &[Stretch], sheet: &mut Sheet) -> VoltAmps {
    let highest = stretches.iter().max_by(|a, b| a.running.apparent().order(&b.running.apparent()));
    let power = highest.map_or_else(Power::default, |stretch| stretch.running);
    let values = [("ΣP", power.real.0, "W"), ("ΣQ", power.reactive.0, "var"), ("ΣD", power.distortion.0, "VA")];
    VoltAmps(sheet.line("demand.running_va", &RUNNING_VA, &values, power.apparent().0))
}

fn starting(
    rule: &Rule,
    figure: &'static str,
    stretches: &[Stretch],
    part: fn(&Stretch) -> VoltAmps,
    sheet: &mut Sheet,
) -> VoltAmps {
    let highest = stretches.iter().map(part).fold(VoltAmps::ZERO, VoltAmps::max);
    VoltAmps(sheet.line(figure, rule, &[], highest.0))
}

fn outage_energy(energy: WattHours, start: Hours, autonomy: Hours, sheet: &mut Sheet) -> WattHours {
    let values = [("start", start.0, "h"), ("t", autonomy.0, "h")];
    WattHours(sheet.line("demand.outage_wh", &OUTAGE, &values, energy.0))
}

fn average_outage(day: &[DayStretch], autonomy: Hours, sheet: &mut Sheet) -> WattHours {
    let energy = outage::day_energy(day);
    let values = [("E_day", energy.0, "Wh"), ("t", autonomy.0, "h")];
    WattHours(sheet.line("demand.average_outage_wh", &AVERAGE, &values, energy.0 * autonomy.0 / 24.0))
}

/// The hardest start of each motor over the day, in the order of the rows.
fn start_needs(items: &[Item], stretches: &[Stretch]) -> Vec<StartNeed> {
    let need = |item: &Item| {
        let start = item.start.filter(|_| item.load.start.is_motor())?;
        let hardest = stretches.iter().filter_map(|stretch| stretch.start_of(item));
        let hardest = hardest.max_by(|a, b| a.apparent().order(&b.apparent()))?;
        Some(StartNeed { row: item.row, start: start.apparent(), needed: hardest.apparent(), needed_w: hardest.real })
    };
    let mut needs: Vec<_> = items.iter().filter_map(need).collect();
    needs.sort_by_key(|need| need.row);
    needs
}

/// Loads that a life hangs on, and motors whose plate leaves their start open.
fn warn_of_loads(survey: &Survey, sheet: &mut Sheet) {
    for load in &survey.loads {
        if load.life_support != LifeSupport::No {
            sheet.find(Finding::MedicalLoad { load: load.name.clone(), kind: load.life_support });
        }
        if matches!(load.motor_plate, Some(MotorPlate::CodeLetter { letter: 'V', .. })) {
            sheet.find(Finding::CodeLetterOpen { load: load.name.clone() });
        }
    }
}
