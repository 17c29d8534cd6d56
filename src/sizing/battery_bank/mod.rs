//! The battery bank: what the cut asks for, at which volts, in which blocks.
//!
//! `need = max(C_flat / DoD, section × ageing) × temperature factor × margin`, over every start of
//! the cut that may be the worst. Two methods see the same currents: Peukert's step sum, which is
//! blind to the order of the load but keeps the depth of discharge, and the section method, which
//! knows the order and makes sure that the aged bank still holds its volts at the hardest moment.
//!
//! A heavier load never gets a smaller bank *on the same inverter*: every step's current then rises
//! and both methods rise with every current. A heavier load may, however, be given a larger unit
//! whose quadratic loss at the same output is smaller, and then the current of a light step falls.

pub mod duty_cycle;
pub mod end_of_cut;
mod figures;
pub mod needs;
pub mod peukert;
pub mod section_method;
pub mod strings;

use duty_cycle::Cut;
use end_of_cut::EndOfCut;
use needs::Needs;
use peukert::Curve;
use strings::Strings;

use super::assumptions::Assumptions;
use super::design::{Bank, Demand, Inverter, Methods, RulingMethod};
use super::finding::Finding;
use super::load_survey;
use super::sheet::Sheet;
use super::survey::{BusVolts, Survey};
use super::tables::battery_temperature;
use super::tables::chemistries::properties;
use crate::units::{AmpHours, Amps, Hours, Watts};

/// What the stages before have settled.
struct Given<'a> {
    survey: &'a Survey,
    inverter: &'a Inverter,
    assumptions: &'a Assumptions,
    curve: Curve,
    cold: f64,
    /// Capacity that just lasts the cut when it is played through, where that was done.
    played: Option<AmpHours>,
}

/// What one choice of bus volts leads to.
struct Answer {
    bus: BusVolts,
    needs: Needs,
    methods: Methods,
    required: AmpHours,
    ruled_by: RulingMethod,
    strings: Strings,
}

/// The bank that carries the cut of a survey, at its hardest start or at the one asked for; no smaller
/// than the one that just lasted it when it was `played` through.
pub fn bank(
    survey: &Survey,
    demand: &Demand,
    inverter: &Inverter,
    played: Option<AmpHours>,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> Bank {
    bank_for(&load_survey::cuts(survey, demand), survey, inverter, played, assumptions, sheet)
}

/// The bank that carries any one of these cuts.
///
/// Each cut is the output of the inverter, stretch by stretch, for one start; there is one of them
/// where the start is given, and one for each start that may be the worst where it is not.
pub fn bank_for(
    outages: &[Vec<(Watts, Hours)>],
    survey: &Survey,
    inverter: &Inverter,
    played: Option<AmpHours>,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> Bank {
    let curve = curve(survey, assumptions, sheet);
    let cold = temperature_factor(survey, sheet);
    let given = Given { survey, inverter, assumptions, curve, cold, played };
    let mut answer = given.best_bus(outages);
    answer.needs.write_down(answer.methods, answer.required, cold, assumptions, sheet);
    answer.methods.kibam = played.map(|just| needs::played(just, assumptions, sheet));
    given.offer(answer, sheet)
}

/// The data sheet's curve, or the typical one of the kind of battery.
fn curve(survey: &Survey, assumptions: &Assumptions, sheet: &mut Sheet) -> Curve {
    let from = properties(survey.choice.chemistry).peukert_holds_from;
    let (curve, finding) = Curve::new(&survey.battery_ratings, assumptions.peukert_exponent, from);
    finding.into_iter().for_each(|finding| sheet.find(finding));
    curve
}

fn temperature_factor(survey: &Survey, sheet: &mut Sheet) -> f64 {
    let (chemistry, coldest) = (survey.choice.chemistry, survey.site.battery_coldest);
    let (lowest, highest) = battery_temperature::rows(chemistry);
    if coldest < lowest {
        sheet.find(Finding::TemperatureOutsideTable { given: coldest, lowest, highest });
    }
    figures::temperature_factor(chemistry, coldest, sheet)
}

impl Given<'_> {
    /// The lowest bus volts with a good current and not too many strings; failing that, the highest.
    fn best_bus(&self, outages: &[Vec<(Watts, Hours)>]) -> Answer {
        let Self { survey, inverter, assumptions, .. } = self;
        let currents = strings::peak_currents(inverter.peak_dc, survey.choice.chemistry, assumptions);
        let buses = strings::bus_volts(survey.choice.bus, currents, Amps(assumptions.bus_current_target_a));
        let most = assumptions.strings_stop as u32;
        let (last, lower) = buses.split_last().expect("there is always a bus");
        let mut answers = lower.iter().map(|&bus| self.answer(bus, outages));
        answers.find(|answer| answer.strings.strings <= most).unwrap_or_else(|| self.answer(*last, outages))
    }

    fn answer(&self, bus: BusVolts, outages: &[Vec<(Watts, Hours)>]) -> Answer {
        let chemistry = self.survey.choice.chemistry;
        let cut_off = strings::cut_off(bus, chemistry, self.assumptions);
        let cuts: Vec<_> = outages.iter().map(|steps| Cut::through(&self.inverter.losses, cut_off, steps)).collect();
        let needs = needs::needs(&cuts, &self.curve);
        let (methods, required, ruled_by) = needs.raised(self.cold, self.played, self.assumptions);
        let strings = Strings::carrying(required, self.curve.block, chemistry);
        Answer { bus, needs, methods, required, ruled_by, strings }
    }

    /// The bank as it is offered, each figure written down.
    fn offer(&self, answer: Answer, sheet: &mut Sheet) -> Bank {
        let Self { survey, inverter, assumptions, ref curve, cold, .. } = *self;
        let Answer { bus, ref needs, methods, required, ruled_by, ref strings } = answer;
        let chemistry = survey.choice.chemistry;
        let kind = properties(chemistry);
        let cut_off = figures::cut_off(bus, chemistry, assumptions, sheet);
        let peak_current = figures::peak_current(inverter, cut_off, sheet);
        figures::bus(bus, peak_current, assumptions, sheet);
        let installed = figures::counts(bus, strings, curve.rated.0, required, sheet);
        let depth = figures::depth(curve, &needs.hardest, installed, sheet);
        let full = installed * curve.share_at(Hours(20.0));
        let end = EndOfCut::new(depth, cold, assumptions, kind.cells_per_block * bus.blocks_in_series());
        self.judge(&answer, peak_current, sheet);
        Bank {
            bus,
            required,
            rated: curve.rated,
            block: strings.block,
            blocks_in_series: bus.blocks_in_series(),
            strings: strings.strings,
            installed,
            peukert_exponent: figures::exponent(curve, needs, sheet),
            depth_of_discharge_max: figures::depth_limit(assumptions, sheet),
            depth_of_discharge: depth,
            temperature_factor: cold,
            methods,
            ruled_by,
            peak_current,
            cut_off,
            aged_resistance: end.resistance(kind, full, assumptions, sheet),
            end_open_circuit: end.open_circuit(kind, sheet),
            weight: figures::weight(kind, full, bus, sheet),
            outage: figures::outage(&needs.hardest, sheet),
        }
    }

    /// Current too high for one cable, too many strings, emptied faster than any rating tells.
    fn judge(&self, answer: &Answer, peak: Amps, sheet: &mut Sheet) {
        strings::judge_current(answer.bus, peak, self.assumptions, sheet);
        answer.strings.judge(self.assumptions, sheet);
        let bank = answer.required.max(answer.strings.block);
        let (hours, shortest) = (self.curve.runtime(bank, answer.needs.hardest.highest()), self.curve.fastest);
        if hours < shortest {
            sheet.find(Finding::OutsideRatings { hours, shortest, longest: self.curve.slowest_rate() });
        }
    }
}

#[cfg(test)]
pub(crate) mod example;
#[cfg(test)]
mod laws;
