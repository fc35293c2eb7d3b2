//! The spool: balance of forces, regulated flow, damping holes, second-order response.

use helmsplit_model::{Dual, Orifice, PriorityValve, Real, SpoolPressures};

use crate::bisection::root;
use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::{linear_chamber, stiff, thin_oil};
use crate::rk4::integrate;
use crate::test_valve::{CD, even_pressure, test_valve};

pub(super) const ABOUT: &str = "\
Spool of 16 mm and 60 g on a spring of 104 N + 8 N/mm (M5.9): what pressure balances it, what flow
that drives through the fixed orifice of 3.7 mm (M5.1), what its damping holes cost (M5.5), and the
step response of mass, spring and viscous damper. Jet forces are left out where a row does not name
them.";

const NUMBERS: Subject = Subject {
    title: "Numbers of the spool",
    source: Source::computed("plane geometry, F / A, sqrt(k / m), A^2 B / V"),
    unit: "",
};

const HOLES: Subject = Subject {
    title: "Pressure over a damping hole at 0.1 m/s",
    source: Source::computed("(rho / 2)(A v / (Cd a))^2, 850 kg/m3, Cd 0.62"),
    unit: "bar",
};

const REGULATED: Subject = Subject {
    title: "Regulated flow without jet force, 848.685 kg/m3",
    source: Source::computed("dp = (F0 + k x) / A, Q = Cd a sqrt(2 dp / rho)"),
    unit: "L/min",
};

const OVERSHOOT: Subject = Subject {
    title: "Overshoot of a second-order system",
    source: Source::computed("100 exp(-pi z / sqrt(1 - z^2)); any text on control"),
    unit: "%",
};

/// Pressure difference over the spool at which its forces balance at a travel, Pa: with `extra`
/// N beside the spring, against +x.
fn balancing_drop(travel: f64, extra: f64) -> f64 {
    let mut valve = without_jets();
    valve.preload += extra;
    let oil = thin_oil(848.685);
    root(0.0, 100e5, |drop| {
        let p = regulated(drop);
        let flows = valve.flows(&oil, travel, 0.0, &p);
        valve.forces(travel, 0.0, 0.0, &p, &flows).sum
    })
}

fn without_jets() -> PriorityValve {
    let mut valve = test_valve();
    valve.jet_factor = 0.0;
    valve
}

/// Inlet and head end lie `drop` above bore and spring end.
fn regulated(drop: f64) -> SpoolPressures<f64> {
    SpoolPressures {
        inlet: 50e5 + drop,
        head: 50e5 + drop,
        ..even_pressure(50e5)
    }
}

/// Flow through the fixed orifice where the forces balance, L/min.
fn regulated_flow(travel: f64, extra: f64) -> f64 {
    let drop = balancing_drop(travel, extra);
    let flows = without_jets().flows(&thin_oil(848.685), travel, 0.0, &regulated(drop));
    flows.orifice * 6e4
}

fn number_checks() -> Vec<Check> {
    vec![
        NUMBERS.in_unit("mm2").check(
            "C4.area",
            "area of its end",
            201.062,
            Absolute(5e-4),
            || test_valve().end_area() * 1e6,
        ),
        NUMBERS.in_unit("bar").check(
            "C4.drop",
            "pressure that balances 104 N",
            5.172_54,
            Absolute(5e-6),
            || balancing_drop(0.0, 0.0) * 1e-5,
        ),
        NUMBERS.in_unit("rad/s").check(
            "C4.omega",
            "natural frequency on its spring",
            365.148,
            Absolute(5e-4),
            natural_frequency,
        ),
        NUMBERS
            .in_unit("Hz")
            .check("C4.hertz", "the same", 58.115, Absolute(5e-4), || {
                natural_frequency() / std::f64::consts::TAU
            }),
        NUMBERS.in_unit("N/m").check(
            "C4.oil",
            "stiffness of 4 cm3 at 1 GPa under its end",
            1.0106e7,
            Relative(5e-5),
            || {
                let area = test_valve().end_area();
                let rate =
                    linear_chamber(4e-6, 1e9).pressure_rate(&stiff(thin_oil(850.0)), 0.0, area);
                rate * area
            },
        ),
    ]
}

/// Square root of the change of acceleration with travel, from the exact slope of the forces.
fn natural_frequency() -> f64 {
    let valve = without_jets();
    let lift = |p: f64| Dual::<1>::constant(p);
    let p = SpoolPressures {
        inlet: lift(50e5),
        bore: lift(50e5),
        head: lift(50e5),
        spring: lift(50e5),
        priority: lift(50e5),
        excess: lift(50e5),
    };
    let travel = Dual::variable(1e-3, 0);
    let flows = valve.flows(&thin_oil(850.0), travel, lift(0.0), &p);
    let forces = valve.forces(travel, lift(0.0), lift(0.0), &p, &flows);
    (-forces.sum.slopes[0] / valve.mass).sqrt()
}

fn hole_checks() -> Vec<Check> {
    [(1.0, 7.2458, 145.69), (0.8, 17.689_906_35, 355.68)]
        .into_iter()
        .flat_map(|(mm, bar, newton)| {
            let drop = move || {
                let displaced = 0.1 * test_valve().end_area();
                let hole = Orifice::round(mm * 1e-3, CD, 60.0);
                root(0.0, 1e9, |dp| hole.flow(&thin_oil(850.0), dp) - displaced)
            };
            [
                HOLES.check(
                    format!("C4.hole.{mm}"),
                    format!("hole of {mm} mm"),
                    bar,
                    Absolute(if mm < 1.0 { 1e-8 } else { 5e-5 }),
                    move || drop() * 1e-5,
                ),
                HOLES.in_unit("N").check(
                    format!("C4.force.{mm}"),
                    format!("hole of {mm} mm, force on the spool"),
                    newton,
                    Absolute(5e-3),
                    move || drop() * test_valve().end_area(),
                ),
            ]
        })
        .collect()
}

fn regulated_checks() -> Vec<Check> {
    let mut all = Vec::new();
    for (mm, bar, flow) in [
        (0.0, 5.1725, 13.9646),
        (1.5, 5.7694, 14.748_303_81),
        (2.0, 5.9683, 15.0004),
        (3.0, 6.3662, 15.4924),
        (4.0, 6.7641, 15.9692),
    ] {
        all.push(REGULATED.in_unit("bar").check(
            format!("C5.dp.{mm}"),
            format!("travel {mm} mm, pressure drop"),
            bar,
            Absolute(5.1e-5),
            move || balancing_drop(mm * 1e-3, 0.0) * 1e-5,
        ));
        all.push(REGULATED.check(
            format!("C5.flow.{mm}"),
            format!("travel {mm} mm, flow"),
            flow,
            Absolute(5.1e-5),
            move || regulated_flow(mm * 1e-3, 0.0),
        ));
    }
    all.push(
        REGULATED
            .in_unit("%")
            .from(Source::computed("dQ / Q = dF / (2 F), first order"))
            .check(
                "C5.droop",
                "change of flow for 5 N at 116 N",
                5.0 / (2.0 * 116.0) * 100.0,
                Relative(2e-4),
                || {
                    // A hundredth of the force, since the rule is of first order.
                    let more = regulated_flow(1.5e-3, 0.05) / regulated_flow(1.5e-3, 0.0);
                    (more - 1.0) * 1e4
                },
            ),
    );
    all
}

/// Largest excess over the settled travel and when it is reached (s), of the spool with a viscous
/// damper of damping ratio `zeta` and natural frequency `omega` (rad/s) after a step of its
/// spring force.
fn step_response(zeta: f64, omega: f64) -> (f64, f64) {
    let mut valve = without_jets();
    valve.mass = valve.spring_rate / (omega * omega);
    valve.viscous = 2.0 * zeta * (valve.spring_rate * valve.mass).sqrt();
    // Settles at 10 mm, away from both stops.
    valve.preload = -80.0;
    let oil = thin_oil(850.0);
    let p = even_pressure(50e5);
    let rates = |y: &[f64], dy: &mut [f64]| {
        let flows = valve.flows(&oil, y[0], y[1], &p);
        dy[0] = y[1];
        dy[1] = valve.forces(y[0], y[1], 0.0, &p, &flows).sum / valve.mass;
    };
    let settled = -valve.preload / valve.spring_rate;
    let (mut highest, mut at) = (0.0, 0.0);
    let mut y = [0.0, 0.0];
    let dt = 1e-4 / omega;
    integrate(&mut y, dt, 8.0 / omega, rates, |t, y| {
        if y[0] > highest {
            (highest, at) = (y[0], t);
        }
    });
    ((highest / settled - 1.0) * 100.0, at)
}

fn overshoot_checks() -> Vec<Check> {
    let mut all: Vec<Check> = [
        (0.05, 85.447),
        (0.1, 72.925),
        (0.2, 52.662),
        (0.3, 37.233),
        (0.4, 25.383),
        (0.5, 16.303_353_48),
        (0.6, 9.478),
        (0.7, 4.599),
        (0.8, 1.516),
    ]
    .into_iter()
    .map(|(zeta, expected)| {
        OVERSHOOT.check(
            format!("C7.{zeta}"),
            format!("damping ratio {zeta}"),
            expected,
            Absolute(6e-4),
            move || step_response(zeta, 365.148).0,
        )
    })
    .collect();
    let published = OVERSHOOT.from(Source::published(
        "text on control: damping ratio 0.5, 10 rad/s",
    ));
    all.push(
        published.check("C7.p", "overshoot", 16.3, Absolute(0.05), || {
            step_response(0.5, 10.0).0
        }),
    );
    all.push(published.in_unit("s").check(
        "C7.t",
        "time of the peak",
        0.36,
        Absolute(5e-3),
        || step_response(0.5, 10.0).1,
    ));
    all
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = number_checks();
    all.extend(hole_checks());
    all.extend(regulated_checks());
    all.extend(overshoot_checks());
    all
}
