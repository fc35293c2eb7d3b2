//! Friction of lines.

use helmsplit_model::{Line, Oil};

use crate::check::Tolerance::Relative;
use crate::check::{Check, Source, Subject};
use crate::ideal::{stiff, viscous_oil};
use crate::rk4::time_of_event;

pub(super) const ABOUT: &str = "\
Pressure loss of smooth lines (M7.2): laminar up to Re 2000, Blasius from 4000, a smooth passage
between. Friction factors are drawn from the loss of a whole line. Churchill's correlation is an
independent law; Blasius lies within 2.5 % of it up to Re 1e5, where its range ends. Between 2000
and 4000 no formula is right, because the flow itself is not repeatable.";

const LAMINAR: Subject = Subject {
    title: "Laminar loss",
    source: Source::computed("Hagen-Poiseuille, dp = 128 mu L Q / (pi d^4)"),
    unit: "bar",
};

const FACTOR: Subject = Subject {
    title: "Friction factor (Darcy) of a smooth line",
    source: Source::computed("Blasius 1913, 0.3164 Re^-0.25"),
    unit: "",
};

const HAGEN: Source = Source::computed("Hagen-Poiseuille, 64 / Re");

const CHURCHILL: Source = Source::computed("Churchill, Chemical Engineering 84(24), 1977, smooth");

const TIME: Subject = Subject {
    title: "Decay of laminar flow",
    source: Source::computed("time constant d^2 / (32 nu), linear momentum balance"),
    unit: "ms",
};

fn line() -> Line {
    Line {
        length: 2.0,
        bore: 10e-3,
        fitting_loss: 0.0,
        segments: 1,
    }
}

fn oil() -> Oil {
    viscous_oil(850.0, 30e-6)
}

/// Darcy's friction factor at a Reynolds number, from the loss of the line.
fn factor(reynolds: f64) -> f64 {
    let (line, oil) = (line(), oil());
    let velocity = reynolds * oil.kinematic_viscosity / line.bore;
    let drop = line.segment_drop(&oil, velocity * line.area());
    drop * 2.0 * line.bore / (line.length * oil.density * velocity * velocity)
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = vec![LAMINAR.check(
        "B3.laminar",
        "15 L/min, 10 mm, 2 m, 30 mm2/s, 850 kg/m3",
        0.519_481_734_2,
        Relative(1e-9),
        || line().segment_drop(&oil(), 15.0 / 6e4) * 1e-5,
    )];
    for (source, name, reynolds, expected, tolerance) in [
        (HAGEN, "hagen", 100.0, 0.64, 1e-9),
        (HAGEN, "hagen", 1000.0, 0.064, 1e-9),
        // The +1 that keeps the formula finite at rest is worth 0.75/Re.
        (FACTOR.source, "blasius", 4000.0, 0.039_785, 2.1e-4),
        (FACTOR.source, "blasius", 1e4, 0.031_64, 1e-4),
        (FACTOR.source, "blasius", 1e5, 0.017_792_5, 2e-5),
        (CHURCHILL, "churchill", 100.0, 0.64, 1e-6),
        (CHURCHILL, "churchill", 1000.0, 0.064, 1e-6),
        (CHURCHILL, "churchill", 4000.0, 0.040_589_732_96, 0.025),
        (CHURCHILL, "churchill", 1e4, 0.031_002, 0.025),
        (CHURCHILL, "churchill", 1e5, 0.017_874_8, 0.025),
    ] {
        all.push(FACTOR.from(source).check(
            format!("B3.{name}.{reynolds}"),
            format!("Re {reynolds}"),
            expected,
            Relative(tolerance),
            move || factor(reynolds),
        ));
    }
    all.push(TIME.check(
        "B5.line",
        "10 mm, 30 mm2/s, to 1/e",
        104.17,
        Relative(5e-5),
        || {
            let (line, oil) = (line(), stiff(oil()));
            let inertance = line.segment_inertance(&oil);
            let start = 1e-4;
            let decay = |y: &[f64], dy: &mut [f64]| {
                dy[0] = -line.segment_drop(&oil, y[0]) / inertance;
            };
            let left = |y: &[f64]| y[0] - start * (-1f64).exp();
            time_of_event(&mut [start], 1e-5, 1.0, decay, left).map_or(f64::NAN, |t| t * 1e3)
        },
    ));
    all
}
