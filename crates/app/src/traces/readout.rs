//! Names of the lines, with their values at the cursor.

use egui::{Align2, FontId, Painter, Rect, Stroke, Ui, pos2};
use helmsplit_view::plot::{Panel, Series, number_text, superscript};

use super::dash::dashed;
use super::drawn::{Drawn, DrawnPanel};
use super::view::TraceView;
use super::{RIGHT, Shown};
use crate::look::{SMALL, egui_colour};
use crate::text::on_screen;

/// Height of a line of text, points.
const ROW: f32 = 14.0;

/// Length of the sample of a line, points.
const SAMPLE: f32 = 26.0;

/// Letters of a name that leave room for a value beside it.
const LONGEST: usize = 20;

/// Height that the names of a panel need, points.
pub(super) fn height(panel: &Panel) -> f32 {
    let title = usize::from(!is_single(panel) || is_long(&panel.label));
    (panel.series.len() + title) as f32 * ROW + 2.0
}

/// Whether the one line of a panel has the panel's name.
fn is_single(panel: &Panel) -> bool {
    matches!(&panel.series[..], [only] if only.label == panel.label)
}

/// Whether a name leaves no room for a value beside it.
fn is_long(label: &str) -> bool {
    label.chars().count() > LONGEST
}

/// The value of a line at a time, between its points; `None` outside and in a gap.
pub(super) fn value_at(points: &[[f64; 2]], time: f64) -> Option<f64> {
    let behind = points.partition_point(|point| point[0] <= time);
    let before = points.get(behind.checked_sub(1)?)?;
    let value = match points.get(behind) {
        None if before[0] < time => return None,
        None => before[1],
        Some(next) => {
            let share = (time - before[0]) / (next[0] - before[0]);
            before[1] + share * (next[1] - before[1])
        }
    };
    value.is_finite().then_some(value)
}

/// Paints names and values to the right of each panel.
pub(super) fn paint(ui: &mut Ui, shown: &Shown<'_>, drawn: &Drawn, view: &TraceView, whole: Rect) {
    let left = whole.right() - RIGHT + 12.0;
    let right = whole.right() - 4.0;
    let painter = ui.painter().clone();
    let font = FontId::proportional(SMALL);
    let head = format!("at {} s", on_screen(&number_text(view.cursor, 4)));
    painter.text(
        pos2(right, whole.top()),
        Align2::RIGHT_TOP,
        head,
        font,
        shown.look.accent(),
    );
    for panel in &drawn.panels {
        let spoken = rows(&painter, shown, panel, view, (left, right));
        // One node for each panel, so that the values can be read out and tested.
        let area = Rect::from_min_max(
            pos2(left, panel.rect.top()),
            pos2(right, panel.rect.bottom()),
        );
        let id = ui.scope_id().with(("readout", panel.place));
        let response = ui.interact(area, id, egui::Sense::hover());
        response.widget_info(|| egui::WidgetInfo::labeled(egui::Role::Label, true, &spoken));
    }
}

/// Paints the rows of one panel; gives them as a sentence.
fn rows(
    painter: &Painter,
    shown: &Shown<'_>,
    drawn: &DrawnPanel,
    view: &TraceView,
    (left, right): (f32, f32),
) -> String {
    let panel = &shown.figure.panels[drawn.place];
    let (exponent, places) = drawn
        .axis
        .as_ref()
        .map_or((0, 2), |axis| (axis.ticks.exponent, axis.ticks.places + 1));
    let unit = match exponent {
        0 => panel.unit.clone(),
        power => on_screen(&format!("×10{} {}", superscript(power), panel.unit)),
    };
    let look = shown.look;
    let font = FontId::proportional(SMALL);
    let mut y = drawn.rect.top();
    let mut spoken = format!("{}, {unit}", panel.label);
    let single = is_single(panel);
    if !single {
        let at = pos2(left, y);
        painter.text(at, Align2::LEFT_TOP, &panel.label, font.clone(), look.ink());
        let at = pos2(right, y);
        painter.text(at, Align2::RIGHT_TOP, &unit, font.clone(), look.quiet());
        y += ROW;
    }
    for series in &panel.series {
        let scale = 10f64.powi(exponent);
        let value = value_at(&series.points, view.cursor).map_or_else(
            || "no value".to_owned(),
            |value| on_screen(&number_text(value / scale, places)),
        );
        sample(painter, shown, series, left, y + ROW / 2.0);
        let at = pos2(left + SAMPLE + 6.0, y);
        painter.text(
            at,
            Align2::LEFT_TOP,
            &series.label,
            font.clone(),
            look.ink(),
        );
        if single && is_long(&series.label) {
            y += ROW;
        }
        let text = if single {
            format!("{value} {unit}")
        } else {
            value.clone()
        };
        let at = pos2(right, y);
        painter.text(at, Align2::RIGHT_TOP, text, font.clone(), look.ink());
        spoken.push_str(&format!("; {} {value}", series.label));
        y += ROW;
    }
    spoken
}

fn sample(painter: &Painter, shown: &Shown<'_>, series: &Series, left: f32, y: f32) {
    let theme = &shown.look.theme;
    let colour = egui_colour(theme.series_colour(series.meaning));
    let stroke = Stroke::new(theme.strokes.series as f32, colour);
    let ends = [pos2(left, y), pos2(left + SAMPLE, y)];
    painter.extend(dashed(&ends, series.dash.pattern(), stroke));
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn values_lie_between_points() {
        let points = [[0.0, 1.0], [1.0, 3.0], [1.0, 9.0], [2.0, f64::NAN]];
        for (time, value) in [
            (-0.1, None),
            (0.0, Some(1.0)),
            (0.5, Some(2.0)),
            // At a jump, what comes after it.
            (1.5, None),
            (2.5, None),
        ] {
            assert_eq!(value_at(&points, time), value, "at {time}");
        }
        let jump = [[0.0, 1.0], [1.0, 3.0], [1.0, 9.0], [2.0, 9.0]];
        assert_eq!(value_at(&jump, 1.0), Some(9.0), "after the jump");
        assert_eq!(value_at(&jump, 2.0), Some(9.0), "at the end");
    }
}
