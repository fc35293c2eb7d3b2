//! Why a circuit of the acceptance tests could not be built or run.

use std::fmt::{Debug, Display, Formatter};

/// Anything that went wrong on the way to a figure, in words. Every error of the crates turns
/// into it.
pub struct Trouble(String);

/// A result, or the trouble on the way to it.
pub type Tried<T> = Result<T, Trouble>;

impl<T: Display> From<T> for Trouble {
    fn from(error: T) -> Self {
        Self(error.to_string())
    }
}

/// The words alone: this is what a failing test prints.
impl Debug for Trouble {
    fn fmt(&self, f: &mut Formatter<'_>) -> std::fmt::Result {
        f.write_str(&self.0)
    }
}
