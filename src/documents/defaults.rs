//! What holds where a survey says nothing. An answer names every default it took.

use crate::sizing::survey::{
    Chemistry, Choice, Code, Conductor, Insulation, LifeSupport, Method, NeedsSine, Runs, Site, StartKind,
};
use crate::units::{AcVolts, Amps, Celsius, Hertz, Hours, Metres};

/// What is usual of a kind of start: power factor, start over running VA, its seconds, whether it
/// wants a sine, and the break it rides through in ms.
///
/// Common practice, no source; the middle of the built-in appliances of each kind.
pub struct Usual {
    /// True power factor.
    pub power_factor: f64,
    /// Starting VA over running VA.
    pub surge_multiple: f64,
    /// Length of the start in s.
    pub surge_s: f64,
    /// Whether it wants a sine.
    pub needs_sine: NeedsSine,
    /// Longest break in ms.
    pub max_break_ms: f64,
}

/// What is usual of a kind of start.
pub fn usual(start: StartKind) -> Usual {
    use NeedsSine::{No, Prefers};
    let (power_factor, surge_multiple, surge_s, needs_sine, max_break_ms) = match start {
        StartKind::Resistive => (1.0, 1.0, 0.0, No, 10_000.0),
        StartKind::Electronic => (0.6, 1.0, 0.0, No, 20.0),
        StartKind::MotorPsc => (0.9, 2.5, 2.0, Prefers, 2000.0),
        StartKind::MotorCapStart => (0.75, 6.0, 1.0, Prefers, 60_000.0),
        StartKind::MotorSplitPhase => (0.7, 5.0, 0.7, Prefers, 2000.0),
        StartKind::Compressor => (0.7, 6.0, 0.5, Prefers, 60_000.0),
        StartKind::UniversalMotor => (0.9, 3.0, 0.7, Prefers, 5000.0),
        StartKind::Transformer => (0.9, 3.0, 0.1, Prefers, 200.0),
        StartKind::HeaterPtc => (1.0, 1.8, 20.0, No, 10_000.0),
    };
    Usual { power_factor, surge_multiple, surge_s, needs_sine, max_break_ms }
}

/// A load starts like a plain resistance unless it is said otherwise.
pub const START: StartKind = StartKind::Resistive;
/// Nothing hangs on a load unless it is said otherwise.
pub const LIFE_SUPPORT: LifeSupport = LifeSupport::No;
/// Cuts in a week: one a day.
pub const CUTS_PER_WEEK: f64 = 7.0;

/// A site in a temperate town on 230 V; the supply as EN 50160 lets it be, less at the top.
pub fn site() -> Site {
    Site {
        name: String::new(),
        supply: AcVolts(230.0),
        frequency: Hertz(50.0),
        supply_lowest: AcVolts(207.0),
        supply_highest: AcVolts(248.0),
        battery_coldest: Celsius(15.0),
        battery_hottest: Celsius(35.0),
        inverter_ambient: Celsius(35.0),
        altitude: Metres(0.0),
        incoming_breaker: Amps(32.0),
        battery_room_vented: true,
    }
}

/// Lowest supply over nominal where it was not measured.
pub const LOWEST_OVER_NOMINAL: f64 = 0.9;
/// Highest supply over nominal where it was not measured.
pub const HIGHEST_OVER_NOMINAL: f64 = 1.08;

/// Tubular lead-acid on copper leads in free air; the board's cables in conduit.
pub const CHOICE: Choice = Choice {
    chemistry: Chemistry::FloodedTubular,
    bus: None,
    code: Code::Iec,
    conductor: Conductor::Copper,
    insulation: Insulation::Xlpe90,
    method: Method::F,
    ac_method: Method::B1,
    square_wave_offered: false,
};

/// Lengths of an ordinary room.
pub const RUNS: Runs = Runs {
    bank_to_inverter: Metres(2.0),
    string_lead: Metres(0.5),
    inverter_to_board: Metres(8.0),
    mains_to_inverter: Metres(8.0),
    charger_to_bank: None,
};

/// The rest of the time between one cut and the next.
pub fn mains_between_cuts(cuts_per_week: f64, autonomy: Hours) -> Hours {
    const HOURS_IN_WEEK: f64 = 168.0;
    let apart = if cuts_per_week > 0.0 { HOURS_IN_WEEK / cuts_per_week } else { HOURS_IN_WEEK };
    Hours((apart - autonomy.0).max(0.0))
}
