//! A picture that follows a window.

use std::num::NonZeroUsize;
use std::sync::{Mutex, PoisonError};

use egui::epaint::{ClippedPrimitive, Primitive};
use egui::{Color32, TexturesDelta};

use crate::error::RasterError;
use crate::painter::Painter;
use crate::picture::{Picture, Strip};
use crate::tiles::{SIDE, Tiles};
use crate::triangle::{Clip, paint};

/// Beyond this threads wait for memory rather than for each other.
const MOST_THREADS: usize = 8;

/// Starting a thread pays from this many pixels on.
const PIXELS_PER_THREAD: usize = 30_000;

/// A rectangle of pixels that was painted anew.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Area {
    /// First column and the one behind the last.
    pub x: (usize, usize),
    /// First row and the one behind the last.
    pub y: (usize, usize),
}

impl Area {
    fn pixels(&self) -> usize {
        (self.x.1 - self.x.0) * (self.y.1 - self.y.0)
    }
}

/// Paints the frames of one egui context, each on top of the one before.
pub struct Canvas {
    painter: Painter,
    picture: Picture,
    tiles: Tiles,
    threads: usize,
}

impl Default for Canvas {
    fn default() -> Self {
        Self::new()
    }
}

impl Canvas {
    /// An empty canvas.
    #[must_use]
    pub fn new() -> Self {
        let threads = std::thread::available_parallelism().map_or(1, NonZeroUsize::get);
        Self {
            painter: Painter::new(),
            picture: Picture::new(0, 0, Color32::TRANSPARENT),
            tiles: Tiles::default(),
            threads: threads.min(MOST_THREADS),
        }
    }

    /// Takes new and changed textures, drops freed ones, and leaves `delta` empty.
    ///
    /// # Errors
    /// As [`Painter::take_textures`].
    pub fn take_textures(&mut self, delta: &mut TexturesDelta) -> Result<(), RasterError> {
        self.painter.take_textures(delta)
    }

    /// The frame that was shown last.
    #[must_use]
    pub fn picture(&self) -> &Picture {
        &self.picture
    }

    /// Shows a frame of `size` pixels over `ground`; `scale` is pixels per point. Gives what was
    /// painted anew, from top to bottom; the rest is as before.
    ///
    /// # Errors
    /// [`RasterError::NoTexture`] or [`RasterError::Callback`] if a shape cannot be painted; the
    /// next frame is then painted whole.
    pub fn show(
        &mut self,
        primitives: &[ClippedPrimitive],
        size: [usize; 2],
        scale: f32,
        ground: Color32,
    ) -> Result<Vec<Area>, RasterError> {
        let before = std::mem::take(&mut self.tiles);
        if [self.picture.width(), self.picture.height()] != size {
            self.picture = Picture::new(size[0], size[1], ground);
        }
        let generation = self.painter.generation();
        let tiles = Tiles::of(primitives, size, scale, ground, generation)?;
        for clipped in primitives {
            if let Primitive::Mesh(mesh) = &clipped.primitive {
                self.painter.texture(mesh.texture_id)?;
            }
        }
        let mut work = Vec::new();
        let mut areas = Vec::new();
        let strips: Vec<_> = self.picture.strips(SIDE).collect();
        for (row, strip) in strips.into_iter().enumerate() {
            let stretches = tiles.changed(&before, row, size[0]);
            let y = (strip.rows().start, strip.rows().end);
            areas.extend(stretches.iter().map(|&x| Area { x, y }));
            if !stretches.is_empty() {
                work.push((row, strip, stretches));
            }
        }
        let frame = Frame {
            primitives,
            painter: &self.painter,
            tiles: &tiles,
            scale,
            ground,
        };
        let pixels: usize = areas.iter().map(Area::pixels).sum();
        frame.paint_all(work, self.threads.min(pixels / PIXELS_PER_THREAD));
        self.tiles = tiles;
        Ok(areas)
    }
}

/// What the threads share.
struct Frame<'a> {
    primitives: &'a [ClippedPrimitive],
    painter: &'a Painter,
    tiles: &'a Tiles,
    scale: f32,
    ground: Color32,
}

/// One row of tiles with the stretches of it to paint.
type Work<'a> = (usize, Strip<'a>, Vec<(usize, usize)>);

impl Frame<'_> {
    fn paint_all(&self, work: Vec<Work<'_>>, threads: usize) {
        if threads < 2 {
            for (row, mut strip, stretches) in work {
                self.paint_row(row, &mut strip, &stretches);
            }
            return;
        }
        let queue = Mutex::new(work.into_iter());
        // The queue is whole even if a thread broke off.
        let next = || queue.lock().unwrap_or_else(PoisonError::into_inner).next();
        let run = || {
            while let Some((row, mut strip, stretches)) = next() {
                self.paint_row(row, &mut strip, &stretches);
            }
        };
        std::thread::scope(|scope| {
            for _ in 1..threads {
                scope.spawn(run);
            }
            run();
        });
    }

    fn paint_row(&self, row: usize, strip: &mut Strip<'_>, stretches: &[(usize, usize)]) {
        let rows = strip.rows();
        let parts = stretches.iter().map(|&x| Clip {
            x,
            y: (rows.start, rows.end),
        });
        for part in parts.clone() {
            for y in part.y.0..part.y.1 {
                strip.span(y, part.x.0, part.x.1).fill(self.ground);
            }
        }
        for piece in self.tiles.pieces(row) {
            let Primitive::Mesh(mesh) = &self.primitives[piece.primitive as usize].primitive else {
                continue;
            };
            // Each texture was asked for before anything was painted.
            let Ok(texture) = self.painter.texture(mesh.texture_id) else {
                continue;
            };
            let corner = |i: u32| {
                let vertex = mesh.indices[(piece.index + i) as usize];
                &mesh.vertices[vertex as usize]
            };
            for part in parts.clone() {
                let clip = piece.clip.and(part);
                if !clip.is_empty() {
                    let corners = [corner(0), corner(1), corner(2)];
                    paint(strip, clip, texture, corners, self.scale);
                }
            }
        }
    }
}
