//! Tries to sign in, so that guessing gets slow.

use super::Store;
use super::error::Result;
use crate::accounts::folded;

impl Store {
    /// Notes a try that failed; those before `forget_before` are forgotten.
    pub async fn note_attempt(&self, email: &str, now: i64, forget_before: i64) -> Result<()> {
        let email = folded(email);
        let write = self.writer.write(move |connection| {
            Box::pin(async move {
                let forgotten = sqlx::query!("delete from sign_in_attempt where at < ?", forget_before);
                forgotten.execute(&mut *connection).await?;
                let noted = sqlx::query!("insert into sign_in_attempt (email_folded, at) values (?, ?)", email, now);
                noted.execute(connection).await?;
                Ok(())
            })
        });
        write.await
    }

    /// How often signing in failed for an address since a moment.
    pub async fn attempts_since(&self, email: &str, since: i64) -> Result<i64> {
        let email = folded(email);
        let count = sqlx::query_scalar!(
            "select count(*) from sign_in_attempt where email_folded = ? and at >= ?",
            email,
            since
        );
        Ok(count.fetch_one(&self.readers).await?)
    }
}
