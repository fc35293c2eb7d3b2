//! Draws one part.

use kurbo::{BezPath, Point, Rect, Shape, Vec2};

use super::{Anchor, Line, Paint, Part, Prim, Stroke, Tone};
use crate::style::TextSize;

/// Tolerance of curves made of other shapes, px.
const CURVE: f64 = 0.05;

/// Distance between the baselines of two lines of a label, px.
pub(crate) const LINE_SPACING: f64 = 14.0;

/// A part in the making.
#[derive(Debug)]
pub(crate) struct PartPen {
    part: Part,
}

/// A path through points.
pub(crate) fn polyline(points: &[(f64, f64)]) -> BezPath {
    let mut path = BezPath::new();
    for (index, &point) in points.iter().enumerate() {
        if index == 0 {
            path.move_to(point);
        } else {
            path.line_to(point);
        }
    }
    path
}

/// A closed path through points.
pub(crate) fn polygon(points: &[(f64, f64)]) -> BezPath {
    let mut path = polyline(points);
    path.close_path();
    path
}

impl PartPen {
    pub(crate) fn new(id: &str, label: &str) -> Self {
        Self {
            part: Part::new(id, label),
        }
    }

    pub(crate) fn done(self) -> Part {
        self.part
    }

    pub(crate) fn push(&mut self, prim: Prim) {
        self.part.push(prim);
    }

    /// A line through points.
    pub(crate) fn line(&mut self, points: &[(f64, f64)], stroke: Stroke) {
        self.path(polyline(points), Some(stroke), None);
    }

    /// A line of a symbol through points.
    pub(crate) fn symbol(&mut self, points: &[(f64, f64)]) {
        self.line(points, Stroke::plain(Line::Symbol));
    }

    /// Any path.
    pub(crate) fn path(&mut self, outline: BezPath, stroke: Option<Stroke>, fill: Option<Paint>) {
        self.push(Prim::Path {
            outline,
            stroke,
            fill,
        });
    }

    /// A filled polygon, with an outline if `line` says how.
    pub(crate) fn area(&mut self, points: &[(f64, f64)], fill: Paint, line: Option<Line>) {
        self.path(polygon(points), line.map(Stroke::plain), Some(fill));
    }

    /// A rectangle of a symbol: outlined, and filled with the ground.
    pub(crate) fn frame(&mut self, frame: Rect) {
        let outline = frame.to_path(CURVE);
        self.path(
            outline,
            Some(Stroke::plain(Line::Symbol)),
            Some(Paint::Ground),
        );
    }

    /// A filled rectangle without an outline.
    pub(crate) fn block(&mut self, frame: Rect, fill: Paint) {
        self.path(frame.to_path(CURVE), None, Some(fill));
    }

    /// A circle of a symbol: outlined, and filled with the ground.
    pub(crate) fn circle(&mut self, centre: (f64, f64), radius: f64) {
        self.push(Prim::Circle {
            centre: centre.into(),
            radius,
            stroke: Some(Stroke::plain(Line::Symbol)),
            fill: Some(Paint::Ground),
        });
    }

    /// A dot where lines join.
    pub(crate) fn junction(&mut self, centre: (f64, f64)) {
        self.push(Prim::Circle {
            centre: centre.into(),
            radius: 3.2,
            stroke: None,
            fill: Some(Paint::Ink),
        });
    }

    /// An arrow head in ink.
    pub(crate) fn head(&mut self, tip: (f64, f64), direction: Vec2, length: f64) {
        self.push(Prim::Arrow {
            tip: tip.into(),
            direction,
            length,
            paint: Paint::Ink,
            pace: 0.0,
        });
    }

    /// A line of a symbol that ends in an arrow head.
    pub(crate) fn arrow(&mut self, from: (f64, f64), to: (f64, f64)) {
        let (start, end) = (Point::from(from), Point::from(to));
        let direction = (end - start).normalize();
        // The line ends inside the head, so that the tip stays sharp.
        let foot = end - direction * 4.0;
        self.symbol(&[from, (foot.x, foot.y)]);
        self.head(to, direction, 7.0);
    }

    /// A text.
    pub(crate) fn text(
        &mut self,
        at: (f64, f64),
        content: impl Into<String>,
        (size, tone): (TextSize, Tone),
        anchor: Anchor,
    ) {
        let content = content.into();
        if content.is_empty() {
            return;
        }
        self.push(Prim::Text {
            at: at.into(),
            content,
            size,
            tone,
            anchor,
        });
    }

    /// The part's name, and under it a quieter line.
    pub(crate) fn label(&mut self, at: (f64, f64), detail: &str, anchor: Anchor) {
        let name = self.part.label.clone();
        self.text(at, name, (TextSize::Label, Tone::Ink), anchor);
        let below = (at.0, at.1 + LINE_SPACING);
        self.text(below, detail, (TextSize::Small, Tone::Quiet), anchor);
    }
}
