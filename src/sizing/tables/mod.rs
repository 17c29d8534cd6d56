//! Tables of standards and of the trade, one file each: headed by standard, year, table and units.

pub mod chemistries;
