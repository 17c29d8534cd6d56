//! What the installer must hear about a run.

use super::laying::Laying;
use super::paper::Paper;
use super::runs::{Given, Plan};
use super::selection::{Candidate, Question};
use crate::sizing::design::Run;
use crate::sizing::finding::Finding;
use crate::sizing::protection::{OPENS_WITHIN_SECONDS, TRIPS_AT_ONCE};
use crate::sizing::sheet::Sheet;
use crate::sizing::survey::{Chemistry, Conductor};
use crate::sizing::tables::{ambient, grouping};
use crate::units::{Amps, Kiloamps};

impl Given<'_> {
    /// A lithium bank's fault current is not a multiple of its capacity.
    pub(super) fn judge_lithium(&self, plans: &[Plan], sheet: &mut Sheet) {
        let bank = plans.iter().find(|plan| plan.run == Run::BankToInverter);
        if let (Chemistry::Lfp, Some(plan)) = (self.survey.choice.chemistry, bank) {
            sheet.find(Finding::FaultCurrentNeedsMaker { estimate: plan.fault });
        }
    }

    /// Cable, device, laying, metal, and the weakest fault there may be.
    pub(super) fn judge(&self, question: &Question, chosen: &Candidate, paper: &mut Paper) {
        judge_cable(question, chosen, paper.sheet);
        judge_device(question, chosen, paper.sheet);
        judge_laying(question, chosen, paper.sheet);
        self.judge_metal(question, paper.sheet);
        self.judge_fault_on_battery(question, paper.sheet);
        self.judge_weakest_fault(question, chosen, paper);
    }

    /// The aged bank at the end of a cut, through the whole cable, must still open the fuse.
    fn judge_weakest_fault(&self, question: &Question, chosen: &Candidate, paper: &mut Paper) {
        let run = question.plan.run;
        let (true, Some(rating)) = (run.is_dc(), question.device.rating) else { return };
        let gives = self.weakest_fault(chosen.loop_resistance, paper);
        let opens_at = rating * OPENS_WITHIN_SECONDS;
        if gives < opens_at {
            paper.sheet.find(Finding::FuseSlowOnAgedBank { run, gives, opens_at });
        }
    }

    /// Battery leads stay of copper.
    fn judge_metal(&self, question: &Question, sheet: &mut Sheet) {
        if self.survey.choice.conductor == Conductor::Aluminium && question.laying.conductor == Conductor::Copper {
            let fixed = Laying { conductor: Conductor::Aluminium, ..*question.laying };
            let smallest_mm2 = fixed.sizes().first().map_or(0.0, |size| size.area.0);
            sheet.find(Finding::NoAluminium { run: question.plan.run, smallest_mm2 });
        }
    }

    /// On battery the unit's surge is all there is to open the board's breaker.
    fn judge_fault_on_battery(&self, question: &Question, sheet: &mut Sheet) {
        let (Run::InverterToBoard, Some(rating)) = (question.plan.run, question.device.rating) else { return };
        let gives: Amps = self.inverter.surge / self.survey.site.supply;
        let trips_at = rating * TRIPS_AT_ONCE;
        if gives < trips_at {
            sheet.find(Finding::BreakerSlowOnBattery { run: question.plan.run, gives, trips_at });
        }
    }
}

fn judge_cable(question: &Question, chosen: &Candidate, sheet: &mut Sheet) {
    let &Plan { run, length, current, fault, drop, .. } = question.plan;
    if !question.carries(chosen) {
        sheet.find(Finding::NoCableFits { run, current, length });
    }
    if !question.bears_fault(chosen) {
        sheet.find(Finding::FaultHeatsCable { run, fault });
    }
    let share = chosen.drop_share;
    if share > drop.limit {
        sheet.find(Finding::DropAboveLimit { run, share, limit: drop.limit });
    } else if share > drop.warn {
        sheet.find(Finding::DropAboveTarget { run, share, target: drop.target });
    }
}

fn judge_device(question: &Question, chosen: &Candidate, sheet: &mut Sheet) {
    let &Plan { run, current, fault, .. } = question.plan;
    if question.device.rating.is_none() {
        sheet.find(Finding::NoFuseFits { run, current, capacity: chosen.capacity });
    }
    let breaks: Kiloamps = question.device.breaks;
    if breaks < fault {
        sheet.find(Finding::BreakingCapacityTooSmall { run, fault, breaks });
    }
}

/// Air or bundle beyond the table: the last row was taken.
fn judge_laying(question: &Question, chosen: &Candidate, sheet: &mut Sheet) {
    let &Laying { code, insulation, method, ambient, .. } = question.laying;
    let highest = ambient::highest(code, insulation);
    if ambient > highest {
        sheet.find(Finding::AmbientOutsideTable { run: question.plan.run, ambient, highest });
    }
    let circuits = question.laying.circuits_with(chosen.parallel);
    let most = grouping::most_circuits(code, method);
    if circuits > most {
        let (given, highest) = (f64::from(circuits), f64::from(most));
        sheet.find(Finding::OutsideMethod {
            what: "Circuits that lie together",
            given,
            lowest: 1.0,
            highest,
            unit: "",
        });
    }
}
