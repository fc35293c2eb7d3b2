//! Checks of the steering: dropout, and the consumer at the lock.

use helmsplit_model::{ExcessSide, Quantity, Signal, SteeringGear, SteeringSide};

use super::response::operand;
use super::{EMPTY, Subject};
use crate::check::{Check, CheckId, Evidence, Limit, Measure};
use crate::dropout::{WheelSample, longest_of};
use crate::lock::{LockHold, is_locked, lock_holds};
use crate::response::mean;

/// A hold shorter than this (s) tells nothing: the consumer is still slowing down.
const SHORTEST_HOLD: f64 = 0.2;

/// Share of a hold at its end over which the consumer's flow is taken.
const HOLD_TAIL: f64 = 0.2;

/// Change of engine speed between the two readings beyond which they are not compared.
const SAME_SPEED: f64 = 0.02;

const NO_WHEEL: &str = "the circuit has no steering wheel";

fn gear<'a>(subject: &Subject<'a>) -> Option<&'a SteeringGear> {
    match &subject.circuit.parts().steering {
        SteeringSide::Unit(gear) => Some(gear),
        SteeringSide::Bench(_) | SteeringSide::Motor(_) => None,
    }
}

/// Commanded wheel rate and cylinder travel over the run.
fn wheel_and_travel(subject: &Subject<'_>) -> Option<(Vec<f64>, Vec<f64>)> {
    let rate = subject.signal(Signal::WheelRate)?;
    let travel = subject.trace().named("y_c").ok()?.to_vec();
    Some((rate, travel))
}

pub(super) fn dropout(subject: &Subject<'_>) -> Check {
    let id = CheckId::Dropout;
    let Some(gear) = gear(subject) else {
        return Check::not_applicable(id, NO_WHEEL);
    };
    let (Some((rate, travel)), Some(shortfall)) = (
        wheel_and_travel(subject),
        subject.signal(Signal::WheelShortfall),
    ) else {
        return Check::not_applicable(id, EMPTY);
    };
    if rate.iter().all(|w| w.abs() <= 0.0) {
        return Check::not_applicable(id, "the manoeuvre never turns the wheel");
    }
    let stroke = gear.cylinder.stroke;
    let samples: Vec<_> = subject
        .times()
        .iter()
        .enumerate()
        .map(|(i, &time)| WheelSample {
            time,
            commanded: rate[i],
            shortfall: shortfall[i],
            locked: is_locked(rate[i], travel[i], stroke),
        })
        .collect();
    let threshold = subject.limits.dropout_shortfall;
    let worst = longest_of(&samples, threshold);
    let duration = worst.map_or(0.0, |d| d.duration);
    let evidence = Evidence {
        time: worst.map(|d| d.start),
        column: Some(Signal::WheelShortfall.name().to_owned()),
        formula: "longest time with (commanded - reached) / commanded wheel rate above the \
                  threshold, the cylinder not in its stop",
        operands: vec![
            operand("threshold", threshold, Quantity::Ratio),
            operand(
                "mean shortfall",
                worst.map_or(0.0, |d| d.share),
                Quantity::Ratio,
            ),
        ],
        source: "limit: common practice, no source",
    };
    let check = Check::measured(
        id,
        Measure::new(duration, Quantity::Time),
        Limit::AtMost(subject.limits.dropout),
        evidence,
    );
    match worst {
        Some(d) => check.with_note(format!(
            "{:.0} % of the wheel rate was missing",
            100.0 * d.share
        )),
        None => check,
    }
}

pub(super) fn consumer_at_lock(subject: &Subject<'_>) -> Check {
    let id = CheckId::ConsumerAtLock;
    let Some(gear) = gear(subject) else {
        return Check::not_applicable(id, NO_WHEEL);
    };
    if matches!(subject.circuit.parts().excess, ExcessSide::Blocked) {
        return Check::not_applicable(id, "the excess port is blocked");
    }
    let (Some((rate, travel)), Some(out)) = (
        wheel_and_travel(subject),
        subject.signal(Signal::ExcessOutFlow),
    ) else {
        return Check::not_applicable(id, EMPTY);
    };
    let stroke = gear.cylinder.stroke;
    let holds = lock_holds(subject.times(), &rate, &travel, stroke, SHORTEST_HOLD);
    if holds.is_empty() {
        return Check::not_applicable(id, "the manoeuvre does not hold the steering at the lock");
    }
    let shares = holds
        .iter()
        .filter_map(|hold| share_at(subject, hold, &out))
        .min_by(|a, b| a.share.total_cmp(&b.share));
    let Some(worst) = shares else {
        return Check::not_applicable(id, "engine speed or command differ before and at the lock");
    };
    let evidence = Evidence {
        time: Some(worst.time),
        column: Some(Signal::ExcessOutFlow.name().to_owned()),
        formula: "mean flow over the last fifth of the hold / flow before the wheel was turned",
        operands: vec![
            operand("flow before", worst.before, Quantity::Flow),
            operand("flow at the lock", worst.at_lock, Quantity::Flow),
        ],
        source: "limit: common practice, no source",
    };
    Check::measured(
        id,
        Measure::ratio(worst.share),
        Limit::AtLeast(subject.limits.consumer_at_lock),
        evidence,
    )
}

struct Share {
    time: f64,
    before: f64,
    at_lock: f64,
    share: f64,
}

fn share_at(subject: &Subject<'_>, hold: &LockHold, out: &[f64]) -> Option<Share> {
    let times = subject.times();
    let from = hold.released - HOLD_TAIL * (hold.released - hold.reached);
    let first = times.partition_point(|&t| t < from);
    let end = times.partition_point(|&t| t < hold.released);
    let before_row = times.partition_point(|&t| t < hold.pushed).checked_sub(1)?;
    if end <= first {
        return None;
    }
    let alike = |signal: Signal| {
        let Some(column) = subject.trace().signal(signal) else {
            return true;
        };
        let (a, b) = (column.get(before_row), column.get(end - 1));
        (a - b).abs() <= SAME_SPEED * a.abs()
    };
    let before = out[before_row];
    if before <= 0.0 || !alike(Signal::EngineSpeed) || !alike(Signal::ExcessCommand) {
        return None;
    }
    let at_lock = mean(&times[first..end], &out[first..end]);
    Some(Share {
        time: hold.released,
        before,
        at_lock,
        share: at_lock / before,
    })
}
