//! The search for a state of rest alone, without waiting for it (docs/model.md, M11).

use crate::error::SimError;
use crate::pseudo_transient::search;
use crate::settle::REST_RESIDUAL;
use crate::system::{Held, System};

/// What a search for a state of rest came to.
#[derive(Debug, Clone, PartialEq)]
pub struct Sought {
    /// The state reached, SI.
    pub state: Vec<f64>,
    /// Largest rate of change of a state relative to its typical size, 1/s.
    pub residual: f64,
    /// Index of the state that has it.
    pub fastest: usize,
    /// Iterations.
    pub iterations: usize,
    /// Whether that is a state of rest: the residual is at most [`REST_RESIDUAL`].
    pub converged: bool,
}

/// Searches the state of rest of `system`, inputs as at time 0, from `guess`, the states `held`
/// kept where they are. Cheap, some ten iterations, and good along a sweep, where the guess is the
/// state next door; from far away it may fail where [`crate::settle`] does not.
///
/// # Errors
/// [`SimError::StartLength`] if the guess does not fit the system.
pub fn seek_rest(system: &dyn System, held: &[usize], guess: &[f64]) -> Result<Sought, SimError> {
    if guess.len() != system.size() {
        return Err(SimError::StartLength {
            expected: system.size(),
            got: guess.len(),
        });
    }
    let resting = Held::new(system, held);
    let found = search(&resting, 0.0, guess, REST_RESIDUAL);
    let mut rates = vec![0.0; system.size()];
    resting.derivatives(0.0, &found.state, &mut rates);
    let pace = |i: usize| {
        let pace = (rates[i] / system.scales()[i]).abs();
        if pace.is_nan() { f64::INFINITY } else { pace }
    };
    let fastest = (0..rates.len())
        .max_by(|&a, &b| pace(a).total_cmp(&pace(b)))
        .unwrap_or(0);
    Ok(Sought {
        state: found.state,
        residual: found.residual,
        fastest,
        iterations: found.iterations,
        converged: found.converged,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    /// `x' = 4 - x^2`, `y' = 3`: rests at 2 with y held, and nowhere with y free.
    struct Root;

    impl System for Root {
        fn size(&self) -> usize {
            2
        }
        fn scales(&self) -> &[f64] {
            &[1.0, 0.5]
        }
        fn derivatives(&self, _time: f64, y: &[f64], dy: &mut [f64]) {
            dy[0] = 4.0 - y[0] * y[0];
            dy[1] = 3.0;
        }
        fn jacobian(&self, _time: f64, y: &[f64], j: &mut [f64]) {
            j.copy_from_slice(&[-2.0 * y[0], 0.0, 0.0, 0.0]);
        }
    }

    #[test]
    fn rests_with_the_drift_held() {
        let sought = seek_rest(&Root, &[1], &[5.0, 7.0]).unwrap();
        assert!(sought.converged, "{sought:?}");
        assert!((sought.state[0] - 2.0).abs() < 1e-9, "{sought:?}");
        assert!((sought.state[1] - 7.0).abs() < 1e-12, "held: {sought:?}");
    }

    #[test]
    fn names_the_state_that_does_not_rest() {
        let sought = seek_rest(&Root, &[], &[5.0, 7.0]).unwrap();
        assert!(!sought.converged, "{sought:?}");
        assert_eq!(sought.fastest, 1, "{sought:?}");
        assert!((sought.residual - 6.0).abs() < 1e-9, "{sought:?}");
        assert!(seek_rest(&Root, &[], &[5.0]).is_err(), "one value too few");
    }
}
