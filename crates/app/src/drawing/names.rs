//! From the parts of a scene to the parts of the circuit.

use helmsplit_model::Circuit;
use helmsplit_view::circuit_scene;
use helmsplit_view::diagram::DrawingOptions;
use helmsplit_view::scene::Scene;

use super::canvas::Subject;
use crate::parts::Part;

/// The part of a circuit that a part of a scene belongs to; `None` for scales.
pub(super) fn section_of(id: &str) -> Option<Part> {
    let section = match id {
        // The inlet choice and the suction line are settings of the pump.
        "suction" => "pump",
        // The line to the valve is part of its inlet volume.
        "inlet" => "valve",
        "excess_port" => "excess",
        "pressure_scale" => return None,
        other => other,
    };
    Part::of(section)
}

/// The parts that the drawing of a circuit shows.
pub(super) fn drawn_parts(circuit: &Circuit) -> Vec<Part> {
    let scene = circuit_scene(circuit, None, DrawingOptions::default());
    let mut parts: Vec<Part> = Vec::new();
    for part in scene.parts.iter().filter_map(|part| section_of(&part.id)) {
        if !parts.contains(&part) {
            parts.push(part);
        }
    }
    parts
}

/// Names and their sizes stand for what they point at.
pub(super) fn meant(id: &str) -> &str {
    match id {
        "valve.land_note" => "valve.land",
        "valve.excess_note" => "valve.excess_port",
        "valve.priority_note" => "valve.priority_port",
        "valve.spring_end_note" => "valve.spring_end",
        "valve.head_end_note" => "valve.head_end",
        "valve.inlet_note" => "valve.inlet",
        "valve.spring_note" => "valve.spring",
        "valve.travel" => "valve.spool",
        "valve.disc" => "valve.disc_hole",
        other => other,
    }
}

/// Whether a part of a scene is a control of its own, to be reached by keyboard and to be read
/// out: not the bodies that fill the section, and not what stands for another part.
pub(super) fn is_control(scene: &Scene, id: &str) -> bool {
    let target = meant(id);
    let stands_for_other = target != id && scene.part(target).is_some();
    !stands_for_other && section_of(id).is_some() && !["valve.housing", "valve.bore"].contains(&id)
}

/// The name of a part for screen readers: parts of the section have the names of ports too, which
/// must not be mixed up with those of the circuit.
pub(super) fn spoken_name(subject: Subject, label: &str) -> String {
    match subject {
        Subject::Circuit => label.to_owned(),
        Subject::Section => format!("In section: {label}"),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::presets::PRESETS;
    use helmsplit_view::valve_scene;

    #[test]
    fn a_part_that_is_not_fitted_is_not_drawn() {
        let mut scenario = PRESETS[0].scenario().unwrap();
        let relief = Part::of("excess_relief").unwrap();
        for (kind, drawn) in [("direct", true), ("none", false)] {
            scenario.set("excess_relief.kind", kind).unwrap();
            let parts = drawn_parts(&scenario.circuit().unwrap());
            assert_eq!(parts.contains(&relief), drawn, "{kind}: {parts:?}");
        }
        let oil = Part::of("oil").unwrap();
        let parts = drawn_parts(&scenario.circuit().unwrap());
        assert!(!parts.contains(&oil), "oil has no symbol");
    }

    #[test]
    fn every_part_of_a_scene_has_its_card_and_no_name_is_given_twice() {
        for preset in PRESETS {
            let circuit = preset.scenario().unwrap().circuit().unwrap();
            let options = DrawingOptions::default();
            let scenes = [
                (Subject::Circuit, circuit_scene(&circuit, None, options)),
                (Subject::Section, valve_scene(&circuit, None, None, options)),
            ];
            let mut names = Vec::new();
            for (subject, scene) in &scenes {
                for part in &scene.parts {
                    assert!(section_of(&part.id).is_some(), "{} has no card", part.id);
                    if is_control(scene, &part.id) {
                        names.push(spoken_name(*subject, &part.label));
                    }
                }
            }
            names.sort_unstable();
            let before = names.len();
            names.dedup();
            assert_eq!(names.len(), before, "{}: {names:?}", preset.key);
        }
    }
}
