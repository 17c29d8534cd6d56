//! The cut as it was played: charge, volts and load, one above the other over the same hours.

use askama::Template;

use super::chart::{ACROSS, Scale, marks};
use crate::sizing::design::Bank;
use crate::sizing::proof::Moment;
use crate::units::{DcVolts, Hours};
use crate::wording::{Numbers, duration};

/// Upper and lower edge of charge, volts and load.
const BANDS: [(f64, f64); 3] = [(26.0, 126.0), (156.0, 236.0), (266.0, 336.0)];
/// Marks on the axis of hours, in hours; the first that gives no more than ten.
const STEPS: [f64; 8] = [0.25, 0.5, 1.0, 2.0, 3.0, 6.0, 12.0, 24.0];

#[derive(Template)]
#[template(path = "design/played.svg.html", escape = "html")]
struct Picture {
    told: String,
    asked: Asked,
    bands: Vec<Band>,
    times: Vec<(String, String)>,
    charge: String,
    charge_end: (String, String),
    volts: String,
    cut_off: String,
    load: String,
    stops: Option<Stop>,
}

/// The hours that were asked for.
struct Asked {
    breadth: String,
}

/// One of the three, with its name and heights.
struct Band {
    name: &'static str,
    top: f64,
    heights: Vec<(String, String)>,
}

/// Where the bank stops.
struct Stop {
    at: String,
    told: String,
    anchor: &'static str,
}

/// The SVG of the ruling case; empty where nothing was played.
pub fn picture(
    curve: &[Moment],
    bank: &Bank,
    asked: Hours,
    runtime: Hours,
    numbers: Numbers,
) -> Result<String, askama::Error> {
    let Some(last) = curve.last().filter(|last| last.at > Hours::ZERO) else { return Ok(String::new()) };
    let x = Scale { numbers: (0.0, last.at.0), places: ACROSS };
    let charge = scale(0, (0.0, 1.0));
    let (low, high) = volts_between(curve, bank.cut_off);
    let volts = scale(1, (low, high));
    let watts = marks(curve.iter().map(|moment| moment.load.0).fold(1.0, f64::max));
    let load = scale(2, (0.0, watts[watts.len() - 1]));
    let place = |at: Hours, y: Scale, value: f64| format!("{} {}", x.place(at.0), y.place(value));
    Picture {
        told: told(curve, bank, asked, runtime, numbers),
        asked: Asked { breadth: format!("{:.1}", (asked.0.min(last.at.0)) / last.at.0 * (ACROSS.1 - ACROSS.0)) },
        bands: vec![
            band("charge left", 0, [0.0, 0.5, 1.0].map(|share| (charge.place(share), numbers.percent(share))).to_vec()),
            band("volts at the unit", 1, [low, high].map(|v| (volts.place(v), numbers.with_unit(v, "V"))).to_vec()),
            band("load", 2, ends(&watts).map(|w| (load.place(w), numbers.with_unit(w, "W"))).to_vec()),
        ],
        times: hours(last.at.0).into_iter().map(|hour| (x.place(hour), hour.to_string())).collect(),
        charge: joined(curve.iter().map(|moment| place(moment.at, charge, moment.charge_left))),
        charge_end: (x.place(last.at.0), charge.place(last.charge_left)),
        volts: joined(
            curve
                .windows(2)
                .flat_map(|pair| [place(pair[0].at, volts, pair[1].from.0), place(pair[1].at, volts, pair[1].volts.0)]),
        ),
        cut_off: volts.place(bank.cut_off.0),
        load: joined(
            curve
                .windows(2)
                .flat_map(|pair| [place(pair[0].at, load, pair[1].load.0), place(pair[1].at, load, pair[1].load.0)]),
        ),
        stops: (runtime.0 <= last.at.0 * (1.0 + 1e-9) && last.charge_left < 1.0).then(|| Stop {
            at: x.place(runtime.0),
            told: format!("stops at {}", duration(runtime)),
            anchor: if runtime.0 > last.at.0 * 0.6 { "end" } else { "start" },
        }),
    }
    .render()
}

fn scale(band: usize, numbers: (f64, f64)) -> Scale {
    let (top, bottom) = BANDS[band];
    Scale { numbers, places: (bottom, top) }
}

fn band(name: &'static str, number: usize, heights: Vec<(String, String)>) -> Band {
    Band { name, top: BANDS[number].0 - 8.0, heights }
}

fn ends(marks: &[f64]) -> [f64; 2] {
    [0.0, marks[marks.len() - 1]]
}

fn joined(points: impl Iterator<Item = String>) -> String {
    points.collect::<Vec<_>>().join("L")
}

/// Whole volts around everything that is drawn, the cut-off among it.
fn volts_between(curve: &[Moment], cut_off: DcVolts) -> (f64, f64) {
    let all = curve.iter().flat_map(|moment| [moment.from.0, moment.volts.0]).chain([cut_off.0]);
    let (low, high) = all.fold((f64::INFINITY, 0.0_f64), |(low, high), volts| (low.min(volts), high.max(volts)));
    (low.floor(), high.ceil())
}

fn hours(end: f64) -> Vec<f64> {
    let step = STEPS.into_iter().find(|step| end / step <= 9.0).unwrap_or(STEPS[7]);
    (0..).map(|n| f64::from(n) * step).take_while(|hour| *hour <= end + 1e-9).collect()
}

fn told(curve: &[Moment], bank: &Bank, asked: Hours, runtime: Hours, numbers: Numbers) -> String {
    let lowest = curve.iter().map(|moment| moment.volts.0.min(moment.from.0)).fold(f64::INFINITY, f64::min);
    format!(
        "At the end of the bank's life on its coldest day it lasts {} of the {} asked for. The volts at the unit fall to {}; it cuts off at {}.",
        duration(runtime),
        duration(asked),
        numbers.with_unit(lowest, "V"),
        numbers.with_unit(bank.cut_off.0, "V"),
    )
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_hours_are_marked_with_few_round_ones() {
        for end in [0.3, 1.0, 4.0, 5.5, 9.0, 12.0, 25.0, 60.0, 168.0] {
            let marks = hours(end);
            assert!((2..=10).contains(&marks.len()), "{end}: {marks:?}");
        }
    }
}
