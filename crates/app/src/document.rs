//! The circuit being edited: its file, whether it is saved, and the way back.

use std::path::{Path, PathBuf};

use helmsplit_scenario::presets::Preset;
use helmsplit_scenario::write::save_atomically;
use helmsplit_scenario::{FileError, Finding, Findings, Scenario};

use crate::command::{Command, Stage, Target};

/// Most undo steps that are kept.
const MOST_STEPS: usize = 500;

/// One step back or forth.
#[derive(Debug, Clone)]
struct Step {
    name: String,
    before: Scenario,
    after: Scenario,
}

/// A gesture that is not finished.
#[derive(Debug, Clone)]
struct Gesture {
    target: Target,
    before: Scenario,
}

/// The circuit with its file and its history.
#[derive(Debug, Clone)]
pub struct Document {
    scenario: Scenario,
    findings: Findings,
    path: Option<PathBuf>,
    /// What the file holds; for a new circuit, what it began as.
    saved: Scenario,
    /// The text of the file, as long as it was not rewritten.
    source: Option<String>,
    undo: Vec<Step>,
    redo: Vec<Step>,
    gesture: Option<Gesture>,
    revision: u64,
}

impl Document {
    /// A new circuit from a preset.
    ///
    /// # Errors
    /// The findings of reading the preset; a test holds that each reads.
    pub fn from_preset(preset: &Preset) -> Result<Self, Findings> {
        let scenario = preset.scenario()?;
        Ok(Self::new(scenario, None, Some(preset.text.to_owned())))
    }

    /// A circuit from a file.
    ///
    /// # Errors
    /// Every finding that prevents its use, with line and column.
    pub fn open(path: &Path) -> Result<Self, Findings> {
        let (scenario, findings) = Scenario::load(path);
        match scenario {
            Some(scenario) if !findings.has_errors() => {
                // Read once more for its comments; a file that vanished since is written anew.
                let source = std::fs::read_to_string(path).ok();
                Ok(Self::new(scenario, Some(path.to_owned()), source))
            }
            _ => Err(findings),
        }
    }

    fn new(scenario: Scenario, path: Option<PathBuf>, source: Option<String>) -> Self {
        Self {
            findings: scenario.validate(),
            saved: scenario.clone(),
            scenario,
            path,
            source,
            undo: Vec::new(),
            redo: Vec::new(),
            gesture: None,
            revision: 0,
        }
    }

    /// The circuit as it stands.
    #[must_use]
    pub fn scenario(&self) -> &Scenario {
        &self.scenario
    }

    /// What contradicts itself or is doubtful in it.
    #[must_use]
    pub fn findings(&self) -> &Findings {
        &self.findings
    }

    /// Its file, if it has one.
    #[must_use]
    pub fn path(&self) -> Option<&Path> {
        self.path.as_deref()
    }

    /// The folder of its file.
    #[must_use]
    pub fn folder(&self) -> Option<PathBuf> {
        self.path.as_deref()?.parent().map(Path::to_owned)
    }

    /// The name of its file, or `not saved yet`.
    #[must_use]
    pub fn file_name(&self) -> String {
        let name = self.path.as_deref().and_then(Path::file_name);
        name.map_or_else(
            || "not saved yet".to_owned(),
            |name| name.to_string_lossy().into_owned(),
        )
    }

    /// Whether it differs from its file.
    #[must_use]
    pub fn is_edited(&self) -> bool {
        self.scenario != self.saved
    }

    /// Counts up with each change.
    #[must_use]
    pub fn revision(&self) -> u64 {
        self.revision
    }

    /// Whether a gesture is not finished.
    #[must_use]
    pub fn in_gesture(&self) -> bool {
        self.gesture.is_some()
    }

    /// Makes a change. A gesture makes one undo step, however many changes it is made of.
    ///
    /// # Errors
    /// A finding when the value is refused; nothing is changed then.
    pub fn apply(&mut self, command: &Command, stage: Stage) -> Result<(), Finding> {
        let target = command.target();
        if self.gesture.as_ref().is_some_and(|g| g.target != target) {
            self.finish_gesture();
        }
        let mut changed = self.scenario.clone();
        let result = command.apply(&mut changed);
        if result.is_ok() {
            let before = std::mem::replace(&mut self.scenario, changed);
            if self.scenario != before {
                self.changed();
            }
            self.gesture.get_or_insert(Gesture { target, before });
        }
        if stage == Stage::Finished {
            self.finish_gesture();
        }
        result
    }

    /// Finishes the gesture, if there is one, with an undo step if it changed anything.
    pub fn finish_gesture(&mut self) {
        let Some(Gesture { target, before }) = self.gesture.take() else {
            return;
        };
        if before == self.scenario {
            return;
        }
        self.undo.push(Step {
            name: target.step_name(&before, &self.scenario),
            before,
            after: self.scenario.clone(),
        });
        self.redo.clear();
        if self.undo.len() > MOST_STEPS {
            self.undo.remove(0);
        }
    }

    /// What undo would take back.
    #[must_use]
    pub fn undo_name(&self) -> Option<&str> {
        self.undo.last().map(|step| step.name.as_str())
    }

    /// What redo would make again.
    #[must_use]
    pub fn redo_name(&self) -> Option<&str> {
        self.redo.last().map(|step| step.name.as_str())
    }

    /// Takes the last step back; `false` if there is none.
    pub fn undo(&mut self) -> bool {
        self.finish_gesture();
        let Some(step) = self.undo.pop() else {
            return false;
        };
        self.scenario = step.before.clone();
        self.redo.push(step);
        self.changed();
        true
    }

    /// Makes the last undone step again; `false` if there is none.
    pub fn redo(&mut self) -> bool {
        self.finish_gesture();
        let Some(step) = self.redo.pop() else {
            return false;
        };
        self.scenario = step.after.clone();
        self.undo.push(step);
        self.changed();
        true
    }

    fn changed(&mut self) {
        self.revision += 1;
        self.findings = self.scenario.validate();
    }

    /// The text that saving writes: the text it was read from while nothing is edited, so that
    /// comments stay; else a file with our own comments.
    #[must_use]
    pub fn text(&self) -> String {
        match &self.source {
            Some(source) if !self.is_edited() => source.clone(),
            _ => self.scenario.to_text(true),
        }
    }

    /// Saves to `path`, all or nothing, which becomes its file. Says whether the file was
    /// rewritten, so that comments of the user's own are gone.
    ///
    /// # Errors
    /// [`FileError`] if it cannot be written; the file is as it was then.
    pub fn save_as(&mut self, path: &Path) -> Result<bool, FileError> {
        self.finish_gesture();
        let text = self.text();
        let rewritten = self.source.as_ref().is_some_and(|source| *source != text);
        save_atomically(path, &text)?;
        self.path = Some(path.to_owned());
        self.saved = self.scenario.clone();
        self.source = Some(text);
        Ok(rewritten)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::PRESETS;
    use helmsplit_scenario::parameter::valve_edges::FIXED_ORIFICE_DIAMETER;

    fn document() -> Document {
        Document::from_preset(&PRESETS[0]).unwrap()
    }

    fn set(text: &str) -> Command {
        Command::SetText {
            id: FIXED_ORIFICE_DIAMETER,
            text: text.to_owned(),
        }
    }

    #[test]
    fn a_gesture_is_one_named_step() {
        let mut document = document();
        let before = document.scenario().clone();
        let first = before.value(FIXED_ORIFICE_DIAMETER).text();
        for text in ["3.6 mm", "3.5 mm", "3.4 mm"] {
            document.apply(&set(text), Stage::Ongoing).unwrap();
        }
        assert_eq!(document.undo_name(), None, "not finished yet");
        document.finish_gesture();
        let name = format!("fixed orifice diameter, {first} to 3.4 mm");
        assert_eq!(document.undo_name(), Some(name.as_str()), "one step");
        assert!(document.is_edited(), "it differs from its file");
        assert!(document.undo(), "there is a step");
        assert_eq!(*document.scenario(), before, "back at once");
        assert!(!document.is_edited(), "as saved");
        assert!(!document.undo(), "no more steps");
        assert_eq!(document.redo_name(), Some(name.as_str()), "forth again");
        assert!(document.redo(), "there is a step");
        let now = document.scenario().value(FIXED_ORIFICE_DIAMETER).text();
        assert_eq!(now, "3.4 mm", "made again");
    }

    #[test]
    fn refused_values_leave_no_trace() {
        let mut document = document();
        let before = document.scenario().clone();
        for text in ["3 bar", "0 mm", "fifty"] {
            document.apply(&set(text), Stage::Finished).unwrap_err();
        }
        assert_eq!(*document.scenario(), before, "unchanged");
        assert_eq!(document.undo_name(), None, "no step");
        assert_eq!(document.revision(), 0, "no change");
    }

    #[test]
    fn a_new_step_ends_the_way_forth() {
        let mut document = document();
        document.apply(&set("3.5 mm"), Stage::Finished).unwrap();
        document.undo();
        document.apply(&set("3.3 mm"), Stage::Finished).unwrap();
        assert_eq!(document.redo_name(), None, "another way was taken");
    }

    #[test]
    fn files_come_back_bit_for_bit() {
        let folder = tempfile::tempdir().unwrap();
        let path = folder.path().join("mine.circuit.ron");
        let mut document = document();
        assert!(
            !document.save_as(&path).unwrap(),
            "the preset as it stands, comments and all"
        );
        let text = std::fs::read_to_string(&path).unwrap();
        assert_eq!(text, PRESETS[0].text, "not a byte changed");
        document.apply(&set("0.141 in"), Stage::Finished).unwrap();
        assert!(document.save_as(&path).unwrap(), "rewritten");
        assert!(!document.is_edited(), "saved");
        let again = Document::open(&path).unwrap();
        assert_eq!(again.scenario(), document.scenario(), "every bit");
        assert!(
            std::fs::read_to_string(&path).unwrap().contains("0.141 in"),
            "as typed"
        );
    }
}
