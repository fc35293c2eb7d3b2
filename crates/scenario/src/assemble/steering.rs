//! What the priority port feeds (M7).

use helmsplit_model::{
    BenchThrottle, Bristle, Chamber, Cylinder, EndStop, Friction, HydraulicMotor, Oil, Relief,
    SteeringGear, SteeringSide, SteeringUnit,
};

use crate::choice::{ShockReliefs, SteeringKind, TyreFriction};
use crate::parameter::{cylinder, steering, steering_motor as motor};
use crate::scenario::Scenario;

impl Scenario {
    pub(super) fn steering(&self, oil: &Oil) -> SteeringSide {
        match self.chosen::<SteeringKind>() {
            SteeringKind::BenchThrottle => SteeringSide::Bench(BenchThrottle {
                edge: self.edge(steering::BENCH_DISCHARGE, steering::BENCH_TRANSITION),
                check_pressure: self.si(steering::CHECK_OPENING_PRESSURE),
            }),
            SteeringKind::SteeringUnit => SteeringSide::Unit(SteeringGear {
                unit: self.steering_unit(oil),
                cylinder: self.steering_cylinder(),
                tyre_rate: self.si(cylinder::TYRE_RATE),
                scrub: self.scrub(),
                suction_area: self.si(steering::SUCTION_CHECK_AREA),
                suction_edge: self.edge(
                    steering::SUCTION_CHECK_DISCHARGE,
                    steering::SUCTION_CHECK_TRANSITION,
                ),
                shock_relief: match self.chosen::<ShockReliefs>() {
                    ShockReliefs::None => None,
                    ShockReliefs::Fitted => Some(self.shock_relief(oil)),
                },
            }),
            SteeringKind::Motor => SteeringSide::Motor(self.priority_motor()),
        }
    }

    fn steering_unit(&self, oil: &Oil) -> SteeringUnit {
        // Leakage through narrow gaps is laminar: it goes with the inverse of the viscosity.
        let thinner = self.si(steering::LEAKAGE_VISCOSITY) / oil.kinematic_viscosity;
        SteeringUnit {
            displacement: self.si(steering::DISPLACEMENT),
            bypass_area: self.si(steering::BYPASS_AREA),
            bypass_leak: self.si(steering::BYPASS_LEAK_AREA),
            bypass_shut: self.si(steering::BYPASS_SHUT),
            supply_area: self.si(steering::SUPPLY_AREA),
            return_area: self.si(steering::RETURN_AREA),
            dead_band: self.si(steering::DEAD_BAND),
            full_deflection: self.si(steering::FULL_DEFLECTION),
            stop_deflection: self.si(steering::STOP_DEFLECTION),
            stop_band: self.si(steering::STOP_BAND),
            centring_time: self.si(steering::CENTRING_TIME),
            centring_rate: self.si(steering::CENTRING_RATE),
            check_pressure: self.si(steering::CHECK_OPENING_PRESSURE),
            supply_leak: self.si(steering::SUPPLY_LEAKAGE) * thinner,
            port_leak: self.si(steering::PORT_LEAKAGE) * thinner,
            bypass_edge: self.edge(steering::BYPASS_DISCHARGE, steering::BYPASS_TRANSITION),
            port_edge: self.edge(steering::EDGE_DISCHARGE, steering::EDGE_TRANSITION),
        }
    }

    fn steering_cylinder(&self) -> Cylinder {
        Cylinder {
            area_a: self.si(cylinder::AREA_A),
            area_b: self.si(cylinder::AREA_B),
            dead_a: self.si(cylinder::DEAD_VOLUME_A),
            dead_b: self.si(cylinder::DEAD_VOLUME_B),
            wall_compressibility: 1.0 / self.si(cylinder::WALL_MODULUS),
            stroke: self.si(cylinder::STROKE),
            mass: self.si(cylinder::LOAD_MASS),
            damping: self.si(cylinder::DAMPING),
            stop: EndStop {
                stiffness: self.si(cylinder::STOP_STIFFNESS),
                loss: self.si(cylinder::STOP_LOSS),
            },
            piston_leak: self.si(cylinder::PISTON_LEAKAGE),
        }
    }

    fn scrub(&self) -> Friction {
        let coulomb = self.si(cylinder::TYRE_FRICTION_FORCE);
        match self.chosen::<TyreFriction>() {
            TyreFriction::Smooth => Friction::Smooth {
                coulomb,
                velocity: self.si(cylinder::TYRE_FRICTION_VELOCITY),
            },
            TyreFriction::Bristle => Friction::Bristle(Bristle {
                coulomb,
                breakaway: self.si(cylinder::TYRE_BREAKAWAY),
                stribeck_velocity: self.si(cylinder::TYRE_STRIBECK_VELOCITY),
                stiffness: self.si(cylinder::TYRE_BRISTLE_STIFFNESS),
                damping: self.si(cylinder::TYRE_BRISTLE_DAMPING),
                viscous: self.si(cylinder::TYRE_BRISTLE_VISCOUS),
            }),
        }
    }

    /// Shock reliefs follow at once: the equations give them no state of their own.
    fn shock_relief(&self, oil: &Oil) -> Relief {
        let edge = self.edge(steering::SHOCK_DISCHARGE, steering::SHOCK_TRANSITION);
        let full_flow_pressure = self.si(steering::SHOCK_FULL_FLOW_PRESSURE);
        Relief {
            cracking: self.si(steering::SHOCK_CRACKING_PRESSURE),
            full_flow_pressure,
            full_area: Relief::full_area(
                self.si(steering::SHOCK_FULL_FLOW),
                full_flow_pressure,
                &edge,
                oil.density,
            ),
            time_constant: f64::MIN_POSITIVE,
            opening_width: self.si(steering::SHOCK_OPENING_WIDTH),
            least_opening: self.si(steering::SHOCK_LEAST_OPENING),
            edge,
        }
    }

    fn priority_motor(&self) -> HydraulicMotor {
        HydraulicMotor {
            valve_area: self.si(motor::MOTOR_VALVE_AREA),
            valve_edge: self.edge(motor::MOTOR_VALVE_DISCHARGE, motor::MOTOR_VALVE_TRANSITION),
            chamber: Chamber::with_wall(
                self.si(motor::MOTOR_VOLUME),
                self.si(motor::MOTOR_WALL_MODULUS),
            ),
            displacement_rad: HydraulicMotor::per_radian(self.si(motor::MOTOR_DISPLACEMENT)),
            slip: self.si(motor::MOTOR_SLIP),
            efficiency: self.si(motor::MOTOR_EFFICIENCY),
            inertia: self.si(motor::MOTOR_INERTIA),
            dry_torque: self.si(motor::MOTOR_DRY_TORQUE),
            dry_speed: self.si(motor::MOTOR_DRY_SPEED),
            viscous: self.si(motor::MOTOR_VISCOUS),
            fan_drag: self.fan_drag(motor::MOTOR_FAN_TORQUE, motor::MOTOR_FAN_SPEED),
            check_area: self.si(motor::MOTOR_CHECK_AREA),
            check_edge: self.edge(motor::MOTOR_CHECK_DISCHARGE, motor::MOTOR_CHECK_TRANSITION),
            check_pressure: self.si(steering::CHECK_OPENING_PRESSURE),
        }
    }
}
