mod laws;

use super::*;
use crate::sizing::battery_bank::example;
use crate::sizing::charger;
use crate::sizing::design::{Run, StartNeed};
use crate::sizing::finding::{Finding, Severity};
use crate::sizing::load_survey::Power;
use crate::sizing::survey::{Chemistry, Conductor, Insulation, Method, StartKind};
use crate::units::{Amps, Celsius, Kiloamps, Metres, Seconds, Watts};

/// The shop, its loads, unit, bank and charger; a test changes what it is about.
#[derive(Clone, Debug)]
struct Case {
    survey: Survey,
    demand: Demand,
    inverter: Inverter,
    bank: Bank,
    charger: Charger,
    assumptions: Assumptions,
}

impl Case {
    fn shop() -> Self {
        Self::of(Chemistry::FloodedTubular)
    }

    fn of(chemistry: Chemistry) -> Self {
        let survey = example::shop(chemistry);
        let (demand, inverter) = (example::demand(), example::inverter(Watts(700.0)));
        let assumptions = Assumptions::defaults(chemistry);
        let (mut bank, mut sheet) = example::bank(&survey, &[(400.0, 2.0), (150.0, 2.0)]);
        bank.strings = 1;
        let charger = charger::plan(&survey, &demand, &inverter, &bank, &assumptions, &mut sheet);
        Self { survey, demand, inverter, bank, charger, assumptions }
    }

    /// A bank drawn at this current, all else equal.
    fn drawn_at(amps: f64) -> Self {
        let mut case = Self::shop();
        case.bank.peak_current = Amps(amps);
        case.bank.aged_resistance = crate::units::Ohms(0.001);
        case
    }

    fn nec() -> Self {
        let mut case = Self::shop();
        case.survey.choice.code = Code::Nec;
        case
    }

    fn answer(&self) -> (Vec<Cable>, Sheet) {
        let mut sheet = Sheet::default();
        let Self { survey, demand, inverter, bank, charger, assumptions } = self;
        let cables = cables(survey, demand, inverter, bank, charger, assumptions, &mut sheet);
        (cables, sheet)
    }

    fn cable(&self, run: Run) -> Cable {
        self.answer().0.into_iter().find(|cable| cable.run == run).expect("the run is there")
    }

    fn findings(&self) -> Vec<Finding> {
        self.answer().1.findings
    }
}

/// Conductors per pole, then the area of one: several thin ones carry more than a thick one of the same metal.
fn rank(cable: &Cable) -> (u32, f64) {
    let area = match cable.size.expect("a size is always named") {
        CrossSection::Metric(area) => area.0,
        CrossSection::Awg(name) => {
            crate::sizing::tables::conductors::AWG.iter().find(|row| row.name == name).expect("in the table").area.0
        }
    };
    (cable.parallel, area)
}

fn metric(cable: &Cable) -> f64 {
    match cable.size {
        Some(CrossSection::Metric(area)) => area.0,
        other => panic!("{other:?} is no metric size"),
    }
}

#[test]
fn the_shop_gets_a_cable_and_a_device_for_each_run_and_nothing_is_amiss() {
    let (cables, sheet) = Case::shop().answer();
    let runs: Vec<_> = cables.iter().map(|cable| cable.run).collect();
    assert_eq!(runs, [Run::BankToInverter, Run::InverterToBoard, Run::MainsToInverter]);
    assert!(sheet.findings.iter().all(|finding| finding.severity() == Severity::Note), "{:?}", sheet.findings);
    for cable in &cables {
        assert!(cable.fuse.expect("a device fits") >= cable.design_current, "{cable:?}");
        assert!(cable.fault_current <= cable.breaking_capacity, "{cable:?}");
        assert_eq!(cable.code, "IEC 60364");
    }
}

#[test]
fn a_battery_lead_is_sized_for_the_current_at_cut_off_by_hand() {
    let mut case = Case::drawn_at(100.0);
    case.survey.choice.insulation = Insulation::Pvc70;
    case.survey.choice.bus = None;
    case.bank.bus = crate::sizing::survey::BusVolts::V24;
    case.bank.installed = crate::units::AmpHours(200.0);
    let cable = case.cable(Run::BankToInverter);
    // By hand: 125 A fuse; F, PVC at 35 °C carries 125 A from 35 mm² (162·0.94); 2·2·100·0.554·1.1965/1000 V
    // are 1.1 % of 24 V; 4 kA for 0.1 s ask for 11 mm².
    assert_eq!((metric(&cable), cable.parallel, cable.fuse), (35.0, 1, Some(Amps(125.0))));
    assert!((cable.capacity.0 - 162.0 * 0.94).abs() < 1e-9, "{cable:?}");
    assert!((cable.voltage_drop - 0.26514).abs() < 1e-5, "{cable:?}");
    assert!((cable.voltage_drop_share - 0.26514 / 24.0).abs() < 1e-6);
    assert_eq!((cable.fault_current, cable.protective_conductor), (Kiloamps(4.0), None));
    assert!(cable.device.contains("terminal fuse") || cable.device.contains("ANL"), "{}", cable.device);
}

/// The shop with a motor that starts like this beside nothing else.
fn starting(watts: f64, volt_amps: f64) -> Case {
    let mut case = Case::drawn_at(20.0);
    let reactive = crate::units::Vars((volt_amps.powi(2) - watts.powi(2)).sqrt());
    let start = Power { real: Watts(watts), reactive, ..Power::default() };
    let (kind, lasts) = (StartKind::Compressor, Seconds(0.5));
    case.demand.starts = vec![StartNeed { row: 0, kind, lasts, rest: Power::default(), start }];
    case
}

#[test]
fn a_battery_lead_is_thick_enough_for_the_hardest_start() {
    let cable = starting(1000.0, 1400.0).cable(Run::BankToInverter);
    // By hand: 20 + 1000 + 0.12·1000²/1600 W are 1095 W, at 10.5 V 104.3 A; 5 % of 12 V leave 5.75 mΩ for 4 m:
    // 1.438 Ω/km, at 90 °C 1.128 Ω/km cold: 25 mm² with 0.795, where 20 A running ask for 10 mm² only.
    assert_eq!(metric(&cable), 25.0, "{cable:?}");
    assert!(metric(&Case::drawn_at(20.0).cable(Run::BankToInverter)) < 25.0);
}

#[test]
fn a_start_that_the_unit_cannot_give_asks_for_no_thicker_lead_than_one_it_can() {
    let (within, beyond) = (starting(2800.0, 4000.0), starting(28_000.0, 40_000.0));
    assert_eq!(within.cable(Run::BankToInverter), beyond.cable(Run::BankToInverter));
}

#[test]
fn current_and_drop_of_the_start_stand_on_the_sheet() {
    let case = starting(1000.0, 1400.0);
    let (_, sheet) = case.answer();
    let figure = |name: &str| {
        let figure = ["cables.bank_to_inverter", name].join(".");
        sheet.working.iter().find(|line| line.figure == figure).map(|line| line.result)
    };
    let current = (20.0 + 1000.0 + 0.12 * 1000.0 * 1000.0 / 1600.0) / case.bank.cut_off.0;
    assert!((figure("start_current_a").expect("a motor starts") - current).abs() < 1e-9);
    let drop = current * case.cable(Run::BankToInverter).loop_resistance.0 / 12.0;
    assert!((figure("start_drop_share").expect("a motor starts") - drop).abs() < 1e-12 && drop <= 0.05);
    let (_, still) = Case::shop().answer();
    assert!(!still.working.iter().any(|line| line.figure.contains("start_")), "nothing starts here");
}

#[test]
fn the_boards_cable_carries_what_the_unit_can_give() {
    let cable = Case::shop().cable(Run::InverterToBoard);
    // By hand: 2000 VA at 230 V are 8.7 A; 10 A; 1.5 mm² C, XLPE carries 24·0.96; 42,000 A²s ask for 1.43 mm².
    assert!((cable.design_current.0 - 2000.0 / 230.0).abs() < 1e-12);
    assert_eq!((metric(&cable), cable.fuse), (1.5, Some(Amps(10.0))));
    assert_eq!(cable.protective_conductor, Some(CrossSection::Metric(SquareMillimetres(1.5))));
    assert!(cable.device.contains("miniature circuit breaker"));
}

#[test]
fn on_battery_the_boards_breaker_does_not_trip_at_once() {
    let told =
        Finding::BreakerSlowOnBattery { run: Run::InverterToBoard, gives: Amps(4000.0 / 230.0), trips_at: Amps(100.0) };
    assert!(Case::shop().findings().contains(&told));
    assert_eq!(told.severity(), Severity::Note);
}

#[test]
fn the_mains_cable_carries_load_and_charger_together() {
    let case = Case::shop();
    let cable = case.cable(Run::MainsToInverter);
    assert_eq!(cable.design_current, case.charger.incoming_current);
    assert_eq!(cable.fault_current, Kiloamps(case.assumptions.supply_fault_current_ka));
}

#[test]
fn a_separate_charger_has_its_own_run_and_takes_its_current_off_the_units_lead() {
    let mut case = Case::drawn_at(20.0);
    case.charger.current = Amps(60.0);
    assert_eq!(case.cable(Run::BankToInverter).design_current, Amps(60.0), "the unit charges too");
    case.survey.runs.charger_to_bank = Some(Metres(3.0));
    assert_eq!(case.cable(Run::BankToInverter).design_current, Amps(20.0));
    assert_eq!(case.cable(Run::ChargerToBank).design_current, Amps(60.0));
}

#[test]
fn each_string_has_its_own_lead_for_its_share_and_a_fuse_against_the_others() {
    let mut case = Case::drawn_at(120.0);
    case.bank.strings = 3;
    let lead = case.cable(Run::StringLead);
    let imbalance = 3.0 / (1.0 + 2.0 * 0.95) - 1.0;
    assert!((lead.design_current.0 - 40.0 * (1.0 + imbalance)).abs() < 1e-9, "{lead:?}");
    let whole = case.cable(Run::BankToInverter).fault_current;
    assert!((lead.fault_current / whole - 2.0 / 3.0).abs() < 1e-12, "the other two feed it");
    assert!(lead.fuse.expect("a fuse fits") >= lead.design_current * 1.25);
    assert!(!case.findings().iter().any(|finding| matches!(finding, Finding::StringsUneven { .. })));
}

#[test]
fn strings_that_differ_much_are_told() {
    let mut case = Case::shop();
    case.bank.strings = 3;
    case.assumptions.string_resistance_spread = 0.2;
    let worst_over_mean = 3.0 / (1.0 + 2.0 * 0.8);
    let told = case.findings().into_iter().find_map(|finding| match finding {
        Finding::StringsUneven { worst_over_mean } => Some(worst_over_mean),
        _ => None,
    });
    assert!((told.expect("15 % is uneven") - worst_over_mean).abs() < 1e-9);
}

#[test]
fn a_lithium_bank_needs_the_makers_fault_current() {
    let case = Case::of(Chemistry::Lfp);
    let estimate = case.cable(Run::BankToInverter).fault_current;
    assert!(case.findings().contains(&Finding::FaultCurrentNeedsMaker { estimate }));
    let lead = Case::shop().findings();
    assert!(!lead.iter().any(|finding| matches!(finding, Finding::FaultCurrentNeedsMaker { .. })));
}

#[test]
fn battery_leads_stay_of_copper_and_fixed_cables_become_thicker_in_aluminium() {
    let mut case = Case::shop();
    case.survey.choice.conductor = Conductor::Aluminium;
    let told = Finding::NoAluminium { run: Run::BankToInverter, smallest_mm2: 25.0 };
    assert!(case.findings().contains(&told), "{:?}", case.findings());
    assert_eq!(metric(&case.cable(Run::BankToInverter)), metric(&Case::shop().cable(Run::BankToInverter)));
    assert_eq!(metric(&case.cable(Run::InverterToBoard)), 10.0, "the thinnest that is made");
}

#[test]
fn the_nec_asks_a_quarter_more_of_device_and_terminals() {
    let mut case = Case::nec();
    case.survey.site.supply = crate::units::AcVolts(120.0);
    let cable = case.cable(Run::InverterToBoard);
    // By hand: 2000 VA at 120 V are 16.7 A, 20.8 A with the quarter: 25 A device. 12 AWG bears 25 A at its
    // terminals but is capped at 20 A, so 10 AWG; its ground by 250.122 is 10 AWG.
    assert_eq!((cable.size, cable.fuse), (Some(CrossSection::Awg("10")), Some(Amps(25.0))));
    assert_eq!((cable.protective_conductor, cable.code), (Some(CrossSection::Awg("10")), "NEC"));
}

#[test]
fn no_conductor_at_the_battery_carries_more_than_one_cable_should() {
    for (amps, parallel) in [(149.0, 1), (151.0, 2), (299.0, 2), (320.0, 3)] {
        let cable = Case::drawn_at(amps).cable(Run::BankToInverter);
        assert_eq!(cable.parallel, parallel, "{amps} A at 150 A to a cable");
    }
}

#[test]
fn an_aged_bank_too_weak_to_open_its_fuse_is_told() {
    let mut case = Case::drawn_at(100.0);
    case.bank.aged_resistance = crate::units::Ohms(0.020);
    let cable = case.cable(Run::BankToInverter);
    let gives: Amps = case.bank.end_open_circuit / (case.bank.aged_resistance + cable.loop_resistance);
    let opens_at = cable.fuse.expect("a fuse fits") * 5.0;
    assert!(gives < opens_at);
    let told = Finding::FuseSlowOnAgedBank { run: Run::BankToInverter, gives, opens_at };
    assert!(case.findings().contains(&told), "{:?}", case.findings());
    case.bank.aged_resistance = crate::units::Ohms(0.005);
    assert!(!case.findings().iter().any(|finding| matches!(finding, Finding::FuseSlowOnAgedBank { .. })));
}

#[test]
fn one_conductor_that_is_too_thin_becomes_several_in_parallel() {
    let mut case = Case::drawn_at(480.0);
    case.survey.choice.method = Method::B1;
    case.survey.choice.insulation = Insulation::Pvc70;
    let cable = case.cable(Run::BankToInverter);
    assert!(cable.parallel > 1 && metric(&cable) >= 50.0, "{cable:?}");
    assert!(cable.capacity >= cable.fuse.expect("600 A and 630 A are made"));
}

#[test]
fn beyond_every_fuse_and_cable_there_is_still_an_answer_that_says_so() {
    let case = Case::drawn_at(5000.0);
    let (cable, findings) = (case.cable(Run::BankToInverter), case.findings());
    assert_eq!((cable.fuse, metric(&cable), cable.parallel), (None, 240.0, selection::MOST_IN_PARALLEL));
    let (run, current, length) = (Run::BankToInverter, Amps(5000.0), case.survey.runs.bank_to_inverter);
    assert!(findings.contains(&Finding::NoCableFits { run, current, length }), "{findings:?}");
    assert!(findings.contains(&Finding::NoFuseFits { run, current, capacity: cable.capacity }));
}

#[test]
fn a_run_too_long_for_any_cable_breaks_the_limit_and_says_so() {
    let mut case = Case::drawn_at(150.0);
    case.survey.runs.bank_to_inverter = Metres(500.0);
    let found = case.findings();
    let over = |finding: &Finding| matches!(finding, Finding::DropAboveLimit { run: Run::BankToInverter, .. });
    assert!(found.iter().any(over), "{found:?}");
}

#[test]
fn a_drop_between_warning_and_limit_is_doubtful() {
    let mut case = Case::drawn_at(100.0);
    case.assumptions.dc_drop_target = 0.002;
    case.assumptions.dc_drop_warn = 0.002;
    case.survey.runs.bank_to_inverter = Metres(25.0);
    let told = case.findings().into_iter().find(|finding| matches!(finding, Finding::DropAboveTarget { .. }));
    let Some(Finding::DropAboveTarget { run: Run::BankToInverter, share, target: 0.002 }) = told else {
        panic!("{told:?}");
    };
    assert!(0.002 < share && share <= case.assumptions.dc_drop_limit);
}

#[test]
fn air_hotter_than_the_table_is_told_for_every_run() {
    let mut case = Case::shop();
    case.survey.choice.insulation = Insulation::Pvc70;
    case.survey.site.inverter_ambient = Celsius(61.0);
    let told = case.findings().into_iter().filter(|finding| matches!(finding, Finding::AmbientOutsideTable { .. }));
    assert_eq!(told.count(), 3);
}

#[test]
fn a_bundle_larger_than_the_table_is_told() {
    let mut case = Case::drawn_at(400.0);
    case.survey.choice.method = Method::B1;
    case.assumptions.grouped_circuits = 20.0;
    let told =
        |finding: &Finding| matches!(finding, Finding::OutsideMethod { given, highest: 20.0, .. } if *given > 20.0);
    assert!(case.findings().iter().any(told), "{:?}", case.findings());
}

#[test]
fn a_fault_above_every_fuse_is_told() {
    let mut case = Case::shop();
    case.bank.installed = crate::units::AmpHours(3000.0);
    let told = Finding::BreakingCapacityTooSmall {
        run: Run::BankToInverter,
        fault: Kiloamps(60.0),
        breaks: case.cable(Run::BankToInverter).breaking_capacity,
    };
    assert!(case.findings().contains(&told), "{:?}", case.findings());
}

#[test]
fn a_fault_that_no_conductor_bears_is_told() {
    let mut case = Case::shop();
    case.bank.installed = crate::units::AmpHours(3000.0);
    case.assumptions.fault_clearing_s = 5.0;
    let told = Finding::FaultHeatsCable { run: Run::BankToInverter, fault: Kiloamps(60.0) };
    assert!(case.findings().contains(&told), "{:?}", case.findings());
}

#[test]
fn the_supply_side_keeps_its_drop_over_both_runs_together() {
    let mut case = Case::shop();
    case.survey.runs.inverter_to_board = Metres(40.0);
    case.survey.runs.mains_to_inverter = Metres(15.0);
    let shares = [Run::InverterToBoard, Run::MainsToInverter].map(|run| case.cable(run).voltage_drop_share);
    assert!(shares[0] + shares[1] <= case.assumptions.ac_drop_limit, "{shares:?}");
}

#[test]
fn every_number_of_a_cable_stands_on_the_sheet_with_the_same_value() {
    let mut strings = Case::drawn_at(120.0);
    strings.bank.strings = 2;
    strings.survey.runs.charger_to_bank = Some(Metres(3.0));
    for case in [strings, Case::nec()] {
        let (cables, sheet) = case.answer();
        for cable in &cables {
            example::assert_on_sheet(&["cables", cable.run.key()].join("."), cable, &sheet);
        }
    }
}

#[test]
fn the_protective_conductor_stands_on_the_sheet_too() {
    let (cables, sheet) = Case::shop().answer();
    let board = cables.iter().find(|cable| cable.run == Run::InverterToBoard).expect("the run is there");
    let figure = "cables.inverter_to_board.protective_conductor.cross_section_mm2";
    let line = sheet.working.iter().find(|line| line.figure == figure).expect("a line of its own");
    assert_eq!(board.protective_conductor, Some(CrossSection::Metric(SquareMillimetres(line.result))));
}
