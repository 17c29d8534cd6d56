//! What goes over the wire: headers, weight, deadlines, an orderly end.

use std::time::{Duration, Instant};

use tokio::io::{AsyncReadExt, AsyncWriteExt};
use tokio::net::TcpStream;

use super::helpers::Service;

#[tokio::test]
async fn every_answer_carries_the_headers_that_keep_it_safe() {
    let service = Service::start().await;
    let ana = service.ana().await;
    for path in ["/", "/in", "/nothing", "/healthz", "/job/999/site"] {
        let answer = ana.get(path).await;
        let header = |name: &str| answer.headers().get(name).map_or("", |value| value.to_str().unwrap()).to_owned();
        let policy = header("content-security-policy");
        assert!(policy.starts_with("default-src 'self'") && policy.contains("frame-ancestors 'none'"), "{path}");
        assert!(!policy.contains("unsafe"), "{path}");
        assert_eq!(header("x-content-type-options"), "nosniff", "{path}");
        assert!(["same-origin", "no-referrer"].contains(&&*header("referrer-policy")), "{path}");
        assert!(header("cache-control").starts_with("private"), "{path}: {}", header("cache-control"));
    }
    assert!(ana.get("/in").await.headers()["cache-control"].to_str().unwrap().contains("no-store"));
}

#[tokio::test]
async fn no_page_has_anything_inline() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let job = ana.start_job().await;
    for path in ["/", "/firm", "/back", &format!("{job}/site"), &format!("{job}/bin"), "/?binned=yes"] {
        let page = ana.page(path).await;
        for banned in [" style=", "<style", " onclick", "javascript:", "type=\"number\"", " required", " placeholder"] {
            assert!(!page.contains(banned), "{banned} on {path}");
        }
        assert_eq!(page.matches("<script").count(), page.matches("<script src=").count(), "{path}");
        assert_eq!(page.matches("<h1").count(), 1, "{path}");
        assert!(page.contains("<html lang=\"en\""), "{path}");
    }
}

#[tokio::test]
async fn style_and_script_are_small_and_kept_for_good() {
    let service = Service::start().await;
    let stranger = service.stranger();
    let page = stranger.page("/in").await;
    for ending in ["css", "js"] {
        let address = page.split('"').find(|part| part.ends_with(&format!(".{ending}"))).unwrap();
        let packed = stranger.client.get(format!("{}{address}", stranger.home)).header("accept-encoding", "gzip");
        let packed = packed.send().await.unwrap();
        assert_eq!(packed.headers()["cache-control"], "public, max-age=31536000, immutable");
        assert_eq!(packed.headers()["content-encoding"], "gzip", "{address}");
        assert!(packed.bytes().await.unwrap().len() <= 10_000, "{address}");
    }
    assert_eq!(stranger.get("/static/keeplit-000000000000.css").await.status(), 404);
}

#[tokio::test]
async fn watchdogs_are_told_without_any_data() {
    let service = Service::start().await;
    for (path, says) in [("/healthz", "up\n"), ("/readyz", "ready\n")] {
        assert_eq!(service.stranger().page(path).await, says);
    }
    assert!(service.stranger().page("/robots.txt").await.contains("Disallow"));
}

#[tokio::test]
async fn a_form_that_is_too_large_is_refused_with_a_page() {
    let service = Service::start().await;
    let answer = service.stranger().post("/in", &[("email", &"x".repeat(300_000))]).await;
    assert_eq!(answer.status(), 413);
    assert!(answer.text().await.unwrap().contains("could not be read"));
}

#[tokio::test]
async fn a_client_that_dribbles_its_headers_is_let_go() {
    let service = Service::start().await;
    let mut slow = TcpStream::connect(service.listens_on).await.unwrap();
    slow.write_all(b"GET / HTTP/1.1\r\nHost: x\r\nX-Slow: ").await.unwrap();
    let begun = Instant::now();
    let mut rest = Vec::new();
    let ended = tokio::time::timeout(Duration::from_secs(9), slow.read_to_end(&mut rest)).await;
    assert!(ended.is_ok(), "still open after {:?}", begun.elapsed());
    assert!(begun.elapsed() >= Duration::from_secs(3), "let go too early");
}

#[tokio::test]
async fn told_to_stop_it_finishes_what_is_open_and_ends_in_time() {
    let mut service = Service::start().await;
    let ana = service.ana().await;
    assert_eq!(ana.get("/").await.status(), 200);
    let mut stuck = TcpStream::connect(service.listens_on).await.unwrap();
    stuck.write_all(b"POST /in HTTP/1.1\r\nHost: x\r\nContent-Length: 100\r\n\r\nhalf").await.unwrap();
    let begun = Instant::now();
    service.stop().await;
    assert!(begun.elapsed() < Duration::from_secs(10), "{:?}", begun.elapsed());
    assert!(TcpStream::connect(service.listens_on).await.is_err(), "it still takes calls");
}
