//! What goes to files and to the clipboard.

use std::path::Path;

use egui::{Key, Modifiers};
use egui_kittest::kittest::Queryable;

use crate::rig::Rig;

/// Asks for an export by its menu entry and answers with a path.
fn export(rig: &mut Rig, entry: &str, path: &Path) {
    rig.menu("File", "Export");
    rig.click(entry);
    if !entry.contains("CSV") {
        rig.click("Choose the file...");
    }
    rig.enter(
        "Path of the file to write",
        path.to_str().expect("plain text"),
    );
    rig.settle();
}

#[test]
fn the_drawing_holds_what_is_shown_and_the_kept_run() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("page.svg");
    let mut rig = Rig::new();
    rig.keep("as <drawn>");
    rig.enter("Fixed orifice diameter", "3.3 mm");
    rig.solve();
    rig.click_trace(0.2, Modifiers::NONE);
    rig.press(Modifiers::NONE, Key::ArrowDown);
    let hidden = rig.app().figure().panels[0].label.clone();
    rig.press(Modifiers::NONE, Key::H);
    export(&mut rig, "Traces as SVG...", &path);
    assert!(rig.says("Exported to"), "said");
    let svg = std::fs::read_to_string(&path).expect("written");
    assert!(svg.starts_with("<svg"), "an SVG document");
    assert!(svg.contains("as &lt;drawn&gt;"), "the kept run is named");
    assert!(svg.contains("Priority (1)"), "its lines are there");
    assert!(!svg.contains(&format!(">{hidden}<")), "{hidden} is hidden");
    assert!(svg.contains(">Pressure<"), "the others are shown");
}

#[test]
fn the_picture_has_the_size_asked_for() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("page.png");
    let mut rig = Rig::new();
    rig.keep("as drawn");
    export(&mut rig, "Traces as PNG...", &path);
    let picture = std::fs::read(&path).expect("written");
    let reads = |at: usize| u32::from_be_bytes(picture[at..at + 4].try_into().expect("four bytes"));
    assert_eq!(&picture[1..4], b"PNG", "a PNG file");
    // Width and height stand at the head of the file (ISO/IEC 15948).
    assert_eq!(reads(16), 2560, "1280 points at two pixels each");
    assert!(reads(20) >= 1920, "at least 960 points high");
}

#[test]
fn the_data_come_with_a_description() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("run.traces.csv");
    let mut rig = Rig::new();
    rig.menu("View", "US: psi");
    export(&mut rig, "Data as CSV...", &path);
    let text = std::fs::read_to_string(&path).expect("written");
    let head = text.lines().next().expect("a head");
    assert!(head.starts_with("t_s,") && head.contains("_psi"), "{head}");
    let rows = text.lines().count() - 1;
    let steps = rig
        .app()
        .answer()
        .expect("solved")
        .solved
        .run
        .trace
        .steps()
        .len();
    assert_eq!(rows, steps, "every step");
    let beside = folder.path().join("run.run.json");
    let json = std::fs::read_to_string(beside).expect("a description");
    assert!(json.contains("circuit_hash"), "of this circuit");
}

#[test]
fn a_file_that_cannot_be_written_is_said() {
    let folder = tempfile::tempdir().expect("a folder");
    let mut rig = Rig::new();
    for entry in ["Traces as SVG...", "Traces as PNG...", "Data as CSV..."] {
        export(&mut rig, entry, &folder.path().join("no such folder/x"));
        assert!(rig.says("There is no folder"), "{entry}");
        assert!(rig.says("no such folder"), "{entry}: which one");
        rig.click("Cancel");
        // Longer than any file system takes: the file itself cannot be made.
        let long = "x".repeat(300);
        export(&mut rig, entry, &folder.path().join(&long));
        assert!(rig.says("The file was not exported"), "{entry}");
        assert!(rig.says(&long), "{entry}: which one");
        rig.click("Close");
    }
    let left = std::fs::read_dir(folder.path()).expect("a folder").count();
    assert_eq!(left, 0, "nothing is left behind");
}

#[test]
fn an_existing_file_is_replaced_after_a_question() {
    let folder = tempfile::tempdir().expect("a folder");
    let path = folder.path().join("page.svg");
    std::fs::write(&path, "old").expect("written");
    let mut rig = Rig::new();
    export(&mut rig, "Traces as SVG...", &path);
    assert_eq!(
        std::fs::read_to_string(&path).expect("there"),
        "old",
        "not yet"
    );
    rig.click("Replace the file");
    let text = std::fs::read_to_string(&path).expect("there");
    assert!(text.starts_with("<svg"), "replaced");
}

#[test]
fn values_and_table_go_to_the_clipboard() {
    let mut rig = Rig::new();
    rig.click_trace(0.5, Modifiers::NONE);
    rig.harness.event(egui::Event::Copy);
    let text = rig.copied();
    let lines: usize = rig
        .app()
        .figure()
        .panels
        .iter()
        .map(|panel| panel.series.len())
        .sum();
    assert_eq!(
        text.lines().count(),
        lines + 1,
        "a head and a row for each line"
    );
    assert!(text.contains("\nPressure\tInlet\tbar\t"), "{text}");
    rig.keep("as drawn");
    rig.click_trace(0.7, Modifiers::SHIFT);
    rig.menu("File", "Export");
    rig.harness.get_by_label("Copy the readout table").click();
    let table = rig.copied();
    let head = table.lines().next().expect("a head");
    assert_eq!(head.split('\t').count(), 9, "{head}");
    let ragged = table.lines().any(|line| line.split('\t').count() != 9);
    assert!(!ragged, "each row has as many fields");
}
