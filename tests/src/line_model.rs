//! A line of segments put together from the engine's own pieces: inertance and loss of
//! [`Line`], compliance of [`Chamber`].
//!
//! The near end holds a constant pressure of 0 gauge, the far end is shut. States alternate as in
//! a circuit: flow of a segment, pressure behind it.

use helmsplit_model::{Chamber, Line, Oil, Real};

/// A line that is shut at its far end.
#[derive(Debug, Clone, Copy)]
pub struct ShutLine {
    /// Length, bore, losses and segments.
    pub line: Line,
    /// Oil.
    pub oil: Oil,
    /// Chamber at the end of each segment.
    pub chamber: Chamber,
}

impl ShutLine {
    /// A line of `length` and `bore` (m) in `segments`, without losses at its fittings; all
    /// stiffness is in the wall (`bulk_modulus` in Pa), the oil as given.
    #[must_use]
    pub fn new(oil: Oil, length: f64, bore: f64, bulk_modulus: f64, segments: usize) -> Self {
        let line = Line {
            length,
            bore,
            fitting_loss: 0.0,
            segments,
        };
        let chamber = Chamber::with_wall(line.volume() / segments as f64, bulk_modulus);
        Self { line, oil, chamber }
    }

    /// Number of states.
    #[must_use]
    pub fn size(&self) -> usize {
        2 * self.line.segments
    }

    /// Rates of all states.
    pub fn rates<S: Real>(&self, y: &[S], dy: &mut [S]) {
        let inertance = 1.0 / self.line.segment_inertance(&self.oil);
        let mut ahead = S::constant(0.0);
        for segment in 0..self.line.segments {
            let (flow, behind) = (y[2 * segment], y[2 * segment + 1]);
            let onward = match y.get(2 * segment + 2) {
                Some(&next) => next,
                None => S::constant(0.0),
            };
            let drop = self.line.segment_drop(&self.oil, flow);
            dy[2 * segment] = (ahead - behind - drop) * inertance;
            dy[2 * segment + 1] = self.chamber.pressure_rate(&self.oil, behind, flow - onward);
            ahead = behind;
        }
    }
}
