//! Bringing the file to this program's schema: a copy first, never backwards.

use std::path::{Path, PathBuf};

use sqlx::migrate::Migrator;
use sqlx::{ConnectOptions, SqliteConnection};

use super::error::{Error, Result};

static MIGRATIONS: Migrator = sqlx::migrate!();

/// Below this version two writers may damage a file in WAL mode (fault of 3.7.0 to 3.51.2).
const OLDEST_SQLITE: i32 = 3_051_003;

/// Opens the connection that writes.
pub async fn connect(file: &Path) -> Result<SqliteConnection> {
    let version = sqlx::query_scalar::<_, String>("select sqlite_version()");
    let mut connection = super::options(file).connect().await?;
    let version = version.fetch_one(&mut connection).await?;
    if number(&version) < OLDEST_SQLITE {
        return Err(Error::Damaged(format!("SQLite {version} is too old: build with the one that comes along")));
    }
    Ok(connection)
}

/// `3.51.3` as `3051003`.
fn number(version: &str) -> i32 {
    version.split('.').filter_map(|part| part.parse::<i32>().ok()).fold(0, |number, part| number * 1000 + part)
}

/// Applies what is missing; an older file is copied beside itself before.
pub async fn migrate(connection: &mut SqliteConnection, file: &Path) -> Result<()> {
    let known = MIGRATIONS.iter().map(|migration| migration.version).max().unwrap_or(0);
    let found = schema(connection).await?;
    if found > known {
        return Err(Error::Newer { found, known });
    }
    if found > 0 && found < known {
        copy(connection, &copy_name(file, found)).await?;
    }
    let migrated = MIGRATIONS.run(connection).await;
    migrated.map_err(|error| Error::Damaged(format!("the database cannot be brought up to date: {error}")))
}

/// Newest migration in the file; zero for an empty one.
async fn schema(connection: &mut SqliteConnection) -> Result<i64> {
    let table = "select count(*) from sqlite_schema where name = '_sqlx_migrations'";
    if sqlx::query_scalar::<_, i64>(table).fetch_one(&mut *connection).await? == 0 {
        return Ok(0);
    }
    let newest = "select coalesce(max(version), 0) from _sqlx_migrations where success";
    Ok(sqlx::query_scalar::<_, i64>(newest).fetch_one(connection).await?)
}

fn copy_name(file: &Path, schema: i64) -> PathBuf {
    file.with_file_name(format!("before-schema-{}.db", schema + 1))
}

/// Writes a consistent copy to a new file.
pub async fn copy(connection: &mut SqliteConnection, to: &Path) -> Result<()> {
    match std::fs::remove_file(to) {
        Err(error) if error.kind() != std::io::ErrorKind::NotFound => return Err(Error::disk(to)(error)),
        _ => {}
    }
    let name = to.to_str().ok_or_else(|| Error::Damaged("the path of the copy is not text".to_owned()))?;
    sqlx::query("vacuum into ?").bind(name).execute(connection).await?;
    Ok(())
}
