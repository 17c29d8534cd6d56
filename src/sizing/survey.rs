//! What was found on site and asked for: the engine's only input besides its assumptions.
//!
//! The types say what a survey means. Numbers get in through one door,
//! `crate::documents::survey`, which holds the limits; so every number here is finite and in range.

use super::tables::outages::Region;
use crate::units::{
    AcVolts, AmpHours, Amps, Celsius, Fraction, Hertz, Hours, Metres, Milliseconds, Seconds, VoltAmps, Watts,
};

/// One customer's site, loads, cuts and cable runs.
#[derive(Clone, Debug, PartialEq)]
pub struct Survey {
    /// The supply and the room.
    pub site: Site,
    /// The cut to be bridged.
    pub outage: Outage,
    /// What must stay on; at least one.
    pub loads: Vec<Load>,
    /// What the installer has decided already.
    pub choice: Choice,
    /// Cable lengths, one way.
    pub runs: Runs,
    /// Data-sheet ratings of the battery block to be used, if known: one to four, any order.
    pub battery_ratings: Vec<BatteryRating>,
    /// An inverter that is there and is to be used again.
    pub reuse: Option<ReusedInverter>,
}

/// The supply and the room.
#[derive(Clone, Debug, PartialEq)]
pub struct Site {
    /// Name or place, as the installer knows it.
    pub name: String,
    /// Nominal supply.
    pub supply: AcVolts,
    /// Nominal frequency.
    pub frequency: Hertz,
    /// Lowest supply seen at the site.
    pub supply_lowest: AcVolts,
    /// Highest supply seen at the site.
    pub supply_highest: AcVolts,
    /// Coldest the battery gets.
    pub battery_coldest: Celsius,
    /// Hottest the battery gets.
    pub battery_hottest: Celsius,
    /// Hottest air at the inverter and around the cables.
    pub inverter_ambient: Celsius,
    /// Height above the sea.
    pub altitude: Metres,
    /// Rating of the breaker that feeds the inverter from the mains.
    pub incoming_breaker: Amps,
    /// Whether the battery's room has openings to the outside air.
    pub battery_room_vented: bool,
}

/// The cut to be bridged.
#[derive(Clone, Debug, PartialEq)]
pub struct Outage {
    /// Time asked for.
    pub autonomy: Hours,
    /// When the cut begins.
    pub starts_at: StartsAt,
    /// Cuts of this kind in a week.
    pub cuts_per_week: f64,
    /// Hours of mains between one cut and the next: the time to recharge.
    pub mains_between_cuts: Hours,
    /// What else is known of the cuts.
    pub pattern: Pattern,
}

/// What is known of the cuts beside the one to be bridged; everything may be unknown.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Pattern {
    /// How long a cut usually lasts.
    pub usual: Option<Hours>,
    /// The longest of a year.
    pub longest: Option<Hours>,
    /// When most of them come.
    pub mostly: Mostly,
    /// Cuts that the feeder announces for each day.
    pub blocks: Vec<Window>,
    /// By how much the blocks move on from one day to the next.
    pub blocks_shift: Hours,
    /// Hours of a day in which the mains is outside the unit's window.
    pub low_voltage: Hours,
    /// Country whose figures stand in where nobody can say how often and how long.
    pub region: Option<&'static Region>,
}

/// When most cuts come.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum Mostly {
    /// At any hour alike.
    #[default]
    AnyTime,
    /// Between 6 and 18 h.
    Daytime,
    /// Between 12 and 20 h, as storms do.
    Afternoon,
    /// Between 17 and 23 h, when the network is loaded most.
    Evening,
    /// Between 22 and 6 h.
    Night,
}

/// When the cut begins.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum StartsAt {
    /// At the hour that costs the most energy; the engine finds it.
    Worst,
    /// At a given time of day.
    At(TimeOfDay),
}

/// Minutes since midnight, `0..=1440`; 1440 is the end of the day.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct TimeOfDay(u16);

impl TimeOfDay {
    /// Midnight at the start of the day.
    pub const MIDNIGHT: Self = Self(0);
    /// Midnight at the end of the day.
    pub const END_OF_DAY: Self = Self(1440);

    /// From minutes since midnight; `None` past the end of the day.
    pub const fn from_minutes(minutes: u16) -> Option<Self> {
        if minutes <= 1440 { Some(Self(minutes)) } else { None }
    }

    /// Minutes since midnight.
    pub const fn minutes(self) -> u16 {
        self.0
    }

    /// Hours since midnight.
    pub fn hours(self) -> Hours {
        Hours(f64::from(self.0) / 60.0)
    }
}

impl std::fmt::Display for TimeOfDay {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(f, "{:02}:{:02}", self.0 / 60, self.0 % 60)
    }
}

/// A stretch of the day in which a load may be on; one that ends before it begins runs over midnight.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Window {
    /// Beginning.
    pub from: TimeOfDay,
    /// End, not included.
    pub to: TimeOfDay,
}

impl Window {
    /// From midnight to midnight.
    pub const ALL_DAY: Self = Self { from: TimeOfDay::MIDNIGHT, to: TimeOfDay::END_OF_DAY };

    /// Whether it holds a moment; one that ends before it begins runs over midnight, and one that ends
    /// where it begins is the whole day.
    pub fn holds(&self, moment: TimeOfDay) -> bool {
        if self.from < self.to {
            self.from <= moment && moment < self.to
        } else {
            self.from <= moment || moment < self.to
        }
    }
}

/// One line of the stay-on list.
#[derive(Clone, Debug, PartialEq)]
pub struct Load {
    /// What it is.
    pub name: String,
    /// How many there are; at least one.
    pub quantity: u32,
    /// How many of them are ever on together; at least one, at most `quantity`.
    pub on_together: u32,
    /// Electrical input of one while it really works.
    pub running: Watts,
    /// True power factor: displacement times distortion; above zero.
    pub power_factor: Fraction,
    /// What happens when it is switched on.
    pub start: StartKind,
    /// Starting VA over running VA, counting what lasts longer than half a cycle; at least one.
    pub surge_multiple: f64,
    /// How long the start lasts.
    pub surge_lasts: Seconds,
    /// What the motor's plate says of its start; it replaces the multiple.
    pub motor_plate: Option<MotorPlate>,
    /// Share of its windows in which it really works.
    pub duty: Fraction,
    /// When it may be on; at least one.
    pub windows: Vec<Window>,
    /// Loads with the same turn never run together.
    pub turn: Option<String>,
    /// Whether it bears a square wave.
    pub needs_sine: NeedsSine,
    /// Longest break it rides through.
    pub max_break: Milliseconds,
    /// Whether a life or a product hangs on it.
    pub life_support: LifeSupport,
}

impl Load {
    /// Whether it may be on at a moment of the day.
    pub fn is_on_at(&self, moment: TimeOfDay) -> bool {
        self.windows.iter().any(|window| window.holds(moment))
    }
}

/// What happens when a load is switched on.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs, reason = "the names are the trade's")]
pub enum StartKind {
    Resistive,
    Electronic,
    MotorPsc,
    MotorCapStart,
    MotorSplitPhase,
    Compressor,
    UniversalMotor,
    Transformer,
    HeaterPtc,
}

impl StartKind {
    /// Every kind, in the order of the form.
    pub const ALL: [Self; 9] = [
        Self::Resistive,
        Self::Electronic,
        Self::MotorPsc,
        Self::MotorCapStart,
        Self::MotorSplitPhase,
        Self::Compressor,
        Self::UniversalMotor,
        Self::Transformer,
        Self::HeaterPtc,
    ];

    /// An induction motor that restarts by itself when power returns.
    pub fn is_motor(self) -> bool {
        matches!(
            self,
            Self::MotorPsc | Self::MotorCapStart | Self::MotorSplitPhase | Self::Compressor | Self::UniversalMotor
        )
    }
}

/// What a motor's plate says of its start, best first.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum MotorPlate {
    /// Locked-rotor current, read on the plate.
    LockedRotor(Amps),
    /// Shaft horsepower and NEC code letter.
    CodeLetter {
        /// Shaft power.
        horsepower: f64,
        /// `A`…`V` without I, O and Q.
        letter: char,
    },
    /// Shaft horsepower only: the code's table current.
    Horsepower(f64),
}

/// Whether a load bears a square wave.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs, reason = "the names say it")]
pub enum NeedsSine {
    Yes,
    Prefers,
    No,
}

/// Whether a life or a product hangs on a load.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum LifeSupport {
    /// Nothing of the kind.
    No,
    /// A life hangs on it.
    Yes,
    /// A treatment hangs on it.
    Clinical,
    /// A product, vaccine or sample hangs on it.
    ProductCritical,
}

/// What the installer has decided already.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Choice {
    /// Kind of battery.
    pub chemistry: Chemistry,
    /// Volts of the bank, if they are forced.
    pub bus: Option<BusVolts>,
    /// Wiring code that rules the cables.
    pub code: Code,
    /// Metal of the conductors.
    pub conductor: Conductor,
    /// Insulation of the cables.
    pub insulation: Insulation,
    /// How the battery's cables are laid.
    pub method: Method,
    /// How the cables to the board and to the mains are laid.
    pub ac_method: Method,
    /// Whether a square-wave unit is on offer.
    pub square_wave_offered: bool,
}

/// Kind of battery.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
#[allow(missing_docs, reason = "the names are the trade's")]
pub enum Chemistry {
    FloodedTubular,
    FloodedFlatPlate,
    VrlaAgm,
    VrlaGel,
    Lfp,
}

impl Chemistry {
    /// Every kind, in the order of the form.
    pub const ALL: [Self; 5] = [Self::FloodedTubular, Self::FloodedFlatPlate, Self::VrlaAgm, Self::VrlaGel, Self::Lfp];

    /// Lead and acid, sealed or not.
    pub fn is_lead_acid(self) -> bool {
        self != Self::Lfp
    }

    /// With free acid, which gasses into the room and wants water.
    pub fn is_flooded(self) -> bool {
        matches!(self, Self::FloodedTubular | Self::FloodedFlatPlate)
    }
}

/// Nominal volts of a bank.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
#[allow(missing_docs, reason = "the names say it")]
pub enum BusVolts {
    V12,
    V24,
    V48,
}

impl BusVolts {
    /// Lowest first.
    pub const ALL: [Self; 3] = [Self::V12, Self::V24, Self::V48];

    /// The number of 12 V blocks in a string.
    pub const fn blocks_in_series(self) -> u32 {
        match self {
            Self::V12 => 1,
            Self::V24 => 2,
            Self::V48 => 4,
        }
    }

    /// The nominal volts.
    pub fn volts(self) -> crate::units::DcVolts {
        crate::units::DcVolts(12.0 * f64::from(self.blocks_in_series()))
    }
}

/// Wiring code that rules the cables.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Code {
    /// IEC 60364 and its national forms, metric sizes.
    Iec,
    /// NEC, AWG sizes.
    Nec,
}

/// Metal of a conductor.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs, reason = "the names say it")]
pub enum Conductor {
    Copper,
    Aluminium,
}

/// Insulation of a cable and the temperature it bears.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Insulation {
    /// PVC, 70 °C (75 °C column under NEC).
    Pvc70,
    /// XLPE or EPR, 90 °C.
    Xlpe90,
}

/// How a cable is laid, by the letters of IEC 60364-5-52.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Method {
    /// Single cores in conduit or trunking on a wall.
    B1,
    /// Clipped direct.
    C,
    /// Two-core cable in free air.
    E,
    /// Touching single cores in free air.
    F,
}

/// Cable lengths, one way.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Runs {
    /// Bank to inverter.
    pub bank_to_inverter: Metres,
    /// Lead of one string to the busbar.
    pub string_lead: Metres,
    /// Inverter to the board of what stays on.
    pub inverter_to_board: Metres,
    /// Mains to inverter.
    pub mains_to_inverter: Metres,
    /// Separate charger to the bank, where there is one.
    pub charger_to_bank: Option<Metres>,
}

/// Capacity of one battery block at one rate.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct BatteryRating {
    /// The rate: hours to empty.
    pub hours: Hours,
    /// Charge delivered at that rate.
    pub capacity: AmpHours,
}

/// An inverter that is there and is to be used again.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ReusedInverter {
    /// Rating in VA.
    pub rating: VoltAmps,
    /// Rating in W, if the plate has one.
    pub rating_w: Option<Watts>,
    /// Largest start it bears, if known.
    pub surge: Option<VoltAmps>,
    /// Whether it makes a sine.
    pub sine: bool,
    /// Break at changeover, if known.
    pub changeover: Option<Milliseconds>,
    /// Mains window, if known: lowest and highest.
    pub mains_window: Option<(AcVolts, AcVolts)>,
}
