//! Site: kept as typed, saved once, and never over someone else's change.

use super::helpers::{Service, Visitor, goes_to, key, value_of};

/// Revision of a job that was never saved.
const NEW: &str = "1";

const FIELDS: [&str; 14] = [
    "key",
    "revision",
    "customer",
    "place",
    "phone",
    "supply",
    "frequency",
    "supply_lowest",
    "supply_highest",
    "incoming_breaker",
    "battery_coldest",
    "battery_hottest",
    "inverter_ambient",
    "altitude",
];

/// The page's form with some fields typed anew.
async fn form(visitor: &Visitor, site: &str, typed: &[(&'static str, &str)]) -> Vec<(&'static str, String)> {
    let page = visitor.page(site).await;
    let value = |name: &'static str| {
        let typed = typed.iter().find(|(field, _)| *field == name).map(|(_, value)| (*value).to_owned());
        (name, typed.unwrap_or_else(|| value_of(&page, name)))
    };
    FIELDS.map(value).to_vec()
}

async fn send(visitor: &Visitor, site: &str, form: &[(&'static str, String)]) -> reqwest::Response {
    let fields: Vec<(&str, &str)> = form.iter().map(|(name, value)| (*name, value.as_str())).collect();
    visitor.post(site, &fields).await
}

/// A job with a name; gives the address below which its pages lie.
pub async fn named(visitor: &Visitor, name: &str) -> String {
    let job = visitor.start_job().await;
    let site = format!("{job}/site");
    let answer = send(visitor, &site, &form(visitor, &site, &[("customer", name)]).await).await;
    assert_eq!(goes_to(&answer), format!("{job}/list"), "{name}");
    job
}

#[tokio::test]
async fn what_was_typed_is_stored_and_shown_again() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let job = ana.start_job().await;
    let site = format!("{job}/site");
    assert_eq!(goes_to(&ana.get(&job).await), site);
    let typed = [
        ("customer", "Okafor \"Corner\" <shop>"),
        ("supply_lowest", "185,5"),
        ("battery_coldest", "\u{2212}5"),
        ("altitude", "1 200 m"),
    ];
    let answer = send(&ana, &site, &form(&ana, &site, &typed).await).await;
    assert_eq!(answer.status(), 303);
    let page = ana.page(&site).await;
    for (field, shown) in [("customer", "Okafor \"Corner\" <shop>"), ("supply_lowest", "185.5"), ("altitude", "1200")] {
        assert_eq!(value_of(&page, field), shown, "{field}");
    }
    assert!(["-5", "\u{2212}5"].contains(&&*value_of(&page, "battery_coldest")));
    assert_eq!(goes_to(&ana.get(&job).await), format!("{job}/list"));
}

#[tokio::test]
async fn one_wrong_field_keeps_every_other_as_typed() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let site = format!("{}/site", ana.start_job().await);
    let right = [("customer", "Okafor"), ("place", "12 Hill Road"), ("supply_lowest", "190"), ("altitude", "640")];
    for (field, label, wrong) in [
        ("supply", "Supply", "two hundred"),
        ("supply", "Supply", "NaN"),
        ("supply", "Supply", "1e309"),
        ("supply", "Supply", ""),
        ("frequency", "Frequency", "-50"),
        ("incoming_breaker", "Breaker before the inverter", "99999999"),
        ("battery_hottest", "Hottest at the battery", "hot"),
        ("supply_highest", "Highest supply seen", "100"),
    ] {
        let mut typed = right.to_vec();
        typed.push((field, wrong));
        let sent = form(&ana, &site, &typed).await;
        let answer = send(&ana, &site, &sent).await;
        assert_eq!(answer.status(), 422, "{field}: {wrong}");
        let page = answer.text().await.unwrap();
        assert!(page.contains("<title>Error: Site"), "{field}: {wrong}");
        assert_eq!(page.matches(&format!("{label}: give")).count(), 2, "beside {field} and on top: {wrong}");
        assert!(page.contains(&format!("href=\"#{field}\"")), "{field}");
        for (name, typed) in sent.iter().filter(|(name, _)| *name != "key") {
            assert_eq!(value_of(&page, name), *typed, "{name} after {field} = {wrong:?}");
        }
    }
    let page = ana.page(&site).await;
    assert_eq!((&*value_of(&page, "customer"), &*value_of(&page, "revision")), ("", NEW));
}

#[tokio::test]
async fn the_second_of_two_to_save_sees_both_and_loses_nothing() {
    let service = Service::start().await;
    let (roof, office) = (service.ana().await, service.ana().await);
    let site = format!("{}/site", roof.start_job().await);
    let first = form(&roof, &site, &[("customer", "Okafor"), ("altitude", "100")]).await;
    let second = form(&office, &site, &[("customer", "Okafor"), ("altitude", "250"), ("place", "Thornby")]).await;
    assert_eq!(send(&roof, &site, &first).await.status(), 303);

    let answer = send(&office, &site, &second).await;
    assert_eq!(answer.status(), 409);
    let page = answer.text().await.unwrap();
    assert!(page.contains("Changed meanwhile"));
    assert!(page.contains("<th scope=\"row\">Height above the sea</th><td>250</td><td>100</td>"), "{page}");
    assert!(!page.contains("<th scope=\"row\">Name</th>"), "fields that agree are no conflict");
    assert_eq!((&*value_of(&page, "altitude"), &*value_of(&page, "place")), ("250", "Thornby"));
    assert_eq!(value_of(&office.page(&site).await, "altitude"), "100", "the first save was overwritten");

    let again: Vec<_> = FIELDS.into_iter().map(|name| (name, value_of(&page, name))).collect();
    assert_eq!(send(&office, &site, &again).await.status(), 303);
    assert_eq!(value_of(&roof.page(&site).await, "altitude"), "250");
}

#[tokio::test]
async fn one_form_sent_twice_is_saved_once() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let site = format!("{}/site", ana.start_job().await);
    let sent = form(&ana, &site, &[("customer", "Okafor")]).await;
    for _ in 0..3 {
        assert_eq!(send(&ana, &site, &sent).await.status(), 303);
    }
    assert_eq!(value_of(&ana.page(&site).await, "revision"), "2");
}

#[tokio::test]
async fn a_form_that_lost_its_key_or_is_no_form_is_not_acted_on() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let site = format!("{}/site", ana.start_job().await);
    let sent = form(&ana, &site, &[("customer", "Okafor"), ("key", "short")]).await;
    assert_eq!(send(&ana, &site, &sent).await.status(), 422);
    let json = ana.client.post(format!("{}{site}", ana.home)).header("origin", &ana.home);
    let json = json.header("content-type", "application/json").body(format!("{{\"key\":\"{}\"}}", key()));
    assert_eq!(json.send().await.unwrap().status(), 415);
    assert_eq!(value_of(&ana.page(&site).await, "revision"), NEW);
}
