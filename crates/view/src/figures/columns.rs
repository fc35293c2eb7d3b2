//! From columns of a trace to lines in display units: the one conversion out.

use helmsplit_model::Quantity;
use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::units::Unit;
use helmsplit_sim::{Table, Trace};

use crate::plot::{Panel, Series, ValueRange};
use crate::style::{Dash, Meaning};
use crate::unit_text::unit_text;

/// Changes below this share of the values are the solver's, not the user's.
const CONSTANT: f64 = 1e-9;

/// The columns of one trace.
pub(super) struct Columns<'a> {
    trace: &'a Trace,
    table: Option<&'a Table>,
    units: UnitSystem,
}

impl<'a> Columns<'a> {
    /// Columns on the solver's steps or, if those were not kept, on the output grid.
    pub(super) fn new(trace: &'a Trace, units: UnitSystem) -> Self {
        let table = match trace.steps() {
            steps if steps.is_empty() => trace.grid(),
            steps => Some(steps),
        };
        Self {
            trace,
            table,
            units,
        }
    }

    /// The unit that a kind of quantity is shown in.
    pub(super) fn unit(&self, quantity: Quantity) -> &'static Unit {
        self.units.unit(quantity)
    }

    /// A state or signal by its short name, in its display unit; `None` if the circuit has none.
    pub(super) fn points(&self, name: &str) -> Option<Vec<[f64; 2]>> {
        let position = self.trace.position(name)?;
        let unit = self.unit(self.trace.columns()[position].quantity);
        let column = self.table?.column(position);
        let points = column.points();
        Some(points.map(|(t, si)| [t, unit.value_from_si(si)]).collect())
    }

    /// The largest size of a column, SI; 0 if there is none.
    pub(super) fn largest(&self, name: &str) -> f64 {
        let position = self.trace.position(name);
        let extreme = position.and_then(|position| self.trace.extreme(position));
        extreme.map_or(0.0, |extreme| extreme.min.abs().max(extreme.max.abs()))
    }

    /// The one value that a column keeps, SI; `None` if it changes or there is none.
    pub(super) fn constant(&self, name: &str) -> Option<f64> {
        let extreme = self.trace.extreme(self.trace.position(name)?)?;
        let size = extreme.min.abs().max(extreme.max.abs());
        (extreme.max - extreme.min <= size * CONSTANT).then_some(extreme.max)
    }

    /// A line, if the circuit has it.
    pub(super) fn series(&self, label: &str, meaning: Meaning, name: &str) -> Option<Series> {
        let points = self.points(name)?;
        let column = Some(name.to_owned());
        Some(Series {
            column,
            ..Series::new(label, meaning, points)
        })
    }

    /// The size of a column without its sign.
    pub(super) fn size(&self, label: &str, meaning: Meaning, name: &str) -> Option<Series> {
        let mut series = self.series(label, meaning, name)?;
        for point in &mut series.points {
            point[1] = point[1].abs();
        }
        Some(series)
    }

    /// A panel with one solid line that has the panel's name, if the circuit has it; zero is in
    /// view.
    pub(super) fn single(&self, label: &str, meaning: Meaning, name: &str) -> Option<Panel> {
        let series = self.series(label, meaning, name)?.dashed(Dash::Solid);
        let quantity = self.trace.columns()[self.trace.position(name)?].quantity;
        Some(self.panel(label, quantity, vec![series]))
    }

    /// A panel with zero in view.
    pub(super) fn panel(&self, label: &str, quantity: Quantity, series: Vec<Series>) -> Panel {
        Panel {
            series,
            range: ValueRange::Including(0.0, 0.0),
            ..Panel::new(label, unit_text(self.unit(quantity)))
        }
    }
}
