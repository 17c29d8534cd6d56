//! Every finding as a sentence, and its cure.

mod bank;
mod cables;
mod charger;
mod place;
mod played;
mod starts;
mod unit;

use super::numbers::Numbers;
use crate::sizing::Finding;
use crate::units::{
    AcVolts, AmpHours, Amps, Celsius, DcVolts, Kiloamps, Metres, Milliseconds, OhmsPerKilometre, Seconds, VoltAmps,
    Watts,
};

/// A finding in words.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Told {
    /// Its name in files.
    pub code: &'static str,
    /// What is the matter, with its figures.
    pub text: String,
    /// What to do about it.
    pub cure: &'static str,
}

/// A quantity with its unit.
trait Figure {
    fn told(self) -> String;
}

macro_rules! figures {
    ($($type:ident)*) => { $(impl Figure for $type {
        fn told(self) -> String { Numbers::default().with_unit(self.0, $type::SYMBOL) }
    })* };
}

figures!(VoltAmps Watts Amps AmpHours AcVolts DcVolts Seconds Milliseconds Celsius Kiloamps Metres OhmsPerKilometre);

fn percent(share: f64) -> String {
    Numbers::default().percent(share)
}

/// The sentence and the cure of a finding.
pub fn finding(finding: &Finding) -> Told {
    use Finding::*;
    match finding {
        MotorWillNotStart { load, needed, available } => starts::motor_will_not_start(load, *needed, *available),
        MotorStartMarginal { load, needed, available } => starts::motor_start_marginal(load, *needed, *available),
        SurgeTooShort { load, lasts, held } => starts::surge_too_short(load, *lasts, *held),
        RestartTogetherTooMuch { together, staggered, available } => {
            starts::restart_together_too_much(*together, *staggered, *available)
        }
        BankSagsAtStart { load, lowest, cut_off } => starts::bank_sags_at_start(load, *lowest, *cut_off),
        NoInverterFits { needed, largest } => unit::no_inverter_fits(*needed, *largest),
        ReusedInverterTooSmall { needed, there } => unit::reused_inverter_too_small(*needed, *there),
        MainsOutsideNarrowWindow { lowest, highest, window } => {
            unit::mains_window_too_narrow(*lowest, *highest, *window)
        }
        MainsOutsideWideWindow { lowest, highest, window } => {
            unit::mains_outside_wide_window(*lowest, *highest, *window)
        }
        ChangeoverTooSlow { load, bears, breaks } => unit::changeover_too_slow(load, *bears, *breaks),
        SquareWaveRefused { load, reused } => unit::square_wave_refused(load, *reused),
        SquareWaveDisliked { load } => unit::square_wave_disliked(load),
        MedicalLoad { load, kind } => bank::medical_load(load, *kind),
        BusTooLow { bus, current, limit } => bank::bus_volts_too_low(*bus, *current, *limit),
        CurrentAboveCable { current, limit } => bank::battery_current_too_high(*current, *limit),
        ManyStrings { strings, good } => bank::many_strings(*strings, *good),
        TooManyStrings { strings, most } => bank::too_many_strings(*strings, *most),
        RatingsContradict { slow, fast } => bank::ratings_contradict(*slow, *fast),
        TypicalRatings { peukert } => bank::typical_ratings(*peukert),
        TemperatureOutsideTable { given, lowest, highest } => {
            place::temperature_outside_table(*given, *lowest, *highest)
        }
        OutsideRatings { hours, shortest, longest } => bank::outside_ratings(*hours, *shortest, *longest),
        OutsideMethod { what, given, lowest, highest, unit } => {
            bank::outside_method(what, *given, *lowest, *highest, unit)
        }
        CannotRefill { needs, has, charger_needed } => charger::cannot_refill(*needs, *has, *charger_needed),
        NoMains => charger::no_mains(),
        ChargerTooStrong { current, most } => charger::charger_too_strong(*current, *most),
        ChargerTooWeak { current, least } => charger::charger_too_weak(*current, *least),
        IncomingBreakerTooSmall { current, breaker } => charger::incoming_breaker_too_small(*current, *breaker),
        DropAboveTarget { run, share, target } => cables::drop_above_target(*run, *share, *target),
        DropAboveLimit { run, share, limit } => cables::drop_above_limit(*run, *share, *limit),
        NoCableFits { run, current, length } => cables::no_cable_fits(*run, *current, *length),
        NoFuseFits { run, current, capacity } => cables::no_fuse_fits(*run, *current, *capacity),
        BreakingCapacityTooSmall { run, fault, breaks } => cables::breaking_capacity_too_small(*run, *fault, *breaks),
        FaultHeatsCable { run, fault } => cables::fault_heats_cable(*run, *fault),
        AmbientOutsideTable { run, ambient, highest } => cables::ambient_outside_table(*run, *ambient, *highest),
        StringsUneven { worst_over_mean } => cables::strings_uneven(*worst_over_mean),
        LithiumInTheCold { coldest } => charger::lithium_in_the_cold(*coldest),
        BatteryTooHot { hottest, limit } => charger::battery_too_hot(*hottest, *limit),
        FloodedWithoutAir { opening_cm2 } => place::flooded_without_air(*opening_cm2),
        SealedWithoutAir { opening_cm2 } => place::sealed_without_air(*opening_cm2),
        NoLoadDrawHeavy { draw, share } => unit::no_load_draw_heavy(*draw, *share),
        NoAluminium { run, smallest_mm2 } => cables::no_aluminium(*run, *smallest_mm2),
        FaultCurrentNeedsMaker { estimate } => cables::fault_current_needs_maker(*estimate),
        FuseSlowOnAgedBank { run, gives, opens_at } => cables::fuse_slow_on_aged_bank(*run, *gives, *opens_at),
        BreakerSlowOnBattery { run, gives, trips_at } => cables::breaker_slow_on_battery(*run, *gives, *trips_at),
        ConductorOutsideTable { run, resistance } => cables::conductor_outside_table(*run, *resistance),
        CodeLetterOpen { load } => starts::code_letter_open(load),
        RatingsNotKinetic { peukert } => played::ratings_not_kinetic(*peukert),
        CutNotHeld { lasts, asked } => played::cut_not_held(*lasts, *asked),
        MethodsDiffer { by_formula, played } => played::methods_differ(*by_formula, *played),
        StartFailsLate { load, at, lowest, cut_off } => played::start_fails_late(load, *at, *lowest, *cut_off),
        SlowlyLosing { missing_hours, missing_current } => played::slowly_losing(*missing_hours, *missing_current),
        NeverRecovers { missing_hours, missing_current } => played::never_recovers(*missing_hours, *missing_current),
    }
}

#[cfg(test)]
mod tests;
