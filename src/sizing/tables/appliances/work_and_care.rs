//! Work and shop, computers, security, medical.
//!
//! Each row: key = name, group, / running W, true power factor, start, starting over running VA, seconds
//! of it, duty, sine, longest break in ms, what hangs on it, / where the watts come from, whether that was
//! read, shape of the current, hint.

use super::sources::*;

appliances! {
    "led_signboard_100w" = "LED shop sign", WorkAndShop,
        100.0, 0.6, Electronic, 1.0, 0.0, 1.0, No, 10_000.0, No,
        PLATES, FromMemory, PULSED, "Several small drivers inside.";
    "hair_clipper" = "Hair clipper", WorkAndShop,
        12.0, 0.5, Transformer, 1.5, 0.1, 0.5, Prefers, 5_000.0, No,
        PLATES, FromMemory, IRON, "";
    "sewing_domestic" = "Sewing machine, household", WorkAndShop,
        100.0, 0.9, UniversalMotor, 2.5, 0.3, 0.4, Prefers, 5_000.0, No,
        PLATES, FromMemory, BRUSHED, "Lamp included.";
    "sewing_clutch" = "Sewing machine, clutch motor", WorkAndShop,
        450.0, 0.6, MotorSplitPhase, 5.0, 0.7, 1.0, Prefers, 5_000.0, No,
        PLATES, FromMemory, LAGGING, "Idles between seams.";
    "sewing_servo" = "Sewing machine, servo motor", WorkAndShop,
        300.0, 0.7, Electronic, 1.5, 0.3, 0.4, Prefers, 200.0, No,
        PLATES, FromMemory, PULSED, "";
    "photocopier" = "Small copier", WorkAndShop,
        1_200.0, 0.9, Electronic, 1.3, 5.0, 0.3, Yes, 20.0, No,
        PLATES, FromMemory, CORRECTED, "Better left off in a cut.";
    "till" = "Till with screen", WorkAndShop,
        50.0, 0.6, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        PLATES, FromMemory, PULSED, "";
    "receipt_printer" = "Receipt printer", WorkAndShop,
        30.0, 0.5, Electronic, 2.0, 1.0, 0.1, No, 20.0, No,
        PLATES, FromMemory, PULSED, "";
    "card_reader" = "Card reader", WorkAndShop,
        6.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        PLATES, FromMemory, PULSED, "Mostly has its own battery.";
    "barcode_scanner" = "Barcode scanner", WorkAndShop,
        3.0, 0.5, Electronic, 1.0, 0.0, 0.5, No, 20.0, No,
        PLATES, FromMemory, PULSED, "";
    "weighing_scale" = "Scale", WorkAndShop,
        8.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 50.0, No,
        PLATES, FromMemory, PULSED, "";
    "money_counter" = "Banknote counter", WorkAndShop,
        80.0, 0.6, UniversalMotor, 2.0, 0.3, 0.1, Prefers, 20.0, No,
        PLATES, FromMemory, BRUSHED, "";
    "drill" = "Drill", WorkAndShop,
        600.0, 0.9, UniversalMotor, 3.0, 0.3, 0.2, Prefers, 5_000.0, No,
        PLATES, FromMemory, BRUSHED, "";
    "angle_grinder" = "Angle grinder", WorkAndShop,
        900.0, 0.92, UniversalMotor, 3.5, 0.7, 0.3, Prefers, 5_000.0, No,
        PLATES, FromMemory, BRUSHED, "";
    "air_compressor_1hp" = "Air compressor, 1 hp", WorkAndShop,
        1_100.0, 0.75, MotorCapStart, 6.0, 1.5, 0.3, Yes, 60_000.0, No,
        NEC_AND_PLATES, FromMemory, LAGGING, "Starts against pressure if its unloader fails.";
    "router" = "Router", Computers,
        10.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 15.0, No,
        PLATES, FromMemory, PULSED, "";
    "fibre_terminal" = "Fibre terminal or modem", Computers,
        8.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 15.0, No,
        PLATES, FromMemory, PULSED, "";
    "network_switch" = "Network switch, 8 ports", Computers,
        10.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        PLATES, FromMemory, PULSED, "Up to 120 W where it feeds cameras or phones.";
    "laptop" = "Laptop", Computers,
        60.0, 0.6, Electronic, 1.0, 0.0, 0.8, No, 60_000.0, No,
        US_UTILITY, Read, PULSED, "Has its own battery.";
    "desktop_pc" = "Desktop computer", Computers,
        120.0, 0.6, Electronic, 1.0, 0.0, 1.0, Prefers, 20.0, No,
        DOE, Read, PULSED, "Without its screen.";
    "monitor" = "Computer screen", Computers,
        25.0, 0.6, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        PLATES, FromMemory, PULSED, "";
    "phone_charger" = "Phone charger", Computers,
        7.0, 0.5, Electronic, 1.0, 0.0, 0.5, No, 60_000.0, No,
        TAMIL_NADU, Read, PULSED, "Fast ones take 20 to 65 W.";
    "printer_inkjet" = "Inkjet printer", Computers,
        20.0, 0.55, Electronic, 1.0, 0.0, 0.1, No, 20.0, No,
        PLATES, FromMemory, PULSED, "";
    "printer_laser" = "Laser printer", Computers,
        500.0, 0.9, Electronic, 2.5, 3.0, 0.1, Prefers, 20.0, No,
        PLATES, FromMemory, CORRECTED, "Pulses to 800 to 1,200 W; better left off in a cut.";
    "camera_recorder" = "Camera recorder with disk", Security,
        25.0, 0.5, Electronic, 1.8, 8.0, 1.0, No, 20.0, No,
        PLATES, FromMemory, PULSED, "";
    "camera" = "Camera with night light", Security,
        6.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 20.0, No,
        PLATES, FromMemory, PULSED, "More by night.";
    "alarm_panel" = "Alarm panel", Security,
        15.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 60_000.0, No,
        FSEC, Read, PULSED, "Has its own battery.";
    "gate_motor" = "Sliding gate", Security,
        350.0, 0.7, MotorPsc, 4.0, 0.7, 0.01, Prefers, 2_000.0, No,
        PLATES, FromMemory, LAGGING, "A few short runs a day.";
    "garage_door" = "Garage door, 1/4 hp", Security,
        550.0, 0.7, MotorSplitPhase, 3.5, 0.7, 0.005, Prefers, 2_000.0, No,
        CO_OP, Read, LAGGING, "";
    "roller_shutter" = "Roller shutter", Security,
        400.0, 0.75, MotorPsc, 4.0, 0.7, 0.005, Prefers, 2_000.0, No,
        PLATES, FromMemory, LAGGING, "";
    "intercom" = "Door phone", Security,
        10.0, 0.5, Electronic, 1.0, 0.0, 1.0, No, 50.0, No,
        PLATES, FromMemory, PULSED, "";
    "fence_energiser" = "Electric fence", Security,
        12.0, 0.5, Electronic, 1.5, 0.1, 1.0, No, 60_000.0, No,
        PLATES, FromMemory, PULSED, "Mostly has its own battery.";
    "vaccine_fridge" = "Vaccine or medicine fridge", Medical,
        150.0, 0.7, Compressor, 6.0, 0.5, 0.4, Yes, 60_000.0, ProductCritical,
        PLATES, FromMemory, LAGGING, "Write down how long it stays cold without power.";
    "nebuliser" = "Nebuliser", Medical,
        150.0, 0.7, MotorPsc, 3.0, 0.5, 0.1, Prefers, 2_000.0, Clinical,
        PLATES, FromMemory, LAGGING, "No runtime is promised: keep its own battery or cylinder.";
    "cpap_dry" = "Breathing aid (CPAP), dry", Medical,
        40.0, 0.6, Electronic, 1.2, 1.0, 1.0, Yes, 20.0, Clinical,
        PLATES, FromMemory, PULSED, "No runtime is promised: keep its own battery or cylinder.";
    "cpap_humid" = "Breathing aid (CPAP), heated", Medical,
        90.0, 0.8, Electronic, 1.2, 1.0, 1.0, Yes, 20.0, Clinical,
        PLATES, FromMemory, PULSED, "No runtime is promised: keep its own battery or cylinder.";
    "oxygen_5_l" = "Oxygen concentrator, 5 l/min", Medical,
        350.0, 0.8, Compressor, 5.0, 0.5, 1.0, Yes, 100.0, Yes,
        WHO, Read, LAGGING, "No runtime is promised: keep its own battery or cylinder.";
    "oxygen_10_l" = "Oxygen concentrator, 10 l/min", Medical,
        700.0, 0.8, Compressor, 5.0, 0.5, 1.0, Yes, 100.0, Yes,
        WHO, Read, LAGGING, "No runtime is promised: keep its own battery or cylinder.";
    "home_ventilator" = "Home ventilator", Medical,
        150.0, 0.7, Electronic, 1.3, 1.0, 1.0, Yes, 20.0, Yes,
        PLATES, FromMemory, PULSED, "No runtime is promised: keep its own battery or cylinder.";
    "suction_machine" = "Suction machine", Medical,
        120.0, 0.7, MotorPsc, 3.0, 0.5, 0.1, Yes, 2_000.0, Yes,
        PLATES, FromMemory, LAGGING, "No runtime is promised: keep its own battery or cylinder.";
    "dialysis_cycler" = "Dialysis cycler", Medical,
        300.0, 0.95, Electronic, 1.3, 2.0, 0.6, Yes, 20.0, Yes,
        PLATES, FromMemory, CORRECTED, "No runtime is promised: keep its own battery or cylinder.";
    "air_mattress" = "Pressure-relief mattress", Medical,
        15.0, 0.6, MotorPsc, 1.5, 0.5, 1.0, Prefers, 60_000.0, Clinical,
        PLATES, FromMemory, LAGGING, "";
}
