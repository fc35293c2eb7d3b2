//! The names of the lines beside the plot: a click edits another one.

use egui::{
    Align2, FontId, Rect, ScrollArea, Sense, Stroke, Ui, UiBuilder, WidgetInfo, pos2, vec2,
};
use egui_plot::LineStyle;
use helmsplit_model::Input;
use helmsplit_scenario::manoeuvre::Line;
use helmsplit_scenario::{Scenario, UnitSystem};

use super::mark::number_text;
use super::plot::{colour, style};
use super::stage::row_and_unit;
use super::state::ListStates;
use crate::look::{Look, SMALL};

/// Height of a name, points.
const ROW: f32 = 17.0;

/// Length of the sample of a line, points.
const SAMPLE: f32 = 24.0;

/// What the names show.
pub(super) struct Names<'a> {
    pub(super) scenario: &'a Scenario,
    pub(super) units: UnitSystem,
    pub(super) look: &'a Look,
    pub(super) shown: &'a [Input],
    pub(super) chosen: Input,
    /// The moment of the values, s.
    pub(super) cursor: f64,
}

/// Draws the names into `rect`.
pub(super) fn names(ui: &mut Ui, rect: Rect, names: &Names<'_>, states: &mut ListStates) {
    let mut side = ui.new_child(
        UiBuilder::new()
            .max_rect(rect)
            .id_salt("names of the lines"),
    );
    ScrollArea::vertical()
        .id_salt("names of the lines")
        .auto_shrink([false, false])
        .show(&mut side, |ui| {
            ui.spacing_mut().item_spacing.y = 0.0;
            for &input in names.shown {
                if name(ui, input, names) {
                    states.line = Some(input);
                    states.notice.clear();
                }
            }
        });
}

/// One name; says whether it was clicked.
fn name(ui: &mut Ui, input: Input, names: &Names<'_>) -> bool {
    let look = names.look;
    let (row, unit) = row_and_unit(input, names.units);
    let chosen = input == names.chosen;
    let (rect, response) = ui.allocate_exact_size(vec2(ui.available_width(), ROW), Sense::click());
    let line = names.scenario.manoeuvre.line(row);
    let value = line.map_or_else(
        |_| "out of order".to_owned(),
        |line: Line| number_text(line.value_at(names.cursor), unit),
    );
    let spoken = format!("Edit {}, {value} at the cursor", row.label.to_lowercase());
    response.widget_info(|| WidgetInfo::selected(egui::Role::RadioButton, true, chosen, &spoken));
    let painter = ui.painter();
    if chosen || response.hovered() {
        painter.rect_filled(rect, 3.0, look.hover());
    }
    if chosen || response.has_focus() {
        let bar = Rect::from_min_size(rect.min, vec2(3.0, rect.height()));
        painter.rect_filled(bar, 1.0, look.accent());
    }
    let left = pos2(rect.left() + 8.0, rect.center().y);
    sample(ui, left, input, chosen, look);
    let font = FontId::proportional(SMALL);
    let heard = names.scenario.listens_to(input);
    let ink = if heard { look.ink() } else { look.quiet() };
    let at = left + vec2(SAMPLE + 7.0, 0.0);
    ui.painter()
        .text(at, Align2::LEFT_CENTER, row.label, font.clone(), ink);
    let at = pos2(rect.right() - 4.0, rect.center().y);
    ui.painter()
        .text(at, Align2::RIGHT_CENTER, value, font, look.ink());
    let response = response.on_hover_ui(|ui| {
        ui.set_max_width(300.0);
        ui.label(row.note);
        if !heard {
            ui.label("It drives nothing in this circuit.");
        }
    });
    response.clicked()
}

/// A short piece of the line, as it is drawn.
fn sample(ui: &Ui, left: egui::Pos2, input: Input, chosen: bool, look: &Look) {
    let ends = [left, left + vec2(SAMPLE, 0.0)];
    let stroke = Stroke::new(if chosen { 2.0 } else { 1.3 }, colour(input, look));
    let painter = ui.painter();
    if chosen {
        painter.line_segment(ends, stroke);
        painter.circle_filled(ends[0] + vec2(SAMPLE / 2.0, 0.0), 3.5, stroke.color);
        return;
    }
    match style(input) {
        LineStyle::Solid => {
            painter.line_segment(ends, stroke);
        }
        LineStyle::Dashed { length } => {
            let gap = length * 0.6;
            painter.extend(egui::Shape::dashed_line(&ends, stroke, length, gap));
        }
        LineStyle::Dotted { spacing } => {
            painter.extend(egui::Shape::dotted_line(&ends, stroke.color, spacing, 0.8));
        }
    }
}
