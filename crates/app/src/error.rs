//! Why there is no window.

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
