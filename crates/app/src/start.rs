//! Opens the window.

use std::path::{Path, PathBuf};

use helmsplit_scenario::{PRESETS, Preset};

use crate::app::HelmsplitApp;
use crate::document::Document;
use crate::error::AppError;
use crate::files::{Home, Kept};
use crate::window::{MakeApp, Renderer, again, cpu, gl, viewport};

/// What to open.
#[derive(Debug, Clone, Default, PartialEq, Eq)]
pub struct Opening {
    /// Circuit file, or the name of a preset; `None` for the orchard carrier.
    pub file: Option<PathBuf>,
    /// What draws the window.
    pub renderer: Renderer,
}

/// Opens the window and stays until it is closed.
///
/// [`Renderer::Auto`] takes OpenGL. Where that is missing, or runs on the processor itself, it
/// starts the program again with `--renderer cpu [-- FILE]` and becomes it, so this function then
/// does not return: a program that calls it takes these arguments.
///
/// # Errors
/// [`AppError`] if the file cannot be used or there is no window to be had; its text says what
/// would do.
pub fn run(opening: &Opening) -> Result<(), AppError> {
    let file = opening.file.as_deref();
    let document = first_document(file)?;
    let home = Home::of_user();
    let (kept, notice) = home.as_ref().map_or_else(Default::default, |home| {
        Kept::read_or_put_aside(&home.settings_file())
    });
    let viewport = viewport(kept.window);
    let make: MakeApp =
        Box::new(move |context| HelmsplitApp::at_home(context, document, home, kept, notice));
    match opening.renderer {
        Renderer::Glow => gl::run(viewport, false, make),
        Renderer::Cpu => cpu::run(viewport, make),
        Renderer::Auto => match gl::run(viewport, true, make) {
            Err(error) if error.is_about_gl() => Err(again::start_on_cpu(file)),
            outcome => outcome,
        },
    }
}

/// The circuit to begin with; as on the command line, a file goes before a preset of its name.
fn first_document(file: Option<&Path>) -> Result<Document, AppError> {
    let preset = match file {
        None => Some(PRESETS[0]),
        Some(file) if file.exists() => None,
        Some(file) => file.to_str().and_then(Preset::from_key),
    };
    let document = match (preset, file) {
        (Some(preset), _) => Document::from_preset(&preset),
        (None, file) => Document::open(file.unwrap_or(Path::new(""))),
    };
    document.map_err(AppError::Circuit)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_file_that_is_none_is_refused_before_any_window() {
        let opening = Opening {
            file: Some(PathBuf::from("nowhere.circuit.ron")),
            renderer: Renderer::Auto,
        };
        let error = run(&opening).unwrap_err();
        assert!(error.to_string().contains("nowhere.circuit.ron"), "{error}");
    }

    #[test]
    fn presets_open_by_name() {
        let name = |file: Option<&str>| {
            let document = first_document(file.map(Path::new)).unwrap();
            document.scenario().name.clone()
        };
        assert_eq!(name(None), "Orchard carrier", "the demo");
        assert_eq!(name(Some("frost-pruner")), "Frost pruner", "by its name");
    }
}
