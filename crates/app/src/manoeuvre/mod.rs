//! The manoeuvre: the strip under the traces, and the cards of everything that is a list.
//!
//! A line is edited by dragging its breakpoints on the strip or as numbers on the card of the
//! manoeuvre. A template writes a stretch of its own; it moves as a whole until it is turned into
//! breakpoints.

mod aim;
mod bars;
mod edit;
mod ground;
mod handles;
mod head;
mod land_card;
mod lines;
mod mark;
mod names;
mod number;
mod plot;
mod points_card;
mod snap;
mod stage;
mod state;
mod strip;
mod templates_card;

use egui::Ui;
use helmsplit_scenario::choice::ValveLand;

use crate::action::Action;
use crate::parts::Part;
use crate::quantity_field::{FieldContext, FieldStates};

pub use edit::{ListEdit, ListTarget};
pub(crate) use state::ListStates;
pub(crate) use strip::{reserve, strip};

/// The lists of a part, under its fields.
pub(crate) fn lists(
    ui: &mut Ui,
    part: Part,
    context: &FieldContext<'_>,
    states: &mut FieldStates,
    actions: &mut Vec<Action>,
) {
    match part.section {
        "manoeuvre" => {
            let lists = &mut states.lists;
            let line = points_card::line_choice(ui, context, lists, actions);
            templates_card::templates(ui, line, context, lists, actions);
            points_card::points(ui, line, context, lists, actions);
        }
        "valve" if context.scenario.chosen::<ValveLand>() == ValveLand::Table => {
            land_card::land(ui, context, &mut states.lists, actions);
        }
        _ => {}
    }
}
