//! The menu of runs.

use egui::Ui;

use super::strip::run_items;
use super::{KeptAction, KeptRuns};
use crate::action::Action;
use crate::menu::{KEEP, item};

/// Draws the menu.
pub(crate) fn runs_menu(ui: &mut Ui, kept: &KeptRuns, solved: bool, actions: &mut Vec<Action>) {
    ui.set_min_width(220.0);
    ui.add_enabled_ui(solved && !kept.is_full(), |ui| {
        item(ui, "Keep this run...", Some(KEEP), actions, || {
            Action::Kept(KeptAction::AskToKeep)
        });
    });
    if kept.runs().is_empty() {
        ui.weak("No runs are kept.");
        return;
    }
    ui.separator();
    for run in kept.runs() {
        let text = format!("({}) {}", run.number(), run.name());
        ui.menu_button(text, |ui| run_items(ui, kept, run, actions));
    }
    ui.separator();
    ui.add_enabled_ui(kept.chosen().is_some(), |ui| {
        item(ui, "Compare with none", None, actions, || {
            Action::Kept(KeptAction::Compare(None))
        });
    });
    item(ui, "Drop all kept runs", None, actions, || {
        Action::Kept(KeptAction::DropAll)
    });
}
