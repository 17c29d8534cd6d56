//! Offers made from whole surveys by the engine itself.

use super::*;
use crate::documents::survey;
use crate::money::{Currency, Money};
use crate::quotes::Quantity;
use crate::quotes::price::{PriceDraft, PricedLine};
use crate::quotes::sheet::{FirmShown, QuoteSheet};
use crate::simulation;
use crate::sizing::{Design, Survey};

const HOUSE: &str = include_str!("../demo/house.json");
const SHOP: &str = include_str!("../demo/shop.json");

fn voice() -> Voice {
    Voice { words: Words::of("en"), numbers: Numbers::default() }
}

fn designed(document: &str) -> (Survey, Design) {
    let (draft, survey) = survey::read(document).unwrap();
    let design = simulation::design(&survey, draft.assumptions(&[]));
    (survey, design)
}

fn offered(document: &str, change: impl FnOnce(&mut Survey)) -> QuoteSheet {
    let (mut survey, _) = designed(document);
    change(&mut survey);
    let design = simulation::design(&survey, crate::sizing::Assumptions::defaults(survey.choice.chemistry));
    let currency = Currency::EUR;
    let price = |line: PricedLine| PricedLine { unit_price: Some(Money { minor: 1250, currency }), ..line };
    let draft = PriceDraft {
        currency,
        lines: refill::refill(&[], &kit(&survey, &design, voice())).into_iter().map(price).collect(),
        labour: None,
        tax_basis_points: 2000,
        ends_on: "2026-12-31".into(),
        note: String::new(),
        left_off: "The oven\n\n The hall heater ".into(),
    };
    let firm = FirmShown {
        name: "Firm".into(),
        phone: "1".into(),
        email: String::new(),
        address: String::new(),
        licence: String::new(),
        time_zone: "UTC".into(),
        decimal_mark: '.',
        made_up: true,
    };
    sheet(firm, Customer { name: "Customer", place: "Place" }, &survey, &design, &draft, voice()).unwrap()
}

#[test]
fn the_kit_holds_what_the_design_asks_for_and_nothing_twice() {
    let (survey, design) = designed(SHOP);
    let kit = kit(&survey, &design, voice());
    let line = |key: &str| kit.iter().find(|line| line.key == key).unwrap_or_else(|| panic!("no {key}"));
    let blocks = design.bank.blocks_in_series * design.bank.strings;
    assert_eq!(line("battery").quantity, Quantity::nearest(f64::from(blocks)));
    assert!(line("battery").text.contains(&format!("{}\u{a0}Ah", design.bank.block.0)), "{:?}", line("battery"));
    assert!(line("inverter").text.contains("pure sine"));
    for cable in &design.cables {
        let fuse = cable.fuse.unwrap();
        assert!(line(&format!("device.{}", cable.run.key())).text.contains(&format!("{}\u{a0}A", fuse.0)));
        assert!(line(&format!("cable.{}", cable.run.key())).quantity > Quantity::default());
    }
    let mut keys: Vec<&str> = kit.iter().map(|line| line.key.as_str()).collect();
    keys.sort_unstable();
    keys.dedup();
    assert_eq!(keys.len(), kit.len());
}

#[test]
fn a_cable_of_the_battery_is_counted_for_both_poles() {
    let (survey, design) = designed(SHOP);
    let kit = kit(&survey, &design, voice());
    let metres = |key: &str| kit.iter().find(|line| line.key == key).unwrap().quantity;
    let main = design.cables.iter().find(|cable| cable.run.key() == "bank_to_inverter").unwrap();
    assert_eq!(metres("cable.bank_to_inverter"), Quantity::nearest(3.0 * f64::from(main.parallel)), "1.5 m, two poles");
    assert_eq!(metres("cable.inverter_to_board"), Quantity::nearest(8.0));
}

#[test]
fn a_unit_that_is_there_is_not_sold_again() {
    let (mut survey, _) = designed(SHOP);
    survey.reuse = Some(crate::sizing::survey::ReusedInverter {
        rating: crate::units::VoltAmps(3000.0),
        rating_w: None,
        surge: None,
        sine: true,
        changeover: None,
        mains_window: None,
    });
    let design = simulation::design(&survey, crate::sizing::Assumptions::defaults(survey.choice.chemistry));
    assert!(kit(&survey, &design, voice()).iter().all(|line| line.key != "inverter"));
}

#[test]
fn the_sheet_promises_the_hours_that_were_asked_for() {
    let sheet = offered(HOUSE, |_| ());
    assert_eq!(sheet.promise.short, "About 6 hours");
    assert_eq!(sheet.stays_on.len(), 8);
    assert_eq!(sheet.one_at_a_time, [["Water pump", "Washing machine"]]);
    assert_eq!(sheet.left_off[..2], ["The oven", "The hall heater"]);
    assert_eq!(sheet.cut.last().unwrap().to_h, 6.0);
    assert_eq!(sheet.total, sheet.subtotal + sheet.tax);
}

#[test]
fn no_hours_are_promised_for_what_a_life_hangs_on() {
    let vital = |survey: &mut Survey| survey.loads[2].life_support = crate::sizing::survey::LifeSupport::Yes;
    let sheet = offered(HOUSE, vital);
    assert_eq!(sheet.not_promised, ["Fridge-freezer"]);
    assert!(sheet.stays_on.iter().all(|thing| thing.name != "Fridge-freezer"));
    let all = |survey: &mut Survey| {
        for load in &mut survey.loads {
            load.life_support = crate::sizing::survey::LifeSupport::Clinical;
        }
    };
    let sheet = offered(HOUSE, all);
    assert_eq!(sheet.promise.short, "No promise of hours");
    assert_eq!(sheet.promise.told, "");
}

#[test]
fn the_charge_only_falls_and_ends_where_the_new_bank_ends_when_it_is_played() {
    let (_, design) = designed(HOUSE);
    let cut = offered(HOUSE, |_| ()).cut;
    assert!(cut.windows(2).all(|pair| pair[0].left_share >= pair[1].left_share));
    let end = cut.last().unwrap().left_share;
    let proof = design.proof.expect("it was played");
    let new = proof.cases.iter().find(|case| case.health == 1.0 && case.battery.0 == 25.0).expect("there is one");
    assert!((end - new.charge_left).abs() < 1e-4, "{end} against {}", new.charge_left);
    let energy: f64 = cut.iter().map(|step| step.average_w * (step.to_h - step.from_h)).sum();
    assert!((energy - design.demand.outage.0).abs() < 1e-6 * energy, "{energy} Wh");
}

#[test]
fn every_message_on_a_sheet_has_all_its_values() {
    for document in [HOUSE, SHOP, include_str!("../demo/flat.json")] {
        let text = serde_json::to_string(&offered(document, |_| ())).unwrap();
        assert!(!text.contains("{$") && !text.contains("kit-") && !text.contains("good-"), "{text}");
    }
}

#[test]
fn cautions_fit_the_battery() {
    let told = |chemistry| offered(SHOP, |survey: &mut Survey| survey.choice.chemistry = chemistry).cautions.join(" ");
    use crate::sizing::survey::Chemistry;
    assert!(told(Chemistry::FloodedTubular).contains("acid"));
    assert!(!told(Chemistry::Lfp).contains("acid"));
    assert!(told(Chemistry::Lfp).contains("below freezing"));
    for chemistry in Chemistry::ALL {
        assert!(told(chemistry).contains("IEC 60364") && told(chemistry).contains("two sources"));
    }
}
