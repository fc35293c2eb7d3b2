//! The hints for a new user.

use egui::Key;
use helmsplit_app::{Appearance, FirstSteps};

use crate::rig::Rig;

fn new_user() -> Rig {
    let mut rig = Rig::new();
    rig.menu("Help", "First steps");
    rig
}

#[test]
fn hints_come_one_at_a_time_and_go_with_the_deed() {
    let mut rig = new_user();
    assert!(rig.says("1 of 3"), "the first hint");
    rig.find("valve.spool_diameter");
    rig.harness.key_press(Key::ArrowUp);
    rig.solve();
    assert!(rig.says("2 of 3"), "a value was stepped");
    rig.click_beginning("overshoot ");
    assert!(rig.says("3 of 3"), "a verdict was opened");
}

#[test]
fn hints_can_be_skipped_or_sent_away_for_good() {
    let mut rig = new_user();
    rig.click("Skip this hint");
    assert!(rig.says("2 of 3"), "the next");
    rig.click("No more hints");
    assert!(!rig.says("First steps,"), "gone");
    assert_eq!(
        rig.app().settings().first_steps,
        FirstSteps::over(),
        "for good"
    );
}

#[test]
fn hints_do_not_come_unasked_once_they_are_over() {
    let rig = Rig::with([1280.0, 720.0], Appearance::Light, "orchard carrier");
    assert!(!rig.says("First steps,"), "the rig begins with them over");
}

#[test]
fn keeping_a_run_ends_the_hints() {
    let mut rig = new_user();
    rig.click("Skip this hint");
    rig.click("Skip this hint");
    assert!(rig.says("3 of 3"), "the last hint");
    rig.harness
        .key_press_modifiers(egui::Modifiers::COMMAND, Key::K);
    rig.settle();
    rig.harness.key_press(Key::Enter);
    rig.settle();
    assert_eq!(rig.app().kept().runs().len(), 1, "kept");
    assert!(rig.app().settings().first_steps.is_over(), "and over");
}
