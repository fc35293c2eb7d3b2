//! What is selected, pointed at, reached by keyboard, or wrong: shown by shape as well as by colour.

use egui::{Align2, FontId, Painter, Pos2, Rect, Shape, Stroke, StrokeKind, pos2, vec2};
use helmsplit_scenario::Severity;
use helmsplit_view::scene::Scene;

use super::canvas::Drawn;
use super::names::section_of;
use super::sheet::Sheet;
use crate::look::{Look, SMALL};
use crate::parts::Part;

/// Width of the glow along lines, points.
const GLOW: f32 = 9.0;

/// Length of a corner of the mark around a part, points.
const CORNER: f32 = 8.0;

/// Space between a part and its mark, points.
const SPACE: f32 = 4.0;

/// Glows under what is pointed at, by its index, and under the parts of the selected card.
pub(super) fn under(
    painter: &Painter,
    sheet: &Sheet,
    scene: &Scene,
    (pointed, selected): (Option<usize>, Option<Part>),
    look: &Look,
) {
    let is_selected =
        |index: usize| selected.is_some() && section_of(&scene.parts[index].id) == selected;
    for &(index, [from, to]) in &sheet.painted.pieces {
        let colour = if is_selected(index) {
            look.accent().gamma_multiply(0.28)
        } else if pointed == Some(index) {
            look.hover()
        } else {
            continue;
        };
        // Not blended where pieces meet, so that joints do not stand out.
        let ground = crate::look::egui_colour(look.theme.background);
        let opaque = ground.blend(colour);
        painter.line_segment([from, to], Stroke::new(GLOW, opaque));
        painter.circle_filled(to, 0.5 * GLOW, opaque);
    }
}

/// Corners around the selected parts, a frame around the one with the focus, words at what is
/// wrong.
pub(super) fn over(
    painter: &Painter,
    sheet: &Sheet,
    (focused, selected): (Option<&str>, Option<Part>),
    drawn: &Drawn<'_>,
) {
    let look = drawn.look;
    for control in &sheet.controls {
        let section = section_of(&control.part_id);
        let frame = control.frame.expand(SPACE);
        if selected.is_some() && section == selected && !is_line(&control.part_id) {
            corners(painter, frame, Stroke::new(1.5, look.accent()));
        }
        if focused == Some(control.part_id.as_str()) {
            focus_frame(painter, frame.expand(1.0), look);
        }
    }
    let mut told: Vec<Part> = Vec::new();
    for control in &sheet.controls {
        let Some(section) = section_of(&control.part_id) else {
            continue;
        };
        if selected.is_none() || told.contains(&section) {
            continue;
        }
        let own = drawn.findings.iter();
        let own = own.filter(|finding| Part::of(&finding.path) == Some(section));
        if let Some(worst) = own.map(|finding| finding.severity).max() {
            told.push(section);
            remark(painter, control.frame.right_top(), worst, look);
        }
    }
}

/// Lines are marked by their glow alone: their frames would run through other parts.
fn is_line(id: &str) -> bool {
    ["inlet", "line", "excess_port", "return_line"].contains(&id)
}

/// A frame around what has the focus.
pub(super) fn focus_frame(painter: &Painter, frame: Rect, look: &Look) {
    let stroke = Stroke::new(2.0, look.accent());
    painter.rect_stroke(frame, 2.0, stroke, StrokeKind::Inside);
}

fn corners(painter: &Painter, frame: Rect, stroke: Stroke) {
    let length = CORNER.min(0.4 * frame.width()).min(0.4 * frame.height());
    for (corner, x, y) in [
        (frame.left_top(), 1.0, 1.0),
        (frame.right_top(), -1.0, 1.0),
        (frame.left_bottom(), 1.0, -1.0),
        (frame.right_bottom(), -1.0, -1.0),
    ] {
        let points = vec![
            corner + vec2(x * length, 0.0),
            corner,
            corner + vec2(0.0, y * length),
        ];
        painter.add(Shape::line(points, stroke));
    }
}

fn remark(painter: &Painter, at: Pos2, severity: Severity, look: &Look) {
    let (word, colour) = match severity {
        Severity::Error => ("error", look.error()),
        Severity::Warning => ("note", look.warning()),
    };
    let galley = painter.layout_no_wrap(word.to_owned(), FontId::proportional(SMALL), colour);
    let size = galley.size() + vec2(6.0, 0.0);
    let clip = painter.clip_rect();
    let right = (at.x + size.x).min(clip.right() - 2.0);
    let top = (at.y - size.y).max(clip.top() + 2.0);
    let frame = Rect::from_min_size(pos2(right - size.x, top), size);
    painter.rect_filled(frame, 2.0, crate::look::egui_colour(look.theme.background));
    painter.rect_stroke(frame, 2.0, Stroke::new(1.0, colour), StrokeKind::Inside);
    let place = Align2::CENTER_CENTER.anchor_size(frame.center(), galley.size());
    painter.galley(place.min, galley, colour);
}
