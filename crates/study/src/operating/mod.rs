//! Where a circuit is looked at: the operating point, what varies it, and the circuit made ready
//! for linear analysis there.

mod error;
mod frozen;
mod point;
mod variable;

pub use error::PointError;
pub use frozen::{Frozen, LeftOut};
pub use point::{ExcessDuty, OperatingPoint, SteeringDuty};
pub use variable::{Variable, VariableName};
