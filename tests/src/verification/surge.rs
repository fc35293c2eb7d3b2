//! Surge and ringing of a shut line, from one segment to many.

use std::f64::consts::{FRAC_2_PI, TAU};

use helmsplit_model::{Dual, Oil};
use nalgebra::DMatrix;

use crate::check::Tolerance::Relative;
use crate::check::{Check, Source, Subject};
use crate::ideal::{stiff, viscous_oil};
use crate::line_model::ShutLine;
use crate::rk4::{integrate, time_of_event};

pub(super) const ABOUT: &str = "\
A line that runs steadily is shut at its far end (M7.2, M1.6). One segment keeps the height of the
surge (Joukowsky) exactly but rings at 2/pi of the real line's frequency; more segments converge
to it with the first power of their number. Integrated with a fixed-step Runge-Kutta method of
fourth order, frequencies of many segments from the eigenvalues of the exact Jacobian. No friction,
and all compliance in a linear wall, as the closed forms assume.";

const JOUKOWSKY: Source =
    Source::computed("dp = rho c dV, c = sqrt(B / rho); Joukowsky 1898, Merritt 1967");

const HEIGHT: Subject = Subject {
    title: "Height of the surge, one segment",
    source: JOUKOWSKY,
    unit: "bar",
};

const CELERITY: Subject = Subject {
    title: "Speed of the wave",
    source: Source::computed(
        "c = sqrt((B / rho) / (1 + B D / (E e))); textbook problem, 4 km line",
    ),
    unit: "m/s",
};

const RINGING: Subject = Subject {
    title: "Ringing of a line of 2 m shut at one end, 870 kg/m3, 1.5 GPa",
    source: Source::computed(
        "chain of N lumps, f = (N c / (pi L)) sin(pi / (4 N + 2)); \
         Rayleigh, The Theory of Sound, 1877, ch. VI",
    ),
    unit: "Hz",
};

/// Oil for a line without friction: at a millionth of any usual flow it is still laminar, and its
/// loss then vanishes against the surge.
fn frictionless(density: f64) -> Oil {
    stiff(viscous_oil(density, 1e-10))
}

/// Share of the stated flow that is stopped; the surge is proportional to it.
const SHARE: f64 = 1e-6;

/// The line of the tables: 2 m of 10 mm bore.
fn line(density: f64, modulus: f64, segments: usize) -> ShutLine {
    ShutLine::new(frictionless(density), 2.0, 10e-3, modulus, segments)
}

/// Highest pressure at the shut end over two periods, Pa, from a steady flow in m3/s.
fn peak(line: &ShutLine, flow: f64) -> f64 {
    let mut y = [SHARE * flow, 0.0];
    let mut highest: f64 = 0.0;
    integrate(
        &mut y,
        1e-6,
        20e-3,
        |y, dy| line.rates(y, dy),
        |_, y| highest = highest.max(y[1]),
    );
    highest / SHARE
}

/// Frequency of one segment, Hz: time from one falling zero of the pressure to the next.
fn one_lump_frequency(line: &ShutLine, dt: f64) -> f64 {
    let mut y = [1e-12, 0.0];
    let fall = |y: &mut [f64; 2]| {
        time_of_event(y, dt, 1e6 * dt, |y, dy| line.rates(y, dy), |y| y[1]).unwrap_or(f64::NAN)
    };
    // The first event leaves the state up to one step late; the second is counted from there.
    let first = fall(&mut y);
    let late = dt - first % dt;
    1.0 / (fall(&mut y) + late)
}

/// Lowest frequency of a line of segments from the eigenvalues of its exact Jacobian, Hz.
fn lowest_frequency(line: &ShutLine) -> f64 {
    let n = line.size();
    let slope = |row: usize, column: usize| {
        let mut y = vec![Dual::<1>::variable(0.0, 1); n];
        y[column] = Dual::variable(0.0, 0);
        let mut dy = y.clone();
        line.rates(&y, &mut dy);
        dy[row].slopes[0]
    };
    // Pressures counted in units of impedance times flow: eigenvalues want a balanced matrix.
    let impedance = (slope(1, 0) / slope(0, 1)).abs().sqrt();
    let unit = |state: usize| {
        if state.is_multiple_of(2) {
            1.0
        } else {
            impedance
        }
    };
    let balanced = DMatrix::from_fn(n, n, |row, column| {
        slope(row, column) * unit(column) / unit(row)
    });
    let lowest = balanced
        .complex_eigenvalues()
        .iter()
        .map(|root| root.im.abs())
        .filter(|&im| im > 1.0)
        .fold(f64::INFINITY, f64::min);
    lowest / TAU
}

fn height_checks() -> Vec<Check> {
    vec![
        HEIGHT.check(
            "B4.height",
            "15 L/min in 10 mm stopped, 2 m, 870 kg/m3, 1.5 GPa",
            36.362_638_06,
            Relative(1e-6),
            || peak(&line(870.0, 1.5e9, 1), 15.0 / 6e4) * 1e-5,
        ),
        HEIGHT.check(
            "B4.length",
            "the same, line of 8 m",
            36.362_638_06,
            Relative(1e-6),
            || {
                let long = ShutLine::new(frictionless(870.0), 8.0, 10e-3, 1.5e9, 1);
                peak(&long, 15.0 / 6e4) * 1e-5
            },
        ),
        HEIGHT
            .from(Source::memory(
                "Holmboe & Rouleau, J. Basic Engineering 89, 1967: oil, 0.128 m/s, c 1324 m/s, \
                 25.4 mm; Joukowsky height at 878 kg/m3",
            ))
            .check(
                "B4.holmboe",
                "0.128 m/s stopped, without friction",
                1.489,
                Relative(1e-3),
                || {
                    let modulus = 878.0 * 1324.0f64.powi(2);
                    let line = ShutLine::new(frictionless(878.0), 2.0, 25.4e-3, modulus, 1);
                    peak(&line, 0.128 * line.line.area()) * 1e-5
                },
            ),
        CELERITY.check(
            "B4.celerity",
            "860 kg/m3, 1.5 GPa, steel 50 mm x 5 mm of 200 GPa",
            1273.77,
            Relative(1e-5),
            || {
                // The wall of the pipe in series with the oil: E e / D.
                let wall = 200e9 * 5.0 / 50.0;
                let together = 1.0 / (1.0 / 1.5e9 + 1.0 / wall);
                let line = ShutLine::new(frictionless(860.0), 2.0, 50e-3, together, 1);
                one_lump_frequency(&line, 1e-6) * TAU * 2.0
            },
        ),
        CELERITY.check(
            "B4.limit",
            "the same: velocity that may be stopped for 600 kPa",
            0.547_723,
            Relative(1e-5),
            || {
                let wall = 200e9 * 5.0 / 50.0;
                let together = 1.0 / (1.0 / 1.5e9 + 1.0 / wall);
                let line = ShutLine::new(frictionless(860.0), 2.0, 50e-3, together, 1);
                600e3 / peak(&line, line.line.area())
            },
        ),
    ]
}

/// Closed form of a chain of N lumps for the line of the table, N and Hz.
const CHAIN: [(usize, f64); 6] = [
    (1, 104.490_339_247),
    (2, 129.157_162_301),
    (4, 145.156_455_952),
    (8, 154.258_434_913),
    (16, 159.099_216_847),
    (32, 161.592_187_981),
];

fn ringing_checks() -> Vec<Check> {
    let mut all = vec![RINGING.check(
        "B4.lump",
        "one segment, c / (2 pi L), timed",
        104.490_34,
        Relative(1e-6),
        || one_lump_frequency(&line(870.0, 1.5e9, 1), 1e-6),
    )];
    for (segments, expected) in CHAIN {
        all.push(RINGING.check(
            format!("B4.chain.{segments}"),
            format!("{segments} segments"),
            expected,
            Relative(1e-6),
            move || lowest_frequency(&line(870.0, 1.5e9, segments)),
        ));
    }
    let real = RINGING.from(Source::computed(
        "quarter wave, f = c / (4 L); Merritt 1967, Wylie & Streeter, Fluid Transients",
    ));
    all.push(real.check(
        "B4.real",
        "32 segments against the real line",
        164.13,
        Relative(0.016),
        || lowest_frequency(&line(870.0, 1.5e9, 32)),
    ));
    all.push(real.check(
        "B4.limit0",
        "16 and 32 segments carried on to infinitely many",
        164.13,
        Relative(3e-4),
        || {
            let of = |n| lowest_frequency(&line(870.0, 1.5e9, n));
            2.0 * of(32) - of(16)
        },
    ));
    all.push(real.in_unit("").check(
        "B4.ratio",
        "one segment over the real line, 2 / pi",
        FRAC_2_PI,
        Relative(1e-4),
        || lowest_frequency(&line(870.0, 1.5e9, 1)) / 164.133,
    ));
    all
}

pub(super) fn checks() -> Vec<Check> {
    let mut all = height_checks();
    all.extend(ringing_checks());
    all
}
