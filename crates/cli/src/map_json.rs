//! An operating map for machines.

use helmsplit_scenario::UnitSystem;
use helmsplit_study::{Layer, OperatingMap, Spot, Variable};
use serde::Serialize;

use crate::exit::Failure;
use crate::input::Loaded;
use crate::map_text::unit;

/// Layout of the report; a reader that knows this number knows the fields.
const FORMAT: u32 = 1;

#[derive(Serialize)]
struct Report<'a> {
    format: u32,
    version: &'static str,
    circuit: &'a str,
    source: &'a str,
    circuit_hash: String,
    x: AxisNote,
    y: AxisNote,
    elapsed_s: f64,
    layers: Vec<LayerNote>,
    /// Row by row from the lowest y.
    stable: Vec<Option<bool>>,
    several: Vec<Option<bool>>,
    growth_per_s: Vec<Option<f64>>,
    failures: Vec<FailureNote<'a>>,
    borders: Vec<Vec<(f64, f64)>>,
    files: &'a [String],
}

#[derive(Serialize)]
struct AxisNote {
    variable: &'static str,
    label: &'static str,
    unit: &'static str,
    values: Vec<f64>,
}

#[derive(Serialize)]
struct LayerNote {
    layer: Layer,
    label: &'static str,
    unit: &'static str,
    values: Vec<Option<f64>>,
}

#[derive(Serialize)]
struct FailureNote<'a> {
    place: usize,
    reason: &'a str,
}

/// The map as JSON text.
pub(crate) fn report(
    loaded: &Loaded,
    map: &OperatingMap,
    units: UnitSystem,
    files: &[String],
) -> Result<String, Failure> {
    let cells = || map.spots.iter().map(Spot::cell);
    let (x, y) = (map.spec.x.variable, map.spec.y.variable);
    let in_unit = |variable: Variable, si: f64| units.unit(variable.quantity()).value_from_si(si);
    let report = Report {
        format: FORMAT,
        version: env!("CARGO_PKG_VERSION"),
        circuit: &loaded.scenario.name,
        source: &loaded.source,
        circuit_hash: loaded.scenario.hash(),
        x: axis(x, &map.xs, units),
        y: axis(y, &map.ys, units),
        elapsed_s: map.elapsed.as_secs_f64(),
        layers: Layer::ALL.map(|layer| note(map, layer, units)).into(),
        stable: cells().map(|cell| cell.map(|c| c.stable)).collect(),
        several: cells().map(|cell| cell.map(|c| c.several)).collect(),
        growth_per_s: cells().map(|cell| cell.map(|c| c.growth)).collect(),
        failures: map
            .spots
            .iter()
            .enumerate()
            .filter_map(|(place, spot)| match spot {
                Spot::Failed(reason) => Some(FailureNote { place, reason }),
                Spot::Waiting | Spot::Solved(_) => None,
            })
            .collect(),
        borders: map
            .stability_border()
            .into_iter()
            .map(|line| {
                let points = line.points.into_iter();
                points
                    .map(|(a, b)| (in_unit(x, a), in_unit(y, b)))
                    .collect()
            })
            .collect(),
        files,
    };
    Ok(format!("{}\n", serde_json::to_string_pretty(&report)?))
}

fn axis(variable: Variable, values: &[f64], units: UnitSystem) -> AxisNote {
    let unit = units.unit(variable.quantity());
    AxisNote {
        variable: variable.name(),
        label: variable.label(),
        unit: unit.symbol(),
        values: values.iter().map(|&si| unit.value_from_si(si)).collect(),
    }
}

fn note(map: &OperatingMap, layer: Layer, units: UnitSystem) -> LayerNote {
    let unit = unit(layer, units);
    let value = |si: f64| unit.map_or(si, |unit| unit.value_from_si(si));
    LayerNote {
        layer,
        label: layer.label(),
        unit: match (unit, layer) {
            (Some(unit), _) => unit.symbol(),
            (None, Layer::Frequency) => "Hz",
            (None, _) => "1",
        },
        values: map
            .spots
            .iter()
            .map(|spot| {
                let si = layer.value(spot.cell()?);
                si.is_finite().then(|| value(si))
            })
            .collect(),
    }
}
