//! What can go wrong before there is a result.

use helmsplit_scenario::Findings;
use helmsplit_sim::SimError;

use crate::equilibrium::EquilibriumError;
use crate::modes::ModesError;
use crate::operating::PointError;

/// Why a scenario was not solved or a study gives no result.
#[derive(Debug, thiserror::Error)]
pub enum StudyError {
    /// The scenario is no circuit; every finding is listed.
    #[error("the circuit cannot be built:\n{0}")]
    Scenario(Findings),
    /// The scenario starts from a saved state, and none was handed over.
    #[error("the circuit starts from a saved state, and the state was not read")]
    StateNotGiven,
    /// A value of a sizing's demand cannot be used.
    #[error("{name}: {value} (SI) cannot be used; {allowed}")]
    Demand {
        /// Which value.
        name: &'static str,
        /// What was given, SI.
        value: f64,
        /// What is accepted.
        allowed: &'static str,
    },
    /// The solver refused the task.
    #[error(transparent)]
    Sim(#[from] SimError),
    /// The operating point does not fit the circuit.
    #[error(transparent)]
    Point(#[from] PointError),
    /// The circuit does not come to rest.
    #[error(transparent)]
    Equilibrium(#[from] EquilibriumError),
    /// The modes of an equilibrium do not come out.
    #[error(transparent)]
    Modes(#[from] ModesError),
}
