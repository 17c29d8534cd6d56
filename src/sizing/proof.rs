//! What playing the cuts through says of a design, as data; `crate::simulation` fills it in.

use serde::{Serialize, Serializer};

use super::survey::TimeOfDay;
use crate::units::{AmpHours, Amps, Celsius, DcVolts, Hours, Watts};

/// The cuts played through on the bank that is offered.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Proof {
    /// How long the new bank lasts at 25 °C from the start it is sized for.
    #[serde(rename = "runtime_new_h")]
    pub runtime_new: Hours,
    /// How long it lasts at the end of its life on its coldest day, from the same start: the ruling case.
    #[serde(rename = "runtime_aged_h")]
    pub runtime_aged: Hours,
    /// Lowest volts at the unit during the cut asked for, in the ruling case.
    #[serde(rename = "lowest_voltage_v")]
    pub lowest: DcVolts,
    /// Whether the ruling case lasts the cut asked for.
    pub holds: bool,
    /// Whether the bank is full before every cut of four weeks.
    pub recovers: bool,
    /// The battery as the model sees it.
    pub wells: WellsShown,
    /// New and aged; coldest, 25 °C and hottest; the start sized for first, the worst one after it where
    /// another was asked for.
    pub cases: Vec<Case>,
    /// Each motor at the last moment of the cut at which it may start, in the ruling case.
    pub starts: Vec<LateStart>,
    /// The ruling case moment by moment, until it stops; one that lasts a week only over the cut asked for.
    pub curve: Vec<Moment>,
    /// Four weeks of cuts.
    pub weeks: Weeks,
    /// What is only looked at on request; absent until it was played.
    #[serde(flatten)]
    pub detail: Option<Detail>,
    /// A year, many times; absent until it was played.
    pub year: Option<Year>,
}

/// The bank from every hour of the day, and without each of its loads.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Detail {
    /// How long it lasts from each hour of the day.
    pub by_hour: Vec<HourOfStart>,
    /// What each load costs in hours, dearest first.
    pub costs: Vec<LoadCost>,
}

/// The kinetic battery model of the bank, new and at 25 °C.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct WellsShown {
    /// Charge of both wells (`q_max`).
    #[serde(rename = "full_ah")]
    pub full: AmpHours,
    /// Share of it at hand (`c`).
    pub at_hand_share: f64,
    /// Rate at which bound charge follows (`k'`).
    pub rate_per_h: f64,
    /// Where the three come from.
    pub from: WellsFrom,
}

/// Where the numbers of the model come from.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
pub enum WellsFrom {
    /// Fitted to three or four ratings of the data sheet.
    Ratings,
    /// Laid through Peukert's law at 20, 5 and 1 h.
    Exponent,
}

/// What ends a discharge.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
pub enum EndedBy {
    /// The mains came back, or a week was over.
    CutEnds,
    /// No charge was at hand any more.
    EmptyWell,
    /// The volts at the unit fell to its cut-off.
    CutOff,
    /// No current delivers the power that was switched on.
    Overload,
}

/// One case of age, warmth and start.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Case {
    /// Capacity over that of a new bank.
    pub health: f64,
    /// Temperature of the bank.
    #[serde(rename = "battery_c")]
    pub battery: Celsius,
    /// When the mains goes off.
    #[serde(serialize_with = "clock")]
    pub start: TimeOfDay,
    /// How long it lasts; a week at most.
    #[serde(rename = "runtime_h")]
    pub runtime: Hours,
    /// What ends it.
    pub ended_by: EndedBy,
    /// Whether it lasts the cut asked for.
    pub holds: bool,
    /// Lowest volts at the unit during the cut asked for.
    #[serde(rename = "lowest_v")]
    pub lowest: DcVolts,
    /// Share of the charge left when the cut ends, or when the bank stops before.
    pub charge_left: f64,
}

/// A motor's start at the end of the cut.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct LateStart {
    /// The load.
    pub load: String,
    /// Hours into the cut of the last moment at which it may start.
    #[serde(rename = "at_h")]
    pub at: Hours,
    /// Volts at the unit while it starts then.
    #[serde(rename = "lowest_v")]
    pub lowest: DcVolts,
    /// Whether they stay at the cut-off or above.
    pub starts: bool,
}

/// The end of a stretch of constant power.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct Moment {
    /// Hours since the mains went off.
    #[serde(rename = "at_h")]
    pub at: Hours,
    /// Power of the loads up to now.
    #[serde(rename = "load_w")]
    pub load: Watts,
    /// Volts at the unit when that power was switched on.
    #[serde(rename = "from_v")]
    pub from: DcVolts,
    /// Battery current now.
    #[serde(rename = "current_a")]
    pub current: Amps,
    /// Volts at the unit now.
    #[serde(rename = "volts_v")]
    pub volts: DcVolts,
    /// Share of the charge left now.
    pub charge_left: f64,
}

/// How long the bank lasts from one hour of the day.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct HourOfStart {
    /// When the mains goes off.
    #[serde(serialize_with = "clock")]
    pub start: TimeOfDay,
    /// New, at 25 °C.
    #[serde(rename = "new_h")]
    pub new: Hours,
    /// At the end of its life, on the coldest day.
    #[serde(rename = "aged_h")]
    pub aged: Hours,
}

/// Whether the bank is full again in time.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
pub enum Recovery {
    /// Full before every cut.
    FullBeforeNextCut,
    /// Not full before every cut, but full again at some time of the last week.
    SlowlyLosing,
    /// Not full once in the last week, or without mains for a week on end.
    NeverRecovers,
}

/// Four weeks of cuts, at the end of the bank's life on the coldest day.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Weeks {
    /// Whether it is full again in time.
    pub recovery: Recovery,
    /// Charging current that is missing for it; absent where nothing is missing or no current would do.
    #[serde(rename = "missing_a")]
    pub missing_current: Option<Amps>,
    /// Hours of mains that are missing before the worst of the cuts.
    #[serde(rename = "missing_h")]
    pub missing_hours: Hours,
    /// Cuts in the four weeks.
    pub cuts: u32,
    /// Cuts in which the bank ran dry.
    pub run_outs: u32,
    /// Charge at its lowest and highest, day by day.
    pub days: Vec<DayOfCharge>,
    /// Share of the charge of the new bank at 25 °C that each cut took.
    #[serde(skip)]
    pub depths: Vec<f64>,
}

/// One day of the four weeks.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct DayOfCharge {
    /// Lowest share of the charge.
    pub lowest: f64,
    /// Highest share of the charge.
    pub highest: f64,
    /// Hours without mains.
    #[serde(rename = "off_h")]
    pub off: Hours,
}

/// What a load costs: the hours that its absence adds in the ruling case.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct LoadCost {
    /// The load.
    pub load: String,
    /// Its row in the survey.
    pub row: usize,
    /// Hours more without it.
    #[serde(rename = "off_gains_h")]
    pub off: Hours,
    /// Hours more with its windows moved out of the evening; absent where it is not on then, or only then.
    #[serde(rename = "out_of_evening_gains_h")]
    pub out_of_evening: Option<Hours>,
}

/// A year of cuts, played many times.
#[derive(Clone, Debug, PartialEq, Serialize)]
pub struct Year {
    /// How often it was played.
    pub years: u32,
    /// Seed of the generator.
    pub seed: u64,
    /// The generator's algorithm.
    pub generator: &'static str,
    /// What the cuts rest on.
    pub rests_on: RestsOn,
    /// The bank new and at 25 °C.
    pub first: YearTold,
    /// The bank at the end of its life on the coldest day, all year.
    pub last: YearTold,
}

/// What a year of cuts rests on.
#[derive(Clone, Debug, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case", tag = "kind")]
pub enum RestsOn {
    /// The feeder's announced blocks.
    Schedule,
    /// How often and how long, as answered.
    Answers,
    /// A country's figures of a year, where nobody could say.
    Country {
        /// The country or region.
        region: &'static str,
        /// The year of its figures.
        year: &'static str,
    },
}

/// What many years say of one state of the bank.
#[derive(Clone, Copy, Debug, PartialEq, Serialize)]
pub struct YearTold {
    /// Cuts in a year.
    pub cuts_per_year: f64,
    /// Cuts in a year in which the bank runs dry.
    pub run_outs_per_year: f64,
    /// The 95 % interval of that mean.
    pub run_outs_interval: (f64, f64),
    /// Share of cuts ridden through.
    pub ridden_through: f64,
    /// Hours in a year without mains and without the bank.
    #[serde(rename = "unserved_h")]
    pub unserved: Hours,
    /// Lowest charge of a year: the worst of twenty years, the middle one, the best of twenty.
    pub lowest_charge: [f64; 3],
    /// Whole discharges in a year.
    pub full_cycles_per_year: f64,
}

fn clock<S: Serializer>(time: &TimeOfDay, serializer: S) -> Result<S::Ok, S::Error> {
    serializer.collect_str(time)
}
