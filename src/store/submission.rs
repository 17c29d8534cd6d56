//! One submit, one record: what the first arrival of a form made.

use sqlx::SqliteConnection;

use super::error::Result;
use super::writer::Writing;
use crate::keys::OneTimeKey;

/// Seconds for which a key is remembered: 30 days.
const REMEMBERED: i64 = 30 * 24 * 3600;

/// A submit of a form.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Once {
    /// The form's key.
    pub key: OneTimeKey,
    /// When it arrived.
    pub now: i64,
}

/// Runs a write unless this key has been here; either way the id that it made.
///
/// `owner` is the firm, or 0 where nobody is signed in.
pub async fn once(
    connection: &mut SqliteConnection,
    owner: i64,
    submit: Once,
    write: impl for<'c> FnOnce(&'c mut SqliteConnection) -> Writing<'c, i64> + Send,
) -> Result<i64> {
    let key = submit.key.as_str();
    let before =
        sqlx::query_scalar!("select result_id from submission where owner_id = ? and one_time_key = ?", owner, key);
    if let Some(result) = before.fetch_optional(&mut *connection).await? {
        return Ok(result);
    }
    let result = write(connection).await?;
    let forgotten = submit.now - REMEMBERED;
    sqlx::query!("delete from submission where at < ?", forgotten).execute(&mut *connection).await?;
    sqlx::query!(
        "insert into submission (owner_id, one_time_key, result_id, at) values (?, ?, ?, ?)",
        owner,
        key,
        result,
        submit.now
    )
    .execute(connection)
    .await?;
    Ok(result)
}
