//! The unit: rating with margin and derating, surge, losses, waveform, changeover, mains window.

mod derating;
mod losses;
mod mains;
mod waveform;

#[cfg(test)]
mod laws;
#[cfg(test)]
mod tests;

use super::assumptions::Assumptions;
use super::design::{Demand, Inverter, StartNeed, Waveform};
use super::finding::Finding;
use super::load_survey::Power;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::Survey;
use super::tables::trade_sizes::INVERTER_VA;
use crate::units::{Fraction, Seconds, VoltAmps, Watts};

const REQUIRED: Rule = Rule {
    symbol: "S_required",
    name: "Rating that the loads ask for",
    formula: "S_required = max((1 + m)·S / f, (1 + m)·P / (f·λ), S_staggered / n, S_long / f)",
    unit: "VA",
    source: "both the VA and the W rating are kept, with margin; the surge is borne with one motor starting at a time; \
             a start longer than the surge is held counts as running",
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
    formula: "S_surge = n · S_rated · w; w what the waveform leaves of a start",
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
    formula: "u = max(S / (f·S_rated), P / (f·P_rated))",
    unit: "",
    source: "both ratings are checked",
    checked: Checked::Derived,
};

/// What a unit makes of its rating: from the plate of the unit that is there, else as assumed.
struct Kind {
    /// W rating over VA rating (λ).
    power_factor: f64,
    /// Surge over VA rating, on its waveform (n).
    surge_multiple: f64,
    /// How long it holds that.
    surge_held: Seconds,
    /// What heat and height leave of the rating (f).
    derating: Fraction,
}

impl Kind {
    fn new(survey: &Survey, derating: Fraction, waveform: Waveform, assumptions: &Assumptions) -> Self {
        let power_factor = survey.reuse.and_then(|unit| Some(unit.rating_w?.0 / unit.rating.0));
        let surge_multiple = survey.reuse.and_then(|unit| Some(unit.surge? / unit.rating));
        let wave = waveform::surge_share(waveform, assumptions);
        Self {
            power_factor: power_factor.unwrap_or(assumptions.inverter_rating_power_factor),
            surge_multiple: surge_multiple.unwrap_or(assumptions.inverter_surge_multiple) * wave,
            surge_held: Seconds(assumptions.inverter_surge_s),
            derating,
        }
    }

    /// The VA rating that carries a power in VA and in W.
    fn carries(&self, power: Power) -> VoltAmps {
        power.apparent().max(VoltAmps(power.real.0 / self.power_factor)) / self.derating
    }
}

/// The unit that carries the demand, or what becomes of the demand on the unit that is there.
pub fn inverter(survey: &Survey, demand: &Demand, assumptions: &Assumptions, sheet: &mut Sheet) -> Inverter {
    let site = &survey.site;
    let derating = derating::derating(site.inverter_ambient, site.altitude, assumptions, sheet);
    let waveform = waveform::waveform(survey, sheet);
    let kind = Kind::new(survey, derating, waveform, assumptions);
    let required = required(demand, &kind, assumptions, sheet);
    let rating = rating(survey, required, sheet);
    let rating_w = rating_w(survey, rating, &kind, sheet);
    let surge = surge(survey, rating, waveform, assumptions, sheet);
    let losses = losses::losses(rating, rating_w, assumptions, sheet);
    let (mains_window, mains_window_volts) = mains::window(survey, assumptions, sheet);
    losses::warn_of_no_load(survey, demand, &losses, assumptions, sheet);
    Inverter {
        required,
        rating,
        rating_w,
        derating,
        surge,
        surge_held: Seconds(sheet.line("inverter.surge_s", &SURGE_HELD, &[], kind.surge_held.0)),
        surge_margin: surge_margin(surge, demand, sheet),
        waveform,
        load_share: load_share(demand, rating, rating_w, derating, sheet),
        losses,
        changeover: mains::changeover(survey, mains_window, assumptions, sheet),
        mains_window,
        mains_window_volts,
        peak_dc: losses::peak_dc(demand, &losses, sheet),
    }
}

fn required(demand: &Demand, kind: &Kind, assumptions: &Assumptions, sheet: &mut Sheet) -> VoltAmps {
    let (power_factor, derating) = (kind.power_factor, kind.derating.get());
    let running = demand.running_va.max(VoltAmps(demand.running.0 / power_factor));
    let running = running * ((1.0 + assumptions.inverter_margin) / derating);
    let starting = demand.surge_staggered / kind.surge_multiple;
    let long = longest_overload(demand, kind);
    let values = [
        ("S", demand.running_va.0, "VA"),
        ("P", demand.running.0, "W"),
        ("S_staggered", demand.surge_staggered.0, "VA"),
        ("S_long", long.0 * derating, "VA"),
        ("m", assumptions.inverter_margin, ""),
        ("f", derating, ""),
        ("λ", power_factor, ""),
        ("n", kind.surge_multiple, ""),
    ];
    VoltAmps(sheet.line("inverter.required_va", &REQUIRED, &values, running.max(starting).max(long).0))
}

/// The rating for the starts that last longer than the unit holds its surge.
fn longest_overload(demand: &Demand, kind: &Kind) -> VoltAmps {
    let long = demand.starts.iter().filter(|need| need.lasts > kind.surge_held);
    long.map(StartNeed::needed).map(|needed| kind.carries(needed)).fold(VoltAmps::ZERO, VoltAmps::max)
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

fn rating_w(survey: &Survey, rating: VoltAmps, kind: &Kind, sheet: &mut Sheet) -> Watts {
    let on_its_plate = survey.reuse.and_then(|unit| unit.rating_w);
    let rating_w = on_its_plate.unwrap_or(Watts(rating.0 * kind.power_factor));
    let values = [("S_rated", rating.0, "VA"), ("λ", kind.power_factor, "")];
    Watts(sheet.line("inverter.rating_w", &RATING_W, &values, rating_w.0))
}

fn surge(
    survey: &Survey,
    rating: VoltAmps,
    waveform: Waveform,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> VoltAmps {
    let on_its_plate = survey.reuse.and_then(|unit| unit.surge);
    let sine = on_its_plate.unwrap_or(rating * assumptions.inverter_surge_multiple);
    let share = waveform::surge_share(waveform, assumptions);
    let values = [("n", sine / rating, ""), ("S_rated", rating.0, "VA"), ("w", share, "")];
    VoltAmps(sheet.line("inverter.surge_va", &SURGE, &values, sine.0 * share))
}

fn surge_margin(surge: VoltAmps, demand: &Demand, sheet: &mut Sheet) -> f64 {
    let hardest = demand.surge_staggered;
    let values = [("S_surge", surge.0, "VA"), ("S_staggered", hardest.0, "VA")];
    sheet.line("inverter.surge_margin", &SURGE_MARGIN, &values, surge / hardest - 1.0)
}

fn load_share(demand: &Demand, rating: VoltAmps, rating_w: Watts, derating: Fraction, sheet: &mut Sheet) -> f64 {
    let share = (demand.running_va / rating).max(demand.running / rating_w) / derating.get();
    let values = [
        ("S", demand.running_va.0, "VA"),
        ("P", demand.running.0, "W"),
        ("S_rated", rating.0, "VA"),
        ("P_rated", rating_w.0, "W"),
        ("f", derating.get(), ""),
    ];
    sheet.line("inverter.load_share", &LOAD_SHARE, &values, share)
}
