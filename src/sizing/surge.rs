//! Motor starts: what each asks for, and whether it starts on this unit, bank and cable.

use super::assumptions::Assumptions;
use super::design::{Bank, Cable, Demand, Inverter, MotorStart, Run, StartNeed, StartVerdict};
use super::finding::Finding;
use super::load_survey::Power;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::{Load, MotorPlate, Site, StartKind, Survey};
use super::tables::motors;
use crate::units::{DcVolts, Fraction, Ohms, VoltAmps, Watts};

#[cfg(test)]
mod tests;

/// What one piece of a load draws while it starts; `None` where that is no more than running.
///
/// A filament has no start here: a unit that limits its current only warms it more slowly. The charging
/// pulse of a capacitor is shorter than half a cycle and does not belong into the multiple.
pub fn start_power(load: &Load, site: &Site, assumptions: &Assumptions) -> Option<Power> {
    let apparent = start_apparent(load, site);
    match load.start {
        StartKind::Resistive => None,
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
    match load.motor_plate.filter(|_| load.start.is_motor()) {
        Some(MotorPlate::LockedRotor(current)) => site.supply * current,
        Some(MotorPlate::CodeLetter { horsepower, letter }) => motors::code_letter_start(horsepower, letter),
        Some(MotorPlate::Horsepower(horsepower)) => motors::table_start(horsepower, site.supply),
        None => Power::of_one(load).apparent() * load.surge_multiple,
    }
}

const NEEDED: Rule = Rule {
    symbol: "S_start",
    name: "Start of this motor, the rest running",
    formula: "S_start = |rest running + start|, P, Q and D apart",
    unit: "VA",
    source: "NEC 430.7(B), 430.251(A) where the plate says so; else the multiple of the running VA",
    checked: Checked::Read,
};

const AVAILABLE: Rule = Rule {
    symbol: "S_surge",
    name: "Surge that the unit gives",
    formula: "S_surge as of the unit",
    unit: "VA",
    source: "surge of the unit, above",
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

/// The unit with its bank and cable, as a start meets them.
struct Supply<'a> {
    inverter: &'a Inverter,
    bank: &'a Bank,
    /// Aged bank and both conductors of its cable.
    resistance: Ohms,
    /// Share of the starting current below which a motor stays where it is.
    marginal: f64,
}

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
    let supply = Supply { inverter, bank, resistance, marginal: assumptions.start_marginal_share };
    let motors = demand.starts.iter().filter(|need| need.kind.is_motor());
    motors.map(|need| supply.start(need, &survey.loads[need.row].name, sheet)).collect()
}

/// All at once is more than the unit gives, one after the other is not.
fn warn_of_restart(demand: &Demand, inverter: &Inverter, sheet: &mut Sheet) {
    let (together, staggered, available) = (demand.surge_together, demand.surge_staggered, inverter.surge);
    if together > available && staggered <= available {
        sheet.find(Finding::RestartTogetherTooMuch { together, staggered, available });
    }
}

impl Supply<'_> {
    fn start(&self, need: &StartNeed, name: &str, sheet: &mut Sheet) -> MotorStart {
        let figure = |key: &str| format!("starts.{name}.{key}");
        let (needed, available) = (need.needed().apparent(), self.inverter.surge);
        let values = [("rest", need.rest.apparent().0, "VA"), ("start", need.start.apparent().0, "VA")];
        sheet.line(figure("needed_va"), &NEEDED, &values, needed.0);
        sheet.line(figure("available_va"), &AVAILABLE, &[("S_surge", available.0, "VA")], available.0);
        let drawn = self.inverter.losses.drawn(need.needed().real);
        let values =
            [("V_oc", self.bank.end_open_circuit.0, "V"), ("R", self.resistance.0, "Ω"), ("P_dc", drawn.0, "W")];
        let lowest = DcVolts(sheet.line(figure("lowest_v"), &LOWEST, &values, self.lowest(drawn).0));
        let verdict = self.on_the_unit(need, name, sheet).max(self.on_the_bank(lowest, name, sheet));
        MotorStart { load: name.to_owned(), needed, available, lowest, verdict }
    }

    /// Volts left at the unit while a power is drawn; where no current can deliver it, the volts at the
    /// greatest power that bank and cable can give, which is half of what the bank shows unloaded.
    fn lowest(&self, power: Watts) -> DcVolts {
        let open = self.bank.end_open_circuit.0;
        let root = (open * open - 4.0 * self.resistance.0 * power.0).max(0.0).sqrt();
        DcVolts((open + root) / 2.0)
    }

    fn on_the_bank(&self, lowest: DcVolts, name: &str, sheet: &mut Sheet) -> StartVerdict {
        let cut_off = self.bank.cut_off;
        if lowest >= cut_off {
            return StartVerdict::Starts;
        }
        sheet.find(Finding::BankSagsAtStart { load: name.to_owned(), lowest, cut_off });
        StartVerdict::WillNotStart
    }

    /// A current limit pulls the volts down and the torque with their square: a motor that gets most
    /// of its current may still start, one that gets less does not.
    fn on_the_unit(&self, need: &StartNeed, name: &str, sheet: &mut Sheet) -> StartVerdict {
        let load = name.to_owned();
        let (needed, available) = (need.needed().apparent(), self.inverter.surge);
        let held = self.inverter.surge_held;
        if need.lasts > held && needed > self.inverter.rating * self.inverter.derating {
            sheet.find(Finding::SurgeTooShort { load, lasts: need.lasts, held });
            StartVerdict::WillNotStart
        } else if needed <= available {
            StartVerdict::Starts
        } else if (need.rest + need.start * self.marginal).apparent() <= available {
            sheet.find(Finding::MotorStartMarginal { load, needed, available });
            StartVerdict::Marginal
        } else {
            sheet.find(Finding::MotorWillNotStart { load, needed, available });
            StartVerdict::WillNotStart
        }
    }
}
