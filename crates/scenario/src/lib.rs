//! scenario

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

pub mod choice;
pub mod convert;
mod land_table;
pub mod manoeuvre;
pub mod parameter;
mod scenario;
mod value;
mod viscosity_grade;

pub use land_table::LandTable;
pub use parameter::{Parameter, ParameterId, parameters};
pub use scenario::Scenario;
pub use value::Value;
pub use viscosity_grade::{viscosity_at_100, viscosity_index, viscosity_of_grade};
