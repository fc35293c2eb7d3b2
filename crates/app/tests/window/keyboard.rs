//! The whole job without a pointer.

use egui::{Key, Modifiers};
use helmsplit_app::Document;
use helmsplit_scenario::{PRESETS, UnitSystem};

use crate::rig::Rig;

/// Most presses of Tab that lead to any control.
const MOST_TABS: usize = 200;

fn press(rig: &mut Rig, key: Key) {
    rig.harness.key_press(key);
    rig.settle();
}

fn press_with(rig: &mut Rig, modifiers: Modifiers, key: Key) {
    rig.harness.key_press_modifiers(modifiers, key);
    rig.settle();
}

fn write(rig: &mut Rig, text: &str) {
    rig.harness.event(egui::Event::Text(text.to_owned()));
    rig.settle();
}

/// Presses Tab until a control with a name that begins so has the focus.
fn tab_to(rig: &mut Rig, beginning: &str) {
    for _ in 0..MOST_TABS {
        press(rig, Key::Tab);
        let there = rig
            .focused()
            .is_some_and(|node| node.name.starts_with(beginning));
        if there {
            return;
        }
    }
    panic!("Tab does not lead to {beginning}");
}

#[test]
fn open_find_edit_undo_prove_switch_and_save_without_a_pointer() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("mine.circuit.ron");
    let mut document = Document::from_preset(&PRESETS[0]).expect("presets read");
    document.save_as(&path).expect("written");
    let mut rig = Rig::new();

    press_with(&mut rig, Modifiers::COMMAND, Key::O);
    press_with(&mut rig, Modifiers::COMMAND, Key::A);
    write(&mut rig, path.to_str().expect("plain text"));
    press(&mut rig, Key::Enter);
    rig.solve();
    assert_eq!(rig.app().document().path(), Some(path.as_path()), "opened");

    rig.find("fixed orifice diameter");
    write(&mut rig, "3.4 mm");
    press(&mut rig, Key::Enter);
    rig.solve();
    let orifice = "valve.fixed_orifice_diameter";
    assert_eq!(rig.text_of(orifice), "3.4 mm", "edited");
    press_with(&mut rig, Modifiers::COMMAND, Key::Z);
    rig.solve();
    assert_ne!(rig.text_of(orifice), "3.4 mm", "undone");
    press_with(&mut rig, Modifiers::COMMAND, Key::Y);
    rig.solve();
    assert_eq!(rig.text_of(orifice), "3.4 mm", "done again");

    tab_to(&mut rig, "overshoot ");
    press(&mut rig, Key::Enter);
    assert!(rig.says("Evidence: overshoot"), "the evidence of a chip");

    rig.find("units psi");
    assert_eq!(rig.app().settings().units, UnitSystem::Us, "units");

    press_with(&mut rig, Modifiers::COMMAND, Key::S);
    assert!(!rig.app().document().is_edited(), "saved");
    let text = std::fs::read_to_string(&path).expect("a file");
    assert!(text.contains("3.4 mm"), "with the edit");

    let pointer = rig.harness.ctx.input(|input| input.pointer.latest_pos());
    assert_eq!(pointer, None, "no pointer was ever there");
}
