//! Steady and transient jet forces.

use helmsplit_model::{Dual, PriorityValve, Real, SpoolPressures};

use crate::bisection::root;
use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::thin_oil;
use crate::test_valve::{CD, OVERLAP, edge, test_valve};

pub(super) const ABOUT: &str = "\
Steady jet force (M5.7) and transient jet force (M5.8) of a sharp land at 69 degrees, drawn from
the flows of the valve. The rules of thumb come from measurements and rounded constants; their
tolerance is their rounding.";

const STEADY: Subject = Subject {
    title: "Steady jet force",
    source: Source::computed("2 Cd Cv A dp cos 69 deg; Merritt 1967, ch. 5"),
    unit: "N",
};

const VON_MISES: Source = Source::published("cos 0.358 (von Mises 1917) through Merritt 1967");

const RULE: Source = Source::published("rule 0.43 w x dp; Merritt 1967, ch. 5");

const TRANSIENT: Subject = Subject {
    title: "Transient jet force over velocity",
    source: Source::memory("L Cd w sqrt(2 rho dp); Merritt 1967, ch. 5"),
    unit: "N s/m",
};

/// The test valve with a discharge and a velocity coefficient at its land.
fn valve(discharge: f64, velocity_coefficient: f64) -> PriorityValve {
    let mut valve = test_valve();
    valve.land_edge = edge(discharge);
    valve.jet_factor = velocity_coefficient;
    valve
}

fn over_land<S: Real>(drop: f64) -> SpoolPressures<S> {
    let p = S::constant(drop);
    SpoolPressures {
        inlet: p,
        bore: p,
        head: p,
        spring: p,
        priority: p,
        excess: S::constant(0.0),
    }
}

/// Jet force in N with the land open to `area` (m2) under `drop` (Pa), oil of 850 kg/m3.
fn force(valve: &PriorityValve, area: f64, drop: f64) -> f64 {
    // The travel at which the land is that far open, rounding of the edge included.
    let travel = root(OVERLAP, 20e-3, |x| valve.land.opening(x).area - area);
    valve
        .flows(&thin_oil(850.0), travel, 0.0, &over_land(drop))
        .land_jet
}

/// Area of a full edge of 16 mm, 0.5 mm open, m2.
const HALF_MILLIMETRE: f64 = 25.132_741_228_718_345e-6;

fn steady_checks() -> Vec<Check> {
    vec![
        STEADY.check(
            "C1.force",
            "25.133 mm2, 50 bar, Cd 0.62, Cv 1",
            55.841_967_43,
            Relative(1e-9),
            || force(&valve(CD, 1.0), HALF_MILLIMETRE, 50e5),
        ),
        STEADY.check(
            "C1.cv",
            "25.133 mm2, 50 bar, Cd 0.61, Cv 0.98",
            53.842,
            Absolute(5e-4),
            || force(&valve(0.61, 0.98), HALF_MILLIMETRE, 50e5),
        ),
        STEADY.check(
            "C1.land",
            "3 x 0.75 mm, 20 MPa, Cd 0.62",
            19.997,
            Absolute(5e-4),
            || force(&valve(CD, 1.0), 2.25e-6, 20e6),
        ),
        STEADY.from(VON_MISES).in_unit("").check(
            "C1.ratio",
            "F / (A dp), Cd 0.611",
            0.438,
            Absolute(5e-4),
            || force(&valve(0.611, 1.0), HALF_MILLIMETRE, 50e5) / (HALF_MILLIMETRE * 50e5),
        ),
        STEADY.from(RULE).check(
            "C1.rule",
            "16 mm, 0.5 mm open, 50 bar",
            54.04,
            Relative(0.01),
            || force(&valve(0.61, 0.98), HALF_MILLIMETRE, 50e5),
        ),
        STEADY.from(RULE).in_unit("N/mm").check(
            "C1.stiffness",
            "jet force per travel, 16 mm, 50 bar",
            108.07,
            Relative(0.01),
            || {
                let travel = Dual::<1>::variable(OVERLAP + 0.5e-3, 0);
                let still = Dual::constant(0.0);
                let flows =
                    valve(0.61, 0.98).flows(&thin_oil(850.0), travel, still, &over_land(50e5));
                flows.land_jet.slopes[0] * 1e-3
            },
        ),
        STEADY
            .from(Source::published(
                "Feigel 1992, measured at one metering edge: F[N] = K Q[L/min] sqrt(dp[bar])",
            ))
            .in_unit("")
            .check("C1.feigel", "K", 0.077, Relative(0.013), || {
                let valve = valve(CD, 1.0);
                let flows = valve.flows(&thin_oil(850.0), OVERLAP + 0.5e-3, 0.0, &over_land(50e5));
                flows.land_jet / (flows.excess * 6e4 * 50f64.sqrt())
            }),
    ]
}

fn transient_checks() -> Vec<Check> {
    [(0.02, 57.464_68), (-0.02, -57.464_68)]
        .into_iter()
        .map(|(length, expected)| {
            TRANSIENT.check(
                format!("C2.{}", length * 1e3),
                format!("damping length {} mm, 50.265 mm, 50 bar", length * 1e3),
                expected,
                Relative(1e-6),
                move || {
                    let mut valve = test_valve();
                    valve.damping_length = length;
                    let flows =
                        valve.flows(&thin_oil(850.0), OVERLAP + 8e-3, 0.1, &over_land(50e5));
                    flows.transient_jet / 0.1
                },
            )
        })
        .collect()
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = steady_checks();
    all.extend(transient_checks());
    all
}
