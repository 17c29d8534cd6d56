//! The charger: current, time to full, set volts, and what it draws from the mains.
//!
//! While it charges the loads live on the mains, so that the whole charging current reaches the bank.

pub mod current;
pub mod refill;
pub mod set_volts;

use current::Limits;
use refill::Refill;
use set_volts::SetVolts;

use super::assumptions::Assumptions;
use super::battery_bank::peukert::Curve;
use super::design::{Bank, Charger, Demand, Inverter};
use super::finding::Finding;
use super::sheet::{Checked, Rule, Sheet};
use super::survey::{Chemistry, Survey};
use super::tables::chemistries::{Properties, properties};
use crate::units::{Amps, DcVolts, Hours, Watts};

/// The charger for a bank.
pub fn plan(
    survey: &Survey,
    demand: &Demand,
    _inverter: &Inverter,
    bank: &Bank,
    assumptions: &Assumptions,
    sheet: &mut Sheet,
) -> Charger {
    let kind = properties(survey.choice.chemistry);
    let refill = refill(survey, bank, kind, assumptions);
    let coldest = survey.site.battery_coldest;
    let limits = Limits::of(refill.capacity, &kind.charge_current, coldest, assumptions, sheet);
    let has = survey.outage.mains_between_cuts;
    let needed = needed(&refill, has, kind, limits);
    let current = limits.setting(needed, sheet);
    let recharge = refill.write_down(current, sheet);
    let refills = judge_time(recharge, has, needed, sheet);
    judge_current(current, needed, limits, sheet);
    judge_temperature(survey, kind, sheet);
    let cells = kind.cells_per_block * bank.blocks_in_series;
    let volts = SetVolts::of(cells, &survey.site, assumptions);
    volts.write_down(cells, &survey.site, assumptions, sheet);
    let input_current = input_current(current, volts.coldest, survey, assumptions, sheet);
    Charger {
        current,
        least: limits.least,
        most: limits.most,
        recharge,
        input_current,
        incoming_current: incoming_current(input_current, survey, demand, sheet),
        absorption: volts.absorption,
        float: volts.float,
        compensation_per_kelvin: volts.per_kelvin,
        absorption_coldest: volts.coldest,
        absorption_hottest: volts.hottest,
        refills,
    }
}

fn refill(survey: &Survey, bank: &Bank, kind: &Properties, assumptions: &Assumptions) -> Refill {
    let curve = Curve::of_bank(survey, bank);
    Refill {
        capacity: bank.installed * curve.share_at(Hours(20.0)),
        taken: bank.outage,
        charge_factor: assumptions.charge_factor,
        end_of_bulk: kind.charge_at_end_of_bulk,
        absorption: kind.absorption,
    }
}

/// The current that fills the bank in time; where no time is enough, the most it bears, and where
/// there is no mains at all, the usual one.
fn needed(refill: &Refill, has: Hours, kind: &Properties, limits: Limits) -> Amps {
    if has <= Hours::ZERO {
        return Amps(refill.capacity.0 * kind.charge_current.usual);
    }
    refill.current_for(has).unwrap_or(limits.most)
}

/// Whether the bank is full before the next cut.
fn judge_time(recharge: Hours, has: Hours, needed: Amps, sheet: &mut Sheet) -> bool {
    if has <= Hours::ZERO {
        sheet.find(Finding::NoMains);
        return false;
    }
    let refills = recharge <= has * (1.0 + 1e-9);
    if !refills {
        sheet.find(Finding::CannotRefill { needs: recharge, has, charger_needed: needed });
    }
    refills
}

/// Whether the bank bears the current that is set or needed, and whether it is enough for its health.
fn judge_current(current: Amps, needed: Amps, limits: Limits, sheet: &mut Sheet) {
    let strongest = current.max(needed);
    if strongest > limits.most * (1.0 + 1e-9) {
        sheet.find(Finding::ChargerTooStrong { current: strongest, most: limits.most });
    }
    if current < limits.least * (1.0 - 1e-9) {
        sheet.find(Finding::ChargerTooWeak { current, least: limits.least });
    }
}

fn judge_temperature(survey: &Survey, kind: &Properties, sheet: &mut Sheet) {
    let (coldest, hottest) = (survey.site.battery_coldest, survey.site.battery_hottest);
    let (lowest, limit) = kind.charge_temperature;
    if survey.choice.chemistry == Chemistry::Lfp && coldest < lowest {
        sheet.find(Finding::LithiumInTheCold { coldest });
    }
    if hottest > limit {
        sheet.find(Finding::BatteryTooHot { hottest, limit });
    }
}

const INPUT: Rule = Rule {
    symbol: "I_in",
    name: "Current from the mains while charging",
    formula: "I_in = I_charge · V_abs,cold / (η · PF · U)",
    unit: "A",
    source: "power balance; efficiency and power factor of chargers built into home units",
    checked: Checked::CommonPractice,
};

fn input_current(current: Amps, volts: DcVolts, survey: &Survey, assumptions: &Assumptions, sheet: &mut Sheet) -> Amps {
    let drawn: Watts = volts * current / assumptions.charger_efficiency;
    let amps = drawn.0 / assumptions.charger_power_factor / survey.site.supply.0;
    let values = [
        ("I_charge", current.0, "A"),
        ("V_abs,cold", volts.0, "V"),
        ("η", assumptions.charger_efficiency, ""),
        ("PF", assumptions.charger_power_factor, ""),
        ("U", survey.site.supply.0, "V"),
    ];
    Amps(sheet.line("charger.input_current_a", &INPUT, &values, amps))
}

const INCOMING: Rule = Rule {
    symbol: "I_mains",
    name: "Current from the mains with load and charger together",
    formula: "I_mains = S_running / U + I_in",
    unit: "A",
    source: "sum of both, an upper bound whatever their power factors",
    checked: Checked::Derived,
};

fn incoming_current(input: Amps, survey: &Survey, demand: &Demand, sheet: &mut Sheet) -> Amps {
    let load: Amps = demand.running_va / survey.site.supply;
    let values = [("S_running", demand.running_va.0, "VA"), ("U", survey.site.supply.0, "V"), ("I_in", input.0, "A")];
    let current = Amps(sheet.line("charger.incoming_current_a", &INCOMING, &values, (load + input).0));
    let breaker = survey.site.incoming_breaker;
    if current > breaker {
        sheet.find(Finding::IncomingBreakerTooSmall { current, breaker });
    }
    current
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::sizing::battery_bank::example;
    use crate::units::Celsius;

    fn planned(survey: &Survey) -> (Charger, Bank, Sheet) {
        let (bank, _) = example::bank(survey, &[(400.0, 2.0), (150.0, 2.0)]);
        let factors = Assumptions::defaults(survey.choice.chemistry);
        let mut sheet = Sheet::default();
        let unit = example::inverter(Watts(500.0));
        let charger = plan(survey, &example::demand(), &unit, &bank, &factors, &mut sheet);
        (charger, bank, sheet)
    }

    #[test]
    fn the_setting_is_the_smallest_that_refills_in_the_mains_hours_and_keeps_the_bank_healthy() {
        for chemistry in Chemistry::ALL {
            let survey = example::shop(chemistry);
            let (charger, bank, sheet) = planned(&survey);
            assert!(charger.refills && charger.recharge <= survey.outage.mains_between_cuts, "{chemistry:?}");
            assert!(charger.least <= charger.current && charger.current <= charger.most, "{chemistry:?}: {charger:?}");
            assert_eq!(sheet.findings, [], "{chemistry:?}");
            assert!(charger.current * charger.recharge >= bank.outage, "less in than out: {chemistry:?}");
        }
    }

    #[test]
    fn too_little_mains_is_told_with_the_current_that_would_do() {
        let mut survey = example::shop(Chemistry::FloodedTubular);
        survey.outage.mains_between_cuts = Hours(2.0);
        let (charger, bank, sheet) = planned(&survey);
        assert!(!charger.refills && charger.current <= charger.most);
        let needed = sheet.findings.iter().find_map(|finding| match finding {
            Finding::CannotRefill { has: Hours(2.0), charger_needed, .. } => Some(*charger_needed),
            _ => None,
        });
        let needed = needed.expect("two hours do not refill it");
        let kind = properties(Chemistry::FloodedTubular);
        let refill = refill(&survey, &bank, kind, &Assumptions::defaults(Chemistry::FloodedTubular));
        assert!((refill.time(needed).0 - 2.0).abs() < 1e-9);
        assert!(sheet.findings.contains(&Finding::ChargerTooStrong { current: needed, most: charger.most }));
    }

    #[test]
    fn without_mains_nothing_is_refilled() {
        let mut survey = example::shop(Chemistry::VrlaAgm);
        survey.outage.mains_between_cuts = Hours(0.0);
        let (charger, _, sheet) = planned(&survey);
        assert!(!charger.refills && charger.recharge.0.is_finite());
        assert_eq!(sheet.findings, [Finding::NoMains]);
    }

    #[test]
    fn set_volts_follow_the_temperature() {
        let (charger, ..) = planned(&example::shop(Chemistry::VrlaAgm));
        // Six cells: 2.40 V absorption, 2.27 V float, −4 mV/K. Source: makers' manuals. 15 and 38 °C by hand.
        for (what, volts, expected) in [
            ("absorption", charger.absorption, 14.40),
            ("float", charger.float, 13.62),
            ("coldest", charger.absorption_coldest, 14.64),
            ("hottest", charger.absorption_hottest, 14.088),
        ] {
            assert!((volts.0 - expected).abs() < 1e-9, "{what}: {volts:?}");
        }
        assert!((charger.compensation_per_kelvin + 0.024).abs() < 1e-12);
        let (lithium, ..) = planned(&example::shop(Chemistry::Lfp));
        assert_eq!(lithium.absorption_coldest, lithium.absorption_hottest);
    }

    #[test]
    fn the_mains_carries_load_and_charger_together() {
        let mut survey = example::shop(Chemistry::VrlaAgm);
        let (charger, ..) = planned(&survey);
        let by_hand = charger.current.0 * 14.64 / 0.85 / 0.8 / 230.0;
        assert!((charger.input_current.0 - by_hand).abs() < 1e-9);
        assert!((charger.incoming_current.0 - by_hand - 4.0).abs() < 1e-9, "920 VA at 230 V are 4 A more");
        survey.site.incoming_breaker = Amps(6.0);
        let told = Finding::IncomingBreakerTooSmall { current: charger.incoming_current, breaker: Amps(6.0) };
        assert!(planned(&survey).2.findings.contains(&told));
    }

    #[test]
    fn cold_lithium_and_hot_batteries_are_told() {
        let mut survey = example::shop(Chemistry::Lfp);
        survey.site.battery_coldest = Celsius(-5.0);
        survey.site.battery_hottest = Celsius(46.0);
        let (charger, _, sheet) = planned(&survey);
        assert!(sheet.findings.contains(&Finding::LithiumInTheCold { coldest: Celsius(-5.0) }));
        let hot = Finding::BatteryTooHot { hottest: Celsius(46.0), limit: Celsius(45.0) };
        assert!(sheet.findings.contains(&hot));
        survey.site.battery_coldest = Celsius(16.0);
        let (warm, ..) = planned(&survey);
        assert!(charger.most < warm.most, "below 15 °C lithium bears a fifth of its capacity only");
    }

    #[test]
    fn every_figure_of_the_charger_stands_on_the_sheet_with_the_same_value() {
        let (charger, _, sheet) = planned(&example::shop(Chemistry::FloodedFlatPlate));
        example::assert_on_sheet("charger", &charger, &sheet);
    }
}
