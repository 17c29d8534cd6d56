//! The sized cut in a few steps, for the picture and the table under it: both show these figures.

use crate::quotes::sheet::CutStretch;
use crate::simulation::cut::Course;
use crate::simulation::day::Day;
use crate::simulation::plant::{NEW, Plant};
use crate::sizing::design::DayStretch;
use crate::sizing::proof::EndedBy;
use crate::sizing::{Design, Survey};
use crate::units::Watts;

/// Lengths of a step, in hours; the first that needs no more than [`MOST_STEPS`] is taken.
const STEPS_H: [f64; 7] = [0.25, 0.5, 1.0, 2.0, 3.0, 6.0, 12.0];
const MOST_STEPS: f64 = 12.0;

/// The cut from its start to its end, with a new battery at 25 °C, as it is played.
///
/// One entry per step, in order; the last one may be shorter.
pub fn cut(survey: &Survey, design: &Design) -> Vec<CutStretch> {
    let start = design.demand.sized_start.hours().0;
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    let course = Course::new(Plant::of(survey, design).0.battery(design.bank.installed, NEW), &day);
    let mut charge = course.battery.wells.filled();
    let mut runs = true;
    let stretch = |(from_h, to_h): (f64, f64)| {
        let average = integral(&design.demand.day, start + from_h, start + to_h, |output| output.0);
        runs = runs && course.play(&mut charge, start + from_h, to_h - from_h).by == EndedBy::CutEnds;
        CutStretch {
            from_h,
            to_h,
            average_w: average / (to_h - from_h),
            left_share: (charge.total / course.battery.wells.full).clamp(0.0, 1.0),
        }
    };
    steps(survey.outage.autonomy.0).into_iter().map(stretch).collect()
}

/// Even steps from nothing to the end; none if there is no time at all.
fn steps(autonomy: f64) -> Vec<(f64, f64)> {
    let step = STEPS_H.into_iter().find(|step| autonomy / step <= MOST_STEPS).unwrap_or(STEPS_H[6]);
    let count = (autonomy / step).ceil() as u32;
    (0..count).map(|n| (f64::from(n) * step, (f64::from(n + 1) * step).min(autonomy))).collect()
}

/// Power over time between two hours counted from a midnight; the day repeats itself.
fn integral(day: &[DayStretch], from: f64, to: f64, power: impl Fn(Watts) -> f64) -> f64 {
    let days = (to / 24.0).ceil() as u32;
    (0..days)
        .flat_map(|n| day.iter().map(move |stretch| (24.0 * f64::from(n), stretch)))
        .map(|(midnight, stretch)| {
            let begins = (midnight + stretch.from.hours().0).max(from);
            let ends = (midnight + stretch.to.hours().0).min(to);
            (ends - begins).max(0.0) * power(stretch.average)
        })
        .fold(0.0, |energy, part| energy + part)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::survey::TimeOfDay;
    use crate::units::VoltAmps;

    fn stretch(from: u16, to: u16, watts: f64) -> DayStretch {
        let time = |hours: u16| TimeOfDay::from_minutes(hours * 60).unwrap();
        DayStretch {
            from: time(from),
            to: time(to),
            average: Watts(watts),
            peak: Watts(watts),
            peak_va: VoltAmps(watts),
        }
    }

    #[test]
    fn power_is_summed_over_midnight() {
        let day = [stretch(0, 6, 50.0), stretch(6, 18, 100.0), stretch(18, 24, 200.0)];
        for (from, to, watt_hours) in [
            (0.0, 6.0, 300.0),
            (18.0, 24.0, 1200.0),
            (22.0, 28.0, 400.0 + 200.0),
            (0.0, 48.0, 2.0 * (300.0 + 1200.0 + 1200.0)),
            (5.5, 6.5, 25.0 + 50.0),
        ] {
            assert!((integral(&day, from, to, |watts| watts.0) - watt_hours).abs() < 1e-9, "{from} to {to}");
        }
    }

    #[test]
    fn the_steps_cover_the_cut_without_gaps() {
        for autonomy in [0.25, 1.0, 4.0, 6.5, 12.0, 13.0, 25.0, 72.0] {
            let steps = steps(autonomy);
            assert!(steps.len() <= 12, "{autonomy} h: {} steps", steps.len());
            assert_eq!(steps[0].0, 0.0);
            assert_eq!(steps[steps.len() - 1].1, autonomy);
            assert!(steps.windows(2).all(|pair| pair[0].1 == pair[1].0));
        }
    }
}
