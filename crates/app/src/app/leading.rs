//! Finding things and going to them.

use super::HelmsplitApp;
use crate::dialogs::Dialog;
use crate::find::{Findable, Finder, things};
use crate::spot::Spot;

impl HelmsplitApp {
    /// Opens the finder.
    pub(super) fn find(&mut self) {
        let things = things(&Findable {
            document: &self.document,
            checks: self.checks(),
            figure: &self.figure,
            settings: &self.settings,
        });
        self.dialog = Some(Dialog::Find(Box::new(Finder::new(things))));
    }

    /// Opens the card of a field and leads the focus to it.
    pub(super) fn go_to(&mut self, spot: Spot) {
        if let Some(part) = spot.part() {
            self.selected = part;
            self.fields.go_to(spot);
        }
    }
}
