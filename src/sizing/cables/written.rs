//! The lines of a run on the calculation sheet.

use super::paper::Paper;
use super::rules;
use super::runs::Plan;
use super::selection::{Candidate, Question, carried};
use super::voltage_drop;
use crate::sizing::design::CrossSection;

/// What has not been written down on the way.
pub(super) fn write_down(question: &Question, chosen: &Candidate, paper: &mut Paper) {
    let &Question { plan, device, .. } = question;
    paper.line("length_m", &rules::LENGTH, &[], plan.length.0);
    write_size(question, chosen, paper);
    write_capacity(question, chosen, paper);
    write_drop(plan, chosen, paper);
    write_start_drop(question, chosen, paper);
    if let Some(rating) = device.rating {
        let carried = carried(plan, question.laying.code);
        let values = [("I", carried.0, "A"), ("I_z", chosen.capacity.0, "A")];
        paper.line("fuse_a", rules::device(device.kind), &values, rating.0);
    }
    paper.line("breaking_capacity_ka", &rules::BREAKING, &[("I_k", plan.fault.0, "kA")], device.breaks.0);
}

fn write_size(question: &Question, chosen: &Candidate, paper: &mut Paper) {
    let plan = question.plan;
    let values = [
        ("I_b", plan.current.0, "A"),
        ("S_fault", question.least_for_fault.0, "mm²"),
        ("u_target", plan.drop.target, ""),
    ];
    if let CrossSection::Metric(area) = chosen.size.cross_section {
        paper.line("cross_section_mm2", &rules::SIZE, &values, area.0);
    }
    let values = [("I_b", plan.current.0, "A"), ("I_most", plan.per_conductor.map_or(0.0, |most| most.0), "A")];
    let given = if plan.per_conductor.is_some() { &values[..] } else { &values[..1] };
    paper.line("parallel", &rules::PARALLEL, given, f64::from(chosen.parallel));
}

fn write_capacity(question: &Question, chosen: &Candidate, paper: &mut Paper) {
    let laying = question.laying;
    let air = [("T", laying.ambient.0, "°C")];
    let ambient = paper.line("ambient_factor", rules::ambient(laying.code), &air, laying.ambient_factor());
    let together = [("circuits", f64::from(laying.circuits_with(chosen.parallel)), "")];
    let grouping = laying.grouping_factor(chosen.parallel);
    let grouping = paper.line("grouping_factor", rules::grouping(laying.code), &together, grouping);
    let values = [
        ("I_t", chosen.size.tabled.0, "A"),
        ("C_a", ambient, ""),
        ("C_g", grouping, ""),
        ("n", f64::from(chosen.parallel), ""),
        ("I_term", chosen.size.terminals.unwrap_or(chosen.size.tabled).0, "A"),
    ];
    let given = if chosen.size.terminals.is_some() { &values[..] } else { &values[..4] };
    paper.line("capacity_a", rules::capacity(laying, &chosen.size), given, chosen.capacity.0);
}

fn write_drop(plan: &Plan, chosen: &Candidate, paper: &mut Paper) {
    let resistance = chosen.loop_resistance.0;
    let values = [("L", plan.length.0, "m"), ("r", chosen.size.warm.0, "Ω/km"), ("n", f64::from(chosen.parallel), "")];
    paper.line("loop_resistance_ohm", &rules::LOOP, &values, resistance);
    let values = [
        ("I_b", plan.current.0, "A"),
        ("R", resistance, "Ω"),
        ("cos φ", plan.power_factor.get(), ""),
        ("X", voltage_drop::loop_reactance(plan.length, chosen.parallel).0, "Ω"),
    ];
    let (rule, given) = if plan.run.is_dc() { (&rules::DC_DROP, &values[..2]) } else { (&rules::AC_DROP, &values[..]) };
    let drop = paper.line("voltage_drop_v", rule, given, chosen.drop);
    let values = [("ΔU", drop, "V"), ("U", plan.nominal, "V")];
    paper.line("voltage_drop_share", &rules::DROP_SHARE, &values, chosen.drop_share);
}

fn write_start_drop(question: &Question, chosen: &Candidate, paper: &mut Paper) {
    let Some(start) = question.plan.start else { return };
    let values = [
        ("I_start", start.current.0, "A"),
        ("R", chosen.loop_resistance.0, "Ω"),
        ("U", question.plan.nominal, "V"),
        ("u_start", start.limit, ""),
    ];
    paper.line("start_drop_share", &rules::START_DROP, &values, question.start_drop_share(chosen, start));
}
