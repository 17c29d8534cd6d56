//! One line of the stay-on list as fields, and back.

use serde::Deserialize;

use super::windows;
use crate::documents::defaults::{Usual, usual};
use crate::documents::limits::{self, Limit};
use crate::documents::names::Named;
use crate::reading::{self, Power, PowerUnit, Refusal, Supplied};
use crate::sizing::survey::{LifeSupport, Load, MotorPlate, NeedsSine, Site, StartKind};
use crate::units::{AcVolts, Amps, Fraction, Milliseconds, Seconds};
use crate::web::forms::{Complaints, text};
use crate::wording::{DecimalMark, Numbers};

/// One line as it is typed. What is usual for its kind of start stands as an empty field.
#[derive(Clone, Debug, Default, PartialEq, Eq, Deserialize)]
#[serde(default)]
pub struct Row {
    /// `yes` where it stands on the list already.
    pub kept: String,
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
#[derive(Clone, Copy)]
pub struct Against<'a> {
    /// The site, for amps.
    pub site: &'a Site,
    /// The firm's decimal mark.
    pub mark: DecimalMark,
}

impl Row {
    /// A line as it is stored.
    pub fn of(load: &Load, numbers: Numbers) -> Self {
        let usual = usual(load.start);
        let unless = |value: f64, usual: f64| if value == usual { String::new() } else { numbers.typed(value) };
        let (plate_a, plate_hp, plate_letter) = plate_fields(load.motor_plate, numbers);
        Self {
            kept: "yes".to_owned(),
            name: load.name.clone(),
            quantity: load.quantity.to_string(),
            power: numbers.typed(load.running.0),
            unit: "W".to_owned(),
            when: windows::typed(&load.windows),
            duty: unless(load.duty.get() * 100.0, 100.0),
            together: if load.on_together == load.quantity { String::new() } else { load.on_together.to_string() },
            turn: load.turn.clone().unwrap_or_default(),
            start: load.start.name().to_owned(),
            factor: unless(load.power_factor.get(), usual.power_factor),
            surge: unless(load.surge_multiple, usual.surge_multiple),
            surge_s: unless(load.surge_lasts.0, usual.surge_s),
            plate_a,
            plate_hp,
            plate_letter,
            sine: if load.needs_sine == usual.needs_sine { "" } else { load.needs_sine.name() }.to_owned(),
            rides: unless(load.max_break.0, usual.max_break_ms),
            life: load.life_support.name().to_owned(),
        }
    }

    /// Whether it stands on the list already.
    pub fn is_kept(&self) -> bool {
        !self.kept.is_empty()
    }

    /// Whether the line was taken off: zero of it, or the count emptied. A new line without a count is one.
    pub fn is_off(&self) -> bool {
        let quantity = self.quantity.trim();
        let is_begun = !self.name.trim().is_empty() && !self.power.trim().is_empty();
        quantity == "0" || (quantity.is_empty() && (self.is_kept() || !is_begun))
    }

    /// Whether nothing is typed into it.
    pub fn is_blank(&self) -> bool {
        self.name.trim().is_empty() && self.power.trim().is_empty() && self.quantity.trim().is_empty()
    }

    /// A new line with what it leaves open taken from the common load that its name means.
    ///
    /// A line whose kind was chosen, or that was stored before, stays as it is.
    pub fn filled(&self, numbers: Numbers) -> Self {
        let mut row = self.clone();
        let Some(likely) = reading::likely(&self.name).filter(|_| self.start.is_empty()) else { return row };
        let usual = Self::of(&likely.load(1), numbers);
        for (field, usual) in [
            (&mut row.start, usual.start),
            (&mut row.duty, usual.duty),
            (&mut row.factor, usual.factor),
            (&mut row.surge, usual.surge),
            (&mut row.surge_s, usual.surge_s),
            (&mut row.sine, usual.sine),
            (&mut row.rides, usual.rides),
            (&mut row.life, usual.life),
        ] {
            if field.trim().is_empty() {
                *field = usual;
            }
        }
        row
    }

    /// The kind of start, as chosen.
    pub fn kind(&self) -> StartKind {
        StartKind::named(&self.start).unwrap_or(StartKind::Resistive)
    }

    /// The load; `None` with complaints, each naming the line.
    pub fn read(&self, prefix: &str, against: &Against, complaints: &mut Complaints) -> Option<Load> {
        let start = self.kind();
        let usual = usual(start);
        let called = if self.name.trim().is_empty() { "New line" } else { self.name.trim() };
        let mut fields = Fields { prefix, called, mark: against.mark, complaints };
        let name = fields.name(&self.name);
        let power_factor =
            fields.share("factor", "power factor", &self.factor, limits::POWER_FACTOR, usual.power_factor);
        let supplied = Supplied { supply: against.site.supply, power_factor: power_factor.unwrap_or(Fraction::ONE) };
        let (times, power) = fields.power(&self.power, &self.unit, supplied);
        let quantity = fields.quantity(&self.quantity, times);
        let together = fields.together(&self.together, quantity);
        let (surge_multiple, surge_lasts, max_break) = fields.start(self, &usual);
        let duty = fields.duty(&self.duty);
        let windows = fields.take("when", "when", windows::read(&self.when));
        let turn = fields.take("turn", "takes turns", text(&self.turn, limits::NAME));
        let horsepower = power.as_ref().and_then(|power| power.horsepower);
        let horsepower = horsepower.filter(|power| start.is_motor() && limits::SHAFT_HP.check(*power).is_ok());
        let motor_plate = fields.plate(self, horsepower);
        Some(Load {
            name: name?,
            quantity: quantity?,
            on_together: together?,
            running: power?.running,
            power_factor: power_factor?,
            start,
            surge_multiple: surge_multiple?,
            surge_lasts: Seconds(surge_lasts?),
            motor_plate: motor_plate?,
            duty: duty?,
            windows: windows?,
            turn: turn.filter(|turn| !turn.is_empty()),
            needs_sine: NeedsSine::named(&self.sine).unwrap_or(usual.needs_sine),
            max_break: Milliseconds(max_break?),
            life_support: LifeSupport::named(&self.life).unwrap_or(LifeSupport::No),
        })
    }

    /// How the power was read, where that is not plain from what was typed.
    pub fn echo(&self, against: &Against) -> Option<String> {
        let mark = against.mark;
        let unit = PowerUnit::named(&self.unit).unwrap_or_default();
        let usual = usual(self.kind()).power_factor;
        let factor = reading::plain(&self.factor, mark, limits::POWER_FACTOR).unwrap_or(usual);
        let power_factor = Fraction::new(factor).unwrap_or(Fraction::ONE);
        let supplied = Supplied { supply: against.site.supply, power_factor };
        let (_, typed) = reading::counted(&self.power);
        let power = reading::power(typed, unit, mark, supplied, limits::RUNNING_W).ok()?;
        let is_plain = unit == PowerUnit::Watts && Numbers::new(mark).typed(power.running.0) == self.power.trim();
        if is_plain { self.shaft(&power, mark) } else { Some(power.echo) }
    }

    /// What the plate's shaft power means in watts, where the stored power was made from it.
    fn shaft(&self, power: &Power, mark: DecimalMark) -> Option<String> {
        let horsepower = reading::plain(&self.plate_hp, mark, limits::SHAFT_HP).ok()?;
        let supplied = Supplied { supply: AcVolts::ZERO, power_factor: Fraction::ONE };
        let typed = Numbers::new(mark).typed(horsepower);
        let read = reading::power(&typed, PowerUnit::Horsepower, mark, supplied, limits::RUNNING_W).ok()?;
        ((read.running.0 - power.running.0).abs() < 0.01).then_some(read.echo)
    }
}

fn plate_fields(plate: Option<MotorPlate>, numbers: Numbers) -> (String, String, String) {
    let none = String::new;
    match plate {
        Some(MotorPlate::LockedRotor(current)) => (numbers.typed(current.0), none(), none()),
        Some(MotorPlate::CodeLetter { horsepower, letter }) => (none(), numbers.typed(horsepower), letter.to_string()),
        Some(MotorPlate::Horsepower(horsepower)) => (none(), numbers.typed(horsepower), none()),
        None => (none(), none(), none()),
    }
}

/// The fields of one line: what is wrong with one is told with the line's name.
struct Fields<'a> {
    prefix: &'a str,
    called: &'a str,
    mark: DecimalMark,
    complaints: &'a mut Complaints,
}

impl Fields<'_> {
    fn take<T>(&mut self, name: &str, what: &str, read: Result<T, impl Into<Refusal>>) -> Option<T> {
        self.complaints.take(&format!("{}[{name}]", self.prefix), &format!("{}: {what}", self.called), read)
    }

    fn refuse(&mut self, name: &str, what: &str, message: &str) {
        self.complaints.add(format!("{}[{name}]", self.prefix), format!("{}: {what}", self.called), message);
    }

    /// A number, or the usual one where nothing is typed.
    fn number(&mut self, name: &str, what: &str, typed: &str, limit: Limit, usual: f64) -> Option<f64> {
        let read = if typed.trim().is_empty() { Ok(usual) } else { reading::plain(typed, self.mark, limit) };
        self.take(name, what, read)
    }

    fn share(&mut self, name: &str, what: &str, typed: &str, limit: Limit, usual: f64) -> Option<Fraction> {
        self.number(name, what, typed, limit, usual).and_then(|share| Fraction::new(share).ok())
    }

    fn name(&mut self, typed: &str) -> Option<String> {
        let name = self.take("name", "name", text(typed, limits::NAME))?;
        if name.is_empty() {
            self.refuse("name", "name", "give a name");
        }
        (!name.is_empty()).then_some(name)
    }

    /// How many stand before the power, `2x60W`, and the power of one.
    fn power(&mut self, typed: &str, unit: &str, supplied: Supplied) -> (u32, Option<Power>) {
        let (times, typed) = reading::counted(typed);
        let unit = PowerUnit::named(unit).unwrap_or_default();
        let power = reading::power(typed, unit, self.mark, supplied, limits::RUNNING_W);
        (times, self.take("power", "power", power))
    }

    fn quantity(&mut self, typed: &str, times: u32) -> Option<u32> {
        let quantity = self.number("quantity", "how many", typed, limits::QUANTITY, f64::from(times))? as u32;
        match (quantity, times) {
            (quantity, 1) => Some(quantity),
            (1, times) => self.number("quantity", "how many", &times.to_string(), limits::QUANTITY, 1.0).map(|_| times),
            (quantity, times) if quantity == times => Some(quantity),
            _ => {
                self.refuse("quantity", "how many", "give the count once: here, or before the power");
                None
            }
        }
    }

    fn together(&mut self, typed: &str, quantity: Option<u32>) -> Option<u32> {
        let quantity = quantity?;
        let together = self.number("together", "on together", typed, limits::QUANTITY, f64::from(quantity))? as u32;
        if together > quantity {
            self.refuse("together", "on together", "give no more than there are");
        }
        (together <= quantity).then_some(together)
    }

    /// Start over running, its seconds, and the break that is ridden through.
    fn start(&mut self, row: &Row, usual: &Usual) -> (Option<f64>, Option<f64>, Option<f64>) {
        let (multiple, label) = (usual.surge_multiple, "start over running");
        (
            self.number("surge", label, &row.surge, limits::SURGE_MULTIPLE, multiple),
            self.number("surge_s", "length of the start", &row.surge_s, limits::SURGE_S, usual.surge_s),
            self.number("rides", "break it rides through", &row.rides, limits::MAX_BREAK_MS, usual.max_break_ms),
        )
    }

    fn duty(&mut self, typed: &str) -> Option<Fraction> {
        let duty = if typed.trim().is_empty() { Ok(1.0) } else { reading::percent(typed, self.mark, limits::DUTY) };
        self.take("duty", "share of the time", duty).and_then(|share| Fraction::new(share).ok())
    }

    /// What the plate says; horsepower typed as the power counts too.
    fn plate(&mut self, row: &Row, horsepower_typed: Option<f64>) -> Option<Option<MotorPlate>> {
        let mut number = |name: &str, what: &str, typed: &str, limit| {
            let nothing = typed.trim().is_empty();
            if nothing { Some(None) } else { self.number(name, what, typed, limit, 0.0).map(Some) }
        };
        let current = number("plate_a", "locked-rotor current", &row.plate_a, limits::LOCKED_ROTOR_A)?;
        let horsepower = number("plate_hp", "shaft power", &row.plate_hp, limits::SHAFT_HP)?.or(horsepower_typed);
        let letter = row.plate_letter.trim().to_uppercase();
        let known = letter.len() == 1 && ("A"..="V").contains(&letter.as_str()) && !"IOQ".contains(&letter);
        match (current, horsepower, letter.chars().next()) {
            (Some(current), ..) => Some(Some(MotorPlate::LockedRotor(Amps(current)))),
            (None, Some(horsepower), Some(letter)) if known => {
                Some(Some(MotorPlate::CodeLetter { horsepower, letter }))
            }
            (None, _, Some(_)) => {
                let message = "give one letter from A to V, not I, O or Q, and the shaft power beside it";
                self.refuse("plate_letter", "code letter", message);
                None
            }
            (None, Some(horsepower), None) => Some(Some(MotorPlate::Horsepower(horsepower))),
            (None, None, None) => Some(None),
        }
    }
}
