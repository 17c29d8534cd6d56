//! The service on a port of its own, as a browser meets it.

mod access;
mod base_path;
mod cut;
mod first_day;
mod foreign_forms;
mod helpers;
mod job_book;
mod list;
mod my_firm;
mod page_form;
mod proof;
mod runs;
mod sign_in;
mod site;
mod wire;
