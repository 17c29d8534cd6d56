//! Volts of the bank, and which blocks in how many strings make it.

use crate::sizing::Sheet;
use crate::sizing::assumptions::Assumptions;
use crate::sizing::finding::Finding;
use crate::sizing::survey::{BusVolts, Chemistry};
use crate::sizing::tables::battery_blocks;
use crate::sizing::tables::chemistries::properties;
use crate::units::{AmpHours, Amps, DcVolts, Watts};

/// Equal strings of equal blocks.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Strings {
    /// Capacity of one block.
    pub block: AmpHours,
    /// Strings in parallel; at least one.
    pub strings: u32,
}

impl Strings {
    /// Capacity of all together.
    pub fn installed(&self) -> AmpHours {
        self.block * f64::from(self.strings)
    }

    /// The fewest strings that carry the capacity, and with them the smallest block.
    ///
    /// With a block from a data sheet only the strings are free.
    pub fn carrying(required: AmpHours, block: Option<AmpHours>, chemistry: Chemistry) -> Self {
        if let Some(block) = block {
            return Self { block, strings: count(required, block) };
        }
        let sizes = battery_blocks::blocks(chemistry).iter().map(|&size| AmpHours(size));
        let largest = sizes.clone().fold(AmpHours::ZERO, AmpHours::max);
        let strings = count(required, largest);
        let block = sizes.into_iter().find(|&size| size * f64::from(strings) >= required).unwrap_or(largest);
        Self { block, strings }
    }

    /// Says so when there are more strings than is good or allowed.
    pub fn judge(&self, assumptions: &Assumptions, sheet: &mut Sheet) {
        let (good, most) = (assumptions.strings_warn as u32, assumptions.strings_stop as u32);
        if self.strings > most {
            sheet.find(Finding::TooManyStrings { strings: self.strings, most });
        } else if self.strings > good {
            sheet.find(Finding::ManyStrings { strings: self.strings, good });
        }
    }
}

/// Strings of one block size that carry a capacity; installed is never less than required.
fn count(required: AmpHours, block: AmpHours) -> u32 {
    let strings = (required / block).ceil().max(1.0) as u32;
    if block * f64::from(strings) < required { strings.saturating_add(1) } else { strings }
}

/// Cut-off of a whole string.
pub fn cut_off(bus: BusVolts, chemistry: Chemistry, assumptions: &Assumptions) -> DcVolts {
    let cells = properties(chemistry).cells_per_block * bus.blocks_in_series();
    DcVolts(assumptions.cut_off_v_per_cell * f64::from(cells))
}

/// The bus volts that may be taken, best first: from the lowest at which the current at cut-off
/// stays within the target; the forced one alone where one is forced.
///
/// `I = P_dc / V_cut-off` at the peak running load. Half the volts are twice the current and four
/// times the loss in the same cable.
///
/// Source: arithmetic; the 100 A habit is common practice.
pub fn bus_volts(forced: Option<BusVolts>, currents: [Amps; 3], target: Amps) -> Vec<BusVolts> {
    if let Some(bus) = forced {
        return vec![bus];
    }
    let good = currents.iter().position(|&current| current <= target).unwrap_or(2);
    BusVolts::ALL[good..].to_vec()
}

/// Current at cut-off and peak running load, at 12, 24 and 48 V.
pub fn peak_currents(peak: Watts, chemistry: Chemistry, assumptions: &Assumptions) -> [Amps; 3] {
    BusVolts::ALL.map(|bus| peak / cut_off(bus, chemistry, assumptions))
}

/// Says so when the current is above what one cable carries, or a higher bus would bring it down.
pub fn judge_current(bus: BusVolts, current: Amps, assumptions: &Assumptions, sheet: &mut Sheet) {
    let (target, limit) = (Amps(assumptions.bus_current_target_a), Amps(assumptions.bus_current_limit_a));
    if current > limit {
        sheet.find(Finding::CurrentAboveCable { current, limit });
    }
    if current > target && bus != BusVolts::V48 {
        sheet.find(Finding::BusTooLow { bus, current, limit: target });
    }
}
