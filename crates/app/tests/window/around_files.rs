//! Files around the circuit: the dialog for paths, files used lately, dropped files, other hands
//! on the file, what is kept from start to start.

use std::path::{Path, PathBuf};
use std::sync::Arc;

use egui::{DroppedFile, Key, Modifiers};
use egui_kittest::kittest::Queryable;
use helmsplit_app::{Appearance, Document, Home, Kept};
use helmsplit_scenario::{PRESETS, UnitSystem};

use crate::rig::Rig;

/// A file as the desktop drops it.
#[derive(Debug)]
struct Dropped(PathBuf);

impl DroppedFile for Dropped {
    fn path(&self) -> &Path {
        &self.0
    }

    fn bytes(&self) -> Result<Vec<u8>, String> {
        std::fs::read(&self.0).map_err(|error| error.to_string())
    }
}

fn preset_file(folder: &Path, name: &str, preset: usize) -> PathBuf {
    let path = folder.join(name);
    std::fs::write(&path, PRESETS[preset].text).expect("written");
    path
}

fn open_dialog(rig: &mut Rig) {
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::O);
    rig.settle();
}

fn go_to(rig: &mut Rig, folder: &Path) {
    let folder = folder.to_str().expect("plain text");
    rig.enter("Path of a .circuit.ron file", folder);
}

#[test]
fn the_list_leads_through_folders_to_a_file() {
    let folder = tempfile::tempdir().expect("a folder");
    let inner = folder.path().join("older");
    std::fs::create_dir(&inner).expect("made");
    preset_file(&inner, "frosty.circuit.ron", 4);
    std::fs::write(inner.join("notes.txt"), "no circuit").expect("written");
    let mut rig = Rig::new();
    open_dialog(&mut rig);
    go_to(&mut rig, folder.path());
    rig.click_beginning("older");
    assert!(rig.says("frosty.circuit.ron"), "the circuit");
    assert!(!rig.says("notes.txt"), "no other files");
    rig.click("Not only circuit files");
    assert!(rig.says("notes.txt"), "unless asked for");
    rig.click("Folder above");
    assert!(rig.says("older"), "back again");
    rig.click_beginning("older");
    rig.click_beginning("frosty.circuit.ron");
    rig.click("Open");
    rig.solve();
    assert!(rig.says("Frost pruner"), "opened");
}

#[test]
fn the_keyboard_alone_opens_a_file() {
    let folder = tempfile::tempdir().expect("a folder");
    preset_file(folder.path(), "frosty.circuit.ron", 4);
    let mut rig = Rig::new();
    open_dialog(&mut rig);
    go_to(&mut rig, folder.path());
    rig.harness.key_press_modifiers(Modifiers::SHIFT, Key::Tab);
    rig.settle();
    rig.harness.key_press(Key::Enter);
    rig.solve();
    assert!(rig.says("Frost pruner"), "opened");
}

#[test]
fn a_wrong_path_is_answered_in_the_dialog() {
    let mut rig = Rig::new();
    open_dialog(&mut rig);
    rig.enter(
        "Path of a .circuit.ron file",
        "/no such folder/x.circuit.ron",
    );
    assert!(
        rig.says("There is no file /no such folder/x.circuit.ron"),
        "why"
    );
    assert!(rig.says("Folder above"), "the dialog stays");
}

#[test]
fn a_file_that_is_there_is_only_replaced_after_a_question() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = preset_file(folder.path(), "frosty.circuit.ron", 4);
    let mut rig = Rig::new();
    rig.harness
        .key_press_modifiers(Modifiers::COMMAND | Modifiers::SHIFT, Key::S);
    rig.settle();
    let typed = folder.path().join("frosty");
    let typed = typed.to_str().expect("plain text");
    rig.enter("Path of the file to write", typed);
    assert!(
        rig.says("frosty.circuit.ron is there already"),
        "the question"
    );
    rig.click("Choose another name");
    rig.enter("Path of the file to write", typed);
    assert_eq!(
        std::fs::read_to_string(&path).expect("there"),
        PRESETS[4].text,
        "untouched so far"
    );
    rig.click("Replace the file");
    assert_eq!(
        std::fs::read_to_string(&path).expect("there"),
        PRESETS[0].text,
        "replaced"
    );
}

#[test]
fn saving_first_goes_on_with_what_was_wanted() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("mine.circuit.ron");
    let mut rig = Rig::new();
    rig.enter("Fixed orifice diameter", "3.2 mm");
    rig.menu("File", "New from preset");
    rig.click("Frost pruner");
    rig.click("Save first");
    rig.enter(
        "Path of the file to write",
        path.to_str().expect("plain text"),
    );
    rig.solve();
    assert!(rig.says("Frost pruner"), "went on");
    let saved = std::fs::read_to_string(&path).expect("saved");
    assert!(saved.contains("\"3.2 mm\""), "with the change");
}

#[test]
fn a_saved_edit_keeps_the_comments_of_the_file() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("mine.circuit.ron");
    let text = "( // row 7\n    valve: (fixed_orifice_diameter: \"3.67 mm\" /* drilled */),\n)\n";
    std::fs::write(&path, text).expect("written");
    let mut rig = Rig::on(Document::open(&path).expect("it reads"));
    rig.enter("Fixed orifice diameter", "3.4 mm");
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::S);
    rig.settle();
    let saved = std::fs::read_to_string(&path).expect("saved");
    assert_eq!(saved, text.replace("3.67 mm", "3.4 mm"), "one value");
    assert!(!rig.app().document().is_edited(), "saved");
}

#[test]
fn a_dropped_file_opens_and_unsaved_changes_are_asked_for_first() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = preset_file(folder.path(), "frosty.circuit.ron", 4);
    let mut rig = Rig::new();
    rig.enter("Fixed orifice diameter", "3.2 mm");
    let drop = |rig: &mut Rig| {
        let file: Arc<dyn DroppedFile + Send + Sync> = Arc::new(Dropped(path.clone()));
        rig.harness.input_mut().dropped_files.push(file);
        rig.settle();
    };
    drop(&mut rig);
    assert!(rig.says("not saved"), "it asks");
    rig.click("Discard the changes");
    rig.solve();
    assert_eq!(rig.app().document().path(), Some(path.as_path()), "opened");
}

#[test]
fn another_hand_on_the_file_is_told_and_can_be_followed_or_not() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = preset_file(folder.path(), "mine.circuit.ron", 0);
    let mut rig = Rig::on(Document::open(&path).expect("it reads"));
    let theirs = PRESETS[0].text.replace("\"8 mm\"", "\"7.5 mm\"");
    std::fs::write(&path, &theirs).expect("written");
    rig.wait_for("changed by another program");
    rig.click("Reload the file");
    rig.solve();
    assert_eq!(rig.text_of("valve.stroke"), "7.5 mm", "theirs");
    std::fs::remove_file(&path).expect("removed");
    rig.wait_for("moved or removed by another program");
    rig.click("Keep mine");
    assert!(rig.app().document().is_edited(), "nowhere saved");
    assert!(!rig.says("another program"), "told once");
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::S);
    rig.settle();
    assert_eq!(
        std::fs::read_to_string(&path).expect("written again"),
        theirs,
        "to the byte"
    );
}

#[test]
fn a_save_over_their_changes_asks_first() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = preset_file(folder.path(), "mine.circuit.ron", 0);
    let mut rig = Rig::on(Document::open(&path).expect("it reads"));
    rig.enter("Fixed orifice diameter", "3.2 mm");
    std::fs::write(&path, PRESETS[4].text).expect("written");
    rig.harness.key_press_modifiers(Modifiers::COMMAND, Key::S);
    rig.settle();
    assert!(rig.says("Another program changed the file"), "it asks");
    let there = std::fs::read_to_string(&path).expect("there");
    assert_eq!(there, PRESETS[4].text, "theirs so far");
    rig.click("Replace it with mine");
    let there = std::fs::read_to_string(&path).expect("there");
    assert!(there.contains("\"3.2 mm\""), "mine");
}

#[test]
fn settings_and_files_used_lately_last_to_the_next_start() {
    let folder = tempfile::tempdir().expect("a folder");
    let home = Home::at(&folder.path().join("home"));
    let path = preset_file(folder.path(), "frosty.circuit.ron", 4);
    let mut rig = Rig::at(&home, Document::open(&path).expect("it reads"));
    rig.menu("View", "US: psi");
    rig.menu("View", "Dark");
    rig.close();
    let kept = Kept::read(&home.settings_file()).expect("it reads");
    let kept = kept.expect("kept");
    assert_eq!(kept.settings.units, UnitSystem::Us, "units");
    assert_eq!(kept.settings.appearance, Appearance::Dark, "appearance");
    let window = kept.window.size.map(f32::round).map(|side| side as i32);
    assert_eq!(window, [1280, 800], "the window");
    assert!(home.layout_file().exists(), "widths of panes");

    let preset = Document::from_preset(&PRESETS[0]).expect("it reads");
    let mut rig = Rig::at(&home, preset);
    assert!(rig.says("psi"), "units on the screen");
    rig.click("File");
    rig.click("Open recent");
    rig.click_beginning("frosty.circuit.ron");
    rig.solve();
    assert!(rig.says("Frost pruner"), "opened from the list");

    std::fs::remove_file(&path).expect("removed");
    let preset = Document::from_preset(&PRESETS[0]).expect("it reads");
    let mut rig = Rig::at(&home, preset);
    rig.click("File");
    rig.click("Open recent");
    rig.click_beginning("frosty.circuit.ron (missing)");
    assert!(rig.says("The file is gone"), "told");
    rig.click("Take it off the list");
    rig.click("File");
    assert!(!rig.says("frosty"), "forgotten");
    let kept = Kept::read(&home.settings_file()).expect("it reads");
    let text = format!("{:?}", kept.expect("kept").recent);
    assert!(!text.contains("frosty"), "{text}");
}

#[test]
fn the_title_names_file_and_state() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = preset_file(folder.path(), "frosty.circuit.ron", 4);
    let mut rig = Rig::on(Document::open(&path).expect("it reads"));
    rig.enter("Fixed orifice diameter", "3.2 mm");
    assert_eq!(
        rig.app().title(),
        "Helmsplit - frosty.circuit.ron, edited",
        "the title"
    );
    assert!(rig.harness.query_by_label("File").is_some(), "and a menu");
}
