//! What the machine asks of its steering.

use std::f64::consts::{FRAC_PI_4, TAU};

use helmsplit_scenario::parameter::{cylinder, limits, pump, ratings, steering, valve};
use helmsplit_scenario::{ParameterId, Scenario};

use super::damping::head_share;

/// What loads the steering cylinder.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Load {
    /// Tyres that scrub on the spot.
    Scrub(Scrub),
    /// Force at the piston, N.
    Force(f64),
    /// What the circuit's own tyres hold against at the lock.
    Circuit,
}

/// A steered axle that is turned on the spot.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Scrub {
    /// Weight on the axle, N.
    pub axle_load: f64,
    /// Friction of tyre on ground; 0.7 on dry concrete is the most.
    pub friction: f64,
    /// Width of the tyre, m.
    pub tyre_width: f64,
    /// Distance from kingpin to the middle of the tyre on the ground, m.
    pub kingpin_offset: f64,
    /// Least arm of the cylinder about the kingpins over its stroke, m.
    pub arm: f64,
    /// Whether the axle is driven: then the torque is taken twice.
    pub driven: bool,
}

/// Demand and design values from which the dimensions follow. SI.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Demand {
    /// What loads the cylinder.
    pub load: Load,
    /// Turns of the wheel from lock to lock.
    pub turns: f64,
    /// Wheel rate that the valve is made for, rad/s.
    pub wheel_rate: f64,
    /// Wheel rate that must be met at low idle, rad/s.
    pub idle_wheel_rate: f64,
    /// Share of the relief's cracking pressure that the load may take.
    pub relief_share: f64,
    /// Pressure that the spring holds over the fixed orifice, Pa.
    pub spring_drop: f64,
    /// Rise of the priority flow from first opening to full excess flow that is allowed, relative.
    pub band: f64,
    /// Drop over the excess land at top speed while nobody steers and the consumer is unloaded,
    /// Pa.
    pub land_drop: f64,
    /// Damping ratio wanted of the valve.
    pub damping_ratio: f64,
    /// Share of the damping that the head hole takes; the disc hole takes the rest.
    pub head_share: f64,
    /// Factor on the slip of a new pump with which the demand must still be met.
    pub wear: f64,
    /// Flow that the consumer needs at top speed, m3/s; 0 takes what is left.
    pub consumer_flow: f64,
    /// Pressure that the consumer needs, Pa; 0 leaves the main relief to the steering.
    pub consumer_pressure: f64,
    /// Whether standard sizes are taken where there is a series.
    pub standard_sizes: bool,
}

/// Wheel rate that steering units are laid out for, rpm.
const DESIGN_RPM: f64 = 120.0;

/// Drop that the open land costs while nobody steers, Pa.
const LAND_DROP: f64 = 8e5;

/// Factor on the slip of a new pump.
const WEAR: f64 = 2.0;

impl Demand {
    /// What a circuit implies: its tyres, cylinder, wheel rate and limits; for what it does not
    /// say, common practice (120 rpm at full speed, the load at 75 % of the relief, a drop of
    /// 8 bar over the land, twice the slip; no source).
    #[must_use]
    pub fn of(scenario: &Scenario) -> Self {
        let s = |id: ParameterId| scenario.si(id);
        let end_area = FRAC_PI_4 * s(valve::SPOOL_DIAMETER).powi(2);
        let spring = s(valve::SPRING_PRELOAD) + s(valve::SPRING_RATE) * s(valve::OVERLAP).max(0.0);
        let area = s(cylinder::AREA_A).max(s(cylinder::AREA_B));
        let volume = area * s(cylinder::STROKE);
        Self {
            load: Load::Circuit,
            turns: volume / s(steering::DISPLACEMENT),
            wheel_rate: DESIGN_RPM * TAU / 60.0,
            idle_wheel_rate: s(ratings::WHEEL_RATE),
            relief_share: 0.75,
            spring_drop: spring / end_area,
            band: s(limits::REGULATION),
            land_drop: LAND_DROP,
            damping_ratio: s(limits::DAMPING),
            head_share: head_share(scenario),
            wear: s(pump::WEAR).max(WEAR),
            consumer_flow: 0.0,
            consumer_pressure: 0.0,
            standard_sizes: true,
        }
    }
}
