//! What can go wrong before there is a result.

use helmsplit_scenario::Findings;
use helmsplit_sim::SimError;

/// Why a scenario was not solved.
#[derive(Debug, thiserror::Error)]
pub enum StudyError {
    /// The scenario is no circuit; every finding is listed.
    #[error("the circuit cannot be built:\n{0}")]
    Scenario(Findings),
    /// The scenario starts from a saved state, and none was handed over.
    #[error("the circuit starts from a saved state, and the state was not read")]
    StateNotGiven,
    /// The solver refused the task.
    #[error(transparent)]
    Sim(#[from] SimError),
}
