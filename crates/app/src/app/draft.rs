//! The circuit that is drawn while there is no run.

use super::HelmsplitApp;

impl HelmsplitApp {
    /// Makes the present circuit, as long as there is no run to draw.
    pub(super) fn make_draft(&mut self) {
        let revision = self.document.revision();
        if self.answer.is_some() {
            self.draft = None;
        } else if self.draft.as_ref().is_none_or(|(old, _)| *old != revision) {
            let circuit = self.document.scenario().circuit().ok();
            self.draft = Some((revision, circuit));
        }
    }
}
