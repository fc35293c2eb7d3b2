//! Every control has a name, on every state of the window.

use egui::accesskit::Role;

use crate::rig::Rig;
use crate::seen::nodes;
use crate::states::each_state;

#[test]
fn every_control_has_a_name_that_a_screen_reader_can_say() {
    let mut rig = Rig::new();
    let mut nameless = Vec::new();
    each_state(&mut rig, |rig, state| {
        for node in nodes(rig) {
            let named = !node.name.trim().is_empty();
            // A scroll bar says what it is by its role; wheel and keys do the same as it does.
            if node.interactive && !named && node.role != Role::ScrollBar {
                nameless.push(format!("{state}: {:?} at {:?}", node.role, node.rect));
            }
        }
    });
    nameless.sort();
    nameless.dedup();
    assert!(
        nameless.is_empty(),
        "without a name:\n{}",
        nameless.join("\n")
    );
}
