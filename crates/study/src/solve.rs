//! From a scenario to its verdict table.

use helmsplit_model::{Circuit, InputProfiles};
use helmsplit_scenario::Scenario;
use helmsplit_scenario::choice::{SolverMethod, StartKind};
use helmsplit_sim::{Method, RunResult, RunSetup, SolverOptions, Start, Watch, run};

use crate::check::{Check, Status};
use crate::checks::check_run;
use crate::error::StudyError;
use crate::event::{Event, events};

/// Where the run of a scenario starts, if not where the scenario says.
#[derive(Debug, Clone, PartialEq, Default)]
pub enum SolveStart {
    /// As the scenario says. "From state" takes the state from [`SolveStart::State`] instead: a
    /// file is the caller's to read.
    #[default]
    Scenario,
    /// Settled at the first inputs, looked for from this state first.
    Near(Vec<f64>),
    /// In this state, SI, in the order of the circuit's states.
    State(Vec<f64>),
}

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

/// The solver options that a scenario asks for; the output grid goes along.
#[must_use]
pub fn options_of(scenario: &Scenario) -> SolverOptions {
    let settings = scenario.solver();
    SolverOptions {
        relative_tolerance: settings.relative_tolerance,
        max_steps: settings.max_steps,
        output_step: Some(settings.output_step),
        method: match settings.method {
            SolverMethod::Bdf => Method::Bdf,
            SolverMethod::Esdirk34 => Method::Esdirk34,
        },
        ..SolverOptions::default()
    }
}

/// Solves a scenario over its manoeuvre and checks the run.
///
/// # Errors
/// [`StudyError::Scenario`] with every finding if it is no circuit; [`StudyError::Sim`] if the
/// start state does not fit. A run that ended early is a result: see its `end`.
pub fn solve(
    scenario: &Scenario,
    start: &SolveStart,
    options: &SolverOptions,
    watch: &mut Watch<'_>,
) -> Result<Solved, StudyError> {
    let circuit = scenario.circuit().map_err(StudyError::Scenario)?;
    let inputs = scenario.inputs().map_err(StudyError::Scenario)?;
    let start = match (start, scenario.chosen::<StartKind>()) {
        (SolveStart::State(state), _) => Start::From(state.clone()),
        (SolveStart::Near(state), _) => Start::SettledNear(state.clone()),
        (SolveStart::Scenario, StartKind::Cold) => Start::Cold,
        (SolveStart::Scenario, StartKind::Settled) => Start::Settled,
        (SolveStart::Scenario, StartKind::FromState) => return Err(StudyError::StateNotGiven),
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
