//! What it needs: verdict first, then what to fit, in fitting order, each with its reason.

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;

use super::hours::lasts;
use super::{anchor, unfinished};
use crate::jobs::JobId;
use crate::simulation;
use crate::sizing::design::{Cable, CrossSection, Design, MotorStart, RulingMethod, StartVerdict};
use crate::sizing::proof::{LoadCost, Recovery};
use crate::sizing::survey::{Conductor, LifeSupport, Survey};
use crate::sizing::{Finding, Severity};
use crate::units::Hours;
use crate::web::app::App;
use crate::web::error::Error;
use crate::web::forms::page;
use crate::web::frame::{Frame, StepOf};
use crate::web::past::changed_since_last_sheet;
use crate::web::price::case::Case;
use crate::web::session::Installer;
use crate::wording::{self, Labelled, Numbers, duration};

#[derive(Template)]
#[template(path = "design/needs.html")]
struct NeedsPage {
    frame: Frame,
    id: JobId,
    verdict: Verdict,
    figures: Vec<Figure>,
    played: Vec<(&'static str, String, String)>,
    costs: Vec<(String, Option<String>)>,
    changed: Option<String>,
    findings: Vec<Told>,
    kit: Vec<Part>,
    starts: Vec<Start>,
    settings: Vec<(&'static str, String, String)>,
    cautions: Vec<&'static str>,
}

/// The answer in shape, words and colour.
struct Verdict {
    class: &'static str,
    shape: &'static str,
    words: String,
}

/// A figure with the way to its working.
struct Figure {
    name: &'static str,
    value: String,
    anchor: String,
}

/// A finding as it is shown.
struct Told {
    class: &'static str,
    weight: &'static str,
    texts: Vec<String>,
    cure: &'static str,
}

/// One part to fit.
struct Part {
    name: String,
    what: String,
    why: String,
    anchor: String,
    code: &'static str,
}

/// A motor's start.
struct Start {
    load: String,
    class: &'static str,
    shape: &'static str,
    verdict: &'static str,
    needed: String,
    available: String,
    lowest: String,
}

/// The answer to a job's survey.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let case = Case::find(&app, &installer, JobId(id)).await?;
    let frame = Frame::of_step(&app, &installer, case.job.id, StepOf::Needs, "What it needs")?;
    let Some((survey, design)) = &case.designed else { return unfinished(frame, &case.job) };
    let design = &simulation::with_detail(survey, design.clone());
    let numbers = frame.numbers;
    page(&NeedsPage {
        id: case.job.id,
        verdict: verdict(survey, design),
        figures: figures(design, numbers),
        played: played(design, numbers),
        costs: costs(design),
        changed: changed_since_last_sheet(&app, &case).await?,
        findings: told(&design.findings),
        kit: kit(survey, design, numbers),
        starts: design.starts.iter().map(|start| start_told(start, numbers)).collect(),
        settings: settings(design, numbers),
        cautions: cautions(survey),
        frame,
    })
}

/// Words, shape and figure; never colour alone.
fn verdict(survey: &Survey, design: &Design) -> Verdict {
    let hours = duration(survey.outage.autonomy);
    let stops = design.findings.iter().filter(|finding| finding.severity() == Severity::Stop).count();
    let warns = design.findings.iter().filter(|finding| finding.severity() == Severity::Warn).count();
    match (stops, warns) {
        (0, 0) => Verdict { class: "hold", shape: "●", words: format!("Holds for {hours}") },
        (0, 1) => Verdict { class: "tight", shape: "▲", words: format!("Tight for {hours}: one thing to look at") },
        (0, n) => Verdict { class: "tight", shape: "▲", words: format!("Tight for {hours}: {n} things to look at") },
        (1, _) => {
            Verdict { class: "short", shape: "■", words: format!("Falls short of {hours}: one thing to put right") }
        }
        (n, _) => {
            Verdict { class: "short", shape: "■", words: format!("Falls short of {hours}: {n} things to put right") }
        }
    }
}

fn figures(design: &Design, numbers: Numbers) -> Vec<Figure> {
    let bank = &design.bank;
    let blocks = bank.blocks_in_series * bank.strings;
    let runtimes = design.proof.as_ref().map(|proof| (proof.runtime_aged, proof.runtime_new));
    vec![
        Figure {
            name: "Inverter",
            value: numbers.with_unit(design.inverter.rating.0, "VA"),
            anchor: anchor("inverter.rating_va"),
        },
        Figure {
            name: "Bank",
            value: format!("{blocks} × {}", numbers.with_unit(bank.block.0, "Ah")),
            anchor: anchor("bank.installed_ah"),
        },
        Figure {
            name: "Lasts",
            value: runtimes.map_or_else(String::new, |(aged, new)| between(aged, new)),
            anchor: anchor("proof.runtime_aged_h"),
        },
    ]
}

/// Two runtimes as a range, in quarters of an hour: "5 h 30 min to 7 h".
fn between(shorter: Hours, longer: Hours) -> String {
    let quarters = |hours: Hours| Hours((hours.0 * 4.0).floor() / 4.0);
    let (shorter, longer) = (if shorter.0 < 2.0 { shorter } else { quarters(shorter) }, quarters(longer));
    if shorter >= longer { lasts(shorter) } else { format!("{} to {}", lasts(shorter), lasts(longer)) }
}

/// What playing the cuts through says, each with the way to its working or its page.
fn played(design: &Design, numbers: Numbers) -> Vec<(&'static str, String, String)> {
    let Some(proof) = &design.proof else { return Vec::new() };
    let starts = match proof.starts.iter().filter(|start| !start.starts).count() {
        _ if proof.starts.is_empty() => None,
        0 => Some("all of them".to_owned()),
        n => Some(format!("{n} of {} do not", proof.starts.len())),
    };
    let full = match proof.weeks.recovery {
        Recovery::FullBeforeNextCut => "yes".to_owned(),
        Recovery::SlowlyLosing => format!("not every time; {} of mains missing", duration(proof.weeks.missing_hours)),
        Recovery::NeverRecovers => format!("never; {} of mains missing", duration(proof.weeks.missing_hours)),
    };
    let mut rows = vec![
        ("Lasts new, at 25 °C", lasts(proof.runtime_new), anchor("proof.runtime_new_h")),
        ("Lasts at the end of its life, on the coldest day", lasts(proof.runtime_aged), anchor("proof.runtime_aged_h")),
        (
            "Lowest volts at the unit in the cut",
            numbers.with_unit(proof.lowest.0, "V"),
            anchor("proof.lowest_voltage_v"),
        ),
    ];
    rows.extend(starts.map(|starts| ("Motors that still start at the end", starts, anchor("proof.lowest_voltage_v"))));
    rows.push(("Full before every cut of four weeks", full, anchor("proof.weeks.missing_h")));
    rows
}

/// What each load costs, dearest first, and what keeping it off in the evening gains; what costs next to
/// nothing is left out.
fn costs(design: &Design) -> Vec<(String, Option<String>)> {
    let detail = design.proof.as_ref().and_then(|proof| proof.detail.as_ref());
    let told = |cost: &LoadCost| {
        let evening = cost.out_of_evening.and_then(rounded);
        let evening = evening.map(|gain| format!("Kept off from 17 to 22 h only: about {gain} longer"));
        Some((format!("Without {}: about {} longer", cost.load, rounded(cost.off)?), evening))
    };
    detail.map_or_else(Vec::new, |detail| detail.costs.iter().filter_map(told).collect())
}

/// A gain to ten minutes, to whole hours where it is long; nothing where it is less than five minutes.
fn rounded(gain: Hours) -> Option<String> {
    let step = if gain.0 >= 10.0 { 1.0 } else { 1.0 / 6.0 };
    (gain.0 >= 1.0 / 12.0).then(|| lasts(Hours((gain.0 / step).round().max(1.0) * step)))
}

/// Findings of one kind stand together under their one cure.
fn told(findings: &[Finding]) -> Vec<Told> {
    let mut kinds: Vec<Told> = Vec::new();
    for finding in findings {
        let (class, weight) = wording::severity(finding.severity());
        let wording::Told { text, cure, .. } = wording::finding(finding);
        match kinds.iter_mut().find(|kind| kind.cure == cure && kind.class == class) {
            Some(kind) => kind.texts.push(text),
            None => kinds.push(Told { class, weight, texts: vec![text], cure }),
        }
    }
    kinds
}

/// Battery, its fuse and cable, inverter, then outwards.
fn kit(survey: &Survey, design: &Design, numbers: Numbers) -> Vec<Part> {
    let mut kit = vec![bank(survey, design, numbers)];
    let runs = |dc: bool| design.cables.iter().filter(move |cable| cable.run.is_dc() == dc);
    kit.extend(runs(true).map(|cable| cable_told(survey, cable, numbers)));
    kit.push(inverter(survey, design, numbers));
    kit.push(charger(design, numbers));
    kit.extend(runs(false).map(|cable| cable_told(survey, cable, numbers)));
    kit.extend(air(design, numbers));
    kit
}

fn bank(survey: &Survey, design: &Design, numbers: Numbers) -> Part {
    let bank = &design.bank;
    let method = match bank.ruled_by {
        RulingMethod::Peukert => "the depth of discharge",
        RulingMethod::Section => "the section method with ageing",
        RulingMethod::Kibam => "playing the cut through",
    };
    let strings = if bank.strings == 1 { "one string".to_owned() } else { format!("{} strings", bank.strings) };
    Part {
        name: format!("Bank, {}", numbers.with_unit(bank.bus.volts().0, "V")),
        what: format!(
            "{} blocks of 12 V {} at the {} rate, {}, {strings}; about {}",
            bank.blocks_in_series * bank.strings,
            numbers.with_unit(bank.block.0, "Ah"),
            numbers.with_unit(bank.rated.0, "h"),
            survey.choice.chemistry.label(),
            numbers.with_unit(bank.weight.0, "kg"),
        ),
        why: format!(
            "The cut asks for {}; {method} rules. Lives about {}.",
            numbers.with_unit(bank.required.0, "Ah"),
            numbers.with_unit(design.life.expected.0, "years"),
        ),
        anchor: anchor("bank.required_ah"),
        code: "",
    }
}

fn inverter(survey: &Survey, design: &Design, numbers: Numbers) -> Part {
    let unit = &design.inverter;
    let there = if survey.reuse.is_some() { " (the one that is there)" } else { "" };
    Part {
        name: format!("Inverter{there}"),
        what: format!(
            "{} and {}, {}, bears {} for {}",
            numbers.with_unit(unit.rating.0, "VA"),
            numbers.with_unit(unit.rating_w.0, "W"),
            unit.waveform.label(),
            numbers.with_unit(unit.surge.0, "VA"),
            numbers.with_unit(unit.surge_held.0, "s"),
        ),
        why: format!(
            "Running {} and {}; loaded to {}; {} left above the hardest start.",
            numbers.with_unit(design.demand.running_va.0, "VA"),
            numbers.with_unit(design.demand.running.0, "W"),
            numbers.percent(unit.load_share),
            numbers.percent(unit.surge_margin),
        ),
        anchor: anchor("inverter.required_va"),
        code: "",
    }
}

fn charger(design: &Design, numbers: Numbers) -> Part {
    let charger = &design.charger;
    Part {
        name: "Charger".to_owned(),
        what: format!("set to {}", numbers.with_unit(charger.current.0, "A")),
        why: format!(
            "Full again in {}; this bank wants {} to {}.",
            duration(charger.recharge),
            numbers.with_unit(charger.least.0, "A"),
            numbers.with_unit(charger.most.0, "A"),
        ),
        anchor: anchor("charger.current_a"),
        code: "",
    }
}

fn cable_told(survey: &Survey, cable: &Cable, numbers: Numbers) -> Part {
    let size = cable.size.map_or_else(|| "no size fits".to_owned(), |size| size_told(size, numbers));
    let times = if cable.parallel > 1 { format!("{} × ", cable.parallel) } else { String::new() };
    let metal = if cable.run.is_dc() { Conductor::Copper } else { survey.choice.conductor };
    let earth = cable.protective_conductor.map(|size| format!(", earth {}", size_told(size, numbers)));
    let fuse = match cable.fuse {
        Some(fuse) => format!(
            "{} {}, breaking {} or more",
            numbers.with_unit(fuse.0, "A"),
            cable.device,
            numbers.with_unit(cable.breaking_capacity.0, "kA")
        ),
        None => "no fuse of the trade fits".to_owned(),
    };
    Part {
        name: format!("Cable {}", cable.run.label()),
        what: format!(
            "{times}{size} {}{}, {}; {fuse}",
            metal.label(),
            earth.unwrap_or_default(),
            numbers.with_unit(cable.length.0, "m")
        ),
        why: format!(
            "Carries {} of {}; drops {} ({}).",
            numbers.with_unit(cable.design_current.0, "A"),
            numbers.with_unit(cable.capacity.0, "A"),
            numbers.with_unit(cable.voltage_drop, "V"),
            numbers.percent(cable.voltage_drop_share),
        ),
        anchor: anchor(&format!("cables.{}.design_current_a", cable.run.key())),
        code: cable.code,
    }
}

fn size_told(size: CrossSection, numbers: Numbers) -> String {
    match size {
        CrossSection::Metric(area) => numbers.with_unit(area.0, "mm²"),
        CrossSection::Awg(size) => format!("{size}\u{a0}AWG"),
    }
}

/// Nothing for a bank that gives off no gas.
fn air(design: &Design, numbers: Numbers) -> Option<Part> {
    let air = &design.ventilation;
    (air.airflow.0 > 0.0).then(|| Part {
        name: "Air for the bank".to_owned(),
        what: format!(
            "two openings of {} each, low and high; no spark within {} of a vent",
            numbers.with_unit(air.opening.0, "cm²"),
            numbers.with_unit(air.safe_distance.0, "mm")
        ),
        why: format!("While charging it needs {} of fresh air.", numbers.with_unit(air.airflow.0, "m³/h")),
        anchor: anchor("ventilation.airflow_m3_per_h"),
        code: "EN IEC 62485-2",
    })
}

fn start_told(start: &MotorStart, numbers: Numbers) -> Start {
    let (class, shape) = match start.verdict {
        StartVerdict::Starts => ("hold", "●"),
        StartVerdict::Marginal => ("tight", "▲"),
        StartVerdict::WillNotStart => ("short", "■"),
    };
    Start {
        load: start.load.clone(),
        class,
        shape,
        verdict: start.verdict.label(),
        needed: numbers.with_unit(start.needed.0, "VA"),
        available: numbers.with_unit(start.available.0, "VA"),
        lowest: numbers.with_unit(start.lowest.0, "V"),
    }
}

/// What is set on the unit at commissioning.
fn settings(design: &Design, numbers: Numbers) -> Vec<(&'static str, String, String)> {
    let (charger, unit, bank) = (&design.charger, &design.inverter, &design.bank);
    let volts = |value: f64| numbers.with_unit(value, "V");
    let window = unit.mains_window_volts;
    vec![
        ("Charging current", numbers.with_unit(charger.current.0, "A"), anchor("charger.current_a")),
        ("Absorption at 25 °C", volts(charger.absorption.0), anchor("charger.absorption_v")),
        ("Float at 25 °C", volts(charger.float.0), anchor("charger.float_v")),
        (
            "For each kelvin above 25 °C",
            numbers.with_unit(charger.compensation_per_kelvin * 1000.0, "mV"),
            anchor("charger.compensation_v_per_k"),
        ),
        ("Low-voltage cut-off", volts(bank.cut_off.0), anchor("bank.cut_off_v")),
        (
            "Mains window",
            format!("{}: {} to {}", unit.mains_window.label(), volts(window.0.0), volts(window.1.0)),
            anchor("inverter.mains_window_v[0]"),
        ),
        ("Changeover", numbers.with_unit(unit.changeover.0, "ms"), anchor("inverter.changeover_ms")),
        (
            "From the mains, load and charging together",
            numbers.with_unit(charger.incoming_current.0, "A"),
            anchor("charger.incoming_current_a"),
        ),
    ]
}

/// What can hurt someone on this job.
fn cautions(survey: &Survey) -> Vec<&'static str> {
    let mut cautions = vec![
        "Two sources: with the mains off the output is still live. Label every point of isolation.",
        "Back-feed kills: only an interlocked changeover that breaks before it makes, never a lead with two plugs.",
        "On battery the neutral is bonded to earth exactly once, and the bond opens when the mains is back.",
        "A bank gives thousands of amperes: insulated tools, no rings, covers on the posts, fuse within reach of the post.",
        "Blocks are heavy: lift with two people or a hoist.",
    ];
    if survey.choice.chemistry.is_flooded() {
        cautions.push("Acid and hydrogen: goggles, gloves, water and bicarbonate at hand, no flame, vents open.");
    } else if survey.choice.chemistry.is_lead_acid() {
        cautions.push("Sealed lead-acid still vents hydrogen when overcharged: no closed box, no flame.");
    } else {
        cautions.push("Lithium: only with its management system, never charged below 0 °C, away from the way out.");
    }
    if survey.loads.iter().any(|load| load.life_support != LifeSupport::No) {
        cautions
            .push("A life, a treatment or a product hangs on a load: promise no hours; it keeps a reserve of its own.");
    }
    cautions.push("Work on the board, earthing and protection is for a licensed person under the local code.");
    cautions
}
