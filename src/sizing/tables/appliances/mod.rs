//! Common loads, ready for the count-off sheet: starting points for the form.
//!
//! What is read on a plate or with a clamp meter always wins. Watts are the electrical input while
//! the load really works; the start counts only what lasts longer than half a cycle.

use crate::sizing::sheet::Checked;
use crate::sizing::survey::{LifeSupport, Load, NeedsSine, StartKind, Window};
use crate::units::{Fraction, Milliseconds, Seconds, Watts};

mod sources;

/// One common load.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Appliance {
    /// Its name in addresses and forms; never changes.
    pub key: &'static str,
    /// Its name as people say it.
    pub name: &'static str,
    /// Where it stands on the count-off sheet.
    pub group: Group,
    /// Electrical input of one while it really works.
    pub running: Watts,
    /// True power factor.
    pub power_factor: Fraction,
    /// What happens when it is switched on.
    pub start: StartKind,
    /// Starting VA over running VA.
    pub surge_multiple: f64,
    /// How long the start lasts.
    pub surge_lasts: Seconds,
    /// Share of its time in which it really works.
    pub duty: Fraction,
    /// Whether it bears a square wave.
    pub needs_sine: NeedsSine,
    /// Longest break it rides through: 20 ms is the ITI curve's point at no volts; the others are inferred.
    pub max_break: Milliseconds,
    /// Whether a life or a product hangs on it.
    pub life_support: LifeSupport,
    /// Where the running watts come from.
    pub source: &'static str,
    /// Whether anyone has seen that page; starts and breaks are from memory throughout.
    pub checked: Checked,
    /// Shape of its current: what its crest does to the unit.
    pub current: &'static str,
    /// A few words for the person who counts; may be empty.
    pub hint: &'static str,
}

/// A part of the count-off sheet.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
#[allow(missing_docs, reason = "the names say it")]
pub enum Group {
    LightAndFans,
    Kitchen,
    Room,
    Water,
    WorkAndShop,
    Computers,
    Washing,
    Security,
    Medical,
}

impl Group {
    /// Every part, in the order of the sheet.
    pub const ALL: [Self; 9] = [
        Self::LightAndFans,
        Self::Kitchen,
        Self::Room,
        Self::Water,
        Self::WorkAndShop,
        Self::Computers,
        Self::Washing,
        Self::Security,
        Self::Medical,
    ];

    /// Its heading.
    pub const fn name(self) -> &'static str {
        match self {
            Self::LightAndFans => "Light and fans",
            Self::Kitchen => "Kitchen",
            Self::Room => "Room",
            Self::Water => "Water",
            Self::WorkAndShop => "Work and shop",
            Self::Computers => "Computers and phones",
            Self::Washing => "Washing and care",
            Self::Security => "Doors and guard",
            Self::Medical => "Medical",
        }
    }
}

/// Makes a list out of rows; each list's head says what stands in a row.
macro_rules! appliances {
    ($($key:literal = $name:literal, $group:ident,
       $watts:literal, $power_factor:literal, $start:ident, $multiple:literal, $seconds:literal, $duty:literal,
       $sine:ident, $break_ms:literal, $life:ident,
       $source:ident, $checked:ident, $current:ident, $hint:literal;)*) => {
        /// The list.
        pub(super) const LIST: &[super::Appliance] = &[$(super::Appliance {
            key: $key,
            name: $name,
            group: super::Group::$group,
            running: super::Watts($watts),
            power_factor: super::Fraction::constant($power_factor),
            start: super::StartKind::$start,
            surge_multiple: $multiple,
            surge_lasts: super::Seconds($seconds),
            duty: super::Fraction::constant($duty),
            needs_sine: super::NeedsSine::$sine,
            max_break: super::Milliseconds($break_ms),
            life_support: super::LifeSupport::$life,
            source: $source,
            checked: super::Checked::$checked,
            current: $current,
            hint: $hint,
        },)*];
    };
}

mod home;
mod kitchen_and_water;
mod work_and_care;

/// All common loads, group by group.
pub fn all() -> impl Iterator<Item = &'static Appliance> {
    [home::LIST, kitchen_and_water::LIST, work_and_care::LIST].into_iter().flatten()
}

/// Those of one part of the sheet, in its order.
pub fn of_group(group: Group) -> impl Iterator<Item = &'static Appliance> {
    all().filter(move |appliance| appliance.group == group)
}

/// The common load of that key.
pub fn by_key(key: &str) -> Option<&'static Appliance> {
    all().find(|appliance| appliance.key == key)
}

impl Appliance {
    /// A line of the stay-on list: so many of it, on all day, all together.
    ///
    /// None is none: a quantity of zero still makes a line of one, since a line without a load is no line.
    pub fn load(&self, quantity: u32) -> Load {
        let quantity = quantity.max(1);
        Load {
            name: self.name.to_owned(),
            quantity,
            on_together: quantity,
            running: self.running,
            power_factor: self.power_factor,
            start: self.start,
            surge_multiple: self.surge_multiple,
            surge_lasts: self.surge_lasts,
            motor_plate: None,
            duty: self.duty,
            windows: vec![Window::ALL_DAY],
            turn: None,
            needs_sine: self.needs_sine,
            max_break: self.max_break,
            life_support: self.life_support,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::collections::HashSet;

    #[test]
    fn each_load_stands_once_and_is_found_by_its_key() {
        let keys: HashSet<_> = all().map(|appliance| appliance.key).collect();
        let names: HashSet<_> = all().map(|appliance| appliance.name).collect();
        assert_eq!((keys.len(), names.len(), all().count()), (118, 118, 118));
        assert!(all().all(|appliance| by_key(appliance.key) == Some(appliance)));
        assert_eq!(by_key("no_such_load"), None);
    }

    #[test]
    fn the_groups_hold_every_load() {
        let grouped: usize = Group::ALL.into_iter().map(|group| of_group(group).count()).sum();
        assert_eq!(grouped, all().count());
        assert!(Group::ALL.into_iter().all(|group| of_group(group).next().is_some()));
    }

    #[test]
    fn every_figure_is_within_what_a_survey_may_hold() {
        for appliance in all() {
            let key = appliance.key;
            assert!((0.1..=100_000.0).contains(&appliance.running.0), "{key}");
            assert!(appliance.power_factor.get() >= 0.4, "{key}");
            assert!((1.0..=10.0).contains(&appliance.surge_multiple), "{key}");
            assert!((0.0..=60.0).contains(&appliance.surge_lasts.0), "{key}");
            assert!(appliance.duty.get() > 0.0 && appliance.max_break.0 > 0.0, "{key}");
            assert!(!appliance.source.is_empty() && !appliance.current.is_empty(), "{key}");
        }
    }

    #[test]
    fn motors_start_harder_than_they_run_and_for_some_time() {
        for appliance in all().filter(|appliance| appliance.start.is_motor()) {
            assert!(appliance.surge_multiple > 1.0 && appliance.surge_lasts > Seconds::ZERO, "{}", appliance.key);
        }
    }

    #[test]
    fn figures_are_those_of_their_sources() {
        // key, running W, true power factor, where from
        let cases = [
            ("ceiling_fan", 75.0, 0.95, "load table of the Tamil Nadu electricity utility"),
            ("kettle", 1500.0, 1.0, "typical plates, from memory"),
            ("coffee_maker", 1000.0, 1.0, "US Department of Energy: 900 to 1,200 W"),
            ("oxygen_5_l", 350.0, 0.8, "WHO and UNICEF: 70 W for each l/min"),
            ("vacuum_cleaner", 1400.0, 0.92, "measured: true power factor 0.921"),
            ("desktop_pc", 120.0, 0.6, "US Department of Energy; measured true power factor 0.580"),
        ];
        for (key, watts, power_factor, source) in cases {
            let appliance = by_key(key).expect(key);
            assert_eq!((appliance.running.0, appliance.power_factor.get()), (watts, power_factor), "{key}: {source}");
        }
    }

    #[test]
    fn computers_ride_through_no_more_than_the_iti_curve_says() {
        // ITI curve, revised 2000: 20 ms at no volts.
        for appliance in of_group(Group::Computers).filter(|a| !["laptop", "phone_charger"].contains(&a.key)) {
            assert!(appliance.max_break <= Milliseconds(20.0), "{}", appliance.key);
        }
    }

    #[test]
    fn whatever_a_life_hangs_on_wants_a_sine_or_asks_for_care() {
        for appliance in all().filter(|appliance| appliance.life_support == LifeSupport::Yes) {
            assert_eq!((appliance.group, appliance.needs_sine), (Group::Medical, NeedsSine::Yes), "{}", appliance.key);
        }
    }

    #[test]
    fn a_load_made_of_it_carries_its_figures() {
        let load = by_key("freezer_chest").expect("it is listed").load(2);
        assert_eq!((load.name.as_str(), load.quantity, load.on_together), ("Chest freezer", 2, 2));
        assert_eq!((load.running, load.surge_multiple, load.duty.get()), (Watts(150.0), 6.0, 0.45));
        assert_eq!((load.windows, load.motor_plate, load.turn), (vec![Window::ALL_DAY], None, None));
    }
}
