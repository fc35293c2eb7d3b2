//! One place of a map.

use std::f64::consts::TAU;

use helmsplit_model::Signal;

use crate::equilibrium::Equilibrium;
use crate::frequency::{RippleClearance, clearance};

/// What is known about one place of a map.
#[derive(Debug, Clone, PartialEq)]
pub enum Spot {
    /// Not looked at yet, or the map was cancelled before.
    Waiting,
    /// The equilibrium there.
    Solved(Box<Cell>),
    /// There is none, or it was not found, and why.
    Failed(String),
}

impl Spot {
    /// The equilibrium there, if there is one.
    #[must_use]
    pub fn cell(&self) -> Option<&Cell> {
        match self {
            Self::Solved(cell) => Some(cell),
            Self::Waiting | Self::Failed(_) => None,
        }
    }
}

/// Figures of the equilibrium at one place of a map, SI.
#[derive(Debug, Clone, PartialEq)]
pub struct Cell {
    /// The state, in the order of the circuit's states: a run may start here.
    pub state: Vec<f64>,
    /// Flow from the priority port, m3/s.
    pub priority_flow: f64,
    /// The same over the set flow, less 1.
    pub priority_error: f64,
    /// Flow from the excess port, m3/s.
    pub excess_flow: f64,
    /// Inlet pressure, Pa.
    pub inlet_pressure: f64,
    /// Spool travel, m.
    pub travel: f64,
    /// Distance of the spool from its stop over the stroke.
    pub stroke_reserve: f64,
    /// Power turned to heat, W.
    pub heat: f64,
    /// Engine speed reached, rad/s.
    pub engine_speed: f64,
    /// Least damping ratio; `None` where nothing swings.
    pub damping: Option<f64>,
    /// Frequency of that mode, Hz.
    pub frequency: Option<f64>,
    /// Least damping ratio and frequency (Hz) of the modes that are slow enough to be felt and to
    /// be told by lumped volumes.
    pub slow_damping: Option<(f64, f64)>,
    /// Largest real part of all eigenvalues, 1/s.
    pub growth: f64,
    /// Whether it is stable, friction left out.
    pub stable: bool,
    /// Whether another equilibrium is met when the map is walked the other way.
    pub several: bool,
    /// Ripple of the pump beside the lightly damped mode that it comes nearest to.
    pub ripple: Option<RippleClearance>,
}

/// Modes above this frequency, Hz, are left out of [`Cell::slow_damping`]: there the spool swings
/// on the oil trapped in its end chambers, a vibration of micrometres that no gauge shows, and a
/// wave needs no longer through a hose of 2 m than through one segment of it.
pub(super) const SLOW: f64 = 500.0;

impl Cell {
    /// Figures of an equilibrium; `set_flow` in m3/s, `strokes` of the pump in one revolution.
    pub(super) fn of(equilibrium: &Equilibrium, set_flow: f64, strokes: f64) -> Self {
        let stability = &equilibrium.stability;
        let priority_flow = equilibrium.signal(Signal::PriorityFlow);
        let engine_speed = equilibrium.signal(Signal::EngineSpeed);
        Self {
            state: equilibrium.state.clone(),
            priority_flow,
            priority_error: priority_flow / set_flow - 1.0,
            excess_flow: equilibrium.signal(Signal::ExcessFlow),
            inlet_pressure: equilibrium.named("p_in").unwrap_or(f64::NAN),
            travel: equilibrium.travel(),
            stroke_reserve: equilibrium.stroke_reserve(),
            heat: equilibrium.signal(Signal::HeatPower),
            engine_speed,
            damping: stability.damping,
            frequency: stability.frequency,
            slow_damping: stability.damping_below(SLOW),
            growth: stability.growth,
            stable: stability.is_stable(),
            several: false,
            ripple: clearance(stability, strokes * engine_speed / TAU),
        }
    }
}
