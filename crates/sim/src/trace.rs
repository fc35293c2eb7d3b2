//! The trace of a run: every state and signal over time.

use helmsplit_model::{Circuit, Quantity, Signal};

use crate::error::SimError;
use crate::extremes::{Extreme, Extremes};
use crate::table::{Column, Table};

/// What a column of a trace holds.
#[derive(Debug, Clone, PartialEq)]
pub struct ColumnInfo {
    /// Short unique name: `p_in`, `q_pump`.
    pub name: String,
    /// What a person calls it.
    pub label: String,
    /// Its kind of quantity.
    pub quantity: Quantity,
    /// The signal, if it is one; else it is a state.
    pub signal: Option<Signal>,
}

/// All states and signals of one run, SI: on the solver's own steps, on a uniform grid if one was
/// asked for, and their least and largest values over the solver's steps.
#[derive(Debug, Clone, PartialEq)]
pub struct Trace {
    columns: Vec<ColumnInfo>,
    steps: Table,
    grid: Option<Table>,
    extremes: Extremes,
}

/// The columns of a circuit's trace: its states, then its signals.
pub(crate) fn columns_of(circuit: &Circuit) -> Vec<ColumnInfo> {
    let states = circuit.states().iter().map(|state| ColumnInfo {
        name: state.name.clone(),
        label: state.label.clone(),
        quantity: state.quantity,
        signal: None,
    });
    let signals = circuit.signals().iter().map(|&signal| ColumnInfo {
        name: signal.name().to_owned(),
        label: signal.label().to_owned(),
        quantity: signal.quantity(),
        signal: Some(signal),
    });
    states.chain(signals).collect()
}

impl Trace {
    pub(crate) fn new(
        columns: Vec<ColumnInfo>,
        steps: Table,
        grid: Option<Table>,
        extremes: Extremes,
    ) -> Self {
        Self {
            columns,
            steps,
            grid,
            extremes,
        }
    }

    /// What each column holds: the states of the circuit in its order, then its signals.
    #[must_use]
    pub fn columns(&self) -> &[ColumnInfo] {
        &self.columns
    }

    /// The solver's own steps; where an input jumps, the time stands twice, before and after.
    /// Empty if the run was told not to keep them.
    #[must_use]
    pub fn steps(&self) -> &Table {
        &self.steps
    }

    /// The uniform output grid, if one was asked for. Its rows come from the solver's interpolant
    /// and never influence the solver.
    #[must_use]
    pub fn grid(&self) -> Option<&Table> {
        self.grid.as_ref()
    }

    /// Position of a state or signal by its short name.
    #[must_use]
    pub fn position(&self, name: &str) -> Option<usize> {
        self.columns.iter().position(|column| column.name == name)
    }

    /// Position of a signal; `None` if the circuit has no such part.
    #[must_use]
    pub fn signal_position(&self, signal: Signal) -> Option<usize> {
        self.columns
            .iter()
            .position(|column| column.signal == Some(signal))
    }

    /// A state or signal by its short name, on the solver's steps.
    ///
    /// # Errors
    /// [`SimError::UnknownColumn`] if the circuit has no such state or signal.
    pub fn named(&self, name: &str) -> Result<Column<'_>, SimError> {
        match self.position(name) {
            Some(position) => Ok(self.steps.column(position)),
            None => Err(SimError::UnknownColumn {
                name: name.to_owned(),
            }),
        }
    }

    /// A signal, on the solver's steps; `None` if the circuit has no such part.
    #[must_use]
    pub fn signal(&self, signal: Signal) -> Option<Column<'_>> {
        let position = self.signal_position(signal)?;
        Some(self.steps.column(position))
    }

    /// Least and largest value of the column at `position` over the solver's steps, with their
    /// times. `None` before the first row.
    ///
    /// # Panics
    /// If there is no such column.
    #[must_use]
    pub fn extreme(&self, position: usize) -> Option<Extreme> {
        self.extremes.get(position)
    }
}
