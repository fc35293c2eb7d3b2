//! Joins the command line and the window, which do not know each other.

use helmsplit_app::{AppError, Opening, Renderer};
use helmsplit_cli::{ExitStatus, NoWindow, WindowRequest};

/// Opens the window that the command line asks for.
pub(crate) fn open(request: &WindowRequest) -> Result<(), NoWindow> {
    let opening = Opening {
        file: request.file.clone(),
        renderer: match request.renderer {
            helmsplit_cli::Renderer::Auto => Renderer::Auto,
            helmsplit_cli::Renderer::Glow => Renderer::Glow,
            helmsplit_cli::Renderer::Cpu => Renderer::Cpu,
        },
    };
    helmsplit_app::run(&opening).map_err(|error| NoWindow {
        status: match error {
            AppError::Circuit(_) => ExitStatus::BadInput,
            _ => ExitStatus::NoWindow,
        },
        reason: error.to_string(),
    })
}
