//! The command line: arguments and environment in, exit code out.

mod add_person;
mod backup;
mod serve;
mod size;

use std::process::ExitCode;

use clap::{Parser, Subcommand};

const EXAMPLES: &str = "\
Examples:
  keeplit serve --demo --data demo-data        look at a made-up firm
  keeplit serve --data /srv/keeplit            start the service
  keeplit size survey.json > design.json       answer a survey file
  keeplit backup copy.db --data /srv/keeplit   copy the data file";

/// Designs, prices and keeps the jobs of people who fit backup power.
#[derive(Debug, Parser)]
#[command(name = "keeplit", version, before_help = EXAMPLES)]
struct Arguments {
    #[command(subcommand)]
    command: Command,
}

#[derive(Debug, Subcommand)]
enum Command {
    /// Answer a survey file with the design, as JSON
    Size(size::Arguments),
    /// Start the service
    Serve(serve::Arguments),
    /// Write a consistent copy of the data file
    Backup(backup::BackupArguments),
    /// Put a copy back, while the service is stopped
    Restore(backup::RestoreArguments),
    /// Verify the data file and every quote's hash
    Check(backup::CheckArguments),
    /// Let another person sign in
    AddPerson(add_person::Arguments),
}

/// Runs the command that the arguments name.
///
/// Exit code 0 when done, 2 for a fault in what was given, 1 for anything else.
pub fn run() -> ExitCode {
    let done = match Arguments::parse().command {
        Command::Size(arguments) => size::run(&arguments),
        Command::Serve(arguments) => serve::run(arguments),
        Command::Backup(arguments) => backup::back_up(&arguments),
        Command::Restore(arguments) => backup::restore(&arguments),
        Command::Check(arguments) => backup::check(&arguments),
        Command::AddPerson(arguments) => add_person::run(&arguments),
    };
    done.unwrap_or_else(|error| {
        eprintln!("keeplit: {error:#}");
        ExitCode::from(1)
    })
}
