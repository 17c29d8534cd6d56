//! A cut laid over the day: its energy from any start, and the start that costs most.

use crate::sizing::design::{DayStretch, Demand};
use crate::sizing::survey::{StartsAt, Survey, TimeOfDay};
use crate::units::{Hours, WattHours, Watts};

const DAY: f64 = 24.0;

/// The cuts that the bank must carry, each as average power and length, in the order of time: one
/// where the start was asked for, one for each start that may be the worst where it was not.
pub fn cuts(survey: &Survey, demand: &Demand) -> Vec<Vec<(Watts, Hours)>> {
    let autonomy = survey.outage.autonomy;
    starts(survey, demand).into_iter().map(|start| steps(&demand.day, start, autonomy)).collect()
}

/// When those cuts begin, in hours since midnight.
pub fn starts(survey: &Survey, demand: &Demand) -> Vec<Hours> {
    match survey.outage.starts_at {
        StartsAt::At(time) => vec![time.hours()],
        StartsAt::Worst => candidate_starts(&demand.day, survey.outage.autonomy),
    }
}

/// The starts among which the worst one is.
///
/// The energy of a cut, as any sum over its steps of a length times a function of the power, is
/// piecewise linear in its start: it bends only where the start or the end of the cut meets a boundary
/// of the day, so its greatest value lies at such a start.
pub fn candidate_starts(day: &[DayStretch], autonomy: Hours) -> Vec<Hours> {
    let boundaries = day.iter().map(|stretch| stretch.from.hours());
    let mut starts: Vec<_> = boundaries.flat_map(|at| [at, Hours((at.0 - autonomy.0).rem_euclid(DAY))]).collect();
    starts.sort_by(Hours::order);
    starts.dedup();
    starts
}

/// Average power and length of each step of a cut, in the order of time; equal neighbours are one.
pub fn steps(day: &[DayStretch], start: Hours, autonomy: Hours) -> Vec<(Watts, Hours)> {
    let about = (autonomy.0 / DAY * day.len() as f64) as usize;
    let mut steps: Vec<(Watts, Hours)> = Vec::with_capacity(about + 2);
    let mut index = stretch_at(day, start);
    let (mut now, mut left) = (start, autonomy);
    while left > Hours::ZERO {
        let stretch = &day[index];
        let lasts = (stretch.to.hours() - now).min(left);
        match steps.last_mut() {
            Some((power, length)) if *power == stretch.average => *length = *length + lasts,
            _ if lasts > Hours::ZERO => steps.push((stretch.average, lasts)),
            _ => {}
        }
        left = left - lasts;
        index = (index + 1) % day.len();
        now = day[index].from.hours();
    }
    steps
}

/// The stretch that a moment falls in.
fn stretch_at(day: &[DayStretch], moment: Hours) -> usize {
    day.partition_point(|stretch| stretch.from.hours() <= moment).saturating_sub(1)
}

/// Energy of a cut from a start.
pub fn energy(day: &[DayStretch], start: Hours, autonomy: Hours) -> WattHours {
    let days = (autonomy.0 / DAY).floor();
    let part = steps(day, start, Hours(autonomy.0 - days * DAY));
    day_energy(day) * days + part.into_iter().map(|(power, length)| power * length).sum()
}

/// Energy of a whole day.
pub fn day_energy(day: &[DayStretch]) -> WattHours {
    day.iter().map(|stretch| stretch.average * (stretch.to.hours() - stretch.from.hours())).sum()
}

/// The start that costs most energy; the earliest of equals.
pub fn worst_start(day: &[DayStretch], autonomy: Hours) -> Hours {
    let meter = Meter::new(day);
    let hair = meter.day().0 * 1e-12;
    let mut worst = (Hours::ZERO, -1.0);
    for start in candidate_starts(day, autonomy) {
        let energy = meter.between(start, Hours(autonomy.0.rem_euclid(DAY))).0;
        if energy > worst.1 + hair {
            worst = (start, energy);
        }
    }
    worst.0
}

/// Energy counted from midnight, so that a cut costs two readings, however many stretches it covers.
struct Meter<'a> {
    day: &'a [DayStretch],
    /// Energy from midnight to the beginning of each stretch, and of the whole day at the end.
    readings: Vec<WattHours>,
}

impl<'a> Meter<'a> {
    fn new(day: &'a [DayStretch]) -> Self {
        let mut readings = vec![WattHours::ZERO];
        for stretch in day {
            let before = readings[readings.len() - 1];
            readings.push(before + stretch.average * (stretch.to.hours() - stretch.from.hours()));
        }
        Self { day, readings }
    }

    fn day(&self) -> WattHours {
        self.readings[self.day.len()]
    }

    fn until(&self, moment: Hours) -> WattHours {
        let index = stretch_at(self.day, moment);
        self.readings[index] + self.day[index].average * (moment - self.day[index].from.hours())
    }

    fn between(&self, start: Hours, length: Hours) -> WattHours {
        let end = start + length;
        if end.0 <= DAY {
            self.until(end) - self.until(start)
        } else {
            self.day() - self.until(start) + self.until(Hours(end.0 - DAY))
        }
    }
}

/// The minute of the day that a moment falls in.
pub fn minute(moment: Hours) -> TimeOfDay {
    let minutes = (moment.0 * 60.0).round().rem_euclid(24.0 * 60.0);
    TimeOfDay::from_minutes(minutes as u16).unwrap_or(TimeOfDay::MIDNIGHT)
}
