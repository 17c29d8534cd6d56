//! What stays on, what does not, and what must not run together.

use std::collections::BTreeMap;

use super::Voice;
use crate::quotes::sheet::StaysOn;
use crate::sizing::survey::{LifeSupport, Load, Window};
use crate::sizing::{Design, Finding, Survey};

/// Loads for which hours are promised, with when they may run.
pub fn stays_on(survey: &Survey, voice: Voice) -> Vec<StaysOn> {
    let promised = survey.loads.iter().filter(|load| load.life_support == LifeSupport::No);
    promised.map(|load| StaysOn { name: load.name.clone(), quantity: load.quantity, when: when(load, voice) }).collect()
}

/// Loads for which no hours are ever promised.
pub fn not_promised(survey: &Survey) -> Vec<String> {
    let vital = survey.loads.iter().filter(|load| load.life_support != LifeSupport::No);
    vital.map(|load| load.name.clone()).collect()
}

/// The installer's own lines first, then what is never on it unless it is listed.
pub fn left_off(own: &str, voice: Voice) -> Vec<String> {
    let own = own.lines().map(str::trim).filter(|line| !line.is_empty()).map(str::to_owned);
    own.chain([voice.words.say("off-heat"), voice.words.say("off-rest")]).collect()
}

/// Groups of loads that take turns; a turn of one load is none.
pub fn one_at_a_time(survey: &Survey) -> Vec<Vec<String>> {
    let mut groups: BTreeMap<&str, Vec<String>> = BTreeMap::new();
    for load in &survey.loads {
        if let Some(turn) = &load.turn {
            groups.entry(turn).or_default().push(load.name.clone());
        }
    }
    groups.into_values().filter(|group| group.len() > 1).collect()
}

/// Motors that must be started one after the other; none if the unit bears all together.
pub fn start_in_turn(survey: &Survey, design: &Design) -> Vec<String> {
    let too_much = |finding: &Finding| matches!(finding, Finding::RestartTogetherTooMuch { .. });
    if !design.findings.iter().any(too_much) {
        return Vec::new();
    }
    survey.loads.iter().filter(|load| load.start.is_motor()).map(|load| load.name.clone()).collect()
}

fn when(load: &Load, voice: Voice) -> String {
    let mut parts = vec![windows(&load.windows, voice)];
    if load.on_together < load.quantity {
        parts.push(voice.words.fill("on-together", &[("count", load.on_together.into())]));
    }
    if load.duty.get() < 0.995 {
        parts
            .push(voice.words.fill("on-share", &[("percent", voice.numbers.plain(load.duty.get() * 100.0, 0).into())]));
    }
    parts.join(", ")
}

fn windows(windows: &[Window], voice: Voice) -> String {
    if windows.contains(&Window::ALL_DAY) {
        return voice.words.say("on-all-day");
    }
    let between = |window: &Window| {
        voice
            .words
            .fill("on-between", &[("from", window.from.to_string().into()), ("to", window.to.to_string().into())])
    };
    let told = windows.iter().map(between);
    told.reduce(|first, second| voice.words.fill("on-and", &[("first", first.into()), ("second", second.into())]))
        .unwrap_or_default()
}
