//! Cost of one right-hand side, one Jacobian and one set of signals of the orchard carrier: along
//! its reference run, as the solver meets it, and at a state thrown by dice, where every check
//! valve, relief and stop is at work.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use helmsplit_model::{Circuit, Input, InputProfiles, Inputs, Profile, Readings};

#[path = "../tests/fixture/mod.rs"]
mod fixture;

/// One moment of a run.
type Moment = (Inputs, Vec<f64>);

/// The manoeuvre of the reference run: times in s, engine speed in rpm, wheel rate in rad/s.
fn manoeuvre() -> InputProfiles {
    let rad_s = std::f64::consts::TAU / 60.0;
    let speed = [
        (0.0, 900.0),
        (1.0, 900.0),
        (2.0, 2400.0),
        (7.0, 2400.0),
        (7.5, 900.0),
    ];
    let w = 90.0 * rad_s;
    let mut wheel = vec![(0.0, 0.0)];
    for (start, rate) in [(3.0, w), (5.0, -w), (8.0, w)] {
        wheel.extend([
            (start, 0.0),
            (start + 0.05, rate),
            (start + 1.0, rate),
            (start + 1.05, 0.0),
        ]);
    }
    let profile = |points: Vec<(f64, f64)>| Profile::new(points).expect("times rise");
    let mut all = InputProfiles::default();
    let speed = speed.iter().map(|&(t, n)| (t, n * rad_s)).collect();
    all.set(Input::EngineSpeed, profile(speed));
    all.set(Input::WheelRate, profile(wheel));
    all.set(Input::ExcessCommand, Profile::constant(1.0));
    all
}

/// Every row of the reference run.
fn reference(circuit: &Circuit) -> Vec<Moment> {
    let path = concat!(
        env!("CARGO_MANIFEST_DIR"),
        "/../../tests/reference/orchard_carrier.csv"
    );
    let text = std::fs::read_to_string(path).expect("the reference is shipped");
    let mut lines = text.lines();
    let head: Vec<&str> = lines.next().unwrap_or_default().split(',').collect();
    let place = |name: &str| {
        head.iter()
            .position(|h| *h == name)
            .expect("every state is there")
    };
    let places: Vec<usize> = circuit.states().iter().map(|s| place(&s.name)).collect();
    let inputs = manoeuvre();
    lines
        .map(|line| {
            let row: Vec<f64> = line
                .split(',')
                .map(|field| field.parse().expect("a number"))
                .collect();
            (
                inputs.at(row[0]),
                places.iter().map(|&at| row[at]).collect(),
            )
        })
        .collect()
}

fn evaluate(c: &mut Criterion) {
    let circuit = Circuit::new(fixture::orchard()).expect("the fixture is a circuit");
    let mut dice = fixture::Dice(1);
    let thrown = fixture::working_state(&circuit, &mut dice);
    let thrown = vec![(fixture::working_inputs(&mut dice), thrown)];
    for (where_at, moments) in [("along the run", reference(&circuit)), ("thrown", thrown)] {
        let n = circuit.state_count();
        let mut dy = vec![0.0; n];
        let mut jacobian = vec![0.0; n * n];
        let mut readings = Readings::default();
        let mut next = moments.iter().cycle();
        let mut turn = || black_box(next.next().expect("a cycle has no end"));
        c.bench_function(&format!("right-hand side, {where_at}"), |b| {
            b.iter(|| {
                let (inputs, y) = turn();
                circuit.derivatives(inputs, y, &mut dy);
            });
        });
        c.bench_function(&format!("jacobian, {where_at}"), |b| {
            b.iter(|| {
                let (inputs, y) = turn();
                circuit.jacobian(inputs, y, &mut jacobian);
            });
        });
        c.bench_function(&format!("signals, {where_at}"), |b| {
            b.iter(|| {
                let (inputs, y) = turn();
                circuit.observe(inputs, y, &mut readings);
            });
        });
    }
}

criterion_group!(benches, evaluate);
criterion_main!(benches);
