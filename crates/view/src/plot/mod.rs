//! Plots as data, and what every painter of them shares: ticks, axes, thinning.

mod axis;
mod decimate;
mod figure;
mod number;
mod series;
mod ticks;

pub use axis::Axis;
pub use decimate::{decimate, straighten};
pub use figure::{Figure, Limit, Mark, Panel, Reach, Shade, TimeAxis, ValueRange, Where};
pub use number::{MINUS, NARROW_SPACE, number_text, power_text, superscript};
pub use series::Series;
pub use ticks::Ticks;
