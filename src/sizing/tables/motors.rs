//! Starting currents of motors: NEC code letters and table currents.

use crate::sizing::survey::MotorPlate;
use crate::units::{AcVolts, Amps, VoltAmps};

/// Locked-rotor kVA per horsepower by code letter: letter, lowest, highest; `None` where it has no top.
///
/// NEC 430.7(B), table of locked-rotor indicating code letters; read in two independent listings.
#[allow(clippy::approx_constant, reason = "3.14 kVA/hp stands in the table")]
pub const CODE_LETTERS: [(char, f64, Option<f64>); 19] = [
    ('A', 0.0, Some(3.14)),
    ('B', 3.15, Some(3.54)),
    ('C', 3.55, Some(3.99)),
    ('D', 4.0, Some(4.49)),
    ('E', 4.5, Some(4.99)),
    ('F', 5.0, Some(5.59)),
    ('G', 5.6, Some(6.29)),
    ('H', 6.3, Some(7.09)),
    ('J', 7.1, Some(7.99)),
    ('K', 8.0, Some(8.99)),
    ('L', 9.0, Some(9.99)),
    ('M', 10.0, Some(11.19)),
    ('N', 11.2, Some(12.49)),
    ('P', 12.5, Some(13.99)),
    ('R', 14.0, Some(15.99)),
    ('S', 16.0, Some(17.99)),
    ('T', 18.0, Some(19.99)),
    ('U', 20.0, Some(22.39)),
    ('V', 22.4, None),
];

/// Single-phase motors: horsepower, full-load current at 115 V and 230 V, locked-rotor current at both, in A.
///
/// NEC 430.248 (full load) and 430.251(A) (locked rotor); read in copies of both tables. The code has
/// no locked-rotor current below 1/2 hp.
pub const SINGLE_PHASE: [(f64, [f64; 2], Option<[f64; 2]>); 10] = [
    (1.0 / 6.0, [4.4, 2.2], None),
    (0.25, [5.8, 2.9], None),
    (1.0 / 3.0, [7.2, 3.6], None),
    (0.5, [9.8, 4.9], Some([58.8, 29.4])),
    (0.75, [13.8, 6.9], Some([82.8, 41.4])),
    (1.0, [16.0, 8.0], Some([96.0, 48.0])),
    (1.5, [20.0, 10.0], Some([120.0, 60.0])),
    (2.0, [24.0, 12.0], Some([144.0, 72.0])),
    (3.0, [34.0, 17.0], Some([204.0, 102.0])),
    (5.0, [56.0, 28.0], Some([336.0, 168.0])),
];

/// Locked-rotor over full-load current of single-phase motors: the ratio of the whole table, taken
/// below 1/2 hp too.
pub const LOCKED_OVER_FULL_LOAD: f64 = 6.0;

/// Locked-rotor VA from a plate's code letter: `hp × kVA/hp × 1000`, the top of the letter's band.
///
/// Letter V has no top: its lowest value is taken, as for a letter that the code does not have, and
/// [`leaves_start_open`] says so.
///
/// Source: NEC 430.7(B).
pub fn code_letter_start(horsepower: f64, letter: char) -> VoltAmps {
    let (_, lowest, highest) = band(letter).unwrap_or(CODE_LETTERS[CODE_LETTERS.len() - 1]);
    VoltAmps(horsepower * highest.unwrap_or(lowest) * 1000.0)
}

fn band(letter: char) -> Option<(char, f64, Option<f64>)> {
    CODE_LETTERS.into_iter().find(|row| row.0 == letter.to_ascii_uppercase())
}

/// Whether a plate gives no upper end of the start: letter V, or a letter that the code does not have.
pub fn leaves_start_open(plate: MotorPlate) -> bool {
    match plate {
        MotorPlate::CodeLetter { letter, .. } => band(letter).and_then(|row| row.2).is_none(),
        MotorPlate::LockedRotor(_) | MotorPlate::Horsepower(_) => false,
    }
}

/// Locked-rotor VA of a single-phase motor from the code's table: the supply's volts times the current of
/// the next size up; above the table in proportion to the power.
///
/// The 115 V column serves supplies of up to 150 V, the 230 V column those above.
///
/// Source: NEC 430.248 and 430.251(A); below 1/2 hp six times full load, the ratio of the whole table.
pub fn table_start(horsepower: f64, supply: AcVolts) -> VoltAmps {
    let last = SINGLE_PHASE[SINGLE_PHASE.len() - 1];
    let row = SINGLE_PHASE.into_iter().find(|row| horsepower <= row.0 + 1e-9);
    let (size, full_load, locked) = row.unwrap_or(last);
    let column = usize::from(supply > AcVolts(150.0));
    let current = locked.map_or(full_load[column] * LOCKED_OVER_FULL_LOAD, |locked| locked[column]);
    supply * Amps(current) * (horsepower / size).max(1.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_code_letter_gives_the_top_of_its_band() {
        // letter, hp, kVA locked, where from
        let cases = [
            ('A', 0.5, 1.57, "NEC 430.7(B): 0.5 × 3.14"),
            ('G', 1.0, 6.29, "NEC 430.7(B)"),
            ('H', 1.0, 7.09, "NEC 430.7(B); one listing misprints the band of J here"),
            ('J', 1.0, 7.99, "NEC 430.7(B)"),
            ('K', 0.5, 4.495, "by hand: 0.5 × 8.99"),
            ('k', 0.5, 4.495, "small letters are read alike"),
            ('N', 2.0, 24.98, "by hand: 2 × 12.49"),
            ('V', 1.0, 22.4, "the band has no top; its lowest value"),
        ];
        for (letter, horsepower, kva, source) in cases {
            let start = code_letter_start(horsepower, letter).0 / 1000.0;
            assert!((start - kva).abs() < 1e-9, "{letter}: {start} kVA; {source}");
        }
    }

    #[test]
    fn the_bands_of_the_letters_follow_one_another_without_i_o_and_q() {
        for pair in CODE_LETTERS.windows(2) {
            let gap = pair[1].1 - pair[0].2.expect("only the last has no top");
            assert!((gap - 0.01).abs() < 1e-9, "{} to {}", pair[0].0, pair[1].0);
        }
        assert!(['I', 'O', 'Q'].into_iter().all(|letter| band(letter).is_none()));
    }

    #[test]
    fn only_a_letter_without_a_top_leaves_the_start_open() {
        let plate = |letter| MotorPlate::CodeLetter { horsepower: 1.0, letter };
        assert!(['V', 'v', 'O'].into_iter().all(|letter| leaves_start_open(plate(letter))));
        assert!(!leaves_start_open(plate('U')) && !leaves_start_open(MotorPlate::Horsepower(1.0)));
    }

    #[test]
    fn the_table_gives_six_times_full_load_at_either_supply() {
        for (horsepower, full_load, locked) in SINGLE_PHASE {
            assert_eq!(full_load[0], full_load[1] * 2.0, "{horsepower} hp");
            if let Some(locked) = locked {
                assert!((locked[0] / full_load[0] - LOCKED_OVER_FULL_LOAD).abs() < 1e-9, "{horsepower} hp");
                assert_eq!(locked[0], locked[1] * 2.0, "{horsepower} hp");
            }
        }
    }

    #[test]
    fn a_motor_without_a_letter_starts_by_the_table() {
        // hp, supply V, VA, where from
        let cases = [
            (1.0, 230.0, 11_040.0, "NEC 430.251(A): 48 A at 230 V"),
            (1.0, 115.0, 11_040.0, "NEC 430.251(A): 96 A at 115 V"),
            (0.5, 240.0, 7_056.0, "NEC 430.251(A): 29.4 A serves 220 to 240 V"),
            (0.25, 230.0, 4_002.0, "NEC 430.248: 2.9 A, six times"),
            (0.6, 230.0, 9_522.0, "the next size up: 41.4 A of 3/4 hp"),
            (10.0, 230.0, 77_280.0, "twice the 168 A of 5 hp"),
        ];
        for (horsepower, supply, va, source) in cases {
            let start = table_start(horsepower, AcVolts(supply)).0;
            assert!((start - va).abs() < 1e-6, "{horsepower} hp at {supply} V: {start} VA; {source}");
        }
    }
}
