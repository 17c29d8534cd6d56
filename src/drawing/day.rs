//! The load over the day with the cut marked on it.

use askama::Template;

use super::chart::{ACROSS, Scale, marks};
use crate::sizing::design::{DayStretch, Demand};
use crate::units::Hours;
use crate::wording::Numbers;

const TOP: f64 = 26.0;
const BOTTOM: f64 = 216.0;

#[derive(Template)]
#[template(path = "design/day.svg.html", escape = "html")]
struct Picture {
    title: String,
    told: String,
    cuts: Vec<(String, String)>,
    heights: Vec<(String, String)>,
    times: Vec<(String, String)>,
    average: String,
    peak: String,
}

/// The SVG: average and highest power over 24 hours, the cut as a hatched band.
pub fn picture(demand: &Demand, autonomy: Hours, numbers: Numbers) -> Result<String, askama::Error> {
    let highest = demand.day.iter().map(|stretch| stretch.peak.0).fold(1.0, f64::max);
    let heights = marks(highest);
    let x = Scale { numbers: (0.0, 24.0), places: ACROSS };
    let y = Scale { numbers: (0.0, heights[heights.len() - 1]), places: (BOTTOM, TOP) };
    let line = |part: fn(&DayStretch) -> f64| stairs(&demand.day, x, y, part);
    let start = demand.sized_start.hours();
    let told = format!(
        "Average up to {}, everything on up to {}. The cut begins at {} and lasts {}.",
        numbers.with_unit(demand.day.iter().map(|stretch| stretch.average.0).fold(0.0, f64::max), "W"),
        numbers.with_unit(highest, "W"),
        demand.sized_start,
        crate::wording::duration(autonomy),
    );
    Picture {
        title: "Load over the day, and the cut".to_owned(),
        told,
        cuts: bands(start, autonomy).into_iter().map(|(from, to)| (x.place(from), x.place(to))).collect(),
        heights: heights.iter().map(|watts| (y.place(*watts), numbers.with_unit(*watts, "W"))).collect(),
        times: (0..=8).map(|n| f64::from(n) * 3.0).map(|hour| (x.place(hour), format!("{hour}"))).collect(),
        average: line(|stretch| stretch.average.0),
        peak: line(|stretch| stretch.peak.0),
    }
    .render()
}

impl Picture {
    fn breadth(&self, band: &(String, String)) -> String {
        let number = |text: &str| text.parse::<f64>().unwrap_or(0.0);
        format!("{:.1}", number(&band.1) - number(&band.0))
    }
}

fn stairs(day: &[DayStretch], x: Scale, y: Scale, part: fn(&DayStretch) -> f64) -> String {
    let step = |stretch: &DayStretch| {
        let height = y.place(part(stretch));
        format!("{} {height}L{} {height}", x.place(stretch.from.hours().0), x.place(stretch.to.hours().0))
    };
    day.iter().map(step).collect::<Vec<_>>().join("L")
}

/// The hours of the day that the cut covers: one band, or two where it runs over midnight.
fn bands(start: Hours, autonomy: Hours) -> Vec<(f64, f64)> {
    let end = start.0 + autonomy.0;
    if autonomy.0 >= 24.0 {
        vec![(0.0, 24.0)]
    } else if end <= 24.0 {
        vec![(start.0, end)]
    } else {
        vec![(0.0, end - 24.0), (start.0, 24.0)]
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_cut_over_midnight_is_two_bands_and_a_long_one_is_the_day() {
        assert_eq!(bands(Hours(18.0), Hours(4.0)), [(18.0, 22.0)]);
        assert_eq!(bands(Hours(22.0), Hours(4.0)), [(0.0, 2.0), (22.0, 24.0)]);
        assert_eq!(bands(Hours(22.0), Hours(30.0)), [(0.0, 24.0)]);
    }
}
