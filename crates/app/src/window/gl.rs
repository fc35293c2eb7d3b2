//! The window that OpenGL draws.

use eframe::{App, Frame, NativeOptions};
use egui::{Ui, ViewportBuilder};

use super::{MakeApp, gl_name, reason};
use crate::app::HelmsplitApp;
use crate::error::AppError;

/// Opens the window and stays until it is closed. With `card_only`, OpenGL that runs on the
/// processor is refused: our own way of drawing there is quicker.
pub(crate) fn run(
    viewport: ViewportBuilder,
    card_only: bool,
    make: MakeApp,
) -> Result<(), AppError> {
    gl_name::listen();
    let options = NativeOptions {
        viewport,
        renderer: eframe::Renderer::Glow,
        // The app keeps its own settings, so that both windows share them.
        persist_window: false,
        ..NativeOptions::default()
    };
    let mut refused = None;
    let outcome = reason::caught(|| {
        eframe::run_native(
            "helmsplit",
            options,
            Box::new(|creation| {
                let name = gl_name::heard();
                let made = match name.filter(|name| card_only && gl_name::is_software(name)) {
                    Some(name) => Err(AppError::SoftwareGl { name }),
                    None => make(&creation.egui_ctx),
                };
                match made {
                    Ok(app) => Ok(Box::new(app)),
                    Err(error) => {
                        let text = error.to_string();
                        refused = Some(error);
                        Err(text.into())
                    }
                }
            }),
        )
    });
    match refused {
        Some(error) => Err(error),
        None => outcome?.map_err(|error| reason_of(&error)),
    }
}

fn reason_of(error: &eframe::Error) -> AppError {
    let cause = error.to_string();
    match error {
        eframe::Error::Glutin(_)
        | eframe::Error::NoGlutinConfigs(..)
        | eframe::Error::OpenGL(_) => AppError::NoOpenGl { cause },
        _ => reason::of_text(cause),
    }
}

impl App for HelmsplitApp {
    fn ui(&mut self, ui: &mut Ui, _frame: &mut Frame) {
        reason::shown();
        self.show(ui);
    }

    fn on_exit(&mut self, _gl: Option<&eframe::glow::Context>) {
        self.closed();
    }

    fn persist_egui_memory(&self) -> bool {
        false
    }
}
