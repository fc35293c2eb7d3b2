//! From a scenario to the numbers of figures.

use std::cell::LazyCell;

use helmsplit_scenario::{ParameterId, Scenario};
use helmsplit_sim::{RunEnd, SolverOptions, Start};

use super::{Figure, MAP_CHECKS, Statistic};
use crate::check::{Check, Status};
use crate::equilibrium::{Equilibrium, equilibrium};
use crate::error::StudyError;
use crate::map::{check_maps, map_checks, with_map_checks};
use crate::operating::OperatingPoint;
use crate::response::mean;
use crate::solve::{Solved, solve};
use crate::study_watch::StudyWatch;

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

/// A scenario with all that it takes to get numbers of it: what figures are asked of.
#[derive(Debug, Clone)]
pub struct Ask<'a> {
    /// The scenario.
    pub scenario: &'a Scenario,
    /// Start that replaces the scenario's own.
    pub start: Option<Start>,
    /// How runs are solved.
    pub options: SolverOptions,
    /// Where figures at rest are taken.
    pub point: OperatingPoint,
}

impl<'a> Ask<'a> {
    /// A scenario with its own start and solver settings; at rest, low idle with nothing steered
    /// and the consumer on.
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
            point: OperatingPoint::resting(scenario),
        }
    }

    /// The same with a start that replaces the scenario's own.
    #[must_use]
    pub fn from_start(mut self, start: Option<Start>) -> Self {
        self.start = start;
        self
    }

    /// The same with another operating point for figures at rest.
    #[must_use]
    pub fn at_point(mut self, point: OperatingPoint) -> Self {
        self.point = point;
        self
    }

    /// The scenario with parameters at other values (SI).
    fn changed(&self, changes: &[(ParameterId, f64)]) -> Result<Scenario, Missing> {
        let mut scenario = self.scenario.clone();
        for &(id, si) in changes {
            scenario
                .set_si(id, si)
                .map_err(|finding| Missing::NoCircuit(finding.to_string()))?;
        }
        Ok(scenario)
    }

    /// The scenario solved, with parameters at other values (SI).
    ///
    /// # Errors
    /// [`Missing`] if it is no circuit then, the solver gave up, or the watch cancelled.
    pub fn solved(
        &self,
        changes: &[(ParameterId, f64)],
        watch: &StudyWatch<'_>,
    ) -> Result<Solved, Missing> {
        self.run(&self.changed(changes)?, watch)
    }

    fn run(&self, scenario: &Scenario, watch: &StudyWatch<'_>) -> Result<Solved, Missing> {
        let mut watch = watch.run_watch();
        let solved = solve(scenario, self.start.clone(), &self.options, &mut watch)
            .map_err(|error| Missing::NoCircuit(first_line(&error)))?;
        match &solved.run.end {
            RunEnd::Finished => Ok(solved),
            RunEnd::Cancelled { .. } => Err(Missing::Cancelled),
            RunEnd::GaveUp { .. } => Err(Missing::GaveUp(solved.run.end.to_string())),
        }
    }

    /// Every check with parameters at other values (SI): those of the run, and those of the
    /// operating map where `with_map` asks for it.
    ///
    /// # Errors
    /// As [`Self::solved`].
    pub fn checks(
        &self,
        changes: &[(ParameterId, f64)],
        with_map: bool,
        watch: &StudyWatch<'_>,
    ) -> Result<Vec<Check>, Missing> {
        let scenario = self.changed(changes)?;
        let checks = self.run(&scenario, watch)?.checks;
        if with_map {
            Ok(with_map_checks(&checks, &of_map(&scenario, watch)?))
        } else {
            Ok(checks)
        }
    }

    /// The numbers of figures, SI, with parameters at other values (SI): one run, one set of maps
    /// and one equilibrium for all that need it.
    pub fn figures(
        &self,
        figures: &[Figure],
        changes: &[(ParameterId, f64)],
        watch: &StudyWatch<'_>,
    ) -> Vec<Result<f64, Missing>> {
        let scenario = match self.changed(changes) {
            Ok(scenario) => scenario,
            Err(missing) => return vec![Err(missing); figures.len()],
        };
        let run = LazyCell::new(|| self.run(&scenario, watch));
        let map = LazyCell::new(|| of_map(&scenario, watch));
        let rest = LazyCell::new(|| at_rest(&scenario, &self.point, watch));
        figures
            .iter()
            .map(|figure| match figure.source() {
                Source::Run => figure.of(run.as_ref().map_err(Clone::clone)?),
                Source::Map => figure.of_checks(map.as_ref().map_err(Clone::clone)?),
                Source::Rest => figure.of_rest(rest.as_ref().map_err(Clone::clone)?),
            })
            .collect()
    }

    /// The number of one figure, SI, with parameters at other values (SI).
    ///
    /// # Errors
    /// [`Missing`] says why there is none.
    pub fn figure(
        &self,
        figure: &Figure,
        changes: &[(ParameterId, f64)],
        watch: &StudyWatch<'_>,
    ) -> Result<f64, Missing> {
        let mut numbers = self.figures(std::slice::from_ref(figure), changes, watch);
        numbers
            .pop()
            .unwrap_or_else(|| unreachable!("one figure, one number"))
    }
}

/// What a figure is taken from.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Source {
    Run,
    Map,
    Rest,
}

/// The checks that the operating map answers.
fn of_map(scenario: &Scenario, watch: &StudyWatch<'_>) -> Result<Vec<Check>, Missing> {
    let maps = check_maps(scenario, watch.map_watch())
        .map_err(|error| Missing::NoCircuit(first_line(&error)))?;
    if watch.is_cancelled() {
        return Err(Missing::Cancelled);
    }
    Ok(map_checks(scenario, &maps))
}

/// The equilibrium at a point.
fn at_rest(
    scenario: &Scenario,
    point: &OperatingPoint,
    watch: &StudyWatch<'_>,
) -> Result<Equilibrium, Missing> {
    if watch.is_cancelled() {
        return Err(Missing::Cancelled);
    }
    equilibrium(scenario, point).map_err(|error| match error {
        StudyError::Equilibrium(error) => Missing::NoOccasion(error.to_string()),
        error => Missing::NoCircuit(first_line(&error)),
    })
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
    pub(crate) fn source(&self) -> Source {
        match self {
            Self::Check(id) if MAP_CHECKS.contains(id) => Source::Map,
            Self::Check(_) | Self::Trace { .. } => Source::Run,
            Self::Rest { .. } | Self::RestDamping => Source::Rest,
        }
    }

    /// Its number in a solved scenario, SI.
    ///
    /// # Errors
    /// [`Missing::NoOccasion`] if the run does not give it.
    pub fn of(&self, solved: &Solved) -> Result<f64, Missing> {
        match self {
            Self::Check(_) => self.of_checks(&solved.checks),
            Self::Trace { column, statistic } => trace_number(solved, column, *statistic),
            Self::Rest { .. } | Self::RestDamping => {
                let reason = "a run does not give a figure at rest";
                Err(Missing::NoOccasion(reason.to_owned()))
            }
        }
    }

    fn of_checks(&self, checks: &[Check]) -> Result<f64, Missing> {
        checks
            .iter()
            .find(|check| *self == Self::Check(check.id))
            .ok_or_else(|| Missing::NoOccasion("there is no such check".to_owned()))
            .and_then(number)
    }

    fn of_rest(&self, rest: &Equilibrium) -> Result<f64, Missing> {
        let none = |reason: &str| Missing::NoOccasion(reason.to_owned());
        match self {
            Self::Rest { column } => rest
                .named(column)
                .or_else(|| signal_of(rest, column))
                .ok_or_else(|| none("the equilibrium has no such reading")),
            _ => rest
                .stability
                .damping
                .ok_or_else(|| none("nothing swings at this operating point")),
        }
    }
}

/// A signal of an equilibrium by its short name; [`Equilibrium::named`] gives states.
fn signal_of(rest: &Equilibrium, name: &str) -> Option<f64> {
    let signals = rest.circuit().signals().iter();
    let found = signals.copied().find(|signal| signal.name() == name)?;
    Some(rest.signal(found))
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
