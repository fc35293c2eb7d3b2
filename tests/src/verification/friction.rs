//! Dry friction and end stops.

use helmsplit_model::{Bristle, EndStop, Friction};

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::thin_oil;
use crate::rk4::{integrate, time_of_event};
use crate::test_valve::{even_pressure, test_valve};

pub(super) const ABOUT: &str = "\
Smooth dry friction (M5.9) on the spool's spring, bristle friction (M5.9b), end stops (M5.10).
Smooth friction of width 0.1 mm/s loses what Coulomb friction loses as long as the spool moves
faster than that.";

const COULOMB: Subject = Subject {
    title: "Spool on a spring of 8 N/mm with dry friction of 5 N",
    source: Source::computed("amplitude falls by 4 F / k per cycle; Den Hartog 1934"),
    unit: "mm",
};

const DAHL: Subject = Subject {
    title: "Bristle force over a first displacement, 40 N, 8 N/um",
    source: Source::computed("F (1 - exp(-sigma_0 s / F)); Dahl 1968"),
    unit: "N",
};

const REBOUND: Subject = Subject {
    title: "Rebound from an end stop, force k s (1 + a s')",
    source: Source::computed(
        "a (v + e v) = ln[(1 + a v) / (1 - a e v)]; Hunt & Crossley, J. Applied Mechanics 42(2), \
         1975, exponent 1",
    ),
    unit: "",
};

/// Amplitude lost per cycle of the spool on its spring, mm, counted over the second cycle.
fn lost_per_cycle() -> f64 {
    let mut valve = test_valve();
    valve.friction = Friction::Smooth {
        coulomb: 5.0,
        velocity: 1e-4,
    };
    // Equilibrium at 15 mm, away from both stops.
    valve.preload = -15e-3 * valve.spring_rate;
    let middle = 15e-3;
    let oil = thin_oil(850.0);
    let p = even_pressure(50e5);
    let swing = |y: &[f64], dy: &mut [f64]| {
        let flows = valve.flows(&oil, y[0], y[1], &p);
        dy[0] = y[1];
        dy[1] = valve.forces(y[0], y[1], 0.0, &p, &flows).sum / valve.mass;
    };
    let mut y = [middle + 10e-3, 0.0];
    let mut tops = Vec::new();
    let mut before = 0.0;
    integrate(&mut y, 4e-7, 0.06, swing, |_, y| {
        if before > 0.0 && y[1] <= 0.0 {
            tops.push(y[0] - middle);
        }
        before = y[1];
    });
    match tops[..] {
        [first, second, ..] => (first - second) * 1e3,
        _ => f64::NAN,
    }
}

/// Bristle force after a displacement, N.
fn bristle_force(displacement: f64) -> f64 {
    let law = Bristle {
        coulomb: 40.0,
        breakaway: 40.0,
        stribeck_velocity: 1e-3,
        stiffness: 8e6,
        damping: 0.0,
        viscous: 0.0,
    };
    // Fast enough that the rounding of |v| at rest does not show; the law knows no rate.
    let speed = 10.0;
    let mut z = [0.0];
    let end = displacement / speed;
    integrate(
        &mut z,
        end / 2000.0,
        end,
        |z, dz| dz[0] = law.force(speed, z[0]).1,
        |_, _| {},
    );
    law.force(speed, z[0]).0
}

/// Rebound over impact speed of a free mass that hits the stop with `av` over its loss factor.
fn rebound(av: f64) -> f64 {
    let stop = EndStop {
        stiffness: 2e7,
        loss: 1.0,
    };
    let (mass, impact) = (0.06, av / stop.loss);
    let mut y = [0.0, impact];
    let hit = |y: &[f64], dy: &mut [f64]| {
        dy[0] = y[1];
        dy[1] = -stop.force(y[0], y[1]) / mass;
    };
    // Contact ends when the penetration is back at 0; it starts there too, so look from inside.
    let inside = |y: &[f64]| if y[1] > 0.0 { 1.0 } else { y[0] };
    match time_of_event(&mut y, 1e-8, 1.0, hit, inside) {
        Some(_) => -y[1] / impact,
        None => f64::NAN,
    }
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = vec![COULOMB.check(
        "B5.coulomb",
        "amplitude lost per cycle",
        2.5,
        Relative(1e-3),
        lost_per_cycle,
    )];
    for (um, expected) in [
        (1.0, 7.250_769_877),
        (5.0, 25.284_822_354),
        (20.0, 39.267_374_445),
    ] {
        all.push(DAHL.check(
            format!("F.dahl.{um}"),
            format!("after {um} um"),
            expected,
            Relative(1e-6),
            move || bristle_force(um * 1e-6),
        ));
    }
    for (av, expected) in [(0.5, 0.748_434_931_6), (0.1, 0.937_476), (0.05, 0.967_739)] {
        all.push(REBOUND.check(
            format!("B5.rebound.{av}"),
            format!("a v = {av}"),
            expected,
            Absolute(1e-6),
            move || rebound(av),
        ));
    }
    all
}
