//! Which figures a result yields.

mod columns;
mod panels;
mod run;
#[cfg(test)]
mod tests;

pub use run::{RunFigure, run_figure, solved_figure};
