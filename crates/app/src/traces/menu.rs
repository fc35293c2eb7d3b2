//! Menus over the traces: which panels and lines are shown, in which order, and what can be taken
//! away.

use egui::Ui;
use helmsplit_view::plot::{Figure, Panel};

use super::arrangement::Rearrange;
use super::view::TraceView;
use crate::action::Action;
use crate::export::{self, ExportKind};
use crate::kept::KeptAction;

/// What of the window the list of panels leaves to everything else, points.
const ROOM_AROUND: f32 = 330.0;

/// The menu of all panels: show, hide, move, axes.
pub(crate) fn traces_menu(ui: &mut Ui, figure: &Figure, view: &mut TraceView) {
    ui.set_min_width(300.0);
    let mut changes = Vec::new();
    let shown = view.arrangement.shown(figure);
    egui::ScrollArea::vertical()
        .max_height((ui.ctx().content_rect().height() - ROOM_AROUND).max(200.0))
        .show(ui, |ui| {
            for place in view.arrangement.all(figure) {
                let panel = &figure.panels[place];
                let at = shown.iter().position(|&other| other == place);
                ui.horizontal(|ui| {
                    let mut on = at.is_some();
                    if ui.checkbox(&mut on, &panel.label).changed() {
                        changes.push(Rearrange::Panel(panel.label.clone(), on));
                    }
                    ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
                        let last = shown.len().saturating_sub(1);
                        step(
                            ui,
                            "Down",
                            panel,
                            1,
                            at.is_some_and(|at| at < last),
                            &mut changes,
                        );
                        step(
                            ui,
                            "Up",
                            panel,
                            -1,
                            at.is_some_and(|at| at > 0),
                            &mut changes,
                        );
                    });
                });
                if panel.series.len() > 1 && at.is_some() {
                    ui.indent(("lines", place), |ui| lines(ui, panel, view, &mut changes));
                }
            }
        });
    ui.separator();
    ways_back(ui, view, &mut changes);
    ui.separator();
    ui.checkbox(&mut view.follow, "Value axes follow the zoom");
    ui.checkbox(&mut view.table, "Table of readings");
    for change in &changes {
        view.arrangement.apply(figure, change);
    }
}

fn ways_back(ui: &mut Ui, view: &TraceView, changes: &mut Vec<Rearrange>) {
    ui.horizontal(|ui| {
        let everything = egui::Button::new("Show everything");
        if ui
            .add_enabled(!view.arrangement.shows_all(), everything)
            .clicked()
        {
            changes.push(Rearrange::All);
        }
        let order = egui::Button::new("Usual order");
        if ui
            .add_enabled(!view.arrangement.is_in_figure_order(), order)
            .clicked()
        {
            changes.push(Rearrange::FigureOrder);
        }
    });
}

fn step(
    ui: &mut Ui,
    word: &str,
    panel: &Panel,
    by: isize,
    possible: bool,
    changes: &mut Vec<Rearrange>,
) {
    let response = ui.add_enabled(possible, egui::Button::new(word).small());
    let spoken = format!("{word}: {}", panel.label);
    response.widget_info(|| {
        egui::WidgetInfo::labeled(egui::accesskit::Role::Button, possible, &spoken)
    });
    if response.clicked() {
        changes.push(Rearrange::Move(panel.label.clone(), by));
    }
}

fn lines(ui: &mut Ui, panel: &Panel, view: &TraceView, changes: &mut Vec<Rearrange>) {
    for series in &panel.series {
        let mut on = view.arrangement.shows_line(&panel.label, &series.label);
        let response = ui.checkbox(&mut on, &series.label);
        let spoken = format!("{}: {}", panel.label, series.label);
        response.widget_info(|| {
            egui::WidgetInfo::selected(egui::accesskit::Role::CheckBox, true, on, &spoken)
        });
        if response.changed() {
            let (of, name) = (panel.label.clone(), series.label.clone());
            changes.push(Rearrange::Line(of, name, on));
        }
    }
}

/// The menu of one panel, over its names.
pub(super) fn panel_menu(
    ui: &mut Ui,
    figure: &Figure,
    panel: &Panel,
    view: &TraceView,
    changes: &mut Vec<Rearrange>,
) {
    ui.set_min_width(200.0);
    ui.strong(&panel.label);
    let label = || panel.label.clone();
    let shown = view.arrangement.shown(figure);
    let at = shown
        .iter()
        .position(|&place| figure.panels[place].label == panel.label);
    let (first, last) = (at == Some(0), at.is_some_and(|at| at + 1 == shown.len()));
    let items = [
        ("Move up", !first, Rearrange::Move(label(), -1)),
        ("Move down", !last, Rearrange::Move(label(), 1)),
        ("Hide this panel", true, Rearrange::Panel(label(), false)),
        ("Hide all others", shown.len() > 1, Rearrange::Only(label())),
        (
            "Show everything",
            !view.arrangement.shows_all(),
            Rearrange::All,
        ),
    ];
    for (text, possible, change) in items {
        if ui.add_enabled(possible, egui::Button::new(text)).clicked() {
            changes.push(change);
            ui.close();
        }
    }
    if panel.series.len() > 1 {
        ui.separator();
        lines(ui, panel, view, changes);
    }
}

/// The menu over the plots: what can be kept, copied and written.
pub(super) fn plot_menu(ui: &mut Ui, view: &mut TraceView, actions: &mut Vec<Action>) {
    ui.set_min_width(220.0);
    let mut item = |ui: &mut Ui, text: &str, action: Action| {
        if ui.button(text).clicked() {
            actions.push(action);
            ui.close();
        }
    };
    item(ui, "Keep this run...", Action::Kept(KeptAction::AskToKeep));
    ui.separator();
    item(ui, export::COPY_VALUES, Action::CopyValues);
    item(ui, export::COPY_TABLE, Action::CopyTable);
    ui.separator();
    for kind in ExportKind::ALL {
        item(ui, kind.item(), Action::AskExport(kind));
    }
    ui.separator();
    if view.second.is_some() {
        if ui.button("Remove cursor B").clicked() {
            view.second = None;
            ui.close();
        }
    } else if ui.button("Cursor B here").clicked() {
        view.second = Some(view.cursor);
        ui.close();
    }
    if ui
        .add_enabled(!view.is_whole(), egui::Button::new("Whole run"))
        .clicked()
    {
        view.show_whole();
        ui.close();
    }
}
