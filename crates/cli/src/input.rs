//! From the arguments to a scenario.

use std::path::Path;

use helmsplit_scenario::choice::StartKind;
use helmsplit_scenario::presets::Preset;
use helmsplit_scenario::{Finding, Findings, Scenario};
use helmsplit_sim::{SavedState, Start};

use crate::args::CircuitArguments;
use crate::exit::Failure;
use crate::output::say;

/// A scenario with where it came from.
pub(crate) struct Loaded {
    pub(crate) scenario: Scenario,
    /// What a person calls the source: a path or the name of a preset.
    pub(crate) source: String,
    /// Start that replaces the scenario's own.
    pub(crate) start: Option<Start>,
}

/// Reads the circuit, applies what `--set` and `--start` say, prints warnings to standard error.
pub(crate) fn load(arguments: &CircuitArguments) -> Result<Loaded, Failure> {
    let (mut scenario, source) = read(&arguments.file)?;
    for assignment in &arguments.set {
        set(&mut scenario, assignment)?;
    }
    let start = choose_start(&mut scenario, arguments)?;
    let findings = scenario.validate();
    report(&findings, &source, !arguments.set.is_empty())?;
    Ok(Loaded {
        scenario,
        source,
        start,
    })
}

/// Reads a circuit file, or a preset if there is no such file but a preset of that name.
pub(crate) fn read(file: &Path) -> Result<(Scenario, String), Failure> {
    let preset = file.to_str().and_then(Preset::from_key);
    if let (Some(preset), false) = (preset, file.exists()) {
        let scenario = preset.scenario().map_err(Failure::Findings)?;
        return Ok((scenario, format!("preset {}", preset.key)));
    }
    let source = file.display().to_string();
    let (scenario, findings) = Scenario::load(file);
    match scenario {
        Some(scenario) if !findings.has_errors() => {
            warn(&findings);
            Ok((scenario, source))
        }
        _ => Err(Failure::Findings(findings)),
    }
}

fn warn(findings: &Findings) {
    if !findings.is_empty() {
        say(findings.to_string().trim_end());
    }
}

/// After `--set` the whole is looked at again: a change can contradict what the file says.
fn report(findings: &Findings, source: &str, changed: bool) -> Result<(), Failure> {
    let mut named = Findings::of(source);
    for finding in findings {
        named.push(finding.clone());
    }
    if named.has_errors() {
        return Err(Failure::Findings(named));
    }
    if changed {
        warn(&named);
    }
    Ok(())
}

fn set(scenario: &mut Scenario, assignment: &str) -> Result<(), Failure> {
    let Some((path, value)) = assignment.split_once('=') else {
        let finding = Finding::error(
            assignment,
            "--set takes PATH=VALUE",
            "write for example --set valve.fixed_orifice_diameter=\"3.5 mm\"",
        );
        return Err(finding.into());
    };
    scenario.set(path.trim(), value.trim())?;
    Ok(())
}

/// Where the run starts; a state file is read here, relative to the circuit file if the circuit
/// names it.
fn choose_start(
    scenario: &mut Scenario,
    arguments: &CircuitArguments,
) -> Result<Option<Start>, Failure> {
    match arguments.start.as_deref() {
        None => {}
        Some(word @ ("settled" | "cold")) => scenario.set("start.kind", word)?,
        Some(file) => return state_of(scenario, Path::new(file)),
    }
    if scenario.chosen::<StartKind>() != StartKind::FromState {
        return Ok(None);
    }
    match scenario.start_state.clone() {
        Some(file) => {
            let folder = arguments.file.parent().unwrap_or(Path::new(""));
            state_of(scenario, &folder.join(file))
        }
        None => Err(Finding::error(
            "start.state",
            "the run starts from a saved state, but no file is named",
            "name a file that --save-state wrote, or start settled",
        )
        .into()),
    }
}

fn state_of(scenario: &Scenario, file: &Path) -> Result<Option<Start>, Failure> {
    let circuit = scenario.circuit().map_err(Failure::Findings)?;
    let start = SavedState::read(file)?.start(&circuit);
    let start = start.map_err(|error| Failure::Input(format!("{}: {error}", file.display())))?;
    Ok(Some(start))
}
