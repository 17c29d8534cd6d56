//! Current-carrying capacity of conductors, in A, at 30 °C in air and with two loaded conductors.
//!
//! Copper: IEC 60364-5-52:2009 Tables B.52.2 (PVC, methods B1 and C), B.52.3 (XLPE, B1 and C),
//! B.52.10 (PVC, E and F) and B.52.12 (XLPE, E and F); read in two or more reproductions each. The
//! IEC has no method F below 25 mm²: those six rows are of ABNT NBR 5410 Tables 38 and 39, read in one.
//! Aluminium: Tables B.52.2, B.52.3, B.52.11 and B.52.13, from memory.
//!
//! NEC Table 310.16, 60, 75 and 90 °C columns, copper read in two reproductions, aluminium from
//! memory; 240.4(D) for the small sizes.

use crate::sizing::survey::{Conductor, Insulation, Method};
use crate::units::Amps;

/// Capacity by size, in the order of [`METRIC`](super::conductors::METRIC); zero where the table has no row.
type Column = [f64; 15];

/// The thinnest size of method F that the IEC itself lists, in mm².
pub const IEC_METHOD_F_FROM_MM2: f64 = 25.0;

const COPPER_PVC_B1: Column =
    [17.5, 24.0, 32.0, 41.0, 57.0, 76.0, 101.0, 125.0, 151.0, 192.0, 232.0, 269.0, 300.0, 341.0, 400.0];
const COPPER_PVC_C: Column =
    [19.5, 27.0, 36.0, 46.0, 63.0, 85.0, 112.0, 138.0, 168.0, 213.0, 258.0, 299.0, 344.0, 392.0, 461.0];
const COPPER_PVC_E: Column =
    [22.0, 30.0, 40.0, 51.0, 70.0, 94.0, 119.0, 148.0, 180.0, 232.0, 282.0, 328.0, 379.0, 434.0, 514.0];
const COPPER_PVC_F: Column =
    [22.0, 31.0, 41.0, 53.0, 73.0, 99.0, 131.0, 162.0, 196.0, 251.0, 304.0, 352.0, 406.0, 463.0, 546.0];
const COPPER_XLPE_B1: Column =
    [23.0, 31.0, 42.0, 54.0, 75.0, 100.0, 133.0, 164.0, 198.0, 253.0, 306.0, 354.0, 393.0, 449.0, 528.0];
const COPPER_XLPE_C: Column =
    [24.0, 33.0, 45.0, 58.0, 80.0, 107.0, 138.0, 171.0, 209.0, 269.0, 328.0, 382.0, 441.0, 506.0, 599.0];
const COPPER_XLPE_E: Column =
    [26.0, 36.0, 49.0, 63.0, 86.0, 115.0, 149.0, 185.0, 225.0, 289.0, 352.0, 410.0, 473.0, 542.0, 641.0];
const COPPER_XLPE_F: Column =
    [27.0, 37.0, 50.0, 65.0, 90.0, 121.0, 161.0, 200.0, 242.0, 310.0, 377.0, 437.0, 504.0, 575.0, 679.0];
const ALUMINIUM_PVC_B1: Column =
    [0.0, 0.0, 0.0, 0.0, 44.0, 60.0, 79.0, 97.0, 118.0, 150.0, 181.0, 210.0, 234.0, 266.0, 312.0];
const ALUMINIUM_PVC_C: Column =
    [0.0, 0.0, 0.0, 0.0, 49.0, 66.0, 83.0, 103.0, 125.0, 160.0, 195.0, 226.0, 261.0, 298.0, 352.0];
const ALUMINIUM_PVC_E: Column =
    [0.0, 0.0, 0.0, 0.0, 54.0, 73.0, 89.0, 111.0, 135.0, 173.0, 210.0, 244.0, 282.0, 322.0, 380.0];
const ALUMINIUM_PVC_F: Column =
    [0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 98.0, 122.0, 149.0, 192.0, 235.0, 273.0, 316.0, 363.0, 430.0];
const ALUMINIUM_XLPE_B1: Column =
    [0.0, 0.0, 0.0, 0.0, 59.0, 79.0, 105.0, 130.0, 157.0, 200.0, 242.0, 281.0, 307.0, 351.0, 412.0];
const ALUMINIUM_XLPE_C: Column =
    [0.0, 0.0, 0.0, 0.0, 62.0, 84.0, 101.0, 126.0, 154.0, 198.0, 241.0, 280.0, 324.0, 371.0, 439.0];
const ALUMINIUM_XLPE_E: Column =
    [0.0, 0.0, 0.0, 0.0, 67.0, 91.0, 108.0, 135.0, 164.0, 211.0, 257.0, 300.0, 346.0, 397.0, 470.0];
const ALUMINIUM_XLPE_F: Column =
    [0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 121.0, 150.0, 184.0, 237.0, 289.0, 337.0, 389.0, 447.0, 530.0];

/// Capacity by size under the IEC, in A, in the order of [`METRIC`](super::conductors::METRIC); zero where
/// the table has no row.
pub fn iec(conductor: Conductor, insulation: Insulation, method: Method) -> &'static [f64; 15] {
    use Insulation::{Pvc70, Xlpe90};
    use Method::{B1, C, E, F};
    match (conductor, insulation, method) {
        (Conductor::Copper, Pvc70, B1) => &COPPER_PVC_B1,
        (Conductor::Copper, Pvc70, C) => &COPPER_PVC_C,
        (Conductor::Copper, Pvc70, E) => &COPPER_PVC_E,
        (Conductor::Copper, Pvc70, F) => &COPPER_PVC_F,
        (Conductor::Copper, Xlpe90, B1) => &COPPER_XLPE_B1,
        (Conductor::Copper, Xlpe90, C) => &COPPER_XLPE_C,
        (Conductor::Copper, Xlpe90, E) => &COPPER_XLPE_E,
        (Conductor::Copper, Xlpe90, F) => &COPPER_XLPE_F,
        (Conductor::Aluminium, Pvc70, B1) => &ALUMINIUM_PVC_B1,
        (Conductor::Aluminium, Pvc70, C) => &ALUMINIUM_PVC_C,
        (Conductor::Aluminium, Pvc70, E) => &ALUMINIUM_PVC_E,
        (Conductor::Aluminium, Pvc70, F) => &ALUMINIUM_PVC_F,
        (Conductor::Aluminium, Xlpe90, B1) => &ALUMINIUM_XLPE_B1,
        (Conductor::Aluminium, Xlpe90, C) => &ALUMINIUM_XLPE_C,
        (Conductor::Aluminium, Xlpe90, E) => &ALUMINIUM_XLPE_E,
        (Conductor::Aluminium, Xlpe90, F) => &ALUMINIUM_XLPE_F,
    }
}

/// Capacity of an American size by the temperature of its terminals or insulation.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Nec {
    /// 60 °C column.
    pub at_60: Amps,
    /// 75 °C column: what terminals of this trade bear.
    pub at_75: Amps,
    /// 90 °C column: where the correction for heat starts from.
    pub at_90: Amps,
}

const fn nec(at_60: f64, at_75: f64, at_90: f64) -> Nec {
    Nec { at_60: Amps(at_60), at_75: Amps(at_75), at_90: Amps(at_90) }
}

/// Copper, in the order of [`AWG`](super::conductors::AWG).
pub const NEC_COPPER: [Nec; 18] = [
    nec(15.0, 20.0, 25.0),
    nec(20.0, 25.0, 30.0),
    nec(30.0, 35.0, 40.0),
    nec(40.0, 50.0, 55.0),
    nec(55.0, 65.0, 75.0),
    nec(70.0, 85.0, 95.0),
    nec(85.0, 100.0, 115.0),
    nec(95.0, 115.0, 130.0),
    nec(110.0, 130.0, 145.0),
    nec(125.0, 150.0, 170.0),
    nec(145.0, 175.0, 195.0),
    nec(165.0, 200.0, 225.0),
    nec(195.0, 230.0, 260.0),
    nec(215.0, 255.0, 290.0),
    nec(240.0, 285.0, 320.0),
    nec(260.0, 310.0, 350.0),
    nec(280.0, 335.0, 380.0),
    nec(320.0, 380.0, 430.0),
];

/// Aluminium, in the order of [`AWG`](super::conductors::AWG); zero where it is not sold.
pub const NEC_ALUMINIUM: [Nec; 18] = [
    nec(0.0, 0.0, 0.0),
    nec(0.0, 0.0, 0.0),
    nec(0.0, 0.0, 0.0),
    nec(35.0, 40.0, 45.0),
    nec(40.0, 50.0, 55.0),
    nec(55.0, 65.0, 75.0),
    nec(65.0, 75.0, 85.0),
    nec(75.0, 90.0, 100.0),
    nec(85.0, 100.0, 115.0),
    nec(100.0, 120.0, 135.0),
    nec(115.0, 135.0, 150.0),
    nec(130.0, 155.0, 175.0),
    nec(150.0, 180.0, 205.0),
    nec(170.0, 205.0, 230.0),
    nec(195.0, 230.0, 260.0),
    nec(210.0, 250.0, 280.0),
    nec(225.0, 270.0, 305.0),
    nec(260.0, 310.0, 350.0),
];

/// Highest rating of the device before a small copper conductor: NEC 240.4(D), by AWG number.
pub const NEC_DEVICE_CAPS: [(&str, Amps); 3] = [("14", Amps(15.0)), ("12", Amps(20.0)), ("10", Amps(30.0))];

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::tables::conductors::{AWG, METRIC};

    const INSULATIONS: [Insulation; 2] = [Insulation::Pvc70, Insulation::Xlpe90];
    /// In the order of growing capacity.
    const METHODS: [Method; 4] = [Method::B1, Method::C, Method::E, Method::F];

    #[test]
    fn rows_are_those_of_the_published_tables() {
        use Insulation::{Pvc70, Xlpe90};
        let cases = [
            // IEC 60364-5-52:2009, two loaded copper conductors; each read in two or more reproductions
            (Pvc70, Method::B1, 2.5, 24.0),
            (Pvc70, Method::C, 16.0, 85.0),
            (Pvc70, Method::E, 95.0, 282.0),
            (Pvc70, Method::F, 25.0, 131.0),
            (Xlpe90, Method::B1, 150.0, 393.0),
            (Xlpe90, Method::C, 4.0, 45.0),
            (Xlpe90, Method::E, 240.0, 641.0),
            (Xlpe90, Method::F, 70.0, 310.0),
        ];
        for (insulation, method, area, expected) in cases {
            let index = METRIC.iter().position(|row| row.area.0 == area).expect("a size of the table");
            assert_eq!(iec(Conductor::Copper, insulation, method)[index], expected, "{insulation:?} {method:?} {area}");
        }
    }

    #[test]
    fn american_rows_are_those_of_table_310_16() {
        let cases = [
            ("14", 15.0, 20.0, 25.0),
            ("6", 55.0, 65.0, 75.0),
            ("2/0", 145.0, 175.0, 195.0),
            ("500 kcmil", 320.0, 380.0, 430.0),
        ];
        for (name, at_60, at_75, at_90) in cases {
            let index = AWG.iter().position(|row| row.name == name).expect("a size of the table");
            assert_eq!(NEC_COPPER[index], nec(at_60, at_75, at_90), "{name}");
        }
    }

    #[test]
    fn capacity_grows_with_the_size_and_more_slowly_than_it() {
        for conductor in [Conductor::Copper, Conductor::Aluminium] {
            for (insulation, method) in INSULATIONS.iter().flat_map(|i| METHODS.map(|m| (*i, m))) {
                let column = iec(conductor, insulation, method);
                let made: Vec<_> = METRIC.iter().zip(column).filter(|row| *row.1 > 0.0).collect();
                for pair in made.windows(2) {
                    let slope = (pair[1].1 / pair[0].1).ln() / (pair[1].0.area / pair[0].0.area).ln();
                    assert!((0.38..0.80).contains(&slope), "{conductor:?} {insulation:?} {method:?} {pair:?}: {slope}");
                }
            }
        }
    }

    #[test]
    fn freer_air_and_better_insulation_carry_more_and_aluminium_less() {
        for insulation in INSULATIONS {
            for (index, row) in METRIC.iter().enumerate() {
                let by_method = METHODS.map(|method| iec(Conductor::Copper, insulation, method)[index]);
                assert!(by_method.is_sorted(), "{insulation:?} {:?}: {by_method:?}", row.area);
            }
        }
        for (method, index) in METHODS.iter().flat_map(|m| (0..METRIC.len()).map(|i| (*m, i))) {
            let of = |conductor, insulation| iec(conductor, insulation, method)[index];
            assert!(of(Conductor::Copper, Insulation::Xlpe90) > of(Conductor::Copper, Insulation::Pvc70));
            for insulation in INSULATIONS.into_iter().filter(|i| of(Conductor::Aluminium, *i) > 0.0) {
                let share = of(Conductor::Aluminium, insulation) / of(Conductor::Copper, insulation);
                assert!((0.70..0.80).contains(&share), "{insulation:?} {method:?} {:?}: {share}", METRIC[index].area);
            }
        }
    }

    #[test]
    fn american_columns_grow_with_size_and_temperature() {
        for table in [&NEC_COPPER, &NEC_ALUMINIUM] {
            assert!(table.windows(2).all(|pair| pair[0].at_75 < pair[1].at_75 || pair[1].at_75 == Amps::ZERO));
            let made = table.iter().filter(|row| row.at_75 > Amps::ZERO);
            assert!(made.into_iter().all(|row| row.at_60 < row.at_75 && row.at_75 < row.at_90));
        }
        for (row, capacity) in AWG.iter().zip(&NEC_ALUMINIUM) {
            assert_eq!(row.aluminium.is_some(), capacity.at_75 > Amps::ZERO, "{}", row.name);
        }
    }

    #[test]
    fn every_cap_names_a_size_of_the_table() {
        assert!(NEC_DEVICE_CAPS.iter().all(|cap| AWG.iter().any(|row| row.name == cap.0)));
    }
}
