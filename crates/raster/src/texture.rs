//! A texture and its samples.

use egui::epaint::{ImageData, ImageDelta};
use egui::{Color32, TextureFilter};

/// One texture, premultiplied.
pub(crate) struct Texture {
    size: [usize; 2],
    pixels: Vec<Color32>,
    nearest: bool,
}

impl Texture {
    /// A texture from an update that replaces the whole of it.
    pub(crate) fn new(delta: &ImageDelta) -> Self {
        let ImageData::Color(image) = &delta.image;
        Self {
            size: image.size,
            pixels: image.pixels.clone(),
            nearest: delta.options.magnification == TextureFilter::Nearest,
        }
    }

    /// Replaces a part; `false`, and nothing happens, if it does not lie within.
    pub(crate) fn patch(&mut self, at: [usize; 2], delta: &ImageDelta) -> bool {
        let ImageData::Color(image) = &delta.image;
        let [width, height] = image.size;
        if at[0] + width > self.size[0] || at[1] + height > self.size[1] {
            return false;
        }
        for (row, from) in image.pixels.chunks_exact(width.max(1)).enumerate() {
            let start = (at[1] + row) * self.size[0] + at[0];
            self.pixels[start..start + width].copy_from_slice(from);
        }
        true
    }

    /// The colour at (u, v), 0 to 1 across the texture, channels 0 to 255; held at the edges.
    pub(crate) fn sample(&self, u: f32, v: f32) -> [f32; 4] {
        let x = u * self.size[0] as f32;
        let y = v * self.size[1] as f32;
        if self.nearest {
            return self.texel(x.floor() as i64, y.floor() as i64);
        }
        let (left, top) = ((x - 0.5).floor(), (y - 0.5).floor());
        let (across, down) = (x - 0.5 - left, y - 0.5 - top);
        let (left, top) = (left as i64, top as i64);
        if across < 1e-3 && down < 1e-3 {
            return self.texel(left, top);
        }
        let mix = |a: [f32; 4], b: [f32; 4], share: f32| {
            std::array::from_fn(|i| a[i] + (b[i] - a[i]) * share)
        };
        let above = mix(self.texel(left, top), self.texel(left + 1, top), across);
        let below = mix(
            self.texel(left, top + 1),
            self.texel(left + 1, top + 1),
            across,
        );
        mix(above, below, down)
    }

    fn texel(&self, x: i64, y: i64) -> [f32; 4] {
        let hold = |place: i64, length: usize| {
            let last = length.saturating_sub(1);
            usize::try_from(place).map_or(0, |place| place.min(last))
        };
        let place = hold(y, self.size[1]) * self.size[0] + hold(x, self.size[0]);
        let pixel = self.pixels.get(place).copied().unwrap_or(Color32::WHITE);
        pixel.to_array().map(f32::from)
    }
}
