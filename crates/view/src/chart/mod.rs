//! Charts as data: any quantity over any other, with fields of colour, lines, points and bars.
//!
//! A [`crate::plot::Figure`] shows traces over one time axis; a [`Chart`] shows maps, paths of
//! modes, frequency responses and balances. It too holds numbers in the units that it shows, and
//! no colour and no pixel. [`crate::svg_from_chart`] writes it.

mod scale;

use serde::{Deserialize, Serialize};

use crate::style::{Dash, Meaning};

pub use scale::{PlacedScale, ScaleKind};

/// Panels below each other, each with axes of its own.
#[derive(Debug, Clone, PartialEq, Default, Serialize, Deserialize)]
pub struct Chart {
    /// What it shows.
    pub title: String,
    /// What must be known to read it, in one line; may be empty.
    pub subtitle: String,
    /// Panels from top to bottom.
    pub panels: Vec<ChartPanel>,
    /// Lines of small text below.
    pub notes: Vec<String>,
}

/// One panel.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct ChartPanel {
    /// The axis to the right.
    pub x: ChartAxis,
    /// The axis upwards; with [`Self::bars`] it is not used.
    pub y: ChartAxis,
    /// Height of the plot, px.
    pub height: f64,
    /// Colours over the whole panel.
    pub field: Option<Field>,
    /// Ranges of x that mean something.
    pub bands: Vec<ChartBand>,
    /// Lines, later ones on top.
    pub lines: Vec<ChartLine>,
    /// Points, on top of lines.
    pub points: Vec<ChartPoint>,
    /// Bars from 0 along x, from top to bottom.
    pub bars: Vec<ChartBar>,
}

/// An axis.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct ChartAxis {
    /// What it shows.
    pub label: String,
    /// Its unit; empty for plain numbers.
    pub unit: String,
    /// How values are spread.
    pub kind: ScaleKind,
    /// First and last value; `None` for those of the data, with a little room.
    pub range: Option<(f64, f64)>,
}

/// Colours over a grid of values.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct Field {
    /// What the colour shows.
    pub label: String,
    /// Its unit.
    pub unit: String,
    /// Grid lines along x, growing.
    pub xs: Vec<f64>,
    /// Grid lines along y, growing.
    pub ys: Vec<f64>,
    /// Values, row by row from the lowest y; one that is not finite leaves a gap.
    pub values: Vec<f64>,
    /// Values at the ends of the colour ramp.
    pub range: (f64, f64),
}

/// What a line of a chart is.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
pub enum LineRole {
    /// Data of a meaning.
    Data(Meaning, Dash),
    /// A line of equal value; its label stands on it.
    Contour,
    /// A border that nobody should cross; its label stands on it.
    Border,
    /// A limit or a help to read; its label stands at its end.
    Guide,
}

/// A line.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct ChartLine {
    /// What it is; may be empty.
    pub label: String,
    /// What it stands for.
    pub role: LineRole,
    /// Points of x and y; one that is not finite leaves a gap.
    pub points: Vec<[f64; 2]>,
}

/// A point.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct ChartPoint {
    /// What it is; may be empty.
    pub label: String,
    /// What it stands for.
    pub meaning: Meaning,
    /// Its place.
    pub at: [f64; 2],
    /// Whether it is drawn full; otherwise as a ring.
    pub full: bool,
}

/// A range of x.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct ChartBand {
    /// What it is.
    pub label: String,
    /// Its ends.
    pub range: (f64, f64),
}

/// A bar from 0 to a value along x.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct ChartBar {
    /// What it is.
    pub label: String,
    /// What it stands for.
    pub meaning: Meaning,
    /// How far it reaches.
    pub value: f64,
    /// The value as text, behind the bar.
    pub text: String,
    /// Drawn as an outline on both sides of 0: what could be, either way.
    pub either_way: bool,
}

impl ChartAxis {
    /// A linear axis over its data.
    #[must_use]
    pub fn linear(label: impl Into<String>, unit: impl Into<String>) -> Self {
        Self {
            label: label.into(),
            unit: unit.into(),
            kind: ScaleKind::Linear,
            range: None,
        }
    }

    /// A logarithmic axis over its data.
    #[must_use]
    pub fn logarithmic(label: impl Into<String>, unit: impl Into<String>) -> Self {
        Self {
            kind: ScaleKind::Logarithmic,
            ..Self::linear(label, unit)
        }
    }

    /// The same from one value to another.
    #[must_use]
    pub fn from_to(self, from: f64, to: f64) -> Self {
        Self {
            range: Some((from, to)),
            ..self
        }
    }
}

/// Which coordinate.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Along {
    X,
    Y,
}

impl ChartPanel {
    /// An empty panel.
    #[must_use]
    pub fn new(x: ChartAxis, y: ChartAxis, height: f64) -> Self {
        Self {
            x,
            y,
            height,
            field: None,
            bands: Vec::new(),
            lines: Vec::new(),
            points: Vec::new(),
            bars: Vec::new(),
        }
    }

    /// The values that the x axis spans; `None` if there is nothing to show.
    #[must_use]
    pub fn x_range(&self) -> Option<(f64, f64)> {
        self.range(Along::X)
    }

    /// The values that the y axis spans; `None` if there is nothing to show.
    #[must_use]
    pub fn y_range(&self) -> Option<(f64, f64)> {
        self.range(Along::Y)
    }

    fn range(&self, along: Along) -> Option<(f64, f64)> {
        let (axis, at) = match along {
            Along::X => (&self.x, 0),
            Along::Y => (&self.y, 1),
        };
        if let Some((from, to)) = axis.range {
            let positive = axis.kind == ScaleKind::Linear || from > 0.0;
            return (from < to && (to - from).is_finite() && positive).then_some((from, to));
        }
        let lines = self.lines.iter().flat_map(|line| &line.points);
        let points = self.points.iter().map(|point| &point.at);
        let mut values: Vec<f64> = lines.chain(points).map(|point| point[at]).collect();
        if let Some(field) = &self.field {
            let grid = match along {
                Along::X => &field.xs,
                Along::Y => &field.ys,
            };
            values.extend(grid);
        }
        if along == Along::X && !self.bars.is_empty() {
            values.push(0.0);
            for bar in &self.bars {
                values.push(bar.value);
                if bar.either_way {
                    values.push(-bar.value);
                }
            }
        }
        scale::range_of(&values, axis.kind, self.field.is_some())
    }
}
