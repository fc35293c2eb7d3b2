//! The arguments of the commands that design: size, solve-for, influence, mend.

use std::path::PathBuf;

use clap::Args;

use crate::args::{CircuitArguments, Colours};

#[derive(Debug, Args)]
pub(crate) struct SizeArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    #[command(flatten)]
    pub(crate) load: LoadArguments,
    /// Turns of the wheel from lock to lock; by default those of the circuit
    #[arg(long, value_name = "NUMBER")]
    pub(crate) turns: Option<String>,
    /// Wheel rate that the valve is made for [default: 120 rpm]
    #[arg(long, value_name = "SPEED")]
    pub(crate) wheel_rate: Option<String>,
    /// Wheel rate that low idle must give; by default that of the circuit's ratings
    #[arg(long, value_name = "SPEED")]
    pub(crate) idle_wheel_rate: Option<String>,
    /// Share of the priority relief's setting that the load may take [default: 75 %]
    #[arg(long, value_name = "SHARE")]
    pub(crate) relief_share: Option<String>,
    /// Pressure that the spring holds over the fixed orifice; by default that of the circuit
    #[arg(long, value_name = "PRESSURE")]
    pub(crate) spring_drop: Option<String>,
    /// Rise of the priority flow allowed up to full excess flow; by default the limit of regulation
    #[arg(long, value_name = "SHARE")]
    pub(crate) band: Option<String>,
    /// Drop over the excess land at top speed while nobody steers [default: 8 bar]
    #[arg(long, value_name = "PRESSURE")]
    pub(crate) land_drop: Option<String>,
    /// Damping ratio wanted of the valve alone; by default the limit of damping
    #[arg(long, value_name = "NUMBER")]
    pub(crate) damping: Option<String>,
    /// Share of the damping that the head hole takes; by default as in the circuit
    #[arg(long, value_name = "SHARE")]
    pub(crate) head_share: Option<String>,
    /// Factor on the slip of a new pump with which the demand must still be met [default: 2]
    #[arg(long, value_name = "NUMBER")]
    pub(crate) wear: Option<String>,
    /// Flow that the consumer needs at top speed
    #[arg(long, value_name = "FLOW")]
    pub(crate) consumer_flow: Option<String>,
    /// Pressure that the consumer needs
    #[arg(long, value_name = "PRESSURE")]
    pub(crate) consumer_pressure: Option<String>,
    /// Take what the formulas give, not the standard size beside it
    #[arg(long)]
    pub(crate) exact: bool,
    /// Write the circuit with the sizes in it to this file
    #[arg(long, value_name = "FILE")]
    pub(crate) adopt: Option<PathBuf>,
    /// Overwrite a file that is there
    #[arg(long, requires = "adopt")]
    pub(crate) force: bool,
    /// Print JSON instead of text
    #[arg(long)]
    pub(crate) json: bool,
}

/// What loads the steering cylinder: tyres that scrub on the spot, or a force; by default the
/// circuit's own tyres.
#[derive(Debug, Args)]
pub(crate) struct LoadArguments {
    /// Weight on the steered axle, as a force; needs --tyre-width and --arm
    #[arg(long, value_name = "FORCE", requires_all = ["tyre_width", "arm"])]
    pub(crate) axle_load: Option<String>,
    /// Width of the tyre
    #[arg(long, value_name = "LENGTH", requires = "axle_load")]
    pub(crate) tyre_width: Option<String>,
    /// Distance from kingpin to the middle of the tyre on the ground [default: 0 mm]
    #[arg(long, value_name = "LENGTH", requires = "axle_load")]
    pub(crate) kingpin_offset: Option<String>,
    /// Least arm of the cylinder about the kingpins
    #[arg(long, value_name = "LENGTH", requires = "axle_load")]
    pub(crate) arm: Option<String>,
    /// Friction of the tyre on the ground [default: 0.7, dry concrete]
    #[arg(long, value_name = "NUMBER", requires = "axle_load")]
    pub(crate) tyre_friction: Option<String>,
    /// The steered axle is driven: take its torque twice
    #[arg(long, requires = "axle_load")]
    pub(crate) driven: bool,
    /// Force at the piston, instead of an axle
    #[arg(long, value_name = "FORCE", conflicts_with = "axle_load")]
    pub(crate) cylinder_force: Option<String>,
}

#[derive(Debug, Args)]
pub(crate) struct SolveForArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    /// Parameter to be found, such as `valve.disc_hole_diameter`
    #[arg(long, value_name = "PATH", required_unless_present = "figures")]
    pub(crate) parameter: Option<String>,
    /// Figure that shall meet the target, such as `overshoot` or `p_in.largest`
    #[arg(long, value_name = "FIGURE", required_unless_present = "figures")]
    pub(crate) figure: Option<String>,
    /// The target, with its unit: "20 %", "160 bar"
    #[arg(long, value_name = "VALUE", required_unless_present = "figures")]
    pub(crate) target: Option<String>,
    /// Lower end of the range; by default that of the usual range
    #[arg(long, value_name = "VALUE")]
    pub(crate) from: Option<String>,
    /// Upper end of the range; by default that of the usual range
    #[arg(long, value_name = "VALUE")]
    pub(crate) to: Option<String>,
    /// Values that the scan looks at
    #[arg(long, value_name = "COUNT", default_value_t = 25)]
    pub(crate) points: usize,
    /// Take figures at rest at the inputs that the manoeuvre has at this time: "6.5 s"
    #[arg(long, value_name = "TIME")]
    pub(crate) at: Option<String>,
    /// List the figures of the circuit
    #[arg(long)]
    pub(crate) figures: bool,
    /// Print JSON instead of text
    #[arg(long)]
    pub(crate) json: bool,
}

#[derive(Debug, Args)]
pub(crate) struct InfluenceArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    /// Figure, such as `overshoot` or `q_priority.mean`; may be repeated
    #[arg(long = "figure", value_name = "FIGURE", required = true)]
    pub(crate) figures: Vec<String>,
    /// Parameter to vary; may be repeated; by default every dimension, setting and property
    #[arg(long = "parameter", value_name = "PATH")]
    pub(crate) parameters: Vec<String>,
    /// Take figures at rest at the inputs that the manoeuvre has at this time: "6.5 s"
    #[arg(long, value_name = "TIME")]
    pub(crate) at: Option<String>,
    /// Rows that are shown
    #[arg(long, value_name = "COUNT", default_value_t = 20)]
    pub(crate) most: usize,
    /// Draw the bars of the first figure as SVG to this file
    #[arg(long, value_name = "FILE")]
    pub(crate) svg: Option<PathBuf>,
    /// Colours of the drawing
    #[arg(long, value_enum, default_value_t = Colours::Light)]
    pub(crate) theme: Colours,
    /// Print JSON instead of text
    #[arg(long)]
    pub(crate) json: bool,
}

#[derive(Debug, Args)]
pub(crate) struct MendArguments {
    #[command(flatten)]
    pub(crate) circuit: CircuitArguments,
    /// The check that fails
    #[arg(long, value_name = "CHECK")]
    pub(crate) check: String,
    /// Parameter that may be changed; may be repeated; by default every dimension and setting that
    /// a designer chooses
    #[arg(long = "parameter", value_name = "PATH")]
    pub(crate) parameters: Vec<String>,
    /// Single changes that are searched, the most promising first
    #[arg(long, value_name = "COUNT", default_value_t = 10)]
    pub(crate) most: usize,
    /// Largest factor by which a dimension may grow or shrink
    #[arg(long, value_name = "NUMBER", default_value_t = 3.0)]
    pub(crate) largest_factor: f64,
    /// Write the circuit with the smallest single change in it to this file
    #[arg(long, value_name = "FILE")]
    pub(crate) adopt: Option<PathBuf>,
    /// Overwrite a file that is there
    #[arg(long, requires = "adopt")]
    pub(crate) force: bool,
    /// Print JSON instead of text
    #[arg(long)]
    pub(crate) json: bool,
}
