//! The scale of the shades: which colour is which pressure.

use egui::{
    Align2, FontId, Mesh, Rect, Sense, Shape, Stroke, StrokeKind, Ui, WidgetInfo, pos2, vec2,
};
use helmsplit_model::Quantity;
use helmsplit_view::plot::number_text;
use helmsplit_view::{PressureScale, unit_text};

use super::Source;
use crate::look::{SMALL, egui_colour};
use crate::text::on_screen;

/// Height of the bar, points.
const HEIGHT: f32 = 8.0;

/// Fields between two stops of the ramp: colours are mixed between them.
const FIELDS: u16 = 32;

/// Draws the scale in one row.
pub(super) fn bar(ui: &mut Ui, source: &Source<'_>) {
    let look = source.look;
    let scale = PressureScale::of(source.of.circuit.parts());
    let unit = source.units.unit(Quantity::Pressure);
    let most = unit.value_from_si(scale.most);
    let places = usize::from(most < 20.0);
    let number = |share: f64| on_screen(&number_text(most * share, places));
    let symbol = on_screen(&unit_text(unit));
    let (row, response) =
        ui.allocate_exact_size(vec2(ui.available_width().floor(), 14.0), Sense::hover());
    let spoken = format!(
        "Pressure scale, {} to {} {symbol}",
        number(0.0),
        number(1.0)
    );
    response.widget_info(|| WidgetInfo::labeled(egui::Role::Label, true, &spoken));
    let painter = ui.painter();
    let font = FontId::proportional(SMALL);
    let lay = |text: String| painter.layout_no_wrap(text, font.clone(), look.quiet());
    let (low, high) = (
        lay(format!("Pressure {}", number(0.0))),
        lay(format!("{} {symbol}", number(1.0))),
    );
    let left = row.left() + low.size().x + 6.0;
    let right = (row.right() - high.size().x - 6.0).min(left + 260.0);
    let middle = row.center().y;
    let text = |at, galley: std::sync::Arc<egui::Galley>, align: Align2| {
        let place = align.anchor_size(at, galley.size());
        painter.galley(place.min, galley, look.quiet());
    };
    text(pos2(left - 6.0, middle), low, Align2::RIGHT_CENTER);
    text(pos2(right + 6.0, middle), high, Align2::LEFT_CENTER);
    let bar = Rect::from_min_max(
        pos2(left, middle - 0.5 * HEIGHT),
        pos2(right, middle + 0.5 * HEIGHT),
    );
    let mut mesh = Mesh::default();
    for field in 0..=FIELDS {
        let share = f64::from(field) / f64::from(FIELDS);
        let colour = egui_colour(look.theme.pressure.at(share));
        let colour = if source.pale {
            look.paled(colour)
        } else {
            colour
        };
        let x = bar.left() + bar.width() * share as f32;
        mesh.colored_vertex(pos2(x, bar.top()), colour);
        mesh.colored_vertex(pos2(x, bar.bottom()), colour);
        if field > 0 {
            let next = 2 * u32::from(field);
            mesh.add_triangle(next - 2, next - 1, next);
            mesh.add_triangle(next - 1, next, next + 1);
        }
    }
    painter.add(Shape::mesh(mesh));
    let outline = Stroke::new(1.0, look.quiet());
    painter.rect_stroke(bar, 0.0, outline, StrokeKind::Outside);
}
