//! The proof on the sheet of its design, and what the installer must hear of it.

use crate::sizing::finding::Finding;
use crate::sizing::life::{self, Wear};
use crate::sizing::proof::{Proof, Recovery};
use crate::sizing::sheet::{Checked, Line, Rule, Sheet};
use crate::sizing::{Design, Survey, battery_bank};
use crate::units::AmpHours;

const KINETIC: &str = "kinetic battery model (Manwell and McGowan 1993), volts by open-circuit table and resistance";

const fn rule(symbol: &'static str, name: &'static str, formula: &'static str, unit: &'static str) -> Rule {
    Rule { symbol, name, formula, unit, source: KINETIC, checked: Checked::Read }
}

const NEW: Rule = rule(
    "T_new",
    "How long the new bank lasts at 25 °C",
    "y_1 = c·y + d, dy/dt = −I, dd/dt = −k'·d − (1−c)·I, I = P_dc/V, V = n·OCV(s) − I·R(s), s = y_1/(c·q_max); ends at y_1 = 0 or V = V_cut-off",
    "h",
);
const AGED: Rule = rule(
    "T_aged",
    "How long it lasts at the end of its life on the coldest day",
    "as T_new with q_max · health / f_temperature and R · ageing_R",
    "h",
);
const LOWEST: Rule = rule(
    "V_lowest",
    "Lowest volts at the unit during the cut, aged and cold",
    "V = n·OCV(s) − I·(R(s) + R_cable), at the ends of each stretch",
    "V",
);
const FULL: Rule = rule(
    "q_max",
    "Charge of both wells of the new bank",
    "1/q(t) = 1/q_max · (1 + (1/c − 1)·(1 − e^(−k't))/(k't)), through the ratings or through Peukert's law at 20, 5 and 1 h",
    "Ah",
);
const AT_HAND: Rule = rule("c", "Share of the charge at hand", "by the same fit", "");
const RATE: Rule = rule("k'", "Rate at which bound charge follows", "by the same fit", "1/h");
const MISSING: Rule = Rule {
    symbol: "T_missing",
    name: "Mains hours missing before the worst cut of four weeks",
    formula: "time to full from the charge at the cut: bulk at the setting, then a current that falls with what is missing, to 0.02·C_20",
    unit: "h",
    source: "makers' charging manuals; efficiency near full by the charge factor",
    checked: Checked::OurRule,
};

/// By how much the capacities of the two ways may differ unremarked.
const ALIKE: f64 = 0.05;

/// The design with its proof: lines, findings, and the life that the played cuts leave.
pub fn with(
    survey: &Survey,
    mut design: Design,
    proof: Proof,
    just: Option<AmpHours>,
    refused: Option<Finding>,
) -> Design {
    let mut sheet = Sheet::default();
    if let (Some(just), None) = (just, design.bank.methods.kibam) {
        let played = battery_bank::needs::played(just, &design.assumptions, &mut sheet);
        design.bank.methods.kibam = Some(played);
        let at = design.working.iter().position(|line| line.figure == "bank.methods.section_ah");
        let at = at.map_or(design.working.len(), |at| at + 1);
        design.working.splice(at..at, sheet.working.drain(..));
    }
    design.working.retain(|line: &Line| !line.figure.starts_with("life."));
    let wear = Wear { cuts: f64::from(proof.weeks.cuts), depths: proof.weeks.depths.clone() };
    design.life = life::life(survey, &wear, &design.assumptions, &mut sheet);
    write_down(&design, &proof, &mut sheet);
    refused.into_iter().for_each(|finding| sheet.find(finding));
    judge(survey, &design, &proof, &mut sheet);
    design.working.append(&mut sheet.working);
    for finding in sheet.findings {
        if !design.findings.contains(&finding) {
            design.findings.push(finding);
        }
    }
    design.findings.sort_by_key(|finding| std::cmp::Reverse(finding.severity()));
    design.proof = Some(proof);
    design
}

fn write_down(design: &Design, proof: &Proof, sheet: &mut Sheet) {
    let installed = ("C_installed", design.bank.installed.0, "Ah");
    sheet.line("proof.wells.full_ah", &FULL, &[installed], proof.wells.full.0);
    sheet.line("proof.wells.at_hand_share", &AT_HAND, &[installed], proof.wells.at_hand_share);
    sheet.line("proof.wells.rate_per_h", &RATE, &[installed], proof.wells.rate_per_h);
    let values = [
        ("q_max", proof.wells.full.0, "Ah"),
        ("c", proof.wells.at_hand_share, ""),
        ("k'", proof.wells.rate_per_h, "1/h"),
        ("V_cut-off", design.bank.cut_off.0, "V"),
    ];
    sheet.line("proof.runtime_new_h", &NEW, &values, proof.runtime_new.0);
    let values = [
        ("health", 1.0 / design.assumptions.ageing_factor, ""),
        ("f_temperature", design.bank.temperature_factor, ""),
        ("ageing_R", design.assumptions.aged_resistance_multiple, ""),
    ];
    sheet.line("proof.runtime_aged_h", &AGED, &values, proof.runtime_aged.0);
    sheet.line("proof.lowest_voltage_v", &LOWEST, &[values[2]], proof.lowest.0);
    let values = [("I", design.charger.current.0, "A"), ("C_20", proof.wells.full.0, "Ah")];
    sheet.line("proof.weeks.missing_h", &MISSING, &values, proof.weeks.missing_hours.0);
}

fn judge(survey: &Survey, design: &Design, proof: &Proof, sheet: &mut Sheet) {
    if !proof.holds {
        sheet.find(Finding::CutNotHeld { lasts: proof.runtime_aged, asked: survey.outage.autonomy });
    }
    let methods = design.bank.methods;
    let by_formula = methods.peukert.max(methods.section);
    if let Some(played) = methods.kibam
        && (played / by_formula - 1.0).abs() > ALIKE
    {
        sheet.find(Finding::MethodsDiffer { by_formula, played });
    }
    for start in proof.starts.iter().filter(|start| !start.starts) {
        let told = |finding: &Finding| matches!(finding, Finding::BankSagsAtStart { load, .. } if *load == start.load);
        if !design.findings.iter().any(told) {
            let (load, cut_off) = (start.load.clone(), design.bank.cut_off);
            sheet.find(Finding::StartFailsLate { load, at: start.at, lowest: start.lowest, cut_off });
        }
    }
    let (missing_hours, missing_current) = (proof.weeks.missing_hours, proof.weeks.missing_current);
    match proof.weeks.recovery {
        Recovery::FullBeforeNextCut => {}
        _ if design.findings.contains(&Finding::NoMains) => {}
        Recovery::SlowlyLosing => sheet.find(Finding::SlowlyLosing { missing_hours, missing_current }),
        Recovery::NeverRecovers => sheet.find(Finding::NeverRecovers { missing_hours, missing_current }),
    }
}
