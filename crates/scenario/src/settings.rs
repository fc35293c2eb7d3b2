//! What studies and the solver take from a scenario beside the circuit, in SI and by name.

use crate::choice::{PumpInlet, SolverMethod, SteeringKind};
use crate::parameter::{ParameterId, limits, manoeuvre, pump, ratings, solver, start, steering};
use crate::scenario::Scenario;

/// Limits of the checks, SI.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Limits {
    /// Least settled priority flow at low idle over the demand.
    pub priority_at_idle: f64,
    /// Largest deviation of the settled priority flow from the set flow.
    pub regulation: f64,
    /// Largest excess of the priority flow after an event over its settled value.
    pub overshoot: f64,
    /// Longest settling time, s.
    pub settling: f64,
    /// Band around the settled flow that counts as settled.
    pub settling_band: f64,
    /// Least damping ratio.
    pub damping: f64,
    /// Longest time with the wheel short of oil, s.
    pub dropout: f64,
    /// Shortfall of the wheel rate that counts.
    pub dropout_shortfall: f64,
    /// Least gap from priority relief to main relief, Pa.
    pub steering_limit: f64,
    /// Least consumer flow at the lock over that before.
    pub consumer_at_lock: f64,
    /// Least gap from the excess side to a pilot relief, Pa.
    pub pilot_clearance: f64,
    /// Largest pressure over its rating.
    pub peak_pressure: f64,
    /// Least stroke in reserve over the stroke.
    pub stroke_reserve: f64,
    /// Largest mean velocity in the suction line, m/s.
    pub suction_velocity: f64,
    /// Largest mean velocity in pressure lines, m/s.
    pub pressure_velocity: f64,
    /// Largest mean velocity in the return line, m/s.
    pub return_velocity: f64,
    /// Least distance of ripple from a mode, relative to the mode.
    pub ripple_clearance: f64,
    /// Largest mean heat over the cooler's capacity.
    pub heat: f64,
    /// Largest relative residual of the audits.
    pub audit: f64,
}

/// Ratings and demands that the checks measure against, SI.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Ratings {
    /// Low idle, rad/s.
    pub low_idle_speed: f64,
    /// Governed speed, rad/s.
    pub top_speed: f64,
    /// Flow that the priority port must give, m3/s: for a steering unit the wheel rate to be met
    /// times the displacement.
    pub priority_demand: f64,
    /// Wheel rate to be met, rad/s; `None` without a steering unit.
    pub wheel_rate: Option<f64>,
    /// Priority flow that the valve is made for, m3/s.
    pub set_flow: f64,
    /// Rating of pump and inlet, Pa.
    pub inlet_pressure: f64,
    /// Rating of the steering side, Pa.
    pub priority_pressure: f64,
    /// Rating of the excess side, Pa.
    pub excess_pressure: f64,
    /// Capacity of the cooler, W.
    pub cooler_capacity: f64,
    /// Least viscosity of the pump, m2/s.
    pub least_viscosity: f64,
    /// Greatest viscosity of the pump, m2/s.
    pub greatest_viscosity: f64,
    /// Bore of the suction line, m.
    pub suction_bore: f64,
    /// Bore of the line from pump to valve, m.
    pub pressure_bore: f64,
    /// Bore of the common return line, m.
    pub return_bore: f64,
}

/// Settings of the solver.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct SolverSettings {
    /// Relative tolerance.
    pub relative_tolerance: f64,
    /// Spacing of exported traces, s.
    pub output_step: f64,
    /// Steps after which a run is given up.
    pub max_steps: usize,
    /// Method of integration.
    pub method: SolverMethod,
    /// End of the run, s.
    pub duration: f64,
}

/// Where the cylinders stand when a run starts; the spool and the pressures follow
/// `start.kind`. Travels in m from mid-stroke.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct StartTravel {
    pub(crate) steering: f64,
    pub(crate) lift: f64,
}

impl Scenario {
    /// Limits of the checks.
    #[must_use]
    pub fn limits(&self) -> Limits {
        let s = |id: ParameterId| self.si(id);
        Limits {
            priority_at_idle: s(limits::PRIORITY_AT_IDLE),
            regulation: s(limits::REGULATION),
            overshoot: s(limits::OVERSHOOT),
            settling: s(limits::SETTLING),
            settling_band: s(limits::SETTLING_BAND),
            damping: s(limits::DAMPING),
            dropout: s(limits::DROPOUT),
            dropout_shortfall: s(limits::DROPOUT_SHORTFALL),
            steering_limit: s(limits::STEERING_LIMIT),
            consumer_at_lock: s(limits::CONSUMER_AT_LOCK),
            pilot_clearance: s(limits::PILOT_CLEARANCE),
            peak_pressure: s(limits::PEAK_PRESSURE),
            stroke_reserve: s(limits::STROKE_RESERVE),
            suction_velocity: s(limits::SUCTION_VELOCITY),
            pressure_velocity: s(limits::PRESSURE_VELOCITY),
            return_velocity: s(limits::RETURN_VELOCITY),
            ripple_clearance: s(limits::RIPPLE_CLEARANCE),
            heat: s(limits::HEAT),
            audit: s(limits::AUDIT),
        }
    }

    /// Ratings and demands.
    #[must_use]
    pub fn ratings(&self) -> Ratings {
        let s = |id: ParameterId| self.si(id);
        let wheel_rate = (self.chosen::<SteeringKind>() == SteeringKind::SteeringUnit)
            .then(|| s(ratings::WHEEL_RATE));
        let priority_demand = match wheel_rate {
            Some(rate) => rate * s(steering::DISPLACEMENT) / std::f64::consts::TAU,
            None => s(ratings::PRIORITY_DEMAND),
        };
        let suction_bore = match self.chosen::<PumpInlet>() {
            PumpInlet::Flooded => s(ratings::SUCTION_BORE),
            PumpInlet::SuctionLine => s(pump::SUCTION_BORE),
        };
        Ratings {
            low_idle_speed: s(ratings::LOW_IDLE_SPEED),
            top_speed: s(ratings::TOP_SPEED),
            priority_demand,
            wheel_rate,
            set_flow: s(ratings::SET_FLOW),
            inlet_pressure: s(ratings::INLET_PRESSURE),
            priority_pressure: s(ratings::PRIORITY_PRESSURE),
            excess_pressure: s(ratings::EXCESS_PRESSURE),
            cooler_capacity: s(ratings::COOLER_CAPACITY),
            least_viscosity: s(ratings::LEAST_VISCOSITY),
            greatest_viscosity: s(ratings::GREATEST_VISCOSITY),
            suction_bore,
            pressure_bore: s(ratings::PRESSURE_BORE),
            return_bore: s(ratings::RETURN_BORE),
        }
    }

    /// Settings of the solver.
    #[must_use]
    pub fn solver(&self) -> SolverSettings {
        SolverSettings {
            relative_tolerance: self.si(solver::RELATIVE_TOLERANCE),
            output_step: self.si(solver::OUTPUT_STEP),
            max_steps: self.si(solver::MAX_STEPS) as usize,
            method: self.chosen(),
            duration: self.si(manoeuvre::DURATION),
        }
    }

    /// Travels of the cylinders at the start. With a saved state they come from there.
    pub(crate) fn start_travel(&self) -> StartTravel {
        let used = |id: ParameterId| if self.uses(id) { self.si(id) } else { 0.0 };
        StartTravel {
            steering: used(start::CYLINDER_POSITION),
            lift: used(start::LIFT_POSITION),
        }
    }
}
