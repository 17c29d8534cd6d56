//! A service with a port and a data folder of its own, and the people who come to it.
//!
//! Ana and Ben are installers of two firms; a stranger has no account.

use std::net::SocketAddr;
use std::sync::LazyLock;
use std::sync::atomic::{AtomicI64, AtomicU64, Ordering};
use std::time::Duration;

use keeplit::accounts::{FirmId, NewPerson, Profile};
use keeplit::keys::OneTimeKey;
use keeplit::store::Store;
use keeplit::web::{self, App, Clock, Config};
use reqwest::redirect::Policy;
use reqwest::{Client, RequestBuilder, Response};
use tokio::sync::oneshot;

/// The moment at which the tests begin: 15 January 2027, 08:00 UTC.
pub const NOW: i64 = 1_800_000_000;
/// Everyone's password.
pub const PASSWORD: &str = "a roof in the rain";

static HASH: LazyLock<String> = LazyLock::new(|| keeplit::passwords::hash(PASSWORD, [3; 16]).unwrap());

/// A running service.
pub struct Service {
    pub app: App,
    pub listens_on: SocketAddr,
    clock: &'static AtomicI64,
    stop: Option<oneshot::Sender<()>>,
    ended: Option<tokio::task::JoinHandle<()>>,
    _folder: tempfile::TempDir,
}

impl Service {
    /// With Ana's firm and Ben's.
    pub async fn start() -> Self {
        let service = Self::empty(Config::default()).await;
        for (name, firm) in [("ana", "Ana's firm"), ("ben", "Ben's firm")] {
            let profile = Profile { name: firm.to_owned(), ..Profile::default() };
            let firm = service.app.store.add_firm(profile, false, NOW).await.unwrap();
            service.add_person(firm, name).await;
        }
        service
    }

    /// With nobody in it.
    pub async fn empty(config: Config) -> Self {
        let folder = tempfile::tempdir().unwrap();
        let store = Store::open(folder.path()).await.unwrap();
        let clock: &'static AtomicI64 = Box::leak(Box::new(AtomicI64::new(NOW)));
        let app = App::new(store, Clock::new(|| clock.load(Ordering::Relaxed)), config).unwrap();
        let listener = tokio::net::TcpListener::bind("127.0.0.1:0").await.unwrap();
        let listens_on = listener.local_addr().unwrap();
        let (stop, stopped) = oneshot::channel::<()>();
        let router = web::router(app.clone());
        let ended = tokio::spawn(web::accept::serve(listener, router, async {
            let _ = stopped.await;
        }));
        Self { app, listens_on, clock, stop: Some(stop), ended: Some(ended), _folder: folder }
    }

    pub async fn add_person(&self, firm: FirmId, name: &str) {
        let email = format!("{name}@example.org");
        let person = NewPerson { name: name.to_owned(), email, password_hash: HASH.clone() };
        self.app.store.add_person(firm, person, NOW).await.unwrap();
    }

    /// Someone with a browser and no account.
    pub fn stranger(&self) -> Visitor {
        let client = Client::builder().cookie_store(true).redirect(Policy::none()).build().unwrap();
        Visitor { client, home: format!("http://{}", self.listens_on) }
    }

    pub async fn ana(&self) -> Visitor {
        self.signed_in("ana").await
    }

    pub async fn ben(&self) -> Visitor {
        self.signed_in("ben").await
    }

    /// Signs in; comes again while someone else's password is being checked, as a person would.
    pub async fn signed_in(&self, name: &str) -> Visitor {
        let visitor = self.stranger();
        let email = format!("{name}@example.org");
        for _ in 0..200 {
            let answer = visitor.post("/in", &[("email", &email), ("password", PASSWORD)]).await;
            match answer.status().as_u16() {
                303 => return visitor,
                429 => tokio::time::sleep(Duration::from_millis(20)).await,
                other => panic!("{name} could not sign in: {other}"),
            }
        }
        panic!("{name} was turned away too often");
    }

    pub fn seconds_pass(&self, seconds: i64) {
        self.clock.fetch_add(seconds, Ordering::Relaxed);
    }

    /// Tells the service to stop, and waits until it has.
    pub async fn stop(&mut self) {
        let _ = self.stop.take().unwrap().send(());
        self.ended.take().unwrap().await.unwrap();
    }
}

/// Someone with a browser: it keeps cookies and says where a form comes from.
#[derive(Clone)]
pub struct Visitor {
    pub client: Client,
    pub home: String,
}

impl Visitor {
    pub async fn get(&self, path: &str) -> Response {
        self.client.get(self.url(path)).send().await.unwrap()
    }

    /// The text of a page that is there.
    pub async fn page(&self, path: &str) -> String {
        let answer = self.get(path).await;
        assert_eq!(answer.status(), 200, "{path}");
        answer.text().await.unwrap()
    }

    pub async fn post(&self, path: &str, fields: &[(&str, &str)]) -> Response {
        self.form(path, fields).header("origin", &self.home).send().await.unwrap()
    }

    /// A form that does not say where it comes from.
    pub fn form(&self, path: &str, fields: &[(&str, &str)]) -> RequestBuilder {
        self.client.post(self.url(path)).form(fields)
    }

    /// Starts a job and gives the address below which its pages lie.
    pub async fn start_job(&self) -> String {
        let answer = self.post("/job/new", &[("key", &key())]).await;
        assert_eq!(answer.status(), 303);
        goes_to(&answer).strip_suffix("/site").unwrap().to_owned()
    }

    fn url(&self, path: &str) -> String {
        format!("{}{path}", self.home)
    }
}

/// Where an answer sends the browser.
pub fn goes_to(answer: &Response) -> String {
    answer.headers().get("location").map_or("", |address| address.to_str().unwrap()).to_owned()
}

/// A key that no form has carried before.
pub fn key() -> String {
    static NEXT: AtomicU64 = AtomicU64::new(1);
    let mut bits = [0; 16];
    bits[..8].copy_from_slice(&NEXT.fetch_add(1, Ordering::Relaxed).to_le_bytes());
    OneTimeKey::from_random(bits).to_string()
}

/// The value of a field on a page, as the browser would send it back.
pub fn value_of(page: &str, field: &str) -> String {
    let tag = page.split('<').find(|tag| tag.starts_with("input") && tag.contains(&format!("name=\"{field}\"")));
    let tag = tag.unwrap_or_else(|| panic!("no field {field} on {page}"));
    let value = tag.split("value=\"").nth(1).and_then(|rest| rest.split('"').next()).unwrap_or("");
    value.replace("&#34;", "\"").replace("&#38;", "&").replace("&#60;", "<").replace("&#62;", ">").replace("&#39;", "'")
}
