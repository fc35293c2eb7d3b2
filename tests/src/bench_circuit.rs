//! A whole circuit around the test valve whose steering cylinder stands alone: ports shut, no
//! tyre, no friction, no leakage.

use std::f64::consts::TAU;

use helmsplit_model::{
    Circuit, CircuitError, Cylinder, EndStop, ExcessSide, Friction, Line, Oil, Parts, PrimeMover,
    PriorityLine, PriorityRelief, Pump, ReturnSide, Ripple, SteeringGear, SteeringSide,
    SteeringUnit, Suction,
};

use crate::test_valve::{CD, edge, test_valve};

/// A steering unit of 125 cm3/rev.
#[must_use]
pub fn steering_unit() -> SteeringUnit {
    SteeringUnit {
        displacement: 125e-6,
        bypass_area: 45e-6,
        bypass_leak: 0.0,
        bypass_shut: 5f64.to_radians(),
        supply_area: 18e-6,
        return_area: 22e-6,
        dead_band: 1f64.to_radians(),
        full_deflection: 8f64.to_radians(),
        stop_deflection: 10f64.to_radians(),
        stop_band: 2f64.to_radians(),
        centring_time: 0.05,
        centring_rate: 0.2,
        check_pressure: 0.3e5,
        supply_leak: 0.0,
        port_leak: 0.0,
        bypass_edge: edge(CD),
        port_edge: edge(CD),
    }
}

/// A cylinder of 25 cm2 on both sides with a stroke of 200 mm and 800 kg, without dead volume,
/// leakage or damping; `wall` in Pa.
#[must_use]
pub fn cylinder(wall: f64) -> Cylinder {
    Cylinder {
        area_a: 25e-4,
        area_b: 25e-4,
        dead_a: 0.0,
        dead_b: 0.0,
        wall_compressibility: 1.0 / wall,
        stroke: 0.2,
        mass: 800.0,
        damping: 0.0,
        stop: EndStop {
            stiffness: 5e7,
            loss: 1.0,
        },
        piston_leak: 0.0,
    }
}

/// The circuit with a given oil and cylinder.
///
/// # Errors
/// As [`Circuit::new`]; the parts below are a circuit.
pub fn circuit(oil: Oil, cylinder: Cylinder) -> Result<Circuit, CircuitError> {
    Circuit::new(Parts {
        oil,
        prime_mover: PrimeMover::SpeedProfile,
        pump: Pump {
            displacement_rad: 20e-6 / TAU,
            slip: 0.0,
            hydromechanical_efficiency: 1.0,
            aeration_loss: 1.0,
            ripple: Ripple::None,
        },
        suction: Suction::Flooded,
        valve: test_valve(),
        main_relief: None,
        priority_relief: PriorityRelief::None,
        line: PriorityLine {
            line: Line {
                length: 2.0,
                bore: 10e-3,
                fitting_loss: 3.0,
                segments: 1,
            },
            wall_compressibility: 0.0,
            end_volume: 30e-6,
        },
        steering: SteeringSide::Unit(SteeringGear {
            unit: steering_unit(),
            cylinder,
            tyre_rate: 0.0,
            scrub: Friction::removed(),
            suction_area: 40e-6,
            suction_edge: edge(CD),
            shock_relief: None,
        }),
        excess: ExcessSide::Tank {
            area: 60e-6,
            edge: edge(CD),
        },
        excess_relief: None,
        return_side: ReturnSide::Constant(0.0),
        cylinder_start: 0.0,
    })
}
