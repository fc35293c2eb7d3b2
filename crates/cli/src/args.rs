//! The arguments.

use std::ffi::OsString;
use std::path::PathBuf;

use clap::{Args, CommandFactory, FromArgMatches, Parser, Subcommand, ValueEnum};
use helmsplit_scenario::PRESETS;
use helmsplit_scenario::UnitSystem;
use helmsplit_sim::Rows;
use helmsplit_study::Layer;
use helmsplit_view::BuiltInTheme;

use crate::study_args::{InfluenceArguments, MendArguments, SizeArguments, SolveForArguments};
use crate::window::Renderer;

const CAUTIONS: &str = "\
Steering is safety-critical. Results support, never replace, tests on the machine, the maker's
instructions, local codes and standards, and licensed or competent practice. Oil under pressure
injects through skin: never feel for leaks. Release stored energy before opening a line.

Exit status: 0 done and all checks pass, 1 a check fails, 2 bad input, 3 the solver gave up,
4 no window could be opened, 130 cancelled.";

const ABOUT: &str = "Simulates steering circuits with a priority flow control valve.";

const WITH_WINDOW: &str = "\
Without a command it opens the window on FILE, or on the built-in orchard carrier. The commands do
the same work in the terminal; `helmsplit run` without FILE solves the orchard carrier and writes
traces and a figure to the folder helmsplit-out.";

const WITHOUT_WINDOW: &str = "\
Without a command it solves FILE, or the built-in orchard carrier, and writes traces and a figure
to the folder helmsplit-out. This program was built without the window.";

#[derive(Debug, Parser)]
#[command(name = "helmsplit", version, about = ABOUT, after_help = CAUTIONS, args_conflicts_with_subcommands = true)]
pub(crate) struct Arguments {
    #[command(subcommand)]
    pub(crate) command: Option<Command>,
    /// Circuit file, or the name of a preset
    pub(crate) file: Option<PathBuf>,
    /// What draws the window; by default what `HELMSPLIT_RENDERER` says, else auto
    #[arg(long, value_enum, value_name = "RENDERER")]
    pub(crate) renderer: Option<Renderer>,
}

/// The arguments that this program takes: without a window there is nothing to say about one.
pub(crate) fn command(has_window: bool) -> clap::Command {
    let command = Arguments::command();
    let about = |rest: &str| format!("{ABOUT}\n\n{rest}");
    if has_window {
        command.long_about(about(WITH_WINDOW))
    } else {
        command
            .long_about(about(WITHOUT_WINDOW))
            .mut_arg("renderer", |argument| argument.hide(true))
    }
}

/// Reads the arguments; the first is the name of the program.
///
/// # Errors
/// What clap says of them; help and version count as errors that go to standard output.
pub(crate) fn parse(
    arguments: impl IntoIterator<Item = OsString>,
    has_window: bool,
) -> Result<Arguments, clap::Error> {
    let mut command = command(has_window);
    let matches = command.try_get_matches_from_mut(arguments)?;
    Arguments::from_arg_matches(&matches).map_err(|error| error.format(&mut command))
}

#[derive(Debug, Subcommand)]
pub(crate) enum Command {
    /// Solve a circuit over its manoeuvre; print the verdict table, write traces and a figure
    Run(RunArguments),
    /// Solve a circuit and print every check with its evidence; writes nothing
    Check(CheckArguments),
    /// Compute equilibria over two variables; print a layer, write tables and a chart
    Map(MapArguments),
    /// Find the equilibrium of a circuit, the forces on its spool, and its modes
    Damping(DampingArguments),
    /// Draw the circuit, or its valve in section, as SVG
    Draw(DrawArguments),
    /// Size a circuit from its demand, step by step with formulas, and compare with the full model
    Size(Box<SizeArguments>),
    /// Find the values of a parameter that give a figure its target
    SolveFor(SolveForArguments),
    /// Rank the parameters by their influence on figures
    Influence(InfluenceArguments),
    /// Find the smallest changes that meet a failing check
    Mend(MendArguments),
    /// Write a commented circuit file from a preset
    New(NewArguments),
    /// List or search the parameters of a circuit file
    Parameters(ParameterArguments),
    /// Rewrite a circuit file in another unit system
    Convert(ConvertArguments),
    /// Print completions for a shell
    Completions {
        /// The shell
        shell: clap_complete::Shell,
    },
    /// Print the manual page
    Man,
}

/// The circuit and what is changed in it.
#[derive(Debug, Args)]
pub(crate) struct CircuitArguments {
    /// Circuit file, or the name of a preset
    #[arg(default_value = PRESETS[0].key)]
    pub(crate) file: PathBuf,
    /// Set a value, such as `valve.fixed_orifice_diameter="3.5 mm"` or `excess.kind=tank`; may be repeated
    #[arg(long = "set", value_name = "PATH=VALUE")]
    pub(crate) set: Vec<String>,
    /// Start the run from: settled, cold, or a state file written by --save-state
    #[arg(long, value_name = "START")]
    pub(crate) start: Option<String>,
    /// Units of everything that is printed or written
    #[arg(long, default_value = "metric", value_name = "SYSTEM", value_parser = unit_system)]
    pub(crate) units: UnitSystem,
}

#[derive(Debug, Args)]
pub(crate) struct RunArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    /// Folder for traces, sidecar and figure
    #[arg(short, long, value_name = "FOLDER", default_value = "helmsplit-out")]
    pub(crate) out: PathBuf,
    /// Compute the operating map too, for the checks that take it
    #[arg(long)]
    pub(crate) map: bool,
    /// Write no files
    #[arg(long, conflicts_with = "out")]
    pub(crate) no_files: bool,
    /// Which rows the traces have
    #[arg(long, value_enum, default_value_t = RowChoice::Grid)]
    pub(crate) rows: RowChoice,
    /// Colours of the figure
    #[arg(long, value_enum, default_value_t = Colours::Light)]
    pub(crate) theme: Colours,
    /// Write the last state to a file that a later run can start from
    #[arg(long, value_name = "FILE")]
    pub(crate) save_state: Option<PathBuf>,
    /// Print JSON instead of a table
    #[arg(long)]
    pub(crate) json: bool,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub(crate) enum RowChoice {
    /// One row each `solver.output_step`
    Grid,
    /// One row each step of the solver
    Steps,
}

impl RowChoice {
    pub(crate) fn rows(self) -> Rows {
        match self {
            Self::Grid => Rows::Grid,
            Self::Steps => Rows::Steps,
        }
    }
}

#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub(crate) enum Colours {
    /// Dark on light
    Light,
    /// Light on dark
    Dark,
    /// Without large tinted areas, for paper
    Print,
}

impl Colours {
    pub(crate) fn theme(self) -> BuiltInTheme {
        match self {
            Self::Light => BuiltInTheme::Light,
            Self::Dark => BuiltInTheme::Dark,
            Self::Print => BuiltInTheme::Print,
        }
    }
}

#[derive(Debug, Args)]
pub(crate) struct CheckArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    /// Leave out the operating map and the checks that take it
    #[arg(long)]
    pub(crate) no_map: bool,
    /// Print JSON instead of text
    #[arg(long)]
    pub(crate) json: bool,
}

/// Where a circuit is looked at while it stands still.
#[derive(Debug, Args)]
pub(crate) struct PointArguments {
    /// Take the inputs that the manoeuvre has at this time: "3.4 s"
    #[arg(long, value_name = "TIME")]
    pub(crate) time: Option<String>,
    /// Engine speed: "2400 rpm"
    #[arg(long, value_name = "SPEED")]
    pub(crate) speed: Option<String>,
    /// Turn the steering wheel: "90 rpm"; "0 rpm" lets it rest
    #[arg(long, value_name = "RATE", allow_hyphen_values = true)]
    pub(crate) wheel: Option<String>,
    /// Hold the steering at its lock and pull the wheel on: "30 rpm"
    #[arg(
        long,
        value_name = "RATE",
        conflicts_with = "wheel",
        allow_hyphen_values = true
    )]
    pub(crate) at_lock: Option<String>,
    /// Pressure behind the bench throttle of the priority port, or load while the wheel turns
    #[arg(long, value_name = "PRESSURE")]
    pub(crate) steering_pressure: Option<String>,
    /// Pressure behind the bench throttle of the excess port
    #[arg(long, value_name = "PRESSURE")]
    pub(crate) excess_pressure: Option<String>,
    /// Command of the excess consumer, -1 to 1
    #[arg(long, value_name = "COMMAND", allow_hyphen_values = true)]
    pub(crate) excess_command: Option<String>,
}

#[derive(Debug, Args)]
pub(crate) struct MapArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    #[command(flatten)]
    pub(crate) point: PointArguments,
    /// Axis to the right: engine-speed, steering-pressure, wheel-rate, excess-pressure,
    /// excess-command, motor-load, temperature, wear, air, or the path of a parameter; with a
    /// range as in `wear=1..4`
    #[arg(long, value_name = "VARIABLE[=FROM..TO]")]
    pub(crate) x: Option<String>,
    /// Axis upwards, the same way
    #[arg(long, value_name = "VARIABLE[=FROM..TO]")]
    pub(crate) y: Option<String>,
    /// Grid lines along both axes
    #[arg(long, value_name = "COUNT", default_value_t = 40)]
    pub(crate) lines: usize,
    /// Spread the grid lines evenly instead of where the layers bend
    #[arg(long)]
    pub(crate) even: bool,
    /// Layer to print and draw: priority-flow, priority-error, excess-flow, damping, frequency,
    /// travel, stroke-reserve, heat, inlet-pressure
    #[arg(long, value_name = "LAYER", default_value = "damping", value_parser = layer)]
    pub(crate) layer: Layer,
    /// Write every layer as a table
    #[arg(long, value_name = "FILE")]
    pub(crate) csv: Option<PathBuf>,
    /// Draw the layer with its contours
    #[arg(long, value_name = "FILE")]
    pub(crate) svg: Option<PathBuf>,
    /// Colours of the chart
    #[arg(long, value_enum, default_value_t = Colours::Light)]
    pub(crate) theme: Colours,
    /// Print JSON instead of text
    #[arg(long)]
    pub(crate) json: bool,
}

#[derive(Debug, Args)]
pub(crate) struct DampingArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    #[command(flatten)]
    pub(crate) point: PointArguments,
    /// Follow the modes while a variable sweeps, and find the borders of hunting on the way:
    /// `valve.disc_hole_diameter="0.4 mm..1 mm"`; variables as for the axes of a map
    #[arg(long, value_name = "VARIABLE[=FROM..TO]")]
    pub(crate) sweep: Option<String>,
    /// Values of the sweep
    #[arg(long, value_name = "COUNT", default_value_t = 31, requires = "sweep")]
    pub(crate) values: usize,
    /// Frequency response from pump-flow, steering-load, engine-speed or excess-load to a state or
    /// signal: `pump-flow:p_in`
    #[arg(long, value_name = "FROM:TO", default_value = "pump-flow:p_in")]
    pub(crate) response: String,
    /// Kick the least damped mode in time, without and with dry friction
    #[arg(long)]
    pub(crate) kick: bool,
    /// Write the modes as a table, over the sweep if there is one
    #[arg(long, value_name = "FILE")]
    pub(crate) csv: Option<PathBuf>,
    /// Draw forces, modes, sweep and response
    #[arg(long, value_name = "FILE")]
    pub(crate) svg: Option<PathBuf>,
    /// Colours of the chart
    #[arg(long, value_enum, default_value_t = Colours::Light)]
    pub(crate) theme: Colours,
    /// Print JSON instead of text
    #[arg(long)]
    pub(crate) json: bool,
}

#[derive(Debug, Args)]
pub(crate) struct DrawArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    /// Draw the circuit in symbols of ISO 1219-1; this is the default
    #[arg(long = "circuit", conflicts_with = "valve")]
    pub(crate) whole: bool,
    /// Draw the priority valve in section
    #[arg(long)]
    pub(crate) valve: bool,
    /// Solve the run and shade the oil by its pressure at this time: "3.4 s"
    #[arg(long, value_name = "TIME")]
    pub(crate) at: Option<String>,
    /// Draw the spool of the valve at this travel instead: "2.3 mm"
    #[arg(long, value_name = "LENGTH", requires = "valve")]
    pub(crate) travel: Option<String>,
    /// File to write; by default the drawing is printed
    #[arg(short, long, value_name = "FILE")]
    pub(crate) output: Option<PathBuf>,
    /// Colours of the drawing
    #[arg(long, value_enum, default_value_t = Colours::Light)]
    pub(crate) theme: Colours,
}

#[derive(Debug, Args)]
pub(crate) struct NewArguments {
    /// Name of the preset; without one the presets are listed
    pub(crate) preset: Option<String>,
    /// File to write; by default the preset's name in the current folder
    #[arg(short, long, value_name = "FILE")]
    pub(crate) output: Option<PathBuf>,
    /// Units of the file
    #[arg(long, default_value = "metric", value_name = "SYSTEM", value_parser = unit_system)]
    pub(crate) units: UnitSystem,
    /// Overwrite a file that is there
    #[arg(long)]
    pub(crate) force: bool,
}

#[derive(Debug, Args)]
pub(crate) struct ParameterArguments {
    /// Words to search in path, label, symbol and note
    pub(crate) search: Vec<String>,
    /// Units of ranges and defaults
    #[arg(long, default_value = "metric", value_name = "SYSTEM", value_parser = unit_system)]
    pub(crate) units: UnitSystem,
    /// Print JSON instead of text
    #[arg(long)]
    pub(crate) json: bool,
}

#[derive(Debug, Args)]
pub(crate) struct ConvertArguments {
    /// Circuit file
    pub(crate) file: PathBuf,
    /// The unit system to write
    #[arg(long, value_name = "SYSTEM", value_parser = unit_system)]
    pub(crate) to: UnitSystem,
    /// File to write; by default the result is printed
    #[arg(short, long, value_name = "FILE", conflicts_with = "in_place")]
    pub(crate) output: Option<PathBuf>,
    /// Overwrite the circuit file itself
    #[arg(long)]
    pub(crate) in_place: bool,
}

fn unit_system(text: &str) -> Result<UnitSystem, String> {
    UnitSystem::from_name(text).ok_or_else(|| "write metric, us or si".to_owned())
}

fn layer(text: &str) -> Result<Layer, String> {
    Layer::from_name(text).ok_or_else(|| {
        let names: Vec<_> = Layer::ALL.iter().map(|layer| layer.name()).collect();
        format!("write one of {}", names.join(", "))
    })
}
