//! Laws that hold for every run, whatever is asked of it.

use proptest::prelude::*;

use super::*;

fn any_case() -> impl Strategy<Value = Case> {
    let choice = (any::<bool>(), any::<bool>(), 0..4_usize, any::<bool>());
    let site = (1.0..400.0_f64, 0.5..15.0_f64, 5.0..59.0_f64, 1.0..6.0_f64, 1..4_u32);
    (choice, site).prop_map(|((nec, pvc, method, aluminium), (amps, length, air, grouped, strings))| {
        let mut case = Case::drawn_at(amps);
        let choice = &mut case.survey.choice;
        choice.code = if nec { Code::Nec } else { Code::Iec };
        choice.insulation = if pvc { Insulation::Pvc70 } else { Insulation::Xlpe90 };
        choice.method = [Method::B1, Method::C, Method::E, Method::F][method];
        choice.ac_method = choice.method;
        choice.conductor = if aluminium { Conductor::Aluminium } else { Conductor::Copper };
        case.survey.runs.bank_to_inverter = Metres(length);
        case.survey.runs.inverter_to_board = Metres(4.0 * length);
        case.survey.site.inverter_ambient = Celsius(air);
        case.assumptions.grouped_circuits = grouped;
        case.bank.strings = strings;
        case
    })
}

fn lacks(findings: &[Finding], run: Run) -> bool {
    findings.iter().any(|finding| match finding {
        Finding::NoCableFits { run: of, .. } | Finding::NoFuseFits { run: of, .. } => *of == run,
        _ => false,
    })
}

proptest! {
    #[test]
    fn every_pair_is_coordinated_or_told(case in any_case()) {
        let (cables, sheet) = case.answer();
        for cable in cables.iter().filter(|cable| !lacks(&sheet.findings, cable.run)) {
            let fuse = cable.fuse.expect("nothing is lacking");
            prop_assert!(cable.design_current <= fuse && cable.design_current <= cable.capacity, "{cable:?}");
            let next_size_up = case.survey.choice.code == Code::Nec && !cable.run.is_dc();
            prop_assert!(fuse <= cable.capacity || next_size_up, "{cable:?}");
            let opens = if cable.device == "gG fuse" { 1.6 } else { 1.45 };
            prop_assert!(fuse * opens <= cable.capacity * 1.45 || next_size_up || cable.run.is_dc(), "{cable:?}");
        }
    }

    #[test]
    fn every_number_is_finite(case in any_case()) {
        let (_, sheet) = case.answer();
        prop_assert!(sheet.working.iter().all(|line| line.result.is_finite()));
    }

    #[test]
    fn more_current_never_gets_a_thinner_cable(case in any_case(), more in 1.0..3.0_f64) {
        let mut heavier = case.clone();
        heavier.bank.peak_current = case.bank.peak_current * more;
        let run = Run::BankToInverter;
        let (light, heavy) = (case.cable(run), heavier.cable(run));
        prop_assert!(rank(&light) <= rank(&heavy), "{light:?} {heavy:?}");
    }

    #[test]
    fn a_longer_run_never_gets_a_thinner_cable(case in any_case(), more in 1.0..4.0_f64) {
        let mut longer = case.clone();
        longer.survey.runs.bank_to_inverter = case.survey.runs.bank_to_inverter * more;
        longer.survey.runs.inverter_to_board = case.survey.runs.inverter_to_board * more;
        for run in [Run::BankToInverter, Run::InverterToBoard] {
            let (short, long) = (case.cable(run), longer.cable(run));
            prop_assert!(rank(&short) <= rank(&long), "{short:?} {long:?}");
        }
    }

    #[test]
    fn hotter_air_or_more_company_never_gets_a_thinner_cable(case in any_case(), hotter in 0.0..40.0_f64, more in 0.0..10.0_f64) {
        let mut harder = case.clone();
        harder.survey.site.inverter_ambient = case.survey.site.inverter_ambient + Celsius(hotter);
        harder.assumptions.grouped_circuits += more;
        for (easy, hard) in case.answer().0.iter().zip(&harder.answer().0) {
            prop_assert!(rank(easy) <= rank(hard), "{easy:?} {hard:?}");
        }
    }

    #[test]
    fn a_harder_start_never_gets_a_thinner_cable_and_its_drop_is_kept(
        case in any_case(), watts in 10.0..2000.0_f64, more in 1.0..2.0_f64,
    ) {
        let started = |watts: f64| Case { demand: starting(watts, 1.4 * watts).demand, ..case.clone() };
        let (soft, hard) = (started(watts).cable(Run::BankToInverter), started(watts * more).cable(Run::BankToInverter));
        prop_assert!(rank(&case.cable(Run::BankToInverter)) <= rank(&soft) && rank(&soft) <= rank(&hard));
        let (_, sheet) = started(watts).answer();
        let drop = sheet.working.iter().find(|line| line.figure.ends_with("start_drop_share")).expect("it starts").result;
        prop_assert!(drop <= 0.05 || soft.parallel == selection::MOST_IN_PARALLEL, "{drop} {soft:?}");
    }
}
