//! Filling the bank: closed form against stepping, makers' times, and what goes in against what comes out.

use keeplit::documents::survey;
use keeplit::simulation::cut::Course;
use keeplit::simulation::day::Day;
use keeplit::simulation::offs;
use keeplit::simulation::passage::Passage;
use keeplit::simulation::plant::{NEW, Plant};
use keeplit::simulation::recharge::Charging;
use keeplit::simulation::{self};
use keeplit::sizing::{Assumptions, Design, Survey};

use super::samples::Chance;

fn house(chemistry: &str, cuts: f64, between: f64, breaker: f64) -> (Survey, Design) {
    let survey = serde_json::json!({
        "format": "keeplit-survey-1",
        "site": { "incoming_breaker_a": breaker },
        "outage": { "autonomy_h": 4, "cuts_per_week": cuts, "mains_between_cuts_h": between },
        "choice": { "chemistry": chemistry },
        "loads": [
            { "name": "Fridge", "running_w": 120, "power_factor": 0.7, "start": "compressor", "duty": 0.4 },
            { "name": "Lamps", "running_w": 60, "windows": [["18:00", "23:30"]] },
            { "name": "Fans", "quantity": 3, "running_w": 55, "start": "motor_psc", "windows": [["10:00", "22:00"]] }
        ]
    });
    let survey = survey::read(&survey.to_string()).expect("the survey is sound").1;
    let assumptions = Assumptions::defaults(survey.choice.chemistry);
    let design = simulation::design(&survey, assumptions);
    (survey, design)
}

const KINDS: [&str; 5] = ["flooded_tubular", "flooded_flat_plate", "vrla_agm", "vrla_gel", "lfp"];

#[test]
fn what_is_missing_falls_as_the_reference_lets_it_fall() {
    let mut chance = Chance::new(3);
    for kind in KINDS {
        // A small breaker leaves the charger little beside the loads of the day.
        for breaker in [32.0, 3.0] {
            let (survey, design) = house(kind, 7.0, 20.0, breaker);
            let day = Day::of(&design.demand.day, &design.inverter.losses);
            let charging = Charging::of(&survey, &design, &day);
            let battery = Plant::of(&survey, &design).0.battery(design.bank.installed, NEW);
            for _ in 0..20 {
                let (left, start, hours) =
                    (chance.between(0.05, 0.99), chance.between(0.0, 24.0), chance.between(0.5, 30.0));
                let mut charge = battery.wells.filled();
                charge.total *= left;
                let filled = charging.fill(&battery, &mut charge, &day, start, hours);
                let (mut stored, mut put_in) = (left * battery.wells.full, 0.0);
                let steps = 40_000;
                let step = hours / f64::from(steps);
                for number in 0..steps {
                    let hour = (start + (f64::from(number) + 0.5) * step).rem_euclid(24.0);
                    let (current, stays) = charging.at(1.0 - stored / battery.wells.full, &day, hour);
                    stored += current * stays * step;
                    put_in += current * step;
                }
                let full = battery.wells.full;
                assert!((charge.total - stored).abs() / full < 2e-4, "{kind}: {} against {stored} Ah", charge.total);
                assert!((filled.put_in - put_in).abs() / full < 3e-4, "{kind}: {} against {put_in} Ah", filled.put_in);
            }
        }
    }
}

#[test]
fn the_absorption_takes_the_time_that_makers_give() {
    // 0.42 · C20/I for flooded and 0.38 · C20/I for glass-mat batteries at a tenth of the capacity, about half an
    // hour for lithium at a fifth: makers' charging manuals. The rule there ends at 2 to 3 % of the capacity.
    for (kind, share, hours) in [("flooded_flat_plate", 0.1, 4.2), ("vrla_agm", 0.1, 3.8), ("lfp", 0.2, 0.5)] {
        let (survey, design) = house(kind, 7.0, 20.0, 32.0);
        let day = Day::of(&design.demand.day, &design.inverter.losses);
        let battery = Plant::of(&survey, &design).0.battery(design.bank.installed, NEW);
        let charging =
            Charging::of(&survey, &design, &day).set_to(design.bank.installed * share / keeplit::units::Hours(1.0));
        let mut charge = battery.wells.filled();
        charge.total *= charging.end_of_bulk();
        let time = charging.time_to_full(&battery, charge).expect("it is full some time");
        assert!((time / hours - 1.0).abs() < 0.25, "{kind}: {time} h against {hours} h");
    }
}

#[test]
fn a_cycle_as_deep_as_allowed_takes_the_charge_factor() {
    for kind in KINDS {
        let (survey, design) = house(kind, 7.0, 20.0, 32.0);
        let day = Day::of(&design.demand.day, &design.inverter.losses);
        let battery = Plant::of(&survey, &design).0.battery(design.bank.installed, NEW);
        let charging = Charging::of(&survey, &design, &day);
        let depth = design.assumptions.depth_of_discharge_max;
        let mut charge = battery.wells.filled();
        charge.total *= 1.0 - depth;
        let taken = battery.wells.full - charge.total;
        let filled = charging.fill(&battery, &mut charge, &day, 0.0, 2000.0);
        let factor = filled.put_in / taken;
        assert!((factor - design.assumptions.charge_factor).abs() < 2e-3, "{kind}: {factor}");
        assert!((charge.total / battery.wells.full - 1.0).abs() < 1e-6, "{kind}");
    }
}

#[test]
fn what_goes_in_is_what_comes_out_and_what_is_lost() {
    for (kind, cuts, between) in
        [("flooded_tubular", 14.0, 3.0), ("vrla_agm", 21.0, 2.0), ("lfp", 30.0, 1.0), ("vrla_gel", 3.0, 20.0)]
    {
        let (survey, design) = house(kind, cuts, between, 32.0);
        let day = Day::of(&design.demand.day, &design.inverter.losses);
        let battery = Plant::of(&survey, &design).0.battery(design.bank.installed, NEW);
        let passage = Passage { course: Course::new(battery, &day), charging: Charging::of(&survey, &design, &day) };
        let (mut put_in, mut taken, mut stored) = (0.0, 0.0, 0.0);
        let mut last = battery.wells.filled().total;
        let end = passage.play(&offs::weeks(&survey, &design), |cut| {
            (put_in, taken) = (put_in + cut.put_in, taken + cut.taken);
            stored += cut.before.total - last;
            assert!(cut.put_in >= cut.before.total - last - 1e-9, "{kind}: more stays than went in");
            assert!((cut.before.total - cut.taken - cut.after.total).abs() < 1e-9 * battery.wells.full, "{kind}");
            last = cut.after.total;
        });
        assert!((battery.wells.full + stored - taken - end.total).abs() < 1e-9 * battery.wells.full, "{kind}");
        let lost = put_in - stored;
        assert!(lost >= -1e-9 && lost < 0.35 * put_in.max(1e-9), "{kind}: {lost} of {put_in} Ah lost");
    }
}

#[test]
fn the_energy_of_the_cells_is_what_the_unit_takes_and_what_the_resistance_eats() {
    for kind in KINDS {
        let (survey, design) = house(kind, 7.0, 20.0, 32.0);
        let day = Day::of(&design.demand.day, &design.inverter.losses);
        let battery = Plant::of(&survey, &design).0.battery(design.bank.installed, NEW);
        let course = Course::new(battery, &day);
        let (mut charge, mut hour) = (battery.wells.filled(), 17.5);
        let (mut cells, mut heat, mut unit) = (0.0, 0.0, 0.0);
        let step = 1.0 / 240.0;
        for _ in 0..960 {
            let before = charge;
            course.play(&mut charge, hour, step);
            hour += step;
            let current = (before.total - charge.total) / step;
            let head = (battery.wells.head(before) + battery.wells.head(charge)) / 2.0;
            let open = battery.kind.open_circuit_at(head).0 * battery.cells;
            let resistance = battery.resistance * battery.kind.resistance_rise(head) + battery.lead;
            cells += open * current * step;
            heat += resistance * current * current * step;
            let at = (hour - step / 2.0).rem_euclid(24.0);
            unit += day.stretches().iter().find(|stretch| at < stretch.to).expect("the day has it").drawn * step;
        }
        assert!(
            (cells - heat - unit).abs() < 1e-4 * cells,
            "{kind}: {cells} Wh, {heat} Wh heat, {unit} Wh to the unit"
        );
    }
}
