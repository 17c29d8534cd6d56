//! `keeplit size`: a survey file to a design.

use std::io::{ErrorKind, Read, Write};
use std::path::{Path, PathBuf};
use std::process::ExitCode;

use anyhow::Context;

use crate::documents::{Fault, design, limits, survey};
use crate::simulation::{self, year};

const EXAMPLES: &str = "\
Examples:
  keeplit size survey.json > design.json
  keeplit size - < survey.json

A wrong file gets one line for each fault on standard error, and exit code 2.";

/// Seed of the years' chance: the same survey gets the same answer.
const SEED: u64 = 1;

/// What `size` is told.
#[derive(Debug, clap::Args)]
#[command(before_help = EXAMPLES)]
pub struct Arguments {
    /// The survey, in the form keeplit-survey-1; - reads it from standard input
    survey: PathBuf,
}

/// Writes the design to standard output; with faults, one line each to standard error and exit code 2.
pub fn run(arguments: &Arguments) -> anyhow::Result<ExitCode> {
    let answer = text_of(&arguments.survey)?.map_err(|fault| vec![fault]).and_then(|text| survey::read(&text));
    match answer {
        Ok((draft, survey)) => {
            let design = simulation::design(&survey, draft.assumptions(&[]));
            let design = simulation::with_detail(&survey, design);
            let design = simulation::with_years(&survey, design, year::enough(&survey), SEED);
            say(&serde_json::to_string_pretty(&design::write(&design, &draft))?)?;
            Ok(ExitCode::SUCCESS)
        }
        Err(faults) => {
            for fault in faults {
                eprintln!("{fault}");
            }
            Ok(ExitCode::from(2))
        }
    }
}

/// Writes a text to standard output in one go; a reader that has seen enough may close it.
fn say(text: &str) -> anyhow::Result<()> {
    match std::io::stdout().lock().write_all(format!("{text}\n").as_bytes()) {
        Err(error) if error.kind() != ErrorKind::BrokenPipe => Err(error).context("cannot write the design"),
        _ => Ok(()),
    }
}

/// The text of a file, or the fault that it is none; a file that cannot be opened is an error.
fn text_of(path: &Path) -> anyhow::Result<Result<String, Fault>> {
    let mut bytes = Vec::new();
    let most = limits::FILE_BYTES as u64 + 1;
    if path == Path::new("-") {
        std::io::stdin().lock().take(most).read_to_end(&mut bytes)
    } else {
        let file = std::fs::File::open(path).with_context(|| format!("cannot open {}", path.display()))?;
        file.take(most).read_to_end(&mut bytes)
    }
    .with_context(|| format!("cannot read {}", path.display()))?;
    Ok(String::from_utf8(bytes).map_err(|_| Fault::new("", "this is not text in UTF-8")))
}
