//! Amounts as they are typed, read to the last digit: money, quantities, percentages.
//!
//! No floating point on the way, and no guess about a factor of a thousand.

use unicode_normalization::UnicodeNormalization;

use crate::money::{Currency, Money};
use crate::quotes::Quantity;

/// Most digits before the mark.
const WHOLE_DIGITS: usize = 10;

impl Currency {
    /// An amount of this currency; the currency's letters or sign may stand beside it.
    pub fn read(self, typed: &str, mark: char) -> Result<Money, String> {
        let letters = self.to_string();
        let bare = typed.trim().trim_start_matches(&letters).trim_end_matches(&letters);
        let bare = bare.trim_matches(|sign: char| "€£$¥₹₦₱ ".contains(sign));
        let minor = exact(bare, self.decimals(), mark)?;
        if minor > Money::MOST {
            return Err(format!("give at most {}", Money { minor: Money::MOST, currency: self }.shown(mark)));
        }
        Ok(Money { minor, currency: self })
    }
}

impl Quantity {
    /// A quantity with at most two decimals.
    pub fn read(typed: &str, mark: char) -> Result<Self, String> {
        let hundredths = exact(typed, 2, mark)?;
        let most = || format!("give 0 to {}", Self::MOST);
        Self::new(hundredths as f64 / 100.0).ok_or_else(most)
    }
}

/// A percentage from 0 to 100, in hundredths of a percent; nothing typed is none.
pub fn percentage(typed: &str, mark: char) -> Result<u32, String> {
    let bare = typed.trim().trim_end_matches('%');
    if bare.trim().is_empty() {
        return Ok(0);
    }
    let points = exact(bare, 2, mark)?;
    u32::try_from(points).ok().filter(|points| *points <= 10_000).ok_or_else(|| "give 0 to 100 %".to_owned())
}

/// A number in units of its last decimal: `12.5` with two decimals is 1250.
fn exact(typed: &str, decimals: u32, mark: char) -> Result<i64, String> {
    let text: String = typed.nfkc().filter(|letter| !letter.is_whitespace() && *letter != '\'').collect();
    let complaint = || "give a number".to_owned();
    if text.is_empty() || !text.chars().all(|letter| letter.is_ascii_digit() || letter == '.' || letter == ',') {
        return Err(complaint());
    }
    let (whole, part) = parts(&text, decimals, mark)?;
    let whole: String = whole.chars().filter(char::is_ascii_digit).collect();
    if part.len() > decimals as usize {
        return Err(if decimals == 0 {
            "give a whole number".into()
        } else {
            format!("give at most {decimals} decimals")
        });
    }
    if whole.trim_start_matches('0').len() > WHOLE_DIGITS || (whole.is_empty() && part.is_empty()) {
        return Err(if whole.is_empty() { complaint() } else { "give a smaller number".into() });
    }
    format!("{whole}{part:0<width$}", width = decimals as usize).parse().map_err(|_| complaint())
}

/// The part before the decimal mark, and the part behind it.
fn parts(text: &str, decimals: u32, mark: char) -> Result<(&str, &str), String> {
    let Some((at, last)) = text.char_indices().rfind(|(_, letter)| !letter.is_ascii_digit()) else {
        return Ok((text, ""));
    };
    let (before, after) = (&text[..at], &text[at + 1..]);
    let marks: Vec<char> = before.chars().filter(|letter| !letter.is_ascii_digit()).collect();
    let alone = marks.is_empty();
    if alone && (after.len() != 3 || (decimals == 3 && last == mark)) {
        return Ok((before, after));
    }
    if alone && last == mark {
        let (thousands, broken) = (format!("{before}{after}"), format!("{before}{mark}{}", &after[..2]));
        return Err(format!("{text} can be read in two ways: write {thousands} or {broken}"));
    }
    let decimal = !alone && marks.iter().all(|other| *other != last);
    let (whole, part) = if decimal { (before, after) } else { (text, "") };
    let mut groups = whole.split(['.', ',']);
    let first = groups.next().is_some_and(|first| (1..=3).contains(&first.len()));
    let one_kind = decimal || marks.iter().all(|other| *other == last);
    let even = marks.windows(2).all(|pair| pair[0] == pair[1]);
    if first && one_kind && even && groups.all(|group| group.len() == 3) {
        Ok((whole, part))
    } else {
        Err("give a number".into())
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn amounts_are_read_to_the_last_coin() {
        let euro = Currency::EUR;
        for (typed, mark, minor) in [
            ("12", '.', 1200),
            ("12.5", '.', 1250),
            ("12,50", '.', 1250),
            (" 1 200.05 ", '.', 120_005),
            ("1\u{202f}200,05", ',', 120_005),
            ("1,200.05", '.', 120_005),
            ("1.200,05", '.', 120_005),
            ("1,500", '.', 150_000),
            ("1.500", ',', 150_000),
            ("1,234,567", '.', 123_456_700),
            ("EUR 99.90", '.', 9990),
            ("€5", '.', 500),
            (".5", '.', 50),
            ("５", '.', 500),
            ("0", '.', 0),
        ] {
            assert_eq!(euro.read(typed, mark), Ok(Money { minor, currency: euro }), "{typed:?}");
        }
    }

    #[test]
    fn what_is_no_amount_is_refused_with_what_to_do() {
        for (typed, told) in [
            ("", "give a number"),
            ("abc", "give a number"),
            ("-5", "give a number"),
            ("1e3", "give a number"),
            ("NaN", "give a number"),
            (".", "give a number"),
            ("1,23,4", "give a number"),
            ("1.2345", "at most 2 decimals"),
            ("1.500", "write 1500 or 1.50"),
            ("99999999999", "smaller"),
        ] {
            let refused = Currency::EUR.read(typed, '.').unwrap_err();
            assert!(refused.contains(told), "{typed:?}: {refused}");
        }
        assert!(Currency::new("JPY").unwrap().read("5.5", '.').unwrap_err().contains("whole number"));
    }

    #[test]
    fn a_long_run_of_digits_is_refused_at_once() {
        assert!(Currency::EUR.read(&"9".repeat(5_000), '.').is_err());
    }

    #[test]
    fn what_is_shown_reads_back() {
        for minor in [0, 5, 50, 199, 100_000, 123_456_789] {
            for (currency, mark) in [("EUR", '.'), ("EUR", ','), ("JPY", '.'), ("KWD", ',')] {
                let money = Money { minor, currency: Currency::new(currency).unwrap() };
                assert_eq!(money.currency.read(&money.typed(mark), mark), Ok(money));
                assert_eq!(money.currency.read(&money.shown(mark), mark), Ok(money));
            }
        }
    }

    #[test]
    fn quantities_and_percentages_have_their_limits() {
        assert_eq!(Quantity::read("2,5", '.'), Ok(Quantity::nearest(2.5)));
        assert!(Quantity::read("100001", '.').is_err());
        assert_eq!(percentage("17,5 %", '.'), Ok(1750));
        assert_eq!(percentage(" ", '.'), Ok(0));
        assert!(percentage("101", '.').is_err());
    }
}
