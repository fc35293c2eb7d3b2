//! Where everything stands, before anything is drawn.

use super::SvgOptions;
use super::end_labels::Naming;
use super::text_width::{bold_width, text_width, wrapped};
use crate::plot::{Axis, Figure, Panel, PlacedMark, placed_marks, row_count, superscript};
use crate::style::TextSize;

/// Around everything, px.
pub(super) const MARGIN: f64 = 16.0;
/// From a tick's number to the plot, px.
pub(super) const TICK_GAP: f64 = 8.0;
/// From the plot over the leader to a name at a line's end, px.
pub(super) const LEADER: f64 = 40.0;
/// Length of a sample of a line in a legend, px.
pub(super) const SAMPLE: f64 = 22.0;
/// Between a sample and its name, px.
pub(super) const SAMPLE_GAP: f64 = 6.0;
/// Between entries of a legend, px.
const ENTRY_GAP: f64 = 18.0;
/// Between a name and its unit, px.
pub(super) const UNIT_GAP: f64 = 6.0;
/// Height of a row in the head of a panel, px.
pub(super) const HEAD_ROW: f64 = 16.0;
/// From the head to the plot, px.
pub(super) const HEAD_GAP: f64 = 6.0;
/// From a plot to the next head, px.
const PANEL_GAP: f64 = 12.0;
/// From the last plot down to the first note: numbers and name of the time axis, px.
const AXIS_ROOM: f64 = 40.0;
/// Height of a line of title, subtitle, and of small text, px.
pub(super) const TITLE_ROW: f64 = 22.0;
pub(super) const SUBTITLE_ROW: f64 = 17.0;
pub(super) const SMALL_ROW: f64 = 14.0;
/// Below the title block, px.
const TITLE_GAP: f64 = 8.0;
/// Least mean distance of ticks across and upwards, px.
const TIME_SPACING: f64 = 64.0;
const VALUE_SPACING: f64 = 20.0;
/// A plot is at least this high, px.
const LEAST_PLOT: f64 = 28.0;
/// A sheet is at least this wide, px.
const LEAST_WIDTH: f64 = 320.0;
/// A name at a line's end that needs more than this share of the sheet goes into a legend.
const MOST_END_SHARE: f64 = 0.24;
/// Rows of event names at most.
const MOST_MARK_ROWS: usize = 4;
/// Least gutter for the numbers of the value axes, px.
const LEAST_GUTTER: f64 = 30.0;

/// Everything placed.
#[derive(Debug)]
pub(super) struct Sheet<'a> {
    pub(super) width: f64,
    pub(super) height: f64,
    /// Left and right edge of all plots.
    pub(super) left: f64,
    pub(super) right: f64,
    pub(super) title: Vec<String>,
    pub(super) subtitle: Vec<String>,
    pub(super) time: Option<Axis>,
    pub(super) marks: Vec<PlacedMark>,
    /// Foot of the rows of event names.
    pub(super) marks_foot: f64,
    pub(super) slots: Vec<Slot<'a>>,
    /// Foot of the last plot.
    pub(super) plots_foot: f64,
    pub(super) notes: Vec<String>,
}

/// A panel placed.
#[derive(Debug)]
pub(super) struct Slot<'a> {
    pub(super) panel: &'a Panel,
    /// Unit as shown, with the power of ten that the ticks leave out.
    pub(super) unit: String,
    /// Top of the plot on the sheet; within a panel, 0 is here.
    pub(super) top: f64,
    /// Height of the plot.
    pub(super) height: f64,
    /// Value axis, from `height` up to 0.
    pub(super) values: Option<Axis>,
    pub(super) naming: Naming,
    pub(super) legend: Vec<Entry>,
    /// Rows of the head.
    pub(super) rows: usize,
}

/// What a legend shows a sample of.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Sample {
    Series(usize),
    Shade(usize),
}

/// An entry of a legend.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Entry {
    pub(super) sample: Sample,
    pub(super) x: f64,
    pub(super) row: usize,
}

impl<'a> Sheet<'a> {
    pub(super) fn new(figure: &'a Figure, options: &SvgOptions<'_>) -> Self {
        let width = options.width.max(LEAST_WIDTH).round();
        let inner = width - 2.0 * MARGIN;
        let lines = |text: &str, size| wrapped(text, size, inner);
        let title = lines(&figure.title, TextSize::Title);
        let subtitle = lines(&figure.subtitle, TextSize::Label);
        let notes: Vec<String> = figure
            .notes
            .iter()
            .flat_map(|note| lines(note, TextSize::Small))
            .collect();
        let mut slots: Vec<Slot<'a>> = figure
            .panels
            .iter()
            .map(|panel| Slot::new(panel, options.panel_height))
            .collect();
        let gutter = slots.iter().map(Slot::gutter).fold(LEAST_GUTTER, f64::max);
        let left = (MARGIN + gutter + TICK_GAP).ceil();
        let range = figure.time_range();
        // Whether names fit at the ends does not depend on where the right edge is; how much room
        // they need does not depend on anything else.
        let provisional = range.map(|range| Axis::new(range, (left, width - MARGIN), TIME_SPACING));
        if let Some(time) = &provisional {
            for slot in &mut slots {
                slot.name_series(time, MOST_END_SHARE * width);
            }
        }
        let names = slots.iter().map(Slot::end_room).fold(0.0, f64::max);
        let right = (width - MARGIN - names).floor();
        let time = range.map(|range| Axis::new(range, (left, right), TIME_SPACING));
        let marks = match &time {
            Some(time) => {
                let width = |label: &str| text_width(label, TextSize::Small);
                placed_marks(&figure.marks, time, MOST_MARK_ROWS, &width)
            }
            None => Vec::new(),
        };
        let mut y = MARGIN
            + TITLE_ROW * title.len() as f64
            + SUBTITLE_ROW * subtitle.len() as f64
            + TITLE_GAP
            + SMALL_ROW * row_count(&marks) as f64;
        let marks_foot = y;
        for slot in &mut slots {
            slot.lay_legend(right);
            y = slot.stand_below(y) + PANEL_GAP;
        }
        let plots_foot = y - PANEL_GAP;
        let notes_height = SMALL_ROW * notes.len() as f64;
        Self {
            width,
            height: (plots_foot + AXIS_ROOM + notes_height + MARGIN).round(),
            left,
            right,
            title,
            subtitle,
            time,
            marks,
            marks_foot,
            slots,
            plots_foot,
            notes,
        }
    }

    /// Baseline of the first note.
    pub(super) fn notes_top(&self) -> f64 {
        self.plots_foot + AXIS_ROOM + SMALL_ROW
    }
}

impl<'a> Slot<'a> {
    fn new(panel: &'a Panel, panel_height: f64) -> Self {
        let weighted = panel.weight * panel_height;
        let height = if weighted.is_finite() {
            weighted.max(LEAST_PLOT).round()
        } else {
            panel_height.round()
        };
        let range = panel.value_range_on(height, VALUE_SPACING);
        let values = range.map(|range| Axis::new(range, (height, 0.0), VALUE_SPACING));
        let exponent = values.as_ref().map_or(0, |axis| axis.ticks.exponent);
        let unit = match (exponent, panel.unit.as_str()) {
            (0, unit) => unit.to_owned(),
            (exponent, unit) => format!("10{} {unit}", superscript(exponent)),
        };
        Self {
            panel,
            unit,
            top: 0.0,
            height,
            values,
            naming: Naming::Legend,
            legend: Vec::new(),
            rows: 1,
        }
    }

    /// Room that the numbers of the value axis need.
    fn gutter(&self) -> f64 {
        let Some(axis) = &self.values else {
            return 0.0;
        };
        let ticks = axis.ticks.major.iter();
        ticks
            .map(|&tick| text_width(&axis.ticks.label(tick), TextSize::Small))
            .fold(0.0, f64::max)
    }

    fn name_series(&mut self, time: &Axis, most_room: f64) {
        if let Some(values) = &self.values {
            self.naming = Naming::of(self.panel, values, time, self.height);
        }
        if self.end_room() > most_room {
            self.naming = Naming::Legend;
        }
    }

    /// Room that names at the ends of lines need.
    fn end_room(&self) -> f64 {
        let Naming::Ends(labels) = &self.naming else {
            return 0.0;
        };
        let widths = labels
            .iter()
            .map(|label| text_width(&self.panel.series[label.series].label, TextSize::Label));
        LEADER + widths.fold(0.0, f64::max)
    }

    /// Places the entries of the legend behind the panel's name, in as many rows as they need.
    fn lay_legend(&mut self, right: f64) {
        let shades = (0..self.panel.shades.len()).map(Sample::Shade);
        let series = (0..self.panel.series.len()).map(Sample::Series);
        let samples: Vec<Sample> = match self.naming {
            Naming::Legend => series.chain(shades).collect(),
            Naming::Panel | Naming::Ends(_) => shades.collect(),
        };
        let name = bold_width(&self.panel.label, TextSize::Label);
        let unit = text_width(&self.unit, TextSize::Label);
        let start = MARGIN + name + UNIT_GAP + unit + ENTRY_GAP;
        let (mut x, mut row) = (start, 0);
        for sample in samples {
            let label = text_width(self.sample_label(sample), TextSize::Small);
            let room = SAMPLE + SAMPLE_GAP + label;
            let is_first_of_row = x <= MARGIN;
            if x + room > right && !is_first_of_row {
                row += 1;
                x = MARGIN;
            }
            self.legend.push(Entry { sample, x, row });
            x += room + ENTRY_GAP;
        }
        self.rows = row + 1;
    }

    /// The name of what a sample stands for.
    pub(super) fn sample_label(&self, sample: Sample) -> &'a str {
        match sample {
            Sample::Series(index) => &self.panel.series[index].label,
            Sample::Shade(index) => &self.panel.shades[index].label,
        }
    }

    /// Puts the panel below `y`; gives the foot of its plot.
    fn stand_below(&mut self, y: f64) -> f64 {
        self.top = y + HEAD_ROW * self.rows as f64 + HEAD_GAP;
        self.top + self.height
    }

    /// Baseline of a row of the head, within the panel.
    pub(super) fn head_baseline(&self, row: usize) -> f64 {
        let rows_below = (self.rows - 1 - row) as f64;
        -HEAD_GAP - 4.0 - HEAD_ROW * rows_below
    }
}
