//! What a number means in its field: power, time, length, heat, money, counts.

use super::number::{Trouble, Typed, number_and_unit};
use crate::documents::limits::Limit;
use crate::units::{AcVolts, Fraction, Watts};
use crate::wording::{DecimalMark, Numbers};

/// Watts at the shaft in one horsepower: the electric horsepower, exact.
pub const WATTS_PER_HORSEPOWER: f64 = 746.0;
/// Shaft power over input of a small single-phase motor. Common practice, no source: 0.55 to 0.70.
pub const MOTOR_EFFICIENCY: f64 = 0.6;

/// What to say of a number that could not be read.
fn told(trouble: Trouble, limit: Limit, mark: DecimalMark) -> String {
    match trouble {
        Trouble::Ambiguous { small, large } => {
            let numbers = Numbers::new(mark);
            let large = numbers.plain(large, 0).replace([',', '\u{202f}'], "");
            format!("this can be read two ways: type {} or {large}", numbers.plain(small, 3).trim_end_matches('0'))
        }
        Trouble::Empty | Trouble::Unreadable => with_unit(limit),
    }
}

fn with_unit(limit: Limit) -> String {
    if limit.unit.is_empty() { limit.told() } else { format!("{} {}", limit.told(), limit.unit) }
}

fn within(number: f64, limit: Limit) -> Result<f64, String> {
    limit.check(number).map_err(|_| with_unit(limit))
}

/// A number in one of some units, each with what it is multiplied by; the first is meant where none stands.
fn in_units(text: &str, mark: DecimalMark, limit: Limit, units: &[(&str, f64)]) -> Result<f64, String> {
    let Typed { number, unit } = number_and_unit(text, mark).map_err(|trouble| told(trouble, limit, mark))?;
    let factor = units.iter().find(|(name, _)| *name == unit || unit.is_empty()).map(|(_, factor)| *factor);
    within(number * factor.ok_or_else(|| with_unit(limit))?, limit)
}

/// A number in the field's own unit, which may stand behind it.
pub fn plain(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, String> {
    let own = limit.unit.to_lowercase();
    in_units(text, mark, limit, &[(&own, 1.0), (&format!("{own}s"), 1.0)])
}

/// A whole number.
pub fn whole(text: &str, mark: DecimalMark, limit: Limit) -> Result<u32, String> {
    plain(text, mark, limit).map(|number| number as u32)
}

/// Heat in °C; °F is turned into it.
pub fn temperature(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, String> {
    let Typed { number, unit } = number_and_unit(text, mark).map_err(|trouble| told(trouble, limit, mark))?;
    match unit.as_str() {
        "" | "°c" | "c" => within(number, limit),
        "°f" | "f" => within((number - 32.0) / 1.8, limit),
        _ => Err(with_unit(limit)),
    }
}

/// A length in metres.
pub fn metres(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, String> {
    in_units(text, mark, limit, &[("m", 1.0), ("ft", 0.3048), ("'", 0.3048), ("cm", 0.01), ("mm", 0.001)])
}

/// A share, typed in per cent.
pub fn percent(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, String> {
    let hundred = Limit { lowest: limit.lowest * 100.0, highest: limit.highest * 100.0, unit: "%", whole: false };
    in_units(text, mark, hundred, &[("%", 1.0)]).map(|percent| percent / 100.0)
}

/// Money in smallest coins of so many decimals.
pub fn money_minor(text: &str, mark: DecimalMark, decimals: u32, most: i64) -> Result<i64, String> {
    let coins = 10f64.powi(decimals as i32);
    let limit = Limit { lowest: 0.0, highest: most as f64 / coins, unit: "", whole: false };
    let amount = in_units(text, mark, limit, &[("", 1.0)])?;
    Ok((amount * coins).round() as i64)
}

/// Hours, also as `6h30`, `6:30`, `6 h 30 min`, `390 min`.
pub fn hours(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, String> {
    let text = text.trim().to_lowercase();
    let parts = text.split_once(':').or_else(|| text.split_once('h').filter(|(_, rest)| !rest.trim().is_empty()));
    let Some((hours, minutes)) = parts else {
        return in_units(&text, mark, limit, &[("h", 1.0), ("hours", 1.0), ("hour", 1.0), ("min", 1.0 / 60.0)]);
    };
    let minutes = minutes.trim_start_matches("ours").trim_start_matches("our").trim_end_matches("min").trim();
    let whole = |text: &str| text.trim().parse::<u16>().map(f64::from).map_err(|_| with_unit(limit));
    let (hours, minutes) = (whole(hours)?, whole(minutes)?);
    if minutes < 60.0 { within(hours + minutes / 60.0, limit) } else { Err(with_unit(limit)) }
}

/// The unit that stands beside a power.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
#[allow(missing_docs, reason = "the names say it")]
pub enum PowerUnit {
    #[default]
    Watts,
    Kilowatts,
    Horsepower,
    Amps,
    VoltAmps,
}

impl PowerUnit {
    /// Every unit with its symbol, in the order of the form.
    pub const ALL: [(Self, &'static str); 5] = [
        (Self::Watts, "W"),
        (Self::Kilowatts, "kW"),
        (Self::Horsepower, "hp"),
        (Self::Amps, "A"),
        (Self::VoltAmps, "VA"),
    ];

    /// The unit of a symbol, however it is written.
    pub fn named(symbol: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|(_, known)| known.eq_ignore_ascii_case(symbol)).map(|(unit, _)| unit)
    }
}

/// A power as it was understood.
#[derive(Clone, Debug, PartialEq)]
pub struct Power {
    /// Electrical input.
    pub running: Watts,
    /// Shaft power, where that was typed.
    pub horsepower: Option<f64>,
    /// How it was read: "read as 1,500 W".
    pub echo: String,
}

/// Reads a power; a unit in the box wins over the one beside it.
pub fn power(
    text: &str,
    beside: PowerUnit,
    mark: DecimalMark,
    supply: AcVolts,
    power_factor: Fraction,
    limit: Limit,
) -> Result<Power, String> {
    let Typed { number, unit } = number_and_unit(text, mark).map_err(|trouble| told(trouble, limit, mark))?;
    let unit = if unit.is_empty() { Some(beside) } else { PowerUnit::named(&unit) };
    let unit = unit.ok_or_else(|| format!("{}, or kW, hp, A, VA", with_unit(limit)))?;
    let (running, behind) = match unit {
        PowerUnit::Watts => (number, String::new()),
        PowerUnit::Kilowatts => (number * 1000.0, String::new()),
        PowerUnit::Amps => {
            (number * supply.0 * power_factor.get(), format!(": {number} A at the supply and its power factor"))
        }
        PowerUnit::VoltAmps => (number * power_factor.get(), ": VA times the power factor".to_owned()),
        PowerUnit::Horsepower => {
            let shaft = number * WATTS_PER_HORSEPOWER;
            (shaft / MOTOR_EFFICIENCY, format!(" drawn; {} at the shaft", Numbers::new(mark).with_unit(shaft, "W")))
        }
    };
    let running = within(running, limit)?;
    let echo = format!("read as {}{behind}", Numbers::new(mark).with_unit(running, "W"));
    Ok(Power { running: Watts(running), horsepower: (unit == PowerUnit::Horsepower).then_some(number), echo })
}

/// `2x60W`: how many, and the rest; one where no count stands before an x.
pub fn counted(text: &str) -> (u32, &str) {
    let text = text.trim();
    let split =
        text.split_once(['x', 'X', '×']).and_then(|(count, rest)| Some((count.trim().parse().ok()?, rest.trim())));
    split.filter(|(count, _)| *count > 0).unwrap_or((1, text))
}

/// `6 lamps 9W 5h`: count, name, power and hours a day, in this order; the count and the hours may be missing.
pub fn one_line(text: &str, mark: DecimalMark) -> Option<(u32, String, String, Option<f64>)> {
    let words: Vec<&str> = text.split_whitespace().collect();
    let has = |word: &str, units: &[&str]| {
        number_and_unit(word, mark).is_ok_and(|typed| units.contains(&typed.unit.as_str()))
    };
    let power = words.iter().position(|word| has(word, &["w", "kw", "hp", "a", "va"]))?;
    let (quantity, from) = match words.first().and_then(|word| word.parse::<u32>().ok()) {
        Some(quantity) if power > 0 => (quantity, 1),
        _ => (1, 0),
    };
    let name = words.get(from..power)?.join(" ");
    let hours = words[power + 1..].iter().find(|word| has(word, &["h"]));
    let hours = hours.and_then(|word| number_and_unit(word, mark).ok()).map(|typed| typed.number);
    (!name.is_empty() && quantity > 0).then(|| (quantity, name, words[power].to_owned(), hours))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::documents::limits;

    const MARK: DecimalMark = DecimalMark::Point;

    fn watts(text: &str, beside: PowerUnit) -> Result<f64, String> {
        let power_factor = Fraction::constant(0.8);
        power(text, beside, MARK, AcVolts(230.0), power_factor, limits::RUNNING_W).map(|power| power.running.0)
    }

    #[test]
    fn a_power_is_read_in_every_unit_of_a_nameplate() {
        assert_eq!(watts("1.5kW", PowerUnit::Watts), Ok(1500.0));
        assert_eq!(watts("1,5", PowerUnit::Kilowatts), Ok(1500.0));
        assert_eq!(watts("4 A", PowerUnit::Watts), Ok(736.0));
        assert_eq!(watts("500 VA", PowerUnit::Watts), Ok(400.0));
        let half = power("½ hp", PowerUnit::Watts, MARK, AcVolts(230.0), Fraction::ONE, limits::RUNNING_W).unwrap();
        assert!((half.running.0 - 373.0 / 0.6).abs() < 1e-9 && half.horsepower == Some(0.5));
        assert_eq!(half.echo, "read as 622\u{a0}W drawn; 373\u{a0}W at the shaft");
    }

    #[test]
    fn a_power_out_of_range_or_in_no_unit_gets_the_limits() {
        for text in ["0", "-3", "99999999", "about 5", "1.5e3", "5 apples"] {
            let message = watts(text, PowerUnit::Watts).unwrap_err();
            assert!(message.starts_with("give 0.1 to 100,000 W"), "{text}: {message}");
        }
        assert_eq!(watts("1.500", PowerUnit::Watts), Err("this can be read two ways: type 1.5 or 1500".into()));
    }

    #[test]
    fn times_are_read_in_every_form() {
        for (typed, expected) in [
            ("6h", 6.0),
            ("6 h 30", 6.5),
            ("6:30", 6.5),
            ("6,5 h", 6.5),
            ("390 min", 6.5),
            ("1h30", 1.5),
            ("2 hours", 2.0),
            ("6 h 30 min", 6.5),
        ] {
            assert_eq!(hours(typed, MARK, limits::AUTONOMY_H), Ok(expected), "{typed}");
        }
        for typed in ["6-8 h", "400", "6:75", "four", ""] {
            assert_eq!(hours(typed, MARK, limits::AUTONOMY_H), Err("give 0.25 to 168 h".into()), "{typed}");
        }
    }

    #[test]
    fn lengths_heat_shares_and_money_are_read() {
        assert_eq!(metres("150cm", MARK, limits::LENGTH_M), Ok(1.5));
        assert!((metres("5 ft", MARK, limits::LENGTH_M).unwrap() - 1.524).abs() < 1e-12);
        assert_eq!(temperature("−5", MARK, limits::TEMPERATURE_C), Ok(-5.0));
        assert_eq!(temperature("50 °F", MARK, limits::TEMPERATURE_C), Ok(10.0));
        assert_eq!(percent("45 %", MARK, limits::DUTY), Ok(0.45));
        assert_eq!(money_minor("1 200,50", MARK, 2, 1_000_000), Ok(120_050));
        assert!(money_minor("-1", MARK, 2, 1_000_000).is_err());
        assert_eq!(whole("2.5", MARK, limits::QUANTITY), Err("give a whole number from 1 to 1,000".into()));
        assert_eq!(whole("4294967296", MARK, limits::QUANTITY).ok(), None);
    }

    #[test]
    fn a_line_tells_count_name_power_and_hours() {
        let line = |text| one_line(text, MARK);
        assert_eq!(line("6 lamps 9W 5h"), Some((6, "lamps".into(), "9W".into(), Some(5.0))));
        assert_eq!(line("hall lamp 9W"), Some((1, "hall lamp".into(), "9W".into(), None)));
        assert_eq!(line("lamps"), None);
        assert_eq!(counted("2 × 60"), (2, "60"));
        assert_eq!(counted("60"), (1, "60"));
    }
}
