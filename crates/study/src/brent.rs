//! One bracketed root by Brent's method, from the library argmin.

use std::cell::Cell;

use argmin::core::{CostFunction, Error, Executor, IterState};
use argmin::solver::brent::BrentRoot;

/// What a search came to.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Found {
    /// Where the function is nearest to zero.
    pub(crate) at: f64,
    /// The function there.
    pub(crate) value: f64,
    /// The last bracket, lower end first, with the function at both ends.
    pub(crate) bracket: [(f64, f64); 2],
    /// Calls of the function.
    pub(crate) calls: usize,
}

struct Problem<'a, F> {
    function: F,
    /// The narrowest bracket seen: ends at which the function is not positive and not negative.
    below: &'a Cell<(f64, f64)>,
    above: &'a Cell<(f64, f64)>,
    best: &'a Cell<(f64, f64)>,
    calls: &'a Cell<usize>,
}

/// The function has no value at a point that the search asked for.
#[derive(Debug, thiserror::Error)]
#[error("no value")]
struct NoValue;

impl<F: Fn(f64) -> Option<f64>> CostFunction for Problem<'_, F> {
    type Param = f64;
    type Output = f64;

    fn cost(&self, at: &f64) -> Result<f64, Error> {
        let ends = [self.below.get(), self.above.get()];
        let known = ends.into_iter().find(|end| end.0.to_bits() == at.to_bits());
        let value = match known {
            Some((_, value)) => value,
            None => {
                self.calls.set(self.calls.get() + 1);
                (self.function)(*at).ok_or(NoValue)?
            }
        };
        if value <= 0.0 {
            self.below.set((*at, value));
        } else {
            self.above.set((*at, value));
        }
        if value.abs() < self.best.get().1.abs() {
            self.best.set((*at, value));
        }
        Ok(value)
    }
}

/// Looks for the root of `function` between two points of known value and opposite sign, to
/// within `tolerance` of the argument. `None` where the function has no value at a point that the
/// search needs, or the signs are not opposite.
pub(crate) fn root_between(
    ends: [(f64, f64); 2],
    tolerance: f64,
    most_calls: usize,
    function: impl Fn(f64) -> Option<f64>,
) -> Option<Found> {
    let [first, second] = ends;
    let opposite = (first.1 <= 0.0) != (second.1 <= 0.0);
    if !opposite {
        return None;
    }
    let (low, high) = if first.1 <= 0.0 {
        (first, second)
    } else {
        (second, first)
    };
    let nearer = if low.1.abs() < high.1.abs() {
        low
    } else {
        high
    };
    let (below, above) = (Cell::new(low), Cell::new(high));
    let (best, calls) = (Cell::new(nearer), Cell::new(0));
    let problem = Problem {
        function,
        below: &below,
        above: &above,
        best: &best,
        calls: &calls,
    };
    let solver = BrentRoot::new(first.0, second.0, tolerance);
    Executor::new(problem, solver)
        .configure(|state: IterState<f64, (), (), (), (), f64>| {
            state.max_iters(u64::try_from(most_calls).unwrap_or(u64::MAX))
        })
        .run()
        .ok()?;
    let (at, value) = best.get();
    let mut bracket = [below.get(), above.get()];
    bracket.sort_by(|a, b| a.0.total_cmp(&b.0));
    Some(Found {
        at,
        value,
        bracket,
        calls: calls.get(),
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The root of x^3 - 2x - 5, 2.094551481542327: Wallis's example, as in Brent, *Algorithms
    /// for Minimization without Derivatives*, 1973 (value from memory, checked by putting in).
    #[test]
    fn finds_the_root_of_wallis() {
        let function = |x: f64| Some(x * x * x - 2.0 * x - 5.0);
        let found = root_between([(2.0, -1.0), (3.0, 16.0)], 1e-13, 60, function).unwrap();
        assert!(
            (found.at - 2.094_551_481_542_327).abs() < 1e-12,
            "{found:?}"
        );
        assert!(found.calls < 15, "{found:?}");
    }

    #[test]
    fn a_jump_keeps_its_bracket() {
        let function = |x: f64| Some(if x < 0.3 { -1.0 } else { 2.0 });
        let found = root_between([(0.0, -1.0), (1.0, 2.0)], 1e-9, 60, function).unwrap();
        let [low, high] = found.bracket;
        assert!(
            low.0 < 0.3 && high.0 >= 0.3 && high.0 - low.0 < 1e-6,
            "{found:?}"
        );
        assert!(low.1 < 0.0 && high.1 > 0.0, "{found:?}");
    }

    #[test]
    fn no_value_and_no_bracket_are_said() {
        let ends = [(0.0, -1.0), (1.0, 2.0)];
        assert!(root_between(ends, 1e-9, 60, |_| None).is_none(), "no value");
        let ends = [(0.0, 1.0), (1.0, 2.0)];
        assert!(root_between(ends, 1e-9, 60, Some).is_none(), "no bracket");
    }
}
