//! Bars across the window.

use egui::Ui;

use super::HelmsplitApp;
use crate::action::Action;
use crate::first_steps::first_steps;
use crate::menu;

impl HelmsplitApp {
    /// Draws the menus.
    pub(super) fn menu_bar(&self, ui: &mut Ui, actions: &mut Vec<Action>) {
        egui::Panel::top("menu").show(ui, |ui| {
            let (recent, offers) = (self.files.recent(), self.files.offers().len());
            menu::menu_bar(
                ui,
                &self.document,
                (recent, offers),
                &self.settings,
                &self.look,
                actions,
            );
        });
    }

    /// Draws the hint for a new user, as long as one is wanted.
    pub(super) fn hints_bar(&self, ui: &mut Ui, actions: &mut Vec<Action>) {
        if !self.settings.first_steps.is_over() {
            egui::Panel::top("first steps").show(ui, |ui| {
                first_steps(ui, &self.settings.first_steps, &self.look, actions);
            });
        }
    }
}
