//! The calculation sheet holds every figure of the design.

use std::collections::{HashMap, HashSet};

use keeplit::sizing::design::Run;

use super::{answer, stage_numbers, surveys, written};

#[test]
fn every_number_of_a_design_stands_on_its_sheet_with_the_same_value() {
    for text in surveys::ALL {
        let design = answer(text);
        let mut sheet: HashMap<&str, Vec<u64>> = HashMap::new();
        for line in &design.working {
            sheet.entry(line.figure.as_ref()).or_default().push(line.result.to_bits());
        }
        let numbers = stage_numbers(&written(text));
        assert!(numbers.len() > 60, "{}", numbers.len());
        for (path, number) in numbers {
            let results = sheet.get(path.as_str()).unwrap_or_else(|| panic!("{path} does not stand on the sheet"));
            assert!(
                results.contains(&number.to_bits()),
                "{path} is {number} in the design and {results:?} on the sheet"
            );
        }
    }
}

#[test]
fn a_figure_is_written_once_except_for_motors_of_one_name() {
    for text in surveys::ALL {
        let design = answer(text);
        let mut seen = HashSet::new();
        for line in design.working.iter().filter(|line| !line.figure.starts_with("starts.")) {
            assert!(seen.insert(&line.figure), "{} stands on the sheet twice", line.figure);
        }
    }
}

#[test]
fn every_line_tells_symbol_formula_and_source() {
    for text in surveys::ALL {
        for line in answer(text).working {
            let figure = &line.figure;
            assert!(!line.symbol.is_empty() && !line.name.is_empty() && !line.formula.is_empty(), "{figure}");
            assert!(!line.source.is_empty(), "{figure}");
            assert!(line.result.is_finite() && line.values.iter().all(|value| value.value.is_finite()), "{figure}");
        }
    }
}

#[test]
fn the_six_jobs_are_indeed_unlike() {
    let strings = answer(surveys::MANY_STRINGS);
    assert!(strings.bank.strings > 1 && strings.cables.iter().any(|cable| cable.run == Run::StringLead));
    let clinic = answer(surveys::LFP_CLINIC);
    assert!(clinic.cables.iter().any(|cable| cable.run == Run::ChargerToBank));
    assert!(written(surveys::NEC_HOUSE)["cables"][0]["awg"].is_string());
    assert_eq!(answer(surveys::REUSED_UNIT).inverter.rating.0, 850.0);
}
