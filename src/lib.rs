//! Keeplit designs, prices and keeps the jobs of people who fit backup power.
//!
//! In reading order: units, the engine, the records, their text, the store, the pages, the command
//! line. `DEVELOPERS.md` holds the map.

pub mod cli;
pub mod documents;
pub mod qr;
pub mod sizing;
pub mod translations;
pub mod units;
pub mod wording;
