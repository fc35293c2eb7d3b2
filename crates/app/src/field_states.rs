//! What the fields of the cards share between frames.

use std::collections::HashMap;

use egui::{Align, Rect, Response, Stroke, StrokeKind, Ui};
use helmsplit_scenario::ParameterId;

use crate::look::Look;
use crate::manoeuvre::ListStates;
use crate::spot::Spot;

/// What all fields share between frames.
#[derive(Debug, Default)]
pub(crate) struct FieldStates {
    /// The text being typed.
    pub(crate) typing: Option<(ParameterId, String)>,
    /// Texts that were refused, with the reason; the circuit keeps the last good value.
    pub(crate) refused: HashMap<ParameterId, (String, String)>,
    /// The drag under way: the value it began with in the display unit, and the way so far.
    pub(crate) drag: Option<(ParameterId, f64, f32)>,
    /// The editors of lists.
    pub(crate) lists: ListStates,
    /// The field to go to; it is to take the focus.
    sought: Option<Spot>,
    /// The field that was gone to, marked until it loses the focus.
    marked: Option<Spot>,
}

impl FieldStates {
    /// The circuit refused `text`.
    pub(crate) fn refuse(&mut self, id: ParameterId, text: String, reason: String) {
        self.refused.insert(id, (text, reason));
    }

    /// The circuit took a value.
    pub(crate) fn accept(&mut self, id: ParameterId) {
        self.refused.remove(&id);
    }

    /// Whether the field is to take the focus.
    pub(crate) fn seeks(&self, spot: Spot) -> bool {
        self.sought == Some(spot)
    }

    /// The field is to take the focus and be marked.
    pub(crate) fn go_to(&mut self, spot: Spot) {
        self.sought = Some(spot);
        self.marked = Some(spot);
    }

    /// Gives the focus to the field that is sought, and brings it into view.
    pub(crate) fn lead(&mut self, ui: &Ui, spot: Spot, response: &Response) {
        if self.sought == Some(spot) {
            if response.has_focus() {
                self.sought = None;
            } else {
                response.request_focus();
            }
            response.scroll_to_me(Some(Align::Center));
            ui.ctx().request_repaint();
        } else if self.marked == Some(spot) && !response.has_focus() {
            self.marked = None;
        }
    }

    /// Marks the row of the field that was gone to.
    pub(crate) fn mark(&self, ui: &Ui, spot: Spot, row: Rect, look: &Look) {
        if self.marked == Some(spot) {
            let stroke = Stroke::new(1.5, look.accent());
            let frame = row.expand(2.0);
            ui.painter()
                .rect_stroke(frame, 3.0, stroke, StrokeKind::Inside);
        }
    }

    /// Another circuit.
    pub(crate) fn clear(&mut self) {
        let mut lists = std::mem::take(&mut self.lists);
        lists.clear();
        *self = Self {
            lists,
            ..Self::default()
        };
    }

    /// Why the text of a parameter was refused.
    pub(crate) fn refusal(&self, id: ParameterId) -> Option<&str> {
        self.refused.get(&id).map(|(_, reason)| reason.as_str())
    }
}
