//! Equations of a steering circuit with a priority flow control valve.
//!
//! A fixed-displacement pump feeds a three-port valve: the first oil goes through a fixed orifice
//! in the spool to the priority port and the steering; what is left goes over the metering land
//! to the excess port. This crate holds the equations of every part and of the whole, generic
//! over the scalar ([`Real`]), so that the same code gives values with `f64` and the exact
//! Jacobian with [`Dual`]. It knows nothing of files, units, solvers or screens.
//!
//! Start with [`Circuit`]; its [`Parts`] name every slot and what may sit in it.
//!
//! # Conventions
//! SI throughout. Pressures are gauge except where a name says `absolute`. A flow is positive in
//! the direction of its name. Spool travel `x` is 0 with the valve sprung shut on the excess side
//! and positive towards opening it. Equation numbers (M2.1 ...) refer to `docs/model.md`.
//!
//! # Not in here
//! Temperature changes along the circuit, wave propagation inside a line segment, elastic
//! deformation of the valve body, eccentric spools, cavitation damage, and the mechanics of the
//! machine beyond one mass, spring and friction at the steering cylinder.

// The shared fixture of the tests names the crate as its users do.
#[cfg(test)]
extern crate self as helmsplit_model;

mod accounts;
mod circuit;
mod compression;
mod cylinder;
mod dependence;
mod dual;
mod end_stop;
mod evaluate;
mod evaluate_excess;
mod evaluate_steering;
mod friction;
mod jacobian;
mod land;
mod layout;
mod line;
mod monotone_cubic;
mod motor;
mod node;
mod oil;
mod orifice;
mod parts;
mod priority_valve;
mod profile;
mod pump;
mod quantity;
mod real;
mod relief;
mod signal;
mod smooth;
mod sparsity;
mod state;
mod steering_unit;

pub use accounts::Accounts;
pub use circuit::{Circuit, CircuitError, MOST_STATES};
pub use cylinder::Cylinder;
pub use dual::Dual;
pub use end_stop::{EndStop, pair_force};
pub use friction::{Bristle, Friction};
pub use land::{LandShape, MeteringLand, Opening};
pub use line::Line;
pub use monotone_cubic::MonotoneCubic;
pub use motor::{HydraulicMotor, MotorFlows};
pub use node::Chamber;
pub use oil::{ATMOSPHERE, ICE_POINT, LEAST_AIR, Oil, WaltherLine, density_at};
pub use orifice::{Edge, LEAST_TRANSITION, Orifice, effective_discharge, velocity};
pub use parts::{
    BenchThrottle, ExcessSide, LiftGear, Parts, PrimeMover, PriorityLine, PriorityRelief,
    ReturnSide, SteeringGear, SteeringSide, Suction,
};
pub use priority_valve::{PriorityValve, SpoolForces, SpoolPressures, ValveFlows};
pub use profile::{
    BREAKPOINT_SPACING, Breakpoint, Input, InputProfiles, InputSegment, Inputs, Profile,
    ProfileError,
};
pub use pump::{Filling, GovernedEngine, Pump, PumpFlows, Ripple};
pub use quantity::Quantity;
pub use real::Real;
pub use relief::Relief;
pub use signal::{Observer, Readings, Signal, Unobserved};
pub use smooth::{ramp, ramp_slope, smooth_step};
pub use state::StateInfo;
pub use steering_unit::{SteeringFlows, SteeringUnit};
