//! Lines laid out once, drawn in each frame until something changes.

use egui::{Pos2, Rect, Shape, Stroke, pos2};
use helmsplit_view::plot::{
    Axis, Frame, Limit, Panel, PlacedMark, PlacedName, Series, ValueRange, placed_marks,
    placed_names,
};
use helmsplit_view::style::{KEPT_WIDTH, Meaning};

use super::arrangement::Arrangement;
use super::curves::Curves;
use super::dash::dashed;
use super::gutter::ROW;
use super::kept_lines::{Tag, tags};
use super::paper::Paper;
use super::reading::value_at;
use super::{GAP, Shown};
use crate::evidence_marks::EvidenceMarks;
use crate::look::{egui_colour, egui_wash};

/// Between ticks, points.
const VALUE_SPACING: f64 = 26.0;
const TIME_SPACING: f64 = 84.0;

/// Opacity of lines that are out of date.
const PALE: f32 = 0.35;

/// Width of a text, points.
pub(super) type Measure<'a> = &'a dyn Fn(&str) -> f64;

/// What a layout depends on.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Key {
    pub(super) generation: u64,
    pub(super) kept: u64,
    pub(super) plot: Rect,
    /// Top of the first panel.
    pub(super) top: f32,
    pub(super) mark_rows: usize,
    pub(super) range: (f64, f64),
    pub(super) whole: (f64, f64),
    pub(super) pale: bool,
    pub(super) dark: bool,
    pub(super) follow: bool,
    pub(super) arrangement: Arrangement,
    /// Heights of the panels that are shown, and what their names need of them.
    pub(super) heights: Vec<Height>,
    pub(super) evidence: Option<EvidenceMarks>,
}

/// The height of a panel, points.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Height {
    pub(super) whole: f32,
    /// What the names of its lines need.
    pub(super) names: f32,
}

/// All panels, laid out.
pub(super) struct Drawn {
    pub(super) key: Key,
    pub(super) time: Axis,
    pub(super) marks: Vec<PlacedMark>,
    pub(super) panels: Vec<DrawnPanel>,
}

/// One panel, laid out.
pub(super) struct DrawnPanel {
    /// Place in the figure.
    pub(super) place: usize,
    pub(super) rect: Rect,
    /// `None` if it has no values.
    pub(super) axis: Option<Axis>,
    pub(super) shapes: Vec<Shape>,
    /// Its limits, and whether each belongs to the evidence.
    pub(super) limits: Vec<(Limit, bool)>,
    /// Where the names of the limits stand; none for those out of view and those named aside.
    pub(super) names: Vec<Option<PlacedName>>,
    /// Limits that are named beside the panel, because lines would run through their names.
    pub(super) aside: Vec<usize>,
    /// Numbers on the lines of kept runs.
    pub(super) tags: Vec<Tag>,
}

/// A line on its way to paper.
pub(super) struct Line<'a> {
    /// Position in the panel.
    pub(super) position: usize,
    pub(super) series: &'a Series,
    /// The place of its kept run; `None` for a line of the run itself.
    pub(super) kept: Option<usize>,
    /// All values, least and largest.
    extent: Option<(f64, f64)>,
    /// What is in view, thinned to the pixels.
    pub(super) thinned: Vec<[f64; 2]>,
}

impl Line<'_> {
    /// The value at a time among the points that are drawn.
    pub(super) fn value_at(&self, time: f64) -> Option<f64> {
        value_at(&self.thinned, time)
    }
}

impl Drawn {
    pub(super) fn new(shown: &Shown<'_>, curves: &Curves, key: Key, measure: Measure<'_>) -> Self {
        let plot = key.plot;
        let ends = (f64::from(plot.left()), f64::from(plot.right()));
        let time = Axis::new(key.range, ends, TIME_SPACING);
        let marks = placed_marks(&shown.figure.marks, &time, key.mark_rows, measure);
        let mut top = key.top;
        let mut panels = Vec::new();
        let places = key.arrangement.shown(shown.figure).into_iter();
        for (place, height) in places.zip(&key.heights) {
            let foot = top + height.whole;
            let rect = Rect::from_min_max(pos2(plot.left(), top), pos2(plot.right(), foot));
            top = foot + GAP;
            let maker = Maker {
                shown,
                key: &key,
                time: &time,
                marks: &marks,
                measure,
            };
            panels.push(maker.panel(curves, place, rect, height.names));
        }
        Self {
            key,
            time,
            marks,
            panels,
        }
    }
}

/// Makes panels.
struct Maker<'a> {
    shown: &'a Shown<'a>,
    key: &'a Key,
    time: &'a Axis,
    marks: &'a [PlacedMark],
    measure: Measure<'a>,
}

impl Maker<'_> {
    fn panel(&self, curves: &Curves, place: usize, rect: Rect, names: f32) -> DrawnPanel {
        let panel = &self.shown.figure.panels[place];
        let columns = rect.width().round().max(1.0) as usize;
        let lines = self.lines(curves, place, columns);
        let limits = self.limits(panel);
        let Some(range) = self.range(panel, &lines, &limits, rect) else {
            return DrawnPanel {
                place,
                rect,
                axis: None,
                shapes: Vec::new(),
                limits: Vec::new(),
                names: Vec::new(),
                aside: Vec::new(),
                tags: Vec::new(),
            };
        };
        let ends = (f64::from(rect.bottom()), f64::from(rect.top()));
        let axis = Axis::new(range, ends, VALUE_SPACING);
        let paper = Paper {
            time: self.time,
            values: &axis,
        };
        let mut shapes = Vec::new();
        for shade in &panel.shades {
            let colour = egui_wash(self.shown.look.theme.wash(shade.fill));
            shapes.push(paper.area(shade, colour.gamma_multiply(self.opacity())));
        }
        let runs: Vec<Vec<Vec<Pos2>>> = lines.iter().map(|line| paper.runs(line)).collect();
        // The most important line comes last, on top; kept runs lie behind.
        let drawn = lines.iter().zip(&runs).rev();
        let (behind, before): (Vec<_>, Vec<_>) = drawn.partition(|(line, _)| line.kept.is_some());
        for (line, runs) in behind.into_iter().chain(before) {
            let (stroke, pattern) = self.stroke(line);
            for run in runs {
                shapes.extend(dashed(run, pattern, stroke));
            }
        }
        let free_rows = ((rect.height() - names) / ROW).floor().max(0.0) as usize;
        let mut names = self.limit_names(&limits, &axis, rect, &runs);
        let aside = named_aside(&limits, &mut names, free_rows);
        let tags = tags(&lines, self.time, &axis);
        DrawnPanel {
            place,
            rect,
            axis: Some(axis),
            shapes,
            limits,
            names,
            aside,
            tags,
        }
    }

    /// The lines of a panel that are shown, and those of kept runs behind them.
    fn lines<'b>(&'b self, curves: &Curves, place: usize, columns: usize) -> Vec<Line<'b>> {
        let panel = &self.shown.figure.panels[place];
        let (from, to) = (self.time.low, self.time.high);
        let mut lines = Vec::new();
        for position in self.key.arrangement.lines(panel) {
            let series = &panel.series[position];
            if let Some(curve) = curves.get(place, position) {
                lines.push(Line {
                    position,
                    series,
                    kept: None,
                    extent: curve.extent(),
                    thinned: curve.thinned(&series.points, from, to, columns),
                });
            }
            for run in self.shown.kept.runs().iter().filter(|run| run.is_shown()) {
                let Some((kept, curve)) = run.counterpart(panel, series) else {
                    continue;
                };
                lines.push(Line {
                    position,
                    series,
                    kept: Some(run.place()),
                    extent: curve.extent(),
                    thinned: curve.thinned(&kept.points, from, to, columns),
                });
            }
        }
        lines
    }

    fn limits(&self, panel: &Panel) -> Vec<(Limit, bool)> {
        let own = panel.limits.iter().map(|limit| (limit.clone(), false));
        let evidence = self.key.evidence.iter().filter(|e| e.panel == panel.label);
        let theirs = evidence.flat_map(|e| e.limits.iter().map(|limit| (limit.clone(), true)));
        own.chain(theirs).collect()
    }

    /// The values to show: those of the whole run, or of what is in view if axes follow.
    fn range(
        &self,
        panel: &Panel,
        lines: &[Line<'_>],
        limits: &[(Limit, bool)],
        rect: Rect,
    ) -> Option<(f64, f64)> {
        let zoomed = self.key.follow && self.key.range != self.key.whole;
        let ends = |(low, high): (f64, f64)| vec![[0.0, low], [0.0, high]];
        let points = |line: &Line<'_>| match (zoomed, line.extent) {
            (true, _) => line.thinned.clone(),
            (false, extent) => extent.map(ends).unwrap_or_default(),
        };
        let seen = Panel {
            series: lines
                .iter()
                .map(|line| Series::new("", Meaning::Inlet, points(line)))
                .collect(),
            limits: limits.iter().map(|(limit, _)| limit.clone()).collect(),
            range: if lines.is_empty() {
                ValueRange::Data
            } else {
                panel.range
            },
            ..Panel::new("", "")
        };
        seen.value_range_on(f64::from(rect.height()), VALUE_SPACING)
    }

    fn opacity(&self) -> f32 {
        if self.key.pale { PALE } else { 1.0 }
    }

    fn stroke(&self, line: &Line<'_>) -> (Stroke, &'static [f64]) {
        let theme = &self.shown.look.theme;
        let width = theme.strokes.series as f32;
        let series = line.series;
        match line.kept {
            None => {
                let colour = egui_colour(theme.series_colour(series.meaning));
                let colour = colour.gamma_multiply(self.opacity());
                (Stroke::new(width, colour), series.dash.pattern())
            }
            // A kept run is never out of date.
            Some(place) => {
                let colour = self.shown.look.kept(series.meaning);
                let pattern = helmsplit_view::style::kept_pattern(place);
                (Stroke::new(width * KEPT_WIDTH as f32, colour), pattern)
            }
        }
    }

    /// Names of limits stand where they cross the fewest lines.
    fn limit_names(
        &self,
        limits: &[(Limit, bool)],
        axis: &Axis,
        rect: Rect,
        runs: &[Vec<Vec<Pos2>>],
    ) -> Vec<Option<PlacedName>> {
        let plain: Vec<Limit> = limits.iter().map(|(limit, _)| limit.clone()).collect();
        let widths: Vec<f64> = plain
            .iter()
            .map(|limit| (self.measure)(&limit.label))
            .collect();
        let (top, bottom) = (f64::from(rect.top()), f64::from(rect.bottom()));
        let point = |at: &Pos2| [f64::from(at.x), f64::from(at.y)];
        let data = runs.iter().flatten();
        let data = data.map(|run| run.iter().map(point).collect::<Vec<_>>());
        let named = self.marks.iter().filter(|mark| mark.row.is_some());
        let upright = named.map(|mark| vec![[mark.x, top], [mark.x, bottom]]);
        let crossed: Vec<_> = data.chain(upright).collect();
        let plot = Frame {
            left: f64::from(rect.left()),
            right: f64::from(rect.right()),
            top,
            bottom,
        };
        placed_names(&plain, &widths, axis, plot, &crossed)
    }
}

/// Takes the names that lines run through off the panel, as far as there is room beside it. What
/// the evidence points at stays where it is.
fn named_aside(
    limits: &[(Limit, bool)],
    names: &mut [Option<PlacedName>],
    free_rows: usize,
) -> Vec<usize> {
    let mut aside = Vec::new();
    for (index, name) in names.iter_mut().enumerate() {
        let crossed = name.is_some_and(|name| name.crossings > 0);
        if crossed && !limits[index].1 && aside.len() < free_rows {
            aside.push(index);
            *name = None;
        }
    }
    aside
}
