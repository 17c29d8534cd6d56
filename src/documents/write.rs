//! Writing `keeplit-survey-1`: every value stands in it, so that it reads back equal.

use serde_json::{Map, Value, json};

use super::draft::Draft;
use super::names::Named;
use super::survey::FORMAT;
use crate::sizing::survey::{Choice, Load, MotorPlate, Outage, ReusedInverter, Runs, Site, StartsAt, Window};

/// The whole draft.
pub fn document(draft: &Draft) -> Value {
    let mut document = json!({
        "format": FORMAT,
        "site": site(&draft.site),
        "loads": draft.loads.iter().map(load).collect::<Vec<_>>(),
        "choice": choice(&draft.choice),
        "runs": runs(&draft.runs),
        "battery_ratings": draft.battery_ratings.iter()
            .map(|rating| json!({ "hours": rating.hours, "ah": rating.capacity })).collect::<Vec<_>>(),
        "assumptions": draft.overrides.iter().map(|(key, value)| (key.clone(), json!(value))).collect::<Map<_, _>>(),
    });
    if let Some(cut) = &draft.outage {
        document["outage"] = outage(cut);
    }
    if let Some(unit) = &draft.reuse {
        document["reuse"] = reuse(unit);
    }
    document
}

fn site(site: &Site) -> Value {
    json!({
        "name": site.name,
        "supply_v": site.supply,
        "frequency_hz": site.frequency,
        "supply_lowest_v": site.supply_lowest,
        "supply_highest_v": site.supply_highest,
        "battery_coldest_c": site.battery_coldest,
        "battery_hottest_c": site.battery_hottest,
        "inverter_ambient_c": site.inverter_ambient,
        "altitude_m": site.altitude,
        "incoming_breaker_a": site.incoming_breaker,
        "battery_room_vented": site.battery_room_vented,
    })
}

fn outage(outage: &Outage) -> Value {
    let starts_at = match outage.starts_at {
        StartsAt::Worst => "worst".to_owned(),
        StartsAt::At(time) => time.to_string(),
    };
    let pattern = &outage.pattern;
    let mut value = json!({
        "autonomy_h": outage.autonomy,
        "starts_at": starts_at,
        "cuts_per_week": outage.cuts_per_week,
        "mains_between_cuts_h": outage.mains_between_cuts,
        "usual_h": pattern.usual,
        "longest_h": pattern.longest,
        "mostly": pattern.mostly.name(),
        "blocks_shift_h": pattern.blocks_shift,
        "low_voltage_h_per_day": pattern.low_voltage,
        "region": pattern.region.map(|region| region.name),
    });
    if !pattern.blocks.is_empty() {
        value["blocks"] = json!(windows(&pattern.blocks));
    }
    value
}

fn windows(windows: &[Window]) -> Vec<[String; 2]> {
    windows.iter().map(|window| [window.from.to_string(), window.to.to_string()]).collect()
}

fn load(load: &Load) -> Value {
    let mut value = json!({
        "name": load.name,
        "quantity": load.quantity,
        "on_together": load.on_together,
        "running_w": load.running,
        "power_factor": load.power_factor,
        "start": load.start.name(),
        "surge_multiple": load.surge_multiple,
        "surge_s": load.surge_lasts,
        "duty": load.duty,
        "windows": windows(&load.windows),
        "turn": load.turn,
        "needs_sine": load.needs_sine.name(),
        "max_break_ms": load.max_break,
        "life_support": load.life_support.name(),
    });
    match load.motor_plate {
        Some(MotorPlate::LockedRotor(current)) => value["locked_rotor_a"] = json!(current),
        Some(MotorPlate::CodeLetter { horsepower, letter }) => {
            value["shaft_hp"] = json!(horsepower);
            value["code_letter"] = json!(letter);
        }
        Some(MotorPlate::Horsepower(horsepower)) => value["shaft_hp"] = json!(horsepower),
        None => {}
    }
    value
}

fn choice(choice: &Choice) -> Value {
    json!({
        "chemistry": choice.chemistry.name(),
        "bus_v": choice.bus.map(|bus| bus.volts()),
        "code": choice.code.name(),
        "conductor": choice.conductor.name(),
        "insulation": choice.insulation.name(),
        "method": choice.method.name(),
        "ac_method": choice.ac_method.name(),
        "square_wave_offered": choice.square_wave_offered,
    })
}

fn runs(runs: &Runs) -> Value {
    json!({
        "bank_to_inverter_m": runs.bank_to_inverter,
        "string_lead_m": runs.string_lead,
        "inverter_to_board_m": runs.inverter_to_board,
        "mains_to_inverter_m": runs.mains_to_inverter,
        "charger_to_bank_m": runs.charger_to_bank,
    })
}

fn reuse(unit: &ReusedInverter) -> Value {
    json!({
        "rating_va": unit.rating,
        "rating_w": unit.rating_w,
        "surge_va": unit.surge,
        "sine": unit.sine,
        "changeover_ms": unit.changeover,
        "mains_lowest_v": unit.mains_window.map(|window| window.0),
        "mains_highest_v": unit.mains_window.map(|window| window.1),
    })
}
