//! What the installer must hear about a design that was nevertheless computed.
//!
//! A finding carries data, not prose: `crate::wording` makes the sentence with its cure.

use crate::units::{
    AcVolts, AmpHours, Amps, Celsius, DcVolts, Hours, Kiloamps, Metres, Milliseconds, OhmsPerKilometre, Seconds,
    VoltAmps, Watts,
};

use super::design::Run;
use super::survey::{BusVolts, LifeSupport};

/// How much a finding weighs.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord, serde::Serialize)]
#[serde(rename_all = "snake_case")]
pub enum Severity {
    /// Good to know.
    Note,
    /// Doubtful: the installer decides.
    Warn,
    /// Unsafe or does not work: no quote is sent.
    Stop,
}

/// Something the installer must hear.
#[derive(Clone, Debug, PartialEq)]
#[allow(missing_docs, reason = "the fields are named by what they hold")]
pub enum Finding {
    /// The unit cannot give a motor's starting current.
    MotorWillNotStart { load: String, needed: VoltAmps, available: VoltAmps },
    /// The unit gives only part of a motor's starting current.
    MotorStartMarginal { load: String, needed: VoltAmps, available: VoltAmps },
    /// A start lasts longer than the unit holds its surge.
    SurgeTooShort { load: String, lasts: Seconds, held: Seconds },
    /// All motors restarting together ask more than the unit gives; staggered they do not.
    RestartTogetherTooMuch { together: VoltAmps, staggered: VoltAmps, available: VoltAmps },
    /// The bank sags below the cut-off when a motor starts.
    BankSagsAtStart { load: String, lowest: DcVolts, cut_off: DcVolts },
    /// The peak running load is above what the trade's largest unit carries.
    NoInverterFits { needed: VoltAmps, largest: VoltAmps },
    /// The unit to be used again is too small.
    ReusedInverterTooSmall { needed: VoltAmps, there: VoltAmps },
    /// The mains leaves the unit's narrow window: it would live on battery, or its wide window with the slow changeover must be set.
    MainsOutsideNarrowWindow { lowest: AcVolts, highest: AcVolts, window: (AcVolts, AcVolts) },
    /// The mains leaves even the wide window: in those hours the bank is never recharged.
    MainsOutsideWideWindow { lowest: AcVolts, highest: AcVolts, window: (AcVolts, AcVolts) },
    /// The break at changeover is longer than a load rides through.
    ChangeoverTooSlow { load: String, bears: Milliseconds, breaks: Milliseconds },
    /// A square wave is refused by a load: a sine is fitted, unless the unit that makes it is to be used again.
    SquareWaveRefused { load: String, reused: bool },
    /// A square wave on offer is borne, but not liked, by a load.
    SquareWaveDisliked { load: String },
    /// A life, a treatment or a product hangs on a load.
    MedicalLoad { load: String, kind: LifeSupport },
    /// The volts of the bank are too low for the power.
    BusTooLow { bus: BusVolts, current: Amps, limit: Amps },
    /// The battery current is too much for one cable: several lie in parallel.
    CurrentAboveCable { current: Amps, limit: Amps },
    /// More strings in parallel than is good practice.
    ManyStrings { strings: u32, good: u32 },
    /// More strings in parallel than is ever allowed.
    TooManyStrings { strings: u32, most: u32 },
    /// Two ratings of a battery contradict each other; the chemistry's typical ones were used.
    RatingsContradict { slow: (Hours, AmpHours), fast: (Hours, AmpHours) },
    /// No rating was given: the chemistry's typical ones were used.
    TypicalRatings { peukert: f64 },
    /// A temperature is outside the table: the nearest row was used.
    TemperatureOutsideTable { given: Celsius, lowest: Celsius, highest: Celsius },
    /// A current or time is outside the ratings the method was fitted to.
    OutsideRatings { hours: Hours, shortest: Hours, longest: Hours },
    /// The method's range ends before the value asked for.
    OutsideMethod { what: &'static str, given: f64, lowest: f64, highest: f64, unit: &'static str },
    /// The bank cannot be full again in the mains hours there are.
    CannotRefill { needs: Hours, has: Hours, charger_needed: Amps },
    /// There is no mains to recharge from.
    NoMains,
    /// The charger needed is above what the bank bears.
    ChargerTooStrong { current: Amps, most: Amps },
    /// The charger is below what the bank wants.
    ChargerTooWeak { current: Amps, least: Amps },
    /// Load and charger together overload the incoming breaker.
    IncomingBreakerTooSmall { current: Amps, breaker: Amps },
    /// The drop is above the target but below the limit.
    DropAboveTarget { run: Run, share: f64, target: f64 },
    /// The drop is above the limit.
    DropAboveLimit { run: Run, share: f64, limit: f64 },
    /// No cable of the table carries the current or keeps the drop.
    NoCableFits { run: Run, current: Amps, length: Metres },
    /// No fuse or breaker of the trade protects the cable.
    NoFuseFits { run: Run, current: Amps, capacity: Amps },
    /// The fault current is above what the device breaks.
    BreakingCapacityTooSmall { run: Run, fault: Kiloamps, breaks: Kiloamps },
    /// The cable does not bear the fault until the device clears it.
    FaultHeatsCable { run: Run, fault: Kiloamps },
    /// The wiring code's ambient table ends below this temperature.
    AmbientOutsideTable { run: Run, ambient: Celsius, highest: Celsius },
    /// The strings share the current unevenly: the worst one's over the mean, above one.
    StringsUneven { worst_over_mean: f64 },
    /// Lithium must not be charged below freezing.
    LithiumInTheCold { coldest: Celsius },
    /// The place is hotter than the battery may be charged at.
    BatteryTooHot { hottest: Celsius, limit: Celsius },
    /// A flooded bank in a room without air.
    FloodedWithoutAir { opening_cm2: f64 },
    /// A sealed bank in a room without air.
    SealedWithoutAir { opening_cm2: f64 },
    /// The no-load draw takes a large share of the bank.
    NoLoadDrawHeavy { draw: Watts, share: f64 },
    /// Aluminium was asked for and is not made as a flexible battery lead: copper was taken for this run.
    NoAluminium { run: Run, smallest_mm2: f64 },
    /// A lithium bank's fault current does not follow from its capacity: the maker's figure is needed.
    FaultCurrentNeedsMaker { estimate: Kiloamps },
    /// The aged bank at the end of a cut gives less than what opens the fuse within seconds.
    FuseSlowOnAgedBank { run: Run, gives: Amps, opens_at: Amps },
    /// On battery the unit gives less than what trips the breaker at once: the unit's own shutdown must end a fault.
    BreakerSlowOnBattery { run: Run, gives: Amps, trips_at: Amps },
    /// The chosen conductor's resistance is outside what the table covers.
    ConductorOutsideTable { run: Run, resistance: OhmsPerKilometre },
    /// A code letter without an upper end.
    CodeLetterOpen { load: String },
    /// Three or more ratings follow no kinetic battery: the cut was played with the exponent.
    RatingsNotKinetic { peukert: f64 },
    /// The bank does not last the cut when it is played through.
    CutNotHeld { lasts: Hours, asked: Hours },
    /// Formula and play-through ask for different capacities.
    MethodsDiffer { by_formula: AmpHours, played: AmpHours },
    /// A motor starts at first but no more at the end of the cut.
    StartFailsLate { load: String, at: Hours, lowest: DcVolts, cut_off: DcVolts },
    /// The bank is not full before every cut.
    SlowlyLosing { missing_hours: Hours, missing_current: Option<Amps> },
    /// The bank is never full again.
    NeverRecovers { missing_hours: Hours, missing_current: Option<Amps> },
}

impl Finding {
    /// How much it weighs; a stop keeps a quote from being sent.
    pub fn severity(&self) -> Severity {
        use Finding::*;
        match self {
            MotorWillNotStart { .. }
            | BankSagsAtStart { .. }
            | NoInverterFits { .. }
            | ReusedInverterTooSmall { .. }
            | SquareWaveRefused { reused: true, .. }
            | SurgeTooShort { .. }
            | TooManyStrings { .. }
            | NoMains
            | DropAboveLimit { .. }
            | NoCableFits { .. }
            | NoFuseFits { .. }
            | BreakingCapacityTooSmall { .. }
            | FaultHeatsCable { .. }
            | AmbientOutsideTable { .. }
            | FloodedWithoutAir { .. }
            | LithiumInTheCold { .. }
            | CutNotHeld { .. }
            | StartFailsLate { .. }
            | NeverRecovers { .. } => Severity::Stop,
            MotorStartMarginal { .. }
            | SquareWaveRefused { reused: false, .. }
            | RestartTogetherTooMuch { .. }
            | MainsOutsideNarrowWindow { .. }
            | MainsOutsideWideWindow { .. }
            | ChangeoverTooSlow { .. }
            | MedicalLoad { .. }
            | BusTooLow { .. }
            | CurrentAboveCable { .. }
            | ManyStrings { .. }
            | RatingsContradict { .. }
            | TemperatureOutsideTable { .. }
            | OutsideRatings { .. }
            | OutsideMethod { .. }
            | CannotRefill { .. }
            | ChargerTooStrong { .. }
            | ChargerTooWeak { .. }
            | IncomingBreakerTooSmall { .. }
            | DropAboveTarget { .. }
            | StringsUneven { .. }
            | BatteryTooHot { .. }
            | SealedWithoutAir { .. }
            | ConductorOutsideTable { .. }
            | NoAluminium { .. }
            | FaultCurrentNeedsMaker { .. }
            | FuseSlowOnAgedBank { .. }
            | CodeLetterOpen { .. }
            | SlowlyLosing { .. } => Severity::Warn,
            SquareWaveDisliked { .. }
            | TypicalRatings { .. }
            | NoLoadDrawHeavy { .. }
            | BreakerSlowOnBattery { .. }
            | RatingsNotKinetic { .. }
            | MethodsDiffer { .. } => Severity::Note,
        }
    }
}
