//! Holds the layers to the map in DEVELOPERS.md: who may know whom.

use std::fs;
use std::path::{Path, PathBuf};

/// Every Rust file below a path, or the file itself.
fn rust_files(path: &Path) -> Vec<PathBuf> {
    if path.is_file() {
        return vec![path.to_owned()];
    }
    let entries = fs::read_dir(path).unwrap_or_else(|error| panic!("{}: {error}", path.display()));
    let mut files: Vec<PathBuf> = entries
        .flat_map(|entry| rust_files(&entry.unwrap().path()))
        .filter(|file| file.extension().is_some_and(|e| e == "rs"))
        .collect();
    files.sort();
    files
}

/// The lines of a file that are code, not comments.
fn code(file: &Path) -> String {
    let text = fs::read_to_string(file).unwrap();
    text.lines().filter(|line| !line.trim_start().starts_with("//")).collect::<Vec<_>>().join("\n")
}

/// Fails when a file below one of `rooms` speaks of one of `words`.
fn assert_silent(rooms: &[&str], words: &[&str]) {
    for room in rooms {
        let files = rust_files(&Path::new("src").join(room));
        assert!(!files.is_empty(), "no file below src/{room}");
        for file in files {
            let code = code(&file);
            for word in words {
                assert!(!code.contains(word), "{} speaks of `{word}`", file.display());
            }
        }
    }
}

const ENGINE: &[&str] = &["units.rs", "sizing", "simulation"];
const RECORDS: &[&str] = &["accounts.rs", "jobs.rs", "quotes.rs", "money.rs"];
const TEXT: &[&str] = &["wording", "reading", "drawing"];
const WORLD: &[&str] = &[
    "axum",
    "sqlx",
    "tokio",
    "std::fs",
    "std::net",
    "std::env",
    "SystemTime",
    "Instant::now",
    "Timestamp::now",
    "getrandom",
];

#[test]
fn the_pure_part_never_meets_web_database_disk_clock_or_chance() {
    for rooms in [ENGINE, &["documents"], RECORDS, TEXT] {
        assert_silent(rooms, WORLD);
    }
    for rooms in [ENGINE, &["documents"], RECORDS] {
        assert_silent(rooms, &["askama"]);
    }
}

#[test]
fn the_engine_knows_nothing_of_what_is_built_on_it() {
    assert_silent(
        ENGINE,
        &[
            "crate::documents",
            "crate::wording",
            "crate::reading",
            "crate::jobs",
            "crate::quotes",
            "crate::accounts",
            "crate::store",
            "crate::web",
            "crate::cli",
        ],
    );
}

#[test]
fn the_formulas_know_nothing_of_the_simulation() {
    assert_silent(&["units.rs", "sizing"], &["crate::simulation::", "use crate::simulation"]);
}

#[test]
fn documents_and_records_know_neither_store_nor_pages() {
    assert_silent(
        &["documents"],
        &["crate::jobs", "crate::quotes", "crate::accounts", "crate::store", "crate::web", "crate::cli"],
    );
    assert_silent(RECORDS, &["crate::store", "crate::web", "crate::cli"]);
}

#[test]
fn the_store_knows_no_pages_and_only_the_store_speaks_sql() {
    assert_silent(&["store"], &["crate::web", "crate::cli", "axum", "askama"]);
    assert_silent(&["web", "cli", "main.rs"], &["sqlx"]);
}

#[test]
fn only_the_command_line_reads_the_environment() {
    assert_silent(&["web", "store"], &["std::env", "clap"]);
    assert_silent(&["cli", "main.rs"], &["axum::", "askama"]);
}
