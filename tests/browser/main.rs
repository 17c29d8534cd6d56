//! The main job in a real browser, scripts off: from the set-up code to the customer's Yes, and back
//! a week later.

mod driver;

use driver::{Browser, Service};

/// The twelve loads of a house, by their keys on the count-off sheet.
const HOUSE: [(&str, &str); 12] = [
    ("led_bulb_9w", "8"),
    ("ceiling_fan", "3"),
    ("tv_43", "1"),
    ("set_top_box", "1"),
    ("router", "1"),
    ("fibre_terminal", "1"),
    ("phone_charger", "2"),
    ("laptop", "1"),
    ("fridge_direct_cool", "1"),
    ("mixer_grinder", "1"),
    ("pump_booster", "1"),
    ("camera_recorder", "1"),
];

#[tokio::test(flavor = "multi_thread")]
async fn a_house_of_twelve_loads_from_the_set_up_code_to_the_customers_yes_and_back() {
    let service = Service::start(&[]);
    let installer = Browser::open(false).await;
    first_day(&installer, &service).await;
    survey(&installer).await;
    let link = quote(&installer).await;
    answer(&link).await;
    revisit(&installer, &service).await;
}

async fn first_day(browser: &Browser, service: &Service) {
    browser.go(&format!("{}/begin", service.address)).await;
    browser.fill("code", "wrong").await;
    browser.fill("firm", "Thornby Light").await;
    browser.fill("name", "Ana").await;
    browser.fill("email", "ana@thornby.example").await;
    browser.fill("password", "long enough").await;
    browser.press("Open the book").await;
    browser.sees("give the code that the program printed").await;
    browser.fill("code", &service.set_up_code()).await;
    browser.fill("password", "long enough").await;
    browser.press("Open the book").await;
    browser.sees("My firm").await;
    browser.fill("phone", "+44 1632 960 150").await;
    browser.press("Save").await;
    browser.sees("Job book").await;
}

async fn survey(browser: &Browser) {
    browser.press("Start a job").await;
    browser.sees("Who and where").await;
    browser.fill("customer", "Grace Okafor").await;
    browser.fill("place", "12 Hill Road, Thornby").await;
    browser.press("Save and carry on").await;
    browser.sees("Count off").await;
    for (key, count) in HOUSE {
        browser.fill(&format!("counts[{key}][quantity]"), count).await;
    }
    browser.press("Keep and carry on").await;
    browser.sees("How long must it last?").await;
    browser.choose("length", "4").await;
    browser.choose("chemistry", "vrla_agm").await;
    browser.press("Save and carry on").await;
    browser.sees("One-way lengths").await;
    browser.fill("bank", "1,5").await;
    browser.fill("board", "7").await;
    browser.press("Work it out").await;
    browser.sees("for 4").await;
    browser.sees("What to fit, in order").await;
    browser.sees("Pressure booster pump").await;
    proof(browser).await;
}

/// The cuts played through, a thousand years of them, and a change that is looked at and thrown away.
async fn proof(browser: &Browser) {
    browser.press("Hour by hour").await;
    browser.sees("stops at").await;
    browser.press("Weeks and years").await;
    browser.press("Play 1,000 years").await;
    browser.sees("Runs dry in a year").await;
    browser.press("Back to what it needs").await;
    browser.press("Try a change").await;
    browser.fill("hours", "8").await;
    browser.press("Work it out").await;
    browser.sees("Use this one").await;
    browser.press("Throw it away").await;
    browser.sees("for 4").await;
}

/// Prices every line, makes the sheet and a link to it; gives the link.
async fn quote(browser: &Browser) -> String {
    browser.press("Price up").await;
    browser.sees("no price yet").await;
    for part in browser.filled("[text]").await {
        browser.fill(&part.replace("[text]", "[price]"), "10").await;
    }
    browser.fill("labour", "350").await;
    browser.press("Make the sheet").await;
    browser.sees("Sheet 1").await;
    browser.press("Make a link").await;
    browser.sees("The link").await;
    browser.value_of("address").await
}

/// Another browser, which has never signed in, opens the link and says yes.
async fn answer(link: &str) {
    let customer = Browser::open(false).await;
    customer.go(link).await;
    customer.sees("About 4 hours").await;
    customer.sees("Thornby Light").await;
    let text = customer.text().await;
    assert!(!text.contains("You pay"), "what the firm pays is shown to the customer");
    customer.choose("off[0]", "yes").await;
    customer.press("Show the hours").await;
    customer.sees("With these off, the battery lasts about").await;
    customer.choose("said", "yes").await;
    customer.fill("name", "Grace Okafor").await;
    customer.press("Send my answer").await;
    customer.sees("Grace Okafor").await;
    assert!(customer.address().await.ends_with("/kept"), "{}", customer.address().await);
}

/// A week later: three letters find the job, one load is changed, and what changed is seen.
async fn revisit(browser: &Browser, service: &Service) {
    browser.go(&format!("{}/?search=oka", service.address)).await;
    browser.sees("Agreed").await;
    browser.press("Grace Okafor").await;
    browser.sees("for 4").await;
    browser.press("Stay-on list").await;
    browser.sees("On the list").await;
    browser.fill("loads[1][quantity]", "5").await;
    browser.press("Keep and carry on").await;
    browser.sees("How long must it last?").await;
    browser.press("Work it out with usual cable lengths").await;
    browser.press("See what changed").await;
    browser.sees("Ceiling fan").await;
    browser.sees("Yes, Grace Okafor").await;
}
