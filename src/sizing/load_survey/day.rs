//! The day in stretches in which nothing changes.

use super::items::Item;
use super::power::Power;
use crate::sizing::survey::{TimeOfDay, Window};
use crate::units::{VoltAmps, Watts};

/// What a stretch of the day asks for.
pub struct Stretch<'a> {
    /// The lines that may be on.
    active: Vec<&'a Item<'a>>,
    /// What each group that takes turns counts for.
    turns: Turns,
    /// Beginning.
    pub from: TimeOfDay,
    /// End, not included.
    pub to: TimeOfDay,
    /// Average real power.
    pub average: Watts,
    /// Everything running that may be on together.
    pub running: Power,
    /// Everything that has a start starting at once, the rest running.
    pub together: VoltAmps,
    /// The worst single start, the rest running.
    pub staggered: VoltAmps,
}

/// The day from midnight to midnight, cut wherever a window begins or ends.
pub fn stretches<'a>(items: &'a [Item<'a>]) -> Vec<Stretch<'a>> {
    boundaries(items).windows(2).map(|pair| stretch(items, pair[0], pair[1])).collect()
}

fn boundaries(items: &[Item]) -> Vec<TimeOfDay> {
    let windows = items.iter().flat_map(|item| &item.load.windows);
    let mut times: Vec<_> = windows.flat_map(|window| [window.from, window.to]).collect();
    times.extend([TimeOfDay::MIDNIGHT, TimeOfDay::END_OF_DAY]);
    times.sort_unstable();
    times.dedup();
    times
}

fn stretch<'a>(items: &'a [Item<'a>], from: TimeOfDay, to: TimeOfDay) -> Stretch<'a> {
    let active: Vec<_> = items.iter().filter(|item| item.load.windows.iter().any(|w| covers(w, from))).collect();
    let turns = Turns::of(&active);
    let alone = || active.iter().filter(|item| item.turn.is_none());
    let running = alone().map(|item| item.running).sum::<Power>() + turns.sum(|turn| turn.running);
    let together = alone().map(|item| item.starting_together()).sum::<Power>() + turns.sum(|turn| turn.together);
    let average = alone().map(|item| item.average).sum::<Watts>() + turns.average();
    let mut stretch =
        Stretch { from, to, average, running, together: VoltAmps::ZERO, staggered: VoltAmps::ZERO, active, turns };
    let single = stretch.active.iter().filter_map(|item| stretch.start_of(item)).map(Power::apparent);
    stretch.staggered = single.fold(running.apparent(), VoltAmps::max);
    stretch.together = together.apparent().max(stretch.staggered);
    stretch
}

impl Stretch<'_> {
    /// One piece of a line starting, the rest running; `None` where it may not be on or has no start.
    pub fn start_of(&self, item: &Item) -> Option<Power> {
        let active = self.active.iter().any(|other| other.row == item.row);
        let off = item.turn.map_or(item.running, |turn| self.turns.0.get(turn).map_or(item.running, |t| t.running));
        item.starting_one().filter(|_| active).map(|start| self.running - off + start)
    }
}

/// Whether a window holds a moment; one that ends before it begins runs over midnight.
fn covers(window: &Window, moment: TimeOfDay) -> bool {
    if window.from < window.to {
        window.from <= moment && moment < window.to
    } else {
        window.from <= moment || moment < window.to
    }
}

/// What each group that takes turns counts for: its largest member, once.
struct Turns(Vec<Turn>);

#[derive(Clone, Default)]
struct Turn {
    running: Power,
    together: Power,
    average: Watts,
    largest: Watts,
}

impl Turns {
    fn of(active: &[&Item]) -> Self {
        let mut turns =
            vec![Turn::default(); active.iter().filter_map(|item| item.turn).max().map_or(0, |last| last + 1)];
        for item in active {
            if let Some(turn) = item.turn {
                turns[turn].add(item);
            }
        }
        Self(turns)
    }

    fn sum(&self, part: impl Fn(&Turn) -> Power) -> Power {
        self.0.iter().map(part).sum()
    }

    /// Members share the time: their duties add, but never to more than the largest running alone.
    fn average(&self) -> Watts {
        self.0.iter().map(|turn| turn.average.min(turn.largest)).sum()
    }
}

impl Turn {
    fn add(&mut self, item: &Item) {
        self.average = self.average + item.average;
        self.largest = self.largest.max(item.running.real);
        if item.running.apparent() > self.running.apparent() {
            self.running = item.running;
        }
        if item.starting_together().apparent() > self.together.apparent() {
            self.together = item.starting_together();
        }
    }
}
