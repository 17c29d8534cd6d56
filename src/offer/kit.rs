//! The parts list as it is first filled in: what the design asks to be fitted, in fitting order.
//!
//! The installer edits it; a line keeps the key of the part of the design that it came from.

use super::Voice;
use crate::quotes::Quantity;
use crate::sizing::design::{Cable, CrossSection, Run, Waveform};
use crate::sizing::survey::{Chemistry, Conductor};
use crate::sizing::{Design, Survey};
use crate::units::Amps;

/// One part that the design asks for.
#[derive(Clone, Debug, PartialEq)]
pub struct KitLine {
    /// Which part of the design it is; the same part keeps its key when the design changes.
    pub key: String,
    /// What the customer reads.
    pub text: String,
    /// How many, or how many metres.
    pub quantity: Quantity,
}

impl KitLine {
    fn new(key: impl Into<String>, text: String, quantity: f64) -> Self {
        Self { key: key.into(), text, quantity: Quantity::nearest(quantity) }
    }
}

/// Everything to be fitted: battery, its fuse and cables, inverter, breakers and their cables, labels.
pub fn kit(survey: &Survey, design: &Design, voice: Voice) -> Vec<KitLine> {
    let mut kit = vec![battery(survey, design, voice)];
    kit.extend(links(design, voice));
    for cable in design.cables.iter().filter(|cable| cable.run.is_dc()) {
        kit.extend(run(survey, design, cable, voice));
    }
    if survey.reuse.is_none() {
        kit.push(inverter(design, voice));
    }
    for cable in design.cables.iter().filter(|cable| !cable.run.is_dc()) {
        kit.extend(run(survey, design, cable, voice));
    }
    kit.push(KitLine::new("labels", voice.words.say("kit-labels"), 1.0));
    kit
}

fn battery(survey: &Survey, design: &Design, voice: Voice) -> KitLine {
    let bank = &design.bank;
    let kind = voice.words.say(match survey.choice.chemistry {
        Chemistry::FloodedTubular => "kit-flooded-tubular",
        Chemistry::FloodedFlatPlate => "kit-flooded-flat",
        Chemistry::VrlaAgm => "kit-agm",
        Chemistry::VrlaGel => "kit-gel",
        Chemistry::Lfp => "kit-lfp",
    });
    let text = voice.words.fill(
        "kit-battery",
        &[
            ("kind", kind.into()),
            ("capacity", voice.numbers.with_unit(bank.block.0, "Ah").into()),
            ("rate", voice.numbers.with_unit(bank.rated.0, "h").into()),
        ],
    );
    KitLine::new("battery", text, f64::from(bank.blocks_in_series * bank.strings))
}

/// A set of links where there is more than one block.
fn links(design: &Design, voice: Voice) -> Option<KitLine> {
    let blocks = design.bank.blocks_in_series * design.bank.strings;
    (blocks > 1).then(|| KitLine::new("links", voice.words.say("kit-links"), 1.0))
}

fn inverter(design: &Design, voice: Voice) -> KitLine {
    let wave = voice.words.say(match design.inverter.waveform {
        Waveform::Sine => "kit-sine",
        Waveform::Square => "kit-square",
    });
    let text = voice.words.fill(
        "kit-inverter",
        &[
            ("rating", voice.numbers.with_unit(design.inverter.rating.0, "VA").into()),
            ("bus", voice.numbers.with_unit(design.bank.bus.volts().0, "V").into()),
            ("wave", wave.into()),
            ("current", voice.numbers.with_unit(design.charger.current.0, "A").into()),
        ],
    );
    KitLine::new("inverter", text, 1.0)
}

/// Protection and cable of one run; what the engine could not find is left out, and a finding says so.
fn run(survey: &Survey, design: &Design, cable: &Cable, voice: Voice) -> Vec<KitLine> {
    let times = if cable.run == Run::StringLead { f64::from(design.bank.strings) } else { 1.0 };
    let device = cable.fuse.map(|rating| device(cable, rating, times, voice));
    let conductors = cable.size.map(|size| conductors(survey, cable, size, times, voice));
    device.into_iter().chain(conductors).collect()
}

fn device(cable: &Cable, rating: Amps, times: f64, voice: Voice) -> KitLine {
    let text = voice.words.fill(
        "kit-device",
        &[
            ("device", capitalised(cable.device).into()),
            ("rating", voice.numbers.with_unit(rating.0, "A").into()),
            ("breaks", voice.numbers.with_unit(cable.breaking_capacity.0, "kA").into()),
            ("run", voice.words.say(run_name(cable.run)).into()),
        ],
    );
    KitLine::new(format!("device.{}", cable.run.key()), text, times)
}

/// On the battery's side two single cores, each of the run's length; on the supply's side one cable.
fn conductors(survey: &Survey, cable: &Cable, size: CrossSection, times: f64, voice: Voice) -> KitLine {
    let metal = match survey.choice.conductor {
        Conductor::Copper => "kit-copper",
        Conductor::Aluminium => "kit-aluminium",
    };
    let (message, poles) = if cable.run.is_dc() { ("kit-cable-battery", 2.0) } else { ("kit-cable-supply", 1.0) };
    let text = voice.words.fill(
        message,
        &[
            ("metal", voice.words.say(metal).into()),
            ("size", told(size, voice).into()),
            ("earth", told(cable.protective_conductor.unwrap_or(size), voice).into()),
            ("run", voice.words.say(run_name(cable.run)).into()),
        ],
    );
    let metres = cable.length.0 * poles * times * f64::from(cable.parallel);
    KitLine::new(format!("cable.{}", cable.run.key()), text, half_metres_up(metres))
}

/// Cable is cut from a reel in half metres.
fn half_metres_up(metres: f64) -> f64 {
    (metres * 2.0 - 1e-9).ceil() / 2.0
}

fn run_name(run: Run) -> &'static str {
    match run {
        Run::BankToInverter => "kit-run-bank-to-inverter",
        Run::StringLead => "kit-run-string-lead",
        Run::InverterToBoard => "kit-run-inverter-to-board",
        Run::MainsToInverter => "kit-run-mains-to-inverter",
        Run::ChargerToBank => "kit-run-charger-to-bank",
    }
}

fn told(size: CrossSection, voice: Voice) -> String {
    match size {
        CrossSection::Metric(area) => voice.numbers.with_unit(area.0, "mm²"),
        CrossSection::Awg(size) => format!("{size}\u{a0}AWG"),
    }
}

fn capitalised(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}
