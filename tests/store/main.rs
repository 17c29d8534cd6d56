//! The store on a freshly migrated file: each function, each owner, each promise.

mod accounts;
mod backup;
mod helpers;
mod jobs;
mod quotes;
