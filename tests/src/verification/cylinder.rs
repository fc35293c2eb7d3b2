//! The cylinder's mass on its columns of oil, in a whole circuit with the ports shut.

use helmsplit_model::{Circuit, Cylinder, Inputs};

use crate::bench_circuit::{circuit, cylinder};
use crate::check::Tolerance::{Absolute, Relative};
use crate::check::{Check, Source, Subject};
use crate::ideal::{stiff, thin_oil};
use crate::rk4::time_of_event;

pub(super) const ABOUT: &str = "\
Mass on two columns of oil (M7.7, M1.6) in a whole circuit: cylinder at mid-stroke, wheel still,
ports shut, no tyre, friction or leakage, no dead volume, compliance linear. Read from the exact
Jacobian (the sum of the squares of its eigenvalues over the four states of the cylinder is minus
twice the square of the frequency) and once timed by integrating those four states.";

const COLUMN: Subject = Subject {
    title: "25 cm2, stroke 200 mm, 800 kg",
    source: Source::computed(
        "w^2 = B A^2 (1/V1 + 1/V2) / M; Stringer, Hydraulic Systems Analysis, 1976, and Merritt \
         1967, ch. 6",
    ),
    unit: "rad/s",
};

/// States of the cylinder, by their names.
const STATES: [&str; 4] = ["p_A", "p_B", "y_c", "v_c"];

/// A circuit with the positions of the cylinder's states and a state of even 50 bar.
fn shut(cylinder: Cylinder) -> Option<(Circuit, [usize; 4], Vec<f64>)> {
    let circuit = circuit(stiff(thin_oil(850.0)), cylinder).ok()?;
    let mut at = [0; 4];
    for (place, name) in at.iter_mut().zip(STATES) {
        *place = circuit.state_index(name)?;
    }
    let y = circuit
        .states()
        .iter()
        .map(|s| if s.name.starts_with("p_") { 50e5 } else { 0.0 })
        .collect();
    Some((circuit, at, y))
}

/// Frequency from the Jacobian, rad/s.
fn from_jacobian(cylinder: Cylinder) -> f64 {
    let Some((circuit, at, y)) = shut(cylinder) else {
        return f64::NAN;
    };
    let n = circuit.state_count();
    let mut jacobian = vec![0.0; n * n];
    circuit.jacobian(&Inputs::default(), &y, &mut jacobian);
    let entry = |row: usize, column: usize| jacobian[column * n + row];
    // With the ports shut nothing else acts on the cylinder; otherwise four states say nothing.
    let alone = at
        .iter()
        .all(|&row| (0..n).all(|j| at.contains(&j) || entry(row, j).abs() < f64::MIN_POSITIVE));
    if !alone {
        return f64::NAN;
    }
    let squares: f64 = at
        .iter()
        .flat_map(|&i| at.iter().map(move |&j| (i, j)))
        .map(|(i, j)| entry(i, j) * entry(j, i))
        .sum();
    (-0.5 * squares).sqrt()
}

/// Frequency from a quarter of the swing: time until the mass set moving stands still, rad/s.
fn timed(cylinder: Cylinder) -> f64 {
    let Some((circuit, at, mut y)) = shut(cylinder) else {
        return f64::NAN;
    };
    let n = circuit.state_count();
    y[at[3]] = 1e-3;
    let inputs = Inputs::default();
    let mut all = vec![0.0; n];
    let swing = |y: &[f64], dy: &mut [f64]| {
        circuit.derivatives(&inputs, y, &mut all);
        // Everything but the cylinder is held.
        dy.fill(0.0);
        for &i in &at {
            dy[i] = all[i];
        }
    };
    let quarter = time_of_event(&mut y, 1e-6, 1.0, swing, |y| y[at[3]]);
    quarter.map_or(f64::NAN, |t| std::f64::consts::FRAC_PI_2 / t)
}

pub(super) fn checks() -> Vec<Check> {
    vec![
        COLUMN.check("C3.1", "1.0 GPa, mid-stroke", 250.0, Relative(1e-9), || {
            from_jacobian(cylinder(1.0e9))
        }),
        COLUMN.check("C3.timed", "the same, timed", 250.0, Relative(1e-6), || {
            timed(cylinder(1.0e9))
        }),
        COLUMN
            .in_unit("Hz")
            .check("C3.hz", "the same", 39.789, Absolute(5e-4), || {
                from_jacobian(cylinder(1.0e9)) / std::f64::consts::TAU
            }),
        COLUMN.check(
            "C3.15",
            "1.5 GPa, mid-stroke",
            306.186,
            Absolute(5e-4),
            || from_jacobian(cylinder(1.5e9)),
        ),
        COLUMN.check(
            "C3.one",
            "1.0 GPa, one live chamber",
            176.777,
            Absolute(5e-4),
            || {
                from_jacobian(Cylinder {
                    area_b: 0.0,
                    dead_b: 60e-6,
                    ..cylinder(1.0e9)
                })
            },
        ),
    ]
}
