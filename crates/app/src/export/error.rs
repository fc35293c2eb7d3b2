//! Why nothing was written.

use helmsplit_raster::RasterError;
use helmsplit_scenario::FileError;
use helmsplit_sim::SimError;
use helmsplit_view::ViewError;

/// Why an export failed.
#[derive(Debug, thiserror::Error)]
pub(crate) enum ExportError {
    /// There is nothing to write.
    #[error("there is no solved run yet")]
    NoRun,
    /// The values are still being changed.
    #[error("this is a draft, solved with a wide tolerance; wait until the run is solved")]
    Draft,
    /// The file cannot be written.
    #[error(transparent)]
    File(#[from] FileError),
    /// The data cannot be written.
    #[error(transparent)]
    Data(#[from] SimError),
    /// The picture cannot be painted.
    #[error("the picture cannot be painted: {0}")]
    Picture(#[from] RasterError),
    /// A theme that comes with the program does not read.
    #[error(transparent)]
    Theme(#[from] ViewError),
}
