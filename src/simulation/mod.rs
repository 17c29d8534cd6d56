//! The proof: cuts played through on the bank that the formulas offer.
//!
//! A formula promises; this plays the cut and sees. A kinetic battery in closed form, behind its volts,
//! gives the day's powers until the mains is back or nothing is left. The same bank is then filled and
//! emptied for four weeks, and for as many years as are wanted. Pure functions all of them: no clock, no
//! chance but a seeded one, no threads of their own.
//!
//! `day` and `plant` hold what is played with; `wells` and `battery` the physics; `cut` plays one cut,
//! `passage` one after the other; `cases`, `need`, `weeks`, `year` and `costs` ask the questions.

pub mod battery;
pub mod cases;
pub mod costs;
pub mod cut;
pub mod day;
pub mod law;
pub mod need;
pub mod offs;
pub mod passage;
pub mod plant;
pub mod recharge;
mod told;
pub mod weeks;
pub mod wells;
pub mod year;

use std::sync::atomic::{AtomicBool, AtomicU32};

use cases::Bench;
use day::Day;
use passage::Passage;
use plant::{NEW, Plant};
use recharge::Charging;
use year::Years;

use crate::sizing::proof::{Detail, Proof, WellsShown};
use crate::sizing::{Assumptions, Design, Survey, size, size_for};
use crate::units::AmpHours;

/// Larger cables change what a larger bank needs, but no more than this often.
const ROUNDS: usize = 4;

/// The design of a survey, proved: the bank is raised until the ruling case passes, and what the cuts say
/// when they are played through stands beside it.
pub fn design(survey: &Survey, assumptions: Assumptions) -> Design {
    let mut design = size(survey, assumptions.clone());
    let mut just = just_enough(survey, &design);
    for _ in 0..ROUNDS {
        let Some(enough) = just.filter(|enough| *enough * assumptions.bank_margin > design.bank.required) else {
            break;
        };
        design = size_for(survey, Some(enough), assumptions.clone());
        just = just_enough(survey, &design).map(|next| next.max(enough));
    }
    prove(survey, design, just)
}

/// The design with how long it lasts from each hour of the day, and what each load costs.
pub fn with_detail(survey: &Survey, mut design: Design) -> Design {
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    let bench = Bench { survey, design: &design, plant: Plant::of(survey, &design).0, day: &day };
    let detail = Detail { by_hour: bench.by_hour(), costs: costs::costs(survey, &design) };
    if let Some(proof) = &mut design.proof {
        proof.detail = Some(detail);
    }
    design
}

/// The design with some years of its cuts played.
pub fn with_years(survey: &Survey, mut design: Design, years: u32, seed: u64) -> Design {
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    let played = Years::new(survey, &design, &day, seed);
    let tallies = played.play(0..years, &AtomicBool::new(false), &AtomicU32::new(0));
    let year = tallies.map(|tallies| played.told(&tallies));
    if let Some(proof) = &mut design.proof {
        proof.year = year;
    }
    design
}

fn just_enough(survey: &Survey, design: &Design) -> Option<AmpHours> {
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    Bench { survey, design, plant: Plant::of(survey, design).0, day: &day }.just_enough()
}

/// Plays the cuts on a design; `just` is the capacity that just lasts them, if any does.
fn prove(survey: &Survey, design: Design, just: Option<AmpHours>) -> Design {
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    let (plant, refused) = Plant::of(survey, &design);
    let bench = Bench { survey, design: &design, plant, day: &day };
    let ruling = Plant::ruling(survey);
    let (cases, start) = (bench.cases(), design.demand.sized_start);
    let (new, aged) = (bench.case(NEW, start), bench.case(ruling, start));
    let new_full = bench.course(NEW).battery.wells.full;
    let passage = Passage { course: bench.course(ruling), charging: Charging::of(survey, &design, &day) };
    let weeks = weeks::weeks(survey, &design, &passage, new_full);
    let proof = Proof {
        runtime_new: new.runtime,
        runtime_aged: aged.runtime,
        lowest: aged.lowest,
        holds: just.is_some_and(|just| just <= design.bank.installed),
        recovers: weeks.recovery == crate::sizing::proof::Recovery::FullBeforeNextCut,
        wells: WellsShown {
            full: AmpHours(new_full),
            at_hand_share: plant.kinetics.at_hand,
            rate_per_h: plant.kinetics.rate,
            from: plant.from,
        },
        cases,
        starts: bench.late_starts(ruling),
        curve: bench.curve(ruling),
        weeks,
        detail: None,
        year: None,
    };
    told::with(survey, design, proof, just, refused)
}
