//! The stay-on list: a count-off sheet with one box for each common load, and lines of one's own.

use std::collections::BTreeMap;

use askama::Template;
use axum::extract::{Path, Query, State};
use axum::response::Response;
use serde::Deserialize;

use super::row::{Against, Row};
use crate::documents::defaults;
use crate::documents::names::Named;
use crate::documents::{Draft, limits};
use crate::jobs::{Job, JobId};
use crate::reading;
use crate::sizing::survey::{LifeSupport, Load, NeedsSine, Outage, StartKind, StartsAt};
use crate::sizing::tables::appliances::{self, Appliance, Group};
use crate::sizing::{Sheet, load_survey};
use crate::store;
use crate::units::Hours;
use crate::web::app::App;
use crate::web::conflict::Conflict;
use crate::web::error::Error;
use crate::web::forms::{Complaints, Form, on_to, page, page_again, page_of_conflict, revision, submit};
use crate::web::frame::{Frame, StepOf};
use crate::web::session::Installer;
use crate::wording::{Labelled, Numbers};

/// Blank lines for loads of one's own.
const BLANK: usize = 3;
/// A power this many times off the usual one is asked about.
const SLIP: f64 = 5.0;

/// What is typed on the page.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct ListForm {
    key: String,
    revision: String,
    /// A load in one line.
    line: String,
    /// Counts of common loads, by their key.
    counts: BTreeMap<String, Count>,
    /// Lines of the list, and new ones.
    loads: BTreeMap<u32, Row>,
    /// `add` stays on the page.
    act: String,
}

/// A common load as it is counted.
#[derive(Clone, Debug, Default, PartialEq, Eq, Deserialize)]
#[serde(default)]
pub struct Count {
    quantity: String,
    power: String,
    when: String,
}

#[derive(Template)]
#[template(path = "survey/list.html")]
struct ListPage {
    frame: Frame,
    here: String,
    form: ListForm,
    slips: BTreeMap<u32, String>,
    tally: Option<Tally>,
    complaints: Complaints,
    conflict: Conflict,
    reload: String,
}

/// What runs together, and the worst start.
struct Tally {
    running: String,
    start: String,
}

impl ListPage {
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

    fn hint(&self, appliance: &Appliance) -> String {
        let watts = self.frame.numbers.with_unit(appliance.running.0, "W");
        if appliance.start.is_motor() {
            format!("{watts}, starts at {}×", self.frame.numbers.three_figures(appliance.surge_multiple))
        } else {
            watts
        }
    }

    /// Lines that stand on the list, then the blank ones.
    fn listed(&self) -> Vec<(u32, &Row)> {
        self.form.loads.iter().map(|(at, row)| (*at, row)).collect()
    }

    fn is_blank(&self, row: &Row) -> bool {
        row.name.is_empty() && row.power.is_empty()
    }

    fn slip(&self, at: &u32) -> &str {
        self.slips.get(at).map_or("", String::as_str)
    }

    fn starts(&self) -> Vec<(&'static str, &'static str)> {
        StartKind::ALL.map(|kind| (kind.name(), kind.label())).to_vec()
    }

    fn sines(&self) -> Vec<(&'static str, &'static str)> {
        [NeedsSine::No, NeedsSine::Prefers, NeedsSine::Yes].map(|kind| (kind.name(), kind.label())).to_vec()
    }

    fn lives(&self) -> Vec<(&'static str, &'static str)> {
        let kinds = [LifeSupport::No, LifeSupport::Yes, LifeSupport::Clinical, LifeSupport::ProductCritical];
        kinds.map(|kind| (kind.name(), kind.label())).to_vec()
    }
}

/// Whether the page was sent back with a question.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct ListQuery {
    look: String,
}

/// The page as it is stored.
pub async fn show(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Query(query): Query<ListQuery>,
) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let form = ListForm::of(&job, Numbers::new(installer.firm.profile.decimal_mark));
    let mut shown = list_page(&app, &installer, &job, form)?;
    if !query.look.is_empty() {
        shown.slips = slips(&job.draft.loads, shown.frame.numbers);
    }
    page(&shown)
}

/// Stores the list and goes on; with complaints, shows it again as typed.
pub async fn save(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<ListForm>,
) -> Result<Response, Error> {
    let firm = &installer.firm;
    let job = app.store.job(firm.id, JobId(id)).await?;
    let against = Against { site: &job.draft.site, mark: firm.profile.decimal_mark };
    let mut complaints = Complaints::default();
    let loads = form.read(&against, &mut complaints);
    if !complaints.is_empty() {
        let mut page = list_page(&app, &installer, &job, form)?;
        (page.complaints, page.frame.is_error) = (complaints, true);
        return page_again(&page);
    }
    let draft = Draft { loads, ..job.draft.clone() };
    let once = submit(&app, &form.key)?;
    match app.store.save_draft(firm.id, once, job.id, revision(&form.revision), &draft).await {
        Err(store::Error::Stale) => conflict(&app, &installer, &job, form),
        saved => saved.map(|()| on_to(&next(&app, &job, &draft, &form.act))).map_err(Error::from),
    }
}

/// On to the cut; back to the list after adding, or where a power looks like a slip for the first time.
fn next(app: &App, before: &Job, draft: &Draft, act: &str) -> String {
    let new: Vec<_> = draft.loads.iter().filter(|load| !before.draft.loads.contains(load)).cloned().collect();
    let list = app.paths().list(before.id);
    if !slips(&new, Numbers::default()).is_empty() {
        format!("{list}?look=yes")
    } else if act == "add" {
        list
    } else {
        app.paths().cut(before.id)
    }
}

fn conflict(app: &App, installer: &Installer, job: &Job, form: ListForm) -> Result<Response, Error> {
    let stored = ListForm::of(job, Numbers::new(installer.firm.profile.decimal_mark));
    let told = |form: &ListForm| form.loads.values().map(told).collect::<Vec<_>>().join("; ");
    let conflict = Conflict::between(&[("Stay-on list", told(&form))], &[("Stay-on list", told(&stored))]);
    let form = ListForm { revision: job.revision.to_string(), ..form };
    let mut page = list_page(app, installer, job, form)?;
    page.conflict = conflict;
    page_of_conflict(&page)
}

fn told(row: &Row) -> String {
    if row.is_off() { String::new() } else { format!("{} × {} {} {}", row.quantity, row.name, row.power, row.unit) }
}

fn list_page(app: &App, installer: &Installer, job: &Job, mut form: ListForm) -> Result<ListPage, Error> {
    let frame = Frame::of_step(app, installer, job.id, StepOf::List, "Stay-on list")?;
    let first = form.loads.keys().max().map_or(0, |last| last + 1);
    let blank = form.loads.values().filter(|row| row.is_off()).count();
    for at in blank..BLANK {
        form.loads.insert(first + at as u32, Row { unit: "W".to_owned(), ..Row::default() });
    }
    Ok(ListPage {
        here: frame.paths.list(job.id),
        reload: frame.paths.list(job.id),
        slips: BTreeMap::new(),
        tally: tally(&job.draft, frame.numbers),
        complaints: Complaints::default(),
        conflict: Conflict::default(),
        form,
        frame,
    })
}

/// Powers far from what is usual for a load of that name.
fn slips(loads: &[Load], numbers: Numbers) -> BTreeMap<u32, String> {
    let slip = |(at, load): (usize, &Load)| {
        let usual = appliances::all().find(|appliance| appliance.name == load.name)?.running;
        let ratio = load.running / usual;
        let watts = |power: f64| numbers.with_unit(power, "W");
        let question = format!("{} usually draws about {}. Keep {}?", load.name, watts(usual.0), watts(load.running.0));
        (!(1.0 / SLIP..=SLIP).contains(&ratio)).then_some((at as u32, question))
    };
    loads.iter().enumerate().filter_map(slip).collect()
}

/// What the list adds up to; the length of the cut does not matter for it.
fn tally(draft: &Draft, numbers: Numbers) -> Option<Tally> {
    let mut draft = draft.clone();
    let between = defaults::mains_between_cuts(defaults::CUTS_PER_WEEK, Hours(4.0));
    draft.outage.get_or_insert(Outage {
        autonomy: Hours(4.0),
        starts_at: StartsAt::Worst,
        cuts_per_week: defaults::CUTS_PER_WEEK,
        mains_between_cuts: between,
    });
    let survey = draft.complete().ok()?;
    let demand = load_survey::demand(&survey, &draft.assumptions(&[]), &mut Sheet::default());
    Some(Tally {
        running: numbers.with_unit(demand.running.0, "W"),
        start: numbers.with_unit(demand.surge_staggered.0, "VA"),
    })
}

impl ListForm {
    fn of(job: &Job, numbers: Numbers) -> Self {
        let loads = job.draft.loads.iter().enumerate().map(|(at, load)| (at as u32, Row::of(load, numbers))).collect();
        Self { revision: job.revision.to_string(), loads, ..Self::default() }
    }

    /// All loads: the lines, the counted ones, the one-line one. Every complaint at once.
    fn read(&self, against: &Against, complaints: &mut Complaints) -> Vec<Load> {
        let lines = self.loads.iter().filter(|(_, row)| !row.is_off());
        let mut loads: Vec<Load> =
            lines.filter_map(|(at, row)| row.read(&format!("loads[{at}]"), against, complaints)).collect();
        for (key, count) in self.counts.iter().filter(|(_, count)| !count.is_off()) {
            let Some(appliance) = appliances::by_key(key) else { continue };
            let numbers = Numbers::new(against.mark);
            let row = count.row(appliance, numbers);
            loads.extend(row.read(&format!("counts[{key}]"), against, complaints));
        }
        if !self.line.trim().is_empty() {
            let mut found = Complaints::default();
            let row = line(&self.line, against);
            loads.extend(row.as_ref().and_then(|row| row.read("line", against, &mut found)));
            let usage = "give count, name and power, such as 6 lamps 9W 5h";
            let message = found.all().first().map_or(usage, |complaint| complaint.message.as_str());
            if row.is_none() || !found.is_empty() {
                complaints.add("line", "Add in one line", message);
            }
        }
        if loads.is_empty() && complaints.is_empty() {
            complaints.add("line", "Stay-on list", "count at least one thing");
        }
        if loads.len() > limits::LOADS {
            complaints.add("line", "Stay-on list", format!("give at most {} lines", limits::LOADS));
        }
        loads
    }
}

impl Count {
    fn is_off(&self) -> bool {
        matches!(self.quantity.trim(), "" | "0")
    }

    /// The line that a counted load becomes; what was corrected wins.
    fn row(&self, appliance: &Appliance, numbers: Numbers) -> Row {
        let mut row = Row::of(&appliance.load(1), numbers);
        row.quantity.clone_from(&self.quantity);
        if !self.power.trim().is_empty() {
            row.power.clone_from(&self.power);
        }
        row.when.clone_from(&self.when);
        row
    }
}

/// `6 lamps 9W 5h`: hours become the evening hours that end at 23:00.
fn line(text: &str, against: &Against) -> Option<Row> {
    let (quantity, name, power, hours) = reading::one_line(text, against.mark)?;
    let when = hours.filter(|hours| (0.25..23.0).contains(hours)).map(|hours| {
        let from = ((23.0 - hours) * 60.0).round() as u32;
        format!("{:02}:{:02}-23:00", from / 60, from % 60)
    });
    let start = StartKind::Electronic.name().to_owned();
    Some(Row { name, quantity: quantity.to_string(), power, when: when.unwrap_or_default(), start, ..Row::default() })
}
