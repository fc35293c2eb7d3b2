//! Lists as numbers: templates, tables, what is saved of them.

use egui::accesskit::Role;
use egui::{Key, Modifiers, vec2};
use egui_kittest::kittest::Queryable;
use helmsplit_app::Document;
use helmsplit_model::Input;

use crate::manoeuvre::{drag, drop_at, has, middle, on_engine_speed, points, tap, undo_name};
use crate::rig::Rig;

/// A number of the circuit by its path.
fn number(rig: &Rig, path: &str) -> String {
    let scenario = rig.app().document().scenario();
    scenario.get(path).expect("a path")
}

#[test]
fn templates_are_added_and_edited() {
    let mut rig = Rig::new();
    rig.menu("Add template", "Kerb strike");
    rig.solve();
    assert_eq!(undo_name(&rig), "kerb strike at 0 s added", "at the cursor");
    assert!(
        has(&rig, "external force, template 1 of 1: Kerb strike"),
        "its line is shown"
    );
    rig.click("Numbers");
    rig.enter("kerb strike, force", "2 tf");
    assert!(rig.says("Not taken"), "no such unit");
    rig.enter("kerb strike, force", "1500 daN");
    rig.enter("kerb strike, starts at", "1500 ms");
    rig.solve();
    assert_eq!(
        number(&rig, "manoeuvre.templates[3].force"),
        "1500 daN",
        "as typed"
    );
    assert_eq!(
        undo_name(&rig),
        "kerb strike, starts at: 0 s to 1500 ms",
        "named"
    );
}

#[test]
fn templates_on_a_line_keep_apart_and_are_exchanged() {
    let mut rig = Rig::new();
    rig.click("Numbers");
    rig.enter("wheel step at 3 s, turning time", "3 s");
    assert!(
        rig.says("already moves until"),
        "it would run into the next"
    );
    assert_eq!(
        number(&rig, "manoeuvre.templates[0].turn"),
        "1 s",
        "the last good one"
    );
    rig.enter("wheel step at 5 s, turning time", "0.5 s");
    tap(&mut rig, "Later: wheel step at 3 s");
    rig.solve();
    assert_eq!(
        undo_name(&rig),
        "wheel step exchanged with wheel step",
        "named"
    );
    assert_eq!(
        number(&rig, "manoeuvre.templates[0].turn"),
        "0.5 s",
        "the shorter is first"
    );
    assert_eq!(
        number(&rig, "manoeuvre.templates[0].at"),
        "3 s",
        "where the other began"
    );
}

#[test]
fn templates_are_removed_and_come_back() {
    let mut rig = Rig::new();
    rig.menu("Add template", "Kerb strike");
    rig.click("Numbers");
    rig.enter("kerb strike, force", "1500 daN");
    rig.solve();
    tap(&mut rig, "Remove: kerb strike at 0 s");
    rig.solve();
    assert_eq!(undo_name(&rig), "kerb strike at 0 s removed", "named");
    rig.menu("Edit", "Undo: kerb strike at 0 s removed");
    rig.solve();
    assert_eq!(
        number(&rig, "manoeuvre.templates[3].force"),
        "1500 daN",
        "back"
    );
    rig.menu("Edit", "Redo: kerb strike at 0 s removed");
    rig.solve();
    assert_eq!(
        rig.app().document().scenario().manoeuvre.templates.len(),
        3,
        "out"
    );
}

#[test]
fn the_table_takes_any_unit_and_says_what_it_refuses() {
    let mut rig = on_engine_speed();
    rig.click("Numbers");
    let good = points(&rig, Input::EngineSpeed);
    for (field, typed, reason) in [
        ("time", "9 s", "give a time from 1 s to 7 s"),
        ("time", "2 bar", "Not taken"),
        ("value", "30000 rpm", "allowed: 0 to 20000 rpm"),
        ("value", "fast", "Not taken"),
    ] {
        let name = format!("engine speed, point 3, {field}");
        rig.enter(&name, typed);
        assert!(rig.says("Not taken"), "{typed} is refused");
        assert!(rig.says(reason), "{typed}: {reason}");
        assert_eq!(
            points(&rig, Input::EngineSpeed),
            good,
            "{typed} changes nothing"
        );
    }
    rig.enter("engine speed, point 3, time", "2100 ms");
    rig.enter("engine speed, point 3, value", "35 rev/s");
    assert!(!rig.says("Not taken"), "good values end the complaints");
    let text = points(&rig, Input::EngineSpeed);
    assert!(text.contains("2100 ms: 35 rev/s"), "as typed: {text}");
    let name = undo_name(&rig);
    let expected = "engine speed, point 3: 2100 ms, 2400 rpm to 2100 ms, 35 rev/s";
    assert_eq!(name, expected, "one step for each field");
    tap(&mut rig, "Add a point");
    let more = points(&rig, Input::EngineSpeed);
    assert!(
        more.ends_with(", 8.5 s: 900 rpm"),
        "behind the last: {more}"
    );
    tap(&mut rig, "Remove engine speed, point 6");
    assert_eq!(points(&rig, Input::EngineSpeed), text, "out again");
}

#[test]
fn duration_is_a_field_of_the_strip() {
    let mut rig = Rig::new();
    rig.enter("Duration of the run", "0 s");
    assert!(rig.says("Duration not taken"), "said beside it");
    assert_eq!(
        rig.text_of("manoeuvre.duration"),
        "10 s",
        "the last good one"
    );
    rig.enter("Duration of the run", "9 s");
    rig.solve();
    assert_eq!(undo_name(&rig), "duration, 10 s to 9 s", "one step");
    rig.enter("Duration of the run", "3500 ms");
    rig.solve();
    assert!(
        rig.says("behind the end of the run"),
        "what is cut off is said"
    );
}

#[test]
fn what_was_drawn_is_saved_bit_for_bit() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("drawn.circuit.ron");
    let mut rig = on_engine_speed();
    let at = middle(&rig, "engine speed, point 4 of 5");
    rig.click("Snap");
    drag(&mut rig, at, vec2(-33.0, 17.0));
    drop_at(&mut rig, at + vec2(-33.0, 17.0));
    rig.menu("Add template", "Sine steering");
    rig.click("Numbers");
    tap(&mut rig, "Turn into breakpoints: wheel step at 8 s");
    rig.solve();
    let drawn = rig.app().document().scenario().clone();
    rig.harness
        .key_press_modifiers(Modifiers::COMMAND | Modifiers::SHIFT, Key::S);
    rig.settle();
    rig.enter(
        "Path of the file to write",
        path.to_str().expect("plain text"),
    );
    rig.settle();
    assert!(!rig.app().document().is_edited(), "saved");
    let read = Document::open(&path).expect("it reads");
    assert_eq!(*read.scenario(), drawn, "every bit");
}

#[test]
fn the_table_of_the_land_is_edited_on_the_card_of_the_valve() {
    let mut rig = Rig::new();
    rig.harness
        .get_by_role_and_label(Role::ComboBox, "Shape of the excess land")
        .click();
    rig.settle();
    rig.click("Table");
    rig.solve();
    let before = rig.fingerprint();
    let table = |rig: &Rig| rig.app().document().scenario().land_table().text();
    let good = table(&rig);
    rig.enter("land, point 2, area", "99 mm2");
    assert!(rig.says("area must not fall"), "said at the field");
    assert_eq!(table(&rig), good, "nothing changed");
    rig.enter("land, point 2, area", "0.12 cm2");
    rig.solve();
    assert!(table(&rig).contains("1 mm: 0.12 cm2"), "{}", table(&rig));
    let expected = "table of the land, point 2: 1 mm, 8 mm2 to 1 mm, 0.12 cm2";
    assert_eq!(undo_name(&rig), expected, "one named step");
    assert_ne!(rig.fingerprint(), before, "other traces");
    tap(&mut rig, "Add a point behind land, point 5");
    assert_eq!(
        undo_name(&rig),
        "table of the land, point 6 added: 6.5 mm, 205 mm2",
        "as far again"
    );
    tap(&mut rig, "Remove land, point 6");
    assert_eq!(
        undo_name(&rig),
        "table of the land, point 6 removed: 6.5 mm, 205 mm2",
        "out"
    );
}
