//! Pseudo-transient continuation: from a state near rest to the state of rest.

use nalgebra::{DMatrix, DVector};

use crate::system::System;

/// First pseudo time step, s: short against the slow modes of a circuit, long against the fast.
const FIRST_STEP: f64 = 1e-2;

/// Longest pseudo time step, s. It stays finite so that a direction without any restoring force
/// leaves the equations solvable.
const LONGEST_STEP: f64 = 1e8;

/// A correction this small in every state, relative to its size, at a pseudo step of at least
/// [`LONG_STEP`], changes nothing a user could see.
const SMALL_CORRECTION: f64 = 1e-9;

/// Pseudo time step from which a small correction means rest and not just a short step, s.
const LONG_STEP: f64 = 10.0;

/// Least growth of the pseudo time step while the residual falls: by the ratio of residuals alone
/// a slow mode, whose residual hardly falls while the step is short, would hold the step short.
const LEAST_GROWTH: f64 = 2.0;

/// Iterations after which the search is given up.
const MOST_ITERATIONS: usize = 80;

/// What the search found.
#[derive(Debug, Clone, PartialEq)]
pub(crate) struct Found {
    /// The state reached.
    pub(crate) state: Vec<f64>,
    /// Largest rate of change relative to size, 1/s.
    pub(crate) residual: f64,
    /// Iterations.
    pub(crate) iterations: usize,
    /// Whether the search converged.
    pub(crate) converged: bool,
}

/// Largest rate of change of any state, relative to the state's typical size, 1/s; infinite where
/// a rate is not a finite number.
pub(crate) fn residual(system: &dyn System, time: f64, y: &[f64], dy: &mut [f64]) -> f64 {
    system.derivatives(time, y, dy);
    let mut largest: f64 = 0.0;
    for (rate, scale) in dy.iter().zip(system.scales()) {
        let pace = (rate / scale).abs();
        if !pace.is_finite() {
            return f64::INFINITY;
        }
        largest = largest.max(pace);
    }
    largest
}

/// Searches the state of rest of `system`, its inputs as at `time` (s), from `guess`.
///
/// Each iteration is an implicit Euler step with one Newton iteration; the pseudo time step grows
/// as the residual falls (switched evolution relaxation), so that the last iterations are
/// Newton's. The search counts as converged when the residual is at most `rest` (1/s) and the
/// correction has become negligible.
///
/// # Source
/// C. T. Kelley & D. E. Keyes, Convergence analysis of pseudo-transient continuation, SIAM
/// Journal on Numerical Analysis 35 (1998) 508-523.
pub(crate) fn search(system: &dyn System, time: f64, guess: &[f64], rest: f64) -> Found {
    let size = system.size();
    let scales = system.scales();
    let mut found = Found {
        state: guess.to_vec(),
        residual: f64::INFINITY,
        iterations: 0,
        converged: false,
    };
    let mut rates = vec![0.0; size];
    let mut trial = vec![0.0; size];
    let mut trial_rates = vec![0.0; size];
    let mut jacobian = vec![0.0; size * size];
    let mut step = FIRST_STEP;
    found.residual = residual(system, time, &found.state, &mut rates);
    while found.iterations < MOST_ITERATIONS && found.residual.is_finite() {
        found.iterations += 1;
        system.jacobian(time, &found.state, &mut jacobian);
        let correction = euler_step(scales, &rates, &jacobian, step);
        let largest = correction.as_ref().map_or(f64::INFINITY, DVector::amax);
        let after = match &correction {
            Some(correction) => {
                for i in 0..size {
                    trial[i] = found.state[i] + correction[i] * scales[i];
                }
                residual(system, time, &trial, &mut trial_rates)
            }
            None => f64::INFINITY,
        };
        if !after.is_finite() || !largest.is_finite() {
            // Outside of what the equations can take: a shorter step stays nearer.
            step *= 0.1;
            continue;
        }
        std::mem::swap(&mut found.state, &mut trial);
        std::mem::swap(&mut rates, &mut trial_rates);
        if after <= rest && largest <= SMALL_CORRECTION && step >= LONG_STEP {
            found.residual = after;
            found.converged = true;
            return found;
        }
        let ratio = if after > 0.0 {
            found.residual / after
        } else {
            f64::INFINITY
        };
        let growth = if ratio > 1.0 {
            ratio.max(LEAST_GROWTH)
        } else {
            ratio
        };
        step = (step * growth.clamp(0.1, 1e3)).min(LONGEST_STEP);
        if after <= rest {
            // Only rounding is left of the residual; its ratio no longer says anything.
            step = step.max(LONG_STEP) * 10.0;
        }
        found.residual = after;
    }
    found
}

/// Solves `(1/step - J) d = f` in states and rates relative to their sizes, rows brought to one
/// size first; `None` where the matrix is singular.
fn euler_step(scales: &[f64], rates: &[f64], jacobian: &[f64], step: f64) -> Option<DVector<f64>> {
    let size = scales.len();
    let mut matrix = DMatrix::from_fn(size, size, |i, j| {
        -jacobian[j * size + i] * scales[j] / scales[i] + if i == j { 1.0 / step } else { 0.0 }
    });
    let mut right = DVector::from_fn(size, |i, _| rates[i] / scales[i]);
    for i in 0..size {
        let largest = matrix.row(i).amax();
        if largest > 0.0 && largest.is_finite() {
            matrix.row_mut(i).unscale_mut(largest);
            right[i] /= largest;
        }
    }
    matrix.lu().solve(&right)
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A stiff pair: `x' = -1e5 (x - y^2)`, `y' = 1 - y`; it rests at (1, 1).
    struct Pair;

    impl System for Pair {
        fn size(&self) -> usize {
            2
        }
        fn scales(&self) -> &[f64] {
            &[1.0, 1.0]
        }
        fn derivatives(&self, _time: f64, y: &[f64], dy: &mut [f64]) {
            dy[0] = -1e5 * (y[0] - y[1] * y[1]);
            dy[1] = 1.0 - y[1];
        }
        fn jacobian(&self, _time: f64, y: &[f64], j: &mut [f64]) {
            j.copy_from_slice(&[-1e5, 0.0, 2e5 * y[1], -1.0]);
        }
    }

    #[test]
    fn finds_the_rest_of_a_stiff_pair() {
        let found = search(&Pair, 0.0, &[5.0, -3.0], 1e-6);
        assert!(found.converged, "{found:?}");
        assert!((found.state[0] - 1.0).abs() < 1e-12, "{found:?}");
        assert!((found.state[1] - 1.0).abs() < 1e-12, "{found:?}");
        assert!(found.iterations < 30, "{found:?}");
    }

    #[test]
    fn a_neutral_direction_stays_where_it_is() {
        struct Neutral;
        impl System for Neutral {
            fn size(&self) -> usize {
                2
            }
            fn scales(&self) -> &[f64] {
                &[1.0, 1.0]
            }
            fn derivatives(&self, _time: f64, y: &[f64], dy: &mut [f64]) {
                dy[0] = 0.0;
                dy[1] = y[0] - y[1];
            }
            fn jacobian(&self, _time: f64, _y: &[f64], j: &mut [f64]) {
                j.copy_from_slice(&[0.0, 1.0, 0.0, -1.0]);
            }
        }
        let found = search(&Neutral, 0.0, &[3.0, 0.0], 1e-6);
        assert!(found.converged, "{found:?}");
        assert!((found.state[0] - 3.0).abs() < 1e-15, "{found:?}");
        assert!((found.state[1] - 3.0).abs() < 1e-9, "{found:?}");
    }

    #[test]
    fn says_so_where_there_is_no_rest() {
        struct Falling;
        impl System for Falling {
            fn size(&self) -> usize {
                1
            }
            fn scales(&self) -> &[f64] {
                &[1.0]
            }
            fn derivatives(&self, _time: f64, _y: &[f64], dy: &mut [f64]) {
                dy[0] = 1.0;
            }
            fn jacobian(&self, _time: f64, _y: &[f64], j: &mut [f64]) {
                j[0] = 0.0;
            }
        }
        assert!(
            !search(&Falling, 0.0, &[0.0], 1e-6).converged,
            "it falls for ever"
        );
    }
}
