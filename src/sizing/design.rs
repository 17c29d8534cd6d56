//! What the engine answers: the design, stage by stage, as its JSON shows it.
//!
//! Field names inside are the trade's words; the names that leave carry the unit.

use serde::Serialize;

use super::assumptions::Assumptions;
use super::finding::Finding;
use super::load_survey::Power;
use super::proof::Proof;
use super::sheet::Line;
use super::survey::{BusVolts, StartKind, TimeOfDay};
use crate::units::{
    AcVolts, AmpHours, Amps, Celsius, CubicMetresPerHour, DcVolts, Fraction, Hours, Kiloamps, Kilograms, Metres,
    Millimetres, Milliseconds, Ohms, Seconds, SquareCentimetres, SquareMillimetres, VoltAmps, WattHours, Watts, Years,
};

/// The whole answer.
#[derive(Clone, Debug, PartialEq)]
pub struct Design {
    /// What the loads ask for.
    pub demand: Demand,
    /// The unit.
    pub inverter: Inverter,
    /// The battery bank.
    pub bank: Bank,
    /// Each motor's start on this unit, bank and cable.
    pub starts: Vec<MotorStart>,
    /// The charger.
    pub charger: Charger,
    /// Every run, from the bank outwards.
    pub cables: Vec<Cable>,
    /// Air for the bank.
    pub ventilation: Ventilation,
    /// How long the bank lives.
    pub life: Life,
    /// The cuts played through; `None` until a simulation has done so.
    pub proof: Option<Proof>,
    /// What the installer must hear, heaviest first.
    pub findings: Vec<Finding>,
    /// How each figure came about.
    pub working: Vec<Line>,
    /// The factors in force.
    pub assumptions: Assumptions,
}

/// What the loads ask for.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Demand {
    /// Highest real power of loads that run together.
    #[serde(rename = "running_w")]
    pub running: Watts,
    /// Highest apparent power of loads that run together.
    #[serde(rename = "running_va")]
    pub running_va: VoltAmps,
    /// All motors restarting together, everything else running.
    #[serde(rename = "surge_together_va")]
    pub surge_together: VoltAmps,
    /// One motor starting at a time, everything else running; the worst of them.
    #[serde(rename = "surge_staggered_va")]
    pub surge_staggered: VoltAmps,
    /// Energy of the loads over the cut from its start, at the inverter's output.
    #[serde(rename = "outage_wh")]
    pub outage: WattHours,
    /// The start that costs most, as `HH:MM`.
    #[serde(serialize_with = "clock")]
    pub worst_start: TimeOfDay,
    /// The start that the bank is sized for: the worst, or the one asked for.
    #[serde(serialize_with = "clock")]
    pub sized_start: TimeOfDay,
    /// Energy of a cut of the same length at an average hour.
    #[serde(rename = "average_outage_wh")]
    pub average_outage: WattHours,
    /// The day in stretches of constant load, from midnight to midnight.
    pub day: Vec<DayStretch>,
    /// The hardest start of each load that has one, in the order of the survey.
    #[serde(skip)]
    pub starts: Vec<StartNeed>,
}

/// What one load asks for when it starts at its hardest hour, the rest running.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct StartNeed {
    /// Its row in the survey.
    pub row: usize,
    /// What starts.
    pub kind: StartKind,
    /// How long the start lasts.
    pub lasts: Seconds,
    /// What runs beside it.
    pub rest: Power,
    /// The start alone.
    pub start: Power,
}

impl StartNeed {
    /// The start with the rest running.
    pub fn needed(&self) -> Power {
        self.rest + self.start
    }

    /// Whether it is a surge, short enough for the unit's surge rating by its nature: a cold heater is
    /// a long overload instead.
    pub fn is_surge(&self) -> bool {
        self.kind != StartKind::HeaterPtc
    }
}

/// A stretch of the day in which nothing changes.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct DayStretch {
    /// Beginning.
    #[serde(serialize_with = "clock")]
    pub from: TimeOfDay,
    /// End, not included.
    #[serde(serialize_with = "clock")]
    pub to: TimeOfDay,
    /// Average real power: running power times duty.
    #[serde(rename = "average_w")]
    pub average: Watts,
    /// Real power with everything on that may be on.
    #[serde(rename = "peak_w")]
    pub peak: Watts,
    /// Apparent power with everything on that may be on.
    #[serde(rename = "peak_va")]
    pub peak_va: VoltAmps,
}

/// The form of the output.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
#[allow(missing_docs, reason = "the names say it")]
pub enum Waveform {
    Sine,
    Square,
}

/// Which mains window the unit is to be set to.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
#[allow(missing_docs, reason = "the names are the trade's")]
pub enum MainsWindow {
    Narrow,
    Wide,
}

/// The unit: rating, surge, losses, changeover.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Inverter {
    /// Rating that the load asks for, with margin and derating.
    #[serde(rename = "required_va")]
    pub required: VoltAmps,
    /// Trade size, or the rating of the unit to be used again.
    #[serde(rename = "rating_va")]
    pub rating: VoltAmps,
    /// Its rating in W.
    #[serde(rename = "rating_w")]
    pub rating_w: Watts,
    /// What heat and height leave of the rating.
    pub derating: Fraction,
    /// Largest start it bears.
    #[serde(rename = "surge_va")]
    pub surge: VoltAmps,
    /// How long it holds that.
    #[serde(rename = "surge_s")]
    pub surge_held: Seconds,
    /// What is left of the surge above the start it must bear, as a share of that start; negative if it falls short.
    pub surge_margin: f64,
    /// Form of the output.
    pub waveform: Waveform,
    /// Running VA over the derated rating; above one it is overloaded.
    pub load_share: f64,
    /// Loss model.
    pub losses: Losses,
    /// Break at changeover in the window to be set.
    #[serde(rename = "changeover_ms")]
    pub changeover: Milliseconds,
    /// The window to be set.
    pub mains_window: MainsWindow,
    /// Lowest and highest mains of that window.
    #[serde(rename = "mains_window_v")]
    pub mains_window_volts: (AcVolts, AcVolts),
    /// Real power the bank gives at the peak running load.
    #[serde(rename = "peak_dc_w")]
    pub peak_dc: Watts,
}

/// `P_dc = P_0 + (1 + k_1)·P + k_2·P²/P_rated`.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Losses {
    /// Draw with nothing on.
    #[serde(rename = "no_load_w")]
    pub no_load: Watts,
    /// `k_1`.
    pub linear: f64,
    /// `k_2`.
    pub quadratic: f64,
    /// Power the quadratic term is taken against.
    #[serde(rename = "rated_w")]
    pub rated: Watts,
}

impl Losses {
    /// Power drawn from the bank for a real power at the output.
    ///
    /// Source (from memory): the loss model with three terms of H. Schmidt and D. U. Sauer, 1996.
    pub fn drawn(&self, output: Watts) -> Watts {
        self.no_load + output * (1.0 + self.linear) + output * (output / self.rated) * self.quadratic
    }
}

/// The battery bank.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Bank {
    /// Nominal volts.
    #[serde(rename = "bus_v", serialize_with = "bus_volts")]
    pub bus: BusVolts,
    /// Capacity that the cut asks for, at the rate of `rated`.
    #[serde(rename = "required_ah")]
    pub required: AmpHours,
    /// The rate that all capacities here are given at.
    #[serde(rename = "rated_hours")]
    pub rated: Hours,
    /// Capacity of one block at that rate.
    #[serde(rename = "block_ah")]
    pub block: AmpHours,
    /// Blocks of 12 V in a string.
    pub blocks_in_series: u32,
    /// Strings in parallel.
    pub strings: u32,
    /// Capacity of the bank offered.
    #[serde(rename = "installed_ah")]
    pub installed: AmpHours,
    /// Peukert's exponent in force.
    pub peukert_exponent: f64,
    /// Share of the bank that the cut may take.
    pub depth_of_discharge_max: f64,
    /// Share of the bank offered that the sized cut takes, new and at 25 °C.
    pub depth_of_discharge: f64,
    /// Factor for the coldest day.
    pub temperature_factor: f64,
    /// What each method asks for, all with the same factors.
    pub methods: Methods,
    /// The method that ruled: `peukert`, `section` or `kibam`.
    pub ruled_by: RulingMethod,
    /// Current at cut-off and peak running load.
    #[serde(rename = "peak_current_a")]
    pub peak_current: Amps,
    /// Cut-off of the whole string.
    #[serde(rename = "cut_off_v")]
    pub cut_off: DcVolts,
    /// Resistance of the bank at the end of its life.
    #[serde(rename = "aged_resistance_ohm")]
    pub aged_resistance: Ohms,
    /// Open-circuit volts at the end of the cut.
    #[serde(rename = "end_open_circuit_v")]
    pub end_open_circuit: DcVolts,
    /// Mass of all blocks, an estimate.
    #[serde(rename = "weight_kg")]
    pub weight: Kilograms,
    /// Charge that the sized cut takes, at its own currents.
    #[serde(rename = "outage_ah")]
    pub outage: AmpHours,
}

/// What each method asks for.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Methods {
    /// Peukert's step sum over the depth of discharge.
    #[serde(rename = "peukert_ah")]
    pub peukert: AmpHours,
    /// Section method with ageing.
    #[serde(rename = "section_ah")]
    pub section: AmpHours,
    /// Kinetic model, by playing the cut through; `None` until that was done.
    #[serde(rename = "kibam_ah")]
    pub kibam: Option<AmpHours>,
}

/// The method that asks for most.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
#[allow(missing_docs, reason = "the names say it")]
pub enum RulingMethod {
    Peukert,
    Section,
    Kibam,
}

/// A motor's start on this unit, bank and cable.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct MotorStart {
    /// The load.
    pub load: String,
    /// Apparent power of the start with everything else running.
    #[serde(rename = "needed_va")]
    pub needed: VoltAmps,
    /// What the unit gives.
    #[serde(rename = "available_va")]
    pub available: VoltAmps,
    /// Volts at the unit's terminals while it starts, bank aged and at the end of the cut.
    #[serde(rename = "lowest_v")]
    pub lowest: DcVolts,
    /// Whether it starts.
    pub verdict: StartVerdict,
}

/// Whether a motor starts.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Serialize)]
#[serde(rename_all = "snake_case")]
#[allow(missing_docs, reason = "the names say it")]
pub enum StartVerdict {
    Starts,
    Marginal,
    WillNotStart,
}

/// The charger: current, time, settings.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Charger {
    /// Charging current, the setting to choose.
    #[serde(rename = "current_a")]
    pub current: Amps,
    /// Least current the chemistry wants.
    #[serde(rename = "least_a")]
    pub least: Amps,
    /// Most current the chemistry bears.
    #[serde(rename = "most_a")]
    pub most: Amps,
    /// Time to full after the sized cut.
    #[serde(rename = "recharge_h")]
    pub recharge: Hours,
    /// Current from the mains while charging.
    #[serde(rename = "input_current_a")]
    pub input_current: Amps,
    /// Current from the mains with the load and the charger together.
    #[serde(rename = "incoming_current_a")]
    pub incoming_current: Amps,
    /// Absorption volts of the string at 25 °C.
    #[serde(rename = "absorption_v")]
    pub absorption: DcVolts,
    /// Float volts of the string at 25 °C.
    #[serde(rename = "float_v")]
    pub float: DcVolts,
    /// Change of both per kelvin above 25 °C, for the string.
    #[serde(rename = "compensation_v_per_k")]
    pub compensation_per_kelvin: f64,
    /// Absorption volts on the coldest day.
    #[serde(rename = "absorption_coldest_v")]
    pub absorption_coldest: DcVolts,
    /// Absorption volts on the hottest day.
    #[serde(rename = "absorption_hottest_v")]
    pub absorption_hottest: DcVolts,
    /// Whether the bank is full before the next cut.
    pub refills: bool,
}

/// Which way a cable runs.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash, Serialize)]
#[serde(rename_all = "snake_case")]
#[allow(missing_docs, reason = "the names say it")]
pub enum Run {
    BankToInverter,
    StringLead,
    InverterToBoard,
    MainsToInverter,
    ChargerToBank,
}

impl Run {
    /// The name in files and in the working.
    pub const fn key(self) -> &'static str {
        match self {
            Self::BankToInverter => "bank_to_inverter",
            Self::StringLead => "string_lead",
            Self::InverterToBoard => "inverter_to_board",
            Self::MainsToInverter => "mains_to_inverter",
            Self::ChargerToBank => "charger_to_bank",
        }
    }

    /// On the battery's side of the unit.
    pub const fn is_dc(self) -> bool {
        matches!(self, Self::BankToInverter | Self::StringLead | Self::ChargerToBank)
    }
}

/// A size by its table.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub enum CrossSection {
    /// IEC 60228.
    #[serde(rename = "cross_section_mm2")]
    Metric(SquareMillimetres),
    /// NEC Chapter 9, with its area.
    #[serde(rename = "awg")]
    Awg(&'static str),
}

/// One run: cable, drop, protection.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Cable {
    /// Which run.
    pub run: Run,
    /// One-way length.
    #[serde(rename = "length_m")]
    pub length: Metres,
    /// Current the run is designed for.
    #[serde(rename = "design_current_a")]
    pub design_current: Amps,
    /// Size of one conductor; the largest of the table where nothing fits, which a finding says.
    #[serde(flatten)]
    pub size: Option<CrossSection>,
    /// Conductors in parallel per pole.
    pub parallel: u32,
    /// Size of the protective conductor where the run has one.
    #[serde(rename = "protective_conductor")]
    pub protective_conductor: Option<CrossSection>,
    /// Current-carrying capacity after all corrections.
    #[serde(rename = "capacity_a")]
    pub capacity: Amps,
    /// Drop over both conductors at the design current and the working temperature.
    #[serde(rename = "voltage_drop_v")]
    pub voltage_drop: f64,
    /// Drop over the nominal volts.
    pub voltage_drop_share: f64,
    /// Resistance of both conductors, warm.
    #[serde(rename = "loop_resistance_ohm")]
    pub loop_resistance: Ohms,
    /// Rating of the fuse or breaker; absent when nothing of the trade fits.
    #[serde(rename = "fuse_a")]
    pub fuse: Option<Amps>,
    /// Kind of the device, in the trade's words.
    pub device: &'static str,
    /// Fault current it must break.
    #[serde(rename = "fault_current_ka")]
    pub fault_current: Kiloamps,
    /// Breaking capacity to be asked for.
    #[serde(rename = "breaking_capacity_ka")]
    pub breaking_capacity: Kiloamps,
    /// The code the figures follow.
    pub code: &'static str,
}

/// Air for the bank.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Ventilation {
    /// Flow of fresh air while charging.
    #[serde(rename = "airflow_m3_per_h")]
    pub airflow: CubicMetresPerHour,
    /// Free area of each of two openings, inlet and outlet.
    #[serde(rename = "opening_cm2")]
    pub opening: SquareCentimetres,
    /// No spark nearer than this to a vent.
    #[serde(rename = "safe_distance_mm")]
    pub safe_distance: Millimetres,
}

/// How long the bank lives.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Life {
    /// Cycles in a year, from the cuts in a week.
    pub cycles_per_year: f64,
    /// Cycles to 80 % at the depth of the sized cut.
    pub cycles: f64,
    /// Life by cycles.
    #[serde(rename = "cycle_life_years")]
    pub by_cycles: Years,
    /// Life by heat and years.
    #[serde(rename = "calendar_life_years")]
    pub by_calendar: Years,
    /// The shorter of both.
    #[serde(rename = "life_years")]
    pub expected: Years,
    /// Temperature the calendar life was taken at.
    #[serde(rename = "at_c")]
    pub at: Celsius,
}

fn clock<S: serde::Serializer>(time: &TimeOfDay, serializer: S) -> Result<S::Ok, S::Error> {
    serializer.collect_str(time)
}

fn bus_volts<S: serde::Serializer>(bus: &BusVolts, serializer: S) -> Result<S::Ok, S::Error> {
    serializer.serialize_f64(bus.volts().0)
}
