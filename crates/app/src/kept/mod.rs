//! Kept runs: results that stay beside the live one, under a name, to be compared with.
//!
//! They stay through everything, also when another circuit is opened, until they are dropped. A
//! line of one is drawn wherever the live run has a line of the same panel, unit and name; their
//! figures follow the units of the window.

mod menu;
mod name_dialog;
mod strip;

use std::sync::Arc;

use helmsplit_scenario::{Scenario, UnitSystem};
use helmsplit_view::figures::solved_figure;
use helmsplit_view::plot::{Figure, Panel, Pyramid, Series};
use helmsplit_view::style::MOST_KEPT;

use crate::document::Document;
use crate::traces::Curves;
use crate::worker::{Answer, Quality};

pub(crate) use menu::runs_menu;
pub(crate) use name_dialog::{RunName, name_dialog};
pub(crate) use strip::strip;

/// Letters of a name that is proposed.
const LONGEST_PROPOSAL: usize = 40;

/// What the window asks of kept runs.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) enum KeptAction {
    /// Asks for a name to keep the present run under.
    AskToKeep,
    /// Keeps the present run under a name.
    Keep(String),
    /// Asks for another name of the run at a place.
    AskToRename(usize),
    /// Gives the run at a place another name.
    Rename(usize, String),
    /// Shows or hides the lines of the run at a place.
    Show(usize, bool),
    /// Compares with the run at a place, or with none.
    Compare(Option<usize>),
    /// Makes the circuit of the run at a place the present one.
    Restore(usize),
    /// Drops the run at a place.
    Drop(usize),
    /// Drops every kept run.
    DropAll,
}

/// Why a run was not kept or not renamed.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
pub enum KeptError {
    /// There is nothing to keep.
    #[error("there is no solved run yet")]
    NoRun,
    /// The values are still being changed.
    #[error("this is a draft, solved with a wide tolerance; keep the run once it is solved")]
    Draft,
    /// There is no place left.
    #[error("{MOST_KEPT} runs are kept already; drop one first")]
    Full,
    /// A name is missing.
    #[error("a kept run needs a name")]
    NoName,
    /// The name is taken.
    #[error("another kept run is called \"{name}\"")]
    NameTaken {
        /// The name.
        name: String,
    },
}

/// One kept run.
pub struct KeptRun {
    name: String,
    place: usize,
    shown: bool,
    answer: Arc<Answer>,
    figure: Figure,
    curves: Curves,
}

impl KeptRun {
    /// Its name.
    #[must_use]
    pub fn name(&self) -> &str {
        &self.name
    }

    /// Its number on the screen, from 1.
    #[must_use]
    pub fn number(&self) -> usize {
        self.place + 1
    }

    /// Its place among kept runs, from 0: gives dash and number.
    #[must_use]
    pub fn place(&self) -> usize {
        self.place
    }

    /// Whether its lines are drawn.
    #[must_use]
    pub fn is_shown(&self) -> bool {
        self.shown
    }

    /// The circuit that was solved.
    #[must_use]
    pub fn scenario(&self) -> &Scenario {
        &self.answer.scenario
    }

    /// Its figure, in the units of the window.
    #[must_use]
    pub fn figure(&self) -> &Figure {
        &self.figure
    }

    /// Its line that shows the same as a line of another figure, with the summary of it.
    pub(crate) fn counterpart(
        &self,
        panel: &Panel,
        series: &Series,
    ) -> Option<(&Series, &Pyramid)> {
        let same = |own: &Panel| own.label == panel.label && own.unit == panel.unit;
        let place = self.figure.panels.iter().position(same)?;
        let lines = &self.figure.panels[place].series;
        let line = lines.iter().position(|own| own.label == series.label)?;
        Some((&lines[line], self.curves.get(place, line)?))
    }

    /// Whether any of its lines has a counterpart in a figure.
    pub(crate) fn fits(&self, figure: &Figure) -> bool {
        let mut panels = figure.panels.iter();
        panels.any(|panel| {
            panel
                .series
                .iter()
                .any(|series| self.counterpart(panel, series).is_some())
        })
    }
}

/// The kept runs, at most [`MOST_KEPT`].
#[derive(Default)]
pub struct KeptRuns {
    runs: Vec<KeptRun>,
    chosen: Option<usize>,
    generation: u64,
}

impl KeptRuns {
    /// The runs by their places.
    #[must_use]
    pub fn runs(&self) -> &[KeptRun] {
        &self.runs
    }

    /// The run at a place.
    #[must_use]
    pub fn get(&self, place: usize) -> Option<&KeptRun> {
        self.runs.iter().find(|run| run.place == place)
    }

    /// The place of the run that the live one is compared with.
    #[must_use]
    pub fn chosen(&self) -> Option<usize> {
        self.chosen
    }

    /// Counts up with each change.
    pub(crate) fn generation(&self) -> u64 {
        self.generation
    }

    /// Whether there is no place left.
    #[must_use]
    pub fn is_full(&self) -> bool {
        self.runs.len() >= MOST_KEPT
    }

    /// Keeps a run under a name and compares with it; gives its place. `figure` is that of the
    /// answer in the units of the window.
    ///
    /// # Errors
    /// [`KeptError`] if it is a draft, there is no place left, or the name will not do.
    pub(crate) fn keep(
        &mut self,
        name: &str,
        answer: &Arc<Answer>,
        figure: &Figure,
    ) -> Result<usize, KeptError> {
        if answer.quality == Quality::Draft {
            return Err(KeptError::Draft);
        }
        if self.is_full() {
            return Err(KeptError::Full);
        }
        let name = self.checked(name, None)?;
        let free = (0..).find(|place| self.get(*place).is_none());
        let place = free.unwrap_or(self.runs.len());
        self.runs.push(KeptRun {
            name,
            place,
            shown: true,
            answer: Arc::clone(answer),
            figure: figure.clone(),
            curves: Curves::of(figure),
        });
        self.runs.sort_by_key(|run| run.place);
        self.chosen = Some(place);
        self.generation += 1;
        Ok(place)
    }

    /// Gives a run another name.
    ///
    /// # Errors
    /// [`KeptError`] if the name will not do.
    pub(crate) fn rename(&mut self, place: usize, name: &str) -> Result<(), KeptError> {
        let name = self.checked(name, Some(place))?;
        if let Some(run) = self.runs.iter_mut().find(|run| run.place == place) {
            run.name = name;
        }
        self.generation += 1;
        Ok(())
    }

    /// A name without spaces around it, if the run at `own` or a new one may have it.
    pub(crate) fn checked(&self, name: &str, own: Option<usize>) -> Result<String, KeptError> {
        let name = name.trim();
        if name.is_empty() {
            return Err(KeptError::NoName);
        }
        let taken = |run: &KeptRun| Some(run.place) != own && run.name == name;
        if self.runs.iter().any(taken) {
            let name = name.to_owned();
            return Err(KeptError::NameTaken { name });
        }
        Ok(name.to_owned())
    }

    /// Drops a run; gives its name.
    pub(crate) fn drop_run(&mut self, place: usize) -> Option<String> {
        let at = self.runs.iter().position(|run| run.place == place)?;
        let run = self.runs.remove(at);
        if self.chosen == Some(place) {
            self.chosen = self.runs.last().map(|run| run.place);
        }
        self.generation += 1;
        Some(run.name)
    }

    /// Drops every run.
    pub(crate) fn clear(&mut self) {
        self.runs.clear();
        self.chosen = None;
        self.generation += 1;
    }

    /// Shows or hides the lines of a run.
    pub(crate) fn set_shown(&mut self, place: usize, shown: bool) {
        if let Some(run) = self.runs.iter_mut().find(|run| run.place == place) {
            run.shown = shown;
        }
        self.generation += 1;
    }

    /// Compares with a run, or with none.
    pub(crate) fn choose(&mut self, place: Option<usize>) {
        self.chosen = place.filter(|place| self.get(*place).is_some());
        self.generation += 1;
    }

    /// Turns all figures into other units.
    pub(crate) fn convert(&mut self, units: UnitSystem) {
        for run in &mut self.runs {
            run.figure = solved_figure(&run.answer.scenario, &run.answer.solved, units);
            run.curves = Curves::of(&run.figure);
        }
        self.generation += 1;
    }

    /// A name for the present run that is free: what the last step made of the circuit, or how it
    /// came.
    pub(crate) fn proposal(&self, document: &Document) -> String {
        let step = document.undo_name().and_then(|name| {
            let (label, change) = name.split_once(", ")?;
            let (_, to) = change.rsplit_once(" to ")?;
            Some(format!("{label} {to}"))
        });
        let stem = match step {
            Some(step) if document.is_edited() => step,
            _ if document.is_edited() => "edited".to_owned(),
            _ if document.path().is_some() => "as saved".to_owned(),
            _ => "as the preset".to_owned(),
        };
        let stem: String = stem.chars().take(LONGEST_PROPOSAL).collect();
        let stem = stem.trim_end();
        let numbered = (2..).map(|number| format!("{stem} {number}"));
        let mut names = std::iter::once(stem.to_owned()).chain(numbered);
        let free = names.find(|name| self.checked(name, None).is_ok());
        free.unwrap_or_default()
    }
}
