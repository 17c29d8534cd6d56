//! How often the mains fails and for how long: an alternating renewal of mains and cuts.
//!
//! The time with mains is exponential at a rate that follows the hour of the day; the length of a cut is
//! lognormal, of one kind or of several.
//!
//! Source: total durations of outage events of four utilities are lognormal (Ahmad and Dobson, abstract);
//! indices by IEEE 1366.

use rand_chacha::ChaCha8Rng;
use rand_distr::{Distribution, Exp1, StandardNormal, StandardUniform};

use super::day::DAY;
use super::offs::Off;
use crate::sizing::Survey;
use crate::sizing::proof::RestsOn;
use crate::sizing::survey::Mostly;

/// Hours of a year.
pub const YEAR: f64 = 8766.0;
/// Weeks of a year.
const WEEKS: f64 = YEAR / 168.0;
/// The least mean time with mains between two cuts, where the answers leave none.
const LEAST_ON: f64 = 0.25;
/// Cuts a year from which a feeder is taken for one that is shed, whose lengths differ less.
const SHED_FROM: f64 = 26.0;
/// Spread of the logarithm on a feeder that is shed, and on one that fails in storms; our choice.
const SPREADS: (f64, f64) = (0.8, 1.2);

/// One kind of cut.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Kind {
    /// In a year.
    pub per_year: f64,
    /// Logarithm of the median length in hours.
    pub mu: f64,
    /// Spread of the logarithm.
    pub sigma: f64,
}

impl Kind {
    /// From the mean length and the spread of its logarithm.
    pub fn of_mean(per_year: f64, mean: f64, sigma: f64) -> Self {
        Self { per_year, mu: mean.ln() - sigma * sigma / 2.0, sigma }
    }

    fn mean(&self) -> f64 {
        (self.mu + self.sigma * self.sigma / 2.0).exp()
    }
}

/// The law of a site's cuts.
#[derive(Clone, Debug, PartialEq)]
pub struct Law {
    kinds: Vec<Kind>,
    /// Rate over its mean, hour by hour, summed up from midnight.
    rising: [f64; 25],
    /// Mean time with mains, h.
    on: f64,
}

impl Law {
    /// Kinds of cut with the hours in which most of them come.
    pub fn new(kinds: Vec<Kind>, mostly: Mostly) -> Self {
        let per_year: f64 = kinds.iter().map(|kind| kind.per_year).sum();
        let off: f64 = kinds.iter().map(|kind| kind.per_year * kind.mean()).sum::<f64>() / per_year.max(1e-9);
        let mut rising = [0.0; 25];
        let weights = weights(mostly);
        let mean = weights.iter().sum::<f64>() / DAY;
        for (hour, weight) in weights.iter().enumerate() {
            rising[hour + 1] = rising[hour] + weight / mean;
        }
        Self { kinds, rising, on: (YEAR / per_year.max(1e-9) - off).max(LEAST_ON) }
    }

    /// The law of the answers on a site, and what it rests on.
    pub fn of(survey: &Survey) -> (Self, RestsOn) {
        let pattern = &survey.outage.pattern;
        let from_answers = |per_year: f64| {
            let spread = if per_year >= SHED_FROM { SPREADS.0 } else { SPREADS.1 };
            let far = upper_quantile(1.0 / per_year.max(2.0));
            let (mu, sigma) = match (pattern.usual, pattern.longest) {
                (Some(usual), Some(longest)) => (usual.0.ln(), ((longest / usual).ln() / far).max(0.05)),
                (Some(usual), None) => (usual.0.ln(), spread),
                (None, longest) => (longest.unwrap_or(survey.outage.autonomy).0.ln() - spread * far, spread),
            };
            Kind { per_year, mu, sigma }
        };
        let (kinds, rests_on) = match pattern.region {
            Some(region) => {
                let kind = |kind: &crate::sizing::tables::outages::Kind| match kind.length {
                    Some((mean, sigma)) => Kind::of_mean(kind.per_year, mean.0, sigma),
                    None => from_answers(kind.per_year),
                };
                let kinds = region.cuts.iter().map(kind).collect();
                (kinds, RestsOn::Country { region: region.name, year: region.year })
            }
            None => (vec![from_answers(survey.outage.cuts_per_week * WEEKS)], RestsOn::Answers),
        };
        (Self::new(kinds, pattern.mostly), rests_on)
    }

    /// Cuts in a year, on average.
    pub fn per_year(&self) -> f64 {
        self.kinds.iter().map(|kind| kind.per_year).sum()
    }

    /// The cuts of a year.
    pub fn draw(&self, random: &mut ChaCha8Rng) -> Vec<Off> {
        let per_year = self.per_year();
        let mut offs = Vec::with_capacity((per_year * 1.2) as usize + 4);
        if per_year <= 0.0 {
            return offs;
        }
        let mut now: f64 = 0.0;
        loop {
            let waits: f64 = Exp1.sample(random);
            let from = now + self.after(now.rem_euclid(DAY), waits * self.on);
            if from >= YEAR {
                return offs;
            }
            let to = (from + self.length(random, per_year)).min(YEAR);
            offs.push(Off { from, to });
            now = to;
        }
    }

    fn length(&self, random: &mut ChaCha8Rng, per_year: f64) -> f64 {
        let mut kind = &self.kinds[0];
        if self.kinds.len() > 1 {
            let uniform: f64 = StandardUniform.sample(random);
            let mut left = uniform * per_year;
            for next in &self.kinds {
                kind = next;
                left -= next.per_year;
                if left < 0.0 {
                    break;
                }
            }
        }
        let normal: f64 = StandardNormal.sample(random);
        (kind.mu + kind.sigma * normal).exp()
    }

    /// Hours until the summed-up rate has grown by so much from an hour of the day on.
    fn after(&self, hour: f64, grown: f64) -> f64 {
        let (days, rest) = ((grown / DAY).floor(), grown.rem_euclid(DAY));
        let at = hour as usize % 24;
        let target = self.rising[at] + (self.rising[at + 1] - self.rising[at]) * (hour - hour.floor()) + rest;
        let (target, midnight) = if target >= DAY { (target - DAY, DAY) } else { (target, 0.0) };
        let reached = self.rising[1..].partition_point(|&sum| sum <= target).min(23);
        let (low, high) = (self.rising[reached], self.rising[reached + 1]);
        days * DAY + midnight + reached as f64 + (target - low) / (high - low) - hour
    }
}

/// Rate by hour of the day: three times as high in the hours in which most cuts come.
fn weights(mostly: Mostly) -> [f64; 24] {
    let hours = match mostly {
        Mostly::AnyTime => 0..0,
        Mostly::Daytime => 6..18,
        Mostly::Afternoon => 12..20,
        Mostly::Evening => 17..23,
        Mostly::Night => 22..30,
    };
    std::array::from_fn(|hour| if hours.contains(&hour) || hours.contains(&(hour + 24)) { 3.0 } else { 1.0 })
}

/// The standard normal value that is exceeded with a probability of at most a half.
///
/// Source (from memory): Abramowitz and Stegun, *Handbook of Mathematical Functions*, 26.2.23; its error is
/// below 4.5e-4.
fn upper_quantile(probability: f64) -> f64 {
    let t = (-2.0 * probability.min(0.5).ln()).sqrt();
    let above = 2.515517 + t * (0.802853 + t * 0.010328);
    let below = 1.0 + t * (1.432788 + t * (0.189269 + t * 0.001308));
    t - above / below
}
