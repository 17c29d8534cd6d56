//! One cut as the battery meets it: constant currents, one after the other.

use crate::sizing::design::Losses;
use crate::units::{AmpHours, Amps, DcVolts, Hours, Watts};

/// The steps of a cut; one entry per stretch of constant current, in the order of time.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Cut(Vec<(Amps, Hours)>);

impl Cut {
    /// A cut of given currents.
    pub fn new(steps: Vec<(Amps, Hours)>) -> Self {
        Self(steps)
    }

    /// The currents that loads draw through the unit from a bank at its cut-off volts.
    ///
    /// `I = P_dc(P) / V_cut-off`; the no-load draw counts through the whole cut. The end volts are
    /// the safe choice: a fuller bank has more volts and gives less current.
    pub fn through(losses: &Losses, cut_off: DcVolts, steps: &[(Watts, Hours)]) -> Self {
        Self(steps.iter().map(|&(output, hours)| (losses.drawn(output) / cut_off, hours)).collect())
    }

    /// Current and length of each step.
    pub fn steps(&self) -> impl Iterator<Item = (Amps, Hours)> + '_ {
        self.0.iter().copied()
    }

    /// The steps as they lie.
    pub fn as_slice(&self) -> &[(Amps, Hours)] {
        &self.0
    }

    /// Charge that the cut takes at its own currents.
    pub fn charge(&self) -> AmpHours {
        self.steps().map(|(current, hours)| current * hours).sum()
    }

    /// Length of the cut.
    pub fn length(&self) -> Hours {
        self.steps().map(|(_, hours)| hours).sum()
    }

    /// Highest current of the cut.
    pub fn highest(&self) -> Amps {
        self.steps().map(|(current, _)| current).fold(Amps::ZERO, Amps::max)
    }

    /// Charge over length; nothing for a cut without length.
    pub fn mean(&self) -> Amps {
        let length = self.length();
        if length.0 > 0.0 { self.charge() / length } else { Amps::ZERO }
    }
}
