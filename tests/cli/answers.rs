//! Surveys that are answered.

use serde_json::Value;

use super::{EXAMPLE, file, keeplit, size};

fn answer(text: impl AsRef<[u8]>) -> Value {
    let output = size(text);
    assert!(output.status.success(), "{}", String::from_utf8_lossy(&output.stderr));
    assert!(output.stderr.is_empty(), "{}", String::from_utf8_lossy(&output.stderr));
    serde_json::from_slice(&output.stdout).expect("the answer is JSON")
}

/// Every number anywhere in the answer, with its path.
fn numbers(path: &str, value: &Value, found: &mut Vec<(String, f64)>) {
    match value {
        Value::Number(number) => found.push((path.to_owned(), number.as_f64().expect("a number"))),
        Value::Array(entries) => {
            entries.iter().enumerate().for_each(|(at, entry)| numbers(&format!("{path}[{at}]"), entry, found));
        }
        Value::Object(members) => {
            members.iter().for_each(|(key, member)| numbers(&format!("{path}.{key}"), member, found));
        }
        _ => {}
    }
}

fn assert_keys(path: &str, value: &Value, keys: &[&str]) {
    for key in keys {
        assert!(value.get(key).is_some(), "{path} has no {key}");
    }
}

#[test]
fn the_example_is_answered_with_every_promised_key() {
    let design = answer(EXAMPLE);
    let stages: [(&str, &[&str]); 8] = [
        ("demand", &["running_w", "running_va", "surge_together_va", "surge_staggered_va", "outage_wh", "worst_start"]),
        ("inverter", &["rating_va", "rating_w", "surge_va", "surge_margin", "waveform", "load_share"]),
        (
            "bank",
            &[
                "bus_v",
                "required_ah",
                "rated_hours",
                "blocks_in_series",
                "strings",
                "installed_ah",
                "peukert_exponent",
                "depth_of_discharge_max",
                "temperature_factor",
                "methods",
            ],
        ),
        ("charger", &["current_a", "recharge_h", "input_current_a", "absorption_v", "float_v"]),
        ("ventilation", &["airflow_m3_per_h", "opening_cm2", "safe_distance_mm"]),
        (
            "proof",
            &[
                "runtime_new_h",
                "runtime_aged_h",
                "lowest_voltage_v",
                "holds",
                "recovers",
                "cases",
                "curve",
                "weeks",
                "costs",
                "year",
            ],
        ),
        ("findings", &[]),
        ("working", &[]),
    ];
    for (stage, keys) in stages {
        assert_keys("the answer", &design, &[stage]);
        assert_keys(stage, &design[stage], keys);
    }
    assert_keys("bank.methods", &design["bank"]["methods"], &["peukert_ah", "section_ah", "kibam_ah"]);
}

#[test]
fn each_cable_finding_and_line_of_the_working_has_its_keys() {
    let design = answer(EXAMPLE);
    let lists: [(&str, &[&str]); 3] = [
        (
            "cables",
            &[
                "run",
                "design_current_a",
                "cross_section_mm2",
                "capacity_a",
                "voltage_drop_v",
                "voltage_drop_share",
                "fuse_a",
                "breaking_capacity_ka",
            ],
        ),
        ("findings", &["code", "severity", "text"]),
        ("working", &["symbol", "name", "formula", "values", "result", "unit", "source", "checked"]),
    ];
    for (list, keys) in lists {
        let entries = design[list].as_array().expect(list);
        assert!(!entries.is_empty(), "{list} is empty");
        entries.iter().for_each(|entry| assert_keys(list, entry, keys));
    }
}

/// Every number to six figures, so that the last bits of a power or a root do not matter.
fn rounded(value: &mut Value) {
    match value {
        Value::Number(number) => {
            let text = format!("{:.5e}", number.as_f64().expect("a number"));
            *value = serde_json::json!(text.parse::<f64>().expect("a number"));
        }
        Value::Array(entries) => entries.iter_mut().for_each(rounded),
        Value::Object(members) => members.values_mut().for_each(rounded),
        _ => {}
    }
}

/// Figures and findings; the working and the assumptions are held by tests of their own, words may change.
#[test]
fn the_whole_answer_to_the_example_is_this() {
    let mut design = answer(EXAMPLE);
    let members = design.as_object_mut().expect("an object");
    for apart in ["working", "assumptions", "program_version"] {
        members.remove(apart);
    }
    for finding in members["findings"].as_array_mut().expect("a list") {
        *finding = serde_json::json!([finding["severity"], finding["code"]]);
    }
    rounded(&mut design);
    insta::assert_json_snapshot!("corner_shop", design);
}

#[test]
fn american_sizes_stand_under_awg() {
    let design = answer(EXAMPLE.replace("\"iec\"", "\"nec\""));
    for cable in design["cables"].as_array().expect("cables") {
        assert!(cable["awg"].is_string() && cable.get("cross_section_mm2").is_none(), "{cable}");
    }
}

#[test]
fn every_number_of_the_answer_is_finite_and_none_is_missing() {
    let output = size(EXAMPLE);
    let text = String::from_utf8(output.stdout).expect("UTF-8");
    // A number that is not finite would be written as null.
    let nulls: Vec<_> = text.lines().filter(|line| line.trim_end_matches(',').ends_with(": null")).collect();
    assert!(nulls.iter().all(|line| line.contains("missing_a") || line.contains("protective")), "{nulls:?}");
    let mut found = Vec::new();
    numbers("", &serde_json::from_str(&text).expect("JSON"), &mut found);
    assert!(found.len() > 300 && found.iter().all(|(_, number)| number.is_finite()), "{}", found.len());
}

#[test]
fn the_shortest_survey_is_answered_and_names_what_it_took() {
    let shortest =
        r#"{"format":"keeplit-survey-1","outage":{"autonomy_h":2},"loads":[{"name":"Lamp","running_w":10}]}"#;
    let design = answer(shortest);
    let taken = design["defaults_taken"].as_object().expect("an object");
    for path in [
        "site.name",
        "site.supply_v",
        "outage.starts_at",
        "loads[0].power_factor",
        "loads[0].turn",
        "loads[0].windows",
        "choice.chemistry",
        "choice.bus_v",
        "runs.bank_to_inverter_m",
        "battery_ratings",
    ] {
        assert!(taken.contains_key(path), "{path} is not named among {taken:?}");
    }
    assert!(!taken.contains_key("outage.autonomy_h"));
}

#[test]
fn an_override_is_in_force_and_shown_beside_its_default() {
    let design = answer(EXAMPLE.replace("\"depth_of_discharge_max\": 0.5", "\"depth_of_discharge_max\": 0.42"));
    let entries = design["assumptions"].as_array().expect("a list");
    let entry = entries.iter().find(|entry| entry["key"] == "depth_of_discharge_max").expect("it is listed");
    assert_eq!((entry["value"].as_f64(), entry["default"].as_f64()), (Some(0.42), Some(0.6)));
    assert_eq!(design["bank"]["depth_of_discharge_max"], 0.42);
}

#[test]
fn a_survey_that_says_everything_takes_no_default() {
    let taken = answer(EXAMPLE)["defaults_taken"].clone();
    let optional = |path: &str| EXAMPLE.contains(&format!("\"{}\"", path.rsplit('.').next().unwrap_or(path)));
    for path in taken.as_object().expect("an object").keys() {
        assert!(!optional(path), "{path} is given and yet named as a default");
    }
}

#[test]
fn a_byte_order_mark_before_the_file_is_passed_over() {
    assert_eq!(answer(format!("\u{feff}{EXAMPLE}")), answer(EXAMPLE));
}

#[test]
fn a_reader_that_has_seen_enough_is_no_error() {
    let path = file("closed.json", EXAMPLE);
    let mut child = keeplit(&["size", path.to_str().expect("UTF-8")]).spawn().expect("the program starts");
    drop(child.stdout.take());
    let output = child.wait_with_output().expect("the program ends");
    assert_eq!((output.status.code(), output.stderr.len()), (Some(0), 0));
}

#[test]
fn a_file_and_the_standard_input_give_the_same_bytes() {
    let path = file("corner_shop.json", EXAMPLE);
    let by_name = keeplit(&["size", path.to_str().expect("UTF-8")]).output().expect("the program runs");
    assert_eq!(by_name.status.code(), Some(0));
    assert_eq!(by_name.stdout, size(EXAMPLE).stdout);
}
