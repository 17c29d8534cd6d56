//! Reading a customer's answer.

use super::page::AnswerForm;
use crate::quotes::Said;
use crate::translations::Words;

/// Longest name, in letters.
const NAME: usize = 120;
/// Longest message, in letters.
const WORDS: usize = 2_000;

/// An answer that may be kept.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct ReadAnswer {
    /// Yes or no.
    pub said: Said,
    /// Full name.
    pub name: String,
    /// Anything else.
    pub words: String,
}

/// The answer, or every complaint about it with the field it belongs to.
pub fn read(form: &AnswerForm, words: &Words) -> Result<ReadAnswer, Vec<(&'static str, String)>> {
    let said = match form.said.as_str() {
        "yes" => Some(Said::Yes),
        "no" => Some(Said::No),
        _ => None,
    };
    let (name, message) = (form.name.trim(), form.words.trim());
    let mut complaints = Vec::new();
    if said.is_none() {
        complaints.push(("said", words.say("problem-choice")));
    }
    if !name.chars().any(char::is_alphanumeric) {
        complaints.push(("name", words.say("problem-name")));
    } else if name.chars().count() > NAME {
        complaints.push(("name", words.fill("problem-name-long", &[("count", NAME.into())])));
    }
    if message.chars().count() > WORDS {
        complaints.push(("words", words.fill("problem-words-long", &[("count", WORDS.into())])));
    }
    match said {
        Some(said) if complaints.is_empty() => {
            Ok(ReadAnswer { said, name: name.to_owned(), words: message.to_owned() })
        }
        _ => Err(complaints),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn form(said: &str, name: &str, words: &str) -> AnswerForm {
        AnswerForm { key: String::new(), said: said.into(), name: name.into(), words: words.into() }
    }

    #[test]
    fn an_answer_needs_a_choice_and_a_name() {
        let words = Words::of("en");
        for (said, name, fields) in [
            ("", "", vec!["said", "name"]),
            ("perhaps", "Cleo Marsh", vec!["said"]),
            ("yes", " \u{a0}.", vec!["name"]),
            ("yes", &"x".repeat(121), vec!["name"]),
        ] {
            let complaints = read(&form(said, name, ""), words).unwrap_err();
            assert_eq!(complaints.iter().map(|(field, _)| *field).collect::<Vec<_>>(), fields, "{said:?} {name:?}");
        }
    }

    #[test]
    fn an_answer_is_kept_as_it_was_typed() {
        let read = read(&form("no", " Cleo  Marsh ", "Too dear.\r\nCall me <b>"), Words::of("en")).unwrap();
        assert_eq!(read.said, Said::No);
        assert_eq!(read.name, "Cleo  Marsh");
        assert_eq!(read.words, "Too dear.\r\nCall me <b>");
    }

    #[test]
    fn a_message_too_long_is_told_with_its_limit() {
        let complaints = read(&form("yes", "Cleo", &"é".repeat(2_001)), Words::of("en")).unwrap_err();
        assert!(complaints[0].1.contains("2000"), "{complaints:?}");
    }
}
