//! The border of hunting: where the least damping ratio is 0 (a Hopf bifurcation), or where an
//! equilibrium begins to run away.

use std::cell::RefCell;

use argmin::core::{CostFunction, Executor, State};
use argmin::solver::brent::BrentRoot;
use helmsplit_scenario::Scenario;

use super::error::ModesError;
use super::path::Sweep;
use super::stability::Stability;
use crate::equilibrium::{Equilibrium, equilibrium};
use crate::error::StudyError;
use crate::operating::{OperatingPoint, Variable};

/// Width of the last bracket, relative to the size of the ends: the border is known far better
/// than any dimension is made.
const WIDTH: f64 = 1e-7;

/// Evaluations after which the search is given up; bisection alone would need fewer.
const MOST_EVALUATIONS: u64 = 100;

/// What begins at a border.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, serde::Serialize)]
#[serde(rename_all = "snake_case")]
pub enum BorderKind {
    /// A mode that swings begins to grow.
    Hunting,
    /// The equilibrium begins to run away without swinging.
    RunningAway,
}

/// Where an equilibrium ceases to be stable.
#[derive(Debug, Clone)]
pub struct Border {
    /// What is varied.
    pub variable: Variable,
    /// Its value at the border, SI.
    pub value: f64,
    /// What begins there.
    pub kind: BorderKind,
    /// Frequency at the border, Hz; `None` if it runs away.
    pub frequency: Option<f64>,
    /// Whether it is stable below the border and not above it.
    pub stable_below: bool,
    /// The equilibrium at the border.
    pub equilibrium: Equilibrium,
}

/// How far an equilibrium is from its border: the least damping ratio, or less if it runs away.
/// It is 0 at the border, positive where stable.
fn margin(stability: &Stability) -> f64 {
    if stability.running_away > 0 {
        // Grows from 0 as the real eigenvalue does; capped, since a ratio is.
        return -(stability.growth / (1.0 + stability.growth)).min(1.0);
    }
    stability.damping.unwrap_or(1.0)
}

struct Margin<'a> {
    scenario: &'a Scenario,
    point: &'a OperatingPoint,
    variable: Variable,
    last: RefCell<Equilibrium>,
    failure: RefCell<Option<StudyError>>,
}

impl Margin<'_> {
    fn at(&self, value: f64) -> Result<f64, StudyError> {
        let mut there = self.point.clone();
        self.variable.apply(self.scenario, &mut there, value)?;
        let next = self.last.borrow().follow(self.scenario, &there)?;
        let margin = margin(&next.stability);
        self.last.replace(next);
        Ok(margin)
    }
}

impl CostFunction for Margin<'_> {
    type Param = f64;
    type Output = f64;

    fn cost(&self, value: &f64) -> Result<f64, argmin::core::Error> {
        self.at(*value).map_err(|error| {
            let text = error.to_string();
            self.failure.replace(Some(error));
            argmin::core::Error::msg(text)
        })
    }
}

/// The border of `variable` between `from` and `to` (SI), at whose ends the circuit is stable and
/// not stable. Found by Brent's method on the least damping ratio to far better than 0.1 %.
///
/// # Errors
/// [`ModesError::NoBorder`] if both ends are alike; [`StudyError`] if an equilibrium is lost on the
/// way.
///
/// # Source
/// Brent, *Algorithms for Minimization without Derivatives*, 1973, ch. 4.
pub fn border(
    scenario: &Scenario,
    point: &OperatingPoint,
    variable: Variable,
    from: f64,
    to: f64,
) -> Result<Border, StudyError> {
    let mut there = point.clone();
    variable.apply(scenario, &mut there, from)?;
    let start = equilibrium(scenario, &there)?;
    let problem = Margin {
        scenario,
        point,
        variable,
        last: RefCell::new(start),
        failure: RefCell::new(None),
    };
    let (low, high) = (problem.at(from)?, problem.at(to)?);
    if (low > 0.0) == (high > 0.0) {
        return Err(ModesError::NoBorder {
            variable: variable.name().to_owned(),
            from,
            to,
            damping_from: low,
            damping_to: high,
        }
        .into());
    }
    let solver = BrentRoot::new(from, to, WIDTH * (from.abs() + to.abs()));
    let search = |message: String| ModesError::Search {
        variable: variable.name().to_owned(),
        message,
    };
    let mut result = Executor::new(problem, solver)
        .configure(|state| state.max_iters(MOST_EVALUATIONS))
        .run()
        .map_err(|error| StudyError::from(search(error.to_string())))?;
    let value = result.state().get_best_param().copied();
    let problem = result.problem.take_problem();
    let (Some(value), Some(problem)) = (value, problem) else {
        return Err(search("it ended without a value".to_owned()).into());
    };
    if let Some(failure) = problem.failure.into_inner() {
        return Err(failure);
    }
    variable.apply(scenario, &mut there, value)?;
    let equilibrium = problem.last.into_inner().follow(scenario, &there)?;
    let stable_below = if from < to { low > 0.0 } else { high > 0.0 };
    Ok(at_border(variable, value, stable_below, equilibrium))
}

fn at_border(
    variable: Variable,
    value: f64,
    stable_below: bool,
    equilibrium: Equilibrium,
) -> Border {
    let near_zero = equilibrium
        .stability
        .damping
        .is_some_and(|d| d.abs() < 1e-3);
    let kind = if near_zero && equilibrium.stability.running_away == 0 {
        BorderKind::Hunting
    } else {
        BorderKind::RunningAway
    };
    Border {
        variable,
        value,
        kind,
        frequency: (kind == BorderKind::Hunting)
            .then_some(equilibrium.stability.frequency)
            .flatten(),
        stable_below,
        equilibrium,
    }
}

/// Every border along a sweep: wherever two neighbouring values differ in being stable.
///
/// # Errors
/// As [`border`]; none at all is no error.
pub fn borders(
    scenario: &Scenario,
    point: &OperatingPoint,
    sweep: &Sweep,
) -> Result<Vec<Border>, StudyError> {
    sweep.check()?;
    let mut there = point.clone();
    sweep
        .variable
        .apply(scenario, &mut there, sweep.values[0])?;
    let mut here = equilibrium(scenario, &there)?;
    let mut found = Vec::new();
    for pair in sweep.values.windows(2) {
        sweep.variable.apply(scenario, &mut there, pair[1])?;
        let next = here.follow(scenario, &there)?;
        let differ = (margin(&here.stability) > 0.0) != (margin(&next.stability) > 0.0);
        if differ {
            found.push(border(scenario, point, sweep.variable, pair[0], pair[1])?);
        }
        here = next;
    }
    Ok(found)
}
