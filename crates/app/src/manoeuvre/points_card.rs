//! The breakpoints of one line as numbers.

use egui::{ComboBox, RichText, Ui, vec2};
use helmsplit_model::{Input, Quantity};
use helmsplit_scenario::manoeuvre::{Line, input_row};
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::units::{Unit, si_unit};

use super::edit::ListEdit;
use super::head::template_menu;
use super::mark::number_text;
use super::names::line_name;
use super::number::Number;
use super::stage::row_and_unit;
use super::state::{Cell, ListStates, lines_of};
use crate::action::Action;
use crate::command::{Command, Stage as Gesture};
use crate::look::SMALL;
use crate::quantity_field::FieldContext;
use crate::text::unit_label;

/// Width of the number of a row, points.
const PLACE: f32 = 24.0;

/// Width of a field, points.
const FIELD: f32 = 92.0;

/// A new point behind the last stands so much later, s.
const LATER: f64 = 1.0;

/// Draws the choice of the line whose lists stand below; gives the line.
pub(super) fn line_choice(
    ui: &mut Ui,
    context: &FieldContext<'_>,
    states: &mut ListStates,
    actions: &mut Vec<Action>,
) -> Input {
    let shown = lines_of(context.scenario);
    let mut chosen = states.line_of(&shown);
    ui.add_space(6.0);
    ui.horizontal(|ui| {
        let label = ui.label(RichText::new("Line").strong());
        ComboBox::from_id_salt("line of the lists")
            .width(180.0)
            .selected_text(input_row(chosen).label)
            .show_ui(ui, |ui| {
                for &input in &shown {
                    let label = input_row(input).label;
                    if ui.selectable_label(input == chosen, label).clicked() {
                        states.line = Some(input);
                        chosen = input;
                    }
                }
            })
            .response
            .labelled_by(label.id);
        ui.menu_button("Add...", |ui| {
            template_menu(ui, context.scenario, 0.0, actions);
        })
        .response
        .on_hover_text("A template: it writes a stretch of its line from a few numbers.");
    });
    chosen
}

/// Draws the table.
pub(super) fn points(
    ui: &mut Ui,
    chosen: Input,
    context: &FieldContext<'_>,
    states: &mut ListStates,
    actions: &mut Vec<Action>,
) {
    ui.separator();
    ui.label(RichText::new("Breakpoints").strong());
    let (row, unit) = row_and_unit(chosen, context.units);
    let line = context.scenario.manoeuvre.line(row).ok();
    let free = context.scenario.manoeuvre.free(chosen);
    let spans = line.as_ref().map_or(&[][..], Line::spans);
    if free.is_empty() && spans.is_empty() {
        let level = number_text(row.level(), unit);
        ui.weak(format!("None: {} rests at {level}.", line_name(chosen)));
    } else {
        heads(ui, unit, context);
    }
    let mut spans = spans.iter().peekable();
    for (place, point) in free.iter().enumerate() {
        while let Some(span) = spans.next_if(|span| span.end <= point.time.si()) {
            stretch(ui, context, span.template, (span.begin, span.end));
        }
        table_row(ui, context, (chosen, place), unit, states, actions);
    }
    for span in spans {
        stretch(ui, context, span.template, (span.begin, span.end));
    }
    if ui
        .button("Add a point")
        .on_hover_text("A breakpoint behind the last of the line.")
        .clicked()
    {
        let edit = behind_the_last(chosen, line.as_ref(), row.level(), unit);
        actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
    }
}

fn heads(ui: &mut Ui, unit: &Unit, context: &FieldContext<'_>) {
    let second = si_unit(Quantity::Time);
    ui.horizontal(|ui| {
        ui.spacing_mut().item_spacing.x = 4.0;
        let mut head = |width: f32, text: String| {
            let size = vec2(width, ui.spacing().interact_size.y);
            let text = RichText::new(text).size(SMALL).color(context.look.quiet());
            ui.add_sized(size, egui::Label::new(text));
        };
        head(PLACE, "no.".to_owned());
        head(FIELD, format!("time in {}", unit_label(second)));
        let value = match unit_label(unit) {
            symbol if symbol.is_empty() => "value".to_owned(),
            symbol => format!("value in {symbol}"),
        };
        head(FIELD, value);
    });
}

/// What a template writes, between the rows.
fn stretch(ui: &mut Ui, context: &FieldContext<'_>, template: usize, (begin, end): (f64, f64)) {
    let second = si_unit(Quantity::Time);
    let kind = context.scenario.manoeuvre.templates[template].kind;
    let text = format!(
        "{} to {}: {}",
        number_text(begin, second),
        number_text(end, second),
        kind.template().label
    );
    ui.horizontal(|ui| {
        ui.add_space(PLACE + 4.0);
        ui.label(RichText::new(text).size(SMALL).color(context.look.quiet()));
    });
}

fn table_row(
    ui: &mut Ui,
    context: &FieldContext<'_>,
    (input, place): (Input, usize),
    unit: &'static Unit,
    states: &mut ListStates,
    actions: &mut Vec<Action>,
) {
    let point = &context.scenario.manoeuvre.free(input)[place];
    let label = format!("{}, point {}", line_name(input), place + 1);
    let (time_name, value_name) = (format!("{label}, time"), format!("{label}, value"));
    let time = Number {
        cell: Cell::Time(input, place),
        name: &time_name,
        value: &point.time,
        unit: si_unit(Quantity::Time),
        width: FIELD,
    };
    let value = Number {
        cell: Cell::Value(input, place),
        name: &value_name,
        value: &point.value,
        unit,
        width: FIELD,
    };
    ui.horizontal(|ui| {
        ui.spacing_mut().item_spacing.x = 4.0;
        let size = vec2(PLACE, ui.spacing().interact_size.y);
        let number = RichText::new(format!("{}", place + 1)).color(context.look.quiet());
        ui.add_sized(size, egui::Label::new(number));
        let mut entered = |time, value| {
            let edit = ListEdit::SetPoint {
                input,
                place,
                time,
                value,
            };
            actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
        };
        if let Some(text) = time.show(ui, states, context.look) {
            entered(Some(text), None);
        }
        if let Some(text) = value.show(ui, states, context.look) {
            entered(None, Some(text));
        }
        let button = egui::Button::new(RichText::new("remove").size(SMALL)).frame(false);
        let button = ui
            .add(button)
            .accessible_name(format!("Remove {label}"))
            .on_hover_text("Takes this breakpoint out");
        if button.clicked() {
            let edit = ListEdit::RemovePoint { input, place };
            actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
        }
        if context.scenario.manoeuvre.twin(input, place).is_some() {
            ui.label(
                RichText::new("jump")
                    .size(SMALL)
                    .color(context.look.quiet()),
            );
        }
    });
    time.remark(ui, states, context.look);
    value.remark(ui, states, context.look);
}

/// A breakpoint a little behind the last one of a line, with the same value.
fn behind_the_last(input: Input, line: Option<&Line>, level: f64, unit: &Unit) -> ListEdit {
    let second = si_unit(Quantity::Time);
    let last = line.and_then(|line| line.points().last());
    let (time, si) = last.map_or((0.0, level), |last| (last.time + LATER, last.value));
    ListEdit::AddPoint {
        input,
        time: text_from_si(time, second, Digits::Significant(6)),
        value: text_from_si(si, unit, Digits::Exact),
    }
}
