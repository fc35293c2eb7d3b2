//! From a scenario to the numbers of figures.

use helmsplit_scenario::{ParameterId, Scenario};
use helmsplit_sim::{RunEnd, SolverOptions, Start, Watch};

use super::{Figure, Statistic};
use crate::check::{Check, Status};
use crate::error::StudyError;
use crate::response::mean;
use crate::solve::{Solved, solve};

/// Why a scenario gives no number for a figure.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
pub enum Missing {
    /// The scenario is no circuit, or not one that can be started.
    #[error("no circuit: {0}")]
    NoCircuit(String),
    /// The solver gave the run up.
    #[error("the run was given up: {0}")]
    GaveUp(String),
    /// The circuit or the manoeuvre gives no occasion.
    #[error("{0}")]
    NoOccasion(String),
    /// The study was cancelled.
    #[error("cancelled")]
    Cancelled,
}

/// A scenario with all that a run of it takes: what figures are asked of.
#[derive(Debug, Clone)]
pub struct Ask<'a> {
    /// The scenario.
    pub scenario: &'a Scenario,
    /// Start that replaces the scenario's own.
    pub start: Option<Start>,
    /// How runs are solved.
    pub options: SolverOptions,
}

impl<'a> Ask<'a> {
    /// A scenario with its own start and solver settings.
    #[must_use]
    pub fn of(scenario: &'a Scenario) -> Self {
        Self {
            scenario,
            start: None,
            options: SolverOptions {
                output_step: None,
                audit: false,
                ..SolverOptions::from(&scenario.solver())
            },
        }
    }

    /// The same with a start that replaces the scenario's own.
    #[must_use]
    pub fn from_start(mut self, start: Option<Start>) -> Self {
        self.start = start;
        self
    }

    /// The scenario solved, with parameters at other values (SI).
    ///
    /// # Errors
    /// [`Missing`] if it is no circuit then, the solver gave up, or the watch cancelled.
    pub fn solved(
        &self,
        changes: &[(ParameterId, f64)],
        watch: &mut Watch<'_>,
    ) -> Result<Solved, Missing> {
        let mut scenario = self.scenario.clone();
        for &(id, si) in changes {
            scenario
                .set_si(id, si)
                .map_err(|finding| Missing::NoCircuit(finding.to_string()))?;
        }
        let solved = solve(&scenario, self.start.clone(), &self.options, watch)
            .map_err(|error| Missing::NoCircuit(first_line(&error)))?;
        match &solved.run.end {
            RunEnd::Finished => Ok(solved),
            RunEnd::Cancelled { .. } => Err(Missing::Cancelled),
            RunEnd::GaveUp { .. } => Err(Missing::GaveUp(solved.run.end.to_string())),
        }
    }

    /// The numbers of figures, SI, with parameters at other values (SI): one run for all.
    pub fn figures(
        &self,
        figures: &[Figure],
        changes: &[(ParameterId, f64)],
        watch: &mut Watch<'_>,
    ) -> Vec<Result<f64, Missing>> {
        match self.solved(changes, watch) {
            Ok(solved) => figures.iter().map(|figure| figure.of(&solved)).collect(),
            Err(missing) => vec![Err(missing); figures.len()],
        }
    }

    /// The number of one figure, SI, with one parameter at another value (SI).
    ///
    /// # Errors
    /// [`Missing`] says why there is none.
    pub fn figure(
        &self,
        figure: &Figure,
        changes: &[(ParameterId, f64)],
        watch: &mut Watch<'_>,
    ) -> Result<f64, Missing> {
        figure.of(&self.solved(changes, watch)?)
    }
}

/// Findings stand one a line; the first says what is wrong.
fn first_line(error: &StudyError) -> String {
    let text = match error {
        StudyError::Scenario(findings) => findings
            .iter()
            .find(|finding| finding.severity == helmsplit_scenario::Severity::Error)
            .map_or_else(|| error.to_string(), ToString::to_string),
        _ => error.to_string(),
    };
    text.lines().next().unwrap_or_default().to_owned()
}

impl Figure {
    /// Its number in a solved scenario, SI.
    ///
    /// # Errors
    /// [`Missing::NoOccasion`] if the run does not give it.
    pub fn of(&self, solved: &Solved) -> Result<f64, Missing> {
        match self {
            Self::Check(id) => solved
                .checks
                .iter()
                .find(|check| check.id == *id)
                .ok_or_else(|| Missing::NoOccasion("there is no such check".to_owned()))
                .and_then(number),
            Self::Trace { column, statistic } => trace_number(solved, column, *statistic),
        }
    }
}

fn number(check: &Check) -> Result<f64, Missing> {
    match (&check.status, check.figure) {
        (_, Some(figure)) => Ok(figure.si),
        (Status::NotApplicable(reason), None) => Err(Missing::NoOccasion(reason.clone())),
        (status, None) => Err(Missing::NoOccasion(status.word().to_owned())),
    }
}

fn trace_number(solved: &Solved, column: &str, statistic: Statistic) -> Result<f64, Missing> {
    let trace = &solved.run.trace;
    let none = || Missing::NoOccasion(format!("the run has no {column}"));
    let position = trace.position(column).ok_or_else(none)?;
    match statistic {
        Statistic::Least => trace.extreme(position).map(|e| e.min).ok_or_else(none),
        Statistic::Largest => trace.extreme(position).map(|e| e.max).ok_or_else(none),
        Statistic::Mean | Statistic::End => {
            let values = trace.steps().column(position).to_vec();
            match (statistic, values.last()) {
                (_, None) => Err(none()),
                (Statistic::End, Some(&last)) => Ok(last),
                _ => Ok(mean(trace.steps().times(), &values)),
            }
        }
    }
}
