//! The strip of kept runs over the traces: number, dash and name of each, with its menu.

use egui::{Button, Sense, Stroke, Ui, pos2, vec2};
use helmsplit_view::plot::Figure;
use helmsplit_view::style::{KEPT_WIDTH, kept_pattern};

use super::{KeptAction, KeptRun, KeptRuns};
use crate::action::Action;
use crate::look::Look;
use crate::traces::dashed;

/// Length of the sample of a dash, points.
const SAMPLE: f32 = 44.0;

/// Letters of a name that are shown.
const LONGEST: usize = 30;

/// Draws the strip; nothing without kept runs.
pub(crate) fn strip(
    ui: &mut Ui,
    kept: &KeptRuns,
    figure: Option<&Figure>,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    if kept.runs().is_empty() {
        return;
    }
    ui.horizontal_wrapped(|ui| {
        ui.spacing_mut().item_spacing = vec2(6.0, 3.0);
        ui.label("Kept runs");
        for run in kept.runs() {
            sample(ui, run, look);
            let chosen = kept.chosen() == Some(run.place());
            let mark = if chosen { ", compared" } else { "" };
            let text = format!("({}) {}{mark}", run.number(), shortened(run.name()));
            let answer = ui.menu_button(text, |ui| run_items(ui, kept, run, actions));
            let fits = figure.is_none_or(|figure| run.fits(figure));
            let more = if fits {
                String::new()
            } else {
                "\nNone of its traces is among those of the present circuit.".to_owned()
            };
            let scenario = &run.scenario().name;
            answer
                .response
                .on_hover_text(format!("{}, of {scenario}{more}", run.name()));
            ui.add_space(8.0);
        }
    });
}

/// What can be done with a run.
pub(super) fn run_items(ui: &mut Ui, kept: &KeptRuns, run: &KeptRun, actions: &mut Vec<Action>) {
    ui.set_min_width(200.0);
    let place = run.place();
    let chosen = kept.chosen() == Some(place);
    let mut wish = None;
    if ui.radio(chosen, "Differences at the cursor").clicked() {
        wish = Some(KeptAction::Compare((!chosen).then_some(place)));
    }
    let mut shown = run.is_shown();
    if ui.checkbox(&mut shown, "Show its lines").clicked() {
        wish = Some(KeptAction::Show(place, shown));
    }
    ui.separator();
    for (text, action) in [
        ("Rename...", KeptAction::AskToRename(place)),
        ("Restore its circuit", KeptAction::Restore(place)),
        ("Drop this run", KeptAction::Drop(place)),
    ] {
        if ui.add(Button::new(text)).clicked() {
            wish = Some(action);
        }
    }
    if let Some(action) = wish {
        actions.push(Action::Kept(action));
        ui.close();
    }
}

fn sample(ui: &mut Ui, run: &KeptRun, look: &Look) {
    let (rect, _) = ui.allocate_exact_size(vec2(SAMPLE, 14.0), Sense::hover());
    let width = look.theme.strokes.series * KEPT_WIDTH;
    let y = rect.center().y;
    let colour = if run.is_shown() {
        look.ink()
    } else {
        look.hover()
    };
    let ends = [pos2(rect.left(), y), pos2(rect.right(), y)];
    let shapes = dashed(
        &ends,
        kept_pattern(run.place()),
        Stroke::new(width as f32, colour),
    );
    ui.painter().extend(shapes);
}

fn shortened(name: &str) -> String {
    if name.chars().count() <= LONGEST {
        return name.to_owned();
    }
    let start: String = name.chars().take(LONGEST - 1).collect();
    format!("{}\u{2026}", start.trim_end())
}
