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
    faults: Vec<(usize, Fault)>,
    /// What was left out, by path, with the value that was taken.
    pub defaults: Vec<(String, Value)>,
}

impl Gathered {
    /// Notes a fault of a value.
    pub fn fault(&mut self, value: &RawValue, fault: Fault) {
        self.faults.push((place(value), fault));
    }

    /// Every fault in the order of the file; a key that is missing stands where its object begins.
    pub fn into_faults(mut self) -> Vec<Fault> {
        self.faults.sort_by_key(|(place, _)| *place);
        self.faults.into_iter().map(|(_, fault)| fault).collect()
    }
}

/// Where a value stands: every value is a slice of the one text, so its address gives the order.
fn place(value: &RawValue) -> usize {
    value.get().as_ptr() as usize
}

/// One object that is being read.
pub struct Object<'a, 'g> {
    path: String,
    place: usize,
    members: Vec<(String, &'a RawValue)>,
    known: Vec<&'static str>,
    gathered: &'g mut Gathered,
}

impl<'a, 'g> Object<'a, 'g> {
    /// Opens the value at a path; what is no object is a fault.
    pub fn open(path: &str, value: &'a RawValue, gathered: &'g mut Gathered) -> Option<Self> {
        match serde_json::from_str::<Members>(value.get()) {
            Ok(Members(members)) => {
                Some(Self { path: path.to_owned(), place: place(value), members, known: Vec::new(), gathered })
            }
            Err(_) => {
                gathered.fault(value, Fault::new(path, not_an_object(value)));
                None
            }
        }
    }

    /// An object whose every key is left out.
    pub fn empty(path: &str, gathered: &'g mut Gathered) -> Self {
        Self { path: path.to_owned(), place: 0, members: Vec::new(), known: Vec::new(), gathered }
    }

    /// The path of a key.
    pub fn path(&self, key: &str) -> String {
        if self.path.is_empty() { key.to_owned() } else { format!("{}.{key}", self.path) }
    }

    /// Notes a fault at a key.
    pub fn fault(&mut self, key: &str, message: impl Into<String>) {
        let place = self.members.iter().rfind(|(name, _)| name == key).map_or(self.place, |(_, value)| place(value));
        let path = self.path(&shown(key));
        self.gathered.faults.push((place, Fault::new(path, message)));
    }

    /// Notes a fault at the entry of a list.
    pub fn fault_at(&mut self, key: &str, at: usize, value: &RawValue, message: &str) {
        let path = self.path(&format!("{key}[{at}]"));
        self.gathered.fault(value, Fault::new(path, message));
    }

    /// What has been gathered, to hand on to an inner object.
    pub fn gathered(&mut self) -> &mut Gathered {
        self.gathered
    }

    /// The value of a key as it stands; `None` where it is left out.
    pub fn given(&mut self, key: &'static str) -> Option<&'a RawValue> {
        self.known.push(key);
        self.members.iter().find(|(name, _)| name == key).map(|(_, value)| *value)
    }

    /// The value of a key that may be nothing; `None` where it is left out or null.
    pub fn raw(&mut self, key: &'static str) -> Option<&'a RawValue> {
        self.given(key).filter(|value| value.get() != "null")
    }

    /// What was read at a key, or nothing and a fault.
    fn told<T>(&mut self, key: &str, read: Result<T, String>) -> Option<T> {
        read.map_err(|message| self.fault(key, message)).ok()
    }

    /// A number within its limit, where there may be none.
    pub fn number(&mut self, key: &'static str, limit: Limit) -> Option<f64> {
        let value = self.raw(key)?;
        self.told(key, number_in(value, limit))
    }

    /// A number within its limit, or the default, which is noted. Null is no number.
    pub fn number_or(&mut self, key: &'static str, limit: Limit, default: f64) -> f64 {
        match self.given(key) {
            Some(value) => self.told(key, number_in(value, limit)).unwrap_or(default),
            None => self.default(key, json!(default), default),
        }
    }

    /// A text of at most so many characters.
    pub fn text(&mut self, key: &'static str, most: usize) -> Option<String> {
        let value = self.raw(key)?;
        self.told(key, text_in(value).and_then(|text| tidy(&text, most)))
    }

    /// One of the names of a choice, or the default, which is noted.
    pub fn choice_or<T: Named>(&mut self, key: &'static str, default: T) -> T {
        let Some(value) = self.given(key) else { return self.default(key, json!(default.name()), default) };
        let chosen = text_in(value).ok().and_then(|name| T::named(&name));
        self.told(key, chosen.ok_or_else(T::told)).unwrap_or(default)
    }

    /// True or false.
    pub fn flag_or(&mut self, key: &'static str, default: bool) -> bool {
        match self.given(key).map(RawValue::get) {
            Some("true") => true,
            Some("false") => false,
            Some(_) => {
                self.fault(key, "give true or false");
                default
            }
            None => self.default(key, json!(default), default),
        }
    }

    /// The entries of a list, at most so many; nothing where it is left out.
    pub fn list(&mut self, key: &'static str, most: usize) -> Vec<&'a RawValue> {
        let Some(value) = self.given(key) else { return Vec::new() };
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
    pub fn finish(self) {
        for at in 0..self.members.len() {
            let (key, value) = &self.members[at];
            let message = if !self.known.contains(&key.as_str()) {
                unknown(&shown(key), &self.known)
            } else if self.members[..at].iter().any(|(earlier, _)| earlier == key) {
                "is given twice: give it once".to_owned()
            } else {
                continue;
            };
            let fault = Fault::new(self.path(&shown(key)), message);
            self.gathered.fault(value, fault);
        }
    }

    /// Notes that a default was taken, and gives it back.
    pub fn default<T>(&mut self, key: &str, written: Value, default: T) -> T {
        let path = self.path(key);
        self.gathered.defaults.push((path, written));
        default
    }
}

/// The text of a value, or what to give instead.
fn text_in(value: &RawValue) -> Result<String, String> {
    serde_json::from_str(value.get()).map_err(|_| match kind(value) {
        "a text" => HALF_A_CHARACTER.to_owned(),
        other => format!("give a text, not {other}"),
    })
}

fn not_an_object(value: &RawValue) -> String {
    match kind(value) {
        "an object" => format!("one of its keys: {HALF_A_CHARACTER}"),
        other => format!("give an object in {{ }}, not {other}"),
    }
}

/// A surrogate without its other half is JSON, but no text.
const HALF_A_CHARACTER: &str = "this text holds half a character: type it again";

/// A key as a message shows it: on one line, without anything that moves a cursor, and not endless.
fn shown(key: &str) -> String {
    const MOST: usize = 60;
    let start: String = key.chars().take(MOST).flat_map(char::escape_debug).collect();
    if key.chars().nth(MOST).is_some() { start + "…" } else { start }
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
