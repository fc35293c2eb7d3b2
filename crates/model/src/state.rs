//! The states of a circuit: names, quantities, typical sizes.

use crate::quantity::Quantity;

/// One state: what the solver integrates.
#[derive(Debug, Clone, PartialEq)]
pub struct StateInfo {
    /// Short name, unique in the circuit, as in docs/model.md: `p_in`, `x`.
    pub name: String,
    /// What a person calls it: "inlet pressure".
    pub label: String,
    /// Its kind of quantity.
    pub quantity: Quantity,
    /// Typical size, SI: absolute tolerances and errors are measured against it.
    pub scale: f64,
}
