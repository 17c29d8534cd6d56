//! The number at the beginning of what was typed, and the rest as its unit.

use unicode_normalization::UnicodeNormalization;

use crate::wording::DecimalMark;

/// A number and what stood behind it.
#[derive(Clone, Debug, PartialEq)]
pub struct Typed {
    /// The number; finite.
    pub number: f64,
    /// What stood behind it, in lower case without spaces; empty if nothing did.
    pub unit: String,
}

/// Why a number could not be read.
#[derive(Clone, Debug, PartialEq)]
pub enum Trouble {
    /// Nothing was typed.
    Empty,
    /// It can be read two ways, a thousand times apart.
    Ambiguous {
        /// Read with a decimal mark.
        small: f64,
        /// Read with a group of three.
        large: f64,
        /// What stood behind it.
        unit: String,
    },
    /// It is no number.
    Unreadable,
}

/// Longest text that is looked at.
const LONGEST: usize = 48;

/// Reads a number with whatever unit stands behind it.
///
/// The last of two different marks is the decimal one. A lone mark before exactly three digits
/// parts a group if it is not the firm's decimal mark; if it is, nobody can tell, and it is asked.
pub fn number_and_unit(text: &str, mark: DecimalMark) -> Result<Typed, Trouble> {
    let text = tidy(text)?;
    let (sign, text) = text.strip_prefix('-').map_or((1.0, text.as_str()), |rest| (-1.0, rest.trim_start()));
    let end = text.find(|letter: char| !letter.is_ascii_digit() && !" .,'/".contains(letter)).unwrap_or(text.len());
    let (digits, unit) = text.split_at(end);
    let unit: String = unit.chars().filter(|letter| *letter != ' ').collect();
    let number = match digits.split_once('/') {
        Some((top, bottom)) => Digits::Read(fraction(top, bottom)?),
        None => decimal(&digits.replace([' ', '\''], ""), mark)?,
    };
    match number {
        Digits::Read(number) => Ok(Typed { number: sign * number + 0.0, unit }),
        Digits::Either(small) => Err(Trouble::Ambiguous { small: sign * small, large: sign * small * 1000.0, unit }),
    }
}

/// Digits as they can be read.
enum Digits {
    /// One way.
    Read(f64),
    /// As this, or as a thousand times this.
    Either(f64),
}

/// Lower case, one kind of space, minus and digit.
pub(super) fn tidy(text: &str) -> Result<String, Trouble> {
    let text: String = text.trim().chars().take(LONGEST + 1).collect();
    let text: String = text.chars().flat_map(parted).nfkc().map(plain_letter).flat_map(char::to_lowercase).collect();
    let text = text.trim().to_owned();
    match text.chars().count() {
        0 => Err(Trouble::Empty),
        length if length > LONGEST => Err(Trouble::Unreadable),
        _ => Ok(text),
    }
}

/// A letter as it is, or parted by a space where it is a fraction of its own: `1½` is one and a half.
fn parted(letter: char) -> impl Iterator<Item = char> {
    let is_fraction = matches!(letter, '¼'..='¾' | '\u{2150}'..='\u{215e}' | '\u{2189}');
    is_fraction.then_some(' ').into_iter().chain([letter])
}

fn plain_letter(letter: char) -> char {
    match letter {
        '\u{2212}' | '\u{2010}'..='\u{2013}' => '-',
        '\u{2044}' => '/',
        '\u{66b}' => '.',
        '\u{66c}' => ',',
        '×' => 'x',
        '’' => '\'',
        letter if letter.is_whitespace() => ' ',
        letter => digit(letter).unwrap_or(letter),
    }
}

/// The ASCII digit of a decimal digit of the scripts our crews write in.
fn digit(letter: char) -> Option<char> {
    const ZEROS: [u32; 12] = [0x660, 0x6f0, 0x966, 0x9e6, 0xa66, 0xae6, 0xb66, 0xbe6, 0xc66, 0xce6, 0xd66, 0xe50];
    let value = ZEROS.iter().map(|zero| u32::from(letter).wrapping_sub(*zero)).find(|value| *value < 10)?;
    char::from_digit(value, 10)
}

/// `1/2`, and `1 1/2` as one and a half.
fn fraction(top: &str, bottom: &str) -> Result<f64, Trouble> {
    let (whole, top) = top.trim().rsplit_once(' ').unwrap_or(("0", top.trim()));
    let part = |text: &str| text.trim().parse::<u32>().map(f64::from).map_err(|_| Trouble::Unreadable);
    let (whole, top, bottom) = (part(whole)?, part(top)?, part(bottom)?);
    if bottom == 0.0 { Err(Trouble::Unreadable) } else { Ok(whole + top / bottom) }
}

/// Digits with marks.
fn decimal(text: &str, mark: DecimalMark) -> Result<Digits, Trouble> {
    let firm = match mark {
        DecimalMark::Point => '.',
        DecimalMark::Comma => ',',
    };
    let marks: Vec<char> = text.chars().filter(|letter| !letter.is_ascii_digit()).collect();
    let last = marks.last().copied();
    let number = match (marks.len(), last) {
        (0, _) => parsed(text),
        (1, Some(only)) => return lone(text, only, firm),
        (_, Some(last)) if marks.iter().filter(|letter| **letter == last).count() == 1 => {
            let (whole, rest) = text.rsplit_once(last).ok_or(Trouble::Unreadable)?;
            parsed(&format!("{}.{rest}", ungrouped(whole)?))
        }
        (_, Some(last)) if marks.iter().all(|letter| *letter == last) => parsed(&ungrouped(text)?),
        _ => Err(Trouble::Unreadable),
    };
    number.map(Digits::Read)
}

/// One mark: decimal, or the sign of a group of three.
fn lone(text: &str, mark: char, firm: char) -> Result<Digits, Trouble> {
    let (whole, rest) = text.split_once(mark).filter(|_| text.len() > 1).ok_or(Trouble::Unreadable)?;
    let small = parsed(&format!("{}.{rest}", if whole.is_empty() { "0" } else { whole }))?;
    let group = rest.len() == 3 && (1..=3).contains(&whole.len()) && !whole.starts_with('0');
    Ok(match (group, mark == firm) {
        (false, _) => Digits::Read(small),
        (true, false) => Digits::Read(small * 1000.0),
        (true, true) => Digits::Either(small),
    })
}

/// Digits in groups of three, without the signs between them.
fn ungrouped(text: &str) -> Result<String, Trouble> {
    let groups: Vec<&str> = text.split(['.', ',']).collect();
    let fits = groups.iter().skip(1).all(|group| group.len() == 3) && (1..=3).contains(&groups[0].len());
    if fits { Ok(groups.concat()) } else { Err(Trouble::Unreadable) }
}

/// Plain digits with at most one point.
fn parsed(text: &str) -> Result<f64, Trouble> {
    let digits = text.bytes().any(|byte| byte.is_ascii_digit());
    let plain = text.bytes().all(|byte| byte.is_ascii_digit() || byte == b'.');
    let number = text.parse::<f64>().ok().filter(|number| digits && plain && number.is_finite());
    number.ok_or(Trouble::Unreadable)
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;
    use crate::wording::Numbers;

    #[test]
    fn numbers_are_read_as_people_type_them() {
        use DecimalMark::{Comma, Point};
        for (typed, mark, number, unit) in [
            ("1.5kW", Point, 1.5, "kw"),
            ("1,5 kW", Point, 1.5, "kw"),
            ("1 500", Point, 1500.0, ""),
            ("1\u{202f}500 W", Point, 1500.0, "w"),
            ("1\u{a0}500W", Comma, 1500.0, "w"),
            ("1500w", Point, 1500.0, "w"),
            ("1,500", Point, 1500.0, ""),
            ("1.500", Comma, 1500.0, ""),
            ("1,234.5", Comma, 1234.5, ""),
            ("1.234,5", Point, 1234.5, ""),
            ("1.234.567", Point, 1_234_567.0, ""),
            ("0.500", Point, 0.5, ""),
            ("½ hp", Point, 0.5, "hp"),
            ("1 1/2 hp", Point, 1.5, "hp"),
            ("1½ hp", Point, 1.5, "hp"),
            ("10¾", Comma, 10.75, ""),
            ("⅓", Point, 1.0 / 3.0, ""),
            ("1/2hp", Point, 0.5, "hp"),
            ("0,5 HP", Point, 0.5, "hp"),
            (".5 hp", Point, 0.5, "hp"),
            ("-5", Point, -5.0, ""),
            ("−5", Point, -5.0, ""),
            ("-0", Point, 0.0, ""),
            ("٣٫٥", Point, 3.5, ""),
            ("３.5", Point, 3.5, ""),
            ("१२", Point, 12.0, ""),
            (" 12 ", Point, 12.0, ""),
            ("12'500", Point, 12_500.0, ""),
        ] {
            assert_eq!(number_and_unit(typed, mark), Ok(Typed { number, unit: unit.into() }), "{typed:?}");
        }
    }

    #[test]
    fn what_can_be_read_two_ways_is_asked_and_what_is_no_number_refused() {
        let asked = |unit: &str| Err(Trouble::Ambiguous { small: 1.5, large: 1500.0, unit: unit.to_owned() });
        assert_eq!(number_and_unit("1.500", DecimalMark::Point), asked(""));
        assert_eq!(number_and_unit("1,500 W", DecimalMark::Comma), asked("w"));
        for typed in ["about 5", "NaN", "inf", "--5", "1.2.3", "1,2,3", "1..5", "/2", "1/0", ".", "w"] {
            assert_eq!(number_and_unit(typed, DecimalMark::Point), Err(Trouble::Unreadable), "{typed:?}");
        }
        assert_eq!(number_and_unit(" \u{a0}", DecimalMark::Point), Err(Trouble::Empty));
        assert_eq!(number_and_unit(&"9".repeat(5000), DecimalMark::Point), Err(Trouble::Unreadable));
    }

    proptest! {
        #[test]
        fn what_is_shown_reads_back(thousandths in 0u32..2_000_000_000, comma: bool) {
            let mark = if comma { DecimalMark::Comma } else { DecimalMark::Point };
            let number = f64::from(thousandths) / 1000.0;
            let shown = Numbers::new(mark).plain(number, 3);
            match number_and_unit(&shown, mark) {
                Ok(read) => prop_assert_eq!(read.number, number),
                Err(Trouble::Ambiguous { small, .. }) => prop_assert_eq!(small, number),
                other => prop_assert!(false, "{} {:?}", shown, other),
            }
        }

        #[test]
        fn what_stands_in_a_field_is_never_asked_about_again(thousandths in 0u32..2_000_000_000, comma: bool) {
            let mark = if comma { DecimalMark::Comma } else { DecimalMark::Point };
            let number = f64::from(thousandths) / 1000.0;
            let read = number_and_unit(&Numbers::new(mark).typed(number), mark);
            prop_assert_eq!(read.map(|typed| typed.number), Ok(number));
        }

        #[test]
        fn nothing_typed_makes_it_stumble(text in ".{0,60}") {
            if let Ok(read) = number_and_unit(&text, DecimalMark::Point) {
                prop_assert!(read.number.is_finite());
            }
        }
    }
}
