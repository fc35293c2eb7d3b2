//! Events: a line through all panels with a name above; a click puts the cursor there.

use egui::accesskit::Role;
use egui::{FontId, Rect, Sense, Shape, Stroke, Ui, WidgetInfo, pos2, vec2};
use helmsplit_view::plot::{Axis, Figure, PlacedMark, number_text, placed_marks, row_count};

use super::drawn::{Drawn, Measure};
use super::{MARK_ROW, Shown};
use crate::look::{SMALL, egui_colour};
use crate::text::on_screen;

/// Rows of names at most.
pub(super) const MOST_ROWS: usize = 3;

/// From a line to its name, points.
const BESIDE: f32 = 4.0;

/// Length of the tick of an event whose name is left out, points.
const TICK: f32 = 6.0;

/// Rows of names that the whole run needs: what is reserved at any zoom, so that panels do not
/// jump.
pub(super) fn rows(
    figure: &Figure,
    whole: (f64, f64),
    ends: (f64, f64),
    measure: Measure<'_>,
) -> usize {
    let time = Axis::new(whole, ends, 100.0);
    row_count(&placed_marks(&figure.marks, &time, MOST_ROWS, measure))
}

/// Paints the events; gives the moment of the one that was clicked.
pub(super) fn paint(ui: &Ui, shown: &Shown<'_>, drawn: &Drawn) -> Option<f64> {
    let foot = drawn.key.top - 3.0;
    let last = drawn.panels.last()?;
    let mut clicked = None;
    for (index, mark) in drawn.marks.iter().enumerate() {
        let x = mark.x as f32;
        let theme = &shown.look.theme;
        let stroke = Stroke::new(theme.strokes.mark as f32, egui_colour(theme.rules.mark));
        let area = match mark.row {
            Some(row) => {
                let top = foot - MARK_ROW * (row + 1) as f32;
                let ends = [pos2(x, top + 2.0), pos2(x, last.rect.bottom())];
                ui.painter()
                    .extend(Shape::dashed_line(&ends, stroke, 2.0, 3.0));
                let width = BESIDE + mark.width as f32 + BESIDE;
                Rect::from_min_size(pos2(x - 2.0, top), vec2(width, MARK_ROW))
            }
            None => {
                // A burst of lines would hide the data: ticks show where they are.
                ui.painter().vline(x, foot - TICK..=foot, stroke);
                Rect::from_min_max(pos2(x - 3.0, foot - TICK), pos2(x + 3.0, foot))
            }
        };
        if event(ui, shown, mark, area, index) {
            clicked = Some(mark.time);
        }
    }
    clicked
}

fn event(ui: &Ui, shown: &Shown<'_>, mark: &PlacedMark, area: Rect, index: usize) -> bool {
    let id = ui.scope_id().with(("event", index));
    let response = ui.interact(area, id, Sense::click());
    let time = on_screen(&number_text(mark.time, 3));
    let spoken = format!("Event: {}, {time} s", mark.label);
    response.widget_info(|| WidgetInfo::labeled(Role::Button, true, &spoken));
    let marked = response.hovered() || response.has_focus();
    let colour = if marked {
        shown.look.accent()
    } else {
        shown.look.ink()
    };
    if mark.row.is_some() {
        let font = FontId::proportional(SMALL);
        let galley = ui
            .painter()
            .layout_no_wrap(mark.label.clone(), font, colour);
        let at = pos2(
            area.left() + 2.0 + BESIDE,
            area.center().y - galley.size().y / 2.0,
        );
        ui.painter().galley(at, galley, colour);
    }
    if response.has_focus() {
        let foot = Stroke::new(2.0, shown.look.accent());
        ui.painter().hline(area.x_range(), area.bottom(), foot);
    }
    let clicked = response.clicked();
    response.on_hover_text(format!("{spoken}. Click: the cursor there."));
    clicked
}
