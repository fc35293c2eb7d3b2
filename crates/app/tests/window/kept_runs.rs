//! Runs that stay to be compared with.

use egui::{Key, Modifiers};
use egui_kittest::kittest::Queryable;
use helmsplit_app::Appearance;

use crate::rig::Rig;

const ORIFICE: &str = "valve.fixed_orifice_diameter";

/// A kept run at the preset's values and a live one with a narrower orifice.
fn two_runs() -> Rig {
    let mut rig = Rig::new();
    rig.keep("as drawn");
    rig.enter("Fixed orifice diameter", "3.3 mm");
    rig.solve();
    rig
}

#[test]
fn a_run_is_kept_under_a_name_and_compared_at_the_cursor() {
    let mut rig = Rig::new();
    let before = rig.fingerprint();
    rig.press(Modifiers::COMMAND, Key::K);
    let field = rig
        .harness
        .get_by_role_and_label(egui::accesskit::Role::TextInput, "Name of the run");
    assert_eq!(
        field.value().as_deref(),
        Some("as the preset"),
        "a name is proposed"
    );
    rig.enter("Name of the run", "as drawn");
    assert_eq!(rig.kept(), ["as drawn"], "kept");
    assert!(rig.says("(1) as drawn, compared"), "in the strip");
    assert!(rig.says("Compared with \"as drawn\""), "in the status line");
    rig.enter("Fixed orifice diameter", "3.3 mm");
    rig.solve();
    rig.click_trace(0.6, Modifiers::NONE);
    let kept = &rig.app().kept().runs()[0];
    let sums = kept.figure().panels.iter().flat_map(|panel| &panel.series);
    let sums: Vec<f64> = sums.map(|s| s.points.iter().map(|p| p[1]).sum()).collect();
    assert_eq!(sums, before, "the kept run is the old one");
    assert_ne!(rig.fingerprint(), before, "the live one is another");
    assert!(rig.says("Priority 1"), "values are read");
    assert!(
        rig.says(", kept 1") && rig.says(", difference \u{2212}"),
        "and differences"
    );
}

#[test]
fn the_next_name_says_what_was_changed() {
    let mut rig = two_runs();
    rig.press(Modifiers::COMMAND, Key::K);
    let field = rig
        .harness
        .get_by_role_and_label(egui::accesskit::Role::TextInput, "Name of the run");
    assert_eq!(
        field.value().as_deref(),
        Some("fixed orifice diameter 3.3 mm"),
        "by the last step"
    );
}

#[test]
fn a_name_is_taken_once_and_five_runs_are_all() {
    let mut rig = Rig::new();
    rig.keep("one");
    rig.press(Modifiers::COMMAND, Key::K);
    rig.enter("Name of the run", "one");
    assert!(
        rig.says("another kept run is called \"one\""),
        "said in the dialog"
    );
    rig.enter("Name of the run", "two");
    for name in ["three", "four", "five"] {
        rig.keep(name);
    }
    assert_eq!(rig.kept(), ["one", "two", "three", "four", "five"], "five");
    rig.press(Modifiers::COMMAND, Key::K);
    assert!(
        rig.says("5 runs are kept already; drop one first"),
        "no sixth"
    );
    rig.click_beginning("(3) three");
    rig.click("Drop this run");
    rig.keep("six");
    assert_eq!(
        rig.kept(),
        ["one", "two", "six", "four", "five"],
        "in the free place"
    );
    assert!(rig.says("(3) six, compared"), "with its number and dash");
}

#[test]
fn restoring_a_circuit_is_one_step_that_can_be_undone() {
    let mut rig = two_runs();
    let kept = rig.app().kept().runs()[0].scenario().clone();
    rig.click_beginning("(1) as drawn");
    rig.click("Restore its circuit");
    rig.solve();
    assert_eq!(*rig.app().document().scenario(), kept, "the old circuit");
    let name = "circuit of the kept run \"as drawn\"";
    assert_eq!(rig.app().document().undo_name(), Some(name), "one step");
    rig.press(Modifiers::COMMAND, Key::Z);
    rig.solve();
    assert_eq!(rig.text_of(ORIFICE), "3.3 mm", "undone");
}

#[test]
fn a_run_is_renamed_hidden_and_dropped() {
    let mut rig = two_runs();
    rig.click_beginning("(1) as drawn");
    rig.click("Rename...");
    rig.enter("Name of the run", "wide orifice");
    assert!(rig.says("Compared with \"wide orifice\""), "the new name");
    rig.click_beginning("(1) wide orifice");
    rig.click("Show its lines");
    assert!(!rig.app().kept().runs()[0].is_shown(), "hidden");
    rig.menu("Runs", "Compare with none");
    assert!(!rig.says("Compared with"), "not compared");
    rig.menu("Runs", "Drop all kept runs");
    assert!(rig.kept().is_empty(), "gone");
    assert!(!rig.says("Kept runs"), "no strip");
}

#[test]
fn kept_runs_stay_when_another_circuit_is_opened_and_follow_the_units() {
    let mut rig = Rig::new();
    rig.keep("carrier");
    rig.menu("File", "New from preset");
    rig.click("Frost pruner");
    rig.solve();
    assert_eq!(rig.kept(), ["carrier"], "it stays");
    rig.menu("View", "US: psi");
    let kept = &rig.app().kept().runs()[0];
    let pressure = kept
        .figure()
        .panels
        .iter()
        .find(|panel| panel.label == "Pressure");
    assert_eq!(
        pressure.expect("pressures").unit,
        "psi",
        "in the units of the window"
    );
    rig.click_trace(0.5, Modifiers::NONE);
    assert!(rig.says(", kept "), "compared where a trace fits");
}

#[test]
fn a_draft_is_not_kept() {
    let mut rig = Rig::new();
    rig.harness
        .get_by_role_and_label(egui::accesskit::Role::TextInput, "Fixed orifice diameter")
        .focus();
    rig.settle();
    rig.harness.key_press(Key::ArrowUp);
    // The gesture is open until a pause; wait for its draft.
    for _ in 0..400 {
        rig.harness.step();
        let draft = rig.app().answer().map(|answer| answer.quality);
        if draft == Some(helmsplit_app::Quality::Draft) || !rig.app().document().in_gesture() {
            break;
        }
        std::thread::sleep(std::time::Duration::from_millis(1));
    }
    let quality = rig.app().answer().map(|answer| answer.quality);
    if quality == Some(helmsplit_app::Quality::Draft) {
        rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::K);
        rig.harness.step();
        rig.harness.step();
        assert!(rig.kept().is_empty(), "a draft is no run");
    }
    rig.solve();
    rig.keep("solved");
    assert_eq!(rig.kept(), ["solved"], "once it is solved");
}

#[test]
fn lines_of_kept_runs_are_painted() {
    let mut rig = Rig::with([1280.0, 800.0], Appearance::Light, "orchard carrier");
    rig.keep("as drawn");
    rig.enter("Fixed orifice diameter", "3.3 mm");
    rig.solve();
    let with = rig.harness.render().expect("a picture");
    rig.click_beginning("(1) as drawn");
    rig.click("Show its lines");
    let without = rig.harness.render().expect("a picture");
    let differ = with
        .pixels()
        .zip(without.pixels())
        .filter(|(a, b)| a != b)
        .count();
    assert!(differ > 500, "{differ} pixels differ");
}
