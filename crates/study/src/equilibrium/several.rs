//! All equilibria that can be met from both sides.

use helmsplit_scenario::Scenario;
use helmsplit_sim::state_scales;

use super::{Equilibrium, SeekFrom};
use crate::error::StudyError;
use crate::operating::{Frozen, OperatingPoint};

/// Two equilibria this near in every state, in sizes of the states, are one.
const ONE: f64 = 1e-3;

/// States that do not tell equilibria apart: pressure trapped in a shut cylinder, and what moves
/// on, is what a manoeuvre has left there.
const TRAPPED: [&str; 6] = ["p_A", "p_B", "y_c", "z_t", "p_cap", "p_rod"];

/// Every equilibrium of `scenario` at `point` that the search meets: from below (spool sprung
/// shut, no pressure), from above (spool wide open, high pressure), and, where these differ,
/// between them (that one is usually unstable). The first is the one from below, if there is one.
///
/// # Errors
/// As [`crate::equilibrium`]; an error only if neither side comes to rest.
pub fn equilibria(
    scenario: &Scenario,
    point: &OperatingPoint,
) -> Result<Vec<Equilibrium>, StudyError> {
    let frozen = Frozen::new(scenario, point)?;
    let below = Equilibrium::of(frozen.clone(), point, SeekFrom::Shut);
    let above = Equilibrium::of(frozen.clone(), point, SeekFrom::Open);
    let (below, above) = match (below, above) {
        (Ok(below), Ok(above)) => (below, above),
        (Ok(one), Err(_)) | (Err(_), Ok(one)) => return Ok(vec![one]),
        (Err(error), Err(_)) => return Err(error),
    };
    if below.is_same(&above) {
        return Ok(vec![below]);
    }
    let middle: Vec<f64> = below
        .state
        .iter()
        .zip(&above.state)
        .map(|(a, b)| 0.5 * (a + b))
        .collect();
    let between = Equilibrium::near(frozen, point, &middle)
        .ok()
        .filter(|found| !found.is_same(&below) && !found.is_same(&above));
    let mut all = vec![below];
    all.extend(between);
    all.push(above);
    Ok(all)
}

impl Equilibrium {
    /// Whether another equilibrium of the same circuit is the same one: every state agrees, but
    /// for pressure trapped in a shut cylinder.
    #[must_use]
    pub fn is_same(&self, other: &Self) -> bool {
        self.is_at(&other.state)
    }

    /// Whether a state of rest of the same circuit is this one.
    pub(crate) fn is_at(&self, state: &[f64]) -> bool {
        let circuit = self.circuit();
        let scales = state_scales(circuit);
        circuit
            .states()
            .iter()
            .enumerate()
            .filter(|(at, info)| {
                !self.held().contains(at) && !TRAPPED.contains(&info.name.as_str())
            })
            .all(|(at, _)| ((self.state[at] - state[at]) / scales[at]).abs() < ONE)
    }
}
