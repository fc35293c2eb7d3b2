//! What changes a circuit: the only ways in.

use helmsplit_scenario::choice::ChoiceId;
use helmsplit_scenario::{Finding, ParameterId, Scenario};

use crate::manoeuvre::{ListEdit, ListTarget};

/// One change of the circuit.
#[derive(Debug, Clone, PartialEq)]
pub enum Command {
    /// A parameter from text with a unit.
    SetText {
        /// Which.
        id: ParameterId,
        /// The text, such as `3.5 mm`.
        text: String,
    },
    /// A parameter back to its default.
    Reset {
        /// Which.
        id: ParameterId,
    },
    /// Another option of a choice.
    Choose {
        /// Which choice.
        id: ChoiceId,
        /// Position of the option.
        option: u8,
    },
    /// An edit of a list: breakpoints, templates, the table of the land.
    List(ListEdit),
}

/// What a command changes.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Target {
    /// A parameter.
    Parameter(ParameterId),
    /// A choice.
    Choice(ChoiceId),
    /// A list or an element of it.
    List(ListTarget),
}

/// Whether more of the same gesture is to come.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Stage {
    /// A value is being dragged or stepped: no undo step yet.
    Ongoing,
    /// The gesture is finished.
    Finished,
}

impl Command {
    /// What it changes.
    #[must_use]
    pub fn target(&self) -> Target {
        match self {
            Self::SetText { id, .. } | Self::Reset { id } => Target::Parameter(*id),
            Self::Choose { id, .. } => Target::Choice(*id),
            Self::List(edit) => Target::List(edit.target()),
        }
    }

    /// Makes the change.
    ///
    /// # Errors
    /// A finding when the value is refused; nothing is changed then.
    pub fn apply(&self, scenario: &mut Scenario) -> Result<(), Finding> {
        match self {
            Self::SetText { id, text } => scenario.set_text(*id, text),
            Self::Reset { id } => {
                scenario.reset(*id);
                Ok(())
            }
            Self::Choose { id, option } => scenario.choose(*id, *option),
            Self::List(edit) => edit.apply(scenario),
        }
    }
}

impl Target {
    /// A change of this target in words: `fixed orifice diameter, 3.7 mm to 3.5 mm`.
    #[must_use]
    pub fn step_name(self, before: &Scenario, after: &Scenario) -> String {
        let (label, from, to) = match self {
            Self::Parameter(id) => (
                id.parameter().label,
                before.value(id).text(),
                after.value(id).text(),
            ),
            Self::Choice(id) => {
                let choice = id.choice();
                let label = |scenario: &Scenario| {
                    let option = usize::from(scenario.option(id));
                    choice.options[option].label.to_lowercase()
                };
                (choice.label, label(before), label(after))
            }
            Self::List(target) => return target.step_name(before, after),
        };
        format!("{}, {from} to {to}", lower_first(label))
    }
}

fn lower_first(text: &str) -> String {
    let mut letters = text.chars();
    letters.next().map_or_else(String::new, |first| {
        first.to_lowercase().chain(letters).collect()
    })
}
