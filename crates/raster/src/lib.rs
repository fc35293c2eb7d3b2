//! Pictures of egui meshes drawn on the CPU: for machines without a GPU, for PNG files and for
//! tests that run without a display.
//!
//! [`Painter`] keeps the textures that egui hands out and paints clipped meshes onto a
//! [`Picture`]; [`write_png`] stores one. The same meshes give the same bytes on every run.
//!
//! # Conventions
//! Colours are sRGB with eight bits a channel, premultiplied by their opacity, and blend in that
//! space, as egui's meshes expect. Pixel (0, 0) is at the top left, its centre at (0.5, 0.5).

mod error;
mod painter;
mod picture;
mod png_file;
mod texture;
mod triangle;

pub use error::RasterError;
pub use painter::Painter;
pub use picture::Picture;
pub use png_file::{png_bytes, write_png};
