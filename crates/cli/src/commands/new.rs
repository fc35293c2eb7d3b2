//! Writes a commented circuit file from a preset.

use std::path::PathBuf;

use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::nearest;
use helmsplit_scenario::presets::{PRESETS, Preset};
use helmsplit_scenario::write::save_atomically;

use crate::args::NewArguments;
use crate::exit::{ExitStatus, Failure};
use crate::output::print;

pub(super) fn new(arguments: &NewArguments) -> Result<ExitStatus, Failure> {
    let Some(name) = &arguments.preset else {
        print(&listing()?)?;
        return Ok(ExitStatus::Done);
    };
    let Some(preset) = Preset::from_key(name) else {
        let hint = match nearest(name, PRESETS.iter().map(|p| p.key)) {
            Some(near) => format!("did you mean {near}?"),
            None => "`helmsplit new` lists them".to_owned(),
        };
        return Err(Failure::Input(format!(
            "there is no preset \"{name}\"; {hint}"
        )));
    };
    let file = arguments
        .output
        .clone()
        .unwrap_or_else(|| PathBuf::from(preset.file_name()));
    if file.exists() && !arguments.force {
        return Err(Failure::Input(format!(
            "{} is there already; name another file with -o, or overwrite it with --force",
            file.display()
        )));
    }
    let text = if arguments.units == UnitSystem::Metric {
        preset.text.to_owned()
    } else {
        let mut scenario = preset.scenario().map_err(Failure::Findings)?;
        scenario.rewrite_units(arguments.units);
        scenario.to_text(true)
    };
    save_atomically(&file, &text)?;
    print(&format!(
        "Wrote {}. Solve it with `helmsplit run {}`.\n",
        file.display(),
        file.display()
    ))?;
    Ok(ExitStatus::Done)
}

/// The presets with the first lines of their notes.
fn listing() -> Result<String, Failure> {
    let mut text = String::from("Presets, for `helmsplit new PRESET`:\n\n");
    for preset in PRESETS {
        let scenario = preset.scenario().map_err(Failure::Findings)?;
        text.push_str(&format!("  {}: {}\n", preset.key, scenario.name));
        for line in scenario.notes.lines() {
            text.push_str(&format!("      {}\n", line.trim()));
        }
        text.push('\n');
    }
    Ok(text)
}
