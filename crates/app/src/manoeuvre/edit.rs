//! Edits of the lists of a circuit: breakpoints, templates, and the table of the land.

use helmsplit_model::Input;
use helmsplit_scenario::manoeuvre::{Manoeuvre, Origin, TemplateKind, TemplateUse, input_row};
use helmsplit_scenario::{Finding, Scenario};

/// One edit of a list. Places count from 0; numbers are texts with a unit.
#[derive(Debug, Clone, PartialEq)]
pub enum ListEdit {
    /// Moves a breakpoint in time, value or both.
    SetPoint {
        /// Whose line.
        input: Input,
        /// Which breakpoint.
        place: usize,
        /// Time, such as `2 s`.
        time: Option<String>,
        /// Value, such as `60 rpm`.
        value: Option<String>,
    },
    /// Moves both breakpoints of a jump in time, and one of them in value.
    MoveJump {
        /// Whose line.
        input: Input,
        /// Which of the two.
        place: usize,
        /// Time of both.
        time: String,
        /// Value of the one.
        value: Option<String>,
    },
    /// Adds a breakpoint. On a line that rested until then it moves from the level at 0 s on.
    AddPoint {
        /// Whose line.
        input: Input,
        /// Time.
        time: String,
        /// Value.
        value: String,
    },
    /// Takes a breakpoint out.
    RemovePoint {
        /// Whose line.
        input: Input,
        /// Which breakpoint.
        place: usize,
    },
    /// Adds a second breakpoint at the time of one, so that the line jumps there.
    AddJump {
        /// Whose line.
        input: Input,
        /// Which breakpoint.
        place: usize,
        /// Value after the jump where no next breakpoint gives it.
        value: String,
    },
    /// Adds a template.
    AddTemplate {
        /// Which.
        kind: TemplateKind,
        /// Its begin.
        at: String,
    },
    /// Sets a number of a template.
    SetTemplate {
        /// Which template.
        place: usize,
        /// Name of the number.
        name: &'static str,
        /// The number.
        text: String,
    },
    /// Takes a template out.
    RemoveTemplate {
        /// Which template.
        place: usize,
    },
    /// Exchanges a template with the next one on its line.
    Exchange {
        /// Which template.
        place: usize,
    },
    /// Turns a template into breakpoints.
    Dissolve {
        /// Which template.
        place: usize,
    },
    /// Sets travel, area or both of a point of the land's table.
    SetLand {
        /// Which point.
        place: usize,
        /// Travel, such as `2 mm`.
        travel: Option<String>,
        /// Area, such as `30 mm2`.
        area: Option<String>,
    },
    /// Adds a point to the land's table, behind another.
    AddLand {
        /// Behind which point.
        place: usize,
    },
    /// Takes a point out of the land's table.
    RemoveLand {
        /// Which point.
        place: usize,
    },
}

/// What an edit of a list changes: edits of one target make one gesture.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum ListTarget {
    /// A breakpoint.
    Point(Input, usize),
    /// The breakpoints of a line.
    Points(Input),
    /// A number of a template.
    Number(usize, &'static str),
    /// The list of templates.
    Templates,
    /// A template, which is turned into breakpoints.
    Dissolved(usize),
    /// A point of the land's table.
    Land(usize),
    /// The points of the land's table.
    LandPoints,
}

impl ListEdit {
    /// What it changes.
    #[must_use]
    pub fn target(&self) -> ListTarget {
        match *self {
            Self::SetPoint { input, place, .. } | Self::MoveJump { input, place, .. } => {
                ListTarget::Point(input, place)
            }
            Self::AddPoint { input, .. }
            | Self::RemovePoint { input, .. }
            | Self::AddJump { input, .. } => ListTarget::Points(input),
            Self::SetTemplate { place, name, .. } => ListTarget::Number(place, name),
            Self::AddTemplate { .. } | Self::RemoveTemplate { .. } | Self::Exchange { .. } => {
                ListTarget::Templates
            }
            Self::Dissolve { place } => ListTarget::Dissolved(place),
            Self::SetLand { place, .. } => ListTarget::Land(place),
            Self::AddLand { .. } | Self::RemoveLand { .. } => ListTarget::LandPoints,
        }
    }

    /// Makes the change.
    ///
    /// # Errors
    /// A finding when it is refused; the scenario may be changed in part then.
    pub fn apply(&self, scenario: &mut Scenario) -> Result<(), Finding> {
        let lines = &mut scenario.manoeuvre;
        let text = Option::as_deref;
        match self {
            Self::SetPoint {
                input,
                place,
                time,
                value,
            } => lines.set_point(*input, *place, text(time), text(value)),
            Self::MoveJump {
                input,
                place,
                time,
                value,
            } => {
                lines.move_jump(*input, *place, time)?;
                lines.set_point(*input, *place, None, text(value))
            }
            Self::AddPoint { input, time, value } => add_point(lines, *input, time, value),
            Self::RemovePoint { input, place } => lines.remove_point(*input, *place),
            Self::AddJump {
                input,
                place,
                value,
            } => lines.add_jump(*input, *place, value).map(|_| ()),
            Self::AddTemplate { kind, at } => {
                let mut template = TemplateUse::new(*kind);
                template.set("manoeuvre.templates", "at", at)?;
                lines.add_template(template).map(|_| ())
            }
            Self::SetTemplate { place, name, text } => lines.set_template(*place, name, text),
            Self::RemoveTemplate { place } => lines.remove_template(*place),
            Self::Exchange { place } => lines.exchange_with_next(*place),
            Self::Dissolve { place } => lines.dissolve(*place).map(|_| ()),
            Self::SetLand {
                place,
                travel,
                area,
            } => {
                let table = scenario.land_table_mut();
                table.set_point(*place, text(travel), text(area))
            }
            Self::AddLand { place } => scenario.land_table_mut().add_point(*place),
            Self::RemoveLand { place } => scenario.land_table_mut().remove_point(*place),
        }
    }

    /// Whether it changes which lists and places there are.
    pub(crate) fn is_structural(&self) -> bool {
        !matches!(
            self,
            Self::SetPoint { .. }
                | Self::MoveJump { .. }
                | Self::SetTemplate { .. }
                | Self::SetLand { .. }
        )
    }
}

/// Adds a breakpoint; a line that rested until then rests on until 0 s.
fn add_point(lines: &mut Manoeuvre, input: Input, time: &str, value: &str) -> Result<(), Finding> {
    let row = input_row(input);
    let rested = lines.free(input).is_empty();
    let place = lines.add_point(input, time, value)?;
    let point = &lines.free(input)[place];
    let moves = point.time.si() > 0.0 && (point.value.si() - row.level()).abs() > 0.0;
    let leads = lines.line(row).is_ok_and(|line| {
        let first = line.points().first();
        first.is_some_and(|first| first.origin == Origin::Free(place))
    });
    if rested && moves && leads {
        lines.add_point(input, "0 s", row.default)?;
    }
    Ok(())
}
