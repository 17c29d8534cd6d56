//! A small shop and its unit, for tests; invented.

use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::{Bank, Demand, Inverter, Losses, MainsWindow, Waveform};
use crate::sizing::sheet::Sheet;
use crate::sizing::survey::*;
use crate::units::*;

/// A shop with a cut of four hours, ten times a week.
pub(crate) fn shop(chemistry: Chemistry) -> Survey {
    Survey {
        site: Site {
            name: "Corner shop".into(),
            supply: AcVolts(230.0),
            frequency: Hertz(50.0),
            supply_lowest: AcVolts(185.0),
            supply_highest: AcVolts(250.0),
            battery_coldest: Celsius(15.0),
            battery_hottest: Celsius(38.0),
            inverter_ambient: Celsius(35.0),
            altitude: Metres(300.0),
            incoming_breaker: Amps(32.0),
            battery_room_vented: true,
        },
        outage: Outage {
            autonomy: Hours(4.0),
            starts_at: StartsAt::Worst,
            cuts_per_week: 10.0,
            mains_between_cuts: Hours(10.0),
            pattern: Pattern::default(),
        },
        loads: vec![],
        choice: Choice {
            chemistry,
            bus: None,
            code: Code::Iec,
            conductor: Conductor::Copper,
            insulation: Insulation::Xlpe90,
            method: Method::F,
            ac_method: Method::C,
            square_wave_offered: false,
        },
        runs: Runs {
            bank_to_inverter: Metres(2.0),
            string_lead: Metres(1.0),
            inverter_to_board: Metres(8.0),
            mains_to_inverter: Metres(8.0),
            charger_to_bank: None,
        },
        battery_ratings: vec![],
        reuse: None,
    }
}

/// A unit of 2 kVA whose peak draw from the bank is given.
pub(crate) fn inverter(peak_dc: Watts) -> Inverter {
    Inverter {
        required: VoltAmps(2000.0),
        rating: VoltAmps(2000.0),
        rating_w: Watts(1600.0),
        derating: Fraction::ONE,
        surge: VoltAmps(4000.0),
        surge_held: Seconds(5.0),
        surge_margin: 0.5,
        waveform: Waveform::Sine,
        load_share: 0.5,
        losses: Losses { no_load: Watts(20.0), linear: 0.0, quadratic: 0.12, rated: Watts(1600.0) },
        changeover: Milliseconds(10.0),
        mains_window: MainsWindow::Narrow,
        mains_window_volts: (AcVolts(190.0), AcVolts(250.0)),
        peak_dc,
    }
}

/// What the loads of the shop ask for.
pub(crate) fn demand() -> Demand {
    Demand {
        running: Watts(700.0),
        running_va: VoltAmps(920.0),
        surge_together: VoltAmps(2500.0),
        surge_staggered: VoltAmps(1800.0),
        outage: WattHours(2000.0),
        worst_start: TimeOfDay::MIDNIGHT,
        sized_start: TimeOfDay::MIDNIGHT,
        average_outage: WattHours(1500.0),
        day: vec![],
        starts: vec![],
    }
}

/// The bank for one cut on the shop's unit, with the default factors.
pub(crate) fn bank(survey: &Survey, cut: &[(f64, f64)]) -> (Bank, Sheet) {
    bank_with(survey, cut, &Assumptions::defaults(survey.choice.chemistry))
}

/// The same with other factors; the peak draw is that of the heaviest step.
pub(crate) fn bank_with(survey: &Survey, cut: &[(f64, f64)], assumptions: &Assumptions) -> (Bank, Sheet) {
    let mut sheet = Sheet::default();
    let peak = cut.iter().map(|step| step.0).fold(0.0, f64::max);
    let unit = inverter(inverter(Watts(0.0)).losses.drawn(Watts(peak)));
    let steps = cut.iter().map(|&(watts, hours)| (Watts(watts), Hours(hours))).collect();
    let bank = super::bank_for(&[steps], survey, &unit, None, assumptions, &mut sheet);
    (bank, sheet)
}

/// Every number of a stage stands on the sheet under its path, with the very same value.
pub(crate) fn assert_on_sheet(stage: &str, answer: &impl serde::Serialize, sheet: &Sheet) {
    let json = serde_json::to_value(answer).expect("an answer is JSON");
    for (key, value) in json.as_object().expect("a stage is an object") {
        let Some(value) = value.as_f64() else { continue };
        let figure = format!("{stage}.{key}");
        let lines: Vec<_> = sheet.working.iter().filter(|line| line.figure == figure).map(|line| line.result).collect();
        assert_eq!(lines, [value], "{figure}");
    }
}
