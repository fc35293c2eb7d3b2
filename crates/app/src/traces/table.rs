//! The table of readings: every line that is shown, at both cursors and in kept runs.

use egui::{Align, Grid, Layout, RichText, ScrollArea, Ui};

use super::drawn::Drawn;
use super::reading::{Digits, PanelReading, Readings};
use super::readout::digits_of;
use super::{Shown, TraceView};
use crate::action::Action;
use crate::export::{COPY_TABLE, COPY_VALUES};
use crate::look::Look;
use crate::text::{on_screen, real_minus};

/// Draws the table.
pub(super) fn table(
    ui: &mut Ui,
    shown: &Shown<'_>,
    view: &mut TraceView,
    actions: &mut Vec<Action>,
) {
    let readings = Readings::take(shown, view);
    ui.horizontal(|ui| {
        ui.label(RichText::new("Readings").strong());
        if view.second.is_none() {
            let hint = "Shift and a click put cursor B.";
            ui.label(RichText::new(hint).color(shown.look.quiet()));
        }
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            if ui.button("Close the table").clicked() {
                view.table = false;
            }
            if ui.button(COPY_VALUES).clicked() {
                actions.push(Action::CopyValues);
            }
            if ui.button(COPY_TABLE).clicked() {
                actions.push(Action::CopyTable);
            }
        });
    });
    let digits = |place: usize| {
        let drawn = view.drawn.as_ref();
        let panel = drawn.and_then(|drawn: &Drawn| drawn.panels.iter().find(|p| p.place == place));
        panel.map(digits_of).unwrap_or(Digits {
            exponent: 0,
            places: 3,
        })
    };
    ScrollArea::both()
        .id_salt("readings")
        .auto_shrink([false, false])
        .show(ui, |ui| {
            Grid::new("readings")
                .striped(true)
                .spacing([18.0, 2.0])
                .show(ui, |ui| {
                    ui.strong("Trace");
                    ui.strong("Unit");
                    for column in readings.columns() {
                        number(ui, RichText::new(on_screen(&real_minus(&column))).strong());
                    }
                    ui.end_row();
                    for panel in &readings.panels {
                        rows(ui, panel, &readings, digits(panel.place), shown.look);
                    }
                });
        });
}

fn rows(ui: &mut Ui, panel: &PanelReading, readings: &Readings, digits: Digits, look: &Look) {
    let unit = digits.unit(&panel.unit);
    for line in &panel.lines {
        let name = if line.label == panel.label {
            line.label.clone()
        } else {
            format!("{}: {}", panel.label, line.label)
        };
        ui.label(name);
        ui.label(RichText::new(&unit).color(look.quiet()));
        let values = 1 + usize::from(readings.b.is_some());
        let differences = if readings.b.is_some() { 2 } else { 0 };
        let kept = values + differences..values + differences + readings.kept.len();
        for (column, value) in readings.numbers(line).into_iter().enumerate() {
            let text = if column < values || kept.contains(&column) {
                digits.value(value)
            } else {
                digits.difference(value)
            };
            number(ui, RichText::new(text));
        }
        ui.end_row();
    }
}

fn number(ui: &mut Ui, text: RichText) {
    ui.with_layout(Layout::right_to_left(Align::Center), |ui| ui.label(text));
}
