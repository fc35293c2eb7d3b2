//! The files of a run: traces, sidecar, figure.

use std::path::{Path, PathBuf};

use helmsplit_scenario::write::save_atomically;
use helmsplit_scenario::{Scenario, UnitSystem};
use helmsplit_sim::{Origin, Rows, Sidecar, SolverOptions, write_csv};
use helmsplit_study::Solved;
use helmsplit_view::figures::solved_figure;
use helmsplit_view::{BuiltInTheme, SvgOptions, svg_from_figure};

use crate::exit::Failure;

/// Folder that a run writes to by default.
pub(crate) const FOLDER: &str = "helmsplit-out";

/// What to write, and where.
pub(crate) struct Job<'a> {
    pub(crate) scenario: &'a Scenario,
    pub(crate) solved: &'a Solved,
    pub(crate) options: &'a SolverOptions,
    pub(crate) units: UnitSystem,
    pub(crate) rows: Rows,
    pub(crate) theme: BuiltInTheme,
}

/// Writes traces, sidecar and figure into `folder`; gives their paths.
pub(crate) fn write(job: &Job<'_>, folder: &Path) -> Result<Vec<PathBuf>, Failure> {
    std::fs::create_dir_all(folder).map_err(|error| {
        Failure::Input(format!(
            "{}: cannot make the folder: {error}",
            folder.display()
        ))
    })?;
    let stem = stem(&job.scenario.name);
    let at = |ending: &str| folder.join(format!("{stem}.{ending}"));
    let (traces, sidecar, figure) = (at("traces.csv"), at("run.json"), at("svg"));
    let run = &job.solved.run;
    write_csv(&traces, &run.trace, job.rows, job.units)?;
    let origin = Origin {
        circuit: &job.scenario.name,
        circuit_hash: &job.scenario.hash(),
        version: env!("CARGO_PKG_VERSION"),
    };
    Sidecar::new(origin, run, job.options, job.units).write(&sidecar)?;
    let drawn = solved_figure(job.scenario, job.solved, job.units);
    let theme = job.theme.load()?;
    save_atomically(&figure, &svg_from_figure(&drawn, &SvgOptions::new(&theme)))?;
    Ok(vec![traces, sidecar, figure])
}

/// A file name from the name of a circuit: letters and digits, the rest as hyphens.
fn stem(name: &str) -> String {
    let mut stem = String::new();
    for character in name.chars() {
        if character.is_alphanumeric() {
            stem.extend(character.to_lowercase());
        } else if !stem.ends_with('-') && !stem.is_empty() {
            stem.push('-');
        }
    }
    let stem = stem.trim_end_matches('-');
    if stem.is_empty() {
        "run".to_owned()
    } else {
        stem.to_owned()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn names_become_file_names() {
        for (name, expected) in [
            ("Orchard carrier", "orchard-carrier"),
            ("  ../etc/passwd ", "etc-passwd"),
            ("///", "run"),
            ("Pump 2 (worn)", "pump-2-worn"),
        ] {
            assert_eq!(stem(name), expected, "{name}");
        }
    }
}
