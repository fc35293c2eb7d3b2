//! Why there are no modes to report.

/// Why the modes of an equilibrium do not come out.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum ModesError {
    /// A rate of change has no finite slope there.
    #[error("the Jacobian of \"{state}\" is not a finite number")]
    NotFinite {
        /// The state, in words.
        state: String,
    },
    /// The iteration for the eigenvalues did not converge.
    #[error("the eigenvalues of {size} states do not converge")]
    NoConvergence {
        /// Number of states.
        size: usize,
    },
    /// A sweep has fewer than two values, or one that is not a finite number.
    #[error("a sweep needs at least two finite values, each larger than the one before")]
    Sweep,
    /// There is no border between the ends.
    #[error(
        "no border of {variable} between {from} and {to}: the least damping ratio is {damping_from:.4} \
         at one end and {damping_to:.4} at the other"
    )]
    NoBorder {
        /// The variable.
        variable: String,
        /// One end, SI.
        from: f64,
        /// The other end, SI.
        to: f64,
        /// Least damping ratio at one end.
        damping_from: f64,
        /// Least damping ratio at the other end.
        damping_to: f64,
    },
    /// The search of the border failed.
    #[error("the border of {variable} was not found: {message}")]
    Search {
        /// The variable.
        variable: String,
        /// What the search said.
        message: String,
    },
}
