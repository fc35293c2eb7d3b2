//! The invented valve that many closed forms are worked out for: 16 mm spool of 60 g, spring
//! 104 N + 8 N/mm, fixed orifice 3.7 mm, head hole 1.0 mm, disc hole 0.8 mm.
//!
//! Friction, film, leakage and end lands are left out, so that one effect stands alone; a check
//! adds back what it is about.

use helmsplit_model::{
    Chamber, Edge, EndStop, Friction, LandShape, MeteringLand, Orifice, PriorityValve,
    SpoolPressures,
};

/// Discharge coefficient of every restriction.
pub const CD: f64 = 0.62;

/// Transition Reynolds number of every restriction; without viscosity it does not act.
const TRANSITION: f64 = 60.0;

/// Jet angle of a sharp edge, degrees.
const JET_ANGLE: f64 = 69.0;

/// Travel before the excess land opens, m.
pub const OVERLAP: f64 = 1.5e-3;

/// An edge with a discharge coefficient.
#[must_use]
pub fn edge(discharge: f64) -> Edge {
    Edge {
        discharge,
        transition_reynolds: TRANSITION,
    }
}

/// The valve.
#[must_use]
pub fn test_valve() -> PriorityValve {
    PriorityValve {
        diameter: 16e-3,
        mass: 0.06,
        preload: 104.0,
        spring_rate: 8e3,
        friction: Friction::removed(),
        viscous: 0.0,
        fixed_orifice: Orifice::round(3.7e-3, CD, TRANSITION),
        head_hole: Orifice::round(1.0e-3, CD, TRANSITION),
        disc_hole: Orifice::round(0.8e-3, CD, TRANSITION),
        land: MeteringLand {
            shape: LandShape::Sharp,
            diameter: 16e-3,
            overlap: OVERLAP,
            // A port so wide that it never limits the opening.
            port_area: 1.0,
        },
        land_edge: edge(CD),
        holes_area: 40e-6,
        holes_leak: 0.0,
        holes_start: 20e-3,
        holes_end: 25e-3,
        holes_edge: edge(CD),
        clearance_factor: 0.0,
        end_conductance: 0.0,
        land_jet_cosine: JET_ANGLE.to_radians().cos(),
        holes_jet_cosine: JET_ANGLE.to_radians().cos(),
        jet_factor: 1.0,
        damping_length: 0.0,
        stop: EndStop {
            stiffness: 2e7,
            loss: 1.0,
        },
        stroke: 30e-3,
        inlet: Chamber::rigid(150e-6),
        bore: Chamber::rigid(1.5e-6),
        head: Chamber::rigid(4e-6),
        spring: Chamber::rigid(12e-6),
        priority_port: Chamber::rigid(20e-6),
        excess_port: Chamber::rigid(150e-6),
    }
}

/// One pressure all around the spool, Pa.
#[must_use]
pub fn even_pressure(pressure: f64) -> SpoolPressures<f64> {
    SpoolPressures {
        inlet: pressure,
        bore: pressure,
        head: pressure,
        spring: pressure,
        priority: pressure,
        excess: pressure,
    }
}
