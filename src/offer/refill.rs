//! Priced lines against the design's kit: first filling, refilling, and what to point out between.

use super::KitLine;
use crate::quotes::price::PricedLine;

/// What the design has to say about a line that came from it.
#[derive(Clone, Debug, PartialEq)]
pub enum Differs {
    /// The design no longer asks for this part.
    Gone,
    /// The design now asks for something else, or for another quantity.
    Now(KitLine),
}

/// The kit as priced lines; a part that was there with the same words keeps its prices, and lines
/// that the installer added himself stay below.
pub fn refill(lines: &[PricedLine], kit: &[KitLine]) -> Vec<PricedLine> {
    let from_kit = kit.iter().map(|part| {
        let same = lines.iter().find(|line| line.from_design.as_ref() == Some(&part.key) && line.text == part.text);
        PricedLine {
            text: part.text.clone(),
            quantity: part.quantity,
            unit_price: same.and_then(|line| line.unit_price),
            cost: same.and_then(|line| line.cost),
            from_design: Some(part.key.clone()),
        }
    });
    let own = lines.iter().filter(|line| line.from_design.is_none()).cloned();
    from_kit.chain(own).collect()
}

/// What the design says otherwise about a line; nothing about lines of the installer's own.
pub fn differs(line: &PricedLine, kit: &[KitLine]) -> Option<Differs> {
    let key = line.from_design.as_ref()?;
    match kit.iter().find(|part| part.key == *key) {
        None => Some(Differs::Gone),
        Some(part) if part.text == line.text && part.quantity == line.quantity => None,
        Some(part) => Some(Differs::Now(part.clone())),
    }
}

/// Parts of the design for which there is no line.
pub fn missing<'a>(lines: &[PricedLine], kit: &'a [KitLine]) -> Vec<&'a KitLine> {
    let has = |part: &KitLine| lines.iter().any(|line| line.from_design.as_ref() == Some(&part.key));
    kit.iter().filter(|part| !has(part)).collect()
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::money::{Currency, Money};
    use crate::quotes::Quantity;

    fn part(key: &str, text: &str, quantity: f64) -> KitLine {
        KitLine { key: key.into(), text: text.into(), quantity: Quantity::nearest(quantity) }
    }

    fn line(key: Option<&str>, text: &str, minor: i64) -> PricedLine {
        let price = Money { minor, currency: Currency::new("EUR").unwrap() };
        PricedLine {
            text: text.into(),
            quantity: Quantity::nearest(1.0),
            unit_price: Some(price),
            cost: None,
            from_design: key.map(str::to_owned),
        }
    }

    #[test]
    fn a_part_that_stays_the_same_keeps_its_price_and_another_one_does_not() {
        let lines = [line(Some("battery"), "Battery 150", 200), line(Some("inverter"), "Inverter 1", 900)];
        let filled = refill(&lines, &[part("battery", "Battery 150", 4.0), part("inverter", "Inverter 2", 1.0)]);
        assert_eq!(filled[0].unit_price, lines[0].unit_price);
        assert_eq!(filled[0].quantity, Quantity::nearest(4.0));
        assert_eq!((filled[1].text.as_str(), filled[1].unit_price), ("Inverter 2", None));
    }

    #[test]
    fn lines_of_the_installers_own_stay() {
        let own = line(None, "Earth rod", 50);
        assert_eq!(refill(std::slice::from_ref(&own), &[]), [own]);
    }

    #[test]
    fn what_the_design_says_otherwise_is_told_per_line() {
        let kit = [part("battery", "Battery 150", 1.0), part("fuse", "Fuse", 1.0)];
        assert_eq!(differs(&line(Some("battery"), "Battery 150", 1), &kit), None);
        assert_eq!(differs(&line(Some("battery"), "Battery 100", 1), &kit), Some(Differs::Now(kit[0].clone())));
        assert_eq!(differs(&line(Some("links"), "Links", 1), &kit), Some(Differs::Gone));
        assert_eq!(differs(&line(None, "Earth rod", 1), &kit), None);
        assert_eq!(missing(&[line(Some("battery"), "Anything", 1)], &kit), [&kit[1]]);
    }
}
