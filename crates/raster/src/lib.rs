//! Pictures of egui meshes drawn on the CPU: for machines without a GPU, for PNG files and for
//! tests that run without a display.
//!
//! [`Painter`] keeps the textures that egui hands out and paints clipped meshes onto a
//! [`Picture`]; [`write_png`] stores one. [`Canvas`] follows a window: it paints only what has
//! changed since the frame before, on several threads. The same meshes give the same bytes on
//! every run and either way.
//!
//! # Conventions
//! Colours are sRGB with eight bits a channel, premultiplied by their opacity, and blend in that
//! space, as egui's meshes expect. Pixel (0, 0) is at the top left, its centre at (0.5, 0.5).

mod canvas;
mod error;
mod painter;
mod picture;
mod png_file;
mod texture;
mod tiles;
mod triangle;

pub use canvas::{Area, Canvas};
pub use error::RasterError;
pub use painter::Painter;
pub use picture::Picture;
pub use png_file::{png_bytes, write_png};
