//! Writes a figure of invented data and a sheet of awkward data as SVG, in each theme, into the
//! folder named as the argument: to look at after a change to the layout.

use std::path::PathBuf;

use helmsplit_view::{BuiltInTheme, SvgOptions, svg_from_figure};

#[path = "../tests/sample/mod.rs"]
mod sample;

fn main() -> Result<(), Box<dyn std::error::Error>> {
    let folder: PathBuf = std::env::args().nth(1).ok_or("name a folder")?.into();
    std::fs::create_dir_all(&folder)?;
    for built_in in BuiltInTheme::ALL {
        let theme = built_in.load()?;
        for (name, figure) in [("run", sample::run()), ("awkward", sample::awkward())] {
            let svg = svg_from_figure(&figure, &SvgOptions::new(&theme));
            std::fs::write(folder.join(format!("{name}-{}.svg", theme.name)), svg)?;
        }
    }
    Ok(())
}
