//! Slopes of what is read: states and signals over states and inputs.

use helmsplit_model::{Inputs, MOST_STATES, Quantity, Readings, Signal};

use super::excitation::{Excitation, around};
use crate::equilibrium::Equilibrium;
use crate::error::StudyError;
use crate::modes::Linear;

/// Step of the differences that give the slopes of signals, in typical sizes of the states: far
/// above rounding, far below where anything bends.
const STEP: f64 = 1e-7;

/// Something that is read: a state or a signal.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Output {
    pub(super) name: String,
    pub(super) label: String,
    pub(super) quantity: Quantity,
    /// Slope over each free state of the linear equations, in balanced units.
    pub(super) row: Vec<f64>,
    /// Slope over the excitation itself.
    pub(super) direct: f64,
}

/// The column of the excitation in balanced units: what it adds to the rates of the free states.
pub(super) fn column(
    equilibrium: &Equilibrium,
    linear: &Linear,
    excitation: Excitation,
) -> Result<Vec<f64>, StudyError> {
    let circuit = equilibrium.circuit();
    let n = circuit.state_count();
    let mut slopes = vec![0.0; n];
    match excitation.input(equilibrium)? {
        None => {
            // What the pump adds goes into the inlet volume.
            if let Some(at) = circuit.state_index("p_in") {
                let parts = circuit.parts();
                let rate = |flow: f64| {
                    parts
                        .valve
                        .inlet
                        .pressure_rate(&parts.oil, equilibrium.state[at], flow)
                };
                slopes[at] = rate(1.0) - rate(0.0);
            }
        }
        Some(input) => {
            let (under, over, distance) = around(equilibrium.inputs(), input);
            let (mut low, mut high) = ([0.0; MOST_STATES], [0.0; MOST_STATES]);
            circuit.derivatives(&under, &equilibrium.state, &mut low[..n]);
            circuit.derivatives(&over, &equilibrium.state, &mut high[..n]);
            for (slope, (low, high)) in slopes.iter_mut().zip(low.iter().zip(&high)) {
                *slope = (high - low) / distance;
            }
        }
    }
    Ok(linear
        .free
        .iter()
        .zip(&linear.units)
        .map(|(&state, unit)| slopes[state] / unit)
        .collect())
}

/// The output of a short name, with its slopes. `None` where the circuit has no such state or
/// signal, or the state is held.
pub(super) fn output(
    equilibrium: &Equilibrium,
    linear: &Linear,
    excitation: Excitation,
    name: &str,
) -> Result<Option<Output>, StudyError> {
    let circuit = equilibrium.circuit();
    if let Some(at) = circuit.state_index(name) {
        let Some(place) = linear.free.iter().position(|&state| state == at) else {
            return Ok(None);
        };
        let info = &circuit.states()[at];
        let mut row = vec![0.0; linear.free.len()];
        row[place] = linear.units[place];
        return Ok(Some(Output {
            name: info.name.clone(),
            label: info.label.clone(),
            quantity: info.quantity,
            row,
            direct: 0.0,
        }));
    }
    let known = circuit.signals().iter().find(|s| s.name() == name);
    let Some(&signal) = known else {
        return Ok(None);
    };
    let read = |inputs: &Inputs, state: &[f64], readings: &mut Readings| {
        circuit.observe(inputs, state, readings);
        readings.get(signal)
    };
    let mut readings = Readings::default();
    let mut state = equilibrium.state.clone();
    let mut row = Vec::with_capacity(linear.free.len());
    for (&at, unit) in linear.free.iter().zip(&linear.units) {
        let step = STEP * circuit.states()[at].scale;
        let value = state[at];
        state[at] = value + step;
        let above = read(equilibrium.inputs(), &state, &mut readings);
        state[at] = value - step;
        let below = read(equilibrium.inputs(), &state, &mut readings);
        state[at] = value;
        row.push((above - below) / (2.0 * step) * unit);
    }
    let direct = match excitation.input(equilibrium)? {
        // What is added is part of the pump's flow.
        None => f64::from(u8::from(signal == Signal::PumpFlow)),
        Some(input) => {
            let (under, over, distance) = around(equilibrium.inputs(), input);
            let above = read(&over, &state, &mut readings);
            let below = read(&under, &state, &mut readings);
            (above - below) / distance
        }
    };
    Ok(Some(Output {
        name: signal.name().to_owned(),
        label: signal.label().to_owned(),
        quantity: signal.quantity(),
        row,
        direct,
    }))
}
