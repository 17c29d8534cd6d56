//! The hours without mains, one after the other: announced, or as often and as long as answered.

use super::day::DAY;
use crate::sizing::{Assumptions, Design, Survey};

/// A time without mains, in hours since the first midnight.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Off {
    /// When the mains goes.
    pub from: f64,
    /// When it is back.
    pub to: f64,
}

/// Days of the schedule that is always played.
pub const DAYS: u32 = 28;

/// Four weeks of cuts: the announced blocks, or the cuts of a week spread over its days, those of one day
/// one behind the other with the mains between them that was found. The first of a week is the longest.
///
/// Hours of low voltage count as hours without mains: the unit does not take what lies outside its
/// window. They are laid half a day from the cut.
pub fn weeks(survey: &Survey, design: &Design) -> Vec<Off> {
    let days = 0..DAYS;
    let mut offs: Vec<_> = if survey.outage.pattern.blocks.is_empty() {
        spread(survey, design.demand.sized_start.hours().0)
    } else {
        days.clone().flat_map(|day| blocks_of(survey, &design.assumptions, day)).collect()
    };
    offs.extend(days.flat_map(|day| low_voltage_of(survey, design, day)));
    merged(offs, f64::from(DAYS) * DAY)
}

/// The announced blocks of a day with their overrun; they move on from day to day.
pub fn blocks_of(survey: &Survey, assumptions: &Assumptions, day: u32) -> Vec<Off> {
    let pattern = &survey.outage.pattern;
    let midnight = f64::from(day) * DAY;
    let moved = pattern.blocks_shift.0 * f64::from(day);
    let block = |window: &crate::sizing::survey::Window| {
        let (from, to) = (window.from.hours().0, window.to.hours().0);
        let lasts = if to > from { to - from } else { to - from + DAY };
        let from = midnight + (from + moved).rem_euclid(DAY);
        Off { from, to: from + lasts + assumptions.block_overrun_h }
    };
    pattern.blocks.iter().map(block).collect()
}

/// Hours of a day in which the mains is outside the unit's window.
pub fn low_voltage_of(survey: &Survey, design: &Design, day: u32) -> Option<Off> {
    let hours = survey.outage.pattern.low_voltage.0;
    let from = f64::from(day) * DAY + (design.demand.sized_start.hours().0 + DAY / 2.0).rem_euclid(DAY);
    (hours > 0.0).then_some(Off { from, to: from + hours })
}

fn spread(survey: &Survey, start: f64) -> Vec<Off> {
    let outage = &survey.outage;
    let a_day = outage.cuts_per_week / 7.0;
    let usual = outage.pattern.usual.unwrap_or(outage.autonomy).0;
    let longest = outage.pattern.longest.map_or(usual, |longest| longest.0);
    let mut offs: Vec<Off> = Vec::new();
    let mut week_of_longest = None;
    for day in 0..DAYS {
        let until = |days: u32| (f64::from(days) * a_day).ceil();
        for _ in 0..(until(day + 1) - until(day)) as u32 {
            let first_of_week = week_of_longest != Some(day / 7);
            week_of_longest = Some(day / 7);
            let earliest = offs.last().map_or(0.0, |last| last.to + outage.mains_between_cuts.0);
            let from = earliest.max(f64::from(day) * DAY + start);
            offs.push(Off { from, to: from + if first_of_week { longest } else { usual } });
        }
    }
    offs
}

/// In the order of time, those that meet made one, up to an end.
pub fn merged(mut offs: Vec<Off>, end: f64) -> Vec<Off> {
    offs.sort_by(|one, other| one.from.total_cmp(&other.from));
    let mut merged: Vec<Off> = Vec::with_capacity(offs.len());
    for off in offs.into_iter().filter(|off| off.from < end) {
        let to = off.to.min(end);
        match merged.last_mut() {
            Some(last) if off.from <= last.to => last.to = last.to.max(to),
            _ => merged.push(Off { from: off.from, to }),
        }
    }
    merged
}
