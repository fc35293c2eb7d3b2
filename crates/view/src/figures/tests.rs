//! Figures of solved circuits.

use helmsplit_model::Signal;
use helmsplit_scenario::{PRESETS, Preset, UnitSystem};
use helmsplit_sim::{SolverOptions, Watch};
use helmsplit_study::{Solved, solve};

use super::{RunFigure, run_figure, solved_figure};
use crate::plot::{Figure, Panel};
use crate::style::Meaning;

fn solved(key: &str, seconds: f64) -> (helmsplit_scenario::Scenario, Solved) {
    let preset = Preset::from_key(key).unwrap();
    let mut scenario = preset.scenario().unwrap();
    scenario
        .set("manoeuvre.duration", &format!("{seconds} s"))
        .unwrap();
    let solved = solve(
        &scenario,
        None,
        &SolverOptions::from(&scenario.solver()),
        &mut Watch::none(),
    )
    .unwrap();
    (scenario, solved)
}

fn panel<'a>(figure: &'a Figure, label: &str) -> &'a Panel {
    let found = figure.panels.iter().find(|panel| panel.label == label);
    found.unwrap_or_else(|| panic!("no panel {label} among {:?}", labels(figure)))
}

fn labels(figure: &Figure) -> Vec<&str> {
    figure
        .panels
        .iter()
        .map(|panel| panel.label.as_str())
        .collect()
}

#[test]
fn a_run_shows_what_the_circuit_has() {
    let (scenario, solved) = solved("orchard_carrier", 3.5);
    let figure = solved_figure(&scenario, &solved, UnitSystem::Metric);
    assert_eq!(figure.title, "Orchard carrier", "title");
    assert_eq!(
        figure.time_range(),
        Some((0.0, 3.5)),
        "as long as the run was meant to be"
    );
    assert_eq!(
        labels(&figure),
        [
            "Engine speed",
            "Spool travel",
            "Pressure",
            "Flow",
            "Steering wheel rate",
            "Steering cylinder, from mid-stroke",
            "Excess motor speed",
            "Power",
        ],
        "panels"
    );
    let notes = figure.notes.join("\n");
    assert!(
        notes.contains("Command of the excess consumer: 100 % throughout"),
        "{notes}"
    );
    assert!(notes.contains("volume closes to"), "{notes}");
}

#[test]
fn constant_inputs_are_told_in_any_unit() {
    let (scenario, solved) = solved("workshop_bench", 0.02);
    for (units, expected) in [
        (UnitSystem::Metric, "100 mm²"),
        (UnitSystem::Si, "0.0001 m²"),
    ] {
        let notes = solved_figure(&scenario, &solved, units).notes.join("\n");
        let expected = format!("Bench throttle opening: {expected} throughout");
        assert!(notes.contains(&expected), "{notes}");
    }
}

#[test]
fn lines_are_the_trace_in_display_units() {
    let (_, solved) = solved("orchard_carrier", 3.5);
    let trace = &solved.run.trace;
    for (units, unit, in_bar) in [
        (UnitSystem::Metric, "bar", 1e5),
        (UnitSystem::Si, "Pa", 1.0),
    ] {
        let figure = run_figure(&RunFigure {
            title: "",
            subtitle: "",
            circuit: &solved.circuit,
            trace,
            span: None,
            marks: Vec::new(),
            units,
        });
        let pressures = panel(&figure, "Pressure");
        assert_eq!(pressures.unit, unit, "unit");
        let inlet = pressures
            .series
            .iter()
            .find(|s| s.meaning == Meaning::Inlet)
            .unwrap();
        let column = trace.named("p_in").unwrap();
        assert_eq!(inlet.points.len(), column.len(), "every step");
        for (point, (time, si)) in inlet.points.iter().zip(column.points()) {
            assert!((point[0] - time).abs() < 1e-15, "time");
            assert!(
                (point[1] * in_bar - si).abs() <= 1e-9 * si.abs(),
                "{} for {si} Pa",
                point[1]
            );
        }
    }
}

#[test]
fn flows_have_the_size_of_the_machine() {
    let (scenario, solved) = solved("orchard_carrier", 3.5);
    let figure = solved_figure(&scenario, &solved, UnitSystem::Metric);
    let flows = panel(&figure, "Flow");
    let largest = |meaning: Meaning| {
        let line = flows.series.iter().find(|s| s.meaning == meaning).unwrap();
        line.extent().unwrap().1
    };
    // Orders of size in L/min that only the right unit gives: 20 cm3/rev at 2400 rpm is 48.
    assert!((40.0..50.0).contains(&largest(Meaning::Inlet)), "pump");
    assert!(
        (10.0..40.0).contains(&largest(Meaning::Priority)),
        "priority"
    );
    let demand = largest(Meaning::Steering);
    assert!(
        (demand - 90.0 * 0.125).abs() < 1e-9,
        "90 rpm of 125 cm3/rev: {demand}"
    );
}

#[test]
fn every_preset_gives_a_figure_with_data_in_every_panel() {
    for preset in PRESETS {
        let (scenario, solved) = solved(preset.key, 0.6);
        for units in UnitSystem::ALL {
            let figure = solved_figure(&scenario, &solved, units);
            for panel in &figure.panels {
                let empty = panel.series.iter().find(|series| series.extent().is_none());
                assert!(
                    !panel.series.is_empty(),
                    "{} of {}",
                    panel.label,
                    preset.key
                );
                assert_eq!(empty, None, "{} of {}", panel.label, preset.key);
            }
        }
    }
}

#[test]
fn a_shortfall_is_shaded_where_the_trace_has_it() {
    let (scenario, solved) = solved("depot_tug", 3.2);
    let figure = solved_figure(&scenario, &solved, UnitSystem::Metric);
    let wheel = panel(&figure, "Steering wheel rate");
    let deepest = wheel.shades[0]
        .points
        .iter()
        .map(|p| p[2] - p[1])
        .fold(0.0, f64::max);
    let position = solved
        .run
        .trace
        .signal_position(Signal::WheelShortfall)
        .unwrap();
    let extreme = solved.run.trace.extreme(position).unwrap();
    let expected = extreme.max.max(-extreme.min) * 60.0 / std::f64::consts::TAU;
    assert!(
        (deepest - expected).abs() < 1e-9 * expected,
        "{deepest} rpm, not {expected}"
    );
}
