//! Solves a circuit, prints the verdict table, writes traces and a figure.

use helmsplit_sim::{RunEnd, SavedState, SolverOptions};
use helmsplit_study::{MapEnd, Solved, check_maps, map_checks, solve, with_map_checks};

use crate::args::RunArguments;
use crate::exit::{ExitStatus, Failure};
use crate::files::{Job, write};
use crate::input::{Loaded, load};
use crate::output::{print, say};
use crate::progress::{watched, watched_map};
use crate::{report_json, verdict};

pub(super) fn run(arguments: &RunArguments) -> Result<ExitStatus, Failure> {
    let loaded = load(&arguments.circuit)?;
    let mut solved = solve_watched(&loaded)?;
    if let RunEnd::Cancelled { .. } = solved.run.end {
        say(&format!("{}; nothing was written", solved.run.end));
        return Ok(ExitStatus::Cancelled);
    }
    if arguments.map && !answer_by_map(&loaded, &mut solved)? {
        say("cancelled; nothing was written");
        return Ok(ExitStatus::Cancelled);
    }
    let options = SolverOptions::from(&loaded.scenario.solver());
    let units = arguments.circuit.units;
    let mut files = Vec::new();
    if !arguments.no_files {
        let job = Job {
            scenario: &loaded.scenario,
            solved: &solved,
            options: &options,
            units,
            rows: arguments.rows.rows(),
            theme: arguments.theme.theme(),
        };
        files = write(&job, &arguments.out)?;
    }
    if let Some(file) = &arguments.save_state {
        SavedState::at_end_of(&solved.run, &solved.circuit).write(file)?;
        files.push(file.clone());
    }
    let text = if arguments.json {
        report_json::report(&loaded, &solved, units, &files)?
    } else {
        verdict::summary(&loaded, &solved, units, &files)
    };
    print(&text)?;
    Ok(status(&solved))
}

/// Solves with progress and Ctrl-C.
pub(super) fn solve_watched(loaded: &Loaded) -> Result<Solved, Failure> {
    let options = SolverOptions::from(&loaded.scenario.solver());
    let duration = loaded.scenario.solver().duration;
    let solved = watched(duration, |watch| {
        solve(&loaded.scenario, loaded.start.clone(), &options, watch)
    })?;
    Ok(solved)
}

/// Computes the maps of the checks and answers those that wait for them; `false` if the user
/// cancelled.
pub(super) fn answer_by_map(loaded: &Loaded, solved: &mut Solved) -> Result<bool, Failure> {
    let maps = watched_map(|watch| check_maps(&loaded.scenario, watch))?;
    if maps.iter().any(|map| map.end == MapEnd::Cancelled) {
        return Ok(false);
    }
    let answers = map_checks(&loaded.scenario, &maps);
    solved.checks = with_map_checks(&solved.checks, &answers);
    Ok(true)
}

/// The exit status that a solved scenario stands for.
pub(super) fn status(solved: &Solved) -> ExitStatus {
    match solved.run.end {
        RunEnd::Cancelled { .. } => ExitStatus::Cancelled,
        RunEnd::GaveUp { .. } => ExitStatus::GaveUp,
        RunEnd::Finished if solved.fails() => ExitStatus::CheckFailed,
        RunEnd::Finished => ExitStatus::Done,
    }
}
