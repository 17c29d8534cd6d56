//! The key in a customer's link: whoever holds it may open the sheet, so only its hash is kept.

use std::fmt;

use data_encoding::BASE32_NOPAD;
use sha2::{Digest, Sha256};

/// Letters of a key in a link: 128 bits, five to a letter.
const LETTERS: usize = 26;

/// A key of 128 bits.
#[derive(Clone, Copy, PartialEq, Eq)]
pub struct ShareKey([u8; 16]);

impl ShareKey {
    /// The key for a form that asks for a link.
    ///
    /// The secret is drawn when the program starts and never stored; so the same form sent twice gets
    /// the same key, and nobody can make it again from the database.
    pub fn mint(secret: &[u8; 32], form_key: &str) -> Self {
        let digest = Sha256::new().chain_update(secret).chain_update(form_key).finalize();
        let mut key = [0; 16];
        key.copy_from_slice(&digest[..16]);
        Self(key)
    }

    /// Reads a key exactly as it was given out.
    pub fn read(text: &str) -> Option<Self> {
        if text.len() != LETTERS || text.bytes().any(|letter| letter.is_ascii_uppercase()) {
            return None;
        }
        let bytes = BASE32_NOPAD.decode(text.to_ascii_uppercase().as_bytes()).ok()?;
        bytes.try_into().ok().map(Self)
    }

    /// Reads a key to which a chat program has stuck the punctuation that followed the link.
    pub fn read_before_punctuation(text: &str) -> Option<Self> {
        let (key, rest) = text.split_at_checked(LETTERS)?;
        let punctuation = |letter: char| ".,;:!?)]}>'\"*_”’»…".contains(letter);
        (!rest.is_empty() && rest.chars().all(punctuation)).then(|| Self::read(key)).flatten()
    }

    /// What is stored of it.
    pub fn hash(&self) -> [u8; 32] {
        Sha256::digest(self.0).into()
    }
}

impl fmt::Display for ShareKey {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&BASE32_NOPAD.encode(&self.0).to_ascii_lowercase())
    }
}

/// A key is never written to a log.
impl fmt::Debug for ShareKey {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str("ShareKey(…)")
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn key() -> ShareKey {
        ShareKey::mint(&[7; 32], "form")
    }

    #[test]
    fn a_key_reads_back_and_is_26_small_letters_and_digits() {
        let text = key().to_string();
        assert_eq!(text.len(), 26);
        assert!(text.bytes().all(|letter| letter.is_ascii_lowercase() || letter.is_ascii_digit()));
        assert_eq!(ShareKey::read(&text), Some(key()));
    }

    #[test]
    fn a_key_that_is_cut_changed_in_case_or_longer_is_no_key() {
        let text = key().to_string();
        for wrong in [&text[..25], &text.to_uppercase(), &format!("{text}a"), "", "é", &"1".repeat(26)] {
            assert_eq!(ShareKey::read(wrong), None, "{wrong}");
        }
    }

    #[test]
    fn only_punctuation_after_a_whole_key_is_forgiven() {
        let text = key().to_string();
        for tail in [".", ")", ").", "’", "…"] {
            assert_eq!(ShareKey::read_before_punctuation(&format!("{text}{tail}")), Some(key()), "{tail}");
        }
        for wrong in [text.clone(), format!("{text}a."), format!("{}.", &text[..25]), format!("{text}.a")] {
            assert_eq!(ShareKey::read_before_punctuation(&wrong), None, "{wrong}");
        }
    }

    #[test]
    fn another_form_or_another_secret_gives_another_key() {
        assert_ne!(key(), ShareKey::mint(&[7; 32], "forn"));
        assert_ne!(key(), ShareKey::mint(&[8; 32], "form"));
        assert_ne!(key().hash(), ShareKey::mint(&[8; 32], "form").hash());
    }

    #[test]
    fn a_key_does_not_show_itself_in_a_log() {
        assert!(!format!("{:?}", key()).contains(&key().to_string()));
    }
}
