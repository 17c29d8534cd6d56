//! My firm: who we are, how we count, and what a new job begins with.

use std::collections::BTreeMap;

use askama::Template;
use axum::extract::State;
use axum::response::Response;
use serde::Deserialize;

use super::app::App;
use super::assumptions::{self, Row};
use super::conflict::Conflict;
use super::error::Error;
use super::forms::{Complaints, Form, on_to, page, page_again, page_of_conflict, revision, submit, text};
use super::frame::Frame;
use super::session::Installer;
use crate::accounts::{Firm, Profile};
use crate::documents::names::Named;
use crate::documents::{Draft, limits};
use crate::money::Currency;
use crate::reading;
use crate::sizing::survey::{Chemistry, Code};
use crate::store;
use crate::units::{AcVolts, Celsius, Hertz, Metres};
use crate::wording::{DecimalMark, Labelled, Numbers};

/// What is typed on the page.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct FirmForm {
    key: String,
    revision: String,
    name: String,
    phone: String,
    email: String,
    address: String,
    licence: String,
    currency: String,
    mark: String,
    tax: String,
    holds: String,
    zone: String,
    supply: String,
    frequency: String,
    coldest: String,
    hottest: String,
    ambient: String,
    bank_run: String,
    board_run: String,
    mains_run: String,
    chemistry: String,
    code: String,
    assumptions: BTreeMap<String, String>,
}

#[derive(Template)]
#[template(path = "accounts/firm.html")]
struct FirmPage {
    frame: Frame,
    form: FirmForm,
    rows: Vec<Row>,
    complaints: Complaints,
    conflict: Conflict,
    reload: String,
}

impl FirmPage {
    fn chemistries(&self) -> Vec<(&'static str, &'static str)> {
        Chemistry::ALL.map(|kind| (kind.name(), kind.label())).to_vec()
    }
}

/// The page as it is stored.
pub async fn show(State(app): State<App>, installer: Installer) -> Result<Response, Error> {
    let form = FirmForm::of(&installer.firm);
    page(&firm_page(&app, &installer, form, Complaints::default())?)
}

/// Stores the page; with complaints, shows it again as typed.
pub async fn save(State(app): State<App>, installer: Installer, Form(form): Form<FirmForm>) -> Result<Response, Error> {
    let mut complaints = Complaints::default();
    let Some(profile) = form.read(&installer.firm.profile, &mut complaints) else {
        return page_again(&firm_page(&app, &installer, form, complaints)?);
    };
    let once = submit(&app, &form.key)?;
    match app.store.save_firm(installer.firm.id, once, revision(&form.revision), profile).await {
        Err(store::Error::Stale) => show_both(&app, &installer, form).await,
        saved => saved.map(|()| on_to(&app.paths().book())).map_err(Error::from),
    }
}

/// The page as typed, with what is stored by now beside it.
async fn show_both(app: &App, installer: &Installer, form: FirmForm) -> Result<Response, Error> {
    let firm = app.store.firm(installer.firm.id).await?;
    let conflict = Conflict::between(&form.fields(), &FirmForm::of(&firm).fields());
    let form = FirmForm { revision: firm.revision.to_string(), ..form };
    let page = firm_page(app, installer, form, Complaints::default())?;
    page_of_conflict(&FirmPage { conflict, ..page })
}

fn firm_page(app: &App, installer: &Installer, form: FirmForm, complaints: Complaints) -> Result<FirmPage, Error> {
    let mut frame = Frame::of(app, installer, "My firm")?;
    frame.is_error = !complaints.is_empty();
    let defaults = installer.firm.profile.first_draft().assumptions(&[]);
    let rows = assumptions::rows(&defaults, &form.assumptions, frame.numbers);
    let reload = frame.paths.firm();
    Ok(FirmPage { frame, form, rows, complaints, conflict: Conflict::default(), reload })
}

impl FirmForm {
    fn of(firm: &Firm) -> Self {
        let profile = firm.profile.clone();
        let numbers = Numbers::new(profile.decimal_mark);
        let draft = profile.first_draft();
        let number = |value: f64| numbers.typed(value);
        Self {
            key: String::new(),
            revision: firm.revision.to_string(),
            currency: profile.currency.to_string(),
            mark: if profile.decimal_mark == DecimalMark::Comma { "comma" } else { "point" }.to_owned(),
            tax: number(f64::from(profile.tax_basis_points) / 100.0),
            holds: profile.price_holds_days.to_string(),
            zone: profile.time_zone,
            supply: number(draft.site.supply.0),
            frequency: number(draft.site.frequency.0),
            coldest: number(draft.site.battery_coldest.0),
            hottest: number(draft.site.battery_hottest.0),
            ambient: number(draft.site.inverter_ambient.0),
            bank_run: number(draft.runs.bank_to_inverter.0),
            board_run: number(draft.runs.inverter_to_board.0),
            mains_run: number(draft.runs.mains_to_inverter.0),
            chemistry: draft.choice.chemistry.name().to_owned(),
            code: draft.choice.code.name().to_owned(),
            assumptions: assumptions::typed(&profile.assumptions, numbers),
            name: profile.name,
            phone: profile.phone,
            email: profile.email,
            address: profile.address,
            licence: profile.licence,
        }
    }

    /// Every field with its label, for a comparison; the factors as one.
    fn fields(&self) -> Vec<(&'static str, String)> {
        let factors = self.assumptions.iter().filter(|(_, typed)| !typed.trim().is_empty());
        let factors: Vec<String> = factors.map(|(key, typed)| format!("{key} {}", typed.trim())).collect();
        [
            ("Name", &self.name),
            ("Phone", &self.phone),
            ("E-mail", &self.email),
            ("Address", &self.address),
            ("Licence number", &self.licence),
            ("Currency", &self.currency),
            ("Decimal mark", &self.mark),
            ("Tax", &self.tax),
            ("A price holds", &self.holds),
            ("Time zone", &self.zone),
            ("Supply", &self.supply),
            ("Frequency", &self.frequency),
            ("Coldest at the battery", &self.coldest),
            ("Hottest at the battery", &self.hottest),
            ("Hottest at the inverter", &self.ambient),
            ("Bank to inverter", &self.bank_run),
            ("Inverter to board", &self.board_run),
            ("Mains to inverter", &self.mains_run),
            ("Wiring code", &self.code),
            ("Battery", &self.chemistry),
            ("Factors of ours", &factors.join(", ")),
        ]
        .map(|(label, typed)| (label, typed.clone()))
        .to_vec()
    }

    /// What the firm has set; `None` with complaints.
    fn read(&self, before: &Profile, complaints: &mut Complaints) -> Option<Profile> {
        let mark = if self.mark == "comma" { DecimalMark::Comma } else { DecimalMark::Point };
        let name = complaints.take("name", "Name", text(&self.name, 120));
        if name.as_deref() == Some("") {
            complaints.add("name", "Name", "give a name");
        }
        let mut short = |field: &str, label: &str, typed: &str, most| complaints.take(field, label, text(typed, most));
        let phone = short("phone", "Phone", &self.phone, 40);
        let email = short("email", "E-mail", &self.email, 254);
        let address = short("address", "Address", &self.address, 300);
        let licence = short("licence", "Licence number", &self.licence, 80);
        let draft = self.read_draft(before, mark, complaints);
        let defaults = draft.clone().unwrap_or_default().assumptions(&[]);
        let assumptions = assumptions::read(&self.assumptions, &defaults, mark, complaints);
        let (currency, tax, holds, zone) = self.read_money(mark, complaints);
        if !complaints.is_empty() {
            return None;
        }
        Some(Profile {
            name: name?,
            phone: phone?,
            email: email?,
            address: address?,
            licence: licence?,
            currency: currency?,
            decimal_mark: mark,
            tax_basis_points: tax?,
            price_holds_days: holds?,
            time_zone: zone?,
            new_job: draft?.write(),
            assumptions,
        })
    }

    #[allow(clippy::type_complexity, reason = "four fields that are read together")]
    fn read_money(
        &self,
        mark: DecimalMark,
        complaints: &mut Complaints,
    ) -> (Option<Currency>, Option<u32>, Option<u32>, Option<String>) {
        const TAX: limits::Limit = limits::Limit { lowest: 0.0, highest: 1.0, unit: "", whole: false };
        const HOLDS: limits::Limit = limits::Limit { lowest: 1.0, highest: 365.0, unit: "", whole: true };
        let letters = self.currency.trim().to_uppercase();
        let currency = Currency::new(&letters).ok_or_else(|| "give three letters, such as EUR".to_owned());
        let tax = reading::percent(&self.tax, mark, TAX).map(|share| (share * 10_000.0).round() as u32);
        let zone = self.zone.trim().to_owned();
        let known =
            jiff::tz::TimeZone::get(&zone).map(|_| zone).map_err(|_| "give a name such as Europe/London".to_owned());
        (
            complaints.take("currency", "Currency", currency),
            complaints.take("tax", "Tax", tax),
            complaints.take("holds", "A price holds", reading::whole(&self.holds, mark, HOLDS)),
            complaints.take("zone", "Time zone", known),
        )
    }

    /// What a new job begins with.
    fn read_draft(&self, before: &Profile, mark: DecimalMark, complaints: &mut Complaints) -> Option<Draft> {
        let mut draft = before.first_draft();
        let mut number = |field: &str, label: &str, typed: &str, limit| {
            complaints.take(field, label, reading::plain(typed, mark, limit))
        };
        let supply = number("supply", "Supply", &self.supply, limits::SUPPLY_V);
        let frequency = number("frequency", "Frequency", &self.frequency, limits::FREQUENCY_HZ);
        let mut heat = |field: &str, label: &str, typed: &str| {
            complaints.take(field, label, reading::temperature(typed, mark, limits::TEMPERATURE_C)).map(Celsius)
        };
        let coldest = heat("coldest", "Coldest at the battery", &self.coldest);
        let hottest = heat("hottest", "Hottest at the battery", &self.hottest);
        let ambient = heat("ambient", "Hottest at the inverter", &self.ambient);
        let mut length = |field: &str, label: &str, typed: &str| {
            complaints.take(field, label, reading::metres(typed, mark, limits::LENGTH_M)).map(Metres)
        };
        let bank_run = length("bank_run", "Bank to inverter", &self.bank_run);
        let board_run = length("board_run", "Inverter to board", &self.board_run);
        let mains_run = length("mains_run", "Mains to inverter", &self.mains_run);
        (draft.runs.bank_to_inverter, draft.runs.inverter_to_board) = (bank_run?, board_run?);
        draft.runs.mains_to_inverter = mains_run?;
        let ratio = (supply? / draft.site.supply.0, AcVolts(supply?));
        draft.site.supply_lowest = draft.site.supply_lowest * ratio.0;
        draft.site.supply_highest = draft.site.supply_highest * ratio.0;
        (draft.site.supply, draft.site.frequency) = (ratio.1, Hertz(frequency?));
        (draft.site.battery_coldest, draft.site.battery_hottest) = (coldest?, hottest?);
        draft.site.inverter_ambient = ambient?;
        if hottest < coldest {
            complaints.add("hottest", "Hottest at the battery", "give no less than the coldest");
        }
        draft.choice.chemistry = Chemistry::named(&self.chemistry).unwrap_or(draft.choice.chemistry);
        draft.choice.code = Code::named(&self.code).unwrap_or(draft.choice.code);
        Some(draft)
    }
}
