//! Motor starts: what each asks for, and whether it starts on this unit, bank and cable.

use super::assumptions::Assumptions;
use super::design::{Bank, Cable, Demand, Inverter, MotorStart, Run, StartNeed, StartVerdict};
use super::finding::Finding;
use super::load_survey::Power;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::{Load, MotorPlate, Site, StartKind, Survey};
use super::tables::motors::{CODE_LETTERS, LOCKED_OVER_FULL_LOAD, SINGLE_PHASE};
use crate::units::{DcVolts, Fraction, Ohms, VoltAmps, Watts};

/// What one piece of a load draws while it starts; `None` where that is no more than running.
///
/// Heaters and lamps that are warm within a few half cycles load the unit by their running power;
/// the charging pulse of capacitors is shorter than half a cycle and counts for no one's seconds.
pub fn start_power(load: &Load, site: &Site, assumptions: &Assumptions) -> Option<Power> {
    let apparent = start_apparent(load, site);
    match load.start {
        StartKind::Resistive | StartKind::HeaterPtc => None,
        _ if apparent <= load.running.apparent(load.power_factor) => None,
        kind if kind.is_motor() => {
            let power_factor = Fraction::new(assumptions.start_power_factor).unwrap_or(Fraction::ONE);
            Some(Power::split(apparent.real(power_factor), power_factor, kind))
        }
        _ => Some(Power::of_one(load) * load.surge_multiple),
    }
}

/// Apparent power of one start: from the plate where it says something, else the multiple of running VA.
fn start_apparent(load: &Load, site: &Site) -> VoltAmps {
    match load.motor_plate {
        Some(MotorPlate::LockedRotor(current)) => site.supply * current,
        Some(MotorPlate::CodeLetter { horsepower, letter }) => code_letter(horsepower, letter),
        Some(MotorPlate::Horsepower(horsepower)) => table_start(horsepower),
        None => load.running.apparent(load.power_factor) * load.surge_multiple,
    }
}

/// Locked-rotor VA from a plate's code letter: `hp × kVA/hp × 1000`, the top of the letter's band.
///
/// Letter V has no top; its lowest value is taken and a finding says so.
///
/// Source: NEC 430.7(B).
pub fn code_letter(horsepower: f64, letter: char) -> VoltAmps {
    let row = CODE_LETTERS.iter().find(|row| row.0 == letter.to_ascii_uppercase());
    let &(_, lowest, highest) = row.unwrap_or(&CODE_LETTERS[CODE_LETTERS.len() - 1]);
    VoltAmps(horsepower * highest.unwrap_or(lowest) * 1000.0)
}

/// Locked-rotor VA of a single-phase motor from the code's table: 230 V times the current of the
/// next size up; above the table in proportion to the power.
///
/// Source: NEC 430.248 and 430.251(A); below 1/2 hp six times full load, the ratio of the whole table.
pub fn table_start(horsepower: f64) -> VoltAmps {
    let last = SINGLE_PHASE[SINGLE_PHASE.len() - 1];
    let (size, full_load, locked) = *SINGLE_PHASE.iter().find(|row| horsepower <= row.0 + 1e-9).unwrap_or(&last);
    let current = locked.map_or(full_load[1] * LOCKED_OVER_FULL_LOAD, |locked| locked[1]);
    VoltAmps(230.0 * current * (horsepower / size).max(1.0))
}

const NEEDED: Rule = Rule {
    symbol: "S_start",
    name: "Start of this motor, the rest running",
    formula: "S_start = |Σ running − running_i + starting_i|",
    unit: "VA",
    source: "NEC 430.7(B), 430.251(A) where the plate says so; else the multiple of the running VA",
    checked: Checked::Read,
};

const AVAILABLE: Rule = Rule {
    symbol: "S_surge",
    name: "Surge that the unit gives",
    formula: "S_surge = rating × surge multiple",
    unit: "VA",
    source: "rating of the unit",
    checked: Checked::Derived,
};

const LOWEST: Rule = Rule {
    symbol: "V_dip",
    name: "Volts at the unit during this start, bank aged and at the end of the cut",
    formula: "V_dip = V_oc − I · R with R·I² − V_oc·I + P_dc = 0, the smaller root",
    unit: "V",
    source: "Ohm's law for a constant-power load behind the resistance of bank and cable",
    checked: Checked::Derived,
};

/// Whether each motor starts: on the unit's surge and its seconds, and on the sag of bank and cable.
pub fn starts(
    survey: &Survey,
    demand: &Demand,
    inverter: &Inverter,
    bank: &Bank,
    cables: &[Cable],
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> Vec<MotorStart> {
    warn_of_restart(demand, inverter, sheet);
    let cable = cables.iter().find(|cable| cable.run == Run::BankToInverter);
    let resistance = bank.aged_resistance + cable.map_or(Ohms::ZERO, |cable| cable.loop_resistance);
    let start = |need: &StartNeed| {
        let load = &survey.loads[need.row];
        let lowest = lowest_volts(bank, inverter.losses.drawn(need.needed_w), resistance);
        let verdict = verdict(load, need, inverter, assumptions, sheet);
        write_down(&load.name, need, inverter, lowest, bank, resistance, sheet);
        let verdict = if lowest < bank.cut_off { sags(&load.name, lowest, bank, sheet) } else { verdict };
        MotorStart { load: load.name.clone(), needed: need.needed, available: inverter.surge, lowest, verdict }
    };
    demand.starts.iter().map(start).collect()
}

/// All at once is more than the unit gives, one after the other is not.
fn warn_of_restart(demand: &Demand, inverter: &Inverter, sheet: &mut Sheet) {
    let (together, staggered, available) = (demand.surge_together, demand.surge_staggered, inverter.surge);
    if together > available && staggered <= available {
        sheet.find(Finding::RestartTogetherTooMuch { together, staggered, available });
    }
}

/// Volts left at the unit while a power is drawn; where no current can deliver it, the volts at the
/// greatest power that bank and cable can give.
fn lowest_volts(bank: &Bank, power: Watts, resistance: Ohms) -> DcVolts {
    let open = bank.end_open_circuit.0;
    let root = (open * open - 4.0 * resistance.0 * power.0).max(0.0).sqrt();
    DcVolts((open + root) / 2.0)
}

fn verdict(
    load: &Load,
    need: &StartNeed,
    inverter: &Inverter,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> StartVerdict {
    let (name, needed, available) = (load.name.clone(), need.needed, inverter.surge);
    let left = available - (needed - need.start);
    if needed > inverter.rating && load.surge_lasts > inverter.surge_held {
        sheet.find(Finding::SurgeTooShort { load: name, lasts: load.surge_lasts, held: inverter.surge_held });
        StartVerdict::WillNotStart
    } else if needed <= available {
        StartVerdict::Starts
    } else if left / need.start >= assumptions.start_marginal_share {
        sheet.find(Finding::MotorStartMarginal { load: name, needed, available });
        StartVerdict::Marginal
    } else {
        sheet.find(Finding::MotorWillNotStart { load: name, needed, available });
        StartVerdict::WillNotStart
    }
}

fn sags(name: &str, lowest: DcVolts, bank: &Bank, sheet: &mut Sheet) -> StartVerdict {
    sheet.find(Finding::BankSagsAtStart { load: name.to_owned(), lowest, cut_off: bank.cut_off });
    StartVerdict::WillNotStart
}

fn write_down(
    name: &str,
    need: &StartNeed,
    inverter: &Inverter,
    lowest: DcVolts,
    bank: &Bank,
    resistance: Ohms,
    sheet: &mut Sheet,
) {
    let starting = [("starting_i", need.start.0, "VA")];
    sheet.line(format!("starts.{name}.needed_va"), &NEEDED, &starting, need.needed.0);
    sheet.line(
        format!("starts.{name}.available_va"),
        &AVAILABLE,
        &[("rating", inverter.rating.0, "VA")],
        inverter.surge.0,
    );
    let drawn = inverter.losses.drawn(need.needed_w);
    let sag = [("V_oc", bank.end_open_circuit.0, "V"), ("R", resistance.0, "Ω"), ("P_dc", drawn.0, "W")];
    sheet.line(format!("starts.{name}.lowest_v"), &LOWEST, &sag, lowest.0);
}
