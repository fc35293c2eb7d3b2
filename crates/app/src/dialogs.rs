//! Windows over the window: files by their path, unsaved changes, keys, about, problems.

use std::path::PathBuf;

use egui::{Context, Id, Key, Modal, RichText, ScrollArea, TextEdit, Ui};

use crate::about;
use crate::action::Action;
use crate::drawing::Export;
use crate::look::Look;

/// What lies over the window.
#[derive(Debug, Clone)]
pub(crate) enum Dialog {
    /// Open a file by its path.
    Open { path: String },
    /// Save under another path.
    SaveAs { path: String },
    /// Write a drawing under a path.
    Export { export: Export, path: String },
    /// The circuit is edited and something else would replace it.
    Unsaved { next: Box<Action> },
    /// The list of keys.
    Keys,
    /// Version, licences, cautions, what is not modelled.
    About,
    /// Something did not work.
    Problem { title: String, text: String },
}

impl Dialog {
    /// A file could not be read or written.
    pub(crate) fn problem(title: &str, text: impl std::fmt::Display) -> Self {
        Self::Problem {
            title: title.to_owned(),
            text: text.to_string(),
        }
    }
}

/// Draws the dialog.
pub(crate) fn dialog(
    context: &Context,
    dialog: &mut Dialog,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    let response = Modal::new(Id::unique("dialog")).show(context, |ui| {
        ui.set_width(match dialog {
            Dialog::About | Dialog::Keys | Dialog::Problem { .. } => 620.0,
            _ => 480.0,
        });
        match dialog {
            Dialog::Open { path } => {
                ui.heading("Open a circuit");
                let label = "Path of a .circuit.ron file";
                ask_path(ui, path, (label, "Open"), actions, Action::Open);
            }
            Dialog::SaveAs { path } => {
                ui.heading("Save the circuit as");
                let label = "Path of the file to write";
                ask_path(ui, path, (label, "Save"), actions, Action::SaveAs);
            }
            Dialog::Export { export, path } => {
                let export = *export;
                ui.heading(export.name());
                let label = "Path of the SVG file to write";
                let make = |path| Action::Export(export, path);
                ask_path(ui, path, (label, "Write"), actions, make);
            }
            Dialog::Unsaved { next } => unsaved(ui, next, actions),
            Dialog::Keys => about::keys(ui, look),
            Dialog::About => about::about(ui, look),
            Dialog::Problem { title, text } => {
                ui.heading(title.clone());
                ScrollArea::vertical().max_height(320.0).show(ui, |ui| {
                    ui.label(text.clone());
                });
            }
        }
        if matches!(
            dialog,
            Dialog::Keys | Dialog::About | Dialog::Problem { .. }
        ) {
            ui.add_space(8.0);
            if ui.button("Close").clicked() {
                actions.push(Action::CloseDialog);
            }
        }
    });
    if response.should_close() {
        actions.push(Action::CloseDialog);
    }
}

/// Asks for a path; `make` makes the wish of it.
fn ask_path(
    ui: &mut Ui,
    path: &mut String,
    (label, button): (&str, &str),
    actions: &mut Vec<Action>,
    make: impl FnOnce(PathBuf) -> Action,
) {
    ui.add_space(4.0);
    let label = ui.label(label);
    let field = Id::unique("path field");
    let response = ui
        .add(TextEdit::singleline(path).id(field).desired_width(460.0))
        .labelled_by(label.id);
    // Asked first: a field that takes the focus back has not lost it.
    let entered = response.lost_focus() && ui.input(|input| input.key_pressed(Key::Enter));
    if ui.memory(|memory| memory.focused().is_none()) {
        response.request_focus();
    }
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        let named = !path.trim().is_empty();
        let pressed = ui.add_enabled(named, egui::Button::new(button)).clicked();
        if named && (pressed || entered) {
            actions.push(make(PathBuf::from(path.trim())));
        }
        if ui.button("Cancel").clicked() {
            actions.push(Action::CloseDialog);
        }
    });
}

fn unsaved(ui: &mut Ui, next: &Action, actions: &mut Vec<Action>) {
    ui.heading("The circuit has changes that are not saved");
    ui.label("Save them first, or go on without them.");
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        if ui.button("Save first").clicked() {
            actions.push(Action::CloseDialog);
            actions.push(Action::Save);
        }
        let text = RichText::new("Discard the changes");
        if ui.button(text).clicked() {
            actions.push(Action::CloseDialog);
            actions.push(Action::Discarding(Box::new(next.clone())));
        }
        if ui.button("Cancel").clicked() {
            actions.push(Action::CloseDialog);
        }
    });
}
