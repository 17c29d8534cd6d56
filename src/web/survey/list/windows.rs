//! Clock windows as people type them: `18-23, 5:30-7`.

use crate::documents::limits;
use crate::sizing::survey::{TimeOfDay, Window};

/// Reads windows; nothing typed means all day.
pub fn read(text: &str) -> Result<Vec<Window>, String> {
    let parts: Vec<&str> = text.split([',', ';']).map(str::trim).filter(|part| !part.is_empty()).collect();
    if parts.is_empty() {
        return Ok(vec![Window::ALL_DAY]);
    }
    if parts.len() > limits::WINDOWS {
        return Err(format!("give at most {} times", limits::WINDOWS));
    }
    let windows: Option<Vec<Window>> = parts.into_iter().map(window).collect();
    windows.ok_or_else(|| "give times such as 18:00 to 23:00, or leave it empty for all day".to_owned())
}

fn window(text: &str) -> Option<Window> {
    let text = text.replace(['–', '−'], "-").replace(" to ", "-");
    let (from, to) = text.split_once('-')?;
    let (from, to) = (time(from)?, time(to)?);
    (from != to && from != TimeOfDay::END_OF_DAY).then_some(Window { from, to })
}

/// `18`, `18:30`, `18.30`, `1830`.
fn time(text: &str) -> Option<TimeOfDay> {
    let text = text.trim().trim_end_matches('h').trim();
    let (hours, minutes) = match text.split_once([':', '.']) {
        Some(parts) => parts,
        None if text.len() == 4 => text.split_at_checked(2)?,
        None => (text, "0"),
    };
    let (hours, minutes) = (hours.parse::<u16>().ok()?, minutes.parse::<u16>().ok()?);
    if minutes > 59 { None } else { TimeOfDay::from_minutes(hours.checked_mul(60)?.checked_add(minutes)?) }
}

/// Windows as they are typed; empty for all day.
pub fn typed(windows: &[Window]) -> String {
    if windows == [Window::ALL_DAY] {
        return String::new();
    }
    windows.iter().map(|window| format!("{}-{}", window.from, window.to)).collect::<Vec<_>>().join(", ")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn times_are_read_as_people_type_them_and_written_back() {
        for (text, expected) in [
            ("18-23", "18:00-23:00"),
            ("18:30 to 23, 5.15–7", "18:30-23:00, 05:15-07:00"),
            ("2200-0600", "22:00-06:00"),
            ("0-24", ""),
            ("", ""),
        ] {
            assert_eq!(read(text).map(|windows| typed(&windows)), Ok(expected.to_owned()), "{text}");
        }
        for text in ["18", "18-18", "25-26", "18:75-20", "evening", "24-3"] {
            assert!(read(text).is_err(), "{text}");
        }
    }
}
