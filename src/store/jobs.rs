//! Jobs: started, saved on a revision, copied, put into the bin and back.

use sqlx::SqliteConnection;

use super::Store;
use super::error::{Error, Result};
use super::submission::Once;
use crate::accounts::{FirmId, folded};
use crate::documents::Draft;
use crate::jobs::{Contact, DAYS_IN_BIN, Filter, Job, JobId, JobState, JobSummary};
use crate::keys::Revision;
use crate::quotes::price::PriceDraft;

/// Most lines that the book shows at once.
const BOOK: i64 = 500;

impl Store {
    /// Starts a job.
    pub async fn start_job(&self, firm: FirmId, submit: Once, contact: Contact, draft: &Draft) -> Result<JobId> {
        let survey = draft.write();
        let now = submit.now;
        let write = self.write_once(firm.0, submit, move |connection| {
            Box::pin(async move { insert(connection, firm, &contact, &survey, now).await })
        });
        Ok(JobId(write.await?))
    }

    /// A job, out of the bin or in it.
    pub async fn job(&self, firm: FirmId, id: JobId) -> Result<Job> {
        let row = sqlx::query!(
            "select customer, place, phone, note, state, survey, price, revision, touched_at, binned_at
               from job
              where firm_id = ? and job_id = ?",
            firm.0,
            id.0
        );
        let row = row.fetch_one(&self.readers).await?;
        let unreadable = |cause: String| Error::Unreadable { what: "job", id: id.0, cause };
        let draft = Draft::read(&row.survey)
            .map_err(|faults| unreadable(faults.iter().map(ToString::to_string).collect::<Vec<_>>().join("; ")))?;
        let price = row.price.as_deref().map(serde_json::from_str).transpose();
        Ok(Job {
            id,
            firm,
            contact: Contact { customer: row.customer, place: row.place, phone: row.phone, note: row.note },
            state: state(&row.state),
            draft,
            price: price.map_err(|cause| unreadable(cause.to_string()))?,
            revision: Revision(row.revision),
            touched_at: row.touched_at,
            binned_at: row.binned_at,
        })
    }

    /// The job book, or the bin: last touched first.
    pub async fn jobs(&self, firm: FirmId, filter: &Filter) -> Result<Vec<JobSummary>> {
        let pattern = like(&filter.search);
        let wanted = filter.state.map(JobState::key);
        let rows = sqlx::query_as!(
            SummaryRow,
            r"select job_id, customer, place, phone, state, touched_at, binned_at
                from job
               where firm_id = ?1
                 and (binned_at is not null) = ?2
                 and searched like ?3 escape '\'
                 and (?4 is null or state = ?4)
               order by touched_at desc, job_id desc
               limit ?5",
            firm.0,
            filter.binned,
            pattern,
            wanted,
            BOOK
        );
        Ok(rows.fetch_all(&self.readers).await?.into_iter().map(JobSummary::from).collect())
    }

    /// Stores who and where together with the survey, unless the job was saved since `seen`: then
    /// [`Error::Stale`].
    pub async fn save_site(
        &self,
        firm: FirmId,
        submit: Once,
        id: JobId,
        seen: Revision,
        contact: Contact,
        draft: &Draft,
    ) -> Result<()> {
        let survey = draft.write();
        self.save(firm, submit, id, move |connection, now| {
            Box::pin(async move {
                let searched = searched(&contact);
                let saved = sqlx::query!(
                    "update job
                        set customer = ?, place = ?, phone = ?, note = ?, searched = ?, survey = ?,
                            revision = revision + 1, touched_at = ?
                      where firm_id = ? and job_id = ? and revision = ? and binned_at is null",
                    contact.customer,
                    contact.place,
                    contact.phone,
                    contact.note,
                    searched,
                    survey,
                    now,
                    firm.0,
                    id.0,
                    seen.0
                );
                Ok(saved.execute(connection).await?.rows_affected())
            })
        })
        .await
    }

    /// Stores the survey so far, unless the job was saved since `seen`: then [`Error::Stale`].
    pub async fn save_draft(&self, firm: FirmId, submit: Once, id: JobId, seen: Revision, draft: &Draft) -> Result<()> {
        let survey = draft.write();
        self.save(firm, submit, id, move |connection, now| {
            Box::pin(async move {
                let saved = sqlx::query!(
                    "update job
                        set survey = ?, revision = revision + 1, touched_at = ?
                      where firm_id = ? and job_id = ? and revision = ? and binned_at is null",
                    survey,
                    now,
                    firm.0,
                    id.0,
                    seen.0
                );
                Ok(saved.execute(connection).await?.rows_affected())
            })
        })
        .await
    }

    /// Stores the prices so far, unless the job was saved since `seen`: then [`Error::Stale`].
    pub async fn save_price(
        &self,
        firm: FirmId,
        submit: Once,
        id: JobId,
        seen: Revision,
        price: &PriceDraft,
    ) -> Result<()> {
        let price = serde_json::json!(price).to_string();
        self.save(firm, submit, id, move |connection, now| {
            Box::pin(async move {
                let saved = sqlx::query!(
                    "update job
                        set price = ?, state = case state when 'being_sized' then 'priced' else state end,
                            revision = revision + 1, touched_at = ?
                      where firm_id = ? and job_id = ? and revision = ? and binned_at is null",
                    price,
                    now,
                    firm.0,
                    id.0,
                    seen.0
                );
                Ok(saved.execute(connection).await?.rows_affected())
            })
        })
        .await
    }

    /// Sets how far a job has come.
    pub async fn set_state(&self, firm: FirmId, submit: Once, id: JobId, state: JobState) -> Result<()> {
        self.save(firm, submit, id, move |connection, now| {
            Box::pin(async move {
                let state = state.key();
                let set = sqlx::query!(
                    "update job set state = ?, touched_at = ? where firm_id = ? and job_id = ?",
                    state,
                    now,
                    firm.0,
                    id.0
                );
                Ok(set.execute(connection).await?.rows_affected())
            })
        })
        .await
    }

    /// A new job with the survey of another; neither prices nor quotes come along.
    pub async fn copy_job(&self, firm: FirmId, submit: Once, id: JobId) -> Result<JobId> {
        let now = submit.now;
        let write = self.write_once(firm.0, submit, move |connection| {
            Box::pin(async move {
                let source = sqlx::query!(
                    "select customer, place, phone, survey from job where firm_id = ? and job_id = ?",
                    firm.0,
                    id.0
                );
                let source = source.fetch_one(&mut *connection).await?;
                let customer = format!("Copy of {}", source.customer).chars().take(120).collect();
                let contact = Contact { customer, place: source.place, phone: source.phone, note: String::new() };
                insert(connection, firm, &contact, &source.survey, now).await
            })
        });
        Ok(JobId(write.await?))
    }

    /// Puts a job into the bin; it can be taken back for 30 days.
    pub async fn bin_job(&self, firm: FirmId, submit: Once, id: JobId) -> Result<()> {
        self.save(firm, submit, id, move |connection, now| {
            Box::pin(async move {
                let binned =
                    sqlx::query!("update job set binned_at = ? where firm_id = ? and job_id = ?", now, firm.0, id.0);
                Ok(binned.execute(connection).await?.rows_affected())
            })
        })
        .await
    }

    /// Takes a job back out of the bin.
    pub async fn restore_job(&self, firm: FirmId, submit: Once, id: JobId) -> Result<()> {
        self.save(firm, submit, id, move |connection, _| {
            Box::pin(async move {
                let restored =
                    sqlx::query!("update job set binned_at = null where firm_id = ? and job_id = ?", firm.0, id.0);
                Ok(restored.execute(connection).await?.rows_affected())
            })
        })
        .await
    }

    /// Deletes jobs that have lain in the bin too long; one with a quote stays, since quotes are kept.
    pub async fn empty_bin(&self, now: i64) -> Result<u64> {
        let before = now - DAYS_IN_BIN * 24 * 3600;
        let write = self.writer.write(move |connection| {
            Box::pin(async move {
                let deleted = sqlx::query!(
                    "delete from job
                      where binned_at < ?
                        and not exists (select 1 from quote_version as v where v.job_id = job.job_id)
                        and not exists (select 1 from audit as a where a.job_id = job.job_id)",
                    before
                );
                Ok(deleted.execute(connection).await?.rows_affected())
            })
        });
        write.await
    }

    /// A change of one job by a form. No row changed means: stale, or not there.
    async fn save(
        &self,
        firm: FirmId,
        submit: Once,
        id: JobId,
        change: impl for<'c> FnOnce(&'c mut SqliteConnection, i64) -> super::writer::Writing<'c, u64> + Send + 'static,
    ) -> Result<()> {
        let now = submit.now;
        let write = self.write_once(firm.0, submit, move |connection| {
            Box::pin(async move {
                match change(&mut *connection, now).await? {
                    0 => Err(why_unchanged(connection, firm, id).await?),
                    _ => Ok(id.0),
                }
            })
        });
        write.await.map(|_| ())
    }
}

struct SummaryRow {
    job_id: i64,
    customer: String,
    place: String,
    phone: String,
    state: String,
    touched_at: i64,
    binned_at: Option<i64>,
}

impl From<SummaryRow> for JobSummary {
    fn from(row: SummaryRow) -> Self {
        let SummaryRow { job_id, customer, place, phone, state: key, touched_at, binned_at } = row;
        Self { id: JobId(job_id), customer, place, phone, state: state(&key), touched_at, binned_at }
    }
}

async fn insert(
    connection: &mut SqliteConnection,
    firm: FirmId,
    contact: &Contact,
    survey: &str,
    now: i64,
) -> Result<i64> {
    let searched = searched(contact);
    let started = sqlx::query!(
        "insert into job (firm_id, customer, place, phone, note, searched, state, survey, created_at, touched_at)
         values (?, ?, ?, ?, ?, ?, 'being_sized', ?, ?, ?)",
        firm.0,
        contact.customer,
        contact.place,
        contact.phone,
        contact.note,
        searched,
        survey,
        now,
        now
    );
    Ok(started.execute(connection).await?.last_insert_rowid())
}

async fn why_unchanged(connection: &mut SqliteConnection, firm: FirmId, id: JobId) -> Result<Error> {
    let there = sqlx::query_scalar!(
        "select count(*) from job where firm_id = ? and job_id = ? and binned_at is null",
        firm.0,
        id.0
    );
    Ok(if there.fetch_one(connection).await? == 0 { Error::NotFound } else { Error::Stale })
}

fn state(key: &str) -> JobState {
    JobState::named(key).unwrap_or(JobState::BeingSized)
}

/// What a search looks through; the digits of a phone number stand there once more without spaces.
fn searched(contact: &Contact) -> String {
    let digits: String = contact.phone.chars().filter(char::is_ascii_digit).collect();
    folded(&format!("{} {} {} {digits}", contact.customer, contact.place, contact.phone))
}

/// A pattern that finds the letters anywhere, with the signs of patterns taken as they are.
fn like(search: &str) -> String {
    let mut pattern = String::from("%");
    for letter in folded(search).chars() {
        if matches!(letter, '%' | '_' | '\\') {
            pattern.push('\\');
        }
        pattern.push(letter);
    }
    pattern.push('%');
    pattern
}
