//! Travel and area of the land as numbers.

use egui::{RichText, Ui, vec2};
use helmsplit_model::Quantity;

use super::edit::ListEdit;
use super::number::Number;
use super::state::{Cell, ListStates};
use crate::action::Action;
use crate::command::{Command, Stage as Gesture};
use crate::look::SMALL;
use crate::quantity_field::FieldContext;
use crate::text::unit_label;

/// Width of the number of a row, points.
const PLACE: f32 = 24.0;

/// Width of a field, points.
const FIELD: f32 = 92.0;

/// Draws the table.
pub(super) fn land(
    ui: &mut Ui,
    context: &FieldContext<'_>,
    states: &mut ListStates,
    actions: &mut Vec<Action>,
) {
    ui.add_space(6.0);
    ui.separator();
    ui.label(RichText::new("Table of the land").strong())
        .on_hover_text(
            "Area of the excess land over the travel behind the overlap. Between the points the \
             area follows a smooth curve that never falls; behind the last it stays.",
        );
    let (travel, area) = (
        context.units.unit(Quantity::Length),
        context.units.unit(Quantity::Area),
    );
    ui.horizontal(|ui| {
        ui.spacing_mut().item_spacing.x = 4.0;
        let mut head = |width: f32, text: String| {
            let size = vec2(width, ui.spacing().interact_size.y);
            let text = RichText::new(text).size(SMALL).color(context.look.quiet());
            ui.add_sized(size, egui::Label::new(text));
        };
        head(PLACE, "no.".to_owned());
        head(FIELD, format!("travel in {}", unit_label(travel)));
        head(FIELD, format!("area in {}", unit_label(area)));
    });
    for place in 0..context.scenario.land_table().points.len() {
        table_row(ui, context, place, states, actions);
    }
    if !states.notice.is_empty() {
        let text = RichText::new(&states.notice).size(SMALL);
        ui.label(text.color(context.look.error()));
    }
}

fn table_row(
    ui: &mut Ui,
    context: &FieldContext<'_>,
    place: usize,
    states: &mut ListStates,
    actions: &mut Vec<Action>,
) {
    let (travel, area) = &context.scenario.land_table().points[place];
    let label = format!("land, point {}", place + 1);
    let names = (format!("{label}, travel"), format!("{label}, area"));
    let travel = Number {
        cell: Cell::Travel(place),
        name: &names.0,
        value: travel,
        unit: context.units.unit(Quantity::Length),
        width: FIELD,
    };
    let area = Number {
        cell: Cell::Area(place),
        name: &names.1,
        value: area,
        unit: context.units.unit(Quantity::Area),
        width: FIELD,
    };
    ui.horizontal(|ui| {
        ui.spacing_mut().item_spacing.x = 4.0;
        let size = vec2(PLACE, ui.spacing().interact_size.y);
        let number = RichText::new(format!("{}", place + 1)).color(context.look.quiet());
        ui.add_sized(size, egui::Label::new(number));
        let mut push = |edit| {
            actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
        };
        if let Some(text) = travel.show(ui, states, context.look) {
            push(ListEdit::SetLand {
                place,
                travel: Some(text),
                area: None,
            });
        }
        if let Some(text) = area.show(ui, states, context.look) {
            push(ListEdit::SetLand {
                place,
                travel: None,
                area: Some(text),
            });
        }
        let edits = [
            ("add", "Add a point behind", ListEdit::AddLand { place }),
            ("remove", "Remove", ListEdit::RemoveLand { place }),
        ];
        for (text, verb, edit) in edits {
            let button = egui::Button::new(RichText::new(text).size(SMALL)).frame(false);
            let name = format!("{verb} {label}");
            if ui.add(button).accessible_name(name).clicked() {
                push(edit);
            }
        }
    });
    travel.remark(ui, states, context.look);
    area.remark(ui, states, context.look);
}
