//! The figures of the bank that is offered: each computed and written down in one place.

use super::duty_cycle::Cut;
use super::needs::Needs;
use super::peukert::Curve;
use super::strings::{self, Strings};
use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::Inverter;
use crate::sizing::sheet::{Checked, Rule, Sheet};
use crate::sizing::survey::{BusVolts, Chemistry};
use crate::sizing::tables::battery_temperature;
use crate::sizing::tables::chemistries::{Properties, properties};
use crate::units::{AmpHours, Amps, Celsius, DcVolts, Kilograms};

/// A rule of this file: all of them share the arithmetic and differ in what they say.
const fn rule(
    symbol: &'static str,
    name: &'static str,
    formula: &'static str,
    unit: &'static str,
    source: &'static str,
    checked: Checked,
) -> Rule {
    Rule { symbol, name, formula, unit, source, checked }
}

const COLD_LEAD_ACID: Rule = rule(
    "f_temperature",
    "Factor for the coldest day",
    "f_temperature = table(T), never below 1",
    "",
    "IEEE 485, temperature correction on a base of 25 °C; read from 4.4 °C up in a published chart",
    Checked::Read,
);

const COLD_LITHIUM: Rule = rule(
    "f_temperature",
    "Factor for the coldest day",
    "f_temperature = 1 / share of the capacity at T, never below 1",
    "",
    "vendor's article on samples of three cells; uncertain, below 0 °C from memory",
    Checked::FromMemory,
);

/// Factor on the size for the coldest day.
pub fn temperature_factor(chemistry: Chemistry, coldest: Celsius, sheet: &mut Sheet) -> f64 {
    let rule = if chemistry.is_lead_acid() { &COLD_LEAD_ACID } else { &COLD_LITHIUM };
    let factor = battery_temperature::size_factor(chemistry, coldest);
    sheet.line("bank.temperature_factor", rule, &[("T", coldest.0, "°C")], factor)
}

const CUT_OFF: Rule = rule(
    "V_cut-off",
    "Low-voltage cut-off of the string",
    "V_cut-off = n · v_cut-off",
    "V",
    "cells in series times the volts per cell in force",
    Checked::Derived,
);

/// Cut-off of a whole string.
pub fn cut_off(bus: BusVolts, chemistry: Chemistry, assumptions: &Assumptions, sheet: &mut Sheet) -> DcVolts {
    let cells = f64::from(properties(chemistry).cells_per_block * bus.blocks_in_series());
    let values = [("n", cells, ""), ("v_cut-off", assumptions.cut_off_v_per_cell, "V")];
    DcVolts(sheet.line("bank.cut_off_v", &CUT_OFF, &values, strings::cut_off(bus, chemistry, assumptions).0))
}

const PEAK_CURRENT: Rule = rule(
    "I_peak",
    "Battery current at cut-off and peak running load",
    "I_peak = P_dc / V_cut-off",
    "A",
    "the end volts are the safe choice for a load of constant power",
    Checked::Derived,
);

/// Current at cut-off and peak running load.
pub fn peak_current(inverter: &Inverter, cut_off: DcVolts, sheet: &mut Sheet) -> Amps {
    let values = [("P_dc", inverter.peak_dc.0, "W"), ("V_cut-off", cut_off.0, "V")];
    Amps(sheet.line("bank.peak_current_a", &PEAK_CURRENT, &values, (inverter.peak_dc / cut_off).0))
}

const BUS: Rule = rule(
    "V_bus",
    "Nominal volts of the bank",
    "lowest of 12, 24, 48 V with I_peak ≤ I_target and few enough strings, or as asked for",
    "V",
    "one practical cable, fuse and lug carry about 100 A",
    Checked::CommonPractice,
);

/// Nominal volts, with the current that chose them.
pub fn bus(bus: BusVolts, peak: Amps, assumptions: &Assumptions, sheet: &mut Sheet) {
    let values = [("I_peak", peak.0, "A"), ("I_target", assumptions.bus_current_target_a, "A")];
    sheet.line("bank.bus_v", &BUS, &values, bus.volts().0);
}

const OUTAGE: Rule = rule(
    "Q",
    "Charge that the sized cut takes",
    "Q = Σ I_j · h_j, I_j = (P_0 + (1 + k_1)·P_j + k_2·P_j²/P_rated) / V_cut-off",
    "Ah",
    "loss model with three terms (Schmidt and Sauer 1996), at the end volts",
    Checked::FromMemory,
);

/// Charge that the hardest cut takes at its own currents.
pub fn outage(hardest: &Cut, sheet: &mut Sheet) -> AmpHours {
    let values =
        [("I_mean", hardest.mean().0, "A"), ("I_highest", hardest.highest().0, "A"), ("h", hardest.length().0, "h")];
    AmpHours(sheet.line("bank.outage_ah", &OUTAGE, &values, hardest.charge().0))
}

const EXPONENT: Rule = rule(
    "k",
    "Peukert's exponent at the mean current of the cut",
    "k = ln(t_1/t_2) / ln(I_2/I_1) between neighbouring ratings, or the typical one",
    "",
    "Peukert 1897, on the ratings of the data sheet",
    Checked::FromMemory,
);

/// The exponent that holds at the mean current of the hardest cut.
pub fn exponent(curve: &Curve, needs: &Needs, sheet: &mut Sheet) -> f64 {
    let mean = needs.hardest.mean();
    let values = [("I_mean", mean.0, "A"), ("C_flat", needs.emptied.0, "Ah")];
    let at = if needs.emptied.0 > 0.0 { needs.emptied } else { AmpHours(1.0) };
    sheet.line("bank.peukert_exponent", &EXPONENT, &values, curve.exponent_at(at, mean))
}

const DEPTH_LIMIT: Rule = rule(
    "DoD_max",
    "Share of the bank that the cut may take",
    "as assumed for the kind of battery",
    "",
    "makers' user manuals",
    Checked::Read,
);

/// Share of the bank that the cut may take.
pub fn depth_limit(assumptions: &Assumptions, sheet: &mut Sheet) -> f64 {
    sheet.line("bank.depth_of_discharge_max", &DEPTH_LIMIT, &[], assumptions.depth_of_discharge_max)
}

const DEPTH: Rule = rule(
    "DoD",
    "Share of the bank offered that the sized cut takes, new and at 25 °C",
    "DoD = Σ h_j / t(I_j, C_installed)",
    "",
    "Peukert's step sum; below the slowest rate plain ampere-hours",
    Checked::FromMemory,
);

/// Share of the bank offered that the hardest cut takes, new and at 25 °C.
pub fn depth(curve: &Curve, hardest: &Cut, installed: AmpHours, sheet: &mut Sheet) -> f64 {
    let values =
        [("C_installed", installed.0, "Ah"), ("I_mean", hardest.mean().0, "A"), ("h", hardest.length().0, "h")];
    sheet.line("bank.depth_of_discharge", &DEPTH, &values, curve.taken(hardest, installed))
}

const RATED: Rule = rule(
    "H",
    "Rate at which all capacities are given",
    "20 h, or the rating of the data sheet nearest to it",
    "h",
    "capacity at 20 h is what the trade prints on a block",
    Checked::CommonPractice,
);
const BLOCK: Rule = rule(
    "C_block",
    "Capacity of one block",
    "from the data sheet, or the smallest trade block with which the fewest strings carry C_required",
    "Ah",
    "12 V blocks that the trade stocks",
    Checked::CommonPractice,
);
const SERIES: Rule =
    rule("n_series", "Blocks of 12 V in a string", "n_series = V_bus / 12 V", "", "arithmetic", Checked::Derived);
const PARALLEL: Rule = rule(
    "n_strings",
    "Strings in parallel",
    "n_strings = C_required / C_block, rounded up",
    "",
    "arithmetic; makers' manuals: one string is best, three at most are good practice",
    Checked::Read,
);
const INSTALLED: Rule = rule(
    "C_installed",
    "Capacity of the bank offered",
    "C_installed = n_strings · C_block ≥ C_required",
    "Ah",
    "arithmetic",
    Checked::Derived,
);

/// Blocks, strings and the capacity they make.
pub fn counts(bus: BusVolts, strings: &Strings, rated: f64, required: AmpHours, sheet: &mut Sheet) -> AmpHours {
    let (block, parallel) = (strings.block.0, f64::from(strings.strings));
    sheet.line("bank.rated_hours", &RATED, &[], rated);
    sheet.line("bank.block_ah", &BLOCK, &[("C_required", required.0, "Ah")], block);
    let series = f64::from(bus.blocks_in_series());
    sheet.line("bank.blocks_in_series", &SERIES, &[("V_bus", bus.volts().0, "V")], series);
    let values = [("C_required", required.0, "Ah"), ("C_block", block, "Ah")];
    sheet.line("bank.strings", &PARALLEL, &values, parallel);
    let values = [("n_strings", parallel, ""), ("C_block", block, "Ah")];
    AmpHours(sheet.line("bank.installed_ah", &INSTALLED, &values, strings.installed().0))
}

const WEIGHT: Rule = rule(
    "m",
    "Mass of all blocks, an estimate",
    "m = n_series · C_20 · m_1",
    "kg",
    "usual mass of a 12 V block per Ah, by kind",
    Checked::FromMemory,
);

/// Mass of all blocks; `capacity` at the 20 h rate.
pub fn weight(kind: &Properties, capacity: AmpHours, bus: BusVolts, sheet: &mut Sheet) -> Kilograms {
    let series = f64::from(bus.blocks_in_series());
    let mass = kind.mass_per_ah * (series * capacity.0);
    let values = [("n_series", series, ""), ("C_20", capacity.0, "Ah"), ("m_1", kind.mass_per_ah.0, "kg/Ah")];
    Kilograms(sheet.line("bank.weight_kg", &WEIGHT, &values, mass.0))
}
