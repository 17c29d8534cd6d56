//! Every finding as a sentence, and its cure.

use super::names::Labelled;
use super::numbers::{Numbers, duration};
use crate::sizing::Finding;
use crate::sizing::design::Run;
use crate::units::{
    AcVolts, AmpHours, Amps, Celsius, DcVolts, Kiloamps, Metres, Milliseconds, OhmsPerKilometre, Seconds, VoltAmps,
    Watts,
};

/// A finding in words.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Told {
    /// Its name in files.
    pub code: &'static str,
    /// What is the matter, with its figures.
    pub text: String,
    /// What to do about it.
    pub cure: &'static str,
}

/// A quantity with its unit.
trait Figure {
    fn told(self) -> String;
}

macro_rules! figures {
    ($($type:ident)*) => { $(impl Figure for $type {
        fn told(self) -> String { Numbers::default().with_unit(self.0, $type::SYMBOL) }
    })* };
}

figures!(VoltAmps Watts Amps AmpHours AcVolts DcVolts Seconds Milliseconds Celsius Kiloamps Metres OhmsPerKilometre);

fn percent(share: f64) -> String {
    Numbers::default().percent(share)
}

fn run(run: Run) -> &'static str {
    run.label()
}

/// The sentence and the cure of a finding.
pub fn finding(finding: &Finding) -> Told {
    let (code, text, cure) = of_starts(finding)
        .or_else(|| of_unit(finding))
        .or_else(|| of_bank(finding))
        .or_else(|| of_charger(finding))
        .or_else(|| of_cables(finding))
        .unwrap_or_else(|| of_place(finding));
    Told { code, text, cure }
}

type Parts = (&'static str, String, &'static str);

fn of_starts(finding: &Finding) -> Option<Parts> {
    use Finding::*;
    Some(match finding {
        MotorWillNotStart { load, needed, available } => (
            "motor_will_not_start",
            format!(
                "{load} will not start: its start asks for {} and the unit gives {}.",
                needed.told(),
                available.told()
            ),
            "Fit a larger unit or one with more surge, a soft starter, or take it off the list.",
        ),
        MotorStartMarginal { load, needed, available } => (
            "motor_start_marginal",
            format!(
                "{load} may not start: its start asks for {} and the unit gives {}.",
                needed.told(),
                available.told()
            ),
            "Try it at commissioning, or fit a larger unit or a soft starter.",
        ),
        SurgeTooShort { load, lasts, held } => (
            "surge_too_short",
            format!("{load} takes {} to start; the unit holds its surge for {}.", lasts.told(), held.told()),
            "Fit a unit that holds its surge longer, or a soft starter.",
        ),
        RestartTogetherTooMuch { together, staggered, available } => (
            "restart_together_too_much",
            format!(
                "All motors restarting at once ask for {}; one after the other they ask for {}. The unit gives {}.",
                together.told(),
                staggered.told(),
                available.told()
            ),
            "Fit delay timers (3 minutes for compressors), or a larger unit.",
        ),
        BankSagsAtStart { load, lowest, cut_off } => (
            "bank_sags_at_start",
            format!(
                "When {load} starts at the end of the cut, the aged bank sags to {} at the unit, below the cut-off at {}.",
                lowest.told(),
                cut_off.told()
            ),
            "Take a larger bank, a thicker or shorter battery cable, or higher bank volts.",
        ),
        CodeLetterOpen { load } => (
            "code_letter_open",
            format!("{load}: code letter V has no upper end, so its start was taken at the lower one."),
            "Read the locked-rotor current on the plate and enter it.",
        ),
        _ => return None,
    })
}

fn of_unit(finding: &Finding) -> Option<Parts> {
    use Finding::*;
    Some(match finding {
        NoInverterFits { needed, largest } => (
            "no_inverter_fits",
            format!("The loads ask for {}; the largest unit of the trade list has {}.", needed.told(), largest.told()),
            "Take loads off the list, let some take turns, or split the site onto two units.",
        ),
        ReusedInverterTooSmall { needed, there } => (
            "reused_inverter_too_small",
            format!("The unit that is there has {}; the loads ask for {}.", there.told(), needed.told()),
            "Replace the unit, take loads off the list, or let some take turns.",
        ),
        MainsOutsideNarrowWindow { lowest, highest, window } => (
            "mains_window_too_narrow",
            format!(
                "The mains here runs from {} to {}; the narrow window takes {} to {}.",
                lowest.told(),
                highest.told(),
                window.0.told(),
                window.1.told()
            ),
            "Set the wide window and mind its slow changeover, or fit a stabiliser before the unit.",
        ),
        MainsOutsideWideWindow { lowest, highest, window } => (
            "mains_outside_wide_window",
            format!(
                "The mains here runs from {} to {}, beyond even the wide window of {} to {}: in those hours the bank is not recharged.",
                lowest.told(),
                highest.told(),
                window.0.told(),
                window.1.told()
            ),
            "Fit a stabiliser before the unit, and count those hours as a cut.",
        ),
        ChangeoverTooSlow { load, bears, breaks } => (
            "changeover_too_slow",
            format!("{load} rides through {}; the changeover takes {}.", bears.told(), breaks.told()),
            "Use the narrow window, a faster unit, or give this load a small supply of its own.",
        ),
        SquareWaveRefused { load, reused: true } => (
            "square_wave_refused",
            format!("{load} needs a sine, and the unit that is there makes a square wave."),
            "Fit a sine unit, or take this load off the list.",
        ),
        SquareWaveRefused { load, reused: false } => (
            "square_wave_refused",
            format!("{load} needs a sine, so a sine unit was chosen."),
            "Offer a square-wave unit only without this load.",
        ),
        SquareWaveDisliked { load } => (
            "square_wave_disliked",
            format!("{load} runs on a square wave, but hotter or louder."),
            "A sine unit serves it better.",
        ),
        NoLoadDrawHeavy { draw, share } => (
            "no_load_draw_heavy",
            format!("The unit itself draws {}, {} of the energy of the cut.", draw.told(), percent(*share)),
            "Take a unit with a lower no-load draw, or switch it off when nothing is needed.",
        ),
        _ => return None,
    })
}

fn of_bank(finding: &Finding) -> Option<Parts> {
    use Finding::*;
    Some(match finding {
        BusTooLow { bus, current, limit } => (
            "bus_volts_too_low",
            format!(
                "At {} the battery current is {}; good practice ends at {}.",
                bus.volts().told(),
                current.told(),
                limit.told()
            ),
            "Take higher bank volts.",
        ),
        CurrentAboveCable { current, limit } => (
            "battery_current_too_high",
            format!("The battery current is {}, above the {} that one cable may carry.", current.told(), limit.told()),
            "Lay the cables in parallel as listed, all of one length; or take higher bank volts, or two units.",
        ),
        ManyStrings { strings, good } => (
            "many_strings",
            format!("{strings} strings in parallel share the current badly; {good} are good practice."),
            "Take larger blocks or higher bank volts, with equal leads to one busbar.",
        ),
        TooManyStrings { strings, most } => (
            "too_many_strings",
            format!("{strings} strings in parallel are more than the {most} that may be."),
            "Take larger blocks, cells of 2 V, higher bank volts, or fewer hours.",
        ),
        RatingsContradict { slow, fast } => (
            "ratings_contradict",
            format!(
                "The ratings contradict each other: {} at {} and {} at {}. Typical ones were used.",
                slow.1.told(),
                duration(slow.0),
                fast.1.told(),
                duration(fast.0)
            ),
            "Read the data sheet again: a faster discharge gives fewer Ah, in a shorter time.",
        ),
        TypicalRatings { peukert } => (
            "typical_ratings",
            format!(
                "No data-sheet ratings were given: the battery's typical exponent {} was used.",
                Numbers::default().three_figures(*peukert)
            ),
            "Enter two or three ratings of the block you fit.",
        ),
        OutsideRatings { hours, shortest, longest } => (
            "outside_ratings",
            format!(
                "The hardest current would empty the bank in {}; the ratings cover {} to {}.",
                duration(*hours),
                duration(*shortest),
                duration(*longest)
            ),
            "Enter a rating at a faster rate, and test the bank at commissioning.",
        ),
        OutsideMethod { what, given, lowest, highest, unit } => (
            "outside_method",
            outside(what, *given, *lowest, *highest, unit),
            "Ask the maker, and confirm by measurement.",
        ),
        MedicalLoad { load, kind } => (
            "medical_load",
            format!("{load}: {}. No hours are promised for it.", kind.label()),
            "Agree with its supplier and the doctor; keep its own reserve; register with the utility; test weekly.",
        ),
        _ => return None,
    })
}

fn outside(what: &str, given: f64, lowest: f64, highest: f64, unit: &str) -> String {
    let told = |value| Numbers::default().with_unit(value, unit);
    format!("{what}: {} is outside the method's range of {} to {}.", told(given), told(lowest), told(highest))
}

fn of_charger(finding: &Finding) -> Option<Parts> {
    use Finding::*;
    Some(match finding {
        CannotRefill { needs, has, charger_needed } => (
            "cannot_refill",
            format!("The bank needs {} to be full again and has {} between cuts.", duration(*needs), duration(*has)),
            if charger_needed.0 > 0.0 {
                "Fit a stronger charger within what the bank bears, a larger bank, or ask less of it."
            } else {
                "No charger is fast enough: ask for fewer hours, take fewer loads, or lithium."
            },
        ),
        NoMains => (
            "no_mains",
            "There are no mains hours to recharge in.".to_owned(),
            "Add another source, such as a generator or solar, or correct the hours between cuts.",
        ),
        ChargerTooStrong { current, most } => (
            "charger_too_strong",
            format!("The charger gives {}; this bank bears {}.", current.told(), most.told()),
            "Choose a lower current setting.",
        ),
        ChargerTooWeak { current, least } => (
            "charger_too_weak",
            format!("The charger gives {}; this bank wants {} at least.", current.told(), least.told()),
            "Choose a higher current setting or a separate charger.",
        ),
        IncomingBreakerTooSmall { current, breaker } => (
            "incoming_breaker_too_small",
            format!("Loads and charger together draw {} through a breaker of {}.", current.told(), breaker.told()),
            "Choose a lower charging current, or have the supply enlarged.",
        ),
        LithiumInTheCold { coldest } => (
            "lithium_in_the_cold",
            format!(
                "The battery place falls to {}; lithium iron phosphate must not be charged below 0 °C.",
                coldest.told()
            ),
            "Put it in a warmer place, or take a pack with a heater and a charge lock.",
        ),
        BatteryTooHot { hottest, limit } => (
            "battery_too_hot",
            format!(
                "The battery place rises to {}; this battery may be charged up to {}.",
                hottest.told(),
                limit.told()
            ),
            "Find a cooler place or give it air.",
        ),
        _ => return None,
    })
}

fn of_cables(finding: &Finding) -> Option<Parts> {
    use Finding::*;
    Some(match finding {
        DropAboveTarget { run: of, share, target } => (
            "drop_above_target",
            format!("Cable {}: the drop is {}, above the {} aimed at.", run(*of), percent(*share), percent(*target)),
            "Shorten the run or take the next size.",
        ),
        DropAboveLimit { run: of, share, limit } => (
            "drop_above_limit",
            format!("Cable {}: the drop is {}, above the limit of {}.", run(*of), percent(*share), percent(*limit)),
            "Shorten the run, take a larger size or higher bank volts.",
        ),
        NoCableFits { run: of, current, length } => (
            "no_cable_fits",
            format!("Cable {}: no size of the table carries {} over {}.", run(*of), current.told(), length.told()),
            "Shorten the run, take higher bank volts, or split the load.",
        ),
        NoFuseFits { run: of, current, capacity } => (
            "no_fuse_fits",
            format!(
                "Cable {}: no fuse of the trade lies between the current of {} and the cable's {}.",
                run(*of),
                current.told(),
                capacity.told()
            ),
            "Take a larger cable, or split the load.",
        ),
        BreakingCapacityTooSmall { run: of, fault, breaks } => (
            "breaking_capacity_too_small",
            format!("Cable {}: a fault brings {}; the fuse breaks {}.", run(*of), fault.told(), breaks.told()),
            "Fit a fuse of a class that breaks more.",
        ),
        FaultHeatsCable { run: of, fault } => (
            "fault_heats_cable",
            format!("Cable {}: a fault of {} overheats it before the fuse clears.", run(*of), fault.told()),
            "Take a larger cable or a faster fuse.",
        ),
        AmbientOutsideTable { run: of, ambient, highest } => (
            "ambient_outside_table",
            format!(
                "Cable {}: {} is beyond the code's table, which ends at {}.",
                run(*of),
                ambient.told(),
                highest.told()
            ),
            "Route it through a cooler place, or take insulation for more heat.",
        ),
        StringsUneven { worst_over_mean } => (
            "strings_uneven",
            format!("The hardest string carries {} of the mean.", percent(*worst_over_mean)),
            "Equal leads, lugs and sizes from each string to one busbar.",
        ),
        NoAluminium { run: of, smallest_mm2 } => (
            "no_aluminium",
            format!(
                "Cable {}: aluminium is not made as a flexible battery lead, and for fixed cables not below {}; copper was taken.",
                run(*of),
                Numbers::default().with_unit(*smallest_mm2, "mm²")
            ),
            "Use flexible copper here, with lugs made for it.",
        ),
        ConductorOutsideTable { run: of, resistance } => (
            "conductor_outside_table",
            format!("Cable {}: {} is outside the table.", run(*of), resistance.told()),
            "Confirm the resistance by the cable's own data sheet.",
        ),
        FaultCurrentNeedsMaker { estimate } => (
            "fault_current_needs_maker",
            format!(
                "A lithium bank's fault current does not follow from its capacity; {} was assumed.",
                estimate.told()
            ),
            "Ask the maker for the prospective fault current before choosing the fuse.",
        ),
        FuseSlowOnAgedBank { run: of, gives, opens_at } => (
            "fuse_slow_on_aged_bank",
            format!(
                "Cable {}: an aged bank gives a fault {}, less than the {} that opens the fuse within seconds.",
                run(*of),
                gives.told(),
                opens_at.told()
            ),
            "Shorten the run or take a larger cable; replace the bank before it is worn out.",
        ),
        BreakerSlowOnBattery { run: of, gives, trips_at } => (
            "breaker_slow_on_battery",
            format!(
                "Cable {}: on battery the unit gives {}, less than the {} that trips the breaker at once.",
                run(*of),
                gives.told(),
                trips_at.told()
            ),
            "Prove by test that the unit shuts down on a fault; fit an RCD after it.",
        ),
        _ => return None,
    })
}

fn of_place(finding: &Finding) -> Parts {
    use Finding::*;
    let opening = |area: f64| Numbers::default().with_unit(area, "cm²");
    match finding {
        FloodedWithoutAir { opening_cm2 } => (
            "flooded_without_air",
            format!(
                "A flooded bank gives off hydrogen; this room has no openings. It needs two of {} each.",
                opening(*opening_cm2)
            ),
            "Make two openings to the outside, low and high on opposite walls, or choose a sealed bank.",
        ),
        SealedWithoutAir { opening_cm2 } => (
            "sealed_without_air",
            format!(
                "A sealed bank gives off some hydrogen; this room has no openings. It needs two of {} each.",
                opening(*opening_cm2)
            ),
            "Make two openings to the outside, low and high on opposite walls.",
        ),
        TemperatureOutsideTable { given, lowest, highest } => (
            "temperature_outside_table",
            format!(
                "{} is outside the table of {} to {}; its nearest row was used.",
                given.told(),
                lowest.told(),
                highest.told()
            ),
            "Warm the battery's place, or ask the maker for the capacity at that temperature.",
        ),
        other => by_name(other),
    }
}

/// Findings are told group by group; one that no group knows is shown by its own name.
fn by_name(finding: &Finding) -> Parts {
    ("finding", format!("{finding:?}"), "Look at the working.")
}
