//! A load in one line, `6 lamps 9W 5h`, and the common load that a name most likely means.

use super::number::number_and_unit;
use crate::sizing::tables::appliances::{self, Appliance};
use crate::units::Watts;
use crate::wording::DecimalMark;

/// A load as it is said in one line.
#[derive(Clone, Debug, PartialEq)]
pub struct Line {
    /// How many.
    pub quantity: u32,
    /// What it is.
    pub name: String,
    /// Its power, still with its unit.
    pub power: String,
    /// Hours a day, if they were told.
    pub hours: Option<f64>,
}

/// Reads count, name, power and hours a day, in this order; count and hours may be missing.
///
/// A unit may stand apart from its number, and the count may be tied to the power: `lamp 6x9 W`.
pub fn one_line(text: &str, mark: DecimalMark) -> Option<Line> {
    let words = joined(text, mark);
    let (quantity, rest) = match words.first().and_then(|word| word.parse::<u32>().ok()) {
        Some(quantity) if words.len() > 1 => (quantity, &words[1..]),
        _ => (1, &words[..]),
    };
    let at = rest.iter().position(|word| has_unit(counted(word).1, &POWER, mark))?;
    let name = rest[..at].join(" ");
    let name = name.trim_matches([',', ':', ';']).trim().to_owned();
    let (tied, power) = counted(&rest[at]);
    let hours = rest[at + 1..].iter().find(|word| has_unit(word, &HOURS, mark));
    let hours = hours.and_then(|word| number_and_unit(word, mark).ok()).map(|typed| typed.number);
    let quantity = quantity.checked_mul(tied).filter(|quantity| *quantity > 0)?;
    (!name.is_empty()).then(|| Line { quantity, name, power: power.to_owned(), hours })
}

const POWER: [&str; 7] = ["w", "kw", "hp", "a", "va", "kva", "ma"];
const HOURS: [&str; 2] = ["h", "hours"];

/// Words, each number with the unit that stands behind it.
fn joined(text: &str, mark: DecimalMark) -> Vec<String> {
    let mut words: Vec<String> = Vec::new();
    for word in text.split_whitespace() {
        let is_unit = POWER.iter().chain(&HOURS).any(|unit| unit.eq_ignore_ascii_case(word));
        match words.last_mut() {
            Some(last) if is_unit && has_unit(counted(last).1, &[""], mark) => last.push_str(word),
            _ => words.push(word.to_owned()),
        }
    }
    words
}

fn has_unit(word: &str, units: &[&str], mark: DecimalMark) -> bool {
    number_and_unit(word, mark).is_ok_and(|typed| units.contains(&typed.unit.as_str()))
}

/// `2x60W`: how many, and the rest; one where no count stands before an x.
pub fn counted(text: &str) -> (u32, &str) {
    let text = text.trim();
    let split =
        text.split_once(['x', 'X', '×']).and_then(|(count, rest)| Some((count.trim().parse().ok()?, rest.trim())));
    split.filter(|(count, _)| *count > 0).unwrap_or((1, text))
}

/// The common load that a name most likely means: it has the name's noun, and most of its words.
pub fn likely(name: &str) -> Option<&'static Appliance> {
    best(name).into_iter().next()
}

/// Least and most that loads of that name usually draw.
pub fn usual_power(name: &str) -> Option<(Watts, Watts)> {
    let draws = best(name).into_iter().map(|appliance| appliance.running);
    draws.fold(None, |range: Option<(Watts, Watts)>, draw| {
        let (least, most) = range.unwrap_or((draw, draw));
        Some((least.min(draw), most.max(draw)))
    })
}

/// The common loads that share the most words with a name, its noun among them; those offered first come first.
fn best(name: &str) -> Vec<&'static Appliance> {
    if let Some(exact) = appliances::all().find(|appliance| appliance.name == name) {
        return vec![exact];
    }
    let words = words(name.split([',', '(']).next().unwrap_or(name));
    let Some(noun) = words.last() else { return Vec::new() };
    let shared = |appliance: &Appliance| {
        let known = self::words(&format!("{} {}", appliance.name, appliance.key.replace('_', " ")));
        let shared = words.iter().filter(|word| known.contains(word)).count();
        if known.contains(noun) { shared } else { 0 }
    };
    let scored: Vec<_> = appliances::all().map(|appliance| (shared(appliance), appliance)).collect();
    let most = scored.iter().map(|(score, _)| *score).max().filter(|most| *most > 0);
    let alike = scored.into_iter().filter(|(score, _)| Some(*score) == most).map(|(_, appliance)| appliance);
    let (mut first, rest): (Vec<_>, Vec<_>) = alike.partition(|appliance| appliance.is_common());
    first.extend(rest);
    first
}

/// Words in lower case and in the singular, each by the name that the list uses.
fn words(text: &str) -> Vec<String> {
    let parts = text.split(|letter: char| !letter.is_alphanumeric()).filter(|word| !word.is_empty());
    parts.map(|word| listed_as(singular(&word.to_lowercase())).to_owned()).collect()
}

fn singular(word: &str) -> &str {
    word.strip_suffix('s').filter(|one| one.len() > 2 && !one.ends_with('s')).unwrap_or(word)
}

fn listed_as(word: &str) -> &str {
    match word {
        "lamp" | "light" | "bulb" => "bulb",
        "refrigerator" | "icebox" => "fridge",
        "telly" | "television" => "tv",
        "aircon" | "ac" => "conditioner",
        "pc" | "computer" => "desktop",
        "modem" | "wifi" => "router",
        "washer" => "washing",
        "notebook" => "laptop",
        other => other,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const MARK: DecimalMark = DecimalMark::Point;

    #[test]
    fn a_line_tells_count_name_power_and_hours() {
        for (text, quantity, name, power, hours) in [
            ("6 lamps 9W 5h", 6, "lamps", "9W", Some(5.0)),
            ("hall lamp 9W", 1, "hall lamp", "9W", None),
            ("6 lamps 9 W 5 h", 6, "lamps", "9W", Some(5.0)),
            ("lamps, 6x9 W", 6, "lamps", "9W", None),
            ("water pump ½hp 2 hours", 1, "water pump", "½hp", Some(2.0)),
            ("3 phase tester 12w", 3, "phase tester", "12w", None),
        ] {
            let expected = Line { quantity, name: name.into(), power: power.into(), hours };
            assert_eq!(one_line(text, MARK), Some(expected), "{text}");
        }
        for text in ["lamps", "9W", "0 lamps 9W", "", "4294967295 lamps 9x9W", "6 6"] {
            assert_eq!(one_line(text, MARK), None, "{text}");
        }
    }

    #[test]
    fn a_count_may_stand_before_the_power() {
        assert_eq!(counted("2 × 60"), (2, "60"));
        assert_eq!(counted("2x60W"), (2, "60W"));
        assert_eq!(counted("60"), (1, "60"));
        assert_eq!(counted("0x60"), (1, "0x60"));
    }

    #[test]
    fn a_name_means_the_common_load_with_its_noun() {
        for (name, key) in [
            ("fridge", "fridge_direct_cool"),
            ("Refrigerator", "fridge_direct_cool"),
            ("lamps", "led_bulb_9w"),
            ("Hall light", "led_bulb_9w"),
            ("TV", "tv_43"),
            ("chest freezer", "freezer_chest"),
            ("pumps", "pump_booster"),
            ("borehole pump", "pump_05hp_borehole"),
            ("Ceiling fans", "ceiling_fan"),
            ("Phone chargers", "phone_charger"),
        ] {
            assert_eq!(likely(name).map(|appliance| appliance.key), Some(key), "{name}");
        }
        for name in ["lathe", "table saw", "", "!", "fridge in the shed"] {
            assert_eq!(likely(name), None, "{name}");
        }
    }

    #[test]
    fn usual_power_spans_the_loads_of_that_name() {
        assert_eq!(usual_power("Fridge, single door"), Some((Watts(150.0), Watts(150.0))));
        let (least, most) = usual_power("pump").unwrap();
        assert!(least.0 < 400.0 && most.0 > 1500.0);
        assert_eq!(usual_power("lathe"), None);
    }
}
