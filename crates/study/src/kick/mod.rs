//! The kick test: what linear analysis says, tried in time.
//!
//! An equilibrium is disturbed a little along its least damped mode and left alone. Without dry
//! friction the motion must swing at the frequency and with the growth that the mode says; with
//! the friction of the circuit it may stick, though the linear equilibrium hunts: [`friction_test`]
//! tells.

mod hold;
mod record;
mod verdict;

use helmsplit_scenario::Scenario;
use helmsplit_sim::{Piece, RunEnd, SolverOptions, Watch, integrate, state_scales};

use crate::equilibrium::Equilibrium;
use crate::error::StudyError;
use crate::modes::Mode;
use crate::operating::{Frozen, PointError};

use hold::HeldCircuit;
use record::Swings;

pub use verdict::{FrictionTest, KickOutcome, friction_test};

/// How to kick.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct KickOptions {
    /// Displacement of the spool by the kick, m. Default 20 micrometres: far below the stroke, far
    /// above what a stuck spool yields.
    pub size: f64,
    /// Longest time to watch, in cycles of the mode. Default 60.
    pub cycles: usize,
    /// Whether the circuit keeps its dry friction. Default: no.
    pub friction: bool,
    /// Relative tolerance of the solver. Default 1e-8: the method's own damping stays far below
    /// that of any mode worth telling.
    pub tolerance: f64,
    /// Whether to end as soon as it is plain what becomes of the swings. Default: yes.
    pub until_plain: bool,
}

impl Default for KickOptions {
    fn default() -> Self {
        Self {
            size: 20e-6,
            cycles: 60,
            friction: false,
            tolerance: 1e-8,
            until_plain: true,
        }
    }
}

/// What became of a kick.
#[derive(Debug, Clone, PartialEq)]
pub struct Kick {
    /// Whether the circuit kept its dry friction.
    pub friction: bool,
    /// Frequency that the mode predicts, Hz, as seen: damped.
    pub predicted_frequency: f64,
    /// Growth that the mode predicts, 1/s; negative when it dies out.
    pub predicted_growth: f64,
    /// Frequency measured from the spool's passages through its middle, Hz; `None` if there were
    /// fewer than two cycles.
    pub frequency: Option<f64>,
    /// Growth measured over all cycles, 1/s; `None` if there were fewer than three.
    pub growth: Option<f64>,
    /// Half of the spool's swing in each cycle, m.
    pub travel: Vec<f64>,
    /// Peak to peak of the inlet pressure in each cycle, Pa.
    pub inlet_pressure: Vec<f64>,
    /// What became of it.
    pub outcome: KickOutcome,
    /// Times of the solver's steps, s.
    pub times: Vec<f64>,
    /// Spool travel at those times less that of the equilibrium, m.
    pub deviations: Vec<f64>,
}

/// Kicks an equilibrium of `scenario` along `mode` and watches. Inputs and what moves on at a
/// steady rate are held, as for the modes.
///
/// # Errors
/// [`StudyError::Point`] if the mode does not swing; [`StudyError::Sim`] if the solver refuses the
/// start. That the solver gives up on the way ends the record there.
pub fn kick(
    scenario: &Scenario,
    equilibrium: &Equilibrium,
    mode: &Mode,
    options: &KickOptions,
    watch: &mut Watch<'_>,
) -> Result<Kick, StudyError> {
    let Some(frequency) = mode.damped_frequency() else {
        return Err(PointError::NoSuchVariable {
            variable: "the mode".to_owned(),
            reason: "it does not swing",
        }
        .into());
    };
    let circuit = if options.friction {
        Frozen::with_friction(scenario, &equilibrium.point)?
    } else {
        equilibrium.circuit().as_ref().clone()
    };
    let start = kicked(&circuit, equilibrium, mode, options.size);
    let held: Vec<usize> = equilibrium
        .held()
        .iter()
        .filter_map(|&at| circuit.state_index(&equilibrium.circuit().states()[at].name))
        .collect();
    let scales = state_scales(&circuit);
    let system = HeldCircuit {
        circuit: &circuit,
        inputs: *equilibrium.inputs(),
        held: &held,
        scales: &scales,
    };
    let mut swings = Swings::new(&circuit, equilibrium, mode, 1.0 / frequency, options);
    let piece = Piece {
        system: &system,
        end: options.cycles as f64 / frequency,
        jump: false,
    };
    // Low orders damp what they integrate, and the damping is what is asked for.
    let solver = SolverOptions {
        highest_order: 5,
        ..SolverOptions::with_tolerance(options.tolerance)
    };
    let run = integrate(&[piece], 0.0, &start, &solver, &mut swings, watch)?;
    let gave_up = matches!(run.end, RunEnd::GaveUp { .. });
    Ok(swings.told(mode, options, gave_up))
}

/// The equilibrium, displaced along the mode so that the spool moves by `size` (m); where the
/// spool takes no part, the state that moves most is displaced by a hundredth of its size.
fn kicked(
    circuit: &helmsplit_model::Circuit,
    equilibrium: &Equilibrium,
    mode: &Mode,
    size: f64,
) -> Vec<f64> {
    let analysed = equilibrium.circuit();
    let spool = analysed
        .state_index("x")
        .map_or((0.0, 0.0), |at| mode.shape[at]);
    let swing = spool.0.hypot(spool.1);
    let largest = analysed
        .states()
        .iter()
        .zip(&mode.shape)
        .map(|(info, motion)| motion.0.hypot(motion.1) / info.scale)
        .fold(f64::MIN_POSITIVE, f64::max);
    // Turned so that the spool is at its farthest: a kick in travel, not in speed.
    let (scale, turn) = if swing > 1e-6 * largest {
        (size / swing, spool.1.atan2(spool.0))
    } else {
        (0.01 / largest, 0.0)
    };
    let mut state = vec![0.0; circuit.state_count()];
    for (at, info) in circuit.states().iter().enumerate() {
        let Some(known) = analysed.state_index(&info.name) else {
            // A bristle that the analysis has left out: relaxed.
            continue;
        };
        let (re, im) = mode.shape[known];
        let real = re * turn.cos() + im * turn.sin();
        state[at] = equilibrium.state[known] + scale * real;
    }
    state
}
