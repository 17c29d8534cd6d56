//! Light, fans, rooms and washing.
//!
//! Each row: key = name, group, / running W, true power factor, start, starting over running VA, seconds
//! of it, duty, sine, longest break in ms, what hangs on it, / where the watts come from, whether that was
//! read, shape of the current, hint.

use super::sources::*;

appliances! {
    "led_bulb_9w" = "LED bulb, 9 W", LightAndFans,
        9.0, 0.55, Electronic, 1.0, 0.0, 1.0, No, 10_000.0, No,
        PLATES, FromMemory, PULSED, "";
    "led_bulb_15w" = "LED bulb, 15 W", LightAndFans,
        15.0, 0.6, Electronic, 1.0, 0.0, 1.0, No, 10_000.0, No,
        PLATES, FromMemory, PULSED, "";
    "led_tube_20w" = "LED tube, 4 ft", LightAndFans,
        20.0, 0.9, Electronic, 1.0, 0.0, 1.0, No, 10_000.0, No,
        PLATES, FromMemory, CORRECTED, "";
    "led_panel_12w" = "LED panel or downlight", LightAndFans,
        12.0, 0.6, Electronic, 1.0, 0.0, 1.0, No, 10_000.0, No,
        PLATES, FromMemory, PULSED, "";
    "led_flood_50w" = "LED floodlight", LightAndFans,
        50.0, 0.9, Electronic, 1.0, 0.0, 1.0, No, 10_000.0, No,
        PLATES, FromMemory, CORRECTED, "";
    "cfl_15w" = "Compact fluorescent lamp", LightAndFans,
        15.0, 0.55, Electronic, 1.0, 0.0, 1.0, No, 10_000.0, No,
        TAMIL_NADU, Read, PULSED, "";
    "tube_t8_magnetic" = "Fluorescent tube with choke", LightAndFans,
        46.0, 0.5, Transformer, 1.5, 1.0, 1.0, Prefers, 10_000.0, No,
        TAMIL_NADU, Read, IRON, "Tube 36 to 40 W, choke 8 to 10 W.";
    "tube_t5_electronic" = "Fluorescent tube with electronic ballast", LightAndFans,
        30.0, 0.95, Electronic, 1.0, 0.0, 1.0, Prefers, 10_000.0, No,
        PLATES, FromMemory, CORRECTED, "";
    "incandescent_60w" = "Filament or halogen lamp", LightAndFans,
        60.0, 1.0, Resistive, 8.0, 0.05, 1.0, No, 10_000.0, No,
        TAMIL_NADU, Read, PLAIN, "An LED does the same with a sixth.";
    "emergency_light_5w" = "Emergency light, charging", LightAndFans,
        5.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 10_000.0, No,
        PLATES, FromMemory, PULSED, "Has its own battery in a cut.";
    "ceiling_fan" = "Ceiling fan", LightAndFans,
        75.0, 0.95, MotorPsc, 2.0, 3.0, 1.0, Prefers, 2_000.0, No,
        TAMIL_NADU, Read, LAGGING, "60 to 75 W at full speed; hums on a square wave.";
    "ceiling_fan_bldc" = "Ceiling fan, brushless", LightAndFans,
        30.0, 0.9, Electronic, 1.2, 1.0, 1.0, No, 500.0, No,
        PLATES, FromMemory, CORRECTED, "26 to 35 W at full speed.";
    "table_fan" = "Table or wall fan", LightAndFans,
        60.0, 0.9, MotorPsc, 2.0, 2.0, 1.0, Prefers, 2_000.0, No,
        ANDAMAN, Read, LAGGING, "";
    "pedestal_fan" = "Stand fan", LightAndFans,
        75.0, 0.9, MotorPsc, 2.0, 2.0, 1.0, Prefers, 2_000.0, No,
        TAMIL_NADU, Read, LAGGING, "";
    "exhaust_fan_small" = "Extractor fan, bathroom or kitchen", LightAndFans,
        40.0, 0.7, MotorPsc, 2.0, 1.0, 1.0, Prefers, 2_000.0, No,
        PLATES, FromMemory, LAGGING, "";
    "exhaust_fan_heavy" = "Extractor fan, heavy duty", LightAndFans,
        150.0, 0.8, MotorPsc, 2.5, 2.0, 1.0, Prefers, 2_000.0, No,
        TAMIL_NADU, Read, LAGGING, "";
    "air_cooler" = "Evaporative air cooler", Room,
        200.0, 0.85, MotorPsc, 2.5, 2.0, 1.0, Prefers, 2_000.0, No,
        TAMIL_NADU, Read, LAGGING, "Fan and water pump together.";
    "air_conditioner_1t" = "Air conditioner, 1 ton", Room,
        1_250.0, 0.9, Compressor, 5.0, 0.7, 0.7, Yes, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Older ones take 1,500 W.";
    "air_conditioner_15t" = "Air conditioner, 1.5 ton", Room,
        1_800.0, 0.9, Compressor, 5.0, 0.7, 0.7, Yes, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Older ones take 2,250 W.";
    "air_conditioner_1t_variable" = "Air conditioner, 1 ton, variable speed", Room,
        1_050.0, 0.97, Electronic, 1.3, 5.0, 0.5, Yes, 500.0, No,
        PLATES, FromMemory, CORRECTED, "400 to 600 W once the room is cool.";
    "air_conditioner_15t_variable" = "Air conditioner, 1.5 ton, variable speed", Room,
        1_600.0, 0.97, Electronic, 1.3, 5.0, 0.5, Yes, 500.0, No,
        PLATES, FromMemory, CORRECTED, "500 to 900 W once the room is cool.";
    "dehumidifier" = "Dehumidifier", Room,
        785.0, 0.85, Compressor, 5.0, 0.5, 0.6, Prefers, 60_000.0, No,
        DOE, Read, LAGGING, "";
    "room_heater" = "Room heater", Room,
        1_500.0, 1.0, Resistive, 1.05, 0.2, 0.8, No, 10_000.0, No,
        DOE, Read, PLAIN, "";
    "ptc_heater" = "Ceramic room heater", Room,
        1_500.0, 1.0, HeaterPtc, 1.8, 20.0, 0.8, No, 10_000.0, No,
        PLATES, FromMemory, PLAIN, "Takes nearly twice as much for its first half minute.";
    "electric_blanket" = "Electric blanket, double", Room,
        100.0, 1.0, Resistive, 1.0, 0.0, 0.5, No, 10_000.0, No,
        DOE, Read, PLAIN, "";
    "furnace_blower" = "Blower of a gas furnace, 1/3 hp", Room,
        750.0, 0.75, MotorPsc, 3.0, 2.0, 0.5, Yes, 1_000.0, No,
        DOE, Read, LAGGING, "";
    "tv_32" = "Television, 32 in", Room,
        50.0, 0.6, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        PLATES, FromMemory, PULSED, "";
    "tv_43" = "Television, 43 in", Room,
        100.0, 0.9, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        US_UTILITY, Read, CORRECTED, "";
    "set_top_box" = "Set-top box", Room,
        35.0, 0.55, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        US_UTILITY, Read, PULSED, "";
    "music_system" = "Music system", Room,
        100.0, 0.6, Transformer, 3.0, 0.1, 1.0, Prefers, 50.0, No,
        ANDAMAN, Read, IRON, "";
    "dvd_player" = "Disc player", Room,
        25.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        DOE, Read, PULSED, "";
    "games_console" = "Games console", Room,
        150.0, 0.9, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        PLATES, FromMemory, CORRECTED, "";
    "mosquito_heater" = "Mosquito vaporiser", Room,
        9.0, 1.0, Resistive, 1.0, 0.0, 1.0, No, 60_000.0, No,
        TAMIL_NADU, Read, PLAIN, "";
    "aquarium" = "Aquarium, pump and light", Room,
        50.0, 0.6, MotorPsc, 1.5, 0.5, 1.0, Prefers, 600_000.0, No,
        DOE, Read, LAGGING, "";
    "washer_top" = "Washing machine, top loader", Washing,
        400.0, 0.7, MotorPsc, 3.0, 0.7, 0.5, Prefers, 1_000.0, No,
        TAMIL_NADU, Read, LAGGING, "Starts anew every few seconds.";
    "washer_front" = "Washing machine, front loader, heating", Washing,
        2_000.0, 0.98, Resistive, 1.1, 0.5, 0.3, Prefers, 1_000.0, No,
        PLATES, FromMemory, PLAIN, "Heats for 15 to 40 minutes of a wash.";
    "iron_dry" = "Iron", Washing,
        750.0, 1.0, Resistive, 1.05, 0.1, 0.5, No, 10_000.0, No,
        TAMIL_NADU, Read, PLAIN, "";
    "iron_steam" = "Steam iron", Washing,
        1_500.0, 1.0, Resistive, 1.05, 0.1, 0.5, No, 10_000.0, No,
        DOE, Read, PLAIN, "";
    "clothes_dryer" = "Tumble dryer", Washing,
        2_790.0, 0.98, Resistive, 1.5, 0.5, 0.7, Prefers, 1_000.0, No,
        US_UTILITY, Read, PLAIN, "Too much for most banks.";
    "vacuum_cleaner" = "Vacuum cleaner", Washing,
        1_400.0, 0.92, UniversalMotor, 2.5, 0.7, 1.0, Prefers, 5_000.0, No,
        US_UTILITY, Read, BRUSHED, "";
    "hair_dryer" = "Hair dryer", Washing,
        1_500.0, 0.99, Resistive, 1.3, 0.3, 1.0, Prefers, 5_000.0, No,
        DOE, Read, PLAIN, "Half heat through a diode disturbs the inverter.";
}
