//! The page as a figure: what is shown, as data.

use helmsplit_view::plot::{Figure, Panel, Series, Shade, TimeAxis, ValueRange};

use crate::traces::{Shown, TraceView};

/// The figure of what is shown: visible panels in their order, visible lines, the stretch of time
/// in view, and kept runs behind.
pub(crate) fn page_figure(shown: &Shown<'_>, view: &TraceView) -> Figure {
    let whole = shown.figure.time_range();
    let range = whole.map(|whole| view.range(whole));
    let panels = view.arrangement.shown(shown.figure);
    let panel = |place: usize| {
        let panel = &shown.figure.panels[place];
        let lines = view.arrangement.lines(panel);
        Panel {
            series: lines
                .iter()
                .map(|&line| panel.series[line].clone())
                .collect(),
            ..panel.clone()
        }
    };
    let mut figure = Figure {
        time: TimeAxis {
            range,
            ..shown.figure.time.clone()
        },
        panels: panels.into_iter().map(panel).collect(),
        ..shown.figure.clone()
    };
    for run in shown.kept.runs().iter().filter(|run| run.is_shown()) {
        figure.lay_behind(run.figure(), run.place(), run.name());
    }
    if let Some(range) = range {
        for panel in &mut figure.panels {
            cut(panel, range, view.follow);
        }
    }
    figure
}

/// Leaves what is in view, with one point on either side. Where axes do not follow the zoom, the
/// values of the whole run stay in view.
fn cut(panel: &mut Panel, (from, to): (f64, f64), follow: bool) {
    if !follow && let Some((low, high)) = extent(panel) {
        panel.range = match panel.range {
            ValueRange::Data => ValueRange::Including(low, high),
            ValueRange::Including(one, other) => {
                ValueRange::Including(one.min(low), other.max(high))
            }
            fixed @ ValueRange::Fixed(..) => fixed,
        };
    }
    for Series { points, .. } in &mut panel.series {
        let end = (points.partition_point(|point| point[0] <= to) + 1).min(points.len());
        points.truncate(end);
        let start = points.partition_point(|point| point[0] < from);
        points.drain(..start.saturating_sub(1));
    }
    for Shade { points, .. } in &mut panel.shades {
        points.retain(|point| point[0] >= from && point[0] <= to);
    }
}

fn extent(panel: &Panel) -> Option<(f64, f64)> {
    let extents = panel.series.iter().filter_map(Series::extent);
    extents.reduce(|all, one| (all.0.min(one.0), all.1.max(one.1)))
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_view::style::Meaning;

    fn panel() -> Panel {
        let points = (0..=10).map(|i| [f64::from(i), f64::from(i * i)]).collect();
        Panel {
            series: vec![Series::new("line", Meaning::Inlet, points)],
            ..Panel::new("Panel", "bar")
        }
    }

    #[test]
    fn a_stretch_keeps_its_neighbours() {
        let mut panel = panel();
        cut(&mut panel, (3.5, 5.5), true);
        let times: Vec<f64> = panel.series[0].points.iter().map(|p| p[0]).collect();
        assert_eq!(times, [3.0, 4.0, 5.0, 6.0], "one on either side");
        assert_eq!(panel.range, ValueRange::Data, "axes follow");
    }

    #[test]
    fn fixed_axes_keep_the_values_of_the_whole_run() {
        let mut panel = panel();
        cut(&mut panel, (3.5, 5.5), false);
        assert_eq!(panel.range, ValueRange::Including(0.0, 100.0), "all of it");
    }
}
