//! The unit: rating with margin and derating, surge, losses, waveform, changeover, mains window.

use super::assumptions::Assumptions;
use super::design::{Demand, Inverter, Losses, MainsWindow, Waveform};
use super::finding::Finding;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::{NeedsSine, Survey};
use super::tables::altitude::altitude_share;
use super::tables::trade_sizes::{INVERTER_VA, SMALL_INVERTER_VA};
use crate::units::{AcVolts, Celsius, Fraction, Metres, Milliseconds, Seconds, VoltAmps, Watts};

const DERATING: Rule = Rule {
    symbol: "f_derating",
    name: "What heat and height leave of the rating",
    formula: "f = (1 − a·(T − T_0)) · f_height; f_height the lower of 1 % per 100 m above 1000 m and the UPS table",
    unit: "",
    source: "rules for air-cooled drives (read); UPS altitude table of IEC 62040-3 (from memory)",
    checked: Checked::FromMemory,
};

const REQUIRED: Rule = Rule {
    symbol: "S_required",
    name: "Rating that the loads ask for",
    formula: "S_required = max((1 + m)·S / f, (1 + m)·P / (f·λ), S_staggered / n)",
    unit: "VA",
    source: "both the VA and the W rating are kept, with margin; the surge is borne with one motor starting at a time",
    checked: Checked::CommonPractice,
};

const RATING: Rule = Rule {
    symbol: "S_rated",
    name: "Rating of the unit",
    formula: "S_rated = next size of the trade that is not below S_required, or the unit that is there",
    unit: "VA",
    source: "sizes that the trade stocks",
    checked: Checked::CommonPractice,
};

const RATING_W: Rule = Rule {
    symbol: "P_rated",
    name: "Real power of the unit",
    formula: "P_rated = S_rated · λ",
    unit: "W",
    source: "rating power factor of the unit; its plate wins",
    checked: Checked::CommonPractice,
};

const SURGE: Rule = Rule {
    symbol: "S_surge",
    name: "Largest start that the unit bears",
    formula: "S_surge = n · S_rated, a fifth less on a square wave",
    unit: "VA",
    source: "iron-core units hold 2 to 3 times their rating for seconds; its data sheet wins",
    checked: Checked::CommonPractice,
};

const SURGE_HELD: Rule = Rule {
    symbol: "t_surge",
    name: "How long the unit holds its surge",
    formula: "t_surge as assumed",
    unit: "s",
    source: "several seconds for iron-core units; its data sheet wins",
    checked: Checked::CommonPractice,
};

const SURGE_MARGIN: Rule = Rule {
    symbol: "m_surge",
    name: "Surge left above the hardest start",
    formula: "m_surge = S_surge / S_staggered − 1",
    unit: "",
    source: "share of the start that must be borne",
    checked: Checked::Derived,
};

const LOAD_SHARE: Rule = Rule {
    symbol: "u",
    name: "Running load over the derated rating",
    formula: "u = max(S / (f · S_rated), P / (f · P_rated))",
    unit: "",
    source: "both ratings are checked",
    checked: Checked::Derived,
};

const NO_LOAD: Rule = Rule {
    symbol: "P_0",
    name: "Draw of the unit with nothing on",
    formula: "P_0 = p_0 · P_rated",
    unit: "W",
    source: "three-term loss model of Schmidt and Sauer; fit to measured battery inverters of 24 and 48 V in open test data",
    checked: Checked::Read,
};

const LOSS_TERM: Rule = Rule {
    symbol: "k",
    name: "Loss term of the unit",
    formula: "P_dc = P_0 + (1 + k_1)·P + k_2·P² / P_rated",
    unit: "",
    source: "three-term loss model of Schmidt and Sauer; fit to measured battery inverters of 24 and 48 V in open test data",
    checked: Checked::Read,
};

const PEAK_DC: Rule = Rule {
    symbol: "P_dc",
    name: "Power drawn from the bank at the peak running load",
    formula: "P_dc = P_0 + (1 + k_1)·P + k_2·P² / P_rated",
    unit: "W",
    source: "three-term loss model of Schmidt and Sauer",
    checked: Checked::FromMemory,
};

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
    formula: "V_window = share of the nominal supply, or as known of the unit that is there",
    unit: "V",
    source: "190 to 250 V narrow, 110 to 270 V wide at 230 V",
    checked: Checked::CommonPractice,
};

/// The unit that carries the demand, or what becomes of the demand on the unit that is there.
pub fn inverter(survey: &Survey, demand: &Demand, assumptions: &Assumptions, sheet: &mut Sheet) -> Inverter {
    let derating = derating(survey.site.inverter_ambient, survey.site.altitude, assumptions, sheet);
    let waveform = waveform(survey, sheet);
    let required = required(demand, derating, waveform, assumptions, sheet);
    let rating = rating(survey, required, sheet);
    let rating_w = rating_w(survey, rating, assumptions, sheet);
    let surge = surge(survey, rating, waveform, assumptions, sheet);
    let losses = losses(rating, rating_w, assumptions, sheet);
    let (mains_window, mains_window_volts) = mains_window(survey, assumptions, sheet);
    warn_of_no_load(survey, demand, &losses, assumptions, sheet);
    Inverter {
        required,
        rating,
        rating_w,
        derating,
        surge,
        surge_held: Seconds(sheet.line("inverter.surge_s", &SURGE_HELD, &[], assumptions.inverter_surge_s)),
        surge_margin: surge_margin(surge, demand, sheet),
        waveform,
        load_share: load_share(demand, rating, rating_w, derating, sheet),
        losses,
        changeover: changeover(survey, mains_window, assumptions, sheet),
        mains_window,
        mains_window_volts,
        peak_dc: peak_dc(demand, &losses, sheet),
    }
}

/// What heat and height leave of the continuous rating; the surge of a second is not touched.
fn derating(ambient: Celsius, altitude: Metres, assumptions: &Assumptions, sheet: &mut Sheet) -> Fraction {
    const HOTTEST: f64 = 50.0;
    if ambient.0 > HOTTEST {
        let (lowest, highest) = (assumptions.derating_from_c, HOTTEST);
        sheet.find(Finding::OutsideMethod { what: "derating by heat", given: ambient.0, lowest, highest, unit: "°C" });
    }
    let heat = 1.0 - assumptions.derating_per_k * (ambient.0 - assumptions.derating_from_c).max(0.0);
    let by_rule = 1.0 - assumptions.derating_per_100_m * ((altitude.0 - 1000.0) / 100.0).max(0.0);
    let height = by_rule.min(altitude_share(altitude, sheet));
    let share = (heat * height).clamp(assumptions.derating_least, 1.0);
    let values = [("T", ambient.0, "°C"), ("T_0", assumptions.derating_from_c, "°C"), ("f_height", height, "")];
    Fraction::new(sheet.line("inverter.derating", &DERATING, &values, share)).unwrap_or(Fraction::ONE)
}

/// A sine, unless a square wave is on offer or there already and every load bears it.
fn waveform(survey: &Survey, sheet: &mut Sheet) -> Waveform {
    let reused = survey.reuse.is_some_and(|unit| !unit.sine);
    if !reused && !survey.choice.square_wave_offered {
        return Waveform::Sine;
    }
    let mut refused = false;
    for load in &survey.loads {
        let load_name = load.name.clone();
        match load.needs_sine {
            NeedsSine::Yes => {
                refused = true;
                sheet.find(Finding::SquareWaveRefused { load: load_name, reused });
            }
            NeedsSine::Prefers => sheet.find(Finding::SquareWaveDisliked { load: load_name }),
            NeedsSine::No => {}
        }
    }
    if refused && !reused { Waveform::Sine } else { Waveform::Square }
}

/// What a square wave leaves of a start: its harmonics make heat and no torque.
fn surge_multiple(waveform: Waveform, assumptions: &Assumptions) -> f64 {
    let share = if waveform == Waveform::Square { assumptions.square_wave_surge_share } else { 1.0 };
    assumptions.inverter_surge_multiple * share
}

fn required(
    demand: &Demand,
    derating: Fraction,
    waveform: Waveform,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> VoltAmps {
    let power_factor = assumptions.inverter_rating_power_factor;
    let with_margin = (1.0 + assumptions.inverter_margin) / derating.get();
    let multiple = surge_multiple(waveform, assumptions);
    let apparent = demand.running_va.max(VoltAmps(demand.running.0 / power_factor)) * with_margin;
    let required = apparent.max(demand.surge_staggered / multiple);
    let values = [
        ("S", demand.running_va.0, "VA"),
        ("P", demand.running.0, "W"),
        ("S_staggered", demand.surge_staggered.0, "VA"),
        ("m", assumptions.inverter_margin, ""),
        ("f", derating.get(), ""),
        ("λ", power_factor, ""),
        ("n", multiple, ""),
    ];
    VoltAmps(sheet.line("inverter.required_va", &REQUIRED, &values, required.0))
}

/// The next size of the trade, or the unit that is there; too small a one is found out.
fn rating(survey: &Survey, required: VoltAmps, sheet: &mut Sheet) -> VoltAmps {
    let largest = VoltAmps(INVERTER_VA[INVERTER_VA.len() - 1]);
    let rating = match survey.reuse {
        Some(unit) => unit.rating,
        None => INVERTER_VA.iter().map(|&size| VoltAmps(size)).find(|&size| size >= required).unwrap_or(largest),
    };
    if rating < required {
        sheet.find(match survey.reuse {
            Some(unit) => Finding::ReusedInverterTooSmall { needed: required, there: unit.rating },
            None => Finding::NoInverterFits { needed: required, largest },
        });
    }
    VoltAmps(sheet.line("inverter.rating_va", &RATING, &[("S_required", required.0, "VA")], rating.0))
}

fn rating_w(survey: &Survey, rating: VoltAmps, assumptions: &Assumptions, sheet: &mut Sheet) -> Watts {
    let power_factor = assumptions.inverter_rating_power_factor;
    let by_factor = Watts(rating.0 * power_factor);
    let rating_w = survey.reuse.and_then(|unit| unit.rating_w).unwrap_or(by_factor);
    let values = [("S_rated", rating.0, "VA"), ("λ", rating_w.0 / rating.0, "")];
    Watts(sheet.line("inverter.rating_w", &RATING_W, &values, rating_w.0))
}

fn surge(
    survey: &Survey,
    rating: VoltAmps,
    waveform: Waveform,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> VoltAmps {
    let multiple = surge_multiple(waveform, assumptions);
    let surge = survey.reuse.and_then(|unit| unit.surge).unwrap_or(rating * multiple);
    let values = [("n", surge / rating, ""), ("S_rated", rating.0, "VA")];
    VoltAmps(sheet.line("inverter.surge_va", &SURGE, &values, surge.0))
}

fn surge_margin(surge: VoltAmps, demand: &Demand, sheet: &mut Sheet) -> f64 {
    let hardest = demand.surge_staggered.max(demand.running_va);
    let values = [("S_surge", surge.0, "VA"), ("S_staggered", hardest.0, "VA")];
    sheet.line("inverter.surge_margin", &SURGE_MARGIN, &values, surge / hardest - 1.0)
}

fn load_share(demand: &Demand, rating: VoltAmps, rating_w: Watts, derating: Fraction, sheet: &mut Sheet) -> f64 {
    let share = (demand.running_va / rating).max(demand.running / rating_w) / derating.get();
    let values = [("S", demand.running_va.0, "VA"), ("P", demand.running.0, "W"), ("f", derating.get(), "")];
    sheet.line("inverter.load_share", &LOAD_SHARE, &values, share)
}

/// Small units built for 12 V lose more than larger ones.
fn losses(rating: VoltAmps, rated: Watts, assumptions: &Assumptions, sheet: &mut Sheet) -> Losses {
    let a = assumptions;
    let (no_load, linear, quadratic) = if rating.0 <= SMALL_INVERTER_VA {
        (a.small_loss_no_load, a.small_loss_linear, a.small_loss_quadratic)
    } else {
        (a.loss_no_load, a.loss_linear, a.loss_quadratic)
    };
    let values = [("p_0", no_load, ""), ("P_rated", rated.0, "W")];
    sheet.line("inverter.losses.rated_w", &RATING_W, &[("S_rated", rating.0, "VA")], rated.0);
    Losses {
        no_load: Watts(sheet.line("inverter.losses.no_load_w", &NO_LOAD, &values, no_load * rated.0)),
        linear: sheet.line("inverter.losses.linear", &LOSS_TERM, &[], linear),
        quadratic: sheet.line("inverter.losses.quadratic", &LOSS_TERM, &[], quadratic),
        rated,
    }
}

fn peak_dc(demand: &Demand, losses: &Losses, sheet: &mut Sheet) -> Watts {
    let values = [
        ("P", demand.running.0, "W"),
        ("P_0", losses.no_load.0, "W"),
        ("k_1", losses.linear, ""),
        ("k_2", losses.quadratic, ""),
        ("P_rated", losses.rated.0, "W"),
    ];
    Watts(sheet.line("inverter.peak_dc_w", &PEAK_DC, &values, losses.drawn(demand.running).0))
}

/// The narrow window where the site stays in it, else the wide one; what lies outside is found out.
fn mains_window(survey: &Survey, assumptions: &Assumptions, sheet: &mut Sheet) -> (MainsWindow, (AcVolts, AcVolts)) {
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
    let nominal = [("V", site.supply.0, "V")];
    sheet.line("inverter.mains_window_v[0]", &WINDOW, &nominal, window.0.0);
    sheet.line("inverter.mains_window_v[1]", &WINDOW, &nominal, window.1.0);
    (kind, window)
}

/// The break at changeover, against the shortest that each load rides through.
fn changeover(survey: &Survey, window: MainsWindow, assumptions: &Assumptions, sheet: &mut Sheet) -> Milliseconds {
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

/// A unit that draws much for itself empties a small bank by night.
fn warn_of_no_load(survey: &Survey, demand: &Demand, losses: &Losses, assumptions: &Assumptions, sheet: &mut Sheet) {
    let own = losses.no_load * survey.outage.autonomy;
    let share = own / (own + demand.outage);
    if share > assumptions.no_load_share_note {
        sheet.find(Finding::NoLoadDrawHeavy { draw: losses.no_load, share });
    }
}
