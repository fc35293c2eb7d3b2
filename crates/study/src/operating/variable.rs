//! What can be varied over an operating map or along a sweep.

use helmsplit_model::Quantity;
use helmsplit_scenario::choice::{ExcessKind, PumpCondition, SteeringKind};
use helmsplit_scenario::parameter::{
    ParameterId, excess, excess_relief, lift, main_relief, oil, priority_relief, pump,
};
use helmsplit_scenario::{Scenario, nearest};

use super::error::PointError;
use super::point::{OperatingPoint, SteeringDuty};

/// A quantity that varies over a map or along a sweep.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Variable {
    /// Engine speed, rad/s.
    EngineSpeed,
    /// Pressure that the steering has to work against, Pa: behind the bench throttle, or as load
    /// on the cylinder of a steering unit while the wheel turns.
    SteeringPressure,
    /// Rate of the steering wheel, rad/s.
    WheelRate,
    /// Pressure behind the bench throttle of the excess port, Pa.
    ExcessPressure,
    /// Command of the excess consumer.
    ExcessCommand,
    /// Any parameter of the circuit, SI.
    Parameter(ParameterId),
}

/// A name for a variable that is not the path of a parameter.
#[derive(Debug, Clone, Copy)]
pub struct VariableName {
    /// As it is written.
    pub name: &'static str,
    /// What it names.
    pub variable: Variable,
    /// What it is, in a few words.
    pub about: &'static str,
}

/// Names beside the paths of parameters.
const NAMES: [VariableName; 9] = [
    VariableName {
        name: "engine-speed",
        variable: Variable::EngineSpeed,
        about: "engine speed",
    },
    VariableName {
        name: "steering-pressure",
        variable: Variable::SteeringPressure,
        about: "pressure that the steering works against",
    },
    VariableName {
        name: "wheel-rate",
        variable: Variable::WheelRate,
        about: "rate of the steering wheel",
    },
    VariableName {
        name: "excess-pressure",
        variable: Variable::ExcessPressure,
        about: "pressure behind the bench throttle of the excess port",
    },
    VariableName {
        name: "excess-command",
        variable: Variable::ExcessCommand,
        about: "command of the excess consumer",
    },
    VariableName {
        name: "motor-load",
        variable: Variable::Parameter(excess::MOTOR_FAN_TORQUE),
        about: "torque of the fan on the excess motor at its rated speed",
    },
    VariableName {
        name: "temperature",
        variable: Variable::Parameter(oil::TEMPERATURE),
        about: "oil temperature",
    },
    VariableName {
        name: "wear",
        variable: Variable::Parameter(pump::WEAR),
        about: "wear factor of the pump",
    },
    VariableName {
        name: "air",
        variable: Variable::Parameter(oil::ENTRAINED_AIR),
        about: "entrained air",
    },
];

impl Variable {
    /// The names of variables beside the paths of parameters.
    #[must_use]
    pub fn names() -> &'static [VariableName] {
        &NAMES
    }

    /// The variable of a name or of the path of a parameter.
    ///
    /// # Errors
    /// [`PointError::NoSuchVariable`] names the nearest.
    pub fn from_name(text: &str) -> Result<Self, PointError> {
        let text = text.trim();
        if let Some(known) = NAMES.iter().find(|known| known.name == text) {
            return Ok(known.variable);
        }
        if let Some(id) = ParameterId::from_path(text) {
            return Ok(Self::Parameter(id));
        }
        let near = nearest(
            text,
            NAMES
                .iter()
                .map(|known| known.name)
                .chain(helmsplit_scenario::paths()),
        );
        let variable = match near {
            Some(near) => format!("\"{text}\" (did you mean {near}?)"),
            None => format!("\"{text}\""),
        };
        Err(PointError::NoSuchVariable {
            variable,
            reason: "there is no such quantity; use engine-speed, steering-pressure, wheel-rate, \
                     excess-pressure, excess-command, motor-load, temperature, wear, air, or the \
                     path of a parameter",
        })
    }

    /// Its name as it is written: a word, or the path of a parameter.
    #[must_use]
    pub fn name(self) -> &'static str {
        match NAMES.iter().find(|known| known.variable == self) {
            Some(known) => known.name,
            None => match self {
                Self::Parameter(id) => id.parameter().path,
                // Every other variable has a name in the table.
                _ => "",
            },
        }
    }

    /// What a person calls it.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::EngineSpeed => "Engine speed",
            Self::SteeringPressure => "Steering pressure",
            Self::WheelRate => "Wheel rate",
            Self::ExcessPressure => "Excess pressure",
            Self::ExcessCommand => "Excess command",
            Self::Parameter(id) => id.parameter().label,
        }
    }

    /// Its kind of quantity.
    #[must_use]
    pub fn quantity(self) -> Quantity {
        match self {
            Self::EngineSpeed | Self::WheelRate => Quantity::AngularVelocity,
            Self::SteeringPressure | Self::ExcessPressure => Quantity::Pressure,
            Self::ExcessCommand => Quantity::Ratio,
            Self::Parameter(id) => id.parameter().quantity,
        }
    }

    /// Whether the circuit itself changes with it, and not only the inputs.
    #[must_use]
    pub fn changes_circuit(self) -> bool {
        matches!(self, Self::Parameter(_))
    }

    /// Sets the variable in a point, SI.
    ///
    /// # Errors
    /// [`PointError::NoSuchVariable`] where the circuit has nothing to vary.
    pub fn apply(
        self,
        scenario: &Scenario,
        point: &mut OperatingPoint,
        si: f64,
    ) -> Result<(), PointError> {
        let refuse = |reason: &'static str| {
            Err(PointError::NoSuchVariable {
                variable: self.name().to_owned(),
                reason,
            })
        };
        match self {
            Self::EngineSpeed => point.engine_speed = si,
            Self::ExcessCommand => point.excess.command = si,
            Self::ExcessPressure => {
                if scenario.chosen::<ExcessKind>() != ExcessKind::BenchThrottle {
                    return refuse(
                        "the excess side is no bench throttle; vary motor-load, excess-command, or \
                         set excess.kind to \"bench throttle\"",
                    );
                }
                point.excess.pressure = si;
            }
            Self::SteeringPressure => match &mut point.steering {
                SteeringDuty::Bench { pressure, .. } => *pressure = si,
                SteeringDuty::Turning { load, .. } => *load = si,
                SteeringDuty::Rest | SteeringDuty::AtLock { .. } => {
                    return refuse("the wheel does not turn: turn it, or vary wheel-rate");
                }
                SteeringDuty::Motor { .. } => {
                    return refuse(
                        "a motor hangs on the priority port: vary steering.motor_fan_torque",
                    );
                }
            },
            Self::WheelRate => {
                if scenario.chosen::<SteeringKind>() != SteeringKind::SteeringUnit {
                    return refuse("the circuit has no steering wheel");
                }
                point.steering = match point.steering {
                    SteeringDuty::AtLock { .. } => SteeringDuty::AtLock { wheel_rate: si },
                    _ if si.abs() <= f64::EPSILON => SteeringDuty::Rest,
                    SteeringDuty::Turning { load, .. } => SteeringDuty::Turning {
                        wheel_rate: si,
                        load,
                    },
                    _ => SteeringDuty::Turning {
                        wheel_rate: si,
                        load: 0.0,
                    },
                };
            }
            Self::Parameter(id) => {
                if !scenario.uses(id) {
                    return refuse("the parameter has no effect under the present choices");
                }
                point.put(id, si);
            }
        }
        Ok(())
    }

    /// Range that is worth a look in this circuit, SI: from low idle to governed speed; up to nine
    /// tenths of the pressure at which a relief begins to open; up to the wheel rate to be met;
    /// the usual range of a parameter.
    #[must_use]
    pub fn usual_range(self, scenario: &Scenario) -> (f64, f64) {
        let ratings = scenario.ratings();
        let below = |limit: f64| 0.9 * limit;
        match self {
            Self::EngineSpeed => (ratings.low_idle_speed, ratings.top_speed),
            Self::SteeringPressure => {
                let mut limit = ratings.priority_pressure;
                for id in [
                    main_relief::CRACKING_PRESSURE,
                    priority_relief::CRACKING_PRESSURE,
                ] {
                    if scenario.uses(id) {
                        limit = limit.min(scenario.si(id));
                    }
                }
                (5e5, below(limit))
            }
            Self::WheelRate => (
                0.0,
                ratings.wheel_rate.unwrap_or(0.0).max(f64::MIN_POSITIVE),
            ),
            Self::ExcessPressure => {
                let mut limit = ratings.excess_pressure;
                for id in [
                    main_relief::CRACKING_PRESSURE,
                    excess_relief::CRACKING_PRESSURE,
                ] {
                    if scenario.uses(id) {
                        limit = limit.min(scenario.si(id));
                    }
                }
                (2e5, below(limit))
            }
            Self::ExcessCommand => (0.0, 1.0),
            // What loads the consumer scatters about its own value, not over all machines.
            Self::Parameter(id) if Self::excess_load(scenario) == Some(self) => {
                let present = scenario.si(id);
                (0.2 * present, 2.0 * present)
            }
            Self::Parameter(id) => {
                let row = id.parameter();
                let unit = row.unit();
                (
                    unit.si_from_value(row.usual.low),
                    unit.si_from_value(row.usual.high),
                )
            }
        }
    }

    /// What loads the excess side of this circuit, if anything can be varied there: the bench's
    /// pressure, the fan's torque, the lift's load, or the command of an outlet to tank.
    #[must_use]
    pub fn excess_load(scenario: &Scenario) -> Option<Self> {
        match scenario.chosen::<ExcessKind>() {
            ExcessKind::Tank => Some(Self::ExcessCommand),
            ExcessKind::BenchThrottle => Some(Self::ExcessPressure),
            ExcessKind::Motor => Some(Self::Parameter(excess::MOTOR_FAN_TORQUE)),
            ExcessKind::LiftCylinder => Some(Self::Parameter(lift::LIFT_LOAD)),
            ExcessKind::Blocked => None,
        }
    }

    /// How wear of the pump is varied in this circuit.
    #[must_use]
    pub fn wear(scenario: &Scenario) -> Self {
        match scenario.chosen::<PumpCondition>() {
            PumpCondition::WearFactor => Self::Parameter(pump::WEAR),
            PumpCondition::MeasuredEfficiency => Self::Parameter(pump::MEASURED_EFFICIENCY),
        }
    }
}
