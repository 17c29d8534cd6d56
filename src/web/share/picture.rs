//! The picture of the cut on the offer sheet: what is left in the battery, from the figures of the table.

use askama::Template;

use crate::quotes::sheet::CutStretch;
use crate::translations::Words;

/// Left, right, upper and lower edge of the plot, in the units of the picture.
const LEFT: f64 = 52.0;
const RIGHT: f64 = 324.0;
const TOP: f64 = 12.0;
const BOTTOM: f64 = 168.0;

#[derive(Template)]
#[template(path = "quotes/cut.html")]
struct Picture {
    title: String,
    heights: Vec<Tick>,
    times: Vec<Tick>,
    line: String,
    end_x: String,
    end_y: String,
}

struct Tick {
    at: String,
    label: String,
}

/// The SVG; empty if there is no cut to show.
pub fn picture(cut: &[CutStretch], words: &Words) -> Result<String, askama::Error> {
    let Some(end) = cut.last().filter(|end| end.to_h > 0.0) else {
        return Ok(String::new());
    };
    let x = |hours: f64| format!("{:.1}", LEFT + (RIGHT - LEFT) * hours / end.to_h);
    let y = |share: f64| format!("{:.1}", BOTTOM - (BOTTOM - TOP) * share);
    let points = std::iter::once((0.0, 1.0)).chain(cut.iter().map(|stretch| (stretch.to_h, stretch.left_share)));
    let line: Vec<String> = points.map(|(hours, share)| format!("{} {}", x(hours), y(share))).collect();
    let percent = |share: f64| words.fill("cut-percent", &[("percent", (share * 100.0).round().into())]);
    let title = words.fill(
        "cut-picture",
        &[("duration", words.duration(end.to_h).into()), ("left", percent(end.left_share).into())],
    );
    Picture {
        title,
        heights: [0.0, 0.5, 1.0].map(|share| Tick { at: y(share), label: percent(share) }).into(),
        times: hour_marks(end.to_h).into_iter().map(|hour| Tick { at: x(hour), label: mark(hour, words) }).collect(),
        line: line.join("L"),
        end_x: x(end.to_h),
        end_y: y(end.left_share),
    }
    .render()
}

/// At most seven marks, each a whole number of hours or a plain part of one.
fn hour_marks(end: f64) -> Vec<f64> {
    let step = [0.25, 0.5, 1.0, 2.0, 3.0, 6.0, 12.0].into_iter().find(|step| end / step <= 6.0).unwrap_or(24.0);
    (0..).map(|n| f64::from(n) * step).take_while(|hour| *hour <= end).collect()
}

fn mark(hour: f64, words: &Words) -> String {
    if hour == 0.0 { words.say("cut-start") } else { words.fill("cut-hours", &[("hours", hour.to_string().into())]) }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_line_runs_through_the_figures_of_the_table() {
        let cut = [
            CutStretch { from_h: 0.0, to_h: 1.0, average_w: 100.0, left_share: 0.75 },
            CutStretch { from_h: 1.0, to_h: 2.0, average_w: 100.0, left_share: 0.5 },
        ];
        let svg = picture(&cut, Words::of("en")).unwrap();
        assert!(svg.contains("M52.0 12.0L188.0 51.0L324.0 90.0"), "{svg}");
        assert!(svg.contains("2 hours") && svg.contains("50\u{a0}%"), "{svg}");
    }

    #[test]
    fn marks_are_few_at_any_length() {
        for end in [0.25, 1.0, 4.0, 6.0, 6.5, 12.0, 24.0, 72.0] {
            let marks = hour_marks(end);
            assert!((2..=7).contains(&marks.len()), "{end}: {marks:?}");
        }
    }
}
