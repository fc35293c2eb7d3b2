//! What a run cost.

use serde::Serialize;

/// Counts of one run: the same for the same input, whatever the machine is doing. The time it
/// took is kept apart from it.
#[derive(Debug, Clone, Default, PartialEq, Eq, Serialize)]
pub struct Statistics {
    /// Accepted steps.
    pub steps: usize,
    /// Steps rejected because they were not accurate enough.
    pub rejected_accuracy: usize,
    /// Attempts given up because Newton's iteration did not converge.
    pub rejected_newton: usize,
    /// Newton iterations.
    pub newton_iterations: usize,
    /// Evaluations of the right-hand side by the solver.
    pub rhs_calls: u64,
    /// Evaluations of the Jacobian.
    pub jacobian_calls: u64,
    /// Factorisations of the iteration matrix.
    pub factorisations: usize,
    /// Starts at order 1: the start of the run and each jump of an input.
    pub starts: usize,
    /// Accepted steps by order of the method, from order 1.
    pub steps_by_order: [usize; 5],
}
