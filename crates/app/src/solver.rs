//! One solve, and what it may reuse of the one before.

use std::path::Path;
use std::sync::atomic::AtomicBool;

use helmsplit_model::Circuit;
use helmsplit_scenario::Scenario;
use helmsplit_scenario::choice::StartKind;
use helmsplit_sim::{RunEnd, SavedState, SolverOptions, Start, Watch};
use helmsplit_study::{Solved, solve};

use crate::worker::{Job, Quality};

/// Relative tolerance while a value is being dragged.
const DRAFT_TOLERANCE: f64 = 1e-5;

/// Why there is no result.
pub(crate) enum Refusal {
    /// A newer job or the user stopped it.
    Cancelled,
    /// A sentence for the user.
    Because(String),
}

/// Solves one job after the other and remembers where the circuit settled.
#[derive(Default)]
pub(crate) struct Solver {
    settled: Option<SettledState>,
}

/// A settled state with the names of its states: another circuit has others.
struct SettledState {
    names: Vec<String>,
    state: Vec<f64>,
}

impl Solver {
    /// Solves; `report` hears the time reached, s.
    pub(crate) fn solve(
        &mut self,
        job: &Job,
        cancel: &AtomicBool,
        report: &mut dyn FnMut(f64),
    ) -> Result<Solved, Refusal> {
        let mut options = SolverOptions::from(&job.scenario.solver());
        if job.quality == Quality::Draft {
            options.relative_tolerance = options.relative_tolerance.max(DRAFT_TOLERANCE);
        }
        let start = self.start(&job.scenario, job.folder.as_deref())?;
        let mut watch = Watch::none().with_cancel(cancel).with_progress(report);
        let solved = solve(&job.scenario, start, &options, &mut watch)
            .map_err(|error| Refusal::Because(error.to_string()))?;
        match &solved.run.end {
            RunEnd::Finished => {}
            RunEnd::Cancelled { .. } => return Err(Refusal::Cancelled),
            end @ RunEnd::GaveUp { .. } => return Err(Refusal::Because(sentence(end))),
        }
        if let Some(settled) = &solved.run.settled {
            self.settled = Some(SettledState {
                names: names(&solved.circuit),
                state: settled.state.clone(),
            });
        }
        Ok(solved)
    }

    /// The start that replaces the scenario's own: a saved state, or a guess where it settles.
    fn start(&self, scenario: &Scenario, folder: Option<&Path>) -> Result<Option<Start>, Refusal> {
        let circuit = || {
            let circuit = scenario.circuit();
            circuit.map_err(|findings| Refusal::Because(findings.to_string()))
        };
        match scenario.chosen::<StartKind>() {
            StartKind::Cold => Ok(None),
            StartKind::Settled => {
                let Some(settled) = &self.settled else {
                    return Ok(None);
                };
                let fits = names(&circuit()?) == settled.names;
                Ok(fits.then(|| Start::SettledNear(settled.state.clone())))
            }
            StartKind::FromState => {
                let Some(file) = &scenario.start_state else {
                    let reason = "The run starts from a saved state, but no file is named.";
                    return Err(Refusal::Because(reason.to_owned()));
                };
                let path = folder.map_or_else(|| file.into(), |folder| folder.join(file));
                let circuit = circuit()?;
                let start = SavedState::read(&path).and_then(|state| state.start(&circuit));
                start
                    .map(Some)
                    .map_err(|error| Refusal::Because(sentence(&error)))
            }
        }
    }
}

fn names(circuit: &Circuit) -> Vec<String> {
    let states = circuit.states().iter();
    states.map(|state| state.name.clone()).collect()
}

/// Capital letter and full stop.
fn sentence(reason: &impl std::fmt::Display) -> String {
    let text = reason.to_string();
    let mut letters = text.chars();
    let first = letters.next().map(char::to_uppercase);
    let text: String = first.into_iter().flatten().chain(letters).collect();
    if text.ends_with('.') {
        text
    } else {
        format!("{text}.")
    }
}
