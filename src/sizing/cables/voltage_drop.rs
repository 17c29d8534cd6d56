//! What is lost along a run, over both conductors.

use super::laying::Size;
use crate::units::{Amps, Fraction, Metres, Ohms, OhmsPerKilometre};

/// Reactance of low-voltage cables, one way. Source: the low-voltage cables of a published network library, 0.080 to 0.083.
pub const REACTANCE: OhmsPerKilometre = OhmsPerKilometre(0.08);

/// Resistance of both conductors, warm: `2 · L · r / n`.
pub fn loop_resistance(size: &Size, length: Metres, parallel: u32) -> Ohms {
    (size.warm * length * 2.0 / f64::from(parallel)).ohms()
}

/// Volts lost on direct current: `2 · L · I · r / n`.
///
/// Source: a cable-rating handbook's page, and arithmetic.
pub fn direct(current: Amps, loop_resistance: Ohms) -> f64 {
    (current * loop_resistance).0
}

/// Volts lost on alternating current: `2 · L · I · (r·cos φ + x·sin φ) / n`.
///
/// Holds for a lagging load of one phase. Source: IEC 60364-5-52 Annex G, read in a reproduction.
pub fn alternating(current: Amps, loop_resistance: Ohms, loop_reactance: Ohms, power_factor: Fraction) -> f64 {
    let cosine = power_factor.get();
    let sine = (1.0 - cosine * cosine).max(0.0).sqrt();
    current.0 * (loop_resistance.0 * cosine + loop_reactance.0 * sine)
}

/// Reactance of both conductors: `2 · L · x / n`.
pub fn loop_reactance(length: Metres, parallel: u32) -> Ohms {
    (REACTANCE * length * 2.0 / f64::from(parallel)).ohms()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::cables::laying::{Laying, laid};
    use crate::sizing::survey::{Code, Insulation};

    fn size(laying: Laying, area: f64) -> Size {
        laying.sizes().into_iter().find(|size| size.area.0 == area).expect("a size of the table")
    }

    #[test]
    fn a_battery_lead_drops_by_its_warm_resistance() {
        // Our own vector: 24 V, 100 A, 35 mm² class 5, 2 m, 70 °C: 2·2·100·0.554·1.1965/1000 V.
        let lead = Laying { insulation: Insulation::Pvc70, flexible: true, ..laid() };
        let drop = direct(Amps(100.0), loop_resistance(&size(lead, 35.0), Metres(2.0), 1));
        assert!((drop - 0.26514).abs() < 1e-5, "{drop}");
    }

    #[test]
    fn a_supply_cable_drops_by_resistance_and_reactance() {
        // Our own vector: 20 A, 4 mm² class 2 at 70 °C, 25 m, cos φ 0.9.
        let cable = Laying { insulation: Insulation::Pvc70, ..laid() };
        let resistance = loop_resistance(&size(cable, 4.0), Metres(25.0), 1);
        let drop = alternating(Amps(20.0), resistance, loop_reactance(Metres(25.0), 1), Fraction::constant(0.9));
        assert!((drop - 4.999).abs() < 0.001, "{drop}");
    }

    #[test]
    fn an_american_cable_drops_by_the_circular_mil_form() {
        // K = 12.9 Ω·cmil/ft at 75 °C from the table itself: 2·K·I·L/CM for 4 AWG, 41,740 cmil, 30 ft, 60 A.
        let lead = Laying { code: Code::Nec, flexible: true, ..laid() };
        let size = lead.sizes().into_iter().find(|size| (size.area.0 - 21.15).abs() < 0.01).expect("4 AWG");
        let drop = direct(Amps(60.0), loop_resistance(&size, Metres(30.0 * 0.3048), 1));
        assert!((drop / (2.0 * 12.9 * 60.0 * 30.0 / 41_740.0) - 1.0).abs() < 0.005, "{drop}");
    }

    #[test]
    fn parallel_conductors_share_the_drop_and_a_thicker_one_never_drops_more() {
        for code in [Code::Iec, Code::Nec] {
            let sizes = Laying { code, ..laid() }.sizes();
            let of = |size: &Size, n| loop_resistance(size, Metres(7.0), n);
            assert!(sizes.windows(2).all(|pair| of(&pair[0], 1) > of(&pair[1], 1)), "{code:?}");
            assert!(sizes.iter().all(|size| (of(size, 1) / of(size, 2) - 2.0).abs() < 1e-12));
        }
    }
}
