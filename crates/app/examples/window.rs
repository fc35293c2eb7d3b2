//! Opens the window on a circuit file, or on the orchard carrier.
//!
//! `cargo run -p helmsplit-app --example window [--renderer auto|glow|cpu] [--] [FILE]`

use std::path::PathBuf;
use std::process::ExitCode;

use helmsplit_app::{Opening, Renderer};

#[allow(
    clippy::print_stderr,
    reason = "an example has nowhere else to say why there is no window"
)]
fn main() -> ExitCode {
    let mut opening = Opening::default();
    let mut arguments = std::env::args_os().skip(1);
    while let Some(argument) = arguments.next() {
        if argument == "--renderer" {
            opening.renderer = match arguments.next().unwrap_or_default().to_str() {
                Some("glow") => Renderer::Glow,
                Some("cpu") => Renderer::Cpu,
                _ => Renderer::Auto,
            };
        } else if argument != "--" {
            opening.file = Some(PathBuf::from(argument));
        }
    }
    match helmsplit_app::run(&opening) {
        Ok(()) => ExitCode::SUCCESS,
        Err(error) => {
            eprintln!("{error}");
            ExitCode::from(4)
        }
    }
}
