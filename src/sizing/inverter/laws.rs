//! Laws that hold for any demand.

use proptest::prelude::*;

use super::*;
use crate::sizing::load_survey::example::*;
use crate::sizing::survey::*;
use crate::units::{Celsius, Metres};

fn a_load() -> impl Strategy<Value = Load> {
    let kind = prop::sample::select(StartKind::ALL.to_vec());
    (1.0..2500.0, 0.4..=1.0, kind, 1.0..7.0, 0.0..20.0).prop_map(|(watts, factor, kind, multiple, lasts)| Load {
        surge_multiple: multiple,
        surge_lasts: Seconds(lasts),
        ..load("Load", watts, factor, kind)
    })
}

fn site() -> impl Strategy<Value = (f64, f64)> {
    (-10.0..60.0, 0.0..6000.0)
}

fn unit_of(loads: Vec<Load>, (celsius, metres): (f64, f64)) -> (Inverter, Demand, Vec<Finding>) {
    let mut survey = survey(loads);
    (survey.site.inverter_ambient, survey.site.altitude) = (Celsius(celsius), Metres(metres));
    let (demand, mut sheet) = demand_of(&survey);
    let unit = inverter(&survey, &demand, &Assumptions::defaults(survey.choice.chemistry), &mut sheet);
    (unit, demand, sheet.findings)
}

proptest! {
    #[test]
    fn the_unit_carries_load_and_start_or_the_trade_has_none(load in a_load(), other in a_load(), site in site()) {
        let (unit, demand, findings) = unit_of(vec![load, other], site);
        if findings.iter().any(|finding| matches!(finding, Finding::NoInverterFits { .. })) {
            prop_assert!(unit.required > unit.rating);
        } else {
            let left = unit.derating.get() * (1.0 + 1e-12);
            prop_assert!(demand.running_va <= unit.rating * left && demand.running <= unit.rating_w * left);
            prop_assert!(unit.load_share <= 1.0 / 1.25 + 1e-12 && unit.surge_margin >= -1e-12);
            prop_assert!(demand.surge_staggered.0 <= unit.surge.0 * (1.0 + 1e-12));
        }
    }

    #[test]
    fn a_heavier_load_never_gets_a_smaller_unit(load in a_load(), factor in 1.0..3.0, site in site()) {
        let heavier = Load { running: load.running * factor, ..load.clone() };
        let ((before, ..), (after, ..)) = (unit_of(vec![load], site), unit_of(vec![heavier], site));
        prop_assert!(after.required.0 >= before.required.0 * (1.0 - 1e-12) && after.rating >= before.rating);
    }

    #[test]
    fn a_hotter_or_higher_site_never_gets_a_smaller_unit(
        load in a_load(),
        (celsius, metres) in site(),
        hotter in 0.0..30.0,
        higher in 0.0..2000.0,
    ) {
        let (before, ..) = unit_of(vec![load.clone()], (celsius, metres));
        let (after, ..) = unit_of(vec![load], (celsius + hotter, metres + higher));
        prop_assert!(after.derating <= before.derating && after.rating >= before.rating);
    }

    #[test]
    fn the_unit_never_gives_more_than_it_draws(output in 0.0..12_000.0, load in a_load()) {
        let (unit, ..) = unit_of(vec![load], (25.0, 0.0));
        prop_assert!(unit.losses.drawn(Watts(output)).0 > output);
    }
}
