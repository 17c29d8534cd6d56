//! A year of cuts, played many times.
//!
//! Each year has a stream of its own in one seeded generator, so that it comes out the same whoever plays
//! it: one thread or two, in whatever order.

use std::ops::Range;
use std::sync::atomic::{AtomicBool, AtomicU32, Ordering};

use rand_chacha::ChaCha8Rng;
use rand_chacha::rand_core::SeedableRng;
use rand_distr::{Distribution, StandardUniform};

use super::cut::Course;
use super::day::{DAY, Day};
use super::law::{Law, YEAR};
use super::offs::{self, Off};
use super::passage::Passage;
use super::plant::{Condition, NEW, Plant};
use super::recharge::Charging;
use crate::sizing::proof::{RestsOn, Year, YearTold};
use crate::sizing::{Design, Survey};
use crate::units::Hours;

/// The generator's algorithm.
pub const GENERATOR: &str = "ChaCha, 8 rounds, one stream a year";
/// How coarse the steps of a year may be.
const COARSE: f64 = 1e-3;

/// Cuts that an answer without a page plays at most, in all its years.
const CUTS: f64 = 1e6;

/// How many years are enough for an answer without a page: a thousand, fewer where cuts are very many.
pub fn enough(survey: &Survey) -> u32 {
    let per_year = if survey.outage.pattern.blocks.is_empty() {
        Law::of(survey).0.per_year()
    } else {
        survey.outage.pattern.blocks.len() as f64 * YEAR / DAY
    };
    (CUTS / per_year.max(1.0)).clamp(100.0, 1000.0) as u32
}

/// What the years of a survey rest on.
pub fn rests_on(survey: &Survey) -> RestsOn {
    if survey.outage.pattern.blocks.is_empty() { Law::of(survey).1 } else { RestsOn::Schedule }
}

/// What one year came to, in one state of the bank.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Tally {
    /// Cuts.
    pub cuts: u32,
    /// Cuts in which the bank ran dry.
    pub run_outs: u32,
    /// Hours without mains.
    pub off: f64,
    /// Hours without mains and without the bank.
    pub unserved: f64,
    /// Lowest share of the charge.
    pub lowest: f64,
    /// Whole discharges.
    pub full_cycles: f64,
}

/// Everything that a year needs; the same for all of them.
pub struct Years<'a> {
    survey: &'a Survey,
    design: &'a Design,
    law: Law,
    rests_on: RestsOn,
    first: Passage<'a>,
    last: Passage<'a>,
    seed: u64,
}

impl<'a> Years<'a> {
    /// The years of a design; `day` is [`Day::of`] its demand.
    pub fn new(survey: &'a Survey, design: &'a Design, day: &'a Day, seed: u64) -> Self {
        let (plant, _) = Plant::of(survey, design);
        let law = Law::of(survey).0;
        let charging = Charging::of(survey, design, day);
        let passage = |condition: Condition| Passage {
            course: Course::new(plant.battery(design.bank.installed, condition), day).in_steps_of(COARSE),
            charging: charging.clone(),
        };
        Self {
            survey,
            design,
            law,
            rests_on: rests_on(survey),
            first: passage(NEW),
            last: passage(Plant::ruling(survey)),
            seed,
        }
    }

    /// Plays some of the years: the bank new, and at the end of its life. `None` when it was stopped.
    ///
    /// Looks at `stop` before every year, and counts each one that is over in `done`.
    pub fn play(&self, years: Range<u32>, stop: &AtomicBool, done: &AtomicU32) -> Option<Vec<[Tally; 2]>> {
        let mut tallies = Vec::with_capacity(years.len());
        for year in years {
            if stop.load(Ordering::Relaxed) {
                return None;
            }
            let offs = self.offs(year);
            tallies.push([tally(&self.first, &offs), tally(&self.last, &offs)]);
            done.fetch_add(1, Ordering::Relaxed);
        }
        Some(tallies)
    }

    /// The hours without mains of one year.
    fn offs(&self, year: u32) -> Vec<Off> {
        let mut random = ChaCha8Rng::seed_from_u64(self.seed);
        random.set_stream(u64::from(year));
        let mut offs =
            if self.rests_on == RestsOn::Schedule { self.announced(&mut random) } else { self.law.draw(&mut random) };
        if self.survey.outage.pattern.low_voltage.0 > 0.0 {
            let days = 0..(YEAR / DAY) as u32;
            offs.extend(days.filter_map(|day| offs::low_voltage_of(self.survey, self.design, day)));
        } else if self.rests_on != RestsOn::Schedule {
            return offs;
        }
        offs::merged(offs, YEAR)
    }

    /// The announced blocks of a year; each runs over its end by any part of the overrun.
    fn announced(&self, random: &mut ChaCha8Rng) -> Vec<Off> {
        let overrun = self.design.assumptions.block_overrun_h;
        let days = 0..(YEAR / DAY) as u32;
        let blocks = days.flat_map(|day| offs::blocks_of(self.survey, &self.design.assumptions, day));
        blocks
            .map(|block| {
                let part: f64 = StandardUniform.sample(random);
                Off { to: block.to - overrun * part, ..block }
            })
            .collect()
    }

    /// What the years say together; their order does not matter to what comes out as long as it is kept.
    pub fn told(&self, tallies: &[[Tally; 2]]) -> Year {
        let of = |state: usize| told(tallies.iter().map(|tally| tally[state]).collect());
        Year {
            years: tallies.len() as u32,
            seed: self.seed,
            generator: GENERATOR,
            rests_on: self.rests_on.clone(),
            first: of(0),
            last: of(1),
        }
    }
}

fn tally(passage: &Passage, offs: &[Off]) -> Tally {
    let full = passage.course.battery.wells.full;
    let mut tally = Tally { lowest: 1.0, ..Tally::default() };
    passage.play(offs, |cut| {
        tally.cuts += 1;
        tally.run_outs += u32::from(cut.ran_out());
        tally.off += cut.off.to - cut.off.from;
        tally.unserved += cut.unserved();
        tally.lowest = tally.lowest.min((cut.before.total - cut.taken) / full);
        tally.full_cycles += cut.taken / full;
    });
    tally
}

fn told(tallies: Vec<Tally>) -> YearTold {
    let years = (tallies.len() as f64).max(1.0);
    let mean = |figure: &dyn Fn(&Tally) -> f64| tallies.iter().map(figure).sum::<f64>() / years;
    let (cuts, run_outs) = (mean(&|tally| f64::from(tally.cuts)), mean(&|tally| f64::from(tally.run_outs)));
    let mut lowest: Vec<_> = tallies.iter().map(|tally| tally.lowest).collect();
    lowest.sort_by(f64::total_cmp);
    let at = |share: f64| lowest.get(((years - 1.0) * share).round() as usize).copied().unwrap_or(1.0);
    YearTold {
        cuts_per_year: cuts,
        run_outs_per_year: run_outs,
        run_outs_interval: interval(&tallies, run_outs, years),
        ridden_through: if cuts > 0.0 { 1.0 - run_outs / cuts } else { 1.0 },
        unserved: Hours(mean(&|tally| tally.unserved)),
        lowest_charge: [at(0.05), at(0.5), at(0.95)],
        full_cycles_per_year: mean(&|tally| tally.full_cycles),
    }
}

/// The 95 % interval of the mean: by the normal law, and by the rule of three where nothing was seen.
fn interval(tallies: &[Tally], mean: f64, years: f64) -> (f64, f64) {
    if mean == 0.0 {
        return (0.0, 3.0 / years);
    }
    let squares: f64 = tallies.iter().map(|tally| (f64::from(tally.run_outs) - mean).powi(2)).sum();
    let half = 1.96 * (squares / (years - 1.0).max(1.0) / years).sqrt();
    ((mean - half).max(0.0), mean + half)
}
