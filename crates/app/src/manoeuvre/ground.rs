//! The ground of the strip: clicks between the points, zoom, and adding points.

use egui::{Key, Modifiers, Pos2, Response, Ui};
use helmsplit_model::{Input, Quantity};
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::units::si_unit;

use super::edit::ListEdit;
use super::plot::Pale;
use super::stage::Stage;
use super::state::ListStates;
use crate::action::Action;
use crate::command::{Command, Stage as Gesture};
use crate::traces::TraceView;

/// A click this near to a line means the line, points.
const NEAR: f32 = 6.0;

/// Digits of a value taken from the line.
const DIGITS: u32 = 6;

/// Takes what is done to the ground: a click chooses a line or puts the cursor, a double click
/// adds a point, the wheel zooms with Ctrl and pans with Shift.
pub(super) fn take(
    ui: &Ui,
    stage: &Stage<'_>,
    pale: &[Pale],
    response: &Response,
    states: &mut ListStates,
    view: &mut TraceView,
    actions: &mut Vec<Action>,
) {
    let whole = stage.whole;
    if let Some(pointer) = response.interact_pointer_pos() {
        // A third click counts any click shortly before, wherever it was.
        if response.double_clicked() || response.triple_clicked() {
            // The first click of the two may have chosen another line: it meant this one.
            if let Some(line) = states.left.take() {
                states.line = Some(line);
            }
            states.add_at = Some(pointer);
            ui.ctx().request_repaint();
        } else if response.clicked() {
            states.notice.clear();
            states.left = None;
            match near(stage, pale, pointer) {
                Some(line) => {
                    states.left = Some(stage.input());
                    states.line = Some(line);
                }
                None => view.jump(stage.numbers_at(pointer).0, whole),
            }
            ui.ctx().request_repaint();
        }
    } else if let Some(pointer) = states.add_at.take() {
        let (time, value) = stage.numbers_at(pointer);
        let snap = states.snap && !ui.input(|input| input.modifiers.command);
        let on_line = distance(&screen_line(stage), pointer) <= NEAR;
        let value = (!on_line).then_some(value);
        let edit = addition(stage, time, value, snap);
        actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
    }
    if let Some(pointer) = response.hover_pos() {
        let (zoom, scroll) = ui.input(|input| (input.zoom_delta(), input.smooth_scroll_delta));
        let time = stage.numbers_at(pointer).0;
        if (zoom - 1.0).abs() > 1e-4 {
            view.scale(1.0 / f64::from(zoom), time, whole);
            ui.ctx().request_repaint();
        }
        if scroll.x.abs() > 0.1 {
            view.pan(-f64::from(scroll.x / stage.rect.width()), whole);
            ui.ctx().request_repaint();
        }
    }
    if response.has_focus() && ui.input_mut(|input| input.consume_key(Modifiers::NONE, Key::Insert))
    {
        let edit = addition(stage, view.cursor, None, false);
        actions.push(Action::Edit(Command::List(edit), Gesture::Finished));
    }
}

/// A new point at a time in s; its value in the display unit, or that of the line.
pub(super) fn addition(stage: &Stage<'_>, time: f64, value: Option<f64>, snap: bool) -> ListEdit {
    let second = si_unit(Quantity::Time);
    let time = time.max(0.0);
    let time_text = stage.time_steps(snap).text(time, second);
    let (least, most) = stage.allowed();
    let value = match (value, &stage.line) {
        (Some(value), _) => stage
            .value_steps(snap)
            .text(value.clamp(least, most), stage.unit),
        (None, line) => {
            let si = line
                .as_ref()
                .map_or(stage.row.level(), |line| line.value_at(time));
            text_from_si(si, stage.unit, Digits::Significant(DIGITS))
        }
    };
    ListEdit::AddPoint {
        input: stage.input(),
        time: time_text,
        value,
    }
}

fn screen_line(stage: &Stage<'_>) -> Vec<Pos2> {
    let Some(line) = &stage.line else {
        return Vec::new();
    };
    let (from, to) = (stage.time.low, stage.time.high);
    let ends = [from, to].map(|time| stage.at(time, line.value_at(time)));
    let inner = line.points().iter().filter(|p| stage.time.contains(p.time));
    let inner = inner.map(|point| stage.at(point.time, point.value));
    std::iter::once(ends[0])
        .chain(inner)
        .chain(std::iter::once(ends[1]))
        .collect()
}

/// The pale line under the pointer, unless the line that is edited is as near.
fn near(stage: &Stage<'_>, pale: &[Pale], pointer: Pos2) -> Option<Input> {
    if distance(&screen_line(stage), pointer) <= NEAR {
        return None;
    }
    let on_screen = |line: &Pale| -> Vec<Pos2> {
        let point = |&[time, height]: &[f64; 2]| {
            let point = egui_plot::PlotPoint::new(time, height);
            stage.transform.position_from_point(&point)
        };
        line.points.iter().map(point).collect()
    };
    pale.iter()
        .map(|line| (line.input, distance(&on_screen(line), pointer)))
        .filter(|(_, distance)| *distance <= NEAR)
        .min_by(|a, b| a.1.total_cmp(&b.1))
        .map(|(input, _)| input)
}

/// Distance from a broken line, points.
fn distance(line: &[Pos2], from: Pos2) -> f32 {
    let to_piece = |pair: &[Pos2]| {
        let (a, way) = (pair[0], pair[1] - pair[0]);
        let length = way.length_sq();
        let share = if length > 0.0 {
            ((from - a).dot(way) / length).clamp(0.0, 1.0)
        } else {
            0.0
        };
        from.distance(a + way * share)
    };
    line.windows(2).map(to_piece).fold(f32::INFINITY, f32::min)
}
