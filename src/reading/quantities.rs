//! What a number means in its field: power, time, length, heat, money, counts.

use super::number::{Trouble, Typed, number_and_unit, tidy};
use crate::documents::limits::Limit;
use crate::units::{AcVolts, Fraction, Watts};
use crate::wording::{DecimalMark, Numbers};

/// Watts at the shaft in one horsepower: the electric horsepower, exact.
pub const WATTS_PER_HORSEPOWER: f64 = 746.0;
/// Watts at the shaft in one metric horsepower (PS, cv): 75 kgf·m/s.
pub const WATTS_PER_METRIC_HORSEPOWER: f64 = 735.498_75;
/// Metres in a foot, exact.
const FOOT_M: f64 = 0.3048;
/// Shaft power over input of a small single-phase motor. Common practice, no source: 0.55 to 0.70.
pub const MOTOR_EFFICIENCY: f64 = 0.6;

/// Why a number was not taken, in a sentence.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Refusal {
    /// What to give instead.
    pub text: String,
    /// What could have been meant, each as it would be typed; empty where only the sentence helps.
    pub readings: Vec<String>,
}

impl From<String> for Refusal {
    fn from(text: String) -> Self {
        Self { text, readings: Vec::new() }
    }
}

/// What to say of a number in no form that is known, or out of its range.
fn out_of(limit: Limit, mark: DecimalMark) -> Refusal {
    let numbers = Numbers::new(mark);
    let what = if limit.whole { "give a whole number from" } else { "give" };
    let (lowest, highest) = (numbers.plain(limit.lowest, 6), numbers.plain(limit.highest, 6));
    let text = format!("{what} {lowest} to {highest} {}", limit.unit);
    text.trim_end().to_owned().into()
}

fn within(number: f64, limit: Limit, mark: DecimalMark) -> Result<f64, Refusal> {
    limit.check(number).map_err(|_| out_of(limit, mark))
}

/// Both readings of a number, or the only one that is in range.
fn either(small: f64, large: f64, unit: &str, limit: Limit, mark: DecimalMark) -> Result<f64, Refusal> {
    match (limit.check(small), limit.check(large)) {
        (Ok(_), Ok(_)) => {
            let typed = |number: f64| format!("{} {unit}", Numbers::new(mark).typed(number)).trim_end().to_owned();
            let (small, large) = (typed(small), typed(large));
            Err(Refusal {
                text: format!("this can be read two ways: {small} or {large}"),
                readings: vec![small, large],
            })
        }
        (Ok(only), Err(_)) | (Err(_), Ok(only)) => Ok(only),
        (Err(_), Err(_)) => Err(out_of(limit, mark)),
    }
}

/// A name of a unit, and what a number in it is multiplied by.
type Unit = (&'static str, f64);

/// A number as it was typed and the unit it was in; the first unit is meant where none stands.
fn measured(text: &str, mark: DecimalMark, limit: Limit, units: &[Unit]) -> Result<(f64, Unit), Refusal> {
    let meant = |unit: &str| {
        let found = units.iter().find(|(name, _)| name.to_lowercase() == unit || unit.is_empty());
        found.copied().ok_or_else(|| out_of(limit, mark))
    };
    match number_and_unit(text, mark) {
        Ok(Typed { number, unit }) => {
            let unit = meant(&unit)?;
            within(number * unit.1, limit, mark).map(|_| (number, unit))
        }
        Err(Trouble::Ambiguous { small, large, unit }) => {
            let unit = meant(&unit)?;
            let limit = Limit { lowest: limit.lowest / unit.1, highest: limit.highest / unit.1, ..limit };
            either(small, large, unit.0, limit, mark).map(|number| (number, unit))
        }
        Err(Trouble::Empty | Trouble::Unreadable) => Err(out_of(limit, mark)),
    }
}

/// A number in one of some units, in the first of them.
fn in_units(text: &str, mark: DecimalMark, limit: Limit, units: &[Unit]) -> Result<f64, Refusal> {
    let (number, (_, factor)) = measured(text, mark, limit, units)?;
    within(number * factor, limit, mark)
}

/// A number in the field's own unit, which may stand behind it.
pub fn plain(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, Refusal> {
    in_units(text, mark, limit, &[(limit.unit, 1.0)])
}

/// A whole number.
pub fn whole(text: &str, mark: DecimalMark, limit: Limit) -> Result<u32, Refusal> {
    plain(text, mark, limit).map(|number| number as u32)
}

/// Heat in °C; °F is turned into it.
pub fn temperature(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, Refusal> {
    if !text.trim().ends_with(['f', 'F', '℉']) {
        return in_units(text, mark, limit, &[("°C", 1.0), ("C", 1.0)]);
    }
    let fahrenheit = |celsius: f64| celsius * 1.8 + 32.0;
    let range = Limit { lowest: fahrenheit(limit.lowest), highest: fahrenheit(limit.highest), unit: "°F", ..limit };
    let number = in_units(text, mark, range, &[("°F", 1.0), ("F", 1.0)])?;
    within((number - 32.0) / 1.8, limit, mark)
}

/// A length in metres.
pub fn metres(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, Refusal> {
    const UNITS: [Unit; 6] =
        [("m", 1.0), ("ft", FOOT_M), ("'", FOOT_M), ("in", FOOT_M / 12.0), ("cm", 0.01), ("mm", 0.001)];
    in_units(text, mark, limit, &UNITS)
}

/// A share, typed in per cent.
pub fn percent(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, Refusal> {
    let hundred = Limit { lowest: limit.lowest * 100.0, highest: limit.highest * 100.0, unit: "%", whole: false };
    in_units(text, mark, hundred, &[("%", 1.0)]).map(|percent| percent / 100.0)
}

/// Hours, also as `6h30`, `6:30`, `6 h 30 min`, `390 min`.
pub fn hours(text: &str, mark: DecimalMark, limit: Limit) -> Result<f64, Refusal> {
    const UNITS: [Unit; 6] =
        [("h", 1.0), ("hours", 1.0), ("hour", 1.0), ("min", 1.0 / 60.0), ("minutes", 1.0 / 60.0), ("m", 1.0 / 60.0)];
    let refused = || out_of(limit, mark);
    let tidied = tidy(text).map_err(|_| refused())?;
    let parts = tidied.split_once(':').or_else(|| tidied.split_once('h'));
    let after = |rest: &str| {
        rest.trim_start_matches("our")
            .trim_start_matches('s')
            .trim_end_matches("utes")
            .trim_end_matches("min")
            .trim()
            .to_owned()
    };
    let Some((hours, minutes)) = parts.map(|(hours, rest)| (hours, after(rest))).filter(|(_, rest)| !rest.is_empty())
    else {
        return in_units(text, mark, limit, &UNITS);
    };
    let whole = |text: &str| text.trim().parse::<u16>().map(f64::from).map_err(|_| refused());
    let (hours, minutes) = (whole(hours)?, whole(&minutes)?);
    if minutes < 60.0 { within(hours + minutes / 60.0, limit, mark) } else { Err(refused()) }
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

/// What a power in amps, VA or horsepower is turned into watts with.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Supplied {
    /// Volts at the load.
    pub supply: AcVolts,
    /// Power factor of the load.
    pub power_factor: Fraction,
}

impl Supplied {
    /// Every unit of a nameplate with the watts drawn for one of it; the one beside the field comes first.
    fn units(self, beside: PowerUnit) -> [Unit; 15] {
        let (va, shaft) = (self.power_factor.get(), 1.0 / MOTOR_EFFICIENCY);
        let (amp, horse, metric_horse) =
            (self.supply.0 * va, WATTS_PER_HORSEPOWER * shaft, WATTS_PER_METRIC_HORSEPOWER * shaft);
        let mut units = [
            ("W", 1.0),
            ("kW", 1000.0),
            ("hp", horse),
            ("A", amp),
            ("VA", va),
            ("kVA", 1000.0 * va),
            ("mA", amp / 1000.0),
            ("PS", metric_horse),
            ("cv", metric_horse),
            ("watts", 1.0),
            ("watt", 1.0),
            ("horsepower", horse),
            ("amps", amp),
            ("amp", amp),
            ("kilowatts", 1000.0),
        ];
        units.swap(0, beside as usize);
        units
    }
}

/// Reads a power; a unit in the box wins over the one beside it.
pub fn power(
    text: &str,
    beside: PowerUnit,
    mark: DecimalMark,
    supplied: Supplied,
    limit: Limit,
) -> Result<Power, Refusal> {
    let (number, unit) = measured(text, mark, limit, &supplied.units(beside)).map_err(|mut refusal| {
        if refusal.readings.is_empty() {
            refusal.text.push_str(", or the like in kW, hp, A or VA");
        }
        refusal
    })?;
    let running = within(number * unit.1, limit, mark)?;
    let horsepower = match unit.0 {
        "hp" | "horsepower" => Some(number),
        "PS" | "cv" => Some(number * WATTS_PER_METRIC_HORSEPOWER / WATTS_PER_HORSEPOWER),
        _ => None,
    };
    let echo = echo(number, unit.0, running, supplied, Numbers::new(mark));
    Ok(Power { running: Watts(running), horsepower, echo })
}

/// How a power was read, with what was assumed.
fn echo(number: f64, unit: &str, running: f64, supplied: Supplied, numbers: Numbers) -> String {
    let watts = |power: f64| numbers.with_unit(power, "W");
    let typed = numbers.with_unit(number, unit);
    let power_factor = numbers.plain(supplied.power_factor.get(), 2);
    match unit {
        "hp" | "horsepower" | "PS" | "cv" => {
            let shaft = watts(running * MOTOR_EFFICIENCY);
            let share = numbers.percent(MOTOR_EFFICIENCY);
            format!("{typed} at the shaft is {shaft}; it draws about {} (efficiency {share} assumed)", watts(running))
        }
        "A" | "mA" | "amps" | "amp" => {
            let va = numbers.with_unit(running / supplied.power_factor.get(), "VA");
            let volts = numbers.with_unit(supplied.supply.0, "V");
            format!("{typed} at {volts} is {va}; at a power factor of {power_factor} it draws {}", watts(running))
        }
        "VA" | "kVA" => format!("{typed} at a power factor of {power_factor} draws {}", watts(running)),
        _ => format!("read as {}", watts(running)),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::documents::limits;

    const MARK: DecimalMark = DecimalMark::Point;

    fn watts(text: &str, beside: PowerUnit) -> Result<f64, String> {
        read(text, beside).map(|power| power.running.0).map_err(|refusal| refusal.text)
    }

    fn read(text: &str, beside: PowerUnit) -> Result<Power, Refusal> {
        let supplied = Supplied { supply: AcVolts(230.0), power_factor: Fraction::constant(0.8) };
        power(text, beside, MARK, supplied, limits::RUNNING_W)
    }

    #[test]
    fn a_power_is_read_in_every_unit_of_a_nameplate() {
        use PowerUnit::{Amps, Horsepower, Kilowatts, VoltAmps, Watts};
        for (typed, beside, expected) in [
            ("1.5kW", Watts, 1500.0),
            ("1,5", Kilowatts, 1500.0),
            ("1500w", Kilowatts, 1500.0),
            ("4 A", Watts, 736.0),
            ("4", Amps, 736.0),
            ("500", VoltAmps, 400.0),
            ("0.5kVA", Watts, 400.0),
            ("½ hp", Watts, 373.0 / 0.6),
            ("1/2", Horsepower, 373.0 / 0.6),
            ("1½ HP", Watts, 1119.0 / 0.6),
            ("1 PS", Watts, 735.498_75 / 0.6),
            ("٦٠", Watts, 60.0),
        ] {
            let watts = watts(typed, beside).unwrap();
            assert!((watts - expected).abs() < 1e-9, "{typed}: {watts}");
        }
    }

    #[test]
    fn what_was_read_is_told_with_what_was_assumed() {
        let told = |typed: &str| read(typed, PowerUnit::Watts).unwrap().echo.replace('\u{a0}', " ");
        assert_eq!(told("1,5 kW"), "read as 1,500 W");
        let horse = "0.5 hp at the shaft is 373 W; it draws about 622 W (efficiency 60 % assumed)";
        assert_eq!(told("½ hp"), horse);
        assert_eq!(told("4 A"), "4 A at 230 V is 920 VA; at a power factor of 0.8 it draws 736 W");
        assert_eq!(told("500 VA"), "500 VA at a power factor of 0.8 draws 400 W");
        assert_eq!(read("½ hp", PowerUnit::Watts).unwrap().horsepower, Some(0.5));
    }

    #[test]
    fn a_power_out_of_range_or_in_no_unit_gets_the_limits() {
        for text in ["0", "-3", "99999999", "about 5", "1.5e3", "5 apples", "6-8", "NaN", "inf"] {
            let message = watts(text, PowerUnit::Watts).unwrap_err();
            assert_eq!(message, "give 0.1 to 100,000 W, or the like in kW, hp, A or VA", "{text}");
        }
    }

    #[test]
    fn what_can_be_read_two_ways_is_asked_and_in_range_only_one_way_taken() {
        let asked = read("1.500", PowerUnit::Watts).unwrap_err();
        assert_eq!(asked.text, "this can be read two ways: 1.5 W or 1500 W");
        for (reading, expected) in asked.readings.iter().zip([1.5, 1500.0]) {
            assert_eq!(watts(reading, PowerUnit::Kilowatts), Ok(expected));
        }
        assert_eq!(watts("1.500 kW", PowerUnit::Watts), Ok(1500.0));
        assert_eq!(metres("1.500", MARK, limits::LENGTH_M), Ok(1.5));
        assert_eq!(temperature("1,500", DecimalMark::Comma, limits::TEMPERATURE_C), Ok(1.5));
    }

    #[test]
    fn limits_are_told_with_the_firms_mark() {
        let refused = plain("0", DecimalMark::Comma, limits::RUNNING_W).unwrap_err();
        assert_eq!(refused.text, "give 0,1 to 100\u{202f}000 W");
        let refused = temperature("200 F", MARK, limits::TEMPERATURE_C).unwrap_err();
        assert_eq!(refused.text, "give −40 to 158 °F");
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
            ("6 hours 30 minutes", 6.5),
            ("6\u{a0}h 30\u{a0}min", 6.5),
            ("٦:٣٠", 6.5),
            ("½ h", 0.5),
            ("45m", 0.75),
        ] {
            assert_eq!(hours(typed, MARK, limits::AUTONOMY_H), Ok(expected), "{typed}");
        }
        for typed in ["6-8 h", "400", "6:75", "four", ""] {
            assert_eq!(hours(typed, MARK, limits::AUTONOMY_H), Err("give 0.25 to 168 h".to_owned().into()), "{typed}");
        }
    }

    #[test]
    fn lengths_heat_and_shares_are_read() {
        assert_eq!(metres("150cm", MARK, limits::LENGTH_M), Ok(1.5));
        assert!((metres("5 ft", MARK, limits::LENGTH_M).unwrap() - 1.524).abs() < 1e-12);
        assert_eq!(temperature("−5", MARK, limits::TEMPERATURE_C), Ok(-5.0));
        assert_eq!(temperature("50 °F", MARK, limits::TEMPERATURE_C), Ok(10.0));
        assert_eq!(percent("45 %", MARK, limits::DUTY), Ok(0.45));
        assert_eq!(whole("2.5", MARK, limits::QUANTITY), Err("give a whole number from 1 to 1,000".to_owned().into()));
        assert_eq!(whole("4294967296", MARK, limits::QUANTITY).ok(), None);
    }
}
