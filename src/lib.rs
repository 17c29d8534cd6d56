//! Keeplit designs, prices and keeps the jobs of people who fit backup power.
//!
//! In reading order: units, the engine, the records, their text, the store, the pages, the command
//! line. `DEVELOPERS.md` holds the map.

pub mod accounts;
pub mod cli;
pub mod demo;
pub mod documents;
pub mod drawing;
pub mod jobs;
pub mod keys;
pub mod money;
pub mod offer;
pub mod passwords;
pub mod qr;
pub mod quotes;
pub mod reading;
pub mod simulation;
pub mod sizing;
pub mod store;
pub mod translations;
pub mod units;
pub mod web;
pub mod wording;
