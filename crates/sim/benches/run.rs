//! Runs of the orchard carrier, and the settled start.

#[allow(clippy::too_many_lines, reason = "tables of parts")]
#[path = "../../model/tests/fixture/mod.rs"]
mod fixture;
#[path = "../tests/manoeuvre/mod.rs"]
mod manoeuvre;

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use helmsplit_model::{Circuit, InputSegment};
use helmsplit_sim::{
    CircuitOnSegment, RunSetup, SettleOptions, SolverOptions, Start, Watch, run, settle,
    state_scales,
};

fn runs(criterion: &mut Criterion) {
    let circuit = Circuit::new(fixture::orchard()).expect("a line of one segment");
    let inputs = manoeuvre::carrier_manoeuvre();
    let mut group = criterion.benchmark_group("orchard carrier, 10 s");
    group.sample_size(20);
    for start in [Start::Cold, Start::Settled] {
        for tolerance in [1e-5, 1e-6, 1e-8] {
            let options = SolverOptions::with_tolerance(tolerance);
            let setup = RunSetup {
                circuit: &circuit,
                inputs: &inputs,
                from: 0.0,
                to: 10.0,
                start: &start,
                options: &options,
            };
            group.bench_function(format!("{start:?}, {tolerance:e}"), |bencher| {
                bencher.iter(|| run(black_box(&setup), &mut Watch::none()).expect("it fits"));
            });
        }
    }
    group.finish();
}

fn settled(criterion: &mut Criterion) {
    let circuit = Circuit::new(fixture::orchard()).expect("a line of one segment");
    let inputs = manoeuvre::carrier_manoeuvre().at(2.5);
    let scales = state_scales(&circuit);
    let frozen = CircuitOnSegment::new(&circuit, InputSegment::frozen(inputs), &scales);
    let cold = circuit.cold_state(&inputs);
    let find = |guess: Option<&[f64]>| {
        settle(
            &frozen,
            circuit.drifting_states(),
            &cold,
            guess,
            &SettleOptions::default(),
            &mut Watch::none(),
        )
        .expect("the cold state fits")
    };
    criterion.bench_function("settle from cold", |bencher| bencher.iter(|| find(None)));
    let rest = find(None).state;
    let near: Vec<f64> = rest.iter().map(|value| value * 1.02).collect();
    criterion.bench_function("settle from near", |bencher| {
        bencher.iter(|| find(Some(black_box(&near))));
    });
}

criterion_group!(benches, runs, settled);
criterion_main!(benches);
