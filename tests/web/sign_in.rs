//! Signing in, signing out, and the session in between.

use reqwest::StatusCode;

use super::helpers::{PASSWORD, Service, goes_to, key, value_of};

const ANA: &str = "ana@example.org";

#[tokio::test]
async fn only_the_right_password_lets_in_and_the_answer_does_not_tell_who_is_known() {
    let service = Service::start().await;
    let stranger = service.stranger();
    let mut pages = Vec::new();
    for email in [ANA, "nobody@example.org"] {
        let answer = stranger.post("/in", &[("email", email), ("password", "a guess of mine")]).await;
        assert_eq!(answer.status(), 422, "{email}");
        assert!(answer.headers().get("set-cookie").is_none());
        pages.push(answer.text().await.unwrap().replace(email, ""));
    }
    assert_eq!(pages[0], pages[1]);
    assert!(pages[0].contains("do not belong together") && !pages[0].contains("a guess of mine"));
    let answer = stranger.post("/in", &[("email", " Ana@Example.org"), ("password", PASSWORD)]).await;
    assert_eq!(answer.status(), 303);
    assert_eq!(stranger.get("/").await.status(), 200);
}

#[tokio::test]
async fn the_cookie_is_closed_to_scripts_and_is_new_at_each_sign_in() {
    let service = Service::start().await;
    let fields = [("email", ANA), ("password", PASSWORD)];
    let mut cookies = Vec::new();
    for _ in 0..2 {
        let stranger = service.stranger();
        let form = stranger.form("/in", &fields).header("cookie", "keeplit=chosen").header("origin", &stranger.home);
        let answer = form.send().await.unwrap();
        let cookie = answer.headers()["set-cookie"].to_str().unwrap().to_owned();
        assert!(cookie.contains("HttpOnly; SameSite=Lax") && cookie.contains("Path=/"), "{cookie}");
        assert!(!cookie.contains("chosen"));
        cookies.push(cookie);
    }
    assert_ne!(cookies[0], cookies[1]);
}

#[tokio::test]
async fn a_session_ends_with_signing_out_and_with_time() {
    let service = Service::start().await;
    let ana = service.ana().await;
    assert_eq!(ana.get("/").await.status(), 200);
    service.seconds_pass(15 * 24 * 3600);
    assert_eq!(ana.get("/").await.status(), 303);

    let answer = service.stranger().post("/in", &[("email", ANA), ("password", PASSWORD)]).await;
    let cookie = answer.headers()["set-cookie"].to_str().unwrap().split(';').next().unwrap().to_owned();
    let with = |cookie: String| service.stranger().client.get(format!("{}/", ana.home)).header("cookie", cookie).send();
    assert_eq!(with(cookie.clone()).await.unwrap().status(), 200);
    for forged in [format!("{cookie}a"), cookie.to_uppercase(), format!("{cookie}; {cookie}"), "keeplit=".to_owned()] {
        assert_eq!(with(forged.clone()).await.unwrap().status(), 303, "{forged}");
    }
    let out = service.stranger().form("/out", &[]).header("cookie", &cookie).header("origin", &ana.home);
    assert_eq!(out.send().await.unwrap().status(), 303);
    assert_eq!(with(cookie).await.unwrap().status(), 303, "a session that was ended goes on");
}

#[tokio::test]
async fn nobody_is_sent_to_another_site_after_signing_in() {
    let service = Service::start().await;
    for (next, goes) in [
        ("/back", "/back"),
        ("/?search=oak", "/?search=oak"),
        ("//evil.example", "/"),
        ("https://evil.example", "/"),
        ("/\\evil.example", "/"),
        ("javascript:alert(1)", "/"),
        ("", "/"),
    ] {
        let answer = service.stranger().post("/in", &[("email", ANA), ("password", PASSWORD), ("next", next)]).await;
        assert_eq!(goes_to(&answer), goes, "{next}");
    }
}

#[tokio::test]
async fn a_form_sent_after_the_session_ended_is_saved_once_after_signing_in() {
    let service = Service::start().await;
    let job = service.ana().await.start_job().await;
    let site = format!("{job}/site");
    let ana = service.ana().await;
    let page = ana.page(&site).await;
    let (key, revision) = (value_of(&page, "key"), value_of(&page, "revision"));
    let next_revision = (revision.parse::<i64>().unwrap() + 1).to_string();
    let names = ["supply", "frequency", "supply_lowest", "supply_highest", "incoming_breaker", "altitude"];
    let heats = ["battery_coldest", "battery_hottest", "inverter_ambient"];
    let mut fields = vec![("key", key), ("revision", revision), ("customer", "Mirza & Sons <shop>".to_owned())];
    fields.extend(names.iter().chain(&heats).map(|name| (*name, value_of(&page, name))));
    let fields: Vec<(&str, &str)> = fields.iter().map(|(name, value)| (*name, value.as_str())).collect();

    service.seconds_pass(15 * 24 * 3600);
    let kept = ana.post(&site, &fields).await;
    assert_eq!(kept.status(), 401);
    let kept = kept.text().await.unwrap();
    assert!(kept.contains("What you typed is kept"));
    let (next, again) = (value_of(&kept, "next"), value_of(&kept, "again"));
    assert_eq!(next, site);
    let sent_again = [("email", ANA), ("password", PASSWORD), ("next", &*next), ("again", &*again)];
    for round in 1..=2 {
        let answer = ana.post("/in", &sent_again).await;
        assert_eq!(answer.status(), 303, "round {round}");
        assert_eq!(goes_to(&answer), format!("{job}/list"));
    }
    let page = ana.page(&site).await;
    assert_eq!(
        (value_of(&page, "customer"), value_of(&page, "revision")),
        ("Mirza & Sons <shop>".to_owned(), next_revision)
    );
}

#[tokio::test]
async fn a_kept_form_is_never_sent_to_another_site() {
    let service = Service::start().await;
    let fields = [("email", ANA), ("password", PASSWORD), ("next", "https://evil.example/"), ("again", "a=b")];
    let answer = service.stranger().post("/in", &fields).await;
    assert_eq!(answer.status(), 404);
}

#[tokio::test]
async fn a_flood_of_guesses_is_turned_away_while_pages_are_served() {
    let service = Service::start().await;
    let ana = service.ana().await;
    let guess = |n: usize| {
        let stranger = service.stranger();
        async move {
            let email = format!("guess{n}@example.org");
            stranger.post("/in", &[("email", &email), ("password", "a guess of mine")]).await.status()
        }
    };
    let flood = tokio::spawn(all((0..40).map(guess).collect()));
    for _ in 0..20 {
        assert_eq!(ana.get("/").await.status(), 200);
    }
    let answers = flood.await.unwrap();
    let refused = answers.iter().filter(|status| **status == StatusCode::TOO_MANY_REQUESTS).count();
    assert!(refused >= 20, "{refused} of 40 turned away");
    assert!(answers.iter().all(|status| [422, 429].contains(&status.as_u16())), "{answers:?}");
}

/// What all of them give, at the same time.
async fn all<F>(tasks: Vec<F>) -> Vec<F::Output>
where
    F: Future + Send + 'static,
    F::Output: Send + 'static,
{
    let tasks: Vec<_> = tasks.into_iter().map(tokio::spawn).collect();
    let mut answers = Vec::new();
    for task in tasks {
        answers.push(task.await.unwrap());
    }
    answers
}

#[tokio::test]
async fn guessing_at_one_account_is_stopped_and_forgotten_after_a_while() {
    let service = Service::start().await;
    let stranger = service.stranger();
    for _ in 0..10 {
        stranger.post("/in", &[("email", ANA), ("password", "a guess of mine")]).await;
    }
    let right = [("email", ANA), ("password", PASSWORD)];
    let answer = stranger.post("/in", &right).await;
    assert_eq!(answer.status(), 429);
    assert!(answer.headers().contains_key("retry-after"));
    service.seconds_pass(16 * 60);
    assert_eq!(stranger.post("/in", &right).await.status(), 303);
}

#[tokio::test]
async fn a_password_too_long_is_refused_without_being_hashed() {
    let service = Service::start().await;
    let long = "x".repeat(200_000);
    let begun = std::time::Instant::now();
    let answer = service.stranger().post("/in", &[("email", ANA), ("password", &long)]).await;
    assert_eq!(answer.status(), 422);
    assert!(begun.elapsed().as_secs() < 2);
    let unknown_form = service.stranger().post("/in", &[("key", &key())]).await;
    assert_eq!(unknown_form.status(), 422);
}
