//! Pointer and keys over the traces.

use egui::{Key, Modifiers, PointerButton, Rect, Response, Ui};

use super::view::TraceView;

/// One press of a zoom key makes the stretch shorter by this factor.
const ZOOM: f64 = 0.8;

/// Takes what the user did: a click or drag puts the cursor, the other button marks a stretch to
/// zoom to, a double click shows the whole run, the wheel zooms with Ctrl and pans with Shift.
pub(super) fn take(
    ui: &Ui,
    response: &Response,
    plot: Rect,
    whole: (f64, f64),
    view: &mut TraceView,
) {
    let (from, to) = view.range(whole);
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
                view.show(begun, time, whole);
            }
        } else if !other && (response.clicked() || response.dragged_by(PointerButton::Primary)) {
            view.cursor = time;
            response.request_focus();
        }
    }
    if response.double_clicked() {
        view.show_whole();
    }
    if let Some(pointer) = response.hover_pos() {
        let (zoom, scroll) = ui.input(|input| (input.zoom_delta(), input.smooth_scroll_delta));
        if (zoom - 1.0).abs() > 1e-4 {
            view.scale(1.0 / f64::from(zoom), time_at(pointer.x), whole);
        }
        if scroll.x.abs() > 0.1 {
            view.pan(-f64::from(scroll.x / plot.width()), whole);
        }
    }
    if response.has_focus() {
        keys(ui, plot, whole, view);
    }
}

fn keys(ui: &Ui, plot: Rect, whole: (f64, f64), view: &mut TraceView) {
    let (from, to) = view.range(whole);
    let pixel = (to - from) / f64::from(plot.width());
    let pressed = |modifiers, key| ui.input_mut(|input| input.consume_key(modifiers, key));
    let steps = [
        (Modifiers::SHIFT, Key::ArrowLeft, -20.0),
        (Modifiers::SHIFT, Key::ArrowRight, 20.0),
        (Modifiers::NONE, Key::ArrowLeft, -1.0),
        (Modifiers::NONE, Key::ArrowRight, 1.0),
    ];
    for (modifiers, key, pixels) in steps {
        if pressed(modifiers, key) {
            view.jump(view.cursor + pixels * pixel, whole);
        }
    }
    if pressed(Modifiers::NONE, Key::Home) {
        view.jump(whole.0, whole);
    }
    if pressed(Modifiers::NONE, Key::End) {
        view.jump(whole.1, whole);
    }
    if pressed(Modifiers::NONE, Key::Plus) || pressed(Modifiers::NONE, Key::Equals) {
        view.scale(ZOOM, view.cursor, whole);
    }
    if pressed(Modifiers::NONE, Key::Minus) {
        view.scale(1.0 / ZOOM, view.cursor, whole);
    }
    if pressed(Modifiers::NONE, Key::Num0) {
        view.show_whole();
    }
}
