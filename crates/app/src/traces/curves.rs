//! Lines prepared for thinning.

use helmsplit_view::plot::{Figure, Pyramid, Series};

/// The summaries of all lines of a figure, made once for each figure.
#[derive(Debug, Clone, Default)]
pub(crate) struct Curves {
    panels: Vec<Vec<Pyramid>>,
}

impl Curves {
    /// Summarises every line.
    pub(crate) fn of(figure: &Figure) -> Self {
        let pyramid = |series: &Series| Pyramid::new(&series.points);
        let panels = figure.panels.iter();
        Self {
            panels: panels
                .map(|panel| panel.series.iter().map(pyramid).collect())
                .collect(),
        }
    }

    /// The summary of a line by the places of its panel and of itself.
    pub(crate) fn get(&self, panel: usize, line: usize) -> Option<&Pyramid> {
        self.panels.get(panel)?.get(line)
    }
}
