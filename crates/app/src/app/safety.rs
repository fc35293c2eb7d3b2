//! What keeps work from being lost: changes that are not saved, and other hands on the file.

use std::time::SystemTime;

use egui::{Panel, Ui};

use super::HelmsplitApp;
use crate::action::{Action, Filing};
use crate::dialogs::{Dialog, OfferLine};
use crate::document::Document;
use crate::files::words::age;
use crate::files::{DiskNews, Note};

impl HelmsplitApp {
    /// Keeps what is not saved, and hears what happened to the file.
    pub(super) fn follow_safety(&mut self) {
        let (news, trouble) = self.files.follow(&self.document);
        if let Some(news) = news {
            self.disk_news = Some(news);
        }
        if let Some(trouble) = trouble {
            self.notice = format!("The changes are not kept for recovery: {trouble}");
        }
    }

    /// Another circuit took the place of the one before.
    pub(super) fn new_document(&mut self) {
        self.disk_news = None;
        self.files.new_document();
    }

    /// The bar that tells what happened to the file.
    pub(super) fn disk_bar(&self, ui: &mut Ui, actions: &mut Vec<Action>) {
        let Some(news) = self.disk_news else {
            return;
        };
        Panel::top("file news").show(ui, |ui| {
            ui.horizontal_wrapped(|ui| {
                let name = self.document.file_name();
                match news {
                    DiskNews::Changed => {
                        ui.label(format!("{name} was changed by another program."));
                        if ui.button("Reload the file").clicked() {
                            actions.push(Action::Filing(Filing::Reload));
                        }
                    }
                    DiskNews::Gone => {
                        ui.label(format!("{name} was moved or removed by another program."));
                        if ui.button("Save it again").clicked() {
                            actions.push(Action::Filing(Filing::ReplaceTheirs));
                        }
                    }
                }
                if ui.button("Keep mine").clicked() {
                    actions.push(Action::Filing(Filing::KeepMine));
                }
            });
        });
    }

    pub(super) fn reload(&mut self) {
        self.dialog = None;
        match self.document.reload() {
            Ok(()) => {
                self.new_document();
                self.fields.clear();
                "Reloaded; undo brings the circuit of before back".clone_into(&mut self.notice);
            }
            Err(findings) => {
                self.dialog = Some(Dialog::problem("The file was not reloaded", findings));
            }
        }
    }

    pub(super) fn keep_mine(&mut self) {
        self.document.keep_mine();
        self.new_document();
    }

    /// Shows what earlier windows did not save.
    pub(super) fn show_offers(&mut self) {
        let now = SystemTime::now();
        let line = |note: &Note| OfferLine {
            title: note.title(),
            circuit: note.name.clone(),
            file: note.file.clone(),
            kept: age(note.time(), now),
            change: note.change.clone(),
        };
        let offers = self.files.offers().iter();
        let offers: Vec<_> = offers.map(|offer| line(&offer.note)).collect();
        self.dialog = (!offers.is_empty()).then_some(Dialog::Offers { offers });
    }

    pub(super) fn restore(&mut self, offer: usize) {
        let Some(found) = self.files.offers().get(offer) else {
            return;
        };
        match Document::restored(&found.note) {
            Ok(document) => {
                self.take_document(document);
                "Restored; save it to keep it".clone_into(&mut self.notice);
                if let Err(problem) = self.files.restored(offer, &self.document) {
                    self.notice = problem;
                }
            }
            Err(findings) => {
                let file = found.file().display();
                let text = format!("{findings}\nWhat was kept is in {file}.");
                self.dialog = Some(Dialog::problem("The circuit was not restored", text));
            }
        }
    }

    pub(super) fn discard_offer(&mut self, offer: usize) {
        if let Err(problem) = self.files.discard(offer) {
            self.notice = problem;
        }
        self.show_offers();
    }
}
