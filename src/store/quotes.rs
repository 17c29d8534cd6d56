//! Quote versions, links and the audit: written once, read back, never recomputed.

use sha2::{Digest, Sha256};
use sqlx::SqliteConnection;

use super::Store;
use super::error::{Error, Result};
use super::submission::Once;
use crate::accounts::FirmId;
use crate::jobs::JobId;
use crate::keys::Revision;
use crate::quotes::{Answer, Done, FrozenVersion, Link, LinkId, NewVersion, Said, VersionId};

impl Store {
    /// Freezes a version, unless the job was saved since `seen`: then [`Error::Stale`].
    pub async fn make_version(
        &self,
        firm: FirmId,
        submit: Once,
        job: JobId,
        seen: Revision,
        new: NewVersion,
    ) -> Result<VersionId> {
        let now = submit.now;
        let write = self.write_once(firm.0, submit, move |connection| {
            Box::pin(async move {
                let current = sqlx::query_scalar!(
                    "select revision from job where firm_id = ? and job_id = ? and binned_at is null",
                    firm.0,
                    job.0
                );
                if current.fetch_one(&mut *connection).await? != seen.0 {
                    return Err(Error::Stale);
                }
                freeze(connection, firm, job, &new, now).await
            })
        });
        Ok(VersionId(write.await?))
    }

    /// The versions of a job, newest first.
    pub async fn versions(&self, firm: FirmId, job: JobId) -> Result<Vec<FrozenVersion>> {
        let rows = sqlx::query_as!(
            VersionRow,
            "select v.version_id as \"version_id!\", v.job_id, v.number, v.version, v.sheet, v.sheet_sha256, v.survey, v.design,
                    v.program_version, v.made_by, v.made_at,
                    a.said as \"said?\", a.name as \"name?\", a.words as \"words?\", a.at as \"at?\"
               from quote_version as v left join answer as a using (version_id)
              where v.firm_id = ? and v.job_id = ?
              order by v.version desc",
            firm.0,
            job.0
        );
        Ok(rows.fetch_all(&self.readers).await?.into_iter().map(FrozenVersion::from).collect())
    }

    /// One version.
    pub async fn version(&self, firm: FirmId, id: VersionId) -> Result<FrozenVersion> {
        let row = sqlx::query_as!(
            VersionRow,
            "select v.version_id as \"version_id!\", v.job_id, v.number, v.version, v.sheet, v.sheet_sha256, v.survey, v.design,
                    v.program_version, v.made_by, v.made_at,
                    a.said as \"said?\", a.name as \"name?\", a.words as \"words?\", a.at as \"at?\"
               from quote_version as v left join answer as a using (version_id)
              where v.firm_id = ? and v.version_id = ?",
            firm.0,
            id.0
        );
        Ok(row.fetch_one(&self.readers).await?.into())
    }

    /// Makes a link to a version; only the hash of its key is kept.
    pub async fn make_link(
        &self,
        firm: FirmId,
        submit: Once,
        version: VersionId,
        token_hash: [u8; 32],
        ends_at: i64,
        who: String,
    ) -> Result<LinkId> {
        let now = submit.now;
        let write = self.write_once(firm.0, submit, move |connection| {
            Box::pin(async move {
                let job = job_of(connection, firm, version).await?;
                let token_hash = token_hash.as_slice();
                let made = sqlx::query!(
                    "insert into share_link (firm_id, version_id, token_hash, made_at, ends_at)
                             values (?, ?, ?, ?, ?)",
                    firm.0,
                    version.0,
                    token_hash,
                    now,
                    ends_at
                );
                let id = made.execute(&mut *connection).await?.last_insert_rowid();
                let sent = sqlx::query!(
                    "update job
                                set state = case when state in ('being_sized', 'priced') then 'sent' else state end,
                                    touched_at = ?
                              where job_id = ?",
                    now,
                    job
                );
                sent.execute(&mut *connection).await?;
                note(connection, firm, job, &who, "made a link", now).await?;
                Ok(id)
            })
        });
        Ok(LinkId(write.await?))
    }

    /// The links of a job, newest first.
    pub async fn links(&self, firm: FirmId, job: JobId) -> Result<Vec<Link>> {
        let rows = sqlx::query_as!(
            LinkRow,
            "select l.link_id, l.version_id, v.number, l.made_at, l.ends_at, l.cancelled_at
               from share_link as l join quote_version as v using (version_id)
              where l.firm_id = ? and v.job_id = ?
              order by l.link_id desc",
            firm.0,
            job.0
        );
        Ok(rows.fetch_all(&self.readers).await?.into_iter().map(Link::from).collect())
    }

    /// Cancels a link; it is dead at once.
    pub async fn cancel_link(&self, firm: FirmId, submit: Once, id: LinkId, who: String) -> Result<()> {
        let now = submit.now;
        let write = self.write_once(firm.0, submit, move |connection| {
            Box::pin(async move {
                let link =
                    sqlx::query!("select version_id from share_link where firm_id = ? and link_id = ?", firm.0, id.0);
                let version = VersionId(link.fetch_one(&mut *connection).await?.version_id);
                let cancelled = sqlx::query!(
                    "update share_link set cancelled_at = ? where link_id = ? and cancelled_at is null",
                    now,
                    id.0
                );
                cancelled.execute(&mut *connection).await?;
                let job = job_of(connection, firm, version).await?;
                note(connection, firm, job, &who, "cancelled a link", now).await?;
                Ok(id.0)
            })
        });
        write.await.map(|_| ())
    }

    /// What was done to a job, newest first.
    pub async fn audit(&self, firm: FirmId, job: JobId) -> Result<Vec<Done>> {
        let rows = sqlx::query_as!(
            Done,
            "select who, did, at from audit where firm_id = ? and job_id = ? order by audit_id desc",
            firm.0,
            job.0
        );
        Ok(rows.fetch_all(&self.readers).await?)
    }
}

/// Columns of a version with its answer.
pub(super) struct VersionRow {
    pub version_id: i64,
    pub job_id: i64,
    pub number: i64,
    pub version: i64,
    pub sheet: Vec<u8>,
    pub sheet_sha256: Vec<u8>,
    pub survey: String,
    pub design: String,
    pub program_version: String,
    pub made_by: String,
    pub made_at: i64,
    pub said: Option<String>,
    pub name: Option<String>,
    pub words: Option<String>,
    pub at: Option<i64>,
}

impl From<VersionRow> for FrozenVersion {
    fn from(row: VersionRow) -> Self {
        let said = row.said.as_deref().and_then(Said::named);
        let answer = said.zip(row.name).zip(row.words).zip(row.at);
        Self {
            id: VersionId(row.version_id),
            job: JobId(row.job_id),
            number: row.number,
            version: row.version,
            sheet: row.sheet,
            sheet_sha256: row.sheet_sha256,
            survey: row.survey,
            design: row.design,
            program_version: row.program_version,
            made_by: row.made_by,
            made_at: row.made_at,
            answer: answer.map(|(((said, name), words), at)| Answer { said, name, words, at }),
        }
    }
}

/// Columns of a link.
pub(super) struct LinkRow {
    pub link_id: i64,
    pub version_id: i64,
    pub number: i64,
    pub made_at: i64,
    pub ends_at: i64,
    pub cancelled_at: Option<i64>,
}

impl From<LinkRow> for Link {
    fn from(row: LinkRow) -> Self {
        let LinkRow { link_id, version_id, number, made_at, ends_at, cancelled_at } = row;
        Self { id: LinkId(link_id), version: VersionId(version_id), number, made_at, ends_at, cancelled_at }
    }
}

/// Writes the row that never changes, under the firm's next number.
async fn freeze(
    connection: &mut SqliteConnection,
    firm: FirmId,
    job: JobId,
    new: &NewVersion,
    now: i64,
) -> Result<i64> {
    let hash = Sha256::digest(&new.sheet);
    let hash = hash.as_slice();
    let frozen = sqlx::query!(
        "insert into quote_version (firm_id, job_id, number, version, sheet, sheet_sha256, survey, design,
                                    program_version, made_by, made_at)
         values (?1, ?2,
                 (select coalesce(max(number), 0) + 1 from quote_version where firm_id = ?1),
                 (select coalesce(max(version), 0) + 1 from quote_version where job_id = ?2),
                 ?3, ?4, ?5, ?6, ?7, ?8, ?9)",
        firm.0,
        job.0,
        new.sheet,
        hash,
        new.survey,
        new.design,
        new.program_version,
        new.made_by,
        now
    );
    let id = frozen.execute(&mut *connection).await?.last_insert_rowid();
    let touched = sqlx::query!(
        "update job
            set state = case when state in ('being_sized', 'agreed', 'turned_down') then 'priced' else state end,
                touched_at = ?
          where job_id = ?",
        now,
        job.0
    );
    touched.execute(&mut *connection).await?;
    note(connection, firm, job.0, &new.made_by, "made a sheet", now).await?;
    Ok(id)
}

async fn job_of(connection: &mut SqliteConnection, firm: FirmId, version: VersionId) -> Result<i64> {
    let job =
        sqlx::query_scalar!("select job_id from quote_version where firm_id = ? and version_id = ?", firm.0, version.0);
    Ok(job.fetch_one(connection).await?)
}

/// Adds a row to the audit.
pub(super) async fn note(
    connection: &mut SqliteConnection,
    firm: FirmId,
    job: i64,
    who: &str,
    did: &str,
    now: i64,
) -> Result<()> {
    let noted = sqlx::query!(
        "insert into audit (firm_id, job_id, who, did, at) values (?, ?, ?, ?, ?)",
        firm.0,
        job,
        who,
        did,
        now
    );
    noted.execute(connection).await?;
    Ok(())
}
