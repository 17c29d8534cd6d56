//! Cable runs: lengths and how they are laid.

use super::helpers::{Service, goes_to};
use super::page_form::PageForm;

#[tokio::test]
async fn lengths_in_feet_and_centimetres_are_stored_in_metres() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let job = ana.start_job().await;
    let runs = format!("{job}/runs");
    let typed = [("bank", "5 ft"), ("board", "1,25"), ("mains", "850cm"), ("string", "0.4 m"), ("charger", "3")];
    let answer = PageForm::of(&ana, &runs).await.with(&typed).send(&ana, &runs).await;
    assert_eq!(goes_to(&answer), format!("{job}/needs"));
    let form = PageForm::of(&ana, &runs).await;
    for (name, metres) in [("bank", "1.5240"), ("board", "1.25"), ("mains", "8.5"), ("string", "0.4"), ("charger", "3")]
    {
        assert_eq!(form.value(name), metres, "{name}");
    }
    assert_eq!(form.send(&ana, &runs).await.status(), 303, "what a page shows it also takes");
}

#[tokio::test]
async fn how_cables_are_laid_is_kept() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let runs = format!("{}/runs", ana.start_job().await);
    let typed =
        [("method", "E"), ("ac_method", "C"), ("conductor", "aluminium"), ("insulation", "pvc_70"), ("code", "nec")];
    assert_eq!(PageForm::of(&ana, &runs).await.with(&typed).send(&ana, &runs).await.status(), 303);
    let form = PageForm::of(&ana, &runs).await;
    for (name, value) in typed {
        assert_eq!(form.value(name), value, "{name}");
    }
}

#[tokio::test]
async fn faults_name_the_run_and_keep_what_was_typed() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let runs = format!("{}/runs", ana.start_job().await);
    let typed = [("bank", ""), ("board", "far"), ("mains", "0"), ("charger", "9999")];
    let answer = PageForm::of(&ana, &runs).await.with(&typed).send(&ana, &runs).await;
    assert_eq!(answer.status(), 422);
    let page = answer.text().await.unwrap();
    for (name, value) in typed {
        assert_eq!(PageForm::on(&page).value(name), value, "{name}");
    }
    for (id, run) in [
        ("bank", "Bank to inverter"),
        ("board", "Inverter to board"),
        ("mains", "Mains to inverter"),
        ("charger", "Separate charger to bank"),
    ] {
        let told = format!("href=\"#{id}\">{run}: give 0.1 to 500 m");
        assert!(page.contains(&told), "{told}: {page}");
    }
}
