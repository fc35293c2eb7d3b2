//! States kept for a later run.

use std::path::Path;

use helmsplit_model::Circuit;
use helmsplit_scenario::write::save_atomically;
use serde::{Deserialize, Serialize};

use crate::error::SimError;
use crate::run::{RunResult, Start};

/// Largest file of a saved state: some hundred states with names take a few kilobytes.
const MOST_BYTES: u64 = 1 << 20;

/// The state of a circuit at one moment, each value (SI) with the name of its state, so that it
/// fits any circuit with the same states.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct SavedState {
    /// The time in its run, s.
    pub time_s: f64,
    /// Names and values, SI.
    pub states: Vec<(String, f64)>,
}

impl SavedState {
    /// The state that a run of `circuit` ended in.
    #[must_use]
    pub fn at_end_of(result: &RunResult, circuit: &Circuit) -> Self {
        let names = circuit.states().iter().map(|state| state.name.clone());
        Self {
            time_s: result.final_time,
            states: names.zip(result.final_state.iter().copied()).collect(),
        }
    }

    /// The start of a run of `circuit` in this state.
    ///
    /// # Errors
    /// [`SimError::SavedStateLacks`] names a state that is not saved; a saved one that the circuit
    /// does not have is [`SimError::UnknownColumn`].
    pub fn start(&self, circuit: &Circuit) -> Result<Start, SimError> {
        for (name, _) in &self.states {
            if circuit.state_index(name).is_none() {
                return Err(SimError::UnknownColumn { name: name.clone() });
            }
        }
        let value = |name: &str| self.states.iter().find(|(saved, _)| saved == name);
        let states = circuit.states().iter();
        let values = states.map(|state| match value(&state.name) {
            Some(&(_, value)) => Ok(value),
            None => Err(SimError::SavedStateLacks {
                state: state.name.clone(),
            }),
        });
        Ok(Start::From(values.collect::<Result<_, _>>()?))
    }

    /// Reads a saved state.
    ///
    /// # Errors
    /// [`SimError::Read`] if there is no such file, [`SimError::NoSavedState`] if it holds
    /// something else.
    pub fn read(path: &Path) -> Result<Self, SimError> {
        let unreadable = |source| SimError::Read {
            path: path.to_owned(),
            source,
        };
        let bytes = std::fs::metadata(path).map_err(unreadable)?.len();
        if bytes > MOST_BYTES {
            return Err(SimError::NoSavedState {
                path: path.to_owned(),
                message: format!("{bytes} bytes are too many for a saved state"),
            });
        }
        let text = std::fs::read_to_string(path).map_err(unreadable)?;
        serde_json::from_str(&text).map_err(|error| SimError::NoSavedState {
            path: path.to_owned(),
            message: error.to_string(),
        })
    }

    /// Writes it as JSON. The file appears whole or not at all.
    ///
    /// # Errors
    /// [`SimError::Write`] names the file and what the system said.
    pub fn write(&self, path: &Path) -> Result<(), SimError> {
        let mut text =
            serde_json::to_string_pretty(self).map_err(|error| SimError::Format(error.into()))?;
        text.push('\n');
        Ok(save_atomically(path, &text)?)
    }
}
