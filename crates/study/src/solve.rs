//! From a scenario to its verdict table.

use helmsplit_model::{Circuit, InputProfiles};
use helmsplit_scenario::Scenario;
use helmsplit_scenario::choice::StartKind;
use helmsplit_sim::{RunResult, RunSetup, SolverOptions, Start, Watch, run};

use crate::check::{Check, Status};
use crate::checks::check_run;
use crate::error::StudyError;
use crate::event::{Event, events};

/// A scenario, solved.
#[derive(Debug, Clone)]
pub struct Solved {
    /// The circuit.
    pub circuit: Circuit,
    /// Its inputs.
    pub inputs: InputProfiles,
    /// The run.
    pub run: RunResult,
    /// The verdict table.
    pub checks: Vec<Check>,
    /// The events.
    pub events: Vec<Event>,
}

impl Solved {
    /// Whether a check fails.
    #[must_use]
    pub fn fails(&self) -> bool {
        self.checks.iter().any(|c| c.status == Status::Fail)
    }
}

/// Solves a scenario over its manoeuvre and checks the run. `start` replaces the start that the
/// scenario names; a saved state is always handed over this way, since reading files is the
/// caller's.
///
/// # Errors
/// [`StudyError::Scenario`] with every finding if it is no circuit; [`StudyError::Sim`] if the
/// start state does not fit. A run that ended early is a result: see its `end`.
pub fn solve(
    scenario: &Scenario,
    start: Option<Start>,
    options: &SolverOptions,
    watch: &mut Watch<'_>,
) -> Result<Solved, StudyError> {
    let circuit = scenario.circuit().map_err(StudyError::Scenario)?;
    let inputs = scenario.inputs().map_err(StudyError::Scenario)?;
    let start = match (start, scenario.chosen::<StartKind>()) {
        (Some(start), _) => start,
        (None, StartKind::Cold) => Start::Cold,
        (None, StartKind::Settled) => Start::Settled,
        (None, StartKind::FromState) => return Err(StudyError::StateNotGiven),
    };
    let run = run(
        &RunSetup {
            circuit: &circuit,
            inputs: &inputs,
            from: 0.0,
            to: scenario.solver().duration,
            start: &start,
            options,
        },
        watch,
    )?;
    let checks = check_run(scenario, &circuit, &inputs, &run);
    let events = events(&circuit, &run.trace);
    Ok(Solved {
        circuit,
        inputs,
        run,
        checks,
        events,
    })
}
