//! Firms, people and sessions.

use sqlx::SqliteConnection;

use super::Store;
use super::error::{Error, Result};
use super::submission::Once;
use crate::accounts::{Firm, FirmId, NewPerson, Person, PersonId, Profile, folded};
use crate::keys::Revision;

/// Who a session belongs to.
#[derive(Clone, Debug, PartialEq)]
pub struct SignedIn {
    /// The person.
    pub person: Person,
    /// Their firm.
    pub firm: Firm,
}

impl Store {
    /// Whether nobody has been here yet.
    pub async fn is_first_day(&self) -> Result<bool> {
        Ok(sqlx::query_scalar!("select count(*) from person").fetch_one(&self.readers).await? == 0)
    }

    /// Makes the first firm with its first person; [`Error::Taken`] once there is anybody.
    pub async fn begin(&self, submit: Once, profile: Profile, made_up: bool, person: NewPerson) -> Result<PersonId> {
        let now = submit.now;
        let id = self.write_once(0, submit, move |connection| {
            Box::pin(async move {
                if sqlx::query_scalar!("select count(*) from person").fetch_one(&mut *connection).await? > 0 {
                    return Err(Error::Taken);
                }
                let firm = insert_firm(connection, &profile, made_up, now).await?;
                insert_person(connection, firm, &person, now).await
            })
        });
        Ok(PersonId(id.await?))
    }

    /// Makes a firm.
    pub async fn add_firm(&self, profile: Profile, made_up: bool, now: i64) -> Result<FirmId> {
        let write = self
            .writer
            .write(move |connection| Box::pin(async move { insert_firm(connection, &profile, made_up, now).await }));
        Ok(FirmId(write.await?))
    }

    /// Adds a person to a firm; [`Error::Taken`] if someone has this e-mail address already.
    pub async fn add_person(&self, firm: FirmId, person: NewPerson, now: i64) -> Result<PersonId> {
        let write = self
            .writer
            .write(move |connection| Box::pin(async move { insert_person(connection, firm.0, &person, now).await }));
        Ok(PersonId(write.await?))
    }

    /// A firm.
    pub async fn firm(&self, firm: FirmId) -> Result<Firm> {
        let row = sqlx::query!("select profile, made_up, revision from firm where firm_id = ?", firm.0);
        let row = row.fetch_one(&self.readers).await?;
        read_firm(firm.0, &row.profile, row.made_up, row.revision)
    }

    /// The firm of a name, for the command line.
    pub async fn firm_named(&self, name: &str) -> Result<FirmId> {
        let wanted = folded(name);
        let rows = sqlx::query!("select firm_id, profile from firm order by firm_id").fetch_all(&self.readers).await?;
        let named = rows.into_iter().find(|row| {
            serde_json::from_str::<Profile>(&row.profile).is_ok_and(|profile| folded(&profile.name) == wanted)
        });
        named.map(|row| FirmId(row.firm_id)).ok_or(Error::NotFound)
    }

    /// Stores what a firm has set, unless it was saved since `seen`: then [`Error::Stale`].
    pub async fn save_firm(&self, firm: FirmId, submit: Once, seen: Revision, profile: Profile) -> Result<()> {
        let write = self.write_once(firm.0, submit, move |connection| {
            Box::pin(async move {
                let profile = written(&profile);
                let saved = sqlx::query!(
                    "update firm set profile = ?, revision = revision + 1 where firm_id = ? and revision = ?",
                    profile,
                    firm.0,
                    seen.0
                );
                match saved.execute(connection).await?.rows_affected() {
                    0 => Err(Error::Stale),
                    _ => Ok(firm.0),
                }
            })
        });
        write.await.map(|_| ())
    }

    /// Everyone of a firm, by name.
    pub async fn people(&self, firm: FirmId) -> Result<Vec<Person>> {
        let rows = sqlx::query_as!(
            PersonRow,
            "select person_id, firm_id, name, email, password_hash from person where firm_id = ? order by name",
            firm.0
        );
        Ok(rows.fetch_all(&self.readers).await?.into_iter().map(Person::from).collect())
    }

    /// The person of an e-mail address, however it is spelled.
    pub async fn person_by_email(&self, email: &str) -> Result<Option<Person>> {
        let email = folded(email);
        let row = sqlx::query_as!(
            PersonRow,
            "select person_id, firm_id, name, email, password_hash from person where email_folded = ?",
            email
        );
        Ok(row.fetch_optional(&self.readers).await?.map(Person::from))
    }

    /// Stores a new password and ends every session of the person.
    pub async fn set_password(&self, person: PersonId, password_hash: String) -> Result<()> {
        let write = self.writer.write(move |connection| {
            Box::pin(async move {
                let changed =
                    sqlx::query!("update person set password_hash = ? where person_id = ?", password_hash, person.0);
                changed.execute(&mut *connection).await?;
                sqlx::query!("delete from session where person_id = ?", person.0).execute(connection).await?;
                Ok(())
            })
        });
        write.await
    }

    /// Keeps a session by the hash of its token; sessions that are over are forgotten.
    pub async fn start_session(&self, person: PersonId, token_hash: [u8; 32], now: i64, ends_at: i64) -> Result<()> {
        let write = self.writer.write(move |connection| {
            Box::pin(async move {
                let token_hash = token_hash.as_slice();
                sqlx::query!("delete from session where ends_at <= ?", now).execute(&mut *connection).await?;
                let kept = sqlx::query!(
                    "insert into session (token_hash, person_id, created_at, seen_at, ends_at) values (?, ?, ?, ?, ?)",
                    token_hash,
                    person.0,
                    now,
                    now,
                    ends_at
                );
                kept.execute(connection).await?;
                Ok(())
            })
        });
        write.await
    }

    /// Who a token belongs to; nobody once the session is over.
    pub async fn session(&self, token_hash: [u8; 32], now: i64) -> Result<Option<SignedIn>> {
        let token_hash = token_hash.as_slice();
        let row = sqlx::query!(
            "select person_id, firm_id, name, email, password_hash, profile, made_up, revision
               from session join person using (person_id) join firm using (firm_id)
              where token_hash = ? and ends_at > ?",
            token_hash,
            now
        );
        let Some(row) = row.fetch_optional(&self.readers).await? else { return Ok(None) };
        let firm = read_firm(row.firm_id, &row.profile, row.made_up, row.revision)?;
        let (id, name, email) = (PersonId(row.person_id), row.name, row.email);
        let person = Person { id, firm: firm.id, name, email, password_hash: row.password_hash };
        Ok(Some(SignedIn { person, firm }))
    }

    /// Ends one session.
    pub async fn end_session(&self, token_hash: [u8; 32]) -> Result<()> {
        let write = self.writer.write(move |connection| {
            Box::pin(async move {
                let token_hash = token_hash.as_slice();
                sqlx::query!("delete from session where token_hash = ?", token_hash).execute(connection).await?;
                Ok(())
            })
        });
        write.await
    }
}

struct PersonRow {
    person_id: i64,
    firm_id: i64,
    name: String,
    email: String,
    password_hash: String,
}

impl From<PersonRow> for Person {
    fn from(row: PersonRow) -> Self {
        let PersonRow { person_id, firm_id, name, email, password_hash } = row;
        Self { id: PersonId(person_id), firm: FirmId(firm_id), name, email, password_hash }
    }
}

fn read_firm(id: i64, profile: &str, made_up: i64, revision: i64) -> Result<Firm> {
    let profile = serde_json::from_str(profile);
    let profile = profile.map_err(|cause| Error::Unreadable { what: "firm", id, cause: cause.to_string() })?;
    Ok(Firm { id: FirmId(id), profile, made_up: made_up != 0, revision: Revision(revision) })
}

fn written(profile: &Profile) -> String {
    serde_json::json!(profile).to_string()
}

async fn insert_firm(connection: &mut SqliteConnection, profile: &Profile, made_up: bool, now: i64) -> Result<i64> {
    let profile = written(profile);
    let made = sqlx::query!("insert into firm (profile, made_up, created_at) values (?, ?, ?)", profile, made_up, now);
    Ok(made.execute(connection).await?.last_insert_rowid())
}

async fn insert_person(connection: &mut SqliteConnection, firm: i64, person: &NewPerson, now: i64) -> Result<i64> {
    let email = folded(&person.email);
    let added = sqlx::query!(
        "insert into person (firm_id, name, email, email_folded, password_hash, created_at) values (?, ?, ?, ?, ?, ?)",
        firm,
        person.name,
        person.email,
        email,
        person.password_hash,
        now
    );
    Ok(added.execute(connection).await?.last_insert_rowid())
}
