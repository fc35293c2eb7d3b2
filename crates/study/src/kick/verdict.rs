//! What a kick says, and whether friction hides a hunt.

use helmsplit_scenario::Scenario;
use helmsplit_sim::Watch;
use serde::Serialize;

use super::record::{Swings, is_steady};
use super::{Kick, KickOptions, kick};
use crate::equilibrium::Equilibrium;
use crate::error::StudyError;

/// Swings of a mode that dies out, or that friction may hold, have died out below this share of
/// the first.
const DIED: f64 = 0.2;

/// Swings of a mode that grows end in a steady hunt, which may be far smaller than the kick; below
/// this share of the first they are gone.
const GONE: f64 = 1e-3;

/// Share of the first swing below which swings have died out.
pub(super) fn died(grows: bool) -> f64 {
    if grows { GONE } else { DIED }
}

/// Swings that rose above this multiple of the first have grown.
const GREW: f64 = 2.0;

/// What became of the swings.
#[derive(Debug, Clone, Copy, PartialEq, Serialize)]
#[serde(rename_all = "snake_case", tag = "kind")]
pub enum KickOutcome {
    /// They died out, or the spool stuck.
    DiesOut,
    /// They went on about as they were to the end.
    Lingers,
    /// They still grew at the end.
    Grows,
    /// They ended in a steady hunt.
    LimitCycle {
        /// Peak to peak of the spool travel, m.
        travel: f64,
        /// Peak to peak of the inlet pressure, Pa.
        inlet_pressure: f64,
        /// Frequency, Hz.
        frequency: f64,
    },
    /// The solver gave up.
    GaveUp,
}

pub(super) fn outcome(swings: &Swings, grows: bool, gave_up: bool) -> KickOutcome {
    let Some((&first, &last)) = swings.travel.first().zip(swings.travel.last()) else {
        return KickOutcome::GaveUp;
    };
    let frequency = swings.last_frequency();
    let pressure = swings.inlet_pressure.last().copied();
    match (frequency, pressure) {
        _ if last < died(grows) * first => KickOutcome::DiesOut,
        (Some(frequency), Some(inlet_pressure)) if is_steady(&swings.travel) => {
            KickOutcome::LimitCycle {
                travel: 2.0 * last,
                inlet_pressure,
                frequency,
            }
        }
        _ if gave_up => KickOutcome::GaveUp,
        _ if last > GREW * first => KickOutcome::Grows,
        // A spool that sticks stays where the kick has put it: it does not swing.
        (None, _) => KickOutcome::DiesOut,
        _ => KickOutcome::Lingers,
    }
}

/// The same small kick without and with dry friction.
#[derive(Debug, Clone, PartialEq)]
pub struct FrictionTest {
    /// Without dry friction: what the modes say.
    pub without: Kick,
    /// With the friction of the circuit.
    pub with: Kick,
    /// Whether the equilibrium hunts by its modes and a small kick dies out with friction: a
    /// larger disturbance, or oil that carries the friction away, can set it going.
    pub hides_hunting: bool,
}

/// Kicks the least damped mode below 500 Hz (failing that, of all) without and with dry friction.
/// `None` if nothing swings.
///
/// # Errors
/// As [`kick`].
pub fn friction_test(
    scenario: &Scenario,
    equilibrium: &Equilibrium,
    options: &KickOptions,
    watch: &mut Watch<'_>,
) -> Result<Option<FrictionTest>, StudyError> {
    /// Faster swings are of the oil trapped in the end chambers: nobody feels them.
    const SLOW: f64 = 500.0;
    let modes = equilibrium.modes()?;
    let slow = modes
        .oscillations()
        .find(|m| m.frequency().is_some_and(|f| f < SLOW));
    let Some(mode) = slow.or_else(|| modes.least_damped()) else {
        return Ok(None);
    };
    let mut with = |friction: bool| {
        let options = KickOptions {
            friction,
            ..*options
        };
        kick(scenario, equilibrium, mode, &options, watch)
    };
    let without = with(false)?;
    let with = with(true)?;
    let hides_hunting = mode.grows() && with.outcome == KickOutcome::DiesOut;
    Ok(Some(FrictionTest {
        without,
        with,
        hides_hunting,
    }))
}
