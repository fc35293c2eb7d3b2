//! Which figures a result yields.

mod columns;
mod panels;
mod run;

pub use run::{RunFigure, run_figure, solved_figure};
