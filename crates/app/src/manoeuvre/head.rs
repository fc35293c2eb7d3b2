//! The head of the strip: fold it, duration, templates to add, numbers, snapping, what went wrong.

use egui::{Layout, Rect, RichText, Ui, UiBuilder};
use helmsplit_model::Input;
use helmsplit_model::Quantity;
use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::manoeuvre::{Line, TEMPLATES, Template, input_row};
use helmsplit_scenario::parameter::manoeuvre::DURATION;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::units::si_unit;
use helmsplit_scenario::{Scenario, Severity};

use super::edit::ListEdit;
use super::number::Number;
use super::state::Cell;
use crate::action::Action;
use crate::command::{Command, Stage as Gesture};
use crate::look::SMALL;
use crate::parts::Part;
use crate::quantity_field::{FieldContext, FieldStates};
use crate::text::unit_label;

/// Height of the head, points.
pub(super) const HEAD: f32 = 26.0;

/// How dragging and templates live together.
const RULES: &str = "Drag a point; double-click to add one; its menu makes a jump or removes it. \
    A template writes a stretch of its own, under a bar: drag the bar to move it, or turn it into \
    breakpoints to drag what it wrote. Points stand ahead of it and behind it.";

const SNAP: &str = "Round times and values while dragging. Hold Ctrl for the other way once, Shift \
    to move in time or in value alone.";

/// Draws the head into `rect`.
pub(super) fn head(
    ui: &mut Ui,
    rect: Rect,
    context: &FieldContext<'_>,
    chosen: Input,
    cursor: f64,
    states: &mut FieldStates,
    actions: &mut Vec<Action>,
) {
    let layout = Layout::left_to_right(egui::Align::Center);
    let mut row = ui.new_child(
        UiBuilder::new()
            .max_rect(rect)
            .layout(layout)
            .id_salt("head of the manoeuvre"),
    );
    let ui = &mut row;
    fold(ui, states);
    duration(ui, context, states, actions);
    let lists = &mut states.lists;
    ui.menu_button("Add template", |ui| {
        template_menu(ui, context.scenario, cursor, actions);
    })
    .response
    .on_hover_text("Ready manoeuvres, each with a few numbers of its own.");
    if ui
        .button("Add point")
        .on_hover_text("A breakpoint on the chosen line at the cursor. Or double-click the line.")
        .clicked()
    {
        let edit = point_at(context, chosen, cursor);
        actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
    }
    if ui
        .button("Numbers")
        .on_hover_text("Every breakpoint and template as numbers, on the card of the manoeuvre.")
        .clicked()
    {
        lists.line = Some(chosen);
        actions.extend(Part::of("manoeuvre").map(Action::Select));
    }
    ui.checkbox(&mut lists.snap, "Snap").on_hover_text(SNAP);
    message(ui, context, chosen, states);
}

fn fold(ui: &mut Ui, states: &mut FieldStates) {
    let folded = states.lists.folded;
    let (word, sign) = if folded {
        ("Show the manoeuvre", "+")
    } else {
        ("Fold the manoeuvre", "\u{2212}")
    };
    let button = egui::Button::new(RichText::new(sign).monospace()).small();
    let response = ui.add(button).accessible_name(word).on_hover_text(word);
    if response.clicked() {
        states.lists.folded = !folded;
        ui.ctx().request_repaint();
    }
    ui.label(RichText::new("Manoeuvre").strong())
        .on_hover_text(RULES);
}

fn duration(
    ui: &mut Ui,
    context: &FieldContext<'_>,
    states: &mut FieldStates,
    actions: &mut Vec<Action>,
) {
    let unit = display_unit(DURATION.parameter(), context.units);
    ui.spacing_mut().item_spacing.x = 4.0;
    ui.label(RichText::new("Duration").color(context.look.quiet()));
    let number = Number {
        cell: Cell::Duration,
        name: "Duration of the run",
        value: context.scenario.value(DURATION),
        unit,
        width: 56.0,
    };
    if let Some(text) = number.show(ui, &mut states.lists, context.look) {
        let command = Command::SetText { id: DURATION, text };
        actions.push(Action::Edit(command, Gesture::Finished));
    }
    ui.label(RichText::new(unit_label(unit)).color(context.look.quiet()));
    ui.spacing_mut().item_spacing.x = 8.0;
}

/// What went wrong last, or what is doubtful about the lines.
fn message(ui: &mut Ui, context: &FieldContext<'_>, chosen: Input, states: &FieldStates) {
    let look = context.look;
    let (text, colour) = if let Some(reason) = states.refusal(DURATION) {
        (format!("Duration not taken: {reason}"), look.error())
    } else if !states.lists.notice.is_empty() {
        (states.lists.notice.clone(), look.error())
    } else if let Some(finding) = finding(context, chosen) {
        let (word, colour) = match finding.severity {
            Severity::Error => ("Error", look.error()),
            Severity::Warning => ("Note", look.warning()),
        };
        let hint = if finding.hint.is_empty() {
            String::new()
        } else {
            format!("; {}", finding.hint)
        };
        (format!("{word}: {}{hint}", finding.message), colour)
    } else {
        return;
    };
    let label = RichText::new(&text).size(SMALL).color(colour);
    ui.add(egui::Label::new(label).truncate())
        .on_hover_text(&text);
}

/// What the validation says about the line that is edited, or about a template.
fn finding<'a>(
    context: &'a FieldContext<'_>,
    chosen: Input,
) -> Option<&'a helmsplit_scenario::Finding> {
    let path = input_row(chosen).path;
    let of_line = |path_of: &str| path_of.starts_with(path);
    let own = context.findings.iter().find(|f| of_line(&f.path));
    own.or_else(|| {
        let of_template = |path_of: &str| path_of.starts_with("manoeuvre.templates");
        context.findings.iter().find(|f| of_template(&f.path))
    })
}

/// The templates, by the line that each writes.
pub(super) fn template_menu(
    ui: &mut Ui,
    scenario: &Scenario,
    cursor: f64,
    actions: &mut Vec<Action>,
) {
    ui.set_min_width(220.0);
    for input in Input::ALL {
        let own: Vec<&Template> = TEMPLATES.iter().filter(|t| t.drives == input).collect();
        if own.is_empty() {
            continue;
        }
        let heard = scenario.listens_to(input);
        let label = input_row(input).label;
        ui.label(RichText::new(label).size(SMALL).weak());
        for template in own {
            let button = ui.add_enabled(heard, egui::Button::new(template.label));
            let button = button
                .on_hover_text(template.note)
                .on_disabled_hover_text("This circuit has nothing that listens to it.");
            if button.clicked() {
                let at = room_for(scenario, template, cursor);
                let kind = template.kind;
                let edit = ListEdit::AddTemplate { kind, at };
                actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
                ui.close();
            }
        }
    }
}

/// Where a new template begins: at the cursor if it fits there, else in the next gap of its line.
fn room_for(scenario: &Scenario, template: &Template, cursor: f64) -> String {
    let row = input_row(template.drives);
    let second = si_unit(Quantity::Time);
    let line = scenario.manoeuvre.line(row).ok();
    let points = line.as_ref().map_or(&[][..], Line::points);
    // Plus zero: no text begins with a minus for 0 s.
    let round = |time: f64| (time * 10.0 - 1e-9).ceil() / 10.0 + 0.0;
    // Candidates: the cursor, then behind each breakpoint.
    let behind = points
        .iter()
        .map(|point| point.time)
        .filter(|t| *t > cursor);
    let mut begins: Vec<f64> = vec![round(cursor)];
    for time in behind {
        begins.push(round(time));
        begins.push(time);
    }
    let text = |begin: &f64| text_from_si(*begin, second, Digits::Significant(12));
    let fits = |at: &String| {
        let edit = ListEdit::AddTemplate {
            kind: template.kind,
            at: at.clone(),
        };
        edit.apply(&mut scenario.clone()).is_ok()
    };
    let found = begins.iter().map(text).find(fits);
    // The circuit says why it does not fit.
    found.unwrap_or_else(|| text(&round(cursor)))
}

/// A point on a line at a moment, with the value that the line has there.
pub(super) fn point_at(context: &FieldContext<'_>, input: Input, time: f64) -> ListEdit {
    let (row, unit) = super::stage::row_and_unit(input, context.units);
    let line = context.scenario.manoeuvre.line(row);
    let si = line.map_or(row.level(), |line| line.value_at(time));
    let second = si_unit(Quantity::Time);
    ListEdit::AddPoint {
        input,
        time: text_from_si(time, second, Digits::Significant(4)),
        value: text_from_si(si, unit, Digits::Significant(6)),
    }
}
