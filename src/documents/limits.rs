//! The range of every number of a survey, alike for files and for forms.

/// Lowest and highest of one number.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Limit {
    /// Lowest that is taken.
    pub lowest: f64,
    /// Highest that is taken.
    pub highest: f64,
    /// Its unit; empty for a share, a factor or a count.
    pub unit: &'static str,
    /// Whether only whole numbers are taken.
    pub whole: bool,
}

impl Limit {
    const fn new(lowest: f64, highest: f64, unit: &'static str) -> Self {
        Self { lowest, highest, unit, whole: false }
    }

    const fn whole(lowest: f64, highest: f64) -> Self {
        Self { lowest, highest, unit: "", whole: true }
    }

    /// The number itself, or what to give instead. Negative zero is zero; NaN is outside every range.
    pub fn check(&self, value: f64) -> Result<f64, String> {
        let fits = (self.lowest..=self.highest).contains(&value) && (!self.whole || value.fract() == 0.0);
        if fits { Ok(value + 0.0) } else { Err(self.told()) }
    }

    /// What to give: "give 0.1 to 100,000".
    pub fn told(&self) -> String {
        let what = if self.whole { "give a whole number from" } else { "give" };
        format!("{what} {} to {}", grouped(self.lowest), grouped(self.highest))
    }
}

/// A plain number with commas between groups of three digits.
pub fn grouped(value: f64) -> String {
    let text = value.to_string();
    let (sign, digits) = text.strip_prefix('-').map_or(("", text.as_str()), |digits| ("-", digits));
    let (whole, rest) = digits.find('.').map_or((digits, ""), |point| digits.split_at(point));
    let mut groups = String::new();
    for (at, digit) in whole.chars().enumerate() {
        if at > 0 && (whole.len() - at).is_multiple_of(3) {
            groups.push(',');
        }
        groups.push(digit);
    }
    format!("{sign}{groups}{rest}")
}

/// Most loads in a survey.
pub const LOADS: usize = 200;
/// Most windows of one load.
pub const WINDOWS: usize = 12;
/// Most data-sheet ratings of a battery.
pub const RATINGS: usize = 4;
/// Most characters of a name.
pub const NAME: usize = 120;
/// Most bytes of a survey file.
pub const FILE_BYTES: usize = 1_000_000;

/// Nominal supply.
pub const SUPPLY_V: Limit = Limit::new(90.0, 260.0, "V");
/// Nominal frequency.
pub const FREQUENCY_HZ: Limit = Limit::new(45.0, 65.0, "Hz");
/// Supply as seen at the site.
pub const SUPPLY_SEEN_V: Limit = Limit::new(0.0, 500.0, "V");
/// Temperature of a place.
pub const TEMPERATURE_C: Limit = Limit::new(-40.0, 70.0, "°C");
/// Height above the sea.
pub const ALTITUDE_M: Limit = Limit::new(-450.0, 6000.0, "m");
/// Breaker that feeds the unit.
pub const BREAKER_A: Limit = Limit::new(1.0, 1000.0, "A");
/// Time asked for.
pub const AUTONOMY_H: Limit = Limit::new(0.25, 168.0, "h");
/// Cuts in a week.
pub const CUTS_PER_WEEK: Limit = Limit::new(0.0, 168.0, "");
/// Mains between cuts.
pub const MAINS_BETWEEN_CUTS_H: Limit = Limit::new(0.0, 8784.0, "h");
/// Usual or longest cut.
pub const CUT_H: Limit = Limit::new(0.05, 168.0, "h");
/// By how much announced blocks move on each day.
pub const BLOCKS_SHIFT_H: Limit = Limit::new(0.0, 23.0, "h");
/// Hours of a day in which the mains is outside the unit's window.
pub const LOW_VOLTAGE_H: Limit = Limit::new(0.0, 24.0, "h");
/// How many of one load.
pub const QUANTITY: Limit = Limit::whole(1.0, 1000.0);
/// Input of one load.
pub const RUNNING_W: Limit = Limit::new(0.1, 100_000.0, "W");
/// True power factor.
pub const POWER_FACTOR: Limit = Limit::new(0.05, 1.0, "");
/// Starting VA over running VA.
pub const SURGE_MULTIPLE: Limit = Limit::new(1.0, 20.0, "");
/// Length of a start.
pub const SURGE_S: Limit = Limit::new(0.0, 120.0, "s");
/// Share of the windows in which a load works.
pub const DUTY: Limit = Limit::new(0.001, 1.0, "");
/// Longest break a load rides through.
pub const MAX_BREAK_MS: Limit = Limit::new(0.0, 86_400_000.0, "ms");
/// Locked-rotor current on a plate.
pub const LOCKED_ROTOR_A: Limit = Limit::new(0.1, 2000.0, "A");
/// Shaft power on a plate.
pub const SHAFT_HP: Limit = Limit::new(0.02, 50.0, "hp");
/// One-way length of a cable.
pub const LENGTH_M: Limit = Limit::new(0.1, 500.0, "m");
/// Rate of a battery rating.
pub const RATING_HOURS: Limit = Limit::new(0.1, 240.0, "h");
/// Capacity of one battery block.
pub const RATING_AH: Limit = Limit::new(0.5, 5000.0, "Ah");
/// Rating of a unit that is there.
pub const REUSE_VA: Limit = Limit::new(50.0, 50_000.0, "VA");
/// Real power of a unit that is there.
pub const REUSE_W: Limit = Limit::new(50.0, 50_000.0, "W");
/// Largest start of a unit that is there.
pub const REUSE_SURGE_VA: Limit = Limit::new(50.0, 300_000.0, "VA");
/// Break at changeover of a unit that is there.
pub const CHANGEOVER_MS: Limit = Limit::new(0.0, 10_000.0, "ms");
/// Any finite number; the assumption of that name holds its own limits.
pub const ANY: Limit = Limit::new(-1e9, 1e9, "");
