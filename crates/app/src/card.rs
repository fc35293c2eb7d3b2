//! The list of parts and the card of the selected one.

use egui::accesskit::Role;
use egui::{Align, ComboBox, Layout, RichText, ScrollArea, Sense, Ui, WidgetInfo, vec2};
use helmsplit_scenario::Severity;
use helmsplit_scenario::choice::Choice;

use crate::action::Action;
use crate::command::{Command, Stage};
use crate::look::SMALL;
use crate::parts::{PARTS, Part};
use crate::quantity_field::{FieldContext, FieldStates, quantity_field};

/// Height of a row of the list, points.
const ROW: f32 = 21.0;

/// Draws the list of parts, in two columns.
pub(crate) fn part_list(
    ui: &mut Ui,
    selected: Part,
    context: &FieldContext<'_>,
    actions: &mut Vec<Action>,
) {
    let half = PARTS.len().div_ceil(2);
    ui.horizontal_top(|ui| {
        ui.spacing_mut().item_spacing = vec2(4.0, 0.0);
        let width = (ui.available_width() - 4.0) / 2.0;
        for column in [&PARTS[..half], &PARTS[half..]] {
            ui.vertical(|ui| {
                ui.set_width(width);
                for &part in column {
                    if part_row(ui, part, part == selected, width, context) {
                        actions.push(Action::Select(part));
                    }
                }
            });
        }
    });
}

/// One row; says whether it was clicked.
fn part_row(
    ui: &mut Ui,
    part: Part,
    selected: bool,
    width: f32,
    context: &FieldContext<'_>,
) -> bool {
    let look = context.look;
    let (rect, response) = ui.allocate_exact_size(vec2(width, ROW), Sense::click());
    response.widget_info(|| WidgetInfo::selected(Role::Button, true, selected, part.label));
    let painter = ui.painter();
    if selected || response.hovered() {
        painter.rect_filled(rect, 3.0, look.hover());
    }
    if selected || response.has_focus() {
        let bar = egui::Rect::from_min_size(rect.min, vec2(3.0, rect.height()));
        painter.rect_filled(bar, 1.0, look.accent());
    }
    painter.text(
        rect.left_center() + vec2(10.0, 0.0),
        egui::Align2::LEFT_CENTER,
        part.label,
        egui::TextStyle::Body.resolve(ui.style()),
        look.ink(),
    );
    let own = context.findings.iter();
    let worst = own
        .filter(|finding| Part::of(&finding.path) == Some(part))
        .map(|finding| finding.severity)
        .max();
    if let Some(worst) = worst {
        let (word, colour) = match worst {
            Severity::Error => ("error", look.error()),
            Severity::Warning => ("note", look.warning()),
        };
        painter.text(
            rect.right_center() - vec2(6.0, 0.0),
            egui::Align2::RIGHT_CENTER,
            word,
            egui::TextStyle::Small.resolve(ui.style()),
            colour,
        );
    }
    response.clicked()
}

/// Draws the card of a part.
pub(crate) fn card(
    ui: &mut Ui,
    part: Part,
    context: &FieldContext<'_>,
    states: &mut FieldStates,
    actions: &mut Vec<Action>,
) {
    ui.horizontal(|ui| {
        ui.heading(part.label);
    });
    ScrollArea::vertical()
        .id_salt(part.section)
        .auto_shrink([false, false])
        .show(ui, |ui| {
            ui.spacing_mut().item_spacing.y = 3.0;
            for choice in part.choices(context.scenario) {
                choice_menu(ui, choice, context, actions);
            }
            let rows = part.used(context.scenario);
            for &row in &rows {
                quantity_field(ui, row, context, states, actions);
            }
            if rows.is_empty() {
                ui.weak("Nothing to set under the present choice.");
            }
            general_remarks(ui, part, context);
        });
}

/// The menu of one choice.
fn choice_menu(
    ui: &mut Ui,
    choice: &'static Choice,
    context: &FieldContext<'_>,
    actions: &mut Vec<Action>,
) {
    let at = context.scenario.option(choice.id);
    ui.horizontal(|ui| {
        let height = ui.spacing().interact_size.y;
        let width = (ui.available_width() - 176.0).max(80.0);
        let label = ui
            .allocate_ui_with_layout(
                vec2(width, height),
                Layout::left_to_right(Align::Center),
                |ui| {
                    ui.set_min_width(width);
                    ui.add(egui::Label::new(choice.label).truncate())
                },
            )
            .inner
            .on_hover_text(choice.note);
        ComboBox::from_id_salt(choice.path)
            .width(160.0)
            .selected_text(choice.options[usize::from(at)].label)
            .show_ui(ui, |ui| {
                for (option, row) in (0_u8..).zip(choice.options) {
                    let response = ui
                        .selectable_label(option == at, row.label)
                        .on_hover_text(row.note);
                    if response.clicked() && option != at {
                        let id = choice.id;
                        let command = Command::Choose { id, option };
                        actions.push(Action::Edit(command, Stage::Finished));
                    }
                }
            })
            .response
            .labelled_by(label.id);
    });
}

/// Findings about the part that belong to none of its fields.
fn general_remarks(ui: &mut Ui, part: Part, context: &FieldContext<'_>) {
    let shown = part.used(context.scenario);
    for finding in context.findings {
        let has_field = shown.iter().any(|row| row.path == finding.path);
        if has_field || Part::of(&finding.path) != Some(part) {
            continue;
        }
        let colour = match finding.severity {
            Severity::Error => context.look.error(),
            Severity::Warning => context.look.warning(),
        };
        let text = RichText::new(finding.to_string()).size(SMALL);
        ui.label(text.color(colour));
    }
}
