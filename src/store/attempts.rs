//! Tries to sign in, so that guessing gets slow.
//!
//! What is counted is a text of the caller's: an e-mail with where the try came from, or that place
//! alone. Someone who guesses from elsewhere does not lock the owner out.

use super::Store;
use super::error::Result;
use crate::accounts::folded;

impl Store {
    /// Notes a try that failed; those before `forget_before` are forgotten.
    pub async fn note_attempt(&self, whose: &str, now: i64, forget_before: i64) -> Result<()> {
        let whose = folded(whose);
        let write = self.writer.write(move |connection| {
            Box::pin(async move {
                let forgotten = sqlx::query!("delete from sign_in_attempt where at < ?", forget_before);
                forgotten.execute(&mut *connection).await?;
                let noted = sqlx::query!("insert into sign_in_attempt (whose, at) values (?, ?)", whose, now);
                noted.execute(connection).await?;
                Ok(())
            })
        });
        write.await
    }

    /// How often signing in failed since a moment.
    pub async fn attempts_since(&self, whose: &str, since: i64) -> Result<i64> {
        let whose = folded(whose);
        let count =
            sqlx::query_scalar!("select count(*) from sign_in_attempt where whose = ? and at >= ?", whose, since);
        Ok(count.fetch_one(&self.readers).await?)
    }
}
