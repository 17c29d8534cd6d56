//! The back room: people, copies, version, address.

use std::path::{Path, PathBuf};

use askama::Template;
use axum::extract::State;
use axum::response::Response;

use super::app::App;
use super::book::{KeyForm, day_and_time};
use super::error::Error;
use super::forms::{Form, on_to, page, submit};
use super::frame::Frame;
use super::session::Installer;
use crate::accounts::Person;

#[derive(Template)]
#[template(path = "accounts/back.html")]
struct BackPage {
    frame: Frame,
    people: Vec<Person>,
    copies: Vec<Copy>,
    version: &'static str,
    public_address: Option<String>,
    faults: Vec<String>,
}

impl BackPage {
    /// Whether a customer's phone could not open a link with this address.
    fn is_for_this_machine_only(&self) -> bool {
        let host = self.public_address.as_deref().and_then(|address| address.split("://").nth(1));
        host.is_none_or(|host| ["127.", "localhost", "[::1]", "0.0.0.0"].iter().any(|own| host.starts_with(own)))
    }
}

/// A copy of the data file.
struct Copy {
    name: String,
    size: String,
}

/// The back room.
pub async fn show(State(app): State<App>, installer: Installer) -> Result<Response, Error> {
    page(&BackPage {
        frame: Frame::of(&app, &installer, "Back room")?,
        people: app.store.people(installer.firm.id).await?,
        copies: copies(&folder(&app)).await,
        version: env!("CARGO_PKG_VERSION"),
        public_address: app.config.public_address.clone(),
        faults: app.store.check().await?.faults,
    })
}

/// Writes a copy of the data file beside it.
pub async fn back_up(
    State(app): State<App>,
    installer: Installer,
    Form(form): Form<KeyForm>,
) -> Result<Response, Error> {
    let once = submit(&app, form.key())?;
    let folder = folder(&app);
    tokio::fs::create_dir_all(&folder).await.map_err(|error| Error::Internal(error.into()))?;
    let stamp = day_and_time(once.now, &installer.firm.profile.time_zone).replace([' ', ','], "-").replace(':', "");
    let file = folder.join(format!("keeplit-{}-{stamp}.db", once.now));
    if !file.exists() {
        app.store.backup(&file).await?;
    }
    Ok(on_to(&app.paths().back()))
}

fn folder(app: &App) -> PathBuf {
    app.store.folder().join("backups")
}

/// The copies in a folder, newest first; none where there is no folder.
async fn copies(folder: &Path) -> Vec<Copy> {
    let mut copies = Vec::new();
    let Ok(mut entries) = tokio::fs::read_dir(folder).await else { return copies };
    while let Ok(Some(entry)) = entries.next_entry().await {
        let name = entry.file_name().to_string_lossy().into_owned();
        let bytes = entry.metadata().await.map_or(0, |data| data.len());
        if name.ends_with(".db") {
            copies.push(Copy { name, size: format!("{}\u{a0}kB", bytes.div_ceil(1000)) });
        }
    }
    copies.sort_by(|a, b| b.name.cmp(&a.name));
    copies
}
