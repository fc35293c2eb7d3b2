//! Asks for the name of a run.

use egui::{Button, Id, Key, RichText, TextEdit, Ui};

use super::{KeptAction, KeptRuns};
use crate::action::Action;
use crate::look::Look;

/// A name being typed.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct RunName {
    /// The place of the run to rename; `None` to keep the present one.
    pub(crate) place: Option<usize>,
    pub(crate) name: String,
    /// Why the name that was entered will not do.
    pub(crate) refused: String,
}

impl RunName {
    /// Asks for the name of the present run.
    pub(crate) fn to_keep(name: String) -> Self {
        Self {
            place: None,
            name,
            refused: String::new(),
        }
    }

    /// Asks for another name of a run; `None` if there is none at that place.
    pub(crate) fn to_rename(kept: &KeptRuns, place: usize) -> Option<Self> {
        let run = kept.get(place)?;
        Some(Self {
            place: Some(place),
            name: run.name().to_owned(),
            refused: String::new(),
        })
    }
}

/// Draws the dialog.
pub(crate) fn name_dialog(
    ui: &mut Ui,
    asked: &mut RunName,
    look: &Look,
    actions: &mut Vec<Action>,
) {
    let (heading, verb) = match asked.place {
        None => ("Keep this run", "Keep"),
        Some(_) => ("Rename the kept run", "Rename"),
    };
    ui.heading(heading);
    if asked.place.is_none() {
        ui.label("Its lines stay behind the live ones until you drop it.");
    }
    ui.add_space(4.0);
    let label = ui.label("Name of the run");
    let field = Id::unique("run name");
    let response = ui
        .add(
            TextEdit::singleline(&mut asked.name)
                .id(field)
                .desired_width(460.0),
        )
        .labelled_by(label.id);
    if response.changed() {
        asked.refused.clear();
    }
    // Asked first: a field that takes the focus back has not lost it.
    let entered = response.lost_focus() && ui.input(|input| input.key_pressed(Key::Enter));
    if ui.memory(|memory| memory.focused().is_none()) {
        response.request_focus();
        select_all(ui, field, &asked.name);
    }
    if !asked.refused.is_empty() {
        ui.label(RichText::new(&asked.refused).color(look.error()));
    }
    ui.add_space(8.0);
    ui.horizontal(|ui| {
        let named = !asked.name.trim().is_empty();
        let clicked = ui.add_enabled(named, Button::new(verb)).clicked();
        if named && (clicked || entered) {
            let name = asked.name.clone();
            actions.push(Action::Kept(match asked.place {
                None => KeptAction::Keep(name),
                Some(place) => KeptAction::Rename(place, name),
            }));
        }
        if ui.button("Cancel").clicked() {
            actions.push(Action::CloseDialog);
        }
    });
}

/// Selects the whole name, so that typing replaces it.
fn select_all(ui: &Ui, field: Id, text: &str) {
    use egui::text::{CCursor, CCursorRange};
    let mut state = egui::TextEdit::load_state(ui.ctx(), field).unwrap_or_default();
    let end = CCursor::new(text.chars().count());
    state
        .cursor
        .set_char_range(Some(CCursorRange::two(CCursor::new(0), end)));
    state.store(ui.ctx(), field);
}
