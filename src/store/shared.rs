//! What a customer's link opens, and the answer that comes back through it.

use sqlx::SqliteConnection;

use super::Store;
use super::error::{Error, Result};
use super::quotes::{LinkRow, VersionRow, note};
use super::submission::Once;
use crate::accounts::FirmId;
use crate::quotes::{Answer, FrozenVersion, Link, LinkState, Shared};

impl Store {
    /// What the key of this hash opens at a moment; `None` for a key that was never given out.
    ///
    /// Reading changes nothing: programs that look at links open them too.
    pub async fn shared(&self, token_hash: [u8; 32], now: i64) -> Result<Option<Shared>> {
        let mut connection = self.readers.acquire().await?;
        Ok(find(&mut connection, token_hash, now).await?.map(|(_, shared)| shared))
    }

    /// Keeps the customer's answer to the version that the key opens: one for each version.
    ///
    /// [`Error::Taken`] once it was answered, [`Error::Stale`] if the link is dead by now.
    pub async fn answer(&self, token_hash: [u8; 32], submit: Once, answer: Answer) -> Result<()> {
        let now = submit.now;
        let write = self.write_once(0, submit, move |connection| {
            Box::pin(async move {
                let (firm, shared) = find(connection, token_hash, now).await?.ok_or(Error::NotFound)?;
                match (&shared.version.answer, shared.state) {
                    (Some(_), _) => Err(Error::Taken),
                    (None, LinkState::Open) => keep(connection, firm, &shared, &answer, now).await,
                    (None, _) => Err(Error::Stale),
                }
            })
        });
        write.await.map(|_| ())
    }
}

async fn find(connection: &mut SqliteConnection, token_hash: [u8; 32], now: i64) -> Result<Option<(FirmId, Shared)>> {
    let token_hash = token_hash.as_slice();
    let link = sqlx::query!(
        "select l.firm_id, l.link_id, l.version_id, v.number, l.made_at, l.ends_at, l.cancelled_at
           from share_link as l join quote_version as v using (version_id)
          where l.token_hash = ?",
        token_hash
    );
    let Some(row) = link.fetch_optional(&mut *connection).await? else { return Ok(None) };
    let firm = FirmId(row.firm_id);
    let link = Link::from(LinkRow {
        link_id: row.link_id,
        version_id: row.version_id,
        number: row.number,
        made_at: row.made_at,
        ends_at: row.ends_at,
        cancelled_at: row.cancelled_at,
    });
    let version = sqlx::query_as!(
        VersionRow,
        "select v.version_id as \"version_id!\", v.job_id, v.number, v.version, v.sheet, v.sheet_sha256, v.survey, v.design,
                v.program_version, v.made_by, v.made_at,
                a.said as \"said?\", a.name as \"name?\", a.words as \"words?\", a.at as \"at?\"
           from quote_version as v left join answer as a using (version_id)
          where v.version_id = ?",
        link.version.0
    );
    let version = FrozenVersion::from(version.fetch_one(&mut *connection).await?);
    let newest = sqlx::query!(
        "select version_id, made_at from quote_version where job_id = ? order by version desc limit 1",
        version.job.0
    );
    let newest = newest.fetch_one(connection).await?;
    let state = link.state(now, newest.version_id == version.id.0, version.answer.is_some());
    Ok(Some((firm, Shared { link, version, newest_made_at: newest.made_at, state })))
}

async fn keep(
    connection: &mut SqliteConnection,
    firm: FirmId,
    shared: &Shared,
    answer: &Answer,
    now: i64,
) -> Result<i64> {
    let said = answer.said.key();
    let kept = sqlx::query!(
        "insert into answer (version_id, link_id, said, name, words, at) values (?, ?, ?, ?, ?, ?)",
        shared.version.id.0,
        shared.link.id.0,
        said,
        answer.name,
        answer.words,
        now
    );
    let id = kept.execute(&mut *connection).await?.last_insert_rowid();
    let state = if said == "yes" { "agreed" } else { "turned_down" };
    let job = shared.version.job.0;
    let told = sqlx::query!("update job set state = ?, touched_at = ? where job_id = ?", state, now, job);
    told.execute(&mut *connection).await?;
    note(connection, firm, job, &answer.name, &format!("answered {said}"), now).await?;
    Ok(id)
}
