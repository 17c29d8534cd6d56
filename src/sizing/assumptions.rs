//! Every factor that someone might argue with: default, unit, limits, source.
//!
//! A firm may set its own and a job may override one; the sheet prints all of them and says which
//! were changed. No formula elsewhere holds a bare number of this kind.

use super::sheet::Checked;
use super::survey::Chemistry;
use super::tables::chemistries;

/// What is known about one factor, beside its value.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct About {
    /// Its name in survey files; ends in its unit, or is a share or a plain factor.
    pub key: &'static str,
    /// What it is, in the trade's words.
    pub name: &'static str,
    /// Its unit; empty for a share or a factor.
    pub unit: &'static str,
    /// Lowest value that may be set.
    pub lowest: f64,
    /// Highest value that may be set.
    pub highest: f64,
    /// Where the default comes from.
    pub source: &'static str,
    /// Whether anyone has seen that page.
    pub checked: Checked,
}

/// One factor with its value and its default.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Entry {
    /// What is known about it.
    pub about: &'static About,
    /// The value in force.
    pub value: f64,
    /// The value that holds when nobody says otherwise.
    pub default: f64,
}

/// Why a factor could not be set.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum Refused {
    /// No factor has this name.
    #[error("there is no assumption of this name")]
    Unknown,
    /// The value is outside the factor's limits.
    #[error("give {lowest} to {highest}")]
    OutOfRange {
        /// Lowest value that may be set.
        lowest: f64,
        /// Highest value that may be set.
        highest: f64,
    },
}

/// Declares the factors once: field, default (a function of the chemistry), and what is known of each.
macro_rules! assumptions {
    ($($(#[$doc:meta])* $key:ident = $default:expr, $name:literal, $unit:literal, $lowest:literal..=$highest:literal, $source:literal, $checked:ident;)*) => {
        /// The factors in force for one design.
        #[derive(Clone, Debug, PartialEq)]
        pub struct Assumptions {
            chemistry: Chemistry,
            $($(#[$doc])* pub $key: f64,)*
        }

        const ABOUT: &[About] = &[$(About {
            key: stringify!($key), name: $name, unit: $unit, lowest: $lowest, highest: $highest,
            source: $source, checked: Checked::$checked,
        },)*];

        impl Assumptions {
            /// The defaults for a kind of battery.
            pub fn defaults(chemistry: Chemistry) -> Self {
                let of_chemistry = chemistries::properties(chemistry);
                Self { chemistry, $($key: $default(of_chemistry),)* }
            }

            /// All factors, in the order of the sheet.
            pub fn entries(&self) -> Vec<Entry> {
                let defaults = Self::defaults(self.chemistry);
                let values = [$((self.$key, defaults.$key),)*];
                ABOUT.iter().zip(values).map(|(about, (value, default))| Entry { about, value, default }).collect()
            }

            /// Sets one factor by its name.
            pub fn set(&mut self, key: &str, value: f64) -> Result<(), Refused> {
                let about = ABOUT.iter().find(|about| about.key == key).ok_or(Refused::Unknown)?;
                if !(about.lowest..=about.highest).contains(&value) {
                    return Err(Refused::OutOfRange { lowest: about.lowest, highest: about.highest });
                }
                match key {
                    $(stringify!($key) => self.$key = value,)*
                    _ => return Err(Refused::Unknown),
                }
                Ok(())
            }
        }
    };
}

use chemistries::Properties;

assumptions! {
    /// Spare share of the inverter's rating over the peak running load.
    inverter_margin = |_: &Properties| 0.25, "Inverter margin over running load", "", 0.0..=2.0,
        "20 to 25 % over the derated running load", CommonPractice;
    /// Rating power factor of an inverter whose plate gives VA only.
    inverter_rating_power_factor = |_: &Properties| 0.8, "Rating power factor of the inverter", "", 0.5..=1.0,
        "0.7 to 0.8 for older units, 1.0 for newer ones", CommonPractice;
    /// Largest start over the VA rating that a trade-size unit holds.
    inverter_surge_multiple = |_: &Properties| 2.0, "Surge the inverter bears, over its rating", "", 1.0..=6.0,
        "iron-core 50 Hz units hold 2 to 3 times, high-frequency units 1.5 to 2 times", CommonPractice;
    /// How long the unit holds that surge.
    inverter_surge_s = |_: &Properties| 5.0, "Time the inverter holds its surge", "s", 0.01..=60.0,
        "several seconds for iron-core units", CommonPractice;
    /// No-load draw over the rating.
    loss_no_load = |_: &Properties| 0.013, "No-load loss, per unit of rating", "", 0.0..=0.2,
        "fit to measured battery inverters of 24 and 48 V, open test data of a US energy commission", Read;
    /// Loss in proportion to the load.
    loss_linear = |_: &Properties| 0.0, "Linear loss, per unit of load", "", 0.0..=0.3,
        "fit to measured battery inverters of 24 and 48 V, open test data of a US energy commission", Read;
    /// Loss by the square of the load.
    loss_quadratic = |_: &Properties| 0.121, "Quadratic loss at rated load", "", 0.0..=0.5,
        "fit to measured battery inverters of 24 and 48 V, open test data of a US energy commission", Read;
    /// No-load draw of a small 12 V unit, over the rating.
    small_loss_no_load = |_: &Properties| 0.025, "No-load loss of a small 12 V unit, per unit of rating", "", 0.0..=0.2,
        "about 1 A at 12 V for a small unit", CommonPractice;
    /// Linear loss of a small 12 V unit.
    small_loss_linear = |_: &Properties| 0.020, "Linear loss of a small 12 V unit, per unit of load", "", 0.0..=0.3,
        "estimate; full load falls into the lowest band of India's star label (83 to 85 %)", CommonPractice;
    /// Quadratic loss of a small 12 V unit.
    small_loss_quadratic = |_: &Properties| 0.140, "Quadratic loss of a small 12 V unit at rated load", "", 0.0..=0.5,
        "estimate; full load falls into the lowest band of India's star label (83 to 85 %)", CommonPractice;
    /// Rating lost per kelvin above the base.
    derating_per_k = |_: &Properties| 0.01, "Inverter rating lost per kelvin above 40 °C", "", 0.0..=0.1,
        "air-cooled drives: 1 % per kelvin from 40 to 50 °C", Read;
    /// Temperature up to which the full rating holds.
    derating_from_c = |_: &Properties| 40.0, "Temperature up to which the inverter gives its rating", "°C", 20.0..=60.0,
        "air-cooled drives: 1 % per kelvin from 40 to 50 °C", Read;
    /// Rating lost per 100 m above 1000 m.
    derating_per_100_m = |_: &Properties| 0.01, "Inverter rating lost per 100 m above 1000 m", "", 0.0..=0.05,
        "air-cooled drives: 1 % per 100 m above 1000 m", Read;
    /// Rating that heat and height leave at least.
    derating_least = |_: &Properties| 0.5, "Least share of the rating that heat and height leave", "", 0.1..=1.0,
        "beyond half the rating the rule no longer holds", OurRule;
    /// What a square wave leaves of a start.
    square_wave_surge_share = |_: &Properties| 0.8, "Share of a motor's start that a square wave leaves", "", 0.3..=1.0,
        "harmonic current makes heat and no torque; a fifth is our margin for it", OurRule;
    /// Share of the bank's energy that the unit may take for itself without a note.
    no_load_share_note = |_: &Properties| 0.2, "Share of the energy that the unit may draw for itself", "", 0.0..=1.0,
        "15 to 30 W over a night are a fifth of a small bank", CommonPractice;
    /// Break at changeover of a trade-size unit.
    changeover_ms = |_: &Properties| 10.0, "Break at changeover", "ms", 0.0..=500.0,
        "6 to 10 ms in the narrow setting, 40 to 50 ms in the wide one", CommonPractice;
    /// Break at changeover in the wide mains window.
    changeover_wide_ms = |_: &Properties| 45.0, "Break at changeover in the wide mains window", "ms", 0.0..=500.0,
        "40 to 50 ms in the wide setting", CommonPractice;
    /// Narrow window, lowest supply over nominal.
    narrow_window_low = |_: &Properties| 0.826, "Narrow mains window, lowest over nominal", "", 0.4..=1.0,
        "190 to 250 V at 230 V", CommonPractice;
    /// Narrow window, highest supply over nominal.
    narrow_window_high = |_: &Properties| 1.087, "Narrow mains window, highest over nominal", "", 1.0..=1.5,
        "190 to 250 V at 230 V", CommonPractice;
    /// Wide window, lowest supply over nominal.
    wide_window_low = |_: &Properties| 0.478, "Wide mains window, lowest over nominal", "", 0.3..=1.0,
        "110 to 270 V at 230 V", CommonPractice;
    /// Wide window, highest supply over nominal.
    wide_window_high = |_: &Properties| 1.174, "Wide mains window, highest over nominal", "", 1.0..=1.5,
        "110 to 270 V at 230 V", CommonPractice;
    /// Share of the locked-rotor current below which a motor does not start.
    start_marginal_share = |_: &Properties| 0.75, "Share of the starting current below which a motor will not start", "", 0.5..=1.0,
        "sag to 75 % leaves 56 % of the torque", Derived;
    /// Power factor while a motor starts.
    start_power_factor = |_: &Properties| 0.7, "Power factor during a motor's start", "", 0.2..=1.0,
        "0.6 to 0.8 for split-phase and capacitor-start motors", CommonPractice;
    /// Current up to which one battery cable is good practice.
    bus_current_target_a = |_: &Properties| 100.0, "Battery current aimed at", "A", 20.0..=400.0,
        "one practical cable, fuse and lug", CommonPractice;
    /// Current that one battery cable must never exceed.
    bus_current_limit_a = |_: &Properties| 150.0, "Battery current never to be exceeded per cable", "A", 20.0..=600.0,
        "one practical cable, fuse and lug", CommonPractice;
    /// Share of the bank that a cut may take.
    depth_of_discharge_max = |c: &Properties| c.depth_of_discharge_max, "Depth of discharge allowed", "", 0.05..=1.0,
        "makers' user manuals; about half for daily lead-acid, 0.8 for lithium iron phosphate", Read;
    /// Peukert's exponent where the data sheet gives fewer than two ratings.
    peukert_exponent = |c: &Properties| c.peukert, "Peukert's exponent where the data sheet gives fewer than two ratings", "", 1.0..=1.6,
        "battery monitor's manual and makers' data sheets, by kind; tubular and lithium from memory", Read;
    /// Bank size for its last year over the size for its first.
    ageing_factor = |_: &Properties| 1.25, "Ageing factor", "", 1.0..=2.0,
        "IEEE 485: 1/0.8, end of life at 80 % of rated capacity", FromMemory;
    /// Spare share of the bank.
    bank_margin = |_: &Properties| 1.10, "Design margin of the bank", "", 1.0..=2.0,
        "IEEE 485: 1.10 to 1.15", FromMemory;
    /// Volts per cell at which the unit stops.
    cut_off_v_per_cell = |c: &Properties| c.cut_off.0, "Low-voltage cut-off, per cell", "V", 1.5..=3.3,
        "1.75 V a cell is the usual sizing value for lead-acid", Read;
    /// Resistance of an aged cell over that of a new one.
    aged_resistance_multiple = |c: &Properties| c.resistance_multiple_end_of_life, "Resistance of an aged cell over a new one", "", 1.0..=5.0,
        "valve-regulated practice: look into it at +25 to +50 %", FromMemory;
    /// Strings of blocks in parallel above which a lead-acid bank is doubtful.
    strings_warn = |c: &Properties| f64::from(c.strings_warn), "Strings in parallel that are still good practice", "", 1.0..=16.0,
        "battery makers' manuals: 3 at most", Read;
    /// Strings of blocks in parallel that are never exceeded.
    strings_stop = |c: &Properties| f64::from(c.strings_stop), "Strings in parallel never to be exceeded", "", 1.0..=16.0,
        "battery makers' manuals: 4 at most", Read;
    /// Battery charge put back over charge taken.
    charge_factor = |c: &Properties| c.charge_factor, "Charge put back over charge taken", "", 1.0..=1.5,
        "makers' charging notes: 1.02 to 1.20 by kind", CommonPractice;
    /// Least charging current over the 20 h capacity.
    charge_current_least_a_per_ah = |c: &Properties| c.charge_current.least, "Least charging current over the 20 h capacity", "A/Ah", 0.01..=1.0,
        "makers' manuals: 0.05 to 0.10 by kind", Read;
    /// Most charging current over the 20 h capacity.
    charge_current_most_a_per_ah = |c: &Properties| c.charge_current.most, "Most charging current over the 20 h capacity", "A/Ah", 0.05..=2.0,
        "makers' manuals and data sheets: 0.2 to 0.5 by kind", Read;
    /// Absorption volts per cell at 25 °C.
    absorption_v_per_cell = |c: &Properties| c.set_volts.absorption.0, "Absorption volts per cell at 25 °C", "V", 2.2..=3.7,
        "makers' data sheets and manuals, by kind", Read;
    /// Float volts per cell at 25 °C.
    float_v_per_cell = |c: &Properties| c.set_volts.float.0, "Float volts per cell at 25 °C", "V", 2.1..=3.6,
        "makers' data sheets and manuals, by kind", Read;
    /// Change of the set volts per kelvin and cell.
    compensation_mv_per_k = |c: &Properties| c.set_volts.compensation_mv_per_k, "Change of the set volts per kelvin and cell", "mV/K", -8.0..=0.0,
        "makers' manuals: -3 to -5 for lead-acid; none for lithium", Read;
    /// Efficiency of the charger.
    charger_efficiency = |_: &Properties| 0.85, "Efficiency of the charger", "", 0.5..=1.0,
        "chargers built into home units", CommonPractice;
    /// Power factor of the charger's input.
    charger_power_factor = |_: &Properties| 0.8, "Power factor of the charger's input", "", 0.4..=1.0,
        "phase-controlled chargers built into home units", CommonPractice;
    /// How long the unit waits after the mains is back before it takes it.
    requalification_s = |_: &Properties| 30.0, "Wait after the mains is back before the unit takes it", "s", 0.0..=900.0,
        "units' manuals: 3 to 30 s; the longest is taken", Read;
    /// Time by which an announced cut runs over its end.
    block_overrun_h = |_: &Properties| 0.5, "Time by which an announced cut runs over its end", "h", 0.0..=4.0,
        "up to half an hour of switching in a published scheme", FromMemory;
    /// Current at which the absorption ends, over the 20 h capacity.
    absorption_ends_a_per_ah = |_: &Properties| 0.02, "Charging current at which the bank counts as full, over the 20 h capacity", "A/Ah", 0.001..=0.1,
        "makers' charging notes: 2 to 3 % of the 20 h capacity", Read;
    /// Battery cable drop aimed at.
    dc_drop_target = |_: &Properties| 0.02, "Voltage drop aimed at on battery cables", "", 0.002..=0.1,
        "no single international figure; 2 % is our target", OurRule;
    /// Battery cable drop that raises a warning.
    dc_drop_warn = |_: &Properties| 0.03, "Voltage drop on battery cables that is doubtful", "", 0.002..=0.1,
        "no single international figure; 3 % after small-craft practice", OurRule;
    /// Battery cable drop that is refused.
    dc_drop_limit = |_: &Properties| 0.05, "Voltage drop on battery cables never to be exceeded", "", 0.002..=0.2,
        "no single international figure; 5 % of nominal", OurRule;
    /// Drop on the unit's battery cable while the hardest motor starts.
    dc_surge_drop_limit = |_: &Properties| 0.05, "Voltage drop allowed on the battery cable while a motor starts", "", 0.005..=0.3,
        "a thin lead must not pull the unit below its cut-off; 5 % of nominal is our limit", OurRule;
    /// Supply cable drop allowed.
    ac_drop_limit = |_: &Properties| 0.03, "Voltage drop allowed on cables to the board and the mains", "", 0.002..=0.1,
        "IEC 60364-5-52 Annex G: 3 % for lighting from a public supply", Read;
    /// Circuits that lie together in one conduit or bundle.
    grouped_circuits = |_: &Properties| 1.0, "Circuits that lie together", "", 1.0..=20.0,
        "as found on site; one if nothing is said", OurRule;
    /// Time a protective device may take to break a fault.
    fault_clearing_s = |_: &Properties| 0.1, "Time in which a fuse or breaker clears a fault", "s", 0.001..=5.0,
        "below 0.1 s the device's let-through energy rules", Read;
    /// By how much one string's resistance may fall below the others'.
    string_resistance_spread = |_: &Properties| 0.05, "Spread of resistance between parallel strings", "", 0.0..=0.5,
        "blocks of one batch, leads of equal length, size and lug to one busbar", OurRule;
    /// Short-circuit current of a lead-acid battery over its capacity, for breaking capacity.
    fault_current_per_ah = |_: &Properties| 20.0, "Short-circuit current of lead-acid over its capacity, upper bound", "A/Ah", 2.0..=60.0,
        "a switchgear maker's note on DC distribution: near 10, always under 20", Read;
    /// Short-circuit current at the mains terminals.
    supply_fault_current_ka = |_: &Properties| 6.0, "Prospective fault current of the mains", "kA", 0.5..=50.0,
        "usual breaking capacity of house breakers; ask the distributor", CommonPractice;
    /// Years on float at 25 °C.
    calendar_life_years = |c: &Properties| c.calendar_life.0, "Life on float at 25 °C", "years", 1.0..=30.0,
        "glass mat: maker's data sheet, 6 to 8 years; the other kinds from memory", FromMemory;
    /// Life lost by heat: kelvin that halve it.
    life_halving_k = |c: &Properties| c.life_halving_step.0, "Heat that halves a battery's calendar life", "K", 5.0..=30.0,
        "a maker's support article: half the life per 10 K above 25 °C", Read;
}
