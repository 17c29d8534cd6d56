//! Reading `keeplit-survey-1`: the one form of a survey, on the command line, in a file and in a job.

use serde_json::value::RawValue;
use serde_json::{Value, json};

use super::defaults::{self, usual};
use super::draft::Draft;
use super::fault::Fault;
use super::limits as limit;
use super::read::{Gathered, Object, number_in};
use crate::sizing::assumptions::Assumptions;
use crate::sizing::survey::{
    BatteryRating, BusVolts, Chemistry, Choice, Load, Mostly, MotorPlate, Outage, Pattern, ReusedInverter, Runs, Site,
    StartsAt, Survey, TimeOfDay, Window,
};
use crate::sizing::tables::outages::{self, Region};
use crate::units::{
    AcVolts, AmpHours, Amps, Celsius, DcVolts, Fraction, Hertz, Hours, Metres, Milliseconds, Seconds, VoltAmps, Watts,
};

/// The name of the form; every survey carries it.
pub const FORMAT: &str = "keeplit-survey-1";

/// Reads a whole survey: the draft with its defaults, and the survey itself.
pub fn read(text: &str) -> Result<(Draft, Survey), Vec<Fault>> {
    let (draft, mut faults) = gather(text);
    match draft.complete() {
        Ok(survey) if faults.is_empty() => Ok((draft, survey)),
        Ok(_) => Err(faults),
        Err(missing) => {
            let new: Vec<_> = missing.into_iter().filter(|fault| !is_known(&fault.path, &faults)).collect();
            faults.extend(new);
            Err(faults)
        }
    }
}

/// Whether a fault was told already at this path, within it, or of what holds it.
fn is_known(path: &str, faults: &[Fault]) -> bool {
    faults.iter().any(|fault| fault.path.starts_with(path) || path.starts_with(&fault.path))
}

/// Reads a survey in progress; loads and cut may be missing.
pub fn read_draft(text: &str) -> Result<Draft, Vec<Fault>> {
    let (draft, faults) = gather(text);
    if faults.is_empty() { Ok(draft) } else { Err(faults) }
}

fn gather(text: &str) -> (Draft, Vec<Fault>) {
    let document = match parsed(text) {
        Ok(document) => document,
        Err(fault) => return (Draft::default(), vec![fault]),
    };
    let mut gathered = Gathered::default();
    let mut draft = Object::open("", document, &mut gathered).map(whole).unwrap_or_default();
    draft.defaults_taken = std::mem::take(&mut gathered.defaults);
    (draft, gathered.into_faults())
}

fn parsed(text: &str) -> Result<&RawValue, Fault> {
    // Some editors put a byte order mark before the text.
    let text = text.trim_start_matches('\u{feff}');
    if text.len() > limit::FILE_BYTES {
        return Err(Fault::new("", format!("give at most {} bytes", limit::grouped(limit::FILE_BYTES as f64))));
    }
    if text.trim().is_empty() {
        return Err(Fault::new("", format!("the file is empty: give a survey in the form {FORMAT}")));
    }
    serde_json::from_str(text).map_err(|error| Fault::new("", not_json(text, &error)))
}

/// One line for text that is no JSON; the words NaN and Infinity are the usual cause.
fn not_json(text: &str, error: &serde_json::Error) -> String {
    let (line, column) = (error.line(), error.column());
    let here = text.lines().nth(line.saturating_sub(1)).unwrap_or("");
    let word = ["NaN", "Infinity"].into_iter().find(|word| here.contains(word));
    match word {
        Some(word) => format!("line {line}: {word} is no number: give one in digits"),
        None => format!("line {line}, column {column}: this is not JSON"),
    }
}

fn whole(mut object: Object) -> Draft {
    let format = object.text("format", limit::NAME);
    if format.as_deref() != Some(FORMAT) {
        object.fault("format", format!("give \"{FORMAT}\""));
    }
    let site = inner(&mut object, "site", site);
    let outage = inner(&mut object, "outage", outage);
    let choice = inner(&mut object, "choice", choice);
    let runs = inner(&mut object, "runs", runs);
    let draft = Draft {
        site,
        outage,
        loads: loads(&mut object),
        choice,
        runs,
        battery_ratings: ratings(&mut object),
        reuse: object.raw("reuse").and_then(|value| reuse(value, object.gathered())),
        overrides: overrides(&mut object, choice.chemistry),
        defaults_taken: Vec::new(),
    };
    object.finish();
    draft
}

/// Reads an inner object, or its defaults where it is left out or is no object.
fn inner<T>(object: &mut Object, key: &'static str, read: impl FnOnce(&mut Object) -> T) -> T {
    let path = object.path(key);
    let value = object.given(key);
    let gathered = object.gathered();
    let opened = value.and_then(|value| Object::open(&path, value, gathered));
    let mut inner = match opened {
        Some(inner) => inner,
        None => return read(&mut Object::empty(&path, object.gathered())),
    };
    let answer = read(&mut inner);
    inner.finish();
    answer
}

fn site(o: &mut Object) -> Site {
    let usual = defaults::site();
    let supply = o.number_or("supply_v", limit::SUPPLY_V, usual.supply.0);
    let site = Site {
        name: text_or(o, "name", json!("")).unwrap_or_default(),
        supply: AcVolts(supply),
        frequency: Hertz(o.number_or("frequency_hz", limit::FREQUENCY_HZ, usual.frequency.0)),
        supply_lowest: seen(o, "supply_lowest_v", supply * defaults::LOWEST_OVER_NOMINAL),
        supply_highest: seen(o, "supply_highest_v", supply * defaults::HIGHEST_OVER_NOMINAL),
        battery_coldest: heat(o, "battery_coldest_c", usual.battery_coldest),
        battery_hottest: heat(o, "battery_hottest_c", usual.battery_hottest),
        inverter_ambient: heat(o, "inverter_ambient_c", usual.inverter_ambient),
        altitude: Metres(o.number_or("altitude_m", limit::ALTITUDE_M, usual.altitude.0)),
        incoming_breaker: Amps(o.number_or("incoming_breaker_a", limit::BREAKER_A, usual.incoming_breaker.0)),
        battery_room_vented: o.flag_or("battery_room_vented", usual.battery_room_vented),
    };
    if site.supply_highest < site.supply_lowest {
        o.fault("supply_highest_v", "give no less than supply_lowest_v");
    }
    if site.battery_hottest < site.battery_coldest {
        o.fault("battery_hottest_c", "give no less than battery_coldest_c");
    }
    site
}

/// A text that may be left out; that it was is noted.
fn text_or(o: &mut Object, key: &'static str, usual: Value) -> Option<String> {
    if o.given(key).is_none() {
        return o.default(key, usual, None);
    }
    o.text(key, limit::NAME)
}

fn seen(o: &mut Object, key: &'static str, usual: f64) -> AcVolts {
    AcVolts(o.number_or(key, limit::SUPPLY_SEEN_V, usual))
}

fn heat(o: &mut Object, key: &'static str, usual: Celsius) -> Celsius {
    Celsius(o.number_or(key, limit::TEMPERATURE_C, usual.0))
}

/// `None` until the hours are given.
fn outage(o: &mut Object) -> Option<Outage> {
    let autonomy = o.number("autonomy_h", limit::AUTONOMY_H).map(Hours);
    let starts_at = starts_at(o);
    let cuts_per_week = o.number_or("cuts_per_week", limit::CUTS_PER_WEEK, defaults::CUTS_PER_WEEK);
    let between = defaults::mains_between_cuts(cuts_per_week, autonomy.unwrap_or(Hours::ZERO));
    let mains_between_cuts = Hours(o.number_or("mains_between_cuts_h", limit::MAINS_BETWEEN_CUTS_H, between.0));
    let pattern = pattern(o);
    Some(Outage { autonomy: autonomy?, starts_at, cuts_per_week, mains_between_cuts, pattern })
}

fn pattern(o: &mut Object) -> Pattern {
    let (usual, longest) = (o.number("usual_h", limit::CUT_H), o.number("longest_h", limit::CUT_H));
    if usual.is_some_and(|usual| longest.is_some_and(|longest| longest < usual)) {
        o.fault("longest_h", "give no less than usual_h");
    }
    let entries = o.list("blocks", limit::WINDOWS);
    let blocks = windows_of(o, "blocks", entries);
    Pattern {
        usual: usual.map(Hours),
        longest: longest.map(Hours),
        mostly: o.choice_or("mostly", Mostly::AnyTime),
        blocks,
        blocks_shift: Hours(o.number("blocks_shift_h", limit::BLOCKS_SHIFT_H).unwrap_or(0.0)),
        low_voltage: Hours(o.number("low_voltage_h_per_day", limit::LOW_VOLTAGE_H).unwrap_or(0.0)),
        region: region(o),
    }
}

fn region(o: &mut Object) -> Option<&'static Region> {
    let name = o.text("region", limit::NAME)?;
    let region = outages::region(&name);
    if region.is_none() {
        let names: Vec<_> = outages::REGIONS.iter().map(|region| region.name).collect();
        o.fault("region", format!("give one of {}", names.join(", ")));
    }
    region
}

fn starts_at(o: &mut Object) -> StartsAt {
    match text_or(o, "starts_at", json!("worst")).as_deref() {
        None | Some("worst") => StartsAt::Worst,
        Some(text) => match clock(text).filter(|time| *time < TimeOfDay::END_OF_DAY) {
            Some(time) => StartsAt::At(time),
            None => {
                o.fault("starts_at", "give worst, or a time from 00:00 to 23:59");
                StartsAt::Worst
            }
        },
    }
}

/// `HH:MM`, up to 24:00.
pub fn clock(text: &str) -> Option<TimeOfDay> {
    let (hours, minutes) = text.split_once(':')?;
    let digits = |part: &str| part.len() == 2 && part.bytes().all(|byte| byte.is_ascii_digit());
    if !digits(hours) || !digits(minutes) {
        return None;
    }
    let (hours, minutes) = (hours.parse::<u16>().ok()?, minutes.parse::<u16>().ok()?);
    if minutes > 59 { None } else { TimeOfDay::from_minutes(hours * 60 + minutes) }
}

fn loads(object: &mut Object) -> Vec<Load> {
    let entries = object.list("loads", limit::LOADS);
    let read = |(at, value): (usize, &RawValue)| {
        let mut o = Object::open(&format!("loads[{at}]"), value, object.gathered())?;
        let load = load(&mut o);
        o.finish();
        load
    };
    entries.into_iter().enumerate().filter_map(read).collect()
}

/// `None` without name or watts; every other key is read all the same, so that its faults are told too.
fn load(o: &mut Object) -> Option<Load> {
    let name = required_name(o);
    let running = required(o, "running_w", limit::RUNNING_W);
    let is_whole = name.is_some() && running.is_some();
    let start = o.choice_or("start", defaults::START);
    let usual = usual(start);
    let quantity = o.number_or("quantity", limit::QUANTITY, 1.0);
    let on_together = o.number_or("on_together", limit::QUANTITY, quantity);
    if on_together > quantity {
        o.fault("on_together", "give no more than quantity");
    }
    let load = Load {
        name: name.unwrap_or_default(),
        quantity: quantity as u32,
        on_together: on_together.min(quantity) as u32,
        running: Watts(running.unwrap_or(limit::RUNNING_W.lowest)),
        power_factor: share(o.number_or("power_factor", limit::POWER_FACTOR, usual.power_factor)),
        start,
        surge_multiple: o.number_or("surge_multiple", limit::SURGE_MULTIPLE, usual.surge_multiple),
        surge_lasts: Seconds(o.number_or("surge_s", limit::SURGE_S, usual.surge_s)),
        motor_plate: motor_plate(o),
        duty: share(o.number_or("duty", limit::DUTY, 1.0)),
        windows: windows(o),
        turn: text_or(o, "turn", Value::Null).filter(|turn| !turn.is_empty()),
        needs_sine: o.choice_or("needs_sine", usual.needs_sine),
        max_break: Milliseconds(o.number_or("max_break_ms", limit::MAX_BREAK_MS, usual.max_break_ms)),
        life_support: o.choice_or("life_support", defaults::LIFE_SUPPORT),
    };
    is_whole.then_some(load)
}

fn required_name(o: &mut Object) -> Option<String> {
    let given = o.raw("name").is_some();
    let name = o.text("name", limit::NAME);
    if !given || name.as_deref() == Some("") {
        o.fault("name", "give a name");
    }
    name.filter(|name| !name.is_empty())
}

/// A number that was checked to be a share.
fn share(number: f64) -> Fraction {
    Fraction::new(number).unwrap_or(Fraction::ONE)
}

/// The best of what the plate says: amps, then code letter with horsepower, then horsepower alone.
fn motor_plate(o: &mut Object) -> Option<MotorPlate> {
    let amps = o.number("locked_rotor_a", limit::LOCKED_ROTOR_A);
    let horsepower = o.number("shaft_hp", limit::SHAFT_HP);
    let letter = code_letter(o);
    if letter.is_some() && horsepower.is_none() {
        o.fault("shaft_hp", "is missing: a code letter needs the shaft power");
    }
    match (amps, horsepower, letter) {
        (Some(amps), ..) => Some(MotorPlate::LockedRotor(Amps(amps))),
        (None, Some(horsepower), Some(letter)) => Some(MotorPlate::CodeLetter { horsepower, letter }),
        (None, Some(horsepower), None) => Some(MotorPlate::Horsepower(horsepower)),
        _ => None,
    }
}

fn code_letter(o: &mut Object) -> Option<char> {
    let text = o.text("code_letter", limit::NAME)?;
    let letter = text.chars().next().map(|letter| letter.to_ascii_uppercase());
    let letter = letter.filter(|letter| text.chars().count() == 1 && ('A'..='V').contains(letter));
    let letter = letter.filter(|letter| !['I', 'O', 'Q'].contains(letter));
    if letter.is_none() {
        o.fault("code_letter", "give one letter from A to V, not I, O or Q");
    }
    letter
}

fn windows(o: &mut Object) -> Vec<Window> {
    let entries = o.list("windows", limit::WINDOWS);
    if entries.is_empty() {
        return o.default("windows", json!([["00:00", "24:00"]]), vec![Window::ALL_DAY]);
    }
    windows_of(o, "windows", entries)
}

fn windows_of(o: &mut Object, key: &'static str, entries: Vec<&RawValue>) -> Vec<Window> {
    let read = |(at, value): (usize, &RawValue)| {
        let window = window(value);
        if window.is_none() {
            o.fault_at(key, at, value, "give two different times, as [\"18:00\", \"23:00\"]");
        }
        window
    };
    entries.into_iter().enumerate().filter_map(read).collect()
}

fn window(value: &RawValue) -> Option<Window> {
    let [from, to] = serde_json::from_str::<[String; 2]>(value.get()).ok()?;
    let (from, to) = (clock(&from)?, clock(&to)?);
    (from != to && from != TimeOfDay::END_OF_DAY).then_some(Window { from, to })
}

fn choice(o: &mut Object) -> Choice {
    let usual = defaults::CHOICE;
    Choice {
        chemistry: o.choice_or("chemistry", usual.chemistry),
        bus: bus(o),
        code: o.choice_or("code", usual.code),
        conductor: o.choice_or("conductor", usual.conductor),
        insulation: o.choice_or("insulation", usual.insulation),
        method: o.choice_or("method", usual.method),
        ac_method: o.choice_or("ac_method", usual.ac_method),
        square_wave_offered: o.flag_or("square_wave_offered", usual.square_wave_offered),
    }
}

/// `None` leaves the volts to the engine.
fn bus(o: &mut Object) -> Option<BusVolts> {
    let Some(value) = o.given("bus_v") else { return o.default("bus_v", Value::Null, None) };
    if value.get() == "null" {
        return None;
    }
    let number = value.get().parse::<f64>().map(DcVolts);
    let bus = number.ok().and_then(|volts| BusVolts::ALL.into_iter().find(|bus| bus.volts() == volts));
    if bus.is_none() {
        o.fault("bus_v", "give 12, 24, 48 or null");
    }
    bus
}

fn runs(o: &mut Object) -> Runs {
    let usual = defaults::RUNS;
    let mut length = |key, usual: Metres| Metres(o.number_or(key, limit::LENGTH_M, usual.0));
    Runs {
        bank_to_inverter: length("bank_to_inverter_m", usual.bank_to_inverter),
        string_lead: length("string_lead_m", usual.string_lead),
        inverter_to_board: length("inverter_to_board_m", usual.inverter_to_board),
        mains_to_inverter: length("mains_to_inverter_m", usual.mains_to_inverter),
        charger_to_bank: o.number("charger_to_bank_m", limit::LENGTH_M).map(Metres),
    }
}

fn ratings(object: &mut Object) -> Vec<BatteryRating> {
    if object.given("battery_ratings").is_none() {
        return object.default("battery_ratings", json!([]), Vec::new());
    }
    let entries = object.list("battery_ratings", limit::RATINGS);
    let mut ratings: Vec<BatteryRating> = Vec::new();
    for (at, value) in entries.into_iter().enumerate() {
        let Some(rating) = rating(&format!("battery_ratings[{at}]"), value, object.gathered()) else { continue };
        if ratings.iter().any(|earlier| earlier.hours == rating.hours) {
            object.fault_at("battery_ratings", at, value, "this rate is given twice: give it once");
        }
        ratings.push(rating);
    }
    ratings
}

fn rating(path: &str, value: &RawValue, gathered: &mut Gathered) -> Option<BatteryRating> {
    let mut o = Object::open(path, value, gathered)?;
    let hours = required(&mut o, "hours", limit::RATING_HOURS);
    let capacity = required(&mut o, "ah", limit::RATING_AH);
    o.finish();
    Some(BatteryRating { hours: Hours(hours?), capacity: AmpHours(capacity?) })
}

fn required(o: &mut Object, key: &'static str, limit: limit::Limit) -> Option<f64> {
    if o.raw(key).is_none() {
        o.fault(key, format!("is missing: {}", limit.told()));
    }
    o.number(key, limit)
}

fn reuse(value: &RawValue, gathered: &mut Gathered) -> Option<ReusedInverter> {
    let mut o = Object::open("reuse", value, gathered)?;
    let rating = required(&mut o, "rating_va", limit::REUSE_VA);
    let window = (
        o.number("mains_lowest_v", limit::SUPPLY_SEEN_V).map(AcVolts),
        o.number("mains_highest_v", limit::SUPPLY_SEEN_V).map(AcVolts),
    );
    let unit = ReusedInverter {
        rating: VoltAmps(rating.unwrap_or(limit::REUSE_VA.lowest)),
        rating_w: o.number("rating_w", limit::REUSE_W).map(Watts),
        surge: o.number("surge_va", limit::REUSE_SURGE_VA).map(VoltAmps),
        sine: o.flag_or("sine", true),
        changeover: o.number("changeover_ms", limit::CHANGEOVER_MS).map(Milliseconds),
        mains_window: window.0.zip(window.1),
    };
    if window.0.is_some() != window.1.is_some() || unit.mains_window.is_some_and(|(low, high)| low >= high) {
        o.fault("mains_highest_v", "give both ends of the mains window, the lower one first");
    }
    o.finish();
    rating.map(|_| unit)
}

fn overrides(object: &mut Object, chemistry: Chemistry) -> Vec<(String, f64)> {
    let Some(value) = object.given("assumptions") else { return Vec::new() };
    let Some(mut o) = Object::open("assumptions", value, object.gathered()) else { return Vec::new() };
    let mut assumptions = Assumptions::defaults(chemistry);
    let mut overrides: Vec<(String, f64)> = Vec::new();
    for (key, value) in o.take_all() {
        let number = number_in(value, limit::ANY);
        let set = number.and_then(|number| {
            assumptions.set(&key, number).map_err(|refused| refused.to_string())?;
            Ok(number)
        });
        match set {
            Ok(_) if overrides.iter().any(|(known, _)| *known == key) => o.fault(&key, "is given twice: give it once"),
            Ok(number) => overrides.push((key, number)),
            Err(message) => o.fault(&key, message),
        }
    }
    overrides
}
