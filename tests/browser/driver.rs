//! Starts the service and a headless browser for one test, and ends both with it.

use std::io::{BufRead, BufReader};
use std::net::TcpListener;
use std::process::{Child, Command, Stdio};
use std::time::Duration;

use thirtyfour::prelude::*;
use thirtyfour::{ChromeCapabilities, ChromiumLikeCapabilities};

/// A child process that ends with the test.
pub struct Running(Child);

impl Drop for Running {
    fn drop(&mut self) {
        let _ = self.0.kill();
        let _ = self.0.wait();
    }
}

/// The service on a free port with an empty data folder of its own.
pub struct Service {
    /// Where it answers.
    pub address: String,
    /// What it printed at its start, line by line.
    pub printed: Vec<String>,
    _process: Running,
    _data: tempfile::TempDir,
}

impl Service {
    /// Starts `keeplit serve` with further arguments and waits until it says where it listens.
    pub fn start(arguments: &[&str]) -> Self {
        let data = tempfile::tempdir().unwrap();
        let mut process = Command::new(env!("CARGO_BIN_EXE_keeplit"))
            .args(["serve", "--listen", "127.0.0.1:0", "--data"])
            .arg(data.path())
            .args(arguments)
            .stdout(Stdio::piped())
            .spawn()
            .unwrap();
        let lines = BufReader::new(process.stdout.take().unwrap()).lines();
        let process = Running(process);
        let mut printed = Vec::new();
        for line in lines {
            let line = line.unwrap();
            let ready = line.starts_with("Ready");
            printed.push(line);
            if ready {
                break;
            }
        }
        let address = word_with(&printed, "http://");
        Self { address, printed, _process: process, _data: data }
    }

    /// The one-time set-up code that it printed.
    pub fn set_up_code(&self) -> String {
        let line = self.printed.iter().find(|line| line.contains("code")).expect("no set-up code was printed");
        line.split_whitespace().last().unwrap().to_owned()
    }
}

/// The last printed word that begins so, without a path behind the address.
fn word_with(printed: &[String], beginning: &str) -> String {
    let word = printed.iter().rev().flat_map(|line| line.split_whitespace()).find(|word| word.starts_with(beginning));
    let word = word.unwrap_or_else(|| panic!("nothing printed begins with {beginning}: {printed:?}"));
    word.splitn(4, '/').take(3).collect::<Vec<_>>().join("/")
}

/// A browser window; scripts are off unless asked for.
pub struct Browser {
    /// The window.
    pub driver: WebDriver,
    _process: Running,
}

impl Browser {
    /// Opens a window as wide as a phone.
    pub async fn open(script: bool) -> Self {
        let port = TcpListener::bind("127.0.0.1:0").unwrap().local_addr().unwrap().port();
        let process = Command::new("chromedriver")
            .arg(format!("--port={port}"))
            .stdout(Stdio::null())
            .stderr(Stdio::null())
            .spawn()
            .expect("chromedriver is missing: tests/run says what to install");
        let process = Running(process);
        let driver = connect(&format!("http://127.0.0.1:{port}"), script).await;
        driver.set_window_rect(0, 0, 500, 900).await.unwrap();
        Self { driver, _process: process }
    }

    /// Opens an address.
    pub async fn go(&self, address: &str) {
        self.driver.goto(address).await.unwrap();
    }

    /// Where the browser is.
    pub async fn address(&self) -> String {
        self.driver.current_url().await.unwrap().to_string()
    }

    /// The names of all fields that end so and are not empty.
    pub async fn filled(&self, ending: &str) -> Vec<String> {
        let css = format!("input[name$='{ending}']:not([value=''])");
        let mut names = Vec::new();
        for field in self.driver.find_all(By::Css(css.as_str())).await.unwrap() {
            names.extend(field.attr("name").await.unwrap());
        }
        names
    }

    /// What stands in the field of an id.
    pub async fn value_of(&self, id: &str) -> String {
        self.driver.find(By::Id(id)).await.unwrap().value().await.unwrap().unwrap()
    }

    /// Types into the field of a name, in place of what was there.
    pub async fn fill(&self, name: &str, text: &str) {
        let field = self.field(name).await;
        field.clear().await.unwrap();
        field.send_keys(text).await.unwrap();
    }

    /// Picks the choice of a name and value, by the keyboard.
    pub async fn choose(&self, name: &str, value: &str) {
        self.found(By::Css(format!("input[name='{name}'][value='{value}']"))).await.send_keys(" ").await.unwrap();
    }

    /// Presses the button or link of these words, by the keyboard.
    pub async fn press(&self, words: &str) {
        let path = format!("//*[self::button or self::a][contains(normalize-space(.), \"{words}\")]");
        self.found(By::XPath(path)).await.send_keys(Key::Enter + "").await.unwrap();
    }

    /// All text that the page shows; empty while one page gives way to the next.
    pub async fn text(&self) -> String {
        match self.driver.find(By::Tag("body")).await {
            Ok(body) => body.text().await.unwrap_or_default(),
            Err(_) => String::new(),
        }
    }

    /// Waits until the page shows these words; fails when it does not.
    pub async fn sees(&self, words: &str) {
        for _ in 0..50 {
            if self.text().await.contains(words) {
                return;
            }
            tokio::time::sleep(Duration::from_millis(100)).await;
        }
        panic!("the page does not say {words:?}:\n{}", self.text().await);
    }

    async fn field(&self, name: &str) -> WebElement {
        self.found(By::Css(format!("[name='{name}']"))).await
    }

    /// Waits for something on the page, while one page gives way to the next; fails when it does not come.
    async fn found(&self, what: By) -> WebElement {
        for _ in 0..50 {
            if let Ok(element) = self.driver.find(what.clone()).await {
                return element;
            }
            tokio::time::sleep(Duration::from_millis(100)).await;
        }
        panic!("{what:?} is not on the page:\n{}", self.text().await);
    }
}

/// A session with the driver, as soon as it answers.
async fn connect(driver: &str, script: bool) -> WebDriver {
    let mut last = None;
    for _ in 0..100 {
        match WebDriver::new(driver, capabilities(script)).await {
            Ok(window) => return window,
            Err(error) => last = Some(error),
        }
        tokio::time::sleep(Duration::from_millis(100)).await;
    }
    panic!("the browser did not start: {last:?}");
}

fn capabilities(script: bool) -> ChromeCapabilities {
    let mut capabilities = DesiredCapabilities::chrome();
    for argument in [
        "--headless",
        "--no-sandbox",
        "--disable-gpu",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
        "--disable-dev-shm-usage",
    ] {
        capabilities.add_arg(argument).unwrap();
    }
    if !script {
        let off = serde_json::json!({ "profile.managed_default_content_settings.javascript": 2 });
        capabilities.add_experimental_option("prefs", off).unwrap();
    }
    capabilities
}
