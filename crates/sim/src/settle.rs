//! The state of rest at given inputs, from which a run may start (docs/model.md, M11).

use serde::Serialize;

use crate::ending::GiveUp;
use crate::error::SimError;
use crate::integrate::{Flow, Piece, Recorder, Step, integrate};
use crate::options::SolverOptions;
use crate::pseudo_transient::{residual, search};
use crate::system::{Held, System};
use crate::watch::Watch;

/// A state rests when no rate of change exceeds this share of the state's typical size, 1/s: over
/// a run of 10 s nothing moves by more than a hundred-thousandth of its size.
pub const REST_RESIDUAL: f64 = 1e-6;

/// Highest order of the wait. Above 2 the method itself keeps the spool's fast oscillation on
/// trapped oil alive at a loose tolerance, and takes ten times the steps.
const WAIT_ORDER: usize = 2;

/// The wait may end once no state has moved by more than [`QUIET_CHANGE`] of its typical size
/// over this time, s. Rates themselves say little while waiting: the errors of a loose tolerance
/// make stiff pressures look fast.
const QUIET_TIME: f64 = 0.1;

/// See [`QUIET_TIME`].
const QUIET_CHANGE: f64 = 1e-3;

/// Motion has died out if the equilibrium lies this near to where the wait ended, in sizes of the
/// states.
const NEAR: f64 = 2e-2;

/// Relative tolerance of the wait: only its end counts, and the search corrects that.
const WAIT_TOLERANCE: f64 = 1e-4;

/// How to look for a state of rest.
#[derive(Debug, Clone, PartialEq)]
pub struct SettleOptions {
    /// How long to wait for motion to die out, s. Default 3.
    pub wait: f64,
    /// Most solver steps of the wait. Default 100,000.
    pub max_steps: usize,
}

impl Default for SettleOptions {
    fn default() -> Self {
        Self {
            wait: 3.0,
            max_steps: 100_000,
        }
    }
}

/// Whether, and how, a state of rest was reached.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize)]
#[serde(rename_all = "snake_case")]
pub enum Rest {
    /// Motion died out by itself, and the equilibrium behind it was solved for.
    DiedOut,
    /// The equilibrium was solved for from a guess, without waiting.
    FromGuess,
    /// The equilibrium was solved for, but motion had not died out: the circuit may hunt about it.
    SolvedOnly,
    /// No equilibrium was found; the state is the one after the wait.
    NotAtRest,
}

/// A state to start a run from.
#[derive(Debug, Clone, PartialEq, Serialize)]
pub struct Settled {
    /// The state, SI.
    pub state: Vec<f64>,
    /// Whether it is at rest.
    pub rest: Rest,
    /// Largest rate of change of a state relative to its typical size, 1/s; states that turn or
    /// travel at a steady rate are left out.
    pub residual: f64,
    /// Iterations of the search.
    pub iterations: usize,
    /// Time integrated before the search, s.
    pub waited: f64,
    /// Solver steps taken while waiting.
    pub steps: usize,
}

impl std::fmt::Display for Settled {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        let Self {
            residual,
            iterations,
            waited,
            ..
        } = self;
        match self.rest {
            Rest::DiedOut => write!(f, "at rest, motion died out within {waited:.3} s"),
            Rest::FromGuess => write!(f, "at rest, solved in {iterations} iterations"),
            Rest::SolvedOnly => write!(
                f,
                "equilibrium found, but motion does not die out within {waited:.3} s"
            ),
            Rest::NotAtRest => write!(
                f,
                "does not come to rest: starts from the state after {waited:.3} s \
                 (fastest state {residual:.1e} of its size per second)"
            ),
        }
    }
}

/// Looks for the state of rest of `system` with its inputs as at `time` (s), the states `held`
/// kept where they are.
///
/// With a `guess`, the equilibrium is first solved for from there. Failing that, or without one,
/// the system is integrated from the guess or else from `cold`, for up to [`SettleOptions::wait`],
/// and the equilibrium is solved for from where it comes to.
///
/// The wait runs at a loose tolerance, which may hide a faint hunt: that a state is at rest does
/// not say that it is stable. The modes of the equilibrium say so.
///
/// # Errors
/// [`SimError`] if the start does not fit the system.
pub fn settle(
    system: &dyn System,
    held: &[usize],
    cold: &[f64],
    guess: Option<&[f64]>,
    options: &SettleOptions,
    watch: &mut Watch<'_>,
) -> Result<Settled, SimError> {
    let resting = Held::new(system, held);
    let mut iterations = 0;
    if let Some(guess) = guess.filter(|guess| guess.len() == system.size()) {
        let found = search(&resting, 0.0, guess, REST_RESIDUAL);
        iterations += found.iterations;
        if found.converged {
            return Ok(Settled {
                state: found.state,
                rest: Rest::FromGuess,
                residual: found.residual,
                iterations,
                waited: 0.0,
                steps: 0,
            });
        }
    }
    let mut settled = Settled {
        state: guess.unwrap_or(cold).to_vec(),
        rest: Rest::NotAtRest,
        residual: f64::INFINITY,
        iterations,
        waited: 0.0,
        steps: 0,
    };
    // First up to where motion has nearly died out; if the search fails from there, to the end.
    for stop_when_quiet in [true, false] {
        if wait(&resting, &mut settled, stop_when_quiet, options, watch)? {
            return Ok(settled);
        }
    }
    Ok(settled)
}

/// Integrates on and searches from there. Says whether that is the end of it.
fn wait(
    system: &dyn System,
    settled: &mut Settled,
    stop_when_quiet: bool,
    options: &SettleOptions,
    watch: &mut Watch<'_>,
) -> Result<bool, SimError> {
    let piece = Piece {
        system,
        end: options.wait,
        jump: false,
    };
    let solver = SolverOptions {
        max_steps: options.max_steps,
        highest_order: WAIT_ORDER,
        ..SolverOptions::with_tolerance(WAIT_TOLERANCE)
    };
    let mut watcher = QuietWatcher {
        scales: system.scales(),
        stop_when_quiet,
        since: settled.waited,
        mark: settled.state.clone(),
        change: 0.0,
    };
    let start = settled.state.clone();
    let result = integrate(
        &[piece],
        settled.waited,
        &start,
        &solver,
        &mut watcher,
        watch,
    )?;
    settled.state = result.state;
    settled.waited = result.time;
    settled.steps += result.statistics.steps;
    settled.residual = residual(system, 0.0, &settled.state, &mut vec![0.0; system.size()]);
    let found = search(system, 0.0, &settled.state, REST_RESIDUAL);
    settled.iterations += found.iterations;
    if found.converged {
        let away = largest_change(system.scales(), &settled.state, &found.state);
        settled.rest = if away < NEAR {
            Rest::DiedOut
        } else {
            Rest::SolvedOnly
        };
        settled.state = found.state;
        settled.residual = found.residual;
    }
    let over = settled.waited >= options.wait || !result.end.is_finished();
    Ok(found.converged || over)
}

/// Largest difference of two states, in sizes of the states.
fn largest_change(scales: &[f64], a: &[f64], b: &[f64]) -> f64 {
    a.iter()
        .zip(b)
        .zip(scales)
        .map(|((a, b), scale)| ((a - b) / scale).abs())
        .fold(0.0, f64::max)
}

/// Ends the wait once nothing moves much any more.
struct QuietWatcher<'a> {
    scales: &'a [f64],
    stop_when_quiet: bool,
    /// Start of the window looked at, s, and the state there.
    since: f64,
    mark: Vec<f64>,
    /// Largest change from it.
    change: f64,
}

impl Recorder for QuietWatcher<'_> {
    fn begin(&mut self, _piece: usize, _time: f64, _y: &[f64]) {}

    fn step(&mut self, step: &mut Step<'_>) -> Result<Flow, GiveUp> {
        if !self.stop_when_quiet {
            return Ok(Flow::Continue);
        }
        self.change = self
            .change
            .max(largest_change(self.scales, &self.mark, step.y));
        if step.time - self.since >= QUIET_TIME {
            if self.change < QUIET_CHANGE {
                return Ok(Flow::Stop);
            }
            self.since = step.time;
            self.mark.copy_from_slice(step.y);
            self.change = 0.0;
        }
        Ok(Flow::Continue)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Van der Pol's oscillator: its only equilibrium, zero, is unstable for positive damping
    /// parameter and stable for negative. A third state turns at a steady rate.
    struct Oscillator {
        damping: f64,
    }

    impl System for Oscillator {
        fn size(&self) -> usize {
            3
        }
        fn scales(&self) -> &[f64] {
            &[1.0, 1.0, 1.0]
        }
        fn derivatives(&self, _time: f64, y: &[f64], dy: &mut [f64]) {
            dy[0] = 20.0 * y[1];
            dy[1] = 20.0 * (self.damping * (1.0 - y[0] * y[0]) * y[1] - y[0]);
            dy[2] = 7.0;
        }
        fn jacobian(&self, _time: f64, y: &[f64], j: &mut [f64]) {
            j.fill(0.0);
            j[1] = 20.0 * (-2.0 * self.damping * y[0] * y[1] - 1.0);
            j[3] = 20.0;
            j[4] = 20.0 * self.damping * (1.0 - y[0] * y[0]);
        }
    }

    fn settled(damping: f64, guess: Option<&[f64]>) -> Settled {
        settle(
            &Oscillator { damping },
            &[2],
            &[0.5, 0.0, 4.0],
            guess,
            &SettleOptions::default(),
            &mut Watch::none(),
        )
        .unwrap()
    }

    #[test]
    fn calm_motion_dies_out_and_what_turns_is_held() {
        let s = settled(-0.5, None);
        assert_eq!(s.rest, Rest::DiedOut, "{s:?}");
        assert!(s.residual <= REST_RESIDUAL, "{s:?}");
        assert!(
            (s.state[2] - 4.0).abs() < 1e-12,
            "the third state is held: {s:?}"
        );
        assert!(s.waited < 3.0, "it need not wait to the end: {s:?}");
    }

    #[test]
    fn hunting_is_told_from_rest() {
        let s = settled(0.5, None);
        assert_eq!(s.rest, Rest::SolvedOnly, "{s:?}");
        assert!(s.to_string().contains("does not die out"), "{s}");
    }

    #[test]
    fn a_good_guess_needs_no_wait() {
        let s = settled(-0.5, Some(&[1e-3, 0.0, 4.0]));
        assert_eq!(s.rest, Rest::FromGuess, "{s:?}");
        assert_eq!(s.steps, 0, "{s:?}");
    }

    #[test]
    fn a_guess_of_the_wrong_length_is_reported() {
        let result = settle(
            &Oscillator { damping: -0.5 },
            &[],
            &[0.0; 3],
            Some(&[0.0; 2]),
            &SettleOptions::default(),
            &mut Watch::none(),
        );
        assert!(result.is_err(), "two values for three states");
    }
}
