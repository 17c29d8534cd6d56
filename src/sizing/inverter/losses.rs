//! What the unit takes for itself.

use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::{Demand, Losses};
use crate::sizing::finding::Finding;
use crate::sizing::sheet::{Checked, Rule, Sheet};
use crate::sizing::survey::Survey;
use crate::sizing::tables::trade_sizes::SMALL_INVERTER_VA;
use crate::units::{VoltAmps, Watts};

const FIT: &str = "three-term loss model of Schmidt and Sauer; fit to 36 battery inverters of 24 and 48 V in open test data \
                   of a US energy commission";

const ESTIMATE: &str = "three-term loss model of Schmidt and Sauer; estimate for small 12 V units, whose full load falls \
                        into the lowest band of India's star label";

const NO_LOAD: Rule = Rule {
    symbol: "P_0",
    name: "Draw of the unit with nothing on",
    formula: "P_0 = p_0 · P_rated",
    unit: "W",
    source: FIT,
    checked: Checked::Read,
};

const LINEAR: Rule = Rule {
    symbol: "k_1",
    name: "Loss in proportion to the load",
    formula: "k_1 as assumed for the size of the unit",
    unit: "",
    source: FIT,
    checked: Checked::Read,
};

const QUADRATIC: Rule = Rule {
    symbol: "k_2",
    name: "Loss by the square of the load",
    formula: "k_2 as assumed for the size of the unit",
    ..LINEAR
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
    let small = rating.0 <= SMALL_INVERTER_VA;
    let of_class = |rule| if small { Rule { source: ESTIMATE, checked: Checked::FromMemory, ..rule } } else { rule };
    let (no_load, linear, quadratic) = if small {
        (a.small_loss_no_load, a.small_loss_linear, a.small_loss_quadratic)
    } else {
        (a.loss_no_load, a.loss_linear, a.loss_quadratic)
    };
    let values = [("p_0", no_load, ""), ("P_rated", rated.0, "W")];
    sheet.line("inverter.losses.rated_w", &RATED, &[], rated.0);
    Losses {
        no_load: Watts(sheet.line("inverter.losses.no_load_w", &of_class(NO_LOAD), &values, no_load * rated.0)),
        linear: sheet.line("inverter.losses.linear", &of_class(LINEAR), &[], linear),
        quadratic: sheet.line("inverter.losses.quadratic", &of_class(QUADRATIC), &[], quadratic),
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
