//! Every message has its use, and every use its message.

use std::collections::BTreeSet;
use std::fs;
use std::path::Path;

use keeplit::translations::Words;

/// The text of all files below a folder.
fn text_below(folder: &Path) -> String {
    let entries = fs::read_dir(folder).unwrap().map(|entry| entry.unwrap().path());
    let text =
        |path: std::path::PathBuf| if path.is_dir() { text_below(&path) } else { fs::read_to_string(path).unwrap() };
    entries.map(text).collect()
}

fn spoken() -> String {
    ["src/offer", "src/web", "templates/quotes"].map(|folder| text_below(Path::new(folder))).concat()
}

#[test]
fn no_message_is_left_over() {
    let table = fs::read_to_string("templates/messages/en.ftl").unwrap();
    let spoken = spoken() + &fs::read_to_string("src/translations.rs").unwrap();
    let names = table.lines().filter(|line| !line.starts_with([' ', '#'])).filter_map(|line| line.split_once(" ="));
    let left: Vec<&str> = names
        .map(|(name, _)| name)
        .filter(|name| !name.starts_with("month-") && !spoken.contains(&format!("\"{name}\"")))
        .collect();
    assert!(left.is_empty(), "{left:?}");
}

#[test]
fn no_page_asks_for_a_message_that_is_not_there() {
    let spoken = spoken();
    let asked = ["say(\"", "fill(\""].iter().flat_map(|call| spoken.split(call).skip(1));
    let names: BTreeSet<&str> = asked.map(|rest| rest.split('"').next().unwrap()).collect();
    assert!(names.len() > 60, "{names:?}");
    let unknown: Vec<_> = names.into_iter().filter(|name| !Words::of("en").knows(name)).collect();
    assert!(unknown.is_empty(), "{unknown:?}");
}
