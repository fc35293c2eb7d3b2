//! One run over time: solver, traces, audits, statistics, export.
//!
//! Start with [`run`]: it takes a [`RunSetup`] (circuit, inputs, times, start, options) and gives
//! a [`RunResult`] with the [`Trace`] of every state and signal. [`settle`] finds the state of
//! rest from which a run usually starts. [`integrate`] is the layer below, for any [`System`].
//!
//! # Conventions
//! SI throughout; units come in at export only, as the caller names them. No hidden state: the
//! same input gives the same result. A run that the solver gives up or the user cancels is a
//! result with an ending ([`RunEnd`]), not an error, and keeps what it has.
//!
//! # Not in here
//! Figures and checks, equilibria for their own sake, sweeps: everything that asks for more than
//! one run. diffsol's types do not leave this crate.

mod audit;
mod circuit_system;
mod crawl_guard;
mod csv_export;
mod dense_factors;
mod elimination_order;
mod ending;
mod error;
mod extremes;
mod factors;
mod history;
mod integrate;
mod lu_solver;
mod options;
mod problem;
mod pseudo_transient;
mod quadrature;
mod recorder;
mod run;
mod saved_state;
mod seek;
mod settle;
mod sidecar;
mod sparse_factors;
mod statistics;
mod system;
mod table;
mod trace;
mod watch;

pub use audit::{Audit, Balance};
pub use circuit_system::{CircuitOnSegment, state_scales};
pub use csv_export::{Rows, column_heading, write_csv};
pub use ending::{GiveUp, RunEnd};
pub use error::SimError;
pub use extremes::Extreme;
pub use integrate::{Flow, Integration, Piece, Recorder, Step, integrate};
pub use options::{Method, SolverOptions};
pub use run::{RunResult, RunSetup, Start, run};
pub use saved_state::SavedState;
pub use seek::{Sought, seek_rest};
pub use settle::{REST_RESIDUAL, Rest, SettleOptions, Settled, settle};
pub use sidecar::{Origin, Sidecar};
pub use statistics::Statistics;
pub use system::System;
pub use table::{Column, Table};
pub use trace::{ColumnInfo, Trace};
pub use watch::Watch;
