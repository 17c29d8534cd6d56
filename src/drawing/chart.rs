//! Scales and marks of a chart.

/// Where the plot of every chart begins and ends from left to right; its labels stand before it.
pub const ACROSS: (f64, f64) = (88.0, 426.0);

/// A stretch of numbers laid over a stretch of the picture.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Scale {
    /// First and last number.
    pub numbers: (f64, f64),
    /// Where they lie in the picture.
    pub places: (f64, f64),
}

impl Scale {
    /// Where a number lies, to a tenth of the picture's unit.
    pub fn place(&self, number: f64) -> String {
        let (first, last) = self.numbers;
        let share = if last > first { (number - first) / (last - first) } else { 0.0 };
        format!("{:.1}", self.places.0 + (self.places.1 - self.places.0) * share)
    }
}

/// Round numbers from nothing to the first one that is not below the highest; four to six of them.
///
/// The last is the top of the scale. Steps are 1, 2 or 5 times a power of ten.
pub fn marks(highest: f64) -> Vec<f64> {
    let rough = (highest / 4.0).max(1e-9);
    let power = 10f64.powf(rough.log10().floor());
    let step = [1.0, 2.0, 5.0, 10.0].into_iter().map(|times| times * power).find(|step| *step >= rough);
    let step = step.unwrap_or(10.0 * power);
    let count = (highest / step).ceil().max(1.0) as u32;
    (0..=count).map(|n| f64::from(n) * step).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn marks_are_few_and_round_and_reach_over_the_highest() {
        for highest in [0.3, 1.0, 7.0, 42.0, 99.0, 314.0, 1234.0, 98_765.0] {
            let marks = marks(highest);
            assert!((3..=6).contains(&marks.len()), "{highest}: {marks:?}");
            assert!(marks[marks.len() - 1] >= highest && marks[marks.len() - 2] < highest, "{highest}: {marks:?}");
        }
        assert_eq!(marks(314.0), [0.0, 100.0, 200.0, 300.0, 400.0]);
    }

    #[test]
    fn a_scale_without_breadth_puts_all_at_its_beginning() {
        let scale = Scale { numbers: (5.0, 5.0), places: (10.0, 20.0) };
        assert_eq!(scale.place(5.0), "10.0");
    }
}
