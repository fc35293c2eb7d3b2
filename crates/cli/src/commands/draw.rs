//! Draws the circuit or its valve.

use helmsplit_model::{Circuit, Quantity};
use helmsplit_scenario::quantity_text::parse;
use helmsplit_scenario::write::save_atomically;
use helmsplit_sim::RunEnd;
use helmsplit_view::diagram::DrawingOptions;
use helmsplit_view::{Moment, circuit_scene, svg_from_scene, valve_scene};

use super::run::solve_watched;
use crate::args::DrawArguments;
use crate::exit::{ExitStatus, Failure};
use crate::input::{Loaded, load};
use crate::output::{print, say};

pub(super) fn draw(arguments: &DrawArguments) -> Result<ExitStatus, Failure> {
    let time = number(arguments.at.as_deref(), "--at", Quantity::Time)?;
    let travel = number(arguments.travel.as_deref(), "--travel", Quantity::Length)?;
    let loaded = load(&arguments.circuit)?;
    let circuit = loaded.scenario.circuit().map_err(Failure::Findings)?;
    check_travel(travel, &circuit)?;
    let moment = match time {
        None => None,
        Some(time) => match moment_of(&loaded, time)? {
            Ok(moment) => Some(moment),
            Err(status) => return Ok(status),
        },
    };
    let options = DrawingOptions {
        units: arguments.circuit.units,
        ..DrawingOptions::default()
    };
    let (mut scene, id) = if arguments.valve {
        let scene = valve_scene(&circuit, moment.as_ref(), travel, options);
        (scene, "valve")
    } else {
        (circuit_scene(&circuit, moment.as_ref(), options), "circuit")
    };
    scene.title = format!("{}: {}", loaded.scenario.name, scene.title);
    let svg = svg_from_scene(&scene, &arguments.theme.theme().load()?, id);
    match &arguments.output {
        Some(file) => {
            save_atomically(file, &svg)?;
            print(&format!("Wrote {}.\n", file.display()))?;
        }
        None => print(&svg)?,
    }
    Ok(ExitStatus::Done)
}

/// A quantity of the command line, SI.
fn number(text: Option<&str>, option: &str, quantity: Quantity) -> Result<Option<f64>, Failure> {
    let Some(text) = text else {
        return Ok(None);
    };
    let parsed = parse(text, quantity);
    let parsed = parsed.map_err(|error| Failure::Input(format!("{option}: {error}")))?;
    Ok(Some(parsed.si))
}

fn check_travel(travel: Option<f64>, circuit: &Circuit) -> Result<(), Failure> {
    let stroke = circuit.parts().valve.stroke;
    match travel {
        Some(travel) if !(0.0..=stroke).contains(&travel) => Err(Failure::Input(format!(
            "--travel: the spool travels from 0 to {} mm",
            1000.0 * stroke
        ))),
        _ => Ok(()),
    }
}

/// Solves the run and takes out one moment; the exit status where the run does not reach it.
fn moment_of(loaded: &Loaded, time: f64) -> Result<Result<Moment, ExitStatus>, Failure> {
    let duration = loaded.scenario.solver().duration;
    if !(0.0..=duration).contains(&time) {
        return Err(Failure::Input(format!(
            "--at: the run lasts from 0 to {duration} s"
        )));
    }
    let solved = solve_watched(loaded)?;
    let trace = &solved.run.trace;
    let last = trace.steps().times().last().copied();
    let status = match solved.run.end {
        RunEnd::Cancelled { .. } => ExitStatus::Cancelled,
        RunEnd::GaveUp { .. } if last.is_none_or(|last| last < time) => ExitStatus::GaveUp,
        _ => {
            return Moment::of(trace, time)
                .map(Ok)
                .ok_or_else(|| Failure::Input("the run has no row to draw".to_owned()));
        }
    };
    say(&format!("{}; nothing was drawn", solved.run.end));
    Ok(Err(status))
}

#[cfg(test)]
mod tests {
    use std::path::Path;

    use clap::Parser;

    use super::*;
    use crate::args::{Arguments, Command};

    /// Draws into `file`; the arguments follow `helmsplit draw`.
    fn drawn(file: &Path, arguments: &[&str]) -> Result<String, Failure> {
        let output = ["-o", file.to_str().unwrap()];
        let all = ["helmsplit", "draw"].iter().chain(arguments).chain(&output);
        let command = Arguments::try_parse_from(all).unwrap().command;
        let Some(Command::Draw(arguments)) = command else {
            panic!("no draw command");
        };
        let status = draw(&arguments)?;
        assert_eq!(status, ExitStatus::Done, "{arguments:?}");
        Ok(std::fs::read_to_string(file).unwrap())
    }

    #[test]
    fn circuits_and_valves_are_drawn_at_rest_and_at_a_time() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("drawing.svg");
        let rest = drawn(&file, &["frost_pruner"]).unwrap();
        assert!(rest.contains("Frost pruner: Steering circuit"), "title");
        assert!(!rest.contains("Pressure scale"), "nothing is shaded");
        let running = [
            "frost_pruner",
            "--set",
            "manoeuvre.duration=0.5 s",
            "--at",
            "400 ms",
        ];
        let shaded = drawn(&file, &running).unwrap();
        assert!(shaded.contains("at 0.400 s"), "time");
        assert!(shaded.contains("Pressure scale"), "scale");
        let valve = drawn(&file, &["frost_pruner", "--valve", "--travel", "0.1 in"]).unwrap();
        assert!(valve.contains("2.54 mm"), "travel");
    }

    #[test]
    fn what_cannot_be_drawn_is_said() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("drawing.svg");
        for (arguments, part) in [
            (["--at=1 h", "--circuit"], "from 0 to"),
            (["--at=3 bar", "--circuit"], "--at"),
            (["--valve", "--travel=8 mm"], "0 to 7 mm"),
            (["--valve", "--travel=-1 mm"], "0 to 7 mm"),
        ] {
            let all = [&["frost_pruner"], &arguments[..]].concat();
            let error = drawn(&file, &all).unwrap_err().to_string();
            assert!(error.contains(part), "{all:?}: {error}");
            assert!(!file.exists(), "nothing is written");
        }
    }
}
