//! What of the traces is in view.

use helmsplit_view::plot::Axis;

use super::arrangement::Arrangement;
use super::curves::Curves;
use super::drawn::Drawn;

/// Shortest stretch of time that can be zoomed to, as a share of the run.
const SHORTEST: f64 = 1e-6;

/// Cursors, zoom, and which panels are shown.
pub(crate) struct TraceView {
    /// Cursor A: the moment that all readings are taken at, s.
    pub(crate) cursor: f64,
    /// Cursor B, s.
    pub(crate) second: Option<f64>,
    /// The stretch in view, s; `None` for the whole run.
    zoom: Option<(f64, f64)>,
    /// Whether the value axes follow what is in view.
    pub(crate) follow: bool,
    /// Whether the traces had the focus when they were last drawn.
    pub(crate) focused: bool,
    /// Whether the table of readings is open.
    pub(crate) table: bool,
    /// Panels and lines: which, and in which order.
    pub(crate) arrangement: Arrangement,
    /// The panel that the keys move and hide, by its name.
    pub(crate) picked: Option<String>,
    /// A panel to bring into view, by its name.
    pub(crate) reveal: Option<String>,
    /// Where a stretch to zoom to was begun, s.
    pub(crate) selecting: Option<f64>,
    /// Summaries of the lines of a figure, by its generation.
    pub(super) curves: Option<(u64, Curves)>,
    pub(super) drawn: Option<Drawn>,
}

impl Default for TraceView {
    fn default() -> Self {
        Self {
            cursor: 0.0,
            second: None,
            zoom: None,
            follow: true,
            focused: false,
            table: false,
            arrangement: Arrangement::default(),
            picked: None,
            reveal: None,
            selecting: None,
            curves: None,
            drawn: None,
        }
    }
}

impl TraceView {
    /// The stretch in view, within the whole run.
    pub(crate) fn range(&self, whole: (f64, f64)) -> (f64, f64) {
        let Some((from, to)) = self.zoom else {
            return whole;
        };
        let (from, to) = (from.max(whole.0), to.min(whole.1));
        if to - from > (whole.1 - whole.0) * SHORTEST * 0.5 {
            (from, to)
        } else {
            whole
        }
    }

    /// The time axis as it was drawn last, s over points.
    pub(crate) fn time_axis(&self) -> Option<&Axis> {
        self.drawn.as_ref().map(|drawn| &drawn.time)
    }

    /// Whether the whole run is in view.
    pub(crate) fn is_whole(&self) -> bool {
        self.zoom.is_none()
    }

    /// Shows the whole run.
    pub(crate) fn show_whole(&mut self) {
        self.zoom = None;
    }

    /// Shows a stretch; one that covers the run is the whole of it.
    pub(crate) fn show(&mut self, from: f64, to: f64, whole: (f64, f64)) {
        let least = (whole.1 - whole.0) * SHORTEST;
        let (mut from, mut to) = (from.min(to), from.max(to));
        if to - from < least {
            let middle = (from + to) / 2.0;
            (from, to) = (middle - least / 2.0, middle + least / 2.0);
        }
        if from <= whole.0 && to >= whole.1 {
            self.zoom = None;
        } else {
            self.zoom = Some((from.max(whole.0), to.min(whole.1)));
        }
    }

    /// Makes the stretch in view longer (`factor` above 1) or shorter around `around`, s.
    pub(crate) fn scale(&mut self, factor: f64, around: f64, whole: (f64, f64)) {
        let (from, to) = self.range(whole);
        let from = around - (around - from) * factor;
        let to = around + (to - around) * factor;
        self.show(from, to, whole);
    }

    /// Moves the stretch in view by a share of its length.
    pub(crate) fn pan(&mut self, share: f64, whole: (f64, f64)) {
        let (from, to) = self.range(whole);
        let way = (share * (to - from)).clamp(whole.0 - from, whole.1 - to);
        if !self.is_whole() {
            self.show(from + way, to + way, whole);
        }
    }

    /// Puts the cursor to a moment and brings it into view.
    pub(crate) fn jump(&mut self, time: f64, whole: (f64, f64)) {
        self.cursor = time.clamp(whole.0, whole.1);
        let (from, to) = self.range(whole);
        if self.cursor < from || self.cursor > to {
            let half = (to - from) / 2.0;
            let from = (self.cursor - half).clamp(whole.0, whole.1 - 2.0 * half);
            self.show(from, from + 2.0 * half, whole);
        }
    }

    /// Puts cursor B to a moment and brings it into view.
    pub(crate) fn jump_second(&mut self, time: f64, whole: (f64, f64)) {
        let first = self.cursor;
        self.jump(time, whole);
        self.second = Some(self.cursor);
        self.cursor = first;
    }

    /// The same view for a picture: what lies over the page for a moment is left out.
    pub(crate) fn for_picture(&self) -> Self {
        Self {
            cursor: self.cursor,
            second: self.second,
            zoom: self.zoom,
            follow: self.follow,
            arrangement: self.arrangement.clone(),
            ..Self::default()
        }
    }

    /// Begins anew for another circuit: the whole run from its start, with panels as arranged.
    pub(crate) fn begin_anew(&mut self) {
        *self = Self {
            follow: self.follow,
            table: self.table,
            arrangement: std::mem::take(&mut self.arrangement),
            ..Self::default()
        };
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const WHOLE: (f64, f64) = (0.0, 10.0);

    #[test]
    fn zoom_stays_within_the_run() {
        let mut view = TraceView::default();
        view.scale(0.5, 2.0, WHOLE);
        assert_eq!(view.range(WHOLE), (1.0, 6.0), "half of it around 2 s");
        view.pan(2.0, WHOLE);
        assert_eq!(view.range(WHOLE), (5.0, 10.0), "held at the end");
        view.scale(4.0, 7.0, WHOLE);
        assert!(view.is_whole(), "not beyond the run");
        view.show(3.0, 3.0, WHOLE);
        let (from, to) = view.range(WHOLE);
        assert!(to > from && to - from < 1e-3, "{from} to {to}");
    }

    #[test]
    fn a_jump_brings_the_moment_into_view() {
        let mut view = TraceView::default();
        view.show(1.0, 3.0, WHOLE);
        view.jump(9.5, WHOLE);
        let (from, to) = view.range(WHOLE);
        assert!(from <= 9.5 && 9.5 <= to, "{from} to {to}");
        assert!((to - from - 2.0).abs() < 1e-12, "as long as before");
        view.jump(99.0, WHOLE);
        assert!((view.cursor - 10.0).abs() < 1e-12, "within the run");
    }
    #[test]
    fn the_second_cursor_leaves_the_first_where_it_is() {
        let mut view = TraceView::default();
        view.jump(2.0, WHOLE);
        view.jump_second(11.0, WHOLE);
        assert_eq!(
            (view.cursor, view.second),
            (2.0, Some(10.0)),
            "held in the run"
        );
        view.table = true;
        view.begin_anew();
        assert_eq!((view.cursor, view.second), (0.0, None), "no cursors left");
        assert!(view.table, "what the user opened stays open");
    }
}
