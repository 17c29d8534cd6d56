//! The promise: the hours that were asked for, and on what they hold.

use super::Voice;
use crate::quotes::sheet::Promise;
use crate::sizing::survey::{LifeSupport, StartsAt};
use crate::sizing::{Design, Survey};

/// The promise in a few words and its conditions; none where nothing on the list may be promised hours.
pub fn promise(survey: &Survey, design: &Design, voice: Voice) -> Promise {
    let hours = survey.outage.autonomy.0;
    if survey.loads.iter().all(|load| load.life_support != LifeSupport::No) {
        return Promise { hours, short: voice.words.say("promise-none"), told: String::new(), holds_on: Vec::new() };
    }
    let duration = voice.words.duration(hours);
    let start = match survey.outage.starts_at {
        StartsAt::Worst => "promise-start",
        StartsAt::At(_) => "promise-start-asked",
    };
    Promise {
        hours,
        short: voice.words.fill("promise-about", &[("duration", duration.clone().into())]),
        told: voice.words.fill("promise-told", &[("duration", duration.into())]),
        holds_on: vec![
            voice.words.fill(start, &[("time", design.demand.sized_start.to_string().into())]),
            voice.words.say("promise-worst"),
            voice.words.say("promise-more"),
        ],
    }
}
