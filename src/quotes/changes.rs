//! What changed between the last sheet and the job as it is now, for whoever comes back to a site.
//!
//! Both sides are read from the same documents: the survey and the design in the form in which they
//! are kept. A figure that one side does not have is no change.

use serde_json::Value;

use crate::money::Money;

/// What a job stood at: what was asked for, what the engine answered, what it cost.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Standing {
    loads: Vec<LoadBrief>,
    autonomy_h: Option<f64>,
    figures: Vec<(Figure, f64)>,
    sizes: Vec<(String, String)>,
    total: Option<Money>,
}

/// A load as far as a change of it matters.
#[derive(Clone, Debug, PartialEq)]
pub struct LoadBrief {
    /// What it is.
    pub name: String,
    /// How many.
    pub quantity: f64,
    /// Input of one, in W.
    pub running_w: f64,
    times: (f64, String),
}

/// A figure of the kit that is compared.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[allow(missing_docs, reason = "the names say it")]
pub enum Figure {
    InverterRating,
    BankVolts,
    Batteries,
    BlockCapacity,
    ChargingCurrent,
    OutageEnergy,
}

impl Figure {
    const ALL: [(Self, &'static str); 5] = [
        (Self::InverterRating, "/inverter/rating_va"),
        (Self::BankVolts, "/bank/bus_v"),
        (Self::BlockCapacity, "/bank/block_ah"),
        (Self::ChargingCurrent, "/charger/current_a"),
        (Self::OutageEnergy, "/demand/outage_wh"),
    ];
}

/// One thing that is not as it was.
#[derive(Clone, Debug, PartialEq)]
#[allow(missing_docs, reason = "old and new are named by what they hold")]
pub enum Change {
    /// A load that was not on the list.
    LoadAdded(LoadBrief),
    /// A load that is no longer on the list.
    LoadRemoved(LoadBrief),
    /// More or fewer of the same.
    LoadCounted { name: String, old: f64, new: f64 },
    /// Other watts, in W.
    LoadWatts { name: String, old: f64, new: f64 },
    /// Other hours of the day, or working more or less of them.
    LoadTimes { name: String },
    /// Another length of the cut, in hours.
    Autonomy { old: f64, new: f64 },
    /// Another figure of the kit.
    Kit { figure: Figure, old: f64, new: f64 },
    /// Another size of cable on a run, named as in the design's JSON.
    Cable { run: String, old: String, new: String },
    /// Another price to the customer.
    Price { old: Money, new: Money },
}

impl Standing {
    /// Reads a survey document and, where there is one, a design document.
    pub fn of(survey: &Value, design: Option<&Value>, total: Option<Money>) -> Self {
        let nothing = Value::Null;
        let design = design.unwrap_or(&nothing);
        Self {
            loads: list(survey, "/loads").iter().map(load).collect(),
            autonomy_h: number(survey, "/outage/autonomy_h"),
            figures: figures(design),
            sizes: list(design, "/cables").iter().filter_map(size).collect(),
            total,
        }
    }
}

fn list<'a>(document: &'a Value, at: &str) -> &'a [Value] {
    document.pointer(at).and_then(Value::as_array).map_or(&[], Vec::as_slice)
}

fn number(document: &Value, at: &str) -> Option<f64> {
    document.pointer(at).and_then(Value::as_f64)
}

fn load(document: &Value) -> LoadBrief {
    LoadBrief {
        name: document.pointer("/name").and_then(Value::as_str).unwrap_or_default().to_owned(),
        quantity: number(document, "/quantity").unwrap_or(1.0),
        running_w: number(document, "/running_w").unwrap_or(0.0),
        times: (
            number(document, "/duty").unwrap_or(1.0),
            document.pointer("/windows").map(Value::to_string).unwrap_or_default(),
        ),
    }
}

fn figures(design: &Value) -> Vec<(Figure, f64)> {
    let plain = Figure::ALL.iter().filter_map(|&(figure, at)| Some((figure, number(design, at)?)));
    let blocks = number(design, "/bank/blocks_in_series").zip(number(design, "/bank/strings"));
    let batteries = blocks.map(|(in_series, strings)| (Figure::Batteries, in_series * strings));
    plain.chain(batteries).collect()
}

fn size(cable: &Value) -> Option<(String, String)> {
    let run = cable.pointer("/run")?.as_str()?.to_owned();
    let metric = number(cable, "/cross_section_mm2").map(|area| format!("{area} mm²"));
    let size = metric.or_else(|| Some(format!("{} AWG", cable.pointer("/awg")?.as_str()?)))?;
    let parallel = number(cable, "/parallel").unwrap_or(1.0);
    Some((run, if parallel > 1.0 { format!("{parallel} × {size}") } else { size }))
}

/// Everything that is not as it was: loads first, then hours, kit and price.
pub fn changes(old: &Standing, new: &Standing) -> Vec<Change> {
    let mut changes = load_changes(&old.loads, &new.loads);
    let hours = differing(old.autonomy_h, new.autonomy_h);
    changes.extend(hours.map(|(old, new)| Change::Autonomy { old, new }));
    for &(figure, then) in &old.figures {
        let now = new.figures.iter().find(|(other, _)| *other == figure).map(|&(_, now)| now);
        changes.extend(differing(Some(then), now).map(|(old, new)| Change::Kit { figure, old, new }));
    }
    for (run, then) in &old.sizes {
        let now = new.sizes.iter().find(|(other, _)| other == run).map(|(_, now)| now);
        let differing = now.filter(|now| *now != then);
        changes.extend(differing.map(|now| Change::Cable { run: run.clone(), old: then.clone(), new: now.clone() }));
    }
    let price = old.total.zip(new.total).filter(|(old, new)| old != new);
    changes.extend(price.map(|(old, new)| Change::Price { old, new }));
    changes
}

/// Both, if they differ by more than what a document's rounding may do.
fn differing(old: Option<f64>, new: Option<f64>) -> Option<(f64, f64)> {
    old.zip(new).filter(|(old, new)| (old - new).abs() > 1e-9 * old.abs().max(new.abs()))
}

/// Loads are the same if they bear the same name; the second of a name is matched with the second.
fn load_changes(old: &[LoadBrief], new: &[LoadBrief]) -> Vec<Change> {
    let mut left: Vec<&LoadBrief> = new.iter().collect();
    let mut changes = Vec::new();
    for then in old {
        match left.iter().position(|now| now.name == then.name) {
            Some(place) => changes.extend(one_load(then, left.remove(place))),
            None => changes.push(Change::LoadRemoved(then.clone())),
        }
    }
    changes.extend(left.into_iter().cloned().map(Change::LoadAdded));
    changes
}

fn one_load(old: &LoadBrief, new: &LoadBrief) -> Vec<Change> {
    let name = || old.name.clone();
    let counted = differing(Some(old.quantity), Some(new.quantity));
    let watts = differing(Some(old.running_w), Some(new.running_w));
    let times = (old.times != new.times).then(|| Change::LoadTimes { name: name() });
    counted
        .map(|(old, new)| Change::LoadCounted { name: name(), old, new })
        .into_iter()
        .chain(watts.map(|(old, new)| Change::LoadWatts { name: name(), old, new }))
        .chain(times)
        .collect()
}

#[cfg(test)]
mod tests {
    use serde_json::json;

    use super::*;

    fn survey() -> Value {
        json!({
            "outage": { "autonomy_h": 4 },
            "loads": [
                { "name": "Lamp", "quantity": 6, "running_w": 9, "duty": 1, "windows": [["18:00", "23:00"]] },
                { "name": "Fridge", "quantity": 1, "running_w": 120.0, "duty": 0.4 },
            ]
        })
    }

    fn design() -> Value {
        json!({
            "inverter": { "rating_va": 1000 },
            "bank": { "bus_v": 24.0, "blocks_in_series": 2, "strings": 1, "block_ah": 150 },
            "cables": [{ "run": "bank_to_inverter", "cross_section_mm2": 25.0, "parallel": 1 }],
        })
    }

    #[test]
    fn what_is_as_it_was_is_no_change() {
        let standing = Standing::of(&survey(), Some(&design()), None);
        assert_eq!(changes(&standing, &standing), []);
    }

    #[test]
    fn whole_and_broken_numbers_of_one_value_are_no_change() {
        let mut again = survey();
        again["loads"][1]["running_w"] = json!(120);
        again["outage"]["autonomy_h"] = json!(4.0);
        assert_eq!(changes(&Standing::of(&survey(), None, None), &Standing::of(&again, None, None)), []);
    }

    #[test]
    fn each_kind_of_change_is_told_once() {
        let (mut survey_now, mut design_now) = (survey(), design());
        survey_now["outage"]["autonomy_h"] = json!(6);
        survey_now["loads"] = json!([
            { "name": "Lamp", "quantity": 8, "running_w": 7, "duty": 1, "windows": [["17:00", "23:00"]] },
            { "name": "Pump", "quantity": 1, "running_w": 750 },
        ]);
        design_now["inverter"]["rating_va"] = json!(2500);
        design_now["bank"]["strings"] = json!(2);
        design_now["cables"][0]["cross_section_mm2"] = json!(70.0);
        let old = Standing::of(&survey(), Some(&design()), None);
        let new = Standing::of(&survey_now, Some(&design_now), None);
        let pump = load(&json!({ "name": "Pump", "quantity": 1, "running_w": 750 }));
        let fridge = load(&survey()["loads"][1]);
        let lamp = || "Lamp".to_owned();
        assert_eq!(
            changes(&old, &new),
            [
                Change::LoadCounted { name: lamp(), old: 6.0, new: 8.0 },
                Change::LoadWatts { name: lamp(), old: 9.0, new: 7.0 },
                Change::LoadTimes { name: lamp() },
                Change::LoadRemoved(fridge),
                Change::LoadAdded(pump),
                Change::Autonomy { old: 4.0, new: 6.0 },
                Change::Kit { figure: Figure::InverterRating, old: 1000.0, new: 2500.0 },
                Change::Kit { figure: Figure::Batteries, old: 2.0, new: 4.0 },
                Change::Cable { run: "bank_to_inverter".into(), old: "25 mm²".into(), new: "70 mm²".into() },
            ]
        );
    }

    #[test]
    fn two_loads_of_one_name_are_matched_in_their_order() {
        let twins = |second: u32| json!({ "loads": [{ "name": "Fan", "running_w": 50 }, { "name": "Fan", "running_w": second }] });
        let old = Standing::of(&twins(60), None, None);
        let new = Standing::of(&twins(75), None, None);
        assert_eq!(changes(&old, &new), [Change::LoadWatts { name: "Fan".into(), old: 60.0, new: 75.0 }]);
    }

    #[test]
    fn a_figure_that_one_side_lacks_is_no_change() {
        let old = Standing::of(&survey(), None, None);
        let new = Standing::of(&survey(), Some(&design()), None);
        assert_eq!(changes(&old, &new), []);
    }
}
