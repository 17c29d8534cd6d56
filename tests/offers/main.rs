//! From prices to the customer's answer, as browsers meet it.

mod service;

mod quotes;
mod share;
mod words;
