//! A window that dies leaves what was not saved to the next one.

use std::io::{BufRead as _, BufReader};
use std::process::{Child, Command, Stdio};
use std::time::{Duration, Instant};

use helmsplit_app::{Document, Home};
use helmsplit_scenario::PRESETS;

use crate::rig::Rig;

/// Where the doomed window keeps its things.
const VARIABLE: &str = "HELMSPLIT_TEST_DOOMED_HOME";

fn preset() -> Document {
    Document::from_preset(&PRESETS[0]).expect("it reads")
}

/// Not a test of its own: the window that [`a_killed_window_loses_nothing`] starts and kills. It
/// edits, waits until that is kept, says so, and then waits for its end.
#[test]
#[ignore = "started by another test, in a process of its own"]
fn doomed() {
    let Some(folder) = std::env::var_os(VARIABLE) else {
        return;
    };
    let home = Home::at(folder.as_ref());
    let mut rig = Rig::at(&home, preset());
    rig.enter("Fixed orifice diameter", "3.21 mm");
    let begun = Instant::now();
    while notes(&home) == 0 {
        rig.settle();
        assert!(begun.elapsed() < Duration::from_secs(60), "not kept");
        std::thread::sleep(Duration::from_millis(50));
    }
    println!("\nkept and waiting");
    std::thread::sleep(Duration::from_secs(300));
}

fn notes(home: &Home) -> usize {
    let entries = std::fs::read_dir(home.unsaved_folder());
    let names = entries.into_iter().flatten().flatten();
    names
        .filter(|entry| entry.path().extension().is_some_and(|end| end == "ron"))
        .count()
}

fn start_doomed(home: &std::path::Path) -> Child {
    let program = std::env::current_exe().expect("this program");
    let mut child = Command::new(program)
        .args(["--exact", "recovery::doomed", "--ignored", "--nocapture"])
        .env(VARIABLE, home)
        .stdout(Stdio::piped())
        .spawn()
        .expect("it starts");
    let output = child.stdout.take().expect("piped");
    let mut lines = BufReader::new(output).lines();
    let kept = lines.any(|line| line.is_ok_and(|line| line.contains("kept and waiting")));
    assert!(kept, "the window ended before anything was kept");
    child
}

#[test]
fn a_killed_window_loses_nothing() {
    let folder = tempfile::tempdir().expect("a folder");
    let home = Home::at(folder.path());
    let mut child = start_doomed(folder.path());
    {
        // While it lives, its changes are its own.
        let rig = Rig::at(&home, preset());
        assert!(!rig.says("were not saved"), "nothing is offered");
    }
    // On Unix this is SIGKILL: the process gets no chance to tidy up.
    child.kill().expect("killed");
    child.wait().expect("gone");
    let mut rig = Rig::at(&home, preset());
    assert!(rig.says("Changes that were not saved"), "the offer");
    assert!(rig.says("fixed orifice diameter"), "the last change");
    rig.click("Restore Orchard carrier");
    rig.solve();
    assert_eq!(
        rig.text_of("valve.fixed_orifice_diameter"),
        "3.21 mm",
        "all of it"
    );
    assert!(rig.app().document().is_edited(), "but not saved yet");
    assert_eq!(notes(&home), 1, "kept by this window now");
    rig.close();
    assert_eq!(notes(&home), 0, "given up with the window");
}

#[test]
fn an_offer_can_wait_or_be_thrown_away() {
    let folder = tempfile::tempdir().expect("a folder");
    let home = Home::at(folder.path());
    {
        // A window that goes down without closing keeps what it has.
        let mut rig = Rig::at(&home, preset());
        rig.enter("Spool diameter", "19.7 mm");
    }
    let mut rig = Rig::at(&home, preset());
    rig.click("Decide later");
    assert_eq!(notes(&home), 1, "still there");
    rig.menu("File", "Restore unsaved changes");
    rig.click("Discard Orchard carrier");
    assert_eq!(notes(&home), 0, "gone");
    assert!(!rig.says("Decide later"), "nothing left to offer");
    drop(rig);
    let rig = Rig::at(&home, preset());
    assert!(!rig.says("were not saved"), "not offered again");
}
