//! The service on a port of its own, as a browser meets it.

mod access;
mod base_path;
mod first_day;
mod foreign_forms;
mod helpers;
mod job_book;
mod my_firm;
mod sign_in;
mod site;
mod wire;
