//! Starting currents of motors: NEC code letters and table currents.

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
