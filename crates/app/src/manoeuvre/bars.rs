//! Templates of the line that is edited: a bar for each stretch, dragged as a whole.

use egui::{
    CursorIcon, EventFilter, Id, Key, Modifiers, Rect, Response, Sense, Stroke, Ui, WidgetInfo,
    pos2,
};
use helmsplit_model::Quantity;
use helmsplit_scenario::manoeuvre::{Origin, Span};
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::units::si_unit;

use super::edit::ListEdit;
use super::mark::{clipped_text, number_text};
use super::names::line_name;
use super::stage::Stage;
use super::state::{Drag, ListStates, Wish};
use crate::action::Action;
use crate::command::{Command, Stage as Gesture};
use crate::look::Look;
use crate::parts::Part;

/// Narrowest bar, points.
const LEAST_WIDTH: f32 = 12.0;

/// Dots of a template closer than this are left out, points.
const DOT_SPACING: f32 = 7.0;

/// Draws the bars over the plot and the points that templates write.
pub(super) fn bars(
    ui: &mut Ui,
    stage: &Stage<'_>,
    row: Rect,
    states: &mut ListStates,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    let Some(line) = &stage.line else { return };
    dots(ui, stage, look);
    for (place, span) in line.spans().iter().enumerate() {
        let outside = span.end < stage.time.low || span.begin > stage.time.high;
        if outside {
            continue;
        }
        let bar = Bar {
            stage,
            row,
            span: *span,
            number: place + 1,
            count: line.spans().len(),
            ahead: place.checked_sub(1).is_some(),
            behind: place + 1 < line.spans().len(),
            next: line.spans().get(place + 1).map(|next| next.begin),
        };
        let response = bar.interact(ui, states);
        bar.take(ui, &response, states, actions);
        bar.paint(ui, &response, look);
        bar.menu(&response, actions);
    }
}

/// Small rings: they are not dragged one by one.
fn dots(ui: &Ui, stage: &Stage<'_>, look: &Look) {
    let Some(line) = &stage.line else { return };
    let painter = ui.painter().with_clip_rect(stage.rect.expand(4.0));
    let colour = super::plot::colour(stage.input(), look);
    let ground = crate::look::egui_colour(look.theme.background);
    let mut last = f32::NEG_INFINITY;
    for point in line.points() {
        let written = matches!(point.origin, Origin::Template(_));
        if !written || !stage.time.contains(point.time) {
            continue;
        }
        let at = stage.at(point.time, point.value);
        if at.x - last >= DOT_SPACING || (at.x - last).abs() < 1.0 {
            painter.circle(at, 2.5, ground, Stroke::new(1.2, colour));
            last = at.x;
        }
    }
}

struct Bar<'a> {
    stage: &'a Stage<'a>,
    row: Rect,
    span: Span,
    number: usize,
    count: usize,
    /// Whether templates stand ahead of it and behind it.
    ahead: bool,
    behind: bool,
    /// Begin of the next one, s.
    next: Option<f64>,
}

impl Bar<'_> {
    fn label(&self) -> &'static str {
        let template = &self.stage.scenario.manoeuvre.templates[self.span.template];
        template.kind.template().label
    }

    fn text(&self) -> String {
        let second = si_unit(Quantity::Time);
        format!(
            "{}, {} to {}",
            self.label(),
            number_text(self.span.begin, second),
            number_text(self.span.end, second)
        )
    }

    fn rect(&self) -> Rect {
        let x = |time: f64| self.stage.at(time, 0.0).x;
        let left = x(self.span.begin);
        let right = x(self.span.end).max(left + LEAST_WIDTH);
        Rect::from_min_max(pos2(left, self.row.top()), pos2(right, self.row.bottom()))
    }

    fn interact(&self, ui: &Ui, states: &mut ListStates) -> Response {
        let id = Id::unique(("template bar", self.span.template));
        let visible = self.rect().intersect(self.row);
        let response = ui.interact(visible, id, Sense::click_and_drag());
        let name = format!(
            "{}, template {} of {}: {}",
            line_name(self.stage.input()),
            self.number,
            self.count,
            self.text()
        );
        response.widget_info(|| WidgetInfo::labeled(egui::Role::Slider, true, &name));
        if states.wish == Some(Wish::Template(self.span.template)) {
            states.wish = None;
            response.request_focus();
        }
        let filter = EventFilter {
            horizontal_arrows: true,
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(id, filter));
        response.on_hover_and_drag_cursor(CursorIcon::ResizeHorizontal)
    }

    fn take(
        &self,
        ui: &Ui,
        response: &Response,
        states: &mut ListStates,
        actions: &mut Vec<Action>,
    ) {
        if response.clicked() || response.drag_started() {
            response.request_focus();
        }
        let snap = states.snap && !ui.input(|input| input.modifiers.command);
        if response.drag_started() {
            states.drag = Some(Drag {
                from: (self.span.begin, 0.0),
                twin: None,
                axis: (self.stage.value.low, self.stage.value.high),
            });
            states.notice.clear();
        }
        if response.dragged()
            && let (Some(drag), Some(travel)) = (states.drag, response.total_drag_delta())
        {
            let span = self.stage.time.high - self.stage.time.low;
            let way = f64::from(travel.x / self.stage.rect.width()) * span;
            actions.extend(self.moved(drag.from.0 + way, snap));
        }
        if response.drag_stopped() {
            states.drag = None;
            actions.push(Action::FinishGesture);
        }
        if response.has_focus() && !response.dragged() {
            self.keys(ui, snap, actions);
        }
    }

    fn keys(&self, ui: &Ui, snap: bool, actions: &mut Vec<Action>) {
        let place = self.span.template;
        let pressed = |key: Key| ui.input_mut(|input| input.consume_key(Modifiers::NONE, key));
        if pressed(Key::Delete) || pressed(Key::Backspace) {
            let edit = ListEdit::RemoveTemplate { place };
            actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
            return;
        }
        if pressed(Key::Enter) {
            actions.extend(Part::of("manoeuvre").map(Action::Select));
        }
        let modifiers = ui.input(|input| input.modifiers);
        let arrow = |key: Key| {
            let pressed = ui.input_mut(|input| input.count_and_consume_key(modifiers, key));
            pressed as f64
        };
        let along = arrow(Key::ArrowRight) - arrow(Key::ArrowLeft);
        if along != 0.0 {
            let stride = if modifiers.shift { 10.0 } else { 1.0 };
            let way = along * stride * self.stage.time_steps(snap).size();
            actions.extend(self.moved(self.span.begin + way, snap));
        }
    }

    /// Lets the template begin at a time, held by what stands ahead of it and behind it.
    fn moved(&self, begin: f64, snap: bool) -> Option<Action> {
        let line = self.stage.line.as_ref()?;
        let own = Origin::Template(self.span.template);
        let others = || {
            line.points()
                .iter()
                .filter(move |point| point.origin != own)
        };
        let ahead = others().rfind(|point| point.time <= self.span.begin);
        let behind = others().find(|point| point.time >= self.span.end);
        let least = ahead.map_or(0.0, |point| point.time);
        let length = self.span.end - self.span.begin;
        let most = behind.map_or(f64::INFINITY, |point| point.time - length);
        let second = si_unit(Quantity::Time);
        let rounded = self.stage.time_steps(snap).text(begin, second);
        let parsed = helmsplit_scenario::quantity_text::parse(&rounded, Quantity::Time).ok()?;
        let text = if parsed.si < least {
            text_from_si(least, second, Digits::Exact)
        } else if parsed.si > most {
            // Rounded down: a template that ends behind the next point is refused.
            let floor = (most.max(least) * 1e9).floor() / 1e9;
            text_from_si(floor.max(least), second, Digits::Significant(12))
        } else {
            rounded
        };
        let aimed = helmsplit_scenario::quantity_text::parse(&text, Quantity::Time).ok()?;
        let changes = aimed.si.to_bits() != self.span.begin.to_bits();
        let edit = ListEdit::SetTemplate {
            place: self.span.template,
            name: "at",
            text,
        };
        changes.then_some(Action::Edit(Command::List(edit), Gesture::Ongoing))
    }

    fn paint(&self, ui: &Ui, response: &Response, look: &Look) {
        let rect = self.rect().shrink2(egui::vec2(0.0, 1.0));
        let painter = ui
            .painter()
            .with_clip_rect(self.row.intersect(ui.clip_rect()));
        let colour = super::plot::colour(self.stage.input(), look);
        let fill = if response.hovered() || response.dragged() {
            look.hover()
        } else {
            look.control()
        };
        painter.rect_filled(rect, 3.0, fill);
        let edge = if response.has_focus() {
            Stroke::new(2.0, look.accent())
        } else {
            Stroke::new(1.0, colour)
        };
        painter.rect_stroke(rect, 3.0, edge, egui::StrokeKind::Inside);
        // A name longer than its bar goes on until the next one.
        let end = self.next.map_or(self.row.right(), |begin| {
            self.stage.at(begin, 0.0).x.min(self.row.right())
        });
        let room = Rect::from_min_max(rect.min, pos2(end.max(rect.right()), rect.bottom()));
        clipped_text(ui, room.intersect(self.row), self.label(), look);
    }

    fn menu(&self, response: &Response, actions: &mut Vec<Action>) {
        let place = self.span.template;
        response.context_menu(|ui| {
            ui.set_min_width(220.0);
            ui.weak(self.text());
            template_items(
                ui,
                place,
                (self.ahead, self.behind),
                self.ahead_place(),
                actions,
            );
            if ui
                .add(egui::Button::new("Edit in numbers").shortcut_text("Enter"))
                .clicked()
            {
                actions.extend(Part::of("manoeuvre").map(Action::Select));
                ui.close();
            }
        });
        let hovered = response.clone();
        hovered.on_hover_ui(|ui| {
            ui.set_max_width(320.0);
            ui.strong(self.text());
            let template = &self.stage.scenario.manoeuvre.templates[place];
            ui.label(template.kind.template().note);
            ui.weak("Drag the bar to move it. Its menu turns it into breakpoints.");
        });
    }

    /// The template ahead of it on the line.
    fn ahead_place(&self) -> Option<usize> {
        let spans = self.stage.line.as_ref()?.spans();
        Some(spans.get(self.number.checked_sub(2)?)?.template)
    }
}

/// What can be done to a template: the same in its menu and on its card.
pub(super) fn template_items(
    ui: &mut Ui,
    place: usize,
    (ahead, behind): (bool, bool),
    ahead_place: Option<usize>,
    actions: &mut Vec<Action>,
) {
    let items = [
        (
            "Turn into breakpoints",
            "Its points can be dragged one by one then.",
            true,
            Some(ListEdit::Dissolve { place }),
        ),
        (
            "Earlier",
            "Exchange it with the template ahead of it on the line.",
            ahead,
            ahead_place.map(|place| ListEdit::Exchange { place }),
        ),
        (
            "Later",
            "Exchange it with the next template on the line.",
            behind,
            Some(ListEdit::Exchange { place }),
        ),
        (
            "Remove",
            "Take it out.",
            true,
            Some(ListEdit::RemoveTemplate { place }),
        ),
    ];
    for (text, note, enabled, edit) in items {
        let button = ui.add_enabled(enabled, egui::Button::new(text));
        if let Some(edit) = edit.filter(|_| button.on_hover_text(note).clicked()) {
            actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
            ui.close();
        }
    }
}
