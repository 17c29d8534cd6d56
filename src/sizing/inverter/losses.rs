//! What the unit takes for itself.

use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::{Demand, Losses};
use crate::sizing::finding::Finding;
use crate::sizing::sheet::{Checked, Rule, Sheet};
use crate::sizing::survey::Survey;
use crate::sizing::tables::trade_sizes::SMALL_INVERTER_VA;
use crate::units::{VoltAmps, Watts};

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

const RATED: Rule = Rule {
    symbol: "P_rated",
    name: "Power that the quadratic loss is taken against",
    formula: "P_rated as of the unit",
    unit: "W",
    source: "rating of the unit, above",
    checked: Checked::Derived,
};

const PEAK_DC: Rule = Rule {
    symbol: "P_dc",
    name: "Power drawn from the bank at the peak running load",
    formula: "P_dc = P_0 + (1 + k_1)·P + k_2·P² / P_rated",
    unit: "W",
    source: "three-term loss model of Schmidt and Sauer",
    checked: Checked::FromMemory,
};

/// Small units built for 12 V lose more than larger ones.
pub fn losses(rating: VoltAmps, rated: Watts, assumptions: &Assumptions, sheet: &mut Sheet) -> Losses {
    let a = assumptions;
    let (no_load, linear, quadratic) = if rating.0 <= SMALL_INVERTER_VA {
        (a.small_loss_no_load, a.small_loss_linear, a.small_loss_quadratic)
    } else {
        (a.loss_no_load, a.loss_linear, a.loss_quadratic)
    };
    let values = [("p_0", no_load, ""), ("P_rated", rated.0, "W")];
    sheet.line("inverter.losses.rated_w", &RATED, &[], rated.0);
    Losses {
        no_load: Watts(sheet.line("inverter.losses.no_load_w", &NO_LOAD, &values, no_load * rated.0)),
        linear: sheet.line("inverter.losses.linear", &LOSS_TERM, &[], linear),
        quadratic: sheet.line("inverter.losses.quadratic", &LOSS_TERM, &[], quadratic),
        rated,
    }
}

/// Power drawn from the bank while everything runs that may run together.
pub fn peak_dc(demand: &Demand, losses: &Losses, sheet: &mut Sheet) -> Watts {
    let values = [
        ("P", demand.running.0, "W"),
        ("P_0", losses.no_load.0, "W"),
        ("k_1", losses.linear, ""),
        ("k_2", losses.quadratic, ""),
        ("P_rated", losses.rated.0, "W"),
    ];
    Watts(sheet.line("inverter.peak_dc_w", &PEAK_DC, &values, losses.drawn(demand.running).0))
}

/// A unit that draws much for itself empties a small bank by night.
pub fn warn_of_no_load(
    survey: &Survey,
    demand: &Demand,
    losses: &Losses,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) {
    let own = losses.no_load * survey.outage.autonomy;
    let all = own + demand.outage;
    if own > all * assumptions.no_load_share_note {
        sheet.find(Finding::NoLoadDrawHeavy { draw: losses.no_load, share: own / all });
    }
}
