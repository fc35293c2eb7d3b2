//! Why there is no equilibrium to report.

/// Why no equilibrium was found.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum EquilibriumError {
    /// The search did not converge.
    #[error(
        "no equilibrium found: after {waited:.1} s of waiting and {iterations} iterations \"{fastest}\" \
         still changes by {residual:.1e} of its size per second"
    )]
    NotFound {
        /// Largest rate of change of a state relative to its typical size where the search ended,
        /// 1/s.
        residual: f64,
        /// The state that changes fastest, in words.
        fastest: String,
        /// The state reached, SI.
        state: Vec<f64>,
        /// Time waited for motion to die out, s.
        waited: f64,
        /// Iterations of all searches.
        iterations: usize,
    },
}
