//! Laws that hold for any list of loads.

use proptest::prelude::*;

use super::example::*;
use super::*;
use crate::sizing::survey::*;
use crate::units::Seconds;

fn windows() -> impl Strategy<Value = Vec<Window>> {
    let time = || (0u16..=1440).prop_map(|minutes| TimeOfDay::from_minutes(minutes).expect("within the day"));
    let window = (time(), time()).prop_map(|(from, to)| Window { from, to });
    prop::collection::vec(window, 1..4)
}

/// Whole watts and quarter duties, so that energies that differ differ by more than rounding.
fn a_load() -> impl Strategy<Value = Load> {
    let size = (1u32..2000, 0.4..=1.0, 0u8..=4, 1u32..5);
    let start = (prop::sample::select(StartKind::ALL.to_vec()), 1.0..8.0, 0.0..20.0);
    let turn = prop::option::weighted(0.3, prop::sample::select(vec!["a", "b"]));
    (size, start, windows(), turn).prop_map(
        |((watts, factor, quarters, quantity), (kind, multiple, lasts), windows, turn)| Load {
            quantity,
            on_together: quantity.div_ceil(2),
            duty: share(f64::from(quarters) / 4.0),
            surge_multiple: multiple,
            surge_lasts: Seconds(lasts),
            turn: turn.map(str::to_owned),
            ..during(load("Load", f64::from(watts), factor, kind), &windows)
        },
    )
}

fn loads() -> impl Strategy<Value = Vec<Load>> {
    prop::collection::vec(a_load(), 1..7)
}

fn cut(loads: Vec<Load>, minutes: u32) -> Survey {
    let mut survey = survey(loads);
    survey.outage.autonomy = Hours(f64::from(minutes) / 60.0);
    survey
}

/// What the demand comes to, in figures.
fn figures(demand: &Demand) -> [f64; 6] {
    let Demand { running, running_va, surge_together, surge_staggered, outage, average_outage, .. } = demand;
    [running.0, running_va.0, surge_together.0, surge_staggered.0, outage.0, average_outage.0]
}

fn alike(one: &[f64], other: &[f64]) -> bool {
    one.iter().zip(other).all(|(a, b)| (a - b).abs() <= 1e-9 * a.abs().max(b.abs()))
}

/// Average power at a minute of the day, straight from the meaning of the survey.
fn power_at(loads: &[Load], minute: u16) -> f64 {
    let on = |load: &&Load| {
        load.windows.iter().any(|window| {
            let (from, to) = (window.from.minutes(), window.to.minutes());
            if from < to { (from..to).contains(&minute) } else { minute >= from || minute < to }
        })
    };
    let average = |load: &Load| {
        let most = f64::from(load.on_together);
        load.running.0 * (f64::from(load.quantity) * load.duty.get()).min(most)
    };
    let on: Vec<_> = loads.iter().filter(on).collect();
    let alone: f64 = on.iter().filter(|load| load.turn.is_none()).map(|load| average(load)).sum();
    let turns = ["a", "b"].map(|name| {
        let members: Vec<_> = on.iter().filter(|load| load.turn.as_deref() == Some(name)).collect();
        let largest = members.iter().map(|load| load.running.0 * f64::from(load.on_together)).fold(0.0, f64::max);
        members.iter().map(|load| average(load)).sum::<f64>().min(largest)
    });
    alone + turns.iter().sum::<f64>()
}

/// Energy of a cut from each minute of the day, minute by minute.
fn scan(loads: &[Load], minutes: u32) -> Vec<f64> {
    let day: Vec<_> = (0..1440).map(|minute| power_at(loads, minute) / 60.0).collect();
    let mut energy: f64 = (0..minutes as usize).map(|minute| day[minute % 1440]).sum();
    let slide = |start: usize| {
        let now = energy;
        energy += day[(start + minutes as usize) % 1440] - day[start];
        now
    };
    (0..1440).map(slide).collect()
}

proptest! {
    #[test]
    fn the_worst_start_is_the_earliest_that_a_scan_minute_by_minute_finds(loads in loads(), minutes in 1u32..4000) {
        let (demand, _) = demand_of(&cut(loads.clone(), minutes));
        let scan = scan(&loads, minutes);
        let most = scan.iter().copied().fold(0.0, f64::max);
        prop_assert!((demand.outage.0 - most).abs() <= 1e-6, "{} against {most}", demand.outage.0);
        let earliest = scan.iter().position(|&energy| energy >= most - 1e-5).expect("there is a most");
        prop_assert_eq!(usize::from(demand.worst_start.minutes()), earliest);
    }

    #[test]
    fn a_cut_from_any_start_has_the_energy_of_its_minutes(
        loads in loads(),
        minutes in 1u32..4000,
        start in 0u16..=1440,
    ) {
        let mut survey = cut(loads.clone(), minutes);
        survey.outage.starts_at = StartsAt::At(TimeOfDay::from_minutes(start).expect("within the day"));
        let (demand, _) = demand_of(&survey);
        let expected = scan(&loads, minutes)[usize::from(start) % 1440];
        prop_assert!((demand.outage.0 - expected).abs() <= 1e-6, "{} against {expected}", demand.outage.0);
    }

    #[test]
    fn the_steps_of_every_cut_fill_it_and_no_two_neighbours_are_alike(loads in loads(), hours in 0.01..80.0) {
        let mut survey = survey(loads);
        survey.outage.autonomy = Hours(hours);
        let (demand, _) = demand_of(&survey);
        let cuts = cuts(&survey, &demand);
        for steps in &cuts {
            let length: f64 = steps.iter().map(|step| step.1.0).sum();
            prop_assert!((length - hours).abs() < 1e-9);
            prop_assert!(steps.iter().all(|step| step.1 > Hours::ZERO));
            prop_assert!(steps.windows(2).all(|pair| pair[0].0 != pair[1].0));
        }
        let energy = |steps: &Vec<(Watts, Hours)>| steps.iter().map(|step| (step.0 * step.1).0).sum::<f64>();
        let most = cuts.iter().map(energy).fold(0.0, f64::max);
        prop_assert!((demand.outage.0 - most).abs() <= 1e-9 * most);
    }

    #[test]
    fn the_order_of_the_rows_never_matters(
        (loads, shuffled) in loads().prop_flat_map(|loads| (Just(loads.clone()), Just(loads).prop_shuffle())),
    ) {
        let ((one, _), (other, _)) = (demand_of(&survey(loads)), demand_of(&survey(shuffled)));
        prop_assert_eq!(figures(&one), figures(&other));
        prop_assert_eq!((one.worst_start, one.day), (other.worst_start, other.day));
    }

    #[test]
    fn three_lines_of_one_are_one_line_of_three(load in a_load()) {
        let one = Load { quantity: 1, on_together: 1, turn: None, ..load };
        let three = Load { quantity: 3, on_together: 3, ..one.clone() };
        let (lines, _) = demand_of(&survey(vec![one.clone(), one.clone(), one]));
        let (line, _) = demand_of(&survey(vec![three]));
        prop_assert!(alike(&figures(&lines), &figures(&line)), "{:?} {:?}", figures(&lines), figures(&line));
    }

    #[test]
    fn two_alike_draw_exactly_twice_the_volt_amperes_of_one(load in a_load()) {
        let one = Load { turn: None, ..load };
        let (single, _) = demand_of(&survey(vec![one.clone()]));
        let (double, _) = demand_of(&survey(vec![one.clone(), one]));
        prop_assert_eq!(double.running_va, single.running_va * 2.0);
    }

    #[test]
    fn a_heavier_load_never_asks_less(loads in loads(), which in any::<prop::sample::Index>(), factor in 1.0..3.0) {
        let mut heavier = loads.clone();
        let load = which.get(&heavier).clone();
        heavier[which.index(loads.len())].running = load.running * factor;
        let ((before, _), (after, _)) = (demand_of(&survey(loads)), demand_of(&survey(heavier)));
        for (before, after) in figures(&before).into_iter().zip(figures(&after)) {
            prop_assert!(after >= before * (1.0 - 1e-9), "{after} below {before}");
        }
    }

    #[test]
    fn one_more_load_never_asks_less(loads in loads(), more in a_load()) {
        let (before, _) = demand_of(&survey(loads.clone()));
        let (after, _) = demand_of(&survey(loads.into_iter().chain([more]).collect()));
        for (before, after) in figures(&before).into_iter().zip(figures(&after)) {
            prop_assert!(after >= before * (1.0 - 1e-9), "{after} below {before}");
        }
    }

    #[test]
    fn together_is_never_below_staggered_nor_staggered_below_running(loads in loads()) {
        let (demand, _) = demand_of(&survey(loads.clone()));
        prop_assert!(demand.surge_together >= demand.surge_staggered);
        prop_assert!(demand.surge_staggered >= demand.running_va);
        prop_assert!(demand.running_va.0 >= demand.running.0 * (1.0 - 1e-12));
        let most: f64 = loads.iter().map(|load| (Power::of_one(load) * f64::from(load.on_together)).apparent().0).sum();
        prop_assert!(demand.running_va.0 <= most * (1.0 + 1e-12), "never above the plain sum of VA");
    }
}
