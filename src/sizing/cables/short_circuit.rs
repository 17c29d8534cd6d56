//! How thick a conductor must be to bear a fault until the device has cleared it.

use super::laying::Laying;
use crate::sizing::survey::{Code, Conductor, Insulation};
use crate::units::{Celsius, SquareMillimetres};

/// `k` of a conductor, in A·√s/mm²: what heats it from one temperature to the other without loss.
///
/// `k = K · √ln((β + T_end) / (β + T_start))`, with K = 226 and β = 234.5 °C for copper, 148 and 228 °C for
/// aluminium. Holds up to 5 s.
///
/// Source (from memory): IEC 60364-5-54 Annex A, IEC 60949; it gives back the tabled values, which were read,
/// within 0.6.
pub fn heat_constant(conductor: Conductor, start: Celsius, end: Celsius) -> f64 {
    let (constant, reciprocal) = match conductor {
        Conductor::Copper => (226.0, 234.5),
        Conductor::Aluminium => (148.0, 228.0),
    };
    constant * ((reciprocal + end.0) / (reciprocal + start.0)).ln().max(0.0).sqrt()
}

/// Temperatures of a conductor before and after a fault: what its insulation bears for long and for a moment.
///
/// Sources: IEC 60364-5-54, read in a reproduction; 75 and 150 °C of thermoplastic under the NEC from memory.
pub fn temperatures(laying: &Laying) -> (Celsius, Celsius) {
    match (laying.code, laying.insulation) {
        (Code::Iec, Insulation::Pvc70) => (Celsius(70.0), Celsius(160.0)),
        (Code::Nec, Insulation::Pvc70) => (Celsius(75.0), Celsius(150.0)),
        (_, Insulation::Xlpe90) => (Celsius(90.0), Celsius(250.0)),
    }
}

/// The thinnest conductor that bears an energy in A²s: `S = √(I²t) / k`.
///
/// Source: IEC 60364-4-43, read in two reproductions.
pub fn least_area(energy: f64, heat_constant: f64) -> SquareMillimetres {
    SquareMillimetres(energy.sqrt() / heat_constant)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_constant_gives_back_the_tabled_values() {
        let cases = [
            // IEC 60364-5-54 and -4-43 as read in reproductions: metal, start, end °C, k
            (Conductor::Copper, 70.0, 160.0, 115.0),
            (Conductor::Aluminium, 70.0, 160.0, 76.0),
            (Conductor::Copper, 90.0, 250.0, 143.0),
            (Conductor::Aluminium, 90.0, 250.0, 94.0),
            (Conductor::Copper, 85.0, 220.0, 134.0),
            (Conductor::Aluminium, 85.0, 220.0, 89.0),
            (Conductor::Copper, 30.0, 160.0, 143.0),
            (Conductor::Copper, 30.0, 250.0, 176.0),
        ];
        for (conductor, start, end, tabled) in cases {
            let k = heat_constant(conductor, Celsius(start), Celsius(end));
            assert!((k - tabled).abs() <= 0.6, "{conductor:?} {start} to {end} °C: {k}");
        }
    }

    #[test]
    fn eight_kiloamperes_for_a_twentieth_of_a_second_ask_for_twelve_and_a_half_square_millimetres() {
        // Our own vector.
        let k = heat_constant(Conductor::Copper, Celsius(90.0), Celsius(250.0));
        assert!((least_area(8000.0_f64.powi(2) * 0.05, k).0 - 12.5).abs() < 0.05);
    }
}
