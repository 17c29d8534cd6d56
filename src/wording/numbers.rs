//! Numbers the SI way: number, no-break space, symbol; grouped by three; never "-0".

use serde::{Deserialize, Serialize};

use crate::units::Hours;

const NO_BREAK: char = '\u{a0}';
const THIN: &str = "\u{202f}";

/// The sign between the whole part and the rest.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum DecimalMark {
    /// `1,234.5`
    #[default]
    Point,
    /// `1 234,5`: groups are parted by a thin space, since a point would be read as the mark.
    Comma,
}

/// Writes numbers with one decimal mark.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Numbers {
    /// The mark.
    pub mark: DecimalMark,
}

impl Numbers {
    /// Writes numbers with this mark.
    pub fn new(mark: DecimalMark) -> Self {
        Self { mark }
    }

    /// A number with as many decimals as asked for at most; zeros at the end are left out.
    pub fn plain(self, value: f64, decimals: usize) -> String {
        let text = format!("{value:.decimals$}");
        let text = if text.contains('.') { text.trim_end_matches('0').trim_end_matches('.') } else { &text };
        let negative = text.starts_with('-') && text.bytes().any(|byte| (b'1'..=b'9').contains(&byte));
        let digits = text.trim_start_matches('-');
        let (whole, rest) = digits.split_once('.').unwrap_or((digits, ""));
        let (group, mark) = match self.mark {
            DecimalMark::Point => (",", "."),
            DecimalMark::Comma => (THIN, ","),
        };
        let sign = if negative { "−" } else { "" };
        let mark = if rest.is_empty() { "" } else { mark };
        format!("{sign}{}{mark}{rest}", grouped(whole, group))
    }

    /// A number as it stands in a field, without groups.
    ///
    /// Three decimals get a zero behind them, since `1.500` would be asked about: 1.5 or 1500?
    pub fn typed(self, value: f64) -> String {
        let mark = if self.mark == DecimalMark::Point { "." } else { "," };
        let text = format!("{value:.6}");
        let text = text.trim_end_matches('0').trim_end_matches('.');
        let is_like_a_group = text.split_once('.').is_some_and(|(_, rest)| rest.len() == 3);
        let zero = if is_like_a_group { "0" } else { "" };
        (if text == "-0" { "0".to_owned() } else { format!("{text}{zero}") }).replace('.', mark)
    }

    /// A number with three figures or all its whole digits: 1,234 · 123 · 12.3 · 1.23 · 0.0123.
    pub fn three_figures(self, value: f64) -> String {
        let size = value.abs();
        let decimals =
            if size == 0.0 || size >= 100.0 { 0 } else { (2.0 - size.log10().floor()).clamp(0.0, 9.0) as usize };
        self.plain(value, decimals)
    }

    /// A figure with its unit, three figures; a pure number without one.
    pub fn with_unit(self, value: f64, unit: &str) -> String {
        let number = self.three_figures(value);
        if unit.is_empty() { number } else { format!("{number}{NO_BREAK}{unit}") }
    }

    /// A share as whole per cent; below ten with one decimal.
    pub fn percent(self, share: f64) -> String {
        let percent = share * 100.0;
        format!("{}{NO_BREAK}%", self.plain(percent, usize::from(percent.abs() < 10.0)))
    }
}

/// Hours as `6 h 30 min`, to the minute.
pub fn duration(hours: Hours) -> String {
    let minutes = (hours.0 * 60.0).round().max(0.0) as u64;
    match (minutes / 60, minutes % 60) {
        (0, minutes) => format!("{minutes}{NO_BREAK}min"),
        (hours, 0) => format!("{hours}{NO_BREAK}h"),
        (hours, minutes) => format!("{hours}{NO_BREAK}h {minutes}{NO_BREAK}min"),
    }
}

fn grouped(whole: &str, group: &str) -> String {
    let mut text = String::with_capacity(whole.len() + whole.len() / 3);
    for (at, digit) in whole.chars().enumerate() {
        if at > 0 && (whole.len() - at).is_multiple_of(3) {
            text.push_str(group);
        }
        text.push(digit);
    }
    text
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_are_written_the_si_way() {
        let point = Numbers::default();
        let comma = Numbers::new(DecimalMark::Comma);
        let cases = [
            (point.with_unit(1500.0, "W"), "1,500\u{a0}W"),
            (comma.with_unit(1500.0, "W"), "1\u{202f}500\u{a0}W"),
            (point.with_unit(12.0, "V"), "12\u{a0}V"),
            (point.with_unit(12.345, "V"), "12.3\u{a0}V"),
            (comma.with_unit(0.012_34, "Ω"), "0,0123\u{a0}Ω"),
            (point.with_unit(-0.0, "°C"), "0\u{a0}°C"),
            (point.with_unit(-5.0, "°C"), "−5\u{a0}°C"),
            (point.with_unit(1_234_567.0, "W"), "1,234,567\u{a0}W"),
            (point.percent(0.0123), "1.2\u{a0}%"),
            (point.percent(0.5), "50\u{a0}%"),
            (duration(Hours(6.5)), "6\u{a0}h 30\u{a0}min"),
            (duration(Hours(0.75)), "45\u{a0}min"),
            (duration(Hours(2.0)), "2\u{a0}h"),
        ];
        for (written, expected) in cases {
            assert_eq!(written, expected);
        }
    }
}
