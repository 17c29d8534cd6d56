//! Resistance of conductors.
//!
//! Metric: IEC 60228, highest d.c. resistance at 20 °C in Ω/km, plain copper of class 2 (stranded,
//! for fixed wiring) and class 5 (flexible, for battery leads), aluminium of class 2; sizes in mm².
//! Read in four reproductions that agree. Being the highest allowed, it is above ρ·L/A.
//!
//! AWG: NEC Chapter 9 Table 8, stranded uncoated copper, Ω per 1000 ft at 75 °C; read in two
//! reproductions. Areas in mm² from memory, they agree with the circular mils. Aluminium columns
//! from memory.

use crate::units::{OhmsPerKilometre, SquareMillimetres};

/// A metric size.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Metric {
    /// Nominal cross-section.
    pub area: SquareMillimetres,
    /// Copper, stranded, at 20 °C.
    pub copper_class2: OhmsPerKilometre,
    /// Copper, flexible, at 20 °C.
    pub copper_class5: OhmsPerKilometre,
    /// Aluminium, stranded, at 20 °C; it is not made thinner.
    pub aluminium: Option<OhmsPerKilometre>,
}

/// An American size.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Awg {
    /// AWG number, or thousands of circular mils.
    pub name: &'static str,
    /// Area of the metal.
    pub area: SquareMillimetres,
    /// Copper at 75 °C.
    pub copper: OhmsPerKilometre,
    /// Aluminium at 75 °C; thinner sizes are not sold for fixed wiring (common practice, no source).
    pub aluminium: Option<OhmsPerKilometre>,
}

/// Temperature of the metric resistances.
pub const METRIC_AT_C: f64 = 20.0;

/// Temperature of the American resistances.
pub const AWG_AT_C: f64 = 75.0;

/// Rise of resistance per kelvin above 20 °C, copper. Read as a constant of a published network library.
pub const COPPER_PER_KELVIN: f64 = 0.00393;

/// Rise of resistance per kelvin above 20 °C, aluminium. Read as a constant of a published network library.
pub const ALUMINIUM_PER_KELVIN: f64 = 0.00403;

/// A row of IEC 60228: mm², class 2, class 5, aluminium (zero: not made), Ω/km.
const fn metric(area: f64, class2: f64, class5: f64, aluminium: f64) -> Metric {
    Metric {
        area: SquareMillimetres(area),
        copper_class2: OhmsPerKilometre(class2),
        copper_class5: OhmsPerKilometre(class5),
        aluminium: if aluminium > 0.0 { Some(OhmsPerKilometre(aluminium)) } else { None },
    }
}

/// A row of NEC Chapter 9 Table 8: name, mm², copper, aluminium (zero: not sold), Ω per 1000 ft.
const fn awg(name: &'static str, area: f64, copper: f64, aluminium: f64) -> Awg {
    /// Thousands of feet in a kilometre.
    const KILOFEET: f64 = 1.0 / 0.3048;
    Awg {
        name,
        area: SquareMillimetres(area),
        copper: OhmsPerKilometre(copper * KILOFEET),
        aluminium: if aluminium > 0.0 { Some(OhmsPerKilometre(aluminium * KILOFEET)) } else { None },
    }
}

/// IEC 60228, thinnest first; begins where the ampacity tables begin.
pub const METRIC: [Metric; 15] = [
    metric(1.5, 12.1, 13.3, 0.0),
    metric(2.5, 7.41, 7.98, 0.0),
    metric(4.0, 4.61, 4.95, 0.0),
    metric(6.0, 3.08, 3.3, 0.0),
    metric(10.0, 1.83, 1.91, 3.08),
    metric(16.0, 1.15, 1.21, 1.91),
    metric(25.0, 0.727, 0.78, 1.2),
    metric(35.0, 0.524, 0.554, 0.868),
    metric(50.0, 0.387, 0.386, 0.641),
    metric(70.0, 0.268, 0.272, 0.443),
    metric(95.0, 0.193, 0.206, 0.32),
    metric(120.0, 0.153, 0.161, 0.253),
    metric(150.0, 0.124, 0.129, 0.206),
    metric(185.0, 0.0991, 0.106, 0.164),
    metric(240.0, 0.0754, 0.0801, 0.125),
];

/// NEC Chapter 9 Table 8, thinnest first; begins at the thinnest size allowed for branch circuits.
#[expect(clippy::approx_constant, reason = "14 AWG has 3.14 Ω per 1000 ft")]
pub const AWG: [Awg; 18] = [
    awg("14", 2.08, 3.14, 0.0),
    awg("12", 3.31, 1.98, 0.0),
    awg("10", 5.261, 1.24, 0.0),
    awg("8", 8.367, 0.778, 1.28),
    awg("6", 13.3, 0.491, 0.808),
    awg("4", 21.15, 0.308, 0.508),
    awg("3", 26.67, 0.245, 0.403),
    awg("2", 33.62, 0.194, 0.319),
    awg("1", 42.41, 0.154, 0.253),
    awg("1/0", 53.49, 0.122, 0.201),
    awg("2/0", 67.43, 0.0967, 0.159),
    awg("3/0", 85.01, 0.0766, 0.126),
    awg("4/0", 107.2, 0.0608, 0.1),
    awg("250 kcmil", 127.0, 0.0515, 0.0847),
    awg("300 kcmil", 152.0, 0.0429, 0.0707),
    awg("350 kcmil", 177.0, 0.0367, 0.0605),
    awg("400 kcmil", 203.0, 0.0321, 0.0529),
    awg("500 kcmil", 253.0, 0.0258, 0.0424),
];

#[cfg(test)]
mod tests {
    use super::*;

    /// Ω·mm²/km at 20 °C: IEC 60028 and IEC 60889 (from memory).
    const COPPER: f64 = 17.241;
    const ALUMINIUM: f64 = 28.264;

    fn row(area: f64) -> &'static Metric {
        METRIC.iter().find(|row| row.area.0 == area).expect("a size of the table")
    }

    #[test]
    fn copper_and_aluminium_agree_with_a_published_network_library() {
        let cases = [
            // mm², copper, aluminium, highest deviation: standard line types of pandapower 3.5.6, Ω/km at 20 °C
            (50.0, None, Some(0.642), 0.002),
            (70.0, None, Some(0.443), 1e-9),
            (120.0, Some(0.153), Some(0.253), 1e-9),
            (150.0, None, Some(0.206), 1e-9),
            (185.0, Some(0.099), None, 0.0015),
            (240.0, Some(0.075), None, 0.006),
        ];
        for (area, copper, aluminium, tolerance) in cases {
            let row = row(area);
            let agrees =
                |ours: f64, theirs: Option<f64>| theirs.is_none_or(|ohm| (ours / ohm - 1.0).abs() <= tolerance);
            assert!(agrees(row.copper_class2.0, copper), "copper {area} mm²: {row:?}");
            assert!(agrees(row.aluminium.expect("made").0, aluminium), "aluminium {area} mm²: {row:?}");
        }
    }

    #[test]
    fn the_highest_resistance_lies_above_the_metals_own_by_the_standards_allowance() {
        for row in METRIC {
            let over = |ohm: OhmsPerKilometre, metal: f64| ohm.0 * row.area.0 / metal - 1.0;
            let (stranded, flexible) = (over(row.copper_class2, COPPER), over(row.copper_class5, COPPER));
            let allowed = if row.area.0 == 50.0 { 0.123 } else { 0.089 };
            assert!((0.04..allowed).contains(&stranded), "{row:?}: {stranded}");
            assert!((0.10..0.16).contains(&flexible), "{row:?}: {flexible}");
            if let Some(ohm) = row.aluminium {
                assert!((0.06..0.135).contains(&over(ohm, ALUMINIUM)), "{row:?}");
            }
        }
    }

    #[test]
    fn american_sizes_lie_just_above_the_metals_own_resistance_at_75_degrees() {
        let warm = 1.0 + COPPER_PER_KELVIN * (AWG_AT_C - METRIC_AT_C);
        for row in AWG {
            let over = row.copper.0 * row.area.0 / (COPPER * warm) - 1.0;
            assert!((0.015..0.03).contains(&over), "{}: {over}", row.name);
            let Some(aluminium) = row.aluminium else { continue };
            assert!((1.60..1.68).contains(&(aluminium / row.copper)), "{}: {}", row.name, aluminium / row.copper);
        }
    }

    #[test]
    fn a_thicker_conductor_always_has_less_resistance() {
        for pair in METRIC.windows(2) {
            assert!(pair[0].area < pair[1].area && pair[0].copper_class2 > pair[1].copper_class2);
            assert!(pair[0].copper_class5 > pair[1].copper_class5);
            assert!(pair[0].aluminium.is_none() || pair[0].aluminium > pair[1].aluminium);
        }
        for pair in AWG.windows(2) {
            assert!(pair[0].area < pair[1].area && pair[0].copper > pair[1].copper);
            assert!(pair[0].aluminium.is_none() || pair[0].aluminium > pair[1].aluminium);
        }
    }
}
