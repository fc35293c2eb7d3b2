//! The chart of one layer of an operating map.

use helmsplit_model::Quantity;
use helmsplit_scenario::units::Unit;
use helmsplit_scenario::{Scenario, UnitSystem};
use helmsplit_study::{Layer, MapEnd, OperatingMap, Spot, Variable};

use super::point::point_text;
use crate::chart::{Chart, ChartAxis, ChartLine, ChartPanel, Field, LineRole};
use crate::plot::Ticks;
use crate::unit_text::unit_text;

/// Height of the map, px.
const HEIGHT: f64 = 460.0;

/// About so many lines of equal value.
const CONTOURS: usize = 9;

/// A number with its unit, or a plain one.
struct Shown {
    unit: Option<&'static Unit>,
    name: String,
}

impl Shown {
    fn of(quantity: Option<Quantity>, units: UnitSystem) -> Self {
        match quantity {
            // The units know no hertz.
            None => Self {
                unit: None,
                name: "Hz".to_owned(),
            },
            Some(quantity) => {
                let unit = units.unit(quantity);
                Self {
                    unit: Some(unit),
                    name: unit_text(unit),
                }
            }
        }
    }

    fn shown(&self, si: f64) -> f64 {
        self.unit.map_or(si, |unit| unit.value_from_si(si))
    }

    fn si(&self, value: f64) -> f64 {
        self.unit.map_or(value, |unit| unit.si_from_value(value))
    }
}

/// One layer of a map: a field of colours with its scale, lines of equal value, and the border
/// beyond which the circuit is not stable.
#[must_use]
pub fn map_chart(
    scenario: &Scenario,
    map: &OperatingMap,
    layer: Layer,
    units: UnitSystem,
) -> Chart {
    // A damping ratio of 0.3 is read as such, not as 30 %.
    let ratio = layer == Layer::Damping;
    let shown = if ratio {
        Shown {
            unit: None,
            name: String::new(),
        }
    } else {
        Shown::of(layer.quantity(), units)
    };
    let axis = |variable: Variable| Shown::of(Some(variable.quantity()), units);
    let (x, y) = (axis(map.spec.x.variable), axis(map.spec.y.variable));
    let named =
        |variable: Variable, shown: &Shown| ChartAxis::linear(variable.label(), shown.name.clone());
    let mut panel = ChartPanel::new(
        named(map.spec.x.variable, &x),
        named(map.spec.y.variable, &y),
        HEIGHT,
    );
    fill_panel(&mut panel, map, layer, (&shown, &x, &y));
    let unit = if shown.name.is_empty() {
        String::new()
    } else {
        format!(", {}", shown.name)
    };
    Chart {
        title: format!("{}: {}{unit}", scenario.name, layer.label().to_lowercase()),
        subtitle: point_text_without_axes(scenario, map, units),
        panels: vec![panel],
        notes: notes(map),
    }
}

/// Colours, lines of equal value and the border; values as `shown`, places as `x` and `y`.
fn fill_panel(
    panel: &mut ChartPanel,
    map: &OperatingMap,
    layer: Layer,
    (shown, x, y): (&Shown, &Shown, &Shown),
) {
    let values: Vec<f64> = map
        .spots
        .iter()
        .map(|spot| {
            spot.cell()
                .map_or(f64::NAN, |cell| shown.shown(layer.value(cell)))
        })
        .collect();
    let range = range_of(&values);
    let levels = Ticks::new(range.0, range.1, CONTOURS);
    let si: Vec<f64> = levels.major.iter().map(|&level| shown.si(level)).collect();
    let place = |&(px, py): &(f64, f64)| [x.shown(px), y.shown(py)];
    for contour in map.contours(layer, &si) {
        panel.lines.push(ChartLine {
            label: levels.label(shown.shown(contour.level)),
            role: LineRole::Contour,
            points: contour.points.iter().map(place).collect(),
        });
    }
    for border in map.stability_border() {
        panel.lines.push(ChartLine {
            label: "border of hunting".to_owned(),
            role: LineRole::Border,
            points: border.points.iter().map(place).collect(),
        });
    }
    panel.field = Some(Field {
        label: layer.label().to_owned(),
        unit: shown.name.clone(),
        xs: map.xs.iter().map(|&v| x.shown(v)).collect(),
        ys: map.ys.iter().map(|&v| y.shown(v)).collect(),
        values,
        range,
    });
}

/// What holds all over the map: the point, of which the axes vary a part.
fn point_text_without_axes(scenario: &Scenario, map: &OperatingMap, units: UnitSystem) -> String {
    let vary = |variable: Variable| variable.label().to_lowercase();
    format!(
        "{}, but for {} and {}",
        point_text(scenario, &map.spec.point, units),
        vary(map.spec.x.variable),
        vary(map.spec.y.variable)
    )
}

fn range_of(values: &[f64]) -> (f64, f64) {
    let finite = values.iter().copied().filter(|v| v.is_finite());
    let (low, high) = finite.fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), v| {
        (low.min(v), high.max(v))
    });
    match high - low {
        span if span > 1e-6 * low.abs().max(high.abs()) => (low, high),
        span if span >= 0.0 => {
            let room = 0.01 * low.abs().max(1e-9);
            (low - room, high + room)
        }
        _ => (0.0, 1.0),
    }
}

fn notes(map: &OperatingMap) -> Vec<String> {
    let mut notes = vec![format!(
        "{} x {} equilibria, dry friction at rest and pump ripple left out; lines of the grid \
         gather where it bends.",
        map.xs.len(),
        map.ys.len()
    )];
    if map.end == MapEnd::Cancelled {
        notes.push("The map was cancelled: blank places were not looked at.".to_owned());
    }
    let failed = map.failed();
    if failed > 0 {
        notes.push(format!("No equilibrium found at {failed} places: blank."));
    }
    let count = |wanted: &dyn Fn(&helmsplit_study::Cell) -> bool| {
        let cells = map.spots.iter().filter_map(Spot::cell);
        cells.filter(|cell| wanted(cell)).count()
    };
    let unstable = count(&|cell| !cell.stable);
    if unstable > 0 {
        notes.push(format!(
            "At {unstable} places the equilibrium is not stable: it hunts, unless dry friction \
             hides it."
        ));
    }
    let several = count(&|cell| cell.several);
    if several > 0 {
        notes.push(format!(
            "At {several} places there are two equilibria: where the circuit came from decides."
        ));
    }
    notes
}
