//! A symbol's own axes on the sheet.

use kurbo::Vec2;

/// Where a symbol stands and which way its oil runs. Symbols are drawn once, along their flow, and
/// stand in four directions.
#[derive(Debug, Clone, Copy)]
pub(super) struct Frame {
    /// Centre on the sheet.
    pub(super) centre: (f64, f64),
    /// Direction of flow, length 1.
    pub(super) flow: Vec2,
    /// Across the flow, towards the spring where there is one, length 1.
    pub(super) side: Vec2,
}

/// To the right on the sheet.
pub(super) const RIGHT: Vec2 = Vec2::new(1.0, 0.0);
/// To the left on the sheet.
pub(super) const LEFT: Vec2 = Vec2::new(-1.0, 0.0);
/// Up on the sheet.
pub(super) const UP: Vec2 = Vec2::new(0.0, -1.0);
/// Down on the sheet.
pub(super) const DOWN: Vec2 = Vec2::new(0.0, 1.0);

impl Frame {
    pub(super) fn new(centre: (f64, f64), flow: Vec2, side: Vec2) -> Self {
        Self { centre, flow, side }
    }

    /// The point so far along the flow and so far to the side.
    pub(super) fn at(&self, along: f64, across: f64) -> (f64, f64) {
        let shift = self.flow * along + self.side * across;
        (self.centre.0 + shift.x, self.centre.1 + shift.y)
    }

    /// The points, each so far along the flow and so far to the side.
    pub(super) fn all<const N: usize>(&self, points: [(f64, f64); N]) -> [(f64, f64); N] {
        points.map(|(along, across)| self.at(along, across))
    }

    /// The same axes about another point of this frame.
    pub(super) fn moved(&self, along: f64, across: f64) -> Self {
        Self {
            centre: self.at(along, across),
            ..*self
        }
    }
}
