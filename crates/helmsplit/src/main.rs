//! The program `helmsplit`: without a command it solves a circuit, the built-in demo by default;
//! with one it is the command line.

use std::process::ExitCode;

fn main() -> ExitCode {
    ExitCode::from(helmsplit_cli::run(std::env::args_os()).code())
}
