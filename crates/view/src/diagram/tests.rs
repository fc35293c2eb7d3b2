//! Every choice of every slot: nothing overlaps, ids are unique, the drawing shows what is there.

use helmsplit_model::Circuit;
use helmsplit_scenario::Scenario;
use helmsplit_scenario::presets::{PRESETS, Preset};
use helmsplit_sim::{SolverOptions, Watch};
use helmsplit_study::solve;
use kurbo::{Line as Straight, ParamCurve, Point, Rect};

use super::*;
use crate::scene::{Prim, collisions};
use crate::svg::svg_from_scene;
use crate::theme::BuiltInTheme;

/// The options of the slots that change the drawing.
const SLOTS: [(&str, &[&str]); 9] = [
    ("prime_mover.kind", &["speed profile", "governed"]),
    ("pump.inlet", &["flooded", "suction line"]),
    ("main_relief.kind", &["none", "direct"]),
    (
        "priority_relief.kind",
        &[
            "none",
            "on the priority port",
            "pilot on the spring chamber",
        ],
    ),
    (
        "steering.kind",
        &["bench throttle", "steering unit", "motor"],
    ),
    ("steering.shock_reliefs", &["none", "fitted"]),
    (
        "excess.kind",
        &[
            "tank",
            "bench throttle",
            "motor",
            "lift cylinder",
            "blocked",
        ],
    ),
    ("excess_relief.kind", &["none", "direct"]),
    ("return_line.kind", &["constant", "restricted"]),
];

/// A circuit with those choices; what a choice needs has its default.
fn circuit(choices: &[&str]) -> Circuit {
    static BASE: std::sync::OnceLock<Scenario> = std::sync::OnceLock::new();
    let base = BASE.get_or_init(|| {
        let preset = Preset::from_key("orchard_carrier").unwrap();
        preset.scenario().unwrap()
    });
    let mut scenario = base.clone();
    for ((path, _), choice) in SLOTS.iter().zip(choices) {
        // Shock reliefs exist with a steering unit only.
        if *path == "steering.shock_reliefs" && choices[4] != "steering unit" {
            continue;
        }
        scenario.set(path, choice).unwrap();
    }
    scenario.circuit().unwrap()
}

/// A moment with every value wide and every arrow drawn: 188.8 bar, flows everywhere.
fn busy_moment(circuit: &Circuit, sign: f64) -> Moment {
    let states: Vec<f64> = circuit
        .states()
        .iter()
        .enumerate()
        .map(|(index, state)| match state.quantity {
            helmsplit_model::Quantity::Pressure => 188.8e5 - 7e5 * (index % 20) as f64,
            helmsplit_model::Quantity::AngularVelocity => 268.3 * sign,
            helmsplit_model::Quantity::Velocity => 0.0888 * sign,
            helmsplit_model::Quantity::Flow => 4e-4,
            helmsplit_model::Quantity::Ratio => 0.6,
            helmsplit_model::Quantity::Length if state.name == "x" => 4.88e-3,
            helmsplit_model::Quantity::Length => 0.1 * sign,
            _ => 0.05 * sign,
        })
        .collect();
    let mut inputs = helmsplit_model::Inputs::default();
    for input in helmsplit_model::Input::ALL {
        let value = match input {
            helmsplit_model::Input::EngineSpeed => 240.0,
            helmsplit_model::Input::WheelRate => 9.8 * sign,
            helmsplit_model::Input::BenchArea => 5e-6,
            helmsplit_model::Input::BenchPressure | helmsplit_model::Input::ExcessPressure => {
                88.8e5
            }
            helmsplit_model::Input::ExcessCommand | helmsplit_model::Input::PriorityCommand => 0.88,
            helmsplit_model::Input::ExternalForce => 0.0,
        };
        inputs.set(input, value);
    }
    Moment::new(circuit, &inputs, &states, 3.412)
}

fn every_combination() -> Vec<Vec<&'static str>> {
    SLOTS.iter().fold(vec![Vec::new()], |sofar, (_, options)| {
        sofar
            .iter()
            .flat_map(|chosen| {
                options.iter().map(move |option| {
                    let mut longer: Vec<&'static str> = chosen.clone();
                    longer.push(option);
                    longer
                })
            })
            .collect()
    })
}

#[test]
fn no_text_touches_a_line_or_a_text_whatever_sits_in_the_slots() {
    let combinations = every_combination();
    assert_eq!(combinations.len(), 2 * 2 * 2 * 3 * 3 * 2 * 5 * 2 * 2, "all");
    let units = [
        helmsplit_scenario::UnitSystem::Metric,
        helmsplit_scenario::UnitSystem::Us,
        helmsplit_scenario::UnitSystem::Si,
    ];
    let mut found = std::collections::BTreeMap::new();
    for (index, choices) in combinations.iter().enumerate() {
        let circuit = circuit(choices);
        // Units and senses take turns: each is met with each choice.
        let sign = if index % 2 == 0 { 1.0 } else { -1.0 };
        let options = DrawingOptions {
            units: units[(index / 2) % 3],
            ..DrawingOptions::default()
        };
        let moment = busy_moment(&circuit, sign);
        for moment in [None, Some(&moment)] {
            let scene = circuit_scene(&circuit, moment, options);
            for wrong in collisions(&scene) {
                found.entry(wrong).or_insert_with(|| choices.clone());
            }
        }
    }
    assert!(found.is_empty(), "{found:#?}");
}

/// A preset, solved.
fn solved(preset: &Preset) -> (Scenario, helmsplit_study::Solved) {
    let scenario = preset.scenario().unwrap();
    let options = SolverOptions::from(&scenario.solver());
    let solved = solve(&scenario, None, &options, &mut Watch::none()).unwrap();
    (scenario, solved)
}

#[test]
fn presets_are_drawn_at_every_moment_without_collisions() {
    for preset in PRESETS {
        let (scenario, solved) = solved(preset);
        for step in 0..=8_u32 {
            let time = scenario.solver().duration * f64::from(step) / 8.0;
            let moment = Moment::of(&solved.run.trace, time).unwrap();
            let scene = circuit_scene(&solved.circuit, Some(&moment), DrawingOptions::default());
            let wrong = collisions(&scene);
            assert!(wrong.is_empty(), "{} at {time} s: {wrong:#?}", preset.key);
        }
    }
}

#[test]
fn ids_are_unique_and_everything_lies_inside_the_bounds() {
    for choices in every_combination() {
        let scene = circuit_scene(&circuit(&choices), None, DrawingOptions::default());
        let mut ids: Vec<_> = scene.parts.iter().map(|part| part.id.as_str()).collect();
        ids.sort_unstable();
        let before = ids.len();
        ids.dedup();
        assert_eq!(ids.len(), before, "{choices:?}: {ids:?}");
        for part in &scene.parts {
            let union = scene.bounds.union(part.bounds);
            assert_eq!(union, scene.bounds, "{} of {choices:?}", part.id);
        }
    }
}

/// Whether any oil of these choices goes back to tank through the return line.
fn returns(choices: &[&str]) -> bool {
    let reliefs = [choices[2], choices[3], choices[7]];
    reliefs.iter().any(|relief| *relief != "none")
        || choices[4] != "bench throttle"
        || !["bench throttle", "blocked"].contains(&choices[6])
}

#[test]
fn choices_change_the_drawing() {
    let scenes: Vec<_> = every_combination()
        .iter()
        // Without a steering unit there are no shock reliefs to choose.
        .filter(|choices| choices[4] == "steering unit" || choices[5] == "none")
        // Where nothing returns, there is no return line.
        .filter(|choices| choices[8] == "constant" || returns(choices))
        .map(|choices| circuit_scene(&circuit(choices), None, DrawingOptions::default()))
        .collect();
    let mut drawings: Vec<_> = scenes
        .iter()
        .map(|scene| format!("{:?}", scene.parts))
        .collect();
    drawings.sort_unstable();
    let before = drawings.len();
    drawings.dedup();
    assert_eq!(drawings.len(), before, "two combinations look the same");
}

#[test]
fn working_lines_run_square_and_never_along_each_other() {
    for choices in every_combination() {
        let scene = circuit_scene(&circuit(&choices), None, DrawingOptions::default());
        let mut runs: Vec<(&str, Straight)> = Vec::new();
        for part in &scene.parts {
            for prim in &part.prims {
                let (Some(stroke), Prim::Path { outline, .. }) = (prim.stroke(), prim) else {
                    continue;
                };
                if stroke.line != crate::scene::Line::Working {
                    continue;
                }
                for segment in outline.segments() {
                    let line = Straight::new(segment.start(), segment.end());
                    let step = line.p1 - line.p0;
                    let square = step.x.abs() < 1e-9 || step.y.abs() < 1e-9;
                    assert!(square, "{} of {choices:?}: {line:?}", part.id);
                    for (other, run) in &runs {
                        let shared = overlap(line, *run);
                        assert!(
                            shared < 1e-6,
                            "{} along {other} in {choices:?}: {line:?}",
                            part.id
                        );
                    }
                    runs.push((part.id.as_str(), line));
                }
            }
        }
    }
}

/// Length over which two square lines lie upon each other.
fn overlap(a: Straight, b: Straight) -> f64 {
    let frame = |line: Straight| Rect::from_points(line.p0, line.p1);
    let (a, b) = (frame(a), frame(b));
    let width = a.x1.min(b.x1) - a.x0.max(b.x0);
    let height = a.y1.min(b.y1) - a.y0.max(b.y0);
    if width < -1e-9 || height < -1e-9 {
        return 0.0;
    }
    width.max(height)
}

#[test]
fn parts_can_be_pointed_at() {
    let scene = circuit_scene(
        &circuit(&["speed profile"]),
        None,
        DrawingOptions::default(),
    );
    let id = |x: f64, y: f64| {
        scene
            .hit(Point::new(x, y), 5.0)
            .map(|hit| hit.part.id.as_str())
    };
    let (x, y) = places::PUMP;
    assert_eq!(id(x, y + 6.0), Some("pump"), "inside the pump");
    assert_eq!(
        id(240.0, places::INLET_Y + 2.0),
        Some("inlet"),
        "on its line"
    );
    assert_eq!(
        id(places::CONSUMER_X + 20.0, 566.0),
        Some("excess.motor"),
        "the motor"
    );
}

#[test]
fn svg_reads_in_every_theme_and_tells_of_its_parts() {
    let (_, solved) = solved(&PRESETS[0]);
    let moment = Moment::of(&solved.run.trace, 3.5).unwrap();
    let scene = circuit_scene(&solved.circuit, Some(&moment), DrawingOptions::default());
    for built_in in BuiltInTheme::ALL {
        let svg = svg_from_scene(&scene, &built_in.load().unwrap(), "c");
        let document = roxmltree::Document::parse(&svg).unwrap();
        let root = document.root_element();
        let title = root.first_element_child().unwrap();
        assert_eq!(title.text(), Some("Steering circuit"), "title");
        let text = root.children().find(|node| node.has_tag_name("desc"));
        let text = text.and_then(|node| node.text()).unwrap();
        assert!(text.contains("hydrostatic steering unit"), "{text}");
        assert!(text.contains("At 3.50 s: inlet"), "{text}");
        let groups = root
            .children()
            .filter(|node| node.has_tag_name("g"))
            .count();
        assert_eq!(groups, scene.parts.len(), "a group for each part");
    }
}
