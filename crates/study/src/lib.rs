//! Studies: what is asked of runs. For now the solving of a scenario, the events of a run, its
//! figures, and the checks of those figures against limits.
//!
//! Start with [`solve`]: scenario in, [`Solved`] out, with the verdict table in
//! [`Solved::checks`].
//!
//! # Conventions
//! SI throughout. A check that a single run cannot answer says so ([`Status::NeedsMap`]) and
//! gives no number; one that the circuit or the manoeuvre gives no occasion for is
//! [`Status::NotApplicable`], with the reason.

mod check;
mod checks;
mod dropout;
mod error;
mod event;
mod lock;
mod response;
mod solve;
mod window;

pub use check::{Check, CheckId, Evidence, Limit, Measure, Operand, Status};
pub use checks::check_run;
pub use dropout::{Dropout, longest_dropout};
pub use error::StudyError;
pub use event::{Event, EventKind, events};
pub use lock::{LockHold, lock_holds};
pub use response::{Response, response_after};
pub use solve::{Solved, solve};
pub use window::{Window, windows};
