//! Draws every circuit that comes with the program, at rest and at the middle of its run, into the
//! folder named as the first argument, in the theme named as the second.

use std::path::PathBuf;

use helmsplit_scenario::presets::PRESETS;
use helmsplit_sim::{SolverOptions, Watch};
use helmsplit_study::solve;
use helmsplit_view::diagram::DrawingOptions;
use helmsplit_view::{BuiltInTheme, Moment, circuit_scene, svg_from_scene, valve_scene};

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
        let options = SolverOptions::from(&scenario.solver());
        let solved = solve(&scenario, None, &options, &mut Watch::none())?;
        let moment = Moment::of(&solved.run.trace, 0.5 * scenario.solver().duration);
        for (name, moment) in [("at-rest", None), ("running", moment.as_ref())] {
            let scene = circuit_scene(&solved.circuit, moment, DrawingOptions::default());
            let svg = svg_from_scene(&scene, &theme, "circuit");
            std::fs::write(folder.join(format!("{}-{name}.svg", preset.key)), svg)?;
            let scene = valve_scene(&solved.circuit, moment, None, DrawingOptions::default());
            let svg = svg_from_scene(&scene, &theme, "valve");
            std::fs::write(folder.join(format!("{}-valve-{name}.svg", preset.key)), svg)?;
        }
    }
    Ok(())
}
