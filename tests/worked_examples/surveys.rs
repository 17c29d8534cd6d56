//! Six jobs that have little in common; invented.

/// A shop's freezer on tubular lead-acid, IEC.
pub const SHOP: &str = include_str!("../cli/corner_shop.json");

/// A house on 120 V by NEC: a motor by its plate, a pump with a start of its own, a long cut.
pub const NEC_HOUSE: &str = r#"{
  "format": "keeplit-survey-1",
  "site": { "name": "House by the lake", "supply_v": 120, "frequency_hz": 60, "supply_lowest_v": 108,
            "supply_highest_v": 126, "battery_coldest_c": -5, "battery_hottest_c": 30, "inverter_ambient_c": 30,
            "altitude_m": 1800, "incoming_breaker_a": 50 },
  "outage": { "autonomy_h": 20, "starts_at": "16:30", "cuts_per_week": 0.2, "mains_between_cuts_h": 200 },
  "loads": [
    { "name": "Fridge", "running_w": 180, "start": "compressor", "duty": 0.35 },
    { "name": "Well pump", "running_w": 750, "start": "motor_cap_start", "shaft_hp": 0.5, "code_letter": "L",
      "duty": 0.1, "turn": "water" },
    { "name": "Washer", "running_w": 500, "start": "universal_motor", "duty": 0.2, "turn": "water",
      "windows": [["08:00", "20:00"]] },
    { "name": "Furnace blower", "running_w": 400, "start": "motor_psc", "locked_rotor_a": 14, "duty": 0.5 },
    { "name": "Lamps", "quantity": 8, "on_together": 5, "running_w": 9, "start": "electronic",
      "windows": [["17:00", "23:30"]] } ],
  "choice": { "chemistry": "vrla_agm", "code": "nec", "insulation": "pvc_70", "method": "B1" },
  "runs": { "bank_to_inverter_m": 1.5, "string_lead_m": 0.6, "inverter_to_board_m": 15, "mains_to_inverter_m": 4 },
  "battery_ratings": [ { "hours": 20, "ah": 100 }, { "hours": 5, "ah": 85 }, { "hours": 1, "ah": 60 } ]
}"#;

/// A clinic on lithium at 48 V, with a charger of its own.
pub const LFP_CLINIC: &str = r#"{
  "format": "keeplit-survey-1",
  "site": { "name": "Clinic on the hill", "battery_coldest_c": -3, "battery_hottest_c": 44, "altitude_m": 2600,
            "inverter_ambient_c": 45, "incoming_breaker_a": 40, "battery_room_vented": false },
  "outage": { "autonomy_h": 7.5, "cuts_per_week": 14, "mains_between_cuts_h": 4.5 },
  "loads": [
    { "name": "Vaccine fridge", "running_w": 120, "start": "compressor", "duty": 0.4, "life_support": "product_critical" },
    { "name": "Oxygen concentrator", "running_w": 350, "power_factor": 0.8, "start": "motor_psc", "needs_sine": "yes",
      "max_break_ms": 20, "life_support": "yes" },
    { "name": "Computers", "quantity": 3, "running_w": 120, "start": "electronic", "windows": [["08:00", "17:00"]] } ],
  "choice": { "chemistry": "lfp", "bus_v": 48 },
  "runs": { "charger_to_bank_m": 3 }
}"#;

/// An old square-wave unit that stays, on a weak feeder.
pub const REUSED_UNIT: &str = r#"{
  "format": "keeplit-survey-1",
  "site": { "supply_lowest_v": 150, "supply_highest_v": 265 },
  "outage": { "autonomy_h": 3, "cuts_per_week": 20 },
  "loads": [
    { "name": "Fans", "quantity": 3, "running_w": 75, "start": "motor_psc" },
    { "name": "Television", "running_w": 100, "start": "electronic", "needs_sine": "yes", "duty": 0.8 },
    { "name": "Tubes with chokes", "quantity": 2, "running_w": 46, "power_factor": 0.5, "start": "transformer" } ],
  "choice": { "chemistry": "flooded_flat_plate", "square_wave_offered": true },
  "reuse": { "rating_va": 850, "rating_w": 600, "surge_va": 1600, "sine": false, "changeover_ms": 40,
             "mains_lowest_v": 180, "mains_highest_v": 260 }
}"#;

/// A workshop whose bank needs several strings, in aluminium, over long runs, through a week-end.
pub const MANY_STRINGS: &str = r#"{
  "format": "keeplit-survey-1",
  "site": { "name": "Workshop", "battery_coldest_c": 5, "inverter_ambient_c": 48 },
  "outage": { "autonomy_h": 30, "cuts_per_week": 1 },
  "loads": [
    { "name": "Air compressor", "running_w": 1100, "start": "motor_cap_start", "shaft_hp": 1, "duty": 0.2 },
    { "name": "Lights", "quantity": 12, "running_w": 20, "start": "electronic", "windows": [["18:00", "02:00"]] },
    { "name": "Freezer", "quantity": 2, "running_w": 150, "start": "compressor", "duty": 0.45 },
    { "name": "Freezer", "running_w": 150, "start": "compressor", "duty": 0.45 } ],
  "choice": { "chemistry": "vrla_gel", "bus_v": 24, "conductor": "aluminium", "ac_method": "E" },
  "runs": { "bank_to_inverter_m": 6, "string_lead_m": 2, "inverter_to_board_m": 60, "mains_to_inverter_m": 45 },
  "battery_ratings": [ { "hours": 20, "ah": 100 }, { "hours": 10, "ah": 93 } ],
  "assumptions": { "grouped_circuits": 3, "bank_margin": 1.15, "inverter_margin": 0.3 }
}"#;

/// The least that a survey may say.
pub const ONE_LAMP: &str = r#"{
  "format": "keeplit-survey-1", "outage": { "autonomy_h": 0.25 }, "loads": [ { "name": "Lamp", "running_w": 0.1 } ]
}"#;

/// All of them.
pub const ALL: [&str; 6] = [SHOP, NEC_HOUSE, LFP_CLINIC, REUSED_UNIT, MANY_STRINGS, ONE_LAMP];
