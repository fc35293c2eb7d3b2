//! Oscillatory modes of a circuit at rest, from the eigenvalues of its exact Jacobian
//! (docs/model.md, M11).

use std::f64::consts::TAU;

use nalgebra::DMatrix;
use nalgebra::linalg::balancing::balance_parlett_reinsch;

use crate::rig::AtRest;

/// Slower than this (rad/s) is no oscillation but rounding in a pair of real eigenvalues.
const SLOWEST: f64 = 1.0;

/// One oscillatory mode.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Mode {
    /// Frequency of the undamped mode, Hz.
    pub frequency: f64,
    /// Damping ratio; negative when it grows.
    pub damping: f64,
}

/// The oscillatory modes, least damped first. The dry friction of the circuit must be 0: its
/// slope at rest is a damper that is not there in motion.
#[must_use]
pub fn modes(rest: &AtRest) -> Vec<Mode> {
    let n = rest.circuit.state_count();
    let mut entries = vec![0.0; n * n];
    rest.circuit
        .jacobian(&rest.inputs, &rest.state, &mut entries);
    let mut matrix = DMatrix::from_vec(n, n, entries);
    // Pascals beside metres: without balance the eigenvalues are wrong.
    let _scales = balance_parlett_reinsch(&mut matrix);
    let mut modes: Vec<Mode> = matrix
        .complex_eigenvalues()
        .iter()
        .filter(|root| root.im > SLOWEST)
        .map(|root| Mode {
            frequency: root.norm() / TAU,
            damping: -root.re / root.norm(),
        })
        .collect();
    modes.sort_by(|a, b| a.damping.total_cmp(&b.damping));
    modes
}
