//! The data folder: one program at a time, and a file that only its owner reads.

use std::fs::{self, File, OpenOptions, TryLockError};
use std::path::{Path, PathBuf};

use super::error::{Error, Result};

/// A data folder that is locked for this program; the lock ends with the value.
#[derive(Debug)]
pub struct Folder {
    path: PathBuf,
    _lock: File,
}

impl Folder {
    /// Locks a folder, which is made where there is none.
    pub fn lock(path: &Path) -> Result<Self> {
        fs::create_dir_all(path).map_err(Error::disk(path))?;
        let lock = path.join("keeplit.lock");
        let file = private().open(&lock).map_err(Error::disk(&lock))?;
        match file.try_lock() {
            Ok(()) => Ok(Self { path: path.to_owned(), _lock: file }),
            Err(TryLockError::WouldBlock) => Err(Error::InUse(path.to_owned())),
            Err(TryLockError::Error(error)) => Err(Error::disk(&lock)(error)),
        }
    }

    /// The folder.
    pub fn path(&self) -> &Path {
        &self.path
    }

    /// The database in it, made empty and private where there is none.
    pub fn database(&self) -> Result<PathBuf> {
        let file = self.path.join(super::FILE);
        private().open(&file).map_err(Error::disk(&file))?;
        Ok(file)
    }
}

/// Opens for writing; a new file is readable by its owner alone.
fn private() -> OpenOptions {
    let mut options = OpenOptions::new();
    options.read(true).write(true).create(true).truncate(false);
    #[cfg(unix)]
    std::os::unix::fs::OpenOptionsExt::mode(&mut options, 0o600);
    options
}
