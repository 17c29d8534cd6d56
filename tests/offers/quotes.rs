//! Pricing, freezing and sending, as the installer meets it.

use reqwest::StatusCode;

use crate::service::{HOUSE, SHOP, Service};

const PRICE: &str = "/job/2/price";

#[tokio::test]
async fn a_form_with_faults_comes_back_as_typed_and_stores_nothing() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let form = ana.form(PRICE, PRICE).await;
    let changes = [("lines[0][price]", "1.500"), ("tax", "lots"), ("note", "kept <b>"), ("act", "save")];
    let answer = ana.send(PRICE, &form, &changes).await;
    assert_eq!(answer.status(), StatusCode::UNPROCESSABLE_ENTITY);
    let page = answer.text().await.unwrap();
    for expected in ["<title>Error:", "write 1500 or 1.50", "Tax: give a number", "value=\"1.500\"", "kept &#60;b&#62;"]
    {
        assert!(page.contains(expected), "{expected}: {page}");
    }
    assert_eq!(ana.form(PRICE, PRICE).await["lines[0][price]"], form["lines[0][price]"]);
}

#[tokio::test]
async fn a_line_without_a_price_is_saved_but_keeps_the_sheet_back() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let saved = ana.send(PRICE, &ana.form(PRICE, PRICE).await, &[("lines[0][price]", ""), ("act", "save")]).await;
    assert_eq!(saved.status(), StatusCode::SEE_OTHER);
    let form = ana.form(PRICE, PRICE).await;
    assert_eq!(form["lines[0][price]"], "");
    let made = ana.send(PRICE, &form, &[("act", "make")]).await;
    assert_eq!(made.status(), StatusCode::UNPROCESSABLE_ENTITY);
    assert!(made.text().await.unwrap().contains("have no price yet"));
}

#[tokio::test]
async fn the_same_form_sent_five_times_makes_one_sheet() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let form = ana.form(PRICE, PRICE).await;
    for _ in 0..5 {
        let made = ana.send(PRICE, &form, &[("act", "make")]).await;
        assert_eq!(
            (made.status(), &made.headers()["location"]),
            (StatusCode::SEE_OTHER, &"/job/2/send".parse().unwrap())
        );
    }
    assert_eq!(ana.page("/job/2/past").await.matches("version ").count(), 1);
}

#[tokio::test]
async fn who_saves_second_sees_both_prices() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let (office, roof) = (ana.form(PRICE, PRICE).await, ana.form(PRICE, PRICE).await);
    ana.send(PRICE, &office, &[("labour", "400"), ("act", "save")]).await;
    let second = ana.send(PRICE, &roof, &[("labour", "450"), ("act", "save")]).await;
    assert_eq!(second.status(), StatusCode::CONFLICT);
    let page = second.text().await.unwrap();
    assert!(page.contains("400.00") && page.contains("value=\"450\""), "{page}");
}

#[tokio::test]
async fn a_frozen_sheet_stays_as_it_was_and_the_change_is_told() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let link = ana.offer(HOUSE).await;
    let before = ana.page("/job/2/sheet/2").await;
    ana.send(PRICE, &ana.form(PRICE, PRICE).await, &[("labour", "999"), ("act", "save")]).await;
    assert_eq!(ana.page("/job/2/sheet/2").await, before);
    assert!(!service.browser().page(&link).await.contains("999"));
    let past = ana.page("/job/2/past").await;
    assert!(past.contains("Price: EUR"), "{past}");
}

#[tokio::test]
async fn what_the_firm_pays_is_on_no_page_of_the_customer() {
    let service = Service::start().await;
    let ana = service.ana().await;
    ana.send(PRICE, &ana.form(PRICE, PRICE).await, &[("lines[0][cost]", "77.77"), ("act", "save")]).await;
    let link = ana.offer(HOUSE).await;
    assert!(!service.browser().page(&link).await.contains("77.77"));
    assert!(ana.page(PRICE).await.contains("77.77"));
}

#[tokio::test]
async fn a_stranger_gets_none_of_these_pages() {
    let service = Service::start().await;
    let stranger = service.browser();
    for path in ["price", "send", "past", "sheet/1"] {
        let answer = stranger.get(&format!("/job/{SHOP}/{path}")).await;
        assert_eq!(answer.status(), StatusCode::SEE_OTHER, "{path}");
        assert!(answer.headers()["location"].to_str().unwrap().starts_with("/in"), "{path}");
    }
}

#[tokio::test]
async fn ids_that_are_none_and_versions_of_other_jobs_are_not_here() {
    let service = Service::start().await;
    let ana = service.ana().await;
    for path in ["/job/99/price", "/job/99/send", "/job/99/past", "/job/2/sheet/1", "/job/3/sheet/99", "/job/-1/price"]
    {
        assert_eq!(ana.get(path).await.status(), StatusCode::NOT_FOUND, "{path}");
    }
}

#[tokio::test]
async fn a_change_from_the_check_over_comes_back_to_it() {
    let service = Service::start().await;
    let ana = service.ana().await;
    assert!(ana.page(PRICE).await.contains("/job/2/site?back=price"));
    let form = ana.form("/job/2/site", "/job/2/site").await;
    let changed = ana.send_from("/job/2/site?back=price", "/job/2/site", &form).await;
    assert_eq!(changed.headers()["location"], PRICE);
    let form = ana.form("/job/2/site", "/job/2/site").await;
    let plain = ana.send("/job/2/site", &form, &[]).await;
    assert_eq!(plain.headers()["location"], "/job/2/list");
}
