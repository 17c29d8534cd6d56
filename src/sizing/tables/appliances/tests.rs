use super::*;
use std::collections::HashSet;

#[test]
fn each_load_stands_once_and_is_found_by_its_key() {
    let keys: HashSet<_> = all().map(|appliance| appliance.key).collect();
    let names: HashSet<_> = all().map(|appliance| appliance.name).collect();
    assert_eq!((keys.len(), names.len(), all().count()), (118, 118, 118));
    assert!(all().all(|appliance| by_key(appliance.key) == Some(appliance)));
    assert_eq!(by_key("no_such_load"), None);
}

#[test]
fn the_groups_hold_every_load() {
    let grouped: usize = Group::ALL.into_iter().map(|group| of_group(group).count()).sum();
    assert_eq!(grouped, all().count());
    assert!(Group::ALL.into_iter().all(|group| of_group(group).next().is_some()));
}

#[test]
fn every_figure_is_within_what_a_survey_may_hold() {
    for appliance in all() {
        let key = appliance.key;
        assert!((0.1..=100_000.0).contains(&appliance.running.0), "{key}");
        assert!(appliance.power_factor.get() >= 0.4, "{key}");
        assert!((1.0..=10.0).contains(&appliance.surge_multiple), "{key}");
        assert!((0.0..=60.0).contains(&appliance.surge_lasts.0), "{key}");
        assert!(appliance.duty.get() > 0.0 && appliance.max_break.0 > 0.0, "{key}");
        assert!(!appliance.source.is_empty() && !appliance.current.is_empty(), "{key}");
    }
}

#[test]
fn motors_start_harder_than_they_run_and_for_some_time() {
    for appliance in all().filter(|appliance| appliance.start.is_motor()) {
        assert!(appliance.surge_multiple > 1.0 && appliance.surge_lasts > Seconds::ZERO, "{}", appliance.key);
    }
}

#[test]
fn figures_are_those_of_their_sources() {
    // key, running W, true power factor, where from
    let cases = [
        ("ceiling_fan", 75.0, 0.95, "load table of the Tamil Nadu electricity utility"),
        ("kettle", 1500.0, 1.0, "typical plates, from memory"),
        ("coffee_maker", 1000.0, 1.0, "US Department of Energy: 900 to 1,200 W"),
        ("oxygen_5_l", 350.0, 0.8, "WHO and UNICEF: 70 W for each l/min"),
        ("vacuum_cleaner", 1400.0, 0.92, "measured: true power factor 0.921"),
        ("desktop_pc", 120.0, 0.6, "US Department of Energy; measured true power factor 0.580"),
    ];
    for (key, watts, power_factor, source) in cases {
        let appliance = by_key(key).expect(key);
        assert_eq!((appliance.running.0, appliance.power_factor.get()), (watts, power_factor), "{key}: {source}");
    }
}

#[test]
fn computers_ride_through_no_more_than_the_iti_curve_says() {
    // ITI curve, revised 2000: 20 ms at no volts.
    for appliance in of_group(Group::Computers).filter(|a| !["laptop", "phone_charger"].contains(&a.key)) {
        assert!(appliance.max_break <= Milliseconds(20.0), "{}", appliance.key);
    }
}

#[test]
fn whatever_a_life_hangs_on_wants_a_sine_or_asks_for_care() {
    for appliance in all().filter(|appliance| appliance.life_support == LifeSupport::Yes) {
        assert_eq!((appliance.group, appliance.needs_sine), (Group::Medical, NeedsSine::Yes), "{}", appliance.key);
    }
}

#[test]
fn a_load_made_of_it_carries_its_figures() {
    let load = by_key("freezer_chest").expect("it is listed").load(2);
    assert_eq!((load.name.as_str(), load.quantity, load.on_together), ("Chest freezer", 2, 2));
    assert_eq!((load.running, load.surge_multiple, load.duty.get()), (Watts(150.0), 6.0, 0.45));
    assert_eq!((load.windows, load.motor_plate, load.turn), (vec![Window::ALL_DAY], None, None));
}
#[test]
fn the_common_ones_are_all_listed_and_each_once() {
    let keys: HashSet<_> = common().map(|appliance| appliance.key).collect();
    assert_eq!(keys.len(), COMMON.len());
    assert!(common().all(Appliance::is_common));
    assert_eq!(all().filter(|appliance| appliance.is_common()).count(), COMMON.len());
}
