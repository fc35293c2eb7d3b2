//! The strip under the traces.

use egui::{Frame, Panel, Rect, Ui, pos2};
use egui_plot::{PlotBounds, PlotTransform};
use helmsplit_view::plot::Axis;

use super::bars::bars;
use super::ground;
use super::handles::handles;
use super::head::{HEAD, head};
use super::lines::{Names, names};
use super::plot::{draw, numbers, pale_lines};
use super::stage::{Stage, plot_rect, row_and_unit, value_axis};
use super::state::{ListStates, lines_of};
use crate::action::Action;
use crate::quantity_field::{FieldContext, FieldStates};
use crate::traces::TraceView;

/// Height at first, and least and greatest one, points.
const HEIGHT: f32 = 146.0;
const HEIGHTS: std::ops::RangeInclusive<f32> = 104.0..=460.0;

/// Height of the bars of templates, points.
const BARS: f32 = 17.0;

/// Room above a line without templates, points.
const NO_BARS: f32 = 6.0;

/// Room for the numbers of the value axis and for names, where no traces give it, points.
const LEFT: f32 = 52.0;
const RIGHT: f32 = 216.0;

/// Narrowest plot, points.
const LEAST_WIDTH: f32 = 60.0;

/// Between ticks on the time axis, points, where no traces give them.
const TIME_SPACING: f64 = 84.0;

/// Keeps room for the strip at the foot of `ui`.
pub(crate) fn reserve(ui: &mut Ui, states: &ListStates) -> Rect {
    // Another id, so that the height comes back with the strip.
    let panel = if states.folded {
        Panel::bottom("folded manoeuvre")
            .resizable(false)
            .exact_size(HEAD)
    } else {
        Panel::bottom("manoeuvre strip")
            .resizable(true)
            .default_size(HEIGHT)
            .size_range(HEIGHTS)
    };
    panel
        .frame(Frame::NONE)
        .show(ui, |ui| {
            let rect = ui.available_rect_before_wrap();
            ui.allocate_space(rect.size());
            rect
        })
        .inner
}

/// Draws the strip into the room kept for it, after the traces, whose time axis it shares.
/// `whole` is the whole run of the traces, s.
pub(crate) fn strip(
    ui: &mut Ui,
    (rect, whole): (Rect, Option<(f64, f64)>),
    context: &FieldContext<'_>,
    states: &mut FieldStates,
    view: &mut TraceView,
    actions: &mut Vec<Action>,
) {
    let shown = lines_of(context.scenario);
    let chosen = states.lists.line_of(&shown);
    let top = Rect::from_min_max(rect.min, pos2(rect.right(), rect.top() + HEAD));
    head(ui, top, context, chosen, view.cursor, states, actions);
    if states.lists.folded {
        return;
    }
    let body = Rect::from_min_max(pos2(rect.left(), top.bottom()), rect.max);
    let end = context.scenario.solver().duration;
    let whole = whole.unwrap_or((0.0, end));
    let drawn = view.time_axis().cloned();
    let time = drawn.unwrap_or_else(|| own_axis(body, end));
    let ends = (time.start as f32, time.end as f32);
    if ends.1 - ends.0 < LEAST_WIDTH {
        return;
    }
    let lists = &mut states.lists;
    let (row, unit) = row_and_unit(chosen, context.units);
    let line = context.scenario.manoeuvre.line(row).ok();
    let written = line.as_ref().is_some_and(|line| !line.spans().is_empty());
    let plot = plot_rect(body, ends, if written { BARS } else { NO_BARS });
    let held = lists.drag.map(|drag| drag.axis);
    let value = value_axis(line.as_ref(), row, unit, plot, held);
    let bounds = PlotBounds::from_min_max([time.low, value.low], [time.high, value.high]);
    let mut stage = Stage {
        scenario: context.scenario,
        row,
        unit,
        line,
        rect: plot,
        whole,
        transform: PlotTransform::new(plot, bounds, false),
        time,
        value,
    };
    let pale = pale_lines(&stage, &shown);
    let (response, transform) = draw(ui, &stage, &pale, view.cursor, context.look);
    stage.transform = transform;
    numbers(ui, &stage, context.look);
    let over = Rect::from_min_max(pos2(ends.0, body.top()), pos2(ends.1, plot.top()));
    bars(ui, &stage, over, lists, context.look, actions);
    handles(ui, &stage, lists, context.look, actions);
    ground::take(ui, &stage, &pale, &response, lists, view, actions);
    let side = Rect::from_min_max(
        pos2(ends.1 + 12.0, body.top()),
        pos2(rect.right(), plot.bottom()),
    );
    let list = Names {
        scenario: context.scenario,
        units: context.units,
        look: context.look,
        shown: &shown,
        chosen,
        cursor: view.cursor,
    };
    names(ui, side, &list, lists);
}

/// The time axis before there are traces.
fn own_axis(body: Rect, end: f64) -> Axis {
    let ends = (
        f64::from(body.left() + LEFT),
        f64::from(body.right() - RIGHT),
    );
    Axis::new((0.0, end), ends, TIME_SPACING)
}
