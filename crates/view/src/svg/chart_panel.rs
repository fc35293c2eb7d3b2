//! One panel of a chart.

use super::chart::LEGEND_ROW;
use super::chart_field::{FieldPainter, scale_width};
use super::layout::{MARGIN, SAMPLE, SAMPLE_GAP, TICK_GAP, UNIT_GAP};
use super::pen::{Anchor, Stroke, Text, centred, outline, rectangle};
use super::text_width::text_width;
use super::xml::{Px, Xml};
use crate::chart::{ChartBar, ChartLine, ChartPanel, LineRole, PlacedScale};
use crate::plot::superscript;
use crate::style::{Fill, TextSize};
use crate::theme::Theme;

/// Length of ticks, px.
const TICK: f64 = 4.0;
/// Least mean distance of ticks across and upwards, px.
const ACROSS: f64 = 70.0;
const UPWARDS: f64 = 28.0;
/// Least gutter for the numbers of the y axis, px.
const LEAST_GUTTER: f64 = 30.0;
/// Radius of a point, px.
const POINT: f64 = 4.0;
/// Share of a bar's row that the bar fills.
const BAR: f64 = 0.6;
/// Room behind the longest bar for its number, px.
const BAR_TEXT: f64 = 90.0;
/// Between entries of a legend, px.
const ENTRY_GAP: f64 = 18.0;
/// Dashes of a guide, px.
const GUIDE_DASH: [f64; 2] = [4.0, 3.0];

/// Everything that a panel is drawn with; 0 is the top of its plot.
pub(super) struct PanelPainter<'a> {
    panel: &'a ChartPanel,
    theme: &'a Theme,
    left: f64,
    right: f64,
    x: Option<PlacedScale>,
    y: Option<PlacedScale>,
    clip: String,
    legend: Vec<Entry<'a>>,
}

struct Entry<'a> {
    label: &'a str,
    stroke: Stroke<'static>,
    x: f64,
    row: usize,
}

impl<'a> PanelPainter<'a> {
    pub(super) fn new(
        panel: &'a ChartPanel,
        theme: &'a Theme,
        width: f64,
        id: &str,
        index: usize,
    ) -> Self {
        let height = panel.height;
        let y_range = panel.y_range().filter(|_| panel.bars.is_empty());
        let y = y_range.map(|r| PlacedScale::new(panel.y.kind, r, (height, 0.0), UPWARDS));
        let numbers = y.as_ref().map_or_else(Vec::new, |y| y.ticks().0);
        let bar_names = panel
            .bars
            .iter()
            .map(|bar| text_width(&bar.label, TextSize::Label));
        let gutter = numbers
            .iter()
            .map(|(_, text)| text_width(text, TextSize::Small))
            .chain(bar_names)
            .fold(LEAST_GUTTER, f64::max);
        let left = (MARGIN + gutter + TICK_GAP).ceil();
        let scale_room = panel.field.as_ref().map_or(0.0, scale_width);
        let bar_room = if panel.bars.is_empty() { 0.0 } else { BAR_TEXT };
        let right = (width - MARGIN - scale_room - bar_room).floor();
        let x_ends = if panel.bars.is_empty() {
            (left, right)
        } else {
            // Numbers of bars to the left of 0 need room too.
            (left + BAR_TEXT, right)
        };
        let x = panel
            .x_range()
            .map(|range| PlacedScale::new(panel.x.kind, range, x_ends, ACROSS));
        let mut painter = Self {
            panel,
            theme,
            left,
            right,
            x,
            y,
            clip: format!("{id}-chart-{index}"),
            legend: Vec::new(),
        };
        painter.lay_legend();
        painter
    }

    pub(super) fn legend_rows(&self) -> usize {
        self.legend.last().map_or(0, |entry| entry.row + 1)
    }

    /// Data lines with a name, in rows above the plot.
    fn lay_legend(&mut self) {
        let (mut x, mut row) = (MARGIN, 0);
        for line in &self.panel.lines {
            let LineRole::Data(..) = line.role else {
                continue;
            };
            if line.label.is_empty() {
                continue;
            }
            let room = SAMPLE + SAMPLE_GAP + text_width(&line.label, TextSize::Small);
            if x + room > self.right && x > MARGIN {
                row += 1;
                x = MARGIN;
            }
            self.legend.push(Entry {
                label: &line.label,
                stroke: self.stroke(line.role),
                x,
                row,
            });
            x += room + ENTRY_GAP;
        }
    }

    fn stroke(&self, role: LineRole) -> Stroke<'static> {
        let Theme {
            rules,
            strokes,
            text,
            ..
        } = self.theme;
        match role {
            LineRole::Data(meaning, dash) => dash.of(Stroke::new(
                self.theme.series_colour(meaning),
                strokes.series,
            )),
            LineRole::Contour => Stroke::new(text.ink, strokes.rule),
            LineRole::Border => Stroke::new(text.ink, 2.0 * strokes.series),
            LineRole::Guide => Stroke::new(rules.limit, strokes.limit).dashed(&GUIDE_DASH),
        }
    }

    pub(super) fn draw(&self, xml: &mut Xml) {
        self.draw_names(xml);
        self.draw_legend(xml);
        let (Some(x), y) = (&self.x, &self.y) else {
            let at = (self.left, centred(0.5 * self.panel.height, TextSize::Label));
            let text = Text::new(at, TextSize::Label, self.theme.text.quiet);
            xml.write(text, "nothing to show");
            return;
        };
        if let (Some(field), Some(y)) = (&self.panel.field, y) {
            let painter = FieldPainter {
                field,
                theme: self.theme,
                right: self.right,
                height: self.panel.height,
            };
            painter.draw(xml, x, y);
        }
        self.draw_bands(xml, x);
        self.draw_axes(xml, x, y.as_ref());
        self.draw_bars(xml, x);
        let Some(y) = y else { return };
        xml.open("clipPath", &[("id", &self.clip)]);
        let frame = rectangle((self.left, self.right), (0.0, self.panel.height));
        xml.empty("path", &[("d", &frame)]);
        xml.close();
        let clip = format!("url(#{})", self.clip);
        xml.open("g", &[("clip-path", &clip)]);
        for line in &self.panel.lines {
            self.draw_line(xml, line, x, y);
        }
        xml.close();
        for line in &self.panel.lines {
            self.name_line(xml, line, x, y);
        }
        self.draw_points(xml, x, y);
    }

    fn unit_of(unit: &str, scale: Option<&PlacedScale>) -> String {
        match scale.map_or(0, PlacedScale::exponent) {
            0 => unit.to_owned(),
            exponent => format!("10{} {unit}", superscript(exponent)),
        }
    }

    /// Name of the y axis above the plot, of the x axis below it.
    fn draw_names(&self, xml: &mut Xml) {
        let ink = self.theme.text.ink;
        let quiet = self.theme.text.quiet;
        let rows = self.legend_rows() as f64;
        let mut upper = |label: &str, unit: &str| {
            let at = (MARGIN, -8.0 - LEGEND_ROW * rows);
            let text = Text::new(at, TextSize::Label, ink).strong();
            xml.write_with_unit(text, label, unit, quiet);
        };
        let unit = Self::unit_of(&self.panel.y.unit, self.y.as_ref());
        upper(&self.panel.y.label, &unit);
        let at = (self.left, self.panel.height + 34.0);
        let text = Text::new(at, TextSize::Label, ink).strong();
        let unit = Self::unit_of(&self.panel.x.unit, self.x.as_ref());
        xml.write_with_unit(text, &self.panel.x.label, &unit, quiet);
    }

    fn draw_legend(&self, xml: &mut Xml) {
        let rows = self.legend_rows();
        for entry in &self.legend {
            let y = -8.0 - LEGEND_ROW * (rows - 1 - entry.row) as f64;
            let middle = y - 3.5;
            xml.line((entry.x, middle), (entry.x + SAMPLE, middle), entry.stroke);
            let at = (entry.x + SAMPLE + SAMPLE_GAP, y);
            xml.write(
                Text::new(at, TextSize::Small, self.theme.text.ink),
                entry.label,
            );
        }
    }

    fn draw_axes(&self, xml: &mut Xml, x: &PlacedScale, y: Option<&PlacedScale>) {
        let Theme {
            rules,
            strokes,
            text,
            ..
        } = self.theme;
        let height = self.panel.height;
        let (x_named, x_minor) = x.ticks();
        let (y_named, y_minor) = y.map(PlacedScale::ticks).unwrap_or_default();
        let y_at = |value: f64| y.map_or(0.0, |y| y.position(value));
        if self.panel.field.is_none() {
            let upright = x_named.iter().map(|(v, _)| x.position(*v));
            let level = y_named.iter().map(|(v, _)| y_at(*v));
            let grid: Vec<_> = upright
                .map(|x| [(x, 0.0), (x, height)])
                .chain(level.map(|y| [(self.left, y), (self.right, y)]))
                .collect();
            xml.rules(&grid, Stroke::new(rules.grid, strokes.rule));
            let zero = Stroke::new(rules.zero, 1.5 * strokes.rule);
            if x.range().0 < 0.0 && x.contains(0.0) {
                xml.line((x.position(0.0), 0.0), (x.position(0.0), height), zero);
            }
            if y.is_some_and(|y| y.range().0 < 0.0 && y.contains(0.0)) {
                xml.line((self.left, y_at(0.0)), (self.right, y_at(0.0)), zero);
            }
        }
        let foot =
            |v: f64, length: f64| [(x.position(v), height), (x.position(v), height + length)];
        let side = |v: f64, length: f64| [(self.left - length, y_at(v)), (self.left, y_at(v))];
        let mut ticks = vec![
            [(self.left, height), (self.right, height)],
            [(self.left, 0.0), (self.left, height)],
        ];
        ticks.extend(x_named.iter().map(|(v, _)| foot(*v, TICK)));
        ticks.extend(x_minor.iter().map(|&v| foot(v, 0.5 * TICK)));
        ticks.extend(y_named.iter().map(|(v, _)| side(*v, TICK)));
        ticks.extend(y_minor.iter().map(|&v| side(v, 0.5 * TICK)));
        xml.rules(&ticks, Stroke::new(rules.frame, strokes.rule));
        for (value, label) in &x_named {
            let at = (x.position(*value), height + 17.0);
            let number = Text::new(at, TextSize::Small, text.quiet);
            xml.write(number.anchored(Anchor::Middle), label);
        }
        for (value, label) in &y_named {
            let at = (self.left - TICK_GAP, centred(y_at(*value), TextSize::Small));
            let number = Text::new(at, TextSize::Small, text.quiet);
            xml.write(number.anchored(Anchor::End), label);
        }
    }

    fn draw_bands(&self, xml: &mut Xml, x: &PlacedScale) {
        let (low, high) = x.range();
        let height = self.panel.height;
        for (band, row) in self.panel.bands.iter().zip(0_u32..) {
            let (from, to) = (band.range.0.max(low), band.range.1.min(high));
            if from >= to {
                continue;
            }
            let sides = (x.position(from), x.position(to));
            xml.area(
                &rectangle(sides, (0.0, height)),
                self.theme.wash(Fill::Band),
            );
            let at = (sides.0 + UNIT_GAP, 14.0 + LEGEND_ROW * f64::from(row % 3));
            let text = Text::new(at, TextSize::Small, self.theme.text.quiet);
            xml.write(text.halo(self.theme.background), &band.label);
        }
    }

    fn draw_line(&self, xml: &mut Xml, line: &ChartLine, x: &PlacedScale, y: &PlacedScale) {
        let places: Vec<[f64; 2]> = line
            .points
            .iter()
            .map(|&[px, py]| [x.position(px), y.position(py)].map(|v| v.clamp(-1e5, 1e5)))
            .collect();
        let runs = places.split(|p| !(p[0].is_finite() && p[1].is_finite()));
        let path: String = runs
            .filter(|run| run.len() > 1)
            .map(|run| outline(run.iter().copied()))
            .collect();
        if path.is_empty() {
            return;
        }
        if line.role == LineRole::Border {
            // A light rim, so that it stands out from the darkest field.
            let rim = Stroke::new(self.theme.background, 4.0 * self.theme.strokes.series);
            xml.path(&path, rim, &line.label);
        }
        xml.path(&path, self.stroke(line.role), &line.label);
    }

    /// Contours, borders and guides carry their names themselves.
    fn name_line(&self, xml: &mut Xml, line: &ChartLine, x: &PlacedScale, y: &PlacedScale) {
        if line.label.is_empty() || matches!(line.role, LineRole::Data(..)) {
            return;
        }
        let half = 0.5 * text_width(&line.label, TextSize::Small) + 2.0;
        let shown: Vec<(f64, f64)> = line
            .points
            .iter()
            .map(|&[px, py]| (x.position(px), y.position(py)))
            .filter(|&(px, py)| {
                let across = self.left + half..=self.right - half;
                across.contains(&px) && (10.0..=self.panel.height - 4.0).contains(&py)
            })
            .collect();
        let length: f64 = shown
            .windows(2)
            .map(|p| (p[1].0 - p[0].0).hypot(p[1].1 - p[0].1))
            .sum();
        // A scrap of a line has no room for a name.
        let room = if line.role == LineRole::Contour {
            3.0 * half
        } else {
            0.0
        };
        let place = match line.role {
            LineRole::Guide => shown.last(),
            _ => shown.get(shown.len() / 2),
        };
        let Some(&(px, py)) = place.filter(|_| length >= room) else {
            return;
        };
        let at = match line.role {
            LineRole::Guide => (px, py - 4.0),
            _ => (px, centred(py, TextSize::Small)),
        };
        let mut text = Text::new(at, TextSize::Small, self.theme.text.ink)
            .anchored(Anchor::Middle)
            .halo(self.theme.background);
        text.strong = line.role == LineRole::Border;
        xml.write(text, &line.label);
    }

    fn draw_points(&self, xml: &mut Xml, x: &PlacedScale, y: &PlacedScale) {
        for point in &self.panel.points {
            let (px, py) = (x.position(point.at[0]), y.position(point.at[1]));
            let inside = x.contains(point.at[0]) && y.contains(point.at[1]);
            if !(inside && px.is_finite() && py.is_finite()) {
                continue;
            }
            let colour = self.theme.series_colour(point.meaning);
            let fill = if point.full {
                colour
            } else {
                self.theme.background
            };
            let (cx, cy, radius) = (Px(px), Px(py), Px(POINT));
            let width = Px(self.theme.strokes.series);
            xml.empty(
                "circle",
                &[
                    ("cx", &cx),
                    ("cy", &cy),
                    ("r", &radius),
                    ("fill", &fill),
                    ("stroke", &colour),
                    ("stroke-width", &width),
                ],
            );
            if !point.label.is_empty() {
                let room = text_width(&point.label, TextSize::Small) + POINT + UNIT_GAP;
                let (at, anchor) = if px + room > self.right {
                    (px - POINT - 4.0, Anchor::End)
                } else {
                    (px + POINT + 4.0, Anchor::Start)
                };
                let text = Text::new(
                    (at, centred(py, TextSize::Small)),
                    TextSize::Small,
                    self.theme.text.ink,
                );
                let text = text.anchored(anchor).halo(self.theme.background);
                xml.write(text, &point.label);
            }
        }
    }

    fn draw_bars(&self, xml: &mut Xml, x: &PlacedScale) {
        let count = self.panel.bars.len();
        if count == 0 {
            return;
        }
        let row = self.panel.height / count as f64;
        for (index, bar) in self.panel.bars.iter().enumerate() {
            let middle = (index as f64 + 0.5) * row;
            let at = (self.left - TICK_GAP, centred(middle, TextSize::Label));
            let name = Text::new(at, TextSize::Label, self.theme.text.ink);
            xml.write(name.anchored(Anchor::End), &bar.label);
            self.draw_bar(xml, x, bar, (middle, 0.5 * BAR * row));
        }
    }

    fn draw_bar(&self, xml: &mut Xml, x: &PlacedScale, bar: &ChartBar, place: (f64, f64)) {
        let (middle, half) = place;
        let (zero, end) = (x.position(0.0), x.position(bar.value));
        let colour = self.theme.series_colour(bar.meaning);
        let sides = if bar.either_way {
            let other = x.position(-bar.value);
            (other.min(end), other.max(end))
        } else {
            (zero.min(end), zero.max(end))
        };
        let shape = rectangle(sides, (middle - half, middle + half));
        if bar.either_way {
            let stroke = Stroke::new(colour, self.theme.strokes.series).dashed(&GUIDE_DASH);
            xml.path(&shape, stroke, &bar.label);
        } else {
            xml.empty("path", &[("d", &shape), ("fill", &colour)]);
        }
        let y = centred(middle, TextSize::Small);
        let (at, anchor) = if end >= zero || bar.either_way {
            ((sides.1 + 6.0, y), Anchor::Start)
        } else {
            ((sides.0 - 6.0, y), Anchor::End)
        };
        let text = Text::new(at, TextSize::Small, self.theme.text.ink).anchored(anchor);
        xml.write(text.halo(self.theme.background), &bar.text);
    }
}
