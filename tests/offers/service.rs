//! The service on a port of its own, with the made-up firm and its jobs.

use std::collections::BTreeMap;
use std::sync::Arc;
use std::sync::atomic::{AtomicI64, Ordering};

use keeplit::demo;
use keeplit::store::Store;
use keeplit::web::{self, App, Clock, Config};
use reqwest::{Client, Response, StatusCode, redirect};
use tempfile::TempDir;
use tokio::net::TcpListener;

/// 1 December 2026, noon.
const NOON: i64 = 1_796_126_400;
const PASSWORD: &str = "a password for tests";
/// The made-up house: priced, not yet sent.
pub const HOUSE: i64 = 2;
/// The made-up shop: sent and agreed.
pub const SHOP: i64 = 3;
/// What links show, whatever address a request claims.
pub const PUBLIC: &str = "https://jobs.example.test";

/// A running service.
pub struct Service {
    address: String,
    now: Arc<AtomicI64>,
    _data: TempDir,
}

/// A browser.
pub struct Browser {
    client: Client,
    address: String,
}

impl Service {
    /// Starts on a free port.
    pub async fn start() -> Self {
        let data = tempfile::tempdir().unwrap();
        let store = Store::open(data.path()).await.unwrap();
        demo::fill(&store, NOON, PASSWORD, [3; 16], [5; 32]).await.unwrap();
        let now = Arc::new(AtomicI64::new(NOON));
        let hands = now.clone();
        let clock = Clock::new(move || hands.load(Ordering::SeqCst));
        let config = Config { public_address: Some(PUBLIC.to_owned()), trusted_proxies: Vec::new() };
        let app = App::new(store, clock, config).unwrap();
        let listener = TcpListener::bind("127.0.0.1:0").await.unwrap();
        let address = format!("http://{}", listener.local_addr().unwrap());
        tokio::spawn(web::accept::serve(listener, web::router(app), std::future::pending()));
        Self { address, now, _data: data }
    }

    /// Lets days go by.
    pub fn days_later(&self, days: i64) {
        self.now.fetch_add(days * 24 * 3600, Ordering::SeqCst);
    }

    /// Somebody with a browser.
    pub fn browser(&self) -> Browser {
        let client = Client::builder().cookie_store(true).redirect(redirect::Policy::none()).build().unwrap();
        Browser { client, address: self.address.clone() }
    }

    /// The made-up installer, signed in.
    pub async fn ana(&self) -> Browser {
        let ana = self.browser();
        let answer = ana.post("/in", &[("email", demo::EMAIL), ("password", PASSWORD)]).await;
        assert_eq!(answer.status(), StatusCode::SEE_OTHER);
        ana
    }
}

impl Browser {
    /// Opens a page.
    pub async fn get(&self, path: &str) -> Response {
        self.client.get(format!("{}{path}", self.address)).send().await.unwrap()
    }

    /// The text of a page that is there.
    pub async fn page(&self, path: &str) -> String {
        let answer = self.get(path).await;
        assert_eq!(answer.status(), StatusCode::OK, "{path}");
        answer.text().await.unwrap()
    }

    /// Asks for the head of a page.
    pub async fn head(&self, path: &str) -> Response {
        self.client.head(format!("{}{path}", self.address)).send().await.unwrap()
    }

    /// Sends a form.
    pub async fn post(&self, path: &str, fields: &[(&str, &str)]) -> Response {
        let request = self.client.post(format!("{}{path}", self.address)).header("origin", &self.address);
        request.header("sec-fetch-site", "same-origin").form(fields).send().await.unwrap()
    }

    /// The fields of the form on a page that posts to `action`, as they stand.
    pub async fn form(&self, path: &str, action: &str) -> BTreeMap<String, String> {
        let page = self.page(path).await;
        let start = page.find(&format!("action=\"{action}\"")).unwrap_or_else(|| panic!("no form to {action}: {page}"));
        let form = &page[start..start + page[start..].find("</form>").unwrap()];
        let mut fields = BTreeMap::new();
        for tag in form.split('<').filter(|tag| tag.starts_with("input")) {
            let skip = tag.contains("type=\"radio\"") && !tag.contains(" checked");
            if let (Some(name), false) = (attribute(tag, "name"), skip) {
                fields.insert(name, attribute(tag, "value").unwrap_or_default());
            }
        }
        for tag in form.split('<').filter(|tag| tag.starts_with("textarea")) {
            let text = tag.split_once('>').unwrap().1.to_owned();
            fields.insert(attribute(tag, "name").unwrap(), text);
        }
        fields
    }

    /// Sends a form as it stands, with some fields changed.
    pub async fn send(&self, path: &str, form: &BTreeMap<String, String>, changes: &[(&str, &str)]) -> Response {
        let mut fields: BTreeMap<&str, &str> =
            form.iter().map(|(name, value)| (name.as_str(), value.as_str())).collect();
        fields.extend(changes.iter().copied());
        self.post(path, &fields.into_iter().collect::<Vec<_>>()).await
    }

    /// Sends a form as it stands from a page, as its `Referer` says.
    pub async fn send_from(&self, page: &str, path: &str, form: &BTreeMap<String, String>) -> Response {
        let request = self.client.post(format!("{}{path}", self.address)).header("origin", &self.address);
        let request = request.header("referer", format!("{}{page}", self.address));
        request.header("sec-fetch-site", "same-origin").form(form).send().await.unwrap()
    }

    /// Makes a sheet of a job and a link to it; the path of the link.
    pub async fn offer(&self, job: i64) -> String {
        let price = format!("/job/{job}/price");
        let made = self.send(&price, &self.form(&price, &price).await, &[("act", "make")]).await;
        assert_eq!(made.status(), StatusCode::SEE_OTHER, "{}", made.text().await.unwrap());
        self.link(job).await
    }

    /// Makes a link to the newest sheet of a job; its path.
    pub async fn link(&self, job: i64) -> String {
        let send = format!("/job/{job}/send");
        let made = self.send(&send, &self.form(&send, &send).await, &[]).await;
        let shown = self.page(made.headers()["location"].to_str().unwrap().split('#').next().unwrap()).await;
        let address = shown.split("readonly value=\"").nth(1).unwrap().split('"').next().unwrap();
        address.strip_prefix(PUBLIC).unwrap_or_else(|| panic!("{address}")).to_owned()
    }
}

fn attribute(tag: &str, name: &str) -> Option<String> {
    let value = tag.split(&format!(" {name}=\"")).nth(1)?.split('"').next()?;
    Some(value.replace("&#39;", "'").replace("&#34;", "\"").replace("&#38;", "&"))
}
