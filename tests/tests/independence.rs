//! Results depend on the circuit and its inputs alone: not on the output step, the units of the
//! file, the side that is steered to, or on how often the run is repeated.

use helmsplit_acceptance::rig::{Rig, last};
use helmsplit_acceptance::trouble::Tried;
use helmsplit_model::{Input, Profile};
use helmsplit_scenario::document::Document;
use helmsplit_scenario::{PRESETS, Preset, Scenario, UnitSystem, convert_units};
use helmsplit_sim::{RunResult, RunSetup, SolverOptions, Start, Watch, run};
use helmsplit_study::{CheckId, Status, solve};

/// Runs a scenario over its manoeuvre from a cold or a settled start.
fn whole(scenario: &Scenario, start: &Start, options: &SolverOptions) -> Tried<RunResult> {
    let setup = RunSetup {
        circuit: &scenario.circuit()?,
        inputs: &scenario.inputs()?,
        from: 0.0,
        to: scenario.solver().duration,
        start,
        options,
    };
    Ok(run(&setup, &mut Watch::none())?)
}

#[test]
fn the_output_step_changes_nothing() -> Tried<()> {
    for preset in [
        PRESETS[0],
        Preset::from_key("workshop_bench").ok_or("no bench")?,
    ] {
        let scenario = preset.scenario()?;
        let options = |step: Option<f64>| SolverOptions {
            output_step: step,
            ..SolverOptions::from(&scenario.solver())
        };
        let plain = whole(&scenario, &Start::Settled, &options(None))?;
        for step in [0.1, 0.003_7] {
            let other = whole(&scenario, &Start::Settled, &options(Some(step)))?;
            assert_eq!(
                other.trace.steps(),
                plain.trace.steps(),
                "{} at {step} s",
                preset.key
            );
            assert_eq!(
                other.statistics, plain.statistics,
                "{} at {step} s",
                preset.key
            );
            assert_eq!(other.audit, plain.audit, "{} at {step} s", preset.key);
        }
    }
    Ok(())
}

#[test]
fn the_units_of_the_file_change_nothing() -> Tried<()> {
    let options = SolverOptions::default();
    for preset in PRESETS {
        let document = Document::from_text(preset.file_name(), preset.text)?;
        let metric = preset.scenario()?;
        for system in [UnitSystem::Us, UnitSystem::Si] {
            let text = convert_units(&document, system)?;
            let (converted, findings) = Scenario::from_text("converted.circuit.ron", &text);
            let converted = converted.ok_or_else(|| findings.to_string())?;
            assert_eq!(
                converted, metric,
                "{} in {system:?}: every value, bit for bit",
                preset.key
            );
            if preset.key == "orchard_carrier" {
                assert_ne!(text, preset.text, "{system:?}: the units have changed");
                let a = whole(&metric, &Start::Cold, &options)?;
                let b = whole(&converted, &Start::Cold, &options)?;
                assert_eq!(a.trace, b.trace, "{system:?}: every bit of every trace");
            }
        }
    }
    Ok(())
}

#[test]
fn the_same_input_gives_the_same_bits() -> Tried<()> {
    for preset in PRESETS {
        let scenario = preset.scenario()?;
        let options = SolverOptions::from(&scenario.solver());
        let a = whole(&scenario, &Start::Settled, &options)?;
        let b = whole(&scenario, &Start::Settled, &options)?;
        assert_eq!(a.trace, b.trace, "{}: traces", preset.key);
        assert_eq!(a.statistics, b.statistics, "{}: counts", preset.key);
        assert_eq!(a.final_state, b.final_state, "{}: end", preset.key);
    }
    Ok(())
}

/// The cylinder has equal areas and volumes on both sides and starts in the middle.
#[test]
fn left_is_the_mirror_of_right() -> Tried<()> {
    let turn = |rate: &str| {
        Rig::preset("orchard_carrier")?
            .hold(Input::EngineSpeed, "1500 rpm")?
            .drive(
                Input::WheelRate,
                &[("0.5 s", "0 rpm"), ("0.55 s", rate), ("1.2 s", rate)],
            )?
            .run_with(
                &Start::Settled,
                1.5,
                &SolverOptions {
                    output_step: Some(0.01),
                    ..SolverOptions::default()
                },
            )
    };
    let (right, left) = (turn("90 rpm")?, turn("-90 rpm")?);
    let mirrored = [
        ("y_c", "y_c", -1.0),
        ("v_c", "v_c", -1.0),
        ("d", "d", -1.0),
        ("p_A", "p_B", 1.0),
        ("p_in", "p_in", 1.0),
    ];
    let (Some(a), Some(b)) = (right.trace.grid(), left.trace.grid()) else {
        return Err("no grid".into());
    };
    for (name, mirror, sign) in mirrored {
        let (Some(here), Some(there)) = (right.trace.position(name), left.trace.position(mirror))
        else {
            return Err(format!("no trace {name}").into());
        };
        let (a, b) = (a.column(here), b.column(there));
        let size = a.iter().fold(0.0_f64, |most, value| most.max(value.abs()));
        assert!(size > 0.0, "{name} moves");
        for (row, (a, b)) in a.iter().zip(b.iter()).enumerate() {
            // Opposite roundings let the step sequences part a little: the solver's tolerance.
            assert!(
                (a - sign * b).abs() < 1e-4 * size,
                "{name}, row {row}: {a} and {b}"
            );
        }
    }
    Ok(())
}

/// Where an input jumps the solver starts anew, and the run equals two runs joined there.
#[test]
fn a_jump_is_a_fresh_start() -> Tried<()> {
    let rig = Rig::preset("orchard_carrier")?.drive(
        Input::WheelRate,
        &[("0 s", "0 rpm"), ("0.5 s", "0 rpm"), ("0.5 s", "60 rpm")],
    )?;
    let joined = rig.run(&Start::Settled, 1.0)?;
    assert_eq!(joined.statistics.starts, 2, "one start and one jump");
    let first = rig.run(&Start::Settled, 0.5)?;
    let circuit = rig.scenario.circuit()?;
    let second = run(
        &RunSetup {
            circuit: &circuit,
            inputs: &rig.scenario.inputs()?,
            from: 0.5,
            to: 1.0,
            start: &Start::From(first.final_state.clone()),
            options: &SolverOptions::default(),
        },
        &mut Watch::none(),
    )?;
    for (place, info) in circuit.states().iter().enumerate() {
        let (a, b) = (joined.final_state[place], second.final_state[place]);
        assert!(
            (a - b).abs() < 1e-3 * info.scale,
            "{}: {a} and {b}",
            info.name
        );
    }
    let wheel = joined.trace.named("w_wheel")?;
    let at_jump: Vec<f64> = wheel
        .points()
        .filter(|(t, _)| (t - 0.5).abs() < 1e-12)
        .map(|(_, w)| w)
        .collect();
    let jump = Profile::new(vec![
        (0.0, 0.0),
        (0.5, 0.0),
        (0.5, 2.0 * std::f64::consts::PI),
    ])?;
    assert_eq!(at_jump.len(), 2, "the moment of the jump stands twice");
    assert!(
        at_jump[0].abs() < 1e-12 && (at_jump[1] - jump.at(0.5)).abs() < 1e-9,
        "{at_jump:?}"
    );
    Ok(())
}

/// Every circuit that comes along, as its file says and from both starts: to the end, with both
/// audits closed.
#[test]
fn every_circuit_that_comes_along_runs_to_its_end_and_closes_its_audits() -> Tried<()> {
    for preset in PRESETS {
        let scenario = preset.scenario()?;
        let options = SolverOptions::from(&scenario.solver());
        for start in [Start::Settled, Start::Cold] {
            let name = format!("{}, {start:?}", preset.key);
            let solved = solve(&scenario, Some(start), &options, &mut Watch::none())?;
            assert!(solved.run.end.is_finished(), "{name}: {}", solved.run.end);
            let audit = solved.run.audit.ok_or("no audit")?;
            assert!(
                audit.volume.relative < 1e-3,
                "{name}: volume {:?}",
                audit.volume
            );
            assert!(
                audit.energy.relative < 1e-3,
                "{name}: energy {:?}",
                audit.energy
            );
            let verdict = solved
                .checks
                .iter()
                .find(|check| check.id == CheckId::Audit);
            let passed = verdict.is_some_and(|check| check.status == Status::Pass);
            assert!(passed, "{name}: the verdict table says so too: {verdict:?}");
            assert!(
                last(&solved.run, "p_in").is_finite(),
                "{name}: inlet pressure"
            );
            for info in solved
                .circuit
                .states()
                .iter()
                .filter(|info| info.name.starts_with("p_"))
            {
                let position = solved.run.trace.position(&info.name).ok_or("no trace")?;
                let least = solved.run.trace.extreme(position).ok_or("no rows")?.min;
                assert!(
                    least > -101_325.0,
                    "{name}: {} below vacuum: {least} Pa",
                    info.name
                );
            }
        }
    }
    Ok(())
}
