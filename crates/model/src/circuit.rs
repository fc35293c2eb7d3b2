//! A circuit: parts joined by their nodes, ready to be integrated.

use crate::accounts::Accounts;
use crate::layout::{ABSENT, Layout};
use crate::parts::{ExcessSide, Parts, PrimeMover, SteeringSide};
use crate::profile::{Input, Inputs};
use crate::signal::{Observer, Readings, Signal, Unobserved};
use crate::sparsity::Sparsity;
use crate::state::StateInfo;

/// Most states that one circuit can have: line segments are what adds up.
pub const MOST_STATES: usize = 128;

/// Parts and layout of one circuit. Parameters are fixed; states and inputs come with each call.
#[derive(Debug, Clone, PartialEq)]
pub struct Circuit {
    pub(crate) parts: Parts,
    pub(crate) layout: Layout,
    pub(crate) sparsity: Sparsity,
    signals: Vec<Signal>,
}

/// Why parts are no circuit.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum CircuitError {
    /// The line has no segment.
    NoSegment,
    /// The circuit would have more states than [`MOST_STATES`].
    TooManyStates {
        /// How many it would have.
        states: usize,
    },
}

impl std::fmt::Display for CircuitError {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            Self::NoSegment => write!(f, "the priority line needs at least one segment"),
            Self::TooManyStates { states } => write!(
                f,
                "the circuit would have {states} states, at most {MOST_STATES} are possible; \
                 use fewer line segments"
            ),
        }
    }
}

impl std::error::Error for CircuitError {}

impl Circuit {
    /// Joins parts to a circuit.
    ///
    /// # Errors
    /// [`CircuitError`] if the line has no segment or far too many.
    pub fn new(parts: Parts) -> Result<Self, CircuitError> {
        if parts.line.line.segments == 0 {
            return Err(CircuitError::NoSegment);
        }
        let layout = Layout::new(&parts);
        let states = layout.states.len();
        if states > MOST_STATES {
            return Err(CircuitError::TooManyStates { states });
        }
        let mut circuit = Self {
            parts,
            layout,
            sparsity: Sparsity::default(),
            signals: Vec::new(),
        };
        circuit.sparsity = circuit.find_sparsity();
        let inputs = Inputs::default();
        let mut readings = Readings::default();
        circuit.observe(&inputs, &circuit.cold_state(&inputs), &mut readings);
        circuit.signals = Signal::ALL
            .iter()
            .copied()
            .filter(|&s| readings.has(s))
            .collect();
        Ok(circuit)
    }

    /// The parts.
    #[must_use]
    pub fn parts(&self) -> &Parts {
        &self.parts
    }

    /// Number of states.
    #[must_use]
    pub fn state_count(&self) -> usize {
        self.layout.states.len()
    }

    /// The states in the order of the solver's vector.
    #[must_use]
    pub fn states(&self) -> &[StateInfo] {
        &self.layout.states
    }

    /// Position of a state by its name.
    #[must_use]
    pub fn state_index(&self, name: &str) -> Option<usize> {
        self.layout.states.iter().position(|s| s.name == name)
    }

    /// The signals that this circuit has.
    #[must_use]
    pub fn signals(&self) -> &[Signal] {
        &self.signals
    }

    /// States that move on at a steady rate while the rest is at rest: cylinder travel, shaft
    /// angle (M11). They are held while looking for a settled state.
    #[must_use]
    pub fn drifting_states(&self) -> &[usize] {
        &self.layout.drifting
    }

    /// All at rest without pressure, the spool pressed into its stop by the spring; a governed
    /// prime mover at its set speed.
    #[must_use]
    pub fn cold_state(&self, inputs: &Inputs) -> Vec<f64> {
        let mut y = vec![0.0; self.state_count()];
        let ix = &self.layout;
        y[ix.x] = self.parts.valve.rest_travel();
        if let (PrimeMover::Governed(_), true) = (&self.parts.prime_mover, ix.w_eng != ABSENT) {
            y[ix.w_eng] = inputs.get(Input::EngineSpeed);
        }
        if let SteeringSide::Unit(_) = self.parts.steering {
            y[ix.y_c] = self.parts.cylinder_start;
        }
        if let ExcessSide::Lift(gear) = &self.parts.excess {
            y[ix.y_l] = gear.start;
            // The load rests on trapped oil, not on vacuum.
            y[ix.p_cap] = gear.load.max(0.0) / gear.cylinder.area_a;
        }
        y
    }

    /// Rates of all states (SI per second) into `rates`; both slices as long as
    /// [`Self::state_count`].
    pub fn derivatives(&self, inputs: &Inputs, states: &[f64], rates: &mut [f64]) {
        self.evaluate(inputs, states, rates, &mut Unobserved);
    }

    /// All signals at one state (SI), replacing what `readings` held.
    pub fn observe(&self, inputs: &Inputs, states: &[f64], readings: &mut Readings) {
        readings.clear();
        let mut rates = [0.0; MOST_STATES];
        let n = self.state_count();
        self.evaluate(inputs, states, &mut rates[..n], readings);
        let lost: f64 = LOSSES.iter().map(|&s| readings.get(s)).sum();
        readings.put(Signal::EnergyLost, lost);
        let mechanical = readings.get(Signal::PumpShaftPower) - readings.get(Signal::EnergyIn);
        readings.put(Signal::HeatPower, lost + mechanical);
    }

    /// What the audits of a run need (M12).
    #[must_use]
    pub fn accounts(&self) -> Accounts {
        Accounts::new(self)
    }
}

/// The signals that add up to the power lost inside the circuit.
const LOSSES: [Signal; 11] = [
    Signal::FixedOrificeLoss,
    Signal::HolesLoss,
    Signal::LandLoss,
    Signal::DampingLoss,
    Signal::ReliefLoss,
    Signal::LineLoss,
    Signal::SteeringLoss,
    Signal::ConsumerLoss,
    Signal::ReturnLoss,
    Signal::FrictionLoss,
    Signal::JetExchange,
];
