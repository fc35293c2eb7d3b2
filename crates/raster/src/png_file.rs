//! PNG.

use std::path::Path;

use crate::error::RasterError;
use crate::picture::Picture;

/// The picture as a PNG file in memory.
///
/// # Errors
/// [`RasterError::Encode`] if the picture has no pixels.
pub fn png_bytes(picture: &Picture) -> Result<Vec<u8>, RasterError> {
    let mut bytes = Vec::new();
    // PNG counts in 32 bits; a picture beyond that does not fit into memory.
    let size = |length: usize| u32::try_from(length).unwrap_or(u32::MAX);
    let mut encoder = png::Encoder::new(&mut bytes, size(picture.width()), size(picture.height()));
    encoder.set_color(png::ColorType::Rgba);
    encoder.set_depth(png::BitDepth::Eight);
    let mut writer = encoder.write_header()?;
    writer.write_image_data(&picture.rgba())?;
    writer.finish()?;
    Ok(bytes)
}

/// Writes the picture to a PNG file.
///
/// # Errors
/// [`RasterError::Encode`] if the picture has no pixels, [`RasterError::Write`] if the file cannot
/// be written.
pub fn write_png(picture: &Picture, path: &Path) -> Result<(), RasterError> {
    let bytes = png_bytes(picture)?;
    std::fs::write(path, bytes).map_err(|source| RasterError::Write {
        path: path.to_owned(),
        source,
    })
}
