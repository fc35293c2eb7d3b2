//! Which parameters a study varies.

use helmsplit_model::Quantity;
use helmsplit_scenario::{Parameter, ParameterId, Scenario, parameters};

/// Sections that describe the task, the limits and the solver, not the circuit.
const NOT_OF_THE_CIRCUIT: [&str; 5] = ["start", "manoeuvre", "limits", "ratings", "solver"];

/// Parameters that shape the equations where nature has no edge: numbers, not hardware.
fn is_numeric(row: &Parameter) -> bool {
    let name = row.name();
    name.ends_with("opening_width")
        || name.ends_with("friction_velocity")
        || name == "motor_dry_speed"
        || name == "centring_rate"
}

/// Names of what a designer does not choose: properties of oil, edges and bodies, loads, faults.
const GIVEN: [&str; 17] = [
    "discharge",
    "transition",
    "stiffness",
    "loss",
    "leakage",
    "leak_area",
    "least_opening",
    "reference_",
    "measured_",
    "wear",
    "friction",
    "tyre_",
    "load_",
    "aeration_loss",
    "efficiency",
    "jet_",
    "viscosity",
];

/// Parameters of the circuit that a scenario uses and that can be varied smoothly: all but whole
/// numbers, numerics, and what describes task, limits and solver.
#[must_use]
pub fn varied_parameters(scenario: &Scenario) -> Vec<ParameterId> {
    parameters()
        .iter()
        .filter(|row| {
            scenario.uses(row.id)
                && row.quantity != Quantity::Count
                && !NOT_OF_THE_CIRCUIT.contains(&row.section())
                && !is_numeric(row)
        })
        .map(|row| row.id)
        .collect()
}

/// Those of them that a designer chooses: dimensions, springs, settings, volumes, masses. Oil,
/// prime mover, loads, wear and properties of edges are left out.
#[must_use]
pub fn design_parameters(scenario: &Scenario) -> Vec<ParameterId> {
    let mut chosen = varied_parameters(scenario);
    chosen.retain(|id| {
        let row = id.parameter();
        let section = row.section();
        section != "oil"
            && section != "prime_mover"
            && !GIVEN.iter().any(|given| row.name().contains(given))
            && !(section == "excess" && row.name().starts_with("motor_"))
            && !(section == "excess" && row.name().starts_with("lift_"))
            && !(section == "steering" && row.name().starts_with("motor_"))
    });
    chosen
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_designer_chooses_dimensions_and_settings() {
        let scenario = Scenario::default();
        let paths: Vec<_> = design_parameters(&scenario)
            .iter()
            .map(|id| id.parameter().path)
            .collect();
        for path in [
            "pump.displacement",
            "valve.spool_diameter",
            "valve.spring_preload",
            "valve.spring_rate",
            "valve.fixed_orifice_diameter",
            "valve.disc_hole_diameter",
            "valve.head_hole_diameter",
            "valve.chamfer_angle",
            "valve.inlet_volume",
            "main_relief.cracking_pressure",
            "line.bore",
            "line.length",
            "steering.displacement",
        ] {
            assert!(paths.contains(&path), "{path} is left out");
        }
        for path in [
            "oil.temperature",
            "pump.wear",
            "valve.land_discharge",
            "valve.notch_angle",
            "valve.stop_stiffness",
            "steering.tyre_friction_force",
            "solver.relative_tolerance",
            "limits.overshoot",
        ] {
            assert!(!paths.contains(&path), "{path} is no choice");
        }
    }
}
