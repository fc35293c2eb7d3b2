//! Cost of one right-hand side, one Jacobian and one set of signals of the orchard carrier.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use helmsplit_model::{Circuit, Readings};

#[path = "../tests/fixture/mod.rs"]
mod fixture;

fn evaluate(c: &mut Criterion) {
    let circuit = Circuit::new(fixture::orchard()).expect("the fixture is a circuit");
    let n = circuit.state_count();
    let mut dice = fixture::Dice(1);
    let y = fixture::working_state(&circuit, &mut dice);
    let inputs = fixture::working_inputs(&mut dice);
    let mut dy = vec![0.0; n];
    let mut jac = vec![0.0; n * n];
    let mut readings = Readings::default();
    c.bench_function("right-hand side", |b| {
        b.iter(|| circuit.derivatives(black_box(&inputs), black_box(&y), &mut dy));
    });
    c.bench_function("jacobian", |b| {
        b.iter(|| circuit.jacobian(black_box(&inputs), black_box(&y), &mut jac));
    });
    c.bench_function("signals", |b| {
        b.iter(|| circuit.observe(black_box(&inputs), black_box(&y), &mut readings));
    });
}

criterion_group!(benches, evaluate);
criterion_main!(benches);
