//! One file a command.

mod check;
mod completions;
mod convert;
mod damping;
mod draw;
mod influence;
mod map;
mod mend;
mod new;
mod parameters;
mod run;
mod size;
mod solve_for;

pub(crate) use size::Sized;

use std::path::{Path, PathBuf};

use helmsplit_scenario::presets::PRESETS;
use helmsplit_scenario::{UnitSystem, nearest};

use crate::args::{
    Arguments, CircuitArguments, Colours, Command, RowChoice, RunArguments, command,
};
use crate::exit::{ExitStatus, Failure};
use crate::output::say;
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
        Some(Command::Size(arguments)) => size::size(&arguments),
        Some(Command::SolveFor(arguments)) => solve_for::solve_for(&arguments),
        Some(Command::Influence(arguments)) => influence::influence(&arguments),
        Some(Command::Mend(arguments)) => mend::mend(&arguments),
        Some(Command::New(arguments)) => new::new(&arguments),
        Some(Command::Parameters(arguments)) => parameters::parameters(&arguments),
        Some(Command::Convert(arguments)) => convert::convert(&arguments),
        Some(Command::Completions { shell }) => completions::completions(shell, has_window),
        Some(Command::Man) => completions::man(has_window),
    }
}

/// A mistyped command is taken for a file that is not there.
pub(crate) fn hint_at_command(file: Option<&Path>, has_window: bool) {
    let command = command(has_window);
    let names = command.get_subcommands().map(clap::Command::get_name);
    if let Some(word) = file.filter(|file| !file.exists()).and_then(Path::to_str)
        && let Some(near) = nearest(word, names)
    {
        say(&format!("did you mean the command `helmsplit {near}`?"));
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
