//! Hashing of passwords; the salt comes in as an argument.

use argon2::{Argon2, Params};
use argon2::{PasswordHasher, PasswordVerifier};

/// Fewest characters of a password.
pub const SHORTEST: usize = 8;
/// Most characters of a password.
pub const LONGEST: usize = 256;

/// The hash that an unknown person is checked against, so that time does not tell who is known.
const NOBODY: &str =
    "$argon2id$v=19$m=19456,t=2,p=1$bm9ib2R5LW5vYm9keS0xMg$Zm9yIHRoZSBzYW1lIHRpbWUgYXMgYSByZWFsIG9uZSE";

/// Argon2id with 19 MiB, two passes and one lane.
///
/// Source: OWASP Password Storage Cheat Sheet, 2026: m = 19 MiB, t = 2, p = 1.
fn argon2() -> Argon2<'static> {
    Argon2::from(&Params::new(19_456, 2, 1, None).unwrap_or(Params::DEFAULT))
}

/// What is wrong with a password, if anything; no rule but its length.
pub fn complaint(password: &str) -> Option<String> {
    let length = password.chars().count();
    (!(SHORTEST..=LONGEST).contains(&length)).then(|| format!("give {SHORTEST} to {LONGEST} characters"))
}

/// The hash to be stored, in the PHC form.
pub fn hash(password: &str, salt: [u8; 16]) -> Result<String, argon2::password_hash::Error> {
    Ok(argon2().hash_password_with_salt(password.as_bytes(), &salt)?.to_string())
}

/// Whether a password is the one that was hashed; takes as long when nobody is known.
pub fn fits(password: &str, hash: Option<&str>) -> bool {
    let known = argon2().verify_password(password.as_bytes(), hash.unwrap_or(NOBODY)).is_ok();
    known && hash.is_some()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn only_the_same_password_fits_whatever_its_letters() {
        let hashed = hash("größe 🔌 and more", [7; 16]).unwrap();
        assert!(hashed.starts_with("$argon2id$v=19$m=19456,t=2,p=1$"), "{hashed}");
        assert!(fits("größe 🔌 and more", Some(&hashed)));
        assert!(!fits("größe 🔌 and more ", Some(&hashed)));
        assert!(!fits("größe 🔌 and more", None));
        argon2::PasswordHash::new(NOBODY).unwrap();
    }

    #[test]
    fn only_the_length_is_a_rule() {
        assert_eq!(complaint("1234567"), Some("give 8 to 256 characters".to_owned()));
        assert_eq!(complaint("12345678"), None);
        assert_eq!(complaint(&"🔌".repeat(256)), None);
        assert!(complaint(&"a".repeat(257)).is_some());
    }
}
