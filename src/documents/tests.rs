//! What is written reads back equal, whatever a survey holds.

use proptest::prelude::*;
use proptest::sample::{select, subsequence};

use super::draft::Draft;
use super::limits::{self as limit, Limit};
use super::names::Named;
use super::survey;
use crate::sizing::assumptions::Assumptions;
use crate::sizing::survey::*;
use crate::sizing::tables::outages;
use crate::units::*;

fn within(limit: Limit) -> impl Strategy<Value = f64> {
    let (lowest, highest) = (limit.lowest, limit.highest);
    prop_oneof![8 => lowest..=highest, 1 => Just(lowest), 1 => Just(highest)]
}

fn any_of<T: Named + std::fmt::Debug>() -> impl Strategy<Value = T> {
    select(T::NAMES).prop_map(|(value, _)| value)
}

/// Any script, quotes and backslashes too; no white space around it and no control characters.
fn name() -> impl Strategy<Value = String> {
    "[^\\p{Cc}]{0,40}".prop_map(|text| text.trim().to_owned())
}

fn given_name() -> impl Strategy<Value = String> {
    name().prop_map(|name| if name.is_empty() { "Lamp".to_owned() } else { name })
}

fn pair(limit: Limit) -> impl Strategy<Value = (f64, f64)> {
    (within(limit), within(limit)).prop_map(|(a, b)| (a.min(b), a.max(b)))
}

fn site() -> impl Strategy<Value = Site> {
    let supply = (within(limit::SUPPLY_V), within(limit::FREQUENCY_HZ), pair(limit::SUPPLY_SEEN_V));
    let room = (pair(limit::TEMPERATURE_C), within(limit::TEMPERATURE_C), within(limit::ALTITUDE_M));
    (name(), supply, room, within(limit::BREAKER_A), any::<bool>()).prop_map(|(name, supply, room, breaker, vented)| {
        Site {
            name,
            supply: AcVolts(supply.0),
            frequency: Hertz(supply.1),
            supply_lowest: AcVolts(supply.2.0),
            supply_highest: AcVolts(supply.2.1),
            battery_coldest: Celsius(room.0.0),
            battery_hottest: Celsius(room.0.1),
            inverter_ambient: Celsius(room.1),
            altitude: Metres(room.2),
            incoming_breaker: Amps(breaker),
            battery_room_vented: vented,
        }
    })
}

fn outage() -> impl Strategy<Value = Outage> {
    let starts = prop_oneof![Just(StartsAt::Worst), (0..1440_u16).prop_map(|minute| StartsAt::At(time(minute)))];
    let often = (within(limit::CUTS_PER_WEEK), within(limit::MAINS_BETWEEN_CUTS_H));
    (within(limit::AUTONOMY_H), starts, often, pattern()).prop_map(
        |(autonomy, starts_at, (cuts_per_week, between), pattern)| Outage {
            autonomy: Hours(autonomy),
            starts_at,
            cuts_per_week,
            mains_between_cuts: Hours(between),
            pattern,
        },
    )
}

fn pattern() -> impl Strategy<Value = Pattern> {
    let usual = proptest::option::of(0.05..24.0_f64);
    let longest = proptest::option::of(24.0..168.0_f64);
    let mostly = any_of::<Mostly>();
    let blocks = (proptest::collection::vec(window(), 0..limit::WINDOWS), within(limit::BLOCKS_SHIFT_H));
    let region = proptest::option::of(select(outages::REGIONS.iter().collect::<Vec<_>>()));
    (usual, longest, mostly, blocks, within(limit::LOW_VOLTAGE_H), region).prop_map(
        |(usual, longest, mostly, (blocks, shift), low, region)| Pattern {
            usual: usual.map(Hours),
            longest: longest.map(Hours),
            mostly,
            blocks,
            blocks_shift: Hours(shift),
            low_voltage: Hours(low),
            region,
        },
    )
}

fn time(minute: u16) -> TimeOfDay {
    TimeOfDay::from_minutes(minute).expect("a minute of the day")
}

fn window() -> impl Strategy<Value = Window> {
    let ends = (0..1440_u16, 0..=1440_u16).prop_filter("two times", |(from, to)| from != to);
    ends.prop_map(|(from, to)| Window { from: time(from), to: time(to) })
}

fn motor_plate() -> impl Strategy<Value = Option<MotorPlate>> {
    let letters = select("ABCDEFGHJKLMNPRSTUV".chars().collect::<Vec<_>>());
    let lettered = (within(limit::SHAFT_HP), letters);
    prop_oneof![
        Just(None),
        within(limit::LOCKED_ROTOR_A).prop_map(|amps| Some(MotorPlate::LockedRotor(Amps(amps)))),
        lettered.prop_map(|(horsepower, letter)| Some(MotorPlate::CodeLetter { horsepower, letter })),
        within(limit::SHAFT_HP).prop_map(|horsepower| Some(MotorPlate::Horsepower(horsepower))),
    ]
}

fn share(limit: Limit) -> impl Strategy<Value = Fraction> {
    within(limit).prop_map(|share| Fraction::new(share).expect("a share"))
}

fn load() -> impl Strategy<Value = Load> {
    let many = (1..=1000_u32).prop_flat_map(|quantity| (Just(quantity), 1..=quantity));
    let power = (within(limit::RUNNING_W), share(limit::POWER_FACTOR), share(limit::DUTY), any_of::<StartKind>());
    let surge = (within(limit::SURGE_MULTIPLE), within(limit::SURGE_S), motor_plate());
    let when = (proptest::collection::vec(window(), 1..limit::WINDOWS), proptest::option::of(given_name()));
    let needs = (any_of::<NeedsSine>(), within(limit::MAX_BREAK_MS), any_of::<LifeSupport>());
    let rest = (surge, when, needs);
    (given_name(), many, power, rest).prop_map(|(name, (quantity, on_together), power, (surge, when, needs))| Load {
        name,
        quantity,
        on_together,
        running: Watts(power.0),
        power_factor: power.1,
        duty: power.2,
        start: power.3,
        surge_multiple: surge.0,
        surge_lasts: Seconds(surge.1),
        motor_plate: surge.2,
        windows: when.0,
        turn: when.1,
        needs_sine: needs.0,
        max_break: Milliseconds(needs.1),
        life_support: needs.2,
    })
}

fn choice() -> impl Strategy<Value = Choice> {
    let bus = prop_oneof![Just(None), select(&BusVolts::ALL[..]).prop_map(Some)];
    let cable =
        (any_of::<Code>(), any_of::<Conductor>(), any_of::<Insulation>(), any_of::<Method>(), any_of::<Method>());
    (any_of::<Chemistry>(), bus, cable, any::<bool>()).prop_map(|(chemistry, bus, cable, square_wave_offered)| Choice {
        chemistry,
        bus,
        code: cable.0,
        conductor: cable.1,
        insulation: cable.2,
        method: cable.3,
        ac_method: cable.4,
        square_wave_offered,
    })
}

fn runs() -> impl Strategy<Value = Runs> {
    let length = || within(limit::LENGTH_M).prop_map(Metres);
    let lengths = (length(), length(), length(), length(), proptest::option::of(length()));
    lengths.prop_map(|(bank_to_inverter, string_lead, inverter_to_board, mains_to_inverter, charger_to_bank)| Runs {
        bank_to_inverter,
        string_lead,
        inverter_to_board,
        mains_to_inverter,
        charger_to_bank,
    })
}

fn ratings() -> impl Strategy<Value = Vec<BatteryRating>> {
    let hours = subsequence(vec![0.1, 1.0, 5.0, 10.0, 20.0, 100.0, 240.0], 0..=limit::RATINGS).prop_shuffle();
    (hours, proptest::collection::vec(within(limit::RATING_AH), limit::RATINGS)).prop_map(|(hours, capacities)| {
        let rating = |(hours, ah)| BatteryRating { hours: Hours(hours), capacity: AmpHours(ah) };
        hours.into_iter().zip(capacities).map(rating).collect()
    })
}

fn reuse() -> impl Strategy<Value = ReusedInverter> {
    let plate = (within(limit::REUSE_VA), proptest::option::of(within(limit::REUSE_W)));
    let surge = proptest::option::of(within(limit::REUSE_SURGE_VA));
    let window = proptest::option::of(pair(limit::SUPPLY_SEEN_V).prop_filter("two ends", |(low, high)| low < high));
    let rest = (any::<bool>(), proptest::option::of(within(limit::CHANGEOVER_MS)), window);
    (plate, surge, rest).prop_map(|((rating, rating_w), surge, (sine, changeover, window))| ReusedInverter {
        rating: VoltAmps(rating),
        rating_w: rating_w.map(Watts),
        surge: surge.map(VoltAmps),
        sine,
        changeover: changeover.map(Milliseconds),
        mains_window: window.map(|(low, high)| (AcVolts(low), AcVolts(high))),
    })
}

/// Some of the assumptions, each somewhere within its limits.
fn overrides() -> impl Strategy<Value = Vec<(String, f64)>> {
    let entries = Assumptions::defaults(Chemistry::Lfp).entries();
    let (count, abouts) = (entries.len(), entries.into_iter().map(|entry| entry.about).collect::<Vec<_>>());
    (subsequence(abouts, 0..6), proptest::collection::vec(0.0..=1.0_f64, count)).prop_map(|(abouts, places)| {
        let value = |lowest: f64, highest: f64, at: f64| (lowest + (highest - lowest) * at).clamp(lowest, highest);
        abouts.into_iter().zip(places).map(|(a, at)| (a.key.to_owned(), value(a.lowest, a.highest, at))).collect()
    })
}

fn draft() -> impl Strategy<Value = Draft> {
    let asked = (proptest::option::of(outage()), proptest::collection::vec(load(), 0..4));
    let fitted = (choice(), runs(), ratings(), proptest::option::of(reuse()), overrides());
    (site(), asked, fitted).prop_map(|(site, (outage, loads), fitted)| Draft {
        site,
        outage,
        loads,
        choice: fitted.0,
        runs: fitted.1,
        battery_ratings: fitted.2,
        reuse: fitted.3,
        overrides: fitted.4,
        defaults_taken: Vec::new(),
    })
}

proptest! {
    #[test]
    fn a_draft_that_is_written_reads_back_equal(draft in draft()) {
        let mut read = Draft::read(&draft.write()).map_err(|faults| TestCaseError::fail(format!("{faults:?}")))?;
        // A draft without a cut leaves the cut's keys out.
        prop_assert!(draft.outage.is_none() || read.defaults_taken.is_empty(), "{:?}", read.defaults_taken);
        read.defaults_taken.clear();
        read.overrides.sort_by(|a, b| a.0.cmp(&b.0));
        let mut expected = draft;
        expected.overrides.sort_by(|a, b| a.0.cmp(&b.0));
        prop_assert_eq!(read, expected);
    }

    #[test]
    fn a_whole_draft_is_a_survey_and_a_part_names_what_is_missing(draft in draft()) {
        match survey::read(&draft.write()) {
            Ok((_, survey)) => prop_assert_eq!((Some(&survey.outage), &survey.loads), (draft.outage.as_ref(), &draft.loads)),
            Err(faults) => {
                let paths: Vec<_> = faults.iter().map(|fault| fault.path.as_str()).collect();
                let missing = |absent: bool, path| absent.then_some(path);
                let expected = [missing(draft.outage.is_none(), "outage.autonomy_h"), missing(draft.loads.is_empty(), "loads")];
                prop_assert_eq!(paths, expected.into_iter().flatten().collect::<Vec<_>>());
            }
        }
    }

    #[test]
    fn no_text_whatever_brings_the_reader_down(text in ".{0,200}") {
        prop_assert!(survey::read(&text).is_err());
    }

    #[test]
    fn a_document_cut_off_anywhere_is_refused(draft in draft(), at in any::<prop::sample::Index>()) {
        let text = draft.write();
        let end = at.index(text.len());
        if let Some(part) = text.get(..end) {
            prop_assert!(Draft::read(part).is_err());
        }
    }
}
