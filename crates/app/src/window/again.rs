//! Starting the program again: one process can have only one loop of window events, so another
//! window takes another process.

use std::path::Path;
use std::process::Command;

use crate::error::AppError;

/// Starts the program again with the window that the processor draws, and becomes it: its exit
/// status is ours. Comes back only if that fails.
pub(crate) fn start_on_cpu(file: Option<&Path>) -> AppError {
    let failed = |cause: std::io::Error| AppError::Window {
        cause: format!("the program could not start itself again: {cause}"),
    };
    let program = match std::env::current_exe() {
        Ok(program) => program,
        Err(cause) => return failed(cause),
    };
    let mut command = Command::new(program);
    command.args(["--renderer", "cpu"]);
    if let Some(file) = file {
        // A file may be called like an option.
        command.arg("--").arg(file);
    }
    failed(become_it(command))
}

#[cfg(unix)]
fn become_it(mut command: Command) -> std::io::Error {
    use std::os::unix::process::CommandExt as _;
    command.exec()
}

#[cfg(not(unix))]
fn become_it(mut command: Command) -> std::io::Error {
    match command.status() {
        Ok(status) => std::process::exit(status.code().unwrap_or(4)),
        Err(cause) => cause,
    }
}
