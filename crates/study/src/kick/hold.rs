//! A circuit under steady inputs with some states held.

use helmsplit_model::{Circuit, Inputs};
use helmsplit_sim::System;

/// What the solver integrates in a kick test.
pub(super) struct HeldCircuit<'a> {
    pub(super) circuit: &'a Circuit,
    pub(super) inputs: Inputs,
    pub(super) held: &'a [usize],
    pub(super) scales: &'a [f64],
}

impl System for HeldCircuit<'_> {
    fn size(&self) -> usize {
        self.circuit.state_count()
    }

    fn scales(&self) -> &[f64] {
        self.scales
    }

    fn derivatives(&self, _time: f64, y: &[f64], dy: &mut [f64]) {
        self.circuit.derivatives(&self.inputs, y, dy);
        for &row in self.held {
            dy[row] = 0.0;
        }
    }

    fn jacobian(&self, _time: f64, y: &[f64], column_major: &mut [f64]) {
        self.circuit.jacobian(&self.inputs, y, column_major);
        let size = self.size();
        for &row in self.held {
            for column in 0..size {
                column_major[column * size + row] = 0.0;
            }
        }
    }

    fn state_name(&self, index: usize) -> String {
        let state = &self.circuit.states()[index];
        format!("{} ({})", state.label, state.name)
    }
}
