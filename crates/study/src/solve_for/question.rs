//! What is asked.

use helmsplit_scenario::{ParameterId, Scenario};

use crate::figure::Figure;
use crate::parameter_scale::{ParameterScale, is_allowed, usual_range};

/// Values that a scan looks at.
const POINTS: usize = 25;

/// Which value of a parameter gives a figure its target?
#[derive(Debug, Clone, PartialEq)]
pub struct Question {
    /// The parameter.
    pub parameter: ParameterId,
    /// The figure.
    pub figure: Figure,
    /// Its target, SI.
    pub target: f64,
    /// Lower end of the range, SI.
    pub from: f64,
    /// Upper end of the range, SI.
    pub to: f64,
    /// Values that the scan looks at, at least 2. Roots closer together than two of them may be
    /// missed.
    pub points: usize,
}

/// Why a question cannot be asked.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum QuestionError {
    /// The scenario does not use the parameter.
    #[error("{path} is not used by this circuit: another choice is taken")]
    NotUsed {
        /// Path of the parameter.
        path: &'static str,
    },
    /// The range is empty or the wrong way round.
    #[error("the range of {path} is empty: its lower end must lie below its upper end")]
    EmptyRange {
        /// Path of the parameter.
        path: &'static str,
    },
    /// An end of the range is not allowed.
    #[error("the range of {path} goes beyond what is allowed; `helmsplit parameters` tells it")]
    NotAllowed {
        /// Path of the parameter.
        path: &'static str,
    },
    /// The target is no number.
    #[error("the target is not a finite number")]
    Target,
    /// Too few or too many values.
    #[error("a scan takes 2 to 1000 values, not {0}")]
    Points(usize),
}

impl Question {
    /// A question over the usual range of the parameter, with 25 values.
    #[must_use]
    pub fn new(parameter: ParameterId, figure: Figure, target: f64) -> Self {
        let (from, to) = usual_range(parameter);
        Self {
            parameter,
            figure,
            target,
            from,
            to,
            points: POINTS,
        }
    }

    /// Refuses what makes no sense for a scenario.
    ///
    /// # Errors
    /// [`QuestionError`] says what does not fit.
    pub fn check(&self, scenario: &Scenario) -> Result<(), QuestionError> {
        let path = self.parameter.parameter().path;
        if !scenario.uses(self.parameter) {
            return Err(QuestionError::NotUsed { path });
        }
        if !self.target.is_finite() {
            return Err(QuestionError::Target);
        }
        if !(is_allowed(self.parameter, self.from) && is_allowed(self.parameter, self.to)) {
            return Err(QuestionError::NotAllowed { path });
        }
        if self.from >= self.to {
            return Err(QuestionError::EmptyRange { path });
        }
        if !(2..=1000).contains(&self.points) {
            return Err(QuestionError::Points(self.points));
        }
        Ok(())
    }

    pub(crate) fn axis(&self) -> ParameterScale {
        ParameterScale::new(self.parameter, self.from, self.to)
    }
}
