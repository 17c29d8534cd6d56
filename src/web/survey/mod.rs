//! The survey's pages: stay-on list, power cut, cable runs.

pub mod cut;
pub mod list;
mod row;
pub mod runs;
mod windows;
