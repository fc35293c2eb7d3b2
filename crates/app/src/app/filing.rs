//! What the app does with files: opening, saving, questions for paths, and what is kept.

use std::path::{Path, PathBuf};

use egui::{Align2, Area, Context, Event, Frame, Id, Order, Vec2};
use helmsplit_scenario::Findings;
use helmsplit_scenario::write::save_atomically;

use super::HelmsplitApp;
use crate::action::{Action, Filing};
use crate::dialogs::Dialog;
use crate::document::Comments;
use crate::files::ask_path::{Answered, AskPath, PathDialog, Purpose, with_ending};
use crate::files::{DiskNews, Put, WindowPlace};
use crate::menu;

impl HelmsplitApp {
    /// Does what a part of the window asked for with files.
    pub(super) fn file(&mut self, context: &Context, filing: Filing) {
        match filing {
            Filing::SaveThen(next) => {
                self.after_save = Some(*next);
                self.save(context);
            }
            Filing::PathChosen(then) => {
                self.dialog = None;
                self.act(context, *then);
            }
            Filing::Reload => self.reload(),
            Filing::KeepMine => self.keep_mine(),
            Filing::ReplaceTheirs => {
                self.keep_mine();
                self.save(context);
            }
            Filing::ShowOffers => self.show_offers(),
            Filing::Restore(_) if self.document.is_edited() => {
                let next = Box::new(Action::Filing(filing));
                self.dialog = Some(Dialog::Unsaved { next });
            }
            Filing::Restore(offer) => self.restore(offer),
            Filing::DiscardOffer(offer) => self.discard_offer(offer),
            Filing::OwnDialog => self.ask_here(),
            Filing::ForgetRecent(path) => self.keep(|kept| kept.recent.remove(&path)),
            Filing::ForgetAllRecent => self.keep(|kept| kept.recent.clear()),
        }
    }

    /// Looks for news of files: an answer of the desktop's dialog, files dropped on the window.
    pub(super) fn follow_files(&mut self, context: &Context, actions: &mut Vec<Action>) {
        let focused = |event: &Event| matches!(event, Event::WindowFocused(true));
        if context.input(|input| input.events.iter().any(focused)) {
            self.files.look();
        }
        match self.files.answer() {
            None | Some(Answered::Waiting) => {}
            Some(Answered::Cancelled) => actions.push(Action::CloseDialog),
            Some(Answered::Path(ask, path)) => self.desktop_answered(ask, &path, actions),
            Some(Answered::NotShown(ask)) => {
                let folder = self.files.folder();
                self.files.desktop_failed();
                self.dialog = Some(Dialog::AskPath(Box::new(PathDialog::new(ask, &folder))));
            }
        }
        self.take_dropped(context, actions);
        self.follow_title(context);
        self.place = place(context, self.place);
    }

    /// The desktop asks before a file is replaced, but knows nothing of the ending that we add.
    fn desktop_answered(&mut self, ask: AskPath, path: &Path, actions: &mut Vec<Action>) {
        let named = match ask.purpose {
            Purpose::Open => path.to_owned(),
            Purpose::Save => with_ending(path.to_owned(), ask.kind),
        };
        if named != path && named.exists() {
            let dialog = PathDialog::asking_to_replace(ask, named);
            self.dialog = Some(Dialog::AskPath(Box::new(dialog)));
        } else {
            actions.push(Action::Filing(Filing::PathChosen(Box::new((ask.then)(
                named,
            )))));
        }
    }

    fn take_dropped(&mut self, context: &Context, actions: &mut Vec<Action>) {
        let (dropped, hovering) = context.input(|input| {
            let files = input.raw.dropped_files.iter();
            let dropped: Vec<PathBuf> = files.map(|file| file.path().to_owned()).collect();
            (dropped, !input.raw.hovered_files.is_empty())
        });
        if hovering {
            Area::new(Id::unique("drop hint"))
                .order(Order::Foreground)
                .anchor(Align2::CENTER_CENTER, Vec2::ZERO)
                .show(context, |ui| {
                    Frame::popup(ui.style())
                        .inner_margin(24)
                        .show(ui, |ui| ui.heading("Drop the circuit file to open it"));
                });
        }
        let Some(first) = dropped.first() else {
            return;
        };
        if self.dialog.is_some() {
            "Answer the dialog first; the file was not opened".clone_into(&mut self.notice);
            return;
        }
        actions.push(Action::Open(first.clone()));
        if dropped.len() > 1 {
            self.notice = format!("Only the first of {} files was opened", dropped.len());
        }
    }

    fn follow_title(&mut self, context: &Context) {
        let edited = if self.document.is_edited() {
            ", edited"
        } else {
            ""
        };
        let name = match self.document.path() {
            Some(_) => self.document.file_name(),
            None => self.document.scenario().name.clone(),
        };
        let title = format!("Helmsplit - {name}{edited}");
        if self.title != title {
            context.send_viewport_cmd(egui::ViewportCommand::Title(title.clone()));
            self.title = title;
        }
    }

    /// Puts a question for a path.
    pub(super) fn ask(&mut self, context: &Context, ask: AskPath) {
        self.dialog = Some(match self.files.ask(ask, context) {
            Put::ByDesktop => Dialog::ByDesktop,
            Put::Own(dialog) => Dialog::AskPath(dialog),
        });
    }

    /// Our own dialog takes over from the desktop's.
    pub(super) fn ask_here(&mut self) {
        self.dialog = self.files.own_dialog().map(Dialog::AskPath);
    }

    pub(super) fn close_dialog(&mut self) {
        self.dialog = None;
        self.after_save = None;
        self.files.withdraw();
    }

    pub(super) fn save(&mut self, context: &Context) {
        match self.document.path().map(Path::to_owned) {
            Some(path) if self.document.disk_news() == Some(DiskNews::Changed) => {
                self.dialog = Some(Dialog::Theirs { path });
            }
            Some(path) => self.save_as(context, &path),
            None => self.ask(context, menu::ask_save_as(&self.document)),
        }
    }

    pub(super) fn save_as(&mut self, context: &Context, path: &Path) {
        match self.document.save_as(path) {
            Ok(comments) => {
                self.dialog = None;
                self.notice = saved_words(comments).to_owned();
                self.new_document();
                self.used(path);
                if let Some(next) = self.after_save.take() {
                    self.act(context, next);
                }
            }
            Err(error) => {
                self.after_save = None;
                self.dialog = Some(Dialog::problem("The circuit was not saved", error));
            }
        }
    }

    /// A file was opened or written.
    pub(super) fn used(&mut self, path: &Path) {
        let path = std::path::absolute(path).unwrap_or_else(|_| path.to_owned());
        self.keep(|kept| {
            kept.recent.add(&path);
            kept.folder = path.parent().map(Path::to_owned);
        });
    }

    /// A file did not open.
    pub(super) fn not_opened(&mut self, path: &Path, findings: Findings) {
        let listed = self.files.recent().iter().any(|file| file.path == path);
        self.dialog = Some(if listed && !path.exists() {
            let path = path.to_owned();
            Dialog::Missing { path }
        } else {
            Dialog::problem("The circuit was not opened", findings)
        });
    }

    /// Changes what is kept for the next start.
    pub(super) fn keep(&mut self, change: impl FnOnce(&mut crate::files::Kept)) {
        if let Err(error) = self.files.keep(change) {
            self.notice = format!("The settings are not kept: {error}");
        }
    }

    /// Keeps the settings if they changed.
    pub(super) fn keep_settings(&mut self) {
        let settings = self.settings;
        if self.settings_kept != settings {
            self.settings_kept = settings;
            self.keep(|kept| kept.settings = settings);
        }
    }

    /// Widths of panes as they were left.
    pub(super) fn restore_layout(&self, context: &Context) {
        let text = self.files.home().map(|home| home.layout_file());
        let text = text.and_then(|file| std::fs::read_to_string(file).ok());
        // A layout of another version is no loss.
        if let Some(memory) = text.and_then(|text| ron::from_str(&text).ok()) {
            context.memory_mut(|place| *place = memory);
        }
    }

    /// The window is closed for good: what is kept for the next start is written, and what is
    /// not saved was given up.
    pub fn closed(&mut self) {
        self.files.closed();
        let place = self.place;
        self.keep(|kept| kept.window = place);
        let Some(home) = self.files.home() else {
            return;
        };
        let file = home.layout_file();
        if let Ok(text) = self.context.memory(ron::to_string) {
            let folder = file.parent().map(std::fs::create_dir_all);
            // Nobody is left to be told, and widths of panes are no loss.
            let _ = (folder, save_atomically(&file, &text));
        }
    }
}

/// The size to open with next time, in points without our own scale; that of before while the
/// window fills the screen.
fn place(context: &Context, before: WindowPlace) -> WindowPlace {
    let zoom = context.zoom_factor();
    let (size, maximized) = context.input(|input| {
        let maximized = input.viewport().maximized.unwrap_or(false);
        (input.content_rect().size() * zoom, maximized)
    });
    WindowPlace {
        size: if maximized { before.size } else { size.into() },
        maximized,
    }
}

fn saved_words(comments: Comments) -> &'static str {
    match comments {
        Comments::Kept => "Saved",
        Comments::LostInLists => {
            "Saved; lists that changed were written anew, without the comments within them"
        }
        Comments::Replaced => {
            "Saved; the file was written anew, with our comments in place of others"
        }
    }
}
