//! The states of the window, one after the other.

use egui::Key;
use helmsplit_scenario::parameters;
use helmsplit_study::CheckId;

use crate::rig::Rig;

/// Brings the window into each state and calls `look` in it: the page, the card of each part, the
/// evidence of each check, each dialog that can be opened by its name.
pub(crate) fn each_state(rig: &mut Rig, mut look: impl FnMut(&mut Rig, &str)) {
    look(rig, "page");
    let scenario = rig.app().document().scenario().clone();
    let mut sections = Vec::new();
    for row in parameters().iter().filter(|row| scenario.uses(row.id)) {
        if !sections.contains(&row.section()) {
            sections.push(row.section());
            rig.find(row.path);
            look(rig, &format!("card of {}", row.section()));
        }
    }
    for id in CheckId::ALL {
        let name = id.name().replace('-', " ");
        rig.find(&format!("verdict {name}"));
        assert!(rig.says(&format!("Evidence: {name}")), "evidence of {name}");
        look(rig, &format!("evidence of {name}"));
    }
    for dialog in DIALOGS {
        rig.find(dialog);
        look(rig, dialog);
        rig.harness.key_press(Key::Escape);
        rig.settle();
    }
    rig.open_finder("spool");
    look(rig, "finder");
    rig.harness.key_press(Key::Escape);
    rig.settle();
}

/// Commands that open a dialog.
const DIALOGS: [&str; 4] = [
    "Open a circuit",
    "Save the circuit as",
    "Keys and gestures",
    "About and cautions",
];
