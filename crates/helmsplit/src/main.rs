//! The program `helmsplit`: without a command it opens the window, with one it is the command
//! line. Built without the feature `app` it is the command line alone.

#[cfg(feature = "app")]
mod window;

use std::process::ExitCode;

#[cfg(feature = "app")]
const WINDOW: Option<helmsplit_cli::OpenWindow> = Some(window::open);

#[cfg(not(feature = "app"))]
const WINDOW: Option<helmsplit_cli::OpenWindow> = None;

fn main() -> ExitCode {
    ExitCode::from(helmsplit_cli::run(std::env::args_os(), WINDOW).code())
}
