//! Four weeks of cuts: whether the bank is full again in time, and what is missing where it is not.

use super::day::DAY;
use super::offs::{self, DAYS, Off};
use super::passage::{Passage, Passed};
use super::wells::Charge;
use crate::sizing::proof::{DayOfCharge, Recovery, Weeks};
use crate::sizing::{Design, Survey};
use crate::units::{Amps, Hours};

/// A charger so many times the one that is set is searched for, no larger one.
const STRONGEST: f64 = 8.0;

/// Plays the four weeks; `new_full` is the charge of the new bank at 25 °C, Ah.
pub fn weeks(survey: &Survey, design: &Design, passage: &Passage, new_full: f64) -> Weeks {
    let offs = offs::weeks(survey, design);
    let mut passed = Vec::with_capacity(offs.len());
    passage.play(&offs, |cut| passed.push(*cut));
    let recovery = recovery(&passed);
    let missing_hours =
        passed.iter().filter_map(|cut| passage.charging.time_to_full(&passage.course.battery, cut.before));
    let depths = passed.iter().map(|cut| cut.taken / new_full);
    let cuts = passed.len() as u32;
    Weeks {
        recovery,
        missing_current: if recovery == Recovery::FullBeforeNextCut { None } else { missing_current(passage, &offs) },
        missing_hours: Hours(missing_hours.fold(0.0, f64::max)),
        cuts,
        run_outs: passed.iter().filter(|cut| cut.ran_out()).count() as u32,
        days: days(passage, &offs),
        depths: depths.collect(),
    }
}

fn recovery(passed: &[Passed]) -> Recovery {
    const WEEK: f64 = 7.0 * DAY;
    let last_week = passed.iter().filter(|cut| cut.off.from >= f64::from(DAYS) * DAY - WEEK);
    if passed.iter().any(|cut| cut.off.to - cut.off.from >= WEEK) {
        Recovery::NeverRecovers
    } else if passed.iter().all(|cut| cut.was_full) {
        Recovery::FullBeforeNextCut
    } else if last_week.clone().any(|cut| cut.was_full) || last_week.count() == 0 {
        Recovery::SlowlyLosing
    } else {
        Recovery::NeverRecovers
    }
}

/// How much stronger the charger must be set; none where no setting would do.
fn missing_current(passage: &Passage, offs: &[Off]) -> Option<Amps> {
    let set = passage.charging.setting;
    let recovers = |setting: f64| {
        let stronger = Passage { charging: passage.charging.set_to(Amps(setting)), course: passage.course.clone() };
        let mut full = true;
        stronger.play(offs, |cut| full &= cut.was_full);
        full
    };
    let mut enough = set * STRONGEST;
    if set <= 0.0 || !recovers(enough) {
        return None;
    }
    let mut short = set;
    while enough / short > 1.005 {
        let middle = (enough * short).sqrt();
        if recovers(middle) { enough = middle } else { short = middle }
    }
    Some(Amps(enough - set))
}

/// Lowest and highest charge of each day: while the mains is there it only rises, while it is away it only
/// falls, so every turn and every midnight is looked at.
fn days(passage: &Passage, offs: &[Off]) -> Vec<DayOfCharge> {
    let nothing = DayOfCharge { lowest: 1.0, highest: 0.0, off: Hours::ZERO };
    let mut days = vec![nothing; DAYS as usize];
    let full = passage.course.battery.wells.full;
    let mut look = |at: f64, charge: Charge| {
        let day = &mut days[((at / DAY) as usize).min(DAYS as usize - 1)];
        let share = charge.total / full;
        (day.lowest, day.highest) = (day.lowest.min(share), day.highest.max(share));
    };
    let battery = &passage.course.battery;
    let mut charge = battery.wells.filled();
    let mut now = 0.0;
    look(now, charge);
    let mut turns: Vec<Passed> = Vec::with_capacity(offs.len());
    passage.play(offs, |cut| turns.push(*cut));
    let end = f64::from(DAYS) * DAY;
    for cut in turns.iter().map(Some).chain([None]) {
        let until = cut.map_or(end, |cut| cut.off.from);
        while now < until {
            let next = ((now / DAY).floor() * DAY + DAY).min(until);
            passage.charging.fill(battery, &mut charge, passage.course.day, now, next - now);
            look(next - 1e-9, charge);
            look(next.min(end - 1e-9), charge);
            now = next;
        }
        let Some(cut) = cut else { break };
        look(cut.off.from, cut.before);
        let (first, over) = (cut.off.from, cut.off.to.min(end));
        let mut drawn = cut.before;
        passage
            .course
            .play_seen(&mut drawn, first, over - first, |played| look(first + played.to - 1e-9, played.after));
        charge = cut.after;
        now = (cut.off.to + passage.charging.wait).max(now);
        look((now - 1e-9).min(end - 1e-9), charge);
    }
    for off in offs {
        let mut from = off.from;
        while from < off.to {
            let day = (from / DAY) as usize;
            let to = off.to.min((day as f64 + 1.0) * DAY);
            if let Some(day) = days.get_mut(day) {
                day.off = day.off + Hours(to - from);
            }
            from = to;
        }
    }
    days
}
