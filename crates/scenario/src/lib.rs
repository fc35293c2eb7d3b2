//! What the user writes: units, the parameter table, the circuit file and its way into a circuit.
//!
//! - Text: [`units`] and [`quantity_text`] turn `"3.7 mm"` into SI and back without losing a bit;
//!   [`document`] reads a file with the place of every value; [`write`](mod@write) changes and
//!   saves it; [`Finding`]s say what is wrong, where, and what would do.
//! - Table: [`parameter`] and [`choice`] name all that can be set; a [`Scenario`] holds the values
//!   and assembles them into the circuit of the model.
//!
//! Numbers are SI everywhere behind the one conversion in and before the one conversion out.

pub mod document;
mod error;
mod finding;
mod nearest;
pub mod quantity_text;
pub mod units;
pub mod write;

pub use error::{FileError, MAX_FILE_BYTES};
pub use finding::{Finding, Findings, Severity};
pub use nearest::nearest;
pub use units::UnitSystem;

mod access;
mod assemble;
pub mod choice;
pub mod convert;
mod describe;
mod hash;
mod land_table;
pub mod manoeuvre;
mod migrate;
pub mod parameter;
pub mod presets;
mod read;
mod scenario;
mod settings;
mod to_text;
mod unit_rewrite;
mod validate;
mod value;
mod viscosity_grade;

pub use access::paths;
pub use describe::describe_markdown;
pub use land_table::LandTable;
pub use migrate::FORMAT;
pub use parameter::{Parameter, ParameterId, parameters};
pub use presets::{PRESETS, Preset};
pub use scenario::Scenario;
pub use settings::{Limits, Ratings, SolverSettings};
pub use unit_rewrite::convert_units;
pub use value::Value;
pub use viscosity_grade::{viscosity_at_100, viscosity_index, viscosity_of_grade};
