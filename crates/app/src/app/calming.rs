//! Keeps drafts that come and go from making the window blink.

use egui::Context;

use super::HelmsplitApp;

/// A solve is spoken of when it takes longer than this, s.
const LONG_SOLVE: f64 = 0.3;

/// While a value is being dragged, a failure is spoken of when it lasts longer than this, s.
const LASTING_FAILURE: f64 = 0.4;

impl HelmsplitApp {
    /// Takes note of what is to be spoken of in this frame.
    pub(super) fn calm(&mut self, context: &Context) {
        self.solving
            .follow(context, self.worker.is_busy(), LONG_SOLVE);
        let wait = if self.document.in_gesture() {
            LASTING_FAILURE
        } else {
            0.0
        };
        self.trouble.follow(context, self.failure.is_some(), wait);
    }
}
