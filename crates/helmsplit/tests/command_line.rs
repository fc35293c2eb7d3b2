//! The command line as a user or a script meets it: output, files, exit status.

use std::path::Path;
use std::process::{Command, Output, Stdio};

const PRESETS: [&str; 6] = [
    "orchard_carrier",
    "vineyard_sprayer",
    "nursery_loader",
    "depot_tug",
    "frost_pruner",
    "workshop_bench",
];

fn helmsplit(folder: &Path, arguments: &[&str]) -> Output {
    Command::new(env!("CARGO_BIN_EXE_helmsplit"))
        .current_dir(folder)
        .args(arguments)
        .output()
        .expect("the program starts")
}

fn out(output: &Output) -> String {
    String::from_utf8_lossy(&output.stdout).into_owned()
}

fn err(output: &Output) -> String {
    String::from_utf8_lossy(&output.stderr).into_owned()
}

fn folder() -> tempfile::TempDir {
    tempfile::tempdir().expect("a folder for the test")
}

/// A quick run of a preset: the first half second.
const SHORT: [&str; 2] = ["--set", "manoeuvre.duration=0.5 s"];

#[test]
fn run_without_a_file_solves_the_demo_and_writes_it() {
    let home = folder();
    solves_the_demo(&home, &["run"]);
}

/// Without the window nothing else can be meant.
#[cfg(not(feature = "app"))]
#[test]
fn without_a_command_the_demo_is_solved_and_written() {
    let home = folder();
    solves_the_demo(&home, &[]);
}

fn solves_the_demo(home: &tempfile::TempDir, arguments: &[&str]) {
    let done = helmsplit(home.path(), arguments);
    assert!(matches!(done.status.code(), Some(0 | 1)), "{}", err(&done));
    let text = out(&done);
    assert!(text.contains("Orchard carrier"), "{text}");
    assert!(text.contains("overshoot"), "{text}");
    for ending in ["svg", "traces.csv", "run.json"] {
        let file = format!("helmsplit-out/orchard-carrier.{ending}");
        assert!(text.contains(&file), "{file} is not named in {text}");
        let written = std::fs::read_to_string(home.path().join(&file)).expect(&file);
        assert!(written.len() > 1000, "{file} is nearly empty");
    }
}

#[test]
fn new_files_run_in_every_unit_system() {
    let home = folder();
    let mut figures = Vec::new();
    for units in ["metric", "us", "si"] {
        let file = format!("{units}.circuit.ron");
        let made = helmsplit(
            home.path(),
            &["new", "orchard_carrier", "-o", &file, "--units", units],
        );
        assert_eq!(made.status.code(), Some(0), "{}", err(&made));
        let mut arguments = vec!["run", &file, "--json", "--no-files"];
        arguments.extend(["--set", "manoeuvre.duration=3.5 s"]);
        let done = helmsplit(home.path(), &arguments);
        let report: serde_json::Value =
            serde_json::from_str(&out(&done)).unwrap_or_else(|e| panic!("{e}: {}", err(&done)));
        figures.push((report["checks"].clone(), report["audit"].clone()));
    }
    assert_eq!(figures[0], figures[1], "US units change the result");
    assert_eq!(figures[0], figures[2], "SI units change the result");
    let again = helmsplit(
        home.path(),
        &["new", "orchard_carrier", "-o", "us.circuit.ron"],
    );
    assert_eq!(
        again.status.code(),
        Some(2),
        "overwrites without being asked"
    );
    assert!(err(&again).contains("--force"), "{}", err(&again));
}

#[test]
fn convert_keeps_comments_and_values() {
    let home = folder();
    let file = home.path().join("mine.circuit.ron");
    let text =
        "(\n    format: 1,\n    // my own words\n    valve: (spool_diameter: \"20 mm\"),\n)\n";
    std::fs::write(&file, text).expect("written");
    let us = helmsplit(home.path(), &["convert", "mine.circuit.ron", "--to", "us"]);
    assert_eq!(us.status.code(), Some(0), "{}", err(&us));
    assert!(out(&us).contains("// my own words"), "{}", out(&us));
    assert!(out(&us).contains(" in\""), "{}", out(&us));
    let there = helmsplit(
        home.path(),
        &["convert", "mine.circuit.ron", "--to", "us", "--in-place"],
    );
    assert_eq!(there.status.code(), Some(0), "{}", err(&there));
    let back = helmsplit(
        home.path(),
        &["convert", "mine.circuit.ron", "--to", "metric"],
    );
    assert_eq!(out(&back), text, "there and back");
}

/// Asserts that a call is refused with status 2, without a panic, and names what is `wanted`.
fn refused(home: &Path, arguments: &[&str], wanted: &[&str]) {
    let done = helmsplit(home, arguments);
    let message = err(&done);
    let shown: String = arguments.join(" ").chars().take(60).collect();
    assert_eq!(done.status.code(), Some(2), "{shown}: {message}");
    assert!(message.contains("error"), "{shown}: {message}");
    assert!(!message.contains("panicked"), "{shown}: {message}");
    for text in wanted {
        assert!(
            message.contains(text),
            "{shown}: no \"{text}\" in {message}"
        );
    }
    let written = home.join("helmsplit-out").exists();
    assert!(!written, "{shown}: a refused run writes nothing");
}

#[test]
fn bad_files_are_refused_with_status_2_and_a_place() {
    let home = folder();
    let typo: &[u8] =
        b"(\n  valve: (spool_diametre: \"20 mm\"),\n  pump: (displacement: \"20\"),\n)";
    let deep = "(".repeat(5000);
    let cases: [(&str, &[u8], &[&str]); 5] = [
        (
            "cut.ron",
            b"(format: 1, valve: (spool_diameter: \"20 mm\"",
            &["cut.ron:1:", "ends before"],
        ),
        (
            "typo.ron",
            typo,
            &[
                "typo.ron:2:",
                "did you mean spool_diameter?",
                "typo.ron:3:",
                "needs a unit",
            ],
        ),
        ("latin.ron", b"(name: \"\xe4\")", &["latin.ron:1:", "UTF-8"]),
        ("deep.ron", deep.as_bytes(), &["deep.ron:1:"]),
        ("empty.ron", b"", &["empty.ron"]),
    ];
    for (name, bytes, wanted) in cases {
        std::fs::write(home.path().join(name), bytes).expect("written");
        refused(home.path(), &["run", name], wanted);
        refused(home.path(), &["check", name], wanted);
        refused(home.path(), &["convert", name, "--to", "si"], wanted);
    }
    refused(
        home.path(),
        &["run", "missing.ron"],
        &["missing.ron", "no such file"],
    );
    refused(home.path(), &["run", "."], &["folder"]);
}

#[test]
fn bad_arguments_are_refused_with_status_2_and_a_hint() {
    let home = folder();
    let other = "{\"time_s\": 0, \"states\": [[\"q\", 1]]}";
    std::fs::write(home.path().join("state.json"), other).expect("written");
    let long = format!("{}=1", "x".repeat(10_000));
    let settings: [(&str, &[&str]); 4] = [
        ("valve.spool_diameter=20 bar", &["is a pressure"]),
        ("excess.kind=tanks", &["did you mean", "tank"]),
        ("valve.spring_volume=1 cm3", &["valve.spring_volume"]),
        (&long, &["no such parameter"]),
    ];
    for (setting, wanted) in settings {
        refused(
            home.path(),
            &["run", "orchard_carrier", "--set", setting],
            wanted,
        );
    }
    for (file, wanted) in [
        ("nowhere.json", "nowhere.json"),
        ("state.json", "state.json"),
    ] {
        refused(
            home.path(),
            &["run", "orchard_carrier", "--start", file],
            &[wanted],
        );
    }
    refused(
        home.path(),
        &["new", "orchard_carier"],
        &["did you mean orchard_carrier"],
    );
}

#[test]
fn several_findings_come_in_one_pass() {
    let home = folder();
    let text = "(\n  valve: (spool_diameter: \"20 bar\", stroke: \"8\"),\n  main_relief: (cracking_pressure: \"180 bar\", full_flow_pressure: \"170 bar\"),\n)";
    std::fs::write(home.path().join("three.ron"), text).expect("written");
    let done = helmsplit(home.path(), &["check", "three.ron"]);
    assert_eq!(done.status.code(), Some(2), "{}", err(&done));
    let errors = err(&done).matches("error").count();
    assert!(errors >= 2, "{}", err(&done));
}

#[test]
fn a_saved_state_starts_a_later_run() {
    let home = folder();
    let mut arguments = vec![
        "run",
        "orchard_carrier",
        "--no-files",
        "--save-state",
        "end.json",
    ];
    arguments.extend(SHORT);
    let first = helmsplit(home.path(), &arguments);
    assert!(
        matches!(first.status.code(), Some(0 | 1)),
        "{}",
        err(&first)
    );
    let mut arguments = vec![
        "run",
        "orchard_carrier",
        "--no-files",
        "--start",
        "end.json",
        "--json",
    ];
    arguments.extend(SHORT);
    let second = helmsplit(home.path(), &arguments);
    assert!(
        matches!(second.status.code(), Some(0 | 1)),
        "{}",
        err(&second)
    );
    let mut arguments = vec!["run", "workshop_bench", "--no-files", "--start", "end.json"];
    arguments.extend(SHORT);
    let other = helmsplit(home.path(), &arguments);
    assert_eq!(
        other.status.code(),
        Some(2),
        "another circuit's state: {}",
        out(&other)
    );
}

#[test]
fn a_failing_check_is_status_1_and_a_met_one_status_0() {
    let home = folder();
    let loose = [
        "--set",
        "limits.overshoot=400 %",
        "--set",
        "limits.settling=10 s",
        "--set",
        "limits.steering_limit=5 bar",
        "--set",
        "limits.pressure_velocity=20 m/s",
    ];
    let mut arguments = vec!["check", "orchard_carrier", "--no-map"];
    arguments.extend(loose);
    let met = helmsplit(home.path(), &arguments);
    assert_eq!(met.status.code(), Some(0), "{}{}", out(&met), err(&met));
    arguments.extend(["--set", "limits.overshoot=1 %"]);
    let missed = helmsplit(home.path(), &arguments);
    assert_eq!(missed.status.code(), Some(1), "{}", out(&missed));
    assert!(out(&missed).contains("overshoot: FAIL"), "{}", out(&missed));
}

#[test]
fn a_run_that_the_solver_gives_up_is_status_3_and_keeps_what_it_has() {
    let home = folder();
    let arguments = ["run", "orchard_carrier", "--set", "solver.max_steps=200"];
    let done = helmsplit(home.path(), &arguments);
    assert_eq!(done.status.code(), Some(3), "{}{}", out(&done), err(&done));
    assert!(out(&done).contains("gave up at"), "{}", out(&done));
    let sidecar = home.path().join("helmsplit-out/orchard-carrier.run.json");
    let text = std::fs::read_to_string(sidecar).expect("the sidecar is written");
    assert!(text.contains("gave_up"), "{text}");
}

#[cfg(unix)]
#[test]
fn ctrl_c_leaves_no_half_file() {
    let home = folder();
    let mut child = Command::new(env!("CARGO_BIN_EXE_helmsplit"))
        .current_dir(home.path())
        .args([
            "run",
            "depot_tug",
            "--set",
            "solver.relative_tolerance=1e-10",
        ])
        .args(["--set", "manoeuvre.duration=3000 s"])
        .stdout(Stdio::null())
        .stderr(Stdio::piped())
        .spawn()
        .expect("the program starts");
    std::thread::sleep(std::time::Duration::from_millis(1500));
    let kill = Command::new("kill")
        .args(["-INT", &child.id().to_string()])
        .status();
    assert!(kill.is_ok_and(|s| s.success()), "the signal is sent");
    let status = child.wait().expect("it ends");
    assert_eq!(status.code(), Some(130), "cancelled");
    let left: Vec<_> = std::fs::read_dir(home.path()).expect("listed").collect();
    assert!(left.is_empty(), "{left:?}");
}

#[test]
fn every_preset_solves_to_its_end() {
    let home = folder();
    for preset in PRESETS {
        let done = helmsplit(home.path(), &["run", preset, "--no-files", "--json"]);
        assert!(
            matches!(done.status.code(), Some(0 | 1)),
            "{preset}: {}",
            err(&done)
        );
        let report: serde_json::Value =
            serde_json::from_str(&out(&done)).unwrap_or_else(|e| panic!("{preset}: {e}"));
        assert_eq!(report["end"]["kind"], "finished", "{preset}");
        for balance in ["volume", "energy"] {
            let residual = report["audit"][balance]["relative"].as_f64().unwrap_or(1.0);
            assert!(residual < 1e-3, "{preset}: {balance} is open by {residual}");
        }
    }
}

#[test]
fn parameters_are_found_and_listed() {
    let home = folder();
    let found = helmsplit(home.path(), &["parameters", "disc", "hole", "diameter"]);
    assert_eq!(found.status.code(), Some(0), "{}", err(&found));
    assert!(
        out(&found).contains("valve.disc_hole_diameter"),
        "{}",
        out(&found)
    );
    let all = helmsplit(home.path(), &["parameters", "--json", "--units", "us"]);
    let listing: serde_json::Value = serde_json::from_str(&out(&all)).expect("JSON");
    assert!(
        listing["parameters"]
            .as_array()
            .is_some_and(|p| p.len() > 150),
        "all of them"
    );
    let none = helmsplit(home.path(), &["parameters", "flux capacitor"]);
    assert_eq!(none.status.code(), Some(2), "{}", out(&none));
}

#[test]
fn completions_and_manual_are_printed() {
    let home = folder();
    for shell in ["bash", "zsh", "fish"] {
        let done = helmsplit(home.path(), &["completions", shell]);
        assert!(out(&done).contains("convert"), "{shell}");
    }
    assert!(
        out(&helmsplit(home.path(), &["man"])).contains(".TH"),
        "a manual page"
    );
}

#[test]
fn checks_that_take_the_map_are_answered() {
    let home = folder();
    let arguments = ["check", "orchard_carrier", SHORT[0], SHORT[1]];
    let done = helmsplit(home.path(), &arguments);
    let text = out(&done);
    assert!(matches!(done.status.code(), Some(0 | 1)), "{}", err(&done));
    assert!(!text.contains("needs the map"), "{text}");
    assert!(text.contains("stroke-reserve: "), "{text}");
    assert!(text.contains("at engine speed = "), "{text}");
    let mut without = arguments.to_vec();
    without.push("--no-map");
    let done = helmsplit(home.path(), &without);
    assert!(out(&done).contains("needs the map"), "{}", out(&done));
    let run = [
        "run",
        "orchard_carrier",
        "--no-files",
        "--map",
        SHORT[0],
        SHORT[1],
    ];
    let done = helmsplit(home.path(), &run);
    assert!(!out(&done).contains("needs the map"), "{}", out(&done));
}

#[test]
fn a_map_is_printed_and_written() {
    let home = folder();
    let mut arguments = vec![
        "map",
        "orchard_carrier",
        "--lines",
        "6",
        "--layer",
        "damping",
    ];
    arguments.extend(["--csv", "map.csv", "--svg", "map.svg"]);
    let done = helmsplit(home.path(), &arguments);
    assert_eq!(done.status.code(), Some(0), "{}", err(&done));
    let text = out(&done);
    for word in [
        "Least damping ratio",
        "Stroke in reserve",
        "Wrote map.csv",
        "6 x 6 equilibria",
    ] {
        assert!(text.contains(word), "{word} is not in {text}");
    }
    let table = std::fs::read_to_string(home.path().join("map.csv")).unwrap();
    let head = table.lines().next().unwrap();
    assert!(
        head.starts_with("engine_speed_rpm,steering_pressure_bar,"),
        "{head}"
    );
    assert_eq!(table.lines().count(), 37, "one row a place");
    let chart = std::fs::read_to_string(home.path().join("map.svg")).unwrap();
    assert!(chart.starts_with("<svg"), "a chart");

    let axes = [
        "map",
        "orchard_carrier",
        "--lines",
        "4",
        "--x",
        "temperature=20 degC..80 degC",
    ];
    let mut arguments = axes.to_vec();
    arguments.extend(["--y", "valve.disc_hole_diameter=0.4 mm..0.8 mm", "--json"]);
    let done = helmsplit(home.path(), &arguments);
    let report: serde_json::Value = serde_json::from_str(&out(&done)).expect("JSON");
    assert_eq!(report["x"]["unit"], "degC", "{report}");
    assert_eq!(
        report["layers"][0]["values"].as_array().unwrap().len(),
        16,
        "{report}"
    );
}

#[test]
fn an_equilibrium_is_told_with_forces_modes_and_sweep() {
    let home = folder();
    let mut arguments = vec!["damping", "orchard_carrier"];
    arguments.extend(["--speed", "2400 rpm", "--wheel", "90 rpm"]);
    arguments.extend([
        "--sweep",
        "valve.disc_hole_diameter=0.4 mm..0.9 mm",
        "--values",
        "6",
    ]);
    arguments.extend(["--svg", "damping.svg", "--csv", "damping.csv"]);
    let done = helmsplit(home.path(), &arguments);
    assert_eq!(done.status.code(), Some(0), "{}", err(&done));
    let text = out(&done);
    for word in [
        "Forces on the spool",
        "dry friction, left out",
        "Modes",
        "damping ratio",
        "Sweep of disc hole diameter",
        "left out: dry friction of the spool",
    ] {
        assert!(text.contains(word), "{word} is not in {text}");
    }
    let table = std::fs::read_to_string(home.path().join("damping.csv")).unwrap();
    assert!(
        table.starts_with("valve_disc_hole_diameter_mm,mode_1_"),
        "{table}"
    );
    let chart = std::fs::read_to_string(home.path().join("damping.svg")).unwrap();
    assert!(chart.contains("Forces on the spool"), "bars");

    let json = ["damping", "workshop_bench", "--json"];
    let done = helmsplit(home.path(), &json);
    let report: serde_json::Value = serde_json::from_str(&out(&done)).expect("JSON");
    assert!(report["modes"].as_array().unwrap().len() > 5, "{report}");
    assert_eq!(report["ripple"].as_array().unwrap().len(), 2, "{report}");
}

#[test]
fn bad_points_and_ranges_are_refused_with_a_hint() {
    let home = folder();
    let map = ["map", "orchard_carrier"];
    let damping = ["damping", "orchard_carrier"];
    for (command, arguments, wanted) in [
        (map, ["--x", "engin-speed"], "did you mean engine-speed?"),
        (map, ["--x", "wear=3..1"], "must grow"),
        (map, ["--x", "wear=1-3"], "FROM..TO"),
        (map, ["--y", "excess-pressure"], "vary motor-load"),
        (map, ["--lines", "1"], "2 to 400"),
        (damping, ["--speed", "20 bar"], "--speed"),
        (damping, ["--excess-command", "3"], "-1 to 1"),
        (damping, ["--response", "pump-flow:p_nowhere"], "p_in"),
        (damping, ["--response", "pump:p_in"], "pump-flow"),
        (damping, ["--steering-pressure", "20 bar"], "does not turn"),
    ] {
        let all = [&command[..], &arguments[..]].concat();
        refused(home.path(), &all, &[wanted]);
    }
}
