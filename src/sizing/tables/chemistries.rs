//! What is known of each kind of battery, per cell unless said otherwise.
//!
//! The values are the typical ones of a range; what differs most between makes (exponent, depth,
//! volts, currents, years) is an assumption that a firm can set. Beside each value stands where it
//! comes from; "maker's data sheet" and "maker's manual" were read, `from memory` was not.

use crate::sizing::survey::Chemistry;
use crate::units::{AmpHours, Celsius, DcVolts, Hours, Kilograms, Ohms, Years};

/// What is known of one kind of battery.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Properties {
    /// Cells in a block of nominally 12 V.
    pub cells_per_block: u32,
    /// Nominal volts.
    pub nominal: DcVolts,
    /// Depth of discharge for sizing.
    pub depth_of_discharge_max: f64,
    /// Volts at which the unit stops.
    pub cut_off: DcVolts,
    /// Peukert's exponent where no data sheet is at hand.
    pub peukert: f64,
    /// The fastest rate that exponent is known for.
    pub peukert_holds_from: Hours,
    /// Open-circuit volts: state of charge (falling) and volts.
    pub open_circuit: &'static [(f64, f64)],
    /// Resistance of a full, new cell of 1 Ah at the 20 h rate; a larger cell divides it.
    pub resistance_at_1_ah: Ohms,
    /// Resistance at a state of charge of 20 % over that of a full cell.
    pub resistance_multiple_nearly_empty: f64,
    /// Resistance at the end of the life over that of a new cell.
    pub resistance_multiple_end_of_life: f64,
    /// Charging current over the 20 h capacity.
    pub charge_current: ChargeCurrent,
    /// Set volts of the charger at 25 °C.
    pub set_volts: SetVolts,
    /// State of charge at which the current begins to fall.
    pub charge_at_end_of_bulk: f64,
    /// How long the rest takes.
    pub absorption: Absorption,
    /// Charge put back over charge taken.
    pub charge_factor: f64,
    /// Depth of discharge (falling) and cycles to 80 % of the capacity.
    pub cycles: &'static [(f64, f64)],
    /// Years on float at 25 °C.
    pub calendar_life: Years,
    /// Heat that halves the calendar life, in kelvin.
    pub life_halving_step: Celsius,
    /// Gassing current over the 10 h capacity, mA per Ah; `None` where nothing gasses in normal use.
    pub gassing: Option<Gassing>,
    /// Lowest and highest temperature at which it may be charged.
    pub charge_temperature: (Celsius, Celsius),
    /// Strings in parallel that are good practice.
    pub strings_warn: u32,
    /// Strings in parallel never to be exceeded.
    pub strings_stop: u32,
    /// Mass of a 12 V block per Ah at the 20 h rate, with its acid.
    pub mass_per_ah: Kilograms,
}

/// Charging current over the 20 h capacity, per hour.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct ChargeCurrent {
    /// Below it lead-acid never mixes its acid and does not come back to full.
    pub least: f64,
    /// What makers recommend.
    pub usual: f64,
    /// Above it the battery is harmed.
    pub most: f64,
    /// A lower limit in the cold: below which temperature, and how much.
    pub most_in_the_cold: Option<(Celsius, f64)>,
}

/// Set volts of the charger at 25 °C.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SetVolts {
    /// While the current falls.
    pub absorption: DcVolts,
    /// Once full.
    pub float: DcVolts,
    /// Change of both per kelvin above 25 °C, in mV.
    pub compensation_mv_per_k: f64,
}

/// How long the absorption takes of a battery that was emptied below the end of bulk:
/// `coefficient × 20 h capacity ÷ current + fixed`.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Absorption {
    /// The part that a smaller current lengthens.
    pub coefficient: f64,
    /// The part that no current shortens.
    pub fixed: Hours,
}

/// Gassing current over the 10 h capacity, mA per Ah.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Gassing {
    /// On float.
    pub float: f64,
    /// While boost charging.
    pub boost: f64,
}

/// Flooded tubular plates.
const FLOODED_TUBULAR: Properties = Properties {
    cells_per_block: 6,
    nominal: DcVolts(2.0),
    depth_of_discharge_max: 0.6,    // from memory: 0.5 to 0.8
    cut_off: DcVolts(1.75),         // handbooks on stationary batteries: the usual sizing value
    peukert: 1.20,                  // from memory: 1.15 to 1.30, between gel and flat plate
    peukert_holds_from: Hours(5.0), // as flat plate
    open_circuit: TUBULAR_OPEN_CIRCUIT,
    resistance_at_1_ah: Ohms(0.12),        // from memory: 0.08 to 0.20
    resistance_multiple_nearly_empty: 1.8, // from memory: 1.5 to 2.5
    resistance_multiple_end_of_life: 1.5,  // from memory: 1.25 to 2.0
    charge_current: ChargeCurrent { least: 0.08, usual: 0.10, most: 0.20, most_in_the_cold: None }, // from memory
    set_volts: SetVolts { absorption: DcVolts(2.40), float: DcVolts(2.23), compensation_mv_per_k: -4.0 }, // from memory
    charge_at_end_of_bulk: 0.80,           // from memory, as flat plate
    absorption: Absorption { coefficient: 0.42, fixed: Hours(0.0) }, // from memory, as flat plate
    charge_factor: 1.15,                   // from memory: 1.05 to 1.20
    cycles: &[(0.8, 1200.0), (0.5, 2500.0), (0.3, 4000.0)], // from memory: order of magnitude
    calendar_life: Years(8.0),             // from memory: monobloc of a home unit; large stationary cells last longer
    life_halving_step: Celsius(10.0),      // maker's support article
    gassing: Some(VENTED),
    charge_temperature: LEAD_ACID_CHARGE_TEMPERATURE,
    strings_warn: 3,              // maker's manual
    strings_stop: 4,              // maker's guideline
    mass_per_ah: Kilograms(0.40), // from memory: 55 to 65 kg for a filled 12 V 150 Ah block
};

/// Flooded flat plates, deep-cycle.
const FLOODED_FLAT_PLATE: Properties = Properties {
    cells_per_block: 6,
    nominal: DcVolts(2.0),
    depth_of_discharge_max: 0.5,    // maker's manual
    cut_off: DcVolts(1.75),         // handbooks on stationary batteries: the usual sizing value
    peukert: 1.22,                  // battery monitor's manual, from 20 h ratings and reserve minutes: 1.14 to 1.28
    peukert_holds_from: Hours(5.0), // the same manual: 20 h down to a ninth or a fifth of the capacity
    open_circuit: FLAT_PLATE_OPEN_CIRCUIT,
    resistance_at_1_ah: Ohms(0.08), // derived from a maker's data sheet and a simulated cell: 0.05 to 0.15
    resistance_multiple_nearly_empty: 1.8, // from memory: 1.5 to 2.5
    resistance_multiple_end_of_life: 1.5, // from memory: 1.25 to 2.0
    charge_current: ChargeCurrent { least: 0.05, usual: 0.10, most: 0.20, most_in_the_cold: None }, // maker's manual
    set_volts: SetVolts { absorption: DcVolts(2.45), float: DcVolts(2.20), compensation_mv_per_k: -5.0 }, // maker's data sheet
    charge_at_end_of_bulk: 0.80,                                     // maker's manual
    absorption: Absorption { coefficient: 0.42, fixed: Hours(0.0) }, // maker's manual: 20 % at half the current and 5 % more
    charge_factor: 1.15,                                             // from memory: 1.05 to 1.20
    cycles: &[(0.8, 225.0), (0.5, 750.0)], // public collection of questions on deep-cycle batteries; premium makes: 400, 1200
    calendar_life: Years(5.0),             // from memory
    life_halving_step: Celsius(10.0),      // maker's support article
    gassing: Some(VENTED),
    charge_temperature: LEAD_ACID_CHARGE_TEMPERATURE,
    strings_warn: 3,              // maker's manual
    strings_stop: 4,              // maker's guideline
    mass_per_ah: Kilograms(0.30), // from memory: about 30 kg for a 12 V 100 Ah block
};

/// Valve-regulated, acid in glass mat.
const VRLA_AGM: Properties = Properties {
    cells_per_block: 6,
    nominal: DcVolts(2.0),
    depth_of_discharge_max: 0.5,    // from memory; standby with few cuts a year may go to 0.8
    cut_off: DcVolts(1.75),         // handbooks on stationary batteries: the usual sizing value
    peukert: 1.12,                  // maker's data sheet: 1.117 from 20 to 10 h, 1.133 to 5 h, 1.206 to 1 h
    peukert_holds_from: Hours(5.0), // the same sheet
    open_circuit: AGM_OPEN_CIRCUIT,
    resistance_at_1_ah: Ohms(0.055),       // maker's data sheet: 8 mΩ, 40 Ah, six cells
    resistance_multiple_nearly_empty: 1.8, // from memory: 1.5 to 2.5
    resistance_multiple_end_of_life: 1.5,  // from memory: 1.25 to 2.0
    charge_current: ChargeCurrent { least: 0.10, usual: 0.20, most: 0.40, most_in_the_cold: None }, // maker's manual; most: maker's data sheet
    set_volts: SetVolts { absorption: DcVolts(2.40), float: DcVolts(2.27), compensation_mv_per_k: -4.0 }, // maker's manual; 2.35 to 2.45 V
    charge_at_end_of_bulk: 0.82,                                     // maker's manual
    absorption: Absorption { coefficient: 0.38, fixed: Hours(0.0) }, // maker's manual
    charge_factor: 1.08,                                             // maker's manual: 1.05 to 1.10
    cycles: &[(1.0, 200.0), (0.5, 600.0), (0.3, 1500.0)],            // maker's data sheet
    calendar_life: Years(7.0),                                       // maker's data sheet: 6 to 8 years on float
    life_halving_step: Celsius(10.0), // maker's support article; another maker's sheet means 19 K
    gassing: Some(VALVE_REGULATED),
    charge_temperature: LEAD_ACID_CHARGE_TEMPERATURE,
    strings_warn: 3,              // maker's manual
    strings_stop: 4,              // maker's guideline
    mass_per_ah: Kilograms(0.32), // from memory: 30 to 33 kg for a 12 V 100 Ah block
};

/// Valve-regulated, acid as gel.
const VRLA_GEL: Properties = Properties {
    cells_per_block: 6,
    nominal: DcVolts(2.0),
    depth_of_discharge_max: 0.5,    // from memory, as glass mat
    cut_off: DcVolts(1.75),         // handbooks on stationary batteries: the usual sizing value
    peukert: 1.12,                  // battery monitor's manual: 1.10 to 1.14
    peukert_holds_from: Hours(5.0), // the same manual
    open_circuit: GEL_OPEN_CIRCUIT,
    resistance_at_1_ah: Ohms(0.08),        // from memory: 0.05 to 0.12
    resistance_multiple_nearly_empty: 1.8, // from memory: 1.5 to 2.5
    resistance_multiple_end_of_life: 1.5,  // from memory: 1.25 to 2.0
    charge_current: ChargeCurrent { least: 0.05, usual: 0.10, most: 0.20, most_in_the_cold: None }, // from memory
    set_volts: SetVolts { absorption: DcVolts(2.37), float: DcVolts(2.25), compensation_mv_per_k: -3.0 }, // makers' manuals; one says -5 mV
    charge_at_end_of_bulk: 0.80, // from memory, as flat plate
    absorption: Absorption { coefficient: 0.42, fixed: Hours(0.0) }, // from memory, as flat plate; gel is rather slower
    charge_factor: 1.05,         // maker's charging note: 1.02 to 1.05
    cycles: &[(0.8, 500.0), (0.5, 1000.0), (0.3, 1800.0)], // from memory: order of magnitude
    calendar_life: Years(8.0),   // from memory
    life_halving_step: Celsius(10.0), // maker's support article
    gassing: Some(VALVE_REGULATED),
    charge_temperature: LEAD_ACID_CHARGE_TEMPERATURE,
    strings_warn: 3,              // maker's manual
    strings_stop: 4,              // maker's guideline
    mass_per_ah: Kilograms(0.33), // from memory: 31 to 34 kg for a 12 V 100 Ah block
};

/// Lithium iron phosphate with its management unit.
const LFP: Properties = Properties {
    cells_per_block: 4,
    nominal: DcVolts(3.2),          // makers' data sheets: 12.8 V for four cells
    depth_of_discharge_max: 0.8,    // maker's data sheet: cycle life is quoted at 80 %
    cut_off: DcVolts(3.0),          // from memory: 2.8 to 3.1, so that the unit stops before the management unit does
    peukert: 1.02,                  // from memory: 1.00 to 1.05; simulated cell: 1.018 from 20 to 5 h
    peukert_holds_from: Hours(1.0), // from memory: sheets rate the same capacity from a third of it to all of it in an hour
    open_circuit: LFP_OPEN_CIRCUIT,
    resistance_at_1_ah: Ohms(0.06), // from memory for the cell; packs with their management unit up to 0.5 (maker's data sheet)
    resistance_multiple_nearly_empty: 1.1, // from memory: nearly flat above 10 %
    resistance_multiple_end_of_life: 1.5, // from memory: 1.25 to 2.0
    // Most: maker's data sheet, half the capacity from 15 to 45 °C and a fifth below. Lithium bears any smaller current:
    // it only takes longer; the least is our own floor.
    charge_current: ChargeCurrent {
        least: 0.05,
        usual: 0.20,
        most: 0.50,
        most_in_the_cold: Some((Celsius(15.0), 0.20)),
    },
    set_volts: SetVolts { absorption: DcVolts(3.55), float: DcVolts(3.40), compensation_mv_per_k: 0.0 }, // from memory; sheets go to 3.65 and 3.475
    charge_at_end_of_bulk: 0.96, // charger's manual: over 95 %
    absorption: Absorption { coefficient: 0.0, fixed: Hours(0.5) }, // charger's manual
    charge_factor: 1.01,         // from memory: 1.00 to 1.02
    cycles: &[(1.0, 2000.0), (0.8, 3000.0)], // makers' data sheets
    calendar_life: Years(10.0),  // from memory
    life_halving_step: Celsius(13.0), // from memory: 10 to 15
    gassing: None,               // EN IEC 62485-2 covers lead-acid and nickel only
    charge_temperature: (Celsius(0.0), Celsius(45.0)), // makers' data sheets
    strings_warn: 4,             // from memory: the maker of the management unit decides
    strings_stop: 16,            // from memory
    mass_per_ah: Kilograms(0.115), // from memory: 11 to 12 kg for a 12.8 V 100 Ah block
};

/// EN IEC 62485-2, vented cells. Source (from memory).
const VENTED: Gassing = Gassing { float: 5.0, boost: 20.0 };

/// EN IEC 62485-2, valve-regulated cells. Source: float; boost from memory.
const VALVE_REGULATED: Gassing = Gassing { float: 1.0, boost: 8.0 };

/// Source: makers' notes, not over 49 to 50 °C; the lower end (from memory) keeps clear of frozen acid.
const LEAD_ACID_CHARGE_TEMPERATURE: (Celsius, Celsius) = (Celsius(-10.0), Celsius(49.0));

/// Source: the battery trade association's table for acid of 1.265, 12 V block over six.
const FLAT_PLATE_OPEN_CIRCUIT: &[(f64, f64)] =
    &[(1.0, 2.1083), (0.75, 2.075), (0.5, 2.04), (0.25, 2.01), (0.0, 1.9817)];

/// Source (from memory): flat plate less 0.02 V for acid of 1.24, as open-circuit volts are about density + 0.845.
const TUBULAR_OPEN_CIRCUIT: &[(f64, f64)] = &[(1.0, 2.088), (0.75, 2.055), (0.5, 2.022), (0.25, 1.992), (0.0, 1.963)];

/// Source: bands of an owner's manual; the value within the band from memory.
const AGM_OPEN_CIRCUIT: &[(f64, f64)] = &[(1.0, 2.15), (0.75, 2.10), (0.5, 2.06), (0.25, 2.01), (0.0, 1.95)];

/// Source (from memory): glass mat less 0.01 V.
const GEL_OPEN_CIRCUIT: &[(f64, f64)] = &[(1.0, 2.14), (0.75, 2.09), (0.5, 2.05), (0.25, 2.00), (0.0, 1.94)];

/// Source (from memory): rested cell with graphite.
const LFP_OPEN_CIRCUIT: &[(f64, f64)] = &[
    (1.0, 3.37),
    (0.9, 3.33),
    (0.8, 3.325),
    (0.7, 3.31),
    (0.6, 3.295),
    (0.5, 3.29),
    (0.4, 3.285),
    (0.3, 3.26),
    (0.2, 3.22),
    (0.1, 3.12),
    (0.05, 3.0),
    (0.0, 2.6),
];

/// What is known of a kind of battery.
pub fn properties(chemistry: Chemistry) -> &'static Properties {
    match chemistry {
        Chemistry::FloodedTubular => &FLOODED_TUBULAR,
        Chemistry::FloodedFlatPlate => &FLOODED_FLAT_PLATE,
        Chemistry::VrlaAgm => &VRLA_AGM,
        Chemistry::VrlaGel => &VRLA_GEL,
        Chemistry::Lfp => &LFP,
    }
}

impl Properties {
    /// Open-circuit volts of a cell at a state of charge; straight between the points.
    pub fn open_circuit_at(&self, charge: f64) -> DcVolts {
        DcVolts(super::between(self.open_circuit, charge))
    }

    /// Resistance of a new cell at a state of charge.
    ///
    /// Rises in a straight line from full to the multiple at 20 %, and on along it below.
    pub fn resistance_at(&self, charge: f64, capacity: AmpHours) -> Ohms {
        Ohms(self.resistance_at_1_ah.0 / capacity.0 * self.resistance_rise(charge))
    }

    /// Resistance at a state of charge over that of a full cell.
    pub fn resistance_rise(&self, charge: f64) -> f64 {
        1.0 + (self.resistance_multiple_nearly_empty - 1.0) * (1.0 - charge) / 0.8
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_kind_has_its_own_row_and_sane_values() {
        for chemistry in Chemistry::ALL {
            let row = properties(chemistry);
            assert_eq!(row.cells_per_block, if chemistry.is_lead_acid() { 6 } else { 4 }, "{chemistry:?}");
            assert_eq!(row.gassing.is_some(), chemistry.is_lead_acid(), "{chemistry:?}");
            assert!(row.cut_off < row.nominal && row.nominal < row.set_volts.float, "{chemistry:?}");
            assert!(row.set_volts.float < row.set_volts.absorption, "{chemistry:?}");
            assert!(row.charge_current.least <= row.charge_current.usual, "{chemistry:?}");
            assert!(row.charge_current.usual <= row.charge_current.most, "{chemistry:?}");
            assert!(row.strings_warn <= row.strings_stop && row.peukert >= 1.0, "{chemistry:?}");
        }
        assert_ne!(properties(Chemistry::VrlaAgm), properties(Chemistry::VrlaGel));
    }

    #[test]
    fn open_circuit_volts_and_cycles_rise_with_the_charge_that_stays() {
        for chemistry in Chemistry::ALL {
            let row = properties(chemistry);
            assert!(row.open_circuit.windows(2).all(|pair| pair[0].0 > pair[1].0 && pair[0].1 > pair[1].1));
            assert!(row.cycles.windows(2).all(|pair| pair[0].0 > pair[1].0 && pair[0].1 < pair[1].1));
        }
    }

    #[test]
    fn a_flat_plate_block_rests_at_the_trade_tables_volts() {
        let cases = [(1.0, 12.65), (0.75, 12.45), (0.5, 12.24), (0.25, 12.06), (0.0, 11.89)];
        for (charge, volts) in cases {
            let block = properties(Chemistry::FloodedFlatPlate).open_circuit_at(charge) * 6.0;
            assert!((block.0 - volts).abs() < 0.002, "{charge}: {block:?}");
        }
    }

    #[test]
    fn resistance_grows_as_the_charge_falls_and_shrinks_with_the_capacity() {
        let row = properties(Chemistry::VrlaAgm);
        let full = row.resistance_at(1.0, AmpHours(40.0));
        assert!((full.0 * 6.0 - 0.00825).abs() < 1e-9, "8 mΩ for six cells of 40 Ah, maker's data sheet: {full:?}");
        assert!((row.resistance_at(0.2, AmpHours(40.0)) / full - 1.8).abs() < 1e-12);
        assert!((row.resistance_at(1.0, AmpHours(80.0)) / full - 0.5).abs() < 1e-12);
    }
}
