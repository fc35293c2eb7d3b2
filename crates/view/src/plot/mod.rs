//! Plots as data, and what every painter of them shares: ticks, axes, thinning.

mod axis;
mod decimate;
mod figure;
mod limit_names;
mod mark_rows;
mod number;
mod pyramid;
mod series;
mod ticks;

pub use axis::Axis;
pub use decimate::{decimate, straighten};
pub use figure::{Figure, Limit, Mark, Panel, Reach, Shade, TimeAxis, ValueRange, Where};
pub use limit_names::{Frame, PlacedName, placed_names};
pub use mark_rows::{PlacedMark, placed_marks, row_count};
pub use number::{MINUS, NARROW_SPACE, number_text, power_text, superscript};
pub use pyramid::Pyramid;
pub use series::Series;
pub use ticks::Ticks;
