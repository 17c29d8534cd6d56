//! What the customer ought to know, and the words of caution.
//!
//! Common practice of handovers; the codes named are those that the figures follow.

use super::Voice;
use crate::sizing::survey::{Chemistry, Code};
use crate::sizing::{Design, Survey};

/// How to live with it: refilling, years, heat, growth, water, the old battery.
pub fn good_to_know(survey: &Survey, design: &Design, voice: Voice) -> Vec<String> {
    let refill = voice.words.duration((design.charger.recharge.0 * 2.0).round() / 2.0);
    let mut told = vec![voice.words.fill("good-refill", &[("duration", refill.into())]), years(design, voice)];
    told.extend(["good-heat", "good-added"].map(|name| voice.words.say(name)));
    if survey.choice.chemistry.is_flooded() {
        told.push(voice.words.say("good-water"));
    }
    told.push(voice.words.say("good-old"));
    told
}

fn years(design: &Design, voice: Voice) -> String {
    let years = design.life.expected.0.floor() as u32;
    if years == 0 {
        return voice.words.say("good-years-less");
    }
    voice.words.fill("good-years", &[("duration", voice.words.fill("years", &[("count", years.into())]).into())])
}

/// What can hurt someone, in the order in which it is met.
pub fn cautions(survey: &Survey, voice: Voice) -> Vec<String> {
    let chemistry = survey.choice.chemistry;
    let of_chemistry: &[&str] = match chemistry {
        Chemistry::FloodedTubular | Chemistry::FloodedFlatPlate => &["care-acid", "care-air"],
        Chemistry::VrlaAgm | Chemistry::VrlaGel => &["care-sealed"],
        Chemistry::Lfp => &["care-lithium"],
    };
    let code = match survey.choice.code {
        Code::Iec => "care-code-iec",
        Code::Nec => "care-code-nec",
    };
    let always = ["care-power", "care-sources", "care-socket"];
    let last = ["care-lift", "care-children", "care-smoke", "care-licensed", code];
    always.iter().chain(of_chemistry).chain(&last).map(|name| voice.words.say(name)).collect()
}
