//! One number of the circuit: typed in any unit, dragged, stepped by keys or wheel.

use egui::{Align, CursorIcon, Id, Key, Layout, Modifiers, RichText, Sense, TextEdit, Ui, vec2};
use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::quantity_text::{Digits, number_from_si, parse};
use helmsplit_scenario::units::{Unit, all_units};
use helmsplit_scenario::{Findings, Parameter, Scenario, Severity, UnitSystem};

use crate::action::Action;
use crate::command::{Command, Stage};
pub(crate) use crate::field_states::FieldStates;
use crate::look::{Look, SMALL};
use crate::quantity_step::step_of;
use crate::select_all::select_all;
use crate::spot::Spot;
use crate::text::{real_minus, unit_label, with_unit};

/// Digits of a number at rest.
const DIGITS: u32 = 7;

/// Pointer travel for one step, points.
const STEP_TRAVEL: f32 = 4.0;

const TEXT_WIDTH: f32 = 72.0;
const UNIT_WIDTH: f32 = 54.0;
const RESET_WIDTH: f32 = 32.0;

/// What a field needs to know.
pub(crate) struct FieldContext<'a> {
    pub(crate) scenario: &'a Scenario,
    pub(crate) findings: &'a Findings,
    pub(crate) units: UnitSystem,
    pub(crate) look: &'a Look,
}

/// Draws the field of one parameter.
pub(crate) fn quantity_field(
    ui: &mut Ui,
    row: &'static Parameter,
    context: &FieldContext<'_>,
    states: &mut FieldStates,
    actions: &mut Vec<Action>,
) {
    let unit = display_unit(row, context.units);
    let field = Field {
        row,
        unit,
        step: step_of(row, unit),
        value: unit.value_from_si(context.scenario.si(row.id)),
        context,
    };
    let line = ui.horizontal(|ui| {
        ui.spacing_mut().item_spacing.x = 4.0;
        let room = ui.available_width() - TEXT_WIDTH - UNIT_WIDTH - RESET_WIDTH - 14.0;
        let label = field.label(ui, room.max(80.0), states, actions);
        field.number(ui, label, states, actions);
        field.unit(ui);
        field.reset(ui, actions);
    });
    states.mark(
        ui,
        Spot::Parameter(row.id),
        line.response.rect,
        context.look,
    );
    field.remarks(ui, states);
}

struct Field<'a> {
    row: &'static Parameter,
    unit: &'static Unit,
    step: f64,
    value: f64,
    context: &'a FieldContext<'a>,
}

impl Field<'_> {
    /// The name, which is also the handle to drag. Gives its id.
    fn label(
        &self,
        ui: &mut Ui,
        width: f32,
        states: &mut FieldStates,
        actions: &mut Vec<Action>,
    ) -> Id {
        let text = egui::Label::new(self.row.label)
            .truncate()
            .selectable(false)
            .sense(Sense::drag());
        let height = ui.spacing().interact_size.y;
        let response = ui
            .allocate_ui_with_layout(vec2(width, height), Layout::left_to_right(Align::Center), {
                |ui: &mut Ui| {
                    ui.set_min_width(width);
                    ui.add(text)
                }
            })
            .inner
            .on_hover_cursor(CursorIcon::ResizeHorizontal)
            .on_hover_ui(|ui| self.tooltip(ui));
        let id = self.row.id;
        if response.drag_started() {
            states.drag = Some((id, self.value, 0.0));
        }
        if let Some((dragged, from, way)) = &mut states.drag
            && *dragged == id
        {
            if response.dragged() {
                let before = (*way / STEP_TRAVEL).round();
                *way += response.drag_delta().x;
                let steps = (*way / STEP_TRAVEL).round();
                let (from, moved) = (*from, (steps - before).abs() > 0.0);
                if moved {
                    states.typing = None;
                    self.set(from + f64::from(steps) * self.step, actions);
                }
            }
            if response.drag_stopped() {
                states.drag = None;
                actions.push(Action::FinishGesture);
            }
        }
        response.id
    }

    fn number(&self, ui: &mut Ui, label: Id, states: &mut FieldStates, actions: &mut Vec<Action>) {
        let id = self.row.id;
        // The same limit may stand on its card and beside the evidence.
        let field_id = ui.make_persistent_id(("quantity field", self.row.path));
        let focused = ui.memory(|memory| memory.has_focus(field_id));
        if focused {
            self.nudges(ui, states, actions);
        }
        let shown = self.shown();
        let mut text = match (&states.typing, states.refused.get(&id)) {
            (Some((typed, text)), _) if *typed == id => text.clone(),
            (_, Some((text, _))) => text.clone(),
            _ => shown.clone(),
        };
        let mut edit = TextEdit::singleline(&mut text)
            .id(field_id)
            .desired_width(TEXT_WIDTH - 8.0)
            .align(egui::Align2::RIGHT_CENTER);
        if states.refused.contains_key(&id) {
            edit = edit.text_color(self.context.look.error());
        }
        let response = ui.add(edit).labelled_by(label);
        let spot = Spot::Parameter(id);
        if states.seeks(spot) && response.has_focus() {
            select_all(ui, field_id, &text);
        }
        states.lead(ui, spot, &response);
        if response.changed() {
            states.typing = Some((id, text.clone()));
        }
        if response.lost_focus() {
            let typed = states.typing.take_if(|(typed, _)| *typed == id);
            if ui.input(|input| input.key_pressed(Key::Escape)) {
                states.refused.remove(&id);
            } else if let Some((_, typed)) = typed {
                let text = self.completed(&typed);
                let command = Command::SetText { id, text };
                actions.push(Action::Edit(command, Stage::Finished));
            }
            actions.push(Action::FinishGesture);
        }
    }

    /// Arrow keys, page keys and wheel step the value of the focused field.
    fn nudges(&self, ui: &Ui, states: &mut FieldStates, actions: &mut Vec<Action>) {
        let keys = [
            (Modifiers::NONE, Key::ArrowUp, 1.0),
            (Modifiers::NONE, Key::ArrowDown, -1.0),
            (Modifiers::NONE, Key::PageUp, 10.0),
            (Modifiers::NONE, Key::PageDown, -10.0),
        ];
        let mut steps = ui.input_mut(|input| {
            let pressed = |&(modifiers, key, steps): &(Modifiers, Key, f64)| {
                f64::from(u8::from(input.consume_key(modifiers, key))) * steps
            };
            keys.iter().map(pressed).sum::<f64>()
        });
        if ui.rect_contains_pointer(ui.min_rect()) {
            let turned = ui.input_mut(|input| std::mem::take(&mut input.smooth_scroll_delta.y));
            steps += f64::from(turned.signum()) * f64::from(u8::from(turned.abs() > 0.5));
        }
        if steps != 0.0 {
            states.typing = None;
            self.set(self.value + steps * self.step, actions);
        }
    }

    /// Asks for the value nearest to `wanted` on the grid of steps.
    fn set(&self, wanted: f64, actions: &mut Vec<Action>) {
        let number = (wanted / self.step).round() * self.step;
        let places = (-self.step.log10().floor()).clamp(0.0, 12.0) as usize;
        let text = self.completed(&format!("{number:.places$}"));
        let command = Command::SetText {
            id: self.row.id,
            text,
        };
        actions.push(Action::Edit(command, Stage::Ongoing));
    }

    /// A bare number gets the unit that stands beside the field.
    fn completed(&self, typed: &str) -> String {
        let typed = typed.trim().replace(helmsplit_view::plot::MINUS, "-");
        if typed.parse::<f64>().is_ok() && !self.unit.is_bare() {
            format!("{typed} {}", self.unit)
        } else {
            typed
        }
    }

    /// The value at rest.
    fn shown(&self) -> String {
        let si = self.context.scenario.si(self.row.id);
        real_minus(&number_from_si(si, self.unit, Digits::Significant(DIGITS)))
    }

    fn unit(&self, ui: &mut Ui) {
        let height = ui.spacing().interact_size.y;
        let symbol = unit_label(self.unit);
        if symbol.is_empty() {
            ui.allocate_exact_size(vec2(UNIT_WIDTH, height), Sense::hover());
            return;
        }
        let text = RichText::new(symbol).color(self.context.look.quiet());
        ui.allocate_ui_with_layout(
            vec2(UNIT_WIDTH, height),
            Layout::left_to_right(Align::Center),
            |ui| {
                ui.set_min_width(UNIT_WIDTH);
                ui.add(egui::Label::new(text).truncate());
            },
        );
    }

    fn reset(&self, ui: &mut Ui, actions: &mut Vec<Action>) {
        let id = self.row.id;
        if self.context.scenario.is_default(id) {
            return;
        }
        let text = RichText::new("reset").size(SMALL);
        let response = ui.add(egui::Button::new(text).frame(false));
        let name = format!("Reset {}", self.row.label);
        response.widget_info(|| {
            egui::WidgetInfo::labeled(egui::accesskit::Role::Button, true, name.clone())
        });
        if response
            .on_hover_text(format!("Back to the default, {}", self.row.default))
            .clicked()
        {
            let command = Command::Reset { id };
            actions.push(Action::Edit(command, Stage::Finished));
        }
    }

    /// What is wrong or doubtful, under the field.
    fn remarks(&self, ui: &mut Ui, states: &FieldStates) {
        let look = self.context.look;
        let remark = |ui: &mut Ui, text: String, colour| {
            ui.label(RichText::new(text).size(SMALL).color(colour));
        };
        if let Some((_, reason)) = states.refused.get(&self.row.id) {
            remark(ui, format!("Not taken: {reason}"), look.error());
        } else if let Some((typed, text)) = &states.typing
            && *typed == self.row.id
            && let Err(error) = parse(&self.completed(text), self.row.quantity)
        {
            remark(ui, format!("Not yet: {error}"), look.warning());
        }
        let own = self.context.findings.iter();
        for finding in own.filter(|finding| finding.path == self.row.path) {
            let (word, colour) = match finding.severity {
                Severity::Error => ("Error", look.error()),
                Severity::Warning => ("Note", look.warning()),
            };
            let hint = if finding.hint.is_empty() {
                String::new()
            } else {
                format!("; {}", finding.hint)
            };
            remark(ui, format!("{word}: {}{hint}", finding.message), colour);
        }
    }

    fn tooltip(&self, ui: &mut Ui) {
        ui.set_max_width(320.0);
        let row = self.row;
        let symbol = if row.symbol.is_empty() {
            String::new()
        } else {
            format!("  ({})", row.symbol)
        };
        ui.strong(format!("{}{symbol}", row.label));
        ui.label(row.note);
        let own = row.unit();
        let text = |number: f64| with_unit(own.si_from_value(number), self.unit, 4);
        ui.label(format!(
            "Usual: {} to {}. Allowed: {} to {}.",
            text(row.usual.low),
            text(row.usual.high),
            text(row.allowed.low),
            text(row.allowed.high)
        ));
        if !row.source.is_empty() {
            ui.weak(format!("Source: {}", row.source));
        }
        let same: Vec<_> = all_units()
            .iter()
            .filter(|unit| unit.quantity() == row.quantity && !unit.is_bare())
            .map(unit_label)
            .collect();
        if same.len() > 1 {
            ui.weak(format!("Type any of {}.", same.join(", ")));
        }
        ui.weak("Drag the name, or step with arrow keys, Page keys or the wheel.");
    }
}
