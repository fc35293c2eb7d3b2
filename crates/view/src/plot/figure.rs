//! A figure as data: what is to be seen, not how it is painted.

use serde::{Deserialize, Serialize};

use super::axis::most_ticks;
use super::series::{Series, extent};
use super::ticks::Ticks;
use crate::style::Fill;

/// Room above and below the data, as a share of their span.
const HEADROOM: f64 = 0.04;

/// A constant is shown with this share of its size above and below.
const ROOM_AROUND_CONSTANT: f64 = 0.1;

/// A span below this share of the values is rounding, and the series a constant.
const ROUNDING: f64 = 1e-9;

/// Stacked panels over one time axis.
#[derive(Debug, Clone, PartialEq, Default, Serialize, Deserialize)]
pub struct Figure {
    /// What it shows.
    pub title: String,
    /// What must be known to read it, in one line; may be empty.
    pub subtitle: String,
    /// Its time axis.
    pub time: TimeAxis,
    /// Panels from top to bottom.
    pub panels: Vec<Panel>,
    /// Events: vertical lines through all panels.
    pub marks: Vec<Mark>,
    /// Lines of small text below.
    pub notes: Vec<String>,
}

/// The time axis that all panels share.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct TimeAxis {
    /// What it shows.
    pub label: String,
    /// Its unit.
    pub unit: String,
    /// Start and end; `None` for those of the data.
    pub range: Option<(f64, f64)>,
}

impl Default for TimeAxis {
    fn default() -> Self {
        Self {
            label: "Time".to_owned(),
            unit: "s".to_owned(),
            range: None,
        }
    }
}

/// One panel: series with a common unit.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct Panel {
    /// What its values are.
    pub label: String,
    /// Their unit; empty for plain numbers.
    pub unit: String,
    /// Lines, the most important first.
    pub series: Vec<Series>,
    /// Limits and set values.
    pub limits: Vec<Limit>,
    /// Areas between two lines.
    pub shades: Vec<Shade>,
    /// Which values must be in view.
    pub range: ValueRange,
    /// Height against a panel of weight 1.
    pub weight: f64,
}

/// Which values a panel shows. Whatever is asked for, a limit with [`Reach::Widen`] is in view.
#[derive(Debug, Clone, Copy, PartialEq, Default, Serialize, Deserialize)]
pub enum ValueRange {
    /// The data.
    #[default]
    Data,
    /// The data, and these two values at least.
    Including(f64, f64),
    /// From the first value to the second, whatever the data are.
    Fixed(f64, f64),
}

/// A limit or set value.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct Limit {
    /// What it is.
    pub label: String,
    /// Where it lies.
    pub at: Where,
    /// Whether it must be in view.
    pub reach: Reach,
}

/// Where a limit lies.
#[derive(Debug, Clone, Copy, PartialEq, Serialize, Deserialize)]
pub enum Where {
    /// At one value.
    Line(f64),
    /// From one value to another.
    Band(f64, f64),
}

/// Whether a limit must be in view.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Serialize, Deserialize)]
pub enum Reach {
    /// The panel grows to show it.
    Widen,
    /// Shown if it happens to be in view.
    IfInView,
}

/// An area between two lines.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct Shade {
    /// What it is.
    pub label: String,
    /// What it means.
    pub fill: Fill,
    /// Time (s), lower value, upper value. Times never decrease.
    pub points: Vec<[f64; 3]>,
}

/// An event.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub struct Mark {
    /// When, s.
    pub time: f64,
    /// What happened.
    pub label: String,
}

impl Panel {
    /// A panel of weight 1 that shows its data.
    #[must_use]
    pub fn new(label: impl Into<String>, unit: impl Into<String>) -> Self {
        Self {
            label: label.into(),
            unit: unit.into(),
            series: Vec::new(),
            limits: Vec::new(),
            shades: Vec::new(),
            range: ValueRange::Data,
            weight: 1.0,
        }
    }

    /// The values to show, from least to largest, for an axis with about `most` ticks: rounded
    /// outwards to a minor tick. `None` if there is nothing to show.
    #[must_use]
    pub fn value_range(&self, most: usize) -> Option<(f64, f64)> {
        if let ValueRange::Fixed(from, to) = self.range {
            return (from < to && (to - from).is_finite()).then_some((from, to));
        }
        let (low, high) = extent(self.series.iter().filter_map(Series::extent).flat_map(pair))?;
        let (low, high) = match self.range {
            ValueRange::Including(one, other) => (low.min(one), high.max(other)),
            ValueRange::Data | ValueRange::Fixed(..) => (low, high),
        };
        let wanted = self
            .limits
            .iter()
            .filter(|limit| limit.reach == Reach::Widen);
        let wanted = wanted.flat_map(|limit| match limit.at {
            Where::Line(value) => [value; 2],
            Where::Band(from, to) => [from, to],
        });
        let (low, high) = extent(wanted.filter(|v| v.is_finite()).chain([low, high]))?;
        let size = low.abs().max(high.abs());
        let span = high - low;
        if !span.is_finite() {
            return None;
        }
        if span <= size * ROUNDING || span < f64::MIN_POSITIVE {
            let room = if size > 0.0 {
                size * ROOM_AROUND_CONSTANT
            } else {
                1.0
            };
            return Some(Ticks::widened(low - room, high + room, most));
        }
        // A line along zero stays at the foot: nothing goes below.
        let room = |end: f64| {
            if end.abs() <= size * ROUNDING {
                0.0
            } else {
                span * HEADROOM
            }
        };
        Some(Ticks::widened(low - room(low), high + room(high), most))
    }

    /// The values to show on a panel `height` px high with ticks `spacing` px apart.
    #[must_use]
    pub fn value_range_on(&self, height: f64, spacing: f64) -> Option<(f64, f64)> {
        self.value_range(most_ticks(height, spacing))
    }
}

impl Figure {
    /// Start and end of the time axis: as set, else those of the data. A single moment gets half a
    /// second on either side; `None` if there is no time at all.
    #[must_use]
    pub fn time_range(&self) -> Option<(f64, f64)> {
        let data = || {
            let series = self.panels.iter().flat_map(|panel| &panel.series);
            extent(series.filter_map(Series::time_extent).flat_map(pair))
        };
        let (from, to) = self.time.range.or_else(data)?;
        match to - from {
            span if span.is_finite() && span > 0.0 => Some((from, to)),
            0.0 => Some((from - 0.5, to + 0.5)),
            _ => None,
        }
    }
}

impl Figure {
    /// The line of this figure that shows the same as a line of another figure: by the names and
    /// the unit of its panel and by its own name. `None` if there is none.
    #[must_use]
    pub fn counterpart(&self, panel: &Panel, series: &Series) -> Option<&Series> {
        let same = |other: &&Panel| other.label == panel.label && other.unit == panel.unit;
        let panel = self.panels.iter().find(same)?;
        let mut lines = panel.series.iter().filter(|line| line.kept.is_none());
        lines.find(|line| line.label == series.label)
    }

    /// Lays the lines of a kept run behind those that show the same here, each with the number of
    /// the run behind its name, and says in a note which run that is. `place` counts kept runs from
    /// 0. Lines that nothing here answers to are left out.
    pub fn lay_behind(&mut self, kept: &Self, place: usize, name: &str) {
        let number = place + 1;
        for panel in &mut self.panels {
            let line = |series: &Series| {
                let found = kept.counterpart(panel, series)?;
                Some(Series {
                    label: format!("{} ({number})", series.label),
                    meaning: series.meaning,
                    dash: series.dash,
                    column: series.column.clone(),
                    kept: Some(place),
                    points: found.points.clone(),
                })
            };
            let own = panel.series.iter().filter(|series| series.kept.is_none());
            let lines: Vec<Series> = own.filter_map(line).collect();
            panel.series.extend(lines);
        }
        self.notes
            .push(format!("({number}) is the kept run \"{name}\"."));
    }
}

fn pair((low, high): (f64, f64)) -> [f64; 2] {
    [low, high]
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::style::Meaning;

    fn panel(values: &[f64]) -> Panel {
        let points = values.iter().enumerate().map(|(i, &v)| [i as f64, v]);
        let mut panel = Panel::new("Pressure", "bar");
        panel.series = vec![Series::new("Inlet", Meaning::Inlet, points.collect())];
        panel
    }

    #[test]
    fn ranges_are_round_and_hold_the_data() {
        let (low, high) = panel(&[0.0, 93.0]).value_range(5).unwrap();
        assert!(
            low.abs() < 1e-12 && (high - 100.0).abs() < 1e-9,
            "{low}..{high}"
        );
        let (low, high) = panel(&[-3.2, 93.0]).value_range(5).unwrap();
        assert!(low <= -3.2 && high >= 93.0, "{low}..{high}");
    }

    #[test]
    fn constants_stand_in_the_middle() {
        for value in [50.0, -50.0, 0.0, 50.0 * (1.0 + 1e-13)] {
            let (low, high) = panel(&[value, 50.0_f64.copysign(value) * f64::from(value != 0.0)])
                .value_range(4)
                .unwrap();
            assert!(low < value && high > value, "{value} in {low}..{high}");
        }
    }

    #[test]
    fn limits_widen_only_if_told_to() {
        let mut panel = panel(&[0.0, 40.0]);
        let limit = |reach| Limit {
            label: "main relief cracks".to_owned(),
            at: Where::Line(165.0),
            reach,
        };
        panel.limits = vec![limit(Reach::IfInView)];
        assert!(
            panel.value_range(4).unwrap().1 < 60.0,
            "stays close to the data"
        );
        panel.limits = vec![limit(Reach::Widen)];
        assert!(panel.value_range(4).unwrap().1 >= 165.0, "shows the limit");
        panel.range = ValueRange::Fixed(0.0, 30.0);
        assert_eq!(panel.value_range(4), Some((0.0, 30.0)), "fixed is fixed");
    }

    #[test]
    fn nothing_to_show_has_no_range() {
        assert_eq!(panel(&[]).value_range(4), None, "no data");
        assert_eq!(panel(&[f64::NAN]).value_range(4), None, "only gaps");
        assert_eq!(
            panel(&[-f64::MAX, f64::MAX]).value_range(4),
            None,
            "more than a double holds"
        );
        assert_eq!(Figure::default().time_range(), None, "no data");
        let single = Figure {
            panels: vec![panel(&[7.0])],
            ..Figure::default()
        };
        assert_eq!(single.time_range(), Some((-0.5, 0.5)), "a moment gets room");
    }

    #[test]
    fn kept_runs_lie_behind_what_shows_the_same() {
        let figure = |values: &[f64], unit: &str| {
            let mut panel = panel(values);
            panel.unit = unit.to_owned();
            Figure {
                panels: vec![panel],
                ..Figure::default()
            }
        };
        let mut live = figure(&[1.0, 2.0], "bar");
        live.lay_behind(&figure(&[3.0, 4.0], "bar"), 0, "as drawn");
        live.lay_behind(&figure(&[5.0, 6.0], "psi"), 1, "in other units");
        let lines = &live.panels[0].series;
        assert_eq!(lines.len(), 2, "one has the same unit: {lines:?}");
        assert_eq!(lines[1].label, "Inlet (1)", "numbered");
        assert_eq!(
            (lines[1].kept, lines[1].points[1][1]),
            (Some(0), 4.0),
            "its values"
        );
        assert!(live.notes[0].contains("as drawn"), "{:?}", live.notes);
        assert_ne!(lines[0].pattern(), lines[1].pattern(), "another dash");
    }

    #[test]
    fn survives_a_file() {
        let figure = Figure {
            title: "Wheel step".to_owned(),
            panels: vec![panel(&[1.0, 2.0])],
            marks: vec![Mark {
                time: 0.5,
                label: "stop reached".to_owned(),
            }],
            ..Figure::default()
        };
        let text = ron::to_string(&figure).unwrap();
        assert_eq!(
            ron::from_str::<Figure>(&text).unwrap(),
            figure,
            "round trip"
        );
    }
}
