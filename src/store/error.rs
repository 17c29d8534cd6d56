//! What can go wrong in the store.

use std::path::PathBuf;

/// What can go wrong in the store.
#[derive(Debug, thiserror::Error)]
pub enum Error {
    /// There is no such record, or it is someone else's.
    #[error("there is no such record")]
    NotFound,
    /// It was saved by someone else since it was read.
    #[error("it was changed meanwhile")]
    Stale,
    /// Something of this name is there already.
    #[error("it is there already")]
    Taken,
    /// A stored document cannot be read.
    #[error("{what} {id} cannot be read: {cause}")]
    Unreadable {
        /// Which kind of record.
        what: &'static str,
        /// Its id.
        id: i64,
        /// Why.
        cause: String,
    },
    /// The file is held by another program for too long.
    #[error("the database is busy")]
    Busy,
    /// There is no room left on the disk.
    #[error("the disk is full")]
    Full,
    /// Another copy of the program works in the folder.
    #[error("another keeplit works in {0}: stop it first")]
    InUse(PathBuf),
    /// The database was written by a newer program.
    #[error(
        "the database is of a newer keeplit (schema {found}, this one knows {known}): install that version again, or restore an older copy"
    )]
    Newer {
        /// Schema of the file.
        found: i64,
        /// Newest schema that this program knows.
        known: i64,
    },
    /// The file is damaged or no database of ours.
    #[error("{0}")]
    Damaged(String),
    /// The disk said no.
    #[error("{path}: {source}")]
    Disk {
        /// Where.
        path: PathBuf,
        /// What it said.
        source: std::io::Error,
    },
    /// Anything else.
    #[error("the database could not answer")]
    Internal(#[source] sqlx::Error),
}

/// What the store answers.
pub type Result<T> = std::result::Result<T, Error>;

impl From<sqlx::Error> for Error {
    fn from(error: sqlx::Error) -> Self {
        if matches!(error, sqlx::Error::RowNotFound) {
            return Self::NotFound;
        }
        let code = error.as_database_error().and_then(|cause| cause.code()).unwrap_or_default();
        // SQLite's primary result codes stand in the lowest byte.
        match code.parse::<u32>().map(|code| code & 0xff) {
            Ok(5 | 6) => Self::Busy,
            Ok(13) => Self::Full,
            Ok(11 | 26) => Self::Damaged(error.to_string()),
            _ if error.as_database_error().is_some_and(|cause| cause.is_unique_violation()) => Self::Taken,
            _ => Self::Internal(error),
        }
    }
}

impl Error {
    /// A disk error at a path.
    pub(super) fn disk(path: impl Into<PathBuf>) -> impl FnOnce(std::io::Error) -> Self {
        let path = path.into();
        move |source| Self::Disk { path, source }
    }
}
