//! Windows over the window: files by their path, unsaved changes, keys, about, problems.

use std::path::{Path, PathBuf};

use egui::{Context, Id, Modal, RichText, ScrollArea, Ui};

use crate::about;
use crate::action::{Action, Filing};
use crate::files::ask_path::{PathDialog, path_dialog};
use crate::find::{Finder, finder};
use crate::look::Look;

/// What lies over the window.
#[derive(Debug, Clone)]
pub(crate) enum Dialog {
    /// A path is asked for.
    AskPath(Box<PathDialog>),
    /// The desktop asks for a path.
    ByDesktop,
    /// A file used lately is gone.
    Missing { path: PathBuf },
    /// Another program changed the file that is to be saved.
    Theirs { path: PathBuf },
    /// Earlier windows ended without saving.
    Offers { offers: Vec<OfferLine> },
    /// The circuit is edited and something else would replace it.
    Unsaved { next: Box<Action> },
    /// Find something by a word.
    Find(Box<Finder>),
    /// The list of keys.
    Keys,
    /// Version, licences, cautions, what is not modelled.
    About,
    /// Something did not work.
    Problem { title: String, text: String },
}

/// A circuit that an earlier window did not save.
#[derive(Debug, Clone)]
pub(crate) struct OfferLine {
    /// Name of its file, else of the circuit.
    pub(crate) title: String,
    /// Name of the circuit.
    pub(crate) circuit: String,
    pub(crate) file: Option<PathBuf>,
    /// How long ago.
    pub(crate) kept: String,
    /// The last change in words; may be empty.
    pub(crate) change: String,
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
    if let Dialog::Find(state) = dialog {
        finder(context, state, look, actions);
        return;
    }
    let response = Modal::new(Id::unique("dialog")).show(context, |ui| {
        ui.set_width(match dialog {
            Dialog::About | Dialog::Keys | Dialog::Problem { .. } | Dialog::AskPath(_) => 620.0,
            _ => 480.0,
        });
        match dialog {
            Dialog::AskPath(ask) => path_dialog(ui, ask, look, actions),
            Dialog::ByDesktop => by_desktop(ui, actions),
            Dialog::Missing { path } => missing(ui, path, actions),
            Dialog::Theirs { path } => theirs(ui, path, actions),
            Dialog::Offers { offers: lines } => offers(ui, lines, look, actions),
            Dialog::Unsaved { next } => unsaved(ui, next, actions),
            // Drawn above, at a place of its own.
            Dialog::Find(_) => {}
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

fn by_desktop(ui: &mut Ui, actions: &mut Vec<Action>) {
    ui.heading("The desktop asks for the file");
    ui.label("Answer in its window.");
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        if ui.button("Choose here instead").clicked() {
            actions.push(Action::Filing(Filing::OwnDialog));
        }
        if ui.button("Cancel").clicked() {
            actions.push(Action::CloseDialog);
        }
    });
}

fn missing(ui: &mut Ui, path: &Path, actions: &mut Vec<Action>) {
    ui.heading("The file is gone");
    ui.label(format!("There is no file {} any more.", path.display()));
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        if ui.button("Take it off the list").clicked() {
            actions.push(Action::CloseDialog);
            actions.push(Action::Filing(Filing::ForgetRecent(path.to_owned())));
        }
        if ui.button("Close").clicked() {
            actions.push(Action::CloseDialog);
        }
    });
}

fn theirs(ui: &mut Ui, path: &Path, actions: &mut Vec<Action>) {
    ui.heading("Another program changed the file");
    ui.label(format!(
        "{} is not as it was when this circuit was read from it or saved to it.",
        path.display()
    ));
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        if ui.button("Replace it with mine").clicked() {
            actions.push(Action::Filing(Filing::ReplaceTheirs));
        }
        if ui.button("Reload the file").clicked() {
            actions.push(Action::Filing(Filing::Reload));
        }
        if ui.button("Cancel").clicked() {
            actions.push(Action::CloseDialog);
        }
    });
}

fn offers(ui: &mut Ui, offers: &[OfferLine], look: &Look, actions: &mut Vec<Action>) {
    ui.heading("Changes that were not saved");
    ui.label("The program ended before these circuits were saved.");
    ScrollArea::vertical().max_height(320.0).show(ui, |ui| {
        for (place, offer) in offers.iter().enumerate() {
            ui.separator();
            ui.label(RichText::new(&offer.title).strong());
            let quiet = |text: String| RichText::new(text).color(look.quiet());
            let folder = match &offer.file {
                Some(file) => file.display().to_string(),
                None => "never saved to a file".to_owned(),
            };
            ui.label(quiet(format!("{}, {folder}", offer.circuit)));
            let change = if offer.change.is_empty() {
                String::new()
            } else {
                format!("; last change: {}", offer.change)
            };
            ui.label(quiet(format!("Kept {}{change}", offer.kept)));
            ui.horizontal(|ui| {
                if ui.button(format!("Restore {}", offer.title)).clicked() {
                    actions.push(Action::Filing(Filing::Restore(place)));
                }
                if ui.button(format!("Discard {}", offer.title)).clicked() {
                    actions.push(Action::Filing(Filing::DiscardOffer(place)));
                }
            });
        }
    });
    ui.separator();
    if ui.button("Decide later").clicked() {
        actions.push(Action::CloseDialog);
    }
}

fn unsaved(ui: &mut Ui, next: &Action, actions: &mut Vec<Action>) {
    ui.heading("The circuit has changes that are not saved");
    ui.label("Save them first, or go on without them.");
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        if ui.button("Save first").clicked() {
            actions.push(Action::CloseDialog);
            actions.push(Action::Filing(Filing::SaveThen(Box::new(next.clone()))));
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
