//! A whole circuit around the test valve, bare enough for closed forms: ideal pump, no reliefs,
//! throttle on the priority port, orifice to tank on the excess port, and a compliance that is the
//! same at every pressure.

use std::f64::consts::{FRAC_PI_4, TAU};

use helmsplit_model::{
    BenchThrottle, Chamber, Circuit, Edge, ExcessSide, Input, InputProfiles, Line, Oil, Parts,
    PrimeMover, PriorityLine, PriorityRelief, Profile, Pump, ReturnSide, Ripple, SteeringSide,
    Suction,
};
use helmsplit_sim::{RunResult, RunSetup, SolverOptions, Start, Watch, run};

use crate::ideal::{linear_chamber, stiff, viscous_oil};
use crate::test_valve::{CD, edge, test_valve};
use crate::trouble::Tried;

/// Density of the oil, kg/m3.
pub const DENSITY: f64 = 850.0;

/// Pressure that the runs start from, Pa: no chamber comes near vacuum.
pub const EVEN: f64 = 50e5;

/// Transition Reynolds number of a restriction that is turbulent to all digits that are compared.
pub const TURBULENT: f64 = 1e-3;

/// The circuit's oil: its viscosity is that of every day, so that the rest of the circuit behaves.
#[must_use]
pub fn oil() -> Oil {
    stiff(viscous_oil(DENSITY, 30e-6))
}

/// An edge that is turbulent from the first drop.
#[must_use]
pub fn sharp_edge() -> Edge {
    Edge {
        transition_reynolds: TURBULENT,
        ..edge(CD)
    }
}

/// Area of a round hole, m2, from its diameter in m.
#[must_use]
pub fn hole(diameter: f64) -> f64 {
    FRAC_PI_4 * diameter * diameter
}

/// The parts. `modulus` (Pa) holds for every chamber.
#[must_use]
pub fn parts(modulus: f64) -> Parts {
    let mut valve = test_valve();
    for chamber in [
        &mut valve.inlet,
        &mut valve.bore,
        &mut valve.head,
        &mut valve.spring,
        &mut valve.priority_port,
        &mut valve.excess_port,
    ] {
        let Chamber { volume, .. } = *chamber;
        *chamber = linear_chamber(volume, modulus);
    }
    Parts {
        oil: oil(),
        prime_mover: PrimeMover::SpeedProfile,
        pump: Pump {
            displacement_rad: 20e-6 / TAU,
            slip: 0.0,
            hydromechanical_efficiency: 1.0,
            aeration_loss: 0.0,
            ripple: Ripple::None,
        },
        suction: Suction::Flooded,
        valve,
        main_relief: None,
        priority_relief: PriorityRelief::None,
        line: PriorityLine {
            line: Line {
                length: 2.0,
                bore: 10e-3,
                fitting_loss: 0.0,
                segments: 1,
            },
            wall_compressibility: 1.0 / modulus,
            end_volume: 0.0,
        },
        steering: SteeringSide::Bench(BenchThrottle {
            edge: edge(CD),
            check_pressure: 0.3e5,
        }),
        excess: ExcessSide::Tank {
            area: hole(1e-3),
            edge: sharp_edge(),
        },
        excess_relief: None,
        return_side: ReturnSide::Constant(0.0),
        cylinder_start: 0.0,
    }
}

/// A state with [`EVEN`] in every chamber and all else at 0, but for the states named.
#[must_use]
pub fn even_state(circuit: &Circuit, but: &[(&str, f64)]) -> Vec<f64> {
    let value = |name: &str| {
        let named = but.iter().find(|(known, _)| *known == name);
        let even = if name.starts_with("p_") { EVEN } else { 0.0 };
        named.map_or(even, |(_, value)| *value)
    };
    circuit
        .states()
        .iter()
        .map(|state| value(&state.name))
        .collect()
}

/// Inputs that stay at a level each; all others are 0.
#[must_use]
pub fn levels(levels: &[(Input, f64)]) -> InputProfiles {
    let mut inputs = InputProfiles::default();
    for &(input, level) in levels {
        inputs.set(input, Profile::constant(level));
    }
    inputs
}

/// Runs the circuit from a state to `end` (s) at a relative tolerance of 1e-8.
///
/// # Errors
/// If the state does not fit or the solver gives up.
pub fn run_from(
    circuit: &Circuit,
    inputs: &InputProfiles,
    state: Vec<f64>,
    end: f64,
) -> Tried<RunResult> {
    let result = run(
        &RunSetup {
            circuit,
            inputs,
            from: 0.0,
            to: end,
            start: &Start::From(state),
            options: &SolverOptions::with_tolerance(1e-8),
        },
        &mut Watch::none(),
    )?;
    if result.end.is_finished() {
        Ok(result)
    } else {
        Err(result.end.into())
    }
}
