//! Solves every circuit that comes with the program and writes its figure, in the theme named as
//! the second argument, into the folder named as the first.

use std::path::PathBuf;

use helmsplit_scenario::{PRESETS, UnitSystem};
use helmsplit_sim::{SolverOptions, Watch};
use helmsplit_study::solve;
use helmsplit_view::figures::solved_figure;
use helmsplit_view::{BuiltInTheme, SvgOptions, svg_from_figure};

fn main() -> Result<(), Box<dyn std::error::Error>> {
    let mut arguments = std::env::args().skip(1);
    let folder: PathBuf = arguments.next().ok_or("name a folder")?.into();
    let wanted = arguments.next().unwrap_or_else(|| "light".to_owned());
    let built_in = BuiltInTheme::ALL
        .into_iter()
        .find(|theme| theme.name() == wanted);
    let theme = built_in.ok_or("light, dark or print")?.load()?;
    std::fs::create_dir_all(&folder)?;
    for preset in PRESETS {
        let scenario = preset
            .scenario()
            .map_err(|findings| format!("{}: {findings}", preset.key))?;
        let solved = solve(
            &scenario,
            None,
            &SolverOptions::from(&scenario.solver()),
            &mut Watch::none(),
        )?;
        let figure = solved_figure(&scenario, &solved, UnitSystem::Metric);
        let svg = svg_from_figure(&figure, &SvgOptions::new(&theme));
        std::fs::write(folder.join(format!("{}.svg", preset.key)), svg)?;
    }
    Ok(())
}
