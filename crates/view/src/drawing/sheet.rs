//! From millimetres to the sheet, and what every part of the section needs to know.

use crate::moment::Moment;
use crate::ramp::PressureScale;
use crate::scene::{Paint, PartPen};

use super::hatch::hatched;
use super::proportions::{Proportions, Span};
use crate::scene::{Line, Stroke};

/// Thickness of the end walls as a share of the spool diameter.
const END_WALL: f64 = 0.3;

/// Thickness of the wall outside the cores as a share of the spool diameter.
const OUTER_WALL: f64 = 0.22;

/// Distance of hatch lines, px.
const HOUSING_HATCH: f64 = 9.0;
const STEEL_HATCH: f64 = 6.0;

/// One section on one sheet.
pub(super) struct Sheet<'a> {
    pub(super) shape: Proportions,
    /// Travel, mm.
    pub(super) travel: f64,
    pub(super) moment: Option<&'a Moment>,
    pub(super) scale: PressureScale,
    /// Length of the housing on the sheet, px.
    pub(super) length: f64,
    /// Sheet length of a millimetre, px.
    pub(super) px_per_mm: f64,
    /// Left edge of the housing, mm.
    pub(super) left: f64,
    /// Right edge of the housing, mm.
    pub(super) right: f64,
    /// Half its height, mm.
    pub(super) half_height: f64,
}

impl<'a> Sheet<'a> {
    pub(super) fn new(
        shape: Proportions,
        travel: f64,
        moment: Option<&'a Moment>,
        (scale, length): (PressureScale, f64),
    ) -> Self {
        let wall = 2.0 * END_WALL * shape.radius;
        let (left, right) = (shape.head_end - wall, shape.spring_end + wall);
        Self {
            shape,
            travel,
            moment,
            scale,
            length,
            px_per_mm: length / (right - left),
            left,
            right,
            half_height: shape.core_radius + 2.0 * OUTER_WALL * shape.radius,
        }
    }

    /// A place of the housing on the sheet; `x` from the stop of the head end, `y` up from the
    /// axis, mm.
    pub(super) fn at(&self, x: f64, y: f64) -> (f64, f64) {
        (
            (x - self.left) * self.px_per_mm,
            (self.half_height - y) * self.px_per_mm,
        )
    }

    /// A place of the spool on the sheet.
    pub(super) fn spool_at(&self, x: f64, y: f64) -> (f64, f64) {
        self.at(x + self.travel, y)
    }

    /// The oil under the pressure of that name.
    pub(super) fn oil(&self, pressure: &str) -> Paint {
        let pressure = self.moment.and_then(|moment| moment.state(pressure));
        Paint::Oil(pressure.map(|pressure| self.scale.share(pressure)))
    }

    /// A rectangle between two heights, mm.
    pub(super) fn fill(&self, pen: &mut PartPen, span: Span, heights: Span, paint: Paint) {
        let corners = [
            self.at(span.0, heights.0),
            self.at(span.1, heights.0),
            self.at(span.1, heights.1),
            self.at(span.0, heights.1),
        ];
        pen.area(&corners, paint, None);
    }

    /// A rectangle of the spool between two heights, mm.
    pub(super) fn fill_spool(&self, pen: &mut PartPen, span: Span, heights: Span, paint: Paint) {
        let moved = (span.0 + self.travel, span.1 + self.travel);
        self.fill(pen, moved, heights, paint);
    }

    /// An edge through places of the housing, mm.
    pub(super) fn edge(&self, pen: &mut PartPen, points: &[(f64, f64)]) {
        let points: Vec<_> = points.iter().map(|&(x, y)| self.at(x, y)).collect();
        pen.symbol(&points);
    }

    /// An edge through places of the spool, mm.
    pub(super) fn spool_edge(&self, pen: &mut PartPen, points: &[(f64, f64)]) {
        let points: Vec<_> = points.iter().map(|&(x, y)| self.spool_at(x, y)).collect();
        pen.symbol(&points);
    }

    /// A cut face of the housing.
    pub(super) fn housing(&self, pen: &mut PartPen, corners: &[(f64, f64)]) {
        let corners: Vec<_> = corners.iter().map(|&(x, y)| self.at(x, y)).collect();
        pen.area(&corners, Paint::Housing, None);
        let lines = hatched(&corners, HOUSING_HATCH, true);
        pen.path(lines, Some(Stroke::plain(Line::Hatch)), None);
    }

    /// A cut face of the spool, with its outline.
    pub(super) fn steel(&self, pen: &mut PartPen, corners: &[(f64, f64)]) {
        let corners: Vec<_> = corners.iter().map(|&(x, y)| self.spool_at(x, y)).collect();
        pen.area(&corners, Paint::Steel, None);
        let lines = hatched(&corners, STEEL_HATCH, false);
        pen.path(lines, Some(Stroke::plain(Line::Hatch)), None);
        let outline = crate::scene::polygon(&corners);
        pen.path(outline, Some(Stroke::plain(Line::Symbol)), None);
    }
}
