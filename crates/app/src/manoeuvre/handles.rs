//! The breakpoints of the line that is edited: dragged, stepped by keys, with a menu each.

use egui::{
    CursorIcon, EventFilter, Id, Key, Modifiers, Pos2, Rect, Response, Sense, Stroke, Ui,
    WidgetInfo, pos2, vec2,
};
use helmsplit_model::Quantity;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::units::{Unit, si_unit};

use super::aim::{Aim, Moved};
use super::edit::ListEdit;
use super::mark::callout;
use super::names::line_name;
use super::stage::Stage;
use super::state::{Drag, ListStates, Wish};
use crate::action::Action;
use crate::command::{Command, Stage as Gesture};
use crate::look::Look;
use crate::parts::Part;

/// Size of the area that takes the pointer, points.
const GRIP: f32 = 15.0;

/// Pointer travel from which on a coordinate follows, points: a point dragged along does not
/// change its value by accident.
const SLACK: f32 = 3.0;

/// Times larger steps with Shift.
const STRIDE: f64 = 10.0;

/// Draws the breakpoints and takes what is done to them.
pub(super) fn handles(
    ui: &mut Ui,
    stage: &Stage<'_>,
    states: &mut ListStates,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    let count = stage.scenario.manoeuvre.free(stage.input()).len();
    let mut spoken = None;
    for place in 0..count {
        let handle = Handle::new(stage, place, count);
        if !handle.is_in_view() {
            continue;
        }
        let response = handle.interact(ui, states);
        let limit = handle.take(ui, &response, states, actions);
        handle.menu(&response, actions);
        handle.paint(ui, &response, look);
        let active = response.dragged() || response.has_focus();
        if active || (response.hovered() && spoken.is_none()) {
            spoken = Some((handle, limit, response));
        }
    }
    if let Some((handle, limit, _)) = spoken {
        callout(
            ui,
            stage.rect,
            handle.at,
            &handle.text(),
            limit.as_deref(),
            look,
        );
    }
}

struct Handle<'a> {
    stage: &'a Stage<'a>,
    place: usize,
    count: usize,
    at: Pos2,
    /// Time in s and value in the display unit.
    numbers: (f64, f64),
    /// The other breakpoint, where the line jumps.
    twin: Option<usize>,
}

impl<'a> Handle<'a> {
    fn new(stage: &'a Stage<'a>, place: usize, count: usize) -> Self {
        let lines = &stage.scenario.manoeuvre;
        let point = &lines.free(stage.input())[place];
        let twin = lines.twin(stage.input(), place);
        Self {
            stage,
            place,
            count,
            at: stage.at(point.time.si(), point.value.si()),
            numbers: (point.time.si(), stage.unit.value_from_si(point.value.si())),
            twin,
        }
    }

    fn is_in_view(&self) -> bool {
        self.stage.time.contains(self.numbers.0)
    }

    /// `2.2 s, 80 rpm`.
    fn text(&self) -> String {
        let point = &self.stage.scenario.manoeuvre.free(self.stage.input())[self.place];
        super::mark::point_text(point.time.si(), point.value.si(), self.stage.unit)
    }

    /// `steering wheel rate, point 3 of 6, 2 s, 60 rpm`.
    fn name(&self) -> String {
        let jump = match self.twin {
            Some(twin) if twin > self.place => ", jump from",
            Some(_) => ", jump to",
            None => "",
        };
        format!(
            "{}, point {} of {}{jump}, {}",
            line_name(self.stage.input()),
            self.place + 1,
            self.count,
            self.text()
        )
    }

    fn interact(&self, ui: &Ui, states: &mut ListStates) -> Response {
        let id = Id::unique(("breakpoint", self.stage.row.path, self.place));
        // Held at the edge of the plot while it is dragged beyond.
        let at = pos2(
            self.at.x,
            self.at
                .y
                .clamp(self.stage.rect.top(), self.stage.rect.bottom()),
        );
        let grip = Rect::from_center_size(at, vec2(GRIP, GRIP));
        let response = ui.interact(grip, id, Sense::click_and_drag());
        let name = self.name();
        response.widget_info(|| WidgetInfo::labeled(egui::Role::Slider, true, &name));
        let wish = Wish::Point(self.stage.input(), self.place);
        if states.wish == Some(wish) {
            states.wish = None;
            response.request_focus();
        }
        let filter = EventFilter {
            horizontal_arrows: true,
            vertical_arrows: true,
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(id, filter));
        response.on_hover_and_drag_cursor(CursorIcon::Move)
    }

    /// Takes drags and keys; gives the limit that holds the point.
    fn take(
        &self,
        ui: &Ui,
        response: &Response,
        states: &mut ListStates,
        actions: &mut Vec<Action>,
    ) -> Option<String> {
        if response.clicked() || response.drag_started() {
            response.request_focus();
        }
        if response.drag_started() {
            let point = &self.stage.scenario.manoeuvre.free(self.stage.input())[self.place];
            states.drag = Some(Drag {
                from: (point.time.si(), point.value.si()),
                twin: self.twin,
                axis: (self.stage.value.low, self.stage.value.high),
            });
            states.notice.clear();
        }
        let mut limit = None;
        if response.dragged() {
            limit = self.drag(ui, response, states, actions);
        }
        if response.drag_stopped() {
            states.drag = None;
            actions.push(Action::FinishGesture);
        }
        if response.has_focus() && !response.dragged() {
            limit = limit.or(self.keys(ui, states, actions));
        }
        limit
    }

    fn drag(
        &self,
        ui: &Ui,
        response: &Response,
        states: &ListStates,
        actions: &mut Vec<Action>,
    ) -> Option<String> {
        let (Some(drag), Some(travel)) = (states.drag, response.total_drag_delta()) else {
            return None;
        };
        let modifiers = ui.input(|input| input.modifiers);
        let (mut along, mut across) = (travel.x.abs() > SLACK, travel.y.abs() > SLACK);
        if modifiers.shift {
            along &= travel.x.abs() >= travel.y.abs();
            across &= !along;
        }
        let start = self.stage.at(drag.from.0, drag.from.1);
        let (time, value) = self.stage.numbers_at(start + travel);
        let snap = states.snap && !modifiers.command;
        let moved = Moved {
            place: self.place,
            twin: drag.twin,
        };
        let aim = Aim::at(
            self.stage,
            moved,
            along.then_some(time),
            across.then_some(value),
            snap,
        );
        let limit = aim.limit.clone();
        // Back on its old time or value it takes the very number it began with.
        let exact = |si: f64, unit: &Unit| text_from_si(si, unit, Digits::Exact);
        let second = si_unit(Quantity::Time);
        let aim = Aim {
            time: aim.time.or_else(|| Some(exact(drag.from.0, second))),
            value: aim
                .value
                .or_else(|| Some(exact(drag.from.1, self.stage.unit))),
            limit: None,
        };
        if let Some(edit) = aim.edit(self.stage, moved) {
            actions.push(Action::Edit(Command::List(edit), Gesture::Ongoing));
        }
        limit
    }

    /// Takes keys; gives the limit that holds the point.
    fn keys(&self, ui: &Ui, states: &mut ListStates, actions: &mut Vec<Action>) -> Option<String> {
        let (input, place) = (self.stage.input(), self.place);
        let pressed = |key: Key| ui.input_mut(|i| i.consume_key(Modifiers::NONE, key));
        let edit = if pressed(Key::Delete) || pressed(Key::Backspace) {
            Some(ListEdit::RemovePoint { input, place })
        } else if pressed(Key::J) {
            Some(self.jump_edit())
        } else if pressed(Key::Insert) {
            Some(self.insertion())
        } else {
            None
        };
        if let Some(edit) = edit {
            actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
            return None;
        }
        if pressed(Key::Enter) {
            actions.extend(Part::of("manoeuvre").map(Action::Select));
            return None;
        }
        self.arrows(ui, states, actions)
    }

    fn arrows(
        &self,
        ui: &Ui,
        states: &mut ListStates,
        actions: &mut Vec<Action>,
    ) -> Option<String> {
        let modifiers = ui.input(|input| input.modifiers);
        let arrow = |key: Key| {
            let pressed = ui.input_mut(|input| input.count_and_consume_key(modifiers, key));
            pressed as f64
        };
        let along = arrow(Key::ArrowRight) - arrow(Key::ArrowLeft);
        let across = arrow(Key::ArrowUp) - arrow(Key::ArrowDown);
        if along == 0.0 && across == 0.0 {
            return None;
        }
        states.notice.clear();
        let snap = states.snap && !modifiers.command;
        let stride = if modifiers.shift { STRIDE } else { 1.0 };
        let (times, values) = (self.stage.time_steps(snap), self.stage.value_steps(snap));
        let time = self.numbers.0 + along * stride * times.size();
        let value = self.numbers.1 + across * stride * values.size();
        let moved = Moved {
            place: self.place,
            twin: self.twin,
        };
        let aim = Aim::at(
            self.stage,
            moved,
            (along != 0.0).then_some(time),
            (across != 0.0).then_some(value),
            snap,
        );
        let limit = aim.limit.clone();
        if let Some(limit) = &limit {
            states.notice = format!("The point is at its limit: {limit}");
        }
        if let Some(edit) = aim.edit(self.stage, moved) {
            actions.push(Action::Edit(Command::List(edit), Gesture::Ongoing));
        }
        limit
    }

    fn jump_edit(&self) -> ListEdit {
        let (low, high) = (self.stage.value.low, self.stage.value.high);
        // Away from where it is, so that the jump can be seen.
        let middle = f64::midpoint(low, high);
        let way = if self.numbers.1 > middle { -0.25 } else { 0.25 };
        let value = self.numbers.1 + way * (high - low);
        let (least, most) = self.stage.allowed();
        let value = self
            .stage
            .value_steps(true)
            .text(value.clamp(least, most), self.stage.unit);
        ListEdit::AddJump {
            input: self.stage.input(),
            place: self.place,
            value,
        }
    }

    /// A point half way to the next; behind the last a tenth of the view further.
    fn insertion(&self) -> ListEdit {
        let lines = &self.stage.scenario.manoeuvre;
        let next = lines.free(self.stage.input()).get(self.place + 1);
        let (time, _) = self.numbers;
        let time = next.map_or_else(
            || time + 0.1 * (self.stage.time.high - self.stage.time.low),
            |next| f64::midpoint(time, next.time.si()),
        );
        super::ground::addition(self.stage, time, None, false)
    }

    fn menu(&self, response: &Response, actions: &mut Vec<Action>) {
        let input = self.stage.input();
        let place = self.place;
        response.context_menu(|ui| {
            ui.set_min_width(210.0);
            ui.weak(self.text());
            let mut item = |ui: &mut Ui, text: &str, key: &str, action: Action| {
                if ui.add(egui::Button::new(text).shortcut_text(key)).clicked() {
                    actions.push(action);
                    ui.close();
                }
            };
            let edit = |edit| Action::Edit(Command::List(edit), Gesture::Finished);
            if self.twin.is_some() {
                let removal = ListEdit::RemovePoint { input, place };
                item(ui, "Remove from the jump", "Delete", edit(removal));
            } else {
                item(ui, "Make a jump here", "J", edit(self.jump_edit()));
                let removal = ListEdit::RemovePoint { input, place };
                item(ui, "Remove the point", "Delete", edit(removal));
            }
            item(
                ui,
                "Add a point behind it",
                "Insert",
                edit(self.insertion()),
            );
            if let Some(part) = Part::of("manoeuvre") {
                item(ui, "Edit in numbers", "Enter", Action::Select(part));
            }
        });
    }

    /// A disc; a square where the line jumps. A ring when it has the focus.
    fn paint(&self, ui: &Ui, response: &Response, look: &Look) {
        let painter = ui
            .painter()
            .with_clip_rect(self.stage.rect.expand(GRIP / 2.0).intersect(ui.clip_rect()));
        let colour = super::plot::colour(self.stage.input(), look);
        let ground = crate::look::egui_colour(look.theme.background);
        let active = response.hovered() || response.dragged() || response.has_focus();
        let radius = if active { 5.5 } else { 4.5 };
        let edge = Stroke::new(1.5, ground);
        if self.twin.is_some() {
            let square = Rect::from_center_size(self.at, vec2(radius, radius) * 1.8);
            painter.rect_filled(square, 0.0, colour);
            painter.rect_stroke(square, 0.0, edge, egui::StrokeKind::Outside);
        } else {
            painter.circle_filled(self.at, radius, colour);
            painter.circle_stroke(self.at, radius + 0.75, edge);
        }
        if response.has_focus() {
            let ring = Stroke::new(1.5, look.accent());
            painter.circle_stroke(self.at, radius + 3.0, ring);
        }
    }
}
