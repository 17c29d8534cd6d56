//! The job book: started once, found again, put into the bin and taken back.

use super::helpers::{Service, goes_to, key, value_of};
use super::site::named;

#[tokio::test]
async fn five_taps_on_one_button_start_one_job() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let key = value_of(&ana.page("/").await, "key");
    let mut taps = Vec::new();
    for _ in 0..5 {
        let (ana, key) = (ana.clone(), key.clone());
        taps.push(tokio::spawn(async move { goes_to(&ana.post("/job/new", &[("key", &key)]).await) }));
    }
    let mut addresses = Vec::new();
    for tap in taps {
        addresses.push(tap.await.unwrap());
    }
    assert!(addresses.iter().all(|address| *address == addresses[0] && address.ends_with("/site")), "{addresses:?}");
    assert_eq!(ana.page("/").await.matches("class=\"job-name\"").count(), 1);
}

#[tokio::test]
async fn a_job_is_found_by_letters_of_its_name_and_the_search_stands_in_the_address() {
    let service = Service::start().await;
    let ana = service.ana().await;
    for name in ["Okafor", "Lindqvist", "100% <b>Solid</b>"] {
        named(&ana, name).await;
    }
    let page = ana.page("/?search=oka").await;
    assert!(page.contains("Okafor") && !page.contains("Lindqvist"));
    assert_eq!(value_of(&page, "search"), "oka");
    let page = ana.page("/?search=100%25").await;
    assert!(page.contains("Solid") && !page.contains("Okafor"));
    assert!(!page.contains("<b>Solid"), "a name became markup");
    assert!(ana.page("/?search=nothing+like+it").await.contains("No job fits"));
    assert!(ana.page("/?state=sent").await.contains("No job fits"));
    assert!(ana.page("/?state=being_sized").await.contains("Okafor"));
}

#[tokio::test]
async fn a_binned_job_comes_back_intact() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let job = named(&ana, "Okafor").await;
    let before = ana.page(&format!("{job}/site")).await;
    assert!(ana.page(&format!("{job}/bin")).await.contains("Okafor"));
    let answer = ana.post(&format!("{job}/bin"), &[("key", &key())]).await;
    let book = ana.page(&goes_to(&answer)).await;
    assert!(book.contains("Undo") && !book.contains("Okafor"));
    assert!(ana.page("/?binned=yes").await.contains("Okafor"));
    let answer = ana.post(&format!("{job}/restore"), &[("key", &key())]).await;
    assert!(ana.page(&goes_to(&answer)).await.contains("Okafor"));
    let after = ana.page(&format!("{job}/site")).await;
    for field in ["customer", "place", "supply", "revision"] {
        assert_eq!(value_of(&before, field), value_of(&after, field), "{field}");
    }
}

#[tokio::test]
async fn a_copy_is_a_job_of_its_own() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let job = named(&ana, "Okafor").await;
    let answer = ana.post(&format!("{job}/copy"), &[("key", &key())]).await;
    let copy = goes_to(&answer);
    assert_ne!(copy, format!("{job}/site"));
    assert_eq!(value_of(&ana.page(&copy).await, "customer"), "Copy of Okafor");
}

#[tokio::test]
async fn the_back_room_makes_a_copy_once_for_one_button() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let page = ana.page("/back").await;
    assert!(page.contains("No copy yet") && page.contains("Sound") && page.contains("ana@example.org"));
    assert!(!page.contains("ben@example.org"), "another firm's people are shown");
    let key = value_of(&page, "key");
    for _ in 0..2 {
        assert_eq!(goes_to(&ana.post("/back/backup", &[("key", &key)]).await), "/back");
    }
    let page = ana.page("/back").await;
    assert_eq!(page.matches(".db").count(), 1, "{page}");
}
