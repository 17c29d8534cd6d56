//! What each load costs: the hours that the bank would last longer without it.

use super::cut::Course;
use super::day::{DAY, Day};
use super::plant::Plant;
use crate::sizing::load_survey;
use crate::sizing::proof::LoadCost;
use crate::sizing::survey::{Load, TimeOfDay, Window};
use crate::sizing::{Design, Survey};
use crate::units::Hours;

/// No runtime is told beyond this.
pub const LONGEST: f64 = 7.0 * DAY;
/// When the network is loaded most and people are at home, in minutes since midnight.
const EVENING: (u16, u16) = (17 * 60, 22 * 60);

/// How long the bank of a design lasts with some of its loads, at the end of its life on the coldest day,
/// from the start it is sized for; no longer than a week.
pub fn runtime_with(survey: &Survey, design: &Design, keeps: impl Fn(usize) -> bool) -> Hours {
    let rows = survey.loads.iter().enumerate().filter(|(row, _)| keeps(*row));
    let loads: Vec<_> = rows.map(|(_, load)| load.clone()).collect();
    Hours(Bench::new(survey, design).runtime(loads))
}

/// What each load costs, dearest first.
pub fn costs(survey: &Survey, design: &Design) -> Vec<LoadCost> {
    let bench = Bench::new(survey, design);
    let whole = bench.runtime(survey.loads.clone());
    let cost = |(row, load): (usize, &Load)| {
        let mut others = survey.loads.clone();
        others.remove(row);
        let off = bench.runtime(others) - whole;
        let moved = out_of_evening(&load.windows).map(|windows| {
            let mut loads = survey.loads.clone();
            loads[row].windows = windows;
            Hours((bench.runtime(loads) - whole).max(0.0))
        });
        LoadCost { load: load.name.clone(), row, off: Hours(off.max(0.0)), out_of_evening: moved }
    };
    let mut costs: Vec<_> = survey.loads.iter().enumerate().map(cost).collect();
    costs.sort_by(|one, other| other.off.order(&one.off));
    costs
}

/// A bank that loads are tried on.
struct Bench<'a> {
    survey: &'a Survey,
    design: &'a Design,
    plant: Plant,
}

impl<'a> Bench<'a> {
    fn new(survey: &'a Survey, design: &'a Design) -> Self {
        Self { survey, design, plant: Plant::of(survey, design).0 }
    }

    fn runtime(&self, loads: Vec<Load>) -> f64 {
        let survey = Survey { loads, ..self.survey.clone() };
        let day = Day::of(&load_survey::averages(&survey, &self.design.assumptions), &self.design.inverter.losses);
        let battery = self.plant.battery(self.design.bank.installed, Plant::ruling(self.survey));
        Course::new(battery, &day).lasts(self.design.demand.sized_start.hours().0, LONGEST).served
    }
}

/// The windows without the evening; `None` where they do not touch it, or lie wholly in it.
fn out_of_evening(windows: &[Window]) -> Option<Vec<Window>> {
    let (from, to) = EVENING;
    let pieces = windows.iter().flat_map(|window| {
        let (begins, ends) = (window.from.minutes(), window.to.minutes());
        if begins < ends { vec![(begins, ends)] } else { vec![(begins, 1440), (0, ends)] }
    });
    let touched = pieces.clone().any(|(begins, ends)| begins < to && ends > from);
    let left = pieces.flat_map(|(begins, ends)| [(begins, ends.min(from)), (begins.max(to), ends)]);
    let left: Vec<_> = left.filter(|(begins, ends)| begins < ends).filter_map(window).collect();
    (touched && !left.is_empty()).then_some(left)
}

fn window((from, to): (u16, u16)) -> Option<Window> {
    Some(Window { from: TimeOfDay::from_minutes(from)?, to: TimeOfDay::from_minutes(to)? })
}
