//! Pictures by the server: scales and marks here, the SVG itself in a template.

pub mod chart;
pub mod day;
pub mod played;
pub mod spread;
pub mod weeks;
