//! The orchard carrier: held at the lock, with a blocked port, and with faults.

use helmsplit_model::Input;
use helmsplit_sim::{RunResult, Start};

use super::{EARLIER, LPM, number};
use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Subject};
use crate::rig::{Rig, last, mean};
use crate::trouble::Tried;

const LOCK: Subject = Subject {
    title: "Steering held at the lock, 1800 rpm, fan on the excess port",
    source: EARLIER,
    unit: "rpm",
};

const BLOCKED: Subject = Subject {
    title: "Excess port blocked, 2000 rpm",
    source: EARLIER,
    unit: "bar",
};

const STROKE: Subject = Subject {
    title: "Stroke after one second of wheel at 110 rpm, idling at 900 rpm, 91.7 mm without losses \
            (guessed: from 2400 rpm to idle in 0.5 s, wheel 0.9 s later)",
    source: EARLIER,
    unit: "mm",
};

const PLUGGED: Subject = Subject {
    title: "Disc hole plugged, cold start, while the wheel turns at 110 rpm",
    source: EARLIER,
    unit: "L/min",
};

/// rpm in 1 rad/s.
const RPM: f64 = 30.0 / std::f64::consts::PI;

/// The wheel goes to the lock and is pulled there; settled start.
fn at_the_lock(relief: &str) -> Tried<RunResult> {
    Rig::preset("orchard_carrier")?
        .set("priority_relief.kind", relief)?
        .hold(Input::EngineSpeed, "1800 rpm")?
        .drive(
            Input::WheelRate,
            &[
                ("0.5 s", "0 rpm"),
                ("0.55 s", "90 rpm"),
                ("3 s", "90 rpm"),
                ("3.05 s", "30 rpm"),
            ],
        )?
        .run(&Start::Settled, 6.0)
}

fn lock_figure(relief: &str, name: &str, from: f64, to: f64) -> Tried<f64> {
    Ok(mean(&at_the_lock(relief)?, name, from, to))
}

fn blocked(relief: &str) -> Tried<RunResult> {
    Rig::preset("orchard_carrier")?
        .set("priority_relief.kind", relief)?
        .set("excess.kind", "blocked")?
        .hold(Input::EngineSpeed, "2000 rpm")?
        .run(&Start::Settled, 0.5)
}

/// Stroke in mm with a fault: values by their paths.
fn stroke(fault: &[(&str, &str)]) -> Tried<f64> {
    let mut rig = Rig::preset("orchard_carrier")?
        .drive(
            Input::EngineSpeed,
            &[("1 s", "2400 rpm"), ("1.5 s", "900 rpm")],
        )?
        .drive(
            Input::WheelRate,
            &[
                ("2.4 s", "0 rpm"),
                ("2.45 s", "110 rpm"),
                ("3.4 s", "110 rpm"),
                ("3.45 s", "0 rpm"),
            ],
        )?;
    for (path, text) in fault {
        rig = rig.set(path, text)?;
    }
    Ok(last(&rig.run(&Start::Settled, 4.9)?, "y_c") * 1e3)
}

fn plugged(speed: &str) -> Tried<f64> {
    let run = Rig::preset("orchard_carrier")?
        .set("valve.disc_hole_diameter", "0 mm")?
        .hold(Input::EngineSpeed, speed)?
        .drive(Input::WheelRate, &[("2 s", "0 rpm"), ("2.05 s", "110 rpm")])?
        .run(&Start::Cold, 2.9)?;
    Ok(mean(&run, "q_priority", 2.2, 2.9) * LPM)
}

#[allow(clippy::too_many_lines, reason = "a table of cases")]
pub(super) fn push_lock(all: &mut Vec<Check>) {
    const NONE: &str = "none";
    const PORT: &str = "on the priority port";
    const PILOT: &str = "pilot on the spring chamber";
    let held = |relief, name| move || number(lock_figure(relief, name, 5.5, 6.0));
    let motor = |relief| move || number(lock_figure(relief, "w_m", 5.5, 6.0)) * RPM;
    all.push(LOCK.check(
        "earlier-lock-before",
        "fan before the turn",
        788.0,
        Relative(0.01),
        || number(lock_figure(PORT, "w_m", 0.0, 0.5)) * RPM,
    ));
    all.push(LOCK.check(
        "earlier-lock-none",
        "fan without priority relief",
        0.0,
        Absolute(5.0),
        motor(NONE),
    ));
    all.push(LOCK.check(
        "earlier-lock-port",
        "fan with a relief on the priority port",
        720.0,
        Absolute(1.0),
        motor(PORT),
    ));
    all.push(LOCK.check(
        "earlier-lock-pilot",
        "fan with a pilot on the spring chamber",
        1296.0,
        Relative(0.01),
        motor(PILOT),
    ));
    let flow = held(NONE, "q_main");
    all.push(LOCK.in_unit("L/min").check(
        "earlier-lock-main",
        "flow through the main relief without priority relief",
        33.0,
        Absolute(0.5),
        move || flow() * LPM,
    ));
    let pressure = held(PILOT, "p_in");
    all.push(LOCK.in_unit("bar").check(
        "earlier-lock-inlet",
        "inlet pressure with a pilot on the spring chamber",
        147.0,
        Absolute(0.5),
        move || pressure() / 1e5,
    ));
    all.push(BLOCKED.check(
        "earlier-blocked-inlet",
        "inlet pressure",
        170.0,
        Absolute(0.5),
        || number(blocked(PORT).map(|run| last(&run, "p_in"))) / 1e5,
    ));
    all.push(BLOCKED.in_unit("L/min").check(
        "earlier-blocked-pilot",
        "what is left for the steering with a pilot on the spring chamber",
        0.15,
        Absolute(5e-3),
        || number(blocked(PILOT).map(|run| last(&run, "q_priority"))) * LPM,
    ));
}

/// A fault: what it is, the values that make it, and the stroke in mm.
type Fault = (&'static str, &'static [(&'static str, &'static str)], f64);

const FAULTS: &[Fault] = &[
    ("healthy", &[], 87.1),
    (
        "three times the slip of the pump, 80 degC",
        &[("pump.wear", "3"), ("oil.temperature", "80 degC")],
        74.8,
    ),
    ("0 degC", &[("oil.temperature", "0 degC")], 3.9),
    (
        "spool friction 40 N",
        &[("valve.coulomb_friction", "40 N")],
        81.5,
    ),
    (
        "spool friction 80 N",
        &[("valve.coulomb_friction", "80 N")],
        69.0,
    ),
    (
        "spool friction 150 N",
        &[("valve.coulomb_friction", "150 N")],
        37.1,
    ),
    ("air 5 %", &[("oil.entrained_air", "5 %")], 80.6),
    ("air 15 %", &[("oil.entrained_air", "15 %")], 64.9),
    (
        "spring preload halved",
        &[("valve.spring_preload", "88 N")],
        39.6,
    ),
];

pub(super) fn push_faults(all: &mut Vec<Check>) {
    for (place, &(what, fault, expected)) in FAULTS.iter().enumerate() {
        let id = format!("earlier-stroke-{}", place + 1);
        let obtain = move || number(stroke(fault));
        all.push(STROKE.check(id, what, expected, Relative(0.015), obtain));
    }
    for (id, speed, expected) in [
        ("earlier-plugged-idle", "900 rpm", 16.7),
        ("earlier-plugged-fast", "2400 rpm", 45.0),
    ] {
        let what = format!("priority flow at {speed}");
        all.push(PLUGGED.check(id, what, expected, Relative(0.01), move || {
            number(plugged(speed))
        }));
    }
}
