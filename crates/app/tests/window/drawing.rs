//! The drawing: what it shows, how it is pointed at and reached, played and written.

use egui::accesskit::Role;
use egui::{Key, Modifiers};
use egui_kittest::kittest::{NodeT, Queryable};
use helmsplit_app::Appearance;
use helmsplit_scenario::presets::PRESETS;
use helmsplit_view::diagram::DrawingOptions;
use helmsplit_view::{BuiltInTheme, Moment, circuit_scene, svg_from_scene, valve_scene};

use crate::rig::Rig;

/// Whether the drawing has a control of that name.
fn draws(rig: &Rig, label: &str) -> bool {
    rig.harness
        .query_by_role_and_label(Role::Button, label)
        .is_some()
}

/// Whether the card of that name is shown.
fn card(rig: &Rig, label: &str) -> bool {
    let name = format!("Card: {label}");
    rig.harness.query_by_label(&name).is_some()
}

/// What a part of the drawing tells a screen reader.
fn told(rig: &Rig, label: &str) -> String {
    let node = rig.harness.get_by_role_and_label(Role::Button, label);
    node.accesskit_node().description().unwrap_or_default()
}

/// Places the cursor of the traces with the slider.
fn put_cursor(rig: &mut Rig, time: f64) {
    let slider = "Time of the cursor, s";
    rig.harness.get_by_label(slider).set_value_accesskit(time);
    rig.settle();
}

#[test]
fn every_part_of_every_preset_can_be_reached_by_name() {
    for preset in PRESETS {
        let rig = Rig::with([1280.0, 720.0], Appearance::Light, preset.key);
        let answer = rig.app().answer().expect("solved");
        let scene = circuit_scene(&answer.solved.circuit, None, DrawingOptions::default());
        assert!(scene.parts.len() > 8, "{} has parts", preset.key);
        for part in &scene.parts {
            assert!(draws(&rig, &part.label), "{} of {}", part.label, preset.key);
        }
        rig.harness.get_by_label("Circuit drawing");
    }
}

#[test]
fn choosing_none_for_a_relief_removes_its_symbol() {
    let mut rig = Rig::new();
    assert!(draws(&rig, "Main relief"), "fitted");
    rig.click("Main relief");
    rig.harness
        .get_by_role_and_label(Role::ComboBox, "Main relief")
        .click();
    rig.settle();
    rig.click("None");
    rig.solve();
    let answer = rig.app().answer().expect("solved");
    assert!(answer.solved.circuit.parts().main_relief.is_none(), "gone");
    let drawn = rig.harness.query_all_by(|node| {
        node.role() == Role::Button && node.label().as_deref() == Some("Main relief")
    });
    let described = drawn
        .filter(|node| node.accesskit_node().description().is_some())
        .count();
    assert_eq!(described, 0, "no symbol of it");
    // Its card is still at hand, to fit it again.
    rig.click("Oil");
    rig.click_beginning("Main relief: ");
    assert!(card(&rig, "Main relief"), "in the row of what is not drawn");
}

#[test]
fn a_click_on_a_part_shows_its_card() {
    let mut rig = Rig::new();
    for (part, card_label) in [
        ("Pump", "Pump"),
        ("Steering cylinder", "Steering side"),
        ("Return", "Return line"),
        ("Excess port", "Excess side"),
        ("Priority valve", "Priority valve"),
    ] {
        rig.click(part);
        assert!(card(&rig, card_label), "{part} opens {card_label}");
        let node = rig.harness.get_by_role_and_label(Role::Button, part);
        let toggled = node.accesskit_node().toggled();
        assert_eq!(
            toggled,
            Some(egui::accesskit::Toggled::True),
            "{part} is marked"
        );
    }
}

#[test]
fn parts_are_reached_and_chosen_by_keyboard_and_by_screen_readers() {
    let mut rig = Rig::new();
    rig.harness
        .get_by_role_and_label(Role::Button, "Pump")
        .focus();
    rig.settle();
    assert!(rig.says("Pump slip"), "what has the focus tells its values");
    rig.harness.key_press(Key::Enter);
    rig.settle();
    assert!(card(&rig, "Pump"), "Enter shows the card");
    rig.harness.key_press(Key::Tab);
    rig.settle();
    let focused = rig.harness.query_by(|node| node.is_focused());
    let next = focused.and_then(|node| node.accesskit_node().label());
    assert!(next.is_some_and(|next| next != "Pump"), "Tab goes on");
    rig.harness.key_press(Key::Enter);
    rig.settle();
    assert!(!card(&rig, "Pump"), "Enter shows the next card");
    rig.harness
        .get_by_role_and_label(Role::Button, "Steering unit")
        .click_accesskit();
    rig.settle();
    assert!(card(&rig, "Steering side"), "a screen reader can choose");
}

#[test]
fn pointing_tells_pressure_flow_and_opening_with_units() {
    let mut rig = Rig::new();
    put_cursor(&mut rig, 3.5);
    rig.harness
        .get_by_role_and_label(Role::Button, "Main relief")
        .hover();
    rig.harness.run_steps(60);
    for text in ["Inlet pressure", "Main relief opening", "Main relief flow"] {
        assert!(rig.says(text), "{text}");
    }
    let answer = rig.app().answer().expect("solved");
    let moment = Moment::of(&answer.solved.run.trace, rig.app().cursor()).expect("a row");
    let bar = moment.state("p_in").expect("an inlet") / 1e5;
    assert!(rig.says(&format!("{bar:.1} bar")), "{bar:.1} bar");
    rig.harness
        .get_by_role_and_label(Role::Button, "Excess port")
        .hover();
    rig.harness.run_steps(60);
    assert!(rig.says("Excess flow"), "lines tell too");
}

#[test]
fn the_cursor_moves_the_spool_and_what_the_parts_tell() {
    let mut rig = Rig::new();
    rig.click("Valve in section");
    let travel = |rig: &Rig| {
        let trace = &rig.app().answer().expect("solved").solved.run.trace;
        Moment::of(trace, rig.app().cursor())
            .expect("a row")
            .travel()
    };
    put_cursor(&mut rig, 0.0);
    let (first, told_first) = (travel(&rig), told(&rig, "In section: Spool"));
    put_cursor(&mut rig, 3.5);
    let (second, told_second) = (travel(&rig), told(&rig, "In section: Spool"));
    assert!((second - first).abs() > 1e-4, "{first} m to {second} m");
    assert_ne!(told_first, told_second, "it says so");
    let millimetres = format!("Spool travel {:.2} mm", 1000.0 * second);
    assert!(told_second.starts_with(&millimetres), "{told_second}");
}

#[test]
fn the_run_is_played_stepped_and_scrubbed() {
    let mut rig = Rig::new();
    put_cursor(&mut rig, 2.0);
    assert!((rig.app().cursor() - 2.0).abs() < 1e-6, "scrubbed");
    rig.click("Step on");
    let step = rig.app().cursor() - 2.0;
    assert!(step > 0.0 && step < 0.1, "a step of {step} s");
    rig.harness.get_by_label("Circuit drawing").focus();
    rig.settle();
    rig.harness.key_press(Key::ArrowLeft);
    rig.settle();
    assert!((rig.app().cursor() - 2.0).abs() < 1e-9, "and back by arrow");
    rig.harness
        .key_press_modifiers(Modifiers::SHIFT, Key::ArrowRight);
    rig.settle();
    assert!(
        (rig.app().cursor() - 2.0 - 20.0 * step).abs() < 1e-6,
        "twenty steps"
    );
    put_cursor(&mut rig, 2.0);
    rig.harness.get_by_label("Circuit drawing").focus();
    rig.settle();
    rig.harness.key_press(Key::Space);
    rig.harness.run_steps(60);
    let played = rig.app().cursor();
    assert!((2.8..3.1).contains(&played), "a second of run: {played} s");
    rig.harness.key_press(Key::Space);
    rig.harness.run_steps(30);
    let stopped = rig.app().cursor();
    rig.harness.run_steps(30);
    assert!((rig.app().cursor() - stopped).abs() < 1e-12, "stopped");
    rig.harness.get_by_label("Traces over time").focus();
    rig.settle();
    rig.harness.key_press(Key::Space);
    rig.harness.run_steps(30);
    assert!(
        rig.app().cursor() > stopped + 0.3,
        "Space in the traces too"
    );
    rig.click("Pause");
}

#[test]
fn nothing_is_repainted_while_nothing_moves() {
    let mut rig = Rig::new();
    rig.harness.run_ok();
    let delay = |rig: &Rig| {
        let viewport = rig.harness.output().viewport_output.values().next();
        viewport.expect("a window").repaint_delay
    };
    rig.harness.step();
    assert_eq!(delay(&rig), std::time::Duration::MAX, "idle");
    rig.click("Play");
    rig.harness.step();
    assert!(delay(&rig).as_secs_f64() < 0.1, "played");
    rig.click("Pause");
    rig.harness.run_ok();
    rig.harness.step();
    assert_eq!(delay(&rig), std::time::Duration::MAX, "idle again");
}

#[test]
fn the_exported_svg_is_that_of_the_scene() {
    let folder = tempfile::tempdir().expect("a folder");
    let mut rig = Rig::new();
    put_cursor(&mut rig, 3.5);
    for (entry, name) in [
        ("Circuit drawing as SVG", "circuit.svg"),
        ("Valve section as SVG", "valve.svg"),
    ] {
        let path = folder.path().join(name);
        rig.menu("File", "Export");
        rig.click_beginning(entry);
        rig.enter(
            "Path of the file to write",
            path.to_str().expect("plain text"),
        );
        let written = std::fs::read_to_string(&path).expect("written");
        let answer = rig.app().answer().expect("solved");
        let (circuit, trace) = (&answer.solved.circuit, &answer.solved.run.trace);
        let moment = Moment::of(trace, rig.app().cursor());
        let options = DrawingOptions::default();
        let theme = BuiltInTheme::Light.load().expect("a theme");
        let (mut scene, id) = if name == "valve.svg" {
            let scene = valve_scene(circuit, moment.as_ref(), None, options);
            (scene, "valve")
        } else {
            (circuit_scene(circuit, moment.as_ref(), options), "circuit")
        };
        scene.title = format!("Orchard carrier: {}", scene.title);
        assert_eq!(written, svg_from_scene(&scene, &theme, id), "{name}");
    }
    let nowhere = folder.path().join("no such folder/x.svg");
    rig.menu("File", "Export");
    rig.click_beginning("Circuit drawing as SVG");
    rig.enter(
        "Path of the file to write",
        nowhere.to_str().expect("plain text"),
    );
    assert!(rig.says("There is no folder"), "it says so");
}

#[test]
fn after_a_failed_solve_the_last_good_moment_stays_pale() {
    let mut rig = Rig::new();
    put_cursor(&mut rig, 3.5);
    let before = told(&rig, "Pump");
    let bright = rig.harness.render().expect("a picture");
    // A land that opens behind the end of the stroke never opens.
    rig.enter("Overlap of the excess land", "9 mm");
    rig.settle();
    assert!(rig.app().failure().is_some(), "it failed");
    assert_eq!(told(&rig, "Pump"), before, "the last good moment");
    let pale = rig.harness.render().expect("a picture");
    assert_ne!(bright.as_raw(), pale.as_raw(), "and it looks different");
}

#[test]
fn the_row_of_parts_reaches_what_the_drawing_does_not_show() {
    let mut rig = Rig::new();
    for part in [
        "Oil",
        "Manoeuvre",
        "Start of the run",
        "Limits",
        "Ratings",
        "Solver",
    ] {
        rig.click_beginning(part);
        assert!(card(&rig, part), "the card of {part}");
    }
    rig.menu("All parts", "Prime mover");
    assert!(card(&rig, "Prime mover"), "all parts are in the menu");
}

/// Writes drawings of several circuits as PNG into the folder named by `HELMSPLIT_SHOTS`.
#[test]
#[ignore = "writes pictures to look at"]
fn screenshots() {
    let Ok(folder) = std::env::var("HELMSPLIT_SHOTS") else {
        panic!("name a folder in HELMSPLIT_SHOTS");
    };
    let only = std::env::var("HELMSPLIT_SHOTS_OF").unwrap_or_default();
    let small = [1280.0, 720.0];
    let large = [1920.0, 1080.0];
    for (preset, size, scale, appearance, view) in [
        ("orchard carrier", small, 100, Appearance::Light, "Circuit"),
        ("orchard carrier", small, 100, Appearance::Dark, "Both"),
        ("orchard carrier", large, 100, Appearance::Light, "Both"),
        ("orchard carrier", large, 150, Appearance::Dark, "Circuit"),
        ("nursery loader", small, 100, Appearance::Dark, "Circuit"),
        (
            "nursery loader",
            large,
            100,
            Appearance::Dark,
            "Valve in section",
        ),
        (
            "depot tug",
            small,
            100,
            Appearance::Light,
            "Valve in section",
        ),
        ("depot tug", small, 150, Appearance::Light, "Circuit"),
        ("workshop bench", small, 100, Appearance::Light, "Circuit"),
        ("vineyard sprayer", large, 150, Appearance::Light, "Both"),
        ("frost pruner", large, 100, Appearance::Dark, "Circuit"),
    ] {
        let name = format!("{preset}-{view}-{}-{scale}-{appearance:?}", size[0]);
        let name = name.replace(' ', "_");
        if !name.contains(&only) {
            continue;
        }
        let mut rig = Rig::scaled(size, scale, appearance, preset);
        let end = rig.app().document().scenario().solver().duration;
        put_cursor(&mut rig, 0.45 * end);
        if view != "Circuit" {
            rig.click(view);
        }
        let picture = rig.harness.render().expect("a picture");
        picture
            .save(format!("{folder}/{name}.png"))
            .expect("written");
    }
}

/// Writes what pointing, focus, playing and a failed solve look like.
#[test]
#[ignore = "writes pictures to look at"]
fn screenshots_of_states() {
    let Ok(folder) = std::env::var("HELMSPLIT_SHOTS") else {
        panic!("name a folder in HELMSPLIT_SHOTS");
    };
    let mut rig = Rig::with([1280.0, 720.0], Appearance::Light, "nursery loader");
    let shoot = |rig: &mut Rig, name: &str| {
        rig.harness.run_steps(60);
        let picture = rig.harness.render().expect("a picture");
        picture
            .save(format!("{folder}/{name}.png"))
            .expect("written");
    };
    put_cursor(&mut rig, 3.4);
    rig.click("Return");
    rig.harness
        .get_by_role_and_label(Role::Button, "Steering unit")
        .hover();
    shoot(&mut rig, "state-hover");
    rig.harness
        .get_by_role_and_label(Role::Button, "Excess relief")
        .focus();
    shoot(&mut rig, "state-focus");
    rig.click("Play");
    rig.harness.run_steps(9);
    rig.click("Larger");
    rig.click("Larger");
    shoot(&mut rig, "state-playing-zoomed");
    rig.click("Pause");
    rig.click("Priority valve");
    rig.enter("Overlap of the excess land", "9 mm");
    shoot(&mut rig, "state-pale");
}

#[test]
fn the_pane_keeps_its_width_at_every_scale_and_with_every_card() {
    for scale in [80, 100, 125, 150, 175] {
        let size = [1367.0, 771.0];
        let mut rig = Rig::scaled(size, scale, Appearance::Light, "frost pruner");
        let width = |rig: &Rig| {
            let drawing = rig.harness.get_by_label("Circuit drawing");
            drawing.rect().width()
        };
        let before = width(&rig);
        for part in ["Return", "Pump", "Priority valve"] {
            rig.click(part);
            rig.harness.run_steps(40);
            let found = width(&rig);
            assert!(
                (found - before).abs() < 1.0,
                "{scale} %, {part}: {before} points became {found}"
            );
        }
    }
}
