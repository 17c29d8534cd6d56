//! Laws of the whole engine, for any survey within the limits.

use keeplit::documents::{limits, survey};
use keeplit::sizing::design::{Cable, CrossSection, Run};
use keeplit::sizing::{Design, Survey};
use keeplit::units::{Celsius, Watts};
use keeplit::wording;
use proptest::prelude::*;
use proptest::sample::select;
use serde_json::{Value, json};

use super::stage_numbers;

const STARTS: [&str; 9] = [
    "resistive",
    "electronic",
    "motor_psc",
    "motor_cap_start",
    "motor_split_phase",
    "compressor",
    "universal_motor",
    "transformer",
    "heater_ptc",
];

/// Anywhere within a limit, and often at its ends.
fn within(limit: limits::Limit) -> impl Strategy<Value = f64> {
    let (lowest, highest) = (limit.lowest, limit.highest);
    let lowest_above_zero = lowest.max(highest * 1e-6);
    prop_oneof![
        4 => lowest..=highest,
        4 => (0.0..=1.0_f64).prop_map(move |at| lowest.max(lowest_above_zero * (highest / lowest_above_zero).powf(at)).min(highest)),
        1 => Just(lowest),
        1 => Just(highest),
    ]
}

fn load() -> impl Strategy<Value = Value> {
    let power = (within(limits::RUNNING_W), within(limits::POWER_FACTOR), within(limits::DUTY), select(&STARTS[..]));
    let surge = (within(limits::SURGE_MULTIPLE), within(limits::SURGE_S), 1..=1000_u32);
    let rest = (select(vec![json!(null), json!("a"), json!("b")]), within(limits::MAX_BREAK_MS), any::<bool>());
    (power, surge, rest).prop_map(|(power, surge, (turn, max_break, evening))| {
        let windows = if evening { json!([["18:00", "01:00"]]) } else { json!([["00:00", "24:00"]]) };
        json!({ "name": "Load", "running_w": power.0, "power_factor": power.1, "duty": power.2, "start": power.3,
                "surge_multiple": surge.0, "surge_s": surge.1, "quantity": surge.2, "turn": turn,
                "max_break_ms": max_break, "windows": windows })
    })
}

fn site() -> impl Strategy<Value = Value> {
    let supply = (within(limits::SUPPLY_V), within(limits::FREQUENCY_HZ), within(limits::BREAKER_A));
    let room = (within(limits::TEMPERATURE_C), within(limits::TEMPERATURE_C), within(limits::TEMPERATURE_C));
    (supply, room, within(limits::ALTITUDE_M), any::<bool>()).prop_map(|(supply, room, altitude, vented)| {
        json!({ "supply_v": supply.0, "frequency_hz": supply.1, "incoming_breaker_a": supply.2,
                "battery_coldest_c": room.0.min(room.1), "battery_hottest_c": room.0.max(room.1),
                "inverter_ambient_c": room.2, "altitude_m": altitude, "battery_room_vented": vented })
    })
}

fn choice() -> impl Strategy<Value = Value> {
    let kind = select(vec!["flooded_tubular", "flooded_flat_plate", "vrla_agm", "vrla_gel", "lfp"]);
    let bus = select(vec![json!(null), json!(12), json!(24), json!(48)]);
    let cable = (select(vec!["iec", "nec"]), select(vec!["copper", "aluminium"]), select(vec!["pvc_70", "xlpe_90"]));
    let method = select(vec!["B1", "C", "E", "F"]);
    (kind, bus, cable, method).prop_map(|(chemistry, bus, cable, method)| {
        json!({ "chemistry": chemistry, "bus_v": bus, "code": cable.0, "conductor": cable.1, "insulation": cable.2,
                "method": method, "ac_method": method })
    })
}

/// Any survey within the limits, its extremes included.
fn any_survey() -> impl Strategy<Value = Survey> {
    let outage = (within(limits::AUTONOMY_H), within(limits::CUTS_PER_WEEK), within(limits::MAINS_BETWEEN_CUTS_H));
    let length = || within(limits::LENGTH_M);
    let runs = (length(), length(), length(), length(), proptest::option::of(length()));
    let ratings = proptest::option::of((within(limits::RATING_AH), 0.3..1.0_f64));
    let loads = proptest::collection::vec(load(), 1..5);
    (site(), outage, loads, choice(), runs, ratings).prop_map(|(site, outage, loads, choice, runs, ratings)| {
        let ratings = ratings.map_or(
            json!([]),
            |(ah, share)| json!([{ "hours": 20, "ah": ah }, { "hours": 5, "ah": (ah * share).max(0.5) }]),
        );
        let document = json!({
            "format": survey::FORMAT, "site": site, "loads": loads, "choice": choice, "battery_ratings": ratings,
            "outage": { "autonomy_h": outage.0, "cuts_per_week": outage.1, "mains_between_cuts_h": outage.2 },
            "runs": { "bank_to_inverter_m": runs.0, "string_lead_m": runs.1, "inverter_to_board_m": runs.2,
                      "mains_to_inverter_m": runs.3, "charger_to_bank_m": runs.4 },
        });
        survey::read(&document.to_string()).unwrap_or_else(|faults| panic!("{faults:?}: {document}")).1
    })
}

/// A survey of a home's size, for laws that the trade's largest sizes would hide.
fn home() -> impl Strategy<Value = Survey> {
    (any_survey(), 20.0..400.0_f64, 0.5..12.0_f64, 1.0..6.0_f64, 10.0..40.0_f64).prop_map(
        |(mut survey, watts, hours, length, warmth)| {
            for (at, load) in survey.loads.iter_mut().enumerate() {
                load.running = Watts(watts * (1.0 + at as f64));
                load.power_factor = keeplit::units::Fraction::constant(0.8);
                load.surge_multiple = load.surge_multiple.min(6.0);
                (load.quantity, load.on_together) = (1, 1);
            }
            survey.outage.autonomy.0 = hours;
            survey.runs.bank_to_inverter.0 = length;
            survey.site.inverter_ambient = Celsius(warmth);
            survey.site.battery_hottest = Celsius(70.0);
            survey
        },
    )
}

fn answer(survey: &Survey) -> Design {
    keeplit::simulation::design(survey, keeplit::sizing::Assumptions::defaults(survey.choice.chemistry))
}

fn cable(design: &Design, run: Run) -> Option<&Cable> {
    design.cables.iter().find(|cable| cable.run == run)
}

/// Copper or aluminium of one pole, in mm².
fn metal(cable: &Cable) -> f64 {
    let one = match cable.size.expect("a size is always named") {
        CrossSection::Metric(area) => area.0,
        CrossSection::Awg(name) => {
            let row = keeplit::sizing::tables::conductors::AWG.iter().find(|row| row.name == name);
            row.expect("a size of the table").area.0
        }
    };
    one * f64::from(cable.parallel)
}

proptest! {
    #[test]
    fn every_number_is_finite_whatever_is_asked(survey in any_survey()) {
        let design = answer(&survey);
        for line in &design.working {
            prop_assert!(line.result.is_finite(), "{line:?}");
            prop_assert!(line.values.iter().all(|value| value.value.is_finite()), "{line:?}");
        }
        let draft = keeplit::documents::Draft::default();
        let written = keeplit::documents::design::write(&design, &draft);
        prop_assert!(stage_numbers(&written).len() > 60);
        for finding in &design.findings {
            let told = wording::finding(finding);
            prop_assert!(!told.text.contains("NaN") && !told.text.contains("inf "), "{told:?}");
        }
    }

    #[test]
    fn the_heaviest_findings_come_first(survey in any_survey()) {
        let weights: Vec<_> = answer(&survey).findings.iter().map(|finding| finding.severity()).collect();
        prop_assert!(weights.is_sorted_by(|one, next| one >= next), "{weights:?}");
    }

    #[test]
    fn the_same_survey_always_gets_the_same_design(survey in any_survey()) {
        prop_assert_eq!(answer(&survey), answer(&survey));
    }

    #[test]
    fn the_bank_offered_is_never_below_the_bank_required(survey in any_survey()) {
        let bank = answer(&survey).bank;
        prop_assert!(bank.installed >= bank.required || bank.strings == u32::MAX, "{bank:?}");
        prop_assert!(bank.required.0 >= bank.methods.peukert.0.max(bank.methods.section.0) * (1.0 - 1e-12));
    }

    #[test]
    fn a_heavier_load_on_the_same_unit_and_lead_never_gets_a_smaller_bank(survey in home(), factor in 1.0..1.5_f64) {
        let mut heavier = survey.clone();
        heavier.loads[0].running = heavier.loads[0].running * factor;
        let (light, heavy) = (answer(&survey), answer(&heavier));
        // A thicker lead leaves more volts at the unit, and a smaller bank may do.
        let is_same_lead = light.cables[0].loop_resistance == heavy.cables[0].loop_resistance;
        if light.inverter.rating == heavy.inverter.rating && light.bank.bus == heavy.bank.bus && is_same_lead {
            let (light, heavy) = (light.bank, heavy.bank);
            prop_assert!(heavy.required.0 >= light.required.0 * (1.0 - 1e-9), "{} {}", heavy.required.0, light.required.0);
            prop_assert!(heavy.installed.0 >= light.installed.0 * (1.0 - 1e-9));
        }
    }

    #[test]
    fn a_longer_cut_never_gets_a_smaller_bank(survey in home(), factor in 1.0..3.0_f64) {
        let mut longer = survey.clone();
        longer.outage.autonomy.0 *= factor;
        let (short, long) = (answer(&survey), answer(&longer));
        if short.bank.bus == long.bank.bus {
            prop_assert!(long.bank.required.0 >= short.bank.required.0 * (1.0 - 1e-9));
        }
    }

    #[test]
    fn a_colder_place_never_gets_a_smaller_bank(survey in home(), colder in 0.0..30.0_f64) {
        let mut cold = survey.clone();
        cold.site.battery_coldest.0 = (cold.site.battery_coldest.0 - colder).max(-40.0);
        let (warm, cold) = (answer(&survey), answer(&cold));
        prop_assert!(cold.bank.bus > warm.bank.bus || cold.bank.required >= warm.bank.required);
    }

    #[test]
    fn a_longer_battery_lead_is_never_thinner(survey in home(), factor in 1.0..4.0_f64) {
        let mut longer = survey.clone();
        longer.runs.bank_to_inverter.0 *= factor;
        let (short, long) = (answer(&survey), answer(&longer));
        let metal = |design: &Design| metal(cable(design, Run::BankToInverter).expect("always there"));
        prop_assert!(metal(&long) >= metal(&short), "{} {}", metal(&long), metal(&short));
    }

    #[test]
    fn every_device_lies_between_current_and_cable_or_it_is_told(survey in home()) {
        let design = answer(&survey);
        for cable in &design.cables {
            let told = design.findings.iter().any(|finding| {
                ["no_cable_fits", "no_fuse_fits"].contains(&wording::finding(finding).code)
            });
            let fits = cable.fuse.is_some_and(|fuse| fuse >= cable.design_current);
            prop_assert!(told || fits && cable.capacity >= cable.design_current, "{cable:?}");
        }
    }
}
