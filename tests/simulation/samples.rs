//! Random banks and days, the same ones each time.

use keeplit::simulation::battery::Battery;
use keeplit::simulation::day::Day;
use keeplit::simulation::wells::Wells;
use keeplit::sizing::design::{DayStretch, Losses};
use keeplit::sizing::survey::{Chemistry, TimeOfDay};
use keeplit::sizing::tables::chemistries::properties;
use keeplit::units::{DcVolts, VoltAmps, Watts};
use rand_chacha::ChaCha8Rng;
use rand_chacha::rand_core::SeedableRng;
use rand_distr::{Distribution, Uniform};

/// A bank, a day, and a cut on it.
pub struct Sample {
    pub battery: Battery,
    pub day: Day,
    pub powers: Vec<(f64, f64)>,
    pub start: f64,
    pub hours: f64,
}

pub struct Chance(ChaCha8Rng);

impl Chance {
    pub fn new(seed: u64) -> Self {
        Self(ChaCha8Rng::seed_from_u64(seed))
    }

    pub fn between(&mut self, low: f64, high: f64) -> f64 {
        Uniform::new(low, high).expect("a range").sample(&mut self.0)
    }

    pub fn even_in_logarithm(&mut self, low: f64, high: f64) -> f64 {
        self.between(low.ln(), high.ln()).exp()
    }

    pub fn whole(&mut self, below: u32) -> u32 {
        self.between(0.0, f64::from(below)) as u32
    }
}

/// A unit without losses of its own: what is drawn is what the loads take.
pub const NO_LOSSES: Losses = Losses { no_load: Watts(0.0), linear: 0.0, quadratic: 0.0, rated: Watts(1.0) };

/// A day of powers: each its end in minutes and its watts.
pub fn day(powers: &[(u16, f64)]) -> Day {
    let mut from = TimeOfDay::MIDNIGHT;
    let stretch = |&(to, watts): &(u16, f64)| {
        let to = TimeOfDay::from_minutes(to).expect("a minute of the day");
        let begins = std::mem::replace(&mut from, to);
        DayStretch { from: begins, to, average: Watts(watts), peak: Watts(watts), peak_va: VoltAmps(watts) }
    };
    Day::of(&powers.iter().map(stretch).collect::<Vec<_>>(), &NO_LOSSES)
}

/// Banks of every kind and size under loads from a trickle to more than they bear.
pub fn sample(chance: &mut Chance) -> Sample {
    let kind = properties(Chemistry::ALL[chance.whole(5) as usize]);
    let series = [1.0, 2.0, 4.0][chance.whole(3) as usize];
    let cells = f64::from(kind.cells_per_block) * series;
    let capacity = chance.even_in_logarithm(5.0, 1000.0);
    let cut_off = DcVolts(cells * kind.cut_off.0 * chance.between(0.97, 1.03));
    let battery = Battery {
        wells: Wells { full: capacity, at_hand: chance.between(0.15, 0.95), rate: chance.even_in_logarithm(0.1, 3.0) },
        kind,
        cells,
        resistance: kind.resistance_at_1_ah.0 / capacity * cells * chance.between(1.0, 1.5),
        lead: chance.between(0.0, 0.05) * kind.resistance_at_1_ah.0 / capacity * cells,
        cut_off,
    };
    let stretches = 1 + chance.whole(7);
    let energy = capacity * cells * kind.nominal.0;
    let mut ends: Vec<u16> = (1..stretches).map(|_| 1 + chance.whole(1439) as u16).collect();
    ends.push(1440);
    ends.sort_unstable();
    ends.dedup();
    let typical = energy / chance.even_in_logarithm(0.5, 40.0);
    let powers: Vec<_> = ends.iter().map(|&end| (end, typical * chance.between(0.2, 1.8) * spike(chance))).collect();
    Sample {
        battery,
        day: day(&powers),
        powers: powers.iter().map(|&(end, watts)| (f64::from(end) / 60.0, watts)).collect(),
        start: f64::from(chance.whole(1440)) / 60.0,
        hours: chance.even_in_logarithm(0.5, 48.0),
    }
}

/// Now and then a load that no bank of this size carries.
fn spike(chance: &mut Chance) -> f64 {
    if chance.whole(25) == 0 { 40.0 } else { 1.0 }
}
