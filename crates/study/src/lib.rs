//! Studies: what is asked of runs and of the equations at rest.
//!
//! - A run: [`solve`] takes a scenario and gives [`Solved`], with the verdict table in
//!   [`Solved::checks`].
//! - At rest: [`equilibrium`] takes a scenario and an [`OperatingPoint`] and gives the
//!   [`Equilibrium`] there, with the balance of forces on the spool and its [`Stability`];
//!   [`Equilibrium::modes`] says who swings; [`mode_path`] and [`border`] follow that along a
//!   sweep.
//! - Design: [`sizing`] from the demand to the dimensions; [`solve_for`] any parameter against any
//!   [`figure`]; [`influence`] of parameters on figures; [`mend`] the smallest change that meets a
//!   failing check. They take a [`StudyWatch`]: progress, and a flag that cancels.
//!
//! # Conventions
//! SI throughout. A check that a single run cannot answer says so ([`Status::NeedsMap`]) and
//! gives no number; one that the circuit or the manoeuvre gives no occasion for is
//! [`Status::NotApplicable`], with the reason.

mod brent;
mod check;
mod checks;
mod dropout;
mod equilibrium;
mod error;
mod event;
pub mod figure;
mod frequency;
pub mod influence;
mod kick;
mod lock;
mod map;
pub mod mend;
mod modes;
mod operating;
mod parameter_scale;
mod response;
pub mod sizing;
mod solve;
pub mod solve_for;
mod study_watch;
mod window;

pub use check::{Check, CheckId, Evidence, Limit, Measure, Operand, Status};
pub use checks::check_run;
pub use dropout::{Dropout, longest_dropout};
pub use equilibrium::{
    Equilibrium, EquilibriumError, Force, ForceKind, Loss, Reading, SeekFrom, equilibria,
    equilibrium,
};
pub use error::StudyError;
pub use event::{Event, EventKind, events};
pub use frequency::{
    Excitation, FrequencyResponse, LIGHT, RippleBand, RippleClearance, frequency_response,
    ripple_bands, ripple_clearance, spread_frequencies,
};
pub use kick::{FrictionTest, Kick, KickOptions, KickOutcome, friction_test, kick};
pub use lock::{LockHold, lock_holds};
pub use map::{
    Axis, Cell, ContourLine, Layer, MapEnd, MapNews, MapSpec, MapWatch, OperatingMap, Spot,
    check_maps, map_checks, operating_map, with_map_checks,
};
pub use modes::{
    Border, BorderKind, Mode, ModeKind, ModePath, Modes, ModesError, Part, Pathway, Share,
    Stability, Sweep, border, borders, mode_path,
};
pub use operating::{
    ExcessDuty, Frozen, LeftOut, OperatingPoint, PointError, SteeringDuty, Variable, VariableName,
};
pub use response::{Response, response_after};
pub use solve::{Solved, solve};
pub use study_watch::{Progress, StudyWatch};
pub use window::{Window, windows};
