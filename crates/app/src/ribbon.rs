//! The verdict ribbon: one chip for each check that was judged.

use egui::accesskit::Role;
use egui::{
    Color32, FontId, Painter, Pos2, Rect, Sense, Shape, Stroke, Ui, WidgetInfo, pos2, vec2,
};
use helmsplit_scenario::UnitSystem;
use helmsplit_study::{Check, CheckId, Status};

use crate::action::Action;
use crate::look::{BODY, Look, SMALL};
use crate::text::{check_name, limit, measure};

const HEIGHT: f32 = 24.0;
const ICON: f32 = 7.0;
const GAP: f32 = 6.0;

/// Draws the ribbon.
pub(crate) fn ribbon(
    ui: &mut Ui,
    checks: &[Check],
    open: Option<CheckId>,
    units: UnitSystem,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    let judged = |check: &&Check| check.figure.is_some();
    ui.horizontal_wrapped(|ui| {
        ui.spacing_mut().item_spacing = vec2(6.0, 4.0);
        if checks.is_empty() {
            ui.weak("No verdicts yet: the circuit is being solved.");
            return;
        }
        for check in checks.iter().filter(judged) {
            chip(ui, check, open == Some(check.id), units, look, actions);
        }
        let others: Vec<_> = checks.iter().filter(|check| !judged(check)).collect();
        if !others.is_empty() {
            ui.menu_button(format!("{} not judged", others.len()), |ui| {
                for check in others {
                    let reason = match &check.status {
                        Status::NotApplicable(reason) => reason.clone(),
                        status => status.word().to_owned(),
                    };
                    let text = format!("{}: {reason}", check_name(check.id));
                    if ui.button(text).clicked() {
                        actions.push(Action::Evidence(check.id));
                        ui.close();
                    }
                }
            });
        }
    });
}

fn chip(
    ui: &mut Ui,
    check: &Check,
    open: bool,
    units: UnitSystem,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    let word = check.status.word();
    let name = check_name(check.id);
    let figure = check
        .figure
        .map_or_else(String::new, |figure| measure(figure, units, 3));
    let colour = look.verdict(&check.status);
    let painter = ui.painter();
    let lay = |text: &str, size: f32, colour: Color32| {
        painter.layout_no_wrap(text.to_owned(), FontId::proportional(size), colour)
    };
    let parts = [
        lay(&name, BODY, look.quiet()),
        lay(&figure, BODY, look.ink()),
        lay(word, SMALL, colour),
    ];
    let text: f32 = parts.iter().map(|galley| galley.size().x + GAP).sum();
    let width = GAP + 2.0 * ICON + GAP + text;
    let (rect, response) = ui.allocate_exact_size(vec2(width, HEIGHT), Sense::click());
    let spoken = format!("{name} {figure}, {word}");
    response.widget_info(|| WidgetInfo::selected(Role::Button, true, open, &spoken));
    let painter = ui.painter();
    let ground = if response.hovered() || open {
        look.hover()
    } else {
        look.control()
    };
    painter.rect_filled(rect, 3.0, ground);
    if open || response.has_focus() {
        let foot = Rect::from_min_max(pos2(rect.left(), rect.bottom() - 2.0), rect.max);
        painter.rect_filled(foot, 0.0, look.accent());
    }
    let icon = pos2(rect.left() + GAP + ICON, rect.center().y);
    draw_icon(painter, icon, &check.status, colour, ground);
    let mut x = icon.x + ICON + GAP;
    for galley in parts {
        let y = rect.center().y - galley.size().y / 2.0;
        let advance = galley.size().x + GAP;
        painter.galley(pos2(x, y), galley, look.ink());
        x += advance;
    }
    let clicked = response.clicked();
    response.on_hover_ui(|ui| {
        ui.set_max_width(320.0);
        ui.strong(check.id.label());
        if let Some(limit) = limit(check, units) {
            ui.label(format!("{figure}, limit {limit}: {word}"));
        }
        if !check.note.is_empty() {
            ui.label(&check.note);
        }
        ui.weak("Click: the moment and the evidence.");
    });
    if clicked {
        actions.push(Action::Evidence(check.id));
    }
}

/// A shape for each verdict: a disc with a tick, a triangle with a bar, a square on its corner
/// with a cross, an empty ring.
pub(crate) fn draw_icon(
    painter: &Painter,
    centre: Pos2,
    status: &Status,
    colour: Color32,
    ground: Color32,
) {
    let at = |x: f32, y: f32| centre + vec2(x, y) * ICON;
    let mark = Stroke::new(1.8, ground);
    match status {
        Status::Pass => {
            painter.circle_filled(centre, ICON, colour);
            painter.line(vec![at(-0.45, 0.0), at(-0.1, 0.4), at(0.5, -0.4)], mark);
        }
        Status::Near => {
            let corners = vec![at(0.0, -1.0), at(1.05, 0.85), at(-1.05, 0.85)];
            painter.add(Shape::convex_polygon(corners, colour, Stroke::NONE));
            painter.line_segment([at(0.0, -0.35), at(0.0, 0.3)], mark);
            painter.circle_filled(at(0.0, 0.58), 1.0, ground);
        }
        Status::Fail => {
            let corners = vec![at(0.0, -1.1), at(1.1, 0.0), at(0.0, 1.1), at(-1.1, 0.0)];
            painter.add(Shape::convex_polygon(corners, colour, Stroke::NONE));
            painter.line_segment([at(-0.35, -0.35), at(0.35, 0.35)], mark);
            painter.line_segment([at(-0.35, 0.35), at(0.35, -0.35)], mark);
        }
        Status::NeedsMap | Status::NotApplicable(_) => {
            painter.circle_stroke(centre, ICON - 1.0, Stroke::new(1.5, colour));
        }
    }
}
