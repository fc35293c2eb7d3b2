//! What a check gave.

use crate::check::{Check, Repeatability, Tolerance};

/// Deviations below this say nothing but rounding.
const ROUNDING_FLOOR: f64 = 1e-9;

/// Deviations below this differ from machine to machine when a solver chose the steps.
const SOLVER_FLOOR: f64 = 1e-5;

/// A check with what the engine gave.
pub struct Outcome {
    /// The check.
    pub check: Check,
    /// What the engine gave, in the check's unit.
    pub obtained: f64,
}

impl Outcome {
    /// Asks the engine.
    #[must_use]
    pub fn of(check: Check) -> Self {
        let obtained = check.obtained();
        Self { check, obtained }
    }

    /// Distance from the expected value in the measure of the tolerance: relative, or in the unit
    /// of the check.
    #[must_use]
    pub fn deviation(&self) -> f64 {
        let distance = (self.obtained - self.check.expected).abs();
        match self.check.tolerance {
            Tolerance::Relative(_) => distance / self.check.expected.abs(),
            Tolerance::Absolute(_) => distance,
        }
    }

    /// Whether the engine meets the expected value; never for something that is not a number.
    #[must_use]
    pub fn is_met(&self) -> bool {
        let (Tolerance::Relative(limit) | Tolerance::Absolute(limit)) = self.check.tolerance;
        self.deviation() <= limit
    }

    /// Deviation as a share of what is permitted.
    #[must_use]
    pub fn share_of_tolerance(&self) -> f64 {
        let (Tolerance::Relative(limit) | Tolerance::Absolute(limit)) = self.check.tolerance;
        self.deviation() / limit
    }

    /// Number of significant digits of the obtained value that every machine agrees on.
    #[must_use]
    pub fn digits(&self) -> usize {
        match self.check.repeats {
            Repeatability::Rounding => 6,
            Repeatability::Solver => 4,
        }
    }

    /// Below this share of the expected value a deviation is not printed.
    #[must_use]
    pub fn floor(&self) -> f64 {
        match self.check.repeats {
            Repeatability::Rounding => ROUNDING_FLOOR,
            Repeatability::Solver => SOLVER_FLOOR,
        }
    }
}
