//! Quantities as text: `"3.7 mm"` in, `"3.7 mm"` out, and not a bit lost between.
//!
//! Reading forms the exact product of the typed decimal and the unit's factor and rounds it once
//! to an `f64`. Writing searches the shortest decimal for which that same reading gives back the
//! same bits. Files may therefore change units as often as one likes without a value drifting.

mod error;
mod format;
mod parse;

pub use error::QuantityError;
pub use format::{Digits, number_from_si, text_from_si};
pub use parse::{Parsed, parse};

#[cfg(test)]
mod tests;
