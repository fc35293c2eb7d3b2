//! What a map spans.

use helmsplit_scenario::Scenario;
use helmsplit_scenario::choice::SteeringKind;

use crate::error::StudyError;
use crate::operating::{OperatingPoint, PointError, SteeringDuty, Variable};

/// Fewest and most lines of a map along one axis.
const LINES: std::ops::RangeInclusive<usize> = 2..=400;

/// One axis of a map.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Axis {
    /// What varies along it.
    pub variable: Variable,
    /// First value, SI.
    pub from: f64,
    /// Last value, SI, above the first.
    pub to: f64,
    /// Number of grid lines along it, 2 to 400.
    pub lines: usize,
}

/// What a map spans, and where it is taken.
#[derive(Debug, Clone, PartialEq)]
pub struct MapSpec {
    /// The axis to the right.
    pub x: Axis,
    /// The axis upwards.
    pub y: Axis,
    /// Everything else.
    pub point: OperatingPoint,
    /// Whether the grid lines gather where the layers bend; otherwise they are spread evenly.
    pub refine: bool,
}

/// Grid lines of a map along each axis where nothing else is asked for.
const USUAL_LINES: usize = 40;

impl Axis {
    /// A variable over the range that is worth a look in a circuit.
    #[must_use]
    pub fn usual(scenario: &Scenario, variable: Variable, lines: usize) -> Self {
        let (from, to) = variable.usual_range(scenario);
        Self {
            variable,
            from,
            to,
            lines,
        }
    }

    fn check(&self) -> Result<(), PointError> {
        let grows = self.from.is_finite() && self.to.is_finite() && self.from < self.to;
        if !grows {
            return Err(PointError::Value {
                what: "the end of an axis (SI)",
                value: self.to,
                allowed: "a finite number above the start of the axis",
            });
        }
        if !LINES.contains(&self.lines) {
            return Err(PointError::Value {
                what: "the number of grid lines",
                value: self.lines as f64,
                allowed: "2 to 400",
            });
        }
        Ok(())
    }
}

impl MapSpec {
    /// The map that a circuit is looked at first: engine speed to the right; upwards the pressure
    /// of the steering while the wheel turns at the rate to be met, or, with a motor on the
    /// priority port, what loads the excess side.
    #[must_use]
    pub fn usual(scenario: &Scenario) -> Self {
        let y = match scenario.chosen::<SteeringKind>() {
            SteeringKind::SteeringUnit | SteeringKind::BenchThrottle => Variable::SteeringPressure,
            SteeringKind::Motor => {
                Variable::excess_load(scenario).unwrap_or_else(|| Variable::wear(scenario))
            }
        };
        Self {
            x: Axis::usual(scenario, Variable::EngineSpeed, USUAL_LINES),
            y: Axis::usual(scenario, y, USUAL_LINES),
            point: steering_point(scenario),
            refine: true,
        }
    }

    pub(super) fn check(&self) -> Result<(), StudyError> {
        self.x.check()?;
        self.y.check()?;
        if self.x.variable == self.y.variable {
            return Err(PointError::NoSuchVariable {
                variable: self.x.variable.name().to_owned(),
                reason: "both axes would vary the same",
            }
            .into());
        }
        Ok(())
    }

    /// The point at a place of the map.
    ///
    /// # Errors
    /// [`PointError`] where the circuit has nothing to vary.
    pub fn point_at(
        &self,
        scenario: &Scenario,
        x: f64,
        y: f64,
    ) -> Result<OperatingPoint, PointError> {
        let mut point = self.point.clone();
        self.x.variable.apply(scenario, &mut point, x)?;
        self.y.variable.apply(scenario, &mut point, y)?;
        Ok(point)
    }
}

/// The point at which a circuit steers: its resting inputs, with the wheel turned at the rate to
/// be met.
pub(super) fn steering_point(scenario: &Scenario) -> OperatingPoint {
    let point = OperatingPoint::resting(scenario);
    match scenario.ratings().wheel_rate {
        Some(wheel_rate) if wheel_rate > 0.0 => point.steering(SteeringDuty::Turning {
            wheel_rate,
            load: 0.0,
        }),
        _ => point,
    }
}
