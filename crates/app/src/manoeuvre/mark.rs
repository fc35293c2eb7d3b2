//! Words on the strip: numbers of a point, and a label beside it.

use egui::{Align2, FontId, Pos2, Rect, Stroke, Ui, vec2};
use helmsplit_model::Quantity;
use helmsplit_scenario::quantity_text::{Digits, number_from_si};
use helmsplit_scenario::units::{Unit, si_unit};

use crate::look::{Look, SMALL};
use crate::text::{real_minus, unit_label};

/// Digits of a number in words.
const DIGITS: u32 = 6;

/// `2.2 s, 80 rpm`, with the least digits that tell the numbers.
pub(super) fn point_text(time: f64, si: f64, unit: &Unit) -> String {
    let second = si_unit(Quantity::Time);
    format!("{}, {}", number_text(time, second), number_text(si, unit))
}

/// A number with its unit.
pub(super) fn number_text(si: f64, unit: &Unit) -> String {
    let number = real_minus(&number_from_si(si, unit, Digits::Significant(DIGITS)));
    match unit_label(unit) {
        symbol if symbol.is_empty() => number,
        symbol => format!("{number} {symbol}"),
    }
}

/// A label beside a place, inside `within`; a limit under it.
pub(super) fn callout(
    ui: &Ui,
    within: Rect,
    at: Pos2,
    text: &str,
    limit: Option<&str>,
    look: &Look,
) {
    let painter = ui.painter();
    let font = FontId::proportional(SMALL);
    let lines = [(Some(text), look.ink()), (limit, look.warning())];
    let galleys: Vec<_> = lines
        .into_iter()
        .filter_map(|(text, colour)| {
            Some(painter.layout_no_wrap(text?.to_owned(), font.clone(), colour))
        })
        .collect();
    let width = galleys.iter().map(|g| g.size().x).fold(0.0, f32::max);
    let height: f32 = galleys.iter().map(|g| g.size().y).sum();
    let size = vec2(width, height) + vec2(10.0, 4.0);
    // To the right of the point and above it, unless that is outside.
    let mut min = at + vec2(9.0, -9.0 - size.y);
    if min.x + size.x > within.right() {
        min.x = at.x - 9.0 - size.x;
    }
    if min.y < within.top() - 14.0 {
        min.y = at.y + 9.0;
    }
    min.x = min.x.max(within.left());
    min.y = min.y.min(within.bottom() - size.y);
    let frame = Rect::from_min_size(min, size);
    painter.rect_filled(frame, 3.0, look.control());
    let stroke = Stroke::new(1.0, look.quiet());
    painter.rect_stroke(frame, 3.0, stroke, egui::StrokeKind::Inside);
    let mut y = frame.top() + 2.0;
    for galley in galleys {
        let place = egui::pos2(frame.left() + 5.0, y);
        y += galley.size().y;
        painter.galley(place, galley, look.ink());
    }
}

/// A text that ends where the room does.
pub(super) fn clipped_text(ui: &Ui, rect: Rect, text: &str, look: &Look) {
    let painter = ui.painter().with_clip_rect(rect.intersect(ui.clip_rect()));
    painter.text(
        rect.left_center() + vec2(5.0, 0.0),
        Align2::LEFT_CENTER,
        text,
        FontId::proportional(SMALL),
        look.ink(),
    );
}
