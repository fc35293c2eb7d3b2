//! Which parts of a picture changed, and which triangles lie in them.
//!
//! The picture is divided into square tiles. Each tile has a sum over everything that is painted
//! into it, in order; if the sum is that of the frame before, so are the pixels.

use egui::epaint::{ClippedPrimitive, Primitive, Vertex};
use egui::{Color32, TextureId};

use crate::error::RasterError;
use crate::painter::pixels_of;
use crate::triangle::Clip;

/// Side of a tile, px.
pub(crate) const SIDE: usize = 32;

/// A triangle to paint, by its place in the frame.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Piece {
    pub(crate) primitive: u32,
    /// Place of its first index.
    pub(crate) index: u32,
    /// The pixels it can touch, clipped.
    pub(crate) clip: Clip,
}

/// Sums of the tiles of one frame, and its triangles by rows of tiles.
#[derive(Debug, Default)]
pub(crate) struct Tiles {
    columns: usize,
    sums: Vec<u64>,
    rows: Vec<Vec<Piece>>,
}

impl Tiles {
    /// Sorts a frame. `generation` stands for the texels.
    ///
    /// # Errors
    /// [`RasterError::Callback`] if a shape draws itself with a GPU.
    pub(crate) fn of(
        primitives: &[ClippedPrimitive],
        size: [usize; 2],
        scale: f32,
        ground: Color32,
        generation: u64,
    ) -> Result<Self, RasterError> {
        let columns = size[0].div_ceil(SIDE);
        let rows = size[1].div_ceil(SIDE);
        let start = mixed(generation, u64::from(u32::from_le_bytes(ground.to_array())));
        let mut tiles = Self {
            columns,
            sums: vec![start; columns * rows],
            rows: vec![Vec::new(); rows],
        };
        for (primitive, clipped) in primitives.iter().enumerate() {
            let Primitive::Mesh(mesh) = &clipped.primitive else {
                return Err(RasterError::Callback);
            };
            let clip = pixels_of(clipped.clip_rect, scale, size);
            if clip.is_empty() {
                continue;
            }
            let texture = texture_number(mesh.texture_id);
            for (place, triangle) in mesh.indices.chunks_exact(3).enumerate() {
                let corner = |i: usize| &mesh.vertices[triangle[i] as usize];
                let corners = [corner(0), corner(1), corner(2)];
                let piece = Piece {
                    // Both count in 32 bits in egui's meshes already.
                    primitive: primitive as u32,
                    index: 3 * place as u32,
                    clip: clip.and(Clip::around(corners, scale)),
                };
                if !piece.clip.is_empty() {
                    tiles.add(piece, sum_of(corners, scale, texture));
                }
            }
        }
        Ok(tiles)
    }

    fn add(&mut self, piece: Piece, sum: u64) {
        let Clip { x, y } = piece.clip;
        // The clip cuts the triangle, so it counts too.
        let sum = mixed(mixed(sum, (x.0 as u64) << 32 | x.1 as u64), y.0 as u64);
        let sum = mixed(sum, y.1 as u64);
        for row in y.0 / SIDE..=(y.1 - 1) / SIDE {
            self.rows[row].push(piece);
            for column in x.0 / SIDE..=(x.1 - 1) / SIDE {
                let tile = &mut self.sums[row * self.columns + column];
                *tile = mixed(*tile, sum);
            }
        }
    }

    /// The triangles in a row of tiles, in the order of painting.
    pub(crate) fn pieces(&self, row: usize) -> &[Piece] {
        &self.rows[row]
    }

    /// The stretches of a row of tiles that differ from the frame `before`: first column and the
    /// one behind the last, px, not beyond `width`.
    pub(crate) fn changed(&self, before: &Self, row: usize, width: usize) -> Vec<(usize, usize)> {
        let same_size = before.columns == self.columns && before.sums.len() == self.sums.len();
        let mut stretches: Vec<(usize, usize)> = Vec::new();
        for column in 0..self.columns {
            let tile = row * self.columns + column;
            if same_size && before.sums[tile] == self.sums[tile] {
                continue;
            }
            let (from, to) = (column * SIDE, ((column + 1) * SIDE).min(width));
            match stretches.last_mut() {
                Some(last) if last.1 == from => last.1 = to,
                _ => stretches.push((from, to)),
            }
        }
        stretches
    }
}

fn texture_number(id: TextureId) -> u64 {
    match id {
        TextureId::Managed(number) => 2 * number,
        TextureId::User(number) => 2 * number + 1,
    }
}

fn sum_of(corners: [&Vertex; 3], scale: f32, texture: u64) -> u64 {
    let pair = |a: f32, b: f32| u64::from(a.to_bits()) << 32 | u64::from(b.to_bits());
    let mut sum = mixed(texture, u64::from(scale.to_bits()));
    for corner in corners {
        sum = mixed(sum, pair(corner.pos.x, corner.pos.y));
        sum = mixed(sum, pair(corner.uv.x, corner.uv.y));
        sum = mixed(sum, u64::from(u32::from_le_bytes(corner.color.to_array())));
    }
    sum
}

/// One step of the sum: a product with the golden ratio in 64 bits (Knuth 1998, The Art of
/// Computer Programming 3, section 6.4) with its high half folded down.
fn mixed(sum: u64, word: u64) -> u64 {
    let product = (sum ^ word).wrapping_mul(0x9e37_79b9_7f4a_7c15);
    product ^ (product >> 32)
}
