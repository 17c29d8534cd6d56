//! The lines of the stay-on list, made ready for adding up.

use super::power::Power;
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
        let turn = load.turn.as_deref().and_then(|name| turns.iter().position(|&turn| turn == name));
        Self { row, load, one, running, average, start, turn }
    }

    /// All pieces starting at once.
    pub fn starting_together(&self) -> Power {
        self.start.map_or(self.running, |start| start * f64::from(self.load.on_together))
    }

    /// One piece starting, the others of this line running.
    pub fn starting_one(&self) -> Option<Power> {
        self.start.map(|start| self.running - self.one + start)
    }
}

/// All lines in an order that does not depend on the order of the rows, so that sums do not either.
pub fn items<'a>(survey: &'a Survey, assumptions: &Assumptions) -> Vec<Item<'a>> {
    let turns = turns(&survey.loads);
    let rows = survey.loads.iter().enumerate();
    let mut items: Vec<_> = rows.map(|(row, load)| Item::new(row, load, &survey.site, assumptions, &turns)).collect();
    items.sort_by(|a, b| {
        let by_power = a.running.real.order(&b.running.real).then(a.average.order(&b.average));
        by_power.then_with(|| a.running.apparent().order(&b.running.apparent())).then_with(|| a.turn.cmp(&b.turn))
    });
    items
}

/// The names of the groups that take turns, in alphabetical order.
pub fn turns(loads: &[Load]) -> Vec<&str> {
    let mut turns: Vec<_> = loads.iter().filter_map(|load| load.turn.as_deref()).collect();
    turns.sort_unstable();
    turns.dedup();
    turns
}
