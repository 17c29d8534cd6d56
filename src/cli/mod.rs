//! The command line: arguments and environment in, exit code out.

mod serve;
mod size;

use std::process::ExitCode;

use clap::{Parser, Subcommand};

const EXAMPLES: &str = "\
Examples:
  keeplit size survey.json > design.json";

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
}

/// Runs the command that the arguments name.
///
/// Exit code 0 when done, 2 for a fault in what was given, 1 for anything else.
pub fn run() -> ExitCode {
    let done = match Arguments::parse().command {
        Command::Size(arguments) => size::run(&arguments),
        Command::Serve(arguments) => serve::run(arguments),
    };
    done.unwrap_or_else(|error| {
        eprintln!("keeplit: {error:#}");
        ExitCode::from(1)
    })
}
