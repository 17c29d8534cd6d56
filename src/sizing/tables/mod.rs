//! Tables of standards and of the trade, one file each: headed by standard, year, table and units.

pub mod altitude;
pub mod ambient;
pub mod ampacity;
pub mod appliances;
pub mod battery_blocks;
pub mod battery_temperature;
pub mod charger_currents;
pub mod chemistries;
pub mod conductors;
pub mod grouping;
pub mod motors;
pub mod outages;
pub mod protection_ratings;
pub mod trade_sizes;

/// Reads a table of points, first column falling, along straight lines; beyond its ends the end value holds.
pub(crate) fn between(points: &[(f64, f64)], at: f64) -> f64 {
    let first = points.first().expect("a table has rows");
    if at >= first.0 {
        return first.1;
    }
    for pair in points.windows(2) {
        let (high, low) = (pair[0], pair[1]);
        if at >= low.0 {
            return low.1 + (high.1 - low.1) * (at - low.0) / (high.0 - low.0);
        }
    }
    points.last().expect("a table has rows").1
}
