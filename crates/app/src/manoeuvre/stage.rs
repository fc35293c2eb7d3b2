//! Where a line of the strip is drawn: its axes, and the way from the screen to numbers.

use egui::{Pos2, Rect, pos2};
use egui_plot::{PlotPoint, PlotTransform};
use helmsplit_model::Input;
use helmsplit_scenario::convert::input_unit;
use helmsplit_scenario::manoeuvre::{InputRow, Line, input_row};
use helmsplit_scenario::units::Unit;
use helmsplit_scenario::{Scenario, UnitSystem};
use helmsplit_view::plot::Axis;

use super::snap::Steps;

/// Between numbers on the value axis, points.
const VALUE_SPACING: f64 = 24.0;

/// Room above and below what a line usually spans, as a share of it.
const HEADROOM: f64 = 0.14;

/// Room beyond what is allowed, so that a point at the limit is whole.
const BRINK: f64 = 0.06;

/// One line with its axes.
pub(super) struct Stage<'a> {
    pub(super) scenario: &'a Scenario,
    pub(super) row: &'static InputRow,
    pub(super) unit: &'static Unit,
    /// The line, if it is in order.
    pub(super) line: Option<Line>,
    pub(super) rect: Rect,
    /// The whole run, s.
    pub(super) whole: (f64, f64),
    /// Time, that of the traces, s.
    pub(super) time: Axis,
    /// Value, in the display unit.
    pub(super) value: Axis,
    pub(super) transform: PlotTransform,
}

impl Stage<'_> {
    pub(super) fn input(&self) -> Input {
        self.row.input
    }

    /// The place of a time in s and a value in SI.
    pub(super) fn at(&self, time: f64, si: f64) -> Pos2 {
        let point = PlotPoint::new(time, self.unit.value_from_si(si));
        self.transform.position_from_point(&point)
    }

    /// The time in s and the value in the display unit at a place.
    pub(super) fn numbers_at(&self, at: Pos2) -> (f64, f64) {
        let point = self.transform.value_from_position(at);
        (point.x, point.y)
    }

    pub(super) fn time_steps(&self, snap: bool) -> Steps {
        Steps::new(self.time.high - self.time.low, self.rect.width(), snap)
    }

    pub(super) fn value_steps(&self, snap: bool) -> Steps {
        let span = self.value.high - self.value.low;
        Steps::new(span, self.rect.height(), snap)
    }

    /// Least and greatest value allowed, in the display unit.
    pub(super) fn allowed(&self) -> (f64, f64) {
        let shown = |number: f64| {
            self.unit
                .value_from_si(self.row.unit().si_from_value(number))
        };
        (shown(self.row.allowed.low), shown(self.row.allowed.high))
    }
}

/// The value axis of a line, over `rect`; `held` is its range while a drag lasts.
pub(super) fn value_axis(
    line: Option<&Line>,
    row: &'static InputRow,
    unit: &Unit,
    rect: Rect,
    held: Option<(f64, f64)>,
) -> Axis {
    let range = held.unwrap_or_else(|| value_range(line, row, unit));
    let ends = (f64::from(rect.bottom()), f64::from(rect.top()));
    Axis::new(range, ends, VALUE_SPACING)
}

/// What the axis spans: what the input usually does, and what the line does.
pub(super) fn value_range(line: Option<&Line>, row: &InputRow, unit: &Unit) -> (f64, f64) {
    let own = |number: f64| unit.value_from_si(row.unit().si_from_value(number));
    let (low, high) = usual(row.input);
    let (mut low, mut high) = (own(low), own(high));
    for point in line.map_or(&[][..], Line::points) {
        let value = unit.value_from_si(point.value);
        (low, high) = (low.min(value), high.max(value));
    }
    let span = high - low;
    let least = own(row.allowed.low) - BRINK * span;
    let most = own(row.allowed.high) + BRINK * span;
    let (low, high) = (low - HEADROOM * span, high + HEADROOM * span);
    (low.max(least), high.min(most))
}

/// What an input usually spans, in the unit of its row: room to drag on an empty line.
fn usual(input: Input) -> (f64, f64) {
    match input {
        Input::EngineSpeed => (0.0, 2500.0),
        Input::WheelRate => (-100.0, 100.0),
        Input::ExternalForce => (0.0, 20_000.0),
        Input::BenchArea => (0.0, 100.0),
        Input::BenchPressure | Input::ExcessPressure => (0.0, 150.0),
        Input::ExcessCommand | Input::PriorityCommand => (0.0, 1.0),
    }
}

/// Room for the numbers of the time axis, points.
const FOOT: f32 = 16.0;

/// A line of the strip with its unit on the screen.
pub(super) fn row_and_unit(input: Input, units: UnitSystem) -> (&'static InputRow, &'static Unit) {
    let row = input_row(input);
    (row, input_unit(row, units))
}

/// The plot area between two ends, under the bars of the templates.
pub(super) fn plot_rect(body: Rect, (left, right): (f32, f32), bars: f32) -> Rect {
    let top = body.top() + bars;
    let bottom = (body.bottom() - FOOT).max(top + 10.0);
    Rect::from_min_max(pos2(left, top), pos2(right, bottom))
}
