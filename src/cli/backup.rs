//! `keeplit backup`, `restore` and `check`: the data file, copied, put back, looked at.

use std::path::{Path, PathBuf};
use std::process::ExitCode;

use crate::store::{self, Report, Store, backup};

/// What `backup` is told.
#[derive(Debug, clap::Args)]
pub struct BackupArguments {
    /// The file to write; it appears only once it is whole and was checked
    file: PathBuf,
    /// Folder of the data file
    #[arg(long, env = "KEEPLIT_DATA", default_value = "keeplit-data")]
    data: PathBuf,
}

/// What `restore` is told.
#[derive(Debug, clap::Args)]
pub struct RestoreArguments {
    /// The copy to put back; the service must be stopped
    file: PathBuf,
    /// Folder of the data file
    #[arg(long, env = "KEEPLIT_DATA", default_value = "keeplit-data")]
    data: PathBuf,
}

/// What `check` is told.
#[derive(Debug, clap::Args)]
pub struct CheckArguments {
    /// Folder of the data file
    #[arg(long, env = "KEEPLIT_DATA", default_value = "keeplit-data")]
    data: PathBuf,
}

/// Copies the data file, whether the service runs or not.
pub fn back_up(arguments: &BackupArguments) -> anyhow::Result<ExitCode> {
    let report = wait(backup::backup(&arguments.data.join(store::FILE), &arguments.file))?;
    Ok(told(&report, &format!("Copied to {}", arguments.file.display())))
}

/// Puts a copy back.
pub fn restore(arguments: &RestoreArguments) -> anyhow::Result<ExitCode> {
    let (report, kept) = wait(backup::restore(&arguments.file, &arguments.data))?;
    let kept = kept.map_or_else(String::new, |kept| format!("; the file before it is kept as {}", kept.display()));
    Ok(told(&report, &format!("Restored from {}{kept}", arguments.file.display())))
}

/// Looks at the data file, while the service is stopped.
pub fn check(arguments: &CheckArguments) -> anyhow::Result<ExitCode> {
    let report = wait(look(&arguments.data))?;
    Ok(told(&report, "Sound"))
}

async fn look(data: &Path) -> store::Result<Report> {
    let store = Store::open(data).await?;
    let report = store.check().await;
    store.close().await;
    report
}

fn wait<T>(work: impl Future<Output = store::Result<T>>) -> anyhow::Result<T> {
    Ok(tokio::runtime::Runtime::new()?.block_on(work)?)
}

/// What was counted, or what is wrong.
fn told(report: &Report, done: &str) -> ExitCode {
    if report.faults.is_empty() {
        println!("{done}. {} jobs, {} frozen sheets.", report.jobs, report.versions);
        return ExitCode::SUCCESS;
    }
    for fault in &report.faults {
        eprintln!("{fault}");
    }
    ExitCode::from(1)
}
