//! Textures kept, meshes painted.

use std::collections::HashMap;

use egui::epaint::{ClippedPrimitive, Mesh, Primitive};
use egui::{Color32, Rect, TextureId, TexturesDelta};

use crate::error::RasterError;
use crate::picture::{Picture, Strip};
use crate::texture::Texture;
use crate::triangle::{Clip, paint};

/// Paints egui's output. It keeps the textures, so one painter goes along with one egui context.
#[derive(Default)]
pub struct Painter {
    textures: HashMap<TextureId, Texture>,
    /// Counts up whenever texels change that something may have been painted with.
    generation: u64,
}

/// The texture of the fonts. It only ever grows in place: a letter is added where nothing was, or
/// the whole is handed over anew.
const FONTS: TextureId = TextureId::Managed(0);

impl Painter {
    /// A painter without textures.
    #[must_use]
    pub fn new() -> Self {
        Self::default()
    }

    /// Takes new and changed textures, drops freed ones, and leaves `delta` empty.
    ///
    /// # Errors
    /// [`RasterError::TextureUpdate`] if a change does not lie within its texture; the other
    /// changes are made.
    pub fn take_textures(&mut self, delta: &mut TexturesDelta) -> Result<(), RasterError> {
        let mut result = Ok(());
        #[allow(
            clippy::iter_over_hash_type,
            reason = "textures do not depend on each other"
        )]
        for (id, changes) in delta.set.drain() {
            for change in changes {
                let fits = match change.pos {
                    None => {
                        self.generation += 1;
                        self.textures.insert(id, Texture::new(&change));
                        true
                    }
                    Some(at) => {
                        self.generation += u64::from(id != FONTS);
                        let texture = self.textures.get_mut(&id);
                        texture.is_some_and(|texture| texture.patch(at, &change))
                    }
                };
                if !fits {
                    result = Err(RasterError::TextureUpdate {
                        texture: format!("{id:?}"),
                    });
                }
            }
        }
        self.textures.retain(|id, _| !delta.free.contains(id));
        delta.clear();
        result
    }

    /// Paints meshes onto a new picture of `size` pixels over `ground`; `scale` is pixels per
    /// point.
    ///
    /// # Errors
    /// [`RasterError::NoTexture`] or [`RasterError::Callback`] if a shape cannot be painted.
    pub fn paint(
        &self,
        primitives: &[ClippedPrimitive],
        size: [usize; 2],
        scale: f32,
        ground: Color32,
    ) -> Result<Picture, RasterError> {
        let mut picture = Picture::new(size[0], size[1], ground);
        let mut strip = picture.strip();
        for ClippedPrimitive {
            clip_rect,
            primitive,
        } in primitives
        {
            let clip = pixels_of(*clip_rect, scale, size);
            match primitive {
                Primitive::Mesh(mesh) => self.paint_mesh(&mut strip, clip, mesh, scale)?,
                Primitive::Callback(_) => return Err(RasterError::Callback),
            }
        }
        Ok(picture)
    }

    /// Counts up whenever texels change that something may have been painted with.
    pub(crate) fn generation(&self) -> u64 {
        self.generation
    }

    /// A texture that was handed over.
    pub(crate) fn texture(&self, id: TextureId) -> Result<&Texture, RasterError> {
        self.textures
            .get(&id)
            .ok_or_else(|| RasterError::NoTexture {
                texture: format!("{id:?}"),
            })
    }

    fn paint_mesh(
        &self,
        strip: &mut Strip<'_>,
        clip: Clip,
        mesh: &Mesh,
        scale: f32,
    ) -> Result<(), RasterError> {
        let texture = self.texture(mesh.texture_id)?;
        for triangle in mesh.indices.chunks_exact(3) {
            let corner = |i: usize| &mesh.vertices[triangle[i] as usize];
            paint(
                strip,
                clip,
                texture,
                [corner(0), corner(1), corner(2)],
                scale,
            );
        }
        Ok(())
    }
}

/// The pixels of a clip rectangle, rounded as a GPU's scissor is, within the picture.
pub(crate) fn pixels_of(rect: Rect, scale: f32, size: [usize; 2]) -> Clip {
    // The casts hold at 0, which is what clipping wants.
    let place = |points: f32, end: usize| ((points * scale).round() as usize).min(end);
    let x = (place(rect.min.x, size[0]), place(rect.max.x, size[0]));
    let y = (place(rect.min.y, size[1]), place(rect.max.y, size[1]));
    Clip { x, y }
}
