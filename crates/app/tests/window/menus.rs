//! Every entry of every menu is clicked, and does what it says.

use egui::accesskit::Role;
use egui::{Key, ViewportCommand};
use egui_kittest::kittest::Queryable;
use helmsplit_scenario::PRESETS;

use crate::rig::Rig;
use crate::seen::nodes;

/// Names of what can be pressed now.
fn controls(rig: &Rig) -> Vec<String> {
    let pressable = [Role::Button, Role::RadioButton, Role::CheckBox];
    let seen = nodes(rig).into_iter();
    seen.filter(|node| node.interactive && pressable.contains(&node.role))
        .map(|node| without_keys(&node.name).to_owned())
        .collect()
}

/// The name of an entry without the keys behind it.
fn without_keys(name: &str) -> &str {
    let keys = name.find(" Ctrl+").or_else(|| name.find(" F1"));
    keys.map_or(name, |at| &name[..at])
}

/// Presses what is called exactly so.
fn press(rig: &mut Rig, name: &str) {
    let wanted = name.to_owned();
    rig.harness
        .get_by(move |node| {
            node.role() != Role::Label
                && node
                    .label()
                    .is_some_and(|label| without_keys(&label) == wanted)
        })
        .click();
    rig.settle();
}

/// The entries that a press of `name` brings up.
fn entries(rig: &mut Rig, name: &str) -> Vec<String> {
    let before = controls(rig);
    press(rig, name);
    let mut entries = controls(rig);
    entries.retain(|entry| !before.contains(entry));
    entries
}

fn escape(rig: &mut Rig) {
    for _ in 0..2 {
        rig.harness.key_press(Key::Escape);
        rig.settle();
    }
}

/// Entries of a menu with what the window says once they were clicked.
const DIALOGS: [(&str, &str, &str); 8] = [
    ("File", "Open...", "Open a circuit"),
    ("File", "Save", "Save the circuit as"),
    ("File", "Save as...", "Save the circuit as"),
    ("Edit", "Find...", "Find a parameter, a choice"),
    ("Runs", "Keep this run...", "Its lines stay behind"),
    ("Help", "Keys and gestures", "Tab, Shift+Tab"),
    ("Help", "About and cautions", "safety-critical"),
    ("Help", "First steps", "1 of 3"),
];

/// Entries that tests of their own click, or that lead to entries below.
const ELSEWHERE: [&str; 6] = [
    "New from preset",
    "Open recent",
    "Export",
    "Undo",
    "Redo",
    "Quit",
];

#[test]
fn entries_that_open_something_open_it() {
    for (menu, entry, says) in DIALOGS {
        let mut rig = Rig::new();
        press(&mut rig, menu);
        press(&mut rig, entry);
        assert!(rig.says(says), "{menu}, {entry}: {says}");
    }
}

#[test]
fn no_entry_is_without_a_test() {
    let mut rig = Rig::new();
    for menu in ["File", "Edit", "Runs", "Help"] {
        for entry in entries(&mut rig, menu) {
            let clicked = DIALOGS.iter().any(|(_, name, _)| *name == entry);
            let known = clicked || ELSEWHERE.contains(&entry.as_str());
            assert!(known, "{menu}, {entry} is clicked by no test");
        }
        escape(&mut rig);
    }
}

#[test]
fn every_entry_of_the_view_menu_changes_a_setting() {
    let mut rig = Rig::new();
    let all = entries(&mut rig, "View");
    escape(&mut rig);
    assert!(
        all.len() >= 2 + 3 + 7,
        "other units, appearances, scales: {all:?}"
    );
    for entry in all {
        let before = *rig.app().settings();
        press(&mut rig, "View");
        press(&mut rig, &entry);
        let chosen = |rig: &Rig| {
            let settings = rig.app().settings();
            (settings.units, settings.appearance, settings.scale)
        };
        let now = chosen(&rig);
        // What is chosen already stays chosen; everything else becomes so.
        let same = now == (before.units, before.appearance, before.scale);
        press(&mut rig, "View");
        let radio = nodes(&rig)
            .into_iter()
            .find(|node| node.role == Role::RadioButton && node.name == entry);
        assert!(radio.is_some(), "{entry} is still there");
        escape(&mut rig);
        let first = ["Metric: bar, L/min, mm", "Light", "100 %"];
        assert!(
            !same || first.contains(&entry.as_str()),
            "{entry} does nothing"
        );
    }
}

#[test]
fn every_preset_opens_from_the_menu() {
    for preset in PRESETS {
        let name = preset.scenario().expect("presets read").name;
        let mut rig = Rig::new();
        press(&mut rig, "File");
        press(&mut rig, "New from preset");
        press(&mut rig, &name);
        assert_eq!(rig.app().document().scenario().name, name, "opened");
    }
}

#[test]
fn every_export_asks_where_to_or_copies() {
    let mut rig = Rig::new();
    press(&mut rig, "File");
    let all = entries(&mut rig, "Export");
    assert!(!all.is_empty(), "something to export");
    for entry in all {
        escape(&mut rig);
        press(&mut rig, "File");
        press(&mut rig, "Export");
        press(&mut rig, &entry);
        let says = if entry.starts_with("Copy ") {
            "Copied to the clipboard"
        } else {
            "Cancel"
        };
        assert!(rig.says(says), "{entry}: {says}");
    }
}

#[test]
fn quit_closes_the_window() {
    let mut rig = Rig::new();
    press(&mut rig, "File");
    let quit = "Quit".to_owned();
    rig.harness
        .get_by(move |node| {
            node.label()
                .is_some_and(|label| without_keys(&label) == quit)
        })
        .click();
    let closes = (0..4).any(|_| {
        rig.harness.step();
        let viewports = rig.harness.output().viewport_output.values();
        let mut commands = viewports.flat_map(|viewport| &viewport.commands);
        commands.any(|command| matches!(command, ViewportCommand::Close))
    });
    assert!(closes, "the window is told to close");
}
