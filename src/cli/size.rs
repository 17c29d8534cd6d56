//! `keeplit size`: a survey file to a design.

use std::io::{Read, Write};
use std::path::{Path, PathBuf};
use std::process::ExitCode;

use anyhow::Context;

use crate::documents::{Fault, design, limits, survey};
use crate::sizing;

/// What `size` is told.
#[derive(Debug, clap::Args)]
pub struct Arguments {
    /// The survey, in the form keeplit-survey-1; - reads it from standard input
    survey: PathBuf,
}

/// Writes the design to standard output; with faults, one line each to standard error and exit code 2.
pub fn run(arguments: &Arguments) -> anyhow::Result<ExitCode> {
    let answer = text_of(&arguments.survey)?.map_err(|fault| vec![fault]).and_then(|text| survey::read(&text));
    match answer {
        Ok((draft, survey)) => {
            let design = sizing::size(&survey, draft.assumptions(&[]));
            let mut out = std::io::stdout().lock();
            serde_json::to_writer_pretty(&mut out, &design::write(&design, &draft))?;
            writeln!(out)?;
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
