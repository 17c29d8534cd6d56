//! `keeplit serve`: the service, from opening the store to the orderly end.

use std::net::{IpAddr, SocketAddr};
use std::path::PathBuf;
use std::process::ExitCode;

use anyhow::Context;
use tokio::net::TcpListener;

use crate::demo;
use crate::store::Store;
use crate::web::{self, App, Clock, Config};

/// What `serve` is told; each flag has an environment variable.
#[derive(Debug, clap::Args)]
pub struct Arguments {
    /// Fill an empty data folder with a made-up firm to look at
    #[arg(long)]
    demo: bool,
    /// Address and port to listen on
    #[arg(long, env = "KEEPLIT_LISTEN", default_value = "127.0.0.1:8080")]
    listen: SocketAddr,
    /// Folder of the data file
    #[arg(long, env = "KEEPLIT_DATA", default_value = "keeplit-data")]
    data: PathBuf,
    /// Address that customers' links and QR codes show, with its scheme and base path
    #[arg(long, value_name = "URL", env = "KEEPLIT_PUBLIC_ADDRESS", value_parser = public_address)]
    public_address: Option<String>,
    /// Address of a proxy whose word on the caller's address is taken; may be given several times
    #[arg(long, env = "KEEPLIT_TRUSTED_PROXY", value_delimiter = ',')]
    trusted_proxy: Vec<IpAddr>,
}

fn public_address(text: &str) -> Result<String, String> {
    let rest = text.strip_prefix("https://").or_else(|| text.strip_prefix("http://"));
    match rest {
        Some(rest) if !rest.is_empty() && !rest.contains(['?', '#', ' ', '"', '<']) => {
            Ok(text.trim_end_matches('/').to_owned())
        }
        _ => Err("give an address that begins with http:// or https://, without ? and #".to_owned()),
    }
}

/// Serves until it is told to stop.
pub fn run(arguments: Arguments) -> anyhow::Result<ExitCode> {
    tracing_subscriber::fmt().json().with_writer(std::io::stderr).with_max_level(tracing::Level::INFO).init();
    let runtime = tokio::runtime::Runtime::new()?;
    runtime.block_on(serve(arguments))?;
    Ok(ExitCode::SUCCESS)
}

async fn serve(arguments: Arguments) -> anyhow::Result<()> {
    let Arguments { demo, listen, data, public_address, trusted_proxy } = arguments;
    let store = Store::open(&data).await?;
    let listener = TcpListener::bind(listen).await.with_context(|| format!("cannot listen on {listen}"))?;
    let address = format!("http://{}", listener.local_addr()?);
    if public_address.is_none() {
        println!("No public address is set: customers' links will show {address}. Set it with --public-address.");
    }
    let config = Config { public_address: public_address.or(Some(address.clone())), trusted_proxies: trusted_proxy };
    let app = App::new(store.clone(), Clock::system(), config)?;
    store.empty_bin(app.clock.now()).await?;
    greet(&app, demo, &address).await?;
    println!("Ready on {address}{}/", app.config.base());
    web::accept::serve(listener, web::router(app), stopped()).await;
    store.close().await;
    Ok(())
}

/// Tells how to get in: the demo's password, or the set-up code of the first day.
async fn greet(app: &App, demo: bool, address: &str) -> anyhow::Result<()> {
    let empty = app.store.is_first_day().await?;
    if empty {
        if demo {
            return made_up(app).await;
        }
        let code = app.open_first_day()?;
        println!(
            "Nobody has an account yet. Open {address}{}/begin and enter this set-up code: {code}",
            app.config.base()
        );
    } else if demo {
        println!("There is a firm in this folder already: nothing made up was added.");
    }
    Ok(())
}

/// Fills the empty folder with a made-up firm; its password is drawn now and stored nowhere.
async fn made_up(app: &App) -> anyhow::Result<()> {
    let password = web::random_text::<10>()?;
    let mut salt = [0; 16];
    getrandom::fill(&mut salt)?;
    demo::fill(&app.store, app.clock.now(), &password, salt, app.secret).await?;
    println!("Filled with a made-up firm. Sign in as {} with the password {password}", demo::EMAIL);
    Ok(())
}

/// Done when the program is told to stop.
async fn stopped() {
    let interrupted = tokio::signal::ctrl_c();
    #[cfg(unix)]
    {
        let terminated = tokio::signal::unix::signal(tokio::signal::unix::SignalKind::terminate());
        if let Ok(mut terminated) = terminated {
            tokio::select! { _ = interrupted => {}, _ = terminated.recv() => {} }
            return;
        }
    }
    let _ = interrupted.await;
}
