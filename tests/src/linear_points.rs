//! Operating points at which eigenvalues and frequency responses are held against another
//! library, and the matrices handed to it.

use helmsplit_model::Input;
use helmsplit_scenario::Scenario;
use helmsplit_scenario::parameter::valve_edges;
use helmsplit_study::{
    Equilibrium, Excitation, OperatingPoint, SteeringDuty, equilibrium, frequency_response,
};
use serde::{Deserialize, Serialize};

use crate::equilibria::{RPM, bench, bench_point, preset};
use crate::trouble::Tried;

/// Frequencies of the responses, Hz: below, about and above the modes that are felt.
pub const FREQUENCIES: [f64; 6] = [1.0, 10.0, 40.0, 60.0, 150.0, 600.0];

/// States that are read.
pub const OUTPUTS: [&str; 3] = ["p_in", "x", "p_su"];

/// Excitations that are tried.
pub const EXCITATIONS: [Excitation; 3] = [
    Excitation::PumpFlow,
    Excitation::SteeringLoad,
    Excitation::EngineSpeed,
];

/// One operating point by its name.
pub struct LinearPoint {
    /// Name in files and tables.
    pub name: &'static str,
    /// The circuit.
    pub scenario: Scenario,
    /// Where.
    pub point: OperatingPoint,
}

/// The points: the bench damped well, little, and about at the border of hunting; the carrier at
/// rest, turning and at the lock; a governed engine with a line of many segments; a pilot relief.
#[must_use]
pub fn linear_points() -> Vec<LinearPoint> {
    let carrier = preset("orchard_carrier");
    let of = |scenario: &Scenario, speed: f64, steering: SteeringDuty| {
        OperatingPoint::resting(scenario)
            .at_speed(speed * RPM)
            .steering(steering)
    };
    let turning = |wheel_rate: f64, load: f64| SteeringDuty::Turning {
        wheel_rate: wheel_rate * RPM,
        load,
    };
    let mut all = Vec::new();
    let mut push = |name: &'static str, scenario: &Scenario, point: OperatingPoint| {
        all.push(LinearPoint {
            name,
            scenario: scenario.clone(),
            point,
        });
    };
    push("bench 900/10/2", &bench(), bench_point(900.0, 10.0, 2.0));
    push(
        "bench 2400/130/2",
        &bench(),
        bench_point(2400.0, 130.0, 2.0),
    );
    push(
        "bench 2400/30/150",
        &bench(),
        bench_point(2400.0, 30.0, 150.0),
    );
    let border = bench_point(2400.0, 130.0, 2.0).with(valve_edges::DISC_HOLE_DIAMETER, 0.656e-3);
    push("bench at the border", &bench(), border);
    push(
        "carrier at rest",
        &carrier,
        of(&carrier, 1500.0, SteeringDuty::Rest),
    );
    push(
        "carrier turning",
        &carrier,
        of(&carrier, 1500.0, turning(90.0, 30e5)),
    );
    let lock = SteeringDuty::AtLock { wheel_rate: 3.0 };
    push("carrier at the lock", &carrier, of(&carrier, 1800.0, lock));
    let sprayer = preset("vineyard_sprayer");
    push(
        "sprayer turning",
        &sprayer,
        of(&sprayer, 1500.0, turning(60.0, 20e5)),
    );
    let tug = preset("depot_tug");
    push("tug turning", &tug, of(&tug, 1500.0, turning(60.0, 20e5)));
    all
}

/// Matrices of one point, SI: `z' = A z + B u`, and states read one by one.
#[derive(Debug, Serialize)]
pub struct Matrices {
    /// Name of the point.
    pub name: &'static str,
    /// Short names of the free states.
    pub states: Vec<String>,
    /// Jacobian, row by row, 1/s in SI units of the states.
    pub a: Vec<Vec<f64>>,
    /// One column for each of [`EXCITATIONS`].
    pub b: Vec<Vec<f64>>,
}

/// What the other library made of them.
#[derive(Debug, Deserialize)]
pub struct LinearReference {
    /// One entry a point.
    pub points: Vec<ReferencePoint>,
}

/// Eigenvalues and responses of one point by the other library.
#[derive(Debug, Deserialize)]
pub struct ReferencePoint {
    /// Name of the point.
    pub name: String,
    /// Eigenvalues, 1/s: real and imaginary part.
    pub eigenvalues: Vec<(f64, f64)>,
    /// Responses: excitation, output, frequency, each real and imaginary part, SI.
    pub responses: Vec<Vec<Vec<(f64, f64)>>>,
}

/// The stored numbers.
///
/// # Errors
/// If the file does not read.
pub fn linear_reference() -> Tried<LinearReference> {
    let text = include_str!("../reference/linear_reference.json");
    Ok(serde_json::from_str(text)?)
}

/// The matrices of a point. The Jacobian is the circuit's own; the columns come from differences
/// of its rates over its inputs, and for the pump's flow from the inlet volume.
///
/// # Errors
/// If there is no equilibrium.
pub fn matrices(linear: &LinearPoint) -> Tried<Matrices> {
    let rest = equilibrium(&linear.scenario, &linear.point)?;
    let circuit = rest.circuit();
    let n = circuit.state_count();
    let mut jacobian = vec![0.0; n * n];
    circuit.jacobian(rest.inputs(), &rest.state, &mut jacobian);
    let free: Vec<usize> = (0..n).filter(|i| !rest.held().contains(i)).collect();
    let a = free
        .iter()
        .map(|&i| free.iter().map(|&j| jacobian[j * n + i]).collect())
        .collect();
    let columns = EXCITATIONS.map(|excitation| column(&rest, excitation));
    let b = columns
        .iter()
        .map(|column| free.iter().map(|&i| column[i]).collect())
        .collect();
    Ok(Matrices {
        name: linear.name,
        states: free
            .iter()
            .map(|&i| circuit.states()[i].name.clone())
            .collect(),
        a,
        b,
    })
}

fn column(rest: &Equilibrium, excitation: Excitation) -> Vec<f64> {
    let circuit = rest.circuit();
    let n = circuit.state_count();
    let (input, step) = match excitation {
        Excitation::PumpFlow => {
            let mut column = vec![0.0; n];
            if let Some(at) = circuit.state_index("p_in") {
                let parts = circuit.parts();
                let chamber = parts.valve.inlet;
                column[at] = chamber.pressure_rate(&parts.oil, rest.state[at], 1.0)
                    - chamber.pressure_rate(&parts.oil, rest.state[at], 0.0);
            }
            return column;
        }
        Excitation::EngineSpeed => (Input::EngineSpeed, 1e-3),
        Excitation::SteeringLoad | Excitation::ExcessLoad => {
            let bench = matches!(rest.point.steering, SteeringDuty::Bench { .. });
            if bench {
                (Input::BenchPressure, 10.0)
            } else {
                (Input::ExternalForce, 1.0)
            }
        }
    };
    let rates = |by: f64| {
        let mut inputs = *rest.inputs();
        inputs.set(input, inputs.get(input) + by);
        let mut rates = vec![0.0; n];
        circuit.derivatives(&inputs, &rest.state, &mut rates);
        rates
    };
    let (above, below) = (rates(step), rates(-step));
    above
        .iter()
        .zip(&below)
        .map(|(above, below)| (above - below) / (2.0 * step))
        .collect()
}

/// Largest distance of an eigenvalue from its nearest in the reference, relative to its size;
/// eigenvalues below 1 1/s count as that large, since a neutral one is 0 but for rounding.
///
/// # Errors
/// If there is no equilibrium or no reference for the point.
pub fn eigenvalue_deviation(name: &str) -> Tried<f64> {
    let (rest, reference) = both(name)?;
    let mut found = rest.stability.eigenvalues.clone();
    if found.len() != reference.eigenvalues.len() {
        return Err("another number of eigenvalues".into());
    }
    let mut worst: f64 = 0.0;
    for &(re, im) in &reference.eigenvalues {
        let far = |v: &(f64, f64)| (v.0 - re).hypot(v.1 - im);
        let nearest = (0..found.len()).min_by(|&a, &b| far(&found[a]).total_cmp(&far(&found[b])));
        let Some(at) = nearest else {
            return Err("eigenvalues are missing".into());
        };
        worst = worst.max(far(&found[at]) / re.hypot(im).max(1.0));
        found.swap_remove(at);
    }
    Ok(worst)
}

/// Largest deviation of a response from the reference, relative to the largest response of the
/// same signal to the same excitation.
///
/// # Errors
/// If there is no equilibrium or no reference for the point.
pub fn response_deviation(name: &str) -> Tried<f64> {
    let (rest, reference) = both(name)?;
    let mut worst: f64 = 0.0;
    for (excitation, expected) in EXCITATIONS.into_iter().zip(&reference.responses) {
        let found = frequency_response(&rest, excitation, &OUTPUTS, &FREQUENCIES)?;
        for (response, expected) in found.iter().zip(expected) {
            let largest = expected.iter().map(|v| v.0.hypot(v.1)).fold(0.0, f64::max);
            for (a, b) in response.values.iter().zip(expected) {
                worst = worst.max((a.0 - b.0).hypot(a.1 - b.1) / largest);
            }
        }
    }
    Ok(worst)
}

fn both(name: &str) -> Tried<(Equilibrium, ReferencePoint)> {
    let linear = linear_points().into_iter().find(|p| p.name == name);
    let linear = linear.ok_or("no such point")?;
    let rest = equilibrium(&linear.scenario, &linear.point)?;
    let reference = linear_reference()?
        .points
        .into_iter()
        .find(|p| p.name == name);
    Ok((rest, reference.ok_or("no reference for the point")?))
}
