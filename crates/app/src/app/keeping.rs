//! Kept runs and evidence: what the app does with results.

use helmsplit_study::{Check, CheckId};

use super::HelmsplitApp;
use crate::dialogs::Dialog;
use crate::evidence_marks::{EvidenceMarks, evidence_marks};
use crate::kept::{KeptAction, KeptError, KeptRuns, RunName};
use crate::traces::Rearrange;

impl HelmsplitApp {
    /// The moment of cursor B, s.
    #[must_use]
    pub fn second_cursor(&self) -> Option<f64> {
        self.view.second
    }

    /// The runs that are kept.
    #[must_use]
    pub fn kept(&self) -> &KeptRuns {
        &self.kept
    }

    /// The name of the run that the live one is compared with.
    pub(super) fn compared(&self) -> Option<&str> {
        let run = self.kept.get(self.kept.chosen()?)?;
        Some(run.name())
    }

    /// Does what was asked of kept runs.
    pub(super) fn act_on_kept(&mut self, action: KeptAction) {
        match action {
            KeptAction::AskToKeep => self.ask_to_keep(),
            KeptAction::Keep(name) => {
                let kept = self.keep_run(&name);
                self.named(kept, &format!("Kept as \"{}\"", name.trim()));
            }
            KeptAction::AskToRename(place) => {
                self.dialog = RunName::to_rename(&self.kept, place).map(Dialog::RunName);
            }
            KeptAction::Rename(place, name) => {
                let renamed = self.kept.rename(place, &name);
                self.named(renamed, &format!("Renamed to \"{}\"", name.trim()));
            }
            KeptAction::Show(place, shown) => self.kept.set_shown(place, shown),
            KeptAction::Compare(place) => self.kept.choose(place),
            KeptAction::Restore(place) => self.restore_kept(place),
            KeptAction::Drop(place) => {
                if let Some(name) = self.kept.drop_run(place) {
                    self.notice = format!("Dropped \"{name}\"");
                }
            }
            KeptAction::DropAll => {
                self.kept.clear();
                "Dropped all kept runs".clone_into(&mut self.notice);
            }
        }
    }

    fn ask_to_keep(&mut self) {
        let refused = match &self.answer {
            None => Some(KeptError::NoRun),
            Some(_) if self.kept.is_full() => Some(KeptError::Full),
            Some(_) => None,
        };
        match refused {
            Some(error) => self.notice = format!("Not kept: {error}"),
            None => {
                let name = self.kept.proposal(&self.document);
                self.dialog = Some(Dialog::RunName(RunName::to_keep(name)));
            }
        }
    }

    fn keep_run(&mut self, name: &str) -> Result<(), KeptError> {
        let answer = self.answer.as_ref().ok_or(KeptError::NoRun)?;
        self.kept.keep(name, answer, &self.figure).map(|_| ())
    }

    /// Closes the dialog with a notice, or says in it why the name will not do.
    fn named(&mut self, result: Result<(), KeptError>, done: &str) {
        match (result, &mut self.dialog) {
            (Ok(()), _) => {
                self.dialog = None;
                done.clone_into(&mut self.notice);
            }
            (Err(error), Some(Dialog::RunName(asked))) => {
                asked.refused = format!("Not taken: {error}.");
            }
            (Err(error), _) => self.notice = format!("Not kept: {error}"),
        }
    }

    fn restore_kept(&mut self, place: usize) {
        let Some(run) = self.kept.get(place) else {
            return;
        };
        let name = format!("circuit of the kept run \"{}\"", run.name());
        let scenario = run.scenario().clone();
        self.document.replace(scenario, &name);
        self.fields.clear();
        self.notice = format!("Restored: {name}");
    }

    fn check(&self, id: CheckId) -> Option<&Check> {
        self.checks().iter().find(|check| check.id == id)
    }

    /// What the open evidence points at in the traces.
    pub(super) fn marks(&self) -> Option<EvidenceMarks> {
        let check = self.check(self.evidence?)?;
        evidence_marks(check, &self.figure, self.settings.units)
    }

    /// Opens the evidence of a check: the cursor goes to its moment, its panel comes into view.
    pub(super) fn open_evidence(&mut self, id: CheckId) {
        self.evidence = Some(id);
        let time = self
            .check(id)
            .and_then(|check| check.evidence.as_ref()?.time);
        if let (Some(time), Some(whole)) = (time, self.figure.time_range()) {
            self.view.jump(time, whole);
        }
        if let Some(marks) = self.marks() {
            let shown = Rearrange::Panel(marks.panel.clone(), true);
            self.view.arrangement.apply(&self.figure, &shown);
            self.view.reveal = Some(marks.panel);
        }
    }
}
