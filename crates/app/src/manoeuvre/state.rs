//! What the editors of lists keep between frames.

use std::collections::HashMap;

use helmsplit_model::Input;
use helmsplit_scenario::{Finding, Scenario};

use super::edit::ListEdit;
use crate::command::Stage;

/// One field of a list.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub(crate) enum Cell {
    /// Time of a breakpoint.
    Time(Input, usize),
    /// Value of a breakpoint.
    Value(Input, usize),
    /// Number of a template.
    Number(usize, &'static str),
    /// Travel of a point of the land's table.
    Travel(usize),
    /// Area of a point of the land's table.
    Area(usize),
    /// Duration of the run, on the strip.
    Duration,
}

/// A text that was refused, with the reason; the circuit keeps the last good value.
#[derive(Debug, Clone)]
pub(crate) struct Refusal {
    pub(crate) text: String,
    pub(crate) reason: String,
}

/// What is being dragged.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Drag {
    /// Time and value that it began with, SI.
    pub(crate) from: (f64, f64),
    /// The other breakpoint, where it began with a jump: the two move as one then. A point that
    /// is dragged onto its neighbour does not take it along.
    pub(crate) twin: Option<usize>,
    /// The value axis while it lasts, in the display unit.
    pub(crate) axis: (f64, f64),
}

/// What to give the focus to, once it is drawn.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Wish {
    /// A breakpoint.
    Point(Input, usize),
    /// A template.
    Template(usize),
}

/// Selection, drags, and texts being typed.
#[derive(Debug)]
pub(crate) struct ListStates {
    /// Whether the strip is folded to its head.
    pub(crate) folded: bool,
    /// Whether dragging takes round times and values.
    pub(crate) snap: bool,
    /// The line being edited.
    pub(crate) line: Option<Input>,
    /// The drag under way.
    pub(crate) drag: Option<Drag>,
    pub(crate) wish: Option<Wish>,
    /// The line that the last click left for another.
    pub(crate) left: Option<Input>,
    /// Where to add a point in the next frame.
    pub(crate) add_at: Option<egui::Pos2>,
    /// Why the last gesture was refused.
    pub(crate) notice: String,
    typing: Option<(Cell, String)>,
    refused: HashMap<Cell, Refusal>,
}

impl Default for ListStates {
    fn default() -> Self {
        Self {
            folded: false,
            snap: true,
            line: None,
            drag: None,
            wish: None,
            left: None,
            add_at: None,
            notice: String::new(),
            typing: None,
            refused: HashMap::new(),
        }
    }
}

impl ListStates {
    /// Forgets what was typed; the way it looks stays.
    pub(crate) fn clear(&mut self) {
        self.typing = None;
        self.refused.clear();
        self.notice.clear();
        self.drag = None;
        self.wish = None;
    }

    /// The text in a field: being typed, refused, or `None` for the value at rest.
    pub(crate) fn text(&self, cell: Cell) -> Option<&str> {
        match &self.typing {
            Some((typed, text)) if *typed == cell => Some(text),
            _ => self.refusal(cell).map(|refusal| refusal.text.as_str()),
        }
    }

    /// The text being typed into a field.
    pub(crate) fn typed(&self, cell: Cell) -> Option<&str> {
        let typing = self.typing.as_ref().filter(|(typed, _)| *typed == cell);
        typing.map(|(_, text)| text.as_str())
    }

    pub(crate) fn set_typing(&mut self, cell: Cell, text: String) {
        self.typing = Some((cell, text));
    }

    /// Takes what was typed into a field.
    pub(crate) fn take_typed(&mut self, cell: Cell) -> Option<String> {
        let typing = self.typing.take_if(|(typed, _)| *typed == cell);
        typing.map(|(_, text)| text)
    }

    /// Why a field was refused.
    pub(crate) fn refusal(&self, cell: Cell) -> Option<&Refusal> {
        self.refused.get(&cell)
    }

    /// Goes back to the last good value.
    pub(crate) fn forgive(&mut self, cell: Cell) {
        self.refused.remove(&cell);
    }

    /// The circuit refused an edit: said at the field it was typed into, else on the strip.
    pub(crate) fn refuse(&mut self, edit: &ListEdit, stage: Stage, finding: &Finding) {
        let hint = if finding.hint.is_empty() {
            String::new()
        } else {
            format!("; {}", finding.hint)
        };
        let reason = format!("{}{hint}", finding.message);
        match cell_of(edit) {
            Some((cell, text)) if stage == Stage::Finished => {
                self.refused.insert(cell, Refusal { text, reason });
            }
            _ => self.notice = format!("Not taken: {reason}"),
        }
    }

    /// The circuit took an edit.
    pub(crate) fn accept(&mut self, edit: &ListEdit, after: &Scenario) {
        self.notice.clear();
        if let Some((cell, _)) = cell_of(edit) {
            self.refused.remove(&cell);
        }
        if edit.is_structural() {
            // Places moved: what was typed at one belongs nowhere any more.
            self.refused.clear();
            self.typing = None;
        }
        self.follow(edit, after);
    }

    /// Keeps the focus with what was edited.
    fn follow(&mut self, edit: &ListEdit, after: &Scenario) {
        let lines = &after.manoeuvre;
        let count = |input: Input| lines.free(input).len();
        match edit {
            ListEdit::AddPoint { input, time, value } => {
                let points = lines.free(*input).iter();
                let added = points
                    .rev()
                    .position(|point| point.time.text() == *time && point.value.text() == *value);
                let place = added.map(|behind| count(*input) - 1 - behind);
                self.line = Some(*input);
                self.wish = place.map(|place| Wish::Point(*input, place));
            }
            ListEdit::AddJump { input, place, .. } => {
                self.wish = Some(Wish::Point(*input, place + 1));
            }
            ListEdit::RemovePoint { input, place } => {
                let left = count(*input).checked_sub(1);
                self.wish = left.map(|last| Wish::Point(*input, (*place).min(last)));
            }
            ListEdit::AddTemplate { kind, .. } => {
                self.line = Some(kind.template().drives);
                let last = lines.templates.len().checked_sub(1);
                self.wish = last.map(Wish::Template);
            }
            _ => {}
        }
    }

    /// The line being edited: the one chosen, if the circuit has it, or the wheel's.
    pub(crate) fn line_of(&self, shown: &[Input]) -> Input {
        let chosen = self.line.filter(|line| shown.contains(line));
        let wheel = Some(Input::WheelRate).filter(|line| shown.contains(line));
        let first = shown.first().copied();
        chosen.or(wheel).or(first).unwrap_or(Input::EngineSpeed)
    }
}

/// The field that an edit comes from, with the text typed there.
fn cell_of(edit: &ListEdit) -> Option<(Cell, String)> {
    match edit {
        ListEdit::SetPoint {
            input,
            place,
            time,
            value,
        } => match (time, value) {
            (Some(time), None) => Some((Cell::Time(*input, *place), time.clone())),
            (None, Some(value)) => Some((Cell::Value(*input, *place), value.clone())),
            _ => None,
        },
        ListEdit::SetTemplate { place, name, text } => {
            Some((Cell::Number(*place, name), text.clone()))
        }
        ListEdit::SetLand {
            place,
            travel,
            area,
        } => match (travel, area) {
            (Some(travel), None) => Some((Cell::Travel(*place), travel.clone())),
            (None, Some(area)) => Some((Cell::Area(*place), area.clone())),
            _ => None,
        },
        _ => None,
    }
}

/// The lines of a circuit: the inputs that act on it, and those that something moves in vain.
pub(crate) fn lines_of(scenario: &Scenario) -> Vec<Input> {
    let shown = |input: &Input| scenario.listens_to(*input) || scenario.manoeuvre.moves(*input);
    Input::ALL.into_iter().filter(shown).collect()
}
