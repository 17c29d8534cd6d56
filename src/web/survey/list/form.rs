//! What is typed on the stay-on list, and the loads it makes.

use std::collections::BTreeMap;

use serde::Deserialize;

use super::row::{Against, Row};
use crate::documents::limits;
use crate::jobs::Job;
use crate::reading::{self, Line};
use crate::sizing::survey::Load;
use crate::sizing::tables::appliances::{self, Appliance};
use crate::web::forms::Complaints;
use crate::wording::Numbers;

/// Blank lines for loads of one's own.
const BLANK: usize = 4;

/// What is typed on the page.
#[derive(Clone, Debug, Default, Deserialize)]
#[serde(default)]
pub struct ListForm {
    pub key: String,
    pub revision: String,
    /// A load in one line.
    pub line: String,
    /// Counts of common loads, by their key.
    pub counts: BTreeMap<String, Count>,
    /// Lines of the list, and new ones.
    pub loads: BTreeMap<u32, Row>,
    /// `add` stays on the page.
    pub act: String,
}

/// A common load as it is counted.
#[derive(Clone, Debug, Default, PartialEq, Eq, Deserialize)]
#[serde(default)]
pub struct Count {
    pub quantity: String,
    pub power: String,
    pub when: String,
}

impl ListForm {
    /// The list as it is stored.
    pub fn of(job: &Job, numbers: Numbers) -> Self {
        let loads = job.draft.loads.iter().enumerate().map(|(at, load)| (at as u32, Row::of(load, numbers))).collect();
        Self { revision: job.revision.to_string(), loads, ..Self::default() }
    }

    /// The same with blank lines behind it.
    pub fn with_blanks(mut self) -> Self {
        let first = self.loads.keys().max().map_or(0, |last| last.saturating_add(1));
        let blank = self.loads.values().filter(|row| row.is_blank()).count();
        for at in blank..BLANK {
            self.loads.insert(first.saturating_add(at as u32), Row { unit: "W".to_owned(), ..Row::default() });
        }
        self
    }

    /// The lines in a few words each.
    pub fn told(&self) -> String {
        let rows = self.loads.values().filter(|row| !row.is_off());
        let lines = rows.map(|row| format!("{} × {} {} {}", row.quantity, row.name, row.power, row.unit));
        let counts = self.counts.iter().filter(|(_, count)| !count.is_off()).filter_map(|(key, count)| {
            appliances::by_key(key).map(|appliance| format!("{} × {}", count.quantity, appliance.name))
        });
        lines.chain(counts).collect::<Vec<_>>().join("; ")
    }

    /// All loads: the lines, the counted ones, the one-line one. Every complaint at once.
    pub fn read(&self, against: &Against, complaints: &mut Complaints) -> Vec<Load> {
        let numbers = Numbers::new(against.mark);
        let mut loads = Vec::new();
        for (at, row) in self.loads.iter().filter(|(_, row)| !row.is_off()) {
            loads.extend(row.filled(numbers).read(&format!("loads[{at}]"), against, complaints));
        }
        let added = self.read_counts(against, complaints).into_iter().chain(self.read_line(against, complaints));
        added.for_each(|load| add(&mut loads, load));
        if loads.is_empty() && complaints.is_empty() {
            complaints.add("line", "Stay-on list", "count at least one thing");
        }
        if loads.len() > limits::LOADS {
            complaints.add("line", "Stay-on list", format!("give at most {} lines", limits::LOADS));
        }
        loads
    }

    fn read_counts(&self, against: &Against, complaints: &mut Complaints) -> Vec<Load> {
        let numbers = Numbers::new(against.mark);
        let counted = self.counts.iter().filter(|(_, count)| !count.is_off());
        let read = |(key, count): (&String, &Count)| {
            let row = count.row(appliances::by_key(key)?, numbers);
            row.read(&format!("counts[{key}]"), against, complaints)
        };
        counted.filter_map(read).collect()
    }

    /// The one-line load; whatever is wrong with it is told at its box.
    fn read_line(&self, against: &Against, complaints: &mut Complaints) -> Option<Load> {
        if self.line.trim().is_empty() {
            return None;
        }
        let mut found = Complaints::default();
        let row = reading::one_line(&self.line, against.mark).map(row_of_line);
        let load = row.and_then(|row| row.filled(Numbers::new(against.mark)).read("line", against, &mut found));
        if load.is_none() {
            let usage = "give count, name and power, such as 6 lamps 9W 5h";
            let message = found.all().first().map_or(usage, |complaint| complaint.message.as_str());
            complaints.add("line", "Add in one line", message);
        }
        load
    }
}

/// Adds a load; one that is on the list already gets a higher count.
fn add(loads: &mut Vec<Load>, load: Load) {
    let alike = |one: &&mut Load| {
        let counts = Load { quantity: one.quantity, on_together: one.on_together, ..load.clone() };
        one.quantity == one.on_together && **one == counts
    };
    match loads.iter_mut().find(alike) {
        Some(one) if limits::QUANTITY.check(f64::from(one.quantity) + f64::from(load.quantity)).is_ok() => {
            one.quantity += load.quantity;
            one.on_together += load.on_together;
        }
        _ => loads.push(load),
    }
}

impl Count {
    /// Whether it was not counted.
    pub fn is_off(&self) -> bool {
        matches!(self.quantity.trim(), "" | "0")
    }

    /// Whether something else than the usual was typed.
    pub fn is_corrected(&self) -> bool {
        !(self.power.trim().is_empty() && self.when.trim().is_empty())
    }

    /// The line that a counted load becomes; what was corrected wins.
    fn row(&self, appliance: &Appliance, numbers: Numbers) -> Row {
        let mut row = Row::of(&appliance.load(1), numbers);
        row.quantity.clone_from(&self.quantity);
        if !self.power.trim().is_empty() {
            row.power.clone_from(&self.power);
        }
        row.when.clone_from(&self.when);
        row
    }
}

/// A line whose hours, if they were told, are the evening hours that end at 23:00.
fn row_of_line(line: Line) -> Row {
    let when = line.hours.filter(|hours| (0.25..23.0).contains(hours)).map(|hours| {
        let from = ((23.0 - hours) * 60.0).round() as u32;
        format!("{:02}:{:02}-23:00", from / 60, from % 60)
    });
    let quantity = line.quantity.to_string();
    Row { name: line.name, quantity, power: line.power, when: when.unwrap_or_default(), ..Row::default() }
}
