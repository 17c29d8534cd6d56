//! The customer's side: the sheet behind a link, the answer, the record.

use reqwest::StatusCode;

use crate::service::{HOUSE, SHOP, Service};

#[tokio::test]
async fn looking_at_a_sheet_changes_nothing_and_leaves_no_trace() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let link = ana.offer(HOUSE).await;
    let cleo = service.browser();
    for _ in 0..20 {
        assert_eq!(cleo.head(&link).await.status(), StatusCode::OK);
        cleo.page(&link).await;
    }
    let answer = cleo.get(&link).await;
    for (name, value) in [
        ("referrer-policy", "no-referrer"),
        ("x-robots-tag", "noindex, nofollow"),
        ("cache-control", "private, no-store"),
    ] {
        assert_eq!(answer.headers()[name], value);
    }
    assert!(!answer.headers().contains_key("set-cookie"));
    let page = answer.text().await.unwrap();
    assert!(!page.contains("<script") && !page.contains("style=\""), "{page}");
    assert!(ana.page("/job/2/send").await.contains("none yet"));
}

#[tokio::test]
async fn a_customer_switches_loads_off_and_sees_the_hours_and_nothing_is_kept() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let link = ana.offer(HOUSE).await;
    let cleo = service.browser();
    let plain = cleo.page(&link).await;
    assert!(plain.contains("What if you switch something off?") && !plain.contains("With these off"));
    assert!(plain.contains("What makes it last longer") && plain.contains(" longer</bdi>"), "{plain}");
    let asked = cleo.page(&format!("{link}?off%5B0%5D=yes")).await;
    assert!(asked.contains("With these off, the battery lasts about"), "{asked}");
    assert!(asked.contains("name=\"off[0]\" value=\"yes\" checked"), "{asked}");
    for nonsense in ["?off=1", "?off[9999]=yes", "?off[-1]=yes", "?off[a]=b", "?%ff", "?off[0][0][0][0]=x"] {
        let page = cleo.page(&format!("{link}{nonsense}")).await;
        assert!(!page.contains("With these off"), "{nonsense}");
    }
    let after = cleo.page(&link).await;
    assert_eq!(after.replace(key_on(&after), ""), plain.replace(key_on(&plain), ""));
    assert!(ana.page("/job/2/send").await.contains("none yet"));
}

/// The one-time key of the form on a page, which is another each time.
fn key_on(page: &str) -> &str {
    page.split("name=\"key\" value=\"").nth(1).and_then(|rest| rest.split('"').next()).unwrap_or("none")
}

#[tokio::test]
async fn an_answer_needs_a_choice_and_a_name_and_keeps_what_was_typed() {
    let service = Service::start().await;
    let link = service.ana().await.offer(HOUSE).await;
    let cleo = service.browser();
    let form = cleo.form(&link, &link).await;
    let answer = cleo.send(&link, &form, &[("words", "Monday is fine")]).await;
    assert_eq!(answer.status(), StatusCode::UNPROCESSABLE_ENTITY);
    let page = answer.text().await.unwrap();
    for expected in ["<title>Error:", "Choose yes or no", "Enter your full name", "Monday is fine"] {
        assert!(page.contains(expected), "{expected}");
    }
}

#[tokio::test]
async fn a_version_is_answered_once_whoever_comes_second() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let (first, second) = (ana.offer(HOUSE).await, ana.link(HOUSE).await);
    let cleo = service.browser();
    let yes = cleo.send(&first, &cleo.form(&first, &first).await, &[("said", "yes"), ("name", "Cleo Marsh")]).await;
    assert_eq!(yes.status(), StatusCode::SEE_OTHER);
    let other = service.browser();
    let no = other.post(&second, &[("said", "no"), ("name", "Somebody Else")]).await;
    assert_eq!(no.status(), StatusCode::SEE_OTHER);
    let kept = other.page(&format!("{second}/kept")).await;
    for expected in ["Cleo Marsh", "You said yes", "1 December 2026, 12:00", "2026-12-01T12:00:00Z", "version 1"] {
        assert!(kept.contains(expected), "{expected}: {kept}");
    }
    assert!(!kept.contains("Somebody Else"));
    assert!(ana.page("/job/2/send").await.contains("Cleo Marsh said yes"));
}

#[tokio::test]
async fn a_cancelled_link_is_dead_at_once_and_shows_only_the_phone() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let link = ana.offer(HOUSE).await;
    let send = ana.page("/job/2/send").await;
    let action = send.split("action=\"").find(|part| part.contains("/cancel\"")).unwrap().split('"').next().unwrap();
    let form = ana.form("/job/2/send", action).await;
    assert_eq!(ana.send(action, &form, &[]).await.status(), StatusCode::SEE_OTHER);
    for path in [link.clone(), format!("{link}/kept")] {
        let answer = service.browser().get(&path).await;
        assert_eq!(answer.status(), StatusCode::GONE);
        let page = answer.text().await.unwrap();
        assert!(page.contains("01632 960 300") && page.contains("withdrawn"), "{page}");
        assert!(!page.contains("Rosalind") && !page.contains("EUR"), "{page}");
    }
}

#[tokio::test]
async fn a_link_ends_and_a_late_answer_is_not_kept() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let link = ana.offer(HOUSE).await;
    let cleo = service.browser();
    let form = cleo.form(&link, &link).await;
    service.days_later(31);
    assert_eq!(cleo.get(&link).await.status(), StatusCode::GONE);
    let late = cleo.send(&link, &form, &[("said", "yes"), ("name", "Cleo Marsh")]).await;
    assert_eq!(late.status(), StatusCode::GONE);
    assert!(late.text().await.unwrap().contains("was not kept"));
}

#[tokio::test]
async fn a_newer_sheet_replaces_the_link_but_never_an_agreed_one() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let old = ana.offer(HOUSE).await;
    let new = ana.offer(HOUSE).await;
    let answer = service.browser().get(&old).await;
    assert_eq!(answer.status(), StatusCode::GONE);
    assert!(answer.text().await.unwrap().contains("was replaced on 1 December 2026"));
    assert_eq!(service.browser().get(&new).await.status(), StatusCode::OK);
    let agreed = ana.link(SHOP).await;
    let price = format!("/job/{SHOP}/price");
    ana.send(&price, &ana.form(&price, &price).await, &[("labour", "1"), ("act", "make")]).await;
    assert!(service.browser().page(&agreed).await.contains("said yes to this sheet"));
}

#[tokio::test]
async fn only_the_whole_key_opens_a_sheet_and_a_full_stop_behind_it_is_forgiven() {
    let service = Service::start().await;
    let link = service.ana().await.offer(HOUSE).await;
    let cleo = service.browser();
    for wrong in
        [&link[..link.len() - 1], &link.to_uppercase().replace("/O/", "/o/"), &format!("{link}a"), "/o/x", "/o/"]
    {
        let status = cleo.get(wrong).await.status();
        assert_eq!(status, StatusCode::NOT_FOUND, "{wrong}");
    }
    for tail in [".", ")."] {
        let answer = cleo.get(&format!("{link}{tail}")).await;
        assert_eq!(answer.headers()["location"], link.as_str());
    }
}

#[tokio::test]
async fn twenty_wrong_links_make_one_wait_and_the_right_one_still_opens() {
    let service = Service::start().await;
    let link = service.ana().await.offer(HOUSE).await;
    let cleo = service.browser();
    for _ in 0..20 {
        assert_eq!(cleo.get("/o/wrong").await.status(), StatusCode::NOT_FOUND);
    }
    assert_eq!(cleo.get("/o/wrong").await.status(), StatusCode::TOO_MANY_REQUESTS);
    assert_eq!(cleo.get(&link).await.status(), StatusCode::OK);
}

#[tokio::test]
async fn the_square_on_the_sheet_leads_to_the_public_address() {
    let service = Service::start().await;
    let link = service.ana().await.offer(HOUSE).await;
    let page = service.browser().page(&link).await;
    let address = format!("{}{link}", crate::service::PUBLIC);
    let expected = keeplit::qr::Qr::of(&address).unwrap();
    assert!(page.contains(&expected.path) && page.contains(&address));
}
