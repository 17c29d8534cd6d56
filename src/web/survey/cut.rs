//! Power cut: how long, how often, which battery, and what is there already.

use std::collections::BTreeMap;

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;
use serde::Deserialize;

use crate::documents::names::Named;
use crate::documents::{Draft, defaults, limits, survey};
use crate::jobs::{Job, JobId};
use crate::reading;
use crate::sizing::survey::{
    BatteryRating, BusVolts, Chemistry, Mostly, Outage, Pattern, ReusedInverter, StartsAt, TimeOfDay, Window,
};
use crate::sizing::tables::outages;
use crate::store;
use crate::units::{AcVolts, AmpHours, Hours, Milliseconds, VoltAmps, Watts};
use crate::web::app::App;
use crate::web::conflict::Conflict;
use crate::web::error::Error;
use crate::web::forms::{Complaints, Form, on_to, page, page_again, page_of_conflict, revision, submit};
use crate::web::frame::{Frame, StepOf};
use crate::web::session::Installer;
use crate::wording::{DecimalMark, Labelled, Numbers};

/// Lengths that are offered, in hours.
const LENGTHS: [&str; 5] = ["2", "4", "6", "8", "12"];
/// Rows for data-sheet ratings.
const RATINGS: u32 = 3;

/// What is typed on the page.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct CutForm {
    key: String,
    revision: String,
    length: String,
    other: String,
    starts_time: String,
    cuts: String,
    mains: String,
    usual: String,
    longest: String,
    mostly: String,
    blocks: String,
    shift: String,
    low: String,
    region: String,
    chemistry: String,
    bus: String,
    square: String,
    ratings: BTreeMap<u32, Rating>,
    reuse_va: String,
    reuse_w: String,
    reuse_surge: String,
    reuse_wave: String,
    reuse_changeover: String,
    reuse_low: String,
    reuse_high: String,
    act: String,
}

/// A data-sheet rating as it is typed.
#[derive(Clone, Debug, Default, PartialEq, Eq, Deserialize)]
#[serde(default)]
pub struct Rating {
    hours: String,
    ah: String,
}

#[derive(Template)]
#[template(path = "survey/cut.html")]
struct CutPage {
    frame: Frame,
    here: String,
    reload: String,
    form: CutForm,
    complaints: Complaints,
    conflict: Conflict,
}

impl CutPage {
    fn lengths(&self) -> [&'static str; 5] {
        LENGTHS
    }

    fn is_picked(&self, picked: &str, value: &str) -> bool {
        picked == value
    }

    fn has_ratings(&self) -> bool {
        self.form.ratings.values().any(|rating| !rating.ah.is_empty())
    }

    fn has_pattern(&self) -> bool {
        let form = &self.form;
        let told = [&form.usual, &form.longest, &form.blocks, &form.shift, &form.low, &form.region];
        let touched = ["usual", "longest", "blocks", "shift", "low", "region"];
        told.into_iter().any(|typed| !typed.is_empty())
            || form.mostly != Mostly::AnyTime.name()
            || touched.into_iter().any(|field| self.complaints.touch(field))
    }

    fn times(&self) -> Vec<(&'static str, &'static str)> {
        Mostly::NAMES.iter().map(|(value, name)| (*name, value.label())).collect()
    }

    fn regions(&self) -> Vec<&'static str> {
        outages::REGIONS.iter().map(|region| region.name).collect()
    }

    fn chemistries(&self) -> Vec<(&'static str, &'static str, &'static str)> {
        Chemistry::ALL.map(|kind| (kind.name(), kind.label(), character(kind))).to_vec()
    }
}

/// One line on each kind of battery.
fn character(kind: Chemistry) -> &'static str {
    match kind {
        Chemistry::FloodedTubular => "Heavy and long-lived; wants water and air.",
        Chemistry::FloodedFlatPlate => "Cheap; likes shallow use; wants water and air.",
        Chemistry::VrlaAgm => "Sealed; gives high currents; ages in heat.",
        Chemistry::VrlaGel => "Sealed; bears deeper use; charges slowly.",
        Chemistry::Lfp => "Light, deep and fast; no charging below 0 °C.",
    }
}

/// The page as it is stored.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let form = CutForm::of(&job, Numbers::new(installer.firm.profile.decimal_mark));
    page(&cut_page(&app, &installer, job.id, form)?)
}

/// Stores the page and goes on to the cable runs, or with their usual lengths straight to the answer.
pub async fn save(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<CutForm>,
) -> Result<Response, Error> {
    let firm = &installer.firm;
    let job = app.store.job(firm.id, JobId(id)).await?;
    let mut complaints = Complaints::default();
    let Some(draft) = form.read(&job.draft, firm.profile.decimal_mark, &mut complaints) else {
        let mut page = cut_page(&app, &installer, job.id, form)?;
        (page.complaints, page.frame.is_error) = (complaints, true);
        return page_again(&page);
    };
    let once = submit(&app, &form.key)?;
    match app.store.save_draft(firm.id, once, job.id, revision(&form.revision), &draft).await {
        Err(store::Error::Stale) => {
            let stored = CutForm::of(&job, Numbers::new(firm.profile.decimal_mark));
            let conflict = Conflict::between(&form.fields(), &stored.fields());
            let mut page = cut_page(&app, &installer, job.id, CutForm { revision: job.revision.to_string(), ..form })?;
            page.conflict = conflict;
            page_of_conflict(&page)
        }
        saved => {
            let paths = app.paths();
            let next = if form.act == "answer" { paths.needs(job.id) } else { paths.runs(job.id) };
            saved.map(|()| on_to(&next)).map_err(Error::from)
        }
    }
}

fn cut_page(app: &App, installer: &Installer, id: JobId, mut form: CutForm) -> Result<CutPage, Error> {
    let frame = Frame::of_step(app, installer, id, StepOf::Cut, "Power cut")?;
    for at in 0..RATINGS {
        form.ratings.entry(at).or_default();
    }
    let here = frame.paths.cut(id);
    let (complaints, conflict) = (Complaints::default(), Conflict::default());
    Ok(CutPage { reload: here.clone(), here, frame, form, complaints, conflict })
}

impl CutForm {
    fn of(job: &Job, numbers: Numbers) -> Self {
        let draft = &job.draft;
        let rating = |(at, rating): (usize, &BatteryRating)| {
            (at as u32, Rating { hours: numbers.typed(rating.hours.0), ah: numbers.typed(rating.capacity.0) })
        };
        let mut form = Self {
            revision: job.revision.to_string(),
            cuts: numbers.typed(defaults::CUTS_PER_WEEK),
            mostly: Mostly::AnyTime.name().to_owned(),
            chemistry: draft.choice.chemistry.name().to_owned(),
            bus: draft.choice.bus.map_or_else(String::new, |bus| numbers.typed(bus.volts().0)),
            square: if draft.choice.square_wave_offered { "yes" } else { "no" }.to_owned(),
            ratings: draft.battery_ratings.iter().enumerate().map(rating).collect(),
            ..Self::default()
        };
        form.fill_outage(draft.outage.as_ref(), numbers);
        form.fill_reuse(draft.reuse, numbers);
        form
    }

    fn fill_outage(&mut self, outage: Option<&Outage>, numbers: Numbers) {
        let Some(outage) = outage else { return };
        let hours = numbers.typed(outage.autonomy.0);
        if LENGTHS.contains(&hours.as_str()) {
            self.length = hours;
        } else {
            (self.length, self.other) = ("other".to_owned(), hours);
        }
        if let StartsAt::At(time) = outage.starts_at {
            self.starts_time = time.to_string();
        }
        self.cuts = numbers.typed(outage.cuts_per_week);
        self.mains = numbers.typed(outage.mains_between_cuts.0);
        let pattern = &outage.pattern;
        let hours = |hours: Hours| if hours > Hours::ZERO { numbers.typed(hours.0) } else { String::new() };
        self.usual = pattern.usual.map_or_else(String::new, hours);
        self.longest = pattern.longest.map_or_else(String::new, hours);
        self.mostly = pattern.mostly.name().to_owned();
        let block = |block: &Window| format!("{}-{}", block.from, block.to);
        self.blocks = pattern.blocks.iter().map(block).collect::<Vec<_>>().join(", ");
        (self.shift, self.low) = (hours(pattern.blocks_shift), hours(pattern.low_voltage));
        self.region = pattern.region.map_or_else(String::new, |region| region.name.to_owned());
    }

    fn fill_reuse(&mut self, reuse: Option<ReusedInverter>, numbers: Numbers) {
        let Some(unit) = reuse else { return };
        let number = |value: Option<f64>| value.map_or_else(String::new, |value| numbers.typed(value));
        self.reuse_va = numbers.typed(unit.rating.0);
        self.reuse_w = number(unit.rating_w.map(|power| power.0));
        self.reuse_surge = number(unit.surge.map(|power| power.0));
        self.reuse_wave = if unit.sine { "sine" } else { "square" }.to_owned();
        self.reuse_changeover = number(unit.changeover.map(|time| time.0));
        self.reuse_low = number(unit.mains_window.map(|window| window.0.0));
        self.reuse_high = number(unit.mains_window.map(|window| window.1.0));
    }

    fn fields(&self) -> Vec<(&'static str, String)> {
        let length = if self.is_another_length() { &self.other } else { &self.length };
        let ratings = self.ratings.values().filter(|rating| !rating.ah.is_empty());
        let ratings = ratings.map(|rating| format!("{} h {} Ah", rating.hours, rating.ah)).collect::<Vec<_>>();
        [
            ("Length of the cut", length.clone()),
            ("Starts", self.starts_time.clone()),
            ("Cuts in a week", self.cuts.clone()),
            ("Mains between cuts", self.mains.clone()),
            ("Usual cut", self.usual.clone()),
            ("Longest cut of a year", self.longest.clone()),
            ("Most cuts", self.mostly.clone()),
            ("Announced blocks", self.blocks.clone()),
            ("Blocks move on", self.shift.clone()),
            ("Low-voltage hours", self.low.clone()),
            ("Country", self.region.clone()),
            ("Battery", self.chemistry.clone()),
            ("Volts of the bank", self.bus.clone()),
            ("Ratings", ratings.join(", ")),
            ("Unit that is there", self.reuse_va.clone()),
        ]
        .to_vec()
    }

    /// The draft with this page's answers; `None` with complaints.
    fn read(&self, before: &Draft, mark: DecimalMark, complaints: &mut Complaints) -> Option<Draft> {
        let outage = self.read_outage(mark, complaints);
        let battery_ratings = self.read_ratings(mark, complaints);
        let reuse = if self.is_reused() { self.read_reuse(mark, complaints) } else { None };
        let mut choice = before.choice;
        match Chemistry::named(&self.chemistry) {
            Some(chemistry) => choice.chemistry = chemistry,
            None => complaints.add("chemistry", "Battery", "choose one"),
        }
        choice.bus = BusVolts::ALL.into_iter().find(|bus| self.bus == bus.volts().0.to_string());
        choice.square_wave_offered = self.square == "yes";
        if !complaints.is_empty() {
            return None;
        }
        Some(Draft { outage: Some(outage?), battery_ratings, reuse, choice, ..before.clone() })
    }

    /// Whether the length stands in the box; what is typed there counts where nothing is picked.
    fn is_another_length(&self) -> bool {
        self.length == "other" || (self.length.is_empty() && !self.other.trim().is_empty())
    }

    /// Whether something is told of a unit that is there.
    fn is_reused(&self) -> bool {
        let told = [&self.reuse_va, &self.reuse_w, &self.reuse_surge, &self.reuse_changeover];
        told.into_iter().chain([&self.reuse_low, &self.reuse_high]).any(|typed| !typed.trim().is_empty())
    }

    fn read_outage(&self, mark: DecimalMark, complaints: &mut Complaints) -> Option<Outage> {
        let (field, typed) = if self.is_another_length() { ("other", &self.other) } else { ("length", &self.length) };
        let autonomy = if typed.trim().is_empty() {
            Err("choose how long it lasts".to_owned().into())
        } else {
            reading::hours(typed, mark, limits::AUTONOMY_H)
        };
        let autonomy = complaints.take(field, "Length of the cut", autonomy).map(Hours);
        let cuts = reading::plain(&self.cuts, mark, limits::CUTS_PER_WEEK);
        let cuts = complaints.take("cuts", "Cuts in a week", cuts);
        let usual = defaults::mains_between_cuts(cuts.unwrap_or(0.0), autonomy.unwrap_or(Hours::ZERO));
        let mains = if self.mains.trim().is_empty() {
            Ok(usual.0)
        } else {
            reading::hours(&self.mains, mark, limits::MAINS_BETWEEN_CUTS_H)
        };
        let mains = complaints.take("mains", "Mains between cuts", mains).map(Hours);
        let starts_at = self.read_start(complaints);
        let pattern = self.read_pattern(mark, complaints);
        Some(Outage {
            autonomy: autonomy?,
            starts_at: starts_at?,
            cuts_per_week: cuts?,
            mains_between_cuts: mains?,
            pattern,
        })
    }

    fn read_pattern(&self, mark: DecimalMark, complaints: &mut Complaints) -> Pattern {
        let mut hours = |field: &str, label: &str, typed: &str, limit| {
            if typed.trim().is_empty() {
                return None;
            }
            complaints.take(field, label, reading::hours(typed, mark, limit)).map(Hours)
        };
        let usual = hours("usual", "A usual cut", &self.usual, limits::CUT_H);
        let longest = hours("longest", "The longest of a year", &self.longest, limits::CUT_H);
        let shift = hours("shift", "Each day the blocks move on by", &self.shift, limits::BLOCKS_SHIFT_H);
        let low = hours("low", "Mains outside the unit's window", &self.low, limits::LOW_VOLTAGE_H);
        if usual.is_some_and(|usual| longest.is_some_and(|longest| longest < usual)) {
            complaints.add("longest", "The longest of a year", "give no less than a usual cut lasts");
        }
        let name = self.region.trim();
        let region = outages::region(name);
        if region.is_none() && !name.is_empty() {
            complaints.add("region", "Country", "choose one of the list, or leave it empty");
        }
        Pattern {
            usual,
            longest,
            mostly: Mostly::named(&self.mostly).unwrap_or_default(),
            blocks: self.read_blocks(complaints),
            blocks_shift: shift.unwrap_or(Hours::ZERO),
            low_voltage: low.unwrap_or(Hours::ZERO),
            region,
        }
    }

    /// Blocks as they are announced: `06:00-08:00, 18:00-20:00`.
    fn read_blocks(&self, complaints: &mut Complaints) -> Vec<Window> {
        let block = |text: &str| {
            let (from, to) = text.split_once(['-', '–'])?;
            let time = |text: &str| {
                let text = text.trim();
                survey::clock(&if text.len() == 4 { format!("0{text}") } else { text.to_owned() })
            };
            let (from, to) = (time(from)?, time(to)?);
            (from != to && from < TimeOfDay::END_OF_DAY).then_some(Window { from, to })
        };
        let typed = self.blocks.split([',', ';']).filter(|part| !part.trim().is_empty());
        let blocks: Vec<_> = typed.map(block).collect();
        if blocks.contains(&None) || blocks.len() > limits::WINDOWS {
            let most = limits::WINDOWS;
            let told = format!("give times such as 06:00-08:00, 18:00-20:00; at most {most} blocks");
            complaints.add("blocks", "Announced blocks", told);
        }
        blocks.into_iter().flatten().collect()
    }

    fn read_start(&self, complaints: &mut Complaints) -> Option<StartsAt> {
        let typed = self.starts_time.trim();
        if typed.is_empty() {
            return Some(StartsAt::Worst);
        }
        let padded = if typed.len() == 4 { format!("0{typed}") } else { typed.to_owned() };
        let time = survey::clock(&padded).filter(|time| *time < TimeOfDay::END_OF_DAY);
        let time = time.ok_or_else(|| "give a time, such as 18:00".to_owned());
        complaints.take("starts_time", "Starts at", time).map(StartsAt::At)
    }

    fn read_ratings(&self, mark: DecimalMark, complaints: &mut Complaints) -> Vec<BatteryRating> {
        let mut ratings: Vec<BatteryRating> = Vec::new();
        for (at, rating) in &self.ratings {
            if rating.hours.trim().is_empty() && rating.ah.trim().is_empty() {
                continue;
            }
            let label = format!("Rating {}", at + 1);
            let hours = reading::plain(&rating.hours, mark, limits::RATING_HOURS);
            let hours = complaints.take(&format!("ratings[{at}][hours]"), &format!("{label}, hours"), hours);
            let capacity = reading::plain(&rating.ah, mark, limits::RATING_AH);
            let capacity = complaints.take(&format!("ratings[{at}][ah]"), &format!("{label}, Ah"), capacity);
            let (Some(hours), Some(capacity)) = (hours.map(Hours), capacity.map(AmpHours)) else { continue };
            if ratings.iter().any(|earlier| earlier.hours == hours) {
                complaints.add(format!("ratings[{at}][hours]"), format!("{label}, hours"), "give each rate once");
            }
            ratings.push(BatteryRating { hours, capacity });
        }
        ratings
    }

    fn read_reuse(&self, mark: DecimalMark, complaints: &mut Complaints) -> Option<ReusedInverter> {
        let mut number = |field: &str, label: &str, typed: &str, limit| {
            if typed.trim().is_empty() {
                return None;
            }
            complaints.take(field, label, reading::plain(typed, mark, limit))
        };
        let rating_w = number("reuse_w", "Its W", &self.reuse_w, limits::REUSE_W);
        let surge = number("reuse_surge", "Its largest start", &self.reuse_surge, limits::REUSE_SURGE_VA);
        let changeover = number("reuse_changeover", "Its changeover", &self.reuse_changeover, limits::CHANGEOVER_MS);
        let low = number("reuse_low", "Its mains window, lowest", &self.reuse_low, limits::SUPPLY_SEEN_V);
        let high = number("reuse_high", "Its mains window, highest", &self.reuse_high, limits::SUPPLY_SEEN_V);
        let rating = reading::plain(&self.reuse_va, mark, limits::REUSE_VA);
        let rating = complaints.take("reuse_va", "Its VA", rating);
        if low.is_some() != high.is_some() || low.zip(high).is_some_and(|(low, high)| low >= high) {
            complaints.add("reuse_high", "Its mains window, highest", "give both ends, the lower one first");
        }
        Some(ReusedInverter {
            rating: VoltAmps(rating?),
            rating_w: rating_w.map(Watts),
            surge: surge.map(VoltAmps),
            sine: self.reuse_wave != "square",
            changeover: changeover.map(Milliseconds),
            mains_window: low.map(AcVolts).zip(high.map(AcVolts)),
        })
    }
}
