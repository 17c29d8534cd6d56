//! Cable runs: one-way lengths, how they are laid, of what.

use askama::Template;
use axum::extract::{Path, State};
use axum::response::Response;
use serde::Deserialize;

use crate::documents::names::Named;
use crate::documents::{Draft, limits};
use crate::jobs::{Job, JobId};
use crate::reading;
use crate::sizing::survey::{Code, Conductor, Insulation, Method, Runs};
use crate::store;
use crate::units::Metres;
use crate::web::app::App;
use crate::web::conflict::Conflict;
use crate::web::error::Error;
use crate::web::forms::{Complaints, Form, on_to, page, page_again, page_of_conflict, revision, submit};
use crate::web::frame::{Frame, StepOf};
use crate::web::session::Installer;
use crate::wording::{DecimalMark, Labelled, Numbers};

/// What is typed on the page.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct RunsForm {
    key: String,
    revision: String,
    bank: String,
    string: String,
    board: String,
    mains: String,
    charger: String,
    method: String,
    ac_method: String,
    conductor: String,
    insulation: String,
    code: String,
}

#[derive(Template)]
#[template(path = "survey/runs.html")]
struct RunsPage {
    frame: Frame,
    here: String,
    reload: String,
    form: RunsForm,
    complaints: Complaints,
    conflict: Conflict,
}

impl RunsPage {
    fn methods(&self) -> Vec<(&'static str, &'static str)> {
        [Method::F, Method::C, Method::E, Method::B1].map(|method| (method.name(), method.label())).to_vec()
    }
}

/// The page as it is stored.
pub async fn show(State(app): State<App>, installer: Installer, Path(id): Path<i64>) -> Result<Response, Error> {
    let job = app.store.job(installer.firm.id, JobId(id)).await?;
    let form = RunsForm::of(&job, Numbers::new(installer.firm.profile.decimal_mark));
    page(&runs_page(&app, &installer, job.id, form)?)
}

/// Stores the page and goes on to the answer.
pub async fn save(
    State(app): State<App>,
    installer: Installer,
    Path(id): Path<i64>,
    Form(form): Form<RunsForm>,
) -> Result<Response, Error> {
    let firm = &installer.firm;
    let job = app.store.job(firm.id, JobId(id)).await?;
    let mut complaints = Complaints::default();
    let Some(draft) = form.read(&job.draft, firm.profile.decimal_mark, &mut complaints) else {
        let mut page = runs_page(&app, &installer, job.id, form)?;
        (page.complaints, page.frame.is_error) = (complaints, true);
        return page_again(&page);
    };
    let once = submit(&app, &form.key)?;
    match app.store.save_draft(firm.id, once, job.id, revision(&form.revision), &draft).await {
        Err(store::Error::Stale) => {
            let stored = RunsForm::of(&job, Numbers::new(firm.profile.decimal_mark));
            let conflict = Conflict::between(&form.fields(), &stored.fields());
            let mut page =
                runs_page(&app, &installer, job.id, RunsForm { revision: job.revision.to_string(), ..form })?;
            page.conflict = conflict;
            page_of_conflict(&page)
        }
        saved => saved.map(|()| on_to(&app.paths().needs(job.id))).map_err(Error::from),
    }
}

fn runs_page(app: &App, installer: &Installer, id: JobId, form: RunsForm) -> Result<RunsPage, Error> {
    let frame = Frame::of_step(app, installer, id, StepOf::Runs, "Cable runs")?;
    let here = frame.paths.runs(id);
    let (complaints, conflict) = (Complaints::default(), Conflict::default());
    Ok(RunsPage { reload: here.clone(), here, frame, form, complaints, conflict })
}

impl RunsForm {
    fn of(job: &Job, numbers: Numbers) -> Self {
        let (runs, choice) = (&job.draft.runs, &job.draft.choice);
        let length = |length: Metres| numbers.typed(length.0);
        Self {
            key: String::new(),
            revision: job.revision.to_string(),
            bank: length(runs.bank_to_inverter),
            string: length(runs.string_lead),
            board: length(runs.inverter_to_board),
            mains: length(runs.mains_to_inverter),
            charger: runs.charger_to_bank.map_or_else(String::new, length),
            method: choice.method.name().to_owned(),
            ac_method: choice.ac_method.name().to_owned(),
            conductor: choice.conductor.name().to_owned(),
            insulation: choice.insulation.name().to_owned(),
            code: choice.code.name().to_owned(),
        }
    }

    fn fields(&self) -> Vec<(&'static str, String)> {
        [
            ("Bank to inverter", &self.bank),
            ("String to busbar", &self.string),
            ("Inverter to board", &self.board),
            ("Mains to inverter", &self.mains),
            ("Separate charger to bank", &self.charger),
            ("Battery cables", &self.method),
            ("Board and mains cables", &self.ac_method),
            ("Metal", &self.conductor),
            ("Insulation", &self.insulation),
            ("Code", &self.code),
        ]
        .map(|(label, typed)| (label, typed.clone()))
        .to_vec()
    }

    /// The draft with this page's answers; `None` with complaints.
    fn read(&self, before: &Draft, mark: DecimalMark, complaints: &mut Complaints) -> Option<Draft> {
        let mut length = |field: &str, label: &str, typed: &str| {
            complaints.take(field, label, reading::metres(typed, mark, limits::LENGTH_M)).map(Metres)
        };
        let bank = length("bank", "Bank to inverter", &self.bank);
        let string = length("string", "String to busbar", &self.string);
        let board = length("board", "Inverter to board", &self.board);
        let mains = length("mains", "Mains to inverter", &self.mains);
        let charger = if self.charger.trim().is_empty() {
            None
        } else {
            length("charger", "Separate charger to bank", &self.charger)
        };
        if !complaints.is_empty() {
            return None;
        }
        let mut draft = before.clone();
        draft.runs = Runs {
            bank_to_inverter: bank?,
            string_lead: string?,
            inverter_to_board: board?,
            mains_to_inverter: mains?,
            charger_to_bank: charger,
        };
        let choice = &mut draft.choice;
        choice.method = Method::named(&self.method).unwrap_or(choice.method);
        choice.ac_method = Method::named(&self.ac_method).unwrap_or(choice.ac_method);
        choice.conductor = Conductor::named(&self.conductor).unwrap_or(choice.conductor);
        choice.insulation = Insulation::named(&self.insulation).unwrap_or(choice.insulation);
        choice.code = Code::named(&self.code).unwrap_or(choice.code);
        Some(draft)
    }
}
