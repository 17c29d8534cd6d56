//! Capacities of the 12 V blocks that the trade stocks, Ah at the 20 h rate, smallest first.
//!
//! Common practice, no source. Lithium packs are rated 12.8 V and their capacity hardly depends on the rate.

use crate::sizing::survey::Chemistry;

const TUBULAR: &[f64] = &[80.0, 100.0, 120.0, 135.0, 150.0, 165.0, 180.0, 200.0, 220.0, 230.0, 250.0];
const FLAT_PLATE: &[f64] = &[40.0, 60.0, 75.0, 80.0, 100.0, 120.0, 135.0, 150.0, 165.0, 180.0, 200.0];
const SEALED: &[f64] =
    &[7.0, 9.0, 12.0, 18.0, 26.0, 33.0, 40.0, 55.0, 65.0, 75.0, 80.0, 100.0, 120.0, 134.0, 150.0, 180.0, 200.0, 250.0];
const LITHIUM: &[f64] = &[7.0, 12.0, 20.0, 30.0, 50.0, 60.0, 80.0, 100.0, 120.0, 150.0, 200.0, 230.0, 280.0, 300.0];

/// The blocks of one kind, smallest first.
pub fn blocks(chemistry: Chemistry) -> &'static [f64] {
    match chemistry {
        Chemistry::FloodedTubular => TUBULAR,
        Chemistry::FloodedFlatPlate => FLAT_PLATE,
        Chemistry::VrlaAgm | Chemistry::VrlaGel => SEALED,
        Chemistry::Lfp => LITHIUM,
    }
}
