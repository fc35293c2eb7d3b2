//! Why there is no window.

use helmsplit_raster::RasterError;
use helmsplit_scenario::Findings;
use helmsplit_view::ViewError;

/// Why the window could not be opened.
#[derive(Debug, thiserror::Error)]
pub enum AppError {
    /// The circuit file cannot be used.
    #[error("{0}")]
    Circuit(Findings),
    /// A theme that comes with the program does not read.
    #[error(transparent)]
    Theme(#[from] ViewError),
    /// There is no display to open a window on.
    #[error(
        "There is no display to open a window on: neither DISPLAY nor WAYLAND_DISPLAY leads to \
         one. Start it from a desktop session, or use `helmsplit run` in a terminal."
    )]
    NoDisplay {
        /// What the window library said.
        cause: String,
    },
    /// A library of the display is missing.
    #[error(
        "A library that windows need is missing. On Debian or Ubuntu install it with \
         `apt-get install libx11-6 libx11-xcb1 libxcursor1 libxi6 libxkbcommon0 \
         libxkbcommon-x11-0`, or use `helmsplit run` in a terminal. The system said: {cause}"
    )]
    MissingLibrary {
        /// What the window library said.
        cause: String,
    },
    /// There is no OpenGL to draw with.
    #[error(
        "There is no OpenGL to draw the window with. On Debian or Ubuntu install it with \
         `apt-get install libegl1 libgl1-mesa-dri`, or use `helmsplit run` in a terminal. The \
         system said: {cause}"
    )]
    NoOpenGl {
        /// What the window library said.
        cause: String,
    },
    /// OpenGL runs on the processor.
    #[error(
        "OpenGL runs on the processor here ({name}), so the window draws itself there instead."
    )]
    SoftwareGl {
        /// What draws it.
        name: String,
    },
    /// The processor cannot draw a frame.
    #[error("The window could not be drawn: {0}")]
    Draw(#[from] RasterError),
    /// The display took no picture.
    #[error(
        "The display took no picture of the window, so use `helmsplit run` in a terminal. It said: {cause}"
    )]
    Screen {
        /// What it said.
        cause: String,
    },
    /// A fault of the program while its window was open.
    #[error(
        "The window broke down, which is a fault of this program; changes that were not saved are \
         offered at the next start. The fault: {cause}"
    )]
    Broken {
        /// The message of the fault.
        cause: String,
    },
    /// The system has no thread for the solver.
    #[error("The system has no thread for the solver: {0}")]
    Thread(#[from] std::io::Error),
    /// Anything else.
    #[error(
        "The window could not be opened, so use `helmsplit run` in a terminal. The system said: {cause}"
    )]
    Window {
        /// What the window library said.
        cause: String,
    },
}

impl AppError {
    /// Whether another way of drawing could help: the display is there, but OpenGL is not, or
    /// nobody knows what is wrong.
    pub(crate) fn is_about_gl(&self) -> bool {
        matches!(
            self,
            Self::SoftwareGl { .. } | Self::NoOpenGl { .. } | Self::Window { .. }
        )
    }
}
