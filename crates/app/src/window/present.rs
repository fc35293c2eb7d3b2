//! From a picture in memory to the screen.

use std::num::NonZeroU32;
use std::sync::Arc;

use egui::Color32;
use helmsplit_raster::{Area, Picture};
use softbuffer::{Context, SoftBufferError, Surface};
use winit::event_loop::{ActiveEventLoop, OwnedDisplayHandle};
use winit::window::Window;

/// The pixels of a window.
pub(super) struct Screen {
    surface: Surface<OwnedDisplayHandle, Arc<Window>>,
    size: [usize; 2],
}

impl Screen {
    /// The pixels of `window`.
    ///
    /// # Errors
    /// What the display said if it gives none.
    pub(super) fn new(
        event_loop: &ActiveEventLoop,
        window: Arc<Window>,
    ) -> Result<Self, SoftBufferError> {
        let context = Context::new(event_loop.owned_display_handle())?;
        Ok(Self {
            surface: Surface::new(&context, window)?,
            size: [0, 0],
        })
    }

    /// Shows a picture of which only `areas` changed since the last one.
    ///
    /// # Errors
    /// What the display said.
    pub(super) fn present(
        &mut self,
        picture: &Picture,
        areas: &[Area],
    ) -> Result<(), SoftBufferError> {
        let size = [picture.width(), picture.height()];
        let side = |length: usize| u32::try_from(length).ok().and_then(NonZeroU32::new);
        let (Some(width), Some(height)) = (side(size[0]), side(size[1])) else {
            return Ok(());
        };
        let resized = self.size != size;
        if resized {
            self.surface.resize(width, height)?;
            self.size = size;
        }
        let mut buffer = self.surface.buffer_mut()?;
        // A buffer of another age than one frame lacks what the frames between changed.
        if resized || buffer.age() != 1 {
            let whole = Area {
                x: (0, size[0]),
                y: (0, size[1]),
            };
            copy(picture, &mut buffer, whole);
        } else {
            for &area in areas {
                copy(picture, &mut buffer, area);
            }
        }
        buffer.present()
    }
}

fn copy(picture: &Picture, buffer: &mut [u32], area: Area) {
    let width = picture.width();
    for y in area.y.0..area.y.1 {
        let row = y * width + area.x.0..y * width + area.x.1;
        let (from, to) = (&picture.pixels()[row.clone()], &mut buffer[row]);
        for (to, from) in to.iter_mut().zip(from) {
            *to = word(*from);
        }
    }
}

/// A pixel as the screen takes it: red, green, blue from the third byte down.
fn word(pixel: Color32) -> u32 {
    let [red, green, blue, _] = pixel.to_array();
    u32::from_be_bytes([0, red, green, blue])
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn an_area_and_nothing_else_is_copied() {
        let colour = Color32::from_rgba_premultiplied(1, 2, 3, 255);
        let picture = Picture::new(4, 3, colour);
        let mut buffer = vec![0xff00_0000; 12];
        let area = Area {
            x: (1, 3),
            y: (2, 3),
        };
        copy(&picture, &mut buffer, area);
        let copied: Vec<_> = (0..12).filter(|&i| buffer[i] == 0x0001_0203).collect();
        assert_eq!(copied, [9, 10], "two pixels of the last row");
    }
}
