//! Values, choices, units, and the way back.

use egui::{Key, Modifiers};
use egui_kittest::kittest::Queryable;
use helmsplit_scenario::Severity;

use crate::rig::Rig;

const ORIFICE: &str = "valve.fixed_orifice_diameter";
const SPOOL: &str = "valve.spool_diameter";

#[test]
fn it_opens_on_a_solved_circuit() {
    let rig = Rig::new();
    let answer = rig.app().answer().expect("solved");
    assert!(answer.solved.run.end.is_finished(), "to the end");
    assert!(
        rig.says("Orchard carrier"),
        "the name of the circuit is shown"
    );
    assert!(rig.says("Solved in"), "the status line says so");
    assert!(rig.says("Volume audit"), "with its audits");
    rig.harness.get_by_label("Traces over time");
}

#[test]
fn a_typed_value_in_another_unit_changes_the_traces() {
    let mut rig = Rig::new();
    let before = rig.fingerprint();
    rig.enter("Fixed orifice diameter", "0.14 in");
    rig.solve();
    assert_eq!(rig.text_of(ORIFICE), "0.14 in", "kept as typed");
    assert_ne!(rig.fingerprint(), before, "other traces");
    assert!(rig.app().document().is_edited(), "edited");
}

#[test]
fn a_bare_number_takes_the_unit_beside_the_field() {
    let mut rig = Rig::new();
    rig.enter("Fixed orifice diameter", "3.5");
    assert_eq!(rig.text_of(ORIFICE), "3.5 mm", "millimetres stand there");
}

#[test]
fn a_bad_value_is_said_at_the_field_and_the_last_good_one_stays() {
    let mut rig = Rig::new();
    let (before, good) = (rig.fingerprint(), rig.text_of(ORIFICE));
    for (typed, reason) in [
        ("7 bar", "bar"),
        ("900 mm", "too large"),
        ("wide", "Not taken"),
    ] {
        rig.enter("Fixed orifice diameter", typed);
        assert!(rig.says("Not taken"), "{typed} is refused");
        assert!(rig.says(reason), "{typed}: {reason}");
        assert_eq!(rig.text_of(ORIFICE), good, "{typed} changes nothing");
    }
    rig.solve();
    assert_eq!(rig.fingerprint(), before, "the traces of the good value");
    rig.enter("Fixed orifice diameter", "3.6 mm");
    assert!(!rig.says("Not taken"), "a good value ends the complaint");
}

#[test]
fn a_contradiction_keeps_the_last_good_traces_and_says_why() {
    let mut rig = Rig::new();
    let before = rig.fingerprint();
    // A land that opens behind the end of the stroke never opens.
    rig.enter("Overlap of the excess land", "9 mm");
    let findings = rig.app().document().findings();
    let contradicts = findings.iter().any(|f| f.severity == Severity::Error);
    assert!(contradicts, "a contradiction: {findings}");
    assert!(rig.says("never open"), "said at the field");
    assert!(rig.app().failure().is_some(), "not solved");
    assert!(
        rig.says("last good values"),
        "and the traces are said to be old"
    );
    assert_eq!(rig.fingerprint(), before, "the last good traces");
    rig.enter("Overlap of the excess land", "1.4 mm");
    rig.solve();
    assert!(!rig.says("last good values"), "solved again");
    assert_ne!(rig.fingerprint(), before, "with the new value");
}

#[test]
fn arrow_keys_step_a_value_and_one_undo_takes_all_steps_back() {
    let mut rig = Rig::new();
    let before = rig.text_of(ORIFICE);
    rig.harness
        .get_by_role_and_label(egui::accesskit::Role::TextInput, "Fixed orifice diameter")
        .focus();
    rig.settle();
    for _ in 0..3 {
        rig.harness.key_press(Key::ArrowUp);
        rig.settle();
    }
    let stepped = rig.text_of(ORIFICE);
    assert_ne!(stepped, before, "stepped");
    rig.solve();
    let name = rig.app().document().undo_name().map(str::to_owned);
    let expected = format!("fixed orifice diameter, {before} to {stepped}");
    assert_eq!(name.as_deref(), Some(expected.as_str()), "one named step");
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::Z);
    rig.solve();
    assert_eq!(rig.text_of(ORIFICE), before, "all of it");
    assert!(!rig.app().document().is_edited(), "as it was");
}

#[test]
fn dragging_a_name_drags_its_value() {
    let mut rig = Rig::new();
    let before = rig.text_of(SPOOL);
    let at = {
        let nodes = rig
            .harness
            .query_all_by_value("Spool diameter")
            .chain(rig.harness.query_all_by_label("Spool diameter"));
        let label = nodes
            .into_iter()
            .map(|node| node.rect())
            .min_by(|a, b| a.left().total_cmp(&b.left()));
        label.expect("the name beside the field").center()
    };
    rig.harness.hover_at(at);
    rig.settle();
    rig.harness.drag_at(at);
    rig.settle();
    for x in [10.0, 20.0, 40.0] {
        rig.harness.hover_at(at + egui::vec2(x, 0.0));
        rig.settle();
    }
    let dragged = rig.text_of(SPOOL);
    assert_ne!(dragged, before, "it follows the pointer");
    assert_eq!(
        rig.app().document().undo_name(),
        None,
        "no step while dragging"
    );
    rig.harness.drop_at(at + egui::vec2(40.0, 0.0));
    rig.solve();
    assert!(
        rig.app().document().undo_name().is_some(),
        "one step at the end"
    );
}

#[test]
fn undo_and_redo_from_the_menu_name_their_step() {
    let mut rig = Rig::new();
    let (before, first) = (rig.fingerprint(), rig.text_of(ORIFICE));
    rig.enter("Fixed orifice diameter", "3.3 mm");
    rig.solve();
    let after = rig.fingerprint();
    rig.menu("Edit", "Undo: fixed orifice diameter");
    rig.solve();
    assert_eq!(rig.text_of(ORIFICE), first, "back");
    assert_eq!(
        rig.fingerprint().len(),
        before.len(),
        "the lines of the first run"
    );
    rig.menu("Edit", "Redo: fixed orifice diameter");
    rig.solve();
    assert_eq!(rig.text_of(ORIFICE), "3.3 mm", "forth");
    assert_ne!(before, after, "the runs differ");
}

#[test]
fn units_switch_everywhere_at_once() {
    let mut rig = Rig::new();
    let scenario = rig.app().document().scenario().clone();
    let unit = |rig: &Rig, label: &str| {
        let panels = &rig.app().figure().panels;
        let panel = panels.iter().find(|panel| panel.label == label);
        panel.expect("a panel of that name").unit.clone()
    };
    assert_eq!(unit(&rig, "Pressure"), "bar", "metric first");
    rig.menu("View", "US: psi");
    assert_eq!(unit(&rig, "Pressure"), "psi", "the traces");
    let shown = rig
        .harness
        .get_by_role_and_label(egui::accesskit::Role::TextInput, "Fixed orifice diameter")
        .value();
    let inches: f64 = shown.expect("a number").parse().expect("plain digits");
    assert!((0.05..0.5).contains(&inches), "the card: {inches} in");
    assert_eq!(
        *rig.app().document().scenario(),
        scenario,
        "the circuit is the same"
    );
    assert!(!rig.app().document().is_edited(), "and not edited");
}

#[test]
fn another_choice_brings_other_fields_and_other_traces() {
    let mut rig = Rig::new();
    rig.click("Excess motor");
    rig.harness
        .get_by_role_and_label(egui::accesskit::Role::ComboBox, "Excess side")
        .click();
    rig.settle();
    rig.click("Blocked");
    rig.solve();
    let answer = rig.app().answer().expect("solved");
    assert_eq!(
        answer.scenario.get("excess.kind").expect("a choice"),
        "blocked",
        "the choice was taken"
    );
    let motor = rig
        .app()
        .figure()
        .panels
        .iter()
        .any(|panel| panel.label == "Excess motor speed");
    assert!(!motor, "no motor any more");
    rig.menu("Edit", "Undo: excess side");
    rig.solve();
    assert!(
        !rig.app().document().is_edited(),
        "back with everything that the motor had"
    );
}
