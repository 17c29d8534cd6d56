//! Worked starts.

use super::*;
use crate::sizing::design::{Methods, RulingMethod};
use crate::sizing::load_survey::example::*;
use crate::sizing::survey::StartKind::*;
use crate::sizing::survey::*;
use crate::units::*;

fn volt_amperes(load: &Load) -> Option<f64> {
    let survey = survey(vec![]);
    let assumptions = Assumptions::defaults(Chemistry::FloodedTubular);
    start_power(load, &survey.site, &assumptions).map(|power| power.apparent().0)
}

#[test]
fn what_the_plate_says_goes_before_the_multiple() {
    let pump = motor("Pump", 600.0, 0.75, 6.0);
    // plate, VA, where from
    let cases = [
        (None, 4800.0, "six times 800 VA"),
        (Some(MotorPlate::LockedRotor(Amps(20.0))), 4600.0, "20 A at 230 V"),
        (Some(MotorPlate::CodeLetter { horsepower: 0.5, letter: 'K' }), 4495.0, "NEC 430.7(B): 0.5 × 8.99 kVA"),
        (Some(MotorPlate::Horsepower(0.5)), 6762.0, "NEC 430.251(A): 29.4 A at 230 V"),
    ];
    for (motor_plate, va, source) in cases {
        let start = volt_amperes(&Load { motor_plate, ..pump.clone() }).expect("a motor starts");
        assert!((start - va).abs() < 1e-9, "{start} VA instead of {va}; {source}");
    }
}

#[test]
fn only_what_draws_more_than_running_has_a_start() {
    // kind, multiple, VA of the start of 100 W at 0.8
    let cases = [
        (Resistive, 8.0, None),
        (Electronic, 1.0, None),
        (Electronic, 1.5, Some(187.5)),
        (Transformer, 3.0, Some(375.0)),
        (Compressor, 1.0, None),
        (MotorPsc, 2.0, Some(250.0)),
        (UniversalMotor, 3.0, Some(375.0)),
    ];
    for (kind, surge_multiple, va) in cases {
        let start = volt_amperes(&Load { surge_multiple, ..load("Load", 100.0, 0.8, kind) });
        assert_eq!(start.map(|start| (start * 1e6).round() / 1e6), va, "{kind:?}");
    }
    let heater = Load { surge_multiple: 1.8, ..load("Heater", 1500.0, 1.0, HeaterPtc) };
    assert_eq!(volt_amperes(&heater), Some(2700.0));
}

/// A bank of 12 V behind 10 mΩ and a unit without losses.
fn bank(open_circuit: f64, cut_off: f64) -> Bank {
    let none = AmpHours(0.0);
    Bank {
        bus: BusVolts::V12,
        required: none,
        rated: Hours(20.0),
        block: none,
        blocks_in_series: 1,
        strings: 1,
        installed: none,
        peukert_exponent: 1.2,
        depth_of_discharge_max: 0.5,
        depth_of_discharge: 0.5,
        temperature_factor: 1.0,
        methods: Methods { peukert: none, section: none, kibam: None },
        ruled_by: RulingMethod::Peukert,
        peak_current: Amps(0.0),
        cut_off: DcVolts(cut_off),
        aged_resistance: Ohms(0.010),
        end_open_circuit: DcVolts(open_circuit),
        weight: Kilograms(0.0),
        outage: none,
    }
}

fn unit(surge: f64) -> Inverter {
    let example = crate::sizing::battery_bank::example::inverter(Watts(500.0));
    let losses =
        crate::sizing::design::Losses { no_load: Watts(0.0), linear: 0.0, quadratic: 0.0, rated: Watts(800.0) };
    Inverter { rating: VoltAmps(1000.0), rating_w: Watts(800.0), surge: VoltAmps(surge), losses, ..example }
}

/// Starts of a survey's motors on a strong bank, or on the one given.
fn starts_on(survey: &Survey, unit: &Inverter, bank: &Bank) -> (Vec<MotorStart>, Vec<Finding>) {
    let (demand, mut sheet) = demand_of(survey);
    let assumptions = Assumptions::defaults(survey.choice.chemistry);
    let starts = starts(survey, &demand, unit, bank, &[], &assumptions, &mut sheet);
    (starts, sheet.findings)
}

fn strong() -> Bank {
    Bank { aged_resistance: Ohms(0.0), ..bank(12.2, 10.5) }
}

#[test]
fn a_motor_starts_or_may_start_or_stays_where_it_is() {
    // A fridge of 140 W at 0.7 starts at 1000 VA with nothing beside it.
    let survey = survey(vec![motor("Fridge", 140.0, 0.7, 5.0)]);
    let (load, needed) = (String::from("Fridge"), VoltAmps(1000.0));
    for (surge, verdict) in [
        (2000.0, StartVerdict::Starts),
        (1000.001, StartVerdict::Starts),
        (990.0, StartVerdict::Marginal),
        (751.0, StartVerdict::Marginal),
        (749.0, StartVerdict::WillNotStart),
    ] {
        let (starts, findings) = starts_on(&survey, &unit(surge), &strong());
        assert_eq!(starts[0].verdict, verdict, "{surge} VA");
        assert!((starts[0].needed.0 - needed.0).abs() < 1e-9);
        let available = VoltAmps(surge);
        let expected = match verdict {
            StartVerdict::Starts => vec![],
            StartVerdict::Marginal => {
                vec![Finding::MotorStartMarginal { load: load.clone(), needed: starts[0].needed, available }]
            }
            StartVerdict::WillNotStart => {
                vec![Finding::MotorWillNotStart { load: load.clone(), needed: starts[0].needed, available }]
            }
        };
        assert_eq!(findings, expected, "{surge} VA");
    }
}

#[test]
fn what_runs_beside_a_start_leaves_less_for_it() {
    // 300 W of heat beside it: three quarters of 1000 VA at 0.7 make |300 + 525, 535.6| = 983.6 VA.
    let survey = survey(vec![load("Heater", 300.0, 1.0, Resistive), motor("Fridge", 140.0, 0.7, 5.0)]);
    let verdict = |surge| starts_on(&survey, &unit(surge), &strong()).0[0].verdict;
    assert_eq!(verdict(984.0), StartVerdict::Marginal);
    assert_eq!(verdict(983.0), StartVerdict::WillNotStart);
}

#[test]
fn a_start_longer_than_the_surge_is_held_must_fit_the_rating() {
    let long = |multiple| Load { surge_lasts: Seconds(8.0), ..motor("Compressor", 140.0, 0.7, multiple) };
    let (starts, findings) = starts_on(&survey(vec![long(6.0)]), &unit(2000.0), &strong());
    assert_eq!(starts[0].verdict, StartVerdict::WillNotStart);
    let load = String::from("Compressor");
    assert_eq!(findings, [Finding::SurgeTooShort { load, lasts: Seconds(8.0), held: Seconds(5.0) }]);
    let (starts, _) = starts_on(&survey(vec![long(4.0)]), &unit(2000.0), &strong());
    assert_eq!(starts[0].verdict, StartVerdict::Starts, "800 VA are within the rating of 1000 VA");
    let hot = Inverter { derating: share(0.7), ..unit(2000.0) };
    let (starts, _) = starts_on(&survey(vec![long(4.0)]), &hot, &strong());
    assert_eq!(starts[0].verdict, StartVerdict::WillNotStart, "heat leaves 700 VA");
}

#[test]
fn a_weak_bank_lets_a_motor_down_that_the_unit_would_start() {
    // By hand, 12 V behind 10 mΩ, P = 0.7 · S: V = 6 + √(36 − 0.01·P).
    // open circuit V, start VA, volts left, verdict at a cut-off of 10.5 V
    let cases = [
        (12.0, 1000.0, 6.0 + f64::sqrt(36.0 - 7.0), StartVerdict::Starts),
        (12.0, 2500.0, 6.0 + f64::sqrt(36.0 - 17.5), StartVerdict::WillNotStart),
        (12.0, 6000.0, 6.0, StartVerdict::WillNotStart),
    ];
    for (open, start, volts, verdict) in cases {
        let survey = survey(vec![motor("Pump", 140.0, 0.7, start / 200.0)]);
        let (starts, findings) = starts_on(&survey, &unit(9000.0), &bank(open, 10.5));
        assert!((starts[0].lowest.0 - volts).abs() < 1e-9, "{start} VA: {:?}", starts[0].lowest);
        assert_eq!(starts[0].verdict, verdict, "{start} VA");
        let sags =
            findings.iter().any(|finding| matches!(finding, Finding::BankSagsAtStart { load, .. } if load == "Pump"));
        assert_eq!(sags, verdict == StartVerdict::WillNotStart);
    }
}

#[test]
fn a_longer_cable_leaves_fewer_volts() {
    let survey = survey(vec![motor("Pump", 140.0, 0.7, 5.0)]);
    let (demand, mut sheet) = demand_of(&survey);
    let assumptions = Assumptions::defaults(survey.choice.chemistry);
    let mut volts = |milliohms: f64| {
        let bank = Bank { aged_resistance: Ohms(0.010 + milliohms / 1000.0), ..bank(12.2, 10.5) };
        starts(&survey, &demand, &unit(2000.0), &bank, &[], &assumptions, &mut sheet)[0].lowest
    };
    assert!(volts(0.0) > volts(1.0) && volts(1.0) > volts(5.0));
}

#[test]
fn all_together_is_a_warning_where_one_after_the_other_would_do() {
    let survey = survey(vec![motor("Fridge", 140.0, 0.7, 5.0), motor("Freezer", 140.0, 0.7, 5.0)]);
    let restart = |surge| {
        let (starts, findings) = starts_on(&survey, &unit(surge), &strong());
        assert!(starts.iter().all(|start| start.verdict == StartVerdict::Starts));
        findings.iter().any(|finding| matches!(finding, Finding::RestartTogetherTooMuch { .. }))
    };
    assert!(restart(1500.0), "1200 VA one at a time, 2000 VA together");
    assert!(!restart(2100.0));
}

#[test]
fn motors_are_listed_in_the_order_of_the_survey_and_nothing_else_is() {
    let heater = Load { surge_multiple: 1.8, ..load("Heater", 500.0, 1.0, HeaterPtc) };
    let loads = vec![motor("Pump", 300.0, 0.7, 5.0), heater, motor("Fridge", 100.0, 0.7, 5.0)];
    let (starts, _) = starts_on(&survey(loads), &unit(9000.0), &strong());
    let names: Vec<_> = starts.iter().map(|start| start.load.as_str()).collect();
    assert_eq!(names, ["Pump", "Fridge"]);
}

#[test]
fn every_figure_of_a_start_stands_on_the_sheet() {
    let survey = survey(vec![motor("Fridge", 140.0, 0.7, 5.0)]);
    let (demand, mut sheet) = demand_of(&survey);
    let assumptions = Assumptions::defaults(survey.choice.chemistry);
    let starts = starts(&survey, &demand, &unit(2000.0), &strong(), &[], &assumptions, &mut sheet);
    crate::sizing::battery_bank::example::assert_on_sheet("starts.Fridge", &starts[0], &sheet);
}
