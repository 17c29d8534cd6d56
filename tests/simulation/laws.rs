//! Laws of whole proofs, over unlike surveys and over hostile ones.

use std::sync::atomic::{AtomicBool, AtomicU32, Ordering};

use keeplit::documents::survey;
use keeplit::simulation::day::Day;
use keeplit::simulation::year::Years;
use keeplit::simulation::{self, wells::Kinetics};
use keeplit::sizing::finding::Finding;
use keeplit::sizing::proof::{EndedBy, Recovery, RestsOn};
use keeplit::sizing::{Assumptions, Design, Survey};
use keeplit::units::Hours;
use serde_json::{Value, json};

fn base() -> Value {
    json!({
        "format": "keeplit-survey-1",
        "outage": { "autonomy_h": 5, "cuts_per_week": 7, "mains_between_cuts_h": 12 },
        "loads": [
            { "name": "Fridge", "running_w": 120, "power_factor": 0.7, "start": "compressor", "surge_multiple": 6, "duty": 0.4 },
            { "name": "Lamps", "running_w": 60, "windows": [["18:00", "23:30"]] },
            { "name": "Iron", "running_w": 700, "duty": 0.5, "windows": [["19:00", "20:00"]] },
            { "name": "Fans", "quantity": 3, "running_w": 55, "start": "motor_psc", "windows": [["10:00", "22:00"]] }
        ]
    })
}

fn proved(change: impl FnOnce(&mut Value)) -> (Survey, Design) {
    let mut text = base();
    change(&mut text);
    let (draft, survey) = survey::read(&text.to_string()).unwrap_or_else(|faults| panic!("{faults:?}"));
    let design = simulation::with_detail(&survey, simulation::design(&survey, draft.assumptions(&[])));
    (survey, design)
}

/// Every number of a proof is finite.
fn assert_finite(design: &Design) {
    let value = serde_json::to_value(&design.proof).expect("a proof is JSON");
    fn look(value: &Value, path: &str) {
        match value {
            Value::Null => {
                let may_lack = ["missing_a", "out_of_evening_gains_h", "year"];
                assert!(may_lack.iter().any(|key| path.ends_with(key)), "{path} is no number");
            }
            Value::Array(entries) => entries.iter().for_each(|entry| look(entry, path)),
            Value::Object(members) => members.iter().for_each(|(key, value)| look(value, &format!("{path}.{key}"))),
            _ => {}
        }
    }
    look(&value, "proof");
}

#[test]
fn the_bank_offered_lasts_the_cut_in_every_case_that_it_promises() {
    for kind in ["flooded_tubular", "flooded_flat_plate", "vrla_agm", "vrla_gel", "lfp"] {
        for hours in [0.5, 2.0, 5.0, 24.0] {
            let (_, design) = proved(|text| {
                text["choice"] = json!({ "chemistry": kind });
                text["outage"]["autonomy_h"] = json!(hours);
            });
            let proof = design.proof.as_ref().expect("it was played");
            assert!(proof.holds && proof.runtime_aged.0 >= hours, "{kind}, {hours} h: {:?}", proof.runtime_aged);
            let played = design.bank.methods.kibam.expect("it was played");
            assert!(played <= design.bank.required, "{kind}, {hours} h");
            assert!(proof.cases.iter().all(|case| case.holds), "{kind}, {hours} h");
            assert_finite(&design);
        }
    }
}

#[test]
fn age_and_cold_only_shorten_it() {
    let (_, design) = proved(|text| text["site"] = json!({ "battery_coldest_c": 2, "battery_hottest_c": 40 }));
    let proof = design.proof.expect("it was played");
    for ages in proof.cases.chunks(3) {
        assert!(ages.windows(2).all(|pair| pair[0].runtime <= pair[1].runtime), "{ages:?}");
    }
    let (new, aged) = proof.cases.split_at(3);
    assert!(new.iter().zip(aged).all(|(new, aged)| aged.runtime < new.runtime && aged.lowest <= new.lowest));
    assert!(proof.detail.as_ref().expect("it was played").by_hour.iter().all(|hour| hour.aged < hour.new));
}

#[test]
fn short_hard_cuts_raise_the_bank_above_what_the_formulas_ask_for() {
    // A high cut-off ends the cut on volts, which no method of charge sees.
    let (_, design) = proved(|text| text["assumptions"] = json!({ "cut_off_v_per_cell": 1.98 }));
    let methods = design.bank.methods;
    let played = methods.kibam.expect("it was played");
    assert!(played > methods.peukert.max(methods.section), "{methods:?}");
    assert_eq!(design.bank.required, played);
    assert!(design.proof.as_ref().expect("it was played").holds);
    assert!(design.findings.iter().any(|finding| matches!(finding, Finding::MethodsDiffer { .. })));
}

#[test]
fn each_load_left_off_makes_it_last_longer_and_the_dearest_stands_first() {
    let (survey, design) = proved(|_| {});
    let proof = design.proof.as_ref().expect("it was played");
    let costs = &proof.detail.as_ref().expect("it was played").costs;
    assert_eq!(costs.len(), survey.loads.len());
    assert!(costs.iter().all(|cost| cost.off.0 > 0.0));
    assert!(costs.windows(2).all(|pair| pair[0].off >= pair[1].off));
    let iron = costs.iter().find(|cost| cost.load == "Iron").expect("it is on the list");
    assert_eq!(iron.out_of_evening, None, "it is on in the evening only");
    let without = simulation::costs::runtime_with(&survey, &design, |row| row != iron.row);
    let whole = simulation::costs::runtime_with(&survey, &design, |_| true);
    assert!((without.0 - whole.0 - iron.off.0).abs() < 1e-9);
    assert!((whole.0 - proof.runtime_aged.0).abs() < 1e-9);
    assert!(simulation::costs::runtime_with(&survey, &design, |_| false).0 > whole.0);
}

#[test]
fn four_weeks_tell_a_bank_that_recovers_from_one_that_does_not() {
    let (_, fine) = proved(|_| {});
    assert_eq!(fine.proof.as_ref().map(|proof| proof.weeks.recovery), Some(Recovery::FullBeforeNextCut));
    let (_, poor) = proved(|text| {
        text["outage"]["cuts_per_week"] = json!(21);
        text["outage"]["mains_between_cuts_h"] = json!(2);
    });
    let weeks = &poor.proof.as_ref().expect("it was played").weeks;
    assert_ne!(weeks.recovery, Recovery::FullBeforeNextCut);
    assert!(weeks.missing_hours > Hours::ZERO && weeks.days.len() == 28);
    let told = |finding: &Finding| matches!(finding, Finding::NeverRecovers { .. } | Finding::SlowlyLosing { .. });
    assert!(poor.findings.iter().any(told), "{:?}", poor.findings);
    assert!(weeks.days[27].lowest < fine.proof.as_ref().expect("it was played").weeks.days[27].lowest);
}

#[test]
fn the_current_that_is_missing_is_the_one_that_would_do() {
    let (survey, design) = proved(|text| {
        text["outage"]["cuts_per_week"] = json!(14);
        text["outage"]["mains_between_cuts_h"] = json!(3);
    });
    let weeks = &design.proof.as_ref().expect("it was played").weeks;
    let Some(missing) = weeks.missing_current else { panic!("{:?}", weeks.recovery) };
    let mut stronger = design.clone();
    stronger.charger.current = design.charger.current + missing;
    stronger.charger.most = stronger.charger.current;
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    let plant = simulation::plant::Plant::of(&survey, &design).0;
    let bench = simulation::cases::Bench { survey: &survey, design: &stronger, plant, day: &day };
    let passage = simulation::passage::Passage {
        course: bench.course(simulation::plant::Plant::ruling(&survey)),
        charging: simulation::recharge::Charging::of(&survey, &stronger, &day),
    };
    let again = simulation::weeks::weeks(&survey, &stronger, &passage, 1.0);
    assert_eq!(again.recovery, Recovery::FullBeforeNextCut);
}

#[test]
fn announced_blocks_move_on_and_low_voltage_hours_keep_the_mains_away() {
    let (survey, design) = proved(|text| {
        text["outage"]["blocks"] = json!([["06:00", "08:00"], ["18:00", "20:00"]]);
        text["outage"]["blocks_shift_h"] = json!(2);
        text["outage"]["low_voltage_h_per_day"] = json!(1.5);
    });
    let offs = simulation::offs::weeks(&survey, &design);
    assert!(offs.windows(2).all(|pair| pair[0].to < pair[1].from), "{offs:?}");
    let hours: f64 = offs.iter().map(|off| off.to - off.from).sum();
    // Two blocks of 2 h, half an hour over each, and an hour and a half of low voltage that may lie within one.
    assert!((28.0 * 5.0..=28.0 * 6.5).contains(&hours), "{hours}");
    assert!(
        offs.iter().any(|off| (off.from - (24.0 + 8.0)).abs() < 1e-9),
        "the morning block of the second day begins at 8"
    );
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    let years = Years::new(&survey, &design, &day, 1);
    let played = years.play(0..3, &AtomicBool::new(false), &AtomicU32::new(0)).expect("nobody stopped it");
    assert_eq!(years.told(&played).rests_on, RestsOn::Schedule);
    assert_ne!(played[0], played[1], "no two years are alike");
}

#[test]
fn one_thread_or_two_give_the_same_bits() {
    let (survey, design) = proved(|text| text["outage"]["cuts_per_week"] = json!(12));
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    let years = Years::new(&survey, &design, &day, 42);
    let (go, done) = (AtomicBool::new(false), AtomicU32::new(0));
    let alone = years.play(0..60, &go, &done).expect("nobody stopped it");
    let halves = std::thread::scope(|scope| {
        let late = scope.spawn(|| years.play(23..60, &go, &done));
        let early = years.play(0..23, &go, &done);
        [early, late.join().expect("it does not panic")].map(|half| half.expect("nobody stopped it"))
    });
    let together: Vec<_> = halves.into_iter().flatten().collect();
    assert_eq!(years.told(&alone), years.told(&together));
    assert!(alone == together && done.load(Ordering::Relaxed) == 120);
    let other = Years::new(&survey, &design, &day, 43).play(0..60, &go, &done).expect("nobody stopped it");
    assert_ne!(alone, other, "another seed is another chance");
}

#[test]
fn stopped_years_give_no_half_answer() {
    let (survey, design) = proved(|_| {});
    let day = Day::of(&design.demand.day, &design.inverter.losses);
    let done = AtomicU32::new(0);
    assert!(Years::new(&survey, &design, &day, 1).play(0..1000, &AtomicBool::new(true), &done).is_none());
    assert_eq!(done.load(Ordering::Relaxed), 0);
}

#[test]
fn more_cuts_and_an_old_bank_run_dry_more_often() {
    let told = |cuts: f64| {
        let (survey, design) = proved(|text| {
            text["outage"]["cuts_per_week"] = json!(cuts);
            text["outage"]["usual_h"] = json!(3);
            text["outage"]["longest_h"] = json!(30);
        });
        let year = simulation::with_years(&survey, design, 300, 9).proof.and_then(|proof| proof.year);
        year.expect("it was played")
    };
    let (few, many) = (told(1.0), told(6.0));
    assert!(many.last.run_outs_per_year > few.last.run_outs_per_year);
    assert!(many.first.run_outs_per_year < many.last.run_outs_per_year);
    for year in [&few.first, &few.last, &many.first, &many.last] {
        let (low, high) = year.run_outs_interval;
        assert!(low <= year.run_outs_per_year && year.run_outs_per_year <= high && high > low);
        assert!((0.0..=1.0).contains(&year.ridden_through));
        assert!(year.lowest_charge.windows(2).all(|pair| pair[0] <= pair[1]));
    }
    assert_eq!(few.rests_on, RestsOn::Answers);
}

#[test]
fn a_country_stands_in_where_nobody_can_say_and_is_named() {
    let (survey, design) = proved(|text| text["outage"]["region"] = json!("Kenya"));
    let year =
        simulation::with_years(&survey, design, 50, 1).proof.and_then(|proof| proof.year).expect("it was played");
    assert_eq!(year.rests_on, RestsOn::Country { region: "Kenya", year: "2018" });
    assert!((year.first.cuts_per_year - 45.6).abs() < 4.0, "{}", year.first.cuts_per_year);
}

#[test]
fn hostile_surveys_get_an_answer_in_order() {
    type Change = fn(&mut Value);
    let cases: [(&str, Change); 12] = [
        ("next to no load", |text| text["loads"] = json!([{ "name": "LED", "running_w": 0.1 }])),
        ("more than any bank carries", |text| {
            text["loads"] = json!([{ "name": "Kiln", "running_w": 100000, "quantity": 1000 }])
        }),
        ("never any mains", |text| text["outage"]["mains_between_cuts_h"] = json!(0)),
        ("a week long", |text| text["outage"]["autonomy_h"] = json!(168)),
        ("a cut in every hour", |text| text["outage"]["cuts_per_week"] = json!(168)),
        ("no cut at all", |text| text["outage"]["cuts_per_week"] = json!(0)),
        ("a block of half an ampere-hour", |text| text["battery_ratings"] = json!([{ "hours": 20, "ah": 0.5 }])),
        ("ratings that contradict", |text| {
            text["battery_ratings"] =
                json!([{ "hours": 20, "ah": 100 }, { "hours": 10, "ah": 120 }, { "hours": 1, "ah": 90 }]);
        }),
        ("the cold", |text| text["site"] = json!({ "battery_coldest_c": -40, "battery_hottest_c": -39 })),
        ("the heat", |text| text["site"] = json!({ "battery_coldest_c": 60, "battery_hottest_c": 70 })),
        ("half the life gone", |text| {
            text["assumptions"] = json!({ "ageing_factor": 2.0, "aged_resistance_multiple": 5.0 })
        }),
        ("no mains in any hour of the day", |text| text["outage"]["low_voltage_h_per_day"] = json!(24)),
    ];
    for (name, change) in cases {
        for kind in ["flooded_tubular", "lfp"] {
            let (survey, design) = proved(|text| {
                text["choice"] = json!({ "chemistry": kind });
                change(text);
            });
            assert_finite(&design);
            let design = simulation::with_years(&survey, design, 3, 1);
            assert_finite(&design);
            let proof = design.proof.as_ref().expect("it was played");
            assert!(proof.year.is_some(), "{name}");
            if name.contains("mains") {
                assert_eq!(proof.weeks.recovery, Recovery::NeverRecovers, "{name}");
            }
            let told = design.findings.iter().any(|finding| matches!(finding, Finding::CutNotHeld { .. }));
            assert!(proof.holds != told, "{name}: {:?}", design.findings);
            assert!(proof.runtime_aged.0 >= survey.outage.autonomy.0 || told, "{name}");
        }
    }
}

#[test]
fn ratings_of_three_rates_are_fitted_and_refused_when_they_follow_no_battery() {
    use keeplit::sizing::proof::WellsFrom;
    let with = |ratings: Value| proved(|text| text["battery_ratings"] = ratings).1;
    // Maker's data sheet, 12 V 40 Ah glass mat.
    let fitted = with(json!([{ "hours": 20, "ah": 40 }, { "hours": 5, "ah": 34 }, { "hours": 1, "ah": 24 }]));
    let wells = fitted.proof.as_ref().expect("it was played").wells;
    assert_eq!(wells.from, WellsFrom::Ratings);
    assert!((wells.at_hand_share - 0.456).abs() < 0.001 && (wells.rate_per_h - 0.941).abs() < 0.001);
    let odd = with(json!([{ "hours": 20, "ah": 40 }, { "hours": 5, "ah": 39.99 }, { "hours": 1, "ah": 20 }]));
    assert_eq!(odd.proof.as_ref().expect("it was played").wells.from, WellsFrom::Exponent);
    assert!(odd.findings.iter().any(|finding| matches!(finding, Finding::RatingsNotKinetic { .. })));
}

#[test]
fn what_ends_a_cut_is_named() {
    let (_, design) = proved(|_| {});
    let proof = design.proof.expect("it was played");
    assert!(proof.cases.iter().all(|case| case.ended_by != EndedBy::CutEnds));
    let last = proof.curve.last().expect("it has moments");
    assert!((last.at.0 - proof.runtime_aged.0).abs() < 1e-9);
    assert!(proof.curve.windows(2).all(|pair| pair[0].at < pair[1].at));
    assert!(proof.curve.iter().all(|moment| (0.0..=1.0).contains(&moment.charge_left)));
    let _ = (Kinetics::PLAIN, Assumptions::defaults(keeplit::sizing::survey::Chemistry::Lfp));
}
