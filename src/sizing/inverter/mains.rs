//! How the unit meets the mains: window and changeover.

use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::MainsWindow;
use crate::sizing::finding::Finding;
use crate::sizing::sheet::{Checked, Rule, Sheet};
use crate::sizing::survey::Survey;
use crate::units::{AcVolts, Milliseconds};

const CHANGEOVER: Rule = Rule {
    symbol: "t_change",
    name: "Break at changeover in the window to be set",
    formula: "t_change as assumed for the window, or as known of the unit that is there",
    unit: "ms",
    source: "6 to 10 ms in the narrow setting, 40 to 50 ms in the wide one; its data sheet wins",
    checked: Checked::CommonPractice,
};

const WINDOW: Rule = Rule {
    symbol: "V_window",
    name: "Mains that the unit accepts in that window",
    formula: "V_window = w · V; w as assumed, or known of the unit that is there",
    unit: "V",
    source: "190 to 250 V narrow, 110 to 270 V wide at 230 V",
    checked: Checked::CommonPractice,
};

/// The narrow window where the site stays in it, else the wide one; what lies outside is found out.
pub fn window(survey: &Survey, assumptions: &Assumptions, sheet: &mut Sheet) -> (MainsWindow, (AcVolts, AcVolts)) {
    let site = &survey.site;
    let (lowest, highest) = (site.supply_lowest, site.supply_highest);
    let of = |low: f64, high: f64| (site.supply * low, site.supply * high);
    let known = survey.reuse.and_then(|unit| unit.mains_window);
    let narrow = known.unwrap_or(of(assumptions.narrow_window_low, assumptions.narrow_window_high));
    let wide = known.unwrap_or(of(assumptions.wide_window_low, assumptions.wide_window_high));
    let inside = |window: (AcVolts, AcVolts)| window.0 <= lowest && highest <= window.1;
    let (kind, window) = if inside(narrow) { (MainsWindow::Narrow, narrow) } else { (MainsWindow::Wide, wide) };
    if !inside(wide) {
        sheet.find(Finding::MainsOutsideWideWindow { lowest, highest, window: wide });
    } else if !inside(narrow) {
        sheet.find(Finding::MainsOutsideNarrowWindow { lowest, highest, window: narrow });
    }
    let values = |end: AcVolts| [("w", end / site.supply, ""), ("V", site.supply.0, "V")];
    sheet.line("inverter.mains_window_v[0]", &WINDOW, &values(window.0), window.0.0);
    sheet.line("inverter.mains_window_v[1]", &WINDOW, &values(window.1), window.1.0);
    (kind, window)
}

/// The break at changeover, against the shortest that each load rides through.
pub fn changeover(survey: &Survey, window: MainsWindow, assumptions: &Assumptions, sheet: &mut Sheet) -> Milliseconds {
    let assumed = match window {
        MainsWindow::Narrow => assumptions.changeover_ms,
        MainsWindow::Wide => assumptions.changeover_wide_ms,
    };
    let breaks = survey.reuse.and_then(|unit| unit.changeover).unwrap_or(Milliseconds(assumed));
    for load in survey.loads.iter().filter(|load| load.max_break < breaks) {
        sheet.find(Finding::ChangeoverTooSlow { load: load.name.clone(), bears: load.max_break, breaks });
    }
    Milliseconds(sheet.line("inverter.changeover_ms", &CHANGEOVER, &[], breaks.0))
}
