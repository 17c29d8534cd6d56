//! How long one design takes. `cargo bench` prints the times; no test depends on them.

use keeplit::documents::survey;
use keeplit::sizing::{self, Assumptions, Survey};

fn main() {
    divan::main();
}

/// A house and a workshop with as many loads as asked for, of every start kind, over the whole day.
///
/// People write their hours in whole hours; `scattered` gives every load a minute of its own, so that
/// no two windows share a boundary.
fn survey_of(n_loads: usize, scattered: bool) -> Survey {
    let kinds = ["resistive", "electronic", "motor_psc", "compressor", "motor_cap_start", "transformer"];
    let clock = |hour: usize, minute: usize| format!("{:02}:{:02}", hour % 24, if scattered { minute % 60 } else { 0 });
    let load = |i: usize| {
        serde_json::json!({
            "name": format!("Load {i}"), "quantity": 1 + i % 3, "running_w": 10 + 7 * i, "power_factor": 0.7,
            "start": kinds[i % kinds.len()], "duty": 0.5,
            "windows": [[clock(i * 5, i * 7), clock(i * 5 + 6, i * 11)]],
        })
    };
    let loads: Vec<_> = (0..n_loads).map(load).collect();
    let survey = serde_json::json!({ "format": "keeplit-survey-1", "outage": { "autonomy_h": 5.5 }, "loads": loads });
    survey::read(&survey.to_string()).expect("the survey is sound").1
}

fn bench(bencher: divan::Bencher, survey: &Survey) {
    let assumptions = Assumptions::defaults(survey.choice.chemistry);
    bencher.bench(|| sizing::size(divan::black_box(survey), assumptions.clone()));
}

/// The engine alone, from a read survey to the design with findings and working.
#[divan::bench(args = [12, 40, 100])]
fn design(bencher: divan::Bencher, n_loads: usize) {
    bench(bencher, &survey_of(n_loads, false));
}

/// The same where no two loads share a boundary: twice as many starts to look at as there are loads.
#[divan::bench(args = [12, 40, 100])]
fn design_of_scattered_windows(bencher: divan::Bencher, n_loads: usize) {
    bench(bencher, &survey_of(n_loads, true));
}
