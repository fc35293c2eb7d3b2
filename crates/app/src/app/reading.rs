//! What can be read of the app from outside.

use std::sync::Arc;

use helmsplit_view::plot::Figure;

use super::HelmsplitApp;
use crate::document::Document;
use crate::settings::Settings;
use crate::worker::{Answer, Failure, Quality};

impl HelmsplitApp {
    /// The circuit being edited.
    #[must_use]
    pub fn document(&self) -> &Document {
        &self.document
    }

    /// The title of the window.
    #[must_use]
    pub fn title(&self) -> &str {
        &self.title
    }

    /// What the user prefers.
    #[must_use]
    pub fn settings(&self) -> &Settings {
        &self.settings
    }

    /// The last good result.
    #[must_use]
    pub fn answer(&self) -> Option<&Answer> {
        self.answer.as_deref()
    }

    /// Whether the last good result is that of the present circuit, at full accuracy.
    #[must_use]
    pub fn is_up_to_date(&self) -> bool {
        let fits = |answer: &Arc<Answer>| {
            answer.revision == self.document.revision() && answer.quality == Quality::Final
        };
        self.answer.as_ref().is_some_and(fits) && !self.worker.is_busy()
    }

    /// Why the present circuit has no result, if that is so.
    #[must_use]
    pub fn failure(&self) -> Option<&Failure> {
        self.failure.as_ref()
    }

    /// The moment of the cursor, s.
    #[must_use]
    pub fn cursor(&self) -> f64 {
        self.view.cursor
    }

    /// The figure being shown.
    #[must_use]
    pub fn figure(&self) -> &Figure {
        &self.figure
    }
}
