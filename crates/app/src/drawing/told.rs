//! What is told of a part: its values at the cursor.

use egui::{Grid, Response, RichText, Tooltip, Ui};
use helmsplit_view::part_readings;
use helmsplit_view::plot::number_text;
use helmsplit_view::scene::Part;

use super::canvas::Drawn;
use super::names::{meant, section_of};
use crate::look::SMALL;
use crate::text::on_screen;

/// Writes the values of the part of that id.
pub(super) fn tell(ui: &mut Ui, drawn: &Drawn<'_>, id: &str, label: &str) {
    ui.set_max_width(340.0);
    let look = drawn.look;
    ui.strong(label);
    let Some(moment) = drawn.moment else {
        ui.label("Not solved yet.");
        return;
    };
    let told = part_readings(drawn.circuit, moment, id, drawn.units);
    ui.spacing_mut().interact_size.y = 0.0;
    let grid = Grid::new(("told", id)).num_columns(2);
    grid.spacing([16.0, 2.0]).show(ui, |ui| {
        for reading in &told {
            ui.label(RichText::new(&reading.name).color(look.quiet()));
            ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
                ui.label(on_screen(&reading.text));
            });
            ui.end_row();
        }
    });
    let of = if drawn.pale {
        ", of the last good values"
    } else {
        ""
    };
    let time = format!("at {} s{of}", on_screen(&number_text(moment.time, 4)));
    ui.label(RichText::new(time).size(SMALL).color(look.quiet()));
    if let Some(section) = section_of(id).filter(|section| *section != drawn.selected) {
        let text = format!("Click: the card of {}", section.label.to_lowercase());
        ui.label(RichText::new(text).size(SMALL).color(look.quiet()));
    }
}

/// The same beside the control that has the focus.
pub(super) fn tell_beside(response: &Response, drawn: &Drawn<'_>, part: &Part) {
    let context = response.ctx.clone();
    let tooltip = Tooltip::always_open(context, response.layer_id, response.id, response);
    tooltip.show(|ui| tell(ui, drawn, meant(&part.id), &part.label));
}

/// The same in one line, for screen readers.
pub(super) fn in_words(drawn: &Drawn<'_>, id: &str) -> String {
    let Some(moment) = drawn.moment else {
        return "Not solved yet".to_owned();
    };
    let told = part_readings(drawn.circuit, moment, id, drawn.units);
    let rows: Vec<String> = told
        .into_iter()
        .map(|reading| format!("{} {}", reading.name, reading.text))
        .collect();
    rows.join("; ")
}
