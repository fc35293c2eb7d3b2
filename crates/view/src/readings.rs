//! What is known of a part of a drawing at a moment: pressures, flows, openings, forces.

use helmsplit_model::{Circuit, Quantity, Signal};
use helmsplit_scenario::UnitSystem;

use crate::diagram::value_text;
use crate::moment::Moment;
use crate::plot::number_text;
use crate::unit_text::unit_text;

/// One value with its name.
#[derive(Debug, Clone, PartialEq)]
pub struct Reading {
    /// What a person calls it.
    pub name: String,
    /// The value with its unit.
    pub text: String,
}

/// Where a value is taken from.
enum From {
    /// A state, by its short name.
    State(&'static str),
    /// A signal.
    Signal(Signal),
}

use From::{Signal as Q, State as P};

/// What is told of the part of that id, of [`crate::circuit_scene`] or [`crate::valve_scene`], in
/// the order of importance. Values that the circuit does not have are left out; so a part that has
/// none, such as the pressure scale, gives nothing.
#[must_use]
pub fn part_readings(
    circuit: &Circuit,
    moment: &Moment,
    id: &str,
    units: UnitSystem,
) -> Vec<Reading> {
    let id = id.strip_suffix("_note").unwrap_or(id);
    let of_valve = id.strip_prefix("valve.");
    let wanted = of_valve.map_or_else(|| in_circuit(id), in_section);
    let found = wanted.iter().filter_map(|from| match from {
        P(name) => {
            let info = circuit.states().iter().find(|info| info.name == *name)?;
            let value = moment.state(name)?;
            Some((info.label.as_str(), value, info.quantity))
        }
        Q(signal) => {
            let value = moment.signal(*signal)?;
            Some((signal.label(), value, signal.quantity()))
        }
    });
    let reading = |(name, value, quantity): (&str, f64, Quantity)| Reading {
        name: name.to_owned(),
        text: text_of(value, quantity, units),
    };
    found.map(reading).collect()
}

/// Three significant digits, four places at most; shares in per cent.
fn text_of(si: f64, quantity: Quantity, units: UnitSystem) -> String {
    if quantity == Quantity::Ratio {
        return format!("{} %", number_text(100.0 * si, 0));
    }
    if units == UnitSystem::Si {
        return value_text(si, quantity, units);
    }
    let unit = units.unit(quantity);
    let value = unit.value_from_si(si);
    let size = value.abs().max(1e-9).log10().floor() as i32;
    let places = usize::try_from((2 - size).clamp(0, 4)).unwrap_or(0);
    // What rounds to nothing has no places to show.
    let nothing = value.abs() < 0.5 * 0.1_f64.powi(4);
    let number = number_text(value, if nothing { 0 } else { places });
    format!("{number} {}", unit_text(unit))
        .trim_end()
        .to_owned()
}

fn in_circuit(id: &str) -> &'static [From] {
    match id {
        "prime_mover" => &[
            Q(Signal::EngineSpeed),
            Q(Signal::EngineSetSpeed),
            Q(Signal::PumpTorque),
            Q(Signal::EngineTorque),
            Q(Signal::PumpShaftPower),
        ],
        "suction" => &[P("p_suc"), Q(Signal::SuctionFlow), Q(Signal::PumpFill)],
        "pump" => &[
            Q(Signal::PumpFlow),
            P("p_in"),
            Q(Signal::PumpSlip),
            Q(Signal::PumpTorque),
            Q(Signal::PumpPower),
        ],
        "inlet" => &[P("p_in"), Q(Signal::PumpFlow)],
        "main_relief" => &[
            P("p_in"),
            Q(Signal::MainReliefOpening),
            Q(Signal::MainReliefFlow),
        ],
        "valve" => &[
            P("x"),
            Q(Signal::PriorityFlow),
            Q(Signal::ExcessFlow),
            Q(Signal::PressureMargin),
            Q(Signal::LandArea),
            Q(Signal::HolesArea),
            Q(Signal::SpringForce),
            Q(Signal::EndPressureForce),
        ],
        "priority_relief" => &[
            P("p_c"),
            P("p_s"),
            Q(Signal::PriorityReliefOpening),
            Q(Signal::PriorityReliefFlow),
            Q(Signal::PilotReliefFlow),
        ],
        "line" => &[
            P("p_c"),
            P("p_su"),
            Q(Signal::LineFlow),
            Q(Signal::LineEndFlow),
            Q(Signal::LinePressureDrop),
        ],
        "return_line" => &[P("p_ret"), Q(Signal::ReturnFlow)],
        _ => in_steering(id),
    }
}

fn in_steering(id: &str) -> &'static [From] {
    match id {
        "steering.bench" => &[
            P("p_su"),
            Q(Signal::BenchPressure),
            Q(Signal::BenchArea),
            Q(Signal::BenchFlow),
        ],
        "steering.unit" => &[
            Q(Signal::WheelRate),
            Q(Signal::WheelRateEffective),
            Q(Signal::WheelShortfall),
            P("p_su"),
            Q(Signal::MeterFlow),
            Q(Signal::NeutralBypassFlow),
            Q(Signal::MeterArea),
            Q(Signal::SteeringReturnFlow),
        ],
        "steering.cylinder" => &[
            P("y_c"),
            P("v_c"),
            P("p_A"),
            P("p_B"),
            Q(Signal::CylinderForce),
            Q(Signal::TyreForce),
            Q(Signal::ExternalForce),
        ],
        "steering.motor" => &[
            P("w_pm"),
            P("p_pm"),
            Q(Signal::PriorityMotorFlow),
            Q(Signal::PriorityCommand),
        ],
        _ => in_excess(id),
    }
}

fn in_excess(id: &str) -> &'static [From] {
    match id {
        "excess_port" => &[P("p_e"), Q(Signal::ExcessFlow), Q(Signal::ExcessOutFlow)],
        "excess_relief" => &[
            P("p_e"),
            Q(Signal::ExcessReliefOpening),
            Q(Signal::ExcessReliefFlow),
        ],
        "excess.tank" => &[P("p_e"), Q(Signal::ExcessOutFlow), Q(Signal::ExcessCommand)],
        "excess.bench" => &[
            P("p_e"),
            Q(Signal::ExcessBenchPressure),
            Q(Signal::ExcessOutFlow),
            Q(Signal::ExcessCommand),
        ],
        "excess.motor" => &[
            P("w_m"),
            P("p_m"),
            Q(Signal::MotorFlow),
            Q(Signal::AntiCavitationFlow),
            Q(Signal::MotorTorque),
            Q(Signal::MotorLoadTorque),
            Q(Signal::ExcessCommand),
        ],
        "excess.lift" => &[
            P("y_l"),
            P("v_l"),
            P("p_cap"),
            P("p_rod"),
            Q(Signal::LiftForce),
            Q(Signal::LiftFlow),
        ],
        "excess.lift_valve" => &[P("p_e"), Q(Signal::LiftFlow), Q(Signal::ExcessCommand)],
        "excess.blocked" => &[P("p_e"), Q(Signal::ExcessOutFlow)],
        _ => &[],
    }
}

fn in_section(id: &str) -> &'static [From] {
    match id {
        "inlet" => &[P("p_in"), Q(Signal::PumpFlow)],
        "excess" | "excess_port" => &[P("p_e"), Q(Signal::ExcessFlow)],
        "priority" | "priority_port" => &[P("p_c"), Q(Signal::PriorityFlow)],
        "head_end" => &[P("p_h"), Q(Signal::HeadHoleFlow), Q(Signal::HeadEndLeakage)],
        "spring_end" => &[
            P("p_s"),
            Q(Signal::DiscHoleFlow),
            Q(Signal::SpringEndLeakage),
        ],
        "spool" | "travel" => &[
            P("x"),
            P("v"),
            Q(Signal::EndPressureForce),
            Q(Signal::SpringForce),
            Q(Signal::ExcessJetForce),
            Q(Signal::PriorityJetForce),
            Q(Signal::TransientJetForce),
            Q(Signal::SpoolFriction),
            Q(Signal::SpoolViscous),
            Q(Signal::StopForce),
            Q(Signal::SpoolForce),
        ],
        "disc" | "disc_hole" => &[Q(Signal::DiscHoleFlow), P("p_b"), P("p_s")],
        "spring" => &[Q(Signal::SpringForce), P("x")],
        "land" => &[
            Q(Signal::LandArea),
            Q(Signal::ExcessFlow),
            Q(Signal::LandLeakage),
            Q(Signal::ExcessJetForce),
        ],
        "fixed_orifice" => &[
            Q(Signal::FixedOrificeFlow),
            Q(Signal::PressureMargin),
            P("p_in"),
            P("p_b"),
            Q(Signal::FixedOrificeLoss),
        ],
        "head_hole" => &[Q(Signal::HeadHoleFlow), P("p_in"), P("p_h")],
        "priority_holes" => &[
            Q(Signal::HolesArea),
            Q(Signal::PriorityHolesFlow),
            P("p_b"),
            P("p_c"),
            Q(Signal::PriorityJetForce),
        ],
        "bore" => &[P("p_b"), Q(Signal::FixedOrificeFlow)],
        "housing" => &[P("p_in"), P("p_c"), P("p_e")],
        _ => &[],
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagram::DrawingOptions;
    use crate::{circuit_scene, valve_scene};
    use helmsplit_model::Inputs;
    use helmsplit_scenario::presets::PRESETS;

    /// A preset at a moment whose states are told apart by their size.
    fn moment(circuit: &Circuit) -> Moment {
        let states: Vec<f64> = circuit
            .states()
            .iter()
            .map(|state| match state.quantity {
                Quantity::Pressure => 61.2e5,
                Quantity::Length => 2.31e-3,
                _ => 0.0,
            })
            .collect();
        let mut inputs = Inputs::default();
        inputs.set(helmsplit_model::Input::EngineSpeed, 150.0);
        Moment::new(circuit, &inputs, &states, 1.0)
    }

    #[test]
    fn every_part_of_every_preset_has_something_to_tell_but_scales_and_tanks() {
        for preset in PRESETS {
            let circuit = preset.scenario().unwrap().circuit().unwrap();
            let moment = moment(&circuit);
            let options = DrawingOptions::default();
            let scenes = [
                circuit_scene(&circuit, Some(&moment), options),
                valve_scene(&circuit, Some(&moment), None, options),
            ];
            for part in scenes.iter().flat_map(|scene| &scene.parts) {
                let told = part_readings(&circuit, &moment, &part.id, UnitSystem::Metric);
                // Flooded inlets and constant returns have no state of their own.
                let silent = ["pressure_scale", "suction"].contains(&part.id.as_str());
                assert!(silent || !told.is_empty(), "{} of {}", part.id, preset.key);
                let mut names: Vec<_> = told.iter().map(|reading| &reading.name).collect();
                names.sort_unstable();
                let before = names.len();
                names.dedup();
                assert_eq!(names.len(), before, "{}: {names:?}", part.id);
            }
        }
    }

    #[test]
    fn values_are_those_of_the_moment_in_the_wanted_units() {
        let circuit = PRESETS[0].scenario().unwrap().circuit().unwrap();
        let moment = moment(&circuit);
        let text = |id: &str, name: &str, units| {
            let told = part_readings(&circuit, &moment, id, units);
            let found = told.into_iter().find(|reading| reading.name == name);
            found.map(|reading| reading.text)
        };
        let travel = text("valve.spool", "Spool travel", UnitSystem::Metric);
        assert_eq!(travel.as_deref(), Some("2.31 mm"), "travel");
        let us = text("valve", "Spool travel", UnitSystem::Us);
        assert_eq!(us.as_deref(), Some("0.0909 in"), "inches");
        assert_eq!(
            text("nothing", "Spool travel", UnitSystem::Si),
            None,
            "none"
        );
    }
}
