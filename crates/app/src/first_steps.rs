//! Three hints for a new user, one at a time, each until the user did what it says.

use egui::{RichText, Ui};
use serde::{Deserialize, Serialize};

use crate::action::Action;
use crate::command::{Command, Stage};
use crate::kept::KeptAction;
use crate::look::Look;

/// Number of hints.
const COUNT: usize = 3;

/// What each hint says.
const HINTS: [&str; COUNT] = [
    "Drag the name of a value on the card, such as Spool diameter, to the right or left, or press \
     Up and Down in its field: the run is solved anew as it changes.",
    "Click a verdict in the row above, such as overshoot: the traces go to its moment, and its \
     formula, numbers and source open.",
    "Keep this run with Ctrl+K or Keep run above the traces, then change a value: the kept run stays \
     behind the live one to compare with.",
];

/// Which hints are still wanted. Kept from one start to the next.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, Serialize, Deserialize)]
#[serde(default)]
pub struct FirstSteps {
    done: [bool; COUNT],
}

impl FirstSteps {
    /// No hints any more.
    #[must_use]
    pub fn over() -> Self {
        Self {
            done: [true; COUNT],
        }
    }

    /// Whether no hint is left.
    #[must_use]
    pub fn is_over(&self) -> bool {
        self.current().is_none()
    }

    fn current(&self) -> Option<usize> {
        self.done.iter().position(|done| !done)
    }

    /// The hint in view is not wanted.
    pub(crate) fn skip(&mut self) {
        if let Some(hint) = self.current() {
            self.done[hint] = true;
        }
    }

    /// Takes note of what the user did.
    pub(crate) fn follow(&mut self, action: &Action) {
        let hint = match action {
            Action::Edit(Command::SetText { .. }, Stage::Ongoing) => 0,
            Action::Evidence(_) => 1,
            Action::Kept(KeptAction::Keep(_)) => 2,
            _ => return,
        };
        self.done[hint] = true;
    }
}

/// Draws the strip.
pub(crate) fn first_steps(ui: &mut Ui, steps: &FirstSteps, look: &Look, actions: &mut Vec<Action>) {
    let Some(hint) = steps.current() else { return };
    ui.horizontal_wrapped(|ui| {
        let count = format!("First steps, {} of {COUNT}", hint + 1);
        ui.label(RichText::new(count).color(look.quiet()));
        ui.label(HINTS[hint]);
        if hint + 1 < COUNT && ui.button("Skip this hint").clicked() {
            actions.push(Action::SkipHint);
        }
        let no_more = ui.button("No more hints");
        let no_more = no_more.on_hover_text("Help, First steps brings them back.");
        if no_more.clicked() {
            actions.push(Action::NoMoreHints);
        }
    });
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_study::CheckId;

    #[test]
    fn each_hint_goes_when_its_deed_is_done_in_any_order() {
        let mut steps = FirstSteps::default();
        assert_eq!(steps.current(), Some(0), "the first");
        steps.follow(&Action::Evidence(CheckId::Overshoot));
        assert_eq!(steps.current(), Some(0), "the first is still open");
        steps.follow(&Action::Save);
        assert_eq!(steps.current(), Some(0), "saving is no answer to a hint");
        steps.skip();
        assert_eq!(steps.current(), Some(2), "the second was done before");
        steps.follow(&Action::Kept(KeptAction::Keep("as drawn".to_owned())));
        assert!(steps.is_over(), "nothing left");
        steps.skip();
        assert_eq!(steps, FirstSteps::over(), "and it stays so");
    }

    #[test]
    fn what_is_done_survives_a_restart() {
        let mut steps = FirstSteps::default();
        steps.skip();
        let text = ron::to_string(&steps).unwrap();
        assert_eq!(ron::from_str::<FirstSteps>(&text).unwrap(), steps, "{text}");
    }
}
