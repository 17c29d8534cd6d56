//! The first day: the set-up code opens the book once.

use keeplit::web::Config;

use super::helpers::{PASSWORD, Service, goes_to, key};

fn typed<'a>(key: &'a str, code: &'a str) -> [(&'a str, &'a str); 6] {
    [
        ("key", key),
        ("code", code),
        ("firm", "Hillside Power"),
        ("name", "Dora"),
        ("email", "dora@example.org"),
        ("password", PASSWORD),
    ]
}

#[tokio::test]
async fn the_code_that_was_printed_makes_the_first_account_and_the_page_closes_for_good() {
    let service = Service::empty(Config::default()).await;
    let code = service.app.open_first_day().unwrap();
    let dora = service.stranger();
    assert_eq!(goes_to(&dora.get("/").await), "/in?next=%2F");
    assert_eq!(goes_to(&dora.get("/in").await), "/begin");
    assert!(dora.page("/begin").await.contains("Set-up code"));

    let answer = dora.post("/begin", &typed(&key(), &code)).await;
    assert_eq!((answer.status().as_u16(), &*goes_to(&answer)), (303, "/firm"));
    assert!(dora.page("/firm").await.contains("Hillside Power"));
    for visitor in [dora, service.stranger()] {
        assert_eq!(visitor.get("/begin").await.status(), 404);
        assert_eq!(visitor.post("/begin", &typed(&key(), &code)).await.status(), 404);
    }
    service.signed_in("dora").await;
}

#[tokio::test]
async fn a_wrong_code_makes_nothing_and_keeps_what_was_typed() {
    let service = Service::empty(Config::default()).await;
    service.app.open_first_day().unwrap();
    let answer = service.stranger().post("/begin", &typed(&key(), "wrong")).await;
    assert_eq!(answer.status(), 422);
    let page = answer.text().await.unwrap();
    assert!(page.contains("<title>Error: First day"));
    for kept in ["Hillside Power", "Dora", "dora@example.org", "give the code that the program printed"] {
        assert!(page.contains(kept), "{kept}");
    }
    assert!(!page.contains(PASSWORD));
    assert!(service.app.store.is_first_day().await.unwrap());
}

#[tokio::test]
async fn without_a_code_there_is_no_first_day() {
    let service = Service::empty(Config::default()).await;
    assert_eq!(service.stranger().get("/begin").await.status(), 404);
    assert_eq!(service.stranger().post("/begin", &typed(&key(), "")).await.status(), 404);
}

#[tokio::test]
async fn of_many_first_accounts_at_once_one_is_made() {
    let service = Service::empty(Config::default()).await;
    let code = service.app.open_first_day().unwrap();
    let mut tries = Vec::new();
    for _ in 0..5 {
        let (visitor, code) = (service.stranger(), code.clone());
        tries.push(tokio::spawn(async move { visitor.post("/begin", &typed(&key(), &code)).await.status().as_u16() }));
    }
    let mut made = 0;
    for answer in tries {
        let status = answer.await.unwrap();
        assert!([303, 404, 409, 429].contains(&status), "{status}");
        made += usize::from(status == 303);
    }
    assert_eq!(made, 1);
}
