//! One run over time: solver, traces, audits.

mod ending;
mod error;
mod integrate;
mod options;
mod problem;
mod pseudo_transient;
mod quadrature;
mod settle;
mod statistics;
mod system;
mod watch;

pub use ending::{GiveUp, RunEnd};
pub use error::SimError;
pub use integrate::{Flow, Integration, Piece, Recorder, Step, integrate};
pub use options::{Method, SolverOptions};
pub use settle::{REST_RESIDUAL, Rest, SettleOptions, Settled, settle};
pub use statistics::Statistics;
pub use system::System;
pub use watch::Watch;
