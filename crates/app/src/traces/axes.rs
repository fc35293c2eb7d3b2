//! Grid, limits, events, lines and the cursor.

use egui::{Align2, FontId, Painter, Pos2, Rect, Shape, Stroke, Ui, pos2};
use helmsplit_view::plot::{Axis, Limit, Where};
use helmsplit_view::style::Fill;

use super::drawn::{Drawn, DrawnPanel};
use super::view::TraceView;
use super::{Shown, TOP};
use crate::look::{SMALL, egui_colour, egui_wash};
use crate::text::on_screen;

/// Names of limits closer than this to one another are left out; the line stays.
const NAME_HEIGHT: f32 = 11.0;

/// Paints everything but the cursor.
pub(super) fn paint(ui: &Ui, shown: &Shown<'_>, drawn: &Drawn, focused: bool) {
    let painter = ui.painter();
    let ground = egui_colour(shown.look.theme.background);
    for panel in &drawn.panels {
        painter.rect_filled(panel.rect, 0.0, ground);
        grid(painter, shown, drawn, panel);
        if let Some(axis) = &panel.axis {
            let limits = &shown.figure.panels[panel.place].limits;
            paint_limits(painter, shown, limits, axis, panel.rect);
        }
        let clipped = painter.with_clip_rect(panel.rect.expand(1.0).intersect(ui.clip_rect()));
        clipped.extend(panel.shapes.iter().cloned());
        if let Some(axis) = &panel.axis {
            let limits = &shown.figure.panels[panel.place].limits;
            limit_names(painter, shown, limits, axis, panel.rect);
        }
    }
    time_axis(painter, shown, drawn);
    marks(painter, shown, drawn);
    if let Some(last) = drawn.panels.last().filter(|_| focused) {
        let foot = Stroke::new(2.5, shown.look.accent());
        painter.hline(last.rect.x_range(), last.rect.bottom(), foot);
    }
}

fn grid(painter: &Painter, shown: &Shown<'_>, drawn: &Drawn, panel: &DrawnPanel) {
    let theme = &shown.look.theme;
    let rule = theme.strokes.rule as f32;
    let (grid, zero) = (
        Stroke::new(rule, egui_colour(theme.rules.grid)),
        Stroke::new(rule, egui_colour(theme.rules.zero)),
    );
    let rect = panel.rect;
    for &time in &drawn.time.ticks.major {
        painter.vline(drawn.time.position(time) as f32, rect.y_range(), grid);
    }
    if let Some(axis) = &panel.axis {
        for &value in &axis.ticks.major {
            let y = axis.position(value) as f32;
            let stroke = if value.abs() < axis.ticks.step * 1e-6 {
                zero
            } else {
                grid
            };
            painter.hline(rect.x_range(), y, stroke);
            painter.text(
                pos2(rect.left() - 6.0, y),
                Align2::RIGHT_CENTER,
                on_screen(&axis.ticks.label(value)),
                FontId::proportional(SMALL),
                shown.look.quiet(),
            );
        }
    }
    painter.vline(rect.left(), rect.y_range(), zero);
}

/// Where the line of a limit lies, or the middle of its band; `None` out of view.
fn height_of(limit: &Limit, axis: &Axis) -> Option<f32> {
    match limit.at {
        Where::Line(value) if axis.contains(value) => Some(axis.position(value) as f32),
        Where::Band(low, high) if low < axis.high && high > axis.low => {
            let (top, bottom) = (high.min(axis.high), low.max(axis.low));
            Some(f64::midpoint(axis.position(top), axis.position(bottom)) as f32)
        }
        _ => None,
    }
}

fn paint_limits(painter: &Painter, shown: &Shown<'_>, limits: &[Limit], axis: &Axis, rect: Rect) {
    let theme = &shown.look.theme;
    let stroke = Stroke::new(theme.strokes.limit as f32, egui_colour(theme.rules.limit));
    for limit in limits {
        let Some(y) = height_of(limit, axis) else {
            continue;
        };
        match limit.at {
            Where::Line(_) => {
                let ends = [pos2(rect.left(), y), pos2(rect.right(), y)];
                painter.extend(Shape::dashed_line(&ends, stroke, 6.0, 4.0));
            }
            Where::Band(low, high) => {
                let top = axis.position(high.min(axis.high)) as f32;
                let bottom = axis.position(low.max(axis.low)) as f32;
                let band = Rect::from_min_max(pos2(rect.left(), top), pos2(rect.right(), bottom));
                painter.rect_filled(band, 0.0, egui_wash(theme.wash(Fill::Band)));
            }
        }
    }
}

/// Names of limits over the lines, on a ground of their own.
fn limit_names(painter: &Painter, shown: &Shown<'_>, limits: &[Limit], axis: &Axis, rect: Rect) {
    let ground = egui_colour(shown.look.theme.background).gamma_multiply(0.8);
    let mut names: Vec<f32> = Vec::new();
    for limit in limits {
        let Some(at) = height_of(limit, axis) else {
            continue;
        };
        let galley = painter.layout_no_wrap(
            limit.label.clone(),
            FontId::proportional(SMALL),
            shown.look.quiet(),
        );
        // Above the line, in the middle of a band; below the line where above is outside.
        let top = match limit.at {
            Where::Band(..) => at - NAME_HEIGHT / 2.0,
            Where::Line(_) if at - NAME_HEIGHT < rect.top() => at + 1.0,
            Where::Line(_) => at - NAME_HEIGHT - 2.0,
        };
        if names.iter().any(|other| (other - top).abs() < NAME_HEIGHT) {
            continue;
        }
        names.push(top);
        let left = rect.right() - 4.0 - galley.size().x;
        let place = Rect::from_min_size(pos2(left, top), galley.size());
        painter.rect_filled(place, 0.0, ground);
        painter.galley(place.min, galley, shown.look.quiet());
    }
}

fn time_axis(painter: &Painter, shown: &Shown<'_>, drawn: &Drawn) {
    let Some(last) = drawn.panels.last() else {
        return;
    };
    let y = last.rect.bottom();
    let frame = Stroke::new(1.0, egui_colour(shown.look.theme.rules.frame));
    painter.hline(last.rect.x_range(), y, frame);
    let font = FontId::proportional(SMALL);
    let quiet = shown.look.quiet();
    for &time in &drawn.time.ticks.major {
        let x = drawn.time.position(time) as f32;
        let label = on_screen(&drawn.time.ticks.label(time));
        painter.text(
            pos2(x, y + 4.0),
            Align2::CENTER_TOP,
            label,
            font.clone(),
            quiet,
        );
    }
    let text = format!("{} ({})", shown.figure.time.label, shown.figure.time.unit);
    let at = pos2(last.rect.right() + 16.0, y + 4.0);
    painter.text(at, Align2::LEFT_TOP, text, font, quiet);
}

/// Events: a line through all panels, a name where there is room for it.
fn marks(painter: &Painter, shown: &Shown<'_>, drawn: &Drawn) {
    let plot = drawn.key.plot;
    let Some(last) = drawn.panels.last() else {
        return;
    };
    let theme = &shown.look.theme;
    let stroke = Stroke::new(theme.strokes.mark as f32, egui_colour(theme.rules.mark));
    let mut free_from = plot.left();
    for mark in &shown.figure.marks {
        if !drawn.time.contains(mark.time) {
            continue;
        }
        let x = drawn.time.position(mark.time) as f32;
        let ends = [pos2(x, plot.top() + TOP - 3.0), pos2(x, last.rect.bottom())];
        painter.extend(Shape::dashed_line(&ends, stroke, 2.0, 3.0));
        let galley = painter.layout_no_wrap(
            mark.label.clone(),
            FontId::proportional(SMALL),
            shown.look.quiet(),
        );
        let left = (x - galley.size().x / 2.0).clamp(
            plot.left(),
            (plot.right() - galley.size().x).max(plot.left()),
        );
        if left >= free_from {
            free_from = left + galley.size().x + 8.0;
            painter.galley(pos2(left, plot.top()), galley, shown.look.quiet());
        }
    }
}

/// Paints the cursor, and the stretch being marked.
pub(super) fn paint_cursor(ui: &Ui, shown: &Shown<'_>, drawn: &Drawn, view: &TraceView) {
    let painter = ui.painter();
    let Some(last) = drawn.panels.last() else {
        return;
    };
    let (top, bottom) = (drawn.key.plot.top() + TOP, last.rect.bottom());
    if let (Some(begun), Some(pointer)) = (view.selecting, ui.input(|i| i.pointer.latest_pos())) {
        let x = drawn.time.position(begun) as f32;
        let end = pointer
            .x
            .clamp(drawn.key.plot.left(), drawn.key.plot.right());
        let stretch = Rect::from_two_pos(pos2(x, top), pos2(end, bottom));
        painter.rect_filled(stretch, 0.0, shown.look.accent().gamma_multiply(0.18));
    }
    if !drawn.time.contains(view.cursor) {
        return;
    }
    let x = drawn.time.position(view.cursor) as f32;
    painter.vline(x, top..=bottom, Stroke::new(1.2, shown.look.accent()));
    for panel in &drawn.panels {
        let Some(axis) = &panel.axis else { continue };
        for series in &shown.figure.panels[panel.place].series {
            let value = super::readout::value_at(&series.points, view.cursor);
            if let Some(value) = value.filter(|value| axis.contains(*value)) {
                let at: Pos2 = pos2(x, axis.position(value) as f32);
                let colour = egui_colour(shown.look.theme.series_colour(series.meaning));
                painter.circle_filled(at, 2.5, colour);
            }
        }
    }
}
