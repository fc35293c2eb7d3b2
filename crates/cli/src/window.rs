//! What the command line asks of a window. It knows none: the program hands one in.

use std::path::PathBuf;

use clap::ValueEnum;

use crate::exit::{ExitStatus, Failure};

/// Names the renderer when the command line does not.
const VARIABLE: &str = "HELMSPLIT_RENDERER";

/// What draws the window.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, ValueEnum)]
pub enum Renderer {
    /// OpenGL where the machine has a graphics card for it, else the processor
    #[default]
    Auto,
    /// OpenGL
    Glow,
    /// The processor alone; needs no OpenGL
    Cpu,
}

/// A window to open.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct WindowRequest {
    /// Circuit file or name of a preset; `None` for the demo.
    pub file: Option<PathBuf>,
    /// What draws it.
    pub renderer: Renderer,
}

/// Why there is no window.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct NoWindow {
    /// In a sentence, with what would do.
    pub reason: String,
    /// How the program ends: [`ExitStatus::NoWindow`], or [`ExitStatus::BadInput`] if the fault
    /// lies in the circuit file.
    pub status: ExitStatus,
}

/// Opens a window and stays until it is closed.
pub type OpenWindow = fn(&WindowRequest) -> Result<(), NoWindow>;

/// Opens the window on a file, drawn by what the argument says, else the environment.
pub(crate) fn open(
    open_window: OpenWindow,
    file: Option<PathBuf>,
    renderer: Option<Renderer>,
) -> Result<ExitStatus, Failure> {
    let renderer = match renderer {
        Some(renderer) => renderer,
        None => from_environment()?,
    };
    open_window(&WindowRequest { file, renderer }).map_err(Failure::Window)?;
    Ok(ExitStatus::Done)
}

fn from_environment() -> Result<Renderer, Failure> {
    let Some(value) = std::env::var_os(VARIABLE) else {
        return Ok(Renderer::default());
    };
    named(&value.to_string_lossy())
}

fn named(value: &str) -> Result<Renderer, Failure> {
    let ignore_case = true;
    Renderer::from_str(value.trim(), ignore_case).map_err(|_unknown| {
        Failure::Input(format!(
            "the environment variable {VARIABLE} is \"{value}\"; write auto, glow or cpu"
        ))
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn renderers_are_named_and_misnamed_ones_refused() {
        assert_eq!(named(" CPU ").unwrap(), Renderer::Cpu, "any case");
        let error = named("gpu").unwrap_err().to_string();
        assert!(error.contains("auto, glow or cpu"), "{error}");
    }

    #[test]
    fn the_status_of_the_program_follows_the_fault() {
        let opened: OpenWindow = |request| {
            assert_eq!(request.renderer, Renderer::Glow, "handed through");
            let status = match request.file {
                None => return Ok(()),
                Some(_) => ExitStatus::BadInput,
            };
            let reason = "error: no such file".to_owned();
            Err(NoWindow { reason, status })
        };
        let renderer = Some(Renderer::Glow);
        assert_eq!(
            open(opened, None, renderer).unwrap(),
            ExitStatus::Done,
            "closed"
        );
        let failure = open(opened, Some("x".into()), renderer).unwrap_err();
        assert_eq!(failure.status(), ExitStatus::BadInput, "a bad file");
        let missing: OpenWindow = |_| {
            let reason = "There is no display.".to_owned();
            let status = ExitStatus::NoWindow;
            Err(NoWindow { reason, status })
        };
        let failure = open(missing, None, renderer).unwrap_err();
        assert_eq!(failure.status().code(), 4, "no window");
    }
}
