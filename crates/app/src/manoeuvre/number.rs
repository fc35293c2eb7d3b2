//! A field for one number of a list: typed in any unit, refused texts stay with their reason.

use egui::{Align2, Id, Key, RichText, TextEdit, Ui};
use helmsplit_scenario::Value;
use helmsplit_scenario::quantity_text::{Digits, number_from_si, parse};
use helmsplit_scenario::units::Unit;

use super::state::{Cell, ListStates};
use crate::look::{Look, SMALL};
use crate::text::real_minus;

/// Digits of a number at rest.
const DIGITS: u32 = 7;

/// What a field shows.
pub(crate) struct Number<'a> {
    pub(crate) cell: Cell,
    /// Its accessible name.
    pub(crate) name: &'a str,
    pub(crate) value: &'a Value,
    /// The unit beside it or in the head of its column.
    pub(crate) unit: &'static Unit,
    pub(crate) width: f32,
}

impl Number<'_> {
    /// Draws the field; gives the text, with its unit, once one was typed and entered.
    pub(crate) fn show(&self, ui: &mut Ui, states: &mut ListStates, look: &Look) -> Option<String> {
        let rest = number_from_si(self.value.si(), self.unit, Digits::Significant(DIGITS));
        let rest = real_minus(&rest);
        let mut text = states.text(self.cell).map_or(rest, str::to_owned);
        let mut edit = TextEdit::singleline(&mut text)
            .id(self.id(ui))
            .desired_width(self.width - 8.0)
            .align(Align2::RIGHT_CENTER);
        if states.refusal(self.cell).is_some() {
            edit = edit.text_color(look.error());
        }
        let response = ui.add(edit).accessible_name(self.name);
        if response.changed() {
            states.set_typing(self.cell, text);
        }
        if !response.lost_focus() {
            return None;
        }
        let typed = states.take_typed(self.cell);
        if ui.input(|input| input.key_pressed(Key::Escape)) {
            states.forgive(self.cell);
            return None;
        }
        typed.map(|typed| completed(&typed, self.unit))
    }

    fn id(&self, ui: &Ui) -> Id {
        ui.make_persistent_id(("number of a list", self.cell))
    }

    /// What is wrong with the text, under the row.
    pub(crate) fn remark(&self, ui: &mut Ui, states: &ListStates, look: &Look) {
        let remark = |ui: &mut Ui, text: String, colour| {
            ui.label(RichText::new(text).size(SMALL).color(colour));
        };
        if let Some(refusal) = states.refusal(self.cell) {
            remark(ui, format!("Not taken: {}", refusal.reason), look.error());
        } else if let Some(typed) = states.typed(self.cell)
            && let Err(error) = parse(&completed(typed, self.unit), self.unit.quantity())
        {
            remark(ui, format!("Not yet: {error}"), look.warning());
        }
    }
}

/// A bare number gets the unit that stands beside the field.
pub(crate) fn completed(typed: &str, unit: &Unit) -> String {
    let typed = typed.trim().replace(helmsplit_view::plot::MINUS, "-");
    if typed.parse::<f64>().is_ok() && !unit.is_bare() {
        format!("{typed} {unit}")
    } else {
        typed
    }
}
