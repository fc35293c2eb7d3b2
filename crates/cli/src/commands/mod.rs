//! One file a command.

mod check;
mod completions;
mod convert;
mod damping;
mod draw;
mod map;
mod new;
mod parameters;
mod run;

use std::path::PathBuf;

use helmsplit_scenario::UnitSystem;
use helmsplit_scenario::presets::PRESETS;

use crate::args::{Arguments, CircuitArguments, Colours, Command, RowChoice, RunArguments};
use crate::exit::{ExitStatus, Failure};
use crate::window::{OpenWindow, open};

pub(crate) use damping::Told;

/// Does what the arguments ask.
pub(crate) fn dispatch(
    arguments: Arguments,
    open_window: Option<OpenWindow>,
) -> Result<ExitStatus, Failure> {
    let has_window = open_window.is_some();
    match arguments.command {
        None => match open_window {
            Some(open_window) => open(open_window, arguments.file, arguments.renderer),
            None => run::run(&main_job(arguments.file)),
        },
        Some(Command::Run(arguments)) => run::run(&arguments),
        Some(Command::Check(arguments)) => check::check(&arguments),
        Some(Command::Map(arguments)) => map::map(&arguments),
        Some(Command::Damping(arguments)) => damping::damping(&arguments),
        Some(Command::Draw(arguments)) => draw::draw(&arguments),
        Some(Command::New(arguments)) => new::new(&arguments),
        Some(Command::Parameters(arguments)) => parameters::parameters(&arguments),
        Some(Command::Convert(arguments)) => convert::convert(&arguments),
        Some(Command::Completions { shell }) => completions::completions(shell, has_window),
        Some(Command::Man) => completions::man(has_window),
    }
}

/// Without a command and without a window: solve the file, or the demo, with everything at its default.
fn main_job(file: Option<PathBuf>) -> RunArguments {
    RunArguments {
        circuit: CircuitArguments {
            file: file.unwrap_or_else(|| PathBuf::from(PRESETS[0].key)),
            set: Vec::new(),
            start: None,
            units: UnitSystem::Metric,
        },
        out: PathBuf::from(crate::files::FOLDER),
        map: false,
        no_files: false,
        rows: RowChoice::Grid,
        theme: Colours::Light,
        save_state: None,
        json: false,
    }
}
