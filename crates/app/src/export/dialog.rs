//! Asks what an export looks like.

use egui::{DragValue, RichText, Ui};
use helmsplit_view::BuiltInTheme;

use super::{ExportForm, ExportKind, HEIGHTS, SCALES, WIDTHS};
use crate::action::Action;
use crate::look::Look;

/// Draws the dialog.
pub(crate) fn export_dialog(
    ui: &mut Ui,
    form: &mut ExportForm,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    let quiet = |text: String| RichText::new(text).color(look.quiet());
    if form.kind == ExportKind::Svg {
        ui.heading("Export the traces as SVG");
        ui.label("The panels, lines and stretch of time that are shown.");
        colours(ui, form);
        number(ui, "Width, px", &mut form.width, WIDTHS);
    } else {
        ui.heading("Export the traces as PNG");
        ui.label("The traces as they are shown, in a size of their own.");
        number(ui, "Width, points", &mut form.width, WIDTHS);
        number(ui, "Least height, points", &mut form.height, HEIGHTS);
        ui.horizontal(|ui| {
            ui.label("Pixels per point");
            for scale in SCALES {
                ui.radio_value(&mut form.scale, scale, scale.to_string());
            }
            let width = u32::from(form.width) * u32::from(form.scale);
            ui.label(quiet(format!("{width} px wide")));
        });
    }
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        if ui.button("Choose the file...").clicked() {
            actions.push(Action::AskExportFile(form.clone()));
        }
        if ui.button("Cancel").clicked() {
            actions.push(Action::CloseDialog);
        }
    });
}

fn colours(ui: &mut Ui, form: &mut ExportForm) {
    ui.horizontal(|ui| {
        ui.label("Colours");
        for (theme, name) in [
            (BuiltInTheme::Light, "Light"),
            (BuiltInTheme::Dark, "Dark"),
            (BuiltInTheme::Print, "Print"),
        ] {
            ui.radio_value(&mut form.theme, theme, name);
        }
    });
}

fn number(ui: &mut Ui, label: &str, value: &mut u16, range: std::ops::RangeInclusive<u16>) {
    ui.horizontal(|ui| {
        let name = ui.label(label);
        ui.add(DragValue::new(value).range(range).speed(10.0))
            .labelled_by(name.id);
    });
}
