//! My firm: what is set there is what a new job begins with.

use super::helpers::{Service, Visitor, goes_to, value_of};

const FIELDS: [&str; 17] = [
    "key",
    "revision",
    "name",
    "phone",
    "email",
    "address",
    "licence",
    "currency",
    "tax",
    "holds",
    "zone",
    "supply",
    "frequency",
    "coldest",
    "hottest",
    "ambient",
    "bank_run",
];

async fn form(visitor: &Visitor, typed: &[(&'static str, &str)]) -> Vec<(&'static str, String)> {
    let page = visitor.page("/firm").await;
    let mut form = FIELDS.map(|name| (name, value_of(&page, name))).to_vec();
    form.extend(["board_run", "mains_run"].map(|name| (name, value_of(&page, name))));
    form.extend([("mark", "point"), ("code", "iec"), ("chemistry", "vrla_agm")].map(|(name, v)| (name, v.to_owned())));
    for (name, value) in typed {
        form.retain(|(field, _)| field != name);
        form.push((name, (*value).to_owned()));
    }
    form
}

async fn send(visitor: &Visitor, form: &[(&'static str, String)]) -> reqwest::Response {
    let fields: Vec<(&str, &str)> = form.iter().map(|(name, value)| (*name, value.as_str())).collect();
    visitor.post("/firm", &fields).await
}

#[tokio::test]
async fn a_new_job_begins_with_what_the_firm_has_set() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let typed = [("supply", "120"), ("frequency", "60"), ("coldest", "-3"), ("mark", "comma"), ("currency", "usd")];
    let answer = send(&ana, &form(&ana, &typed).await).await;
    assert_eq!(answer.status(), 303, "{}", answer.text().await.unwrap());
    let site = format!("{}/site", ana.start_job().await);
    let page = ana.page(&site).await;
    assert_eq!((&*value_of(&page, "supply"), &*value_of(&page, "frequency")), ("120", "60"));
    let firm = ana.page("/firm").await;
    assert_eq!((&*value_of(&firm, "currency"), &*value_of(&firm, "revision")), ("USD", "2"));
}

#[tokio::test]
async fn wrong_fields_are_named_together_and_nothing_is_stored() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let typed = [("name", "New name"), ("currency", "euros"), ("tax", "lots"), ("zone", "Atlantis/Deep")];
    let answer = send(&ana, &form(&ana, &typed).await).await;
    assert_eq!(answer.status(), 422);
    let page = answer.text().await.unwrap();
    assert!(page.contains("3 things to put right"), "{page}");
    for (field, value) in typed {
        assert_eq!(value_of(&page, field), value, "{field}");
    }
    assert!(ana.page("/firm").await.contains("Ana's firm") || ana.page("/firm").await.contains("Ana&#39;s firm"));
}

#[tokio::test]
async fn the_second_of_two_to_save_sees_both_and_loses_nothing() {
    let service = Service::start().await;
    let (first, second) = (service.ana().await, service.ana().await);
    let (one, other) = (form(&first, &[("phone", "111")]).await, form(&second, &[("phone", "222")]).await);
    assert!(!goes_to(&send(&first, &one).await).is_empty());
    let answer = send(&second, &other).await;
    assert_eq!(answer.status(), 409);
    let page = answer.text().await.unwrap();
    assert!(page.contains("<th scope=\"row\">Phone</th><td>222</td><td>111</td>"), "{page}");
    assert_eq!((&*value_of(&page, "phone"), &*value_of(&page, "revision")), ("222", "2"));
}
