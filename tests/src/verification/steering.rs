//! Demand of the steering wheel and turns from lock to lock.

use std::f64::consts::TAU;

use crate::bench_circuit::{cylinder, steering_unit};
use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::viscous_oil;
use crate::rk4::integrate;

pub(super) const ABOUT: &str = "\
Turns of the wheel and flow that a wheel rate asks for (M7.5), for a steering unit of 125 cm3/rev
and a cylinder of 25 cm2 x 200 mm. The metered rows integrate the deflection of the unit between a
supply of 100 bar and a load of 20 bar until it has settled.";

const TURNS: Subject = Subject {
    title: "Turns and times",
    source: Source::computed("cylinder volume over displacement; steering sizing practice"),
    unit: "rev",
};

const DEMAND: Subject = Subject {
    title: "Flow asked for",
    source: Source::published("sizing practice for steering units, 2006: rpm times displacement"),
    unit: "L/min",
};

const METERED: Subject = Subject {
    title: "Flow metered once the deflection has settled",
    source: Source::computed("rpm times displacement: the meter keeps up with the wheel"),
    unit: "L/min",
};

fn wheel(rpm: f64) -> f64 {
    rpm * TAU / 60.0
}

/// Volume from lock to lock, m3.
fn swept() -> f64 {
    let cylinder = cylinder(1e9);
    cylinder.area_a * cylinder.stroke
}

/// Metered flow in L/min after 1 s at a wheel rate in rpm; negative into chamber B.
fn metered(rpm: f64) -> f64 {
    let unit = steering_unit();
    let oil = viscous_oil(850.0, 30e-6);
    let chambers = if rpm > 0.0 { (20e5, 0.0) } else { (0.0, 20e5) };
    let at = |deflection: f64| unit.flows(&oil, deflection, wheel(rpm), 100e5, chambers, 0.0);
    let mut y = [0.0];
    integrate(
        &mut y,
        1e-4,
        1.0,
        |y, dy| dy[0] = at(y[0]).deflection_rate,
        |_, _| {},
    );
    let flows = at(y[0]);
    let sign = if flows.to_a { 1.0 } else { -1.0 };
    sign * flows.metered * 6e4
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = vec![
        TURNS.check("E2.turns", "lock to lock", 4.0, Relative(1e-12), || {
            swept() / steering_unit().demand(wheel(60.0))
        }),
        TURNS.in_unit("s").check(
            "E3.time.90",
            "lock to lock at 90 rpm",
            2.67,
            Absolute(5e-3),
            || swept() / steering_unit().demand(wheel(90.0)),
        ),
        TURNS.in_unit("s").check(
            "E3.time.120",
            "lock to lock at 15 L/min, 120 rpm",
            2.0,
            Relative(1e-12),
            || swept() / steering_unit().demand(wheel(120.0)),
        ),
        TURNS.in_unit("mm/s").check(
            "E3.rod",
            "rod speed at 90 rpm",
            75.0,
            Relative(1e-12),
            || steering_unit().demand(wheel(90.0)) / cylinder(1e9).area_a * 1e3,
        ),
    ];
    for (rpm, expected) in [(60.0, 7.5), (90.0, 11.25), (100.0, 12.5), (120.0, 15.0)] {
        all.push(DEMAND.check(
            format!("E3.{rpm}"),
            format!("{rpm} rpm"),
            expected,
            Relative(1e-12),
            move || steering_unit().demand(wheel(rpm)) * 6e4,
        ));
    }
    for (rpm, expected) in [(60.0, 7.5), (120.0, 15.0), (-90.0, -11.25)] {
        all.push(METERED.check(
            format!("E3.metered.{rpm}"),
            format!("{rpm} rpm"),
            expected,
            Relative(1e-9),
            move || metered(rpm),
        ));
    }
    all
}
