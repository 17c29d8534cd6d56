//! The survey's pages: stay-on list, power cut, cable runs.

pub mod cut;
pub mod list;
pub mod runs;
