//! Four weeks of charge: for each day a bar from its lowest to its highest.

use askama::Template;

use super::chart::{ACROSS, Scale};
use crate::sizing::proof::Weeks;
use crate::wording::Numbers;

const TOP: f64 = 20.0;
const BOTTOM: f64 = 190.0;

#[derive(Template)]
#[template(path = "design/weeks.svg.html", escape = "html")]
struct Picture {
    told: String,
    heights: Vec<(String, String)>,
    bars: Vec<Bar>,
    days: Vec<(String, String)>,
}

struct Bar {
    x: String,
    low: String,
    high: String,
}

/// The SVG.
pub fn picture(weeks: &Weeks, verdict: &str, numbers: Numbers) -> Result<String, askama::Error> {
    let x = Scale { numbers: (0.0, weeks.days.len() as f64), places: ACROSS };
    let y = Scale { numbers: (0.0, 1.0), places: (BOTTOM, TOP) };
    let bar = |(day, charge): (usize, &crate::sizing::proof::DayOfCharge)| Bar {
        x: x.place(day as f64 + 0.5),
        low: y.place(charge.lowest),
        high: y.place(charge.highest.max(charge.lowest)),
    };
    let lowest = weeks.days.iter().map(|day| day.lowest).fold(1.0, f64::min);
    Picture {
        told: format!("{verdict}. The charge falls to {} at the lowest.", numbers.percent(lowest)),
        heights: [0.0, 0.5, 1.0].map(|share| (y.place(share), numbers.percent(share))).to_vec(),
        bars: weeks.days.iter().enumerate().map(bar).collect(),
        days: (0..=4).map(|week| (x.place(f64::from(week * 7)), (week * 7).to_string())).collect(),
    }
    .render()
}
