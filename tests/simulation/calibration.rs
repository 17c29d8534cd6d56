//! The generator of cuts against published indices.

use keeplit::simulation::law::{Kind, Law, YEAR};
use keeplit::sizing::survey::Mostly;
use keeplit::sizing::tables::outages;
use rand_chacha::ChaCha8Rng;
use rand_chacha::rand_core::SeedableRng;

fn united_states() -> Law {
    let region = outages::region("United States").expect("a row of the table");
    let kinds = region.cuts.iter().map(|kind| {
        let (mean, spread) = kind.length.expect("its lengths are known");
        Kind::of_mean(kind.per_year, mean.0, spread)
    });
    Law::new(kinds.collect(), Mostly::AnyTime)
}

#[test]
fn the_two_part_law_gives_the_indices_of_the_united_states() {
    // SAIDI 5.6 h and SAIFI 1.4 a year with major events: Form EIA-861 for 2022, as cited. Cuts of 6 h or more:
    // −ln(1 − 0.254 · 0.70) = 0.196 a household and year, American Housing Survey 2023; the law gives 0.21.
    const YEARS: u64 = 60_000;
    let law = united_states();
    let (mut cuts, mut hours, mut long) = (0.0, 0.0, 0.0);
    for year in 0..YEARS {
        let mut random = ChaCha8Rng::seed_from_u64(2022);
        random.set_stream(year);
        for off in law.draw(&mut random) {
            cuts += 1.0;
            hours += off.to - off.from;
            long += f64::from(u8::from(off.to - off.from >= 6.0));
        }
    }
    let (saifi, saidi, long) = (cuts / YEARS as f64, hours / YEARS as f64, long / YEARS as f64);
    assert!((saifi - 1.4).abs() < 0.02, "SAIFI {saifi}");
    assert!((saidi - 5.6).abs() < 0.15, "SAIDI {saidi} h");
    assert!((long - 0.21).abs() < 0.01, "{long} long cuts a year");
}

#[test]
fn the_shares_of_longer_cuts_are_those_of_the_law() {
    // Share of cuts longer than so many hours, by the two lognormal laws: integrated with a general library.
    let shares = [(0.5, 0.86), (1.0, 0.67), (2.0, 0.43), (4.0, 0.24), (8.0, 0.11), (12.0, 0.065), (24.0, 0.023)];
    let law = united_states();
    let mut lengths = Vec::new();
    for year in 0..20_000 {
        let mut random = ChaCha8Rng::seed_from_u64(5);
        random.set_stream(year);
        lengths.extend(law.draw(&mut random).into_iter().map(|off| off.to - off.from));
    }
    for (hours, share) in shares {
        let longer = lengths.iter().filter(|length| **length > hours).count() as f64 / lengths.len() as f64;
        assert!((longer - share).abs() < 0.01, "over {hours} h: {longer}");
    }
}

#[test]
fn cuts_come_as_often_as_told_and_mostly_when_told() {
    for (per_year, mostly, hours) in
        [(520.0, Mostly::Evening, 17..23), (30.0, Mostly::Night, 22..30), (5.0, Mostly::AnyTime, 0..24)]
    {
        let law = Law::new(vec![Kind::of_mean(per_year, 2.0, 0.8)], mostly);
        let (mut cuts, mut within, mut years) = (0.0, 0.0, 0.0);
        for year in 0..2000 {
            let mut random = ChaCha8Rng::seed_from_u64(11);
            random.set_stream(year);
            years += 1.0;
            for off in law.draw(&mut random) {
                assert!(off.to > off.from && off.to <= YEAR);
                let hour = off.from.rem_euclid(24.0) as i32;
                cuts += 1.0;
                within += f64::from(u8::from(hours.contains(&hour) || hours.contains(&(hour + 24))));
            }
        }
        assert!((cuts / years / per_year - 1.0).abs() < 0.03, "{per_year}: {}", cuts / years);
        // Three times the rate in n of 24 hours: 3n of 3n + 24 − n, a little less while it is off anyway.
        let n = f64::from(hours.end - hours.start);
        let expected = if n == 24.0 { 1.0 } else { 3.0 * n / (2.0 * n + 24.0) };
        assert!((within / cuts - expected).abs() < 0.04, "{mostly:?}: {} against {expected}", within / cuts);
    }
}
