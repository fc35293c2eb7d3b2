//! The maps that the checks look at.

use helmsplit_scenario::Scenario;
use helmsplit_scenario::choice::SteeringKind;

use super::axis::{Axis, MapSpec, steering_point};
use super::compute::{MapWatch, OperatingMap, operating_map};
use crate::error::StudyError;
use crate::operating::{OperatingPoint, Variable};

/// Grid lines of each map for the checks, along each axis: the checks look for extremes, which lie
/// at the edges or where the lines gather.
const LINES: usize = 14;

/// The maps that the checks look at, few and coarse: engine speed against the pressure of the
/// steering while the wheel turns at the rate to be met; engine speed against what loads the excess
/// side; and, with a steering wheel, the latter with the wheel at rest as well.
///
/// # Errors
/// [`StudyError::Point`] if the scenario is no circuit.
pub fn check_maps(
    scenario: &Scenario,
    watch: MapWatch<'_>,
) -> Result<Vec<OperatingMap>, StudyError> {
    specs(scenario)
        .iter()
        .map(|spec| operating_map(scenario, spec, watch))
        .collect()
}

fn specs(scenario: &Scenario) -> Vec<MapSpec> {
    let steers = steering_point(scenario);
    let rests = OperatingPoint::resting(scenario);
    let against = |variable: Variable, point: &OperatingPoint| MapSpec {
        x: Axis::usual(scenario, Variable::EngineSpeed, LINES),
        y: Axis::usual(scenario, variable, LINES),
        point: point.clone(),
        refine: true,
    };
    let kind = scenario.chosen::<SteeringKind>();
    let excess = Variable::excess_load(scenario);
    let mut specs = Vec::new();
    if kind != SteeringKind::Motor {
        specs.push(against(Variable::SteeringPressure, &steers));
    }
    specs.extend(excess.map(|load| against(load, &steers)));
    if kind == SteeringKind::SteeringUnit {
        specs.extend(excess.map(|load| against(load, &rests)));
    }
    if specs.is_empty() {
        // A motor on the priority port and nothing on the excess port: the pump is left to vary.
        specs.push(against(Variable::wear(scenario), &steers));
    }
    specs
}
