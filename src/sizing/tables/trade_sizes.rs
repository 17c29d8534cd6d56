//! Sizes that the trade stocks.

/// Inverter ratings in VA, smallest first. Common practice, no source.
pub const INVERTER_VA: [f64; 22] = [
    600.0, 700.0, 850.0, 900.0, 1000.0, 1100.0, 1250.0, 1450.0, 1500.0, 1650.0, 2000.0, 2200.0, 2500.0, 3000.0, 3500.0,
    4000.0, 5000.0, 5500.0, 6000.0, 7500.0, 8000.0, 10_000.0,
];

/// Largest rating of the small home units built for 12 V, in VA. Common practice, no source.
pub const SMALL_INVERTER_VA: f64 = 1100.0;
