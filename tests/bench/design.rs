//! How long one design takes. `cargo bench` prints the times; no test depends on them.

use keeplit::documents::survey;
use keeplit::sizing::{self, Assumptions, Survey};

fn main() {
    divan::main();
}

/// A house and a workshop with as many loads as asked for, of every start kind, over the whole day.
fn survey_of(n_loads: usize) -> Survey {
    let kinds = ["resistive", "electronic", "motor_psc", "compressor", "motor_cap_start", "transformer"];
    let loads: Vec<_> = (0..n_loads)
        .map(|i| {
            let from = format!("{:02}:{:02}", (i * 5) % 24, (i * 7) % 60);
            let to = format!("{:02}:{:02}", (i * 5 + 6) % 24, (i * 11) % 60);
            serde_json::json!({
                "name": format!("Load {i}"), "quantity": 1 + i % 3, "running_w": 10 + 7 * i, "power_factor": 0.7,
                "start": kinds[i % kinds.len()], "duty": 0.5, "windows": [[from, to]],
            })
        })
        .collect();
    let survey = serde_json::json!({ "format": "keeplit-survey-1", "outage": { "autonomy_h": 5.5 }, "loads": loads });
    survey::read(&survey.to_string()).expect("the survey is sound").1
}

/// The engine alone: from a read survey to the design with findings and working.
#[divan::bench(args = [12, 40, 100])]
fn design(bencher: divan::Bencher, n_loads: usize) {
    let survey = survey_of(n_loads);
    let assumptions = Assumptions::defaults(survey.choice.chemistry);
    bencher.bench(|| sizing::size(divan::black_box(&survey), assumptions.clone()));
}
