//! Correction of capacity for circuits that lie together.
//!
//! IEC 60364-5-52 Table B.52.17, by number of circuits: items 1 (bunched, on a surface or enclosed),
//! 2 (one layer on a wall or unperforated tray) and 4 (one layer on a perforated tray). Read in three
//! reproductions. NEC Table 310.15(C)(1), by current-carrying conductors in one raceway or cable. Read in two.

use crate::sizing::survey::{Code, Method};

/// Rows of the highest number a factor holds for, and the factor.
type Rows = &'static [(u32, f64)];

/// Conductors that carry current in a circuit of two wires.
const CONDUCTORS_PER_CIRCUIT: u32 = 2;

const BUNCHED: Rows = &[
    (1, 1.0),
    (2, 0.8),
    (3, 0.7),
    (4, 0.65),
    (5, 0.6),
    (6, 0.57),
    (7, 0.54),
    (8, 0.52),
    (9, 0.5),
    (12, 0.45),
    (16, 0.41),
    (20, 0.38),
];

const ON_A_WALL: Rows =
    &[(1, 1.0), (2, 0.85), (3, 0.79), (4, 0.75), (5, 0.73), (6, 0.72), (7, 0.72), (8, 0.71), (9, 0.7), (u32::MAX, 0.7)];

const ON_A_TRAY: Rows = &[
    (1, 1.0),
    (2, 0.88),
    (3, 0.82),
    (4, 0.77),
    (5, 0.75),
    (6, 0.73),
    (7, 0.73),
    (8, 0.72),
    (9, 0.72),
    (u32::MAX, 0.72),
];

const IN_A_RACEWAY: Rows = &[(3, 1.0), (6, 0.8), (9, 0.7), (20, 0.5), (30, 0.45), (40, 0.4), (u32::MAX, 0.35)];

/// Factor for a number of circuits that lie together, this one included.
///
/// A number between two rows takes the row of the larger one. Bunched cables beyond the table's last row
/// keep its factor; [`most_circuits`] says where that is.
pub fn factor(code: Code, method: Method, circuits: u32) -> f64 {
    let (rows, count) = match code {
        Code::Iec => (iec_rows(method), circuits),
        Code::Nec => (IN_A_RACEWAY, circuits.saturating_mul(CONDUCTORS_PER_CIRCUIT)),
    };
    rows[rows.partition_point(|row| row.0 < count).min(rows.len() - 1)].1
}

/// The largest number of circuits that the table knows.
pub fn most_circuits(code: Code, method: Method) -> u32 {
    match code {
        Code::Iec => iec_rows(method).last().map_or(1, |row| row.0),
        Code::Nec => u32::MAX,
    }
}

fn iec_rows(method: Method) -> Rows {
    match method {
        Method::B1 => BUNCHED,
        Method::C => ON_A_WALL,
        Method::E | Method::F => ON_A_TRAY,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn factors_are_those_of_the_tables() {
        let cases = [
            // IEC 60364-5-52 Table B.52.17; NEC Table 310.15(C)(1) by conductors, two to a circuit
            (Code::Iec, Method::B1, 2, 0.80),
            (Code::Iec, Method::B1, 10, 0.45),
            (Code::Iec, Method::B1, 20, 0.38),
            (Code::Iec, Method::C, 3, 0.79),
            (Code::Iec, Method::C, 40, 0.70),
            (Code::Iec, Method::F, 3, 0.82),
            (Code::Nec, Method::B1, 1, 1.00),
            (Code::Nec, Method::B1, 2, 0.80),
            (Code::Nec, Method::F, 4, 0.70),
            (Code::Nec, Method::C, 100, 0.35),
        ];
        for (code, method, circuits, expected) in cases {
            assert_eq!(factor(code, method, circuits), expected, "{code:?} {method:?} {circuits}");
        }
    }

    #[test]
    fn more_circuits_never_carry_more() {
        for code in [Code::Iec, Code::Nec] {
            for method in [Method::B1, Method::C, Method::E, Method::F] {
                assert_eq!(factor(code, method, 1), 1.0);
                let falls = (1..60).all(|n| factor(code, method, n) >= factor(code, method, n + 1));
                assert!(falls, "{code:?} {method:?}");
            }
        }
    }

    #[test]
    fn the_bunch_of_the_iec_ends_at_twenty_circuits() {
        assert_eq!(most_circuits(Code::Iec, Method::B1), 20);
        assert_eq!(most_circuits(Code::Iec, Method::C), u32::MAX);
    }
}
