//! Kitchen, cold and water.
//!
//! Each row: key = name, group, / running W, true power factor, start, starting over running VA, seconds
//! of it, duty, sine, longest break in ms, what hangs on it, / where the watts come from, whether that was
//! read, shape of the current, hint.

use super::sources::*;

appliances! {
    "fridge_direct_cool" = "Fridge, single door", Kitchen,
        150.0, 0.7, Compressor, 6.0, 0.5, 0.35, Prefers, 60_000.0, No,
        TAMIL_NADU, Read, LAGGING, "Leave it off for 3 minutes before a restart.";
    "fridge_frost_free" = "Fridge, frost-free", Kitchen,
        200.0, 0.75, Compressor, 6.0, 0.5, 0.4, Prefers, 60_000.0, No,
        US_UTILITY, Read, LAGGING, "Its defrost heater takes 200 to 600 W a few times a day.";
    "fridge_freezer_large" = "Fridge-freezer, side by side", Kitchen,
        725.0, 0.87, Compressor, 3.0, 0.5, 0.33, Prefers, 60_000.0, No,
        DOE, Read, LAGGING, "Plate figure; a newer one runs at 100 to 250 W.";
    "fridge_variable_speed" = "Fridge, variable speed", Kitchen,
        90.0, 0.9, Electronic, 1.5, 1.0, 0.6, Prefers, 1_000.0, No,
        PLATES, FromMemory, CORRECTED, "Starts softly; up to 180 W while it pulls down.";
    "fridge_small" = "Small fridge", Kitchen,
        90.0, 0.65, Compressor, 7.0, 0.5, 0.35, Prefers, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Leave it off for 3 minutes before a restart.";
    "freezer_chest" = "Chest freezer", Kitchen,
        150.0, 0.7, Compressor, 6.0, 0.5, 0.45, Prefers, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Leave it off for 3 minutes before a restart.";
    "freezer_upright" = "Upright freezer, frost-free", Kitchen,
        720.0, 0.8, Compressor, 2.6, 0.5, 0.4, Prefers, 60_000.0, No,
        CO_OP, Read, LAGGING, "Defrost heater included.";
    "chest_cooler" = "Chest cooler for bottles", Kitchen,
        300.0, 0.75, Compressor, 5.0, 0.5, 0.5, Prefers, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Fans and lamp included.";
    "glass_door_cooler" = "Glass-door cooler", Kitchen,
        350.0, 0.75, Compressor, 5.0, 0.5, 0.55, Prefers, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Fans and lamp included.";
    "ice_cream_freezer" = "Ice-cream freezer", Kitchen,
        400.0, 0.75, Compressor, 5.0, 0.5, 0.6, Prefers, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Leave it off for 3 minutes before a restart.";
    "water_dispenser" = "Hot and cold water dispenser", Kitchen,
        600.0, 0.95, Compressor, 2.0, 0.5, 0.25, Prefers, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Heater 500 W, compressor 100 W.";
    "microwave" = "Microwave oven", Kitchen,
        1_200.0, 0.9, Transformer, 3.0, 0.1, 1.0, Yes, 200.0, No,
        TAMIL_NADU, Read, IRON, "Takes more than the cooking power on its label.";
    "kettle" = "Kettle", Kitchen,
        1_500.0, 1.0, Resistive, 1.0, 0.0, 1.0, No, 10_000.0, No,
        PLATES, FromMemory, PLAIN, "1,000 to 3,000 W by market.";
    "rice_cooker" = "Rice cooker", Kitchen,
        700.0, 1.0, Resistive, 1.0, 0.0, 0.7, No, 10_000.0, No,
        PLATES, FromMemory, PLAIN, "";
    "toaster" = "Toaster", Kitchen,
        800.0, 1.0, Resistive, 1.05, 0.2, 1.0, No, 10_000.0, No,
        DOE, Read, PLAIN, "";
    "toaster_oven" = "Small oven", Kitchen,
        1_225.0, 1.0, Resistive, 1.0, 0.0, 0.6, No, 10_000.0, No,
        DOE, Read, PLAIN, "";
    "coffee_maker" = "Coffee maker", Kitchen,
        1_000.0, 1.0, Resistive, 1.0, 0.0, 0.5, No, 10_000.0, No,
        US_UTILITY, Read, PLAIN, "";
    "induction_hob" = "Induction hob, one ring", Kitchen,
        2_000.0, 0.98, Electronic, 1.2, 0.1, 0.6, Yes, 200.0, No,
        PLATES, FromMemory, CORRECTED, "Pulses on and off at low settings.";
    "mixer_grinder" = "Mixer", Kitchen,
        500.0, 0.9, UniversalMotor, 3.0, 0.7, 0.1, Prefers, 5_000.0, No,
        TAMIL_NADU, Read, BRUSHED, "Short bursts.";
    "wet_grinder" = "Wet grinder", Kitchen,
        300.0, 0.7, MotorCapStart, 5.0, 1.0, 0.5, Prefers, 5_000.0, No,
        TAMIL_NADU, Read, LAGGING, "";
    "blender" = "Blender", Kitchen,
        375.0, 0.9, UniversalMotor, 2.5, 0.5, 0.1, Prefers, 5_000.0, No,
        CO_OP, Read, BRUSHED, "";
    "water_purifier" = "Water purifier", Kitchen,
        45.0, 0.6, Electronic, 1.5, 0.2, 0.3, No, 5_000.0, No,
        PLATES, FromMemory, PULSED, "Small pump on an adaptor.";
    "dishwasher" = "Dishwasher", Kitchen,
        1_400.0, 0.98, Resistive, 1.3, 0.5, 0.5, Prefers, 1_000.0, No,
        US_UTILITY, Read, PLAIN, "Heats for half of its time.";
    "pump_booster" = "Pressure booster pump, 1/4 hp", Water,
        330.0, 0.75, MotorPsc, 4.0, 0.7, 0.15, Prefers, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Input watts: more than the shaft power on some plates.";
    "pump_sump" = "Sump pump, 1/3 hp", Water,
        800.0, 0.8, MotorSplitPhase, 4.0, 0.7, 0.2, Prefers, 60_000.0, No,
        CO_OP, Read, LAGGING, "";
    "pump_05hp_surface" = "Surface pump, 1/2 hp", Water,
        600.0, 0.7, MotorCapStart, 6.0, 1.0, 0.08, Prefers, 60_000.0, No,
        NEC_AND_PLATES, FromMemory, LAGGING, "Input watts: more than the shaft power on some plates.";
    "pump_1hp_surface" = "Surface pump, 1 hp", Water,
        1_100.0, 0.75, MotorCapStart, 6.0, 1.0, 0.08, Prefers, 60_000.0, No,
        NEC_AND_PLATES, FromMemory, LAGGING, "Input watts: more than the shaft power on some plates.";
    "pump_05hp_borehole" = "Borehole pump, 1/2 hp", Water,
        700.0, 0.75, MotorCapStart, 5.0, 0.7, 0.1, Yes, 60_000.0, No,
        NEC_AND_PLATES, FromMemory, LAGGING, "Input watts: more than the shaft power on some plates.";
    "pump_1hp_borehole" = "Borehole pump, 1 hp", Water,
        1_250.0, 0.8, MotorCapStart, 5.0, 0.7, 0.1, Yes, 60_000.0, No,
        NEC_AND_PLATES, FromMemory, LAGGING, "Input watts: more than the shaft power on some plates.";
    "pump_15hp_borehole" = "Borehole pump, 1.5 hp", Water,
        1_750.0, 0.82, MotorCapStart, 5.0, 0.8, 0.1, Yes, 60_000.0, No,
        NEC_AND_PLATES, FromMemory, LAGGING, "Input watts: more than the shaft power on some plates.";
    "pump_2hp" = "Pump, 2 hp", Water,
        2_150.0, 0.82, MotorCapStart, 5.0, 0.8, 0.1, Yes, 60_000.0, No,
        NEC_AND_PLATES, FromMemory, LAGGING, "Input watts: more than the shaft power on some plates.";
    "pool_pump" = "Pool pump, 1 hp", Water,
        1_100.0, 0.8, MotorPsc, 4.0, 0.8, 0.3, Prefers, 60_000.0, No,
        PLATES, FromMemory, LAGGING, "Mostly left off in a cut.";
    "water_heater_storage" = "Water heater with tank", Water,
        2_000.0, 1.0, Resistive, 1.0, 0.0, 0.3, No, 10_000.0, No,
        TAMIL_NADU, Read, PLAIN, "";
    "water_heater_instant" = "Instant water heater", Water,
        3_000.0, 1.0, Resistive, 1.0, 0.0, 1.0, No, 10_000.0, No,
        TAMIL_NADU, Read, PLAIN, "Too much for most banks.";
    "immersion_heater" = "Immersion heater", Water,
        1_000.0, 1.0, Resistive, 1.0, 0.0, 1.0, No, 10_000.0, No,
        TAMIL_NADU, Read, PLAIN, "";
}
