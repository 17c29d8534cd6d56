//! One line of the stay-on list as fields, and back.

use serde::Deserialize;

use super::windows;
use crate::documents::defaults::usual;
use crate::documents::limits;
use crate::documents::names::Named;
use crate::reading::{self, PowerUnit, Supplied};
use crate::sizing::survey::{LifeSupport, Load, MotorPlate, NeedsSine, Site, StartKind};
use crate::units::{Amps, Fraction, Milliseconds, Seconds};
use crate::web::forms::{Complaints, text};
use crate::wording::{DecimalMark, Numbers};

/// One line as it is typed.
#[derive(Clone, Debug, Default, PartialEq, Eq, Deserialize)]
#[serde(default)]
pub struct Row {
    pub name: String,
    pub quantity: String,
    pub power: String,
    pub unit: String,
    pub when: String,
    pub duty: String,
    pub together: String,
    pub turn: String,
    pub start: String,
    pub factor: String,
    pub surge: String,
    pub surge_s: String,
    pub plate_a: String,
    pub plate_hp: String,
    pub plate_letter: String,
    pub sine: String,
    pub rides: String,
    pub life: String,
}

/// What a line is read against.
pub struct Against<'a> {
    /// The site, for amps.
    pub site: &'a Site,
    /// The firm's decimal mark.
    pub mark: DecimalMark,
}

impl Row {
    /// A line as it is stored.
    pub fn of(load: &Load, numbers: Numbers) -> Self {
        let number = |value: f64| numbers.typed(value);
        let (mut plate_a, mut plate_hp, mut plate_letter) = Default::default();
        match load.motor_plate {
            Some(MotorPlate::LockedRotor(current)) => plate_a = number(current.0),
            Some(MotorPlate::CodeLetter { horsepower, letter }) => {
                (plate_hp, plate_letter) = (number(horsepower), letter.to_string());
            }
            Some(MotorPlate::Horsepower(horsepower)) => plate_hp = number(horsepower),
            None => {}
        }
        Self {
            name: load.name.clone(),
            quantity: load.quantity.to_string(),
            power: number(load.running.0),
            unit: "W".to_owned(),
            when: windows::typed(&load.windows),
            duty: number(load.duty.get() * 100.0),
            together: if load.on_together == load.quantity { String::new() } else { load.on_together.to_string() },
            turn: load.turn.clone().unwrap_or_default(),
            start: load.start.name().to_owned(),
            factor: number(load.power_factor.get()),
            surge: number(load.surge_multiple),
            surge_s: number(load.surge_lasts.0),
            plate_a,
            plate_hp,
            plate_letter,
            sine: load.needs_sine.name().to_owned(),
            rides: number(load.max_break.0),
            life: load.life_support.name().to_owned(),
        }
    }

    /// Whether the line was taken off: no quantity, or zero of it.
    pub fn is_off(&self) -> bool {
        let quantity = self.quantity.trim();
        quantity == "0" || (quantity.is_empty() && (self.name.trim().is_empty() || self.power.trim().is_empty()))
    }

    /// The load; `None` with complaints, each naming the line.
    pub fn read(&self, prefix: &str, against: &Against, complaints: &mut Complaints) -> Option<Load> {
        let mark = against.mark;
        let called = if self.name.trim().is_empty() { "New line".to_owned() } else { self.name.trim().to_owned() };
        let field = |name: &str| format!("{prefix}[{name}]");
        let label = |what: &str| format!("{called}: {what}");
        let start = StartKind::named(&self.start).unwrap_or(StartKind::Resistive);
        let usual = usual(start);
        let mut number = |name: &str, what: &str, typed: &str, limit, usual: f64| {
            let read = if typed.trim().is_empty() { Ok(usual) } else { reading::plain(typed, mark, limit) };
            complaints.take(&field(name), &label(what), read)
        };
        let quantity = number("quantity", "how many", &self.quantity, limits::QUANTITY, 1.0);
        let together = number("together", "on together", &self.together, limits::QUANTITY, quantity.unwrap_or(1.0));
        let factor = number("factor", "power factor", &self.factor, limits::POWER_FACTOR, usual.power_factor);
        let surge = number("surge", "start over running", &self.surge, limits::SURGE_MULTIPLE, usual.surge_multiple);
        let surge_s = number("surge_s", "length of the start", &self.surge_s, limits::SURGE_S, usual.surge_s);
        let rides = number("rides", "break it rides through", &self.rides, limits::MAX_BREAK_MS, usual.max_break_ms);
        let duty = if self.duty.trim().is_empty() { Ok(1.0) } else { reading::percent(&self.duty, mark, limits::DUTY) };
        let duty = complaints.take(&field("duty"), &label("share of the time"), duty);
        let name = complaints.take(&field("name"), "Name", text(&self.name, limits::NAME));
        if name.as_deref() == Some("") {
            complaints.add(field("name"), label("name"), "give a name");
        }
        let share = |number: f64| Fraction::new(number).unwrap_or(Fraction::ONE);
        let unit = PowerUnit::named(&self.unit).unwrap_or_default();
        let power_factor = share(factor.unwrap_or(usual.power_factor));
        let supplied = Supplied { supply: against.site.supply, power_factor };
        let power = reading::power(&self.power, unit, mark, supplied, limits::RUNNING_W);
        let power = complaints.take(&field("power"), &label("power"), power);
        let windows = complaints.take(&field("when"), &label("when"), windows::read(&self.when));
        let turn = complaints.take(&field("turn"), &label("takes turns"), text(&self.turn, limits::NAME));
        let plate = self.plate(prefix, &called, mark, complaints, power.as_ref().and_then(|power| power.horsepower));
        if together > quantity {
            complaints.add(field("together"), label("on together"), "give no more than there are");
        }
        Some(Load {
            name: name.filter(|name| !name.is_empty())?,
            quantity: quantity? as u32,
            on_together: together?.min(quantity?) as u32,
            running: power?.running,
            power_factor,
            start,
            surge_multiple: surge?,
            surge_lasts: Seconds(surge_s?),
            motor_plate: plate?,
            duty: share(duty?),
            windows: windows?,
            turn: turn.filter(|turn| !turn.is_empty()),
            needs_sine: NeedsSine::named(&self.sine).unwrap_or(usual.needs_sine),
            max_break: Milliseconds(rides?),
            life_support: LifeSupport::named(&self.life).unwrap_or(LifeSupport::No),
        })
    }

    /// What the plate says; horsepower typed as the power counts too.
    fn plate(
        &self,
        prefix: &str,
        called: &str,
        mark: DecimalMark,
        complaints: &mut Complaints,
        horsepower_typed: Option<f64>,
    ) -> Option<Option<MotorPlate>> {
        let mut number = |name: &str, what: &str, typed: &str, limit| {
            if typed.trim().is_empty() {
                return Some(None);
            }
            let read = reading::plain(typed, mark, limit);
            complaints.take(&format!("{prefix}[{name}]"), &format!("{called}: {what}"), read).map(Some)
        };
        let current = number("plate_a", "locked-rotor current", &self.plate_a, limits::LOCKED_ROTOR_A)?;
        let horsepower = number("plate_hp", "shaft power", &self.plate_hp, limits::SHAFT_HP)?;
        let motor = StartKind::named(&self.start).is_some_and(StartKind::is_motor);
        let horsepower = horsepower.or(horsepower_typed.filter(|_| motor));
        let letter = self.plate_letter.trim().to_uppercase();
        let known = letter.len() == 1 && ("A"..="V").contains(&letter.as_str()) && !"IOQ".contains(&letter);
        match (current, horsepower, letter.chars().next()) {
            (Some(current), ..) => Some(Some(MotorPlate::LockedRotor(Amps(current)))),
            (None, Some(horsepower), Some(letter)) if known => {
                Some(Some(MotorPlate::CodeLetter { horsepower, letter }))
            }
            (None, _, Some(_)) => {
                let message = "give one letter from A to V, not I, O or Q, and the shaft power beside it";
                complaints.add(format!("{prefix}[plate_letter]"), format!("{called}: code letter"), message);
                None
            }
            (None, Some(horsepower), None) => Some(Some(MotorPlate::Horsepower(horsepower))),
            (None, None, None) => Some(None),
        }
    }
}
