//! What the engine is held against: values from books, standards and papers, closed forms, and
//! the rules of the house.
//!
//! [`verification`] is the list of outside checks as data. The tests of this package assert every
//! one of them, and `cargo run -p helmsplit-acceptance --example verification` writes the same
//! list, with what was obtained, to `docs/verification.md`.
//!
//! To add a group, write one module under `verification/` with `pub fn checks() -> Vec<Check>`
//! and name it in [`verification::GROUPS`].
//!
//! # Conventions
//! Every expected value stands here as printed in its source or worked out from the formula that
//! the source names; what is obtained comes from the public functions of the engine and never
//! from a copy of the formula.

pub mod bench_circuit;
pub mod bisection;
pub mod check;
pub mod document;
pub mod equilibria;
pub mod ideal;
pub mod line_model;
pub mod linear_points;
pub mod outcome;
pub mod plain_circuit;
pub mod reference;
pub mod rig;
pub mod rk4;
pub mod test_valve;
pub mod trouble;
pub mod verification;
