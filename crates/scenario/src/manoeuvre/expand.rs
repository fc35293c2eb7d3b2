//! From templates to breakpoints.

use std::f64::consts::TAU;

use super::{TemplateKind, TemplateUse};

/// Breakpoints of a template on an input that stands at `base`.
pub(super) fn breakpoints(template: &TemplateUse, base: f64) -> Vec<(f64, f64)> {
    // The table gives each template every number asked for below; a test expands them all.
    let get = |name: &str| template.si(name).unwrap_or(f64::NAN);
    let at = get("at");
    match template.kind {
        TemplateKind::WheelStep => pulse(at, base, &[(get("rate"), get("turn"))], get("ramp")),
        TemplateKind::WheelReversal => reversal(template, at, base),
        TemplateKind::SlowLockToLock => lock_to_lock(template, at, base),
        TemplateKind::HoldAtLock => {
            let stages = [(get("rate"), get("to_lock")), (get("pull"), get("hold"))];
            pulse(at, base, &stages, get("ramp"))
        }
        TemplateKind::SineSteering => sine(template, at, base),
        TemplateKind::EngineRunUp | TemplateKind::LugDown => {
            vec![(at, base), (at + get("ramp"), get("to"))]
        }
        TemplateKind::ConsumerOn => vec![(at, base), (at + get("ramp"), get("command"))],
        TemplateKind::ConsumerOff => vec![(at, base), (at + get("ramp"), 0.0)],
        TemplateKind::PortBlocked => pulse(at, base, &[(0.0, get("hold"))], get("ramp")),
        TemplateKind::KerbStrike => {
            let top = at + get("rise");
            let end = top + get("hold");
            let force = base + get("force");
            vec![
                (at, base),
                (top, force),
                (end, force),
                (end + get("fall"), base),
            ]
        }
        TemplateKind::ColdStart => {
            let (ramp, crank) = (get("ramp"), get("crank_for"));
            let cranking = get("cranking");
            vec![
                (at, 0.0),
                (at + ramp, cranking),
                (at + crank, cranking),
                (at + crank + ramp, get("idle")),
            ]
        }
    }
}

/// One way, then at once the other way.
fn reversal(template: &TemplateUse, at: f64, base: f64) -> Vec<(f64, f64)> {
    let get = |name: &str| template.si(name).unwrap_or(f64::NAN);
    let (rate, turn, ramp) = (get("rate"), get("turn"), get("ramp"));
    vec![
        (at, base),
        (at + ramp, rate),
        (at + turn, rate),
        (at + turn + 2.0 * ramp, -rate),
        (at + 2.0 * turn + ramp, -rate),
        (at + 2.0 * turn + 2.0 * ramp, base),
    ]
}

/// Swings about the base in straight pieces.
fn sine(template: &TemplateUse, at: f64, base: f64) -> Vec<(f64, f64)> {
    let get = |name: &str| template.si(name).unwrap_or(f64::NAN);
    let (rate, period) = (get("rate"), get("period"));
    let (cycles, points) = (get("cycles") as usize, get("points") as usize);
    let point = |i: usize| {
        let share = i as f64 / points as f64;
        // Whole and half swings are exactly at the base.
        let swing = if (i * 2).is_multiple_of(points) {
            0.0
        } else {
            (TAU * share).sin()
        };
        (at + share * period, base + rate * swing)
    };
    (0..=cycles * points).map(point).collect()
}

/// From the base through stages of (value, time from one ramp to the next), back to the base.
fn pulse(at: f64, base: f64, stages: &[(f64, f64)], ramp: f64) -> Vec<(f64, f64)> {
    let mut points = vec![(at, base)];
    let mut begin = at;
    for &(value, time) in stages {
        points.push((begin + ramp, value));
        begin += time;
        points.push((begin, value));
    }
    points.push((begin + ramp, base));
    points
}

/// Half the way, pause, all the way back, pause, half the way.
fn lock_to_lock(template: &TemplateUse, at: f64, base: f64) -> Vec<(f64, f64)> {
    let get = |name: &str| template.si(name).unwrap_or(f64::NAN);
    let (rate, rest, ramp) = (get("rate"), get("rest"), get("ramp"));
    // Ramps at both ends turn half as far as the full rate would.
    let whole = get("turns") * TAU / rate.abs();
    let mut points = Vec::new();
    let mut begin = at;
    for (way, share) in [(rate, 0.5), (-rate, 1.0), (rate, 0.5)] {
        let stretch = pulse(begin, base, &[(way, share * whole)], ramp);
        begin = stretch.last().map_or(begin, |point| point.0) + rest;
        points.extend(stretch);
    }
    points.dedup();
    points
}
