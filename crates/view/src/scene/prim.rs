//! What parts are made of, by meaning.

use kurbo::{BezPath, Point, Rect, Shape, Vec2};

use crate::style::TextSize;
use crate::svg::label_width;

/// A primitive.
#[derive(Debug, Clone, PartialEq)]
pub enum Prim {
    /// A line, an outline or an area.
    Path {
        /// Where it runs.
        outline: BezPath,
        /// How it is drawn, if at all.
        stroke: Option<Stroke>,
        /// How it is filled, if at all; the outline is then one simple polygon.
        fill: Option<Paint>,
    },
    /// A circle.
    Circle {
        /// Centre.
        centre: Point,
        /// Radius, px.
        radius: f64,
        /// How it is drawn, if at all.
        stroke: Option<Stroke>,
        /// How it is filled, if at all.
        fill: Option<Paint>,
    },
    /// A line of text.
    Text {
        /// Start, middle or end of the baseline.
        at: Point,
        /// The text.
        content: String,
        /// Its size.
        size: TextSize,
        /// Its tone.
        tone: Tone,
        /// Which end of the text stands at `at`.
        anchor: Anchor,
    },
    /// A filled arrow head.
    Arrow {
        /// Its tip.
        tip: Point,
        /// Where it points; length 1.
        direction: Vec2,
        /// From tip to base, px.
        length: f64,
        /// Its filling; it has a thin outline in ink.
        paint: Paint,
        /// How fast what it shows moves, as a share of a large flow (0 to 1); 0 for arrows that
        /// belong to a symbol.
        pace: f64,
    },
}

/// A line by its meaning.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Stroke {
    /// What kind of line.
    pub line: Line,
    /// Share of the pressure scale (0 to 1) of the oil inside, if it is shaded.
    pub oil: Option<f64>,
}

impl Stroke {
    /// A line that is not shaded by pressure.
    #[must_use]
    pub fn plain(line: Line) -> Self {
        Self { line, oil: None }
    }
}

/// Kinds of lines. Those of circuits are those of ISO 1219-1.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Line {
    /// Working line: supply, return. Continuous.
    Working,
    /// Pilot and drain line. Dashed.
    Pilot,
    /// Frame around several symbols that are one body. Long dash and dot.
    Envelope,
    /// Outline and inside of a symbol; edges of bodies.
    Symbol,
    /// Springs.
    Spring,
    /// Hatching of a cut face.
    Hatch,
    /// Centre lines. Fine long dash and dot.
    Centre,
    /// Edges behind the section plane. Fine dashes.
    Hidden,
    /// Leaders, scales, dimensions.
    Fine,
    /// What is pointed out: the mark of the present travel.
    Accent,
}

impl Line {
    /// Lengths of line and gap in turn, px; empty for a continuous line.
    #[must_use]
    pub fn dash(self) -> &'static [f64] {
        match self {
            Self::Pilot => &[5.0, 3.0],
            Self::Envelope => &[14.0, 3.0, 1.5, 3.0],
            Self::Centre => &[12.0, 3.0, 2.0, 3.0],
            Self::Hidden => &[3.0, 2.0],
            _ => &[],
        }
    }
}

/// Fillings by meaning.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Paint {
    /// The colour behind everything.
    Ground,
    /// The colour of texts and outlines.
    Ink,
    /// Oil at a share of the pressure scale (0 to 1); `None` where no pressure is known.
    Oil(Option<f64>),
    /// Steel that moves: spool, disc.
    Steel,
    /// Cut face of the housing.
    Housing,
    /// A range on a scale.
    Band,
    /// What is pointed out.
    Accent,
}

/// Tones of text.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Tone {
    /// Names and values.
    Ink,
    /// Sizes, notes.
    Quiet,
}

/// Which end of a text stands at its place.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Anchor {
    /// Its start.
    Start,
    /// Its middle.
    Middle,
    /// Its end.
    End,
}

/// From the baseline up to the top of tall letters, as a share of the text size.
const ASCENT: f64 = 0.76;

/// From the baseline down to the foot of letters that descend, as a share of the text size.
const DESCENT: f64 = 0.22;

/// Half the width of an arrow head as a share of its length.
pub(crate) const ARROW_HALF_WIDTH: f64 = 0.42;

impl Prim {
    /// A frame that holds it; for texts, from widths that fit every face of the type family.
    #[must_use]
    pub fn bounds(&self) -> Rect {
        match self {
            Self::Path { outline, .. } => outline.bounding_box(),
            Self::Circle { centre, radius, .. } => {
                Rect::from_center_size(*centre, (2.0 * radius, 2.0 * radius))
            }
            Self::Text {
                at,
                content,
                size,
                anchor,
                ..
            } => {
                let width = label_width(content, *size);
                let left = match anchor {
                    Anchor::Start => at.x,
                    Anchor::Middle => at.x - 0.5 * width,
                    Anchor::End => at.x - width,
                };
                let (top, foot) = (at.y - ASCENT * size.px(), at.y + DESCENT * size.px());
                Rect::new(left, top, left + width, foot)
            }
            Self::Arrow { .. } => self
                .arrow_corners()
                .map_or(Rect::ZERO, |[tip, left, right]| {
                    Rect::from_points(tip, left).union_pt(right)
                }),
        }
    }

    /// The corners of an arrow: tip, then the two of its base. `None` for anything else.
    #[must_use]
    pub fn arrow_corners(&self) -> Option<[Point; 3]> {
        let Self::Arrow {
            tip,
            direction,
            length,
            ..
        } = self
        else {
            return None;
        };
        let base = *tip - *direction * *length;
        let side = Vec2::new(-direction.y, direction.x) * (ARROW_HALF_WIDTH * length);
        Some([*tip, base + side, base - side])
    }

    /// The line it is drawn with, if it is drawn.
    #[must_use]
    pub fn stroke(&self) -> Option<Stroke> {
        match self {
            Self::Path { stroke, .. } | Self::Circle { stroke, .. } => *stroke,
            Self::Text { .. } | Self::Arrow { .. } => None,
        }
    }
}
