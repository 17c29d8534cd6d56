//! What must hold for every bank.

use proptest::prelude::*;

use super::example::{self, bank_with, shop};
use super::{bank, bank_for};
use crate::sizing::Assumptions;
use crate::sizing::Sheet;
use crate::sizing::design::{Bank, DayStretch, Demand, RulingMethod};
use crate::sizing::finding::Finding;
use crate::sizing::survey::{BatteryRating, BusVolts, Chemistry, StartsAt, TimeOfDay};
use crate::units::{AmpHours, Celsius, Hours, VoltAmps, Watts};

fn rating(hours: f64, capacity: f64) -> BatteryRating {
    BatteryRating { hours: Hours(hours), capacity: AmpHours(capacity) }
}

#[test]
fn a_steady_load_on_a_simple_unit_gets_the_bank_worked_by_hand() {
    // 400 W for 4 h through a unit without losses at 10.5 V: 38.095 A, 152.38 Ah. Glass mat, typical exponent 1.12:
    // t(38.095 A) = 4 h wants C_20 = 38.095 · 20 · (4/20)^(1/1.12) = 181.059 Ah; half of it may be used, 25 °C, no margin.
    let mut survey = shop(Chemistry::VrlaAgm);
    survey.site.battery_coldest = Celsius(25.0);
    survey.choice.bus = Some(BusVolts::V12);
    let mut factors = Assumptions::defaults(Chemistry::VrlaAgm);
    factors.set("bank_margin", 1.0).unwrap();
    let mut unit = example::inverter(Watts(400.0));
    unit.losses.no_load = Watts(0.0);
    unit.losses.quadratic = 0.0;
    let mut sheet = Sheet::default();
    let bank = bank_for(&[vec![(Watts(400.0), Hours(4.0))]], &survey, &unit, None, &factors, &mut sheet);
    assert!((bank.outage.0 - 152.381).abs() < 0.001, "{bank:?}");
    assert!((bank.methods.peukert.0 - 362.118).abs() < 0.001, "{bank:?}");
    assert!((bank.methods.section.0 - 226.324).abs() < 0.001, "{bank:?}");
    assert_eq!((bank.required, bank.ruled_by), (bank.methods.peukert, RulingMethod::Peukert));
    assert_eq!((bank.block.0, bank.strings, bank.installed.0), (200.0, 2, 400.0));
    assert_eq!((bank.peukert_exponent, bank.cut_off.0), (1.12, 10.5));
    assert!(sheet.findings.contains(&Finding::TypicalRatings { peukert: 1.12 }));
}

#[test]
fn a_short_hard_cut_is_ruled_by_the_section_method() {
    let mut factors = Assumptions::defaults(Chemistry::Lfp);
    factors.set("depth_of_discharge_max", 1.0).unwrap();
    let (bank, _) = bank_with(&shop(Chemistry::Lfp), &[(900.0, 1.0)], &factors);
    assert_eq!(bank.ruled_by, RulingMethod::Section);
    assert_eq!(bank.required, bank.methods.section);
}

#[test]
fn a_heavy_load_is_given_higher_bus_volts_and_says_so_when_the_bus_is_forced() {
    let chemistry = Chemistry::FloodedTubular;
    for (watts, bus) in [(500.0, BusVolts::V12), (1200.0, BusVolts::V24), (2800.0, BusVolts::V48)] {
        let mut survey = shop(chemistry);
        assert_eq!(example::bank(&survey, &[(watts, 1.0)]).0.bus, bus, "{watts} W");
        survey.choice.bus = Some(BusVolts::V12);
        let (forced, sheet) = example::bank(&survey, &[(watts, 1.0)]);
        assert_eq!(forced.bus, BusVolts::V12);
        let told = sheet.findings.iter().any(|finding| matches!(finding, Finding::BusTooLow { .. }));
        assert_eq!(told, bus != BusVolts::V12, "{watts} W");
        let stopped = sheet.findings.iter().any(|finding| matches!(finding, Finding::CurrentAboveCable { .. }));
        assert_eq!(stopped, forced.peak_current.0 > 150.0, "{watts} W");
    }
}

#[test]
fn too_many_strings_raise_the_bus_and_are_a_stop_where_that_does_not_help() {
    let survey = shop(Chemistry::VrlaAgm);
    let (raised, sheet) = example::bank(&survey, &[(600.0, 12.0)]);
    assert_eq!(raised.bus, BusVolts::V24, "one string at 12 V would not do: {raised:?}");
    assert!(!sheet.findings.iter().any(|finding| matches!(finding, Finding::TooManyStrings { .. })));
    let (helpless, sheet) = example::bank(&survey, &[(4000.0, 20.0)]);
    assert_eq!(helpless.bus, BusVolts::V48);
    assert!(sheet.findings.contains(&Finding::TooManyStrings { strings: helpless.strings, most: 4 }));
    assert!(helpless.installed >= helpless.required);
}

#[test]
fn ratings_that_contradict_each_other_are_refused_and_the_typical_ones_used() {
    let mut survey = shop(Chemistry::VrlaGel);
    let typical = example::bank(&survey, &[(300.0, 4.0)]).0;
    survey.battery_ratings = vec![rating(20.0, 100.0), rating(10.0, 110.0)];
    let (refused, sheet) = example::bank(&survey, &[(300.0, 4.0)]);
    let finding =
        Finding::RatingsContradict { slow: (Hours(20.0), AmpHours(100.0)), fast: (Hours(10.0), AmpHours(110.0)) };
    assert!(sheet.findings.contains(&finding), "{:?}", sheet.findings);
    assert_eq!((refused.peukert_exponent, refused.required), (typical.peukert_exponent, typical.required));
}

#[test]
fn colder_than_the_table_takes_the_coldest_row_and_says_so() {
    let mut survey = shop(Chemistry::FloodedTubular);
    survey.site.battery_coldest = Celsius(-15.0);
    let (bank, sheet) = example::bank(&survey, &[(300.0, 4.0)]);
    assert_eq!(bank.temperature_factor, 1.52);
    let finding =
        Finding::TemperatureOutsideTable { given: Celsius(-15.0), lowest: Celsius(-3.9), highest: Celsius(25.0) };
    assert!(sheet.findings.contains(&finding));
}

#[test]
fn a_draw_faster_than_any_rating_is_told() {
    let mut survey = shop(Chemistry::VrlaAgm);
    survey.battery_ratings = vec![rating(20.0, 100.0), rating(10.0, 93.0)];
    let (_, sheet) = example::bank(&survey, &[(300.0, 1.0)]);
    let told = sheet.findings.iter().find_map(|finding| match finding {
        Finding::OutsideRatings { hours, shortest, longest } => Some((*hours, *shortest, *longest)),
        _ => None,
    });
    let (hours, shortest, longest) = told.expect("an hour's cut empties the bank in less than ten");
    assert!(hours < shortest && (shortest, longest) == (Hours(10.0), Hours(20.0)));
}

#[test]
fn nothing_drawn_still_gets_one_string_of_the_smallest_block() {
    let mut unit = example::inverter(Watts(0.0));
    unit.losses.no_load = Watts(0.0);
    let survey = shop(Chemistry::VrlaAgm);
    let factors = Assumptions::defaults(Chemistry::VrlaAgm);
    let bank = bank_for(&[vec![(Watts(0.0), Hours(4.0))]], &survey, &unit, None, &factors, &mut Sheet::default());
    assert_eq!((bank.required.0, bank.strings, bank.installed.0), (0.0, 1, 7.0));
    assert!(bank.depth_of_discharge == 0.0 && bank.aged_resistance.0.is_finite());
}

#[test]
fn every_figure_of_the_bank_stands_on_the_sheet_with_the_same_value() {
    let (bank, sheet) = example::bank(&shop(Chemistry::FloodedTubular), &[(300.0, 2.0), (700.0, 1.0), (150.0, 3.0)]);
    example::assert_on_sheet("bank", &bank, &sheet);
    example::assert_on_sheet("bank.methods", &bank.methods, &sheet);
}

#[test]
fn the_worst_of_many_starts_is_as_large_as_the_largest_alone() {
    let survey = shop(Chemistry::VrlaAgm);
    let factors = Assumptions::defaults(Chemistry::VrlaAgm);
    let unit = example::inverter(Watts(900.0));
    let light = vec![(Watts(100.0), Hours(4.0))];
    let early = vec![(Watts(700.0), Hours(1.0)), (Watts(100.0), Hours(3.0))];
    let late = vec![(Watts(100.0), Hours(3.0)), (Watts(700.0), Hours(1.0))];
    let size = |cuts: &[Vec<_>]| bank_for(cuts, &survey, &unit, None, &factors, &mut Sheet::default());
    let all = size(&[light, early, late.clone()]);
    let alone = size(&[late]);
    assert!((all.methods.section.0 - alone.methods.section.0).abs() < 1e-9);
    assert!((all.methods.peukert.0 - alone.methods.peukert.0).abs() < 1e-9);
}

fn chemistry() -> impl Strategy<Value = Chemistry> {
    prop::sample::select(Chemistry::ALL.to_vec())
}

fn steps() -> impl Strategy<Value = Vec<(f64, f64)>> {
    prop::collection::vec((0.0..1500.0, 0.05..4.0), 1..8)
}

/// One to four ratings that a battery could have: the exponent rises as the rate does.
fn ratings() -> impl Strategy<Value = Vec<BatteryRating>> {
    (0.02..0.25_f64, 0.0..0.1_f64, 1_usize..5).prop_map(|(slow, more, count)| {
        let mut capacity = 100.0;
        let times = [20.0, 10.0, 5.0, 1.0_f64];
        let mut ratings = vec![rating(20.0, capacity)];
        for at in 1..count {
            let k = 1.0 + slow + more * at as f64;
            capacity *= (times[at] / times[at - 1]).powf(1.0 - 1.0 / k);
            ratings.push(rating(times[at], capacity));
        }
        ratings
    })
}

fn sized(survey: &crate::sizing::Survey, cut: &[(f64, f64)]) -> Bank {
    example::bank(survey, cut).0
}

proptest! {
    #[test]
    fn the_bank_offered_is_never_smaller_than_what_is_required(kind in chemistry(), cut in steps(), ratings in ratings()) {
        let mut survey = shop(kind);
        survey.battery_ratings = ratings;
        let bank = sized(&survey, &cut);
        prop_assert!(bank.installed >= bank.required);
        prop_assert!(bank.required >= bank.methods.peukert && bank.required >= bank.methods.section);
        prop_assert!(bank.depth_of_discharge <= bank.depth_of_discharge_max);
        prop_assert!(bank.aged_resistance.0.is_finite() && bank.end_open_circuit.0 > 0.0);
    }

    #[test]
    fn a_colder_bank_is_never_smaller(kind in chemistry(), cut in steps(), one in -20.0..40.0, other in -20.0..40.0) {
        let mut survey = shop(kind);
        survey.choice.bus = Some(BusVolts::V48);
        let mut at = |celsius: f64| {
            survey.site.battery_coldest = Celsius(celsius);
            sized(&survey, &cut).required
        };
        prop_assert!(at(f64::min(one, other)) >= at(f64::max(one, other)));
    }

    #[test]
    fn a_heavier_load_never_gets_a_smaller_bank_on_the_same_inverter(
        kind in chemistry(), cut in steps(), ratings in ratings(), at in 0_usize..8, more in 0.0..800.0,
    ) {
        let mut survey = shop(kind);
        survey.choice.bus = Some(BusVolts::V48);
        survey.battery_ratings = ratings;
        let mut heavier = cut.clone();
        heavier[at % cut.len()].0 += more;
        let (light, heavy) = (sized(&survey, &cut), sized(&survey, &heavier));
        prop_assert!(heavy.required.0 >= light.required.0 * (1.0 - 1e-9));
        prop_assert!(heavy.methods.section.0 >= light.methods.section.0 * (1.0 - 1e-9));
        prop_assert!(heavy.methods.peukert.0 >= light.methods.peukert.0 * (1.0 - 1e-9));
    }

    #[test]
    fn a_longer_cut_never_gets_a_smaller_bank(kind in chemistry(), cut in steps(), watts in 0.0..1500.0, hours in 0.1..4.0) {
        let mut survey = shop(kind);
        survey.choice.bus = Some(BusVolts::V48);
        let mut longer = cut.clone();
        longer.push((watts, hours));
        prop_assert!(sized(&survey, &longer).required.0 >= sized(&survey, &cut).required.0 * (1.0 - 1e-9));
    }

    #[test]
    fn twice_the_volts_want_half_the_ampere_hours(kind in chemistry(), cut in steps()) {
        let mut survey = shop(kind);
        let mut at = |bus| {
            survey.choice.bus = Some(bus);
            sized(&survey, &cut).required.0
        };
        let (low, high) = (at(BusVolts::V12), at(BusVolts::V48));
        prop_assert!((low / high - 4.0).abs() < 1e-9);
    }
}

/// A day of stretches whose power changes on full quarters of an hour.
fn day() -> impl Strategy<Value = Vec<DayStretch>> {
    prop::collection::btree_map(1_u16..96, 0.0..900.0, 1..7).prop_map(|changes| {
        let mut powers: Vec<_> = changes.into_iter().collect();
        powers.insert(0, (0, powers[0].1 / 2.0));
        let end = |at: usize| powers.get(at + 1).map_or(96, |next| next.0);
        let time = |quarter: u16| TimeOfDay::from_minutes(quarter * 15).unwrap();
        let stretch = |(at, &(quarter, watts)): (usize, &(u16, f64))| DayStretch {
            from: time(quarter),
            to: time(end(at)),
            average: Watts(watts),
            peak: Watts(watts),
            peak_va: VoltAmps(watts),
        };
        powers.iter().enumerate().map(stretch).collect()
    })
}

proptest! {
    #[test]
    fn no_start_of_the_day_asks_for_more_than_the_bank_gives(
        day in day(), quarters in 1_u16..48, minute in 0_u16..1440, ratings in ratings(),
    ) {
        let mut survey = shop(Chemistry::VrlaAgm);
        survey.outage.autonomy = Hours(f64::from(quarters) / 4.0);
        survey.choice.bus = Some(BusVolts::V48);
        survey.battery_ratings = ratings;
        let demand = Demand { day, ..example::demand() };
        let unit = example::inverter(Watts(1000.0));
        let factors = Assumptions::defaults(Chemistry::VrlaAgm);
        let mut size = |starts_at| {
            survey.outage.starts_at = starts_at;
            bank(&survey, &demand, &unit, None, &factors, &mut Sheet::default()).methods
        };
        let worst = size(StartsAt::Worst);
        let at = size(StartsAt::At(TimeOfDay::from_minutes(minute).unwrap()));
        prop_assert!(at.peukert.0 <= worst.peukert.0 * (1.0 + 1e-9), "{at:?} {worst:?}");
        prop_assert!(at.section.0 <= worst.section.0 * 1.01, "{at:?} {worst:?}");
    }
}
