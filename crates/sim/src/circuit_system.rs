//! A circuit on one straight piece of its inputs, as the solver sees it.

use helmsplit_model::{Circuit, InputSegment};

use crate::system::System;

/// A circuit with the inputs of one piece between two breakpoints. The solver never sees the
/// whole profiles: a step that ends on a breakpoint must see one side of it only (M10).
pub struct CircuitOnSegment<'a> {
    circuit: &'a Circuit,
    segment: InputSegment,
    scales: &'a [f64],
}

impl<'a> CircuitOnSegment<'a> {
    /// `scales` are the typical sizes of the circuit's states, as [`state_scales`] lists them.
    #[must_use]
    pub fn new(circuit: &'a Circuit, segment: InputSegment, scales: &'a [f64]) -> Self {
        Self {
            circuit,
            segment,
            scales,
        }
    }

    /// The inputs of this piece.
    #[must_use]
    pub fn segment(&self) -> &InputSegment {
        &self.segment
    }
}

/// Typical sizes of the states of a circuit, in the order of its states, SI.
#[must_use]
pub fn state_scales(circuit: &Circuit) -> Vec<f64> {
    circuit.states().iter().map(|state| state.scale).collect()
}

impl System for CircuitOnSegment<'_> {
    fn size(&self) -> usize {
        self.circuit.state_count()
    }

    fn scales(&self) -> &[f64] {
        self.scales
    }

    fn derivatives(&self, time: f64, y: &[f64], dy: &mut [f64]) {
        self.circuit.derivatives(&self.segment.at(time), y, dy);
    }

    fn jacobian(&self, time: f64, y: &[f64], column_major: &mut [f64]) {
        self.circuit
            .jacobian(&self.segment.at(time), y, column_major);
    }

    fn state_name(&self, index: usize) -> String {
        match self.circuit.states().get(index) {
            Some(state) => format!("{} ({})", state.label, state.name),
            None => format!("state {}", index + 1),
        }
    }
}
