//! Volumes of oil: how fast pressure rises, and how they empty.

use helmsplit_model::{Chamber, Orifice, SpoolPressures};

use crate::bisection::root;
use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::{linear_chamber, stiff, thin_oil};
use crate::rk4::{integrate, time_of_event};
use crate::test_valve::{CD, test_valve};

pub(super) const ABOUT: &str = "\
Pressure of a volume under inflow (M1.6), a volume that empties through a hole, and the two damping
holes in series that limit the speed of the spool (M5.5, M5.11). Integrated with a fixed-step
Runge-Kutta method of fourth order; turbulent flow, linear compliance.";

const RATE: Subject = Subject {
    title: "Rate of pressure",
    source: Source::computed("dp/dt = B Q / V; Merritt 1967"),
    unit: "bar/s",
};

const EMPTYING: Subject = Subject {
    title: "100 cm3 at 100 bar empties through a hole of 1 mm",
    source: Source::computed(
        "1 GPa, 850 kg/m3, Cd 0.62: sqrt(p) falls linearly, p = (sqrt(p0) - k t / 2)^2, \
         k = B Cd A sqrt(2 / rho) / V",
    ),
    unit: "ms",
};

const SERIES: Subject = Subject {
    title: "Two damping holes in series, 1.0 and 0.8 mm, spool of 16 mm under 104 N",
    source: Source::computed("turbulent flow through both, 1/d^4 adds up; 850 kg/m3, Cd 0.62"),
    unit: "m/s",
};

/// Pressure of the emptying volume over time: time at which it has fallen to `level`, ms.
fn time_to_fall(level: f64) -> f64 {
    let oil = stiff(thin_oil(850.0));
    let chamber = linear_chamber(100e-6, 1e9);
    let hole = Orifice::round(1e-3, CD, 60.0);
    let empty = |p: &[f64], dp: &mut [f64]| {
        dp[0] = chamber.pressure_rate(&oil, p[0], -hole.flow(&oil, p[0]));
    };
    let above = |p: &[f64]| p[0] - level;
    time_of_event(&mut [100e5], 1e-7, 0.03, empty, above).map_or(f64::NAN, |t| t * 1e3)
}

/// States of the closing spool: travel, velocity, pressures of head and spring end.
fn closing(from: f64) -> [f64; 4] {
    let valve = test_valve();
    [from, 0.0, 10e5, 10e5 - valve.preload / valve.end_area()]
}

/// Rates of the spool that the spring drives shut, both ends connected to 10 bar through their
/// damping holes.
fn close(y: &[f64], dy: &mut [f64]) {
    let mut valve = test_valve();
    valve.spring_rate = 0.0;
    let oil = stiff(thin_oil(850.0));
    let chamber = |at_rest: Chamber| linear_chamber(at_rest.volume, 1e9);
    let p = SpoolPressures {
        inlet: 10e5,
        bore: 10e5,
        head: y[2],
        spring: y[3],
        priority: 10e5,
        excess: 10e5,
    };
    let flows = valve.flows(&oil, y[0], y[1], &p);
    let forces = valve.forces(y[0], y[1], 0.0, &p, &flows);
    let (displaced, swept) = (y[1] * valve.end_area(), y[0] * valve.end_area());
    dy[0] = y[1];
    dy[1] = forces.sum / valve.mass;
    dy[2] = chamber(valve.head).pressure_rate_moving(&oil, y[2], flows.head - displaced, swept);
    dy[3] = chamber(valve.spring).pressure_rate_moving(&oil, y[3], flows.disc + displaced, -swept);
}

/// Speed at which the spool closes once everything has settled, m/s.
fn closing_speed() -> f64 {
    let mut y = closing(8e-3);
    let mut speed = f64::NAN;
    integrate(&mut y, 2e-6, 0.1, close, |_, y| speed = -y[1]);
    speed
}

fn series_checks() -> Vec<Check> {
    vec![
        SERIES.check(
            "B5.speed",
            "settled speed",
            0.0455,
            Absolute(5e-5),
            closing_speed,
        ),
        SERIES.in_unit("mm").check(
            "B5.series",
            "one hole that would do the same",
            0.734_20,
            Absolute(5e-6),
            || {
                let valve = test_valve();
                let flow = closing_speed() * valve.end_area();
                let drop = valve.preload / valve.end_area();
                let through = |mm: f64| {
                    Orifice::round(mm * 1e-3, CD, 60.0).flow(&thin_oil(850.0), drop) - flow
                };
                root(0.1, 2.0, through)
            },
        ),
        SERIES
            .in_unit("ms")
            .check("B5.time", "time for 8 mm", 176.0, Absolute(0.5), || {
                let mut y = closing(8e-3);
                time_of_event(&mut y, 2e-6, 0.5, close, |y| y[0]).map_or(f64::NAN, |t| t * 1e3)
            }),
    ]
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = vec![
        RATE.check(
            "B5.rate",
            "150 cm3, 30 L/min, 1 GPa",
            33_333.333_333,
            Relative(1e-9),
            || {
                let oil = stiff(thin_oil(850.0));
                linear_chamber(150e-6, 1e9).pressure_rate(&oil, 0.0, 30.0 / 6e4) * 1e-5
            },
        ),
        EMPTYING.check(
            "B5.empty",
            "time to empty",
            26.775_826_78,
            Relative(1e-4),
            || time_to_fall(0.01),
        ),
        EMPTYING.check(
            "B5.half",
            "time to 25 bar, half of that",
            13.387_913_39,
            Relative(1e-6),
            || time_to_fall(25e5),
        ),
    ];
    all.extend(series_checks());
    all
}
