//! The operating point of a circuit: everything that stands still while it is looked at.

use helmsplit_model::{Input, Inputs};
use helmsplit_scenario::choice::SteeringKind;
use helmsplit_scenario::manoeuvre::input_row;
use helmsplit_scenario::parameter::{ParameterId, cylinder};
use helmsplit_scenario::{Findings, Scenario};

use super::error::PointError;

/// Wheel rates below this are rest, rad/s: at 0 the steering unit's ports are shut.
const AT_REST: f64 = 1e-6;

/// What the priority port has to do.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum SteeringDuty {
    /// The wheel stands still: the oil goes through the neutral bypass of the steering unit.
    Rest,
    /// The wheel turns at a steady rate and the cylinder moves on.
    Turning {
        /// Rate, rad/s; positive extends chamber A.
        wheel_rate: f64,
        /// Load beside the tyre's friction and damping, as a pressure in the fed chamber, Pa.
        load: f64,
    },
    /// The cylinder rests in its stop and the wheel is pulled on.
    AtLock {
        /// Rate at which the wheel is pulled, rad/s; its sign says which stop.
        wheel_rate: f64,
    },
    /// The bench throttle into a given pressure.
    Bench {
        /// Pressure behind the throttle, Pa.
        pressure: f64,
        /// Its area, m2.
        area: f64,
    },
    /// The hydraulic motor on the priority port.
    Motor {
        /// Command of its valve, 0 to 1.
        command: f64,
    },
}

/// What the excess port has to do. Its consumer's own data are parameters of the circuit.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct ExcessDuty {
    /// Command of the consumer: 0 off to 1 fully on, -1 lowers a lift cylinder.
    pub command: f64,
    /// Pressure behind the bench throttle, Pa; other consumers do not see it.
    pub pressure: f64,
}

/// One operating point: inputs that stand still, and parameters that differ from the circuit
/// file. Whatever it does not name is as in the file.
///
/// Oil temperature, wear, entrained air and every dimension are parameters: see
/// [`OperatingPoint::with`].
#[derive(Debug, Clone, PartialEq)]
pub struct OperatingPoint {
    /// Speed of the pump shaft, or set speed of a governed prime mover, rad/s.
    pub engine_speed: f64,
    /// Duty of the priority port.
    pub steering: SteeringDuty,
    /// Duty of the excess port.
    pub excess: ExcessDuty,
    /// Parameters that differ from the circuit file, SI; a later one replaces an earlier one.
    pub settings: Vec<(ParameterId, f64)>,
}

impl OperatingPoint {
    /// The inputs of a scenario's manoeuvre at `time` (s), standing still.
    ///
    /// # Errors
    /// The findings of a manoeuvre that does not fit.
    pub fn at(scenario: &Scenario, time: f64) -> Result<Self, Findings> {
        let inputs = scenario.inputs()?.at(time);
        Ok(Self::of_inputs(scenario, &inputs))
    }

    /// The duty that every input at its resting level makes: wheel still, consumer fully on, low
    /// idle of the ratings.
    #[must_use]
    pub fn resting(scenario: &Scenario) -> Self {
        let mut inputs = Inputs::default();
        for input in Input::ALL {
            inputs.set(input, input_row(input).level());
        }
        inputs.set(Input::EngineSpeed, scenario.ratings().low_idle_speed);
        Self::of_inputs(scenario, &inputs)
    }

    /// The point that steady inputs make.
    #[must_use]
    pub fn of_inputs(scenario: &Scenario, inputs: &Inputs) -> Self {
        let steering = match scenario.chosen::<SteeringKind>() {
            SteeringKind::BenchThrottle => SteeringDuty::Bench {
                pressure: inputs.get(Input::BenchPressure),
                area: inputs.get(Input::BenchArea),
            },
            SteeringKind::Motor => SteeringDuty::Motor {
                command: inputs.get(Input::PriorityCommand),
            },
            SteeringKind::SteeringUnit => {
                let wheel_rate = inputs.get(Input::WheelRate);
                if wheel_rate.abs() <= AT_REST {
                    SteeringDuty::Rest
                } else {
                    let (area, sign) = fed_area(scenario, wheel_rate);
                    SteeringDuty::Turning {
                        wheel_rate,
                        load: sign * inputs.get(Input::ExternalForce) / area,
                    }
                }
            }
        };
        Self {
            engine_speed: inputs.get(Input::EngineSpeed),
            steering,
            excess: ExcessDuty {
                command: inputs.get(Input::ExcessCommand),
                pressure: inputs.get(Input::ExcessPressure),
            },
            settings: Vec::new(),
        }
    }

    /// The same at another engine speed, rad/s.
    #[must_use]
    pub fn at_speed(mut self, engine_speed: f64) -> Self {
        self.engine_speed = engine_speed;
        self
    }

    /// The same with another duty of the priority port.
    #[must_use]
    pub fn steering(mut self, duty: SteeringDuty) -> Self {
        self.steering = duty;
        self
    }

    /// The same with the bench throttle of the priority port into another pressure, Pa.
    #[must_use]
    pub fn bench_pressure(mut self, pressure: f64) -> Self {
        let area = match self.steering {
            SteeringDuty::Bench { area, .. } => area,
            _ => input_row(Input::BenchArea).level(),
        };
        self.steering = SteeringDuty::Bench { pressure, area };
        self
    }

    /// The same with another pressure behind the bench throttle of the excess port, Pa.
    #[must_use]
    pub fn excess_pressure(mut self, pressure: f64) -> Self {
        self.excess.pressure = pressure;
        self
    }

    /// The same with one parameter at another value, SI.
    #[must_use]
    pub fn with(mut self, parameter: ParameterId, si: f64) -> Self {
        self.put(parameter, si);
        self
    }

    /// Sets one parameter, SI; replaces an earlier value.
    pub fn put(&mut self, parameter: ParameterId, si: f64) {
        match self.settings.iter_mut().find(|(id, _)| *id == parameter) {
            Some((_, value)) => *value = si,
            None => self.settings.push((parameter, si)),
        }
    }

    /// The scenario with the settings of this point.
    ///
    /// # Errors
    /// The finding of a value that is not allowed.
    pub fn scenario(&self, base: &Scenario) -> Result<Scenario, PointError> {
        let mut scenario = base.clone();
        for &(id, si) in &self.settings {
            scenario.set_si(id, si)?;
        }
        Ok(scenario)
    }

    /// The inputs of this point.
    ///
    /// # Errors
    /// [`PointError`] if the steering side cannot do what the point asks, or a value is not
    /// possible.
    pub fn inputs(&self, scenario: &Scenario) -> Result<Inputs, PointError> {
        self.check()?;
        let mut inputs = Inputs::default();
        inputs.set(Input::EngineSpeed, self.engine_speed);
        inputs.set(Input::ExcessCommand, self.excess.command);
        inputs.set(Input::ExcessPressure, self.excess.pressure);
        inputs.set(Input::PriorityCommand, 1.0);
        let kind = scenario.chosen::<SteeringKind>();
        let needs = |wanted: &'static str, of: SteeringKind| {
            if kind == of {
                return Ok(());
            }
            let has = match kind {
                SteeringKind::BenchThrottle => "bench throttle",
                SteeringKind::SteeringUnit => "steering unit",
                SteeringKind::Motor => "hydraulic motor",
            };
            Err(PointError::Steering { wanted, has })
        };
        match self.steering {
            SteeringDuty::Rest => needs("a steering wheel at rest", SteeringKind::SteeringUnit)?,
            SteeringDuty::Turning { wheel_rate, load } => {
                needs("a turning steering wheel", SteeringKind::SteeringUnit)?;
                let (area, sign) = fed_area(scenario, wheel_rate);
                inputs.set(Input::WheelRate, wheel_rate);
                inputs.set(Input::ExternalForce, sign * load * area);
            }
            SteeringDuty::AtLock { wheel_rate } => {
                needs("the steering at its lock", SteeringKind::SteeringUnit)?;
                inputs.set(Input::WheelRate, wheel_rate);
            }
            SteeringDuty::Bench { pressure, area } => {
                needs(
                    "a pressure behind a bench throttle",
                    SteeringKind::BenchThrottle,
                )?;
                inputs.set(Input::BenchPressure, pressure);
                inputs.set(Input::BenchArea, area);
            }
            SteeringDuty::Motor { command } => {
                needs("a motor on the priority port", SteeringKind::Motor)?;
                inputs.set(Input::PriorityCommand, command);
            }
        }
        Ok(inputs)
    }

    /// Refuses values without sense.
    #[allow(clippy::too_many_lines, reason = "a table of ranges")]
    fn check(&self) -> Result<(), PointError> {
        let not_negative = "a number from 0 up";
        let any = "a finite number, not 0";
        let mut rows = vec![
            (
                "the engine speed (rad/s)",
                self.engine_speed,
                self.engine_speed >= 0.0,
                not_negative,
            ),
            (
                "the excess command",
                self.excess.command,
                (-1.0..=1.0).contains(&self.excess.command),
                "-1 to 1",
            ),
            (
                "the excess pressure (Pa)",
                self.excess.pressure,
                self.excess.pressure >= 0.0,
                not_negative,
            ),
        ];
        match self.steering {
            SteeringDuty::Rest => {}
            SteeringDuty::Turning { wheel_rate, load } => {
                rows.push((
                    "the wheel rate (rad/s)",
                    wheel_rate,
                    wheel_rate.abs() > AT_REST,
                    any,
                ));
                rows.push((
                    "the steering load (Pa)",
                    load,
                    load.is_finite(),
                    "a finite number",
                ));
            }
            SteeringDuty::AtLock { wheel_rate } => {
                let turns = wheel_rate.abs() > AT_REST;
                rows.push(("the wheel rate (rad/s)", wheel_rate, turns, any));
            }
            SteeringDuty::Bench { pressure, area } => {
                let what = "the bench pressure (Pa)";
                rows.push((what, pressure, pressure >= 0.0, not_negative));
                rows.push(("the bench area (m2)", area, area >= 0.0, not_negative));
            }
            SteeringDuty::Motor { command } => {
                let inside = (0.0..=1.0).contains(&command);
                rows.push(("the priority command", command, inside, "0 to 1"));
            }
        }
        let bad = rows
            .into_iter()
            .find(|(_, value, good, _)| !(*good && value.is_finite()));
        match bad {
            None => Ok(()),
            Some((what, value, _, allowed)) => Err(PointError::Value {
                what,
                value,
                allowed,
            }),
        }
    }
}

/// Area of the chamber that a wheel rate feeds, m2, and the sign of an external force that loads
/// it.
fn fed_area(scenario: &Scenario, wheel_rate: f64) -> (f64, f64) {
    if wheel_rate >= 0.0 {
        (scenario.si(cylinder::AREA_A), 1.0)
    } else {
        (scenario.si(cylinder::AREA_B), -1.0)
    }
}
