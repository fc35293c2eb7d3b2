//! What can go wrong before or beside a run. A run that the solver gives up is not an error but
//! an ending: see [`crate::RunEnd`].

use std::path::PathBuf;

use helmsplit_scenario::FileError;

/// Why a run could not start or its result could not be written.
#[derive(Debug, thiserror::Error)]
pub enum SimError {
    /// The start state does not fit the circuit.
    #[error("the start state has {got} values, the circuit has {expected} states")]
    StartLength {
        /// States of the circuit.
        expected: usize,
        /// Values given.
        got: usize,
    },
    /// A value of the start state is not a finite number.
    #[error("the start state of \"{state}\" is {value}, not a finite number")]
    StartNotFinite {
        /// Name of the state.
        state: String,
        /// The value.
        value: f64,
    },
    /// The run ends before it starts.
    #[error("a run from {start} s to {end} s has no duration")]
    Span {
        /// Start time, s.
        start: f64,
        /// End time, s.
        end: f64,
    },
    /// A solver option is outside its range.
    #[error("solver option {option} is {value}; allowed: {allowed}")]
    Option {
        /// Name of the option.
        option: &'static str,
        /// The value.
        value: f64,
        /// Range in words.
        allowed: &'static str,
    },
    /// The circuit has no such state or signal.
    #[error("the circuit has no state or signal named \"{name}\"")]
    UnknownColumn {
        /// The name asked for.
        name: String,
    },
    /// A saved state does not hold every state of the circuit.
    #[error("the saved state has no value for \"{state}\"")]
    SavedStateLacks {
        /// Name of the state.
        state: String,
    },
    /// A file could not be read.
    #[error("cannot read {}: {source}", path.display())]
    Read {
        /// The file.
        path: PathBuf,
        /// What the system said.
        source: std::io::Error,
    },
    /// A file is not a saved state.
    #[error("{} is not a saved state: {message}", path.display())]
    NoSavedState {
        /// The file.
        path: PathBuf,
        /// What is wrong.
        message: String,
    },
    /// The solver refused the problem as posed.
    #[error("the solver refused the problem: {0}")]
    Setup(String),
    /// A result could not be put into the format of its file.
    #[error("a result does not fit its file: {0}")]
    Format(#[source] std::io::Error),
    /// A result file could not be written.
    #[error(transparent)]
    Write(#[from] FileError),
}
