//! How a run ended.

use serde::Serialize;

/// How a run ended. The trace holds everything up to there in each case.
#[derive(Debug, Clone, PartialEq, Serialize)]
#[serde(rename_all = "snake_case", tag = "kind")]
pub enum RunEnd {
    /// The run reached its end time.
    Finished,
    /// The user stopped it.
    Cancelled {
        /// Time reached, s.
        time: f64,
    },
    /// The solver could not go on.
    GaveUp {
        /// Time reached, s.
        time: f64,
        /// The state that fails, in words.
        state: String,
        /// Why.
        reason: GiveUp,
    },
}

impl RunEnd {
    /// Whether the run reached its end time.
    #[must_use]
    pub fn is_finished(&self) -> bool {
        matches!(self, Self::Finished)
    }
}

impl std::fmt::Display for RunEnd {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            Self::Finished => write!(f, "finished"),
            Self::Cancelled { time } => write!(f, "cancelled at {time:.6} s"),
            Self::GaveUp {
                time,
                state,
                reason,
            } => write!(
                f,
                "the solver gave up at {time:.9} s in \"{state}\": {reason}"
            ),
        }
    }
}

/// Why the solver could not go on.
#[derive(Debug, Clone, PartialEq, Serialize, thiserror::Error)]
#[serde(rename_all = "snake_case", tag = "reason")]
pub enum GiveUp {
    /// The equations gave infinity or not a number.
    #[error("its rate of change is not a finite number")]
    NotFinite,
    /// The step limit is used up.
    #[error("{steps} steps are used up")]
    TooManySteps {
        /// Steps taken.
        steps: usize,
    },
    /// The run hardly advances any more.
    #[error("the last {steps} steps together advanced only {advance:.3e} s")]
    Crawl {
        /// Steps looked at.
        steps: usize,
        /// Time they covered, s.
        advance: f64,
    },
    /// The step had to be made shorter than the shortest allowed.
    #[error("the step would have to be shorter than {min_step:.1e} s")]
    StepTooSmall {
        /// The limit, s.
        min_step: f64,
    },
    /// Newton's iteration failed again and again within one step.
    #[error("the equations of one step were not solved in {failures} attempts")]
    Newton {
        /// Failures within the step.
        failures: usize,
    },
    /// The error test failed again and again within one step.
    #[error("no step was accurate enough in {failures} attempts")]
    Accuracy {
        /// Failures within the step.
        failures: usize,
    },
    /// Anything else the solver reports.
    #[error("{message}")]
    Solver {
        /// The solver's words.
        message: String,
    },
}
