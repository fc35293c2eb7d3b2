//! Orifices from creeping to turbulent flow, and damping holes.

use std::f64::consts::PI;

use helmsplit_model::{Orifice, effective_discharge};

use crate::bisection::root;
use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::{thin_oil, viscous_oil};
use crate::test_valve::CD;

pub(super) const ABOUT: &str = "\
One formula from creeping to turbulent flow (M2.1) and short drilled holes (M2.4). With a
transition Reynolds number of 9.69 the formula's slow limit is Wuest's exact result for a thin
sharp round hole. The last table sets the damping hole against an independent correlation for
short tubes; it is another law, so the tolerance is the difference to expect between the two, and
at Reynolds numbers near 100 they part by about a fifth.";

const TURBULENT: Subject = Subject {
    title: "Turbulent flow, Cd 0.62",
    source: Source::computed("Q = Cd A sqrt(2 dp / rho); Merritt, Hydraulic Control Systems, 1967"),
    unit: "L/min",
};

const BLEND: Subject = Subject {
    title: "Laminar to turbulent, 1 mm, 30 mm2/s, 850 kg/m3, Cd 0.62, Re_t 60",
    source: Source::computed(
        "Borutzky, Barnard & Thoma, Simulation Modelling Practice and Theory 10, 2002, \
         solved for the flow",
    ),
    unit: "L/min",
};

const EFFECTIVE: Subject = Subject {
    title: "Effective discharge coefficient, Cd 0.62",
    source: Source::computed("Cd sqrt(Re / (Re + Re_t)), the same paper"),
    unit: "",
};

const SLOW: Subject = Subject {
    title: "Slow flow through a thin sharp hole",
    source: Source::memory("Wuest, Ingenieur-Archiv 22, 1954, through Merritt 1967, ch. 3"),
    unit: "",
};

const JET: Subject = Subject {
    title: "Jet speed and proportions",
    source: Source::published("engineering text on air release: 100 ft/s is reached at 3.95 bar"),
    unit: "m/s",
};

const SHORT_TUBE: Subject = Subject {
    title: "Damping hole against a correlation for short tubes",
    source: Source::memory(
        "Lichtarowicz, Duggins & Markland, J. Mech. Eng. Science 7(2), 1965: \
         1/Cd = 1/Cd_u + (20/Re)(1 + 2.25 L/d), Cd_u = 0.827 - 0.0085 L/d",
    ),
    unit: "",
};

/// Flow in L/min through a round hole.
fn flow(diameter_mm: f64, bar: f64, density: f64) -> f64 {
    Orifice::round(diameter_mm * 1e-3, CD, 60.0).flow(&thin_oil(density), bar * 1e5) * 6e4
}

/// The hole of the blend table.
fn hole(transition: f64) -> Orifice {
    Orifice::round(1e-3, CD, transition)
}

fn turbulent_checks() -> Vec<Check> {
    [
        (3.7, 5.0, 850.0, 13.719_137_43, 1e-9),
        (3.7, 5.0, 870.0, 13.5605, 5e-6),
        (1.0, 1.0, 850.0, 0.448_165, 2e-6),
        (1.0, 10.0, 850.0, 1.417_224, 1e-6),
        (1.0, 10.0, 870.0, 1.400_839, 1e-6),
        (0.8, 10.0, 850.0, 0.907_023, 1e-6),
    ]
    .into_iter()
    .map(|(d, bar, rho, expected, tolerance)| {
        TURBULENT.check(
            format!("B1.{d}.{bar}.{rho}"),
            format!("{d} mm, {bar} bar, {rho} kg/m3"),
            expected,
            Relative(tolerance),
            move || flow(d, bar, rho),
        )
    })
    .collect()
}

#[allow(clippy::too_many_lines, reason = "a table")]
fn blend_checks() -> Vec<Check> {
    let mut all: Vec<Check> = [
        (1e3, 0.019_291_5, 3e-6),
        (1e4, 0.105_521, 5e-6),
        (1e5, 0.407_756_235_3, 1e-9),
        (1e6, 1.375_446, 1e-6),
    ]
    .into_iter()
    .map(|(dp, expected, tolerance)| {
        BLEND.check(
            format!("B1.blend.{}", dp * 1e-5),
            format!("{} bar", dp * 1e-5),
            expected,
            Relative(tolerance),
            move || hole(60.0).flow(&viscous_oil(850.0, 30e-6), dp) * 6e4,
        )
    })
    .collect();
    all.push(BLEND.in_unit("m3/(s Pa)").check(
        "B1.slope",
        "slope at no pressure difference",
        3.946_497_4e-10,
        Relative(1e-7),
        || hole(60.0).flow(&viscous_oil(850.0, 30e-6), 1e-4) / 1e-4,
    ));
    for (transition, row) in [
        (
            60.0,
            [
                (1.0, 0.0794),
                (10.0, 0.2343),
                (60.0, 0.4384),
                (100.0, 0.4902),
                (1000.0, 0.6022),
            ],
        ),
        (
            9.4,
            [
                (1.0, 0.1923),
                (10.0, 0.4451),
                (60.0, 0.5765),
                (100.0, 0.5928),
                (1000.0, 0.6171),
            ],
        ),
    ] {
        for (reynolds, expected) in row {
            all.push(EFFECTIVE.check(
                format!("B1.cd.{transition}.{reynolds}"),
                format!("Re_t {transition}, Re {reynolds}"),
                expected,
                Absolute(5.1e-5),
                move || effective_discharge(CD, reynolds, transition),
            ));
            all.push(EFFECTIVE.check(
                format!("B1.cdq.{transition}.{reynolds}"),
                format!("Re_t {transition}, Re {reynolds}, from the flow"),
                expected,
                Absolute(5.1e-5),
                move || discharge_at(&hole(transition), 1e-3, reynolds),
            ));
        }
    }
    all
}

/// Discharge coefficient seen at a Reynolds number of the mean velocity in a hole of `diameter`:
/// finds the pressure difference that drives it there.
fn discharge_at(hole: &Orifice, diameter: f64, reynolds: f64) -> f64 {
    let oil = viscous_oil(850.0, 30e-6);
    let wanted = reynolds * oil.kinematic_viscosity / diameter * hole.area;
    let dp = root(1e-6, 1e10, |dp| hole.flow(&oil, dp) - wanted);
    wanted / (hole.area * (2.0 * dp / oil.density).sqrt())
}

fn slow_checks() -> Vec<Check> {
    vec![
        SLOW.check(
            "B1.wuest",
            "k in Q = pi d^3 dp / (k mu), Re_t 9.69",
            50.4,
            Relative(1e-3),
            || {
                let oil = viscous_oil(850.0, 30e-6);
                let (d, dp) = (1e-3f64, 1e-3);
                PI * d.powi(3) * dp / (oil.dynamic_viscosity() * hole(9.69).flow(&oil, dp))
            },
        ),
        SLOW.check(
            "B1.merritt",
            "Cd / sqrt(Re) at Re 0.01, Cd 0.611, Re_t 9.33",
            0.2,
            Relative(1e-3),
            || effective_discharge(0.611, 0.01, 9.33) / 0.1,
        ),
    ]
}

fn jet_checks() -> Vec<Check> {
    vec![
        JET.check(
            "A5.jet",
            "3.95 bar, 850 kg/m3",
            30.48,
            Relative(1e-3),
            || {
                let hole = hole(60.0);
                hole.flow(&thin_oil(850.0), 3.95e5) / (hole.area * CD)
            },
        ),
        JET.in_unit("")
            .from(Source::published("university exercise on a fixed orifice"))
            .check(
                "C5.square",
                "pressure drop for 10 % more flow, relative",
                1.21,
                Relative(1e-9),
                || {
                    let (hole, oil) = (hole(60.0), thin_oil(850.0));
                    let more = 1.1 * hole.flow(&oil, 1e5);
                    root(1e5, 2e5, |dp| hole.flow(&oil, dp) - more) / 1e5
                },
            ),
    ]
}

fn short_tube_checks() -> Vec<Check> {
    [
        (2.0, 1000.0, 0.7437),
        (2.0, 1e4, 0.8028),
        (4.0, 1000.0, 0.6844),
        (4.0, 1e4, 0.7806),
    ]
    .into_iter()
    .map(|(length, reynolds, expected)| {
        SHORT_TUBE.check(
            format!("B1.tube.{length}.{reynolds}"),
            format!("L/d {length}, Re {reynolds}, turbulent Cd as the correlation's"),
            expected,
            Relative(0.06),
            move || {
                let ultimate = 0.827 - 0.0085 * length;
                let hole = Orifice::damping_hole(1e-3, length * 1e-3, ultimate, 60.0);
                discharge_at(&hole, 1e-3, reynolds)
            },
        )
    })
    .collect()
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = turbulent_checks();
    all.extend(blend_checks());
    // One table each: the two ways to the effective coefficient come in pairs of one subject.
    all.sort_by_key(|check| check.subject == EFFECTIVE.title);
    all.extend(slow_checks());
    all.extend(jet_checks());
    all.extend(short_tube_checks());
    all
}
