//! Numbers with units, findings and names as text: alike on screen, on paper and in files.

mod findings;
mod names;
mod numbers;

pub use findings::{Told, finding};
pub use names::{Labelled, severity};
pub use numbers::{DecimalMark, Numbers, duration};
