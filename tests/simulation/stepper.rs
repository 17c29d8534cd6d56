//! The reference: the same equations, stepped plainly. Only tests and benchmarks use it.
//!
//! Wells after Manwell and McGowan (1993) in their own two heads, volts by straight lines between the
//! points of the tables, the midpoint rule, one small step after the other. No closed form, no event
//! search: where a limit is crossed the step is cut in proportion.

use keeplit::simulation::battery::Battery;

/// Charge in the well at hand and in the bound one, Ah.
#[derive(Clone, Copy, Debug)]
pub struct State {
    pub at_hand: f64,
    pub bound: f64,
}

/// How a stepped cut went.
#[derive(Clone, Copy, Debug)]
pub struct Stepped {
    pub hours: f64,
    pub stopped: bool,
    pub state: State,
}

pub fn full(battery: &Battery) -> State {
    let wells = battery.wells;
    State { at_hand: wells.full * wells.at_hand, bound: wells.full * (1.0 - wells.at_hand) }
}

fn between(points: &[(f64, f64)], at: f64) -> f64 {
    let pair = points.windows(2).find(|pair| at >= pair[1].0);
    match pair {
        _ if at >= points[0].0 => points[0].1,
        Some(pair) => pair[1].1 + (pair[0].1 - pair[1].1) * (at - pair[1].0) / (pair[0].0 - pair[1].0),
        None => points[points.len() - 1].1,
    }
}

/// Current of a power and the volts at the unit; `None` where no current delivers it.
pub fn meets(battery: &Battery, state: State, watts: f64) -> Option<(f64, f64)> {
    let head = (state.at_hand / (battery.wells.at_hand * battery.wells.full)).max(0.0);
    let open = between(battery.kind.open_circuit, head) * battery.cells;
    let rise = 1.0 + (battery.kind.resistance_multiple_nearly_empty - 1.0) * (1.0 - head) / 0.8;
    let resistance = battery.resistance * rise + battery.lead;
    let inside = open * open - 4.0 * resistance * watts;
    if inside < 0.0 {
        return None;
    }
    let volts = (open + inside.sqrt()) / 2.0;
    Some((watts / volts, volts))
}

/// What flows into the well at hand and into the bound one.
pub fn flows(battery: &Battery, state: State, current: f64) -> (f64, f64) {
    let wells = battery.wells;
    let valve = wells.rate * wells.at_hand * (1.0 - wells.at_hand);
    let bound_head = if wells.at_hand < 1.0 { state.bound / (1.0 - wells.at_hand) } else { 0.0 };
    let follows = if wells.at_hand < 1.0 { valve * (bound_head - state.at_hand / wells.at_hand) } else { 0.0 };
    (follows - current, -follows)
}

/// Whether the unit still runs: charge at hand, and volts at or above its cut-off.
fn runs(battery: &Battery, state: State, watts: f64) -> Option<f64> {
    let (_, volts) = meets(battery, state, watts)?;
    Some((volts - battery.cut_off.0).min(state.at_hand / battery.wells.full * battery.cut_off.0))
}

/// Plays a cut: `powers` from the hour of the day on, repeated day by day; each is its end and its watts.
pub fn play(battery: &Battery, mut state: State, powers: &[(f64, f64)], start: f64, hours: f64, step: f64) -> Stepped {
    let mut now = 0.0;
    while now < hours {
        let hour = (start + now).rem_euclid(24.0);
        let at = powers.iter().position(|power| hour < power.0 - 1e-9).unwrap_or(0);
        let (until, watts) = powers[at];
        let rest = if until - hour > 1e-9 { until - hour } else { until + 24.0 - hour };
        let length = step.min(rest).min(hours - now);
        let Some(before) = runs(battery, state, watts).filter(|margin| *margin > 0.0) else {
            return Stepped { hours: now, stopped: true, state };
        };
        let first = meets(battery, state, watts).map_or(0.0, |met| met.0);
        let (a, b) = flows(battery, state, first);
        let middle = State { at_hand: state.at_hand + a * length / 2.0, bound: state.bound + b * length / 2.0 };
        let current = meets(battery, middle, watts).map_or(first, |met| met.0);
        let (a, b) = flows(battery, middle, current);
        let next = State { at_hand: state.at_hand + a * length, bound: state.bound + b * length };
        let after = runs(battery, next, watts);
        if let Some(after) = after.filter(|after| *after > 0.0) {
            let _ = after;
            (state, now) = (next, now + length);
            continue;
        }
        let share = after.map_or(0.5, |after| before / (before - after));
        let part = |from: f64, to: f64| from + (to - from) * share;
        state = State { at_hand: part(state.at_hand, next.at_hand), bound: part(state.bound, next.bound) };
        return Stepped { hours: now + length * share, stopped: true, state };
    }
    Stepped { hours, stopped: false, state }
}
