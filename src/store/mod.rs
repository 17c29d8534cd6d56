//! All SQL: one file, one writer with group commit, a few readers beside it.
//!
//! The owner's id comes first and stands in every `where`, so that nobody's record is shown to
//! someone else by mistake. Times come in as arguments. Every write that a form causes carries its
//! one-time key: the same key again gives the first result and writes nothing.

mod accounts;
mod attempts;
pub mod backup;
mod error;
mod folder;
mod jobs;
mod migrate;
mod quotes;
mod shared;
mod submission;
mod writer;

use std::path::{Path, PathBuf};
use std::sync::Arc;
use std::time::Duration;

use sqlx::SqliteConnection;
use sqlx::sqlite::{SqliteConnectOptions, SqliteJournalMode, SqlitePool, SqlitePoolOptions, SqliteSynchronous};

pub use accounts::SignedIn;
pub use backup::Report;
pub use error::{Error, Result};
use folder::Folder;
pub use submission::Once;
use submission::once;
use writer::{Writer, Writing};

/// Name of the database in the data folder.
pub const FILE: &str = "keeplit.db";

const READERS: u32 = 3;
const BUSY_TIMEOUT: Duration = Duration::from_secs(5);

/// The store of one data folder; cheap to clone.
#[derive(Clone)]
pub struct Store {
    writer: Writer,
    readers: SqlitePool,
    folder: Arc<Folder>,
}

impl Store {
    /// Opens the store of a folder, and makes folder and database where there are none.
    ///
    /// A second copy of the program on the same folder is refused; so is a database that a newer
    /// program has written. Before it migrates an older one it copies the file.
    pub async fn open(data: &Path) -> Result<Self> {
        let folder = Folder::lock(data)?;
        let file = folder.database()?;
        let mut connection = migrate::connect(&file).await?;
        migrate::migrate(&mut connection, &file).await?;
        let readers = SqlitePoolOptions::new().max_connections(READERS);
        let readers = readers.connect_with(options(&file).read_only(true)).await?;
        Ok(Self { writer: Writer::start(connection), readers, folder: Arc::new(folder) })
    }

    /// The data folder.
    pub fn folder(&self) -> PathBuf {
        self.folder.path().to_owned()
    }

    /// A write that a form causes, done once for its key; the id that it made.
    async fn write_once(
        &self,
        owner: i64,
        submit: Once,
        work: impl for<'c> FnOnce(&'c mut SqliteConnection) -> Writing<'c, i64> + Send + 'static,
    ) -> Result<i64> {
        let write = self.writer.write(move |connection| Box::pin(once(connection, owner, submit, work)));
        write.await
    }

    /// Waits for what is being written, and closes the file.
    pub async fn close(&self) {
        self.writer.stop().await;
        self.readers.close().await;
    }

    /// Whether the store answers and takes writes.
    pub async fn is_ready(&self) -> bool {
        let read = sqlx::query_scalar!("select 1 as one").fetch_one(&self.readers).await;
        let written = self.writer.write(|_| Box::pin(async { Ok(()) })).await;
        read.is_ok() && written.is_ok()
    }
}

/// How every connection to the file is set.
fn options(file: &Path) -> SqliteConnectOptions {
    SqliteConnectOptions::new()
        .filename(file)
        .journal_mode(SqliteJournalMode::Wal)
        .synchronous(SqliteSynchronous::Full)
        .foreign_keys(true)
        .busy_timeout(BUSY_TIMEOUT)
        .pragma("trusted_schema", "off")
}
