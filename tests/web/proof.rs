//! The proof on its pages: hour by hour, weeks and years, a change tried.

use std::time::{Duration, Instant};

use super::helpers::{Service, Visitor, goes_to, key};
use super::page_form::PageForm;

/// A job with a list and a cut.
async fn job(service: &Service, cut: &[(&str, &str)]) -> (Visitor, String) {
    let ana = service.ana().await;
    let job = ana.start_job().await;
    let counted = [
        ("counts[led_bulb_9w][quantity]", "8"),
        ("counts[led_bulb_9w][when]", "18-23"),
        ("counts[ceiling_fan][quantity]", "3"),
        ("counts[fridge_direct_cool][quantity]", "1"),
        ("counts[tv_43][quantity]", "1"),
    ];
    let list = format!("{job}/list");
    assert_eq!(PageForm::of(&ana, &list).await.with(&counted).send(&ana, &list).await.status(), 303);
    let path = format!("{job}/cut");
    let form = PageForm::of(&ana, &path).await.with(&[("length", "4")]).with(cut);
    assert_eq!(form.send(&ana, &path).await.status(), 303);
    (ana, job)
}

#[tokio::test]
async fn the_answer_says_how_long_it_lasts_and_what_each_load_costs() {
    let service = Service::start().await;
    let (ana, job) = job(&service, &[]).await;
    let needs = ana.page(&format!("{job}/needs")).await;
    for told in ["<dt>Lasts</dt>", "Played through", "Full before every cut of four weeks", "What each load costs"] {
        assert!(needs.contains(told), "{told}");
    }
    let costs = needs.split("What each load costs").nth(1).unwrap();
    assert!(costs.contains("Without Ceiling fan: about"), "{costs}");
}

#[tokio::test]
async fn every_picture_has_its_figures_in_a_table() {
    let service = Service::start().await;
    let (ana, job) = job(&service, &[]).await;
    let hours = ana.page(&format!("{job}/hours")).await;
    assert_eq!(hours.matches("<title id=").count(), 3);
    assert_eq!(hours.matches("The same in figures</summary>").count(), 3);
    for told in ["The cut, played through", "Aged is at 80\u{a0}% health", "From each hour of the day", "stops at"] {
        assert!(hours.contains(told), "{told}");
    }
    // The end of the line is the last row of its table.
    let table = hours.split("The cut in figures</caption>").nth(1).unwrap().split("</table>").next().unwrap();
    let last = table.rsplit("<th scope=\"row\" class=\"when\">").next().unwrap().split('<').next().unwrap();
    assert!(hours.contains(&format!("stops at {last}")), "{last}");
    let weeks = ana.page(&format!("{job}/weeks")).await;
    assert!(weeks.contains("Full before every cut") && weeks.matches("<th scope=\"row\">").count() == 28);
}

#[tokio::test]
async fn years_are_played_while_the_page_comes_and_say_what_they_rest_on() {
    let service = Service::start().await;
    let (ana, job) = job(&service, &[("region", "Kenya"), ("usual", "3"), ("longest", "20")]).await;
    let weeks = format!("{job}/weeks");
    assert!(!ana.page(&weeks).await.contains("Runs dry in a year"));
    let played = ana.page(&format!("{weeks}?play=yes")).await;
    for told in ["Runs dry in a year", "1,000 years played, resting on the average of Kenya, 2018", "ChaCha", "</html>"]
    {
        assert!(played.contains(told), "{told}: {played}");
    }
    let figures = |page: &str| {
        page.split("What the years say</caption>").nth(1).map(|rest| rest.split("</table>").next().unwrap().to_owned())
    };
    let again = ana.page(&format!("{weeks}?play=yes")).await;
    assert_eq!(figures(&played), figures(&again), "the same job gets the same figures");
}

#[tokio::test]
async fn a_browser_that_goes_away_and_stop_both_free_the_place() {
    let service = Service::start().await;
    // Many cuts, so that a thousand years take a while.
    let (ana, job) = job(&service, &[("cuts", "160"), ("usual", "0.3"), ("longest", "1")]).await;
    let free = service.app.playing.free_places();
    let address = format!("{job}/weeks?play=yes");
    let freed = async |why: &str| {
        let begun = Instant::now();
        while service.app.playing.free_places() < free {
            assert!(begun.elapsed() < Duration::from_secs(5), "{why}");
            tokio::time::sleep(Duration::from_millis(5)).await;
        }
    };
    let mut answer = ana.get(&address).await;
    let first = answer.chunk().await.unwrap().unwrap();
    assert!(!first.is_empty() && service.app.playing.free_places() < free, "it plays while the page comes");
    drop(answer);
    freed("nobody waits any more").await;

    let mut answer = ana.get(&address).await;
    answer.chunk().await.unwrap();
    let stopped = ana.post(&format!("{job}/weeks/stop"), &[("key", &key())]).await;
    assert_eq!(goes_to(&stopped), format!("{job}/weeks"));
    let rest = answer.text().await.unwrap();
    assert!(rest.contains("Stopped; nothing was kept.") && !rest.contains("Runs dry in a year"), "{rest}");
    freed("Stop was pressed").await;

    // A second page of the same person ends the first.
    let first = ana.get(&address).await;
    let second = ana.get(&address).await;
    assert!(first.text().await.unwrap().contains("Stopped; nothing was kept."));
    drop(second);
    freed("one at a time for each person").await;

    // Fifty at once: no more run than there are places, and all of them end.
    let fifty: Vec<_> = (0..50).map(|_| ana.get(&address)).collect();
    let mut last = None;
    for answer in fifty {
        last = Some(answer.await);
        assert!(service.app.playing.free_places() + 1 >= free, "one at a time for each person");
    }
    drop(last);
    freed("fifty of them").await;
}

#[tokio::test]
async fn a_change_is_looked_at_without_being_kept_and_used_when_it_is_liked() {
    let service = Service::start().await;
    let (ana, job) = job(&service, &[]).await;
    let address = format!("{job}/try");
    let before = ana.page(&address).await;
    assert!(before.contains("Change something and work it out") && !before.contains("Use this one"));
    let tried = ana.page(&format!("{address}?hours=8&chemistry=lfp&off%5B1%5D=yes")).await;
    for told in ["Use this one", "Throw it away", "<b>8\u{a0}h</b>"] {
        assert!(tried.contains(told), "{told}");
    }
    assert_eq!(PageForm::of(&ana, &format!("{job}/cut")).await.value("length"), "4", "nothing was kept");
    let form = PageForm::on(
        tried.split("<section id=\"beside\">").nth(1).map(|part| format!("<main {part}")).unwrap().as_str(),
    );
    let answer = form.send(&ana, &address).await;
    assert_eq!(goes_to(&answer), format!("{job}/needs"));
    let cut = PageForm::of(&ana, &format!("{job}/cut")).await;
    assert_eq!((cut.value("length"), cut.value("chemistry")), ("8", "lfp"));
    assert_eq!(ana.page(&address).await.matches("type=\"checkbox\"").count(), 3, "the fan is off the list");
    // The page that was open all along is stale now: it stores nothing.
    let stale = form.with(&[("hours", "2"), ("key", &key())]).send(&ana, &address).await;
    assert!(stale.text().await.unwrap().contains("The job has changed meanwhile"));
    assert_eq!(PageForm::of(&ana, &format!("{job}/cut")).await.value("length"), "8");
}

#[tokio::test]
async fn a_change_that_cannot_be_is_told_beside_its_field() {
    let service = Service::start().await;
    let (ana, job) = job(&service, &[]).await;
    for (query, told) in [
        ("hours=500&chemistry=lfp", "Length of the cut: give 0.25 to 168"),
        ("hours=4&chemistry=zinc", "Battery: choose one"),
        (
            "hours=4&chemistry=lfp&off%5B0%5D=y&off%5B1%5D=y&off%5B2%5D=y&off%5B3%5D=y",
            "Left off: leave at least one load on",
        ),
    ] {
        let answer = ana.get(&format!("{job}/try?{query}")).await;
        assert_eq!(answer.status(), 422, "{query}");
        let page = answer.text().await.unwrap();
        assert!(
            page.contains(told) && page.contains("value=\"4\"") || page.contains("value=\"500\""),
            "{told}: {page}"
        );
    }
}
