//! Integration over pieces of time between breakpoints of the inputs.
//!
//! The solver stops exactly at each breakpoint. Where an input only bends it goes on with its
//! history; where one jumps it starts again at order 1 (docs/model.md, M10).

use std::panic::{AssertUnwindSafe, catch_unwind};

use diffsol::error::OdeSolverError;
use diffsol::ode_solver::OdeSolverStatistics;
use diffsol::{
    Bdf, BdfState, DiffsolError, OdeSolverMethod, OdeSolverProblem, OdeSolverState,
    OdeSolverStopReason, Op, RkState, StateRef, StateRefMut, Vector, VectorCommon,
};

use crate::crawl_guard::CrawlGuard;
use crate::ending::{GiveUp, RunEnd};
use crate::error::SimError;
use crate::history::History;
use crate::lu_solver::LuSolver;
use crate::options::{Method, SolverOptions};
use crate::problem::{Equations, Vect, problem};
use crate::statistics::Statistics;
use crate::system::System;
use crate::watch::Watch;

/// A stretch of time on which one system holds.
#[derive(Clone, Copy)]
pub struct Piece<'s> {
    /// The system.
    pub system: &'s dyn System,
    /// End, s; it starts where the piece before it ends.
    pub end: f64,
    /// Whether the right-hand side jumps at its start.
    pub jump: bool,
}

/// Whether to go on.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Flow {
    /// Go on.
    Continue,
    /// Stop here; the run counts as finished.
    Stop,
}

/// Takes what the solver finds.
pub trait Recorder {
    /// A piece begins at `time` (s) in state `y`.
    fn begin(&mut self, piece: usize, time: f64, y: &[f64]);

    /// A step was accepted.
    ///
    /// # Errors
    /// A [`GiveUp`] ends the run.
    fn step(&mut self, step: &mut Step<'_>) -> Result<Flow, GiveUp>;
}

/// Writes the state at a time within the present step.
type Interpolant<'a> = dyn FnMut(f64, &mut [f64]) -> Result<(), DiffsolError> + 'a;

/// An accepted step.
pub struct Step<'a> {
    /// Start of the step, s.
    pub from: f64,
    /// End of the step, s.
    pub time: f64,
    /// State at the end.
    pub y: &'a [f64],
    interpolant: &'a mut Interpolant<'a>,
}

impl Step<'_> {
    /// The state at `time` (s) within the step, from the solver's own interpolant.
    ///
    /// # Errors
    /// If `time` lies outside the step.
    pub fn at(&mut self, time: f64, y: &mut [f64]) -> Result<(), GiveUp> {
        (self.interpolant)(time, y).map_err(|error| GiveUp::Solver {
            message: error.to_string(),
        })
    }
}

/// What an integration leaves beside its record.
#[derive(Debug, Clone, PartialEq)]
pub struct Integration {
    /// How it ended.
    pub end: RunEnd,
    /// Time reached, s.
    pub time: f64,
    /// State reached.
    pub state: Vec<f64>,
    /// What it cost.
    pub statistics: Statistics,
}

/// Integrates from `start` at time `from` (s) over `pieces`, all of one size and in order.
///
/// # Errors
/// [`SimError`] if the options, the start state or the times do not fit. That the solver gives up
/// on the way is no error: see [`Integration::end`].
pub fn integrate(
    pieces: &[Piece<'_>],
    from: f64,
    start: &[f64],
    options: &SolverOptions,
    recorder: &mut dyn Recorder,
    watch: &mut Watch<'_>,
) -> Result<Integration, SimError> {
    options.check()?;
    let (Some(first), Some(last)) = (pieces.first(), pieces.last()) else {
        return Err(SimError::Span {
            start: from,
            end: from,
        });
    };
    check_start(first.system, start)?;
    let mut previous = from;
    for piece in pieces {
        if piece.end.is_nan() || piece.end <= previous {
            return Err(SimError::Span {
                start: from,
                end: last.end,
            });
        }
        previous = piece.end;
    }
    let problem = problem(first.system, start, from, options)?;
    let mut reached = Reached {
        time: from,
        state: start.to_vec(),
        statistics: Statistics::default(),
    };
    let mut drive = Drive {
        problem: &problem,
        pieces,
        options,
        recorder,
        watch,
        reached: &mut reached,
    };
    // diffsol unwraps comparisons of numbers that a broken circuit may make NaN; such a panic
    // must cost this run only.
    let outcome = catch_unwind(AssertUnwindSafe(|| drive.start())).unwrap_or_else(|_| {
        Ok(Outcome::GaveUp(GiveUp::Solver {
            message: "the solver stumbled over its own numbers".to_owned(),
        }))
    })?;
    let equations = &problem.eqn;
    let end = match outcome {
        Outcome::Finished => RunEnd::Finished,
        Outcome::Cancelled => RunEnd::Cancelled { time: reached.time },
        Outcome::GaveUp(reason) => gave_up(equations, &reached, reason),
    };
    let mut statistics = reached.statistics;
    statistics.rhs_calls = equations.rhs_calls.get();
    statistics.jacobian_calls = equations.jacobian_calls.get();
    Ok(Integration {
        end,
        time: reached.time,
        state: reached.state,
        statistics,
    })
}

fn check_start(system: &dyn System, start: &[f64]) -> Result<(), SimError> {
    if start.len() != system.size() {
        return Err(SimError::StartLength {
            expected: system.size(),
            got: start.len(),
        });
    }
    match start.iter().position(|value| !value.is_finite()) {
        None => Ok(()),
        Some(index) => Err(SimError::StartNotFinite {
            state: system.state_name(index),
            value: start[index],
        }),
    }
}

/// Longest first step after the inputs bend, s. The solver comes along with the long steps of the
/// quiet time before; such a step can reach over all that the bend sets going and end where the
/// rates happen to be the old ones, and then no error test notices.
const AFTER_BEND: f64 = 1e-4;

/// How far the solver got; kept outside of it, so that it survives a panic.
struct Reached {
    time: f64,
    state: Vec<f64>,
    statistics: Statistics,
}

impl Reached {
    fn accept(&mut self, state: &StateRef<'_, Vect>, order: usize) {
        self.time = state.t;
        self.state.copy_from_slice(state.y.inner().as_slice());
        let orders = &mut self.statistics.steps_by_order;
        orders[order.clamp(1, orders.len()) - 1] += 1;
    }
}

enum Outcome {
    Finished,
    Cancelled,
    GaveUp(GiveUp),
}

/// Names the state that fails: the one whose rate is not finite, else the one that moves fastest
/// against its size.
fn gave_up(equations: &Equations<'_>, reached: &Reached, reason: GiveUp) -> RunEnd {
    let system = equations.system();
    let size = system.size();
    let mut rates = vec![0.0; size];
    system.derivatives(reached.time, &reached.state, &mut rates);
    let stuck = !matches!(reason, GiveUp::TooManySteps { .. } | GiveUp::Crawl { .. });
    let (index, reason) = match equations.not_finite.get() {
        // An infinity tried and left long ago is not what stopped the run.
        Some(place) if stuck && place.time >= reached.time => (place.state, GiveUp::NotFinite),
        _ => {
            let pace = |i: usize| rates[i].abs() / (reached.state[i].abs() + system.scales()[i]);
            let fastest = (0..size).max_by(|&a, &b| pace(a).total_cmp(&pace(b)));
            (fastest.unwrap_or(0), reason)
        }
    };
    RunEnd::GaveUp {
        time: reached.time,
        state: system.state_name(index),
        reason,
    }
}

/// One integration on its way.
struct Drive<'d, 's, 'w> {
    problem: &'d OdeSolverProblem<Equations<'s>>,
    pieces: &'d [Piece<'s>],
    options: &'d SolverOptions,
    recorder: &'d mut dyn Recorder,
    watch: &'d mut Watch<'w>,
    reached: &'d mut Reached,
}

impl<'d, 's> Drive<'d, 's, '_> {
    fn start(&mut self) -> Result<Outcome, SimError> {
        let problem = self.problem;
        let setup = |error: DiffsolError| SimError::Setup(error.to_string());
        self.reached.statistics.starts = 1;
        let mut rates = vec![0.0; self.reached.state.len()];
        let equations = &problem.eqn;
        equations.evaluate(self.reached.time, &self.reached.state, &mut rates);
        if equations.not_finite.get().is_some() {
            return Ok(Outcome::GaveUp(GiveUp::NotFinite));
        }
        match self.options.method {
            Method::Bdf => {
                let order = self.options.highest_order;
                let state = History::with_highest_order(order, || {
                    BdfState::<Vect, History>::new(problem, 1).map_err(setup)
                })?;
                let solver = Bdf::<_, _, History>::new(problem, state, LuSolver::default())
                    .map_err(setup)?;
                Ok(self.all_pieces(solver, 1))
            }
            Method::Esdirk34 => {
                let state = RkState::new(problem, 3).map_err(setup)?;
                let solver = problem.esdirk34_solver::<LuSolver>(state).map_err(setup)?;
                Ok(self.all_pieces(solver, 3))
            }
        }
    }

    fn all_pieces<S>(&mut self, mut solver: S, start_order: usize) -> Outcome
    where
        S: OdeSolverMethod<'d, Equations<'s>>,
    {
        let mut crawl = CrawlGuard::new(self.options, self.reached.time);
        for (number, piece) in self.pieces.iter().enumerate() {
            self.problem.eqn.exchange(piece.system);
            if piece.jump && number > 0 {
                restart(solver.state_mut(), self.problem, start_order);
                self.reached.statistics.starts += 1;
            }
            self.recorder
                .begin(number, self.reached.time, &self.reached.state);
            let bend = number > 0 && !piece.jump;
            let first = Some(self.reached.time + AFTER_BEND).filter(|t| bend && *t < piece.end);
            for stop in first.into_iter().chain([piece.end]) {
                if let Err(error) = solver.set_stop_time(stop) {
                    return Outcome::GaveUp(reason(&error, self.options));
                }
                if let Some(outcome) = self.one_piece(&mut solver, &mut crawl) {
                    return outcome;
                }
            }
        }
        Outcome::Finished
    }

    /// Steps to the stop time; an outcome if the run ends before.
    fn one_piece<S>(&mut self, solver: &mut S, crawl: &mut CrawlGuard) -> Option<Outcome>
    where
        S: OdeSolverMethod<'d, Equations<'s>>,
    {
        let mut scratch = Vect::zeros(self.reached.state.len(), *self.problem.eqn.context());
        loop {
            let stopped = match solver.step() {
                Ok(stop) => matches!(stop, OdeSolverStopReason::TstopReached),
                Err(error) => {
                    count(solver.get_statistics(), self.reached);
                    return Some(Outcome::GaveUp(reason(&error, self.options)));
                }
            };
            let from = self.reached.time;
            self.reached.accept(&solver.state(), solver.order());
            count(solver.get_statistics(), self.reached);
            let solver = &*solver;
            let mut step = Step {
                from,
                time: self.reached.time,
                y: &self.reached.state,
                interpolant: &mut |time, y| {
                    solver.interpolate_inplace(time, &mut scratch)?;
                    y.copy_from_slice(scratch.inner().as_slice());
                    Ok(())
                },
            };
            match self.recorder.step(&mut step) {
                Ok(Flow::Continue) => {}
                Ok(Flow::Stop) => return Some(Outcome::Finished),
                Err(reason) => return Some(Outcome::GaveUp(reason)),
            }
            if stopped {
                return None;
            }
            if self.watch.cancelled_at(self.reached.time) {
                return Some(Outcome::Cancelled);
            }
            if let Some(reason) = crawl.check(self.reached.statistics.steps, self.reached.time) {
                return Some(Outcome::GaveUp(reason));
            }
        }
    }
}

/// Starts the solver anew from its present state, whose rate has jumped.
fn restart(
    state: StateRefMut<'_, Vect>,
    problem: &OdeSolverProblem<Equations<'_>>,
    start_order: usize,
) {
    let mut state = state;
    let time = *state.t;
    state
        .dy
        .for_each_batch_host([state.y], |dy, [y], _| problem.eqn.evaluate(time, y, dy));
    state.set_step_size(
        problem.h0,
        &problem.atol,
        problem.rtol,
        &problem.eqn,
        start_order,
    );
}

/// Copies the solver's own counts.
fn count(from: &OdeSolverStatistics, reached: &mut Reached) {
    let to = &mut reached.statistics;
    to.steps = from.number_of_steps;
    to.rejected_accuracy = from.number_of_error_test_failures;
    to.rejected_newton = from.number_of_nonlinear_solver_fails;
    to.newton_iterations = from.number_of_nonlinear_solver_iterations;
    to.factorisations = from.number_of_linear_solver_setups;
}

fn reason(error: &DiffsolError, options: &SolverOptions) -> GiveUp {
    match error {
        DiffsolError::OdeSolverError(OdeSolverError::StepSizeTooSmall { .. }) => {
            GiveUp::StepTooSmall {
                min_step: options.min_step,
            }
        }
        DiffsolError::OdeSolverError(OdeSolverError::TooManyNonlinearSolverFailures {
            num_failures,
            ..
        }) => GiveUp::Newton {
            failures: *num_failures,
        },
        DiffsolError::OdeSolverError(OdeSolverError::TooManyErrorTestFailures { .. }) => {
            GiveUp::Accuracy {
                failures: options.max_error_failures,
            }
        }
        other => GiveUp::Solver {
            message: other.to_string(),
        },
    }
}
