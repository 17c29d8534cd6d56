//! The stay-on list as a page.

use std::collections::BTreeMap;

use askama::Template;

use super::form::{Count, ListForm};
use super::row::{Against, Row};
use crate::documents::names::Named;
use crate::documents::{Draft, defaults};
use crate::sizing::survey::{LifeSupport, NeedsSine, Outage, Pattern, StartKind, StartsAt};
use crate::sizing::tables::appliances::{self, Appliance, Group};
use crate::sizing::{Assumptions, Sheet, load_survey};
use crate::units::Hours;
use crate::web::conflict::Conflict;
use crate::web::forms::Complaints;
use crate::web::frame::Frame;
use crate::wording::{Labelled, Numbers};

/// The stay-on list.
#[derive(Template)]
#[template(path = "survey/list.html")]
pub struct ListPage {
    pub frame: Frame,
    pub here: String,
    pub reload: String,
    pub form: ListForm,
    /// What is asked about a line.
    pub questions: BTreeMap<u32, String>,
    /// How a power was read, line by line.
    pub echoes: BTreeMap<u32, String>,
    /// How many of each name are on the list.
    pub listed: BTreeMap<String, u32>,
    pub tally: Option<Tally>,
    pub complaints: Complaints,
    pub conflict: Conflict,
}

/// What runs together, and the worst start.
pub struct Tally {
    pub running: String,
    pub start: String,
}

impl ListPage {
    /// The page around a form, with what is stored so far.
    pub fn new(frame: Frame, here: String, form: ListForm, draft: &Draft, tally: Option<Tally>) -> Self {
        let against = Against { site: &draft.site, mark: frame.numbers.mark };
        let echo = |(at, row): (&u32, &Row)| Some((*at, row.echo(&against)?));
        let mut listed = BTreeMap::new();
        for load in &draft.loads {
            *listed.entry(load.name.clone()).or_default() += load.quantity;
        }
        Self {
            reload: here.clone(),
            here,
            questions: BTreeMap::new(),
            echoes: form.loads.iter().filter_map(echo).collect(),
            listed,
            tally,
            complaints: Complaints::default(),
            conflict: Conflict::default(),
            form,
            frame,
        }
    }

    fn groups(&self) -> Vec<(&'static str, Vec<&'static Appliance>, Vec<&'static Appliance>)> {
        let group = |group: Group| {
            let (common, rest) = appliances::of_group(group).partition(|appliance| appliance.is_common());
            (group.name(), common, rest)
        };
        Group::ALL.into_iter().map(group).collect()
    }

    /// Whether one of these was counted, so that it must be seen.
    fn are_counted(&self, appliances: &[&Appliance]) -> bool {
        appliances.iter().any(|appliance| !self.count(appliance.key).is_off())
    }

    fn count(&self, key: &str) -> Count {
        self.form.counts.get(key).cloned().unwrap_or_default()
    }

    /// Watts, the start if it is a hard one, and how many are on the list.
    fn hint(&self, appliance: &Appliance) -> String {
        let numbers = self.frame.numbers;
        let mut hint = numbers.with_unit(appliance.running.0, "W");
        if appliance.start.is_motor() {
            hint.push_str(&format!(", starts at {}×", numbers.three_figures(appliance.surge_multiple)));
        }
        if let Some(count) = self.listed.get(appliance.name) {
            hint.push_str(&format!(", {count} on the list"));
        }
        hint
    }

    /// Lines that stand on the list.
    fn lines(&self) -> Vec<(&u32, &Row)> {
        self.form.loads.iter().filter(|(_, row)| row.is_kept()).collect()
    }

    /// Lines for loads of one's own: blank, or not on the list yet.
    fn own(&self) -> Vec<(&u32, &Row)> {
        self.form.loads.iter().filter(|(_, row)| !row.is_kept()).collect()
    }

    /// Whether something was typed into them.
    fn are_begun(&self, rows: &[(&u32, &Row)]) -> bool {
        rows.iter().any(|(_, row)| !row.is_blank())
    }

    fn question(&self, at: &u32) -> &str {
        self.questions.get(at).map_or("", String::as_str)
    }

    fn echo(&self, at: &u32) -> &str {
        self.echoes.get(at).map_or("", String::as_str)
    }

    /// A line's hours and start in a few words.
    fn told(&self, row: &Row) -> String {
        let usual = self.frame.numbers.three_figures(defaults::usual(row.kind()).surge_multiple);
        let surge = if row.surge.is_empty() { usual } else { row.surge.clone() };
        let when = if row.when.is_empty() { "All day" } else { &row.when };
        let duty = if row.duty.is_empty() { String::new() } else { format!(", working {} %", row.duty) };
        let start = if row.kind().is_motor() { format!(", starts at {surge}×") } else { String::new() };
        let turn = if row.turn.is_empty() { String::new() } else { format!(", takes turns: {}", row.turn) };
        format!("{when}{duty} · {}{start}{turn}", row.kind().label())
    }

    /// A unit with what is usual for the line's kind of start.
    fn usually(&self, row: &Row, of: &str) -> String {
        let usual = defaults::usual(row.kind());
        let (unit, value) = match of {
            "factor" => ("", usual.power_factor),
            "surge" => ("×", usual.surge_multiple),
            "surge_s" => ("s", usual.surge_s),
            _ => ("ms", usual.max_break_ms),
        };
        let value = self.frame.numbers.with_unit(value, unit);
        format!("usually {value}")
    }

    fn starts(&self) -> Vec<(&'static str, &'static str)> {
        StartKind::ALL.map(|kind| (kind.name(), kind.label())).to_vec()
    }

    fn sines(&self) -> Vec<(&'static str, &'static str)> {
        let kinds = [NeedsSine::No, NeedsSine::Prefers, NeedsSine::Yes].map(|kind| (kind.name(), kind.label()));
        [("", "as usual for its kind")].into_iter().chain(kinds).collect()
    }

    fn lives(&self) -> Vec<(&'static str, &'static str)> {
        let kinds = [LifeSupport::No, LifeSupport::Yes, LifeSupport::Clinical, LifeSupport::ProductCritical];
        kinds.map(|kind| (kind.name(), kind.label())).to_vec()
    }
}

/// What the list adds up to; the length of the cut does not matter for it.
pub fn tally(draft: &Draft, assumptions: &Assumptions, numbers: Numbers) -> Option<Tally> {
    let mut draft = draft.clone();
    let autonomy = Hours(4.0);
    let cuts_per_week = defaults::CUTS_PER_WEEK;
    let mains_between_cuts = defaults::mains_between_cuts(cuts_per_week, autonomy);
    draft.outage.get_or_insert(Outage {
        autonomy,
        starts_at: StartsAt::Worst,
        cuts_per_week,
        mains_between_cuts,
        pattern: Pattern::default(),
    });
    let demand = load_survey::demand(&draft.complete().ok()?, assumptions, &mut Sheet::default());
    Some(Tally {
        running: numbers.with_unit(demand.running.0, "W"),
        start: numbers.with_unit(demand.surge_staggered.0, "VA"),
    })
}
