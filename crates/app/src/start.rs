//! Opens the window.

use std::any::Any;
use std::panic::{AssertUnwindSafe, catch_unwind};
use std::path::PathBuf;

use eframe::NativeOptions;
use egui::ViewportBuilder;
use helmsplit_scenario::PRESETS;

use crate::app::HelmsplitApp;
use crate::document::Document;
use crate::error::AppError;

/// Smallest window that everything fits into, points.
const LEAST_SIZE: [f32; 2] = [960.0, 600.0];

/// Opens the window on a circuit file, or on the orchard carrier, and stays until it is closed.
///
/// It draws through OpenGL.
///
/// # Errors
/// [`AppError`] if the file cannot be used or there is no window to be had; its text says what
/// would do.
pub fn run(file: Option<PathBuf>) -> Result<(), AppError> {
    let document = match file {
        Some(path) => Document::open(&path),
        None => Document::from_preset(&PRESETS[0]),
    };
    let document = document.map_err(AppError::Circuit)?;
    let options = NativeOptions {
        viewport: ViewportBuilder::default()
            .with_title("Helmsplit")
            .with_app_id("helmsplit")
            .with_inner_size([1360.0, 840.0])
            .with_min_inner_size(LEAST_SIZE),
        renderer: eframe::Renderer::Glow,
        ..NativeOptions::default()
    };
    let mut refused = None;
    // A missing library of the display is a panic inside the window library.
    let outcome = catch_unwind(AssertUnwindSafe(|| {
        eframe::run_native(
            "helmsplit",
            options,
            Box::new(|creation| match HelmsplitApp::new(creation, document) {
                Ok(app) => Ok(Box::new(app)),
                Err(error) => {
                    let text = error.to_string();
                    refused = Some(error);
                    Err(text.into())
                }
            }),
        )
    }));
    match (outcome, refused) {
        (_, Some(error)) => Err(error),
        (Ok(Ok(())), None) => Ok(()),
        (Ok(Err(error)), None) => Err(reason(&error)),
        (Err(panic), None) => Err(reason_of_panic(panic.as_ref())),
    }
}

fn reason(error: &eframe::Error) -> AppError {
    let cause = error.to_string();
    match error {
        eframe::Error::Glutin(_)
        | eframe::Error::NoGlutinConfigs(..)
        | eframe::Error::OpenGL(_) => AppError::NoOpenGl { cause },
        _ => reason_of_text(cause),
    }
}

fn reason_of_panic(panic: &(dyn Any + Send)) -> AppError {
    let text = panic
        .downcast_ref::<String>()
        .cloned()
        .or_else(|| panic.downcast_ref::<&str>().map(|text| (*text).to_owned()));
    reason_of_text(text.unwrap_or_else(|| "a fault without a message".to_owned()))
}

/// Sorts what the window library says by what the user can do about it.
fn reason_of_text(cause: String) -> AppError {
    let says = |part: &str| cause.contains(part);
    if says("DISPLAY") || says("open connection to X server") || says("XOpenDisplay") {
        AppError::NoDisplay { cause }
    } else if says("shared librar") || says("xkbcommon") || says("libX") {
        AppError::MissingLibrary { cause }
    } else if says("glutin") || says("OpenGL") || says("EGL") {
        AppError::NoOpenGl { cause }
    } else {
        AppError::Window { cause }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn raw_errors_become_sentences_that_help() {
        let cases = [
            (
                "neither WAYLAND_DISPLAY nor WAYLAND_SOCKET nor DISPLAY is set",
                "no display",
            ),
            ("Failed to open connection to X server", "no display"),
            (
                "Failed to load one of xlib's shared libraries",
                "libxkbcommon-x11-0",
            ),
            ("Found no glutin configs", "libegl1"),
            ("something else", "something else"),
        ];
        for (raw, helpful) in cases {
            let text = reason_of_text(raw.to_owned()).to_string();
            assert!(text.contains(helpful), "{raw}: {text}");
            assert!(text.contains("helmsplit run"), "{raw}: {text}");
        }
    }

    #[test]
    fn a_file_that_is_none_is_refused_before_any_window() {
        let error = run(Some(PathBuf::from("nowhere.circuit.ron"))).unwrap_err();
        assert!(error.to_string().contains("nowhere.circuit.ron"), "{error}");
    }
}
