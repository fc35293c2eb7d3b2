//! Computes the operating map.

use helmsplit_scenario::write::save_atomically;
use helmsplit_study::{Axis, MapEnd, MapSpec, OperatingMap, operating_map};
use helmsplit_view::figures::map_chart;
use helmsplit_view::{SvgOptions, svg_from_chart};

use crate::args::MapArguments;
use crate::exit::{ExitStatus, Failure};
use crate::input::{Loaded, load};
use crate::map_text::csv;
use crate::output::{print, say};
use crate::point::{point, ranged};
use crate::progress::watched_map;
use crate::{map_json, map_text};

pub(super) fn map(arguments: &MapArguments) -> Result<ExitStatus, Failure> {
    let loaded = load(&arguments.circuit)?;
    let spec = spec(&loaded, arguments)?;
    let map = watched_map(|watch| operating_map(&loaded.scenario, &spec, watch))?;
    if map.end == MapEnd::Cancelled {
        say("cancelled; nothing was written");
        return Ok(ExitStatus::Cancelled);
    }
    let files = write(&loaded, arguments, &map)?;
    let units = arguments.circuit.units;
    let text = if arguments.json {
        map_json::report(&loaded, &map, units, &files)?
    } else {
        map_text::report(&loaded, &map, arguments.layer, units, &files)
    };
    print(&text)?;
    if map.cells().next().is_none() {
        Ok(ExitStatus::GaveUp)
    } else {
        Ok(ExitStatus::Done)
    }
}

fn spec(loaded: &Loaded, arguments: &MapArguments) -> Result<MapSpec, Failure> {
    let scenario = &loaded.scenario;
    let usual = MapSpec::usual(scenario);
    let axis = |text: &Option<String>, option: &str, usual: Axis| match text {
        None => Ok(Axis {
            lines: arguments.lines,
            ..usual
        }),
        Some(text) => {
            let (variable, from, to) = ranged(scenario, text, option)?;
            Ok::<_, Failure>(Axis {
                variable,
                from,
                to,
                lines: arguments.lines,
            })
        }
    };
    Ok(MapSpec {
        x: axis(&arguments.x, "--x", usual.x)?,
        y: axis(&arguments.y, "--y", usual.y)?,
        point: point(scenario, usual.point, &arguments.point)?,
        refine: !arguments.even,
    })
}

fn write(
    loaded: &Loaded,
    arguments: &MapArguments,
    map: &OperatingMap,
) -> Result<Vec<String>, Failure> {
    let units = arguments.circuit.units;
    let mut files = Vec::new();
    if let Some(file) = &arguments.csv {
        csv(file, map, units)?;
        files.push(file.display().to_string());
    }
    if let Some(file) = &arguments.svg {
        let chart = map_chart(&loaded.scenario, map, arguments.layer, units);
        let theme = arguments.theme.theme().load()?;
        save_atomically(file, &svg_from_chart(&chart, &SvgOptions::new(&theme)))?;
        files.push(file.display().to_string());
    }
    Ok(files)
}
