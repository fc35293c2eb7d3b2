//! Whole runs: the reference circuits at three tolerances, a thousand variants of the orchard
//! carrier on all cores, and operating maps.

use std::hint::black_box;
use std::time::{Duration, Instant};

use criterion::{BenchmarkId, Criterion, criterion_group, criterion_main};
use helmsplit_acceptance::equilibria::preset;
use helmsplit_acceptance::reference::{NAMES, Reference};
use helmsplit_model::{Circuit, InputProfiles};
use helmsplit_scenario::Scenario;
use helmsplit_scenario::parameter::{valve, valve_edges};
use helmsplit_sim::{RunSetup, SolverOptions, Start, Watch, run};
use helmsplit_study::{MapSpec, MapWatch, operating_map};
use rayon::prelude::*;

fn scenario(name: &'static str) -> Scenario {
    Reference::load(name)
        .and_then(|reference| reference.scenario())
        .expect("the reference is shipped and is a scenario")
}

fn solve(circuit: &Circuit, inputs: &InputProfiles, to: f64, start: &Start, tolerance: f64) {
    let options = SolverOptions::with_tolerance(tolerance);
    let setup = RunSetup {
        circuit,
        inputs,
        from: 0.0,
        to,
        start,
        options: &options,
    };
    let result = run(black_box(&setup), &mut Watch::none()).expect("the setup fits");
    assert!(
        result.end.is_finished(),
        "the run ends early: {}",
        result.end
    );
}

fn references(criterion: &mut Criterion) {
    let mut group = criterion.benchmark_group("reference circuit from cold");
    group.sample_size(20);
    for name in NAMES {
        let scenario = scenario(name);
        let circuit = scenario.circuit().expect("a circuit");
        let inputs = scenario.inputs().expect("inputs");
        let to = scenario.solver().duration;
        for tolerance in [1e-5, 1e-6, 1e-8] {
            group.bench_function(BenchmarkId::new(name, tolerance), |bencher| {
                bencher.iter(|| solve(&circuit, &inputs, to, &Start::Cold, tolerance));
            });
        }
    }
    group.finish();
}

/// Variants in one go.
const VARIANTS: u32 = 1000;

/// A circuit with a few dimensions moved by some per cent, the same for the same number.
fn variant(base: &Scenario, number: u32) -> Circuit {
    let mut scenario = base.clone();
    for (place, id) in [
        valve::SPOOL_MASS,
        valve::SPRING_PRELOAD,
        valve::SPRING_RATE,
        valve_edges::FIXED_ORIFICE_DIAMETER,
    ]
    .into_iter()
    .enumerate()
    {
        // Weyl's sequence: even over -1..1 and the same on every machine.
        let step = [0.618_034, 0.754_878, 0.819_173, 0.856_675][place];
        let even = 2.0 * (f64::from(number) * step).fract() - 1.0;
        scenario
            .set_si(id, base.si(id) * (1.0 + 0.03 * even))
            .expect("a few per cent are allowed");
    }
    scenario.circuit().expect("a circuit")
}

fn variants(criterion: &mut Criterion) {
    let base = scenario("orchard_carrier");
    let inputs = base.inputs().expect("inputs");
    let to = base.solver().duration;
    let mut group = criterion.benchmark_group("variants of the orchard carrier");
    group.sample_size(10);
    group.measurement_time(Duration::from_secs(60));
    group.bench_function("1000 runs of 10 s on all cores, 1e-5", |bencher| {
        bencher.iter_custom(|rounds| {
            let begun = Instant::now();
            for _ in 0..rounds {
                (0..VARIANTS).into_par_iter().for_each(|number| {
                    let circuit = variant(&base, number);
                    solve(&circuit, &inputs, to, &Start::Settled, 1e-5);
                });
            }
            begun.elapsed()
        });
    });
    group.finish();
}

/// The operating map as the window asks for it: 40 by 40 equilibria with their eigenvalues, on all
/// cores; at most 3 s on two idle ones.
fn maps(criterion: &mut Criterion) {
    let mut group = criterion.benchmark_group("operating map");
    group.sample_size(10);
    for name in ["orchard_carrier", "vineyard_sprayer"] {
        let scenario = preset(name);
        let spec = MapSpec::usual(&scenario);
        group.bench_function(BenchmarkId::new("40 x 40", name), |bencher| {
            bencher.iter(|| {
                let map = operating_map(&scenario, &spec, MapWatch::none()).expect("a map");
                black_box(map.failed())
            });
        });
    }
    group.finish();
}

criterion_group!(benches, references, variants, maps);
criterion_main!(benches);
