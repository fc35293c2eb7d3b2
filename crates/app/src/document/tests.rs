//! Steps, files, and other hands on them.

use super::*;
use helmsplit_scenario::PRESETS;
use helmsplit_scenario::parameter::valve_edges::FIXED_ORIFICE_DIAMETER;

fn document() -> Document {
    Document::from_preset(&PRESETS[0]).unwrap()
}

fn set(text: &str) -> Command {
    Command::SetText {
        id: FIXED_ORIFICE_DIAMETER,
        text: text.to_owned(),
    }
}

#[test]
fn a_gesture_is_one_named_step() {
    let mut document = document();
    let before = document.scenario().clone();
    let first = before.value(FIXED_ORIFICE_DIAMETER).text();
    for text in ["3.6 mm", "3.5 mm", "3.4 mm"] {
        document.apply(&set(text), Stage::Ongoing).unwrap();
    }
    assert_eq!(document.undo_name(), None, "not finished yet");
    document.finish_gesture();
    let name = format!("fixed orifice diameter, {first} to 3.4 mm");
    assert_eq!(document.undo_name(), Some(name.as_str()), "one step");
    assert!(document.is_edited(), "it differs from its file");
    assert!(document.undo(), "there is a step");
    assert_eq!(*document.scenario(), before, "back at once");
    assert!(!document.is_edited(), "as saved");
    assert!(!document.undo(), "no more steps");
    assert_eq!(document.redo_name(), Some(name.as_str()), "forth again");
    assert!(document.redo(), "there is a step");
    let now = document.scenario().value(FIXED_ORIFICE_DIAMETER).text();
    assert_eq!(now, "3.4 mm", "made again");
}

#[test]
fn another_circuit_is_one_step() {
    let mut document = document();
    let before = document.scenario().clone();
    let other = PRESETS[1].scenario().unwrap();
    document.apply(&set("3.5 mm"), Stage::Ongoing).unwrap();
    document.replace(other.clone(), "circuit of the kept run");
    assert_eq!(*document.scenario(), other, "restored");
    let name = Some("circuit of the kept run");
    assert_eq!(document.undo_name(), name, "by its name");
    let both = document.undo() && document.undo();
    assert!(both, "the open gesture is a step of its own");
    assert_eq!(*document.scenario(), before, "back");
    let revision = document.revision();
    document.replace(before, "the same");
    assert_eq!(document.revision(), revision, "the same is no change");
}

#[test]
fn refused_values_leave_no_trace() {
    let mut document = document();
    let before = document.scenario().clone();
    for text in ["3 bar", "0 mm", "fifty"] {
        document.apply(&set(text), Stage::Finished).unwrap_err();
    }
    assert_eq!(*document.scenario(), before, "unchanged");
    assert_eq!(document.undo_name(), None, "no step");
    assert_eq!(document.revision(), 0, "no change");
}

#[test]
fn a_new_step_ends_the_way_forth() {
    let mut document = document();
    document.apply(&set("3.5 mm"), Stage::Finished).unwrap();
    document.undo();
    document.apply(&set("3.3 mm"), Stage::Finished).unwrap();
    assert_eq!(document.redo_name(), None, "another way was taken");
}

#[test]
fn files_come_back_bit_for_bit() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("mine.circuit.ron");
    let mut document = document();
    assert_eq!(
        document.save_as(&path).unwrap(),
        Comments::Kept,
        "the preset as it stands, comments and all"
    );
    let text = std::fs::read_to_string(&path).unwrap();
    assert_eq!(text, PRESETS[0].text, "not a byte changed");
    document.apply(&set("0.141 in"), Stage::Finished).unwrap();
    assert_eq!(
        document.save_as(&path).unwrap(),
        Comments::Kept,
        "one value in its place"
    );
    assert!(!document.is_edited(), "saved");
    let again = Document::open(&path).unwrap();
    assert_eq!(again.scenario(), document.scenario(), "every bit");
    assert!(
        std::fs::read_to_string(&path).unwrap().contains("0.141 in"),
        "as typed"
    );
}

fn saved(folder: &Path) -> Document {
    let mut document = document();
    document.save_as(&folder.join("mine.circuit.ron")).unwrap();
    document
}

#[test]
fn another_hand_on_the_file_is_noticed_and_either_side_can_win() {
    let folder = tempfile::tempdir().unwrap();
    let mut document = saved(folder.path());
    let path = document.path().unwrap().to_owned();
    assert_eq!(document.disk_news(), None, "as saved");
    let theirs = document.text().replace("20 mm", "21 mm");
    std::fs::write(&path, &theirs).unwrap();
    assert_eq!(document.disk_news(), Some(DiskNews::Changed), "changed");
    document.reload().unwrap();
    assert!(!document.is_edited(), "as the file");
    assert_eq!(document.text(), theirs, "theirs");
    assert_eq!(document.undo_name(), Some("reload of the file"), "a step");
    std::fs::write(&path, "(name: \"other\")").unwrap();
    document.keep_mine();
    assert_eq!(document.disk_news(), None, "known now");
    assert!(document.is_edited(), "but not saved");
    document.save_as(&path).unwrap();
    assert_eq!(std::fs::read_to_string(&path).unwrap(), theirs, "mine won");
}

#[test]
fn a_file_that_is_gone_leaves_the_circuit_unsaved() {
    let folder = tempfile::tempdir().unwrap();
    let mut document = saved(folder.path());
    std::fs::remove_file(document.path().unwrap()).unwrap();
    assert_eq!(document.disk_news(), Some(DiskNews::Gone), "gone");
    document.keep_mine();
    assert!(document.is_edited(), "nowhere saved");
    assert_eq!(document.disk_news(), None, "known now");
}

#[test]
fn a_reload_that_does_not_read_changes_nothing() {
    let folder = tempfile::tempdir().unwrap();
    let mut document = saved(folder.path());
    let before = document.scenario().clone();
    std::fs::write(document.path().unwrap(), "(valve: (stroke: \"8 bar\"))").unwrap();
    let findings = document.reload().unwrap_err();
    assert!(findings.to_string().contains("valve.stroke"), "{findings}");
    assert_eq!(*document.scenario(), before, "as before");
}
