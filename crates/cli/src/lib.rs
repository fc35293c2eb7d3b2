//! The command line: arguments, output, exit status. Everything it does is done by the crates
//! below; what stands here is how a person or a script asks and what they get to read.

mod args;
mod commands;
mod damping_json;
mod damping_text;
mod exit;
mod files;
mod input;
mod map_json;
mod map_text;
mod measure_text;
mod output;
mod point;
mod progress;
mod report_json;
mod size_json;
mod study_args;
mod study_json;
mod table_csv;
mod typed;
mod verdict;
mod window;

use std::ffi::OsString;

pub use exit::ExitStatus;
pub use window::{NoWindow, OpenWindow, Renderer, WindowRequest};

/// Runs the command line `arguments` (the first is the program's name) and gives the exit status.
/// Results go to standard output, messages and progress to standard error.
///
/// Without a command the work goes to `open_window`; if there is none, because the program was
/// built without the window, the circuit is solved instead.
#[must_use]
pub fn run(
    arguments: impl IntoIterator<Item = OsString>,
    open_window: Option<OpenWindow>,
) -> ExitStatus {
    let arguments = match args::parse(arguments, open_window.is_some()) {
        Ok(arguments) => arguments,
        Err(error) => {
            // Help and version are printed to standard output and are no failure.
            let status = if error.use_stderr() {
                ExitStatus::BadInput
            } else {
                ExitStatus::Done
            };
            return match error.print() {
                Ok(()) => status,
                Err(_closed) => ExitStatus::BadInput,
            };
        }
    };
    let file = arguments.file.clone();
    match commands::dispatch(arguments, open_window) {
        Ok(status) => status,
        Err(failure) => {
            output::complain(&failure);
            commands::hint_at_command(file.as_deref(), open_window.is_some());
            failure.status()
        }
    }
}
