//! The cut in its cases: new and aged, cold and warm, from the worst start and from the one asked for.

use super::costs::LONGEST;
use super::cut::{Course, Played};
use super::day::Day;
use super::plant::{Condition, NEW, Plant};
use crate::sizing::design::StartNeed;
use crate::sizing::proof::{Case, EndedBy, HourOfStart, LateStart, Moment};
use crate::sizing::survey::TimeOfDay;
use crate::sizing::{Design, Survey};
use crate::units::{AmpHours, Amps, Celsius, DcVolts, Hours, Watts};

/// A design on the bench.
#[derive(Clone, Copy)]
pub struct Bench<'a> {
    /// What was asked for.
    pub survey: &'a Survey,
    /// The answer.
    pub design: &'a Design,
    /// Unit, cable and battery of it.
    pub plant: Plant,
    /// What the unit draws over the day.
    pub day: &'a Day,
}

impl<'a> Bench<'a> {
    /// The bank in some condition with its day.
    pub fn course(&self, condition: Condition) -> Course<'a> {
        Course::new(self.plant.battery(self.design.bank.installed, condition), self.day)
    }

    fn autonomy(&self) -> f64 {
        self.survey.outage.autonomy.0
    }

    /// Every case: for each start new and aged, and for each age the coldest day, 25 °C and the hottest.
    pub fn cases(&self) -> Vec<Case> {
        let (demand, site) = (&self.design.demand, &self.survey.site);
        let mut starts = vec![demand.sized_start];
        if demand.worst_start != demand.sized_start {
            starts.push(demand.worst_start);
        }
        let warmths = [site.battery_coldest, Celsius(25.0), site.battery_hottest];
        let conditions = [false, true].into_iter().flat_map(|aged| warmths.map(|at| Condition { aged, at }));
        let conditions: Vec<_> = conditions.collect();
        starts.into_iter().flat_map(|start| conditions.iter().map(move |&state| self.case(state, start))).collect()
    }

    /// One case, played until the bank stops, or for a week.
    pub fn case(&self, condition: Condition, start: TimeOfDay) -> Case {
        let course = self.course(condition);
        let (from, autonomy) = (start.hours().0, self.autonomy());
        let mut charge = course.battery.wells.filled();
        let mut lowest = f64::INFINITY;
        let asked = course.play_seen(&mut charge, from, autonomy, |played| {
            lowest = lowest.min(self.lowest_of(&course, played));
        });
        let whole = if asked.served < autonomy { asked } else { course.lasts(from, LONGEST.max(autonomy)) };
        Case {
            health: self.plant.health(condition),
            battery: condition.at,
            start,
            runtime: Hours(whole.served),
            ended_by: whole.by,
            holds: asked.served >= autonomy,
            lowest: DcVolts(lowest),
            charge_left: (charge.total / course.battery.wells.full).clamp(0.0, 1.0),
        }
    }

    /// The volts of a constant power fall, or rise after a heavier one: the lowest are at one of its ends.
    fn lowest_of(&self, course: &Course, played: Played) -> f64 {
        let watts = self.day.stretches()[played.stretch].drawn;
        let volts = |charge| course.battery.sags_to(course.battery.wells.head(charge).max(0.0), watts);
        volts(played.before).min(volts(played.after))
    }

    /// A case moment by moment: its beginning, and the end of every stretch until the bank stops; a bank that
    /// lasts a week is shown over the cut asked for.
    pub fn curve(&self, condition: Condition) -> Vec<Moment> {
        let course = self.course(condition);
        let start = self.design.demand.sized_start.hours().0;
        let stops = course.lasts(start, LONGEST).by != EndedBy::CutEnds;
        let limit = if stops { LONGEST.max(self.autonomy()) } else { self.autonomy() };
        let mut moments: Vec<Moment> = Vec::new();
        let full = course.battery.wells.full;
        let moment = |at: f64, stretch: usize, before, charge| {
            let of = self.day.stretches()[stretch];
            let meets = |charge| course.battery.sags_to(course.battery.wells.head(charge).max(0.0), of.drawn);
            let volts = meets(charge);
            Moment {
                at: Hours(at),
                load: Watts(of.load),
                from: DcVolts(meets(before)),
                current: Amps(of.drawn / volts),
                volts: DcVolts(volts),
                charge_left: (charge.total / full).clamp(0.0, 1.0),
            }
        };
        let mut now = 0.0;
        course.play_seen(&mut course.battery.wells.filled(), start, limit, |played| {
            if moments.is_empty() {
                moments.push(moment(0.0, played.stretch, played.before, played.before));
            }
            if played.to > now {
                moments.push(moment(played.to, played.stretch, played.before, played.after));
            }
            now = played.to;
        });
        moments
    }

    /// Each motor at the last moment of the cut at which it may start.
    pub fn late_starts(&self, condition: Condition) -> Vec<LateStart> {
        let course = self.course(condition);
        let motors: Vec<_> = self.design.demand.starts.iter().filter(|need| need.kind.is_motor()).collect();
        let mut last: Vec<Option<(f64, f64)>> = vec![None; motors.len()];
        let (start, autonomy) = (self.design.demand.sized_start.hours().0, self.autonomy());
        course.play_seen(&mut course.battery.wells.filled(), start, autonomy, |played| {
            let begins = self.stretch_begins(played.stretch);
            for (need, last) in motors.iter().zip(&mut last) {
                if self.survey.loads[need.row].is_on_at(begins) {
                    let drawn = self.design.inverter.losses.drawn(need.needed().real).0;
                    let head = course.battery.wells.head(played.after).max(0.0);
                    *last = Some((played.to, course.battery.sags_to(head, drawn)));
                }
            }
        });
        let cut_off = self.design.bank.cut_off;
        let told = |(need, last): (&&StartNeed, Option<(f64, f64)>)| {
            let (at, lowest) = last?;
            let load = self.survey.loads[need.row].name.clone();
            Some(LateStart { load, at: Hours(at), lowest: DcVolts(lowest), starts: lowest >= cut_off.0 })
        };
        motors.iter().zip(last).filter_map(told).collect()
    }

    fn stretch_begins(&self, stretch: usize) -> TimeOfDay {
        let before = stretch.checked_sub(1).map_or(0.0, |before| self.day.stretches()[before].to);
        TimeOfDay::from_minutes((before * 60.0).round() as u16).unwrap_or(TimeOfDay::MIDNIGHT)
    }

    /// How long it lasts from each full hour of the day.
    pub fn by_hour(&self) -> Vec<HourOfStart> {
        let (new, aged) = (self.course(NEW), self.course(Plant::ruling(self.survey)));
        let hour = |hour: u16| HourOfStart {
            start: TimeOfDay::from_minutes(hour * 60).unwrap_or(TimeOfDay::MIDNIGHT),
            new: Hours(new.lasts(f64::from(hour), LONGEST).served),
            aged: Hours(aged.lasts(f64::from(hour), LONGEST).served),
        };
        (0..24).map(hour).collect()
    }

    /// Capacity at the reference rate that just lasts the cut in the ruling case, from every start that may
    /// be the worst.
    pub fn just_enough(&self) -> Option<AmpHours> {
        let hardest = self.design.demand.sized_start.hours();
        let others = crate::sizing::load_survey::starts(self.survey, &self.design.demand);
        let starts: Vec<_> = std::iter::once(hardest).chain(others).collect();
        let bank = &self.design.bank;
        let guess = bank.methods.section.min(bank.required) / self.design.assumptions.bank_margin;
        super::need::just_enough(
            &self.plant,
            self.day,
            &starts,
            self.survey.outage.autonomy,
            Plant::ruling(self.survey),
            guess,
        )
    }
}
