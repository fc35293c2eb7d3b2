//! A circuit made ready to be looked at while it stands still (docs/model.md, M11).

use std::sync::Arc;

use helmsplit_model::{
    Circuit, ExcessSide, Friction, Input, Inputs, Parts, Quantity, Ripple, SteeringSide,
};
use helmsplit_scenario::{Finding, Findings, Scenario};

use super::error::PointError;
use super::point::{OperatingPoint, SteeringDuty};
use crate::check::Measure;

/// Viscous damping that is added to the spool while waiting for it to come to rest, N s/m. At
/// rest nothing moves, so that the equilibrium is the same; a hunting spool just gets there.
const CALMING: f64 = 500.0;

/// Leakage across the steering piston while waiting for it to come to rest at the lock,
/// m3/(s Pa). The check valves trap what the surge at the stop has left in the cylinder, and its
/// own leakage would need minutes to let it go.
const LETTING_GO: f64 = 1e-12;

/// Share of the lowest relief setting at which a search from above begins.
const HIGH: f64 = 0.9;

/// Pressure at which a search from above begins without any relief, Pa.
const HIGH_WITHOUT_RELIEF: f64 = 100e5;

/// What linear analysis leaves out of the circuit, and how large it is.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum LeftOut {
    /// Dry friction of the spool, N: at rest its slope would be a damper that is not there in
    /// motion, and it can hide a slow hunt.
    SpoolFriction(f64),
    /// Dry friction of the tyres, N, while they stand. While they slide it is kept.
    TyreFriction(f64),
    /// Dry friction of the lift cylinder, N, while it stands.
    LiftFriction(f64),
    /// Ripple of the pump, peak to peak over the mean: the mean flow counts.
    Ripple(f64),
}

impl LeftOut {
    /// What it is, for a person.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::SpoolFriction(_) => "dry friction of the spool",
            Self::TyreFriction(_) => "dry friction of the standing tyres",
            Self::LiftFriction(_) => "dry friction of the standing lift cylinder",
            Self::Ripple(_) => "ripple of the pump, peak to peak over its mean",
        }
    }

    /// How much.
    #[must_use]
    pub fn measure(self) -> Measure {
        match self {
            Self::SpoolFriction(force) | Self::TyreFriction(force) | Self::LiftFriction(force) => {
                Measure::new(force, Quantity::Force)
            }
            Self::Ripple(share) => Measure::ratio(share),
        }
    }
}

/// A circuit at an operating point, without what has no place in a linear analysis.
///
/// Dry friction at rest and the pump's ripple are left out; states that move on at a steady rate
/// are held. The equations are those of a run.
#[derive(Debug, Clone)]
pub struct Frozen {
    circuit: Arc<Circuit>,
    calmed: Arc<Circuit>,
    inputs: Inputs,
    held: Vec<usize>,
    at_lock: f64,
    left_out: Vec<LeftOut>,
}

impl Frozen {
    /// The circuit of `scenario` at `point`.
    ///
    /// # Errors
    /// [`PointError`] if the scenario is no circuit there or cannot do what the point asks.
    pub fn new(scenario: &Scenario, point: &OperatingPoint) -> Result<Self, PointError> {
        let changed = if point.settings.is_empty() {
            None
        } else {
            Some(point.scenario(scenario)?)
        };
        let scenario = changed.as_ref().unwrap_or(scenario);
        let inputs = point.inputs(scenario)?;
        let findings = scenario.validate();
        if findings.has_errors() {
            return Err(PointError::Scenario(findings));
        }
        let mut parts = scenario.parts()?;
        let left_out = leave_out(&mut parts, point, &inputs);
        let mut calm = parts.clone();
        calm.valve.viscous += CALMING;
        if let (SteeringSide::Unit(gear), SteeringDuty::AtLock { .. }) =
            (&mut calm.steering, point.steering)
        {
            gear.cylinder.piston_leak = gear.cylinder.piston_leak.max(LETTING_GO);
        }
        let circuit = build(parts)?;
        let calmed = build(calm)?;
        let at_lock = match point.steering {
            SteeringDuty::AtLock { wheel_rate } => wheel_rate.signum(),
            _ => 0.0,
        };
        let held = held(&circuit, at_lock.abs() > 0.0);
        Ok(Self {
            circuit: Arc::new(circuit),
            calmed: Arc::new(calmed),
            inputs,
            held,
            at_lock,
            left_out,
        })
    }

    /// The circuit at another point than `here`, for which this one was made. Where only inputs
    /// differ the circuit is shared, which is far cheaper than building it anew.
    ///
    /// # Errors
    /// As [`Frozen::new`].
    pub fn moved(
        &self,
        scenario: &Scenario,
        here: &OperatingPoint,
        there: &OperatingPoint,
    ) -> Result<Self, PointError> {
        let kind = |point: &OperatingPoint| std::mem::discriminant(&point.steering);
        let stands = |point: &OperatingPoint| point.excess.command.abs() <= 0.0;
        let same_circuit = there.settings == here.settings
            && kind(there) == kind(here)
            && stands(there) == stands(here);
        if !same_circuit {
            return Self::new(scenario, there);
        }
        let changed = if there.settings.is_empty() {
            None
        } else {
            Some(there.scenario(scenario)?)
        };
        let mut same = self.clone();
        same.inputs = there.inputs(changed.as_ref().unwrap_or(scenario))?;
        Ok(same)
    }

    /// The circuit of `scenario` at `point` with its dry friction, without ripple: for a kick test
    /// in time.
    ///
    /// # Errors
    /// As [`Frozen::new`].
    pub fn with_friction(
        scenario: &Scenario,
        point: &OperatingPoint,
    ) -> Result<Circuit, PointError> {
        let scenario = point.scenario(scenario)?;
        let mut parts = scenario.parts()?;
        parts.pump.ripple = Ripple::None;
        build(parts)
    }

    /// The circuit as it is analysed.
    #[must_use]
    pub fn circuit(&self) -> &Arc<Circuit> {
        &self.circuit
    }

    /// The same with a heavily damped spool, and at the lock with a leaking piston: its equilibria
    /// are the same ones, or at the lock near them.
    pub(crate) fn calmed(&self) -> &Circuit {
        &self.calmed
    }

    /// The inputs.
    #[must_use]
    pub fn inputs(&self) -> &Inputs {
        &self.inputs
    }

    /// Indices of the states that are held: cylinder travel that moves on at a steady rate.
    #[must_use]
    pub fn held(&self) -> &[usize] {
        &self.held
    }

    /// What is left out.
    #[must_use]
    pub fn left_out(&self) -> &[LeftOut] {
        &self.left_out
    }

    /// Start of a search from below: no pressure, the spool sprung shut.
    #[must_use]
    pub fn shut(&self) -> Vec<f64> {
        let mut state = self.circuit.cold_state(&self.inputs);
        if let (SteeringSide::Unit(gear), Some(at)) = (
            &self.circuit.parts().steering,
            self.circuit.state_index("y_c"),
        ) && self.at_lock.abs() > 0.0
        {
            state[at] = self.at_lock * 0.5 * gear.cylinder.stroke;
        }
        state
    }

    /// Start of a search from above: the spool wide open under pressure.
    #[must_use]
    pub fn open(&self) -> Vec<f64> {
        let mut state = self.shut();
        let parts = self.circuit.parts();
        let main = parts.main_relief.as_ref().map(|r| r.cracking);
        let excess = parts.excess_relief.as_ref().map(|r| r.cracking);
        let lowest = main.into_iter().chain(excess).fold(f64::INFINITY, f64::min);
        let high = if lowest.is_finite() {
            HIGH * lowest
        } else {
            HIGH_WITHOUT_RELIEF
        };
        let spring = (parts.valve.preload + parts.valve.spring_rate * parts.valve.stroke)
            / parts.valve.end_area();
        for (name, pressure) in [
            ("p_in", high),
            ("p_h", high),
            ("p_e", high),
            ("p_b", high - spring),
            ("p_s", high - spring),
        ] {
            if let Some(at) = self.circuit.state_index(name) {
                state[at] = pressure.max(0.0);
            }
        }
        if let Some(at) = self.circuit.state_index("x") {
            state[at] = parts.valve.stroke;
        }
        state
    }
}

fn build(parts: Parts) -> Result<Circuit, PointError> {
    Circuit::new(parts).map_err(|error| {
        let hint = "use fewer segments";
        PointError::Scenario(Findings {
            findings: vec![Finding::error("line.segments", error.to_string(), hint)],
            ..Findings::default()
        })
    })
}

/// Takes dry friction at rest and ripple out of the parts, and lists them.
fn leave_out(parts: &mut Parts, point: &OperatingPoint, inputs: &Inputs) -> Vec<LeftOut> {
    let mut left_out = Vec::new();
    let spool = coulomb(&parts.valve.friction);
    parts.valve.friction = Friction::removed();
    if spool > 0.0 {
        left_out.push(LeftOut::SpoolFriction(spool));
    }
    let slides = matches!(point.steering, SteeringDuty::Turning { .. });
    if let (SteeringSide::Unit(gear), false) = (&mut parts.steering, slides) {
        let tyre = coulomb(&gear.scrub);
        gear.scrub = Friction::removed();
        if tyre > 0.0 {
            left_out.push(LeftOut::TyreFriction(tyre));
        }
    }
    let stands = inputs.get(Input::ExcessCommand).abs() <= 0.0;
    if let (ExcessSide::Lift(gear), true) = (&mut parts.excess, stands)
        && gear.dry_friction > 0.0
    {
        left_out.push(LeftOut::LiftFriction(gear.dry_friction));
        gear.dry_friction = 0.0;
    }
    let ripple = match parts.pump.ripple {
        Ripple::None => 0.0,
        ripple @ (Ripple::Gear { .. } | Ripple::Piston { .. }) => peak_to_peak(&ripple),
    };
    if ripple > 0.0 {
        left_out.push(LeftOut::Ripple(ripple));
    }
    parts.pump.ripple = Ripple::None;
    left_out
}

/// Coulomb force of a law of friction, N.
fn coulomb(friction: &Friction) -> f64 {
    match friction {
        Friction::Smooth { coulomb, .. } => *coulomb,
        Friction::Bristle(law) => law.coulomb,
    }
}

/// Peak to peak of the delivery over its mean: the factor is largest in the middle of a stroke
/// and least between two.
fn peak_to_peak(ripple: &Ripple) -> f64 {
    let between = std::f64::consts::PI / ripple.per_revolution();
    ripple.factor(0.0) - ripple.factor(between)
}

/// States that are held. A governed prime mover's speed is a state like any other; a cylinder in
/// its stop does not move on.
fn held(circuit: &Circuit, at_lock: bool) -> Vec<usize> {
    let travel = circuit.state_index("y_c").filter(|_| at_lock);
    let mut held = circuit.drifting_states().to_vec();
    held.retain(|&state| Some(state) != travel);
    held
}
