//! Why an operating point does not fit its circuit.

use helmsplit_scenario::{Finding, Findings};

/// Why an operating point does not fit its circuit.
#[derive(Debug, thiserror::Error)]
pub enum PointError {
    /// The scenario is no circuit with the values of the point; every finding is listed.
    #[error("the circuit cannot be built at this operating point:\n{0}")]
    Scenario(Findings),
    /// A setting of the point is refused by the table of parameters.
    #[error("{0}")]
    Setting(Box<Finding>),
    /// The point asks the steering side for what it cannot do.
    #[error("the operating point wants {wanted}, but the steering side is a {has}")]
    Steering {
        /// What the point wants.
        wanted: &'static str,
        /// What the circuit has.
        has: &'static str,
    },
    /// A variable does not exist in this circuit.
    #[error("{variable} cannot be varied here: {reason}")]
    NoSuchVariable {
        /// The variable.
        variable: String,
        /// Why, and what would do.
        reason: &'static str,
    },
    /// A value of the point is outside of what is possible.
    #[error("{what} is {value}; allowed: {allowed}")]
    Value {
        /// Which value.
        what: &'static str,
        /// The value, SI.
        value: f64,
        /// Range in words.
        allowed: &'static str,
    },
}

impl From<Finding> for PointError {
    fn from(finding: Finding) -> Self {
        Self::Setting(Box::new(finding))
    }
}
