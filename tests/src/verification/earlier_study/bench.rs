//! The valve on the bench, and the border of hunting.

use helmsplit_model::{Input, Signal};
use helmsplit_scenario::parameter::valve_edges;
use helmsplit_sim::Start;
use helmsplit_study::{Border, Equilibrium, Variable, border, equilibrium};

use super::{EARLIER, LPM, number};
use crate::check::Tolerance::Absolute;
use crate::check::{Check, Subject};
use crate::equilibria::{bench, bench_point};
use crate::rig::{Rig, mean, range};
use crate::trouble::Tried;

const BENCH: Subject = Subject {
    title: "Bench, 900 and 2400 rpm, 10, 70 and 130 bar behind the priority port, 2, 60 and 150 bar \
            behind the excess port (guessed: throttles of 300 and 150 mm2)",
    source: EARLIER,
    unit: "L/min",
};

const OVER: Subject = Subject {
    title: "Bench, 2400 rpm, 150 bar behind the excess port over 30 bar behind the priority port",
    source: EARLIER,
    unit: "L/min",
};

const HUNTING: Subject = Subject {
    title: "Hunting",
    source: EARLIER,
    unit: "Hz",
};

/// The bench at every point of its grid.
fn grid() -> Tried<Vec<Equilibrium>> {
    let scenario = bench();
    let mut all = Vec::new();
    for speed in [900.0, 2400.0] {
        for steering in [10.0, 70.0, 130.0] {
            for excess in [2.0, 60.0, 150.0] {
                let point = bench_point(speed, steering, excess);
                all.push(equilibrium(&scenario, &point)?);
            }
        }
    }
    Ok(all)
}

/// Least and largest priority flow at rest over the grid of the bench, L/min.
fn bench_grid() -> Tried<(f64, f64)> {
    let flows = grid()?
        .into_iter()
        .map(|rest| rest.signal(Signal::PriorityFlow) * LPM);
    let none = (f64::INFINITY, f64::NEG_INFINITY);
    Ok(flows.fold(none, |(least, most), flow| {
        (least.min(flow), most.max(flow))
    }))
}

/// Least damping ratio over the grid of the bench.
fn bench_damping() -> Tried<f64> {
    let least = |rest: &Equilibrium| rest.stability.damping.unwrap_or(f64::NAN);
    Ok(grid()?.iter().map(least).fold(f64::INFINITY, f64::min))
}

/// Disc hole at which the bench begins to hunt at 2400 rpm, 130 and 2 bar.
fn hunting_border() -> Tried<Border> {
    Ok(border(
        &bench(),
        &bench_point(2400.0, 130.0, 2.0),
        Variable::Parameter(valve_edges::DISC_HOLE_DIAMETER),
        0.5e-3,
        0.8e-3,
    )?)
}

fn throttled(start: &str, end: &str) -> Tried<f64> {
    let rig = Rig::bench("2400 rpm", "30 bar", "150 bar")?
        .set("valve.holes_throttle_end", end)?
        .set("valve.holes_throttle_start", start)?;
    Ok(rig.rest()?.priority_flow() * LPM)
}

/// Frequency (Hz) and peak to peak inlet pressure (bar) of the carrier with wide damping holes,
/// while it steers.
fn hunting() -> Tried<(f64, f64)> {
    let run = Rig::preset("orchard_carrier")?
        .set("excess.kind", "tank")?
        .set("valve.head_hole_diameter", "1.5 mm")?
        .set("valve.disc_hole_diameter", "1.5 mm")?
        .hold(Input::EngineSpeed, "2400 rpm")?
        .drive(
            Input::WheelRate,
            &[("0.5 s", "0 rpm"), ("0.55 s", "90 rpm")],
        )?
        .run(&Start::Cold, 1.4)?;
    let (low, high) = range(&run, "p_in", 1.0, 1.4);
    let middle = mean(&run, "p_in", 1.0, 1.4);
    let points: Vec<_> = run
        .trace
        .named("p_in")?
        .points()
        .filter(|(t, _)| *t >= 1.0)
        .collect();
    let rises: Vec<f64> = points
        .windows(2)
        .filter(|pair| pair[0].1 < middle && pair[1].1 >= middle)
        .map(|pair| pair[1].0)
        .collect();
    let (Some(first), Some(last)) = (rises.first(), rises.last()) else {
        return Err("it does not hunt".into());
    };
    Ok((
        (rises.len() - 1) as f64 / (last - first),
        (high - low) / 1e5,
    ))
}

#[allow(clippy::too_many_lines, reason = "a table of cases")]
pub(super) fn push(all: &mut Vec<Check>) {
    let of_grid = |pick: fn((f64, f64)) -> f64| move || number(bench_grid().map(pick));
    all.push(BENCH.check(
        "earlier-bench-least",
        "least priority flow at rest",
        14.50,
        Absolute(0.01),
        of_grid(|(least, _)| least),
    ));
    all.push(BENCH.check(
        "earlier-bench-most",
        "largest priority flow at rest",
        15.58,
        Absolute(0.01),
        of_grid(|(_, most)| most),
    ));
    all.push(BENCH.in_unit("").check(
        "earlier-bench-damping",
        "least damping ratio, friction left out",
        0.114,
        Absolute(1e-3),
        || number(bench_damping()),
    ));
    all.push(OVER.check(
        "earlier-throttled",
        "priority flow, priority holes throttled by the spool",
        14.97,
        Absolute(0.01),
        || number(throttled("3 mm", "6 mm")),
    ));
    all.push(OVER.check(
        "earlier-unthrottled",
        "priority flow, priority holes never throttled",
        46.3,
        Absolute(0.05),
        || number(throttled("100 mm", "1000 mm")),
    ));
    all.push(HUNTING.in_unit("mm").check(
        "earlier-border-hole",
        "bench, 2400 rpm, 130 and 2 bar: disc hole at the border, friction left out",
        0.656,
        Absolute(1e-3),
        || number(hunting_border().map(|border| border.value * 1e3)),
    ));
    all.push(HUNTING.check(
        "earlier-border-frequency",
        "the same: frequency at the border",
        59.6,
        Absolute(0.1),
        || number(hunting_border().map(|border| border.frequency.unwrap_or(f64::NAN))),
    ));
    all.push(HUNTING.check(
        "earlier-hunting-frequency",
        "excess to tank, 2400 rpm, damping holes 1.5 and 1.5 mm, while the wheel turns",
        73.0,
        Absolute(1.0),
        || number(hunting().map(|(frequency, _)| frequency)),
    ));
}
