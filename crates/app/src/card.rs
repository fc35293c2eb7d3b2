//! The row of parts and the card of the selected one.

use egui::accesskit::Role;
use egui::{Align, ComboBox, Layout, RichText, ScrollArea, Ui, WidgetInfo, vec2};
use helmsplit_scenario::Severity;
use helmsplit_scenario::choice::Choice;

use crate::action::Action;
use crate::command::{Command, Stage};
use crate::look::SMALL;
use crate::manoeuvre::lists;
use crate::parts::{PARTS, Part};
use crate::quantity_field::{FieldContext, FieldStates, quantity_field};
use crate::spot::Spot;

/// Draws the menu of all parts, and beside it those that are not in the drawing.
pub(crate) fn parts_row(
    ui: &mut Ui,
    selected: Part,
    undrawn: &[Part],
    context: &FieldContext<'_>,
    actions: &mut Vec<Action>,
) {
    ui.horizontal_wrapped(|ui| {
        ui.spacing_mut().item_spacing = vec2(2.0, 2.0);
        ui.spacing_mut().button_padding = vec2(5.0, 2.0);
        ui.menu_button("All parts", |ui| {
            for part in PARTS {
                if ui.radio(part == selected, named(part, context)).clicked() {
                    actions.push(Action::Select(part));
                    ui.close();
                }
            }
        });
        for &part in undrawn {
            let text = RichText::new(named(part, context)).size(SMALL + 1.0);
            if ui.selectable_label(part == selected, text).clicked() {
                actions.push(Action::Select(part));
            }
        }
    });
}

/// The name of a part, and whether something is wrong with it.
fn named(part: Part, context: &FieldContext<'_>) -> String {
    let own = context.findings.iter();
    let worst = own
        .filter(|finding| Part::of(&finding.path) == Some(part))
        .map(|finding| finding.severity)
        .max();
    match worst {
        Some(Severity::Error) => format!("{}: error", part.label),
        Some(Severity::Warning) => format!("{}: note", part.label),
        None => part.label.to_owned(),
    }
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
        let heading = ui.heading(part.label);
        let name = format!("Card: {}", part.label);
        heading.widget_info(|| WidgetInfo::labeled(Role::Heading, true, &name));
    });
    ScrollArea::vertical()
        .id_salt(part.section)
        .auto_shrink([false, false])
        .show(ui, |ui| {
            ui.spacing_mut().item_spacing.y = 3.0;
            for choice in part.choices(context.scenario) {
                choice_menu(ui, choice, context, states, actions);
            }
            let rows = part.used(context.scenario);
            for &row in &rows {
                quantity_field(ui, row, context, states, actions);
            }
            if rows.is_empty() {
                ui.weak("Nothing to set under the present choice.");
            }
            lists(ui, part, context, states, actions);
            general_remarks(ui, part, context);
        });
}

/// The menu of one choice.
fn choice_menu(
    ui: &mut Ui,
    choice: &'static Choice,
    context: &FieldContext<'_>,
    states: &mut FieldStates,
    actions: &mut Vec<Action>,
) {
    let at = context.scenario.option(choice.id);
    let spot = Spot::Choice(choice.id);
    let line = ui.horizontal(|ui| {
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
        let menu = ComboBox::from_id_salt(choice.path)
            .width(160.0)
            .truncate()
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
        states.lead(ui, spot, &menu);
    });
    states.mark(ui, spot, line.response.rect, context.look);
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
