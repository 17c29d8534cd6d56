//! Power cut: how long, how often, which battery, what is there already.

use super::helpers::{Service, goes_to};
use super::page_form::PageForm;

#[tokio::test]
async fn one_tap_is_enough_and_the_rest_has_its_usual_value() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let job = ana.start_job().await;
    let cut = format!("{job}/cut");
    let answer = PageForm::of(&ana, &cut).await.with(&[("length", "6")]).send(&ana, &cut).await;
    assert_eq!(goes_to(&answer), format!("{job}/runs"));
    let form = PageForm::of(&ana, &cut).await;
    assert_eq!((form.value("length"), form.value("cuts"), form.value("mains")), ("6", "7", "18"));
}

#[tokio::test]
async fn a_length_of_ones_own_is_read_in_any_form() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let cut = format!("{}/cut", ana.start_job().await);
    for (typed, hours) in [("6:30", "6.5"), ("390 min", "6.5"), ("1h30", "1.5"), ("٣", "3"), ("0,75", "0.75")] {
        let form = PageForm::of(&ana, &cut).await.with(&[("length", "other"), ("other", typed)]);
        assert_eq!(form.send(&ana, &cut).await.status(), 303, "{typed}");
        assert_eq!(PageForm::of(&ana, &cut).await.value("other"), hours, "{typed}");
    }
}

#[tokio::test]
async fn everything_typed_is_stored_and_shown_again() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let cut = format!("{}/cut", ana.start_job().await);
    let typed = [
        ("length", "12"),
        ("starts_time", "19:30"),
        ("cuts", "3.5"),
        ("mains", "20"),
        ("usual", "1.5"),
        ("longest", "9"),
        ("mostly", "evening"),
        ("blocks", "06:00-08:00, 18:00-20:00"),
        ("shift", "2"),
        ("low", "1"),
        ("region", "Kenya"),
        ("chemistry", "vrla_gel"),
        ("bus", "24"),
        ("square", "yes"),
        ("ratings[0][hours]", "20"),
        ("ratings[0][ah]", "150"),
        ("ratings[1][hours]", "10"),
        ("ratings[1][ah]", "135"),
        ("reuse_va", "1800"),
        ("reuse_w", "1440"),
        ("reuse_wave", "square"),
        ("reuse_low", "170"),
        ("reuse_high", "280"),
    ];
    assert_eq!(PageForm::of(&ana, &cut).await.with(&typed).send(&ana, &cut).await.status(), 303);
    let form = PageForm::of(&ana, &cut).await;
    for (name, value) in typed {
        assert_eq!(form.value(name), value, "{name}");
    }
}

#[tokio::test]
async fn faults_are_told_at_once_and_nothing_typed_is_lost() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let cut = format!("{}/cut", ana.start_job().await);
    let typed = [
        ("length", "other"),
        ("other", "6-8 h"),
        ("starts_time", "evening"),
        ("cuts", "400"),
        ("usual", "5"),
        ("longest", "3"),
        ("blocks", "mornings"),
        ("shift", "30"),
        ("region", "Atlantis"),
        ("ratings[0][hours]", "20"),
        ("ratings[0][ah]", ""),
        ("reuse_va", "5"),
        ("reuse_low", "200"),
    ];
    let answer = PageForm::of(&ana, &cut).await.with(&typed).send(&ana, &cut).await;
    assert_eq!(answer.status(), 422);
    let page = answer.text().await.unwrap();
    let form = PageForm::on(&page);
    for (name, value) in typed {
        assert_eq!(form.value(name), value, "{name}");
    }
    for told in [
        "href=\"#other\">Length of the cut: give 0.25 to 168 h",
        "href=\"#starts_time\">Starts at: give a time, such as 18:00",
        "href=\"#cuts\">Cuts in a week: give 0 to 168",
        "href=\"#longest\">The longest of a year: give no less than a usual cut lasts",
        "href=\"#blocks\">Announced blocks: give times such as 06:00-08:00",
        "href=\"#shift\">Each day the blocks move on by: give 0 to 23 h",
        "href=\"#region\">Country: choose one of the list",
        "href=\"#ratings-0-ah\">Rating 1, Ah: give 0.5 to 5,000 Ah",
        "href=\"#reuse_va\">Its VA: give 50 to 50,000 VA",
        "href=\"#reuse_high\">Its mains window, highest: give both ends",
    ] {
        assert!(page.contains(told), "{told}: {page}");
    }
}

#[tokio::test]
async fn a_length_that_is_typed_counts_without_being_picked_and_an_emptied_unit_is_gone() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let cut = format!("{}/cut", ana.start_job().await);
    PageForm::of(&ana, &cut).await.with(&[("other", "5h"), ("reuse_va", "900")]).send(&ana, &cut).await;
    let form = PageForm::of(&ana, &cut).await;
    assert_eq!((form.value("length"), form.value("other"), form.value("reuse_va")), ("other", "5", "900"));
    let answer = form.clone().with(&[("reuse_va", ""), ("reuse_w", "700")]).send(&ana, &cut).await;
    assert!(answer.text().await.unwrap().contains("Its VA: give 50 to 50,000 VA"));
    form.with(&[("reuse_va", "")]).send(&ana, &cut).await;
    assert_eq!(PageForm::of(&ana, &cut).await.value("reuse_va"), "");
}

#[tokio::test]
async fn without_a_length_it_is_asked_for() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let cut = format!("{}/cut", ana.start_job().await);
    let answer = PageForm::of(&ana, &cut).await.send(&ana, &cut).await;
    assert_eq!(answer.status(), 422);
    assert!(answer.text().await.unwrap().contains("Length of the cut: choose how long it lasts"));
}

#[tokio::test]
async fn usual_cable_lengths_lead_straight_to_the_answer() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let job = ana.start_job().await;
    let (list, cut) = (format!("{job}/list"), format!("{job}/cut"));
    PageForm::of(&ana, &list).await.with(&[("counts[router][quantity]", "1")]).send(&ana, &list).await;
    let form = PageForm::of(&ana, &cut).await.with(&[("length", "4"), ("act", "answer")]);
    assert_eq!(goes_to(&form.send(&ana, &cut).await), format!("{job}/needs"));
    assert!(ana.page(&format!("{job}/needs")).await.contains("inverter"));
}

#[tokio::test]
async fn an_old_page_shows_both_values_and_overwrites_nothing() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let cut = format!("{}/cut", ana.start_job().await);
    let (office, roof) = (PageForm::of(&ana, &cut).await, PageForm::of(&ana, &cut).await);
    office.with(&[("length", "4")]).send(&ana, &cut).await;
    let answer = roof.with(&[("length", "8")]).send(&ana, &cut).await;
    assert_eq!(answer.status(), 409);
    assert!(answer.text().await.unwrap().contains("<td>8</td><td>4</td>"));
    assert_eq!(PageForm::of(&ana, &cut).await.value("length"), "4");
}
