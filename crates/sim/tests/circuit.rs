//! Runs of whole circuits: traces, grid, audits, starts.

#[allow(clippy::too_many_lines, reason = "tables of parts")]
#[path = "../../model/tests/fixture/mod.rs"]
mod fixture;
mod manoeuvre;

use helmsplit_model::{Circuit, Input, InputProfiles, Profile, Signal};
use helmsplit_scenario::units::UnitSystem;
use helmsplit_sim::{
    Method, Origin, Rest, Rows, RunResult, RunSetup, SavedState, Sidecar, SolverOptions, Start,
    Watch, run, write_csv,
};
use manoeuvre::{carrier_manoeuvre, rad_per_s};

fn carrier() -> Circuit {
    Circuit::new(fixture::orchard()).expect("a line of one segment")
}

fn solve(circuit: &Circuit, inputs: &InputProfiles, to: f64, start: &Start) -> RunResult {
    solve_with(circuit, inputs, to, start, &SolverOptions::default())
}

fn solve_with(
    circuit: &Circuit,
    inputs: &InputProfiles,
    to: f64,
    start: &Start,
    options: &SolverOptions,
) -> RunResult {
    let setup = RunSetup {
        circuit,
        inputs,
        from: 0.0,
        to,
        start,
        options,
    };
    run(&setup, &mut Watch::none()).expect("start and times fit")
}

/// Idle with one sudden turn of the wheel at 0.5 s.
fn jump_of_the_wheel() -> InputProfiles {
    let mut inputs = InputProfiles::default();
    inputs.set(Input::EngineSpeed, Profile::constant(rad_per_s(900.0)));
    inputs.set(Input::ExcessCommand, Profile::constant(1.0));
    let wheel = vec![(0.0, 0.0), (0.5, 0.0), (0.5, rad_per_s(60.0))];
    inputs.set(
        Input::WheelRate,
        Profile::new(wheel).expect("points in order"),
    );
    inputs
}

#[test]
fn audits_of_the_manoeuvre_close() {
    let r = solve(&carrier(), &carrier_manoeuvre(), 10.0, &Start::Settled);
    assert!(r.end.is_finished(), "{}", r.end);
    let audit = r.audit.unwrap();
    assert!(audit.volume.relative < 2e-6, "{:?}", audit.volume);
    assert!(audit.energy.relative < 1e-6, "{:?}", audit.energy);
    assert!(
        audit.volume.taken_in > 5e-3,
        "some 5 L went through: {:?}",
        audit.volume
    );
    // A fifth above the count measured (4742); more is a loss of speed to be explained.
    assert!(r.statistics.steps < 5800, "{:?}", r.statistics);
    assert_eq!(
        r.trace.steps().len(),
        r.statistics.steps + 1,
        "start and every step"
    );
}

#[test]
fn audits_close_on_every_kind_of_circuit() {
    for (name, parts) in fixture::variants() {
        let circuit = Circuit::new(parts).unwrap();
        let mut inputs = jump_of_the_wheel();
        inputs.set(Input::BenchArea, Profile::constant(8e-6));
        inputs.set(Input::BenchPressure, Profile::constant(30e5));
        inputs.set(Input::ExcessPressure, Profile::constant(10e5));
        inputs.set(Input::PriorityCommand, Profile::constant(1.0));
        let r = solve(&circuit, &inputs, 1.0, &Start::Cold);
        assert!(r.end.is_finished(), "{name}: {}", r.end);
        let audit = r.audit.unwrap();
        assert!(audit.volume.relative < 1e-4, "{name}: {:?}", audit.volume);
        assert!(audit.energy.relative < 1e-4, "{name}: {:?}", audit.energy);
    }
}

#[test]
fn the_output_step_changes_nothing_and_adds_a_grid() {
    let (circuit, inputs) = (carrier(), jump_of_the_wheel());
    let plain = solve(&circuit, &inputs, 1.0, &Start::Cold);
    assert!(plain.trace.grid().is_none(), "no grid unless asked for");
    for step in [0.01, 0.0007] {
        let options = SolverOptions {
            output_step: Some(step),
            ..SolverOptions::default()
        };
        let r = solve_with(&circuit, &inputs, 1.0, &Start::Cold, &options);
        assert_eq!(
            r.trace.steps(),
            plain.trace.steps(),
            "the solver's steps at {step} s"
        );
        assert_eq!(r.audit, plain.audit, "audits at {step} s");
        let grid = r.trace.grid().unwrap();
        let rows = (1.0 / step + 1e-9).floor() as usize + 1;
        assert_eq!(grid.len(), rows, "rows at {step} s");
        let wheel = r.trace.signal_position(Signal::WheelRate).unwrap();
        for (&time, value) in grid.times().iter().zip(grid.column(wheel).iter()) {
            let expected = inputs.at(time).get(Input::WheelRate);
            assert!(
                (value - expected).abs() < 1e-12,
                "wheel at {time} s: {value}"
            );
        }
    }
}

#[test]
fn the_grid_follows_the_solver_and_not_straight_lines_between_its_steps() {
    let (circuit, inputs) = (carrier(), jump_of_the_wheel());
    let options = |tolerance: f64| SolverOptions {
        output_step: Some(1e-3),
        ..SolverOptions::with_tolerance(tolerance)
    };
    let coarse = solve_with(&circuit, &inputs, 1.0, &Start::Cold, &options(1e-5));
    let fine = solve_with(&circuit, &inputs, 1.0, &Start::Cold, &options(1e-9));
    let position = coarse.trace.position("w_m").unwrap();
    let (a, b) = (coarse.trace.grid().unwrap(), fine.trace.grid().unwrap());
    let off = |value: f64, row: usize| (value - b.column(position).get(row)).abs() / 100.0;
    let mut from_grid: f64 = 0.0;
    for row in 0..a.len() {
        from_grid = from_grid.max(off(a.column(position).get(row), row));
    }
    assert!(
        from_grid < 5e-4,
        "motor speed off by {from_grid:.1e} of its size"
    );
}

#[test]
fn a_jump_stands_twice_in_the_trace() {
    let r = solve(&carrier(), &jump_of_the_wheel(), 1.0, &Start::Settled);
    let times = r.trace.steps().times();
    let first = times.iter().position(|&t| (t - 0.5).abs() < 1e-15).unwrap();
    assert!((times[first + 1] - 0.5).abs() < 1e-15, "twice at 0.5 s");
    let wheel = r.trace.signal(Signal::WheelRate).unwrap();
    assert!(
        wheel.get(first).abs() < 1e-15,
        "before: {}",
        wheel.get(first)
    );
    assert!(
        (wheel.get(first + 1) - rad_per_s(60.0)).abs() < 1e-12,
        "after"
    );
    assert_eq!(r.statistics.starts, 2, "{:?}", r.statistics);
    let pressure = r.trace.named("p_in").unwrap();
    assert!(
        (pressure.get(first) - pressure.get(first + 1)).abs() < 1e-9,
        "a state does not jump"
    );
}

#[test]
fn extremes_are_those_of_the_steps_and_need_no_steps() {
    let (circuit, inputs) = (carrier(), jump_of_the_wheel());
    let r = solve(&circuit, &inputs, 1.0, &Start::Cold);
    let options = SolverOptions {
        keep_solver_steps: false,
        ..SolverOptions::default()
    };
    let lean = solve_with(&circuit, &inputs, 1.0, &Start::Cold, &options);
    assert!(lean.trace.steps().is_empty(), "steps not kept");
    assert_eq!(lean.audit, r.audit, "audits without steps");
    for (position, info) in r.trace.columns().iter().enumerate() {
        let column = r.trace.steps().column(position);
        let extreme = r.trace.extreme(position).unwrap();
        let least = column.iter().fold(f64::INFINITY, f64::min);
        let largest = column.iter().fold(f64::NEG_INFINITY, f64::max);
        assert_eq!(
            (extreme.min, extreme.max),
            (least, largest),
            "{}",
            info.name
        );
        let when = column
            .times()
            .iter()
            .position(|&t| t >= extreme.max_time)
            .unwrap();
        let near = column
            .get(when)
            .max(column.get((when + 1).min(column.len() - 1)));
        assert!(near >= extreme.max, "{}: largest at its time", info.name);
        assert_eq!(lean.trace.extreme(position), Some(extreme), "{}", info.name);
    }
}

#[test]
fn a_settled_start_stays_at_rest() {
    let circuit = carrier();
    let mut inputs = InputProfiles::default();
    inputs.set(Input::EngineSpeed, Profile::constant(rad_per_s(1500.0)));
    inputs.set(Input::ExcessCommand, Profile::constant(1.0));
    let r = solve(&circuit, &inputs, 1.0, &Start::Settled);
    let settled = r.settled.as_ref().unwrap();
    assert_eq!(settled.rest, Rest::DiedOut, "{settled}");
    let drift = circuit
        .states()
        .iter()
        .zip(r.final_state.iter().zip(&settled.state))
        .map(|(info, (end, start))| (end - start).abs() / info.scale)
        .fold(0.0, f64::max);
    assert!(drift < 1e-6, "moved by {drift:e} of a state's size in 1 s");
    assert!(
        r.statistics.steps < 100,
        "nothing happens: {:?}",
        r.statistics
    );

    inputs.set(Input::EngineSpeed, Profile::constant(rad_per_s(1520.0)));
    let near = solve(
        &circuit,
        &inputs,
        0.1,
        &Start::SettledNear(settled.state.clone()),
    );
    let settled = near.settled.unwrap();
    assert_eq!(settled.rest, Rest::FromGuess, "{settled}");
    assert!(settled.iterations < 25, "{} iterations", settled.iterations);
}

#[test]
fn every_kind_of_circuit_settles_or_says_that_it_does_not() {
    for (name, parts) in fixture::variants() {
        let rippling = parts.pump.ripple.needs_angle();
        let circuit = Circuit::new(parts).unwrap();
        let mut inputs = InputProfiles::default();
        inputs.set(Input::EngineSpeed, Profile::constant(rad_per_s(1200.0)));
        inputs.set(Input::ExcessCommand, Profile::constant(0.6));
        inputs.set(Input::BenchArea, Profile::constant(8e-6));
        inputs.set(Input::BenchPressure, Profile::constant(30e5));
        inputs.set(Input::PriorityCommand, Profile::constant(1.0));
        let r = solve(&circuit, &inputs, 0.2, &Start::Settled);
        let settled = r.settled.unwrap();
        assert_ne!(settled.rest, Rest::NotAtRest, "{name}: {settled}");
        if !rippling {
            let moved = circuit
                .states()
                .iter()
                .enumerate()
                .filter(|(i, _)| !circuit.drifting_states().contains(i))
                .map(|(i, info)| (r.final_state[i] - settled.state[i]).abs() / info.scale)
                .fold(0.0, f64::max);
            assert!(
                moved < 1e-3,
                "{name}: moved by {moved:e} in 0.2 s; {settled}"
            );
        }
    }
}

#[test]
fn a_run_goes_on_from_a_saved_state() {
    let (circuit, inputs) = (carrier(), jump_of_the_wheel());
    let whole = solve(&circuit, &inputs, 0.8, &Start::Cold);
    let part = solve(&circuit, &inputs, 0.4, &Start::Cold);
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("state.json");
    let saved = SavedState::at_end_of(&part, &circuit);
    saved.write(&path).unwrap();
    let read = SavedState::read(&path).unwrap();
    assert_eq!(read, saved, "a saved state reads back bit for bit");
    let start = read.start(&circuit).unwrap();
    let other = fixture::variants().swap_remove(2).1;
    assert!(
        read.start(&Circuit::new(other).unwrap()).is_err(),
        "another circuit"
    );
    assert!(SavedState::read(folder.path()).is_err(), "a folder");
    let setup = RunSetup {
        circuit: &circuit,
        inputs: &inputs,
        from: 0.4,
        to: 0.8,
        start: &start,
        options: &SolverOptions::default(),
    };
    let rest = run(&setup, &mut Watch::none()).unwrap();
    for (info, (a, b)) in circuit
        .states()
        .iter()
        .zip(whole.final_state.iter().zip(&rest.final_state))
    {
        let off = (a - b).abs() / info.scale;
        assert!(off < 2e-3, "{}: {off:e}", info.name);
    }
}

#[test]
fn same_input_same_result() {
    let (circuit, inputs) = (carrier(), jump_of_the_wheel());
    for method in [Method::Bdf, Method::Esdirk34] {
        let options = SolverOptions {
            method,
            ..SolverOptions::default()
        };
        let a = solve_with(&circuit, &inputs, 1.0, &Start::Settled, &options);
        let b = solve_with(&circuit, &inputs, 1.0, &Start::Settled, &options);
        assert_eq!(a.trace, b.trace, "{method:?}: traces");
        assert_eq!(a.statistics, b.statistics, "{method:?}: counts");
    }
}

#[test]
fn exported_files_hold_the_run() {
    let (circuit, inputs) = (carrier(), jump_of_the_wheel());
    let options = SolverOptions {
        output_step: Some(0.01),
        ..SolverOptions::default()
    };
    let r = solve_with(&circuit, &inputs, 1.0, &Start::Settled, &options);
    let folder = tempfile::tempdir().unwrap();
    let (table, note) = (
        folder.path().join("run.csv"),
        folder.path().join("run.json"),
    );
    write_csv(&table, &r.trace, Rows::Grid, UnitSystem::Metric).unwrap();
    let text = std::fs::read_to_string(&table).unwrap();
    let mut lines = text.lines();
    let headings: Vec<&str> = lines.next().unwrap().split(',').collect();
    let at = headings.iter().position(|h| *h == "p_in_bar").unwrap();
    let grid = r.trace.grid().unwrap();
    let position = r.trace.position("p_in").unwrap();
    let mut rows = 0;
    for (line, value) in lines.zip(grid.column(position).iter()) {
        let bar: f64 = line.split(',').nth(at).unwrap().parse().unwrap();
        assert!(
            (bar * 1e5 - value).abs() <= 1e-8 * value.abs(),
            "row {rows}: {bar} bar"
        );
        rows += 1;
    }
    assert_eq!(rows, grid.len(), "rows");

    let origin = Origin {
        circuit: "orchard carrier",
        circuit_hash: "00",
        version: "0.1.0",
    };
    let sidecar = Sidecar::new(origin, &r, &options, UnitSystem::Metric);
    sidecar.write(&note).unwrap();
    let json: serde_json::Value =
        serde_json::from_str(&std::fs::read_to_string(&note).unwrap()).unwrap();
    assert_eq!(json["end"]["kind"], "finished", "{json}");
    assert_eq!(
        json["columns"].as_array().unwrap().len() + 1,
        headings.len(),
        "columns"
    );
    assert!(
        json["audit"]["energy"]["relative"].as_f64().unwrap() < 1e-5,
        "{json}"
    );
    let largest = json["columns"][position]["max"].as_f64().unwrap();
    let expected = r.trace.extreme(position).unwrap().max / 1e5;
    assert!((largest - expected).abs() < 1e-9, "{largest} bar");
}
