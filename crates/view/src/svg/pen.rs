//! Texts, lines and areas as SVG elements.

use std::fmt::Write as _;

use super::layout::UNIT_GAP;
use super::xml::{Attribute, Px, Xml};
use crate::colour::Colour;
use crate::style::{Dash, TextSize};
use crate::theme::Wash;

/// Where a text stands against its place.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Anchor {
    Start,
    Middle,
    End,
}

/// How a text looks and where it stands.
#[derive(Debug, Clone, Copy)]
pub(super) struct Text {
    /// Baseline.
    pub(super) at: (f64, f64),
    pub(super) size: TextSize,
    pub(super) colour: Colour,
    pub(super) anchor: Anchor,
    /// Whether its strokes are heavier.
    pub(super) strong: bool,
    /// Colour around the letters, where lines may run behind them.
    pub(super) halo: Option<Colour>,
}

impl Text {
    pub(super) fn new(at: (f64, f64), size: TextSize, colour: Colour) -> Self {
        Self {
            at,
            size,
            colour,
            anchor: Anchor::Start,
            strong: false,
            halo: None,
        }
    }

    pub(super) fn anchored(self, anchor: Anchor) -> Self {
        Self { anchor, ..self }
    }

    pub(super) fn strong(self) -> Self {
        Self {
            strong: true,
            ..self
        }
    }

    pub(super) fn halo(self, colour: Colour) -> Self {
        Self {
            halo: Some(colour),
            ..self
        }
    }

    fn with_attributes(&self, write: impl FnOnce(&[Attribute<'_>])) {
        let (x, y) = (Px(self.at.0), Px(self.at.1));
        let size = Px(self.size.px());
        let mut attributes: Vec<Attribute<'_>> = vec![
            ("x", &x),
            ("y", &y),
            ("font-size", &size),
            ("fill", &self.colour),
        ];
        match self.anchor {
            Anchor::Start => {}
            Anchor::Middle => attributes.push(("text-anchor", &"middle")),
            Anchor::End => attributes.push(("text-anchor", &"end")),
        }
        if self.strong {
            attributes.push(("font-weight", &"600"));
        }
        if let Some(halo) = &self.halo {
            attributes.push(("stroke", halo));
            attributes.push(("stroke-width", &"3.5"));
            attributes.push(("stroke-linejoin", &"round"));
            attributes.push(("paint-order", &"stroke"));
        }
        write(&attributes);
    }
}

/// A stroke.
#[derive(Debug, Clone, Copy)]
pub(super) struct Stroke<'a> {
    pub(super) colour: Colour,
    pub(super) width: f64,
    pub(super) dash: &'a [f64],
}

impl<'a> Stroke<'a> {
    pub(super) fn new(colour: Colour, width: f64) -> Self {
        Self {
            colour,
            width,
            dash: &[],
        }
    }

    pub(super) fn dashed(self, dash: &'a [f64]) -> Self {
        Self { dash, ..self }
    }
}

impl Dash {
    pub(super) fn of(self, stroke: Stroke<'static>) -> Stroke<'static> {
        stroke.dashed(self.pattern())
    }
}

/// Half the height of a capital letter, as a share of the text size: what centres a text on a
/// line.
const HALF_CAPITAL: f64 = 0.36;

/// The baseline that centres a text on `y`.
pub(super) fn centred(y: f64, size: TextSize) -> f64 {
    y + HALF_CAPITAL * size.px()
}

impl Xml {
    /// Writes a text.
    pub(super) fn write(&mut self, text: Text, content: &str) {
        text.with_attributes(|attributes| self.text("text", attributes, content));
    }

    /// Writes a name and behind it, in a quieter tone, its unit.
    pub(super) fn write_with_unit(&mut self, text: Text, name: &str, unit: &str, quiet: Colour) {
        if unit.is_empty() {
            return self.write(text, name);
        }
        let gap = Px(UNIT_GAP);
        let span: &[Attribute<'_>] = &[("dx", &gap), ("fill", &quiet), ("font-weight", &"400")];
        text.with_attributes(|attributes| self.text_in_two("text", attributes, name, (span, unit)));
    }

    /// A straight line.
    pub(super) fn line(&mut self, from: (f64, f64), to: (f64, f64), stroke: Stroke<'_>) {
        let ends = [from.0, from.1, to.0, to.1].map(Px);
        let width = Px(stroke.width);
        let dash = dash_text(stroke.dash);
        let mut attributes: Vec<Attribute<'_>> = vec![
            ("x1", &ends[0]),
            ("y1", &ends[1]),
            ("x2", &ends[2]),
            ("y2", &ends[3]),
            ("stroke", &stroke.colour),
            ("stroke-width", &width),
        ];
        if !dash.is_empty() {
            attributes.push(("stroke-dasharray", &dash));
        }
        self.empty("line", &attributes);
    }

    /// A line through several points, with a name that readers and browsers can show.
    pub(super) fn path(&mut self, outline: &str, stroke: Stroke<'_>, name: &str) {
        let width = Px(stroke.width);
        let dash = dash_text(stroke.dash);
        let mut attributes: Vec<Attribute<'_>> = vec![
            ("d", &outline),
            ("fill", &"none"),
            ("stroke", &stroke.colour),
            ("stroke-width", &width),
            ("stroke-linejoin", &"round"),
        ];
        if !dash.is_empty() {
            attributes.push(("stroke-dasharray", &dash));
        }
        self.open("path", &attributes);
        self.text("title", &[], name);
        self.close();
    }

    /// Several strokes at once that need no name: grid, ticks. Nothing if there are none.
    pub(super) fn rules(&mut self, strokes: &[[(f64, f64); 2]], stroke: Stroke<'_>) {
        if strokes.is_empty() {
            return;
        }
        let lines = strokes.iter();
        let outline: String = lines
            .map(|[from, to]| outline([[from.0, from.1], [to.0, to.1]]))
            .collect();
        let width = Px(stroke.width);
        self.empty(
            "path",
            &[
                ("d", &outline),
                ("stroke", &stroke.colour),
                ("stroke-width", &width),
            ],
        );
    }

    /// A shaded area.
    pub(super) fn area(&mut self, outline: &str, wash: Wash) {
        let opacity = Px(wash.opacity);
        self.empty(
            "path",
            &[
                ("d", &outline),
                ("fill", &wash.colour),
                ("fill-opacity", &opacity),
            ],
        );
    }
}

/// Path data for a line through points.
pub(super) fn outline(points: impl IntoIterator<Item = [f64; 2]>) -> String {
    let mut text = String::new();
    for [x, y] in points {
        let command = if text.is_empty() { 'M' } else { 'L' };
        // Writing into a string cannot fail.
        let _ = write!(text, "{command}{} {}", Px(x), Px(y));
    }
    text
}

/// Path data for a rectangle.
pub(super) fn rectangle((left, right): (f64, f64), (top, bottom): (f64, f64)) -> String {
    let (left, right, top, bottom) = (Px(left), Px(right), Px(top), Px(bottom));
    format!("M{left} {top}H{right}V{bottom}H{left}Z")
}

fn dash_text(dash: &[f64]) -> String {
    let lengths: Vec<_> = dash.iter().map(|&length| Px(length).to_string()).collect();
    lengths.join(" ")
}
