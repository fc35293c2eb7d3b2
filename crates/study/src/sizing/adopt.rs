//! From a sizing to the circuit.

use helmsplit_scenario::parameter::ratings;
use helmsplit_scenario::{Finding, ParameterId, Scenario};

use super::Sizing;

/// A parameter that a study would change.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Change {
    /// The parameter.
    pub id: ParameterId,
    /// Its value before, SI.
    pub from: f64,
    /// Its value after, SI.
    pub to: f64,
}

impl Sizing {
    /// What the sizing would change in a scenario, in the order of the steps; parameters that the
    /// scenario does not use are left out, and so is what stays the same.
    #[must_use]
    pub fn changes(&self, scenario: &Scenario) -> Vec<Change> {
        let demanded = (ratings::WHEEL_RATE, self.demand.idle_wheel_rate);
        let sized = self
            .steps
            .iter()
            .filter_map(|step| Some((step.writes?, step.chosen)));
        std::iter::once(demanded)
            .chain(sized)
            .filter(|&(id, _)| scenario.uses(id))
            .map(|(id, to)| {
                let from = scenario.si(id);
                Change { id, from, to }
            })
            .filter(|change| change.from.to_bits() != change.to.to_bits())
            .collect()
    }
}

/// Writes all changes at once: either every one is made, or none.
///
/// # Errors
/// A finding when a value is not allowed.
pub fn adopt(scenario: &mut Scenario, changes: &[Change]) -> Result<(), Box<Finding>> {
    let mut changed = scenario.clone();
    for change in changes {
        changed.set_si(change.id, change.to).map_err(Box::new)?;
    }
    *scenario = changed;
    Ok(())
}
