//! Site: who, where, and what the supply and the room are like.

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;
use serde::Deserialize;

use super::app::App;
use super::conflict::Conflict;
use super::error::Error;
use super::forms::{Complaints, Form, on_to, page, page_again, page_of_conflict, revision, submit, text};
use super::frame::{Frame, StepOf};
use super::session::Installer;
use crate::documents::limits;
use crate::jobs::{Contact, Job, JobId};
use crate::reading;
use crate::sizing::survey::Site;
use crate::store;
use crate::units::{AcVolts, Amps, Celsius, Hertz, Metres};
use crate::wording::{DecimalMark, Numbers};

/// What is typed on the page.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct SiteForm {
    key: String,
    revision: String,
    customer: String,
    place: String,
    phone: String,
    note: String,
    supply: String,
    frequency: String,
    supply_lowest: String,
    supply_highest: String,
    incoming_breaker: String,
    battery_coldest: String,
    battery_hottest: String,
    inverter_ambient: String,
    altitude: String,
    vented: String,
}

#[derive(Template)]
#[template(path = "jobs/site.html")]
struct SitePage {
    frame: Frame,
    form: SiteForm,
    complaints: Complaints,
    conflict: Conflict,
    reload: String,
}

/// The first step of a job that is not done.
pub async fn first_step(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let paths = app.paths();
    Ok(on_to(&match &job.draft {
        _ if job.contact.customer.is_empty() => paths.site(job.id),
        draft if draft.loads.is_empty() => paths.list(job.id),
        draft if draft.outage.is_none() => paths.cut(job.id),
        _ => paths.needs(job.id),
    }))
}

/// The page as it is stored.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let form = SiteForm::of(&job, installer.firm.profile.decimal_mark);
    page(&site_page(&app, &installer, job.id, form)?)
}

/// Stores the page and goes on to the list; with complaints, shows it again as typed.
pub async fn save(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<SiteForm>,
) -> Result<Response, Error> {
    let (firm, mark) = (installer.firm.id, installer.firm.profile.decimal_mark);
    let job = app.store.job(firm, JobId(id)).await?;
    let mut complaints = Complaints::default();
    let Some((contact, site)) = form.read(mark, &mut complaints) else {
        let mut page = site_page(&app, &installer, job.id, form)?;
        (page.complaints, page.frame.is_error) = (complaints, true);
        return page_again(&page);
    };
    let mut draft = job.draft.clone();
    draft.site = site;
    let once = submit(&app, &form.key)?;
    match app.store.save_site(firm, once, job.id, revision(&form.revision), contact, &draft).await {
        Err(store::Error::Stale) => show_both(&app, &installer, job.id, form).await,
        saved => saved.map(|()| on_to(&app.paths().list(job.id))).map_err(Error::from),
    }
}

/// The page as typed, with what is stored by now beside it.
async fn show_both(app: &App, installer: &Installer, id: JobId, form: SiteForm) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, id).await?;
    let stored = SiteForm::of(&job, installer.firm.profile.decimal_mark);
    let conflict = Conflict::between(&form.fields(), &stored.fields());
    let page = site_page(app, installer, id, SiteForm { revision: stored.revision, ..form })?;
    page_of_conflict(&SitePage { conflict, ..page })
}

fn site_page(app: &App, installer: &Installer, id: JobId, form: SiteForm) -> Result<SitePage, Error> {
    let frame = Frame::of_step(app, installer, id, StepOf::Site, "Site")?;
    let reload = frame.paths.site(id);
    Ok(SitePage { frame, form, complaints: Complaints::default(), conflict: Conflict::default(), reload })
}

impl SiteForm {
    /// The fields as a job has them.
    fn of(job: &Job, mark: DecimalMark) -> Self {
        let (site, contact) = (&job.draft.site, job.contact.clone());
        let number = |value: f64| Numbers::new(mark).typed(value);
        Self {
            key: String::new(),
            revision: job.revision.to_string(),
            customer: contact.customer,
            place: contact.place,
            phone: contact.phone,
            note: contact.note,
            supply: number(site.supply.0),
            frequency: number(site.frequency.0),
            supply_lowest: number(site.supply_lowest.0),
            supply_highest: number(site.supply_highest.0),
            incoming_breaker: number(site.incoming_breaker.0),
            battery_coldest: number(site.battery_coldest.0),
            battery_hottest: number(site.battery_hottest.0),
            inverter_ambient: number(site.inverter_ambient.0),
            altitude: number(site.altitude.0),
            vented: if site.battery_room_vented { "yes" } else { "no" }.to_owned(),
        }
    }

    /// Every field with its label, for a comparison.
    fn fields(&self) -> Vec<(&'static str, String)> {
        [
            ("Name", &self.customer),
            ("Place", &self.place),
            ("Phone", &self.phone),
            ("Note", &self.note),
            ("Supply", &self.supply),
            ("Frequency", &self.frequency),
            ("Lowest supply seen", &self.supply_lowest),
            ("Highest supply seen", &self.supply_highest),
            ("Breaker before the inverter", &self.incoming_breaker),
            ("Coldest at the battery", &self.battery_coldest),
            ("Hottest at the battery", &self.battery_hottest),
            ("Hottest at the inverter", &self.inverter_ambient),
            ("Height above the sea", &self.altitude),
            ("Openings to the outside", &self.vented),
        ]
        .map(|(label, typed)| (label, typed.clone()))
        .to_vec()
    }

    /// Who and where, and the site; `None` with complaints.
    fn read(&self, mark: DecimalMark, complaints: &mut Complaints) -> Option<(Contact, Site)> {
        let contact = self.read_contact(complaints);
        let mut number = |field: &str, label: &str, typed: &str, limit| {
            complaints.take(field, label, reading::plain(typed, mark, limit))
        };
        let supply = number("supply", "Supply", &self.supply, limits::SUPPLY_V);
        let frequency = number("frequency", "Frequency", &self.frequency, limits::FREQUENCY_HZ);
        let lowest = number("supply_lowest", "Lowest supply seen", &self.supply_lowest, limits::SUPPLY_SEEN_V);
        let highest = number("supply_highest", "Highest supply seen", &self.supply_highest, limits::SUPPLY_SEEN_V);
        let breaker =
            number("incoming_breaker", "Breaker before the inverter", &self.incoming_breaker, limits::BREAKER_A);
        let mut heat = |field: &str, label: &str, typed: &str| {
            complaints.take(field, label, reading::temperature(typed, mark, limits::TEMPERATURE_C))
        };
        let coldest = heat("battery_coldest", "Coldest at the battery", &self.battery_coldest);
        let hottest = heat("battery_hottest", "Hottest at the battery", &self.battery_hottest);
        let ambient = heat("inverter_ambient", "Hottest at the inverter", &self.inverter_ambient);
        let altitude = reading::metres(&self.altitude, mark, limits::ALTITUDE_M);
        let altitude = complaints.take("altitude", "Height above the sea", altitude);
        if lowest > highest && highest.is_some() {
            complaints.add("supply_highest", "Highest supply seen", "give no less than the lowest");
        }
        if coldest > hottest && hottest.is_some() {
            complaints.add("battery_hottest", "Hottest at the battery", "give no less than the coldest");
        }
        let contact = contact.filter(|_| complaints.is_empty())?;
        let site = Site {
            name: contact.customer.clone(),
            supply: AcVolts(supply?),
            frequency: Hertz(frequency?),
            supply_lowest: AcVolts(lowest?),
            supply_highest: AcVolts(highest?),
            battery_coldest: Celsius(coldest?),
            battery_hottest: Celsius(hottest?),
            inverter_ambient: Celsius(ambient?),
            altitude: Metres(altitude?),
            incoming_breaker: Amps(breaker?),
            battery_room_vented: self.vented != "no",
        };
        Some((contact, site))
    }

    fn read_contact(&self, complaints: &mut Complaints) -> Option<Contact> {
        let mut customer = complaints.take("customer", "Name", text(&self.customer, 120));
        if customer.as_deref() == Some("") {
            complaints.add("customer", "Name", "give a name, so that the job can be found again");
            customer = None;
        }
        let place = complaints.take("place", "Place", text(&self.place, 200));
        let phone = complaints.take("phone", "Phone", text(&self.phone, 40));
        let note = complaints.take("note", "Note", text(&self.note, 4000));
        Some(Contact { customer: customer?, place: place?, phone: phone?, note: note? })
    }
}
