//! Hydraulic motor behind an on/off valve, with load and anti-cavitation check (M8.3).

use std::f64::consts::TAU;

use crate::node::Chamber;
use crate::oil::Oil;
use crate::orifice::Edge;
use crate::real::Real;

/// A hydraulic motor with its valve and load; states are the pressure `p_m` between valve and
/// motor and the speed `w`.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct HydraulicMotor {
    /// Area of the on/off valve, m2.
    pub valve_area: f64,
    /// Edge of the on/off valve.
    pub valve_edge: Edge,
    /// Volume between valve and motor.
    pub chamber: Chamber,
    /// Displacement per radian, m3/rad.
    pub displacement_rad: f64,
    /// Wilson's slip coefficient, dimensionless.
    pub slip: f64,
    /// Torque efficiency.
    pub efficiency: f64,
    /// Inertia of motor and load, kg m2.
    pub inertia: f64,
    /// Dry friction torque, N m.
    pub dry_torque: f64,
    /// Speed at which dry friction has grown to 76 %, rad/s.
    pub dry_speed: f64,
    /// Viscous torque, N m s.
    pub viscous: f64,
    /// Drag of a fan, N m s2.
    pub fan_drag: f64,
    /// Area of the anti-cavitation check valve, m2.
    pub check_area: f64,
    /// Edge of that check valve.
    pub check_edge: Edge,
    /// Pressure over which it opens, Pa.
    pub check_pressure: f64,
}

/// What a motor does at one moment: flows in m3/s, torques in N m, powers in W.
#[derive(Debug, Clone, Copy)]
pub struct MotorFlows<S> {
    /// Through the on/off valve, towards the motor.
    pub valve: S,
    /// Through the motor, slip included.
    pub through: S,
    /// Through the anti-cavitation check, from return.
    pub check: S,
    /// Torque that the oil gives.
    pub torque: S,
    /// Torque that friction and load take.
    pub load: S,
    /// Rate of the pressure between valve and motor, Pa/s.
    pub pressure_rate: S,
    /// Rate of the speed, rad/s2.
    pub acceleration: S,
    /// Power lost in valve, slip, check and friction.
    pub lost: S,
    /// Power given to the load.
    pub work: S,
}

impl HydraulicMotor {
    /// Displacement per radian from displacement per revolution.
    #[must_use]
    pub fn per_radian(displacement: f64) -> f64 {
        displacement / TAU
    }

    /// Flows, torques and rates at a valve command (0 shut to 1 open), pressure ahead of the
    /// valve, behind it and in the return (Pa), speed (rad/s).
    #[inline(always)]
    pub fn flows<S: Real>(
        &self,
        oil: &Oil,
        command: f64,
        ahead: S,
        pressure: S,
        ret: S,
        speed: S,
    ) -> MotorFlows<S> {
        let area = self.valve_area * command.clamp(0.0, 1.0);
        let valve = self.valve_edge.flow_given(oil, area, ahead - pressure);
        let dp = pressure - ret;
        let slip = dp * (self.slip * self.displacement_rad / oil.dynamic_viscosity());
        let swept = speed * self.displacement_rad;
        let through = swept + slip;
        let check = self.check_edge.flow_checked(
            oil,
            S::constant(self.check_area),
            self.check_pressure,
            -dp,
        );
        let ideal = dp * self.displacement_rad;
        let torque = ideal * self.efficiency;
        let dry = speed.univariate(|w| (w * (1.0 / self.dry_speed)).tanh() * self.dry_torque);
        let drag = speed.univariate(|w| w * self.viscous + w * w.abs() * self.fan_drag);
        let load = dry + drag;
        let lost = valve * (ahead - pressure) + slip * dp - check * dp
            + (ideal - torque) * speed
            + dry * speed;
        MotorFlows {
            valve,
            through,
            check,
            torque,
            load,
            pressure_rate: self
                .chamber
                .pressure_rate(oil, pressure, valve + check - through),
            acceleration: (torque - load) * (1.0 / self.inertia),
            lost,
            work: drag * speed,
        }
    }
}
