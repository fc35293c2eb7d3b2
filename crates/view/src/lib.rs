//! Figures as data, tables as text, and SVG: what the command line writes and the window paints.
//!
//! Start with [`plot::Figure`]: stacked panels over one time axis, plain data without a colour or
//! a pixel. [`svg_from_figure`] writes it as a self-contained SVG in a [`Theme`]; another painter
//! takes the same figure, the same [`plot::Ticks`] and the same [`plot::decimate`].
//! [`circuit_scene`] draws a circuit with the symbols of ISO 1219-1, as a [`scene::Scene`] that
//! [`svg_from_scene`] writes and a window can point at; a [`Moment`] shades it by pressure.
//! A [`chart::Chart`] shows anything over anything: maps with contours, paths of modes, frequency
//! responses, balances; [`svg_from_chart`] writes it. [`figures`] makes figures from results; [`TextTable`] sets tables for a terminal.
//!
//! # Conventions
//! A figure holds numbers in the units it shows; the one conversion from SI happens where a figure
//! is made from a trace. [`style`] names what things mean, a [`Theme`] says how that looks, and no
//! colour is written anywhere else. The same figure always gives the same text.
//!
//! # Not in here
//! Windows, raster images, files: the two front ends do that.

pub mod chart;
mod colour;
pub mod diagram;
pub mod drawing;
mod error;
pub mod figures;
mod influence_bars;
mod moment;
pub mod plot;
mod ramp;
mod readings;
mod scale_bar;
pub mod scene;
pub mod style;
mod svg;
mod table;
mod theme;
mod theme_scene;
mod unit_text;
mod worked;

pub use colour::{Colour, ColourError};
pub use diagram::circuit_scene;
pub use drawing::valve_scene;
pub use error::ViewError;
pub use influence_bars::{influence_scene, sensitivity_text};
pub use moment::Moment;
pub use ramp::{PressureScale, Ramp};
pub use readings::{Reading, part_readings};
pub use svg::{SvgOptions, svg_from_chart, svg_from_figure, svg_from_scene};
pub use table::{Column, TextTable};
pub use theme::{
    BodyColours, BuiltInTheme, FillColours, RuleColours, SeriesColours, Strokes, TextTones, Theme,
    Wash,
};
pub use unit_text::unit_text;
pub use worked::{change_table, comparison_table, sizing_table, worked_formula, worked_steps};

// Lets the figures of the tests serve the gallery too.
#[cfg(test)]
extern crate self as helmsplit_view;
