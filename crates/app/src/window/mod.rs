//! The windows that the app can be shown in. Neither is known to the app: both call
//! [`HelmsplitApp::show`](crate::HelmsplitApp::show) for each frame and
//! [`HelmsplitApp::closed`](crate::HelmsplitApp::closed) at the end.

pub(crate) mod again;
pub(crate) mod cpu;
mod cpu_running;
pub(crate) mod gl;
mod gl_name;
mod present;
pub(crate) mod reason;
mod size;

pub(crate) use size::viewport;

use egui::Context;

use crate::app::HelmsplitApp;
use crate::error::AppError;

/// Makes the app once there is a context to show it in.
pub(crate) type MakeApp = Box<dyn FnOnce(&Context) -> Result<HelmsplitApp, AppError>>;

/// What draws the window.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default)]
pub enum Renderer {
    /// OpenGL; the processor where OpenGL is missing or itself runs on the processor.
    #[default]
    Auto,
    /// OpenGL.
    Glow,
    /// The processor.
    Cpu,
}
