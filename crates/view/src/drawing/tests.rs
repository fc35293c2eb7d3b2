//! The section against the valve's record and the model's equations.

use helmsplit_model::LandShape;
use helmsplit_scenario::presets::{PRESETS, Preset};
use helmsplit_sim::{SolverOptions, Watch};
use helmsplit_study::solve;

use super::*;
use crate::scene::{Prim, collisions};
use crate::svg::svg_from_scene;
use crate::theme::BuiltInTheme;
use proportions::EdgeShape;

fn circuit(key: &str) -> Circuit {
    let preset = Preset::from_key(key).unwrap();
    preset.scenario().unwrap().circuit().unwrap()
}

fn scene(circuit: &Circuit, travel_mm: f64) -> Scene {
    let options = DrawingOptions::default();
    valve_scene(circuit, None, Some(travel_mm / 1000.0), options)
}

/// Left end of the spool on the sheet, px.
fn spool_left(scene: &Scene) -> f64 {
    scene.part("valve.spool").unwrap().bounds.x0
}

fn sheet(circuit: &Circuit, travel: f64) -> Sheet<'static> {
    let scale = PressureScale { most: 200e5 };
    let shape = Proportions::of(&circuit.parts().valve);
    Sheet::new(shape, travel, None, (scale, 800.0))
}

#[test]
fn the_spool_moves_right_by_the_travel_and_is_as_thick_as_it_is() {
    for preset in PRESETS {
        let circuit = circuit(preset.key);
        let px_per_mm = sheet(&circuit, 0.0).px_per_mm;
        let (shut, open) = (scene(&circuit, 0.0), scene(&circuit, 3.25));
        let moved = spool_left(&open) - spool_left(&shut);
        assert!((moved - 3.25 * px_per_mm).abs() < 1e-6, "{}", preset.key);
        let height = open.part("valve.spool").unwrap().bounds.height();
        let diameter = circuit.parts().valve.diameter * 1000.0 * px_per_mm;
        // Oil in the holes of the spool is painted a hair beyond its outline.
        assert!(
            (height - diameter).abs() < 2.5,
            "{}: {height} px",
            preset.key
        );
    }
}

#[test]
fn the_gap_at_the_land_is_the_opening_of_the_model() {
    for preset in PRESETS {
        let circuit = circuit(preset.key);
        let valve = &circuit.parts().valve;
        let shape = Proportions::of(valve);
        for share in [0.1, 0.3, 0.45, 0.7, 1.0] {
            let travel = share * valve.stroke;
            let gap = shape.land_gap(1000.0 * travel);
            let opening = valve.land.opening(travel);
            if gap < -0.05 {
                // Shut, but for the width over which the equations round the corner.
                let share = opening.area / valve.land.port_area;
                assert!(share < 1e-4, "{} at {travel} m: {opening:?}", preset.key);
                continue;
            }
            // The shortest way from the housing's edge to the spool.
            let drawn = match (&valve.land.shape, shape.edge) {
                (LandShape::Sharp, EdgeShape::Sharp) => gap,
                (LandShape::Chamfer { angle, .. }, EdgeShape::Chamfer { length, drop }) => {
                    let slope = (drop / length).atan();
                    assert!((slope - angle).abs() < 1e-9, "the cone's angle is true");
                    gap * slope.sin()
                }
                // Holes, notches and tables open by area, not by one gap.
                _ => continue,
            };
            if gap < shape.edge.length() || matches!(shape.edge, EdgeShape::Sharp) {
                let model = 1000.0 * opening.gap;
                // The model rounds the corner over 5 um.
                assert!(
                    (drawn - model).abs() < 0.01,
                    "{}: {drawn} {model}",
                    preset.key
                );
            }
        }
    }
}

#[test]
fn the_spring_is_as_long_as_its_compression_leaves_it() {
    for preset in PRESETS {
        let circuit = circuit(preset.key);
        let valve = &circuit.parts().valve;
        for travel in [0.0, 2.0, 1000.0 * valve.stroke] {
            let sheet = sheet(&circuit, travel);
            let force = valve.preload + valve.spring_rate * travel / 1000.0;
            let compression = 1000.0 * force / valve.spring_rate;
            let expected = sheet.shape.spring.free_length - compression;
            let scene = scene(&circuit, travel);
            let drawn = scene.part("valve.spring").unwrap().bounds.width() / sheet.px_per_mm;
            assert!(
                (drawn - expected).abs() < 1e-6,
                "{}: {drawn} mm",
                preset.key
            );
            let closed = f64::from(sheet.shape.spring.coils + 1) * sheet.shape.spring.wire;
            assert!(expected > closed, "{}: coils bind at {travel}", preset.key);
        }
    }
}

#[test]
fn holes_are_drawn_at_their_diameter_and_shut_where_the_model_shuts_them() {
    let circuit = circuit("orchard_carrier");
    let valve = &circuit.parts().valve;
    let shape = Proportions::of(valve);
    assert!((shape.head_hole - 0.6).abs() < 1e-9, "head hole");
    assert!((shape.disc_hole - 0.5).abs() < 1e-9, "disc hole");
    assert!((shape.fixed_orifice - 3.67).abs() < 1e-9, "fixed orifice");
    let edge = shape.priority_core.1;
    let (start, end) = (1000.0 * valve.holes_start, 1000.0 * valve.holes_end);
    assert!(
        (shape.priority_holes.1 + start - edge).abs() < 1e-9,
        "throttling starts"
    );
    assert!(
        (shape.priority_holes.0 + end - edge).abs() < 1e-9,
        "throttling ends"
    );
}

/// Circuits with valves of every land, small, large and odd.
fn odd_valves() -> Vec<(String, Circuit)> {
    let settings: [&[(&str, &str)]; 12] = [
        &[],
        &[("valve.land", "sharp edge"), ("valve.overlap", "0 mm")],
        &[
            ("valve.land", "round holes"),
            ("valve.land_hole_count", "5"),
        ],
        &[
            ("valve.land", "round holes"),
            ("valve.land_hole_diameter", "8 mm"),
        ],
        &[("valve.land", "notches"), ("valve.notch_count", "3")],
        &[("valve.land", "notches"), ("valve.notch_angle", "120 deg")],
        &[
            ("valve.chamfer_angle", "45 deg"),
            ("valve.overlap", "-2 mm"),
        ],
        &[
            ("valve.chamfer_angle", "3 deg"),
            ("valve.chamfer_length", "7.5 mm"),
        ],
        &[
            ("valve.holes_throttle_start", "20 mm"),
            ("valve.holes_throttle_end", "1000 mm"),
        ],
        &[
            ("valve.fixed_orifice_diameter", "12 mm"),
            ("valve.disc_hole_diameter", "2 mm"),
            ("valve.overlap", "4 mm"),
        ],
        &[("valve.stroke", "20 mm"), ("valve.spring_volume", "15 cm3")],
        &[
            ("valve.spool_diameter", "40 mm"),
            ("valve.spring_volume", "40 cm3"),
            ("valve.holes_throttle_start", "0.5 mm"),
        ],
    ];
    let base = Preset::from_key("orchard_carrier")
        .unwrap()
        .scenario()
        .unwrap();
    let odd = settings.iter().map(|set| {
        let mut scenario = base.clone();
        for (path, value) in *set {
            scenario.set(path, value).unwrap();
        }
        (format!("{set:?}"), scenario.circuit().unwrap())
    });
    let presets = PRESETS.iter().map(|p| (p.key.to_owned(), circuit(p.key)));
    odd.chain(presets).collect()
}

#[test]
fn nothing_breaks_through_the_walls() {
    for (key, circuit) in odd_valves() {
        let s = Proportions::of(&circuit.parts().valve);
        assert!(s.bore_radius < s.neck_radius, "{key}: wall of the neck");
        assert!(s.neck_radius < s.radius, "{key}: neck");
        assert!(
            s.neck_start < s.cross_holes.0,
            "{key}: cross holes in the neck"
        );
        assert!(
            s.cross_holes.1 < s.shoulder,
            "{key}: cross holes ahead of the land"
        );
        assert!(
            s.orifice_wall.1 < s.priority_holes.0,
            "{key}: wall ahead of the holes"
        );
        assert!(
            s.priority_holes.1 < s.disc.0,
            "{key}: holes ahead of the disc"
        );
        assert!(
            s.neck_start + s.stroke < s.inlet_core.1,
            "{key}: the neck stays in its core"
        );
        let open = s.shoulder + s.stroke;
        assert!(
            open < s.excess_core.1,
            "{key}: the land never uncovers the next bridge"
        );
        assert!(
            s.priority_holes.0 > s.priority_core.0,
            "{key}: holes begin in their core"
        );
        assert!(
            s.spool_end + s.stroke < s.spring_end,
            "{key}: room for the stroke"
        );
    }
}

#[test]
fn odd_valves_are_drawn_without_collisions() {
    for (key, circuit) in odd_valves() {
        let stroke = 1000.0 * circuit.parts().valve.stroke;
        for step in 0..=4_u32 {
            let travel = stroke * f64::from(step) / 4.0;
            let wrong = collisions(&scene(&circuit, travel));
            assert!(wrong.is_empty(), "{key} at {travel} mm: {wrong:#?}");
        }
    }
}

#[test]
fn no_text_touches_a_line_or_a_text() {
    for preset in PRESETS {
        let scenario = preset.scenario().unwrap();
        let options = SolverOptions::from(&scenario.solver());
        let solved = solve(&scenario, None, &options, &mut Watch::none()).unwrap();
        for step in 0..=10_u32 {
            let share = f64::from(step) / 10.0;
            let moment = Moment::of(&solved.run.trace, share * scenario.solver().duration);
            let travel = share * solved.circuit.parts().valve.stroke;
            for units in [
                helmsplit_scenario::UnitSystem::Metric,
                helmsplit_scenario::UnitSystem::Us,
                helmsplit_scenario::UnitSystem::Si,
            ] {
                for (section_length, notes) in [
                    (800.0, Notes::Full),
                    (640.0, Notes::Full),
                    (480.0, Notes::Full),
                    (400.0, Notes::Full),
                    (400.0, Notes::Names),
                    (320.0, Notes::Names),
                ] {
                    let options = DrawingOptions {
                        units,
                        notes,
                        section_length,
                        ..DrawingOptions::default()
                    };
                    let moment = moment.as_ref();
                    let scene = valve_scene(&solved.circuit, moment, Some(travel), options);
                    let wrong = collisions(&scene);
                    let at = format!("{} at {share}, {section_length} px", preset.key);
                    assert!(wrong.is_empty(), "{at}, {units:?}: {wrong:#?}");
                }
            }
        }
    }
}

#[test]
fn a_bare_section_has_bodies_alone() {
    let circuit = circuit("orchard_carrier");
    let options = DrawingOptions {
        section_length: 300.0,
        notes: Notes::None,
        ..DrawingOptions::default()
    };
    let scene = valve_scene(&circuit, None, Some(0.002), options);
    assert!(scene.part("valve.spool").is_some(), "the spool");
    let prims = scene.parts.iter().flat_map(|part| &part.prims);
    let texts = prims
        .filter(|prim| matches!(prim, Prim::Text { .. }))
        .count();
    assert_eq!(texts, 0, "no texts");
    assert!(scene.bounds.width() < 340.0, "{:?}", scene.bounds);
}

#[test]
fn the_moment_gives_travel_and_shades() {
    let circuit = circuit("orchard_carrier");
    let states: Vec<f64> = circuit
        .states()
        .iter()
        .map(|state| match state.name.as_str() {
            "x" => 0.0031,
            "p_in" => 100e5,
            _ => 0.0,
        })
        .collect();
    let moment = Moment::new(&circuit, &helmsplit_model::Inputs::default(), &states, 0.0);
    let scene = valve_scene(&circuit, Some(&moment), None, DrawingOptions::default());
    assert!(
        scene.description.contains("3.10 mm"),
        "{}",
        scene.description
    );
    let inlet = scene.part("valve.inlet").unwrap();
    let shaded = inlet.prims.iter().any(|prim| {
        matches!(prim, Prim::Path { fill: Some(crate::scene::Paint::Oil(Some(share))), .. }
            if (share - 0.5).abs() < 1e-12)
    });
    assert!(shaded, "100 bar of 200 is the middle of the ramp");
}

#[test]
fn svg_reads_in_every_theme() {
    let scene = scene(&circuit("nursery_loader"), 2.0);
    for built_in in BuiltInTheme::ALL {
        let svg = svg_from_scene(&scene, &built_in.load().unwrap(), "v");
        let document = roxmltree::Document::parse(&svg).unwrap();
        let groups = document.root_element().children();
        let groups = groups.filter(|node| node.has_tag_name("g")).count();
        assert_eq!(groups, scene.parts.len(), "a group for each part");
    }
}
