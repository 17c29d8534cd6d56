//! The two file forms: `keeplit-survey-1` in, `keeplit-design-1` out.
//!
//! The survey's form is one and the same on the command line, in a file and in a stored job. Its
//! reader is the door through which every number enters: it holds the limits, names each fault by
//! its path, and reports all of them at once.

pub mod defaults;
pub mod design;
pub mod draft;
pub mod fault;
pub mod limits;
pub mod names;
mod node;
mod read;
pub mod survey;
mod write;

pub use draft::Draft;
pub use fault::Fault;

#[cfg(test)]
mod tests;
