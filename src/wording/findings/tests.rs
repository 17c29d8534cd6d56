use std::collections::BTreeSet;

use super::*;
use crate::sizing::design::Run;
use crate::sizing::survey::{BusVolts, LifeSupport};
use crate::units::Hours;

/// One of each kind, with something that its text must say.
#[rustfmt::skip]
fn samples() -> Vec<(Finding, &'static str)> {
    use Finding::*;
    let load = || "Well pump".to_owned();
    let run = Run::BankToInverter;
    let (needed, available) = (VoltAmps(4800.0), VoltAmps(3000.0));
    let window = (AcVolts(190.0), AcVolts(250.0));
    let (lowest, highest) = (AcVolts(150.0), AcVolts(270.0));
    vec![
        (MotorWillNotStart { load: load(), needed, available }, "4,800\u{a0}VA"),
        (MotorStartMarginal { load: load(), needed, available }, "3,000\u{a0}VA"),
        (SurgeTooShort { load: load(), lasts: Seconds(8.0), held: Seconds(5.0) }, "8\u{a0}s"),
        (RestartTogetherTooMuch { together: needed, staggered: VoltAmps(2000.0), available }, "2,000\u{a0}VA"),
        (BankSagsAtStart { load: load(), lowest: DcVolts(10.2), cut_off: DcVolts(10.5) }, "10.2\u{a0}V"),
        (CodeLetterOpen { load: load() }, "Well pump"),
        (RatingsNotKinetic { peukert: 1.2 }, "1.2"),
        (CutNotHeld { lasts: Hours(2.5), asked: Hours(4.0) }, "4\u{a0}h"),
        (MethodsDiffer { by_formula: AmpHours(200.0), played: AmpHours(150.0) }, "150\u{a0}Ah"),
        (StartFailsLate { load: load(), at: Hours(3.0), lowest: DcVolts(10.2), cut_off: DcVolts(10.5) }, "10.2\u{a0}V"),
        (SlowlyLosing { missing_hours: Hours(1.5), missing_current: Some(Amps(8.0)) }, "8\u{a0}A"),
        (NeverRecovers { missing_hours: Hours(1.5), missing_current: None }, "no charging current"),
        (NoInverterFits { needed: VoltAmps(12_000.0), largest: VoltAmps(10_000.0) }, "12,000\u{a0}VA"),
        (ReusedInverterTooSmall { needed, there: available }, "3,000\u{a0}VA"),
        (MainsOutsideNarrowWindow { lowest, highest, window }, "150\u{a0}V"),
        (MainsOutsideWideWindow { lowest, highest, window }, "270\u{a0}V"),
        (ChangeoverTooSlow { load: load(), bears: Milliseconds(20.0), breaks: Milliseconds(45.0) }, "45\u{a0}ms"),
        (SquareWaveRefused { load: load(), reused: true }, "unit that is there"),
        (SquareWaveRefused { load: load(), reused: false }, "sine unit was chosen"),
        (SquareWaveDisliked { load: load() }, "Well pump"),
        (MedicalLoad { load: load(), kind: LifeSupport::Yes }, "No hours are promised"),
        (NoLoadDrawHeavy { draw: Watts(20.0), share: 0.3 }, "20\u{a0}W"),
        (BusTooLow { bus: BusVolts::V12, current: Amps(120.0), limit: Amps(100.0) }, "120\u{a0}A"),
        (CurrentAboveCable { current: Amps(180.0), limit: Amps(150.0) }, "150\u{a0}A"),
        (ManyStrings { strings: 4, good: 3 }, "4 strings"),
        (TooManyStrings { strings: 6, most: 4 }, "6 strings"),
        (RatingsContradict { slow: (Hours(20.0), AmpHours(100.0)), fast: (Hours(10.0), AmpHours(110.0)) }, "110\u{a0}Ah"),
        (TypicalRatings { peukert: 1.2 }, "1.2"),
        (TemperatureOutsideTable { given: Celsius(-20.0), lowest: Celsius(-3.9), highest: Celsius(25.0) }, "25\u{a0}°C"),
        (OutsideRatings { hours: Hours(0.5), shortest: Hours(1.0), longest: Hours(20.0) }, "20"),
        (OutsideMethod { what: "derating by height", given: 5000.0, lowest: 0.0, highest: 4000.0, unit: "m" }, "5,000\u{a0}m"),
        (CannotRefill { needs: Hours(9.0), has: Hours(6.0), charger_needed: Amps(40.0) }, "9"),
        (CannotRefill { needs: Hours(9.0), has: Hours(0.2), charger_needed: Amps(0.0) }, "9"),
        (NoMains, "no mains hours"),
        (ChargerTooStrong { current: Amps(60.0), most: Amps(30.0) }, "30\u{a0}A"),
        (ChargerTooWeak { current: Amps(5.0), least: Amps(15.0) }, "15\u{a0}A"),
        (IncomingBreakerTooSmall { current: Amps(40.0), breaker: Amps(32.0) }, "32\u{a0}A"),
        (LithiumInTheCold { coldest: Celsius(-5.0) }, "°C"),
        (BatteryTooHot { hottest: Celsius(55.0), limit: Celsius(45.0) }, "55\u{a0}°C"),
        (DropAboveTarget { run, share: 0.025, target: 0.02 }, "2.5\u{a0}%"),
        (DropAboveLimit { run, share: 0.08, limit: 0.05 }, "8\u{a0}%"),
        (NoCableFits { run, current: Amps(900.0), length: Metres(20.0) }, "20\u{a0}m"),
        (NoFuseFits { run, current: Amps(900.0), capacity: Amps(800.0) }, "800\u{a0}A"),
        (BreakingCapacityTooSmall { run, fault: Kiloamps(60.0), breaks: Kiloamps(20.0) }, "60\u{a0}kA"),
        (FaultHeatsCable { run, fault: Kiloamps(6.0) }, "6\u{a0}kA"),
        (AmbientOutsideTable { run, ambient: Celsius(65.0), highest: Celsius(60.0) }, "65\u{a0}°C"),
        (StringsUneven { worst_over_mean: 1.1 }, "110\u{a0}%"),
        (NoAluminium { run, smallest_mm2: 25.0 }, "25\u{a0}mm²"),
        (ConductorOutsideTable { run, resistance: OhmsPerKilometre(0.05) }, "Ω/km"),
        (FaultCurrentNeedsMaker { estimate: Kiloamps(4.0) }, "4\u{a0}kA"),
        (FuseSlowOnAgedBank { run, gives: Amps(400.0), opens_at: Amps(500.0) }, "500\u{a0}A"),
        (BreakerSlowOnBattery { run, gives: Amps(9.0), trips_at: Amps(100.0) }, "100\u{a0}A"),
        (FloodedWithoutAir { opening_cm2: 40.0 }, "40\u{a0}cm²"),
        (SealedWithoutAir { opening_cm2: 20.0 }, "20\u{a0}cm²"),
    ]
}

#[test]
fn every_finding_is_a_whole_sentence_with_a_cure() {
    for (example, _) in samples() {
        let Told { code, text, cure } = finding(&example);
        assert!(
            text.starts_with(char::is_uppercase)
                || text.starts_with(|c: char| c.is_ascii_digit())
                || text.starts_with('−'),
            "{code}: {text}"
        );
        for sentence in [text.as_str(), cure] {
            assert!(sentence.ends_with('.') && !sentence.ends_with(".."), "{code}: {sentence}");
            assert!(!sentence.contains(['{', '}', '_']) && !sentence.contains("  "), "{code}: {sentence}");
        }
        assert!(cure.starts_with(char::is_uppercase), "{code}: {cure}");
    }
}

#[test]
fn figures_are_told_with_their_units() {
    for (example, says) in samples() {
        let told = finding(&example);
        assert!(told.text.contains(says), "{}: {} does not say {says}", told.code, told.text);
    }
}

#[test]
fn the_samples_hold_every_finding_and_no_two_share_a_code() {
    let files = [
        include_str!("bank.rs"),
        include_str!("cables.rs"),
        include_str!("charger.rs"),
        include_str!("place.rs"),
        include_str!("played.rs"),
        include_str!("starts.rs"),
        include_str!("unit.rs"),
    ];
    let written: usize = files.iter().map(|file| file.matches("code: \"").count()).sum();
    let codes: BTreeSet<_> = samples().iter().map(|(example, _)| finding(example).code).collect();
    assert_eq!(codes.len(), written, "{codes:?}");
    assert!(codes.iter().all(|code| code.bytes().all(|byte| byte.is_ascii_lowercase() || byte == b'_')));
}
