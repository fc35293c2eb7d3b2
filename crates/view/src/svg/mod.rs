//! Figures as self-contained SVG.

mod chart;
mod chart_field;
mod chart_panel;
mod describe;
mod end_labels;
mod layout;
mod panel;
mod pen;
mod root;
mod scene;
mod sheet;
mod spread;
#[cfg(test)]
mod tests;
mod text_width;
mod xml;

use crate::plot::Figure;
use crate::style::TextSize;
use crate::theme::Theme;

pub use chart::svg_from_chart;
pub use scene::svg_from_scene;

/// At most this wide a text will be, px, in any face of the type family.
pub(crate) fn label_width(text: &str, size: TextSize) -> f64 {
    text_width::text_width(text, size)
}

/// How a figure is written.
#[derive(Debug, Clone, PartialEq)]
pub struct SvgOptions<'a> {
    /// Colours and strokes.
    pub theme: &'a Theme,
    /// Width of the whole, px; at least 320 is used.
    pub width: f64,
    /// Height of the plot of a panel of weight 1, px.
    pub panel_height: f64,
    /// Prefix of the ids inside, so that several figures can stand in one page. Letters, digits,
    /// hyphens.
    pub id: &'a str,
}

impl<'a> SvgOptions<'a> {
    /// 960 px wide, 104 px for a panel, ids that begin with `figure`.
    #[must_use]
    pub fn new(theme: &'a Theme) -> Self {
        Self {
            theme,
            width: 960.0,
            panel_height: 104.0,
            id: "figure",
        }
    }
}

/// The figure as an SVG document: self-contained, readable without a style sheet or a script, the
/// same text for the same figure. Height follows from the panels.
///
/// # Examples
/// ```
/// use helmsplit_view::plot::{Figure, Panel, Series};
/// use helmsplit_view::style::Meaning;
/// use helmsplit_view::{BuiltInTheme, SvgOptions, svg_from_figure};
///
/// let mut panel = Panel::new("Pressure", "bar");
/// panel.series.push(Series::new("Inlet", Meaning::Inlet, vec![[0.0, 0.0], [1.0, 60.0]]));
/// let figure = Figure { title: "Run-up".to_owned(), panels: vec![panel], ..Figure::default() };
///
/// let theme = BuiltInTheme::Light.load()?;
/// let svg = svg_from_figure(&figure, &SvgOptions::new(&theme));
/// assert!(svg.starts_with("<svg"));
/// # Ok::<(), helmsplit_view::ViewError>(())
/// ```
#[must_use]
pub fn svg_from_figure(figure: &Figure, options: &SvgOptions<'_>) -> String {
    let sheet = layout::Sheet::new(figure, options);
    sheet::drawn(&sheet, figure, options)
}
