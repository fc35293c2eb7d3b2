//! A field of colours with its scale.

use super::layout::{TICK_GAP, UNIT_GAP};
use super::pen::{Stroke, Text, centred, rectangle};
use super::text_width::text_width;
use super::xml::Xml;
use crate::chart::{Field, PlacedScale};
use crate::plot::Axis;
use crate::style::TextSize;
use crate::theme::Theme;

/// Width of the colour scale, px, and its distance from the plot.
const BAR: f64 = 14.0;
const BAR_GAP: f64 = 18.0;
/// Fields of the scale: enough that the eye sees no steps.
const STEPS: u32 = 64;
/// Least mean distance of the numbers on the scale, px.
const SPACING: f64 = 28.0;

/// Room that the colour scale takes to the right of the plot, px.
pub(super) fn scale_width(field: &Field) -> f64 {
    let axis = Axis::new(field.range, (300.0, 0.0), SPACING);
    let numbers = axis.ticks.major.iter();
    let widest = numbers
        .map(|&tick| text_width(&axis.ticks.label(tick), TextSize::Small))
        .fold(0.0, f64::max);
    BAR_GAP + BAR + TICK_GAP + widest
}

/// Draws a field.
pub(super) struct FieldPainter<'a> {
    pub(super) field: &'a Field,
    pub(super) theme: &'a Theme,
    pub(super) right: f64,
    pub(super) height: f64,
}

impl FieldPainter<'_> {
    pub(super) fn draw(&self, xml: &mut Xml, x: &PlacedScale, y: &PlacedScale) {
        let columns = edges(&self.field.xs, x);
        let rows = edges(&self.field.ys, y);
        xml.open("g", &[("shape-rendering", &"crispEdges")]);
        for (row, ys) in rows.windows(2).enumerate() {
            for (column, xs) in columns.windows(2).enumerate() {
                let at = row * self.field.xs.len() + column;
                let Some(value) = self.field.values.get(at).filter(|v| v.is_finite()) else {
                    continue;
                };
                let colour = self.theme.pressure.at(self.share(*value));
                let shape = rectangle((xs[0], xs[1]), (ys[1], ys[0]));
                xml.empty("path", &[("d", &shape), ("fill", &colour)]);
            }
        }
        xml.close();
        self.draw_scale(xml);
    }

    fn share(&self, value: f64) -> f64 {
        let (low, high) = self.field.range;
        if high > low {
            (value - low) / (high - low)
        } else {
            0.5
        }
    }

    fn draw_scale(&self, xml: &mut Xml) {
        let left = self.right + BAR_GAP;
        let sides = (left, left + BAR);
        xml.open("g", &[("shape-rendering", &"crispEdges")]);
        for step in 0..STEPS {
            let share = (f64::from(step) + 0.5) / f64::from(STEPS);
            let at = |step: u32| self.height * (1.0 - f64::from(step) / f64::from(STEPS));
            let shape = rectangle(sides, (at(step + 1), at(step)));
            xml.empty(
                "path",
                &[("d", &shape), ("fill", &self.theme.pressure.at(share))],
            );
        }
        xml.close();
        let axis = Axis::new(self.field.range, (self.height, 0.0), SPACING);
        let Theme {
            rules,
            strokes,
            text,
            ..
        } = self.theme;
        let ticks: Vec<_> = axis
            .ticks
            .major
            .iter()
            .map(|&tick| {
                let y = axis.position(tick);
                [(sides.1, y), (sides.1 + 4.0, y)]
            })
            .collect();
        xml.rules(&ticks, Stroke::new(rules.frame, strokes.rule));
        for &tick in &axis.ticks.major {
            let at = (
                sides.1 + UNIT_GAP,
                centred(axis.position(tick), TextSize::Small),
            );
            let number = Text::new(at, TextSize::Small, text.quiet);
            xml.write(number, &axis.ticks.label(tick));
        }
    }
}

/// Edges of the cells about grid lines: half way to the next line, the outer ones on the line.
fn edges(lines: &[f64], scale: &PlacedScale) -> Vec<f64> {
    let places: Vec<f64> = lines.iter().map(|&line| scale.position(line)).collect();
    let (Some(&first), Some(&last)) = (places.first(), places.last()) else {
        return Vec::new();
    };
    let between = places.windows(2).map(|pair| 0.5 * (pair[0] + pair[1]));
    std::iter::once(first)
        .chain(between)
        .chain([last])
        .collect()
}
