//! scenario

pub mod document;
mod finding;
mod nearest;
pub mod quantity_text;
pub mod units;

pub use finding::{Finding, Findings, Severity};
pub use nearest::nearest;
pub use units::UnitSystem;
