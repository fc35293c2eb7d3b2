//! The two cursors, the stretch being marked, and what the evidence points at.

use egui::{Align2, FontId, Painter, Pos2, Rect, Shape, Stroke, StrokeKind, Ui, pos2, vec2};
use helmsplit_view::plot::Frame;

use super::Shown;
use super::drawn::{Drawn, DrawnPanel};
use super::reading::value_at;
use super::view::TraceView;
use crate::look::{SMALL, egui_colour};

/// Size of the flag of a cursor, points.
const FLAG: egui::Vec2 = vec2(12.0, 12.0);

/// Half the size of the marker of the evidence, points.
const MARKER: f32 = 5.0;

/// Paints the cursors over the traces.
pub(super) fn paint(ui: &Ui, shown: &Shown<'_>, drawn: &Drawn, view: &TraceView) {
    let painter = ui.painter();
    let Some(last) = drawn.panels.last() else {
        return;
    };
    let (top, bottom) = (drawn.key.top, last.rect.bottom());
    if let (Some(begun), Some(pointer)) = (view.selecting, ui.input(|i| i.pointer.latest_pos())) {
        let x = drawn.time.position(begun) as f32;
        let end = pointer
            .x
            .clamp(drawn.key.plot.left(), drawn.key.plot.right());
        let stretch = Rect::from_two_pos(pos2(x, top), pos2(end, bottom));
        painter.rect_filled(stretch, 0.0, shown.look.accent().gamma_multiply(0.18));
    }
    let accent = shown.look.accent();
    if let Some(time) = view.second.filter(|time| drawn.time.contains(*time)) {
        let x = drawn.time.position(time) as f32;
        let ends = [pos2(x, top), pos2(x, bottom)];
        painter.extend(Shape::dashed_line(
            &ends,
            Stroke::new(1.2, accent),
            5.0,
            3.0,
        ));
        flag(painter, shown, x, bottom, "B");
        dots(painter, shown, drawn, view, time);
    }
    if drawn.time.contains(view.cursor) {
        let x = drawn.time.position(view.cursor) as f32;
        painter.vline(x, top..=bottom, Stroke::new(1.2, accent));
        flag(painter, shown, x, bottom, "A");
        dots(painter, shown, drawn, view, view.cursor);
    }
}

/// The letter of a cursor, below its line.
fn flag(painter: &Painter, shown: &Shown<'_>, x: f32, bottom: f32, letter: &str) {
    let ground = Rect::from_center_size(pos2(x, bottom + FLAG.y / 2.0), FLAG);
    painter.rect_filled(ground, 2.0, shown.look.accent());
    painter.text(
        ground.center(),
        Align2::CENTER_CENTER,
        letter,
        FontId::proportional(SMALL),
        shown.look.on_accent(),
    );
}

/// A dot where each line meets a cursor.
fn dots(painter: &Painter, shown: &Shown<'_>, drawn: &Drawn, view: &TraceView, time: f64) {
    let x = drawn.time.position(time) as f32;
    for panel in &drawn.panels {
        let Some(axis) = &panel.axis else { continue };
        let of = &shown.figure.panels[panel.place];
        for line in view.arrangement.lines(of) {
            let series = &of.series[line];
            let value = value_at(&series.points, time);
            if let Some(value) = value.filter(|value| axis.contains(*value)) {
                let at = pos2(x, axis.position(value) as f32);
                let colour = egui_colour(shown.look.theme.series_colour(series.meaning));
                painter.circle_filled(at, 2.5, colour);
            }
        }
    }
}

/// Paints the stretch and the marker of the evidence.
pub(super) fn evidence(ui: &Ui, shown: &Shown<'_>, drawn: &Drawn) {
    let Some(marks) = shown.evidence else { return };
    let panel = drawn
        .panels
        .iter()
        .find(|panel| shown.figure.panels[panel.place].label == marks.panel);
    let Some(panel) = panel else { return };
    let painter = ui
        .painter()
        .with_clip_rect(panel.rect.expand(1.0).intersect(ui.clip_rect()));
    if let Some((from, to)) = marks.stretch {
        let x = |time: f64| drawn.time.position(time) as f32;
        let stretch = Rect::from_min_max(
            pos2(x(from), panel.rect.top()),
            pos2(x(to).max(x(from) + 1.0), panel.rect.bottom()),
        );
        painter.rect_filled(stretch, 0.0, shown.look.ink().gamma_multiply(0.10));
    }
    if let (Some(axis), Some((time, value))) = (&panel.axis, marks.point)
        && drawn.time.contains(time)
        && axis.contains(value)
    {
        let at = pos2(
            drawn.time.position(time) as f32,
            axis.position(value) as f32,
        );
        marker(&painter, shown, &marks.text, at, panel);
    }
}

/// A hollow square with the figure beside it, where it fits and hides no name.
fn marker(painter: &Painter, shown: &Shown<'_>, text: &str, at: Pos2, panel: &DrawnPanel) {
    let ink = shown.look.ink();
    let square = Rect::from_center_size(at, vec2(2.0 * MARKER, 2.0 * MARKER));
    painter.rect_stroke(square, 0.0, Stroke::new(1.6, ink), StrokeKind::Middle);
    let font = FontId::proportional(SMALL);
    let galley = painter.layout_no_wrap(text.to_owned(), font, ink);
    let size = galley.size();
    let away = MARKER + 4.0;
    let (right, left) = (at.x + away, at.x - away - size.x);
    let (above, below) = (at.y - away - size.y, at.y + away);
    let middle = at.y - size.y / 2.0;
    let corners = [
        pos2(right, middle),
        pos2(left, middle),
        pos2(right, above),
        pos2(right, below),
        pos2(left, above),
        pos2(left, below),
    ];
    let places = corners.map(|corner| Rect::from_min_size(corner, size));
    let names = || panel.names.iter().flatten().map(|name| name.frame);
    let is_free = |place: &&Rect| {
        let frame = Frame {
            left: f64::from(place.left()),
            right: f64::from(place.right()),
            top: f64::from(place.top()),
            bottom: f64::from(place.bottom()),
        };
        panel.rect.contains_rect(**place) && !names().any(|name| name.meets(&frame))
    };
    let free = places.iter().find(is_free);
    let fits = || {
        places
            .iter()
            .find(|place| panel.rect.contains_rect(**place))
    };
    let ground = free.or_else(fits).unwrap_or(&places[0]);
    painter.rect_filled(
        ground.expand(1.0),
        2.0,
        shown.look.ground().gamma_multiply(0.85),
    );
    painter.galley(ground.min, galley, ink);
}
