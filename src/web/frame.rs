//! What stands around every page: title, firm, way through the job, addresses.

use sha2::{Digest, Sha256};

use super::app::{App, fresh_key};
use super::assets::address_of;
use super::error::Error;
use super::paths::Paths;
use super::session::Installer;
use crate::jobs::JobId;
use crate::keys::OneTimeKey;
use crate::wording::Numbers;

/// What stands around a page.
#[derive(Clone, Debug)]
pub struct Frame {
    /// Title of the page, without the firm.
    pub title: String,
    /// Whether something on it is wrong.
    pub is_error: bool,
    /// Whether the firm is invented.
    pub made_up: bool,
    /// Name of the firm; empty where nobody is signed in.
    pub firm: String,
    /// Name of the person; empty where nobody is signed in.
    pub person: String,
    /// The steps of the job, where the page is one of them.
    pub steps: Vec<Step>,
    /// Addresses of all pages.
    pub paths: Paths,
    /// Writes numbers the firm's way.
    pub numbers: Numbers,
    /// Key of the forms on this page.
    pub key: String,
}

/// One step of a job.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Step {
    /// What it is called.
    pub name: &'static str,
    /// Where it is.
    pub address: String,
    /// Whether this page is it.
    pub is_here: bool,
}

/// The steps of a job, in their order.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs, reason = "the names say it")]
pub enum StepOf {
    Site,
    List,
    Cut,
    Runs,
    Needs,
    Price,
    Send,
}

impl Frame {
    /// Around a page that nobody is signed in to see.
    pub fn bare(app: &App, title: &str) -> Self {
        Self {
            title: title.to_owned(),
            is_error: false,
            made_up: false,
            firm: String::new(),
            person: String::new(),
            steps: Vec::new(),
            paths: app.paths(),
            numbers: Numbers::default(),
            key: String::new(),
        }
    }

    /// Around a page of a firm, with a fresh key for its forms.
    pub fn of(app: &App, installer: &Installer, title: &str) -> Result<Self, Error> {
        let firm = &installer.firm;
        Ok(Self {
            made_up: firm.made_up,
            firm: firm.profile.name.clone(),
            person: installer.person.name.clone(),
            numbers: Numbers::new(firm.profile.decimal_mark),
            key: fresh_key()?.to_string(),
            ..Self::bare(app, title)
        })
    }

    /// Around a step of a job.
    pub fn of_step(app: &App, installer: &Installer, job: JobId, here: StepOf, title: &str) -> Result<Self, Error> {
        let mut frame = Self::of(app, installer, title)?;
        let p = &frame.paths;
        let steps = [
            (StepOf::Site, "Site", p.site(job)),
            (StepOf::List, "Stay-on list", p.list(job)),
            (StepOf::Cut, "Power cut", p.cut(job)),
            (StepOf::Runs, "Cable runs", p.runs(job)),
            (StepOf::Needs, "What it needs", p.needs(job)),
            (StepOf::Price, "Price up", p.price(job)),
            (StepOf::Send, "Send", p.send(job)),
        ];
        frame.steps =
            steps.into_iter().map(|(step, name, address)| Step { name, address, is_here: step == here }).collect();
        Ok(frame)
    }

    /// The whole title, as the browser shows it.
    pub fn full_title(&self) -> String {
        let error = if self.is_error { "Error: " } else { "" };
        let firm = if self.firm.is_empty() { "Keeplit" } else { &self.firm };
        format!("{error}{} · {firm}", self.title)
    }

    /// The key of one of several forms on this page, by a name for it.
    pub fn key_of(&self, form: &str) -> String {
        let digest = Sha256::new().chain_update(&self.key).chain_update(form).finalize();
        let mut bits = [0; 16];
        bits.copy_from_slice(&digest[..16]);
        OneTimeKey::from_random(bits).to_string()
    }

    /// The address of an embedded file.
    pub fn asset(&self, name: &str) -> String {
        self.paths.asset(address_of(name))
    }

    /// Where in the way through the job this page stands: "2 of 7".
    pub fn step_number(&self) -> Option<String> {
        let here = self.steps.iter().position(|step| step.is_here)?;
        Some(format!("{} of {}", here + 1, self.steps.len()))
    }
}
