//! Surveys that are refused: exit code 2, one line for each fault, nothing on standard output.

use super::{EXAMPLE, file, keeplit, size};

/// The lines that a bad survey gets.
fn refusal(text: impl AsRef<[u8]>) -> Vec<String> {
    let output = size(text);
    let told = String::from_utf8(output.stderr).expect("UTF-8");
    assert_eq!(output.status.code(), Some(2), "{told}");
    assert!(output.stdout.is_empty(), "{}", String::from_utf8_lossy(&output.stdout));
    assert!(!told.is_empty() && told.lines().all(|line| line.len() < 300 && !line.trim().is_empty()), "{told}");
    told.lines().map(str::to_owned).collect()
}

/// The example with one piece of its text changed.
fn example_with(old: &str, new: &str) -> String {
    assert!(EXAMPLE.contains(old), "{old} is not in the example");
    EXAMPLE.replacen(old, new, 1)
}

/// Changing the example so gives one fault, at this path, that says this.
fn assert_refused(old: &str, new: &str, path: &str, says: &str) {
    let lines = refusal(example_with(old, new));
    assert_eq!(lines.len(), 1, "{old} → {new}: {lines:?}");
    assert!(lines[0].starts_with(&format!("{path}: ")) && lines[0].contains(says), "{old} → {new}: {lines:?}");
}

const WATTS: &str = "\"running_w\": 150";

#[test]
fn an_unknown_key_is_named_with_the_one_that_was_meant() {
    assert_refused(WATTS, "\"running_kw\": 0.15, \"running_w\": 150", "loads[0].running_kw", "did you mean running_w?");
    assert_refused("\"altitude_m\"", "\"altitud_m\"", "site.altitud_m", "did you mean altitude_m?");
    assert_refused("\"runs\":", "\"colour\": 1, \"runs\":", "colour", "leave it out");
    assert_refused("\"depth_of_discharge_max\"", "\"wishful_factor\"", "assumptions.wishful_factor", "no assumption");
}

#[test]
fn kilowatts_for_watts_are_two_faults_a_stranger_and_a_gap() {
    let lines = refusal(example_with(WATTS, "\"running_kw\": 0.15"));
    assert_eq!(lines.len(), 2, "{lines:?}");
    assert!(lines.iter().any(|line| line.starts_with("loads[0].running_w: is missing")), "{lines:?}");
    assert!(lines.iter().any(|line| line.starts_with("loads[0].running_kw: unknown key")), "{lines:?}");
}

#[test]
fn what_is_required_is_missed_by_its_path() {
    assert_refused("\"running_w\": 150, ", "", "loads[0].running_w", "is missing");
    assert_refused("\"name\": \"Chest freezer\", ", "", "loads[0].name", "give a name");
    assert_refused("\"autonomy_h\": 4, ", "", "outage.autonomy_h", "give");
    assert_refused("\"format\": \"keeplit-survey-1\",", "", "format", "keeplit-survey-1");
    assert_refused("keeplit-survey-1", "keeplit-survey-9", "format", "keeplit-survey-1");
}

#[test]
fn a_survey_without_loads_or_cut_is_refused() {
    let bare = refusal(r#"{"format":"keeplit-survey-1"}"#);
    assert!(bare.iter().any(|line| line.starts_with("outage.autonomy_h: ")), "{bare:?}");
    assert!(bare.iter().any(|line| line.starts_with("loads: ")), "{bare:?}");
    let empty = refusal(r#"{"format":"keeplit-survey-1","outage":{"autonomy_h":4},"loads":[]}"#);
    assert!(empty.len() == 1 && empty[0].starts_with("loads: "), "{empty:?}");
}

#[test]
fn numbers_that_are_none_or_out_of_range_are_refused() {
    for (given, says) in [
        ("-150", "give 0.1 to 100,000"),
        ("0", "give 0.1 to 100,000"),
        ("1e309", "give 0.1 to 100,000"),
        ("-1e309", "give 0.1 to 100,000"),
        ("1e-400", "give 0.1 to 100,000"),
        ("1e12", "give 0.1 to 100,000"),
        ("\"150\"", "not a text"),
        ("[150]", "not a list"),
        ("true", "not true or false"),
        ("{}", "not an object"),
    ] {
        assert_refused(WATTS, &format!("\"running_w\": {given}"), "loads[0].running_w", says);
    }
}

#[test]
fn the_words_nan_and_infinity_are_no_numbers() {
    for word in ["NaN", "Infinity", "-Infinity"] {
        let lines = refusal(example_with(WATTS, &format!("\"running_w\": {word}")));
        assert!(lines.len() == 1 && lines[0].contains("is no number") && lines[0].contains("line "), "{lines:?}");
    }
}

#[test]
fn absurd_sizes_are_refused_by_their_limits() {
    for (old, new, path) in [
        ("\"autonomy_h\": 4", "\"autonomy_h\": 100000", "outage.autonomy_h"),
        ("\"quantity\": 1", "\"quantity\": 1001", "loads[0].quantity"),
        ("\"quantity\": 1", "\"quantity\": 1.5", "loads[0].quantity"),
        ("\"quantity\": 1", "\"quantity\": 0", "loads[0].quantity"),
        ("\"altitude_m\": 300", "\"altitude_m\": 9000", "site.altitude_m"),
        ("\"battery_coldest_c\": 15", "\"battery_coldest_c\": -273", "site.battery_coldest_c"),
        ("\"supply_v\": 230", "\"supply_v\": 0", "site.supply_v"),
        ("\"bank_to_inverter_m\": 2.0", "\"bank_to_inverter_m\": 0", "runs.bank_to_inverter_m"),
        ("\"power_factor\": 0.7", "\"power_factor\": 1.2", "loads[0].power_factor"),
        ("\"duty\": 0.45", "\"duty\": 45", "loads[0].duty"),
        ("\"hours\": 20", "\"hours\": 0", "battery_ratings[0].hours"),
        ("\"ah\": 150", "\"ah\": -1", "battery_ratings[0].ah"),
        ("\"depth_of_discharge_max\": 0.5", "\"depth_of_discharge_max\": 5", "assumptions.depth_of_discharge_max"),
    ] {
        assert_refused(old, new, path, "give");
    }
}

#[test]
fn temperatures_and_volts_that_contradict_each_other_are_refused() {
    let colder = refusal(example_with("\"battery_hottest_c\": 38", "\"battery_hottest_c\": 5"));
    assert!(colder[0].starts_with("site.battery_"), "{colder:?}");
    let lower = refusal(example_with("\"supply_highest_v\": 250", "\"supply_highest_v\": 100"));
    assert!(lower[0].starts_with("site.supply_"), "{lower:?}");
}

#[test]
fn words_that_a_choice_does_not_know_are_answered_with_those_it_knows() {
    assert_refused("\"compressor\"", "\"turbine\"", "loads[0].start", "motor_cap_start");
    assert_refused("\"flooded_tubular\"", "\"alkaline\"", "choice.chemistry", "vrla_agm");
    assert_refused("\"bus_v\": null", "\"bus_v\": 36", "choice.bus_v", "12, 24, 48");
    assert_refused("\"worst\"", "\"25:00\"", "outage.starts_at", "");
    assert_refused(
        "[[\"00:00\", \"24:00\"]]",
        "[[\"08:00\", \"08:00\"]]",
        "loads[0].windows[0]",
        "two different times",
    );
    assert_refused("[[\"00:00\", \"24:00\"]]", "[[\"8 pm\", \"9 pm\"]]", "loads[0].windows[0]", "18:00");
}

#[test]
fn a_key_given_twice_is_refused_at_any_depth() {
    assert_refused(WATTS, "\"running_w\": 150, \"running_w\": 1500", "loads[0].running_w", "twice");
    assert_refused("\"runs\":", "\"loads\": [], \"runs\":", "loads", "twice");
    let twice = "\"depth_of_discharge_max\": 0.5, \"depth_of_discharge_max\": 0.8";
    assert_refused("\"depth_of_discharge_max\": 0.5", twice, "assumptions.depth_of_discharge_max", "twice");
}

#[test]
fn too_many_loads_are_refused_as_a_whole() {
    let load = r#"{"name":"Lamp","running_w":10},"#.repeat(10_000);
    let text = format!(
        r#"{{"format":"keeplit-survey-1","outage":{{"autonomy_h":4}},"loads":[{}]}}"#,
        load.trim_end_matches(',')
    );
    let lines = refusal(text);
    assert!(lines.len() == 1 && lines[0].starts_with("loads: ") && lines[0].contains("10000"), "{lines:?}");
}

#[test]
fn deep_nesting_is_refused_and_does_no_harm() {
    for (open, close) in [("[", "]"), ("{\"a\":", "}")] {
        let deep = format!("{}1{}", open.repeat(100_000), close.repeat(100_000));
        refusal(deep.clone());
        refusal(example_with(WATTS, &format!("\"running_w\": {deep}")));
    }
}

#[test]
fn what_is_no_text_or_no_json_is_refused_in_one_line() {
    for (bytes, says) in [
        (&b""[..], "empty"),
        (b"  \n ", "empty"),
        (b"\xff\xfe{\0}\0", "UTF-8"),
        (b"{\"format\": \"\xe9\"}", "UTF-8"),
        (b"not json", "line 1"),
        (b"{\"format\":", "line 1"),
        (b"[]", "give an object"),
        (b"null", "give an object"),
        (b"{} {}", "line 1"),
    ] {
        let lines = refusal(bytes);
        assert!(lines.len() == 1 && lines[0].contains(says), "{lines:?}");
    }
}

#[test]
fn a_file_beyond_the_limit_is_refused_without_being_read_whole() {
    let lines = refusal(" ".repeat(3_000_000));
    assert!(lines.len() == 1 && lines[0].contains("1,000,000 bytes"), "{lines:?}");
}

#[test]
fn names_with_control_characters_or_of_endless_length_are_refused() {
    assert_refused("Chest freezer", "Chest\\u0007freezer", "loads[0].name", "control characters");
    assert_refused("Chest freezer", &"x".repeat(121), "loads[0].name", "120 characters");
}

#[test]
fn every_fault_of_a_file_is_told_at_once() {
    let text = example_with(WATTS, "\"running_w\": -1").replace("\"quantity\": 1", "\"quantity\": 0");
    let text = text.replace("\"autonomy_h\": 4", "\"autonomy_h\": 0").replace("\"xlpe_90\"", "\"wax\"");
    let lines = refusal(text);
    for path in ["loads[0].running_w", "loads[0].quantity", "outage.autonomy_h", "choice.insulation"] {
        assert_eq!(lines.iter().filter(|line| line.starts_with(&format!("{path}: "))).count(), 1, "{path}: {lines:?}");
    }
    assert_eq!(lines.len(), 4, "{lines:?}");
}

#[test]
fn null_is_taken_only_where_the_form_knows_nothing_as_a_value() {
    for (old, key, path) in [
        ("\"power_factor\": 0.7", "power_factor", "loads[0].power_factor"),
        ("\"start\": \"compressor\"", "start", "loads[0].start"),
        ("\"altitude_m\": 300", "altitude_m", "site.altitude_m"),
        ("[[\"00:00\", \"24:00\"]]", "", "loads[0].windows"),
    ] {
        let null = if key.is_empty() { "null".to_owned() } else { format!("\"{key}\": null") };
        assert_refused(old, &null, path, "give");
    }
    let lines = refusal(r#"{"format":"keeplit-survey-1","site":null,"outage":null,"loads":null}"#);
    assert_eq!(lines.len(), 3, "{lines:?}");
    assert!(lines.iter().all(|line| line.contains("not null")), "{lines:?}");
}

#[test]
fn a_key_that_would_move_the_cursor_or_never_ends_is_shown_on_one_short_line() {
    assert_refused(WATTS, "\"running_w\": 150, \"a\\nb\\u001b[2J\": 1", "loads[0].a\\nb\\u{1b}[2J", "unknown key");
    let lines = refusal(example_with(WATTS, &format!("\"running_w\": 150, \"{}\": 1", "k".repeat(500_000))));
    assert!(lines.len() == 1 && lines[0].contains("kkk…: unknown key"), "{}", lines.len());
}

#[test]
fn half_a_character_is_told_as_such() {
    assert_refused("Chest freezer", "\\ud800", "loads[0].name", "half a character");
    assert_refused(WATTS, "\"running_w\": 150, \"\\udc00\": 1", "loads[0]", "half a character");
}

#[test]
fn faults_are_told_in_the_order_of_the_file() {
    let text = r#"{
      "colour": 1, "format": "keeplit-survey-1",
      "loads": [ { "name": "Lamp", "watts": 10, "duty": 2, "running_w": -1 }, { "running_w": 0, "name": 5 } ],
      "outage": { "autonomy_h": 1e309, "battery_ratings": 1, "cuts_per_week": "daily" },
      "site": { "supply_v": 3 } }"#;
    let paths: Vec<_> = refusal(text).iter().map(|line| line.split(": ").next().unwrap_or("").to_owned()).collect();
    let expected = [
        "colour",
        "loads[0].watts",
        "loads[0].duty",
        "loads[0].running_w",
        "loads[1].running_w",
        "loads[1].name",
        "outage.autonomy_h",
        "outage.battery_ratings",
        "outage.cuts_per_week",
        "site.supply_v",
    ];
    assert_eq!(paths, expected);
}

#[test]
fn a_battery_rate_given_twice_is_refused_where_it_stands() {
    assert_refused("\"hours\": 10", "\"hours\": 20", "battery_ratings[1]", "twice");
}

#[test]
fn a_file_that_is_not_there_is_an_error_of_another_kind() {
    let missing = file("gone.json", "");
    std::fs::remove_file(&missing).expect("it was there");
    let output = keeplit(&["size", missing.to_str().expect("UTF-8")]).output().expect("the program runs");
    let told = String::from_utf8(output.stderr).expect("UTF-8");
    assert_eq!((output.status.code(), output.stdout.len()), (Some(1), 0), "{told}");
    assert!(told.lines().count() == 1 && told.contains("gone.json"), "{told}");
}

#[test]
fn a_command_that_is_no_command_is_refused_with_the_usage() {
    let output = keeplit(&["guess"]).output().expect("the program runs");
    assert_eq!(output.status.code(), Some(2));
    assert!(String::from_utf8_lossy(&output.stderr).contains("Usage"));
}
