//! The runs there are, and what each must carry.

use super::paper::Paper;
use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::{Bank, Charger, Demand, Inverter, Run, StartNeed};
use crate::sizing::sheet::{Checked, Rule, Sheet};
use crate::sizing::survey::Survey;
use crate::units::{Amps, Fraction, Kiloamps, Metres, Watts};

/// What the stages before have settled.
#[derive(Clone, Copy)]
pub struct Given<'a> {
    /// Site, choice and lengths.
    pub survey: &'a Survey,
    /// What the loads ask for.
    pub demand: &'a Demand,
    /// The unit.
    pub inverter: &'a Inverter,
    /// The bank.
    pub bank: &'a Bank,
    /// The charger.
    pub charger: &'a Charger,
    /// The factors in force.
    pub assumptions: &'a Assumptions,
}

/// Shares of the nominal volts that a run may lose.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct DropBounds {
    /// Aimed at.
    pub target: f64,
    /// Doubtful above this.
    pub warn: f64,
    /// Never above this.
    pub limit: f64,
}

/// What a run carries for the seconds of a motor's start.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Start {
    /// Current of the hardest start.
    pub current: Amps,
    /// Share of the nominal volts that it may lose.
    pub limit: f64,
}

/// What a run must carry, and how far.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Plan {
    /// Which run.
    pub run: Run,
    /// One way.
    pub length: Metres,
    /// Design current (I_b).
    pub current: Amps,
    /// Volts that the drop is a share of.
    pub nominal: f64,
    /// Of the current; one on the battery's side.
    pub power_factor: Fraction,
    /// Largest fault current.
    pub fault: Kiloamps,
    /// What it may lose.
    pub drop: DropBounds,
    /// What one conductor may carry, where there is a bound besides its capacity.
    pub per_conductor: Option<Amps>,
    /// The hardest motor's start, where it comes through this run.
    pub start: Option<Start>,
}

impl Given<'_> {
    /// Every run of this job, from the bank outwards.
    pub fn plans(&self, sheet: &mut Sheet) -> Vec<Plan> {
        let runs = &self.survey.runs;
        let mut plans = Vec::with_capacity(5);
        if self.bank.strings > 1 {
            plans.push(self.string_lead(sheet));
        }
        plans.push(self.bank_to_inverter(sheet));
        plans.extend(runs.charger_to_bank.map(|length| self.charger_to_bank(length, sheet)));
        plans.push(self.inverter_to_board(sheet));
        plans.push(self.mains_to_inverter(sheet));
        plans
    }

    /// The largest current in or out of the bank: the unit's draw at the cut-off, or its charging current.
    fn bank_current(&self) -> Amps {
        match self.survey.runs.charger_to_bank {
            Some(_) => self.bank.peak_current,
            None => self.bank.peak_current.max(self.charger.current),
        }
    }

    fn bank_to_inverter(&self, sheet: &mut Sheet) -> Plan {
        let mut paper = Paper { run: Run::BankToInverter, sheet };
        let values = [("I_peak", self.bank.peak_current.0, "A"), ("I_charge", self.charger.current.0, "A")];
        let current = Amps(paper.line("design_current_a", &BANK_CURRENT, &values, self.bank_current().0));
        let fault = self.bank_fault(&mut paper);
        let start = self.hardest_start(&mut paper);
        let length = self.survey.runs.bank_to_inverter;
        Plan { start, ..self.battery_plan(Run::BankToInverter, length, current, fault) }
    }

    /// What the hardest motor's start draws at the cut-off, where a battery's current is highest; the unit gives no
    /// more than its surge. `None` without motors.
    fn hardest_start(&self, paper: &mut Paper) -> Option<Start> {
        let motors = self.demand.starts.iter().filter(|need| need.kind.is_motor()).map(StartNeed::needed);
        let given = motors.map(|power| power.real * (self.inverter.surge / power.apparent()).min(1.0));
        let hardest = given.reduce(Watts::max)?;
        let (drawn, cut_off) = (self.inverter.losses.drawn(hardest), self.bank.cut_off);
        let values = [("P_start", hardest.0, "W"), ("P_dc", drawn.0, "W"), ("V_cut-off", cut_off.0, "V")];
        let current = Amps(paper.line("start_current_a", &START_CURRENT, &values, (drawn / cut_off).0));
        Some(Start { current, limit: self.assumptions.dc_surge_drop_limit })
    }

    fn charger_to_bank(&self, length: Metres, sheet: &mut Sheet) -> Plan {
        let mut paper = Paper { run: Run::ChargerToBank, sheet };
        let charging = self.charger.current.0;
        let values = [("I_charge", charging, "A")];
        let current = Amps(paper.line("design_current_a", &CHARGER_CURRENT, &values, charging));
        let fault = self.bank_fault(&mut paper);
        self.battery_plan(Run::ChargerToBank, length, current, fault)
    }

    /// A string carries its share and what its lower resistance draws on top.
    fn string_lead(&self, sheet: &mut Sheet) -> Plan {
        let mut paper = Paper { run: Run::StringLead, sheet };
        let imbalance = self.imbalance(&mut paper);
        let (whole, strings) = (self.bank_current(), f64::from(self.bank.strings));
        let values = [("I_bank", whole.0, "A"), ("n", strings, ""), ("u", imbalance, "")];
        let share = whole / strings * (1.0 + imbalance);
        let current = Amps(paper.line("design_current_a", &STRING_CURRENT, &values, share.0));
        let fault = self.string_fault(strings, &mut paper);
        self.battery_plan(Run::StringLead, self.survey.runs.string_lead, current, fault)
    }

    fn battery_plan(&self, run: Run, length: Metres, current: Amps, fault: Kiloamps) -> Plan {
        let &Assumptions { dc_drop_target: target, dc_drop_warn: warn, dc_drop_limit: limit, .. } = self.assumptions;
        let drop = DropBounds { target, warn, limit };
        let nominal = self.bank.bus.volts().0;
        let per_conductor = Some(Amps(self.assumptions.bus_current_limit_a));
        Plan { run, length, current, nominal, power_factor: Fraction::ONE, fault, drop, per_conductor, start: None }
    }

    /// The board's cable carries what the unit can give, not only what is on the list today.
    fn inverter_to_board(&self, sheet: &mut Sheet) -> Plan {
        let mut paper = Paper { run: Run::InverterToBoard, sheet };
        let supply = self.survey.site.supply;
        let (rating, running) = (self.inverter.rating, self.demand.running_va);
        let values = [("S_rated", rating.0, "VA"), ("S_running", running.0, "VA"), ("U", supply.0, "V")];
        let current: Amps = rating.max(running) / supply;
        let current = Amps(paper.line("design_current_a", &BOARD_CURRENT, &values, current.0));
        let fault = self.mains_fault(&mut paper);
        let power_factor = share_of(self.demand.running.0, running.0);
        self.supply_plan(Run::InverterToBoard, self.survey.runs.inverter_to_board, current, power_factor, fault)
    }

    fn mains_to_inverter(&self, sheet: &mut Sheet) -> Plan {
        let mut paper = Paper { run: Run::MainsToInverter, sheet };
        let incoming = self.charger.incoming_current;
        let values = [("I_mains", incoming.0, "A")];
        let current = Amps(paper.line("design_current_a", &MAINS_CURRENT, &values, incoming.0));
        let fault = self.mains_fault(&mut paper);
        let power_factor = self.incoming_power_factor();
        self.supply_plan(Run::MainsToInverter, self.survey.runs.mains_to_inverter, current, power_factor, fault)
    }

    /// Of load and charger together.
    fn incoming_power_factor(&self) -> Fraction {
        let supply = self.survey.site.supply;
        let charging = (supply * self.charger.input_current).0 * self.assumptions.charger_power_factor;
        let real = self.demand.running + Watts(charging);
        share_of(real.0, (supply * self.charger.incoming_current).0)
    }

    fn supply_plan(&self, run: Run, length: Metres, current: Amps, power_factor: Fraction, fault: Kiloamps) -> Plan {
        let nominal = self.survey.site.supply.0;
        let drop = self.supply_drop(length);
        Plan { run, length, current, nominal, power_factor, fault, drop, per_conductor: None, start: None }
    }

    /// The allowed drop runs from the mains to the board, so both runs share it by their lengths.
    fn supply_drop(&self, length: Metres) -> DropBounds {
        let runs = &self.survey.runs;
        let both = runs.inverter_to_board + runs.mains_to_inverter;
        let limit = self.assumptions.ac_drop_limit;
        let target = limit * if both > Metres::ZERO { length / both } else { 1.0 };
        DropBounds { target, warn: target, limit }
    }
}

/// A ratio as a share of one; the whole where there is nothing to share.
fn share_of(part: f64, whole: f64) -> Fraction {
    if whole > 0.0 { Fraction::new((part / whole).clamp(0.0, 1.0)).unwrap_or(Fraction::ONE) } else { Fraction::ONE }
}

const BANK_CURRENT: Rule = Rule {
    symbol: "I_b",
    name: "Design current",
    formula: "I_b = I_peak, or I_charge where it is larger and takes the same cable",
    unit: "A",
    source: "a battery's current is highest at its lowest volts",
    checked: Checked::Derived,
};

const START_CURRENT: Rule = Rule {
    symbol: "I_start",
    name: "Battery current at cut-off while the hardest motor starts",
    formula: "I_start = P_dc(P_start) / V_cut-off, P_start no more than the unit's surge gives",
    unit: "A",
    source: "a battery's current is highest at its lowest volts",
    checked: Checked::Derived,
};

const CHARGER_CURRENT: Rule = Rule { formula: "I_b = I_charge", source: "the setting of the charger", ..BANK_CURRENT };

const STRING_CURRENT: Rule = Rule {
    formula: "I_b = I_bank / n · (1 + u)",
    source: "an equal share, and what a lower resistance draws on top",
    ..BANK_CURRENT
};

const BOARD_CURRENT: Rule = Rule {
    formula: "I_b = max(S_rated, S_running) / U",
    source: "what the unit can give, whatever is on the list today",
    checked: Checked::OurRule,
    ..BANK_CURRENT
};

const MAINS_CURRENT: Rule = Rule { formula: "I_b = I_mains", source: "load and charger together", ..BANK_CURRENT };
