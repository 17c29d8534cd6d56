//! Stay-on list: counted off, corrected, asked about once, and never lost.

use super::helpers::{Service, Visitor, goes_to};
use super::page_form::PageForm;

/// A fresh job's list and the person who fills it in.
async fn list(service: &Service) -> (Visitor, String) {
    let ana = service.ana().await;
    let job = ana.start_job().await;
    (ana, format!("{job}/list"))
}

async fn type_in(visitor: &Visitor, list: &str, typed: &[(&str, &str)]) -> reqwest::Response {
    PageForm::of(visitor, list).await.with(typed).send(visitor, list).await
}

#[tokio::test]
async fn twelve_loads_are_counted_with_one_submit() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    let counted = [
        ("counts[led_bulb_9w][quantity]", "8"),
        ("counts[ceiling_fan][quantity]", "3"),
        ("counts[fridge_direct_cool][quantity]", "1"),
        ("counts[router][quantity]", "1"),
        ("counts[fibre_terminal][quantity]", "1"),
        ("counts[tv_43][quantity]", "2"),
        ("counts[set_top_box][quantity]", "1"),
        ("counts[phone_charger][quantity]", "2"),
        ("counts[laptop][quantity]", "1"),
        ("counts[water_purifier][quantity]", "1"),
        ("counts[pump_booster][quantity]", "1"),
        ("counts[camera_recorder][quantity]", "1"),
        ("counts[pump_booster][power]", "½ hp"),
        ("counts[led_bulb_9w][when]", "18-23"),
    ];
    let answer = type_in(&ana, &list, &counted).await;
    assert_eq!(goes_to(&answer), list.replace("/list", "/cut"));
    let page = ana.page(&list).await;
    let form = PageForm::on(&page);
    assert_eq!((form.value("loads[0][name]"), form.value("loads[11][quantity]")), ("Camera recorder with disk", "1"));
    assert!(page.contains("0.5\u{a0}hp at the shaft is 373\u{a0}W; it draws about 622\u{a0}W"), "{page}");
    assert!(page.contains("18:00-23:00 · electronic supply"), "{page}");
    assert!(page.contains("Running ") && page.contains("at start "));
}

#[tokio::test]
async fn every_fault_is_told_at_once_by_its_lines_name_and_all_stays_as_typed() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    let typed = [
        ("loads[0][name]", "Water <pump>"),
        ("loads[0][quantity]", "2"),
        ("loads[0][power]", "lots"),
        ("loads[1][name]", "Saw"),
        ("loads[1][quantity]", "1"),
        ("loads[1][power]", "-3"),
        ("loads[1][when]", "evening"),
        ("counts[kettle][quantity]", "1.5"),
        ("counts[router][quantity]", "1"),
        ("line", "lamps"),
    ];
    let answer = type_in(&ana, &list, &typed).await;
    assert_eq!(answer.status(), 422);
    let page = answer.text().await.unwrap();
    let form = PageForm::on(&page);
    for (name, value) in typed {
        assert_eq!(form.value(name), value.replace('>', "&#62;"), "{name}");
    }
    for told in [
        "<title>Error:",
        "href=\"#loads-0-power\">Water &#60;pump&#62;: power: give 0.1 to 100,000 W",
        "href=\"#loads-1-power\">Saw: power: ",
        "href=\"#loads-1-when\">Saw: when: ",
        "href=\"#counts-kettle-quantity\">Kettle: how many: give a whole number from 1 to 1,000",
        "href=\"#line\">Add in one line: give count, name and power",
    ] {
        assert!(page.contains(told), "{told}: {page}");
    }
    assert!(ana.page(&list).await.contains("Nothing yet"));
}

#[tokio::test]
async fn one_line_adds_a_load_with_the_start_that_its_name_means_and_stays() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    let answer = type_in(&ana, &list, &[("line", "2 fridges 150W"), ("act", "add")]).await;
    assert_eq!(goes_to(&answer), list);
    type_in(&ana, &list, &[("line", "6 lamps 9 W 5h"), ("act", "add")]).await;
    let page = ana.page(&list).await;
    let form = PageForm::on(&page);
    assert_eq!((form.value("loads[0][start]"), form.value("loads[0][quantity]")), ("compressor", "2"));
    assert_eq!((form.value("loads[1][when]"), form.value("loads[1][quantity]")), ("18:00-23:00", "6"));
    assert_eq!(form.value("line"), "");
}

#[tokio::test]
async fn a_number_that_reads_two_ways_is_asked_and_the_answer_taken() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    let typed = [("counts[microwave][quantity]", "1"), ("counts[microwave][power]", "1.500")];
    let answer = type_in(&ana, &list, &typed).await;
    assert_eq!(answer.status(), 422);
    let page = answer.text().await.unwrap();
    assert!(page.contains("value=\"counts[microwave][power]=1500 W\">Take 1500 W</button>"), "{page}");
    let form = PageForm::on(&page).with(&[("pick", "counts[microwave][power]=1500 W")]);
    assert_eq!(goes_to(&form.send(&ana, &list).await), list.replace("/list", "/cut"));
    assert_eq!(PageForm::of(&ana, &list).await.value("loads[0][power]"), "1500");
}

#[tokio::test]
async fn a_likely_slip_is_stored_and_asked_about_once() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    let typed = [("counts[router][quantity]", "1"), ("counts[router][power]", "1200")];
    let answer = type_in(&ana, &list, &typed).await;
    assert_eq!(goes_to(&answer), format!("{list}?look=yes"));
    let asked = ana.page(&goes_to(&answer)).await;
    assert!(asked.contains("“Router” is usually 10\u{a0}W. Keep 1,200\u{a0}W?"), "{asked}");
    let again = PageForm::on(&asked).send(&ana, &list).await;
    assert_eq!(goes_to(&again), list.replace("/list", "/cut"));
    assert_eq!(PageForm::of(&ana, &list).await.value("loads[0][power]"), "1200");
}

#[tokio::test]
async fn a_counted_load_raises_the_count_of_its_line_and_an_emptied_count_takes_it_off() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    type_in(&ana, &list, &[("counts[router][quantity]", "1"), ("counts[laptop][quantity]", "2")]).await;
    type_in(&ana, &list, &[("counts[laptop][quantity]", "1")]).await;
    let form = PageForm::of(&ana, &list).await;
    assert_eq!((form.value("loads[0][quantity]"), form.value("loads[1][quantity]")), ("3", "1"));
    type_in(&ana, &list, &[("loads[0][quantity]", "")]).await;
    assert_eq!(PageForm::of(&ana, &list).await.value("loads[0][name]"), "Router");
    let answer = type_in(&ana, &list, &[("loads[0][quantity]", "0")]).await;
    assert_eq!(answer.status(), 422);
    assert!(answer.text().await.unwrap().contains("Stay-on list: count at least one thing"));
}

#[tokio::test]
async fn a_stored_line_comes_back_the_same_however_often_it_is_kept() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    let typed = [
        ("loads[0][name]", "Borehole"),
        ("loads[0][quantity]", "2"),
        ("loads[0][power]", "3x¾hp"),
        ("loads[1][name]", "Lathe"),
        ("loads[1][power]", "2 × 4,5"),
        ("loads[1][unit]", "A"),
        ("loads[1][start]", "motor_cap_start"),
        ("loads[1][when]", "8-12, 22:30 to 5"),
    ];
    let answer = type_in(&ana, &list, &typed).await;
    assert!(answer.text().await.unwrap().contains("Borehole: how many: give the count once"));
    let counted = [&typed[..], &[("loads[0][quantity]", "3"), ("loads[1][quantity]", "")]].concat();
    type_in(&ana, &list, &counted).await;
    let first = PageForm::of(&ana, &list).await;
    assert_eq!(first.value("loads[1][power]"), "776.25", "4.5 A × 230 V × 0.75");
    assert_eq!(first.value("loads[1][when]"), "08:00-12:00, 22:30-05:00");
    let answer = first.send(&ana, &list).await;
    assert_eq!(answer.status(), 303);
    let second = PageForm::of(&ana, &list).await;
    for field in ["power", "quantity", "when", "start", "surge", "factor", "plate_hp", "duty", "rides"] {
        for line in 0..2 {
            let name = format!("loads[{line}][{field}]");
            assert_eq!(first.value(&name), second.value(&name), "{name}");
        }
    }
}

#[tokio::test]
async fn another_kind_brings_its_own_usual_start() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    type_in(&ana, &list, &[("line", "lathe 1500W"), ("act", "add")]).await;
    type_in(&ana, &list, &[("loads[0][start]", "motor_cap_start")]).await;
    assert!(ana.page(&list).await.contains("motor with start capacitor, starts at 6×"));
}

#[tokio::test]
async fn the_same_submit_twice_counts_once_and_an_old_page_never_overwrites() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    let form = PageForm::of(&ana, &list).await;
    let counted = form.clone().with(&[("counts[router][quantity]", "1")]);
    for _ in 0..3 {
        assert_eq!(counted.send(&ana, &list).await.status(), 303);
    }
    assert_eq!(PageForm::of(&ana, &list).await.value("loads[0][quantity]"), "1");
    let key = super::helpers::key();
    let stale = form.with(&[("counts[laptop][quantity]", "4"), ("key", &key)]);
    let answer = stale.send(&ana, &list).await;
    assert_eq!(answer.status(), 409);
    let page = answer.text().await.unwrap();
    assert!(page.contains("4 × Laptop") && page.contains("1 × Router"), "{page}");
    assert_eq!(PageForm::on(&page).value("counts[laptop][quantity]"), "4");
}

#[tokio::test]
async fn nobody_elses_list_is_shown_or_changed() {
    let service = Service::start().await;
    let (ana, list) = list(&service).await;
    type_in(&ana, &list, &[("counts[router][quantity]", "1")]).await;
    let ben = service.ben().await;
    assert_eq!(ben.get(&list).await.status(), 404);
    let form = PageForm::of(&ana, &list).await.with(&[("loads[0][quantity]", "9")]);
    assert_eq!(form.send(&ben, &list).await.status(), 404);
    assert!(goes_to(&service.stranger().get(&list).await).starts_with("/in"));
    assert_eq!(PageForm::of(&ana, &list).await.value("loads[0][quantity]"), "1");
}
