//! Names at the ends of lines.

use super::spread::spread;
use crate::plot::{Axis, Panel};

/// Distance between the middles of two names, px.
const GAP: f64 = 13.5;

/// A name further than this from its line no longer reads as its name, px.
const FARTHEST: f64 = 42.0;

/// A line that ends this far before the edge gets no name at the edge, px.
const SHORT_OF_EDGE: f64 = 2.0;

/// Names may stand this far beyond the panel, px.
const BEYOND: f64 = 4.0;

/// How the series of a panel get their names.
#[derive(Debug, Clone, PartialEq)]
pub(super) enum Naming {
    /// The panel's name says it all.
    Panel,
    /// At the ends of the lines.
    Ends(Vec<EndLabel>),
    /// In the head of the panel.
    Legend,
}

/// A name at the end of a line.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct EndLabel {
    /// Which series.
    pub(super) series: usize,
    /// Where its line ends, px.
    pub(super) line_y: f64,
    /// Where its name stands, px.
    pub(super) y: f64,
}

impl Naming {
    /// Decides for a panel whose plot runs from 0 to `height` px.
    pub(super) fn of(panel: &Panel, values: &Axis, time: &Axis, height: f64) -> Self {
        if let [only] = panel.series.as_slice()
            && (only.label == panel.label || only.label.is_empty())
        {
            return Self::Panel;
        }
        let mut ends = Vec::new();
        for (index, series) in panel.series.iter().enumerate() {
            let in_view = |point: &[f64; 2]| time.contains(point[0]);
            let Some([at, value]) = series.finite().rev().find(in_view) else {
                // A name without a line still belongs into the head.
                return Self::Legend;
            };
            let short = time.end - time.position(at);
            if short > SHORT_OF_EDGE || !values.contains(value) {
                return Self::Legend;
            }
            ends.push((index, values.position(value)));
        }
        let wanted: Vec<f64> = ends.iter().map(|&(_, y)| y).collect();
        let Some(placed) = spread(&wanted, GAP, (-BEYOND, height + BEYOND)) else {
            return Self::Legend;
        };
        if placed
            .iter()
            .zip(&wanted)
            .any(|(y, line_y)| (y - line_y).abs() > FARTHEST)
        {
            return Self::Legend;
        }
        let labels = ends.into_iter().zip(placed);
        Self::Ends(
            labels
                .map(|((series, line_y), y)| EndLabel { series, line_y, y })
                .collect(),
        )
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::plot::Series;
    use crate::style::Meaning;

    fn naming(ends: &[f64], last_time: f64) -> Naming {
        let mut panel = Panel::new("Flow", "L/min");
        panel.series = ends
            .iter()
            .map(|&end| Series::new("x", Meaning::Inlet, vec![[0.0, 0.0], [last_time, end]]))
            .collect();
        let values = Axis::new((0.0, 50.0), (100.0, 0.0), 25.0);
        let time = Axis::new((0.0, 10.0), (60.0, 860.0), 90.0);
        Naming::of(&panel, &values, &time, 100.0)
    }

    #[test]
    fn ends_where_they_fit_else_legend() {
        assert!(
            matches!(naming(&[5.0, 40.0], 10.0), Naming::Ends(_)),
            "apart"
        );
        assert!(
            matches!(naming(&[0.0; 3], 10.0), Naming::Ends(_)),
            "three at the foot"
        );
        assert_eq!(naming(&[0.0; 6], 10.0), Naming::Legend, "six at the foot");
        assert_eq!(naming(&[5.0, 40.0], 6.0), Naming::Legend, "lines end early");
        assert_eq!(
            naming(&[5.0, f64::NAN], 10.0),
            Naming::Legend,
            "a gap at the end"
        );
        assert_eq!(naming(&[5.0, 400.0], 10.0), Naming::Legend, "out of view");
    }
}
