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

/// The first printed word that begins so, without a path behind the address.
fn word_with(printed: &[String], beginning: &str) -> String {
    let word = printed.iter().flat_map(|line| line.split_whitespace()).find(|word| word.starts_with(beginning));
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

    /// Types into the field of a name, in place of what was there.
    pub async fn fill(&self, name: &str, text: &str) {
        let field = self.field(name).await;
        field.clear().await.unwrap();
        field.send_keys(text).await.unwrap();
    }

    /// Ticks or picks the choice of a name and value.
    pub async fn choose(&self, name: &str, value: &str) {
        let css = format!("input[name='{name}'][value='{value}']");
        self.driver
            .find(By::Css(css.as_str()))
            .await
            .unwrap_or_else(|_| panic!("no choice {name}={value}"))
            .click()
            .await
            .unwrap();
    }

    /// Presses the button or link of these words.
    pub async fn press(&self, words: &str) {
        let path = format!("//*[self::button or self::a][contains(normalize-space(.), \"{words}\")]");
        self.driver
            .find(By::XPath(path.as_str()))
            .await
            .unwrap_or_else(|_| panic!("nothing to press says {words}"))
            .click()
            .await
            .unwrap();
    }

    /// All text that the page shows.
    pub async fn text(&self) -> String {
        self.driver.find(By::Tag("body")).await.unwrap().text().await.unwrap()
    }

    /// Fails unless the page shows these words.
    pub async fn sees(&self, words: &str) {
        let text = self.text().await;
        assert!(text.contains(words), "the page does not say {words:?}:\n{text}");
    }

    async fn field(&self, name: &str) -> WebElement {
        let css = format!("[name='{name}']");
        self.driver.find(By::Css(css.as_str())).await.unwrap_or_else(|_| panic!("no field {name}"))
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
