//! A job as it is priced: its survey, the design, the parts that the design asks for.

use crate::accounts::Firm;
use crate::documents;
use crate::jobs::{Job, JobId};
use crate::money::Currency;
use crate::offer::{self, Customer, KitLine, Voice, refill};
use crate::quotes::NewVersion;
use crate::quotes::changes::Standing;
use crate::quotes::price::PriceDraft;
use crate::quotes::sheet::FirmShown;
use crate::simulation;
use crate::sizing::{Design, Severity, Survey};
use crate::translations::Words;
use crate::web::app::App;
use crate::web::error::Error;
use crate::web::session::Installer;
use crate::web::share::page::zoned;
use crate::wording::{self, DecimalMark, Numbers, Told};

/// A job with its design, where the survey is complete.
pub struct Case {
    /// The job.
    pub job: Job,
    /// Its firm.
    pub firm: Firm,
    /// Survey and design; `None` while something is missing.
    pub designed: Option<(Survey, Design)>,
    /// Parts that the design asks for.
    pub kit: Vec<KitLine>,
    /// Decimal mark of the firm.
    pub mark: char,
    /// Words and numbers for the customer.
    pub voice: Voice,
}

impl Case {
    /// The job of a firm.
    pub async fn find(app: &App, installer: &Installer, id: JobId) -> Result<Self, Error> {
        let job = app.store.job(installer.firm.id, id).await?;
        if job.binned_at.is_some() {
            return Err(Error::NotFound);
        }
        Ok(Self::of(&installer.firm, job))
    }

    /// Designs the job anew.
    pub fn of(firm: &Firm, job: Job) -> Self {
        let mark = firm.profile.decimal_mark;
        let voice = Voice { words: Words::of("en"), numbers: Numbers::new(mark) };
        let assumptions = job.draft.assumptions(&firm.profile.assumptions);
        let designed = job.draft.complete().ok().map(|survey| {
            let design = simulation::design(&survey, assumptions);
            (survey, design)
        });
        let kit = designed.as_ref().map_or_else(Vec::new, |(survey, design)| offer::kit(survey, design, voice));
        Self { job, firm: firm.clone(), designed, kit, mark: letter(mark), voice }
    }

    /// Currency of the job: that of its prices so far, or the firm's.
    pub fn currency(&self) -> Currency {
        self.job.price.as_ref().map_or(self.firm.profile.currency, |price| price.currency)
    }

    /// The prices so far; before there are any, the design's parts and the firm's defaults.
    pub fn draft(&self, now: i64) -> PriceDraft {
        if let Some(price) = &self.job.price {
            return price.clone();
        }
        let profile = &self.firm.profile;
        let today = zoned(now, &profile.time_zone).date();
        let ends_on = today.checked_add(jiff::Span::new().days(profile.price_holds_days.min(3_650)));
        PriceDraft {
            currency: profile.currency,
            lines: refill::refill(&[], &self.kit),
            labour: None,
            tax_basis_points: profile.tax_basis_points,
            ends_on: ends_on.map_or_else(|_| String::new(), |day| day.to_string()),
            note: String::new(),
            left_off: String::new(),
        }
    }

    /// What is unsafe or does not work.
    pub fn stops(&self) -> Vec<Told> {
        let findings = self.designed.iter().flat_map(|(_, design)| &design.findings);
        let stops = findings.filter(|finding| finding.severity() == Severity::Stop);
        stops.map(wording::finding).collect()
    }

    /// Why no sheet can be made of these prices yet, each with the field it belongs to.
    pub fn obstacles(&self, price: &PriceDraft, now: i64) -> Vec<(&'static str, &'static str, String)> {
        let mut obstacles = Vec::new();
        if self.designed.is_none() {
            obstacles.push(("lines", "The survey", "finish the stay-on list and the power cut first".to_owned()));
        }
        for stop in self.stops() {
            obstacles.push(("stops", "The design", format!("{} {}", stop.text, stop.cure)));
        }
        let unpriced = price.totals().unpriced;
        if price.lines.is_empty() {
            obstacles.push(("lines", "Parts", "give at least one line".to_owned()));
        } else if unpriced > 0 {
            obstacles.push(("lines", "Parts", format!("{unpriced} of {} lines have no price yet", price.lines.len())));
        }
        let today = zoned(now, &self.firm.profile.time_zone).date();
        if price.ends_on.parse::<jiff::civil::Date>().is_ok_and(|day| day >= today) {
            return obstacles;
        }
        obstacles.push(("ends_on", "Last day of this price", "give today or a later day".to_owned()));
        obstacles
    }

    /// The sheet to be frozen; `None` while an obstacle is there.
    pub fn version(&self, price: &PriceDraft, made_by: &str, now: i64) -> Option<NewVersion> {
        if !self.obstacles(price, now).is_empty() {
            return None;
        }
        let (survey, design) = self.designed.as_ref()?;
        let contact = &self.job.contact;
        let customer = Customer { name: &contact.customer, place: &contact.place };
        let sheet = offer::sheet(self.firm_shown(), customer, survey, design, price, self.voice)?;
        Some(NewVersion {
            sheet: serde_json::to_vec(&sheet).ok()?,
            survey: self.job.draft.write(),
            design: documents::design::write(design, &self.job.draft).to_string(),
            program_version: env!("CARGO_PKG_VERSION"),
            made_by: made_by.to_owned(),
        })
    }

    /// What the job stands at now, to be held against a frozen version.
    pub fn standing(&self) -> Standing {
        let survey = serde_json::from_str(&self.job.draft.write()).unwrap_or_default();
        let design = self.designed.as_ref().map(|(_, design)| documents::design::write(design, &self.job.draft));
        let total = self.job.price.as_ref().map(|price| price.totals().total);
        Standing::of(&survey, design.as_ref(), total)
    }

    fn firm_shown(&self) -> FirmShown {
        let profile = &self.firm.profile;
        FirmShown {
            name: profile.name.clone(),
            phone: profile.phone.clone(),
            email: profile.email.clone(),
            address: profile.address.clone(),
            licence: profile.licence.clone(),
            time_zone: profile.time_zone.clone(),
            decimal_mark: self.mark,
            made_up: self.firm.made_up,
        }
    }
}

fn letter(mark: DecimalMark) -> char {
    match mark {
        DecimalMark::Point => '.',
        DecimalMark::Comma => ',',
    }
}
