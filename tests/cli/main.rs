//! `keeplit size` as a person runs it: what goes in, what comes out, and with which exit code.

mod answers;
mod faults;

use std::io::Write;
use std::path::PathBuf;
use std::process::{Command, Output, Stdio};

/// The example that stands in the program's own description of the form.
const EXAMPLE: &str = include_str!("corner_shop.json");

/// Runs `keeplit size -` on a text.
fn size(text: impl AsRef<[u8]>) -> Output {
    let mut child = keeplit(&["size", "-"]).stdin(Stdio::piped()).spawn().expect("the program starts");
    let mut input = child.stdin.take().expect("a pipe");
    // The program may stop reading at its limit, which closes the pipe.
    let _ = input.write_all(text.as_ref());
    drop(input);
    child.wait_with_output().expect("the program ends")
}

fn keeplit(arguments: &[&str]) -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_keeplit"));
    command.args(arguments).stdout(Stdio::piped()).stderr(Stdio::piped());
    command
}

/// A file of this name in the tests' own folder.
fn file(name: &str, text: impl AsRef<[u8]>) -> PathBuf {
    let path = PathBuf::from(env!("CARGO_TARGET_TMPDIR")).join(name);
    std::fs::write(&path, text).expect("the folder can be written to");
    path
}
