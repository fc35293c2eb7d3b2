//! Which panels and lines are shown, and in which order.

use std::collections::BTreeSet;

use helmsplit_view::plot::{Figure, Panel};

/// Order and visibility of panels and lines, by their names: they hold for any circuit that has
/// panels of those names.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub(crate) struct Arrangement {
    /// Names of panels from the top; empty for the order of the figure.
    order: Vec<String>,
    hidden: BTreeSet<String>,
    /// Hidden lines: panel and name.
    hidden_lines: BTreeSet<(String, String)>,
}

/// A change of the arrangement.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) enum Rearrange {
    /// Shows or hides a panel.
    Panel(String, bool),
    /// Shows or hides a line of a panel.
    Line(String, String, bool),
    /// Hides all panels but one.
    Only(String),
    /// Shows every panel and line.
    All,
    /// Moves a panel up (negative) or down among those that are shown.
    Move(String, isize),
    /// Moves a panel to the place of another one.
    To(String, String),
    /// Back to the order of the figure.
    FigureOrder,
}

impl Arrangement {
    /// Places in the figure of all panels, in the chosen order.
    pub(crate) fn all(&self, figure: &Figure) -> Vec<usize> {
        let place = |label: &String| figure.panels.iter().position(|p| p.label == *label);
        let mut places: Vec<usize> = self.order.iter().filter_map(place).collect();
        for here in 0..figure.panels.len() {
            if places.contains(&here) {
                continue;
            }
            // A panel that was never arranged stays behind its neighbour in the figure.
            let before = here.checked_sub(1);
            let at = before.and_then(|before| places.iter().position(|&place| place == before));
            places.insert(at.map_or(0, |at| at + 1), here);
        }
        places
    }

    /// Places in the figure of the panels that are shown, in the chosen order.
    pub(crate) fn shown(&self, figure: &Figure) -> Vec<usize> {
        let mut places = self.all(figure);
        places.retain(|&place| self.shows(&figure.panels[place].label));
        places
    }

    /// Positions of the lines of a panel that are shown.
    pub(crate) fn lines(&self, panel: &Panel) -> Vec<usize> {
        let shows = |&line: &usize| self.shows_line(&panel.label, &panel.series[line].label);
        (0..panel.series.len()).filter(shows).collect()
    }

    /// Whether a panel is shown.
    pub(crate) fn shows(&self, panel: &str) -> bool {
        !self.hidden.contains(panel)
    }

    /// Whether a line is shown, as far as its panel is.
    pub(crate) fn shows_line(&self, panel: &str, line: &str) -> bool {
        let same = |(of, name): &(String, String)| of == panel && name == line;
        !self.hidden_lines.iter().any(same)
    }

    /// Whether nothing is hidden.
    pub(crate) fn shows_all(&self) -> bool {
        self.hidden.is_empty() && self.hidden_lines.is_empty()
    }

    /// Whether panels stand in the order of the figure.
    pub(crate) fn is_in_figure_order(&self) -> bool {
        self.order.is_empty()
    }

    /// Makes a change.
    pub(crate) fn apply(&mut self, figure: &Figure, change: &Rearrange) {
        match change {
            Rearrange::Panel(panel, true) => {
                self.hidden.remove(panel);
            }
            Rearrange::Panel(panel, false) => {
                self.hidden.insert(panel.clone());
            }
            Rearrange::Line(panel, line, shown) => {
                let key = (panel.clone(), line.clone());
                if *shown {
                    self.hidden_lines.remove(&key);
                } else {
                    self.hidden_lines.insert(key);
                }
            }
            Rearrange::Only(panel) => {
                let others = figure.panels.iter().map(|p| &p.label);
                self.hidden = others.filter(|label| *label != panel).cloned().collect();
            }
            Rearrange::All => {
                self.hidden.clear();
                self.hidden_lines.clear();
            }
            Rearrange::Move(panel, by) => self.move_by(figure, panel, *by),
            Rearrange::To(panel, other) => self.move_to(figure, panel, other),
            Rearrange::FigureOrder => self.order.clear(),
        }
    }

    /// Past hidden panels: a step is one that is seen.
    fn move_by(&mut self, figure: &Figure, panel: &str, by: isize) {
        let shown = self.shown(figure);
        let label = |place: usize| figure.panels[place].label.as_str();
        let Some(at) = shown.iter().position(|&place| label(place) == panel) else {
            return;
        };
        let last = shown.len() - 1;
        let to = at.saturating_add_signed(by).min(last);
        self.move_to(figure, panel, label(shown[to]));
    }

    fn move_to(&mut self, figure: &Figure, panel: &str, other: &str) {
        let all = self.all(figure).into_iter();
        let mut order: Vec<String> = all.map(|p| figure.panels[p].label.clone()).collect();
        let at = |order: &[String], label: &str| order.iter().position(|other| other == label);
        let (Some(from), Some(to)) = (at(&order, panel), at(&order, other)) else {
            return;
        };
        let moved = order.remove(from);
        order.insert(to, moved);
        self.order = order;
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_view::plot::Series;
    use helmsplit_view::style::Meaning;

    fn figure(labels: &str) -> Figure {
        let panel = |label: char| Panel {
            series: vec![Series::new("line", Meaning::Inlet, Vec::new())],
            ..Panel::new(label.to_string(), "bar")
        };
        Figure {
            panels: labels.chars().map(panel).collect(),
            ..Figure::default()
        }
    }

    fn order(arrangement: &Arrangement, figure: &Figure) -> String {
        let shown = arrangement.shown(figure).into_iter();
        shown
            .map(|place| figure.panels[place].label.as_str())
            .collect()
    }

    #[test]
    fn panels_move_past_hidden_ones() {
        let figure = figure("abcd");
        let mut arrangement = Arrangement::default();
        let mut change = |change: Rearrange| {
            arrangement.apply(&figure, &change);
            order(&arrangement, &figure)
        };
        assert_eq!(change(Rearrange::Panel("b".into(), false)), "acd", "hidden");
        assert_eq!(change(Rearrange::Move("c".into(), -1)), "cad", "up by one");
        assert_eq!(change(Rearrange::Move("c".into(), -1)), "cad", "at the top");
        assert_eq!(change(Rearrange::Move("c".into(), 9)), "adc", "to the foot");
        assert_eq!(
            change(Rearrange::To("c".into(), "a".into())),
            "cad",
            "dropped there"
        );
        assert_eq!(change(Rearrange::Only("d".into())), "d", "alone");
        assert_eq!(change(Rearrange::All).len(), 4, "all again");
        assert_eq!(change(Rearrange::FigureOrder), "abcd", "as in the figure");
    }

    #[test]
    fn an_order_holds_for_circuits_with_other_panels() {
        let mut arrangement = Arrangement::default();
        arrangement.apply(&figure("abcd"), &Rearrange::To("d".into(), "a".into()));
        assert_eq!(order(&arrangement, &figure("abcd")), "dabc", "moved");
        assert_eq!(
            order(&arrangement, &figure("abxcd")),
            "dabxc",
            "x stays behind b"
        );
        assert_eq!(
            order(&arrangement, &figure("xad")),
            "xda",
            "nothing before x"
        );
        assert_eq!(order(&arrangement, &figure("")), "", "no panels");
    }

    #[test]
    fn lines_hide_in_their_own_panel_only() {
        let figure = figure("ab");
        let mut arrangement = Arrangement::default();
        let hide = Rearrange::Line("a".into(), "line".into(), false);
        arrangement.apply(&figure, &hide);
        assert!(
            arrangement.lines(&figure.panels[0]).is_empty(),
            "hidden in a"
        );
        assert_eq!(arrangement.lines(&figure.panels[1]), [0], "shown in b");
        assert!(!arrangement.shows_all(), "something is hidden");
    }
}
