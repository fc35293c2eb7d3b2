//! What the excess port feeds (M8).

use helmsplit_model::{BenchThrottle, Cylinder, EndStop, ExcessSide, HydraulicMotor, LiftGear};

use crate::choice::ExcessKind;
use crate::parameter::{ParameterId, excess, lift};
use crate::scenario::Scenario;

impl Scenario {
    pub(super) fn excess(&self) -> ExcessSide {
        let outlet_edge = || self.edge(excess::OUTLET_DISCHARGE, excess::OUTLET_TRANSITION);
        match self.chosen::<ExcessKind>() {
            ExcessKind::Tank => ExcessSide::Tank {
                area: self.si(excess::OUTLET_AREA),
                edge: outlet_edge(),
            },
            ExcessKind::BenchThrottle => ExcessSide::Bench {
                area: self.si(excess::OUTLET_AREA),
                throttle: BenchThrottle {
                    edge: outlet_edge(),
                    check_pressure: self.si(excess::CHECK_OPENING_PRESSURE),
                },
            },
            ExcessKind::Motor => ExcessSide::Motor(self.excess_motor()),
            ExcessKind::LiftCylinder => ExcessSide::Lift(self.lift()),
            ExcessKind::Blocked => ExcessSide::Blocked,
        }
    }

    fn excess_motor(&self) -> HydraulicMotor {
        HydraulicMotor {
            valve_area: self.si(excess::MOTOR_VALVE_AREA),
            valve_edge: self.edge(
                excess::MOTOR_VALVE_DISCHARGE,
                excess::MOTOR_VALVE_TRANSITION,
            ),
            // The hose behind the valve is of the same kind as the one ahead of it (M8.3).
            chamber: self.chamber(excess::MOTOR_VOLUME, excess::PORT_WALL_MODULUS),
            displacement_rad: HydraulicMotor::per_radian(self.si(excess::MOTOR_DISPLACEMENT)),
            slip: self.si(excess::MOTOR_SLIP),
            efficiency: self.si(excess::MOTOR_EFFICIENCY),
            inertia: self.si(excess::MOTOR_INERTIA),
            dry_torque: self.si(excess::MOTOR_DRY_TORQUE),
            dry_speed: self.si(excess::MOTOR_DRY_SPEED),
            viscous: self.si(excess::MOTOR_VISCOUS),
            fan_drag: self.fan_drag(excess::MOTOR_FAN_TORQUE, excess::MOTOR_FAN_SPEED),
            check_area: self.si(excess::MOTOR_CHECK_AREA),
            check_edge: self.edge(
                excess::MOTOR_CHECK_DISCHARGE,
                excess::MOTOR_CHECK_TRANSITION,
            ),
            check_pressure: self.si(excess::CHECK_OPENING_PRESSURE),
        }
    }

    /// Quadratic drag from a torque at a speed, N m s2.
    pub(super) fn fan_drag(&self, torque: ParameterId, speed: ParameterId) -> f64 {
        self.si(torque) / self.si(speed).powi(2)
    }

    fn lift(&self) -> LiftGear {
        LiftGear {
            valve_area: self.si(lift::LIFT_VALVE_AREA),
            neutral_area: self.si(lift::LIFT_NEUTRAL_AREA),
            edge: self.edge(lift::LIFT_VALVE_DISCHARGE, lift::LIFT_VALVE_TRANSITION),
            check_pressure: self.si(excess::CHECK_OPENING_PRESSURE),
            check_area: self.si(lift::LIFT_CHECK_AREA),
            cylinder: Cylinder {
                area_a: self.si(lift::LIFT_CAP_AREA),
                area_b: self.si(lift::LIFT_ROD_AREA),
                dead_a: self.si(lift::LIFT_CAP_DEAD_VOLUME),
                dead_b: self.si(lift::LIFT_ROD_DEAD_VOLUME),
                wall_compressibility: 1.0 / self.si(lift::LIFT_WALL_MODULUS),
                stroke: self.si(lift::LIFT_STROKE),
                mass: self.si(lift::LIFT_MASS),
                damping: self.si(lift::LIFT_DAMPING),
                stop: EndStop {
                    stiffness: self.si(lift::LIFT_END_STIFFNESS),
                    loss: self.si(lift::LIFT_END_LOSS),
                },
                piston_leak: self.si(lift::LIFT_PISTON_LEAKAGE),
            },
            load: self.si(lift::LIFT_LOAD),
            dry_friction: self.si(lift::LIFT_DRY_FRICTION),
            dry_velocity: self.si(lift::LIFT_DRY_VELOCITY),
            start: self.start_travel().lift,
        }
    }
}
