//! Notes of living and of gone windows.

use std::path::{Path, PathBuf};

use helmsplit_scenario::PRESETS;

use super::{Keeper, Snapshot, offers};

fn snapshot(orifice: &str) -> Snapshot {
    let mut scenario = PRESETS[0].scenario().unwrap();
    scenario
        .set("valve.fixed_orifice_diameter", orifice)
        .unwrap();
    Snapshot {
        scenario,
        source: Some(PRESETS[0].text.into()),
        file: Some(PathBuf::from("/work/mine.circuit.ron")),
        change: "fixed orifice diameter".to_owned(),
    }
}

fn keeper(folder: &Path) -> Keeper {
    Keeper::start(folder, || {}).unwrap()
}

#[test]
fn a_living_window_is_not_offered_and_a_gone_one_once() {
    let folder = tempfile::tempdir().unwrap();
    let living = keeper(folder.path());
    living.keep(snapshot("3.3 mm"));
    living.settle();
    let gone = keeper(folder.path());
    gone.keep(snapshot("3.1 mm"));
    drop(gone);
    let (found, problems) = offers(folder.path());
    assert_eq!(problems, Vec::<String>::new(), "all notes read");
    assert_eq!(found.len(), 1, "the gone one alone");
    let note = &found[0].note;
    assert!(note.text.contains("3.1 mm"), "what was not saved");
    assert_eq!(note.title(), "mine.circuit.ron", "of that file");
    let (second, _) = offers(folder.path());
    assert!(second.is_empty(), "no second window offers it meanwhile");
    let offer = found.into_iter().next().unwrap();
    offer.remove().unwrap();
    assert!(offers(folder.path()).0.is_empty(), "taken away");
}

#[test]
fn an_offer_that_is_put_off_comes_again() {
    let folder = tempfile::tempdir().unwrap();
    let gone = keeper(folder.path());
    gone.keep(snapshot("3.1 mm"));
    drop(gone);
    drop(offers(folder.path()));
    assert_eq!(offers(folder.path()).0.len(), 1, "at the next start");
}

#[test]
fn what_is_saved_leaves_nothing_behind() {
    let folder = tempfile::tempdir().unwrap();
    let saved = keeper(folder.path());
    saved.keep(snapshot("3.1 mm"));
    saved.settle();
    assert!(saved.file().exists(), "kept");
    saved.forget();
    saved.settle();
    assert!(!saved.file().exists(), "no longer needed");
    drop(saved);
    let left = std::fs::read_dir(folder.path()).unwrap().count();
    assert_eq!(left, 0, "neither note nor lock");
}

#[test]
fn a_note_that_does_not_read_is_told_and_left() {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("1-1.ron");
    std::fs::write(&file, "(version: 1").unwrap();
    let (found, problems) = offers(folder.path());
    assert!(found.is_empty(), "nothing to restore");
    assert!(problems[0].contains("1-1.ron"), "{problems:?}");
    assert!(file.exists(), "left where it is");
}

#[test]
fn a_folder_that_cannot_be_written_is_told() {
    let folder = tempfile::tempdir().unwrap();
    let keeper = keeper(folder.path());
    std::fs::remove_dir_all(folder.path()).unwrap();
    keeper.keep(snapshot("3.1 mm"));
    keeper.settle();
    assert!(keeper.trouble().is_some(), "told");
    assert!(keeper.trouble().is_none(), "once");
}
