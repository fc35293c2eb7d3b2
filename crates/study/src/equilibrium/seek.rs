//! The search for one equilibrium: guess, wait, guess again.

use helmsplit_model::{Circuit, InputSegment};
use helmsplit_sim::{
    CircuitOnSegment, Rest, SettleOptions, System, Watch, seek_rest, settle, state_scales,
};

use super::error::EquilibriumError;
use crate::error::StudyError;
use crate::operating::Frozen;

/// Where a search begins.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum SeekFrom<'a> {
    /// From below: no pressure, the spool sprung shut.
    Shut,
    /// From above: the spool wide open under pressure.
    Open,
    /// From a state, SI; without waiting if that is near enough.
    State(&'a [f64]),
}

/// Waits in turn, s: a lift or a motor may be slow to get going.
const WAITS: [f64; 2] = [3.0, 30.0];

/// A state of rest.
pub(super) struct Found {
    pub(super) state: Vec<f64>,
    pub(super) residual: f64,
    pub(super) iterations: usize,
    pub(super) waited: f64,
}

/// Searches from a state alone.
pub(super) fn near(frozen: &Frozen, guess: &[f64]) -> Result<Found, StudyError> {
    let circuit = frozen.circuit();
    let scales = state_scales(circuit);
    let system = CircuitOnSegment::new(circuit, InputSegment::frozen(*frozen.inputs()), &scales);
    let sought = seek_rest(&system, frozen.held(), guess)?;
    if sought.converged {
        return Ok(Found {
            state: sought.state,
            residual: sought.residual,
            iterations: sought.iterations,
            waited: 0.0,
        });
    }
    Err(EquilibriumError::NotFound {
        residual: sought.residual,
        fastest: system.state_name(sought.fastest),
        state: sought.state,
        waited: 0.0,
        iterations: sought.iterations,
    }
    .into())
}

/// Searches from a state if there is one, else waits from a side and searches from there.
pub(super) fn seek(frozen: &Frozen, from: SeekFrom<'_>) -> Result<Found, StudyError> {
    let start = match from {
        SeekFrom::Shut => frozen.shut(),
        SeekFrom::Open => frozen.open(),
        SeekFrom::State(state) => match near(frozen, state) {
            Ok(found) => return Ok(found),
            Err(StudyError::Equilibrium(_)) => state.to_vec(),
            Err(other) => return Err(other),
        },
    };
    let mut last = wait(frozen, frozen.calmed(), &start, WAITS[0]).and_then(|calm| {
        let found = near(frozen, &calm.state)?;
        Ok(Found {
            iterations: calm.iterations + found.iterations,
            waited: calm.waited,
            ..found
        })
    });
    // What the calmed spool does not settle, the real one may, and then a longer wait.
    if !matches!(last, Ok(_) | Err(StudyError::Sim(_))) {
        last = wait(frozen, frozen.circuit(), &start, WAITS[0]);
    }
    if !matches!(last, Ok(_) | Err(StudyError::Sim(_))) {
        last = wait(frozen, frozen.circuit(), &start, WAITS[1]);
    }
    if let (Err(StudyError::Equilibrium(_)), SeekFrom::State(_)) = (&last, from) {
        return seek(frozen, SeekFrom::Shut);
    }
    last
}

/// Waits up to `longest` (s) for `circuit` to come to rest from `start`.
fn wait(
    frozen: &Frozen,
    circuit: &Circuit,
    start: &[f64],
    longest: f64,
) -> Result<Found, StudyError> {
    let scales = state_scales(circuit);
    let system = CircuitOnSegment::new(circuit, InputSegment::frozen(*frozen.inputs()), &scales);
    let options = SettleOptions {
        wait: longest,
        ..SettleOptions::default()
    };
    let settled = settle(
        &system,
        frozen.held(),
        start,
        None,
        &options,
        &mut Watch::none(),
    )?;
    if settled.rest == Rest::NotAtRest {
        let sought = seek_rest(&system, frozen.held(), &settled.state)?;
        return Err(EquilibriumError::NotFound {
            residual: settled.residual,
            fastest: system.state_name(sought.fastest),
            state: settled.state,
            waited: settled.waited,
            iterations: settled.iterations,
        }
        .into());
    }
    Ok(Found {
        state: settled.state,
        residual: settled.residual,
        iterations: settled.iterations,
        waited: settled.waited,
    })
}
