//! A picture in memory.

use egui::Color32;

/// A rectangle of pixels, row by row from the top left.
#[derive(Debug, Clone, PartialEq)]
pub struct Picture {
    width: usize,
    height: usize,
    pixels: Vec<Color32>,
}

impl Picture {
    /// A picture of one colour.
    #[must_use]
    pub fn new(width: usize, height: usize, ground: Color32) -> Self {
        Self {
            width,
            height,
            pixels: vec![ground; width * height],
        }
    }

    /// Width, px.
    #[must_use]
    pub fn width(&self) -> usize {
        self.width
    }

    /// Height, px.
    #[must_use]
    pub fn height(&self) -> usize {
        self.height
    }

    /// The pixels, premultiplied.
    #[must_use]
    pub fn pixels(&self) -> &[Color32] {
        &self.pixels
    }

    /// One pixel, premultiplied; `None` outside.
    #[must_use]
    pub fn pixel(&self, x: usize, y: usize) -> Option<Color32> {
        let inside = x < self.width && y < self.height;
        inside.then(|| self.pixels[y * self.width + x])
    }

    /// Red, green, blue and opacity of each pixel, not premultiplied: what image files hold.
    #[must_use]
    pub fn rgba(&self) -> Vec<u8> {
        let straight = |pixel: &Color32| pixel.to_srgba_unmultiplied();
        self.pixels.iter().flat_map(straight).collect()
    }

    /// The whole picture as one strip.
    pub(crate) fn strip(&mut self) -> Strip<'_> {
        Strip {
            top: 0,
            width: self.width,
            pixels: &mut self.pixels,
        }
    }

    /// The picture in strips of `height` rows, the last one perhaps lower.
    pub(crate) fn strips(&mut self, height: usize) -> impl Iterator<Item = Strip<'_>> {
        let width = self.width;
        let strips = self.pixels.chunks_mut((width * height).max(1));
        strips.enumerate().map(move |(index, pixels)| Strip {
            top: index * height,
            width,
            pixels,
        })
    }
}

/// Whole rows of a picture, to be painted by one thread.
pub(crate) struct Strip<'a> {
    top: usize,
    width: usize,
    pixels: &'a mut [Color32],
}

impl Strip<'_> {
    /// Its rows, counted from the top of the picture.
    pub(crate) fn rows(&self) -> std::ops::Range<usize> {
        self.top..self.top + self.pixels.len() / self.width.max(1)
    }

    /// The pixels of row `y` of the picture from column `from` up to, not including, `to`.
    pub(crate) fn span(&mut self, y: usize, from: usize, to: usize) -> &mut [Color32] {
        let row = (y - self.top) * self.width;
        &mut self.pixels[row + from..row + to]
    }
}
