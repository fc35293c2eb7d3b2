//! The slots of a circuit and what may sit in each.

use crate::cylinder::Cylinder;
use crate::friction::Friction;
use crate::line::Line;
use crate::motor::HydraulicMotor;
use crate::node::Chamber;
use crate::oil::Oil;
use crate::orifice::Edge;
use crate::priority_valve::PriorityValve;
use crate::pump::{Filling, GovernedEngine, Pump};
use crate::relief::Relief;
use crate::steering_unit::SteeringUnit;

/// Everything that a circuit is made of.
#[derive(Debug, Clone, PartialEq)]
pub struct Parts {
    /// Oil at its temperature.
    pub oil: Oil,
    /// What turns the pump.
    pub prime_mover: PrimeMover,
    /// Pump.
    pub pump: Pump,
    /// What feeds the pump.
    pub suction: Suction,
    /// Priority flow control valve.
    pub valve: PriorityValve,
    /// Relief at the inlet.
    pub main_relief: Option<Relief>,
    /// Relief of the steering side.
    pub priority_relief: PriorityRelief,
    /// Line from priority port to steering.
    pub line: PriorityLine,
    /// What the priority port feeds.
    pub steering: SteeringSide,
    /// What the excess port feeds.
    pub excess: ExcessSide,
    /// Relief at the excess port.
    pub excess_relief: Option<Relief>,
    /// Way back to tank.
    pub return_side: ReturnSide,
    /// Travel of the steering cylinder at the start, m from mid-stroke.
    pub cylinder_start: f64,
}

/// What turns the pump (M4.6).
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum PrimeMover {
    /// The speed is an input.
    SpeedProfile,
    /// The set speed is an input, the speed a state.
    Governed(GovernedEngine),
}

/// What feeds the pump (M4.5).
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Suction {
    /// Tank pressure, always filled.
    Flooded,
    /// A suction line with a node ahead of the pump.
    Line {
        /// Hose and strainer; one segment.
        line: Line,
        /// Node ahead of the pump.
        chamber: Chamber,
        /// Filling of the pump.
        filling: Filling,
    },
}

/// Relief of the steering side (M6).
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum PriorityRelief {
    /// None.
    None,
    /// On the priority port.
    OnPort(Relief),
    /// A pilot on the spring chamber; the disc hole is its metering restriction.
    Pilot(Relief),
}

/// Line from priority port to steering (M7.2).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PriorityLine {
    /// Length, bore, losses, segments.
    pub line: Line,
    /// Compressibility of its wall, 1/Pa.
    pub wall_compressibility: f64,
    /// Volume at its steering end beside its own, m3.
    pub end_volume: f64,
}

impl PriorityLine {
    /// Chamber at the end of one segment.
    #[inline(always)]
    #[must_use]
    pub fn segment_chamber(&self) -> Chamber {
        Chamber {
            volume: self.line.volume() / self.line.segments as f64,
            wall_compressibility: self.wall_compressibility,
        }
    }

    /// Chamber at the steering end: the last segment's share and the end volume.
    #[inline(always)]
    #[must_use]
    pub fn end_chamber(&self) -> Chamber {
        let segment = self.segment_chamber();
        Chamber {
            volume: segment.volume + self.end_volume,
            ..segment
        }
    }
}

/// What the priority port feeds (M7).
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(
    clippy::large_enum_variant,
    reason = "one a circuit, read in every evaluation"
)]
pub enum SteeringSide {
    /// A throttle behind a check valve into a given pressure; area and pressure are inputs.
    Bench(BenchThrottle),
    /// Steering unit, cylinder and tyre.
    Unit(SteeringGear),
    /// A hydraulic motor.
    Motor(HydraulicMotor),
}

/// A bench throttle: never lets oil back (M7.4, M8.2).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct BenchThrottle {
    /// Its edge.
    pub edge: Edge,
    /// Pressure over which its check valve opens, Pa.
    pub check_pressure: f64,
}

/// Steering unit, cylinder and tyre (M7.5 to M7.7).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct SteeringGear {
    /// Steering unit.
    pub unit: SteeringUnit,
    /// Cylinder.
    pub cylinder: Cylinder,
    /// Spring rate of the tyres, N/m.
    pub tyre_rate: f64,
    /// Dry friction of the tyres' scrub.
    pub scrub: Friction,
    /// Area of each suction check valve, m2.
    pub suction_area: f64,
    /// Edge of the suction check valves.
    pub suction_edge: Edge,
    /// Shock relief on each cylinder port, if fitted.
    pub shock_relief: Option<Relief>,
}

/// What the excess port feeds (M8).
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum ExcessSide {
    /// Straight to the return through an orifice; scaled by the command.
    Tank {
        /// Area at full command, m2.
        area: f64,
        /// Its edge.
        edge: Edge,
    },
    /// A throttle into a given pressure; scaled by the command, the pressure is an input.
    Bench {
        /// Area at full command, m2.
        area: f64,
        /// Throttle.
        throttle: BenchThrottle,
    },
    /// A hydraulic motor; the command drives its on/off valve.
    Motor(HydraulicMotor),
    /// A lift cylinder behind a directional valve; the command runs from -1 (lower) to 1 (lift).
    Lift(LiftGear),
    /// Nothing: the port is blocked.
    Blocked,
}

/// A lift cylinder behind a directional valve (M8.4).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct LiftGear {
    /// Area of each working edge at full command, m2.
    pub valve_area: f64,
    /// Area from excess port to return at no command, m2; 0 for a closed centre.
    pub neutral_area: f64,
    /// Edge of the directional valve.
    pub edge: Edge,
    /// Pressure over which the load-holding check valve opens, Pa.
    pub check_pressure: f64,
    /// Area of each anti-cavitation check valve, m2.
    pub check_area: f64,
    /// Cylinder; chamber A lifts.
    pub cylinder: Cylinder,
    /// Weight and other steady load against lifting, N.
    pub load: f64,
    /// Dry friction, N.
    pub dry_friction: f64,
    /// Velocity at which dry friction has grown to 76 %, m/s.
    pub dry_velocity: f64,
    /// Travel at the start, m from mid-stroke.
    pub start: f64,
}

/// The way back to tank (M9).
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum ReturnSide {
    /// A constant back pressure, Pa.
    Constant(f64),
    /// A node behind filter and cooler.
    Restricted {
        /// Node where the return flows meet.
        chamber: Chamber,
        /// Area of filter and cooler taken as one orifice, m2.
        area: f64,
        /// Its edge.
        edge: Edge,
    },
}
