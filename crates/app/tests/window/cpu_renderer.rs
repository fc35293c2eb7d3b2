//! Our own renderer under the test harness.

use egui_kittest::TestRenderer;
use helmsplit_raster::Painter;
use image::RgbaImage;

/// Paints what the harness shows.
#[derive(Default)]
pub(crate) struct CpuRenderer {
    painter: Painter,
}

impl TestRenderer for CpuRenderer {
    fn handle_delta(&mut self, delta: &mut egui::TexturesDelta) {
        self.painter
            .take_textures(delta)
            .expect("updates lie within their textures");
    }

    fn render(
        &mut self,
        context: &egui::Context,
        output: &egui::FullOutput,
    ) -> Result<RgbaImage, String> {
        let scale = output.pixels_per_point;
        let meshes = context.tessellate(output.shapes.clone(), scale);
        let size = context.content_rect().size() * scale;
        let size = [size.x.round() as usize, size.y.round() as usize];
        let ground = context.global_style().visuals.panel_fill;
        let picture = self.painter.paint(&meshes, size, scale, ground);
        let picture = picture.map_err(|error| error.to_string())?;
        RgbaImage::from_raw(size[0] as u32, size[1] as u32, picture.rgba())
            .ok_or_else(|| "the picture has another size".to_owned())
    }
}
