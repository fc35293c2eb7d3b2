//! Sizing: from what the machine asks of its steering to the dimensions of the circuit, step by
//! step, each with its formula.
//!
//! The formulas are those that a designer works by hand: one part at a time, turbulent orifices,
//! a stiff priority side. [`verify`] then asks the full model and sets both side by side: what the
//! hand formulas leave out shows there.

mod adopt;
mod damping;
mod demand;
#[cfg(test)]
mod evaluator;
mod land;
mod lines;
mod reliefs;
mod sheet;
mod sizes;
mod step;
mod supply;
#[cfg(test)]
mod tests;
mod valve;
mod verify;
mod wheel;

use helmsplit_scenario::Scenario;

pub use adopt::{Change, adopt};
pub use demand::{Demand, Load, Scrub};
pub use sizes::{Offer, Series};
pub use step::{Step, Term};
pub use verify::{Comparison, verify};

use crate::error::StudyError;
use sheet::Sheet;

/// A sizing: every step in order, and what should be known about the whole.
#[derive(Debug, Clone, PartialEq)]
pub struct Sizing {
    /// The demand that it answers.
    pub demand: Demand,
    /// Its steps; each uses only what stands before it.
    pub steps: Vec<Step>,
    /// What did not come out as it should.
    pub warnings: Vec<String>,
}

impl Sizing {
    /// A step by its id.
    #[must_use]
    pub fn step(&self, id: &str) -> Option<&Step> {
        self.steps.iter().find(|step| step.id == id)
    }
}

/// Sizes a circuit for a demand. What the demand does not name is taken from the scenario: oil,
/// cylinder, spool, speeds, volumes, line.
///
/// # Errors
/// [`StudyError::Demand`] if a value of the demand cannot be used; [`StudyError::Scenario`] if
/// the scenario has no oil.
pub fn size(scenario: &Scenario, demand: &Demand) -> Result<Sizing, StudyError> {
    let mut sheet = Sheet::new(scenario, demand)?;
    let wheel = wheel::steps(&mut sheet);
    let supply = supply::steps(&mut sheet, &wheel);
    let sized = valve::steps(&mut sheet, &wheel, &supply);
    damping::steps(&mut sheet, &supply, &sized);
    reliefs::steps(&mut sheet, &wheel, &supply);
    lines::steps(&mut sheet, &wheel, &supply);
    Ok(sheet.finish())
}
