//! Stylesheet, script and icon: embedded, addressed by their checksum, kept for good.

use std::sync::LazyLock;

use axum::extract::Path;
use axum::http::header::{CACHE_CONTROL, CONTENT_TYPE};
use axum::response::{IntoResponse, Response};
use include_dir::{Dir, include_dir};
use sha2::{Digest, Sha256};

use super::error::Error;

static FILES: Dir = include_dir!("$CARGO_MANIFEST_DIR/static");

/// One embedded file.
struct Asset {
    name: &'static str,
    address: String,
    kind: &'static str,
    content: &'static [u8],
}

static ASSETS: LazyLock<Vec<Asset>> = LazyLock::new(|| FILES.files().filter_map(asset_of).collect());

fn asset_of(file: &'static include_dir::File<'static>) -> Option<Asset> {
    let name = file.path().to_str()?;
    let (stem, ending) = name.rsplit_once('.')?;
    let kind = match ending {
        "css" => "text/css; charset=utf-8",
        "js" => "text/javascript; charset=utf-8",
        "svg" => "image/svg+xml",
        _ => "application/octet-stream",
    };
    let sum = data_encoding::HEXLOWER.encode(&Sha256::digest(file.contents())[..6]);
    Some(Asset { name, address: format!("{stem}-{sum}.{ending}"), kind, content: file.contents() })
}

/// The name of a file with its checksum; the plain name for a file that is not there.
pub fn address_of(name: &str) -> &str {
    ASSETS.iter().find(|asset| asset.name == name).map_or(name, |asset| asset.address.as_str())
}

/// An embedded file, by its name with the checksum of today.
pub async fn asset(Path(name): Path<String>) -> Result<Response, Error> {
    let asset = ASSETS.iter().find(|asset| asset.address == name).ok_or(Error::NotFound)?;
    let headers = [(CONTENT_TYPE, asset.kind), (CACHE_CONTROL, "public, max-age=31536000, immutable")];
    Ok((headers, asset.content).into_response())
}

/// Nothing here is for search engines.
pub async fn robots() -> &'static str {
    "User-agent: *\nDisallow: /\n"
}
