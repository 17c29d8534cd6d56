//! Charging currents that units and chargers of the trade can be set to, in A, smallest first.
//!
//! Common practice, no source: a home unit offers about three of them.

/// Settings in A, smallest first.
pub const SETTINGS: &[f64] = &[
    1.0, 2.0, 3.0, 4.0, 5.0, 6.0, 8.0, 10.0, 12.0, 15.0, 18.0, 20.0, 25.0, 30.0, 35.0, 40.0, 45.0, 50.0, 60.0, 70.0,
    80.0, 100.0, 120.0, 140.0, 160.0, 180.0, 200.0, 250.0, 300.0, 400.0, 500.0, 600.0,
];
