//! Formulas and sources of a run's figures, as the sheet prints them.

use super::laying::{Laying, Size};
use crate::sizing::protection::Kind;
use crate::sizing::sheet::{Checked, Rule};
use crate::sizing::survey::{Code, Conductor, Method};
use crate::sizing::tables::ampacity::IEC_METHOD_F_FROM_MM2;

pub const LENGTH: Rule = Rule {
    symbol: "L",
    name: "Length, one way",
    formula: "as measured on site",
    unit: "m",
    source: "the survey",
    checked: Checked::Derived,
};

pub const LEAST_FOR_FAULT: Rule = Rule {
    symbol: "S_fault",
    name: "Thinnest conductor that bears a fault until it is cleared",
    formula: "S_fault = √(I²t) / k, I²t what the device lets through: I_k²·t at most, half a cycle or its energy class for a breaker",
    unit: "mm²",
    source: "IEC 60364-4-43, equation read; k by IEC 60364-5-54 Annex A and energy class 3 of EN 60898-1 from memory",
    checked: Checked::FromMemory,
};

pub const SIZE: Rule = Rule {
    symbol: "S",
    name: "Cross-section of a conductor",
    formula: "thinnest of the table that the device protects, S ≥ S_fault, drop within u_target, at a start within u_start",
    unit: "mm²",
    source: "sizes of IEC 60228",
    checked: Checked::Read,
};

pub const PARALLEL: Rule = Rule {
    symbol: "n",
    name: "Conductors in parallel per pole",
    formula: "more than one where the thickest does not do, or one would carry more than I_most",
    unit: "",
    source: "our choice",
    checked: Checked::OurRule,
};

pub const PROTECTIVE: Rule = Rule {
    symbol: "S_PE",
    name: "Cross-section of the protective conductor",
    formula: "S up to 16 mm², 16 mm² up to 35 mm², then S/2 and up to the next size",
    unit: "mm²",
    source: "IEC 60364-5-54 Table 54.2",
    checked: Checked::Read,
};

const IEC_AMBIENT: Rule = Rule {
    symbol: "C_a",
    name: "Factor for the air around the cable",
    formula: "the table's row; in between, its square runs straight",
    unit: "",
    source: "IEC 60364-5-52 Table B.52.14",
    checked: Checked::Read,
};

const NEC_AMBIENT: Rule = Rule { formula: "the table's range", source: "NEC Table 310.15(B)(1)", ..IEC_AMBIENT };

const IEC_GROUPING: Rule = Rule {
    symbol: "C_g",
    name: "Factor for circuits that lie together",
    formula: "the table's row by circuits; each set in parallel counts as one",
    unit: "",
    source: "IEC 60364-5-52 Table B.52.17",
    checked: Checked::Read,
};

const NEC_GROUPING: Rule = Rule {
    formula: "the table's range by conductors that carry current, two for each circuit",
    source: "NEC Table 310.15(C)(1)",
    ..IEC_GROUPING
};

const IEC_CAPACITY: Rule = Rule {
    symbol: "I_z",
    name: "Current-carrying capacity",
    formula: "I_z = I_t · C_a · C_g · n",
    unit: "A",
    source: "IEC 60364-5-52 Tables B.52.2, B.52.3, B.52.10 and B.52.12",
    checked: Checked::Read,
};

const THIN_SINGLE_CORES: Rule =
    Rule { source: "ABNT NBR 5410 Tables 38 and 39; the IEC has no method F below 25 mm²", ..IEC_CAPACITY };

const IEC_ALUMINIUM: Rule = Rule {
    source: "IEC 60364-5-52 Tables B.52.2, B.52.3, B.52.11 and B.52.13",
    checked: Checked::FromMemory,
    ..IEC_CAPACITY
};

const NEC_CAPACITY: Rule = Rule {
    formula: "I_z = min(I_t · C_a · C_g, I_term) · n, terminals at 75 °C",
    source: "NEC Table 310.16; 110.14(C) from memory",
    ..IEC_CAPACITY
};

const NEC_ALUMINIUM: Rule = Rule { checked: Checked::FromMemory, ..NEC_CAPACITY };

pub const LOOP: Rule = Rule {
    symbol: "R",
    name: "Resistance of both conductors, warm",
    formula: "R = 2 · L · r / n / 1000, r at the temperature that insulation and terminals bear",
    unit: "Ω",
    source: "highest resistance of IEC 60228, or NEC Chapter 9 Table 8",
    checked: Checked::Read,
};

pub const DC_DROP: Rule = Rule {
    symbol: "ΔU",
    name: "Voltage drop over both conductors",
    formula: "ΔU = I_b · R",
    unit: "V",
    source: "Ohm's law",
    checked: Checked::Derived,
};

pub const AC_DROP: Rule = Rule {
    formula: "ΔU = I_b · (R · cos φ + X · sin φ)",
    source: "IEC 60364-5-52 Annex G",
    checked: Checked::Read,
    ..DC_DROP
};

pub const DROP_SHARE: Rule = Rule {
    symbol: "u",
    name: "Voltage drop over the nominal volts",
    formula: "u = ΔU / U",
    unit: "",
    source: "definition",
    checked: Checked::Derived,
};

pub const START_DROP: Rule = Rule {
    symbol: "u_I,start",
    name: "Drop while the hardest motor starts, over the nominal volts",
    formula: "u_I,start = I_start · R / U, no more than u_start",
    unit: "",
    source: "Ohm's law; the limit is ours",
    checked: Checked::OurRule,
};

pub const BREAKING: Rule = Rule {
    symbol: "I_cn",
    name: "Breaking capacity to be asked for",
    formula: "the family's smallest that is I_k or more",
    unit: "kA",
    source: "IEC 60898-1, IEC 60269-2, trade data of battery fuses",
    checked: Checked::FromMemory,
};

const BATTERY_FUSE: Rule = Rule {
    symbol: "I_n",
    name: "Rating of the fuse",
    formula: "smallest rating with I = 1.25 · I_b ≤ I_n ≤ I_z",
    unit: "A",
    source: "these fuses have no conventional fusing current in a standard",
    checked: Checked::OurRule,
};

const MINIATURE_BREAKER: Rule = Rule {
    symbol: "I_n",
    name: "Rating of the breaker",
    formula: "smallest rating with I = I_b ≤ I_n ≤ I_z",
    unit: "A",
    source: "IEC 60364-4-43; I_2 = 1.45 · I_n by IEC 60898-1",
    checked: Checked::Read,
};

const GG_FUSE: Rule = Rule {
    name: "Rating of the fuse",
    formula: "smallest rating with I = I_b ≤ I_n ≤ 0.9 · I_z (0.75 below 16 A, 0.69 up to 4 A)",
    source: "IEC 60364-4-43 with the conventional currents of IEC 60269-1",
    ..MINIATURE_BREAKER
};

const NEC_DEVICE: Rule = Rule {
    formula: "smallest rating with I = 1.25 · I_b ≤ I_n, and I_n ≤ I_z or the next size above it",
    source: "NEC 240.4(B), 240.6(A); 210.20 and 215.3 from memory",
    checked: Checked::FromMemory,
    ..MINIATURE_BREAKER
};

/// Factor for the air.
pub fn ambient(code: Code) -> &'static Rule {
    match code {
        Code::Iec => &IEC_AMBIENT,
        Code::Nec => &NEC_AMBIENT,
    }
}

/// Factor for circuits that lie together.
pub fn grouping(code: Code) -> &'static Rule {
    match code {
        Code::Iec => &IEC_GROUPING,
        Code::Nec => &NEC_GROUPING,
    }
}

/// Capacity, by the table it is taken from.
pub fn capacity(laying: &Laying, size: &Size) -> &'static Rule {
    match (laying.code, laying.conductor) {
        (Code::Nec, Conductor::Copper) => &NEC_CAPACITY,
        (Code::Nec, Conductor::Aluminium) => &NEC_ALUMINIUM,
        (Code::Iec, Conductor::Aluminium) => &IEC_ALUMINIUM,
        (Code::Iec, Conductor::Copper) if is_thin_single_core(laying, size) => &THIN_SINGLE_CORES,
        (Code::Iec, Conductor::Copper) => &IEC_CAPACITY,
    }
}

fn is_thin_single_core(laying: &Laying, size: &Size) -> bool {
    laying.method == Method::F && size.area.0 < IEC_METHOD_F_FROM_MM2
}

/// Rating of the device.
pub fn device(kind: Kind) -> &'static Rule {
    match kind {
        Kind::BatteryFuse => &BATTERY_FUSE,
        Kind::MiniatureBreaker => &MINIATURE_BREAKER,
        Kind::GgFuse => &GG_FUSE,
        Kind::NecDevice => &NEC_DEVICE,
    }
}
