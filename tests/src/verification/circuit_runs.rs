//! Closed forms that whole circuits must follow, run by the program's own solver.

use std::f64::consts::PI;

use helmsplit_model::{Circuit, Input, Profile, Ripple};
use helmsplit_sim::RunResult;

use crate::bisection::root;
use crate::check::Tolerance::Relative;
use crate::check::{Check, Source, Subject};
use crate::ideal::linear_chamber;
use crate::plain_circuit::{
    DENSITY, EVEN, TURBULENT, even_state, hole, levels, parts, run_from, sharp_edge,
};
use crate::rig::{at_rest, last, range};
use crate::test_valve::CD;
use crate::trouble::Tried;

pub(super) const ABOUT: &str = "\
Whole circuits around the test valve, run or brought to rest by the program's own solver: ideal
pump, compliance linear, one effect left standing at a time by the choice of parameters and of the
start. The parts alone are held against the same formulas above; here they stand in a circuit.";

const EMPTYING: Subject = Subject {
    title: "The excess port, 100 cm3 at 100 bar, empties to tank through a hole of 1 mm",
    source: Source::computed(
        "1 GPa, 850 kg/m3, Cd 0.62: sqrt(p) falls linearly and is gone after 26.776 ms",
    ),
    unit: "bar",
};

const SERIES: Subject = Subject {
    title: "Spring of 104 N drives the spool of 16 mm through damping holes of 1.0 and 0.8 mm",
    source: Source::computed("turbulent flow through both, 1/d^4 adds up; 850 kg/m3, Cd 0.62"),
    unit: "m/s",
};

const REBOUND: Subject = Subject {
    title: "The spool flies into its stop",
    source: Source::computed(
        "a (v + e v) = ln[(1 + a v) / (1 - a e v)]; Hunt & Crossley, J. Applied Mechanics 42(2), \
         1975, exponent 1",
    ),
    unit: "",
};

const REGULATED: Subject = Subject {
    title: "Priority flow at rest against spring force, jet force left out",
    source: Source::computed(
        "Q = Cd A sqrt(2 (F0 + k x) / (A_spool rho)), 3.7 mm, 104 N + 8 N/mm, 16 mm, 848.685 kg/m3",
    ),
    unit: "L/min",
};

const SURGE: Subject = Subject {
    title: "The bench throttle shuts in no time: height of the surge over rho c dV",
    source: Source::computed("dp = rho c dV, c = sqrt(B / rho); Joukowsky 1898, Merritt 1967"),
    unit: "",
};

const RINGING: Subject = Subject {
    title: "The priority line, 2 m at 1 GPa, rings behind the shut throttle",
    source: Source::computed(
        "chain of N lumps, f = (N c / (pi L)) sin(pi / (4 N + 2)), c / (4 L) = 135.58 Hz for \
         many; Rayleigh, The Theory of Sound, 1877, ch. VI",
    ),
    unit: "Hz",
};

const RIPPLE: Subject = Subject {
    title: "A gear pump of 12 teeth, 20 deg, through the wide open valve into an orifice",
    source: Source::computed(
        "flow between 1 - b and 1 + a of its mean: (1 + a)^2 - (1 - b)^2 of the mean's pressure \
         (after Rabie, Fluid Power Engineering, 2009), a = r / 3 and b = 2 r / 3 of parabolic arcs",
    ),
    unit: "",
};

const OVERSHOOT: Subject = Subject {
    title: "Step of the spool on its spring, chambers without effect",
    source: Source::computed("100 exp(-pi z / sqrt(1 - z^2)); second-order system, any text"),
    unit: "%",
};

/// All compliance, Pa, where it does not matter.
const MODULUS: f64 = 1.5e9;

/// A value of a run, or not a number with the trouble left out: the check fails then.
fn number(value: Tried<f64>) -> f64 {
    value.unwrap_or(f64::NAN)
}

fn emptying(time: f64) -> Tried<f64> {
    let mut parts = parts(MODULUS);
    parts.valve.excess_port = linear_chamber(100e-6, 1e9);
    // The smoothed corner of a shut edge still leaks: a long overlap makes that vanish.
    parts.valve.land.overlap = 25e-3;
    let circuit = Circuit::new(parts)?;
    let start = even_state(&circuit, &[("p_e", 100e5)]);
    let run = run_from(
        &circuit,
        &levels(&[(Input::ExcessCommand, 1.0)]),
        start,
        time,
    )?;
    Ok(last(&run, "p_e") / 1e5)
}

fn spool_speed() -> Tried<f64> {
    let mut parts = parts(MODULUS);
    let valve = &mut parts.valve;
    valve.spring_rate = 0.0;
    valve.land.overlap = 25e-3;
    // Wide, so that the two damping holes alone hold the spool.
    valve.fixed_orifice.area = hole(15e-3);
    for hole in [&mut valve.head_hole, &mut valve.disc_hole] {
        hole.transition_reynolds = TURBULENT;
    }
    let circuit = Circuit::new(parts)?;
    let start = even_state(&circuit, &[("x", 15e-3)]);
    let run = run_from(&circuit, &levels(&[]), start, 0.1)?;
    // Over a span: the start sets the line swinging a little.
    let travel = run.trace.named("x")?;
    let (Some(from), Some(to)) = (travel.at(0.05), travel.at(0.1)) else {
        return Err("no travel".into());
    };
    Ok((from - to) / 0.05)
}

/// Parts whose spool has no pressure on its ends, without spring.
fn free_spool() -> helmsplit_model::Parts {
    let mut parts = parts(MODULUS);
    let valve = &mut parts.valve;
    valve.diameter = 1e-6;
    valve.preload = 0.0;
    valve.spring_rate = 0.0;
    valve.land.overlap = 25e-3;
    parts
}

fn rebound(speed: f64) -> Tried<f64> {
    let circuit = Circuit::new(free_spool())?;
    let start = even_state(&circuit, &[("x", 1e-4), ("v", -speed)]);
    let run = run_from(&circuit, &levels(&[]), start, 10e-3)?;
    Ok(last(&run, "v") / speed)
}

/// Overshoot in percent of a step of 5 mm at a damping ratio.
fn overshoot(damping: f64) -> Tried<f64> {
    let (rate, mass, from, to): (f64, f64, f64, f64) = (8e3, 0.06, 5e-3, 10e-3);
    let mut parts = free_spool();
    parts.valve.spring_rate = rate;
    parts.valve.preload = -rate * to;
    parts.valve.viscous = 2.0 * damping * (rate * mass).sqrt();
    let circuit = Circuit::new(parts)?;
    let start = even_state(&circuit, &[("x", from)]);
    let run = run_from(&circuit, &levels(&[]), start, 20e-3)?;
    Ok(100.0 * (range(&run, "x", 0.0, 20e-3).1 - to) / (to - from))
}

/// Priority flow in L/min where the spool rests at a travel (m): the pump's speed is sought.
fn regulated(travel: f64) -> Tried<f64> {
    let mut parts = parts(MODULUS);
    parts.oil.density = 848.685;
    parts.valve.jet_factor = 0.0;
    parts.valve.fixed_orifice.transition_reynolds = TURBULENT;
    if let helmsplit_model::ExcessSide::Tank { area, .. } = &mut parts.excess {
        *area = 500e-6;
    }
    let circuit = Circuit::new(parts)?;
    let rest = |speed: f64| {
        let inputs = [
            (Input::EngineSpeed, speed),
            (Input::BenchArea, 20e-6),
            (Input::BenchPressure, 20e5),
            (Input::ExcessCommand, 1.0),
        ];
        at_rest(&circuit, levels(&inputs).at(0.0), None)
    };
    let off = |speed: f64| rest(speed).map_or(f64::NAN, |rest| rest.state("x") - travel);
    let speed = root(70.0, 3000.0, off);
    Ok(rest(speed)?.priority_flow() * 6e4)
}

/// Largest pressure at the shut throttle over the one before, in units of rho c dV.
fn surge() -> Tried<f64> {
    let modulus: f64 = 1e9;
    let mut parts = parts(modulus);
    // Thin oil: the line's friction would add to the surge.
    parts.oil.kinematic_viscosity = 1e-6;
    let inputs = [
        (Input::EngineSpeed, 2.0 * PI * 25.0),
        (Input::BenchArea, 20e-6),
        (Input::BenchPressure, 20e5),
        (Input::ExcessCommand, 1.0),
    ];
    if let helmsplit_model::ExcessSide::Tank { area, .. } = &mut parts.excess {
        *area = 20e-6;
    }
    let before = at_rest(&Circuit::new(parts.clone())?, levels(&inputs).at(0.0), None)?;
    // So large a port that its pressure stands still, as at a line fed from a tank.
    parts.valve.priority_port = linear_chamber(1.0, modulus);
    let area = parts.line.line.area();
    let mut inputs = levels(&inputs);
    inputs.set(
        Input::BenchArea,
        Profile::new(vec![(0.0, 20e-6), (1e-3, 20e-6), (1e-3, 0.0)])?,
    );
    let run = run_from(&Circuit::new(parts)?, &inputs, before.state.clone(), 20e-3)?;
    let height = range(&run, "p_su", 0.0, 20e-3).1 - before.state("p_su");
    let speed = before.state("q_l") / area;
    Ok(height / (DENSITY * (modulus / DENSITY).sqrt() * speed))
}

/// Frequency of the line of `segments`, Hz. It starts in the shape of its lowest mode.
fn ringing(segments: usize) -> Tried<f64> {
    let mut parts = parts(1e9);
    parts.oil.kinematic_viscosity = 1e-6;
    parts.line.line.segments = segments;
    parts.valve.priority_port = linear_chamber(1.0, 1e9);
    let circuit = Circuit::new(parts)?;
    let angle = PI / (2.0 * segments as f64 + 1.0);
    let shape = |lump: usize| EVEN + 1e5 * (angle * lump as f64).sin();
    let names: Vec<String> = (1..segments).map(|lump| format!("p_l{lump}")).collect();
    let mut but: Vec<(&str, f64)> = names
        .iter()
        .enumerate()
        .map(|(place, name)| (name.as_str(), shape(place + 1)))
        .collect();
    but.push(("p_su", shape(segments)));
    let start = even_state(&circuit, &but);
    let run = run_from(&circuit, &levels(&[]), start, 0.1)?;
    falling_zeros_per_second(&run, "p_su", EVEN)
}

/// Rate at which a trace falls through a level, from the first to the last time it does.
fn falling_zeros_per_second(run: &RunResult, name: &str, level: f64) -> Tried<f64> {
    let points: Vec<(f64, f64)> = run.trace.named(name)?.points().collect();
    let zeros: Vec<f64> = points
        .windows(2)
        .filter(|pair| pair[0].1 > level && pair[1].1 <= level)
        .map(|pair| {
            let ((t0, p0), (t1, p1)) = (pair[0], pair[1]);
            t0 + (p0 - level) / (p0 - p1) * (t1 - t0)
        })
        .collect();
    match zeros.as_slice() {
        [first, .., last] => Ok((zeros.len() - 1) as f64 / (last - first)),
        _ => Err("it does not swing".into()),
    }
}

/// Pressure at the orifice, peak to peak, over the pressure of the mean flow.
fn ripple() -> Tried<f64> {
    // Stiff enough for the pressure to follow the flow at once.
    let mut parts = parts(1e13);
    parts.pump.ripple = Ripple::Gear {
        teeth: 12.0,
        peak_to_peak: Ripple::gear_peak_to_peak(12.0, 20f64.to_radians()),
    };
    // A spring that pulls the spool to the far stop.
    parts.valve.preload = -1000.0;
    let area = hole(3e-3);
    parts.excess = helmsplit_model::ExcessSide::Tank {
        area,
        edge: sharp_edge(),
    };
    let speed = 2.0 * PI * 25.0;
    let mean = parts.pump.displacement_rad * speed / (CD * area);
    let mean = 0.5 * DENSITY * mean * mean;
    let circuit = Circuit::new(parts)?;
    let inputs = levels(&[(Input::EngineSpeed, speed), (Input::ExcessCommand, 1.0)]);
    let start = even_state(&circuit, &[("x", 30e-3)]);
    let run = run_from(&circuit, &inputs, start, 0.1)?;
    let (low, high) = range(&run, "p_e", 0.05, 0.1);
    Ok((high - low) / mean)
}

#[allow(clippy::too_many_lines, reason = "a table of cases")]
pub(super) fn checks() -> Vec<Check> {
    let mut all = Vec::new();
    for (id, share, bar) in [
        ("a quarter", 0.25, 56.25),
        ("a half", 0.5, 25.0),
        ("three quarters", 0.75, 6.25),
    ] {
        let time = share * 26.776e-3;
        all.push(EMPTYING.check(
            format!(
                "circuit-emptying-{}",
                id.trim_start_matches("a ").replace(' ', "-")
            ),
            format!("pressure after {id} of that time"),
            bar,
            Relative(5e-4),
            move || number(emptying(time)),
        ));
    }
    all.push(SERIES.check(
        "circuit-spool-speed",
        "speed of the spool on its way back",
        0.045_545,
        Relative(1e-4),
        || number(spool_speed()),
    ));
    for (id, speed, expected) in [("05", 0.5, 0.748_435), ("01", 0.1, 0.937_476)] {
        all.push(REBOUND.check(
            format!("circuit-rebound-{id}"),
            format!("speed after over speed before, a v = {speed}"),
            expected,
            Relative(1e-4),
            move || number(rebound(speed)),
        ));
    }
    for (id, travel, expected) in [
        ("2", 2e-3, 15.0004),
        ("3", 3e-3, 15.4924),
        ("4", 4e-3, 15.9692),
    ] {
        all.push(REGULATED.check(
            format!("circuit-regulated-{id}"),
            format!("spool at rest at {} mm", travel * 1e3),
            expected,
            Relative(1e-5),
            move || number(regulated(travel)),
        ));
    }
    all.push(SURGE.check(
        "circuit-surge",
        "one segment, 850 kg/m3, 1 GPa",
        1.0,
        Relative(0.01),
        || number(surge()),
    ));
    for (segments, expected) in [(1, 86.3139), (4, 119.906), (16, 131.4234)] {
        all.push(RINGING.check(
            format!("circuit-ringing-{segments}"),
            format!("number of segments: {segments}"),
            expected,
            Relative(5e-4),
            move || number(ringing(segments)),
        ));
    }
    all.push(RIPPLE.check(
        "circuit-ripple",
        "pressure peak to peak over the pressure of the mean flow",
        0.344_522,
        Relative(2e-3),
        || number(ripple()),
    ));
    for (id, damping, expected) in [("02", 0.2, 52.662), ("05", 0.5, 16.303), ("07", 0.7, 4.599)] {
        all.push(OVERSHOOT.check(
            format!("circuit-overshoot-{id}"),
            format!("damping ratio {damping}"),
            expected,
            Relative(5e-4),
            move || number(overshoot(damping)),
        ));
    }
    all.into_iter().map(Check::by_solver).collect()
}
