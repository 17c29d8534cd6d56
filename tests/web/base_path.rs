//! Below a path of a domain that others share, and behind https.

use keeplit::web::Config;

use super::helpers::{PASSWORD, Service, goes_to, key};

#[tokio::test]
async fn everything_works_below_a_base_path() {
    let public_address = Some("https://example.org/power".to_owned());
    let service = Service::empty(Config { public_address, ..Config::default() }).await;
    let code = service.app.open_first_day().unwrap();
    let dora = service.stranger();
    assert_eq!(dora.get("/").await.status(), 404);
    let fields = [
        ("key", &*key()),
        ("code", &code),
        ("firm", "Hillside Power"),
        ("name", "Dora"),
        ("email", "dora@example.org"),
        ("password", PASSWORD),
    ];
    let answer = dora.post("/power/begin", &fields).await;
    assert_eq!((answer.status().as_u16(), &*goes_to(&answer)), (303, "/power/firm"));
    let cookie = answer.headers()["set-cookie"].to_str().unwrap().to_owned();
    assert!(cookie.contains("Path=/power;") && cookie.ends_with("; Secure"), "{cookie}");

    let pair = cookie.split(';').next().unwrap();
    let book = dora.client.get(format!("{}/power/", dora.home)).header("cookie", pair).send().await.unwrap();
    assert_eq!(book.status(), 200);
    let book = book.text().await.unwrap();
    for address in book.split("href=\"").chain(book.split("action=\"")).chain(book.split("src=\"")).skip(1) {
        let address = address.split('"').next().unwrap();
        let stays = address.starts_with("/power/") || address.starts_with('#') || address.starts_with("<!DOCTYPE");
        assert!(stays, "{address}");
    }
    let asked = service.stranger().get("/power/back").await;
    assert_eq!(goes_to(&asked), "/power/in?next=%2Fpower%2Fback");
}

#[tokio::test]
async fn behind_https_the_cookie_is_bound_to_its_host() {
    let public_address = Some("https://power.example.org".to_owned());
    let service = Service::empty(Config { public_address, ..Config::default() }).await;
    let firm = service.app.store.add_firm(Default::default(), false, 0).await.unwrap();
    service.add_person(firm, "ana").await;
    let answer = service.stranger().post("/in", &[("email", "ana@example.org"), ("password", PASSWORD)]).await;
    let cookie = answer.headers()["set-cookie"].to_str().unwrap();
    assert!(
        cookie.starts_with("__Host-keeplit=") && cookie.contains("Path=/;") && cookie.ends_with("Secure"),
        "{cookie}"
    );
}
