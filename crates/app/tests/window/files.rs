//! Saving, opening, and what guards unsaved changes.

use egui::accesskit::Role;
use egui::{Key, Modifiers};
use egui_kittest::kittest::Queryable;
use helmsplit_app::Document;

use crate::rig::Rig;

fn save_as(rig: &mut Rig, path: &std::path::Path) {
    rig.harness
        .key_press_modifiers(Modifiers::COMMAND | Modifiers::SHIFT, Key::S);
    rig.settle();
    rig.enter(
        "Path of the file to write",
        path.to_str().expect("plain text"),
    );
    rig.settle();
}

#[test]
fn a_saved_circuit_opens_bit_for_bit() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("mine.circuit.ron");
    let mut rig = Rig::new();
    rig.enter("Fixed orifice diameter", "0.1417 in");
    rig.enter("Spool diameter", "19.7 mm");
    rig.solve();
    let edited = rig.app().document().scenario().clone();
    save_as(&mut rig, &path);
    assert!(!rig.app().document().is_edited(), "saved");
    let read = Document::open(&path).expect("it reads");
    assert_eq!(*read.scenario(), edited, "every bit in the file");

    rig.menu("File", "New from preset");
    rig.click("Frost pruner");
    rig.solve();
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::O);
    rig.settle();
    rig.enter(
        "Path of a .circuit.ron file",
        path.to_str().expect("plain text"),
    );
    rig.solve();
    assert_eq!(
        *rig.app().document().scenario(),
        edited,
        "every bit on the screen"
    );
    assert_eq!(
        rig.app().document().path(),
        Some(path.as_path()),
        "from there"
    );
}

#[test]
fn unsaved_changes_are_not_lost_unasked() {
    let mut rig = Rig::new();
    rig.enter("Fixed orifice diameter", "3.2 mm");
    rig.solve();
    rig.menu("File", "New from preset");
    rig.click("Frost pruner");
    assert!(rig.says("not saved"), "it asks");
    rig.click("Cancel");
    assert_eq!(
        rig.text_of("valve.fixed_orifice_diameter"),
        "3.2 mm",
        "kept"
    );
    rig.menu("File", "New from preset");
    rig.click("Frost pruner");
    rig.click("Discard the changes");
    rig.solve();
    assert!(rig.says("Frost pruner"), "the other circuit");
    assert!(!rig.app().document().is_edited(), "fresh");
}

#[test]
fn a_file_that_does_not_read_says_where() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("broken.circuit.ron");
    std::fs::write(&path, "(format: 1, pump: (displacement: \"20 bar\"))").expect("written");
    let mut rig = Rig::new();
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::O);
    rig.settle();
    rig.enter(
        "Path of a .circuit.ron file",
        path.to_str().expect("plain text"),
    );
    assert!(rig.says("was not opened"), "it says so");
    assert!(rig.says("pump.displacement"), "and where");
    rig.click("Close");
    assert!(rig.says("Orchard carrier"), "the old circuit stays");
}

#[test]
fn a_file_that_cannot_be_written_says_so() {
    let folder = tempfile::tempdir().expect("a folder");
    let mut rig = Rig::new();
    save_as(
        &mut rig,
        &folder.path().join("no such folder/x.circuit.ron"),
    );
    assert!(rig.says("There is no folder"), "it says so");
    assert!(
        rig.app().document().path().is_none(),
        "still without a file"
    );
}

#[test]
fn a_file_that_the_system_refuses_says_so() {
    let folder = tempfile::tempdir().expect("a folder");
    let mut rig = Rig::new();
    // Longer than any name that file systems take.
    save_as(&mut rig, &folder.path().join("x".repeat(300)));
    assert!(rig.says("was not saved"), "it says so");
    assert!(
        rig.app().document().path().is_none(),
        "still without a file"
    );
}

#[test]
fn the_path_field_of_save_as_has_a_proposal() {
    let mut rig = Rig::new();
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::S);
    rig.settle();
    let field = rig
        .harness
        .get_by_role_and_label(Role::TextInput, "Path of the file to write");
    assert_eq!(
        field.value().as_deref(),
        Some("orchard_carrier.circuit.ron"),
        "a new circuit asks where"
    );
}
