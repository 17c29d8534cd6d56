//! The words a customer reads, from one message table per language.
//!
//! The tables lie in `templates/messages/` and are embedded in the program. Headings and short lines
//! are taken from them when a page is shown; what a customer agrees to is made once, when the sheet is
//! made, and kept with it.

use std::sync::LazyLock;

use fluent_bundle::concurrent::FluentBundle;
use fluent_bundle::{FluentArgs, FluentResource};
use jiff::ZonedDateTime;
use jiff::civil::Date;
use unic_langid::LanguageIdentifier;

pub use fluent_bundle::FluentValue;

/// Language and message table; the first one speaks when a language is not known.
const TABLES: [(&str, &str); 1] = [("en", include_str!("../templates/messages/en.ftl"))];

static WORDS: LazyLock<Vec<Words>> =
    LazyLock::new(|| TABLES.iter().map(|(language, table)| Words::read(language, table)).collect());

/// The message table of one language.
pub struct Words {
    language: &'static str,
    bundle: FluentBundle<FluentResource>,
}

impl Words {
    /// The words of a language; the first table's if there is none for it.
    pub fn of(language: &str) -> &'static Self {
        WORDS.iter().find(|words| words.language == language).unwrap_or(&WORDS[0])
    }

    fn read(language: &'static str, table: &str) -> Self {
        let id: LanguageIdentifier = language.parse().unwrap_or_default();
        let mut bundle = FluentBundle::new_concurrent(vec![id]);
        // Names are set apart by the templates' <bdi>; marks inside the text would end up in copies of it.
        bundle.set_use_isolating(false);
        let resource = match FluentResource::try_new(table.to_owned()) {
            Ok(resource) => resource,
            Err((readable, _)) => readable,
        };
        bundle.add_resource_overriding(resource);
        Self { language, bundle }
    }

    /// The language, as `<html lang>` wants it.
    pub fn language(&self) -> &'static str {
        self.language
    }

    /// Whether the table has a message of this name.
    pub fn knows(&self, name: &str) -> bool {
        self.bundle.has_message(name)
    }

    /// A message without values.
    pub fn say(&self, name: &str) -> String {
        self.fill(name, &[])
    }

    /// A message with values; a name that no table has is printed as it is, so that it is seen.
    pub fn fill<'a>(&self, name: &str, values: &[(&'a str, FluentValue<'a>)]) -> String {
        let Some(pattern) = self.bundle.get_message(name).and_then(|message| message.value()) else {
            return name.to_owned();
        };
        let arguments: FluentArgs = values.iter().cloned().collect();
        self.bundle.format_pattern(pattern, Some(&arguments), &mut Vec::new()).into_owned()
    }

    /// A length of time in whole hours and minutes: "6 hours 30 minutes".
    pub fn duration(&self, hours: f64) -> String {
        let minutes = (hours * 60.0).round().max(0.0) as u32;
        let part = |name, count: u32| self.fill(name, &[("count", count.into())]);
        match (minutes / 60, minutes % 60) {
            (0, minutes) => part("minutes", minutes),
            (hours, 0) => part("hours", hours),
            (hours, minutes) => format!("{} {}", part("hours", hours), part("minutes", minutes)),
        }
    }

    /// A day: "1 December 2026".
    pub fn date(&self, day: Date) -> String {
        let month = self.say(&format!("month-{}", day.month()));
        self.fill(
            "date",
            &[("day", day.day().into()), ("month", month.into()), ("year", day.year().to_string().into())],
        )
    }

    /// A day and a time of day: "1 December 2026, 14:03".
    pub fn moment(&self, moment: &ZonedDateTime) -> String {
        let time = moment.strftime("%H:%M").to_string();
        self.fill("date-time", &[("date", self.date(moment.date()).into()), ("time", time.into())])
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Every message with its text, values standing as their names.
    fn messages() -> Vec<(String, String)> {
        let mut messages: Vec<(String, String)> = Vec::new();
        for line in TABLES[0].1.lines().filter(|line| !line.starts_with('#')) {
            match line.split_once(" = ") {
                Some((name, text)) if !line.starts_with(' ') => messages.push((name.to_owned(), text.to_owned())),
                Some(_) | None => {
                    if let Some((_, text)) = messages.last_mut() {
                        text.push(' ');
                        text.push_str(line.trim());
                    }
                }
            }
        }
        messages
    }

    #[test]
    fn the_whole_table_can_be_read() {
        for (language, table) in TABLES {
            let read = FluentResource::try_new(table.to_owned());
            assert!(read.is_ok(), "{language}: {:?}", read.err().map(|(_, errors)| errors));
        }
        assert!(messages().len() > 50);
        for (name, _) in messages() {
            assert!(Words::of("en").knows(&name), "{name}");
        }
    }

    #[test]
    fn no_sentence_is_longer_than_twenty_words() {
        for (name, text) in messages() {
            for sentence in text.split(['.', ':', '?']) {
                let words = sentence.split_whitespace().filter(|word| word.chars().any(char::is_alphanumeric)).count();
                assert!(words <= 20, "{name}: {words} words in {sentence:?}");
            }
        }
    }

    #[test]
    fn the_words_are_plain() {
        let banned = ["dod", "depth of discharge", "peukert", "kva", "invalid", "please", "oops", "user"];
        for (name, text) in messages() {
            let lower = text.to_lowercase();
            for word in banned {
                assert!(
                    !lower
                        .split(|c: char| !c.is_alphabetic() && c != ' ')
                        .any(|part| { part == word || part.split(' ').any(|single| single == word) }),
                    "{name} says {word:?}"
                );
            }
            let speaks_of_charge = text.split(|c: char| !c.is_alphabetic()).any(|word| word == "Ah" || word == "VA");
            assert!(!speaks_of_charge || name.starts_with("kit-"), "{name}: units of the trade outside the parts list");
        }
    }

    #[test]
    fn a_length_of_time_is_told_in_hours_and_minutes() {
        let words = Words::of("en");
        for (hours, told) in [
            (6.0, "6 hours"),
            (1.0, "1 hour"),
            (6.5, "6 hours 30 minutes"),
            (0.25, "15 minutes"),
            (1.0 + 1.0 / 60.0, "1 hour 1 minute"),
            (5.9999, "6 hours"),
        ] {
            assert_eq!(words.duration(hours).replace('\u{a0}', " "), told);
        }
    }

    #[test]
    fn a_moment_is_told_with_the_month_in_letters() {
        let moment: ZonedDateTime = "2026-02-09T04:07:59[UTC]".parse().unwrap();
        assert_eq!(Words::of("en").moment(&moment), "9 February 2026, 04:07");
    }

    #[test]
    fn an_unknown_language_gets_the_first_table_and_an_unknown_message_shows_its_name() {
        assert_eq!(Words::of("tlh").language(), "en");
        assert_eq!(Words::of("en").say("no-such-message"), "no-such-message");
    }
}
