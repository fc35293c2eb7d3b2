//! Which figures a result yields.

mod balance;
mod bode;
mod columns;
mod map;
mod modes;
mod panels;
mod point;
mod run;
#[cfg(test)]
mod tests;

pub use balance::force_panel;
pub use bode::bode_panels;
pub use map::map_chart;
pub use modes::{damping_panels, plane_panel, stability_text};
pub use point::point_text;
pub use run::{RunFigure, run_figure, solved_figure};
