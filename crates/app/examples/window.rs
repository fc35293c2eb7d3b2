//! Opens the window on a circuit file, or on the orchard carrier.
//!
//! `cargo run -p helmsplit-app --example window [FILE]`

use std::path::PathBuf;
use std::process::ExitCode;

#[allow(
    clippy::print_stderr,
    reason = "an example has nowhere else to say why there is no window"
)]
fn main() -> ExitCode {
    match helmsplit_app::run(std::env::args_os().nth(1).map(PathBuf::from)) {
        Ok(()) => ExitCode::SUCCESS,
        Err(error) => {
            eprintln!("{error}");
            ExitCode::from(4)
        }
    }
}
