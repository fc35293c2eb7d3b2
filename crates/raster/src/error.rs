//! What can go wrong.

use std::path::PathBuf;

/// Why a picture could not be drawn or stored.
#[derive(Debug, thiserror::Error)]
pub enum RasterError {
    /// A mesh uses a texture that was never handed over.
    #[error("a mesh uses texture {texture}, which was never handed over")]
    NoTexture {
        /// The texture, as egui prints it.
        texture: String,
    },
    /// A shape draws itself on a GPU.
    #[error("a shape draws itself with a GPU callback, which the CPU cannot run")]
    Callback,
    /// An update does not lie within its texture.
    #[error("an update does not lie within texture {texture}")]
    TextureUpdate {
        /// The texture, as egui prints it.
        texture: String,
    },
    /// The picture could not be put into PNG.
    #[error("the picture could not be put into PNG: {0}")]
    Encode(#[from] png::EncodingError),
    /// The file could not be written.
    #[error("cannot write {}: {source}", path.display())]
    Write {
        /// The file.
        path: PathBuf,
        /// What the system said.
        source: std::io::Error,
    },
}
