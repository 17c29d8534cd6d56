//! The day in stretches in which nothing changes.

use super::items::Item;
use super::power::Power;
use super::turns::Turns;
use crate::sizing::design::{DayStretch, StartNeed};
use crate::sizing::survey::TimeOfDay;
use crate::units::{VoltAmps, Watts};

/// What a stretch of the day asks for.
pub struct Stretch {
    /// Beginning.
    pub from: TimeOfDay,
    /// End, not included.
    pub to: TimeOfDay,
    /// Average real power.
    pub average: Watts,
    /// Highest real power running together.
    pub real: Watts,
    /// Highest apparent power running together, in its parts.
    pub running: Power,
    /// The worst single start, the rest running; running where nothing starts harder.
    pub staggered: VoltAmps,
    /// Every motor starting at once, the rest running.
    pub together: VoltAmps,
    /// Each line's start at this hour, one piece at a time, the rest running.
    pub starts: Vec<StartNeed>,
}

/// The day from midnight to midnight, cut wherever a window begins or ends.
pub fn stretches(items: &[Item]) -> Vec<Stretch> {
    boundaries(items).windows(2).map(|pair| stretch(items, pair[0], pair[1])).collect()
}

/// The same day by its averages alone; its peaks are left at nothing.
pub fn averages(items: &[Item]) -> Vec<DayStretch> {
    let stretch = |pair: &[TimeOfDay]| {
        let active: Vec<_> = items.iter().filter(|item| item.load.is_on_at(pair[0])).collect();
        let alone = active.iter().filter(|item| item.turn.is_none()).map(|item| item.average).sum::<Watts>();
        let average = alone + Turns::of(&active).average();
        DayStretch { from: pair[0], to: pair[1], average, peak: Watts::ZERO, peak_va: VoltAmps::ZERO }
    };
    boundaries(items).windows(2).map(stretch).collect()
}

fn boundaries(items: &[Item]) -> Vec<TimeOfDay> {
    let windows = items.iter().flat_map(|item| &item.load.windows);
    let mut times: Vec<_> = windows.flat_map(|window| [window.from, window.to]).collect();
    times.extend([TimeOfDay::MIDNIGHT, TimeOfDay::END_OF_DAY]);
    times.sort_unstable();
    times.dedup();
    times
}

fn stretch(items: &[Item], from: TimeOfDay, to: TimeOfDay) -> Stretch {
    let active: Vec<_> = items.iter().filter(|item| item.load.is_on_at(from)).collect();
    let turns = Turns::of(&active);
    let alone = || active.iter().filter(|item| item.turn.is_none());
    let always: Power = alone().map(|item| item.running).sum();
    let running = turns.sums(always, None, |item| item.running);
    let restarting = turns.sums(alone().map(|item| item.restarting()).sum(), None, |item| item.restarting());
    let starts = starts(&active, &turns, always, &running);
    let restart = largest(&restarting).apparent();
    let largest = largest(&running);
    let staggered = staggered(largest, &starts);
    Stretch {
        from,
        to,
        average: alone().map(|item| item.average).sum::<Watts>() + turns.average(),
        real: running.iter().map(|power| power.real).fold(Watts::ZERO, Watts::max),
        running: largest,
        staggered,
        together: restart.max(staggered),
        starts,
    }
}

/// The start of each line that has one; beside a line that takes turns its group rests.
fn starts(active: &[&Item], turns: &Turns, always: Power, running: &[Power]) -> Vec<StartNeed> {
    let beside: Vec<_> = (0..turns.count()).map(|turn| turns.sums(always, Some(turn), |item| item.running)).collect();
    let start_of = |item: &&Item| {
        let start = item.start?;
        let (others, off) = match item.turn {
            Some(turn) => (beside[turn].as_slice(), item.one - item.running),
            None => (running, item.one),
        };
        let rests = others.iter().map(|others| *others - off);
        let (row, kind, lasts) = (item.row, item.load.start, item.load.surge_lasts);
        let needs = rests.map(|rest| StartNeed { row, kind, lasts, rest, start });
        hardest(needs)
    };
    active.iter().filter_map(start_of).collect()
}

impl Stretch {
    /// How the design shows it.
    pub fn shown(&self) -> DayStretch {
        let Self { from, to, average, real: peak, running, .. } = *self;
        DayStretch { from, to, average, peak, peak_va: running.apparent() }
    }
}

/// The start that asks most; the first of equals.
pub fn hardest(needs: impl Iterator<Item = StartNeed>) -> Option<StartNeed> {
    needs.reduce(|best, next| if next.needed().square() > best.needed().square() { next } else { best })
}

fn staggered(running: Power, starts: &[StartNeed]) -> VoltAmps {
    let surges = starts.iter().filter(|need| need.is_surge()).map(|need| need.needed());
    largest_of(running, surges).apparent()
}

fn largest(powers: &[Power]) -> Power {
    largest_of(Power::default(), powers.iter().copied())
}

fn largest_of(first: Power, others: impl Iterator<Item = Power>) -> Power {
    others.fold(first, |most, next| if next.square() > most.square() { next } else { most })
}
