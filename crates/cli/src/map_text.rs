//! An operating map for people, and as a table.

use std::path::Path;

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_sim::column_heading;
use helmsplit_study::{Layer, OperatingMap, Variable};
use helmsplit_view::figures::point_text;
use helmsplit_view::{Column, TextTable};

use crate::exit::Failure;
use crate::input::Loaded;
use crate::table_csv::write_table;
use crate::verdict::width;

/// Rows and columns of the printed layer: what fits a terminal.
const SHOWN: usize = 8;

/// Figures are shown with this many digits.
const DIGITS: Digits = Digits::Significant(4);

/// The map in words: extremes of every layer, and the chosen layer in a few rows and columns.
pub(crate) fn report(
    loaded: &Loaded,
    map: &OperatingMap,
    layer: Layer,
    units: UnitSystem,
    files: &[String],
) -> String {
    let scenario = &loaded.scenario;
    let spec = &map.spec;
    let mut text = format!("{}  ({})\n", scenario.name, loaded.source);
    text.push_str(&format!(
        "{} to the right, {} upwards, else {}\n",
        spec.x.variable.label(),
        spec.y.variable.label().to_lowercase(),
        point_text(scenario, &spec.point, units)
    ));
    text.push_str(&format!(
        "{} x {} equilibria in {:.2} s; dry friction at rest and pump ripple left out\n",
        map.xs.len(),
        map.ys.len(),
        map.elapsed.as_secs_f64()
    ));
    text.push_str(&remarks(map));
    text.push('\n');
    text.push_str(&extremes(map, units));
    text.push_str(&format!("\n{}\n", layer.label()));
    text.push_str(&excerpt(map, layer, units));
    for file in files {
        text.push_str(&format!("\nWrote {file}"));
    }
    if !files.is_empty() {
        text.push('\n');
    }
    text
}

fn remarks(map: &OperatingMap) -> String {
    let mut text = String::new();
    let failed = map.failed();
    let unstable = map.cells().filter(|(_, _, cell)| !cell.stable).count();
    let several = map.cells().filter(|(_, _, cell)| cell.several).count();
    for (count, what) in [
        (failed, "no equilibrium was found"),
        (
            unstable,
            "the equilibrium is not stable: it hunts, unless dry friction hides it",
        ),
        (
            several,
            "there are two equilibria: where the circuit came from decides",
        ),
    ] {
        if count > 0 {
            text.push_str(&format!("at {count} places {what}\n"));
        }
    }
    text
}

/// A value of a layer with its unit.
pub(crate) fn layer_value(layer: Layer, si: f64, units: UnitSystem) -> String {
    if !si.is_finite() {
        return String::new();
    }
    match layer.quantity() {
        _ if layer == Layer::Damping => format!("{si:.3}"),
        None => format!("{si:.1} Hz"),
        Some(quantity) => text_from_si(si, units.unit(quantity), DIGITS),
    }
}

fn axis_value(variable: Variable, si: f64, units: UnitSystem) -> String {
    text_from_si(si, units.unit(variable.quantity()), DIGITS)
}

fn extremes(map: &OperatingMap, units: UnitSystem) -> String {
    let mut table = TextTable::new(vec![
        Column::left("layer"),
        Column::right("least"),
        Column::left("at"),
        Column::right("most"),
        Column::left("at"),
    ]);
    for layer in Layer::ALL {
        let values = map
            .cells()
            .map(|(x, y, cell)| (x, y, layer.value(cell)))
            .filter(|(_, _, value)| value.is_finite());
        let place = |(x, y, _): &(f64, f64, f64)| {
            format!(
                "{}, {}",
                axis_value(map.spec.x.variable, *x, units),
                axis_value(map.spec.y.variable, *y, units)
            )
        };
        let least = values.clone().min_by(|a, b| a.2.total_cmp(&b.2));
        let most = values.max_by(|a, b| a.2.total_cmp(&b.2));
        let (Some(least), Some(most)) = (least, most) else {
            continue;
        };
        table.push([
            layer.label().to_owned(),
            layer_value(layer, least.2, units),
            place(&least),
            layer_value(layer, most.2, units),
            place(&most),
        ]);
    }
    table.to_text(width())
}

/// A few rows and columns of one layer, the highest row first.
fn excerpt(map: &OperatingMap, layer: Layer, units: UnitSystem) -> String {
    let (columns, rows) = (picked(map.xs.len()), picked(map.ys.len()));
    let mut heads = vec![Column::right(map.spec.y.variable.label())];
    for &x in &columns {
        heads.push(Column::right(axis_value(
            map.spec.x.variable,
            map.xs[x],
            units,
        )));
    }
    let mut table = TextTable::new(heads);
    for &y in rows.iter().rev() {
        let mut row = vec![axis_value(map.spec.y.variable, map.ys[y], units)];
        for &x in &columns {
            let cell = map.spots[map.index(x, y)].cell();
            row.push(cell.map_or_else(
                || "none".to_owned(),
                |cell| layer_value(layer, layer.value(cell), units),
            ));
        }
        table.push(row);
    }
    table.to_text(width())
}

/// A few of `count` places, the first and the last among them.
fn picked(count: usize) -> Vec<usize> {
    let shown = count.min(SHOWN);
    (0..shown).map(|i| i * (count - 1) / (shown - 1)).collect()
}

/// Every layer, one row a place.
pub(crate) fn csv(file: &Path, map: &OperatingMap, units: UnitSystem) -> Result<(), Failure> {
    let word = |text: &str| text.replace(['-', '.'], "_");
    let axis = |variable: Variable| {
        column_heading(&word(variable.name()), units.unit(variable.quantity()))
    };
    let mut heads = vec![axis(map.spec.x.variable), axis(map.spec.y.variable)];
    heads.extend(Layer::ALL.iter().map(|&layer| match unit(layer, units) {
        None if layer == Layer::Frequency => format!("{}_Hz", word(layer.name())),
        None => word(layer.name()),
        Some(unit) => column_heading(&word(layer.name()), unit),
    }));
    heads.extend(["growth_per_s", "stable", "several"].map(str::to_owned));
    let (x_unit, y_unit) = (
        units.unit(map.spec.x.variable.quantity()),
        units.unit(map.spec.y.variable.quantity()),
    );
    let rows = map.spots.iter().enumerate().map(|(at, spot)| {
        let (x, y) = (at % map.xs.len(), at / map.xs.len());
        let mut row = vec![
            x_unit.value_from_si(map.xs[x]),
            y_unit.value_from_si(map.ys[y]),
        ];
        let cell = spot.cell();
        row.extend(Layer::ALL.iter().map(|&layer| {
            let si = cell.map_or(f64::NAN, |cell| layer.value(cell));
            unit(layer, units).map_or(si, |unit| unit.value_from_si(si))
        }));
        let flag = |on: bool| f64::from(u8::from(on));
        row.push(cell.map_or(f64::NAN, |cell| cell.growth));
        row.push(cell.map_or(f64::NAN, |cell| flag(cell.stable)));
        row.push(cell.map_or(f64::NAN, |cell| flag(cell.several)));
        row
    });
    write_table(file, &heads, rows)
}

/// The unit that a layer is written in; `None` for plain ratios of damping and for hertz.
pub(crate) fn unit(
    layer: Layer,
    units: UnitSystem,
) -> Option<&'static helmsplit_scenario::units::Unit> {
    match layer.quantity() {
        Some(Quantity::Ratio) if layer == Layer::Damping => None,
        quantity => quantity.map(|quantity| units.unit(quantity)),
    }
}
