//! Charts as self-contained SVG.

use super::SvgOptions;
use super::chart_panel::PanelPainter;
use super::layout::{MARGIN, SMALL_ROW, SUBTITLE_ROW, TITLE_ROW};
use super::pen::{Text, rectangle};
use super::root::Root;
use super::text_width::wrapped;
use super::xml::{Px, Xml};
use crate::chart::{Chart, ChartPanel, LineRole};
use crate::style::TextSize;

/// A sheet is at least this wide, px.
const LEAST_WIDTH: f64 = 320.0;

/// Above a panel: its names, px; below: numbers and name of its x axis, px.
const HEAD: f64 = 24.0;
const FOOT: f64 = 44.0;

/// Height of a row of a legend, px.
pub(super) const LEGEND_ROW: f64 = 16.0;

/// The chart as an SVG document: self-contained, readable without a style sheet or a script, the
/// same text for the same chart.
///
/// # Examples
/// ```
/// use helmsplit_view::chart::{Chart, ChartAxis, ChartLine, ChartPanel, LineRole};
/// use helmsplit_view::style::{Dash, Meaning};
/// use helmsplit_view::{BuiltInTheme, SvgOptions, svg_from_chart};
///
/// let x = ChartAxis::linear("Disc hole", "mm");
/// let y = ChartAxis::linear("Damping ratio", "");
/// let mut panel = ChartPanel::new(x, y, 200.0);
/// panel.lines.push(ChartLine {
///     label: "spool".to_owned(),
///     role: LineRole::Data(Meaning::Spool, Dash::Solid),
///     points: vec![[0.4, 0.3], [0.7, -0.1]],
/// });
/// let chart = Chart { title: "Damping".to_owned(), panels: vec![panel], ..Chart::default() };
/// let theme = BuiltInTheme::Light.load()?;
/// assert!(svg_from_chart(&chart, &SvgOptions::new(&theme)).starts_with("<svg"));
/// # Ok::<(), helmsplit_view::ViewError>(())
/// ```
#[must_use]
pub fn svg_from_chart(chart: &Chart, options: &SvgOptions<'_>) -> String {
    let theme = options.theme;
    let width = options.width.max(LEAST_WIDTH).round();
    let inner = width - 2.0 * MARGIN;
    let title = wrapped(&chart.title, TextSize::Title, inner);
    let subtitle = wrapped(&chart.subtitle, TextSize::Label, inner);
    let notes: Vec<String> = chart
        .notes
        .iter()
        .flat_map(|note| wrapped(note, TextSize::Small, inner))
        .collect();
    let head = MARGIN + TITLE_ROW * title.len() as f64 + SUBTITLE_ROW * subtitle.len() as f64;
    let mut tops = Vec::with_capacity(chart.panels.len());
    let mut y = head;
    for (index, panel) in chart.panels.iter().enumerate() {
        let painter = PanelPainter::new(panel, theme, width, options.id, index);
        y += HEAD + LEGEND_ROW * painter.legend_rows() as f64;
        tops.push((y, painter));
        y += panel.height.max(1.0) + FOOT;
    }
    let height = (y + SMALL_ROW * notes.len() as f64 + MARGIN).round();
    let mut xml = Xml::default();
    open_root(&mut xml, chart, options.id, (width, height));
    let ground = rectangle((0.0, width), (0.0, height));
    xml.empty("path", &[("d", &ground), ("fill", &theme.background)]);
    let mut row = MARGIN;
    for line in &title {
        row += TITLE_ROW;
        let text = Text::new((MARGIN, row - 6.0), TextSize::Title, theme.text.ink);
        xml.write(text.strong(), line);
    }
    for line in &subtitle {
        row += SUBTITLE_ROW;
        let text = Text::new((MARGIN, row - 4.0), TextSize::Label, theme.text.quiet);
        xml.write(text, line);
    }
    for (top, painter) in &tops {
        let shift = format!("translate(0 {})", Px(*top));
        xml.open("g", &[("transform", &shift)]);
        painter.draw(&mut xml);
        xml.close();
    }
    for (note, row) in notes.iter().zip(1_u32..) {
        let at = (MARGIN, y + SMALL_ROW * f64::from(row));
        xml.write(Text::new(at, TextSize::Small, theme.text.quiet), note);
    }
    xml.finish()
}

fn open_root(xml: &mut Xml, chart: &Chart, id: &str, (width, height): (f64, f64)) {
    let root = Root {
        id,
        corner: (0.0, 0.0),
        size: (width, height),
    };
    root.open(xml, &chart.title, &described(chart));
}

/// What a reader who does not see the chart is told.
fn described(chart: &Chart) -> String {
    let panels = chart.panels.iter().map(|panel| {
        let over = format!("{} over {}", panel.y.label, panel.x.label);
        let mut parts = vec![if panel.bars.is_empty() {
            over
        } else {
            let bars = panel.bars.iter();
            let values: Vec<_> = bars.map(|b| format!("{} {}", b.label, b.text)).collect();
            values.join(", ")
        }];
        parts.extend(
            panel
                .field
                .as_ref()
                .map(|field| format!("colour: {}", field.label)),
        );
        parts.extend(names(panel));
        parts.join("; ")
    });
    let mut all = vec![chart.subtitle.clone()];
    all.extend(panels);
    all.retain(|text| !text.is_empty());
    all.join(". ")
}

fn names(panel: &ChartPanel) -> Vec<String> {
    let data = panel
        .lines
        .iter()
        .filter(|line| matches!(line.role, LineRole::Data(..) | LineRole::Border));
    let mut names: Vec<String> = data.map(|line| line.label.clone()).collect();
    names.extend(panel.points.iter().map(|point| point.label.clone()));
    names.retain(|name| !name.is_empty());
    names.dedup();
    names
}
