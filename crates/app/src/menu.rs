//! Menu bar and shortcuts.

use std::path::{Path, PathBuf};
use std::sync::LazyLock;

use egui::{Context, Key, KeyboardShortcut, MenuBar, Modifiers, RichText, Ui};
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::presets::{PRESETS, Preset};

use crate::action::{Action, Filing};
use crate::dialogs::Dialog;
use crate::document::Document;
use crate::drawing::Export;
use crate::files::RecentFile;
use crate::files::ask_path::{AskPath, FileKind};
use crate::look::Look;
use crate::settings::{Appearance, SCALES, Settings, units_name};

const SHIFT_COMMAND: Modifiers = Modifiers::COMMAND.plus(Modifiers::SHIFT);
const OPEN: KeyboardShortcut = KeyboardShortcut::new(Modifiers::COMMAND, Key::O);
const SAVE: KeyboardShortcut = KeyboardShortcut::new(Modifiers::COMMAND, Key::S);
const SAVE_AS: KeyboardShortcut = KeyboardShortcut::new(SHIFT_COMMAND, Key::S);
const UNDO: KeyboardShortcut = KeyboardShortcut::new(Modifiers::COMMAND, Key::Z);
const REDO: KeyboardShortcut = KeyboardShortcut::new(SHIFT_COMMAND, Key::Z);
const REDO_TOO: KeyboardShortcut = KeyboardShortcut::new(Modifiers::COMMAND, Key::Y);
const FIND: KeyboardShortcut = KeyboardShortcut::new(Modifiers::COMMAND, Key::F);
const QUIT: KeyboardShortcut = KeyboardShortcut::new(Modifiers::COMMAND, Key::Q);
const HELP: KeyboardShortcut = KeyboardShortcut::new(Modifiers::NONE, Key::F1);

/// Presets with the names of their circuits.
pub(crate) static NAMED_PRESETS: LazyLock<Vec<(&'static Preset, String)>> = LazyLock::new(|| {
    let named = |preset: &'static Preset| {
        let name = preset.scenario().map(|scenario| scenario.name);
        (preset, name.unwrap_or_else(|_| preset.key.to_owned()))
    };
    PRESETS.iter().map(named).collect()
});

/// Takes the shortcuts that were pressed.
pub(crate) fn shortcuts(context: &Context, document: &Document, actions: &mut Vec<Action>) {
    // The longer ones first: Ctrl+Z also matches Ctrl+Shift+Z.
    let table: [(KeyboardShortcut, Action); 9] = [
        (SAVE_AS, save_as(document)),
        (REDO, Action::Redo),
        (REDO_TOO, Action::Redo),
        (UNDO, Action::Undo),
        (SAVE, Action::Save),
        (OPEN, open()),
        (FIND, Action::Find),
        (QUIT, Action::Quit),
        (HELP, Action::Show(Dialog::Keys)),
    ];
    for (shortcut, action) in table {
        if context.input_mut(|input| input.consume_shortcut(&shortcut)) {
            actions.push(action);
        }
    }
}

/// Asks for the path to open.
pub(crate) fn open() -> Action {
    let ask = AskPath::open("Open a circuit", FileKind::CIRCUIT, Action::Open);
    Action::AskPath(ask)
}

/// Asks for the path to save under, as a wish.
pub(crate) fn save_as(document: &Document) -> Action {
    Action::AskPath(ask_save_as(document))
}

/// Asks for the path to save under.
pub(crate) fn ask_save_as(document: &Document) -> AskPath {
    let proposal = document.path().map_or_else(
        || PathBuf::from(format!("{}.circuit.ron", file_stem(document))),
        Path::to_owned,
    );
    let title = "Save the circuit as";
    AskPath::save(title, FileKind::CIRCUIT, proposal, Action::SaveAs)
}

/// Asks for the path to write a drawing under.
pub(crate) fn write_drawing(document: &Document, export: Export) -> Action {
    let name = format!("{}.{}", file_stem(document), export.suffix());
    let path = document.folder().unwrap_or_default().join(name);
    let then: fn(PathBuf) -> Action = match export {
        Export::Circuit => |path| Action::Export(Export::Circuit, path),
        Export::Section => |path| Action::Export(Export::Section, path),
    };
    Action::AskPath(AskPath::save(export.name(), FileKind::SVG, path, then))
}

/// The name of the circuit as a file name without ending.
fn file_stem(document: &Document) -> String {
    let name = document.scenario().name.to_lowercase();
    name.replace([' ', '/', '\\'], "_")
}

/// Draws the bar: menus, the name of the file, units.
pub(crate) fn menu_bar(
    ui: &mut Ui,
    document: &Document,
    (recent, offers): (&[RecentFile], usize),
    settings: &Settings,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    MenuBar::new().ui(ui, |ui| {
        ui.menu_button("File", |ui| {
            file_menu(ui, document, (recent, offers), actions);
        });
        ui.menu_button("Edit", |ui| edit_menu(ui, document, actions));
        ui.menu_button("View", |ui| view_menu(ui, settings, actions));
        ui.menu_button("Help", |ui| {
            item(ui, "Keys and gestures", Some(HELP), actions, || {
                Action::Show(Dialog::Keys)
            });
            item(ui, "About and cautions", None, actions, || {
                Action::Show(Dialog::About)
            });
            item(ui, "First steps", None, actions, || Action::FirstSteps);
        });
        ui.add_space(12.0);
        ui.label(RichText::new(&document.scenario().name).strong())
            .on_hover_text(&document.scenario().notes);
        let state = if document.is_edited() { ", edited" } else { "" };
        let text = format!("{}{state}", document.file_name());
        ui.label(RichText::new(text).color(look.quiet()));
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
            ui.menu_button(units_name(settings.units), |ui| {
                unit_items(ui, settings, actions);
            });
        });
    });
}

fn item(
    ui: &mut Ui,
    text: &str,
    shortcut: Option<KeyboardShortcut>,
    actions: &mut Vec<Action>,
    action: impl FnOnce() -> Action,
) {
    let mut button = egui::Button::new(text);
    if let Some(shortcut) = shortcut {
        button = button.shortcut_text(ui.ctx().format_shortcut(&shortcut));
    }
    if ui.add(button).clicked() {
        actions.push(action());
        ui.close();
    }
}

fn file_menu(
    ui: &mut Ui,
    document: &Document,
    (recent, offers): (&[RecentFile], usize),
    actions: &mut Vec<Action>,
) {
    ui.set_min_width(200.0);
    ui.menu_button("New from preset", |ui| {
        for (preset, name) in NAMED_PRESETS.iter() {
            item(ui, name, None, actions, || Action::New(preset));
        }
    });
    item(ui, "Open...", Some(OPEN), actions, open);
    ui.add_enabled_ui(!recent.is_empty(), |ui| {
        ui.menu_button("Open recent", |ui| recent_menu(ui, recent, actions));
    });
    if offers > 0 {
        item(ui, "Restore unsaved changes...", None, actions, || {
            Action::Filing(Filing::ShowOffers)
        });
    }
    ui.separator();
    item(ui, "Save", Some(SAVE), actions, || Action::Save);
    item(ui, "Save as...", Some(SAVE_AS), actions, || {
        save_as(document)
    });
    ui.menu_button("Export", |ui| {
        for export in Export::ALL {
            let text = format!("{}...", export.name());
            item(ui, &text, None, actions, || write_drawing(document, export));
        }
    });
    ui.separator();
    item(ui, "Quit", Some(QUIT), actions, || Action::Quit);
}

fn recent_menu(ui: &mut Ui, recent: &[RecentFile], actions: &mut Vec<Action>) {
    for file in recent {
        let gone = if file.missing { " (missing)" } else { "" };
        let name = format!("{}{gone}", file.name());
        let button = egui::Button::new(name).shortcut_text(file.folder());
        if ui.add(button).clicked() {
            actions.push(Action::Open(file.path.clone()));
            ui.close();
        }
    }
    ui.separator();
    item(ui, "Empty this list", None, actions, || {
        Action::Filing(Filing::ForgetAllRecent)
    });
}

fn edit_menu(ui: &mut Ui, document: &Document, actions: &mut Vec<Action>) {
    ui.set_min_width(240.0);
    let steps = [
        ("Undo", document.undo_name(), UNDO, Action::Undo),
        ("Redo", document.redo_name(), REDO, Action::Redo),
    ];
    for (word, name, shortcut, action) in steps {
        let text = name.map_or_else(|| word.to_owned(), |name| format!("{word}: {name}"));
        ui.add_enabled_ui(name.is_some(), |ui| {
            item(ui, &text, Some(shortcut), actions, || action);
        });
    }
    ui.separator();
    item(ui, "Find...", Some(FIND), actions, || Action::Find);
}

fn unit_items(ui: &mut Ui, settings: &Settings, actions: &mut Vec<Action>) {
    for units in UnitSystem::ALL {
        let chosen = settings.units == units;
        if ui.radio(chosen, units_name(units)).clicked() {
            actions.push(Action::Units(units));
            ui.close();
        }
    }
}

fn view_menu(ui: &mut Ui, settings: &Settings, actions: &mut Vec<Action>) {
    ui.label(RichText::new("Units").strong());
    unit_items(ui, settings, actions);
    ui.separator();
    ui.label(RichText::new("Appearance").strong());
    for (appearance, name) in Appearance::ALL {
        if ui.radio(settings.appearance == appearance, name).clicked() {
            actions.push(Action::Appearance(appearance));
            ui.close();
        }
    }
    ui.separator();
    ui.label(RichText::new("Scale").strong());
    for scale in SCALES {
        if ui
            .radio(settings.scale == scale, format!("{scale} %"))
            .clicked()
        {
            actions.push(Action::Scale(scale));
            ui.close();
        }
    }
}
