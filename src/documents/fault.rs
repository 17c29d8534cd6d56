//! What is wrong with a document, and where.

use std::fmt;

/// One fault: its path in the document and what to give instead.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Fault {
    /// `loads[2].running_w`; empty for the document as a whole.
    pub path: String,
    /// What to give, in plain words.
    pub message: String,
}

impl Fault {
    /// A fault at a path.
    pub fn new(path: impl Into<String>, message: impl Into<String>) -> Self {
        Self { path: path.into(), message: message.into() }
    }
}

impl fmt::Display for Fault {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        if self.path.is_empty() { f.write_str(&self.message) } else { write!(f, "{}: {}", self.path, self.message) }
    }
}
