//! What shakes the circuit.

use helmsplit_model::{ExcessSide, Input, Inputs, Quantity, SteeringSide};
use serde::Serialize;

use crate::equilibrium::Equilibrium;
use crate::error::StudyError;
use crate::operating::PointError;

/// What shakes the circuit.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Serialize)]
#[serde(rename_all = "kebab-case")]
pub enum Excitation {
    /// Flow added to the pump's, m3/s: its ripple.
    PumpFlow,
    /// Load of the steering: pressure behind the bench throttle (Pa), force on the cylinder (N),
    /// or command of the priority motor.
    SteeringLoad,
    /// Engine speed, rad/s.
    EngineSpeed,
    /// Load of the excess side: pressure behind the bench throttle (Pa), or command of any other
    /// consumer.
    ExcessLoad,
}

impl Excitation {
    /// Every one.
    pub const ALL: [Self; 4] = [
        Self::PumpFlow,
        Self::SteeringLoad,
        Self::EngineSpeed,
        Self::ExcessLoad,
    ];

    /// Its name on the command line.
    #[must_use]
    pub fn name(self) -> &'static str {
        match self {
            Self::PumpFlow => "pump-flow",
            Self::SteeringLoad => "steering-load",
            Self::EngineSpeed => "engine-speed",
            Self::ExcessLoad => "excess-load",
        }
    }

    /// What a person calls it.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::PumpFlow => "Pump flow",
            Self::SteeringLoad => "Steering load",
            Self::EngineSpeed => "Engine speed",
            Self::ExcessLoad => "Excess load",
        }
    }

    /// The input of the circuit that it is; `None` for the pump's flow, which is no input.
    ///
    /// # Errors
    /// [`StudyError::Point`] where the circuit has no such load.
    pub(super) fn input(self, equilibrium: &Equilibrium) -> Result<Option<Input>, StudyError> {
        let parts = equilibrium.circuit().parts();
        Ok(match self {
            Self::PumpFlow => None,
            Self::EngineSpeed => Some(Input::EngineSpeed),
            Self::SteeringLoad => Some(match parts.steering {
                SteeringSide::Bench(_) => Input::BenchPressure,
                SteeringSide::Unit(_) => Input::ExternalForce,
                SteeringSide::Motor(_) => Input::PriorityCommand,
            }),
            Self::ExcessLoad => Some(match parts.excess {
                ExcessSide::Bench { .. } => Input::ExcessPressure,
                ExcessSide::Tank { .. } | ExcessSide::Motor(_) | ExcessSide::Lift(_) => {
                    Input::ExcessCommand
                }
                ExcessSide::Blocked => {
                    return Err(PointError::NoSuchVariable {
                        variable: self.name().to_owned(),
                        reason: "the excess port is blocked",
                    }
                    .into());
                }
            }),
        })
    }

    /// Kind of quantity that it is in this circuit.
    ///
    /// # Errors
    /// [`StudyError::Point`] where the circuit has no such load.
    pub fn quantity(self, equilibrium: &Equilibrium) -> Result<Quantity, StudyError> {
        Ok(match self.input(equilibrium)? {
            None => Quantity::Flow,
            Some(Input::EngineSpeed | Input::WheelRate) => Quantity::AngularVelocity,
            Some(Input::ExternalForce) => Quantity::Force,
            Some(Input::BenchArea) => Quantity::Area,
            Some(Input::BenchPressure | Input::ExcessPressure) => Quantity::Pressure,
            Some(Input::ExcessCommand | Input::PriorityCommand) => Quantity::Ratio,
        })
    }
}

/// Inputs a little below and a little above, and the distance between them. Commands stay within
/// their range, beyond which nothing changes.
pub(super) fn around(inputs: &Inputs, input: Input) -> (Inputs, Inputs, f64) {
    let (step, low, high) = match input {
        Input::EngineSpeed | Input::WheelRate => (1e-4, f64::NEG_INFINITY, f64::INFINITY),
        Input::ExternalForce => (1e-1, f64::NEG_INFINITY, f64::INFINITY),
        Input::BenchArea => (1e-11, 0.0, f64::INFINITY),
        Input::BenchPressure | Input::ExcessPressure => (1.0, f64::NEG_INFINITY, f64::INFINITY),
        Input::ExcessCommand => (1e-6, -1.0, 1.0),
        Input::PriorityCommand => (1e-6, 0.0, 1.0),
    };
    let value = inputs.get(input);
    let (below, above) = ((value - step).max(low), (value + step).min(high));
    let (mut under, mut over) = (*inputs, *inputs);
    under.set(input, below);
    over.set(input, above);
    (under, over, above - below)
}
