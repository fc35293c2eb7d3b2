//! Leakage and film damping of the spool's clearance.

use helmsplit_model::{PriorityValve, SpoolPressures};

use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::thin_oil;
use crate::test_valve::{even_pressure, test_valve};

pub(super) const ABOUT: &str = "\
Leakage through a concentric clearance (M5.4, M5.6) and the drag of its film (M5.9). A spool that
lies against its bore leaks up to 2.5 times as much; that is not modelled, wear is set through the
clearance.";

const LEAKAGE: Subject = Subject {
    title: "Leakage of a concentric clearance",
    source: Source::computed("Q = pi d c^3 dp / (12 mu L); Merritt 1967, ch. 3"),
    unit: "mL/min",
};

const FILM: Subject = Subject {
    title: "Film damping",
    source: Source::computed("mu pi d L / c, Couette flow; Merritt 1967, ch. 3"),
    unit: "N s/m",
};

/// Viscosity of the cases, Pa s.
const VISCOSITY: f64 = 25.5e-3;

pub(super) fn checks() -> Vec<Check> {
    vec![
        LEAKAGE.check(
            "B2.leak",
            "16 mm, 10 um, 10 mm long, 100 bar, 25.5 mPa s",
            9.855_976_952,
            Relative(1e-9),
            || PriorityValve::clearance_factor(16e-3, 10e-6, VISCOSITY) * 100e5 / 10e-3 * 6e7,
        ),
        LEAKAGE.check(
            "B2.end",
            "the same as an end land, inlet to head end",
            9.855_976_952,
            Relative(1e-9),
            || {
                let mut valve = test_valve();
                valve.end_conductance =
                    PriorityValve::clearance_factor(16e-3, 10e-6, VISCOSITY) / 10e-3;
                let p = SpoolPressures {
                    head: 0.0,
                    ..even_pressure(100e5)
                };
                valve.flows(&thin_oil(850.0), 0.0, 0.0, &p).head_leak * 6e7
            },
        ),
        LEAKAGE
            .in_unit("Pa s")
            .from(Source::published(
                "textbook problem: annulus 50 / 49 mm radius, 1 m, 0.001 m3/s, 250 kPa; \
                 viscosity asked",
            ))
            .check(
                "B2.annulus",
                "viscosity from the flow, answer of the book",
                0.0065,
                Absolute(5e-5),
                || {
                    // Leakage falls with viscosity, so a unit viscosity gives the ratio.
                    PriorityValve::clearance_factor(99e-3, 1e-3, 1.0) * 250e3 / 1e-3
                },
            ),
        LEAKAGE
            .in_unit("Pa s")
            .from(Source::computed(
                "the same problem, exact laminar flow in an annulus",
            ))
            .check(
                "B2.annulus.c",
                "viscosity from the flow, exact annulus",
                0.006_479_6,
                Relative(1.5e-5),
                || PriorityValve::clearance_factor(99e-3, 1e-3, 1.0) * 250e3 / 1e-3,
            ),
        FILM.check(
            "B2.film",
            "25.5 mPa s, 16 mm, 30 mm long, 10 um",
            3.845,
            Absolute(5e-4),
            || PriorityValve::film_damping(16e-3, 30e-3, 10e-6, VISCOSITY),
        ),
    ]
}
