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

/// The search from a state in motion is tried once no rate exceeds this, 1/s.
const NEARLY_AT_REST: f64 = 1e-2;

/// Motion that is still faster than this (1/s) when the wait is over has not died out.
const STILL_MOVING: f64 = 1e-1;

/// Relative tolerance of the wait: only its end counts, and the search corrects that.
const WAIT_TOLERANCE: f64 = 1e-4;

/// Steps between two looks at the residual.
const STEPS_PER_LOOK: usize = 8;

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
            Rest::DiedOut => write!(f, "at rest after {waited:.3} s"),
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
    for look in [Some(NEARLY_AT_REST), None] {
        if wait(&resting, &mut settled, look, options, watch)? {
            return Ok(settled);
        }
    }
    Ok(settled)
}

/// Integrates on, until the residual is at most `look` or the wait is over, and searches from
/// there. Says whether that is the end of it.
fn wait(
    system: &dyn System,
    settled: &mut Settled,
    look: Option<f64>,
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
        ..SolverOptions::with_tolerance(WAIT_TOLERANCE)
    };
    let mut watcher = RestWatcher {
        system,
        rates: vec![0.0; system.size()],
        residual: f64::INFINITY,
        stop_at: look,
        steps: 0,
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
    settled.residual = residual(system, 0.0, &settled.state, &mut watcher.rates);
    let died_out = settled.residual < STILL_MOVING;
    let found = search(system, 0.0, &settled.state, REST_RESIDUAL);
    settled.iterations += found.iterations;
    if found.converged {
        settled.state = found.state;
        settled.residual = found.residual;
        settled.rest = if died_out {
            Rest::DiedOut
        } else {
            Rest::SolvedOnly
        };
    }
    let over = settled.waited >= options.wait || !result.end.is_finished();
    Ok(found.converged || over)
}

/// Ends the wait once nothing moves fast any more.
struct RestWatcher<'a> {
    system: &'a dyn System,
    rates: Vec<f64>,
    residual: f64,
    stop_at: Option<f64>,
    steps: usize,
}

impl Recorder for RestWatcher<'_> {
    fn begin(&mut self, _piece: usize, _time: f64, _y: &[f64]) {}

    fn step(&mut self, step: &mut Step<'_>) -> Result<Flow, GiveUp> {
        self.steps += 1;
        let Some(stop_at) = self.stop_at.filter(|_| self.steps % STEPS_PER_LOOK == 0) else {
            return Ok(Flow::Continue);
        };
        self.residual = residual(self.system, 0.0, step.y, &mut self.rates);
        if self.residual <= stop_at {
            return Ok(Flow::Stop);
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
