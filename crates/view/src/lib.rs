//! Figures as data, tables as text, and SVG: what the command line writes and the window paints.
//!
//! Start with [`plot::Figure`]: stacked panels over one time axis, plain data without a colour or
//! a pixel. [`svg_from_figure`] writes it as a self-contained SVG in a [`Theme`]; another painter
//! takes the same figure, the same [`plot::Ticks`] and the same [`plot::decimate`].
//! [`figures`] makes figures from results; [`TextTable`] sets tables for a terminal.
//!
//! # Conventions
//! A figure holds numbers in the units it shows; the one conversion from SI happens where a figure
//! is made from a trace. [`style`] names what things mean, a [`Theme`] says how that looks, and no
//! colour is written anywhere else. The same figure always gives the same text.
//!
//! # Not in here
//! Windows, raster images, files: the two front ends do that.

mod colour;
mod error;
pub mod figures;
pub mod plot;
pub mod style;
mod svg;
mod table;
mod theme;
mod unit_text;

pub use colour::{Colour, ColourError};
pub use error::ViewError;
pub use svg::{SvgOptions, svg_from_figure};
pub use table::{Column, TextTable};
pub use theme::{
    BuiltInTheme, FillColours, RuleColours, SeriesColours, Strokes, TextTones, Theme, Wash,
};
pub use unit_text::unit_text;

// Lets the figures of the tests serve the gallery too.
#[cfg(test)]
extern crate self as helmsplit_view;
