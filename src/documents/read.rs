//! Reading an object key by key: faults and defaults are gathered with their paths on the way.

use serde_json::value::RawValue;
use serde_json::{Value, json};

use super::fault::Fault;
use super::limits::Limit;
use super::names::Named;
use super::node::{Members, kind};

/// What reading has gathered so far.
#[derive(Default)]
pub struct Gathered {
    /// What is wrong.
    pub faults: Vec<Fault>,
    /// What was left out, by path, with the value that was taken.
    pub defaults: Vec<(String, Value)>,
}

/// One object that is being read.
pub struct Object<'a, 'g> {
    path: String,
    members: Vec<(String, &'a RawValue)>,
    known: Vec<&'static str>,
    gathered: &'g mut Gathered,
}

impl<'a, 'g> Object<'a, 'g> {
    /// Opens the value at a path; what is no object is a fault.
    pub fn open(path: &str, value: &'a RawValue, gathered: &'g mut Gathered) -> Option<Self> {
        match serde_json::from_str::<Members>(value.get()) {
            Ok(Members(members)) => Some(Self { path: path.to_owned(), members, known: Vec::new(), gathered }),
            Err(_) => {
                gathered.faults.push(Fault::new(path, format!("give an object in {{ }}, not {}", kind(value))));
                None
            }
        }
    }

    /// An object whose every key is left out.
    pub fn empty(path: &str, gathered: &'g mut Gathered) -> Self {
        Self { path: path.to_owned(), members: Vec::new(), known: Vec::new(), gathered }
    }

    /// The path of a key.
    pub fn path(&self, key: &str) -> String {
        if self.path.is_empty() { key.to_owned() } else { format!("{}.{key}", self.path) }
    }

    /// Notes a fault at a key.
    pub fn fault(&mut self, key: &str, message: impl Into<String>) {
        let path = self.path(key);
        self.gathered.faults.push(Fault::new(path, message));
    }

    /// What has been gathered, to hand on to an inner object.
    pub fn gathered(&mut self) -> &mut Gathered {
        self.gathered
    }

    /// The value of a key; `None` where it is left out or null.
    pub fn raw(&mut self, key: &'static str) -> Option<&'a RawValue> {
        self.known.push(key);
        let value = self.members.iter().find(|(name, _)| name == key).map(|(_, value)| *value);
        value.filter(|value| value.get() != "null")
    }

    /// A number within its limit.
    pub fn number(&mut self, key: &'static str, limit: Limit) -> Option<f64> {
        let value = self.raw(key)?;
        match number_in(value, limit) {
            Ok(number) => Some(number),
            Err(message) => {
                self.fault(key, message);
                None
            }
        }
    }

    /// A number within its limit, or the default, which is noted.
    pub fn number_or(&mut self, key: &'static str, limit: Limit, default: f64) -> f64 {
        let given = self.raw(key).is_some();
        self.number(key, limit).unwrap_or_else(|| self.default(key, given, json!(default), default))
    }

    /// A text of at most so many characters.
    pub fn text(&mut self, key: &'static str, most: usize) -> Option<String> {
        let value = self.raw(key)?;
        let text = serde_json::from_str::<String>(value.get()).map_err(|_| format!("give a text, not {}", kind(value)));
        match text.and_then(|text| tidy(&text, most)) {
            Ok(text) => Some(text),
            Err(message) => {
                self.fault(key, message);
                None
            }
        }
    }

    /// One of the names of a choice.
    pub fn choice<T: Named>(&mut self, key: &'static str) -> Option<T> {
        let value = self.raw(key)?;
        let chosen = serde_json::from_str::<String>(value.get()).ok().and_then(|name| T::named(&name));
        if chosen.is_none() {
            self.fault(key, T::told());
        }
        chosen
    }

    /// One of the names of a choice, or the default, which is noted.
    pub fn choice_or<T: Named>(&mut self, key: &'static str, default: T) -> T {
        let given = self.raw(key).is_some();
        self.choice(key).unwrap_or_else(|| self.default(key, given, json!(default.name()), default))
    }

    /// True or false.
    pub fn flag_or(&mut self, key: &'static str, default: bool) -> bool {
        match self.raw(key).map(RawValue::get) {
            Some("true") => true,
            Some("false") => false,
            Some(_) => {
                self.fault(key, "give true or false");
                default
            }
            None => self.default(key, false, json!(default), default),
        }
    }

    /// The entries of a list, at most so many; nothing where it is left out.
    pub fn list(&mut self, key: &'static str, most: usize) -> Vec<&'a RawValue> {
        let Some(value) = self.raw(key) else { return Vec::new() };
        match serde_json::from_str::<Vec<&RawValue>>(value.get()) {
            Ok(entries) if entries.len() <= most => entries,
            Ok(entries) => {
                self.fault(key, format!("give at most {most} entries, not {}", entries.len()));
                Vec::new()
            }
            Err(_) => {
                self.fault(key, format!("give a list in [ ], not {}", kind(value)));
                Vec::new()
            }
        }
    }

    /// Every member as it stands, for objects whose keys are checked elsewhere.
    pub fn take_all(&mut self) -> Vec<(String, &'a RawValue)> {
        std::mem::take(&mut self.members)
    }

    /// Names keys that nothing asked for, and keys given twice.
    pub fn finish(mut self) {
        let members = std::mem::take(&mut self.members);
        for (at, (key, _)) in members.iter().enumerate() {
            if !self.known.contains(&key.as_str()) {
                let message = unknown(key, &self.known);
                self.fault(key, message);
            } else if members[..at].iter().any(|(earlier, _)| earlier == key) {
                self.fault(key, "is given twice: give it once");
            }
        }
    }

    fn default<T>(&mut self, key: &str, given: bool, written: Value, default: T) -> T {
        if !given {
            let path = self.path(key);
            self.gathered.defaults.push((path, written));
        }
        default
    }
}

/// A number within its limit, or what to give instead.
pub fn number_in(value: &RawValue, limit: Limit) -> Result<f64, String> {
    match value.get().parse::<f64>() {
        Ok(number) => limit.check(number),
        Err(_) => Err(format!("{}, not {}", limit.told(), kind(value))),
    }
}

/// A text without white space around it and without control characters.
pub fn tidy(text: &str, most: usize) -> Result<String, String> {
    let text = text.trim();
    if text.chars().count() > most {
        Err(format!("give at most {most} characters"))
    } else if text.chars().any(char::is_control) {
        Err("leave out line breaks and control characters".to_owned())
    } else {
        Ok(text.to_owned())
    }
}

/// The sentence for an unknown key, with the known one that was likely meant.
fn unknown(key: &str, known: &[&str]) -> String {
    let stem = |name: &str| name.rsplit_once('_').map_or(name.to_owned(), |(stem, _)| stem.to_owned());
    let likely = known.iter().find(|known| stem(known) == stem(key) || strsim::levenshtein(known, key) <= 2);
    match likely {
        Some(likely) => format!("unknown key; did you mean {likely}?"),
        None => "unknown key; leave it out".to_owned(),
    }
}
