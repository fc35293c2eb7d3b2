//! The operating map: equilibria over two variables, layer by layer.
//!
//! Start with [`operating_map`]; [`OperatingMap::contours`] draws lines of equal value through a
//! layer, [`check_maps`] and [`map_checks`] answer the checks that one run cannot.

mod axis;
mod cell;
mod checks;
mod compute;
mod contour;
mod layer;
mod planes;
mod refine;

pub use axis::{Axis, MapSpec};
pub use cell::{Cell, Spot};
pub use checks::{map_checks, with_map_checks};
pub use compute::{MapEnd, MapNews, MapWatch, OperatingMap, operating_map};
pub use contour::ContourLine;
pub use layer::Layer;
pub use planes::check_maps;
