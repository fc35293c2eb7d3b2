//! The command line: arguments, output, exit status. Everything it does is done by the crates
//! below; what stands here is how a person or a script asks and what they get to read.

mod args;
mod commands;
mod exit;
mod files;
mod input;
mod measure_text;
mod output;
mod progress;
mod report_json;
mod verdict;

use std::ffi::OsString;

use clap::Parser;

pub use exit::ExitStatus;

/// Runs the command line `arguments` (the first is the program's name) and gives the exit status.
/// Results go to standard output, messages and progress to standard error.
#[must_use]
pub fn run(arguments: impl IntoIterator<Item = OsString>) -> ExitStatus {
    let arguments = match args::Arguments::try_parse_from(arguments) {
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
    match commands::dispatch(arguments) {
        Ok(status) => status,
        Err(failure) => {
            output::complain(&failure);
            failure.status()
        }
    }
}
