//! Modes of an equilibrium: how a small disturbance dies out or grows (docs/model.md, M11).
//!
//! Start with [`crate::Equilibrium::modes`]; [`mode_path`] follows the modes while one variable
//! sweeps, [`border`] finds where hunting begins.

mod assignment;
mod border;
mod eigen;
mod error;
mod mode;
mod part;
mod path;
mod stability;

pub(crate) use eigen::Linear;

pub use border::{Border, BorderKind, border, borders};
pub use error::ModesError;
pub use mode::{Mode, ModeKind, Modes};
pub use part::{Part, Share};
pub use path::{ModePath, Pathway, Sweep, mode_path};
pub use stability::Stability;

/// An eigenvalue with an imaginary part below this, rad/s, is no oscillation but rounding in a
/// pair of real ones.
pub(crate) const SLOWEST_OSCILLATION: f64 = 1.0;

/// An eigenvalue smaller than this, 1/s, is neutral: pressure trapped between shut ports, or a
/// leak that takes hours.
pub(crate) const NEUTRAL: f64 = 1e-4;
