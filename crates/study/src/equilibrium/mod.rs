//! Equilibria of a circuit: the state in which nothing moves, or everything that moves does so
//! steadily (docs/model.md, M11).
//!
//! Start with [`equilibrium`]; along a sweep go on with [`Equilibrium::follow`], which starts from
//! the state next door. [`equilibria`] looks from both sides and gives every equilibrium it meets.

mod error;
mod forces;
mod seek;
mod several;
mod tables;

use std::sync::Arc;

use helmsplit_model::{Circuit, Inputs, Readings, Signal};
use helmsplit_scenario::Scenario;

use crate::error::StudyError;
use crate::modes::{Modes, Stability};
use crate::operating::{Frozen, LeftOut, OperatingPoint};

pub use error::EquilibriumError;
pub use forces::{Force, ForceKind};
pub use seek::SeekFrom;
pub use several::equilibria;
pub use tables::{Loss, Reading};

/// A circuit at rest at an operating point.
#[derive(Debug, Clone)]
pub struct Equilibrium {
    /// Where.
    pub point: OperatingPoint,
    /// The state, SI, in the order of the states of [`Self::circuit`].
    pub state: Vec<f64>,
    /// Largest rate of change of a state that is not held, relative to its typical size, 1/s.
    pub residual: f64,
    /// Iterations of the search.
    pub iterations: usize,
    /// Time that was waited for motion to die out before the search, s; 0 from a good guess.
    pub waited: f64,
    /// Whether it is stable, friction left out.
    pub stability: Stability,
    pub(crate) frozen: Frozen,
    readings: Readings,
}

/// The equilibrium of `scenario` at `point` that is reached from below: from rest, without
/// pressure, the spool sprung shut. It may be unstable; see [`Equilibrium::stability`].
///
/// # Errors
/// [`StudyError::Point`] if the point does not fit the circuit; [`StudyError::Equilibrium`] if
/// none was found, with how near the search came; [`StudyError::Modes`] if the eigenvalues do not
/// come out.
///
/// # Examples
/// ```
/// use helmsplit_scenario::PRESETS;
/// use helmsplit_study::{OperatingPoint, equilibrium};
///
/// let scenario = PRESETS[0].scenario().map_err(|findings| findings.to_string())?;
/// let idle = OperatingPoint::resting(&scenario);
/// let rest = equilibrium(&scenario, &idle)?;
/// // 15 L/min within a tenth go to the steering.
/// let flow = rest.signal(helmsplit_model::Signal::PriorityFlow) * 6e4;
/// assert!((13.5..16.5).contains(&flow), "{flow} L/min");
/// assert!(rest.stability.is_stable(), "{:?}", rest.stability);
/// # Ok::<(), Box<dyn std::error::Error>>(())
/// ```
pub fn equilibrium(scenario: &Scenario, point: &OperatingPoint) -> Result<Equilibrium, StudyError> {
    Equilibrium::of(Frozen::new(scenario, point)?, point, SeekFrom::Shut)
}

impl Equilibrium {
    /// The equilibrium of a circuit that is ready, looked for from a side or a state.
    ///
    /// # Errors
    /// As [`equilibrium`], without [`StudyError::Point`].
    pub fn of(
        frozen: Frozen,
        point: &OperatingPoint,
        from: SeekFrom<'_>,
    ) -> Result<Self, StudyError> {
        let found = seek::seek(&frozen, from)?;
        Self::found(frozen, point, found)
    }

    /// The same without waiting: the search from `guess` alone.
    pub(crate) fn near(
        frozen: Frozen,
        point: &OperatingPoint,
        guess: &[f64],
    ) -> Result<Self, StudyError> {
        let found = seek::near(&frozen, guess)?;
        Self::found(frozen, point, found)
    }

    /// The state of rest of this circuit that a search from `guess` comes to.
    pub(crate) fn searched_from(&self, guess: &[f64]) -> Option<Vec<f64>> {
        let found = seek::near(&self.frozen, guess).ok()?;
        Some(found.state)
    }

    fn found(
        frozen: Frozen,
        point: &OperatingPoint,
        found: seek::Found,
    ) -> Result<Self, StudyError> {
        let stability = Stability::at(&frozen, &found.state)?;
        let mut readings = Readings::default();
        frozen
            .circuit()
            .observe(frozen.inputs(), &found.state, &mut readings);
        Ok(Self {
            point: point.clone(),
            state: found.state,
            residual: found.residual,
            iterations: found.iterations,
            waited: found.waited,
            stability,
            frozen,
            readings,
        })
    }

    /// The equilibrium at a point near this one, looked for from this state first and, should
    /// that fail, by waiting from here and from rest.
    ///
    /// # Errors
    /// As [`equilibrium`].
    pub fn follow(&self, scenario: &Scenario, point: &OperatingPoint) -> Result<Self, StudyError> {
        let frozen = self.frozen.moved(scenario, &self.point, point)?;
        if frozen.circuit().state_count() == self.state.len() {
            Self::of(frozen, point, SeekFrom::State(&self.state))
        } else {
            Self::of(frozen, point, SeekFrom::Shut)
        }
    }

    /// The circuit as it was analysed: without dry friction at rest and without ripple.
    #[must_use]
    pub fn circuit(&self) -> &Arc<Circuit> {
        self.frozen.circuit()
    }

    /// Its inputs.
    #[must_use]
    pub fn inputs(&self) -> &Inputs {
        self.frozen.inputs()
    }

    /// Indices of the states that were held because they move on at a steady rate.
    #[must_use]
    pub fn held(&self) -> &[usize] {
        self.frozen.held()
    }

    /// What was left out of the circuit.
    #[must_use]
    pub fn left_out(&self) -> &[LeftOut] {
        self.frozen.left_out()
    }

    /// Every signal, SI.
    #[must_use]
    pub fn readings(&self) -> &Readings {
        &self.readings
    }

    /// A signal, SI; 0 where the circuit has no such part.
    #[must_use]
    pub fn signal(&self, signal: Signal) -> f64 {
        self.readings.get(signal)
    }

    /// A state by its short name, SI.
    #[must_use]
    pub fn named(&self, name: &str) -> Option<f64> {
        self.circuit().state_index(name).map(|at| self.state[at])
    }

    /// Spool travel, m.
    #[must_use]
    pub fn travel(&self) -> f64 {
        self.named("x").unwrap_or(f64::NAN)
    }

    /// Distance of the spool from its stop at full travel, over the stroke.
    #[must_use]
    pub fn stroke_reserve(&self) -> f64 {
        let stroke = self.circuit().parts().valve.stroke;
        (stroke - self.travel()) / stroke
    }

    /// All modes with who takes part in them.
    ///
    /// # Errors
    /// [`StudyError::Modes`] if the eigenvalues do not come out.
    pub fn modes(&self) -> Result<Modes, StudyError> {
        Ok(Modes::of(&self.frozen, &self.state)?)
    }
}
