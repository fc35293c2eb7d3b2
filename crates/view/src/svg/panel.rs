//! One panel: grid, areas, limits, lines, names.

use super::end_labels::{EndLabel, Naming};
use super::layout::{LEADER, MARGIN, SAMPLE, SAMPLE_GAP, Sample, Sheet, Slot, TICK_GAP};
use super::pen::{Anchor, Stroke, Text, centred, outline, rectangle};
use super::text_width::text_width;
use super::xml::{Px, Xml};
use crate::plot::{Axis, Frame, Series, Shade, Where, decimate, placed_names, straighten};
use crate::style::{Fill, KEPT_OPACITY, KEPT_WIDTH, TextSize};
use crate::theme::Theme;

/// A line may be straightened by this much, px: less than the eye and the rounding tell.
const STRAIGHTENING: f64 = 0.08;

/// Places beyond this are drawn here; the plot is cut off long before, px.
const FAR_OUTSIDE: f64 = 1e4;

/// Length of the ticks of the value axis, px.
const MINOR_TICK: f64 = 3.0;

/// Radius of a single point, px.
const POINT: f64 = 2.2;

/// Dashes of limits, px: finer than those of series.
const LIMIT_DASH: [f64; 2] = [2.0, 2.0];

/// Over this length a leader slants to its name, px.
const SLANT: f64 = 12.0;

/// A line this many times as long as the plot is wide swings so fast that it fills an area: dashes
/// would only make patterns of their own there.
const DENSE: f64 = 5.0;

/// Shown where there is nothing to show.
const NO_DATA: &str = "no data";

/// Draws panels of one sheet.
pub(super) struct PanelPainter<'a> {
    pub(super) sheet: &'a Sheet<'a>,
    pub(super) theme: &'a Theme,
    pub(super) id: &'a str,
}

impl PanelPainter<'_> {
    /// Draws one panel into the current group, whose origin is at the top of its plot.
    pub(super) fn draw(&self, xml: &mut Xml, slot: &Slot<'_>, index: usize) {
        self.draw_head(xml, slot);
        let (Some(values), Some(time)) = (&slot.values, &self.sheet.time) else {
            let middle = (
                f64::midpoint(self.sheet.left, self.sheet.right),
                slot.height / 2.0,
            );
            let at = (middle.0, centred(middle.1, TextSize::Small));
            let quiet = Text::new(at, TextSize::Small, self.theme.text.quiet);
            xml.write(quiet.anchored(Anchor::Middle), NO_DATA);
            return;
        };
        self.draw_grid(xml, slot, values, time);
        let clip = format!("{}-plot-{index}", self.id);
        self.define_clip(xml, slot, &clip);
        let lines: Vec<Vec<Vec<[f64; 2]>>> = slot
            .panel
            .series
            .iter()
            .map(|series| self.runs(series, values, time))
            .collect();
        xml.open("g", &[("clip-path", &format!("url(#{clip})"))]);
        for shade in &slot.panel.shades {
            let area = self.shade_outline(shade, values, time);
            xml.area(&area, self.theme.wash(shade.fill));
        }
        self.draw_limits(xml, slot, values);
        // The most important line comes last, on top; kept runs lie behind.
        let drawn = slot.panel.series.iter().zip(&lines).rev();
        let (behind, before): (Vec<_>, Vec<_>) =
            drawn.partition(|(series, _)| series.kept.is_some());
        for (series, runs) in behind.into_iter().chain(before) {
            self.draw_series(xml, series, runs);
        }
        xml.close();
        self.name_limits(xml, slot, values, &lines.concat());
        if let Naming::Ends(labels) = &slot.naming {
            for label in labels {
                self.draw_end_label(xml, &slot.panel.series[label.series], *label);
            }
        }
    }

    fn draw_head(&self, xml: &mut Xml, slot: &Slot<'_>) {
        let text = self.theme.text;
        let ground = self.theme.background;
        let y = slot.head_baseline(0);
        let name = Text::new((MARGIN, y), TextSize::Label, text.ink)
            .strong()
            .halo(ground);
        xml.write_with_unit(name, &slot.panel.label, &slot.unit, text.quiet);
        for entry in &slot.legend {
            let y = slot.head_baseline(entry.row);
            let middle = y - 3.8;
            let ends = (entry.x, entry.x + SAMPLE);
            match entry.sample {
                Sample::Series(index) => {
                    let stroke = self.series_stroke(&slot.panel.series[index]);
                    xml.line((ends.0, middle), (ends.1, middle), stroke);
                }
                Sample::Shade(index) => {
                    let wash = self.theme.wash(slot.panel.shades[index].fill);
                    xml.area(&rectangle(ends, (middle - 4.0, middle + 4.0)), wash);
                }
            }
            let at = (ends.1 + SAMPLE_GAP, y);
            let label = Text::new(at, TextSize::Small, text.ink).halo(ground);
            xml.write(label, slot.sample_label(entry.sample));
        }
    }

    fn draw_grid(&self, xml: &mut Xml, slot: &Slot<'_>, values: &Axis, time: &Axis) {
        let Theme { rules, strokes, .. } = self.theme;
        let (left, right) = (self.sheet.left, self.sheet.right);
        let grid = Stroke::new(rules.grid, strokes.rule);
        let upright = time.ticks.major.iter().map(|&tick| time.position(tick));
        let level = values.ticks.major.iter().map(|&tick| values.position(tick));
        let minor = values.ticks.minor.iter().map(|&tick| values.position(tick));
        let lines: Vec<_> = upright
            .map(|x| [(x, 0.0), (x, slot.height)])
            .chain(level.map(|y| [(left, y), (right, y)]))
            .chain(minor.map(|y| [(left - MINOR_TICK, y), (left, y)]))
            .collect();
        xml.rules(&lines, grid);
        for &tick in &values.ticks.major {
            let y = values.position(tick);
            if tick.abs() < 1e-9 * values.ticks.step {
                let zero = Stroke::new(rules.zero, strokes.rule);
                xml.line((left, y), (right, y), zero);
            }
            let at = (left - TICK_GAP, centred(y, TextSize::Small));
            let number = Text::new(at, TextSize::Small, self.theme.text.quiet);
            xml.write(number.anchored(Anchor::End), &values.ticks.label(tick));
        }
    }

    fn define_clip(&self, xml: &mut Xml, slot: &Slot<'_>, id: &str) {
        xml.open("clipPath", &[("id", &id)]);
        // Half a stroke more, so that a line along an edge keeps its width.
        let over = self.theme.strokes.series / 2.0 + 0.5;
        let (left, right) = (self.sheet.left - over, self.sheet.right + over);
        let outline = rectangle((left, right), (-over, slot.height + over));
        xml.empty("path", &[("d", &outline)]);
        xml.close();
    }

    /// A series on paper: one run of points for each stretch between gaps.
    fn runs(&self, series: &Series, values: &Axis, time: &Axis) -> Vec<Vec<[f64; 2]>> {
        let columns = (time.end - time.start).ceil().max(1.0) as usize;
        let points = decimate(&series.points, time.low, time.high, columns);
        let on_paper = |[t, value]: [f64; 2]| {
            let place = |px: f64| px.clamp(-FAR_OUTSIDE, FAR_OUTSIDE);
            [place(time.position(t)), place(values.position(value))]
        };
        points
            .split(|point| !point[1].is_finite())
            .filter(|run| !run.is_empty())
            .map(|run| {
                let run: Vec<_> = run.iter().copied().map(on_paper).collect();
                straighten(&run, STRAIGHTENING)
            })
            .collect()
    }

    fn draw_series(&self, xml: &mut Xml, series: &Series, runs: &[Vec<[f64; 2]>]) {
        let mut stroke = self.series_stroke(series);
        // Only the dash tells kept runs apart.
        if series.kept.is_none()
            && runs.iter().map(|run| length(run)).sum::<f64>()
                > DENSE * (self.sheet.right - self.sheet.left)
        {
            stroke = stroke.dashed(&[]);
        }
        let lines = runs.iter().filter(|run| run.len() > 1);
        let outline: String = lines.map(|run| outline(run.iter().copied())).collect();
        if !outline.is_empty() {
            xml.path(&outline, stroke, &series.label);
        }
        for point in runs
            .iter()
            .filter_map(|run| <&[[f64; 2]; 1]>::try_from(run.as_slice()).ok())
        {
            let [x, y] = point[0].map(Px);
            let radius = Px(POINT);
            xml.empty(
                "circle",
                &[
                    ("cx", &x),
                    ("cy", &y),
                    ("r", &radius),
                    ("fill", &stroke.colour),
                ],
            );
        }
    }

    fn series_stroke(&self, series: &Series) -> Stroke<'static> {
        let colour = self.theme.series_colour(series.meaning);
        let width = self.theme.strokes.series;
        match series.kept {
            Some(_) => {
                let pale = colour.mixed(self.theme.background, 1.0 - KEPT_OPACITY);
                Stroke::new(pale, width * KEPT_WIDTH).dashed(series.pattern())
            }
            None => Stroke::new(colour, width).dashed(series.pattern()),
        }
    }

    /// The outline of an area: along its upper edge and back along its lower one.
    fn shade_outline(&self, shade: &Shade, values: &Axis, time: &Axis) -> String {
        let edge = |which: usize| {
            let points: Vec<_> = shade.points.iter().map(|p| [p[0], p[which]]).collect();
            Series::new("", crate::style::Meaning::Steering, points)
        };
        let lower = self.runs(&edge(1), values, time);
        let upper = self.runs(&edge(2), values, time);
        let mut text = String::new();
        for (upper, lower) in upper.iter().zip(&lower) {
            text += &outline(upper.iter().chain(lower.iter().rev()).copied());
            text.push('Z');
        }
        text
    }

    fn draw_limits(&self, xml: &mut Xml, slot: &Slot<'_>, values: &Axis) {
        let (left, right) = (self.sheet.left, self.sheet.right);
        let stroke = Stroke::new(self.theme.rules.limit, self.theme.strokes.limit);
        for limit in &slot.panel.limits {
            match limit.at {
                Where::Line(value) if values.contains(value) => {
                    let y = values.position(value);
                    xml.line((left, y), (right, y), stroke.dashed(&LIMIT_DASH));
                }
                Where::Band(from, to) if from <= values.high && to >= values.low => {
                    let upper = values.position(to.min(values.high));
                    let lower = values.position(from.max(values.low));
                    let area = rectangle((left, right), (upper, lower));
                    xml.area(&area, self.theme.wash(Fill::Band));
                }
                Where::Line(_) | Where::Band(..) => {}
            }
        }
    }

    fn name_limits(&self, xml: &mut Xml, slot: &Slot<'_>, values: &Axis, lines: &[Vec<[f64; 2]>]) {
        let limits = &slot.panel.limits;
        let widths: Vec<f64> = limits
            .iter()
            .map(|limit| text_width(&limit.label, TextSize::Small))
            .collect();
        let plot = Frame {
            left: self.sheet.left,
            right: self.sheet.right,
            top: 0.0,
            bottom: slot.height,
        };
        let marks = self.sheet.marks.iter();
        let upright = marks.map(|mark| vec![[mark.x, 0.0], [mark.x, slot.height]]);
        let crossed: Vec<_> = lines.iter().cloned().chain(upright).collect();
        let names = placed_names(limits, &widths, values, plot, &crossed);
        for (limit, name) in limits.iter().zip(names) {
            let Some(name) = name else { continue };
            let text = Text::new(name.at, TextSize::Small, self.theme.text.quiet);
            xml.write(text.halo(self.theme.background), &limit.label);
        }
    }

    fn draw_end_label(&self, xml: &mut Xml, series: &Series, label: EndLabel) {
        let right = self.sheet.right;
        let leader = [
            [right + 2.0, label.line_y],
            [right + SLANT, label.y],
            [right + LEADER - SAMPLE_GAP, label.y],
        ];
        xml.path(&outline(leader), self.series_stroke(series), &series.label);
        let at = (right + LEADER, centred(label.y, TextSize::Label));
        let name = Text::new(at, TextSize::Label, self.theme.text.ink);
        xml.write(name, &series.label);
    }
}

/// Length of a line on paper, px.
fn length(run: &[[f64; 2]]) -> f64 {
    run.windows(2)
        .map(|pair| (pair[1][0] - pair[0][0]).hypot(pair[1][1] - pair[0][1]))
        .sum()
}
