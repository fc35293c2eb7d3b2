//! The way to the window, on machines that have none.

#![cfg(feature = "app")]

use std::path::Path;
use std::process::{Command, Output};

/// Starts the program where no display is to be found.
fn without_display(folder: &Path, arguments: &[&str]) -> Output {
    Command::new(env!("CARGO_BIN_EXE_helmsplit"))
        .current_dir(folder)
        .args(arguments)
        .env_remove("DISPLAY")
        .env_remove("WAYLAND_DISPLAY")
        .env_remove("WAYLAND_SOCKET")
        .env_remove("HELMSPLIT_RENDERER")
        .env("XDG_CONFIG_HOME", folder.join("config"))
        .env("XDG_STATE_HOME", folder.join("state"))
        .output()
        .expect("the program starts")
}

fn err(output: &Output) -> String {
    String::from_utf8_lossy(&output.stderr).into_owned()
}

fn folder() -> tempfile::TempDir {
    tempfile::tempdir().expect("a folder for the test")
}

#[test]
fn without_a_display_one_sentence_says_what_to_do() {
    let home = folder();
    let calls: [&[&str]; 5] = [
        &[],
        &["frost_pruner"],
        &["--renderer", "auto"],
        &["--renderer", "glow"],
        &["--renderer", "cpu"],
    ];
    for arguments in calls {
        let done = without_display(home.path(), arguments);
        let message = err(&done);
        assert_eq!(done.status.code(), Some(4), "{arguments:?}: {message}");
        assert!(message.contains("no display"), "{arguments:?}: {message}");
        assert!(
            message.contains("helmsplit run"),
            "{arguments:?}: {message}"
        );
        let lines = message.trim_end().lines().count();
        assert_eq!(lines, 1, "{arguments:?}: {message}");
        assert!(done.stdout.is_empty(), "{arguments:?}: nothing is printed");
    }
}

#[test]
fn a_file_that_does_not_read_is_refused_before_any_window() {
    let home = folder();
    std::fs::write(home.path().join("cut.ron"), "(format: 1, valve: (").expect("written");
    for (file, part) in [
        ("cut.ron", "cut.ron:1:"),
        ("none.ron", "no such file"),
        ("chek", "did you mean the command `helmsplit check`?"),
    ] {
        let done = without_display(home.path(), &[file]);
        assert_eq!(done.status.code(), Some(2), "{file}: {}", err(&done));
        assert!(err(&done).contains(part), "{file}: {}", err(&done));
    }
}

#[test]
fn wrong_renderers_are_refused_by_name() {
    let home = folder();
    let done = without_display(home.path(), &["--renderer", "gpu"]);
    assert_eq!(done.status.code(), Some(2), "{}", err(&done));
    for name in ["auto", "glow", "cpu"] {
        assert!(err(&done).contains(name), "{}", err(&done));
    }
    let done = Command::new(env!("CARGO_BIN_EXE_helmsplit"))
        .current_dir(home.path())
        .env("HELMSPLIT_RENDERER", "gpu")
        .output()
        .expect("the program starts");
    assert_eq!(done.status.code(), Some(2), "{}", err(&done));
    assert!(err(&done).contains("HELMSPLIT_RENDERER"), "{}", err(&done));
}

#[test]
fn the_help_tells_of_window_commands_and_status() {
    let home = folder();
    let text = |arguments: &[&str]| {
        let done = without_display(home.path(), arguments);
        String::from_utf8_lossy(&done.stdout).into_owned()
    };
    let help = text(&["--help"]);
    for part in ["opens the window", "--renderer", "convert", "4 no window"] {
        assert!(help.contains(part), "{part} in {help}");
    }
    let manual = text(&["man"]);
    for part in ["opens the window", "renderer", "4 no window"] {
        assert!(manual.contains(part), "{part} in {manual}");
    }
    for shell in ["bash", "zsh", "fish"] {
        let completions = text(&["completions", shell]);
        assert!(completions.contains("renderer"), "{shell}");
    }
}
