//! The lines of the stay-on list, made ready for adding up.

use std::cmp::Ordering;

use super::power::Power;
use super::turns;
use crate::sizing::assumptions::Assumptions;
use crate::sizing::surge;
use crate::sizing::survey::{Load, Site, Survey};
use crate::units::Watts;

/// One line of the list with its powers.
pub struct Item<'a> {
    /// Its row in the survey.
    pub row: usize,
    /// The line.
    pub load: &'a Load,
    /// One piece while it works.
    pub one: Power,
    /// All pieces that are ever on together.
    pub running: Power,
    /// Average over its windows.
    pub average: Watts,
    /// One piece while it starts; `None` where the start is no more than running.
    pub start: Option<Power>,
    /// Which group takes turns with it.
    pub turn: Option<usize>,
}

impl<'a> Item<'a> {
    fn new(row: usize, load: &'a Load, site: &Site, assumptions: &Assumptions, turns: &[&str]) -> Self {
        let one = Power::of_one(load);
        let running = one * f64::from(load.on_together);
        let average = (load.running * f64::from(load.quantity) * load.duty).min(running.real);
        let start = surge::start_power(load, site, assumptions);
        let turn = load.turn.as_deref().and_then(|name| turns.binary_search(&name).ok());
        Self { row, load, one, running, average, start, turn }
    }

    /// What the line draws when power returns: motors start anew, everything else runs.
    pub fn restarting(&self) -> Power {
        let start = self.start.filter(|_| self.load.start.is_motor());
        start.map_or(self.running, |start| start * f64::from(self.load.on_together))
    }

    /// What sets one line apart from another in a sum.
    fn figures(&self) -> [f64; 6] {
        let start = self.start.unwrap_or_default();
        let running = self.running;
        [running.real.0, running.reactive.0, running.distortion.0, self.average.0, start.real.0, start.reactive.0]
    }

    fn order(&self, other: &Self) -> Ordering {
        let pairs = self.figures().into_iter().zip(other.figures());
        let figures = pairs.map(|(a, b)| a.total_cmp(&b)).find(|order| order.is_ne());
        figures.unwrap_or(Ordering::Equal).then_with(|| self.turn.cmp(&other.turn))
    }
}

/// All lines in an order that does not depend on the order of the rows, so that sums do not either.
pub fn items<'a>(survey: &'a Survey, assumptions: &Assumptions) -> Vec<Item<'a>> {
    let turns = turns::names(&survey.loads);
    let rows = survey.loads.iter().enumerate();
    let mut items: Vec<_> = rows.map(|(row, load)| Item::new(row, load, &survey.site, assumptions, &turns)).collect();
    items.sort_by(Item::order);
    items
}
