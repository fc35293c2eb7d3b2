//! Where the ripple of the pump falls, and how far it is from what it could shake.

use std::f64::consts::TAU;

use helmsplit_scenario::Scenario;
use serde::Serialize;

use crate::equilibrium::Equilibrium;
use crate::error::StudyError;
use crate::modes::Stability;
use crate::operating::PointError;

/// Harmonics of the ripple that are looked at: those above carry little (the arcs of a gear pump
/// have a quarter and a ninth of the first).
const HARMONICS: u32 = 2;

/// A mode with a damping ratio below this is lightly damped: at its frequency it answers more than
/// twice as much as to a steady push (`1 / (2 damping)`, Den Hartog, *Mechanical Vibrations*).
pub const LIGHT: f64 = 0.25;

/// Band that one harmonic of the ripple covers over the speed range.
#[derive(Debug, Clone, Copy, PartialEq, Serialize)]
pub struct RippleBand {
    /// Harmonic, from 1.
    pub harmonic: u32,
    /// Frequency at low idle, Hz.
    pub low: f64,
    /// Frequency at governed speed, Hz.
    pub high: f64,
}

/// The bands of the ripple from low idle to governed speed; none where the circuit states no
/// ripple (`pump.ripple`).
///
/// # Errors
/// [`StudyError::Point`] if the scenario is no circuit.
pub fn ripple_bands(scenario: &Scenario) -> Result<Vec<RippleBand>, StudyError> {
    let strokes = strokes(scenario)?;
    let ratings = scenario.ratings();
    let at = |speed: f64, harmonic: u32| f64::from(harmonic) * strokes * speed / TAU;
    if strokes <= 0.0 {
        return Ok(Vec::new());
    }
    Ok((1..=HARMONICS)
        .map(|harmonic| RippleBand {
            harmonic,
            low: at(ratings.low_idle_speed, harmonic),
            high: at(ratings.top_speed, harmonic),
        })
        .collect())
}

/// Strokes of delivery in one revolution of the scenario's pump; 0 without ripple.
pub(crate) fn strokes(scenario: &Scenario) -> Result<f64, StudyError> {
    let parts = scenario.parts().map_err(PointError::from)?;
    Ok(parts.pump.ripple.per_revolution())
}

/// Ripple beside the mode that it comes nearest to.
#[derive(Debug, Clone, Copy, PartialEq, Serialize)]
pub struct RippleClearance {
    /// Distance of the two frequencies relative to that of the mode.
    pub distance: f64,
    /// Frequency of the ripple, Hz.
    pub ripple: f64,
    /// Its harmonic, from 1.
    pub harmonic: u32,
    /// Frequency of the mode, Hz.
    pub mode: f64,
    /// Damping ratio of the mode.
    pub damping: f64,
}

/// The lightly damped mode of an equilibrium that the pump's ripple comes nearest to at its speed;
/// `None` without ripple or without such a mode. `scenario` is the one of the equilibrium.
///
/// # Errors
/// [`StudyError::Point`] if the scenario is no circuit.
pub fn ripple_clearance(
    scenario: &Scenario,
    equilibrium: &Equilibrium,
) -> Result<Option<RippleClearance>, StudyError> {
    let speed = equilibrium.signal(helmsplit_model::Signal::EngineSpeed);
    Ok(clearance(
        &equilibrium.stability,
        strokes(scenario)? * speed / TAU,
    ))
}

/// The same from the frequency of the first harmonic, Hz.
pub(crate) fn clearance(stability: &Stability, first: f64) -> Option<RippleClearance> {
    if first <= 0.0 {
        return None;
    }
    let modes = stability.eigenvalues.iter().filter(|(_, im)| *im > 1.0);
    let light = modes
        .map(|&(re, im)| {
            let size = re.hypot(im);
            (size / TAU, -re / size)
        })
        .filter(|&(_, damping)| damping < LIGHT);
    light
        .flat_map(|(mode, damping)| {
            (1..=HARMONICS).map(move |harmonic| {
                let ripple = f64::from(harmonic) * first;
                RippleClearance {
                    distance: (ripple - mode).abs() / mode,
                    ripple,
                    harmonic,
                    mode,
                    damping,
                }
            })
        })
        .min_by(|a, b| a.distance.total_cmp(&b.distance))
}
