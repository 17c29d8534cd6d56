//! The main job in a real browser, scripts off: from the set-up code to the customer's Yes.

mod driver;

use driver::{Browser, Service};
use thirtyfour::prelude::*;

#[tokio::test(flavor = "multi_thread")]
async fn probe() {
    let browser = Browser::open(false).await;
    browser.driver.goto("data:text/html,<p id=p>none</p><a href=x>Go</a><script>document.getElementById('p').textContent='ran'</script>").await.unwrap();
    browser.sees("none").await;
    let _ = Service::start;
    let _ = By::Id("x");
}
