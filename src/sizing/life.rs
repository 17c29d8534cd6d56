//! How long the bank lives: by its cycles, by heat and years; the shorter counts.

use super::assumptions::Assumptions;
use super::design::{Bank, Life};
use super::finding::Finding;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::{Site, Survey};
use super::tables::chemistries::properties;
use crate::units::{Celsius, Years};

/// Spans of four weeks in a mean year.
const FOUR_WEEKS: f64 = 365.25 / 28.0;

/// The temperature up to which the calendar life holds.
const BASE: Celsius = Celsius(25.0);

/// A bank that is hardly ever used is not worn out by use: this stands for "longer than it matters".
const NOT_WORN_OUT: Years = Years(100.0);

const CYCLES_PER_YEAR: Rule = Rule {
    symbol: "n_year",
    name: "Cycles in a year",
    formula: "n_year = cuts in four weeks · 365.25 / 28",
    unit: "",
    source: "each cut is a cycle of its own depth",
    checked: Checked::OurRule,
};

const CYCLES: Rule = Rule {
    symbol: "N",
    name: "Cycles to 80 % of the capacity at the depth of the cut",
    formula: "N = 1 / mean of 1/N_i, N_i = N_1 · (DoD/D_1)^(−b) between published points; N = N_1 · D_1/DoD below the shallowest",
    unit: "",
    source: "makers' data sheets; tubular and gel from memory. Sources differ three-fold",
    checked: Checked::FromMemory,
};

const BY_CYCLES: Rule = Rule {
    symbol: "L_cycles",
    name: "Life by cycles",
    formula: "L_cycles = N / n_year, at most 100 years",
    unit: "years",
    source: "arithmetic",
    checked: Checked::Derived,
};

const AT: Rule = Rule {
    symbol: "T_life",
    name: "Temperature the calendar life was taken at",
    formula: "ages like a steady swing between T_cold and T_hot: T_life = 25 + θ·log2(mean of 2^((T−25)/θ))",
    unit: "°C",
    source: "life halves for each θ kelvin: a maker's support article; mean over the swing derived",
    checked: Checked::Derived,
};

const BY_CALENDAR: Rule = Rule {
    symbol: "L_calendar",
    name: "Life by heat and years",
    formula: "L_calendar = L_25 · 2^(−(T_life − 25)/θ), no longer than L_25",
    unit: "years",
    source: "a maker's support article: half the life per 10 K above 25 °C",
    checked: Checked::Read,
};

const EXPECTED: Rule = Rule {
    symbol: "L",
    name: "Life to be expected",
    formula: "L = min(L_cycles, L_calendar)",
    unit: "years",
    source: "our rule: the shorter of both, without decimals to be relied on",
    checked: Checked::OurRule,
};

/// What the cuts do to the bank.
#[derive(Clone, Debug, PartialEq)]
pub struct Wear {
    /// Cuts in four weeks.
    pub cuts: f64,
    /// Depth of discharge of each; at least one.
    pub depths: Vec<f64>,
}

impl Wear {
    /// Every cut as long and as deep as the one designed for.
    pub fn of_sized_cut(survey: &Survey, bank: &Bank) -> Self {
        Self { cuts: survey.outage.cuts_per_week * 4.0, depths: vec![bank.depth_of_discharge] }
    }
}

/// How long the bank lives at the depth and the number of these cuts.
pub fn life(survey: &Survey, wear: &Wear, assumptions: &Assumptions, sheet: &mut Sheet) -> Life {
    let values = [("cuts in four weeks", wear.cuts, "")];
    let cycles_per_year = sheet.line("life.cycles_per_year", &CYCLES_PER_YEAR, &values, wear.cuts * FOUR_WEEKS);
    let cycles = cycles(survey, &wear.depths, sheet);
    let by_cycles = by_cycles(cycles, cycles_per_year, sheet);
    let (at, by_calendar) = by_calendar(&survey.site, assumptions, sheet);
    let values = [("L_cycles", by_cycles.0, "years"), ("L_calendar", by_calendar.0, "years")];
    let expected = Years(sheet.line("life.life_years", &EXPECTED, &values, by_cycles.min(by_calendar).0));
    Life { cycles_per_year, cycles, by_cycles, by_calendar, expected, at }
}

/// Cycles of mixed depth, by their mean wear: each takes one part in the cycles at its own depth.
fn cycles(survey: &Survey, depths: &[f64], sheet: &mut Sheet) -> f64 {
    let points = properties(survey.choice.chemistry).cycles;
    let (deepest, depth) = (points[0].0, depths.iter().copied().fold(0.0, f64::max));
    if depth > deepest {
        let what = "depth of discharge of the published cycle life";
        sheet.find(Finding::OutsideMethod { what, given: depth, lowest: 0.0, highest: deepest, unit: "" });
    }
    let count = (depths.len() as f64).max(1.0);
    let wear = depths.iter().map(|&depth| 1.0 / cycles_at(points, depth)).sum::<f64>() / count;
    let cycles = if wear > 0.0 { 1.0 / wear } else { cycles_at(points, 0.0) };
    let values = [("DoD_mean", depths.iter().sum::<f64>() / count, ""), ("DoD_deepest", depth, "")];
    sheet.line("life.cycles", &CYCLES, &values, cycles)
}

/// Below this depth a cut no longer counts as a cycle of its own.
const LEAST_DEPTH: f64 = 0.01;

/// Cycles at a depth, by the power law between neighbouring points.
///
/// Deeper than the deepest point the law of the last pair goes on, with a finding. Shallower than
/// the shallowest the charge turned over in a life stays the same, `N · D` is constant: less than
/// the law would promise there (b is 1.5 to 2.5), and more than no gain at all.
fn cycles_at(points: &[(f64, f64)], depth: f64) -> f64 {
    let (shallowest, most) = points[points.len() - 1];
    if depth <= shallowest {
        return most * shallowest / depth.max(LEAST_DEPTH);
    }
    let at = points.windows(2).position(|pair| depth >= pair[1].0).unwrap_or(0);
    let ((deep, few), (shallow, many)) = (points[at], points[at + 1]);
    let b = (many / few).ln() / (deep / shallow).ln();
    few * (depth / deep).powf(-b)
}

fn by_cycles(cycles: f64, per_year: f64, sheet: &mut Sheet) -> Years {
    let years = if cycles < NOT_WORN_OUT.0 * per_year { Years(cycles / per_year) } else { NOT_WORN_OUT };
    let values = [("N", cycles, ""), ("n_year", per_year, "")];
    Years(sheet.line("life.cycle_life_years", &BY_CYCLES, &values, years.0))
}

fn by_calendar(site: &Site, assumptions: &Assumptions, sheet: &mut Sheet) -> (Celsius, Years) {
    let halving = assumptions.life_halving_k;
    let (cold, hot) = (site.battery_coldest, site.battery_hottest);
    let at = ages_like(cold, hot, halving);
    let values = [("T_cold", cold.0, "°C"), ("T_hot", hot.0, "°C"), ("θ", halving, "K")];
    let at = Celsius(sheet.line("life.at_c", &AT, &values, at.0));
    let years = assumptions.calendar_life_years * (-(at - BASE).0 / halving).exp2().min(1.0);
    let values = [("L_25", assumptions.calendar_life_years, "years"), ("T_life", at.0, "°C"), ("θ", halving, "K")];
    (at, Years(sheet.line("life.calendar_life_years", &BY_CALENDAR, &values, years)))
}

/// The steady temperature that ages a battery like a swing between two.
///
/// Ageing doubles every `halving` kelvin, so the warm hours count for more than the cold ones. The
/// mean over a sine is taken at three of its points (Gauss and Chebyshev), which is exact to the
/// fifth power of the swing.
fn ages_like(cold: Celsius, hot: Celsius, halving: f64) -> Celsius {
    let (middle, swing) = ((cold + hot) / 2.0, (hot - cold) / 2.0);
    let reach = 3.0_f64.sqrt() / 2.0;
    let rates = [-reach, 0.0, reach].map(|share| ((middle + swing * share - BASE).0 / halving).exp2());
    BASE + Celsius(halving * (rates.iter().sum::<f64>() / 3.0).log2())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::battery_bank::example;
    use crate::sizing::survey::Chemistry;
    use proptest::prelude::*;

    fn lived(change: impl FnOnce(&mut Survey)) -> (Life, Sheet) {
        let mut survey = example::shop(Chemistry::VrlaAgm);
        change(&mut survey);
        let (bank, _) = example::bank(&survey, &[(300.0, 4.0)]);
        let mut sheet = Sheet::default();
        let wear = Wear::of_sized_cut(&survey, &bank);
        let life = life(&survey, &wear, &Assumptions::defaults(survey.choice.chemistry), &mut sheet);
        (life, sheet)
    }

    #[test]
    fn cycles_pass_through_the_published_points() {
        let agm = properties(Chemistry::VrlaAgm).cycles;
        let cases = [
            (1.0, 200.0, "maker's data sheet"),
            (0.5, 600.0, "maker's data sheet"),
            (0.3, 1500.0, "maker's data sheet"),
            (0.5_f64.sqrt(), 346.4, "power law half way: √(200 · 600)"),
            (0.1, 4500.0, "the charge turned over stays that of 1500 cycles of 0.3"),
            (0.0, 45000.0, "finite for no discharge at all"),
        ];
        for (depth, expected, source) in cases {
            let cycles = cycles_at(agm, depth);
            assert!((cycles - expected).abs() < 0.1, "{depth}: {cycles}, {source}");
        }
        let tubular = cycles_at(properties(Chemistry::FloodedTubular).cycles, 1.0);
        assert!(tubular < 1200.0, "deeper than the deepest point lasts shorter: {tubular}");
    }

    #[test]
    fn ten_kelvin_over_25_halve_the_calendar_life() {
        let at = |celsius: f64| {
            let steady = lived(|survey| {
                survey.site.battery_coldest = Celsius(celsius);
                survey.site.battery_hottest = Celsius(celsius);
            });
            (steady.0.at.0, steady.0.by_calendar.0)
        };
        for (celsius, years) in [(25.0, 7.0), (35.0, 3.5), (45.0, 1.75), (10.0, 7.0)] {
            let (found, life) = at(celsius);
            assert!((found - celsius).abs() < 1e-9 && (life - years).abs() < 1e-9, "{celsius} °C: {found}, {life}");
        }
    }

    #[test]
    fn a_swing_ages_like_more_than_its_middle_and_less_than_its_hottest() {
        let like = ages_like(Celsius(15.0), Celsius(35.0), 10.0).0;
        // Mean of 2^((10·sin x)/10) over a turn is the Bessel function I_0(ln 2) = 1.1238; 10·log2 of it is 1.684 K.
        assert!((like - 25.0 - 1.684).abs() < 0.01, "{like}");
    }

    #[test]
    fn no_cuts_at_all_still_end_some_day() {
        let (life, _) = lived(|survey| survey.outage.cuts_per_week = 0.0);
        assert_eq!((life.cycles_per_year, life.by_cycles), (0.0, NOT_WORN_OUT));
        assert!(life.expected == life.by_calendar && life.expected.0.is_finite());
    }

    #[test]
    fn ten_cuts_a_week_wear_a_shop_bank_out_before_it_ages() {
        let (life, sheet) = lived(|survey| survey.outage.cuts_per_week = 10.0);
        assert!((life.cycles_per_year - 521.79).abs() < 0.01, "{life:?}");
        assert_eq!(life.expected, life.by_cycles);
        assert!((life.by_cycles.0 - life.cycles / life.cycles_per_year).abs() < 1e-12);
        assert_eq!(sheet.findings, []);
    }

    #[test]
    fn every_figure_of_the_life_stands_on_the_sheet_with_the_same_value() {
        let (life, sheet) = lived(|_| ());
        example::assert_on_sheet("life", &life, &sheet);
    }

    proptest! {
        #[test]
        fn a_deeper_cut_never_gives_more_cycles(kind in 0_usize..5, one in 0.0..1.5_f64, other in 0.0..1.5_f64) {
            let points = properties(Chemistry::ALL[kind]).cycles;
            prop_assert!(cycles_at(points, one.max(other)) <= cycles_at(points, one.min(other)));
        }

        #[test]
        fn a_hotter_place_never_lengthens_the_life(cold in -10.0..30.0, swing in 0.0..25.0, hotter in 0.0..20.0) {
            let years = |hot: f64| lived(|survey| {
                survey.site.battery_coldest = Celsius(cold);
                survey.site.battery_hottest = Celsius(hot);
            }).0.by_calendar;
            prop_assert!(years(cold + swing + hotter) <= years(cold + swing));
        }
    }
}
