//! Templates with their numbers, in the order of time.

use egui::{Align, Layout, RichText, Ui, vec2};
use helmsplit_model::Input;
use helmsplit_scenario::Value;
use helmsplit_scenario::convert::template_unit;
use helmsplit_scenario::manoeuvre::{TemplateParameter, TemplateUse, input_row};

use super::edit::ListEdit;
use super::number::Number;
use super::state::{Cell, ListStates};
use crate::action::Action;
use crate::command::{Command, Stage as Gesture};
use crate::look::SMALL;
use crate::quantity_field::FieldContext;
use crate::text::{unit_label, with_unit};

const TEXT_WIDTH: f32 = 72.0;
const UNIT_WIDTH: f32 = 54.0;

/// Draws the list.
pub(super) fn templates(
    ui: &mut Ui,
    chosen: Input,
    context: &FieldContext<'_>,
    states: &mut ListStates,
    actions: &mut Vec<Action>,
) {
    let lines = &context.scenario.manoeuvre;
    let places = lines.templates_of(input_row(chosen));
    for (order, &place) in places.iter().enumerate() {
        let ahead = order.checked_sub(1).map(|order| places[order]);
        let behind = order + 1 < places.len();
        let template = &lines.templates[place];
        heading(ui, template, place, ahead, behind, actions);
        for number in template.numbers() {
            field(ui, template, place, number, context, states, actions);
        }
    }
}

/// The name of a template with what can be done to it.
fn heading(
    ui: &mut Ui,
    template: &TemplateUse,
    place: usize,
    ahead: Option<usize>,
    behind: bool,
    actions: &mut Vec<Action>,
) {
    ui.separator();
    let kind = template.kind.template();
    let at = template.value("at").map(Value::text).unwrap_or_default();
    let name = format!("{} at {at}", kind.key);
    ui.horizontal_wrapped(|ui| {
        ui.spacing_mut().item_spacing = vec2(4.0, 2.0);
        ui.label(RichText::new(kind.label).strong())
            .on_hover_text(kind.note);
        let mut button = |ui: &mut Ui, text: &str, note: &str, edit: Option<ListEdit>| {
            let button = egui::Button::new(RichText::new(text).size(SMALL)).small();
            let response = ui
                .add_enabled(edit.is_some(), button)
                .accessible_name(format!("{text}: {name}"))
                .on_hover_text(note);
            if let Some(edit) = edit.filter(|_| response.clicked()) {
                actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
            }
        };
        let earlier = ahead.map(|place| ListEdit::Exchange { place });
        let note = "Exchanges it with the template ahead of it on its line.";
        button(ui, "Earlier", note, earlier);
        let later = behind.then_some(ListEdit::Exchange { place });
        let note = "Exchanges it with the next template on its line.";
        button(ui, "Later", note, later);
        let dissolve = ListEdit::Dissolve { place };
        let note = "Each of its points can be edited and dragged then.";
        button(ui, "Turn into breakpoints", note, Some(dissolve));
        button(
            ui,
            "Remove",
            "Takes it out.",
            Some(ListEdit::RemoveTemplate { place }),
        );
    });
}

/// One number.
fn field(
    ui: &mut Ui,
    template: &TemplateUse,
    place: usize,
    (row, value): (&'static TemplateParameter, &Value),
    context: &FieldContext<'_>,
    states: &mut ListStates,
    actions: &mut Vec<Action>,
) {
    let unit = template_unit(row, context.units);
    let lines = &context.scenario.manoeuvre;
    let own = template.kind.template().drives;
    let same = lines.templates.iter().filter(|t| t.kind == template.kind);
    // Only where there are several of a kind its begin tells which.
    let which = if same.count() > 1 {
        let at = template.value("at").map(Value::text).unwrap_or_default();
        format!("{} at {at}", template.kind.key())
    } else {
        template.kind.key().to_owned()
    };
    let name = format!("{which}, {}", row.label.to_lowercase());
    let number = Number {
        cell: Cell::Number(place, row.name),
        name: &name,
        value,
        unit,
        width: TEXT_WIDTH,
    };
    ui.horizontal(|ui| {
        ui.spacing_mut().item_spacing.x = 4.0;
        let width = (ui.available_width() - TEXT_WIDTH - UNIT_WIDTH - 46.0).max(80.0);
        let height = ui.spacing().interact_size.y;
        let layout = Layout::left_to_right(Align::Center);
        ui.allocate_ui_with_layout(vec2(width, height), layout, |ui| {
            ui.set_min_width(width);
            let label = egui::Label::new(row.label).truncate();
            ui.add(label).on_hover_ui(|ui| {
                ui.set_max_width(300.0);
                ui.label(row.note);
                let text = |number: f64| with_unit(row.unit().si_from_value(number), unit, 4);
                let (low, high) = (text(row.allowed.low), text(row.allowed.high));
                ui.weak(format!(
                    "Allowed: {low} to {high}. Default: {}.",
                    row.default
                ));
            });
        });
        if let Some(text) = number.show(ui, states, context.look) {
            states.line = Some(own);
            let name = row.name;
            let edit = ListEdit::SetTemplate { place, name, text };
            actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
        }
        ui.label(RichText::new(unit_label(unit)).color(context.look.quiet()));
    });
    number.remark(ui, states, context.look);
}
