//! A consistent copy while the program runs, putting one back while it is stopped, and a look at
//! everything that must be true.

use std::fs;
use std::path::{Path, PathBuf};

use sha2::{Digest, Sha256};
use sqlx::{ConnectOptions, Connection, SqliteConnection};

use super::error::{Error, Result};
use super::folder::Folder;
use super::{Store, migrate, options};

/// What a check has seen.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Report {
    /// Jobs in the book and in the bin.
    pub jobs: i64,
    /// Frozen quote versions.
    pub versions: i64,
    /// What is wrong; empty if all is well.
    pub faults: Vec<String>,
}

impl Store {
    /// Writes a consistent copy to a file, which appears only once it is whole and was checked.
    pub async fn backup(&self, to: &Path) -> Result<Report> {
        backup(&self.folder.path().join(super::FILE), to).await
    }

    /// Looks at the file, its references and every quote's hash.
    pub async fn check(&self) -> Result<Report> {
        let mut connection = self.readers.acquire().await?;
        inspect(&mut connection).await
    }
}

/// Writes a consistent copy of a database, whether a program works on it or not.
pub async fn backup(from: &Path, to: &Path) -> Result<Report> {
    if !from.exists() {
        return Err(Error::Damaged(format!("there is no database at {}", from.display())));
    }
    let part = with_ending(to, "part");
    let mut connection = options(from).connect().await?;
    let copied = migrate::copy(&mut connection, &part).await;
    connection.close().await?;
    copied?;
    let report = check_file(&part).await?;
    if report.faults.is_empty() {
        fs::File::open(&part).and_then(|file| file.sync_all()).map_err(Error::disk(&part))?;
        fs::rename(&part, to).map_err(Error::disk(to))?;
    } else {
        fs::remove_file(&part).map_err(Error::disk(&part))?;
    }
    Ok(report)
}

/// Puts a copy in the place of a folder's database; the old one is kept beside it.
///
/// Refused while a program works in the folder, and for a copy that is not sound.
pub async fn restore(from: &Path, data: &Path) -> Result<(Report, Option<PathBuf>)> {
    let folder = Folder::lock(data)?;
    let file = folder.path().join(super::FILE);
    let part = with_ending(&file, "part");
    fs::copy(from, &part).map_err(Error::disk(from))?;
    let report = check_file(&part).await?;
    if !report.faults.is_empty() {
        fs::remove_file(&part).map_err(Error::disk(&part))?;
        return Ok((report, None));
    }
    let kept = keep_aside(&file).await?;
    fs::rename(&part, &file).map_err(Error::disk(&file))?;
    Ok((report, kept))
}

/// Moves a database with all that was written to it to a name of its own.
async fn keep_aside(file: &Path) -> Result<Option<PathBuf>> {
    if !file.exists() {
        return Ok(None);
    }
    let kept = (1..).map(|n| with_ending(file, &format!("before-restore-{n}"))).find(|path| !path.exists());
    let kept = kept.unwrap_or_else(|| with_ending(file, "before-restore"));
    fs::rename(file, &kept).map_err(Error::disk(file))?;
    for ending in ["-wal", "-shm"] {
        let beside = PathBuf::from(format!("{}{ending}", file.display()));
        if beside.exists() {
            let to = PathBuf::from(format!("{}{ending}", kept.display()));
            fs::rename(&beside, to).map_err(Error::disk(beside))?;
        }
    }
    Ok(Some(kept))
}

fn with_ending(file: &Path, ending: &str) -> PathBuf {
    PathBuf::from(format!("{}.{ending}", file.display()))
}

/// Looks at a file that nothing else works on.
async fn check_file(file: &Path) -> Result<Report> {
    let mut connection = options(file).create_if_missing(false).journal_mode(sqlx::sqlite::SqliteJournalMode::Delete);
    connection = connection.read_only(true);
    let mut connection = connection.connect().await?;
    let report = inspect(&mut connection).await;
    connection.close().await?;
    report
}

/// Everything that must be true of a database.
pub async fn inspect(connection: &mut SqliteConnection) -> Result<Report> {
    let mut report = Report::default();
    let integrity = sqlx::query_scalar::<_, String>("pragma integrity_check");
    let integrity = integrity.fetch_all(&mut *connection).await?;
    report.faults.extend(integrity.into_iter().filter(|line| line != "ok"));
    let references = sqlx::query_scalar::<_, String>("select \"table\" from pragma_foreign_key_check");
    let references = references.fetch_all(&mut *connection).await?;
    report.faults.extend(references.into_iter().map(|table| format!("a row of {table} refers to nothing")));
    report.jobs = sqlx::query_scalar!("select count(*) from job").fetch_one(&mut *connection).await?;
    let versions = sqlx::query!("select number, sheet, sheet_sha256 from quote_version order by version_id");
    for version in versions.fetch_all(connection).await? {
        report.versions += 1;
        if Sha256::digest(&version.sheet).as_slice() != version.sheet_sha256 {
            report.faults.push(format!("sheet {} is not what was frozen", version.number));
        }
    }
    Ok(report)
}
