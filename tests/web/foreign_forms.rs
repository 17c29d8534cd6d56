//! Forms that other sites send with a person's cookie.

use super::helpers::{Service, key};

#[tokio::test]
async fn a_form_from_elsewhere_is_refused_and_changes_nothing() {
    let service = Service::start().await;
    let ana = service.ana().await;
    for (name, value) in [
        ("sec-fetch-site", "cross-site"),
        ("sec-fetch-site", "same-site"),
        ("origin", "https://elsewhere.example"),
        ("origin", "null"),
        ("accept", "says nothing of where it was sent from"),
    ] {
        let answer = ana.form("/job/new", &[("key", &key())]).header(name, value).send().await.unwrap();
        assert_eq!(answer.status(), 403, "{name}: {value}");
        assert!(answer.text().await.unwrap().contains("Sent from elsewhere"), "{name}: {value}");
    }
    assert!(ana.page("/").await.contains("Each site is a job"));
}

#[tokio::test]
async fn a_form_from_here_is_taken() {
    let service = Service::start().await;
    let ana = service.ana().await;
    for (name, value) in [("sec-fetch-site", "same-origin"), ("origin", ana.home.as_str())] {
        let answer = ana.form("/job/new", &[("key", &key())]).header(name, value).send().await.unwrap();
        assert_eq!(answer.status(), 303, "{name}: {value}");
    }
}

#[tokio::test]
async fn asking_for_a_page_never_changes_anything() {
    let service = Service::start().await;
    let ana = service.ana().await;
    for path in ["/job/new", "/job/1/copy", "/job/1/restore", "/back/backup", "/out"] {
        assert_eq!(ana.get(path).await.status(), 405, "{path}");
    }
    assert_eq!(ana.get("/").await.status(), 200);
}
