//! Cable, drop and protection of every run.
//!
//! Current → device → cable: the device's rating follows from the current, and the cable is the thinnest
//! that the device protects, that bears a fault until it is cleared, and that keeps the drop. Resistances
//! are the standards' highest, at the temperature the insulation bears.

mod fault_current;
mod judgement;
pub mod laying;
mod paper;
pub mod protective_conductor;
mod rules;
pub mod runs;
pub mod selection;
pub mod sharing;
pub mod short_circuit;
pub mod voltage_drop;
mod written;

use laying::Laying;
use paper::Paper;
use protective_conductor::protective_conductor;
use runs::{Given, Plan};
use selection::{Candidate, Question, carried};
use short_circuit::{heat_constant, least_area, temperatures};
use written::write_down;

use super::assumptions::Assumptions;
use super::design::{Bank, Cable, Charger, CrossSection, Demand, Inverter};
use super::protection::{self, Device};
use super::sheet::Sheet;
use super::survey::{Code, Survey};
use crate::units::{DcVolts, Seconds, SquareMillimetres};

/// Every run with its cable and protection, from the bank outwards.
pub fn cables(
    survey: &Survey,
    demand: &Demand,
    inverter: &Inverter,
    bank: &Bank,
    charger: &Charger,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> Vec<Cable> {
    let given = Given { survey, demand, inverter, bank, charger, assumptions };
    let plans = given.plans(sheet);
    let cables = plans.iter().map(|plan| cable(plan, &given, sheet)).collect();
    given.judge_lithium(&plans, sheet);
    cables
}

/// One run: device, then cable, then what there is to say about both.
fn cable(plan: &Plan, given: &Given, sheet: &mut Sheet) -> Cable {
    let laying = Laying::of(plan.run, given.survey, given.assumptions);
    let mut paper = Paper { run: plan.run, sheet };
    let device = given.device(plan, &laying);
    let least_for_fault = given.least_for_fault(plan, &laying, &device, &mut paper);
    let question = Question { plan, laying: &laying, device: &device, least_for_fault };
    let chosen = question.answer().expect("every table of sizes has its largest");
    given.judge(&question, &chosen, &mut paper);
    write_down(&question, &chosen, &mut paper);
    answer(&question, &chosen, &mut paper)
}

fn answer(question: &Question, chosen: &Candidate, paper: &mut Paper) -> Cable {
    let &Question { plan, laying, device, .. } = question;
    let ground = protective_conductor(laying, &chosen.size, device.rating).filter(|_| !plan.run.is_dc());
    if let Some(CrossSection::Metric(area)) = ground {
        let values = [("S", chosen.size.area.0, "mm²")];
        paper.line("protective_conductor.cross_section_mm2", &rules::PROTECTIVE, &values, area.0);
    }
    Cable {
        run: plan.run,
        length: plan.length,
        design_current: plan.current,
        size: Some(chosen.size.cross_section),
        parallel: chosen.parallel,
        protective_conductor: ground,
        capacity: chosen.capacity,
        voltage_drop: chosen.drop,
        voltage_drop_share: chosen.drop_share,
        loop_resistance: chosen.loop_resistance,
        fuse: device.rating,
        device: device.name,
        fault_current: plan.fault,
        breaking_capacity: device.breaks,
        code: code_name(laying.code),
    }
}

fn code_name(code: Code) -> &'static str {
    match code {
        Code::Iec => "IEC 60364",
        Code::Nec => "NEC",
    }
}

impl Given<'_> {
    fn device(&self, plan: &Plan, laying: &Laying) -> Device {
        let carried = carried(plan, laying.code);
        if plan.run.is_dc() {
            protection::for_battery(carried, self.highest_volts(), plan.fault)
        } else {
            protection::for_supply(laying.code, carried, plan.fault)
        }
    }

    /// Highest volts of the bank: absorption on the coldest day.
    fn highest_volts(&self) -> DcVolts {
        self.charger.absorption.max(self.charger.absorption_coldest).max(self.bank.bus.volts())
    }

    /// The thinnest conductor that bears the fault until the device has cleared it.
    fn least_for_fault(&self, plan: &Plan, laying: &Laying, device: &Device, paper: &mut Paper) -> SquareMillimetres {
        let clears_in = Seconds(self.assumptions.fault_clearing_s);
        let energy = device.lets_through(plan.fault, clears_in, self.survey.site.frequency);
        let (start, end) = temperatures(laying);
        let constant = heat_constant(laying.conductor, start, end);
        let values =
            [("I²t", energy, "A²s"), ("k", constant, "A√s/mm²"), ("I_k", plan.fault.0, "kA"), ("t", clears_in.0, "s")];
        let least = least_area(energy, constant);
        SquareMillimetres(paper.line("least_for_fault_mm2", &rules::LEAST_FOR_FAULT, &values, least.0))
    }
}

#[cfg(test)]
mod tests;
