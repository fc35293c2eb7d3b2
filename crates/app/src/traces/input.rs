//! Pointer and keys over the traces.

use egui::{Event, EventFilter, Key, Modifiers, PointerButton, Rect, Response, Ui};
use helmsplit_view::plot::Figure;

use super::arrangement::Rearrange;
use super::view::TraceView;
use crate::action::Action;

/// One press of a zoom key makes the stretch shorter by this factor.
const ZOOM: f64 = 0.8;

/// One press of an arrow key moves a cursor by so many pixels with Shift.
const LEAP: f64 = 20.0;

/// What the pointer and the keys act on.
pub(super) struct Field<'a> {
    pub(super) figure: &'a Figure,
    pub(super) plot: Rect,
    pub(super) whole: (f64, f64),
}

/// Takes what the user did: a click or drag puts cursor A, with Shift cursor B; the other button
/// marks a stretch to zoom to; a double click shows the whole run; the wheel zooms with Ctrl and
/// pans with Shift.
pub(super) fn take(
    ui: &Ui,
    response: &Response,
    field: &Field<'_>,
    view: &mut TraceView,
    actions: &mut Vec<Action>,
) {
    let (from, to) = view.range(field.whole);
    let plot = field.plot;
    let time_at = |x: f32| {
        let share = f64::from((x - plot.left()) / plot.width()).clamp(0.0, 1.0);
        from + share * (to - from)
    };
    if let Some(pointer) = response.interact_pointer_pos() {
        let time = time_at(pointer.x);
        let other = response.dragged_by(PointerButton::Secondary)
            || response.drag_stopped_by(PointerButton::Secondary);
        if response.drag_started_by(PointerButton::Secondary) {
            view.selecting = Some(time);
        }
        if response.drag_stopped_by(PointerButton::Secondary) {
            if let Some(begun) = view.selecting.take()
                && (time - begun).abs() * f64::from(plot.width()) > 4.0 * (to - from)
            {
                view.show(begun, time, field.whole);
            }
        } else if !other && (response.clicked() || response.dragged_by(PointerButton::Primary)) {
            if ui.input(|input| input.modifiers.shift) {
                view.second = Some(time);
            } else {
                view.cursor = time;
            }
            response.request_focus();
        }
    }
    if response.double_clicked() {
        view.show_whole();
    }
    if let Some(pointer) = response.hover_pos() {
        let (zoom, scroll) = ui.input(|input| (input.zoom_delta(), input.smooth_scroll_delta));
        if (zoom - 1.0).abs() > 1e-4 {
            view.scale(1.0 / f64::from(zoom), time_at(pointer.x), field.whole);
        }
        if scroll.x.abs() > 0.1 {
            view.pan(-f64::from(scroll.x / plot.width()), field.whole);
        }
    }
    if response.has_focus() {
        // Arrow keys are for the cursors here, not for going to another control.
        let filter = EventFilter {
            horizontal_arrows: true,
            vertical_arrows: true,
            escape: view.second.is_some(),
            ..EventFilter::default()
        };
        ui.memory_mut(|memory| memory.set_focus_lock_filter(response.id, filter));
        cursor_keys(ui, field, view);
        zoom_keys(ui, field, view);
        panel_keys(ui, field, view);
        if ui.input(|input| {
            input
                .events
                .iter()
                .any(|event| matches!(event, Event::Copy))
        }) {
            actions.push(Action::CopyValues);
        }
    }
}

fn pressed(ui: &Ui, modifiers: Modifiers, key: Key) -> bool {
    ui.input_mut(|input| input.consume_key(modifiers, key))
}

/// Cursors: A with the arrow keys, B with Alt and the arrow keys.
fn cursor_keys(ui: &Ui, field: &Field<'_>, view: &mut TraceView) {
    let whole = field.whole;
    let (from, to) = view.range(whole);
    let pixel = (to - from) / f64::from(field.plot.width());
    // The longer combinations first: a shorter one would take them too.
    let steps = [
        (Modifiers::ALT | Modifiers::SHIFT, LEAP),
        (Modifiers::ALT, 1.0),
        (Modifiers::SHIFT, LEAP),
        (Modifiers::NONE, 1.0),
    ];
    for (modifiers, pixels) in steps {
        for (key, sign) in [(Key::ArrowLeft, -1.0), (Key::ArrowRight, 1.0)] {
            if !pressed(ui, modifiers, key) {
                continue;
            }
            let way = sign * pixels * pixel;
            if modifiers.alt {
                let second = view.second.unwrap_or(view.cursor);
                view.jump_second(second + way, whole);
            } else {
                view.jump(view.cursor + way, whole);
            }
        }
    }
    if pressed(ui, Modifiers::NONE, Key::Home) {
        view.jump(whole.0, whole);
    }
    if pressed(ui, Modifiers::NONE, Key::End) {
        view.jump(whole.1, whole);
    }
    if pressed(ui, Modifiers::NONE, Key::B) {
        view.second = Some(view.cursor);
    }
    if pressed(ui, Modifiers::NONE, Key::X)
        && let Some(second) = view.second
    {
        view.second = Some(view.cursor);
        view.jump(second, whole);
    }
    if view.second.is_some() && pressed(ui, Modifiers::NONE, Key::Escape) {
        view.second = None;
    }
    if pressed(ui, Modifiers::SHIFT, Key::N) {
        jump_to(view, whole, next_event(field.figure, view.cursor, -1.0));
    }
    if pressed(ui, Modifiers::NONE, Key::N) {
        jump_to(view, whole, next_event(field.figure, view.cursor, 1.0));
    }
}

fn jump_to(view: &mut TraceView, whole: (f64, f64), time: Option<f64>) {
    if let Some(time) = time {
        view.jump(time, whole);
    }
}

/// The nearest event behind a moment (`sign` 1) or before it (-1).
fn next_event(figure: &Figure, time: f64, sign: f64) -> Option<f64> {
    let away = |other: f64| (other - time) * sign;
    let times = figure.marks.iter().map(|mark| mark.time);
    let ahead = times.filter(|&other| away(other) > 1e-9);
    ahead.min_by(|a, b| away(*a).total_cmp(&away(*b)))
}

fn zoom_keys(ui: &Ui, field: &Field<'_>, view: &mut TraceView) {
    if pressed(ui, Modifiers::NONE, Key::Plus) || pressed(ui, Modifiers::NONE, Key::Equals) {
        view.scale(ZOOM, view.cursor, field.whole);
    }
    if pressed(ui, Modifiers::NONE, Key::Minus) {
        view.scale(1.0 / ZOOM, view.cursor, field.whole);
    }
    if pressed(ui, Modifiers::NONE, Key::Num0) {
        view.show_whole();
    }
    if pressed(ui, Modifiers::NONE, Key::Y) {
        view.follow = !view.follow;
    }
    if pressed(ui, Modifiers::NONE, Key::T) {
        view.table = !view.table;
    }
}

/// Panels: one is picked with the arrow keys, moved with Alt, hidden with H.
fn panel_keys(ui: &Ui, field: &Field<'_>, view: &mut TraceView) {
    let figure = field.figure;
    let labels: Vec<&str> = view
        .arrangement
        .shown(figure)
        .into_iter()
        .map(|place| figure.panels[place].label.as_str())
        .collect();
    let at = view
        .picked
        .as_ref()
        .and_then(|picked| labels.iter().position(|label| label == picked));
    let mut change = None;
    for (key, by) in [(Key::ArrowUp, -1_isize), (Key::ArrowDown, 1)] {
        if pressed(ui, Modifiers::ALT, key) {
            change = at.map(|at| Rearrange::Move(labels[at].to_owned(), by));
        }
        if pressed(ui, Modifiers::NONE, key) {
            let last = labels.len().saturating_sub(1);
            let to = at.map_or(0, |at| at.saturating_add_signed(by).min(last));
            view.picked = labels.get(to).map(|label| (*label).to_owned());
        }
    }
    if pressed(ui, Modifiers::SHIFT, Key::H) {
        change = Some(Rearrange::All);
    }
    if pressed(ui, Modifiers::NONE, Key::H)
        && let Some(at) = at
    {
        change = Some(Rearrange::Panel(labels[at].to_owned(), false));
        let next = labels
            .get(at + 1)
            .or_else(|| labels.get(at.wrapping_sub(1)));
        view.picked = next.map(|label| (*label).to_owned());
    }
    if let Some(change) = change {
        view.arrangement.apply(figure, &change);
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_view::plot::Mark;

    #[test]
    fn events_are_found_on_either_side() {
        let mark = |time| Mark {
            time,
            label: "relief cracks".to_owned(),
        };
        let figure = Figure {
            marks: vec![mark(1.0), mark(2.0), mark(3.5)],
            ..Figure::default()
        };
        for (time, sign, found) in [
            (0.0, 1.0, Some(1.0)),
            (2.0, 1.0, Some(3.5)),
            (2.0, -1.0, Some(1.0)),
            (1.0, -1.0, None),
            (9.0, 1.0, None),
        ] {
            assert_eq!(next_event(&figure, time, sign), found, "from {time}");
        }
    }
}
