//! Who may see what: every route is asked for by everyone.

use super::helpers::{Service, key};

/// The routes, as the router lists them: path and methods.
fn routes() -> Vec<(String, Vec<&'static str>)> {
    let source = include_str!("../../src/web/mod.rs");
    let routes = source.split(".route(").skip(1).map(|rest| {
        let path = rest.split('"').nth(1).unwrap().to_owned();
        let handlers = rest.split('\n').next().unwrap();
        let methods = ["get", "post"].into_iter().filter(|method| handlers.contains(&format!("{method}("))).collect();
        (path, methods)
    });
    routes.collect()
}

/// What anybody may ask for.
fn is_open(path: &str) -> bool {
    ["/healthz", "/readyz", "/robots.txt", "/begin", "/in"].contains(&path)
        || path.starts_with("/static/")
        || path.starts_with("/o/")
}

fn filled(path: &str, job: &str) -> String {
    let path = path.replace("/job/{id}", job);
    path.split('/').map(|part| if part.starts_with('{') { "1" } else { part }).collect::<Vec<_>>().join("/")
}

#[tokio::test]
async fn a_stranger_is_asked_to_sign_in_at_every_route() {
    let service = Service::start().await;
    let job = service.ana().await.start_job().await;
    let stranger = service.stranger();
    let mut asked = 0;
    for (path, methods) in routes().into_iter().filter(|(path, _)| !is_open(path)) {
        let address = filled(&path, &job);
        if methods.contains(&"get") {
            let answer = stranger.get(&address).await;
            assert_eq!(answer.status(), 303, "GET {address}");
            assert!(super::helpers::goes_to(&answer).starts_with("/in?next="), "GET {address}");
            asked += 1;
        }
        if methods.contains(&"post") {
            let answer = stranger.post(&address, &[("key", &key()), ("revision", "0")]).await;
            assert_eq!(answer.status(), 401, "POST {address}");
            assert!(answer.text().await.unwrap().contains("Sign in to save"), "POST {address}");
            asked += 1;
        }
    }
    assert!(asked >= 18, "only {asked} routes were found");
}

#[tokio::test]
async fn another_firms_job_is_as_absent_as_one_that_never_was() {
    let service = Service::start().await;
    let job = service.ana().await.start_job().await;
    let ben = service.ben().await;
    for (path, methods) in routes().into_iter().filter(|(path, _)| path.contains("/job/{id}")) {
        let (hers, nobodys) = (filled(&path, &job), filled(&path, "/job/987654"));
        if methods.contains(&"get") {
            let (hers, nobodys) = (ben.get(&hers).await, ben.get(&nobodys).await);
            assert_eq!((hers.status().as_u16(), nobodys.status().as_u16()), (404, 404), "GET {path}");
            assert_eq!(hers.text().await.unwrap(), nobodys.text().await.unwrap(), "GET {path}");
        }
        if methods.contains(&"post") {
            let fields = [("key", &*key()), ("revision", "0"), ("state", "sent")];
            let answer = ben.post(&hers, &fields).await;
            assert_eq!(answer.status(), 404, "POST {path}");
        }
    }
    assert!(ben.page("/").await.contains("Each site is a job"));
}

#[tokio::test]
async fn an_id_that_is_none_is_not_here() {
    let service = Service::start().await;
    let ana = service.ana().await;
    for id in ["-1", "0", "9223372036854775807", "9223372036854775808", "abc", "1.0", "1%20", "%00", "..%2f..%2fetc"] {
        let answer = ana.get(&format!("/job/{id}/site")).await;
        assert_eq!(answer.status(), 404, "{id}");
        assert!(answer.text().await.unwrap().contains("Not here"), "{id}");
    }
    for path in ["/nothing", "//", "/job", "/job/1/site/", "/static/", "/static/..%2fCargo.toml", "/STATIC/keeplit.css"]
    {
        assert_eq!(ana.get(path).await.status(), 404, "{path}");
    }
}
