//! The traces painted off the screen.

use egui::{
    CentralPanel, Context, Frame, Margin, RawInput, Rect, RichText, Ui, ViewportId, pos2, vec2,
};
use helmsplit_raster::{Painter, Picture, RasterError};

use super::ExportForm;
use crate::kept::strip;
use crate::look::SMALL;
use crate::text::on_screen;
use crate::traces::{Shown, TraceView, least_height, traces};

/// Room for the title, the kept runs and the margins, points.
const HEAD: f32 = 84.0;

/// Text needs one frame to be measured and one to stand.
const FRAMES: usize = 3;

/// Paints the traces as they are shown, cursors and readings with them, on a picture of its own
/// size.
///
/// # Errors
/// [`RasterError`] if a shape cannot be painted.
pub(super) fn picture(
    shown: &Shown<'_>,
    view: &TraceView,
    form: &ExportForm,
) -> Result<Picture, RasterError> {
    let context = Context::default();
    shown.look.apply(&context);
    let scale = f32::from(form.scale);
    let height = f32::from(form.height).max(least_height(shown, view) + HEAD);
    let size = vec2(f32::from(form.width), height.ceil());
    let mut view = view.for_picture();
    let mut painter = Painter::new();
    let mut shapes = Vec::new();
    for _ in 0..FRAMES {
        let mut input = RawInput {
            screen_rect: Some(Rect::from_min_size(pos2(0.0, 0.0), size)),
            ..RawInput::default()
        };
        if let Some(root) = input.viewports.get_mut(&ViewportId::ROOT) {
            root.native_pixels_per_point = Some(scale);
        }
        let mut output = context.run_ui(input, |ui| page(ui, shown, &mut view));
        painter.take_textures(&mut output.textures_delta)?;
        shapes = output.shapes;
    }
    let meshes = context.tessellate(shapes, scale);
    let pixels = [size.x * scale, size.y * scale].map(|length| length.round() as usize);
    painter.paint(&meshes, pixels, scale, shown.look.ground())
}

fn page(ui: &mut Ui, shown: &Shown<'_>, view: &mut TraceView) {
    // Nobody can ask for anything in a picture.
    let mut actions = Vec::new();
    let frame = Frame::NONE
        .fill(shown.look.ground())
        .inner_margin(Margin::symmetric(12, 10));
    CentralPanel::default().frame(frame).show(ui, |ui| {
        ui.heading(&shown.figure.title);
        if !shown.figure.subtitle.is_empty() {
            let subtitle = RichText::new(on_screen(&shown.figure.subtitle)).size(SMALL);
            ui.add(egui::Label::new(subtitle.color(shown.look.quiet())).truncate());
        }
        strip(ui, shown.kept, Some(shown.figure), shown.look, &mut actions);
        traces(ui, shown, view, &mut actions);
    });
}
