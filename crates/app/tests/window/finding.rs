//! Finding things by a word of them.

use egui::Key;
use egui::accesskit::Role;
use egui_kittest::kittest::Queryable;
use helmsplit_app::Appearance;
use helmsplit_scenario::parameters;

use crate::rig::Rig;
use crate::seen::nodes;

#[test]
fn a_parameter_is_found_focused_marked_and_edited() {
    let mut rig = Rig::new();
    rig.open_finder("diameter spool");
    let shown = nodes(&rig);
    let row = shown
        .iter()
        .find(|node| node.role == Role::Button && node.name.starts_with("Spool diameter, "));
    let row = row.expect("a match");
    assert!(row.name.ends_with("20 mm"), "value and unit: {}", row.name);
    rig.harness.key_press(Key::Enter);
    rig.settle();
    assert!(!rig.says("Find a parameter"), "the dialog is gone");
    let focused = rig.focused().expect("a field has the focus");
    assert_eq!(focused.role, Role::TextInput, "{focused:?}");
    // The old value is selected: typing replaces it.
    rig.harness
        .get_by_role_and_label(Role::TextInput, &focused.name)
        .type_text("19.5 mm");
    rig.settle();
    rig.harness.key_press(Key::Enter);
    rig.settle();
    assert_eq!(rig.text_of("valve.spool_diameter"), "19.5 mm", "edited");
}

#[test]
fn parameters_of_every_card_can_be_gone_to() {
    let mut rig = Rig::new();
    let scenario = rig.app().document().scenario().clone();
    // Every fifth reaches each card and keeps the test short.
    let used = parameters().iter().filter(|row| scenario.uses(row.id));
    for row in used.step_by(5) {
        rig.find(row.path);
        let focused = rig.focused().unwrap_or_else(|| panic!("{}", row.path));
        assert_eq!(focused.role, Role::TextInput, "{}", row.path);
        assert_eq!(focused.name, row.label, "{}", row.path);
        let window = rig.window();
        assert!(
            window.contains_rect(focused.rect),
            "{} lies at {:?}",
            row.path,
            focused.rect
        );
    }
}

#[test]
fn what_is_not_in_use_leads_to_the_choice_that_brings_it_in() {
    let mut rig = Rig::new();
    let scenario = rig.app().document().scenario().clone();
    let unused = parameters().iter().find(|row| !scenario.uses(row.id));
    let unused = unused.expect("the carrier does not use everything");
    rig.open_finder(unused.path);
    assert!(rig.says("not in use"), "it says so");
    rig.harness.key_press(Key::Enter);
    rig.settle();
    let focused = rig.focused().expect("a choice has the focus");
    assert_eq!(focused.role, Role::ComboBox, "{focused:?}");
}

#[test]
fn arrow_keys_choose_among_the_matches_and_escape_leaves() {
    let mut rig = Rig::new();
    rig.open_finder("spool");
    assert!(rig.says("1 of "), "the first");
    for _ in 0..2 {
        rig.harness.key_press(Key::ArrowDown);
        rig.settle();
    }
    assert!(rig.says("3 of "), "the third");
    rig.harness.key_press(Key::ArrowUp);
    rig.settle();
    assert!(rig.says("2 of "), "the second");
    rig.harness.key_press(Key::Escape);
    rig.settle();
    assert!(!rig.says("Enter takes it"), "closed");
    assert!(!rig.app().document().is_edited(), "nothing happened");
}

#[test]
fn verdicts_commands_and_slips_of_the_key_are_found() {
    let mut rig = Rig::new();
    rig.find("verdict overshoot");
    assert!(rig.says("Evidence: overshoot"), "a verdict");
    rig.find("appearance dark");
    assert!(
        rig.app().settings().appearance == Appearance::Dark,
        "a command"
    );
    rig.open_finder("oriffice");
    assert!(rig.says("found for \"orifice\""), "a slip of the key");
    rig.harness.key_press(Key::Escape);
    rig.settle();
    rig.open_finder("zzzzzz");
    assert!(rig.says("nor anything near it"), "nothing to be found");
    rig.harness.key_press(Key::Enter);
    rig.settle();
    assert!(rig.says("nor anything near it"), "and Enter does nothing");
}

#[test]
fn a_match_can_be_clicked() {
    let mut rig = Rig::new();
    rig.menu("Edit", "Find...");
    rig.harness.event(egui::Event::Text("spool dia".to_owned()));
    rig.settle();
    rig.click_beginning("Spool diameter, ");
    let focused = rig.focused().expect("a field has the focus");
    assert_eq!(focused.name, "Spool diameter", "{focused:?}");
}

/// Writes finder and hints as PNG into the folder named by `HELMSPLIT_SHOTS`.
#[test]
#[ignore = "writes pictures to look at"]
fn screenshots() {
    let folder = std::env::var("HELMSPLIT_SHOTS").expect("a folder");
    for (name, appearance) in [("light", Appearance::Light), ("dark", Appearance::Dark)] {
        let mut rig = Rig::with([1280.0, 720.0], appearance, "orchard carrier");
        let shoot = |rig: &mut Rig, page: &str| {
            let picture = rig.harness.render().expect("a picture");
            let path = format!("{folder}/{page}-{name}.png");
            picture.save(&path).expect("written");
        };
        rig.open_finder("spool");
        shoot(&mut rig, "finder");
        rig.harness.key_press(Key::Enter);
        rig.settle();
        shoot(&mut rig, "found");
        rig.menu("Help", "First steps");
        shoot(&mut rig, "hint");
        rig.menu("Help", "About and cautions");
        shoot(&mut rig, "about");
    }
}
