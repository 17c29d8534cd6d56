//! How fast cuts are played, against the reference that steps them minute by minute, in one run.
//!
//! `cargo bench --bench proof` prints medians and ratios; no test depends on them. Run as a test, it only
//! makes sure that all of it still runs.

#[path = "../simulation/samples.rs"]
mod samples;
#[path = "../simulation/stepper.rs"]
mod stepper;

use std::hint::black_box;
use std::sync::LazyLock;
use std::sync::atomic::{AtomicBool, AtomicU32};
use std::time::{Duration, Instant};

use keeplit::documents::survey;
use keeplit::simulation::battery::Battery;
use keeplit::simulation::cut::Course;
use keeplit::simulation::day::Day;
use keeplit::simulation::offs::Off;
use keeplit::simulation::passage::Passage;
use keeplit::simulation::plant::{NEW, Plant};
use keeplit::simulation::recharge::Charging;
use keeplit::simulation::year::Years;
use keeplit::simulation::{self};
use keeplit::sizing::{Design, Survey};
use keeplit::units::AmpHours;

const MINUTE: f64 = 1.0 / 60.0;

/// Whether times are wanted, or only that everything runs.
static IS_BENCH: LazyLock<bool> = LazyLock::new(|| std::env::args().any(|argument| argument == "--bench"));

/// So many where times are wanted, few otherwise.
fn effort(many: u32) -> u32 {
    if *IS_BENCH { many } else { many.min(2) }
}

/// The middle of several runs.
fn median(runs: usize, mut run: impl FnMut()) -> Duration {
    let runs = effort(runs as u32) as usize;
    let mut times: Vec<_> = (0..runs)
        .map(|_| {
            let begun = Instant::now();
            run();
            begun.elapsed()
        })
        .collect();
    times.sort();
    times[runs / 2]
}

fn told(what: &str, ours: Duration, reference: Duration, per: u32) {
    let micro = |time: Duration| time.as_secs_f64() * 1e6 / f64::from(per);
    let ratio = reference.as_secs_f64() / ours.as_secs_f64();
    println!("{what:<46} {:>12.2} µs   stepped {:>12.2} µs   1/{ratio:.1}", micro(ours), micro(reference));
}

/// A house with a load on in every part of the day.
fn house(cuts: f64) -> (Survey, Design) {
    let load = |name: &str, watts: f64, from: &str, to: &str| serde_json::json!({ "name": name, "running_w": watts, "duty": 0.6, "windows": [[from, to]] });
    let text = serde_json::json!({
        "format": "keeplit-survey-1",
        "outage": { "autonomy_h": 6, "cuts_per_week": cuts, "usual_h": 2, "longest_h": 20 },
        "loads": [
            load("Fridge", 120.0, "00:00", "24:00"), load("Kettle", 300.0, "06:30", "07:30"), load("Fans", 165.0, "10:00", "22:00"),
            load("Lamps", 80.0, "18:00", "23:30"), load("Screen", 90.0, "17:00", "23:00"), load("Pump", 550.0, "07:00", "07:45"),
        ]
    });
    let survey = survey::read(&text.to_string()).expect("the survey is sound").1;
    let assumptions = keeplit::sizing::Assumptions::defaults(survey.choice.chemistry);
    let design = simulation::design(&survey, assumptions);
    (survey, design)
}

fn powers(day: &Day) -> Vec<(f64, f64)> {
    day.stretches().iter().map(|stretch| (stretch.to, stretch.drawn)).collect()
}

fn one_long_cut(survey: &Survey, design: &Design, day: &Day) {
    let battery = Plant::of(survey, design).0.battery(AmpHours(design.bank.installed.0 * 3.0), NEW);
    let powers = powers(day);
    let ours = median(201, || {
        for _ in 0..100 {
            let course = Course::new(black_box(battery), day);
            black_box(course.lasts(18.0, 24.0));
        }
    });
    let reference = median(51, || {
        for _ in 0..10 {
            let full = stepper::full(&battery);
            black_box(stepper::play(black_box(&battery), full, &powers, 18.0, 24.0, MINUTE));
        }
    });
    told("one design, a cut of 24 h", ours / 100, reference / 10, 1);
}

/// Unlike banks, each at its own cut.
fn candidates() {
    let mut chance = samples::Chance::new(1);
    let samples: Vec<_> = (0..effort(10_000)).map(|_| samples::sample(&mut chance)).collect();
    let ours = median(11, || {
        for one in &samples {
            black_box(Course::new(one.battery, &one.day).lasts(one.start, one.hours));
        }
    });
    let reference = median(5, || {
        for one in &samples {
            let full = stepper::full(&one.battery);
            black_box(stepper::play(&one.battery, full, &one.powers, one.start, one.hours, MINUTE));
        }
    });
    told("10,000 candidates, each", ours, reference, samples.len() as u32);
}

/// A year by the minute: the cuts by the reference, the mains between them by the law of the charger.
fn stepped_year(battery: &Battery, day: &Day, charging: &Charging, offs: &[Off]) -> f64 {
    let powers = powers(day);
    let mut state = stepper::full(battery);
    let (mut now, mut unserved) = (0.0, 0.0);
    for off in offs {
        while now < off.from {
            let step = MINUTE.min(off.from - now);
            let total = state.at_hand + state.bound;
            let (current, stays) = charging.at(1.0 - total / battery.wells.full, day, f64::rem_euclid(now, 24.0));
            let beyond = (state.at_hand - battery.wells.at_hand * total) * (1.0 - battery.wells.rate * step);
            let total = total + current * stays * step;
            state.at_hand = battery.wells.at_hand * total + beyond;
            state.bound = total - state.at_hand;
            now += step;
        }
        let cut = stepper::play(battery, state, &powers, off.from, off.to - off.from, MINUTE);
        (state, now) = (cut.state, off.to);
        unserved += if cut.stopped { off.to - off.from - cut.hours } else { 0.0 };
    }
    unserved
}

fn years(survey: &Survey, design: &Design, day: &Day, name: &str) {
    let all = effort(1000);
    let years = Years::new(survey, design, day, 1);
    let (go, done) = (AtomicBool::new(false), AtomicU32::new(0));
    let alone = median(5, || {
        black_box(years.play(0..all, &go, &done));
    });
    let together = median(5, || {
        std::thread::scope(|scope| {
            let late = scope.spawn(|| years.play(all / 2..all, &go, &done));
            black_box(years.play(0..all / 2, &go, &done));
            black_box(late.join().expect("it does not panic"));
        });
    });
    // Each year is played in two states of the bank; the reference steps fewer years of one state.
    let (law, _) = simulation::law::Law::of(survey);
    let plant = Plant::of(survey, design).0;
    let passage = Passage {
        course: Course::new(plant.battery(design.bank.installed, NEW), day),
        charging: Charging::of(survey, design, day),
    };
    let offs: Vec<_> = (0..u64::from(effort(8))).map(|year| years_of(&law, year)).collect();
    let stepped = median(3, || {
        for offs in &offs {
            black_box(stepped_year(&passage.course.battery, day, &passage.charging, offs));
        }
    });
    told(&format!("{name}: a year of one bank"), alone / (2 * all), stepped / offs.len() as u32, 1);
    let gain = alone.as_secs_f64() / together.as_secs_f64();
    println!(
        "{:<46} {:>12.1} ms   on two threads {:>5.1} ms   1/{gain:.2}",
        "  1,000 years, new and aged",
        alone.as_secs_f64() * 1e3,
        together.as_secs_f64() * 1e3
    );
}

fn years_of(law: &simulation::law::Law, year: u64) -> Vec<Off> {
    use rand_chacha::rand_core::SeedableRng;
    let mut random = rand_chacha::ChaCha8Rng::seed_from_u64(1);
    random.set_stream(year);
    law.draw(&mut random)
}

fn whole(survey: &Survey) {
    let assumptions = keeplit::sizing::Assumptions::defaults(survey.choice.chemistry);
    let formula = median(101, || {
        black_box(keeplit::sizing::size(black_box(survey), assumptions.clone()));
    });
    let proved = median(101, || {
        black_box(simulation::design(black_box(survey), assumptions.clone()));
    });
    let micro = |time: Duration| time.as_secs_f64() * 1e6;
    println!(
        "{:<46} {:>12.2} µs   by formula alone {:.2} µs",
        "a whole design with its proof",
        micro(proved),
        micro(formula)
    );
}

fn main() {
    let (survey, design) = house(7.0);
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    one_long_cut(&survey, &design, &day);
    candidates();
    years(&survey, &design, &day, "7 cuts a week");
    let (often, served) = house(20.0);
    let often_day = Day::of(&served.demand.day, &served.inverter.losses);
    years(&often, &served, &often_day, "20 cuts a week");
    whole(&survey);
}
