//! Overshoot and settling of the priority flow.

use helmsplit_model::{Quantity, Signal};

use super::{EMPTY, Subject};
use crate::check::{Check, CheckId, Evidence, Limit, Measure, Operand};
use crate::response::{Response, response_after};
use crate::window::windows;

/// Share of the set flow below which a port counts as shut.
const SHUT: f64 = 0.05;

const NO_EVENT: &str = "the inputs never stand still after a change";

/// Overshoot and settling: the worst over the events of the run.
pub(super) fn checks(subject: &Subject<'_>) -> (Check, Check) {
    let none = |reason: &str| {
        (
            Check::not_applicable(CheckId::Overshoot, reason),
            Check::not_applicable(CheckId::Settling, reason),
        )
    };
    let Some(flow) = subject.signal(Signal::PriorityFlow) else {
        return none(EMPTY);
    };
    let times = subject.times();
    let (Some(&from), Some(&to)) = (times.first(), times.last()) else {
        return none(EMPTY);
    };
    let responses: Vec<Response> = windows(subject.inputs, from, to)
        .iter()
        .filter_map(|window| {
            let least = SHUT * subject.ratings.set_flow;
            response_after(times, &flow, window, subject.limits.settling_band, least)
        })
        .collect();
    let worst = |figure: &dyn Fn(&Response) -> f64| {
        responses
            .iter()
            .copied()
            .max_by(|a, b| figure(a).total_cmp(&figure(b)))
    };
    match (worst(&|r| r.overshoot), worst(&|r| r.settling)) {
        (Some(over), Some(slow)) => (overshoot(subject, &over), settling(subject, &slow)),
        _ => none(NO_EVENT),
    }
}

fn overshoot(subject: &Subject<'_>, worst: &Response) -> Check {
    let evidence = Evidence {
        time: Some(worst.peak_time),
        column: Some(Signal::PriorityFlow.name().to_owned()),
        formula: "(largest flow - larger of the flows before and after) / flow after the event",
        operands: vec![
            operand("largest flow", worst.peak, Quantity::Flow),
            operand("flow after the event", worst.settled, Quantity::Flow),
        ],
        source: "definition of overshoot as in step responses; limit: common practice, no source",
    };
    let check = Check::measured(
        CheckId::Overshoot,
        Measure::ratio(worst.overshoot),
        Limit::AtMost(subject.limits.overshoot),
        evidence,
    );
    if worst.calm {
        check
    } else {
        check.with_note("the flow is still moving when the inputs change again")
    }
}

fn settling(subject: &Subject<'_>, worst: &Response) -> Check {
    let evidence = Evidence {
        time: Some(worst.settled_at),
        column: Some(Signal::PriorityFlow.name().to_owned()),
        formula: "time from the end of the change to the last moment outside the band",
        operands: vec![
            operand("flow after the event", worst.settled, Quantity::Flow),
            operand("band", subject.limits.settling_band, Quantity::Ratio),
        ],
        source: "definition of settling time; band and limit: common practice, no source",
    };
    let check = Check::measured(
        CheckId::Settling,
        Measure::new(worst.settling, Quantity::Time),
        Limit::AtMost(subject.limits.settling),
        evidence,
    );
    if worst.calm {
        check
    } else {
        check.with_note("it did not settle before the inputs changed again")
    }
}

pub(super) fn operand(name: &str, si: f64, quantity: Quantity) -> Operand {
    Operand {
        name: name.to_owned(),
        value: Measure::new(si, quantity),
    }
}
