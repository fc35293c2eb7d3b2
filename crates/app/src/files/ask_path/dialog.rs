//! Our own dialog for a path: a list of the folder, a field to type into, the keyboard alone.

use std::path::{Path, PathBuf};

use egui::{Button, Id, Key, RichText, ScrollArea, TextEdit, Ui, vec2};

use super::listing::{Entry, Filter, Listing, listing};
use super::typed::{Typed, typed};
use super::{AskPath, Purpose};
use crate::action::{Action, Filing};
use crate::look::{Look, SMALL};

/// Height of the list, points.
const LIST_HEIGHT: f32 = 260.0;

/// The dialog while it is open.
#[derive(Debug, Clone)]
pub(crate) struct PathDialog {
    ask: AskPath,
    folder: PathBuf,
    /// What stands in the field.
    text: String,
    everything: bool,
    listing: Listing,
    /// Why the last wish was not followed.
    trouble: String,
    /// A file that is there already and would be replaced.
    occupied: Option<PathBuf>,
}

impl PathDialog {
    /// Opens on the folder of the proposal, else on `folder`.
    pub(crate) fn new(ask: AskPath, folder: &Path) -> Self {
        let own = ask.proposal.parent().filter(|own| own.is_dir());
        let folder = own.unwrap_or(folder).to_owned();
        let name = ask.proposal.file_name();
        let text = name.map_or_else(String::new, |name| name.to_string_lossy().into_owned());
        let mut dialog = Self {
            ask,
            folder: PathBuf::new(),
            text,
            everything: false,
            listing: Listing::default(),
            trouble: String::new(),
            occupied: None,
        };
        dialog.enter(folder);
        dialog
    }

    /// Opens on a file that is there already, with the question whether to replace it.
    pub(crate) fn asking_to_replace(mut ask: AskPath, file: PathBuf) -> Self {
        ask.proposal.clone_from(&file);
        let folder = file.parent().unwrap_or(Path::new("")).to_owned();
        let mut dialog = Self::new(ask, &folder);
        dialog.occupied = Some(file);
        dialog
    }

    fn enter(&mut self, folder: PathBuf) {
        self.folder = folder;
        self.read();
    }

    fn read(&mut self) {
        let filter = Filter {
            kind: self.ask.kind,
            everything: self.everything,
        };
        (self.listing, self.trouble) = match listing(&self.folder, filter) {
            Ok(listing) => (listing, String::new()),
            Err(trouble) => (Listing::default(), trouble),
        };
    }

    /// Follows what stands in the field.
    fn accept(&mut self, actions: &mut Vec<Action>) {
        match typed(&self.text, &self.folder, self.ask.purpose, self.ask.kind) {
            Typed::Folder(folder) => {
                self.text.clear();
                self.enter(folder);
            }
            Typed::File(path) => self.done(path, actions),
            Typed::Occupied(path) => self.occupied = Some(path),
            Typed::Nothing(trouble) => self.trouble = trouble,
        }
    }

    fn done(&self, path: PathBuf, actions: &mut Vec<Action>) {
        actions.push(Action::Filing(Filing::PathChosen(Box::new((self
            .ask
            .then)(
            path
        )))));
    }
}

/// Draws the dialog.
pub(crate) fn path_dialog(
    ui: &mut Ui,
    dialog: &mut PathDialog,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    ui.heading(dialog.ask.title);
    if let Some(path) = dialog.occupied.clone() {
        overwrite(ui, dialog, path, actions);
        return;
    }
    way(ui, dialog, look);
    list(ui, dialog, look, actions);
    let entered = field(ui, dialog);
    if !dialog.trouble.is_empty() {
        ui.colored_label(look.error(), dialog.trouble.clone());
    }
    ui.add_space(4.0);
    ui.horizontal(|ui| {
        let word = match dialog.ask.purpose {
            Purpose::Open => "Open",
            Purpose::Save => "Save",
        };
        if ui.button(word).clicked() || entered {
            dialog.accept(actions);
        }
        if ui.button("Cancel").clicked() {
            actions.push(Action::CloseDialog);
        }
    });
}

/// The folder and the ways out of it.
fn way(ui: &mut Ui, dialog: &mut PathDialog, look: &Look) {
    ui.horizontal(|ui| {
        let above = dialog.folder.parent().map(Path::to_owned);
        let up = ui.add_enabled(above.is_some(), Button::new("Folder above"));
        if let (true, Some(above)) = (up.clicked(), above) {
            dialog.enter(above);
        }
        let home = std::env::home_dir().filter(|home| home.is_dir());
        if let Some(home) = home
            && ui.button("Home folder").clicked()
        {
            dialog.enter(home);
        }
        let all = format!("Not only {}", dialog.ask.kind.name.to_lowercase());
        if ui.checkbox(&mut dialog.everything, all).changed() {
            dialog.read();
        }
    });
    let folder = dialog.folder.display().to_string();
    ui.label(RichText::new(folder).size(SMALL).color(look.quiet()));
}

fn list(ui: &mut Ui, dialog: &mut PathDialog, look: &Look, actions: &mut Vec<Action>) {
    let mut wish = None;
    egui::Frame::NONE
        .fill(ui.visuals().extreme_bg_color)
        .inner_margin(4)
        .show(ui, |ui| {
            ScrollArea::vertical()
                .id_salt("files of the folder")
                .auto_shrink(false)
                .max_height(LIST_HEIGHT)
                .min_scrolled_height(LIST_HEIGHT)
                .show(ui, |ui| {
                    ui.spacing_mut().item_spacing.y = 0.0;
                    for entry in &dialog.listing.entries {
                        wish = wish.take().or(row(ui, entry, &dialog.text));
                    }
                    note(ui, &dialog.listing, look);
                });
        });
    match wish {
        Some(Wish::Enter(folder)) => dialog.enter(folder),
        Some(Wish::Name(name)) => dialog.text = name,
        Some(Wish::Take(name)) => {
            dialog.text = name;
            dialog.accept(actions);
        }
        None => {}
    }
}

/// What a row asks for.
enum Wish {
    Enter(PathBuf),
    Name(String),
    Take(String),
}

fn row(ui: &mut Ui, entry: &Entry, text: &str) -> Option<Wish> {
    let button = Button::selectable(entry.name == text, entry.name.as_str())
        .right_text(RichText::new(&entry.detail).size(SMALL).weak())
        .min_size(vec2(ui.available_width(), 0.0));
    let response = ui.add(button);
    if response.gained_focus() {
        response.scroll_to_me(None);
    }
    let entered = response.has_focus() && ui.input(|input| input.key_pressed(Key::Enter));
    if entry.is_folder {
        return response.clicked().then(|| Wish::Enter(entry.path.clone()));
    }
    let name = || entry.name.clone();
    if response.double_clicked() || entered {
        Some(Wish::Take(name()))
    } else {
        response.clicked().then(|| Wish::Name(name()))
    }
}

/// What the list does not show.
fn note(ui: &mut Ui, listing: &Listing, look: &Look) {
    let text = match (listing.entries.is_empty(), listing.more) {
        (true, _) => "Nothing to show in this folder".to_owned(),
        (_, 0) => return,
        (_, more) => format!("and {more} more: type the name"),
    };
    ui.label(RichText::new(text).size(SMALL).color(look.quiet()));
}

/// The field for a name or a whole path; whether Enter was pressed in it.
fn field(ui: &mut Ui, dialog: &mut PathDialog) -> bool {
    let label = ui.label(match dialog.ask.purpose {
        Purpose::Open => format!("Path of a .{} file", dialog.ask.kind.ending),
        Purpose::Save => "Path of the file to write".to_owned(),
    });
    let edit = TextEdit::singleline(&mut dialog.text)
        .id(Id::unique("path field"))
        .desired_width(f32::INFINITY);
    let response = ui.add(edit).labelled_by(label.id);
    // Asked first: a field that takes the focus back has not lost it.
    let entered = response.lost_focus() && ui.input(|input| input.key_pressed(Key::Enter));
    if ui.memory(|memory| memory.focused().is_none()) {
        response.request_focus();
    }
    entered
}

fn overwrite(ui: &mut Ui, dialog: &mut PathDialog, path: PathBuf, actions: &mut Vec<Action>) {
    let name = path.file_name().unwrap_or(path.as_os_str());
    ui.label(format!(
        "{} is there already, in {}.",
        name.to_string_lossy(),
        path.parent().unwrap_or(Path::new("")).display()
    ));
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        if ui.button("Replace the file").clicked() {
            dialog.done(path, actions);
        }
        if ui.button("Choose another name").clicked() {
            dialog.occupied = None;
        }
    });
}
