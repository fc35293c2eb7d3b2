//! Lines laid out once, drawn in each frame until something changes.

use egui::{Color32, Mesh, Pos2, Rect, Shape, Stroke, pos2};
use helmsplit_view::plot::{Axis, Panel, Series, Shade, decimate};

use super::dash::dashed;
use super::{GAP, Shown, TOP};
use crate::look::{egui_colour, egui_wash};

/// Between ticks, points.
const VALUE_SPACING: f64 = 26.0;
const TIME_SPACING: f64 = 84.0;

/// Opacity of lines that are out of date.
const PALE: f32 = 0.35;

/// What a layout depends on.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Key {
    pub(super) generation: u64,
    pub(super) plot: Rect,
    pub(super) range: (f64, f64),
    pub(super) pale: bool,
    pub(super) dark: bool,
    pub(super) follow: bool,
    pub(super) panels: Vec<usize>,
}

/// All panels, laid out.
pub(super) struct Drawn {
    pub(super) key: Key,
    pub(super) time: Axis,
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
}

impl Drawn {
    pub(super) fn new(shown: &Shown<'_>, key: Key, heights: &[f32], whole: (f64, f64)) -> Self {
        let plot = key.plot;
        let ends = (f64::from(plot.left()), f64::from(plot.right()));
        let time = Axis::new(key.range, ends, TIME_SPACING);
        let mut top = plot.top() + TOP;
        let mut panels = Vec::new();
        for (&place, &height) in key.panels.iter().zip(heights) {
            let rect = Rect::from_min_max(pos2(plot.left(), top), pos2(plot.right(), top + height));
            top += height + GAP;
            let zoomed = key.follow && key.range != whole;
            panels.push(layout(shown, place, rect, &time, zoomed, key.pale));
        }
        Self { key, time, panels }
    }
}

fn layout(
    shown: &Shown<'_>,
    place: usize,
    rect: Rect,
    time: &Axis,
    zoomed: bool,
    pale: bool,
) -> DrawnPanel {
    let panel = &shown.figure.panels[place];
    let columns = rect.width().round().max(1.0) as usize;
    // What is in view, thinned to the pixels.
    let thinned = panel.series.iter().map(|series| Series {
        label: series.label.clone(),
        points: decimate(&series.points, time.low, time.high, columns),
        ..*series
    });
    let seen = Panel {
        series: thinned.collect(),
        limits: panel.limits.clone(),
        range: panel.range,
        ..Panel::new("", "")
    };
    let source = if zoomed { &seen } else { panel };
    let range = source.value_range_on(f64::from(rect.height()), VALUE_SPACING);
    let Some(range) = range else {
        return DrawnPanel {
            place,
            rect,
            axis: None,
            shapes: Vec::new(),
        };
    };
    let ends = (f64::from(rect.bottom()), f64::from(rect.top()));
    let axis = Axis::new(range, ends, VALUE_SPACING);
    let theme = &shown.look.theme;
    let fade = |colour: Color32| {
        if pale {
            colour.gamma_multiply(PALE)
        } else {
            colour
        }
    };
    let mut shapes = Vec::new();
    for shade in &panel.shades {
        let colour = fade(egui_wash(theme.wash(shade.fill)));
        shapes.push(area(shade, time, &axis, colour));
    }
    for series in seen.series.iter().rev() {
        let colour = fade(egui_colour(theme.series_colour(series.meaning)));
        let stroke = Stroke::new(theme.strokes.series as f32, colour);
        for piece in series.points.split(|point| !point[1].is_finite()) {
            let points: Vec<Pos2> = piece
                .iter()
                .map(|&point| on_paper(point, time, &axis))
                .collect();
            shapes.extend(dashed(&points, series.dash.pattern(), stroke));
        }
    }
    DrawnPanel {
        place,
        rect,
        axis: Some(axis),
        shapes,
    }
}

fn on_paper([t, value]: [f64; 2], time: &Axis, axis: &Axis) -> Pos2 {
    pos2(time.position(t) as f32, axis.position(value) as f32)
}

/// A strip between two lines, one column for each pixel.
fn area(shade: &Shade, time: &Axis, axis: &Axis, colour: Color32) -> Shape {
    let mut columns: Vec<[f32; 3]> = Vec::new();
    for &[t, low, high] in &shade.points {
        if !(time.contains(t) && low.is_finite() && high.is_finite()) {
            continue;
        }
        let (x, low, high) = (
            time.position(t) as f32,
            axis.position(low) as f32,
            axis.position(high) as f32,
        );
        match columns.last_mut() {
            Some(last) if x - last[0] < 1.0 => {
                last[1] = last[1].max(low);
                last[2] = last[2].min(high);
            }
            _ => columns.push([x, low, high]),
        }
    }
    let mut mesh = Mesh::default();
    for pair in columns.windows(2) {
        let [[x, low, high], [next, next_low, next_high]] = [pair[0], pair[1]];
        let base = mesh.vertices.len() as u32;
        for (x, y) in [(x, low), (x, high), (next, next_low), (next, next_high)] {
            mesh.colored_vertex(pos2(x, y), colour);
        }
        mesh.add_triangle(base, base + 1, base + 2);
        mesh.add_triangle(base + 1, base + 2, base + 3);
    }
    Shape::mesh(mesh)
}
