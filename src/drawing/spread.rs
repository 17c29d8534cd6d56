//! How long the bank lasts from each hour of the day, new and at the end of its life.

use askama::Template;

use super::chart::{ACROSS, Scale, marks};
use crate::sizing::proof::HourOfStart;
use crate::units::Hours;
use crate::wording::duration;

const TOP: f64 = 20.0;
const BOTTOM: f64 = 190.0;

#[derive(Template)]
#[template(path = "design/spread.svg.html", escape = "html")]
struct Picture {
    told: String,
    heights: Vec<(String, String)>,
    times: Vec<(String, String)>,
    new: String,
    aged: String,
    asked: String,
}

/// The SVG.
pub fn picture(hours: &[HourOfStart], asked: Hours) -> Result<String, askama::Error> {
    let highest = hours.iter().map(|hour| hour.new.0).fold(asked.0, f64::max);
    let heights = marks(highest);
    let x = Scale { numbers: (0.0, 24.0), places: ACROSS };
    let y = Scale { numbers: (0.0, heights[heights.len() - 1]), places: (BOTTOM, TOP) };
    let line = |lasts: fn(&HourOfStart) -> Hours| {
        let stair = |hour: &HourOfStart| {
            let (from, height) = (hour.start.hours().0, y.place(lasts(hour).0));
            format!("{} {height}L{} {height}", x.place(from), x.place(from + 1.0))
        };
        hours.iter().map(stair).collect::<Vec<_>>().join("L")
    };
    let shortest = hours.iter().map(|hour| hour.aged).fold(Hours(f64::MAX), Hours::min);
    Picture {
        told: format!(
            "From its worst hour the bank lasts {} at the end of its life; {} were asked for.",
            duration(shortest),
            duration(asked)
        ),
        heights: heights.iter().map(|&mark| (y.place(mark), duration(Hours(mark)))).collect(),
        times: (0..=8).map(|n| f64::from(n) * 3.0).map(|hour| (x.place(hour), format!("{hour}"))).collect(),
        new: line(|hour| hour.new),
        aged: line(|hour| hour.aged),
        asked: y.place(asked.0),
    }
    .render()
}
