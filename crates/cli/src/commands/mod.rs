//! One file a command.

mod check;
mod completions;
mod convert;
mod draw;
mod new;
mod parameters;
mod run;

use std::path::PathBuf;

use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::presets::PRESETS;

use crate::args::{Arguments, CircuitArguments, Colours, Command, RowChoice, RunArguments};
use crate::exit::{ExitStatus, Failure};

/// Does what the arguments ask.
pub(crate) fn dispatch(arguments: Arguments) -> Result<ExitStatus, Failure> {
    match arguments.command {
        None => run::run(&main_job(arguments.file)),
        Some(Command::Run(arguments)) => run::run(&arguments),
        Some(Command::Check(arguments)) => check::check(&arguments),
        Some(Command::Draw(arguments)) => draw::draw(&arguments),
        Some(Command::New(arguments)) => new::new(&arguments),
        Some(Command::Parameters(arguments)) => parameters::parameters(&arguments),
        Some(Command::Convert(arguments)) => convert::convert(&arguments),
        Some(Command::Completions { shell }) => completions::completions(shell),
        Some(Command::Man) => completions::man(),
    }
}

/// Without a command: solve the file, or the demo, with everything at its default.
fn main_job(file: Option<PathBuf>) -> RunArguments {
    RunArguments {
        circuit: CircuitArguments {
            file: file.unwrap_or_else(|| PathBuf::from(PRESETS[0].key)),
            set: Vec::new(),
            start: None,
            units: UnitSystem::Metric,
        },
        out: PathBuf::from(crate::files::FOLDER),
        no_files: false,
        rows: RowChoice::Grid,
        theme: Colours::Light,
        save_state: None,
        json: false,
    }
}
