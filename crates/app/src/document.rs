//! The circuit being edited: its file, whether it is saved, and the way back.

use std::path::{Path, PathBuf};
use std::sync::Arc;

use helmsplit_scenario::presets::Preset;
use helmsplit_scenario::write::save_atomically;
use helmsplit_scenario::{FileError, Finding, Findings, Scenario};

use crate::command::{Command, Stage, Target};
use crate::files::{DiskNews, Note, Snapshot, Written, written};

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

/// What saving did to the words of the user's own in the file.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Comments {
    /// They are all there, or there was no file.
    Kept,
    /// Lists that changed were written anew, without the comments within them.
    LostInLists,
    /// The file was written anew, with our comments in place of others.
    Replaced,
}

/// The circuit with its file and its history.
#[derive(Debug, Clone)]
pub struct Document {
    scenario: Scenario,
    findings: Findings,
    path: Option<PathBuf>,
    /// What the file holds; for a new circuit, what it began as. `None` if the file is not ours:
    /// gone, or changed by somebody else.
    saved: Option<Scenario>,
    /// The text it was read from or written to last.
    source: Option<Arc<str>>,
    /// The text that we know to be in the file; `None` if the file is known to be gone.
    disk: Option<Arc<str>>,
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
        Ok(Self::new(scenario, None, Some(preset.text.into())))
    }

    /// A circuit from a file.
    ///
    /// # Errors
    /// Every finding that prevents its use, with line and column.
    pub fn open(path: &Path) -> Result<Self, Findings> {
        let (scenario, source) = read(path)?;
        // The folder we were started in may be left.
        let path = std::path::absolute(path).unwrap_or_else(|_| path.to_owned());
        Ok(Self::new(scenario, Some(path), Some(source)))
    }

    /// A circuit that was not saved when its window ended, as it was kept. It differs from its
    /// file, if it has one, by one step that can be undone.
    ///
    /// # Errors
    /// The findings of reading what was kept.
    pub(crate) fn restored(note: &Note) -> Result<Self, Findings> {
        let (scenario, findings) = Scenario::from_text(&note.title(), &note.text);
        let scenario = scenario.ok_or(findings)?;
        let file = note.file.as_deref();
        let mut document = match file.map(Self::open) {
            Some(Ok(document)) => document,
            _ => {
                let text = note.text.as_str().into();
                let path = note.file.clone();
                let mut document = Self::new(scenario.clone(), path, Some(text));
                document.disk = None;
                document.saved = None;
                document
            }
        };
        document.replace(scenario, "changes restored");
        Ok(document)
    }

    fn new(scenario: Scenario, path: Option<PathBuf>, source: Option<Arc<str>>) -> Self {
        Self {
            findings: scenario.validate(),
            saved: Some(scenario.clone()),
            scenario,
            disk: source.clone().filter(|_| path.is_some()),
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
        self.saved.as_ref() != Some(&self.scenario)
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

    /// Another circuit in place of this one, as one step.
    pub(crate) fn replace(&mut self, scenario: Scenario, name: &str) {
        self.finish_gesture();
        let before = std::mem::replace(&mut self.scenario, scenario);
        if before != self.scenario {
            self.undo.push(Step {
                name: name.to_owned(),
                before,
                after: self.scenario.clone(),
            });
            self.redo.clear();
            self.changed();
        }
    }

    /// The text that saving writes: the text it was read from, with the values that changed in
    /// their places, so that comments stay; else a file with our own comments.
    #[must_use]
    pub fn text(&self) -> String {
        self.written().text()
    }

    fn written(&self) -> Written {
        match &self.source {
            Some(source) if !self.is_edited() => Written::InPlace(source.to_string()),
            Some(source) => written(source, &self.scenario),
            None => Written::Anew(self.scenario.to_text(true)),
        }
    }

    /// Saves to `path`, all or nothing, which becomes its file. Says what became of comments of
    /// the user's own.
    ///
    /// # Errors
    /// [`FileError`] if it cannot be written; the file is as it was then.
    pub fn save_as(&mut self, path: &Path) -> Result<Comments, FileError> {
        self.finish_gesture();
        let written = self.written();
        let comments = match &written {
            Written::InPlace(_) => Comments::Kept,
            Written::ListsAnew(_) => Comments::LostInLists,
            // Without a text before there was nothing to lose.
            Written::Anew(_) if self.source.is_none() => Comments::Kept,
            Written::Anew(_) => Comments::Replaced,
        };
        let text: Arc<str> = written.text().into();
        save_atomically(path, &text)?;
        let path = std::path::absolute(path).unwrap_or_else(|_| path.to_owned());
        self.path = Some(path);
        self.saved = Some(self.scenario.clone());
        self.disk = Some(Arc::clone(&text));
        self.source = Some(text);
        Ok(comments)
    }

    /// How its file differs from what we know of it. A file that cannot be read for now differs in
    /// nothing.
    #[must_use]
    pub(crate) fn disk_news(&self) -> Option<DiskNews> {
        let known = self.disk.as_ref()?;
        match std::fs::read(self.path.as_deref()?) {
            Ok(bytes) => (bytes != known.as_bytes()).then_some(DiskNews::Changed),
            Err(error) if error.kind() == std::io::ErrorKind::NotFound => Some(DiskNews::Gone),
            Err(_) => None,
        }
    }

    /// Takes the circuit that its file holds now, as a step that can be undone.
    ///
    /// # Errors
    /// The findings of reading the file; nothing is changed then.
    pub(crate) fn reload(&mut self) -> Result<(), Findings> {
        let Some(path) = self.path.clone() else {
            return Ok(());
        };
        let (scenario, source) = read(&path)?;
        self.replace(scenario, "reload of the file");
        self.saved = Some(self.scenario.clone());
        self.disk = Some(Arc::clone(&source));
        self.source = Some(source);
        Ok(())
    }

    /// Stays with this circuit although its file was changed or removed: it counts as edited until
    /// it is saved, and what the file holds now is known.
    pub(crate) fn keep_mine(&mut self) {
        let text = self.path.as_deref().map(std::fs::read_to_string);
        self.disk = text.and_then(Result::ok).map(Into::into);
        self.saved = None;
    }

    /// Its file with the text that we know to be in it.
    #[must_use]
    pub(crate) fn known_file(&self) -> Option<(&Path, Arc<str>)> {
        Some((self.path.as_deref()?, self.disk.clone()?))
    }

    /// What to keep in case it is never saved.
    #[must_use]
    pub(crate) fn snapshot(&self) -> Snapshot {
        Snapshot {
            scenario: self.scenario.clone(),
            source: self.source.clone(),
            file: self.path.clone(),
            change: self.undo_name().unwrap_or_default().to_owned(),
        }
    }
}

/// Reads a circuit and its text.
fn read(path: &Path) -> Result<(Scenario, Arc<str>), Findings> {
    let (scenario, findings) = Scenario::load(path);
    match scenario {
        Some(scenario) if !findings.has_errors() => {
            // Read once more for its comments. If it changed in between, the text is not that of
            // the circuit, and saving finds that out; if it vanished, our own text stands in.
            let text = std::fs::read_to_string(path);
            let text = text.unwrap_or_else(|_| scenario.to_text(true));
            Ok((scenario, text.into()))
        }
        _ => Err(findings),
    }
}

#[cfg(test)]
mod tests;
