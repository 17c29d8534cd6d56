//! What the hours become when a customer switches something off: nothing is stored, the offer stays.

use super::Voice;
use crate::documents::Draft;
use crate::quotes::sheet::LoadHours;
use crate::simulation::{self, costs};
use crate::sizing::survey::LifeSupport;
use crate::sizing::{Assumptions, Design, Survey};
use crate::translations::Words;
use crate::units::Hours;

/// Gains that a sheet names.
const MOST: usize = 6;
/// A gain below this is not worth a word.
const LEAST: Hours = Hours(1.0 / 6.0);

/// A list to tick, and what ticking says.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct WhatIf {
    /// Row in the survey, name, and whether it is ticked.
    pub loads: Vec<(usize, String, bool)>,
    /// The hours with everything on and with the ticked ones off; nothing while nothing is ticked.
    pub told: Vec<String>,
}

/// What each load costs, dearest first: the few that matter. Nothing on which a life hangs is among them.
pub fn loads_hours(survey: &Survey, design: &Design) -> Vec<LoadHours> {
    let spare = |row: usize| survey.loads.get(row).is_some_and(|load| load.life_support == LifeSupport::No);
    let costs = costs::costs(survey, design).into_iter().filter(|cost| cost.off >= LEAST && spare(cost.row));
    costs.take(MOST).map(|cost| LoadHours { name: cost.load, gains_h: cost.off.0 }).collect()
}

/// A length of time as a customer reads it: to ten minutes, from ten hours on to hours, and no longer than
/// what is played.
pub fn about(hours: f64, words: &Words) -> String {
    if hours >= costs::LONGEST {
        return words.say("what-if-week");
    }
    let step = if hours >= 10.0 { 1.0 } else { 1.0 / 6.0 };
    words.duration((hours / step).round().max(1.0) * step)
}

/// The list of a frozen survey with some rows ticked; `None` where nothing may be switched off.
///
/// `survey` and `design` are the documents that were frozen with the sheet.
pub fn what_if(survey: &str, design: &str, ticked: impl Fn(usize) -> bool, voice: Voice) -> Option<WhatIf> {
    let survey = Draft::read(survey).ok()?.complete().ok()?;
    let spare = survey.loads.iter().enumerate().filter(|(_, load)| load.life_support == LifeSupport::No);
    let loads: Vec<_> = spare.map(|(row, load)| (row, load.name.clone(), ticked(row))).collect();
    if loads.is_empty() {
        return None;
    }
    let off: Vec<_> = loads.iter().filter(|load| load.2).map(|load| load.0).collect();
    let told = if off.is_empty() { Vec::new() } else { told(&survey, assumptions(&survey, design), &off, voice.words) };
    Some(WhatIf { loads, told })
}

fn told(survey: &Survey, assumptions: Assumptions, off: &[usize], words: &Words) -> Vec<String> {
    if off.len() == survey.loads.len() {
        return vec![words.say("what-if-nothing")];
    }
    let design = simulation::design(survey, assumptions);
    let [all, fewer] = [&[][..], off].map(|off| costs::runtime_with(survey, &design, |row| !off.contains(&row)).0);
    vec![
        words.fill("what-if-then", &[("duration", about(fewer, words).into())]),
        words.fill("what-if-now", &[("duration", about(all, words).into())]),
    ]
}

/// The factors that a frozen design was made with.
fn assumptions(survey: &Survey, design: &str) -> Assumptions {
    let mut assumptions = Assumptions::defaults(survey.choice.chemistry);
    let design: serde_json::Value = serde_json::from_str(design).unwrap_or_default();
    for entry in design["assumptions"].as_array().into_iter().flatten() {
        if let (Some(key), Some(value)) = (entry["key"].as_str(), entry["value"].as_f64()) {
            let _ = assumptions.set(key, value);
        }
    }
    assumptions
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::documents;
    use crate::wording::Numbers;

    const SURVEY: &str = r#"{ "format": "keeplit-survey-1", "outage": { "autonomy_h": 4 }, "loads": [
        { "name": "Fridge", "running_w": 120, "duty": 0.4 },
        { "name": "Iron", "running_w": 700, "duty": 0.5, "windows": [["18:00", "21:00"]] },
        { "name": "Breathing aid", "running_w": 60, "life_support": "yes" } ] }"#;

    fn voice() -> Voice {
        Voice { words: Words::of("en"), numbers: Numbers::default() }
    }

    fn frozen(factor: f64) -> (Survey, Design, String) {
        let (draft, survey) = documents::survey::read(SURVEY).expect("the survey is sound");
        let design = simulation::design(&survey, draft.assumptions(&[("bank_margin".to_owned(), factor)]));
        let text = documents::design::write(&design, &draft).to_string();
        (survey, design, text)
    }

    #[test]
    fn what_is_ticked_is_told_in_hours_and_nothing_a_life_hangs_on_can_be_ticked() {
        let (survey, design, text) = frozen(1.1);
        let quiet = what_if(SURVEY, &text, |_| false, voice()).expect("two may be ticked");
        assert_eq!(quiet.loads, [(0, "Fridge".to_owned(), false), (1, "Iron".to_owned(), false)]);
        assert_eq!(quiet.told, Vec::<String>::new());
        let asked = what_if(SURVEY, &text, |row| row == 1, voice()).expect("two may be ticked");
        let hours = costs::runtime_with(&survey, &design, |row| row != 1);
        assert!(asked.told[0].contains(&about(hours.0, Words::of("en"))), "{:?}", asked.told);
        assert!(asked.loads[1].2 && asked.told.len() == 2);
    }

    #[test]
    fn the_factors_are_those_that_were_frozen() {
        let (survey, _, text) = frozen(2.0);
        assert_eq!(assumptions(&survey, &text).bank_margin, 2.0);
        assert_eq!(assumptions(&survey, "no JSON"), Assumptions::defaults(survey.choice.chemistry));
    }

    #[test]
    fn the_sheet_names_the_dearest_loads_first_and_none_that_a_life_hangs_on() {
        let (survey, design, _) = frozen(1.1);
        let hours = loads_hours(&survey, &design);
        assert!(!hours.is_empty() && hours.windows(2).all(|pair| pair[0].gains_h >= pair[1].gains_h));
        assert!(hours.iter().all(|load| load.name != "Breathing aid"));
    }

    #[test]
    fn hours_are_rounded_as_people_say_them() {
        let words = Words::of("en");
        for (hours, told) in
            [(0.02, "10 minutes"), (1.32, "1 hour 20 minutes"), (12.4, "12 hours"), (200.0, "a week or more")]
        {
            assert_eq!(about(hours, words).replace('\u{a0}', " "), told);
        }
    }
}
