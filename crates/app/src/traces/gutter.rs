//! The columns beside the panels: which there are, and how much room they take.

use helmsplit_view::plot::Panel;

use super::drawn::Measure;
use super::view::TraceView;
use super::{LEFT, Shown};

/// Height of a line of text, points.
pub(super) const ROW: f32 = 14.0;

/// Length of the sample of a line, points.
pub(super) const SAMPLE: f32 = 26.0;

/// Width of names and values, and of each further column, points.
pub(super) const BASE: f32 = 216.0;
pub(super) const COLUMN: f32 = 66.0;

/// Between the plot and the names, points.
pub(super) const INSET: f32 = 12.0;

/// Least width of the plot beside two further columns, and beside one, points.
const ROOM_FOR_TWO: f32 = 330.0;
const ROOM_FOR_ONE: f32 = 250.0;

/// What values are compared with.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Other {
    Second,
    /// The kept run that is chosen.
    Kept,
}

/// The columns beside the panels.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Gutter {
    pub(super) width: f32,
    pub(super) other: Option<Other>,
    /// Further columns: value and difference, difference alone, or none.
    pub(super) further: usize,
}

impl Gutter {
    /// What fits beside a plot in `width` points. Cursor B comes before a kept run: it was set
    /// last, and the table shows both.
    pub(super) fn new(shown: &Shown<'_>, view: &TraceView, width: f32) -> Self {
        let other = match (view.second, shown.kept.chosen()) {
            (Some(_), _) => Some(Other::Second),
            (None, Some(_)) => Some(Other::Kept),
            (None, None) => None,
        };
        let room = width - LEFT - BASE;
        let further = match other {
            Some(_) if room - 2.0 * COLUMN >= ROOM_FOR_TWO => 2,
            Some(_) if room - COLUMN >= ROOM_FOR_ONE => 1,
            _ => 0,
        };
        Self {
            width: BASE + further as f32 * COLUMN,
            other,
            further,
        }
    }

    /// Room for a name beside its value, points.
    pub(super) fn name_room(self) -> f32 {
        BASE - INSET - 4.0 - SAMPLE - 6.0 - COLUMN
    }

    /// Height that the names of a panel need, points.
    pub(super) fn height(self, panel: &Panel, lines: &[usize], measure: Measure<'_>) -> f32 {
        let title =
            usize::from(!is_single(panel) || self.is_long(&self.single_name(panel), measure));
        (lines.len().max(1) + title) as f32 * ROW + 2.0
    }

    /// The name of a panel of one line: with the unit where that has no room behind the value.
    pub(super) fn single_name(self, panel: &Panel) -> String {
        if self.further == 0 || panel.unit.is_empty() {
            panel.label.clone()
        } else {
            format!("{}, {}", panel.label, panel.unit)
        }
    }

    /// Whether a name leaves no room for a value beside it.
    fn is_long(self, label: &str, measure: Measure<'_>) -> bool {
        measure(label) as f32 > self.name_room()
    }
}

/// Whether the one line of a panel has the panel's name.
pub(super) fn is_single(panel: &Panel) -> bool {
    matches!(&panel.series[..], [only] if only.label == panel.label)
}
