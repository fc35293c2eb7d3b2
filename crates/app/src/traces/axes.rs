//! Grid, limits, lines and the time axis.

use egui::{Align2, FontId, Painter, Rect, Shape, Stroke, Ui, pos2};
use helmsplit_view::plot::{Axis, Limit, Where};
use helmsplit_view::style::Fill;

use super::drawn::{Drawn, DrawnPanel};
use super::{LIMIT_DASH, Shown, kept_lines};
use crate::look::{SMALL, egui_colour, egui_wash};
use crate::text::on_screen;

/// Below the baseline of a name, points.
const DESCENT: f32 = 2.5;

/// Paints everything but events and cursors.
pub(super) fn paint(ui: &Ui, shown: &Shown<'_>, drawn: &Drawn, focused: bool) {
    let painter = ui.painter();
    for panel in &drawn.panels {
        painter.rect_filled(panel.rect, 0.0, shown.look.ground());
        grid(painter, shown, drawn, panel);
        let clipped = painter.with_clip_rect(panel.rect.expand(1.0).intersect(ui.clip_rect()));
        if let Some(axis) = &panel.axis {
            for (limit, evidence) in &panel.limits {
                paint_limit(&clipped, shown, limit, *evidence, axis, panel.rect);
            }
        }
        clipped.extend(panel.shapes.iter().cloned());
        kept_lines::paint(&clipped, &panel.tags, shown.look);
        limit_names(painter, shown, panel);
    }
    time_axis(painter, shown, drawn);
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
    } else {
        painter.text(
            rect.center(),
            Align2::CENTER_CENTER,
            "No values to show",
            FontId::proportional(SMALL),
            shown.look.quiet(),
        );
    }
    painter.vline(rect.left(), rect.y_range(), zero);
}

fn paint_limit(
    painter: &Painter,
    shown: &Shown<'_>,
    limit: &Limit,
    evidence: bool,
    axis: &Axis,
    rect: Rect,
) {
    let theme = &shown.look.theme;
    let width = theme.strokes.limit as f32;
    let stroke = if evidence {
        Stroke::new(width * 1.6, shown.look.ink())
    } else {
        Stroke::new(width, egui_colour(theme.rules.limit))
    };
    match limit.at {
        Where::Line(value) if axis.contains(value) => {
            let y = axis.position(value) as f32;
            let ends = [pos2(rect.left(), y), pos2(rect.right(), y)];
            let [line, gap] = LIMIT_DASH;
            painter.extend(Shape::dashed_line(&ends, stroke, line, gap));
        }
        Where::Band(low, high) if low < axis.high && high > axis.low => {
            let top = axis.position(high.min(axis.high)) as f32;
            let bottom = axis.position(low.max(axis.low)) as f32;
            let band = Rect::from_min_max(pos2(rect.left(), top), pos2(rect.right(), bottom));
            painter.rect_filled(band, 0.0, egui_wash(theme.wash(Fill::Band)));
        }
        Where::Line(_) | Where::Band(..) => {}
    }
}

/// Names of limits beside their lines, on a ground of their own.
fn limit_names(painter: &Painter, shown: &Shown<'_>, panel: &DrawnPanel) {
    let ground = shown.look.ground().gamma_multiply(0.8);
    for ((limit, evidence), name) in panel.limits.iter().zip(&panel.names) {
        let Some(name) = name else { continue };
        let colour = if *evidence {
            shown.look.ink()
        } else {
            shown.look.quiet()
        };
        let font = FontId::proportional(SMALL);
        let galley = painter.layout_no_wrap(limit.label.clone(), font, colour);
        let foot = name.at.1 as f32 + DESCENT;
        let corner = pos2(name.at.0 as f32, foot - galley.size().y);
        painter.rect_filled(Rect::from_min_size(corner, galley.size()), 0.0, ground);
        painter.galley(corner, galley, colour);
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
