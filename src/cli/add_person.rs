//! `keeplit add-person`: people without the web.

use std::io::Read;
use std::path::{Path, PathBuf};
use std::process::ExitCode;

use anyhow::{Context, bail, ensure};

use crate::accounts::{NewPerson, Profile};
use crate::passwords;
use crate::store::{Error, Store};
use crate::web::Clock;

/// What `add-person` is told. The password is never an argument, where others could read it.
#[derive(Debug, clap::Args)]
pub struct Arguments {
    /// Name of the firm
    #[arg(long)]
    firm: String,
    /// Make the firm if it is not there
    #[arg(long)]
    new_firm: bool,
    /// Name of the person
    #[arg(long)]
    name: String,
    /// E-mail that they sign in with
    #[arg(long)]
    email: String,
    /// File with the password; without it, standard input is read
    #[arg(long)]
    password_file: Option<PathBuf>,
    /// Folder of the data file
    #[arg(long, env = "KEEPLIT_DATA", default_value = "keeplit-data")]
    data: PathBuf,
}

/// Adds a person to a firm, while the service is stopped.
pub fn run(arguments: &Arguments) -> anyhow::Result<ExitCode> {
    let password = password(arguments.password_file.as_deref())?;
    if let Some(complaint) = passwords::complaint(&password) {
        bail!("password: {complaint}");
    }
    ensure!(!arguments.name.trim().is_empty(), "name: give a name");
    ensure!(crate::accounts::is_email(&arguments.email), "e-mail: give an e-mail address, such as ana@example.org");
    let mut salt = [0; 16];
    getrandom::fill(&mut salt).map_err(|error| anyhow::anyhow!("no random numbers: {error}"))?;
    let password_hash = passwords::hash(&password, salt).map_err(|error| anyhow::anyhow!("{error}"))?;
    let (name, email) = (arguments.name.trim().to_owned(), arguments.email.trim().to_owned());
    tokio::runtime::Runtime::new()?.block_on(add(arguments, NewPerson { name, email, password_hash }))?;
    println!("Added. {} can sign in for {}.", arguments.email.trim(), arguments.firm.trim());
    Ok(ExitCode::SUCCESS)
}

/// The password without the end of its line.
fn password(file: Option<&Path>) -> anyhow::Result<String> {
    const MOST: u64 = 4096;
    let mut text = String::new();
    match file {
        Some(path) => {
            let file = std::fs::File::open(path).with_context(|| format!("cannot open {}", path.display()))?;
            file.take(MOST).read_to_string(&mut text)
        }
        None => std::io::stdin().lock().take(MOST).read_to_string(&mut text),
    }
    .context("cannot read the password")?;
    Ok(text.trim_end_matches(['\r', '\n']).to_owned())
}

async fn add(arguments: &Arguments, person: NewPerson) -> anyhow::Result<()> {
    let store = Store::open(&arguments.data).await?;
    let now = Clock::system().now();
    let name = arguments.firm.trim().to_owned();
    let firm = match store.firm_named(&name).await {
        Err(Error::NotFound) if arguments.new_firm => {
            store.add_firm(Profile { name, ..Profile::default() }, false, now).await?
        }
        Err(Error::NotFound) => bail!("there is no firm {name}: give --new-firm to make it"),
        found => found?,
    };
    match store.add_person(firm, person, now).await {
        Err(Error::Taken) => bail!("someone signs in with this e-mail already"),
        added => added.map(|_| ())?,
    }
    store.close().await;
    Ok(())
}
