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

/// What most homes and small shops keep on, in the order in which it is offered.
const COMMON: [&str; 30] = [
    "led_bulb_9w",
    "led_tube_20w",
    "ceiling_fan",
    "table_fan",
    "tv_43",
    "set_top_box",
    "router",
    "fibre_terminal",
    "phone_charger",
    "laptop",
    "desktop_pc",
    "monitor",
    "fridge_direct_cool",
    "fridge_frost_free",
    "freezer_chest",
    "glass_door_cooler",
    "microwave",
    "mixer_grinder",
    "rice_cooker",
    "kettle",
    "water_purifier",
    "pump_booster",
    "pump_05hp_surface",
    "washer_front",
    "air_cooler",
    "air_conditioner_1t_variable",
    "camera_recorder",
    "till",
    "receipt_printer",
    "printer_inkjet",
];

/// Those that are offered first.
pub fn common() -> impl Iterator<Item = &'static Appliance> {
    COMMON.into_iter().filter_map(by_key)
}

impl Appliance {
    /// Whether it is one of those that are offered first.
    pub fn is_common(&self) -> bool {
        COMMON.contains(&self.key)
    }

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
mod tests;
