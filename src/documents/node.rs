//! A JSON object as it is written: keys in order, twice-given keys seen, values still text.
//!
//! Numbers stay text until they are read against a limit, so that `1e309` gets a message with its
//! path instead of spoiling the whole file.

use std::fmt;

use serde::de::{Deserialize, Deserializer, MapAccess, Visitor};
use serde_json::value::RawValue;

/// The members of an object, in their order, twice-given ones included.
pub struct Members<'a>(pub Vec<(String, &'a RawValue)>);

impl<'de> Deserialize<'de> for Members<'de> {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        struct Reader;
        impl<'de> Visitor<'de> for Reader {
            type Value = Members<'de>;
            fn expecting(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
                f.write_str("an object in { }")
            }
            fn visit_map<A: MapAccess<'de>>(self, mut map: A) -> Result<Self::Value, A::Error> {
                let mut members = Vec::new();
                while let Some(member) = map.next_entry()? {
                    members.push(member);
                }
                Ok(Members(members))
            }
        }
        deserializer.deserialize_map(Reader)
    }
}

/// What a value looks like, for messages.
pub fn kind(value: &RawValue) -> &'static str {
    match value.get().as_bytes().first() {
        Some(b'{') => "an object",
        Some(b'[') => "a list",
        Some(b'"') => "a text",
        Some(b't' | b'f') => "true or false",
        Some(b'n') => "null",
        _ => "a number",
    }
}
